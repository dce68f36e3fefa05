/* Water that runs through a reach, held at both ends: bed laws, advection. */
#include "support/reach.h"

static const double gravity = 9.81;

/* Levels of the two ends, and the wind. */
typedef struct run_through {
    size_t links;
    double start; /* m */
    double end;
    double stress; /* Pa */
} run_through;

static void hold_ends(void *user, double t, lee_forcing *forcing) {
    (void)t;
    const run_through *run = user;
    for (size_t f = 0; f < run->links; f++) {
        forcing->stress[f] = run->stress;
    }
    forcing->start_level = run->start;
    forcing->end_level = run->end;
}

static lee_transient *run_until_steady(const lee_channel *channel,
                                       lee_transient_options options,
                                       run_through *run, size_t steps,
                                       double dt) {
    options.start_held = true;
    options.end_held = true;
    run->links = channel->links;
    lee_transient *engine = start_engine(channel, &options, flat, &run->start);
    for (size_t k = 0; k < steps; k++) {
        assert_int_equal(lee_transient_step(engine, dt, hold_ends, run, NULL),
                         LEE_OK);
    }
    return engine;
}

/* ---- uniform flow ---- */

static const double slope = 1e-4;
static const double normal_depth = 2.5; /* m */

static double sloping(const void *numbers, double x) {
    (void)numbers;
    return -slope * x;
}

static double steeply_sloping(const void *numbers, double x) {
    return -*(const double *)numbers * x;
}

/* A film of even depth on a slope, let go at rest. */
static lee_transient *run_downhill(const lee_channel *channel,
                                   lee_transient_options options,
                                   run_through *run, double film) {
    double level[MOST_CELLS];
    options.start_held = true;
    options.end_held = true;
    run->links = channel->links;
    lee_transient *engine;
    assert_int_equal(lee_transient_new(channel, &options, &engine, NULL),
                     LEE_OK);
    for (size_t i = 0; i < channel->nodes; i++) {
        level[i] = channel->bed[i] + film;
    }
    lee_transient_start(engine, 0.0, level);
    for (int k = 0; k < 200; k++) {
        assert_int_equal(lee_transient_step(engine, 20.0, hold_ends, run, NULL),
                         LEE_OK);
    }
    return engine;
}

/* Speed of uniform flow, rho C_f u^2 = rho g H S, from each law's own text:
 * Manning H^(2/3) S^(1/2)/n, Chezy C (H S)^(1/2), log law with the depth mean
 * kappa/(ln(H/z0) - 1), constant C_f, and g S/r for linear friction. */
static void uniform_flow_runs_as_its_bed_law_says(void **state) {
    (void)state;
    const double root = sqrt(normal_depth * slope);
    const double log_mean = (log(normal_depth / 1e-3) - 1.0) / 0.40;
    const double manning = pow(normal_depth, 2.0 / 3.0) * sqrt(slope) / 0.025;
    const struct {
        lee_bed_law bed;
        double speed; /* m s-1 */
    } laws[] = {
        {{LEE_BED_MANNING, 0.025},  manning                        },
        {{LEE_BED_CHEZY, 45.0},     45.0 * root                    },
        {{LEE_BED_ROUGHNESS, 1e-3}, sqrt(gravity) * log_mean * root},
        {{LEE_BED_DRAG, 3e-3},      sqrt(gravity / 3e-3) * root    },
        {{LEE_BED_LINEAR, 2e-3},    gravity * slope / 2e-3         },
    };
    lee_channel channel = cut_reach(0.0, 4e3, 40, sloping, NULL);
    for (size_t k = 0; k < sizeof laws / sizeof laws[0]; k++) {
        lee_transient_options options = frictionless();
        options.bed = laws[k].bed;
        run_through run = {.start = normal_depth,
                           .end = normal_depth - slope * 4e3};
        lee_transient *engine =
            run_until_steady(&channel, options, &run, 4000, 30.0);
        for (size_t f = 0; f < channel.links; f++) {
            /* uniform flow is a steady state of the scheme as well; what is
             * left of the start has died over 33 h */
            assert_near_share(lee_transient_speed(engine)[f], laws[k].speed,
                              1e-6);
        }
        lee_transient_free(engine);
    }
    lee_channel_free(&channel);
}

/* 5 cm take half of the film drag beside the linear law. In the end
 * C_f u^2/H + r u = g S: the positive root. */
static void a_linear_law_and_the_film_drag_act_together(void **state) {
    (void)state;
    const double film = 0.05;
    const double steep = 1e-3;
    const double r = 5e-3;
    const double c = 0.5 * 2.5e-3 / film;
    const double speed =
        (sqrt(r * r + 4.0 * c * gravity * steep) - r) / (2.0 * c);
    /* cells of 50 m: the level given at the last face stands above the bed in
     * the middle of the last cell, half a cell further up */
    lee_channel channel = cut_reach(0.0, 1e3, 20, steeply_sloping, &steep);
    lee_transient_options options = frictionless();
    options.bed = (lee_bed_law){LEE_BED_LINEAR, r};
    options.film_drag = 2.5e-3;
    options.dry_depth = 1e-3;
    run_through run = {.start = film, .end = film - steep * 1e3};
    lee_transient *engine = run_downhill(&channel, options, &run, film);
    for (size_t f = 0; f < channel.links; f++) {
        /* uniform flow is a steady state of the scheme too; the approach,
         * some 30 s long, is done after 4000 s */
        assert_near_share(lee_transient_speed(engine)[f], speed, 1e-12);
    }
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

/* ---- roll waves ---- */

/* Manning on 1 : 100, 10 cm deep: the speed swings at the top of 4 km by a
 * ten thousandth. Returns how the swing at 3 km compares to that at 0.5 km. */
static double growth_down_a_slope(double manning) {
    enum { STEPS = 4000, SEEN = 3000, TOP = 50, FOOT = 300 };
    const double steep = 1e-2;
    const double film = 0.1;
    const double pi = acos(-1.0);
    const double period = 60.0;
    lee_channel channel = cut_reach(0.0, 4e3, 400, steeply_sloping, &steep);
    lee_transient_options options = frictionless();
    options.bed = (lee_bed_law){LEE_BED_MANNING, manning};
    options.start_held = true;
    options.end_held = true;
    run_through run = {.links = channel.links, .end = film - steep * 4e3};
    double level[MOST_CELLS];
    for (size_t i = 0; i < channel.nodes; i++) {
        level[i] = channel.bed[i] + film;
    }
    lee_transient *engine;
    assert_int_equal(lee_transient_new(&channel, &options, &engine, NULL),
                     LEE_OK);
    lee_transient_start(engine, 0.0, level);
    double low[2] = {INFINITY, INFINITY};
    double high[2] = {-INFINITY, -INFINITY};
    for (int k = 0; k < STEPS; k++) {
        run.start = film + 1e-5 * sin(2.0 * pi * k / period);
        assert_int_equal(lee_transient_step(engine, 1.0, hold_ends, &run, NULL),
                         LEE_OK);
        const double *speed = lee_transient_speed(engine);
        for (int j = 0; j < 2 && k >= SEEN; j++) {
            low[j] = fmin(low[j], speed[j == 0 ? TOP : FOOT]);
            high[j] = fmax(high[j], speed[j == 0 ? TOP : FOOT]);
        }
    }
    lee_transient_free(engine);
    lee_channel_free(&channel);
    return (high[1] - low[1]) / (high[0] - low[0]);
}

/* Uniform flow under Manning's law rolls above Froude 3/2 (Vedernikov;
 * textbook, from memory): a wave of depth, (5/3) u, then outruns the waves of
 * gravity, u + sqrt(g H). Fr = H^(1/6) S^(1/2)/(n sqrt(g)) = 1.09 and 2.18. */
static void ripples_fade_below_a_froude_number_of_three_halves(void **state) {
    (void)state;
    assert_true(growth_down_a_slope(0.02) < 0.1);
}

static void ripples_grow_above_a_froude_number_of_three_halves(void **state) {
    (void)state;
    assert_true(growth_down_a_slope(0.01) > 10.0);
}

/* ---- varied flow with wind, from an inverse ---- */

/* q = 2 m2/s, n = 0.03, tau = 0.6 Pa, depth 3 + 0.8 cos(2 pi x/2000):
 *   z_b' = -(1 - q^2/(g H^3)) H' - n^2 q^2/H^(10/3) + tau/(rho g H),
 * row macdonald_wind_*. */
static const double discharge = 2.0;

static double design_depth(double x) {
    return 3.0 + 0.8 * cos(2.0 * 3.14159265358979323846 * x / 2000.0);
}

static double design_slope(double x, double advection) {
    const double k = 2.0 * 3.14159265358979323846 / 2000.0;
    const double depth = design_depth(x);
    const double change = -0.8 * k * sin(k * x);
    const double q2 = discharge * discharge;
    return -(1.0 - advection * q2 / (gravity * depth * depth * depth)) *
               change -
           0.03 * 0.03 * q2 / pow(depth, 10.0 / 3.0) +
           0.6 / (1000.0 * gravity * depth);
}

/* Bed from 0 to x by Simpson's rule, to 1e-9 m; numbers: the share of the
 * advection term. */
static double design_bed(const void *numbers, double x) {
    const double advection = *(const double *)numbers;
    const size_t pieces = 200;
    const double h = x / (double)pieces;
    double sum = 0.0;
    for (size_t i = 0; i < pieces; i++) {
        const double start = h * (double)i;
        sum += h / 6.0 *
               (design_slope(start, advection) +
                4.0 * design_slope(start + 0.5 * h, advection) +
                design_slope(start + h, advection));
    }
    return sum;
}

static void the_designed_bed_is_the_printed_one(void **state) {
    (void)state;
    const double whole = 1.0;
    assert_near(design_bed(&whole, 500.0), 0.77175292, 1e-8);
    assert_near(design_bed(&whole, 1000.0), 1.47291616, 1e-8);
    assert_near(design_bed(&whole, 1500.0), 0.61301944, 1e-8);
    assert_near(design_bed(&whole, 2000.0), -0.19815973, 1e-8);
}

static void expect_designed_flow(double advection) {
    lee_channel channel = cut_reach(0.0, 2000.0, 100, design_bed, &advection);
    lee_transient_options options = frictionless();
    options.bed = (lee_bed_law){LEE_BED_MANNING, 0.03};
    options.has_advection = advection > 0.0;
    run_through run = {.start = 3.8,
                       .end = design_bed(&advection, 2000.0) + 3.8,
                       .stress = 0.6};
    lee_transient *engine =
        run_until_steady(&channel, options, &run, 6000, 10.0);
    const double fall = run.start - run.end;
    for (double x = 500.0; x < 1900.0; x += 500.0) {
        const double surface = design_bed(&advection, x) + design_depth(x);
        /* 1 % of the head lost, which the velocity head of 2.8 cm passes
         * fourteen times */
        assert_near(lee_transient_level_at(engine, x), surface, 0.01 * fall);
    }
    /* the speed on the narrowest section, at the face of 1000 m */
    assert_near_share(lee_transient_speed(engine)[49],
                      discharge / design_depth(1000.0), 0.01);
    lee_transient_free(engine);
    lee_channel_free(&channel);
}

static void varied_flow_in_wind_keeps_the_designed_surface(void **state) {
    (void)state;
    expect_designed_flow(1.0);
}

static void
without_advection_a_narrow_does_not_lower_the_surface(void **state) {
    (void)state;
    expect_designed_flow(0.0);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(uniform_flow_runs_as_its_bed_law_says),
        cmocka_unit_test(a_linear_law_and_the_film_drag_act_together),
        cmocka_unit_test(ripples_fade_below_a_froude_number_of_three_halves),
        cmocka_unit_test(ripples_grow_above_a_froude_number_of_three_halves),
        cmocka_unit_test(the_designed_bed_is_the_printed_one),
        cmocka_unit_test(varied_flow_in_wind_keeps_the_designed_surface),
        cmocka_unit_test(without_advection_a_narrow_does_not_lower_the_surface),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
