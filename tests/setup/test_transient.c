/* The transient engine: its forcing, what it tells, its errors. */
#include "support/reach.h"

#include "setup/transient_internal.h"

/* A canal of 20 km, bed -5 m, unless said otherwise. */
static const double length = 20e3;
static const double bottom = -5.0;
static const double still = 0.0;
static const double density = 1000.0;
static const double gravity = 9.81;

enum { CELLS = 80 };

static lee_transient_options rough(void) {
    lee_transient_options options = frictionless();
    options.bed = (lee_bed_law){LEE_BED_MANNING, 0.025};
    return options;
}

/* A shelving lake of 20 km, 4.2 m deep, with an island and dry ends, whose
 * bed stands `numbers[0]` m above the datum. */
static double shelving(const void *numbers, double x) {
    const double s = 2.0 * x / length - 1.0;
    const double island = 3.9 * exp(-pow((x - 13e3) / 900.0, 2.0));
    return *(const double *)numbers - 4.2 + 5.0 * s * s * s * s + island;
}

/* One storm that turns: 2 Pa one way for 5 h, 1.5 Pa back. */
static double turning(const void *numbers, double t) {
    (void)numbers;
    return t < 5.0 * 3600.0 ? 2.0 : -1.5;
}

static void an_inverse_cube_root_is_good_to_a_few_roundings(void **state) {
    (void)state;
    for (double x = 1e-3; x < 1e4; x *= 1.003) {
        /* two corrections of the fourth order leave the rounding of ten
         * operations */
        assert_near(inverse_cube_root(x) * cbrt(x), 1.0, 10.0 * 2.2e-16);
    }
}

/* ---- forcing ---- */

/* Notes the times it is asked for, and gives a stress of 0.2 Pa. */
typedef struct notebook {
    size_t n;
    double asked[8];
    bool fills_stress;
} notebook;

static void note_time(void *user, double t, lee_forcing *forcing) {
    notebook *book = user;
    if (book->n < 8) {
        book->asked[book->n++] = t;
    }
    if (book->fills_stress) {
        forcing->stress[0] = 0.2;
    }
    forcing->start_level = 0.0;
    forcing->end_level = 0.0;
}

static void wind_is_asked_for_in_the_middle_of_a_step(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, 10, flat, &bottom);
    const lee_transient_options options = frictionless();
    lee_transient *engine = start_engine(&channel, &options, flat, &still);
    notebook book = {.fills_stress = true};
    assert_int_equal(lee_transient_step(engine, 60.0, note_time, &book, NULL),
                     LEE_OK);
    assert_int_equal(lee_transient_step(engine, 20.0, note_time, &book, NULL),
                     LEE_OK);
    assert_int_equal(book.n, 2);
    assert_near(book.asked[0], 30.0, 0.0);
    assert_near(book.asked[1], 70.0, 0.0);
    assert_near(lee_transient_time(engine), 80.0, 0.0);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void held_levels_are_asked_for_at_the_end_of_a_step(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, 10, flat, &bottom);
    lee_transient_options options = frictionless();
    options.start_held = true;
    lee_transient *engine = start_engine(&channel, &options, flat, &still);
    notebook book = {0};
    assert_int_equal(lee_transient_step(engine, 60.0, note_time, &book, NULL),
                     LEE_OK);
    assert_int_equal(book.n, 2);
    assert_near(book.asked[0], 60.0, 0.0);
    assert_near(book.asked[1], 30.0, 0.0);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void stress_left_unfilled_is_calm(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, 10, flat, &bottom);
    const lee_transient_options options = rough();
    lee_transient *engine = start_engine(&channel, &options, flat, &still);
    notebook book = {.fills_stress = true};
    assert_int_equal(lee_transient_step(engine, 60.0, note_time, &book, NULL),
                     LEE_OK);
    const double pushed = lee_transient_speed(engine)[0];
    assert_true(pushed > 0.0);
    assert_true(lee_transient_speed(engine)[5] < 1e-3 * pushed);
    lee_transient_start(engine, 0.0, lee_transient_level(engine));
    book.fills_stress = false;
    lee_transient_start(engine, 0.0, channel.bed);
    assert_int_equal(lee_transient_step(engine, 60.0, note_time, &book, NULL),
                     LEE_OK);
    assert_near(lee_transient_speed(engine)[0], 0.0, 0.0);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

/* Long-time tilt over the outer nodes of the canal under a weak stress. */
static double steady_tilt(const lee_transient_options *options,
                          lee_forcing_at *forcing_at, void *user) {
    lee_channel channel = cut_reach(0.0, length, 50, flat, &bottom);
    lee_transient *engine = start_engine(&channel, options, flat, &still);
    for (size_t k = 0; k < 2000; k++) {
        assert_int_equal(
            lee_transient_step(engine, 300.0, forcing_at, user, NULL), LEE_OK);
    }
    const double tilt = lee_transient_level_at(engine, length) -
                        lee_transient_level_at(engine, 0.0);
    lee_transient_free(engine);
    lee_channel_free(&channel);
    return tilt;
}

static void the_return_flow_multiplies_the_tilt(void **state) {
    (void)state;
    const double stress = 0.1;
    weather light = {49, steady_stress, &stress, 0.0};
    lee_transient_options options = frictionless();
    options.is_linear = true;
    options.bed = (lee_bed_law){LEE_BED_LINEAR, 1e-4};
    const double plain = steady_tilt(&options, blow, &light);
    options.return_flow = 1.25;
    /* what is left of the seiche after 2000 steps: e^-30 */
    assert_near_share(steady_tilt(&options, blow, &light), 1.25 * plain, 1e-9);
    assert_near_share(plain, stress * length / (density * gravity * 5.0), 1e-9);
}

/* 1000 Pa more at the far end: the inverse barometer. */
static void press(void *user, double t, lee_forcing *forcing) {
    (void)t;
    const size_t links = *(const size_t *)user;
    for (size_t f = 0; f < links; f++) {
        forcing->pressure_gradient[f] = 1000.0 / 20e3;
    }
}

/* 10 hPa lower it by 0.1019368 m, dp/(rho g). */
static void higher_air_pressure_lowers_the_water(void **state) {
    (void)state;
    size_t links = 49;
    lee_transient_options options = frictionless();
    options.bed = (lee_bed_law){LEE_BED_LINEAR, 1e-4};
    assert_near(steady_tilt(&options, press, &links), -0.1019368, 1e-7);
}

/* ---- what the engine tells ---- */

/* A sloping surface over a bed that comes out of the water at 15 km. */
static double ramp_bed(const void *numbers, double x) {
    (void)numbers;
    return -3.0 + 0.2e-3 * x;
}

static double ramp_level(const void *numbers, double x) {
    (void)numbers;
    return 1e-5 * x;
}

static void levels_between_nodes_lie_on_a_line(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, 40, ramp_bed, NULL);
    const lee_transient_options options = frictionless();
    lee_transient *engine = start_engine(&channel, &options, ramp_level, NULL);
    for (double x = 250.0; x < 14000.0; x += 37.0) {
        assert_near(lee_transient_level_at(engine, x), 1e-5 * x, 1e-13);
    }
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void the_level_at_a_wall_continues_the_line(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, 40, flat, &bottom);
    const lee_transient_options options = frictionless();
    lee_transient *engine = start_engine(&channel, &options, ramp_level, NULL);
    assert_near(lee_transient_level_at(engine, 0.0), 0.0, 1e-13);
    assert_near(lee_transient_level_at(engine, length), 0.2, 1e-13);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void the_last_wet_cell_keeps_its_level_to_its_shore(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, 40, ramp_bed, NULL);
    const lee_transient_options options = frictionless();
    lee_transient *engine = start_engine(&channel, &options, ramp_level, NULL);
    /* bed and surface meet at 3 m/0.19e-3 = 15789 m: cell 30 ends at 15.5 km
     * with 0.1 m of water, the next holds less than the dry depth */
    assert_near(lee_transient_level_at(engine, 15499.0),
                lee_transient_level(engine)[30], 0.0);
    assert_true(isnan(lee_transient_level_at(engine, 15501.0)));
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void no_level_is_told_beyond_the_axis(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, 40, flat, &bottom);
    const lee_transient_options options = frictionless();
    lee_transient *engine = start_engine(&channel, &options, flat, &still);
    assert_true(isnan(lee_transient_level_at(engine, -0.1)));
    assert_true(isnan(lee_transient_level_at(engine, length + 0.1)));
    assert_true(isnan(lee_transient_level_at(engine, NAN)));
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void a_new_engine_is_dry_and_at_rest(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, 40, ramp_bed, NULL);
    const lee_transient_options options = lee_transient_defaults();
    lee_transient *engine;
    assert_int_equal(lee_transient_new(&channel, &options, &engine, NULL),
                     LEE_OK);
    assert_near(lee_transient_volume(engine), 0.0, 0.0);
    assert_near(lee_transient_time(engine), 0.0, 0.0);
    for (size_t i = 0; i < channel.nodes; i++) {
        assert_near(lee_transient_level(engine)[i], channel.bed[i], 0.0);
    }
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void every_step_is_counted(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, CELLS, shelving, &still);
    const lee_transient_options options = rough();
    lee_transient *engine = start_engine(&channel, &options, flat, &still);
    weather storm = {channel.links, turning, NULL, 0.0};
    run_steps(engine, 60, 600.0, &storm);
    const lee_transient_counts counts = lee_transient_count(engine);
    /* a halving replaces one step by two */
    assert_int_equal(counts.steps, 60 + counts.halvings);
    assert_true(counts.second_passes > 0);
    lee_transient_start(engine, 0.0, channel.bed);
    assert_int_equal(lee_transient_count(engine).steps, 0);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

/* ---- errors ---- */

static void expect_refusal(const lee_channel *channel,
                           const lee_transient_options *options,
                           const char *message) {
    lee_transient *engine;
    lee_error error = {0};
    assert_int_equal(lee_transient_new(channel, options, &engine, &error),
                     LEE_ERR_ARGUMENT);
    assert_string_equal(error.message, message);
    assert_null(engine);
}

static void options_out_of_range_are_refused_and_named(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, 4, flat, &bottom);
    lee_transient_options options = lee_transient_defaults();
    options.gravity = NAN;
    expect_refusal(&channel, &options,
                   "gravity nan is not positive and finite");
    options = lee_transient_defaults();
    options.water_density = 0.0;
    expect_refusal(&channel, &options,
                   "water density 0 is not positive and finite");
    options = lee_transient_defaults();
    options.return_flow = 0.9;
    expect_refusal(&channel, &options,
                   "return flow 0.9 is not at least 1 and finite");
    options = lee_transient_defaults();
    options.theta = 0.49;
    expect_refusal(&channel, &options, "theta 0.49 is not in [0.5, 1]");
    options = lee_transient_defaults();
    options.dry_depth = -1.0;
    expect_refusal(&channel, &options,
                   "dry depth -1 is not positive and finite");
    options = lee_transient_defaults();
    options.bed = (lee_bed_law){LEE_BED_CHEZY, 0.0};
    expect_refusal(&channel, &options,
                   "bed friction 0 is not positive and finite");
    options = rough();
    options.is_linear = true;
    expect_refusal(&channel, &options,
                   "the linear variant takes linear bed friction only");
    lee_channel_free(&channel);
}

static void a_channel_that_is_not_one_reach_is_refused(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, 4, flat, &bottom);
    const lee_transient_options options = lee_transient_defaults();
    channel.to[1] = 3;
    expect_refusal(&channel, &options,
                   "link 1 of the channel leads from node 1 to 3: not one "
                   "reach");
    channel.to[1] = 2;
    channel.classes = 3;
    expect_refusal(&channel, &options,
                   "the engine takes one reach of one class, this channel has "
                   "4 nodes, 3 links and 3 classes");
    channel.classes = 1;
    channel.area[2] = NAN;
    expect_refusal(&channel, &options,
                   "node 2 of the channel has no area, length, bed or "
                   "chainage");
    channel.area[2] = 1.0;
    channel.width[0] = 0.0;
    expect_refusal(&channel, &options,
                   "link 0 of the channel has no spacing, width or bed");
    lee_channel_free(&channel);
}

static void expect_no_step(double dt, double stress, double level,
                           const char *message) {
    lee_channel channel = cut_reach(0.0, length, 4, flat, &bottom);
    lee_transient_options options = rough();
    options.end_held = true;
    lee_transient *engine = start_engine(&channel, &options, flat, &still);
    weather wind = {channel.links, steady_stress, &stress, level};
    lee_error error = {0};
    assert_int_equal(lee_transient_step(engine, dt, blow, &wind, &error),
                     LEE_ERR_ARGUMENT);
    assert_string_equal(error.message, message);
    assert_near(lee_transient_time(engine), 0.0, 0.0);
    assert_near(lee_transient_level(engine)[3], 0.0, 0.0);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void a_step_that_cannot_be_taken_moves_nothing(void **state) {
    (void)state;
    expect_no_step(0.0, 0.0, 0.0, "a step of 0 s is not positive and finite");
    expect_no_step(NAN, 0.0, 0.0, "a step of nan s is not positive and finite");
    expect_no_step(60.0, NAN, 0.0,
                   "the stress or pressure gradient on link 0 is not finite "
                   "at 30 s");
    expect_no_step(60.0, INFINITY, 0.0,
                   "the stress or pressure gradient on link 0 is not finite "
                   "at 30 s");
    expect_no_step(60.0, 0.1, NAN,
                   "the level of a held end is not finite at 60 s");
}

/* 10 m of water beside dry ground, steps of an hour on cells of 25 m: even
 * 112 s cross far more than a cell. */
static double dam(const void *numbers, double x) {
    (void)numbers;
    return x < 500.0 ? 10.0 : 0.0;
}

static void a_current_too_fast_for_the_step_is_an_error(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, 1000.0, 40, flat, &still);
    const lee_transient_options options = frictionless();
    lee_transient *engine = start_engine(&channel, &options, dam, NULL);
    weather calm = {.links = channel.links};
    lee_error error = {0};
    assert_int_equal(lee_transient_step(engine, 3600.0, blow, &calm, &error),
                     LEE_ERR_CONVERGENCE);
    assert_non_null(strstr(error.message, "the step is too long"));
    assert_int_equal(lee_transient_count(engine).halvings, 5);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(an_inverse_cube_root_is_good_to_a_few_roundings),
        cmocka_unit_test(wind_is_asked_for_in_the_middle_of_a_step),
        cmocka_unit_test(held_levels_are_asked_for_at_the_end_of_a_step),
        cmocka_unit_test(stress_left_unfilled_is_calm),
        cmocka_unit_test(the_return_flow_multiplies_the_tilt),
        cmocka_unit_test(higher_air_pressure_lowers_the_water),
        cmocka_unit_test(levels_between_nodes_lie_on_a_line),
        cmocka_unit_test(the_level_at_a_wall_continues_the_line),
        cmocka_unit_test(the_last_wet_cell_keeps_its_level_to_its_shore),
        cmocka_unit_test(no_level_is_told_beyond_the_axis),
        cmocka_unit_test(a_new_engine_is_dry_and_at_rest),
        cmocka_unit_test(every_step_is_counted),
        cmocka_unit_test(options_out_of_range_are_refused_and_named),
        cmocka_unit_test(a_channel_that_is_not_one_reach_is_refused),
        cmocka_unit_test(a_step_that_cannot_be_taken_moves_nothing),
        cmocka_unit_test(a_current_too_fast_for_the_step_is_an_error),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
