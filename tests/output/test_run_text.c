/* A run as text says for each station how high, how low, when, how long. */
#include "support/captured.h"
#include "support/results.h"

static const char *printed(captured *out, const hand_made *made,
                           lee_unit_system units) {
    capture_begin(out);
    assert_int_equal(
        lee_print_run(out->stream, &made->from, &made->run, units, NULL),
        LEE_OK);
    return capture_end(out);
}

static void the_span_and_the_strongest_wind_are_told(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text,
                    "2031-01-14 00:00 UTC to 2031-01-14 00:20 UTC, 3 times\n");
    assert_contains(text, "strongest wind 23.0 m/s from 243 degrees (10 m over "
                          "water), 2031-01-14 00:19 UTC\n");
    capture_free(&out);
}

static void a_calm_names_no_strongest_wind(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.run.strongest = 0.0;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "\ncalm throughout\n");
    assert_lacks(text, "strongest wind");
    capture_free(&out);
}

static void a_low_end_that_falls_dry_is_told_as_dry(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.series[0].min.low = (double)NAN;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "lowest            101.000 m (dry to 101.050), "
                          "2031-01-14 00:00 UTC\n");
    capture_free(&out);
}

static void each_station_has_highest_and_lowest_with_their_times(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "levels in m above Marrow gauge zero\n");
    assert_contains(text, "North quay, chainage 0.40 km\n");
    assert_contains(text, "highest           101.200 m (101.150 to 101.250), "
                          "2031-01-14 00:20 UTC\n");
    assert_contains(text, "lowest            101.000 m (100.950 to 101.050), "
                          "2031-01-14 00:00 UTC\n");
    capture_free(&out);
}

/* Lowest level 101.000 m over a bed at 99.1 m. */
static void a_station_with_a_bed_has_its_least_depth(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "least depth       1.900 m over its bed\n");
    capture_free(&out);
}

/* The water beside it may stand lower than the bed at the station. */
static void a_bed_above_the_lowest_level_has_no_least_depth(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.station[0].bed = 101.0;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "least depth       none, its bed of 101.000 m falls "
                          "dry\n");
    assert_lacks(text, "over its bed");
    capture_free(&out);
}

static void a_section_that_falls_dry_has_no_least_depth(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.series[0].dry_time = 1.0;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "least depth       none, the section falls dry\n");
    assert_lacks(text, "over its bed");
    capture_free(&out);
}

static void a_threshold_tells_first_time_durations_and_return(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "above 101.800 m   first 2031-01-14 00:05 UTC, 2 "
                          "times, longest 2 h 10");
    assert_contains(text, "total 2 h 30 min, back below since 2031-01-14 02:15 "
                          "UTC\n");
    capture_free(&out);
}

static void a_threshold_crossed_once_has_one_duration(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.exceedance[0].times = 1;
    made.exceedance[0].total = 7800.0;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "above 101.800 m   once, 2031-01-14 00:05 UTC, for 2 "
                          "h 10 min, back below");
    capture_free(&out);
}

static void a_threshold_that_is_never_left_says_so(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.exceedance[0].has_returned = false;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "still above at the end\n");
    capture_free(&out);
}

static void a_threshold_that_is_never_reached_says_so(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "below 100.900 m   not reached\n");
    capture_free(&out);
}

static void a_station_that_falls_dry_tells_how_long(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "dry for           10 min\n");
    capture_free(&out);
}

static void a_residual_seiche_is_told_where_it_is_known(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    const char *first = strstr(text, "residual seiche");
    assert_non_null(first);
    assert_contains(first, "0.120 m from still water, 2031-01-14 00:15 UTC\n");
    assert_null(strstr(first + 1, "residual seiche"));
    capture_free(&out);
}

static void a_station_dry_throughout_has_no_level(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.series[0].max.value = (double)NAN;
    made.series[0].min.value = (double)NAN;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "highest           dry throughout\n");
    assert_lacks(text, "least depth");
    capture_free(&out);
}

static void the_own_error_is_told_with_its_parts(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "3.0 mm (from the step 2.0 mm, cells 1.0 mm)\n");
    capture_free(&out);
}

static void an_own_error_that_was_left_out_is_not_claimed(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.run.numerical_error = (double)NAN;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "numerical error   not computed\n");
    capture_free(&out);
}

static void a_parted_record_tells_its_pieces(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    made.run.pieces = 3;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "pieces            3, parted by gaps of the "
                          "record\n");
    capture_free(&out);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_span_and_the_strongest_wind_are_told),
        cmocka_unit_test(a_calm_names_no_strongest_wind),
        cmocka_unit_test(a_low_end_that_falls_dry_is_told_as_dry),
        cmocka_unit_test(each_station_has_highest_and_lowest_with_their_times),
        cmocka_unit_test(a_station_with_a_bed_has_its_least_depth),
        cmocka_unit_test(a_bed_above_the_lowest_level_has_no_least_depth),
        cmocka_unit_test(a_section_that_falls_dry_has_no_least_depth),
        cmocka_unit_test(a_threshold_tells_first_time_durations_and_return),
        cmocka_unit_test(a_threshold_crossed_once_has_one_duration),
        cmocka_unit_test(a_threshold_that_is_never_left_says_so),
        cmocka_unit_test(a_threshold_that_is_never_reached_says_so),
        cmocka_unit_test(a_station_that_falls_dry_tells_how_long),
        cmocka_unit_test(a_residual_seiche_is_told_where_it_is_known),
        cmocka_unit_test(a_station_dry_throughout_has_no_level),
        cmocka_unit_test(the_own_error_is_told_with_its_parts),
        cmocka_unit_test(an_own_error_that_was_left_out_is_not_claimed),
        cmocka_unit_test(a_parted_record_tells_its_pieces),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
