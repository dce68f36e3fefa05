/* Water poured between steps is booked, level and current-free. */
#include "support/reach.h"

static const double still = 0.0;
static const double bottom = -5.0;
enum { CELLS = 20 };

static lee_transient *lake(lee_channel *channel) {
    *channel = cut_reach(0.0, 10e3, CELLS, flat, &bottom);
    const lee_transient_options options = frictionless();
    return start_engine(channel, &options, flat, &still);
}

static void pour_evenly(lee_transient *engine, const lee_channel *channel,
                        double height) {
    double volume[CELLS];
    for (size_t i = 0; i < CELLS; i++) {
        volume[i] = height * channel->area[i];
    }
    lee_transient_pour(engine, volume);
}

static void water_poured_evenly_lifts_the_level_by_its_height(void **state) {
    (void)state;
    lee_channel channel;
    lee_transient *engine = lake(&channel);
    pour_evenly(engine, &channel, 0.25);
    for (size_t i = 0; i < CELLS; i++) {
        assert_near(lee_transient_level(engine)[i], 0.25, 1e-14); /* rounding */
    }
    assert_near(lee_transient_inflow(engine), 0.25 * 10e6, 1e-8);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void a_level_poured_evenly_stays_at_rest(void **state) {
    (void)state;
    lee_channel channel;
    lee_transient *engine = lake(&channel);
    weather calm = {.links = channel.links};
    for (int k = 0; k < 50; k++) {
        pour_evenly(engine, &channel, 0.01);
        assert_int_equal(lee_transient_step(engine, 60.0, blow, &calm, NULL),
                         LEE_OK);
    }
    for (size_t f = 0; f + 1 < CELLS; f++) {
        assert_near(lee_transient_speed(engine)[f], 0.0, 1e-12); /* at rest */
    }
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void no_more_is_taken_than_a_node_holds(void **state) {
    (void)state;
    lee_channel channel;
    lee_transient *engine = lake(&channel);
    const double before = lee_transient_volume(engine);
    pour_evenly(engine, &channel, -7.0);
    assert_near(lee_transient_volume(engine), 0.0, 0.0);
    assert_near(lee_transient_inflow(engine), -before, 1e-8);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(water_poured_evenly_lifts_the_level_by_its_height),
        cmocka_unit_test(a_level_poured_evenly_stays_at_rest),
        cmocka_unit_test(no_more_is_taken_than_a_node_holds),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
