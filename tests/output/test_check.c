/* Check says what was understood: lake, record, gaps, doubts, corrections. */
#include "support/captured.h"
#include "support/results.h"

#include <jansson.h>

typedef struct checked {
    hand_made made;
    char *path;
    lee_wind_gap gap[2];
    lee_problem_check check;
    captured out;
} checked;

static void make_check(checked *all) {
    make(&all->made);
    all->gap[0] = (lee_wind_gap){made_day, made_day + 7200, false};
    all->gap[1] = (lee_wind_gap){made_day + 36000, made_day + 86400, true};
    all->check = (lee_problem_check){
        .method = made_method(),
        .lake = {12000.0,                        24e6, 104.4e6, 4.35, 4.5},
        .still_water = 101.35,
        .has_record = true,
        .pieces = 2,
        .record = { .samples = 1441,
                 .first = made_day,
                 .last = made_day + 864000,
                 .step = 600,
                 .missing = 7,
                 .calms = 3,
                 .spikes = 1,
                 .spike_time = made_day + 1800,
                 .fastest = 21.4,
                 .fastest_from = degrees(251.0),
                 .fastest_time = made_day + 3600,
                 .mean_speed = 6.2,
                 .gap_count = 2,
                 .gap = all->gap},
    };
    lee_wind_source *wind = &all->made.from.problem.wind;
    wind->kind = LEE_WIND_RECORD;
    all->path = word(&all->made, 6, "marrow_wind.csv");
    wind->record_count = 1;
    wind->record_path = &all->path;
}

static const char *printed(checked *all) {
    capture_begin(&all->out);
    assert_int_equal(lee_print_check(all->out.stream, &all->made.from,
                                     &all->check, LEE_UNITS_SI, NULL),
                     LEE_OK);
    return capture_end(&all->out);
}

static void the_lake_is_told_by_axis_bed_width_and_volume(void **state) {
    (void)state;
    checked all;
    make_check(&all);
    all.made.bed[1] = 98.5;
    const char *text = printed(&all);
    assert_contains(text, "3 rows, chainage 0.00 km to 12.00 km\n");
    assert_contains(text, "bearing           65 degrees\n");
    assert_contains(text, "bed               97.000 m to 98.500 m\n");
    assert_contains(text, "width             2.00 km throughout\n");
    assert_contains(text, "start             closed\n");
    assert_contains(text, "24 km2, 104.4 million m3\n");
    assert_contains(text, "mean 4.350 m, greatest 4.500 m\n");
    capture_free(&all.out);
}

static void a_bent_axis_says_so(void **state) {
    (void)state;
    checked all;
    make_check(&all);
    all.made.bearing[2] = degrees(90.0);
    assert_contains(printed(&all),
                    "bent: 65 degrees at the start, 90 degrees at the end\n");
    capture_free(&all.out);
}

static void a_held_end_tells_its_level(void **state) {
    (void)state;
    checked all;
    double level[] = {101.2};
    make_check(&all);
    all.made.from.problem.lake.end = (lee_end){
        true, {.n = 1, .level = level}
    };
    assert_contains(printed(&all), "end               held at 101.200 m\n");
    capture_free(&all.out);
}

static void the_record_is_told_with_its_fastest_wind(void **state) {
    (void)state;
    checked all;
    make_check(&all);
    const char *text = printed(&all);
    assert_contains(text, "file              marrow_wind.csv\n");
    assert_contains(text, "samples           1441, instants\n");
    assert_contains(text, "2031-01-14 00:00 UTC, 2031-01-24 00:00 UTC\n");
    assert_contains(text, "usual step        10 min\n");
    assert_contains(text, "21.4 m/s from 251 degrees, 2031-01-14 01:00 UTC\n");
    capture_free(&all.out);
}

static void gaps_are_listed_with_what_becomes_of_them(void **state) {
    (void)state;
    checked all;
    make_check(&all);
    const char *text = printed(&all);
    assert_contains(text, "gaps              2 h after 2031-01-14 00:00 UTC, "
                          "bridged\n");
    assert_contains(text, "  14 h after 2031-01-14 10:00 UTC, beyond the "
                          "rule\n");
    capture_free(&all.out);
}

static void doubts_are_told_where_there_are_any(void **state) {
    (void)state;
    checked all;
    make_check(&all);
    const char *text = printed(&all);
    assert_contains(text, "missing           7 without wind\n");
    assert_contains(text, "spikes            1, the first 2031-01-14 00:30");
    assert_lacks(text, "beyond belief");
    assert_lacks(text, "repeated");
    capture_free(&all.out);
}

/* 101.35 m over the section's bed at 97 m, and over its own at 99.1 m. */
static void each_station_tells_its_bed(void **state) {
    (void)state;
    checked all;
    make_check(&all);
    const char *text = printed(&all);
    assert_contains(text,
                    "North quay        chainage 0.40 km, depth 2.250 m\n");
    assert_contains(text, "Lee landing       chainage 11.80 km, section "
                          "depth 4.350 m\n");
    assert_contains(text, "  watched above 101.800 m\n");
    assert_contains(text, "  watched below 100.900 m\n");
    capture_free(&all.out);
}

static void a_storm_is_told_by_its_shape(void **state) {
    (void)state;
    checked all;
    make_check(&all);
    lee_wind_source *wind = &all.made.from.problem.wind;
    wind->kind = LEE_WIND_STORM;
    wind->storm = (lee_storm){.peak = 25.0,
                              .from = degrees(240.0),
                              .turn = degrees(40.0),
                              .rise = 10800.0,
                              .hold = 21600.0,
                              .fall = 14400.0};
    all.check.has_record = false;
    const char *text = printed(&all);
    assert_contains(text, "25.0 m/s from 240 degrees\n");
    assert_contains(text, "rise, hold, fall  3 h, 6 h, 4 h\n");
    assert_lacks(text, "samples");
    capture_free(&all.out);
}

static void json_holds_the_counts_and_the_gaps(void **state) {
    (void)state;
    checked all;
    make_check(&all);
    capture_begin(&all.out);
    assert_int_equal(
        lee_json_check(all.out.stream, &all.made.from, &all.check, NULL),
        LEE_OK);
    json_t *root =
        json_loads(capture_end(&all.out), JSON_REJECT_DUPLICATES, NULL);
    capture_free(&all.out);
    assert_non_null(root);
    json_t *wind = json_object_get(root, "wind");
    assert_string_equal(json_string_value(json_object_get(wind, "kind")),
                        "record");
    assert_int_equal(json_integer_value(json_object_get(wind, "missing")), 7);
    json_t *gap = json_array_get(json_object_get(wind, "gaps"), 1);
    assert_string_equal(json_string_value(json_object_get(gap, "before")),
                        "2031-01-15T00:00:00Z");
    assert_true(json_is_true(json_object_get(gap, "is_long")));
    json_t *water = json_object_get(root, "water");
    assert_near(json_number_value(json_object_get(water, "volume_m3")), 104.4e6,
                1.0);
    json_decref(root);
}

static void five_gaps_are_listed_and_no_more_is_said(void **state) {
    (void)state;
    checked all;
    lee_wind_gap gap[6];
    make_check(&all);
    for (size_t i = 0; i < 6; i++) {
        const int64_t after = made_day + 86400 * (int64_t)i;
        gap[i] = (lee_wind_gap){after, after + 7200, false};
    }
    all.check.record.gap = gap;
    all.check.record.gap_count = 5;
    assert_lacks(printed(&all), " more, none longer\n");
    capture_free(&all.out);
    all.check.record.gap_count = 6;
    assert_contains(printed(&all), "and 1 more, none longer\n");
    capture_free(&all.out);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_lake_is_told_by_axis_bed_width_and_volume),
        cmocka_unit_test(a_bent_axis_says_so),
        cmocka_unit_test(a_held_end_tells_its_level),
        cmocka_unit_test(the_record_is_told_with_its_fastest_wind),
        cmocka_unit_test(gaps_are_listed_with_what_becomes_of_them),
        cmocka_unit_test(doubts_are_told_where_there_are_any),
        cmocka_unit_test(each_station_tells_its_bed),
        cmocka_unit_test(a_storm_is_told_by_its_shape),
        cmocka_unit_test(json_holds_the_counts_and_the_gaps),
        cmocka_unit_test(five_gaps_are_listed_and_no_more_is_said),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
