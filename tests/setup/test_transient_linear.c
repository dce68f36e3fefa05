/* The linear variant reproduces the closed forms of linear long waves.
 *
 * The canal of the wind checks: L = 20 km, h = 5 m, tau = 0.5 Pa from rest,
 * rho = 1000, g = 9.81; T1 = 2L/c = 5711.3725 s, steady ends +-0.101936799 m.
 * A sudden wind makes a kinked (triangle) wave: levels at the ends are
 * compared where the kink turns, so those rows need fine cells and steps. */
#include "support/reach.h"

#include <complex.h>

static const double pi = 3.14159265358979323846;
static const double length = 20e3;
static const double depth = 5.0;
static const double bottom = -5.0;
static const double stress = 0.5;
static const double density = 1000.0;
static const double gravity = 9.81;
static const double period = 5711.3725;   /* T1, s, Merian (1828) */
static const double steady = 0.101936799; /* m, half the tilt     */

typedef struct resolution {
    size_t cells;
    size_t steps_a_period; /* of T1 */
    double theta;
    double friction; /* r, s-1 */
} resolution;

static const resolution common = {200, 380, 0.52, 0.0};
static const resolution fine = {1600, 3040, 0.501, 0.0};

typedef struct trial {
    lee_channel channel;
    lee_transient *engine;
    double dt;
} trial;

static void dig(trial *canal, const resolution *setting, bool start_held,
                height_at *level, const void *numbers) {
    lee_transient_options options = frictionless();
    options.is_linear = true;
    options.theta = setting->theta;
    options.start_held = start_held;
    if (setting->friction > 0.0) {
        options.bed = (lee_bed_law){LEE_BED_LINEAR, setting->friction};
    }
    canal->channel = cut_reach(0.0, length, setting->cells, flat, &bottom);
    canal->dt = period / (double)setting->steps_a_period;
    canal->engine = start_engine(&canal->channel, &options, level, numbers);
}

static void dig_still(trial *canal, const resolution *setting) {
    const double still = 0.0;
    dig(canal, setting, false, flat, &still);
}

static void fill_in(trial *canal) {
    lee_transient_free(canal->engine);
    lee_channel_free(&canal->channel);
}

static weather steady_wind(const trial *canal) {
    return (weather){canal->channel.links, steady_stress, &stress, 0.0};
}

static double lee_wall(const trial *canal) {
    return lee_transient_level_at(canal->engine, length);
}

/* ---- sudden wind ---- */

/* The even extension, of period 2L, of x - L/2. */
static double triangle(double x) {
    const double phase = fabs(remainder(x, 2.0 * length));
    return phase - 0.5 * length;
}

/* Steady tilt less the free wave that started as its mirror image (d'Alembert
 * and images). */
static double sudden(double x, double t) {
    const double c = sqrt(gravity * depth);
    const double slope = stress / (density * gravity * depth);
    return slope * (x - 0.5 * length -
                    0.5 * (triangle(x - c * t) + triangle(x + c * t)));
}

static void a_sudden_wind_raises_the_triangle_of_the_closed_form(void **state) {
    (void)state;
    trial canal;
    dig_still(&canal, &common);
    weather wind = steady_wind(&canal);
    /* quarters of T1 as 95 steps each: at T1/4, T1/2 and T1 */
    const size_t quarters[] = {1, 1, 2};
    for (size_t k = 0; k < 3; k++) {
        run_steps(canal.engine, 95 * quarters[k], canal.dt, &wind);
        const double t = lee_transient_time(canal.engine);
        const double *level = lee_transient_level(canal.engine);
        double sum = 0.0;
        for (size_t i = 0; i < canal.channel.nodes; i++) {
            sum += fabs(level[i] - sudden(canal.channel.chainage[i], t));
        }
        /* the goal of the check: 1 % of steady, in the space mean */
        assert_near(sum / (double)canal.channel.nodes, 0.0, 0.01 * steady);
    }
    fill_in(&canal);
}

/* eta(L) = S c t to T1/2, so half of steady at T1/8, steady at T1/4, twice at
 * T1/2; u = g S t in the middle to T1/4, 0 again at T1/2. Rows
 * step_undamped_*. Where a kink passes the grid rounds it by some 3 %. */
static void a_sudden_wind_drives_the_current_of_the_closed_form(void **state) {
    (void)state;
    const resolution eighths = {200, 400, 0.52, 0.0};
    const double current = 0.1427836; /* m s-1 */
    const struct {
        size_t eighths; /* of T1, since the row before */
        double wall;    /* m, at x = L     */
        double wall_share;
        double middle; /* m s-1, at x = L/2 */
        double middle_share;
    } rows[] = {
        {1, 0.050968400, 0.01, 0.0713922, 0.01},
        {1, 0.101936799, 0.01, 0.1427836, 0.04},
        {2, 0.203873598, 0.04, 0.0,       0.01},
    };
    trial canal;
    dig_still(&canal, &eighths);
    weather wind = steady_wind(&canal);
    for (size_t k = 0; k < 3; k++) {
        run_steps(canal.engine, 50 * rows[k].eighths, canal.dt, &wind);
        assert_near(lee_wall(&canal), rows[k].wall,
                    rows[k].wall_share * steady);
        assert_near(lee_transient_speed(canal.engine)[99], rows[k].middle,
                    rows[k].middle_share * current);
    }
    fill_in(&canal);
}

static const double friction_at[] = {0.25, 0.5, 1.0, 2.0, 5.0}; /* T1 */

/* Rows step_friction_*: the sum over odd modes of the damped closed form,
 * evaluated to the printed digits. */
static const struct {
    double friction;  /* r, s-1 */
    double levels[5]; /* m, at x = L */
} friction_rows[] = {
    {2e-5, {0.1012121, 0.2009996, 0.0056589, 0.0110037, 0.0253227}},
    {1e-4, {0.0984221, 0.1902950, 0.0253419, 0.0443855, 0.0775285}},
    {2e-4, {0.0951474, 0.1784674, 0.0444820, 0.0695713, 0.0961696}},
    {1e-3, {0.0754642, 0.1217640, 0.0987206, 0.1019596, 0.1019348}},
    {5e-3, {0.0414377, 0.0597812, 0.0815899, 0.0971946, 0.1018748}},
};

static void compare_friction_row(size_t row, resolution setting,
                                 double tolerance) {
    setting.friction = friction_rows[row].friction;
    trial canal;
    dig_still(&canal, &setting);
    weather wind = steady_wind(&canal);
    double done = 0.0;
    for (size_t k = 0; k < 5; k++) {
        const double more = friction_at[k] - done;
        done = friction_at[k];
        run_steps(canal.engine,
                  (size_t)lround(more * (double)setting.steps_a_period),
                  canal.dt, &wind);
        assert_near(lee_wall(&canal), friction_rows[row].levels[k], tolerance);
        assert_near(lee_transient_level_at(canal.engine, 0.0),
                    -friction_rows[row].levels[k], tolerance);
    }
    fill_in(&canal);
}

static void strong_friction_ends_within_a_millimetre(void **state) {
    (void)state;
    compare_friction_row(3, common, 1e-3);
    compare_friction_row(4, common, 1e-3);
}

static void weak_friction_ends_within_a_hundredth_of_steady(void **state) {
    (void)state;
    for (size_t row = 0; row < 3; row++) {
        compare_friction_row(row, fine, 0.01 * steady);
    }
}

/* ---- wind that stops ---- */

static double stopping(const void *numbers, double t) {
    return t < *(const double *)numbers ? stress : 0.0;
}

/* Highest level at the lee wall in the T1 after the wind has stopped. */
static double residual_seiche(double duration) {
    trial canal;
    dig_still(&canal, &fine);
    weather wind = {canal.channel.links, stopping, &duration, 0.0};
    run_steps(canal.engine, (size_t)lround(duration / canal.dt), canal.dt,
              &wind);
    double highest = -INFINITY;
    for (size_t k = 0; k < fine.steps_a_period; k++) {
        run_steps(canal.engine, 1, canal.dt, &wind);
        highest = fmax(highest, lee_wall(&canal));
    }
    fill_in(&canal);
    return highest;
}

static void a_wind_of_one_period_leaves_no_seiche(void **state) {
    (void)state;
    assert_near(residual_seiche(period), 0.0, 0.02 * steady);
}

static void
a_wind_of_half_a_period_leaves_twice_the_steady_level(void **state) {
    (void)state;
    assert_near(residual_seiche(0.5 * period), 0.203873598, 0.02 * steady);
}

static void a_wind_of_a_quarter_period_leaves_the_steady_level(void **state) {
    (void)state;
    assert_near(residual_seiche(0.25 * period), 0.101936799, 0.02 * steady);
}

/* ---- an open end ---- */

/* eta(L) = S c t to 2L/c, peak 2 S L; row step_halfopen. */
static void a_half_open_canal_peaks_at_twice_its_steady_rise(void **state) {
    (void)state;
    const double still = 0.0;
    const resolution medium = {800, 1600, 0.501, 0.0};
    trial canal;
    dig(&canal, &medium, true, flat, &still);
    weather wind = steady_wind(&canal);
    run_steps(canal.engine, medium.steps_a_period / 2, canal.dt, &wind);
    assert_near_share(lee_wall(&canal), 0.203873598, 0.01);
    run_steps(canal.engine, medium.steps_a_period / 2, canal.dt, &wind);
    assert_near_share(lee_wall(&canal), 0.407747197, 0.01);
    assert_near(lee_transient_level_at(canal.engine, 0.0), 0.0, 1e-15);
    fill_in(&canal);
}

static void water_that_came_through_the_open_end_is_counted(void **state) {
    (void)state;
    const double still = 0.0;
    trial canal;
    dig(&canal, &common, true, flat, &still);
    const double before = lee_transient_volume(canal.engine);
    weather wind = steady_wind(&canal);
    run_steps(canal.engine, 500, canal.dt, &wind);
    const double gained = lee_transient_volume(canal.engine) - before;
    assert_true(gained > 1e5); /* 1e8 m3 in the canal */
    /* each of 500 steps rounds volumes of 5e5 m3 a cell */
    assert_near(lee_transient_inflow(canal.engine), gained, 1e-15 * before);
    fill_in(&canal);
}

/* ---- periodic wind ---- */

typedef struct rhythm {
    double omega;  /* s-1 */
    double stress; /* Pa  */
} rhythm;

static double swinging(const void *numbers, double t) {
    const rhythm *swing = numbers;
    return swing->stress * cos(swing->omega * t);
}

/* Level of the forced motion when the wind is at its strongest:
 * (tau/(rho omega c)) sin(k (x - L/2))/cos(k L/2); no current then. */
static double forced_level(const void *numbers, double x) {
    const rhythm *swing = numbers;
    const double c = sqrt(gravity * depth);
    const double k = swing->omega / c;
    return swing->stress / (density * swing->omega * c) *
           sin(k * (x - 0.5 * length)) / cos(0.5 * k * length);
}

/* Rows harmonic_wind_*, at a thousandth of their stress: the run starts from
 * the forced levels, and the depths of the linear variant are those of its
 * start. */
static void a_swinging_wind_forces_the_motion_of_the_closed_form(void **state) {
    (void)state;
    const double scale = 1e-3;
    const struct {
        double periods;   /* of the wind, T1 */
        double amplitude; /* m at x = L; + in phase with the wind */
    } rows[] = {
        {2.0, 0.1297900 },
        {1.5, 0.1686021 },
        {1.2, 0.2906296 },
        {0.8, -0.1253363},
    };
    for (size_t k = 0; k < 4; k++) {
        const rhythm swing = {2.0 * pi / (rows[k].periods * period),
                              scale * stress};
        trial canal;
        dig(&canal, &common, false, forced_level, &swing);
        weather wind = {canal.channel.links, swinging, &swing, 0.0};
        const size_t steps = (size_t)lround(rows[k].periods * 380.0);
        run_steps(canal.engine, steps, canal.dt, &wind);
        assert_near_share(lee_wall(&canal), scale * rows[k].amplitude, 0.01);
        run_steps(canal.engine, steps / 2, canal.dt, &wind);
        assert_near_share(lee_wall(&canal), -scale * rows[k].amplitude, 0.01);
        fill_in(&canal);
    }
}

/* Amplitude of exp(i omega t) at the lee wall over one period of the wind,
 * after `rest` periods. */
static double complex response(const resolution *setting, double periods,
                               size_t rest) {
    const rhythm swing = {2.0 * pi / (periods * period), stress};
    trial canal;
    dig_still(&canal, setting);
    weather wind = {canal.channel.links, swinging, &swing, 0.0};
    const size_t steps =
        (size_t)lround(periods * (double)setting->steps_a_period);
    run_steps(canal.engine, rest * steps, canal.dt, &wind);
    double complex sum = 0.0;
    for (size_t k = 0; k < steps; k++) {
        run_steps(canal.engine, 1, canal.dt, &wind);
        const double t = lee_transient_time(canal.engine);
        sum += lee_wall(&canal) * cexp(-I * swing.omega * t);
    }
    fill_in(&canal);
    return 2.0 * sum / (double)steps;
}

/* Rows harmonic_wind_friction_*, r = 1e-4. After 40 T1 what was left of the
 * start has fallen to e^-11. Theta 0.501, for at resonance the damping of the
 * step itself counts beside r. */
static void friction_shifts_the_answer_to_a_swinging_wind(void **state) {
    (void)state;
    const resolution damped = {200, 380, 0.501, 1e-4};
    const double complex resonant = response(&damped, 1.0, 40);
    assert_near_share(cabs(resonant), 0.9093638, 0.01);
    assert_near(carg(resonant) * 180.0 / pi, -88.6985, 1.0);
    const double complex slow = response(&damped, 2.0, 20);
    assert_near_share(cabs(slow), 0.1295605, 0.01);
    assert_near(carg(slow) * 180.0 / pi, -2.9686, 0.1);
}

/* ---- order ---- */

/* Rises as (1 - cos)/2 over one T1: smooth enough for second order. */
static double rising(const void *numbers, double t) {
    (void)numbers;
    return t < period ? 0.5 * stress * (1.0 - cos(pi * t / period)) : stress;
}

static double lee_wall_after_rise(size_t cells, double theta) {
    const resolution setting = {cells, 2 * cells, theta, 0.0};
    trial canal;
    dig_still(&canal, &setting);
    weather wind = {canal.channel.links, rising, NULL, 0.0};
    run_steps(canal.engine, 3 * cells, canal.dt, &wind); /* 1.5 T1 */
    const double level = lee_wall(&canal);
    fill_in(&canal);
    return level;
}

static double observed_order(double theta) {
    const double coarse = lee_wall_after_rise(50, theta);
    const double medium = lee_wall_after_rise(100, theta);
    const double dense = lee_wall_after_rise(200, theta);
    return log2(fabs(coarse - medium) / fabs(medium - dense));
}

static void halving_cells_and_steps_quarters_the_error(void **state) {
    (void)state;
    /* a tenth for the terms of fourth order */
    assert_near(observed_order(0.5), 2.0, 0.1);
}

/* Theta 0.52 damps by (theta - 1/2) dt: first order, and small. */
static void the_usual_theta_halves_its_error_with_its_step(void **state) {
    (void)state;
    const double exact = lee_wall_after_rise(400, 0.5);
    const double coarse = lee_wall_after_rise(100, 0.52) - exact;
    const double dense = lee_wall_after_rise(200, 0.52) - exact;
    assert_near(coarse / dense, 2.0, 0.3); /* some second order is left */
    assert_near(dense, 0.0, 1e-3 * steady);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_sudden_wind_raises_the_triangle_of_the_closed_form),
        cmocka_unit_test(a_sudden_wind_drives_the_current_of_the_closed_form),
        cmocka_unit_test(strong_friction_ends_within_a_millimetre),
        cmocka_unit_test(weak_friction_ends_within_a_hundredth_of_steady),
        cmocka_unit_test(a_wind_of_one_period_leaves_no_seiche),
        cmocka_unit_test(a_wind_of_half_a_period_leaves_twice_the_steady_level),
        cmocka_unit_test(a_wind_of_a_quarter_period_leaves_the_steady_level),
        cmocka_unit_test(a_half_open_canal_peaks_at_twice_its_steady_rise),
        cmocka_unit_test(water_that_came_through_the_open_end_is_counted),
        cmocka_unit_test(a_swinging_wind_forces_the_motion_of_the_closed_form),
        cmocka_unit_test(friction_shifts_the_answer_to_a_swinging_wind),
        cmocka_unit_test(halving_cells_and_steps_quarters_the_error),
        cmocka_unit_test(the_usual_theta_halves_its_error_with_its_step),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
