/* First periods agree with closed forms within 0.1 % on smooth beds. */
#include "support/check.h"

#include "leewater/setup.h"

static const double g = 9.81; /* of the closed forms' tabulated values */

enum { ROWS = 401 }; /* beds are given as finely sampled profiles */

static lee_profile dig(double from, double to, double (*depth)(double x)) {
    lee_profile p;
    assert_int_equal(lee_profile_init(&p, ROWS, NULL), LEE_OK);
    for (size_t i = 0; i < ROWS; i++) {
        const double x = from + (to - from) * (double)i / (ROWS - 1);
        p.chainage[i] = x;
        p.bed[i] = -depth(x);
        p.width[i] = 1000.0;
    }
    return p;
}

/* Period of the water at x in a lake filled to level 0. */
static double period_at(const lee_profile *p, double x, bool start_held,
                        bool end_held) {
    const lee_period_input input = {.profile = p,
                                    .x = x,
                                    .gravity = g,
                                    .start_held = start_held,
                                    .end_held = end_held};
    double period = 0.0;
    assert_int_equal(lee_first_period(&input, &period, NULL), LEE_OK);
    return period;
}

/* Period of the water in the middle; frees the lake. */
static double period_of(lee_profile *p, bool start_held, bool end_held) {
    const double middle = 0.5 * (p->chainage[0] + p->chainage[p->n - 1]);
    const double period = period_at(p, middle, start_held, end_held);
    lee_profile_free(p);
    return period;
}

static lee_profile canal(double length, double depth) {
    lee_profile p;
    assert_int_equal(lee_profile_init(&p, 2, NULL), LEE_OK);
    p.chainage[1] = length;
    p.bed[0] = p.bed[1] = -depth;
    p.width[0] = p.width[1] = 300.0;
    return p;
}

/* Merian (1828): T = 2 L/sqrt(g h). */
static void a_closed_canal_swings_with_merians_period(void **state) {
    (void)state;
    static const double rows[][3] = {
        {1e4,   10.0, 2019.2751 },
        {4e4,   5.0,  11422.7450},
        {5e3,   20.0, 713.9216  },
        {100e3, 60.0, 8243.6561 },
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        lee_profile p = canal(rows[i][0], rows[i][1]);
        assert_near_share(period_of(&p, false, false), rows[i][2], 1e-6);
    }
}

/* T = 4 L/sqrt(g h), whichever end is open. */
static void a_canal_open_at_one_end_takes_twice_as_long(void **state) {
    (void)state;
    lee_profile p = canal(1e4, 10.0);
    assert_near_share(period_of(&p, true, false), 4038.5502, 1e-6);
    p = canal(5e3, 20.0);
    assert_near_share(period_of(&p, false, true), 1427.8431, 1e-6);
}

/* Node lines at both ends: half a wave between them, T = 2 L/sqrt(g h). */
static void a_canal_open_at_both_ends_swings_like_a_closed_one(void **state) {
    (void)state;
    lee_profile p = canal(1e4, 10.0);
    assert_near_share(period_of(&p, true, true), 2019.2751, 1e-6);
}

static double parabola(double x) {
    return 10.0 * (1.0 - 4.0 * x * x / 1e8);
}

/* Chrystal: T = pi L/sqrt(2 g h0), L 10 km, h0 10 m. */
static void a_parabolic_lake_swings_with_chrystals_period(void **state) {
    (void)state;
    lee_profile p = dig(-5e3, 5e3, parabola);
    assert_near_share(period_of(&p, false, false), 2242.8507, 1e-3);
}

static double concave(double x) {
    const double s = 1.0 - x * x / 25e6;
    return 20.0 * s * s;
}

static double concave_small(double x) {
    const double s = 1.0 - x * x / 9e6;
    return 6.0 * s * s;
}

static double concave_large(double x) {
    const double s = 1.0 - x * x / 64e6;
    return 50.0 * s * s;
}

/* omega^2 = (g h0/a^2)[1 + (pi/ln((a + b)/(a - b)))^2] (derived). */
static void a_concave_quartic_lake_has_its_closed_form(void **state) {
    (void)state;
    lee_profile p = dig(-4500.0, 4500.0, concave);
    assert_near_share(period_of(&p, false, false), 1533.7549, 1e-3);
    p = dig(-3000.0, 3000.0, concave);
    assert_near_share(period_of(&p, false, false), 905.4674, 1e-3);
    p = dig(-7600.0, 7600.0, concave_large);
    assert_near_share(period_of(&p, false, false), 1722.8882, 1e-3);
    p = dig(-2000.0, 2000.0, concave_small);
    assert_near_share(period_of(&p, false, false), 1120.2322, 1e-3);
}

static double convex(double x) {
    const double s = 1.0 + x * x / 25e6;
    return 5.0 * s * s;
}

static double convex_steep(double x) {
    const double s = 1.0 + x * x / 16e6;
    return 4.0 * s * s;
}

/* omega^2 = (g h0/a^2)[(pi/(2 atan(b/a)))^2 - 1] (derived). */
static void a_convex_quartic_lake_has_its_closed_form(void **state) {
    (void)state;
    lee_profile p = dig(-4500.0, 4500.0, convex);
    assert_near_share(period_of(&p, false, false), 2365.9362, 1e-3);
    p = dig(-6000.0, 6000.0, convex_steep);
    assert_near_share(period_of(&p, false, false), 3217.8998, 1e-3);
}

static lee_profile wedge(double length, double depth) {
    lee_profile p = canal(length, depth);
    p.bed[0] = 0.0;
    return p;
}

/* Wall at the deep end: T = 4 pi L/(3.83171 sqrt(g h1)). */
static void a_wedge_has_the_period_of_its_bessel_zero(void **state) {
    (void)state;
    static const double rows[][3] = {
        {1e4,  10.0, 3311.1830},
        {5e3,  25.0, 1047.0880},
        {20e3, 6.0,  8549.4378},
        {40e3, 30.0, 7646.8496},
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        lee_profile p = wedge(rows[i][0], rows[i][1]);
        assert_near_share(period_of(&p, false, false), rows[i][2], 1e-3);
    }
}

/* Held at the deep end: T = 4 pi L/(2.40483 sqrt(g h1)). */
static void an_open_shelf_has_the_period_of_its_bessel_zero(void **state) {
    (void)state;
    lee_profile p = wedge(1e4, 10.0);
    assert_near_share(period_of(&p, false, true), 5275.8420, 1e-3);
}

static double vee(double x) {
    return 10.0 * (1.0 - fabs(x) / 5e3);
}

/* Half length 5 km, depth 10 m: the first zero of J0. */
static void a_vee_has_the_period_of_its_bessel_zero(void **state) {
    (void)state;
    lee_profile p = dig(-5e3, 5e3, vee);
    assert_near_share(period_of(&p, false, false), 2637.9210, 1e-3);
}

/* 6 km of 4 m and 8 km of 16 m, joined over one metre: the root of
 * c1 tan(w L1/c1) + c2 tan(w L2/c2) = 0. */
static void a_basin_of_two_steps_has_its_closed_form(void **state) {
    (void)state;
    lee_profile p;
    assert_int_equal(lee_profile_init(&p, 4, NULL), LEE_OK);
    const double x[] = {0.0, 5999.5, 6000.5, 14e3};
    const double z[] = {-4.0, -4.0, -16.0, -16.0};
    for (size_t i = 0; i < 4; i++) {
        p.chainage[i] = x[i];
        p.bed[i] = z[i];
        p.width[i] = 700.0;
    }
    assert_near_share(period_of(&p, false, false), 3394.6020, 1e-3);
}

/* A V-shaped plan of uniform depth has the modes of J0'(k x): the equation in
 * the level, (x eta')' + k^2 x eta = 0, ends at J1(k L) = 0. */
static void a_triangular_plan_has_the_period_of_its_bessel_zero(void **state) {
    (void)state;
    lee_profile p = canal(1e4, 10.0);
    p.width[0] = 1e-6;
    p.width[1] = 5e3;
    const double expected =
        2.0 * 3.14159265358979323846 * 1e4 / (3.83171 * sqrt(g * 10.0));
    assert_near_share(period_of(&p, false, false), expected, 1e-3);
}

static void a_period_does_not_depend_on_the_width_of_a_canal(void **state) {
    (void)state;
    lee_profile p = canal(1e4, 10.0);
    const double narrow = period_of(&p, false, false);
    p = canal(1e4, 10.0);
    p.width[0] = p.width[1] = 9000.0;
    assert_near_share(period_of(&p, false, false), narrow, 1e-9);
}

/* Two canals of 4 and 6 km parted by dry land. */
static void each_water_of_a_parted_lake_has_its_own_period(void **state) {
    (void)state;
    lee_profile p;
    assert_int_equal(lee_profile_init(&p, 6, NULL), LEE_OK);
    const double x[] = {0.0, 4000.0, 4000.01, 5000.0, 5000.01, 11000.0};
    const double z[] = {-9.0, -9.0, 1.0, 1.0, -9.0, -9.0};
    for (size_t i = 0; i < 6; i++) {
        p.chainage[i] = x[i];
        p.bed[i] = z[i];
        p.width[i] = 50.0;
    }
    assert_near_share(period_at(&p, 100.0, false, false),
                      8000.0 / sqrt(9.0 * g), 1e-4);
    assert_near_share(period_at(&p, 9000.0, false, false),
                      12000.0 / sqrt(9.0 * g), 1e-4);
    /* an end held elsewhere is none of its business */
    assert_near_share(period_at(&p, 9000.0, true, false),
                      12000.0 / sqrt(9.0 * g), 1e-4);
    assert_true(isnan(period_at(&p, 4500.0, false, false)));
    assert_true(isnan(period_at(&p, -1.0, false, false)));
    lee_profile_free(&p);
}

static void a_gravity_of_nothing_is_refused(void **state) {
    (void)state;
    lee_profile p = canal(1e4, 10.0);
    lee_error error = {0};
    double period = 0.0;
    const lee_period_input input = {.profile = &p, .x = 5e3};
    assert_int_equal(lee_first_period(&input, &period, &error),
                     LEE_ERR_ARGUMENT);
    assert_string_equal(error.message, "level 0 m or gravity 0 m s-2 is "
                                       "outside its range");
    lee_profile_free(&p);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_closed_canal_swings_with_merians_period),
        cmocka_unit_test(a_canal_open_at_one_end_takes_twice_as_long),
        cmocka_unit_test(a_canal_open_at_both_ends_swings_like_a_closed_one),
        cmocka_unit_test(a_parabolic_lake_swings_with_chrystals_period),
        cmocka_unit_test(a_concave_quartic_lake_has_its_closed_form),
        cmocka_unit_test(a_convex_quartic_lake_has_its_closed_form),
        cmocka_unit_test(a_wedge_has_the_period_of_its_bessel_zero),
        cmocka_unit_test(an_open_shelf_has_the_period_of_its_bessel_zero),
        cmocka_unit_test(a_vee_has_the_period_of_its_bessel_zero),
        cmocka_unit_test(a_basin_of_two_steps_has_its_closed_form),
        cmocka_unit_test(a_triangular_plan_has_the_period_of_its_bessel_zero),
        cmocka_unit_test(a_period_does_not_depend_on_the_width_of_a_canal),
        cmocka_unit_test(each_water_of_a_parted_lake_has_its_own_period),
        cmocka_unit_test(a_gravity_of_nothing_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
