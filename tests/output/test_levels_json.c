/* JSON summaries carry the documented names, SI numbers, and null for what is
 * not there. */
#include "support/captured.h"
#include "support/results.h"

#include <jansson.h>

static json_t *steady_of(const hand_made *made) {
    captured out;
    capture_begin(&out);
    assert_int_equal(
        lee_json_steady(out.stream, &made->from, &made->steady, NULL), LEE_OK);
    json_t *root = json_loads(capture_end(&out), JSON_REJECT_DUPLICATES, NULL);
    capture_free(&out);
    assert_non_null(root);
    return root;
}

static json_t *run_of(const hand_made *made) {
    captured out;
    capture_begin(&out);
    assert_int_equal(lee_json_run(out.stream, &made->from, &made->run, NULL),
                     LEE_OK);
    json_t *root = json_loads(capture_end(&out), JSON_REJECT_DUPLICATES, NULL);
    capture_free(&out);
    assert_non_null(root);
    return root;
}

static json_t *item(json_t *parent, const char *list, size_t index) {
    json_t *found = json_array_get(json_object_get(parent, list), index);
    assert_non_null(found);
    return found;
}

static double number(json_t *parent, const char *name) {
    const json_t *found = json_object_get(parent, name);
    assert_true(json_is_number(found));
    return json_number_value(found);
}

static const char *text(json_t *parent, const char *name) {
    const json_t *found = json_object_get(parent, name);
    assert_true(json_is_string(found));
    return json_string_value(found);
}

static void assert_pair(json_t *parent, const char *name, double low,
                        double high) {
    assert_near(json_number_value(item(parent, name, 0)), low, 1e-9);
    assert_near(json_number_value(item(parent, name, 1)), high, 1e-9);
}

static void every_summary_says_what_it_comes_from(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    json_t *root = steady_of(&made);
    assert_string_equal(text(root, "program"), "leewater");
    assert_string_equal(text(root, "version"), lee_version());
    assert_string_equal(text(root, "case"), "marrow.yaml");
    assert_string_equal(text(root, "datum"), "Marrow gauge zero");
    assert_string_equal(text(root, "caution"), lee_caution());
    json_t *method = json_object_get(root, "method");
    assert_string_equal(text(method, "drag"), "garratt-linear-1977");
    assert_near(number(item(method, "corrections", 0), "factor"), 1.094, 1e-9);
    json_decref(root);
}

static void a_wind_has_its_levels_with_ranges(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    json_t *root = steady_of(&made);
    json_t *wind = item(root, "winds", 0);
    assert_near(number(wind, "speed_m_s"), 22.0, 1e-9);
    assert_near(number(wind, "from_degree"), 240.0, 1e-6);
    assert_near(number(wind, "drag_coefficient"), 2.36e-3, 1e-12);
    assert_near(number(wind, "stress_Pa"), 1.675, 1e-9);
    assert_near(number(wind, "return_flow"), 1.072, 1e-9);
    assert_near(number(wind, "set_up_m"), 0.412, 1e-9);
    assert_near(number(wind, "set_down_m"), -0.43, 1e-9);
    assert_near(number(wind, "tilt_m"), 0.842, 1e-9);
    assert_near(number(wind, "cross_tilt_m"), 0.021, 1e-9);
    json_t *water = item(wind, "waters", 0);
    assert_pair(water, "set_up_range_m", 0.31, 0.55);
    assert_pair(water, "set_down_range_m", -0.6, -0.32);
    assert_near(json_number_value(item(water, "nodes_m", 0)), 5900.0, 1e-6);
    json_t *station = item(wind, "stations", 1);
    assert_string_equal(text(station, "name"), "Lee landing");
    assert_near(number(station, "level_m"), 101.755, 1e-6);
    assert_pair(station, "range_m", 101.65, 101.89);
    assert_near(number(station, "section_depth_m"), 4.755, 1e-9);
    json_t *threshold = item(station, "thresholds", 0);
    assert_near(number(threshold, "level_m"), 101.8, 1e-9);
    assert_string_equal(text(threshold, "side"), "above");
    assert_true(json_is_false(json_object_get(threshold, "is_reached")));
    assert_true(
        json_is_true(json_object_get(threshold, "is_reached_in_range")));
    json_decref(root);
}

static void a_dry_level_is_null_and_says_why(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    const double none = (double)NAN;
    made.level[0] = (lee_station_level){
        {none, none, none},
        none, none
    };
    json_t *root = steady_of(&made);
    json_t *station = item(item(root, "winds", 0), "stations", 0);
    assert_true(json_is_null(json_object_get(station, "level_m")));
    assert_true(json_is_null(item(station, "range_m", 0)));
    assert_string_equal(text(station, "reason"), "dry");
    json_decref(root);
}

static void a_run_has_extremes_with_times_and_ranges(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    json_t *root = run_of(&made);
    json_t *station = item(root, "stations", 0);
    assert_near(number(station, "chainage_m"), 400.0, 1e-9);
    assert_near(number(station, "max_m"), 101.2, 1e-6);
    assert_pair(station, "max_range_m", 101.15, 101.25);
    assert_string_equal(text(station, "max_time"), "2031-01-14T00:20:00Z");
    assert_near(number(station, "min_m"), 101.0, 1e-6);
    assert_string_equal(text(station, "min_time"), "2031-01-14T00:00:00Z");
    assert_near(number(root, "step_s"), 60.0, 0.0);
    assert_near(number(root, "cells"), 200.0, 0.0);
    assert_near(number(root, "numerical_error_m"), 0.003, 1e-12);
    assert_near(number(root, "volume_defect"), 2e-14, 1e-22);
    json_decref(root);
}

static void a_run_names_its_strongest_wind(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    json_t *root = run_of(&made);
    json_t *wind = json_object_get(root, "strongest_wind");
    assert_near(number(wind, "speed_10_m_over_water_m_s"), 23.0, 1e-9);
    assert_near(number(wind, "from_degree"), 243.0, 1e-6);
    assert_string_equal(text(wind, "time"), "2031-01-14T00:19:00Z");
    json_decref(root);
}

static void a_run_in_a_calm_has_no_strongest_wind(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    made.run.strongest = 0.0;
    json_t *root = run_of(&made);
    json_t *wind = json_object_get(root, "strongest_wind");
    assert_near(number(wind, "speed_10_m_over_water_m_s"), 0.0, 0.0);
    assert_true(json_is_null(json_object_get(wind, "from_degree")));
    assert_true(json_is_null(json_object_get(wind, "time")));
    assert_string_equal(text(wind, "reason"), "calm throughout");
    json_decref(root);
}

/* Lowest level 101.0 m over a bed at 99.1 m; the other station has no bed. */
static void a_run_has_the_least_depth_over_a_stations_bed(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    json_t *root = run_of(&made);
    json_t *quay = item(root, "stations", 0);
    assert_near(number(quay, "least_depth_m"), 1.9, 1e-9);
    assert_null(json_object_get(item(root, "stations", 1), "least_depth_m"));
    json_decref(root);
}

static void a_bed_that_falls_dry_has_a_reason_for_no_least_depth(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    made.station[0].bed = 101.5;
    json_t *root = run_of(&made);
    json_t *quay = item(root, "stations", 0);
    assert_true(json_is_null(json_object_get(quay, "least_depth_m")));
    assert_string_equal(text(quay, "least_depth_reason"), "its bed falls dry");
    json_decref(root);
}

static void a_threshold_that_was_reached_has_times(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    json_t *root = run_of(&made);
    json_t *seen = item(item(root, "stations", 1), "thresholds", 0);
    assert_near(number(seen, "level_m"), 101.8, 1e-6);
    assert_string_equal(text(seen, "side"), "above");
    assert_string_equal(text(seen, "first_time"), "2031-01-14T00:05:00Z");
    assert_near(number(seen, "longest_s"), 7800.0, 1e-9);
    assert_near(number(seen, "total_s"), 9000.0, 1e-9);
    assert_near(number(seen, "times"), 2.0, 0.0);
    assert_string_equal(text(seen, "return_time"), "2031-01-14T02:15:00Z");
    json_decref(root);
}

static void a_threshold_that_was_not_reached_has_none(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    json_t *root = run_of(&made);
    json_t *seen = item(item(root, "stations", 1), "thresholds", 1);
    assert_string_equal(text(seen, "side"), "below");
    assert_true(json_is_null(json_object_get(seen, "first_time")));
    assert_true(json_is_null(json_object_get(seen, "return_time")));
    assert_near(number(seen, "times"), 0.0, 0.0);
    json_decref(root);
}

static void an_own_error_that_was_left_out_is_null_with_a_reason(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    made.run.numerical_error = (double)NAN;
    json_t *root = run_of(&made);
    assert_true(json_is_null(json_object_get(root, "numerical_error_m")));
    assert_string_equal(text(root, "numerical_error_reason"), "not computed");
    json_decref(root);
}

static void a_residual_that_is_not_there_has_its_true_reason(void **state) {
    (void)state;
    static const struct {
        lee_residual state;
        const char *reason;
    } rows[] = {
        {LEE_RESIDUAL_NO_WIND, "no wind blows in the run"                },
        {LEE_RESIDUAL_NO_DROP,
         "the strongest wind does not drop within the run"               },
        {LEE_RESIDUAL_DRY,     "the station lies dry once the wind drops"},
        {LEE_RESIDUAL_UNSEEN,
         "a gap or a start at rest follows the strongest wind"           },
    };
    hand_made made;
    make(&made);
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        made.series[1].residual_state = rows[i].state;
        json_t *root = run_of(&made);
        json_t *there = item(root, "stations", 0);
        json_t *none = item(root, "stations", 1);
        assert_null(json_object_get(there, "residual_reason"));
        assert_true(json_is_null(json_object_get(none, "residual_m")));
        assert_string_equal(text(none, "residual_reason"), rows[i].reason);
        json_decref(root);
    }
}

static void names_that_are_not_utf8_still_give_valid_json(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    (void)word(&made, 0, "Quai d'\xE9t\xE9");
    json_t *root = run_of(&made);
    assert_string_equal(text(item(root, "stations", 0), "name"),
                        "Quai d'\xEF\xBF\xBDt\xEF\xBF\xBD");
    json_decref(root);
}

static void warnings_and_remarks_are_lists_of_sentences(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    assert_int_equal(lee_notes_add(&made.run.warnings, NULL, "gaps"), LEE_OK);
    assert_int_equal(lee_notes_add(&made.from.notes, NULL, "far off"), LEE_OK);
    json_t *root = run_of(&made);
    assert_string_equal(json_string_value(item(root, "warnings", 0)), "gaps");
    assert_string_equal(json_string_value(item(root, "remarks", 0)), "far off");
    lee_notes_free(&made.run.warnings);
    lee_notes_free(&made.from.notes);
    json_decref(root);
}

static void a_level_that_may_fall_dry_gives_no_reason(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    made.level[0].level.low = (double)NAN;
    json_t *root = steady_of(&made);
    json_t *station = item(item(root, "winds", 0), "stations", 0);
    assert_near(number(station, "level_m"), 100.95, 1e-6);
    assert_true(json_is_null(item(station, "range_m", 0)));
    assert_null(json_object_get(station, "reason"));
    json_decref(root);
}

static void a_direction_is_told_from_0_to_360_degrees(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    made.wind[0].wind.from = degrees(-10.0);
    json_t *root = steady_of(&made);
    assert_near(number(item(root, "winds", 0), "from_degree"), 350.0, 1e-6);
    json_decref(root);
}

static void a_threshold_that_is_still_passed_has_no_return(void **state) {
    (void)state;
    hand_made made;
    make(&made);
    made.exceedance[0].has_returned = false;
    json_t *root = run_of(&made);
    json_t *seen = item(item(root, "stations", 1), "thresholds", 0);
    assert_true(json_is_null(json_object_get(seen, "return_time")));
    json_decref(root);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(every_summary_says_what_it_comes_from),
        cmocka_unit_test(a_wind_has_its_levels_with_ranges),
        cmocka_unit_test(a_dry_level_is_null_and_says_why),
        cmocka_unit_test(a_run_has_extremes_with_times_and_ranges),
        cmocka_unit_test(a_run_names_its_strongest_wind),
        cmocka_unit_test(a_run_in_a_calm_has_no_strongest_wind),
        cmocka_unit_test(a_run_has_the_least_depth_over_a_stations_bed),
        cmocka_unit_test(a_bed_that_falls_dry_has_a_reason_for_no_least_depth),
        cmocka_unit_test(a_threshold_that_was_reached_has_times),
        cmocka_unit_test(a_threshold_that_was_not_reached_has_none),
        cmocka_unit_test(an_own_error_that_was_left_out_is_null_with_a_reason),
        cmocka_unit_test(a_residual_that_is_not_there_has_its_true_reason),
        cmocka_unit_test(names_that_are_not_utf8_still_give_valid_json),
        cmocka_unit_test(warnings_and_remarks_are_lists_of_sentences),
        cmocka_unit_test(a_level_that_may_fall_dry_gives_no_reason),
        cmocka_unit_test(a_direction_is_told_from_0_to_360_degrees),
        cmocka_unit_test(a_threshold_that_is_still_passed_has_no_return),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
