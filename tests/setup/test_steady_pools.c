/* Waters over sills part, spill and join as a slowly growing wind lets them:
 * flat pools with steep sides, worked by hand.
 *
 * A pool of mean depth h and length L follows H^2 = H0^2 + 2 a x. Full to its
 * crest its lee depth is known, H0^2 = H_lee^2 - 2 a L, and its volume is
 * (H_lee^3 - H0^3)/(3a) a metre of width. The sides rise over w = 5 cm; up
 * them the level gains some a (w/h) ln(h/film), below 5e-5 m. */
#include "support/axis.h"

static const double rho_g = 1000.0 * 9.81;
static const double side = 2e-4; /* m, what some steep sides change */

/* Two pools of depth 3 m, 5 and 6.5 km long, and a crest between them. */
static lee_profile dig(double crest) {
    const double x[] = {0.0, 5000.0, 5000.05, 5000.1, 11500.1};
    const double z[] = {-3.0, -3.0, crest, -3.0, -3.0};
    return axis_dig(5, x, z);
}

/* Area under the parabola that ends at lee depth `lee`. */
static double brimful(double a, double length, double lee) {
    const double windward = sqrt(lee * lee - 2.0 * a * length);
    return (pow(lee, 3.0) - pow(windward, 3.0)) / (3.0 * a);
}

static void a_wind_too_weak_to_spill_leaves_each_pool_its_own(void **state) {
    (void)state;
    lee_profile p = dig(0.2);
    const double a = 0.5 / rho_g;
    const lee_steady_input in = axis_wind(&p, 0.5);
    lee_steady s = axis_solve(&in);
    const lee_parabola first = lee_closed_parabola(a, 5000.025, 3.0);
    const lee_parabola second = lee_closed_parabola(a, 6500.025, 3.0);
    assert_int_equal(s.count, 2);
    assert_near(s.water[0].set_up, first.set_up, side);
    assert_near(s.water[0].set_down, first.set_down, side);
    assert_near(s.water[1].set_up, second.set_up, side);
    assert_near(s.water[1].set_down, second.set_down, side);
    assert_false(s.has_sill);
    assert_false(s.water[0].was_parted);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

static void
a_pool_spills_until_its_lee_level_stands_at_the_crest(void **state) {
    (void)state;
    lee_profile p = dig(0.2);
    const double a = 2.5 / rho_g;
    const lee_steady_input in = axis_wind(&p, 2.5);
    lee_steady s = axis_solve(&in);
    const double kept = brimful(a, 5000.025, 3.2);
    const double whole = 3.0 * (5000.025 + 6500.025);
    const lee_parabola second =
        lee_closed_parabola(a, 6500.025, (whole - kept) / 6500.025);
    const double rise = (whole - kept) / 6500.025 - 3.0;
    assert_true(kept < 3.0 * 5000.025);
    assert_int_equal(s.count, 2);
    assert_true(s.has_sill);
    assert_near(s.water[0].set_up, 0.2, 1e-9);
    assert_near(s.water[0].set_down, sqrt(3.2 * 3.2 - 2.0 * a * 5000.025) - 3.0,
                side);
    assert_near(s.water[1].set_up, rise + second.set_up, side);
    assert_near(s.water[1].set_down, rise + second.set_down, side);
    assert_near_share(s.water[0].volume + s.water[1].volume,
                      lee_profile_summary(&p, 0.0).volume, 1e-12);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

static void the_mirrored_wind_spills_the_other_pool(void **state) {
    (void)state;
    lee_profile p = dig(0.2);
    const double a = 2.5 / rho_g;
    const lee_steady_input in = axis_wind(&p, -2.5);
    lee_steady s = axis_solve(&in);
    const double kept = brimful(a, 6500.025, 3.2);
    assert_int_equal(s.count, 2);
    assert_near(s.water[1].set_up, 0.2, 1e-9);
    assert_near(s.water[1].volume / 1000.0, kept, 1.0);
    assert_near_share(s.water[0].volume + s.water[1].volume,
                      lee_profile_summary(&p, 0.0).volume, 1e-12);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* 2 km and 10 km over a sill 0.1 m below still water. Whole, the level at the
 * sill would fall a(4 km)/h = 0.27 m; the short pool is left full to the
 * crest, the long one has the rest. */
static void a_sill_that_falls_dry_parts_the_lake(void **state) {
    (void)state;
    const double x[] = {0.0, 2000.0, 2000.05, 2000.1, 12000.1};
    const double z[] = {-3.0, -3.0, -0.1, -3.0, -3.0};
    lee_profile p = axis_dig(5, x, z);
    const double a = 2.0 / rho_g;
    const lee_steady_input in = axis_wind(&p, 2.0);
    lee_steady s = axis_solve(&in);
    const double kept = brimful(a, 2000.025, 2.9);
    const double depth = (3.0 * (2000.025 + 10000.025) - kept) / 10000.025;
    const lee_parabola second = lee_closed_parabola(a, 10000.025, depth);
    assert_int_equal(s.count, 2);
    assert_true(s.has_sill);
    assert_true(s.water[0].was_parted && s.water[1].was_parted);
    assert_near(s.water[0].set_up, -0.1, 1e-9);
    assert_near(s.water[1].set_up, depth - 3.0 + second.set_up, side);
    assert_near(s.water[1].set_down, depth - 3.0 + second.set_down, side);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* The same lake under less wind: the sill stays covered, and the level is one
 * parabola but for the few metres of the sill. */
static void a_covered_sill_leaves_one_water(void **state) {
    (void)state;
    const double x[] = {0.0, 2000.0, 2000.05, 2000.1, 12000.1};
    const double z[] = {-3.0, -3.0, -0.1, -3.0, -3.0};
    lee_profile p = axis_dig(5, x, z);
    const lee_steady_input in = axis_wind(&p, 0.3);
    lee_steady s = axis_solve(&in);
    const lee_parabola whole = lee_closed_parabola(0.3 / rho_g, 12000.1, 3.0);
    assert_int_equal(s.count, 1);
    assert_false(s.has_sill);
    assert_false(s.water[0].was_parted);
    assert_near(s.water[0].set_up, whole.set_up, side);
    assert_near(s.water[0].set_down, whole.set_down, side);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* The pools stand apart at rest, still water 0.05 m below the crest; the
 * first spills until both stand above the crest at the sill. Whole, the level
 * at the sill is above the crest: it lies in the lee half of a 12 km lake. */
static void pools_join_where_both_stand_above_the_crest(void **state) {
    (void)state;
    const double x[] = {0.0, 10000.0, 10000.05, 10000.1, 12000.1};
    const double z[] = {-3.0, -3.0, 0.05, -3.0, -3.0};
    lee_profile p = axis_dig(5, x, z);
    const lee_steady_input in = axis_wind(&p, 2.0);
    lee_steady s = axis_solve(&in);
    const lee_parabola whole = lee_closed_parabola(2.0 / rho_g, 12000.1, 3.0);
    assert_int_equal(s.count, 1);
    assert_true(s.has_sill);
    assert_near(s.water[0].set_up, whole.set_up, side);
    assert_near(s.water[0].set_down, whole.set_down, side);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* A held lake whose far pool the wind drains towards the held end: the pool
 * is left full to its crest, 0.1 m below the held level. */
static void a_pool_parted_from_a_held_end_keeps_its_crest_level(void **state) {
    (void)state;
    const double x[] = {0.0, 2000.0, 2000.05, 2000.1, 12000.1};
    const double z[] = {-3.0, -3.0, -0.1, -3.0, -3.0};
    lee_profile p = axis_dig(5, x, z);
    const double a = 2.0 / rho_g;
    lee_steady_input in = axis_wind(&p, -2.0);
    in.start_level = 0.0;
    lee_steady s = axis_solve(&in);
    assert_int_equal(s.count, 2);
    assert_true(s.has_sill);
    assert_near(s.water[0].set_down, lee_open_uniform(-a, 2000.025, 3.0), side);
    assert_near(s.water[1].set_up, -0.1, 1e-9);
    assert_near(s.water[1].set_down,
                sqrt(2.9 * 2.9 - 2.0 * a * 10000.025) - 3.0, side);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* Two pools beyond, over two sills: the wind drains both towards the held end
 * and leaves each full to its own crest. */
static void pools_in_a_row_from_a_held_end_keep_their_crests(void **state) {
    (void)state;
    const double x[] = {0.0,    2000.0,  2000.05, 2000.1,
                        6000.1, 6000.15, 6000.2,  12000.2};
    const double z[] = {-3.0, -3.0, -0.1, -3.0, -3.0, -0.2, -3.0, -3.0};
    lee_profile p = axis_dig(8, x, z);
    const double a = 2.0 / rho_g;
    lee_steady_input in = axis_wind(&p, -2.0);
    in.start_level = 0.0;
    lee_steady s = axis_solve(&in);
    assert_int_equal(s.count, 3);
    assert_near(s.water[1].set_up, -0.1, 1e-9);
    assert_near(s.water[1].set_down, sqrt(2.9 * 2.9 - 2.0 * a * 4000.1) - 3.0,
                side);
    assert_near(s.water[2].set_up, -0.2, 1e-9);
    assert_near(s.water[2].set_down, sqrt(2.8 * 2.8 - 2.0 * a * 6000.1) - 3.0,
                side);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* At rest already: the held level stands 0.5 m below still water and below
 * the crest; the far pool runs down to the crest and stays. */
static void a_low_held_end_drains_a_pool_to_its_crest(void **state) {
    (void)state;
    lee_profile p = dig(-0.2);
    lee_steady_input in = axis_wind(&p, 0.0);
    in.start_level = -0.5;
    lee_steady s = axis_solve(&in);
    assert_int_equal(s.count, 2);
    assert_near(s.water[0].set_up, -0.5, 1e-12);
    assert_near(s.water[0].set_down, -0.5, 1e-12);
    assert_near(s.water[1].set_up, -0.2, 1e-9);
    assert_near(s.water[1].set_down, -0.2, 1e-9);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* A hairpin drawn dry at its bend: two canals of half the water, each as if
 * alone. */
static void a_bend_drawn_dry_parts_the_lake_evenly(void **state) {
    (void)state;
    const double x[] = {0.0, 3e4, 6e4};
    const double z[] = {-1.5, -1.5, -1.5};
    lee_profile p = axis_dig(3, x, z);
    p.bearing[1] = 3.14159265358979323846;
    const lee_steady_input in = axis_wind(&p, -2.0);
    lee_steady s = axis_solve(&in);
    const lee_parabola half = lee_closed_parabola(2.0 / rho_g, 3e4, 1.5);
    assert_int_equal(s.count, 2);
    assert_true(s.is_parted);
    assert_false(s.has_sill);
    assert_near(s.water[0].set_up, half.set_up, 1e-9);
    assert_near(s.water[1].set_up, half.set_up, 1e-9);
    assert_near(s.water[0].to, half.wet_length, 1e-3);
    assert_near(s.water[1].from, 6e4 - half.wet_length, 1e-3);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* Hairpin legs of 20 and 40 km, parted at the bend while the wind grows. As
 * H0 at the bend reaches zero, at a stress a* between, the legs hold
 * (2 a* L)^1.5/(3 a*) each: in the ratio 1 to 2^1.5, and so they stay. */
static void an_uneven_bend_keeps_the_shares_of_its_parting(void **state) {
    (void)state;
    const double x[] = {0.0, 2e4, 6e4};
    const double z[] = {-1.5, -1.5, -1.5};
    lee_profile p = axis_dig(3, x, z);
    p.bearing[1] = 3.14159265358979323846;
    const lee_steady_input in = axis_wind(&p, -3.0);
    lee_steady s = axis_solve(&in);
    const double first = 90e6 / (1.0 + pow(2.0, 1.5));
    assert_int_equal(s.count, 2);
    assert_near_share(s.water[0].volume, first, 1e-6);
    assert_near_share(s.water[0].volume + s.water[1].volume, 90e6, 1e-12);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* Depth at x = length below a dry edge on a bed that falls with the wind, and
 * the area under the surface: x = -h/m - (a/m^2) ln(1 - m h/a) and
 * (a x - h^2/2)/m, integrals of dH/dx = a/H - m. */
static double area_on_slope(double a, double m, double length) {
    double low = 0.0;
    double high = 100.0;
    for (int k = 0; k < 200; k++) {
        const double h = 0.5 * (low + high);
        const double x = -h / m - a / (m * m) * log1p(-m * h / a);
        *(x < length ? &low : &high) = h;
    }
    return (a * length - 0.5 * low * low) / m;
}

/* Legs of 20 km, one level, one falling away from the bend: their shares
 * change with the wind, so it matters when they part: at the a* at which both
 * begin dry at the bend and hold all the water. */
static void a_bend_parts_at_the_wind_that_draws_it_dry(void **state) {
    (void)state;
    const double m = -1e-4;
    const double x[] = {0.0, 2e4, 4e4};
    const double z[] = {-1.5, -1.5, -3.5};
    lee_profile p = axis_dig(3, x, z);
    p.bearing[1] = 3.14159265358979323846;
    const lee_steady_input in = axis_wind(&p, -5.0);
    lee_steady s = axis_solve(&in);
    double low = 1e-6;
    double high = 5.0 / rho_g;
    double first = 0.0;
    for (int k = 0; k < 200; k++) {
        const double a = 0.5 * (low + high);
        first = pow(2.0 * a * 2e4, 1.5) / (3.0 * a);
        const double all = first + area_on_slope(a, m, 2e4);
        *(all < 1.5 * 2e4 + 2.5 * 2e4 ? &low : &high) = a;
    }
    assert_int_equal(s.count, 2);
    /* the parting is known to a thousandth of the wind */
    assert_near_share(s.water[0].volume / 1000.0, first, 1e-3);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* The bend lies in a hollow so shallow that the wind drives thin water out of
 * it both ways; deep water stays one, alike on both sides. */
static void a_hollow_at_a_bend_keeps_water_on_both_sides(void **state) {
    (void)state;
    const double x[] = {0.0, 1e4, 2e4};
    const double z[] = {-2.9, -3.0, -2.9};
    lee_profile p = axis_dig(3, x, z);
    p.bearing[1] = 3.14159265358979323846;
    const lee_steady_input in = axis_wind(&p, -1.0);
    lee_steady s = axis_solve(&in);
    assert_int_equal(s.count, 1);
    assert_near(lee_steady_level_at(&s, 0.0), lee_steady_level_at(&s, 2e4),
                1e-12);
    assert_near_share(s.water[0].volume, 2.95 * 2e4 * 1000.0, 1e-13);
    assert_near(s.water[0].set_down_at, 1e4, 1e-9);
    assert_false(s.has_sill);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* A dry hollow behind a dike 0.3 m above still water: what goes over stays. */
static void water_over_a_dike_fills_the_hollow_behind(void **state) {
    (void)state;
    const double x[] = {0.0, 10e3, 10000.05, 10000.1, 14000.1};
    const double z[] = {-3.0, -3.0, 0.3, 0.1, 0.1};
    lee_profile p = axis_dig(5, x, z);
    const double a = 2.0 / rho_g;
    const lee_steady_input in = axis_wind(&p, 2.0);
    lee_steady s = axis_solve(&in);
    const double kept = brimful(a, 10000.025, 3.3);
    assert_int_equal(s.count, 2);
    assert_near(s.water[0].set_up, 0.3, 1e-9);
    assert_near(s.water[1].volume / 1000.0, 3.0 * 10000.025 - kept, 1.0);
    assert_true(s.has_sill);
    assert_true(isnan(s.water[1].first_period));
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* Whether any of six winds, both ways, meets a sill on a bed of `n` rows that
 * has no crest. */
static bool meets_a_sill(size_t n, const double x[], const double z[]) {
    static const double stress[] = {0.3, 1.0, 3.0, -0.3, -1.0, -3.0};
    bool meets = false;
    for (size_t k = 0; k < sizeof stress / sizeof stress[0]; k++) {
        lee_profile p = axis_dig(n, x, z);
        const lee_steady_input in = axis_wind(&p, stress[k]);
        lee_steady s = axis_solve(&in);
        meets = meets || s.has_sill;
        lee_steady_free(&s);
        lee_profile_free(&p);
    }
    return meets;
}

static void a_bed_between_two_beaches_has_no_sill(void **state) {
    (void)state;
    const double x[] = {0.0, 2e3, 10e3, 12e3};
    const double z[] = {1.0, -4.0, -4.0, 1.0};
    assert_false(meets_a_sill(4, x, z));
}

/* Thin water runs down the steep beach and up the gentle terrace: they drain
 * apart, and yet the bed only rises. */
static void a_beach_of_steep_and_gentle_slopes_has_no_sill(void **state) {
    (void)state;
    const double x[] = {0.0, 5e3, 5100.0, 9e3, 9100.0, 12e3, 12100.0};
    const double z[] = {-5.0, -5.0, -1.0, -0.9, 0.5, 0.52, 2.0};
    assert_false(meets_a_sill(7, x, z));
}

static void a_submerged_shelf_has_no_sill(void **state) {
    (void)state;
    const double x[] = {0.0, 8e3, 8100.0, 15e3};
    const double z[] = {-0.3, -0.31, -5.0, -5.0};
    assert_false(meets_a_sill(4, x, z));
}

/* The wind piles the water of the shelf up at its wall, and the deep water
 * falls below the shelf's edge: two waters without a crest between them. */
static void a_shelf_that_falls_dry_parts_the_water(void **state) {
    (void)state;
    const double x[] = {0.0, 8e3, 8100.0, 15e3};
    const double z[] = {-0.3, -0.31, -5.0, -5.0};
    lee_profile p = axis_dig(4, x, z);
    const lee_steady_input in = axis_wind(&p, -1.5);
    lee_steady s = axis_solve(&in);
    assert_int_equal(s.count, 2);
    assert_true(s.is_parted);
    assert_true(s.water[0].was_parted && s.water[1].was_parted);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

/* A lagoon behind a gentle bar, 0.2 m above still water: a storm drives all
 * of it over the bar. */
static void a_lagoon_blown_empty_went_over_a_sill(void **state) {
    (void)state;
    const double x[] = {0.0, 10e3, 10050.0, 10500.0, 14100.0};
    const double z[] = {-5.0, -4.0, 0.2, -0.5, 1.0};
    lee_profile p = axis_dig(5, x, z);
    const lee_steady_input in = axis_wind(&p, -3.0);
    lee_steady s = axis_solve(&in);
    assert_int_equal(s.count, 1);
    assert_true(s.water[0].to < 10050.0);
    assert_true(s.has_sill);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

static void a_puddle_thinner_than_the_dry_depth_is_no_water(void **state) {
    (void)state;
    const double x[] = {0.0, 1e4, 10001.0, 10002.0, 11e3};
    const double z[] = {-3.0, -3.0, 1.0, -0.005, -0.005};
    lee_profile p = axis_dig(5, x, z);
    lee_steady_input in = axis_wind(&p, 0.0);
    lee_steady s = axis_solve(&in);
    assert_int_equal(s.count, 1);
    assert_near(s.dry_length, 998.0, 1.0);
    lee_steady_free(&s);
    in.dry_depth = 0.001;
    s = axis_solve(&in);
    assert_int_equal(s.count, 2);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_wind_too_weak_to_spill_leaves_each_pool_its_own),
        cmocka_unit_test(a_pool_spills_until_its_lee_level_stands_at_the_crest),
        cmocka_unit_test(the_mirrored_wind_spills_the_other_pool),
        cmocka_unit_test(a_sill_that_falls_dry_parts_the_lake),
        cmocka_unit_test(a_covered_sill_leaves_one_water),
        cmocka_unit_test(pools_join_where_both_stand_above_the_crest),
        cmocka_unit_test(a_pool_parted_from_a_held_end_keeps_its_crest_level),
        cmocka_unit_test(pools_in_a_row_from_a_held_end_keep_their_crests),
        cmocka_unit_test(a_low_held_end_drains_a_pool_to_its_crest),
        cmocka_unit_test(a_bend_drawn_dry_parts_the_lake_evenly),
        cmocka_unit_test(an_uneven_bend_keeps_the_shares_of_its_parting),
        cmocka_unit_test(a_bend_parts_at_the_wind_that_draws_it_dry),
        cmocka_unit_test(a_hollow_at_a_bend_keeps_water_on_both_sides),
        cmocka_unit_test(water_over_a_dike_fills_the_hollow_behind),
        cmocka_unit_test(a_bed_between_two_beaches_has_no_sill),
        cmocka_unit_test(a_beach_of_steep_and_gentle_slopes_has_no_sill),
        cmocka_unit_test(a_submerged_shelf_has_no_sill),
        cmocka_unit_test(a_shelf_that_falls_dry_parts_the_water),
        cmocka_unit_test(a_lagoon_blown_empty_went_over_a_sill),
        cmocka_unit_test(a_puddle_thinner_than_the_dry_depth_is_no_water),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
