/* Closed forms give their tabulated values and keep the water's volume. */
#include "support/check.h"

#include "leewater/setup.h"

static const double rho_g = 1000.0 * 9.81; /* of the tabulated values */

/* Derived and integrated by an independent quadrature; six decimals. */
static const struct {
    double stress;
    double length;
    double depth;
    double set_down;
    double set_up;
    double wet_length;
    double node;
} parabolas[] = {
    {0.5, 20000.0, 5.0, -0.102644, 0.101258, 20000.000, 9966.016 },
    {1.0, 50000.0, 3.0, -0.962671, 0.787399, 50000.000, 23785.774},
    {2.0, 50000.0, 3.0, -3.000000, 1.510152, 49887.455, 22185.045},
    {2.0, 30000.0, 1.5, -1.500000, 1.519244, 22356.588, 13161.537},
    {3.0, 40000.0, 1.0, -1.000000, 2.323108, 18055.385, 23579.615},
    {1.5, 50000.0, 2.0, -2.000000, 1.579710, 41902.837, 21177.163},
};

static void each_parabola_gives_its_tabulated_levels(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof parabolas / sizeof parabolas[0]; i++) {
        const lee_parabola p =
            lee_closed_parabola(parabolas[i].stress / rho_g,
                                parabolas[i].length, parabolas[i].depth);
        assert_near(p.set_down, parabolas[i].set_down, 6e-7);
        assert_near(p.set_up, parabolas[i].set_up, 6e-7);
        assert_near(p.wet_length, parabolas[i].wet_length, 6e-4);
        assert_near(p.node, parabolas[i].node, 6e-4);
    }
}

/* Integral of H along H^2 = H0^2 + 2 a x, by the formula with its plain
 * difference of cubes. */
static void a_parabola_keeps_the_volume(void **state) {
    (void)state;
    const double a = 1.0 / rho_g;
    const lee_parabola p = lee_closed_parabola(a, 50000.0, 3.0);
    const double windward = 3.0 + p.set_down;
    const double lee = 3.0 + p.set_up;
    assert_near_share((pow(lee, 3.0) - pow(windward, 3.0)) / (3.0 * a),
                      3.0 * 50000.0, 1e-13);
}

static void a_parabola_does_not_care_which_way_the_wind_blows(void **state) {
    (void)state;
    const lee_parabola with = lee_closed_parabola(1e-4, 20000.0, 5.0);
    const lee_parabola against = lee_closed_parabola(-1e-4, 20000.0, 5.0);
    assert_near(against.set_up, with.set_up, 0.0);
    assert_near(against.set_down, with.set_down, 0.0);
}

/* Both branches meet at h = (2/3) sqrt(2 a L). */
static void the_dried_branch_continues_the_wet_one(void **state) {
    (void)state;
    const double a = 2e-4;
    const double critical = 2.0 / 3.0 * sqrt(2.0 * a * 30000.0);
    const lee_parabola wet = lee_closed_parabola(a, 30000.0, critical + 1e-9);
    const lee_parabola dry = lee_closed_parabola(a, 30000.0, critical - 1e-9);
    assert_near(wet.set_up, dry.set_up, 1e-8);
    assert_near(wet.node, dry.node, 1e-3);
}

static void without_wind_a_parabola_is_flat(void **state) {
    (void)state;
    const lee_parabola p = lee_closed_parabola(0.0, 20000.0, 5.0);
    assert_near(p.set_up, 0.0, 0.0);
    assert_near(p.set_down, 0.0, 0.0);
    assert_near(p.node, 10000.0, 0.0);
}

/* eta = h (sqrt(1 + 2 a L/h^2) - 1), nine decimals. */
static void the_open_canal_gives_its_tabulated_rise(void **state) {
    (void)state;
    assert_near(lee_open_uniform(1.0 / rho_g, 50000.0, 10.0), 0.497317749,
                6e-10);
    assert_near(lee_open_uniform(2.7 / rho_g, 100000.0, 20.0), 1.331804227,
                6e-10);
    assert_near(lee_open_uniform(1.5 / rho_g, 20000.0, 3.0), 0.887956784,
                6e-10);
    assert_near(lee_open_uniform(3.0 / rho_g, 80000.0, 6.0), 3.215729141,
                6e-10);
}

static void an_offshore_wind_may_empty_the_open_canal(void **state) {
    (void)state;
    assert_near(lee_open_uniform(-1e-4, 50000.0, 3.0), -3.0, 0.0);
    /* sqrt(4^2 - 2*1e-4*35000) - 4 = -1 */
    assert_near(lee_open_uniform(-1e-4, 35000.0, 4.0), -1.0, 1e-14);
}

/* eta/h0 at the shore for A = a L/h0^2, integrated independently as an
 * ordinary differential equation; nine decimals. */
static void the_open_slope_gives_its_tabulated_rise(void **state) {
    (void)state;
    static const double rise[][2] = {
        {0.02, 0.062677578},
        {0.05, 0.126172847},
        {0.1,  0.210100300},
        {0.2,  0.343564902},
        {0.4,  0.551235794},
    };
    for (size_t i = 0; i < sizeof rise / sizeof rise[0]; i++) {
        const double a = rise[i][0] * 4.0 * 4.0 / 1e4;
        assert_near(lee_open_slope(a, 1e4, 4.0) / 4.0, rise[i][1], 6e-10);
    }
}

static void without_wind_the_open_shore_stays(void **state) {
    (void)state;
    assert_near(lee_open_slope(0.0, 1e4, 4.0), 0.0, 0.0);
    assert_near(lee_open_uniform(0.0, 1e4, 4.0), 0.0, 0.0);
}

static void a_slope_beyond_its_formula_gives_no_number(void **state) {
    (void)state;
    assert_true(isnan(lee_open_slope(4.0 * 4.0 / 1e4, 1e4, 4.0)));
    assert_true(isnan(lee_open_slope(-1e-4, 1e4, 4.0)));
}

static void missing_numbers_pass_through(void **state) {
    (void)state;
    assert_true(isnan(lee_closed_parabola(NAN, 1e4, 4.0).set_up));
    assert_true(isnan(lee_closed_parabola(1e-4, 1e4, NAN).set_down));
    assert_true(isnan(lee_open_uniform(1e-4, NAN, 4.0)));
    assert_true(isnan(lee_open_slope(1e-4, 1e4, NAN)));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(each_parabola_gives_its_tabulated_levels),
        cmocka_unit_test(a_parabola_keeps_the_volume),
        cmocka_unit_test(a_parabola_does_not_care_which_way_the_wind_blows),
        cmocka_unit_test(the_dried_branch_continues_the_wet_one),
        cmocka_unit_test(without_wind_a_parabola_is_flat),
        cmocka_unit_test(the_open_canal_gives_its_tabulated_rise),
        cmocka_unit_test(an_offshore_wind_may_empty_the_open_canal),
        cmocka_unit_test(the_open_slope_gives_its_tabulated_rise),
        cmocka_unit_test(without_wind_the_open_shore_stays),
        cmocka_unit_test(a_slope_beyond_its_formula_gives_no_number),
        cmocka_unit_test(missing_numbers_pass_through),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
