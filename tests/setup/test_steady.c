/* Steady levels agree with mathematics to a millionth of the tilt. */
#include "support/axis.h"

static const double rho_g = 1000.0 * 9.81;
static const double pi = 3.14159265358979323846;

static const struct {
    double stress;
    double length;
    double depth;
} canals[] = {
    {0.5, 20000.0, 5.0},
    {1.0, 50000.0, 3.0},
    {2.0, 50000.0, 3.0}, /* the windward end falls dry from here on */
    {2.0, 30000.0, 1.5},
    {3.0, 40000.0, 1.0},
    {1.5, 50000.0, 2.0},
};

static void a_closed_canal_tilts_as_its_parabola(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof canals / sizeof canals[0]; i++) {
        lee_profile p = axis_canal(canals[i].length, canals[i].depth);
        const lee_steady_input in = axis_wind(&p, canals[i].stress);
        lee_steady s = axis_solve(&in);
        const lee_parabola exact = lee_closed_parabola(
            canals[i].stress / rho_g, canals[i].length, canals[i].depth);
        const double tilt = exact.set_up - exact.set_down;
        assert_int_equal(s.count, 1);
        assert_near(s.water[0].set_up, exact.set_up, 1e-6 * tilt);
        assert_near(s.water[0].set_down, exact.set_down, 1e-6 * tilt);
        assert_near(s.water[0].to - s.water[0].from, exact.wet_length,
                    1e-6 * canals[i].length);
        assert_int_equal(s.water[0].node_count, 1);
        assert_near(s.water[0].node[0], exact.node, 1e-6 * canals[i].length);
        assert_near(s.dry_length, canals[i].length - exact.wet_length,
                    1e-6 * canals[i].length);
        lee_steady_free(&s);
        lee_profile_free(&p);
    }
}

/* Levels printed to six decimals by an independent quadrature. */
static void the_tabulated_canals_are_met(void **state) {
    (void)state;
    lee_profile p = axis_canal(50000.0, 2.0);
    const lee_steady_input in = axis_wind(&p, 1.5);
    lee_steady s = axis_solve(&in);
    assert_near(s.water[0].set_up, 1.579710, 6e-7);
    assert_near(s.water[0].from, 50000.0 - 41902.837, 6e-4);
    assert_near(s.water[0].set_up_at, 50000.0, 0.0);
    assert_near(s.water[0].set_down_at, 50000.0 - 41902.837, 6e-4);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* Bed of 1, 4, 6, 2 m at 0, 4, 12, 20 km, 0.6 Pa: an ordinary differential
 * equation with the volume closed, six decimals. */
static void a_bed_of_three_slopes_tilts_as_tabulated(void **state) {
    (void)state;
    const double x[] = {0.0, 4e3, 12e3, 20e3};
    const double z[] = {-1.0, -4.0, -6.0, -2.0};
    lee_profile p = axis_dig(4, x, z);
    const lee_steady_input in = axis_wind(&p, 0.6);
    lee_steady s = axis_solve(&in);
    assert_near(lee_steady_level_at(&s, 0.0), -0.196947, 6e-7);
    assert_near(lee_steady_level_at(&s, 4e3), -0.073737, 6e-7);
    assert_near(lee_steady_level_at(&s, 12e3), 0.026018, 6e-7);
    assert_near(lee_steady_level_at(&s, 20e3), 0.156361, 6e-7);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* Weak winds tilt linearly: a L/h, half at each end. */
static void a_weak_wind_tilts_by_the_linear_rule(void **state) {
    (void)state;
    static const double rows[][4] = {
        {0.5, 20000.0, 5.0,  0.203873598},
        {1.0, 50000.0, 10.0, 0.509683996},
        {2.0, 10000.0, 2.0,  1.019367992},
    };
    const double weak = 1e-4;
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        lee_profile p = axis_canal(rows[i][1], rows[i][2]);
        const lee_steady_input in = axis_wind(&p, weak * rows[i][0]);
        lee_steady s = axis_solve(&in);
        /* the parabola differs by (aL/h^2)^2/8 of the tilt, below 1e-8 */
        assert_near(s.water[0].tilt / weak, rows[i][3], 1e-8);
        /* and its ends by an eighth of (aL/h)^2/h, below 3e-6 of the tilt */
        assert_near(s.water[0].set_up / weak, 0.5 * rows[i][3], 1e-5);
        lee_steady_free(&s);
        lee_profile_free(&p);
    }
}

/* A canal held at its windward end, and at its lee end. */
static void a_held_canal_rises_as_its_closed_form(void **state) {
    (void)state;
    static const double rows[][4] = {
        {1.0, 50e3,  10.0, 0.497317749},
        {2.7, 100e3, 20.0, 1.331804227},
        {1.5, 20e3,  3.0,  0.887956784},
        {3.0, 80e3,  6.0,  3.215729141},
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        lee_profile p = axis_canal(rows[i][1], rows[i][2]);
        lee_steady_input in = axis_wind(&p, rows[i][0]);
        in.start_level = 0.0;
        lee_steady s = axis_solve(&in);
        assert_near(s.water[0].set_up, rows[i][3], 6e-10);
        assert_near(s.water[0].set_down, 0.0, 0.0);
        assert_near(s.water[0].volume_defect, 0.0, 0.0);
        lee_steady_free(&s);
        in.stress[1] = -rows[i][0];
        s = axis_solve(&in);
        const double a = -rows[i][0] / rho_g;
        assert_near(s.water[0].set_down,
                    lee_open_uniform(a, rows[i][1], rows[i][2]), 1e-9);
        lee_steady_free(&s);
        lee_profile_free(&p);
    }
}

static void either_end_may_be_held(void **state) {
    (void)state;
    lee_profile p = axis_canal(50e3, 10.0);
    lee_steady_input in = axis_wind(&p, -1.0);
    in.end_level = 0.0;
    lee_steady s = axis_solve(&in);
    assert_near(lee_steady_level_at(&s, 0.0), 0.497317749, 6e-10);
    assert_near(lee_steady_level_at(&s, 50e3), 0.0, 1e-15);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* H^2 = (h + held)^2 + 2 a x; levels are told from still water. */
static void a_held_level_need_not_be_still_water(void **state) {
    (void)state;
    lee_profile p = axis_canal(20e3, 5.0);
    lee_steady_input in = axis_wind(&p, 0.5);
    in.start_level = 0.75;
    lee_steady s = axis_solve(&in);
    const double a = 0.5 / rho_g;
    assert_near(s.water[0].set_up, sqrt(5.75 * 5.75 + 2.0 * a * 20e3) - 5.0,
                1e-12);
    assert_near(s.water[0].set_down, 0.75, 1e-14);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* Textbook examples are linear: tau L/(rho g H) from the open end, as printed
 * and as worked: Stewart [stewart2008], section 17.3 (2.7 Pa, 100 km, 20 m,
 * 1.3 m), and a study note after Pugh [pugh1987] (rho_air 1.2, C_d 2.5e-3,
 * 30 m/s, 200 km, sea water of 1025, 30 m and 1000 m: 1.79 and 0.054 m). */
static void the_textbook_examples_are_met_as_printed(void **state) {
    (void)state;
    static const double rows[][6] = {
        {2.7, 1027.0, 100e3, 20.0,   1.339968, 1.3  },
        {2.7, 1025.0, 200e3, 30.0,   1.790110, 1.79 },
        {2.7, 1025.0, 200e3, 1000.0, 0.053703, 0.054},
    };
    static const double printed[] = {0.05, 0.005, 0.0005};
    const double weak = 1e-6; /* the linear limit of the canal */
    for (size_t i = 0; i < 3; i++) {
        lee_profile p = axis_canal(rows[i][2], rows[i][3]);
        lee_steady_input in = axis_wind(&p, weak * rows[i][0]);
        in.water_density = rows[i][1];
        in.start_level = 0.0;
        lee_steady s = axis_solve(&in);
        const double rise = s.water[0].set_up / weak;
        assert_near(rise, rows[i][4], 1e-6);
        assert_near(rise, rows[i][5], printed[i]);
        lee_steady_free(&s);
        lee_profile_free(&p);
    }
}

/* 10 m falling to 2 m over 20 km, 1 Pa; 6 m to 0.5 m over 15 km, 0.8 Pa: an
 * ordinary differential equation, eight decimals. */
static void an_open_slope_to_a_wall_rises_as_tabulated(void **state) {
    (void)state;
    static const double rows[][5] = {
        {20e3, 10.0, 2.0, 1.0, 0.38723855},
        {15e3, 6.0,  0.5, 0.8, 0.45830461},
    };
    for (size_t i = 0; i < 2; i++) {
        const double x[] = {0.0, rows[i][0]};
        const double z[] = {-rows[i][1], -rows[i][2]};
        lee_profile p = axis_dig(2, x, z);
        lee_steady_input in = axis_wind(&p, rows[i][3]);
        in.start_level = 0.0;
        lee_steady s = axis_solve(&in);
        assert_near(s.water[0].set_up, rows[i][4], 6e-9);
        lee_steady_free(&s);
        lee_profile_free(&p);
    }
}

/* A slope that meets still water at x = L, for A = a L/h0^2. The bed is so
 * deep (2a/m = 2 A h0 > 0.25 m) that no film rule acts. */
static void
an_open_slope_rises_at_the_still_shore_as_its_closed_form(void **state) {
    (void)state;
    static const double rows[][2] = {
        {0.02, 0.062677578},
        {0.05, 0.126172847},
        {0.1,  0.210100300},
        {0.2,  0.343564902},
        {0.4,  0.551235794},
    };
    const double h0 = 10.0;
    const double x[] = {0.0, 1e4, 1.2e4};
    const double z[] = {-h0, 0.0, 0.2 * h0};
    lee_profile p = axis_dig(3, x, z);
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        lee_steady_input in = axis_wind(&p, rows[i][0] * h0 * h0 / 1e4 * rho_g);
        in.start_level = 0.0;
        lee_steady s = axis_solve(&in);
        assert_near(lee_steady_level_at(&s, 1e4) / h0, rows[i][1], 6e-10);
        lee_steady_free(&s);
    }
    lee_profile_free(&p);
}

static void a_wind_forty_degrees_off_counts_by_its_cosine_once(void **state) {
    (void)state;
    lee_profile p = axis_canal(20e3, 5.0);
    lee_steady_input in = axis_wind(&p, 0.0);
    in.stress[0] = 0.5 * sin(40.0 / 180.0 * pi);
    in.stress[1] = 0.5 * cos(40.0 / 180.0 * pi);
    lee_steady s = axis_solve(&in);
    const lee_parabola exact =
        lee_closed_parabola(0.766044443119 * 0.5 / rho_g, 20e3, 5.0);
    assert_near(s.water[0].set_up, exact.set_up, 1e-12);
    assert_near(s.along, 0.766044, 6e-7);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

static void a_bearing_turns_the_axis_clockwise_from_north(void **state) {
    (void)state;
    lee_profile p = axis_canal(20e3, 5.0);
    p.bearing[0] = pi / 2.0; /* chainage grows eastward */
    lee_steady_input in = axis_wind(&p, 0.0);
    in.stress[0] = 0.5;
    lee_steady s = axis_solve(&in);
    assert_near(s.water[0].set_up_at, 20e3, 0.0);
    assert_near(s.along, 1.0, 1e-15);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

static void a_wind_straight_across_leaves_the_axis_level(void **state) {
    (void)state;
    lee_profile p = axis_canal(20e3, 5.0);
    lee_steady_input in = axis_wind(&p, 0.0);
    in.stress[0] = 0.5;
    lee_steady s = axis_solve(&in);
    assert_near(s.water[0].tilt, 0.0, 0.0);
    assert_near(s.along, 0.0, 0.0);
    /* lambda tau_n b/(rho g H) */
    assert_near(s.cross_tilt, 0.5 / rho_g * 1000.0 / 5.0, 1e-15);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* Wind straight across a wedge of 0 to 6 m: the tilt across grows towards the
 * beach and is told where the water is half its mean depth, 1.5 m; the place
 * is one of the drawn points, 6 m/256 apart. */
static void the_tilt_across_is_not_told_from_the_beach(void **state) {
    (void)state;
    const double x[] = {0.0, 12e3};
    const double z[] = {0.0, -6.0};
    lee_profile p = axis_dig(2, x, z);
    lee_steady_input in = axis_wind(&p, 0.0);
    in.stress[0] = 0.5;
    lee_steady s = axis_solve(&in);
    assert_near_share(s.cross_tilt, 0.5 / rho_g * 1000.0 / 1.5, 0.02);
    assert_near(s.cross_tilt_at, 3e3, 0.02 * 3e3);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

static void the_return_flow_factor_multiplies_the_stress(void **state) {
    (void)state;
    lee_profile p = axis_canal(20e3, 5.0);
    lee_steady_input in = axis_wind(&p, 0.5);
    in.return_flow = 1.2;
    lee_steady s = axis_solve(&in);
    const lee_parabola exact =
        lee_closed_parabola(1.2 * 0.5 / rho_g, 20e3, 5.0);
    assert_near(s.water[0].set_up, exact.set_up, 1e-12);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* The first leg runs with the wind, the second across it: H0^2 + 2 a L1 at
 * the corner and level from there. H0 is chosen, the still depth follows from
 * the volume by hand. */
static void an_l_shaped_lake_tilts_along_one_leg_only(void **state) {
    (void)state;
    const double a = 1.0 / rho_g;
    const double l1 = 12e3;
    const double l2 = 7e3;
    const double h0 = 3.0;
    const double h1 = sqrt(h0 * h0 + 2.0 * a * l1);
    const double volume = (h1 * h1 * h1 - h0 * h0 * h0) / (3.0 * a) + h1 * l2;
    const double still = volume / (l1 + l2);
    const double x[] = {0.0, l1, l1 + l2};
    const double z[] = {-still, -still, -still};
    lee_profile p = axis_dig(3, x, z);
    p.bearing[1] = pi / 2.0;
    const lee_steady_input in = axis_wind(&p, 1.0);
    lee_steady s = axis_solve(&in);
    assert_near(s.water[0].set_down, h0 - still, 1e-9);
    assert_near(s.water[0].set_up, h1 - still, 1e-9);
    assert_near(lee_steady_level_at(&s, l1 + 0.5 * l2), h1 - still, 1e-9);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* A hairpin: the wind drives both legs into the bend; each is a canal of its
 * own length. The other way it empties the bend. */
static void a_wind_into_a_hairpin_heaps_water_at_the_bend(void **state) {
    (void)state;
    const double x[] = {0.0, 1e4, 2e4};
    const double z[] = {-3.0, -3.0, -3.0};
    lee_profile p = axis_dig(3, x, z);
    p.bearing[1] = pi;
    lee_steady_input in = axis_wind(&p, 1.0);
    const lee_parabola half = lee_closed_parabola(1.0 / rho_g, 1e4, 3.0);
    lee_steady s = axis_solve(&in);
    assert_int_equal(s.count, 1);
    assert_near(s.water[0].set_up_at, 1e4, 1e-9);
    assert_near(s.water[0].set_up, half.set_up, 1e-9);
    assert_near(lee_steady_level_at(&s, 0.0), half.set_down, 1e-9);
    assert_near(lee_steady_level_at(&s, 2e4), half.set_down, 1e-9);
    assert_int_equal(s.water[0].node_count, 2);
    assert_near(s.water[0].node[0], half.node, 1e-4);
    assert_near(s.water[0].node[1], 2e4 - half.node, 1e-4);
    assert_near(s.along, 0.0, 1e-15);
    lee_steady_free(&s);
    in.stress[1] = -1.0;
    s = axis_solve(&in);
    assert_int_equal(s.count, 1);
    assert_near(s.water[0].set_down_at, 1e4, 1e-9);
    assert_near(s.water[0].set_down, half.set_down, 1e-9);
    assert_near(s.water[0].set_up, half.set_up, 1e-9);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* A lee slope of 1:100 that still water leaves dry above 500 m. Film rule:
 * the depth falls to 2a/m and ends 4a/m^2 further; both from the implicit
 * integral of the slope, by hand below. */
static void a_lee_beach_is_flooded_up_to_its_film(void **state) {
    (void)state;
    const double a = 1.0 / rho_g;
    const double m = 0.01;
    const double x[] = {0.0, 20e3, 21e3};
    const double z[] = {-5.0, -5.0, 5.0};
    lee_profile p = axis_dig(3, x, z);
    const lee_steady_input in = axis_wind(&p, 1.0);
    lee_steady s = axis_solve(&in);
    const double foot = 5.0 + lee_steady_level_at(&s, 20e3);
    const double film = 2.0 * a / m;
    const double reach = -(film - foot) / m -
                         a / (m * m) * log((a - m * film) / (a - m * foot)) +
                         4.0 * a / (m * m);
    assert_near(s.water[0].to, 20e3 + reach, 1e-6);
    assert_near(s.water[0].set_up, -5.0 + m * reach, 1e-8);
    assert_true(s.water[0].to > 20.5e3);
    assert_true(isnan(lee_steady_level_at(&s, s.water[0].to + 0.01)));
    lee_steady_free(&s);
    lee_profile_free(&p);
}

static void the_level_off_the_axis_is_unknown(void **state) {
    (void)state;
    lee_profile p = axis_canal(20e3, 5.0);
    const lee_steady_input in = axis_wind(&p, 0.5);
    lee_steady s = axis_solve(&in);
    assert_true(isnan(lee_steady_level_at(&s, -1.0)));
    assert_true(isnan(lee_steady_level_at(&s, 20001.0)));
    assert_true(isnan(lee_steady_level_at(&s, NAN)));
    lee_steady_free(&s);
    lee_profile_free(&p);
}

static void the_first_period_of_the_still_lake_comes_along(void **state) {
    (void)state;
    lee_profile p = axis_canal(1e4, 10.0);
    const lee_steady_input in = axis_wind(&p, 0.5);
    lee_steady s = axis_solve(&in);
    assert_near_share(s.water[0].first_period, 2019.2751, 1e-6);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_closed_canal_tilts_as_its_parabola),
        cmocka_unit_test(the_tabulated_canals_are_met),
        cmocka_unit_test(a_bed_of_three_slopes_tilts_as_tabulated),
        cmocka_unit_test(a_weak_wind_tilts_by_the_linear_rule),
        cmocka_unit_test(a_held_canal_rises_as_its_closed_form),
        cmocka_unit_test(either_end_may_be_held),
        cmocka_unit_test(a_held_level_need_not_be_still_water),
        cmocka_unit_test(the_textbook_examples_are_met_as_printed),
        cmocka_unit_test(an_open_slope_to_a_wall_rises_as_tabulated),
        cmocka_unit_test(
            an_open_slope_rises_at_the_still_shore_as_its_closed_form),
        cmocka_unit_test(a_wind_forty_degrees_off_counts_by_its_cosine_once),
        cmocka_unit_test(a_bearing_turns_the_axis_clockwise_from_north),
        cmocka_unit_test(a_wind_straight_across_leaves_the_axis_level),
        cmocka_unit_test(the_tilt_across_is_not_told_from_the_beach),
        cmocka_unit_test(the_return_flow_factor_multiplies_the_stress),
        cmocka_unit_test(an_l_shaped_lake_tilts_along_one_leg_only),
        cmocka_unit_test(a_wind_into_a_hairpin_heaps_water_at_the_bend),
        cmocka_unit_test(a_lee_beach_is_flooded_up_to_its_film),
        cmocka_unit_test(the_level_off_the_axis_is_unknown),
        cmocka_unit_test(the_first_period_of_the_still_lake_comes_along),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
