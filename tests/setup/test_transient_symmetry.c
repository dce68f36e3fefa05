/* What the engine may not change: rest, symmetry, volume. */
#include "support/reach.h"

/* m, unless said otherwise */
static const double length = 20e3;
static const double still = 0.0;

static lee_transient_options rough(void) {
    lee_transient_options options = frictionless();
    options.bed = (lee_bed_law){LEE_BED_MANNING, 0.025};
    return options;
}

/* ---- rest ---- */

typedef struct rough_ground {
    double heights[64];
} rough_ground;

static double rough_bed(const void *numbers, double x) {
    const rough_ground *ground = numbers;
    return ground->heights[(size_t)(x / 20e3 * 63.0)];
}

/* A bed of steps between -6 m and +3 m about a still water at 417.3 m: pools,
 * islands and dry nodes. */
static rough_ground random_ground(dice d) {
    rough_ground ground;
    for (size_t i = 0; i < 64; i++) {
        ground.heights[i] = 417.3 - 6.0 + 9.0 * random_share(&d);
    }
    return ground;
}

static void water_at_rest_over_any_bed_stays_at_rest(void **state) {
    (void)state;
    const rough_ground ground = random_ground((dice){20310110});
    const double level = 417.3;
    lee_channel channel = cut_reach(0.0, length, 40, rough_bed, &ground);
    const lee_transient_options options = rough();
    lee_transient *engine = start_engine(&channel, &options, flat, &level);
    const double volume = lee_transient_volume(engine);
    weather calm = {.links = channel.links};
    run_steps(engine, steps_or_fewer(100000, 10000), 300.0, &calm);
    size_t dry = 0;
    for (size_t i = 0; i < channel.nodes; i++) {
        const double shown = lee_transient_level(engine)[i];
        assert_near(shown, fmax(level, channel.bed[i]), 1e-12);
        dry += channel.bed[i] > level ? 1 : 0;
    }
    for (size_t f = 0; f < channel.links; f++) {
        assert_near(lee_transient_speed(engine)[f], 0.0, 1e-12);
    }
    assert_true(dry >= 5);
    assert_near_share(lee_transient_volume(engine), volume, 1e-14);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

/* A step of 2 m: 10 cm of water below it, nothing on top. */
static double one_step(const void *numbers, double x) {
    (void)numbers;
    return x < 10e3 ? 0.0 : 2.0;
}

static void a_thin_column_below_a_dry_step_does_not_move(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, 10, one_step, NULL);
    const double level = 0.1;
    const lee_transient_options options = frictionless();
    lee_transient *engine = start_engine(&channel, &options, flat, &level);
    const double volume = lee_transient_volume(engine);
    weather calm = {.links = channel.links};
    run_steps(engine, 1000, 300.0, &calm);
    for (size_t f = 0; f < channel.links; f++) {
        assert_near(lee_transient_speed(engine)[f], 0.0, 0.0);
    }
    assert_near(lee_transient_volume(engine), volume, 0.0);
    assert_near(lee_transient_level(engine)[9], 2.0, 0.0);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

/* ---- symmetries ---- */

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

static double turning_back(const void *numbers, double t) {
    return -turning(numbers, t);
}

enum { CELLS = 80, HALF_DAY = 144 };

/* Half a day of the turning storm in steps of 300 s; levels out. */
static void run_storm(const lee_channel *channel,
                      const lee_transient_options *options, double level,
                      double (*stress)(const void *, double),
                      double levels[CELLS]) {
    lee_transient *engine = start_engine(channel, options, flat, &level);
    weather storm = {channel->links, stress, NULL, level};
    run_steps(engine, HALF_DAY, 300.0, &storm);
    for (size_t i = 0; i < CELLS; i++) {
        levels[i] = lee_transient_level(engine)[i];
    }
    lee_transient_free(engine);
}

static void swap_ends(lee_channel *c) {
    for (size_t i = 0; i < c->nodes / 2; i++) {
        const size_t j = c->nodes - 1 - i;
        const double area = c->area[i];
        const double bed = c->bed[i];
        c->area[i] = c->area[j];
        c->bed[i] = c->bed[j];
        c->area[j] = area;
        c->bed[j] = bed;
    }
    for (size_t f = 0; f < c->links / 2; f++) {
        const size_t j = c->links - 1 - f;
        const double bed = c->link_bed[f];
        c->link_bed[f] = c->link_bed[j];
        c->link_bed[j] = bed;
    }
}

static void
a_mirrored_lake_in_a_mirrored_wind_has_mirrored_levels(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, CELLS, shelving, &still);
    const lee_transient_options options = rough();
    double levels[CELLS];
    double mirrored[CELLS];
    run_storm(&channel, &options, 0.0, turning, levels);
    swap_ends(&channel);
    run_storm(&channel, &options, 0.0, turning_back, mirrored);
    for (size_t i = 0; i < CELLS; i++) {
        /* the elimination runs the other way: rounding only */
        assert_near(mirrored[CELLS - 1 - i], levels[i], 1e-12);
    }
    lee_channel_free(&channel);
}

static void a_shift_of_the_datum_shifts_the_levels(void **state) {
    (void)state;
    const double datum = 1024.25; /* a sum of powers of two */
    lee_channel low = cut_reach(0.0, length, CELLS, shelving, &still);
    lee_channel high = cut_reach(0.0, length, CELLS, shelving, &datum);
    for (size_t i = 0; i < CELLS; i++) {
        low.bed[i] = ldexp(round(ldexp(low.bed[i], 20)), -20);
        high.bed[i] = low.bed[i] + datum; /* exact */
    }
    for (size_t f = 0; f + 1 < CELLS; f++) {
        low.link_bed[f] = ldexp(round(ldexp(low.link_bed[f], 20)), -20);
        high.link_bed[f] = low.link_bed[f] + datum;
    }
    const lee_transient_options options = rough();
    double here[CELLS];
    double there[CELLS];
    run_storm(&low, &options, 0.0, turning, here);
    run_storm(&high, &options, datum, turning, there);
    for (size_t i = 0; i < CELLS; i++) {
        /* the engine counts from near the bed: only the levels that it tells
         * are rounded at 1000 m, to half of 2.3e-13 m */
        assert_near(there[i] - datum, here[i], 1.2e-13);
    }
    lee_channel_free(&high);
    lee_channel_free(&low);
}

static void a_lake_twice_as_wide_has_the_same_levels(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, CELLS, shelving, &still);
    const lee_transient_options options = rough();
    double narrow[CELLS];
    double wide[CELLS];
    run_storm(&channel, &options, 0.0, turning, narrow);
    for (size_t i = 0; i < CELLS; i++) {
        channel.area[i] *= 2.0;
    }
    for (size_t f = 0; f < channel.links; f++) {
        channel.width[f] *= 2.0;
    }
    run_storm(&channel, &options, 0.0, turning, wide);
    for (size_t i = 0; i < CELLS; i++) {
        assert_near(wide[i], narrow[i], 0.0); /* powers of two: to the bit */
    }
    lee_channel_free(&channel);
}

static void no_way_of_stepping_changes_the_volume(void **state) {
    (void)state;
    lee_channel channel = cut_reach(0.0, length, CELLS, shelving, &still);
    const lee_transient_options options = rough();
    const double steps[] = {60.0, 300.0, 900.0};
    for (size_t k = 0; k < 3; k++) {
        lee_transient *engine = start_engine(&channel, &options, flat, &still);
        const double volume = lee_transient_volume(engine);
        weather storm = {channel.links, turning, NULL, 0.0};
        run_steps(engine, (size_t)(12.0 * 3600.0 / steps[k]), steps[k], &storm);
        /* transports telescope: only the sums of volumes are rounded */
        assert_near_share(lee_transient_volume(engine), volume, 1e-14);
        lee_transient_free(engine);
    }
    lee_channel_free(&channel);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(water_at_rest_over_any_bed_stays_at_rest),
        cmocka_unit_test(a_thin_column_below_a_dry_step_does_not_move),
        cmocka_unit_test(
            a_mirrored_lake_in_a_mirrored_wind_has_mirrored_levels),
        cmocka_unit_test(a_shift_of_the_datum_shifts_the_levels),
        cmocka_unit_test(a_lake_twice_as_wide_has_the_same_levels),
        cmocka_unit_test(no_way_of_stepping_changes_the_volume),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
