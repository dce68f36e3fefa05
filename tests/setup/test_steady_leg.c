/* One segment is crossed exactly, whatever its slope and the wind. */
#include "support/check.h"

#include <stdbool.h>

#include "setup/steady_leg.h"

static lee_leg lay(double slope, double drive) {
    lee_leg leg = {.length = 1000.0,
                   .bed = -5.0,
                   .slope = slope,
                   .width = 100.0,
                   .full = drive};
    lee_leg_blow(&leg, 1.0);
    return leg;
}

/* Distance from depth h0 to h1 by H dH/(a - mH) = dx, integrated:
 * -(h1 - h0)/m - (a/m^2) ln[(a - m h1)/(a - m h0)]. */
static double distance(double a, double m, double h0, double h1) {
    return -(h1 - h0) / m - a / (m * m) * log((a - m * h1) / (a - m * h0));
}

static void a_level_bed_makes_a_parabola(void **state) {
    (void)state;
    const lee_leg leg = lay(0.0, 2e-4);
    const lee_crossing c = lee_leg_cross(&leg, 0.0, 1.0);
    assert_near(c.depth, sqrt(1.0 + 2.0 * 2e-4 * 1000.0), 1e-14);
    assert_near(c.offset, 1000.0, 1e-12);
    assert_false(c.is_dry);
}

static void a_slope_keeps_its_implicit_integral(void **state) {
    (void)state;
    static const double rows[][3] = {
        {2e-3,  1e-4,  3.0}, /* rising with the wind, well above the film */
        {-2e-3, 1e-4,  3.0}, /* falling with the wind                     */
        {2e-3,  -1e-4, 6.0}, /* rising against it                         */
        {3e-4,  1e-4,  0.1}, /* a sheet that grows towards a/m            */
        {3e-4,  1e-4,  2.0}, /* a sheet that thins towards a/m            */
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        const lee_leg leg = lay(rows[i][0], rows[i][1]);
        const lee_crossing c = lee_leg_cross(&leg, 0.0, rows[i][2]);
        assert_int_equal(c.count, 1);
        const double x = distance(rows[i][1], rows[i][0], rows[i][2], c.depth);
        assert_near(x, 1000.0, 1e-8);
    }
}

static void without_wind_the_surface_is_level(void **state) {
    (void)state;
    const lee_leg leg = lay(-3e-3, 0.0);
    const lee_crossing c = lee_leg_cross(&leg, 0.0, 1.0);
    assert_near(c.depth, 4.0, 1e-14);
}

static void
without_wind_a_beach_ends_where_the_bed_meets_the_level(void **state) {
    (void)state;
    const lee_leg leg = lay(4e-3, 0.0);
    const lee_crossing c = lee_leg_cross(&leg, 0.0, 2.0);
    assert_true(c.is_dry);
    assert_near(c.offset, 500.0, 1e-10);
}

/* H = sqrt(2 a x) from a dry edge: against the wind it ends there. */
static void an_upwind_march_finds_the_dry_edge(void **state) {
    (void)state;
    const lee_leg leg = lay(0.0, -2e-4);
    const lee_crossing c = lee_leg_cross(&leg, 0.0, 0.6);
    assert_true(c.is_dry);
    assert_near(c.offset, 0.6 * 0.6 / (2.0 * 2e-4), 1e-9);
}

static void a_downwind_march_starts_at_a_dry_edge(void **state) {
    (void)state;
    const lee_leg leg = lay(0.0, 2e-4);
    const lee_crossing c = lee_leg_cross(&leg, 100.0, 0.0);
    assert_near(c.depth, sqrt(2.0 * 2e-4 * 900.0), 1e-14);
}

/* Film rule: from H = 2a/m on the surface rises by m/2, so the depth falls by
 * m/2 and is gone after 4a/m^2. */
static void a_film_slides_back_from_a_lee_beach(void **state) {
    (void)state;
    const double a = 1e-4;
    const double m = 2e-3;
    const lee_leg leg = lay(m, a);
    const lee_crossing c = lee_leg_cross(&leg, 0.0, 0.5);
    const double film = 2.0 * a / m;
    assert_true(c.is_dry);
    assert_int_equal(c.count, 2);
    assert_near(c.offset, distance(a, m, 0.5, film) + 4.0 * a / (m * m), 1e-9);
}

/* The same shore reached from the other side, against the wind. */
static void a_march_from_a_lee_shore_retraces_the_march_to_it(void **state) {
    (void)state;
    const lee_leg there = lay(2e-3, 1e-4);
    const lee_crossing to = lee_leg_cross(&there, 0.0, 0.5);
    const lee_leg back = lay(-2e-3, -1e-4);
    const lee_crossing from = lee_leg_cross(&back, 1000.0 - to.offset, 0.0);
    assert_near(from.depth, 0.5, 1e-12);
}

/* 2a/m = 0.25 m parts the two: a slope of 8a. */
static void a_gentle_slope_is_flooded_instead(void **state) {
    (void)state;
    assert_true(lay(8.001e-4, 1e-4).has_film);
    const lee_leg gentle = lay(7.999e-4, 1e-4);
    assert_false(gentle.has_film);
    assert_int_equal(gentle.way, 1);
    assert_false(lee_leg_cross(&gentle, 0.0, 0.05).is_dry);
}

static void the_level_rises_evenly_along_the_span(void **state) {
    (void)state;
    const lee_leg leg = lay(2e-3, 1e-4);
    const lee_crossing c = lee_leg_cross(&leg, 0.0, 6.0);
    const lee_spot start = lee_piece_at(&c.piece[0], 0.0);
    const lee_spot middle = lee_piece_at(&c.piece[0], 0.5);
    const lee_spot end = lee_piece_at(&c.piece[0], 1.0);
    assert_near(middle.level, 0.5 * (start.level + end.level), 1e-14);
    assert_near(start.level, 1.0, 1e-15);
}

static void the_node_lies_at_level_zero(void **state) {
    (void)state;
    const lee_leg leg = lay(0.0, 2e-4);
    const lee_crossing c = lee_leg_cross(&leg, 0.0, 4.98);
    const double share = lee_piece_node(&c.piece[0]);
    const lee_spot node = lee_piece_at(&c.piece[0], share);
    assert_near(node.level, 0.0, 1e-14);
    /* H = 5 on H^2 = 4.98^2 + 2 a x */
    assert_near(node.x, (25.0 - 4.98 * 4.98) / 4e-4, 1e-9);
}

/* Multiplying H dH/dx = a - mH by 1 and by H and integrating gives
 * int H dx = (a X - (h1^2 - h0^2)/2)/m and
 * int x H dx = (a X^2/2 - X h1^2/2 + (1/2) int H^2 dx)/m with
 * int H^2 dx = (a int H dx - (h1^3 - h0^3)/3)/m. */
static double volume_by_parts(const lee_leg *leg, double h0, double h1) {
    const double a = leg->drive;
    const double m = leg->slope;
    const double x = leg->length;
    const double first = (a * x - 0.5 * (h1 * h1 - h0 * h0)) / m;
    const double square = (a * first - (h1 * h1 * h1 - h0 * h0 * h0) / 3.0) / m;
    const double moment =
        (0.5 * a * x * x - 0.5 * x * h1 * h1 + 0.5 * square) / m;
    return leg->width * first + leg->widening * moment;
}

static void the_volume_is_exact_on_a_widening_slope(void **state) {
    (void)state;
    static const double rows[][3] = {
        {5e-3,  1e-4,  5.6 }, /* depth falls tenfold */
        {-5e-3, 2e-4,  0.2 }, /* and grows           */
        {5e-2,  -1e-3, 51.0},
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        lee_leg leg = lay(rows[i][0], rows[i][1]);
        leg.widening = 0.3;
        const lee_crossing c = lee_leg_cross(&leg, 0.0, rows[i][2]);
        assert_int_equal(c.count, 1);
        assert_near_share(lee_piece_volume(&c.piece[0]),
                          volume_by_parts(&leg, rows[i][2], c.depth), 1e-11);
    }
}

static void the_volume_below_a_dry_edge_is_exact(void **state) {
    (void)state;
    const lee_leg leg = lay(0.0, 2e-4);
    const lee_crossing c = lee_leg_cross(&leg, 0.0, 0.0);
    assert_near_share(lee_piece_volume(&c.piece[0]),
                      100.0 * pow(2.0 * 2e-4 * 1000.0, 1.5) / (3.0 * 2e-4),
                      1e-14);
}

/* A sheet 200 e-foldings long is a/m deep nearly everywhere:
 * int H dx = a X/m - (h1^2 - h0^2)/(2m). */
static void the_volume_of_a_long_sheet_is_exact(void **state) {
    (void)state;
    lee_leg leg = lay(5e-3, 1.25e-4 * 5.0 * 1.01);
    leg.has_film = false;
    leg.way = 1;
    leg.length = 5000.0;
    const lee_crossing c = lee_leg_cross(&leg, 0.0, 0.0);
    const double film = leg.drive / leg.slope;
    assert_near_share(c.depth, film, 1e-12);
    assert_near_share(lee_piece_volume(&c.piece[0]),
                      100.0 * (film * 5000.0 - 0.5 * film * film / leg.slope),
                      1e-12);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_level_bed_makes_a_parabola),
        cmocka_unit_test(a_slope_keeps_its_implicit_integral),
        cmocka_unit_test(without_wind_the_surface_is_level),
        cmocka_unit_test(
            without_wind_a_beach_ends_where_the_bed_meets_the_level),
        cmocka_unit_test(an_upwind_march_finds_the_dry_edge),
        cmocka_unit_test(a_downwind_march_starts_at_a_dry_edge),
        cmocka_unit_test(a_film_slides_back_from_a_lee_beach),
        cmocka_unit_test(a_march_from_a_lee_shore_retraces_the_march_to_it),
        cmocka_unit_test(a_gentle_slope_is_flooded_instead),
        cmocka_unit_test(the_level_rises_evenly_along_the_span),
        cmocka_unit_test(the_node_lies_at_level_zero),
        cmocka_unit_test(the_volume_is_exact_on_a_widening_slope),
        cmocka_unit_test(the_volume_below_a_dry_edge_is_exact),
        cmocka_unit_test(the_volume_of_a_long_sheet_is_exact),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
