/* Steady levels as text name both ends, the datum, and what is unsure. */
#include "support/captured.h"
#include "support/results.h"

static const char *printed(captured *out, const hand_made *made,
                           lee_unit_system units) {
    capture_begin(out);
    assert_int_equal(
        lee_print_steady(out->stream, &made->from, &made->steady, units, NULL),
        LEE_OK);
    return capture_end(out);
}

static void the_head_names_lake_still_water_and_datum(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "January gale\nMarrow Tarn, still water 101.350 m "
                          "above Marrow gauge zero\n");
    capture_free(&out);
}

static void both_ends_are_named_with_their_range_and_place(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "0.412 m (0.310 to 0.550), lee shore, 12.00 km\n");
    assert_contains(text,
                    "-0.430 m (-0.600 to -0.320), windward shore, 0.00 km\n");
    assert_contains(text, "node              at 5.90 km\n");
    capture_free(&out);
}

static void a_wind_across_the_axis_names_no_end(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.wind[0].is_across = true;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_lacks(text, "lee shore");
    assert_lacks(text, "windward shore");
    assert_contains(text, "across the axis: no end is the lee\n");
    capture_free(&out);
}

static void a_station_has_depth_over_its_own_bed_or_the_section(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "Levels, m above Marrow gauge zero\n");
    assert_contains(text, "North quay     0.40 km   100.950  (100.800 to "
                          "101.050)  depth 1.850 m\n");
    assert_contains(text, "Lee landing   11.80 km   101.755  (101.650 to "
                          "101.890)  section depth 4.755 m\n");
    capture_free(&out);
}

static void a_dry_station_reads_dry(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const double none = (double)NAN;
    made.level[0] = (lee_station_level){
        {none, none, none},
        none, none
    };
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "North quay     0.40 km       dry ");
    capture_free(&out);
}

/* 0.412 m is 1.352 ft, 12 km 7.456 mi, 22 m/s 49.21 mph. */
static void american_units_reach_every_line(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_US);
    assert_contains(text, "Wind 49.2 mph from 240 degrees\n");
    assert_contains(text, "1.35 ft (1.02 to 1.80), lee shore, 7.46 mi\n");
    assert_lacks(text, " km");
    assert_lacks(text, " m,");
    assert_lacks(text, "m/s\n");
    capture_free(&out);
}

static void method_limits_and_caution_close_the_text(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    const char *method = strstr(text, "\nMethod\n");
    assert_non_null(method);
    assert_contains(method, "height x 1.094: neutral log profile\n");
    assert_contains(method, "\nLimits\n");
    assert_contains(method, "\nPlanning estimates. ");
    capture_free(&out);
}

static void warnings_stand_out_from_the_numbers(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    assert_int_equal(
        lee_notes_add(&made.wind[0].warnings, NULL, "drag extrapolated"),
        LEE_OK);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "\n  ! drag extrapolated\n");
    lee_notes_free(&made.wind[0].warnings);
    capture_free(&out);
}

static void two_waters_are_told_apart(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    lee_water_estimate waters[2] = {made.water[0], made.water[0]};
    waters[0].to = 4000.0;
    waters[1].from = 5000.0;
    made.wind[0].water_count = 2;
    made.wind[0].water = waters;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "Water 1 of 2, 0.00 km to 4.00 km\n");
    assert_contains(text, "Water 2 of 2, 5.00 km to 12.00 km\n");
    capture_free(&out);
}

/* Four winds alike but for their speed: a line each, and the block of the one
 * with the highest set-up. */
static void a_scan_is_a_table_and_its_worst_wind(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    lee_wind_estimate winds[4];
    for (size_t i = 0; i < 4; i++) {
        winds[i] = made.wind[0];
        winds[i].wind.from = degrees(90.0 * (double)i);
        winds[i].set_up.value = i == 2 ? 0.9 : 0.1;
    }
    winds[3].is_across = true;
    made.steady.count = 4;
    made.steady.wind = winds;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "    22.0     90     98   12.00    0.100 (0.310 to "
                          "0.550)");
    assert_contains(text, "    22.0    270     98  across    0.100");
    const char *block = strstr(text, "Highest set-up\n");
    assert_non_null(block);
    assert_contains(block, "Wind 22.0 m/s from 180 degrees\n");
    assert_lacks(block, "from 90 degrees");
    capture_free(&out);
}

static void a_scan_names_the_lowest_set_down_too(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    lee_wind_estimate winds[4];
    for (size_t i = 0; i < 4; i++) {
        winds[i] = made.wind[0];
        winds[i].wind.from = degrees(90.0 * (double)i);
        winds[i].set_up.value = i == 2 ? 0.9 : 0.1;
        winds[i].set_down.value = i == 3 ? -0.9 : -0.1;
    }
    made.steady.count = 4;
    made.steady.wind = winds;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    const char *block = strstr(text, "\nLowest set-down\n");
    assert_non_null(block);
    assert_contains(block, "Wind 22.0 m/s from 270 degrees\n");
    capture_free(&out);
    winds[2].set_down.value = -1.0;
    text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "\nHighest set-up and lowest set-down\n");
    assert_lacks(text, "\nLowest set-down\n");
    capture_free(&out);
}

static void a_scan_tells_the_extremes_of_each_station(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    lee_wind_estimate winds[4];
    lee_station_level levels[4][8];
    assert_true(made.from.problem.station_count <= 8);
    for (size_t i = 0; i < 4; i++) {
        winds[i] = made.wind[0];
        winds[i].wind.from = degrees(90.0 * (double)i);
        for (size_t k = 0; k < made.from.problem.station_count; k++) {
            levels[i][k] = made.wind[0].station[k];
        }
        levels[i][0].level =
            (lee_ranged){100.0 + (double)i, 99.0 + (double)i, 104.0};
        winds[i].station = levels[i];
    }
    levels[1][0].level.value = NAN;
    made.steady.count = 4;
    made.steady.wind = winds;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "highest   103.000  (102.000 to 104.000)  wind 22.0 "
                          "m/s from 270 degrees\n");
    assert_contains(text, "lowest        dry");
    capture_free(&out);
}

/* Lee landing: 101.755 m, up to 101.89 m; thresholds above 101.8 m and below
 * 100.9 m. */
static void each_threshold_is_told_reached_or_not(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "    above 101.800 m: only by the high end of the "
                          "range\n    below 100.900 m: not reached\n");
    capture_free(&out);
    made.threshold[0].level = 101.7;
    text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "    above 101.700 m: reached\n");
    capture_free(&out);
}

/* Eight winds round; those from 315, 0 and 45 degrees raise the landing over
 * 101.8 m, the one from 90 degrees only its range. */
static void a_scan_tells_which_directions_reach_a_threshold(void **state) {
    (void)state;
    static const double level[] = {102.0, 101.9, 101.7, 101.0,
                                   101.0, 101.0, 101.0, 101.85};
    hand_made made;
    captured out;
    make(&made);
    lee_wind_estimate winds[8];
    lee_station_level levels[8][2];
    for (size_t i = 0; i < 8; i++) {
        winds[i] = made.wind[0];
        winds[i].wind.from = degrees(45.0 * (double)i);
        levels[i][0] = made.level[0];
        levels[i][1] = made.level[1];
        levels[i][1].level =
            (lee_ranged){level[i], level[i] - 0.05, level[i] + 0.15};
        winds[i].station = levels[i];
    }
    made.steady.count = 8;
    made.steady.wind = winds;
    made.from.problem.wind.kind = LEE_WIND_SCAN;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "      above 101.800 m: reached from 315 to 45 "
                          "degrees; only within the range");
    assert_contains(text, "\n      from 90 degrees\n");
    capture_free(&out);
    made.from.problem.wind.kind = LEE_WIND_GIVEN;
    text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "above 101.800 m: reached by 22.0 m/s from 0, 22.0 "
                          "m/s from 45,");
    capture_free(&out);
}

static void half_degrees_of_a_wind_are_shown(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.wind[0].wind.from = degrees(22.5);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "\nWind 22.0 m/s from 22.5 degrees\n");
    capture_free(&out);
}

static void a_station_above_the_water_is_told_dry(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.level[0].depth = NAN;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "(100.800 to 101.050)  its bed is dry\n");
    capture_free(&out);
}

static void a_cross_tilt_below_the_last_digit_is_none(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.wind[0].cross_tilt = 1e-17;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "cross-axis tilt   none\n");
    capture_free(&out);
}

/* Three of four winds share a warning but for its number. */
static void a_warning_of_many_winds_is_told_once(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    lee_wind_estimate winds[4];
    lee_notes notes[4] = {{0}};
    for (size_t i = 0; i < 4; i++) {
        winds[i] = made.wind[0];
        winds[i].wind.from = degrees(90.0 * (double)i);
        if (i > 0) {
            assert_int_equal(
                lee_notes_add(&notes[i], NULL, "%d m fall dry", 10 * (int)i),
                LEE_OK);
        }
        winds[i].warnings = notes[i];
    }
    made.steady.count = 4;
    made.steady.wind = winds;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "\nWarnings\n  - from 90 degrees, and 2 more winds "
                          "alike: 10 m fall dry\n");
    assert_lacks(text, "20 m fall dry");
    for (size_t i = 0; i < 4; i++) {
        lee_notes_free(&notes[i]);
    }
    capture_free(&out);
}

static void warnings_that_differ_in_words_are_told_apart(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    lee_wind_estimate winds[4];
    lee_notes notes[4] = {{0}};
    for (size_t i = 0; i < 4; i++) {
        winds[i] = made.wind[0];
        assert_int_equal(lee_notes_add(&notes[i], NULL, "%s",
                                       i < 3 ? "shore dry" : "shore drying"),
                         LEE_OK);
        winds[i].warnings = notes[i];
    }
    made.steady.count = 4;
    made.steady.wind = winds;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "and 2 more winds alike: shore dry\n");
    assert_contains(text, "degrees: shore drying\n");
    for (size_t i = 0; i < 4; i++) {
        lee_notes_free(&notes[i]);
    }
    capture_free(&out);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_head_names_lake_still_water_and_datum),
        cmocka_unit_test(both_ends_are_named_with_their_range_and_place),
        cmocka_unit_test(a_wind_across_the_axis_names_no_end),
        cmocka_unit_test(a_station_has_depth_over_its_own_bed_or_the_section),
        cmocka_unit_test(a_dry_station_reads_dry),
        cmocka_unit_test(american_units_reach_every_line),
        cmocka_unit_test(method_limits_and_caution_close_the_text),
        cmocka_unit_test(warnings_stand_out_from_the_numbers),
        cmocka_unit_test(two_waters_are_told_apart),
        cmocka_unit_test(a_scan_is_a_table_and_its_worst_wind),
        cmocka_unit_test(a_scan_names_the_lowest_set_down_too),
        cmocka_unit_test(a_scan_tells_the_extremes_of_each_station),
        cmocka_unit_test(each_threshold_is_told_reached_or_not),
        cmocka_unit_test(a_scan_tells_which_directions_reach_a_threshold),
        cmocka_unit_test(half_degrees_of_a_wind_are_shown),
        cmocka_unit_test(a_station_above_the_water_is_told_dry),
        cmocka_unit_test(a_cross_tilt_below_the_last_digit_is_none),
        cmocka_unit_test(a_warning_of_many_winds_is_told_once),
        cmocka_unit_test(warnings_that_differ_in_words_are_told_apart),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
