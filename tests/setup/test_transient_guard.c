/* The outflow limiter: no node gives more than it holds and receives. */
#include "support/reach.h"

#include "setup/transient_internal.h"

/* Four nodes, steps of 1 s, sections of 2 m2. */
static const double dt = 1.0;
static const double section = 2.0;

static lee_transient *hold(lee_channel *channel, const double volume[4],
                           const double transport[3], bool start_held) {
    const double ground = 0.0;
    *channel = cut_reach(0.0, 4.0, 4, flat, &ground);
    lee_transient_options options = frictionless();
    options.start_held = start_held;
    lee_transient *engine = start_engine(channel, &options, flat, &ground);
    for (size_t i = 0; i < 4; i++) {
        engine->now.volume[i] = volume[i];
    }
    for (size_t f = 0; f < 3; f++) {
        engine->section[f] = section;
        engine->transport[f] = transport[f];
        engine->next.speed[f] = transport[f] / section;
    }
    return engine;
}

static void expect_limited(const double volume[4], const double transport[3],
                           bool start_held, const double expected[3]) {
    lee_channel channel;
    lee_transient *engine = hold(&channel, volume, transport, start_held);
    bool is_cut = false;
    for (size_t f = 0; f < 3; f++) {
        is_cut = is_cut || fabs(expected[f] - transport[f]) > 0.0;
    }
    assert_true(lee_transient_limit(engine, dt) == is_cut);
    for (size_t f = 0; f < 3; f++) {
        assert_near(engine->transport[f], expected[f], 1e-15);
        assert_near(engine->next.speed[f], expected[f] / section, 1e-15);
    }
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void water_that_is_there_flows_unhindered(void **state) {
    (void)state;
    const double volume[] = {5.0, 2.0, 2.0, 2.0};
    const double transport[] = {5.0, 6.0, -3.0};
    const double same[] = {5.0, 6.0, -2.0};
    const double expected[] = {5.0, 6.0, -2.0};
    expect_limited(volume, same, false, expected);
    expect_limited(volume, transport, false, expected);
}

static void a_node_gives_what_it_holds_and_the_next_what_it_got(void **state) {
    (void)state;
    const double volume[] = {1.0, 0.0, 10.0, 1.0};
    const double transport[] = {5.0, 3.0, 2.0};
    const double expected[] = {1.0, 1.0, 2.0};
    expect_limited(volume, transport, false, expected);
}

static void water_running_against_the_axis_is_cut_alike(void **state) {
    (void)state;
    const double volume[] = {1.0, 10.0, 0.0, 1.0};
    const double transport[] = {-2.0, -3.0, -5.0};
    const double expected[] = {-2.0, -1.0, -1.0};
    expect_limited(volume, transport, false, expected);
}

static void a_node_that_gives_on_both_sides_gives_in_proportion(void **state) {
    (void)state;
    const double volume[] = {0.0, 2.0, 0.0, 0.0};
    const double transport[] = {-1.0, 3.0, 0.0};
    const double expected[] = {-0.5, 1.5, 0.0};
    expect_limited(volume, transport, false, expected);
}

static void a_held_node_gives_what_is_asked(void **state) {
    (void)state;
    const double volume[] = {1.0, 0.0, 0.0, 0.0};
    const double transport[] = {5.0, 4.0, 0.0};
    expect_limited(volume, transport, true, transport);
}

/* A mesa of one cell with 0.5 m of water on it and dry ground 3 m below on
 * either side: it runs off both ways at once, faster than a step is short. */
static double mesa(const void *numbers, double x) {
    return fabs(x - 5050.0) < 50.0 ? *(const double *)numbers : -3.0;
}

static void a_limited_step_keeps_the_volume_and_owes_nothing(void **state) {
    (void)state;
    const double rock = 0.0;
    const double water = 0.5;
    lee_channel channel = cut_reach(0.0, 10.1e3, 101, mesa, &rock);
    const lee_transient_options options = frictionless();
    lee_transient *engine = start_engine(&channel, &options, mesa, &water);
    const double volume = lee_transient_volume(engine);
    weather calm = {.links = channel.links};
    for (size_t n = 0; n < 200; n++) {
        run_steps(engine, 1, 20.0, &calm);
        for (size_t i = 0; i < channel.nodes; i++) {
            assert_true(engine->now.volume[i] >= 0.0);
        }
    }
    assert_true(lee_transient_count(engine).limited > 0);
    assert_near_share(lee_transient_volume(engine), volume, 1e-14);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(water_that_is_there_flows_unhindered),
        cmocka_unit_test(a_node_gives_what_it_holds_and_the_next_what_it_got),
        cmocka_unit_test(water_running_against_the_axis_is_cut_alike),
        cmocka_unit_test(a_node_that_gives_on_both_sides_gives_in_proportion),
        cmocka_unit_test(a_held_node_gives_what_is_asked),
        cmocka_unit_test(a_limited_step_keeps_the_volume_and_owes_nothing),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
