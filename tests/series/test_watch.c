/* What the stations saw: extremes, thresholds, dry time, residual. */
#include "support/check.h"

#include "series/watch.h"

enum { SIGHTS = 7 };

/* Levels at every 600 s from 0 on: up through 2, down, up again, down. */
static const double rise_and_fall[SIGHTS] = {1.0, 3.0, 1.0, 1.0, 2.5, 2.5, 0.5};

static lee_threshold above_two = {.level = 2.0, .is_below = false};
static lee_threshold below_one = {.level = 0.75, .is_below = true};

static void see_all(lee_watch *watch, lee_threshold *threshold,
                    const double level[SIGHTS]) {
    const lee_station station = {
        .at = 0.0, .threshold_count = 1, .threshold = threshold};
    assert_int_equal(lee_watch_init(1, &station, watch, NULL), LEE_OK);
    for (size_t i = 0; i < SIGHTS; i++) {
        lee_watch_see(watch, 600.0 * (double)i, &level[i], true);
    }
    lee_watch_break(watch);
}

static void the_first_crossing_is_linear_between_sights(void **state) {
    (void)state;
    lee_watch watch;
    see_all(&watch, &above_two, rise_and_fall);
    const lee_watched_threshold *seen = &watch.station[0].threshold[0];
    assert_true(seen->is_reached);
    assert_near(seen->first, 300.0, 1e-9); /* rounding of seconds */
    lee_watch_free(&watch);
}

static void two_occasions_are_counted_as_two(void **state) {
    (void)state;
    lee_watch watch;
    see_all(&watch, &above_two, rise_and_fall);
    assert_int_equal(watch.station[0].threshold[0].times, 2);
    lee_watch_free(&watch);
}

static void total_and_longest_are_sums_of_the_linear_pieces(void **state) {
    (void)state;
    lee_watch watch;
    see_all(&watch, &above_two, rise_and_fall);
    const lee_watched_threshold *seen = &watch.station[0].threshold[0];
    /* first 300..900; then up 1 -> 2.5 crosses at 2/3, down 2.5 -> 0.5 at
     * 1/4 of the interval */
    const double second = (3000.0 + 150.0) - (1800.0 + 400.0);
    assert_near(seen->longest, second, 1e-9);
    assert_near(seen->total, 600.0 + second, 1e-9);
    lee_watch_free(&watch);
}

static void the_return_is_the_last_time_it_was_left(void **state) {
    (void)state;
    lee_watch watch;
    see_all(&watch, &above_two, rise_and_fall);
    const lee_watched_threshold *seen = &watch.station[0].threshold[0];
    assert_true(seen->has_returned);
    assert_near(seen->returned, 3150.0, 1e-9);
    lee_watch_free(&watch);
}

static void an_occasion_at_the_end_has_not_returned(void **state) {
    (void)state;
    lee_watch watch;
    see_all(&watch, &below_one, rise_and_fall);
    const lee_watched_threshold *seen = &watch.station[0].threshold[0];
    assert_true(seen->is_reached);
    assert_false(seen->has_returned);
    assert_near(seen->total, 75.0, 1e-9); /* 2.5 -> 0.5 meets 0.75 at 7/8 */
    lee_watch_free(&watch);
}

static void a_dry_station_is_under_every_level(void **state) {
    (void)state;
    const double dries[SIGHTS] = {1.0, 1.0, NAN, NAN, NAN, 1.0, 1.0};
    lee_watch watch;
    see_all(&watch, &below_one, dries);
    const lee_watched_threshold *seen = &watch.station[0].threshold[0];
    assert_int_equal(seen->times, 1);
    assert_near(seen->total, 1800.0, 1e-9);
    assert_near(watch.station[0].dry_time, 1800.0, 1e-9);
    lee_watch_free(&watch);
}

static void a_dry_station_is_over_no_level(void **state) {
    (void)state;
    const double dries[SIGHTS] = {1.0, 1.0, NAN, NAN, NAN, 1.0, 1.0};
    lee_watch watch;
    see_all(&watch, &above_two, dries);
    assert_false(watch.station[0].threshold[0].is_reached);
    lee_watch_free(&watch);
}

static void highest_and_lowest_carry_their_times(void **state) {
    (void)state;
    lee_watch watch;
    see_all(&watch, &above_two, rise_and_fall);
    assert_near(watch.station[0].max, 3.0, 0.0);
    assert_near(watch.station[0].max_time, 600.0, 0.0);
    assert_near(watch.station[0].min, 0.5, 0.0);
    assert_near(watch.station[0].min_time, 3600.0, 0.0);
    lee_watch_free(&watch);
}

static void a_spin_up_is_judged_by_nothing(void **state) {
    (void)state;
    const lee_station station = {
        .at = 0.0, .threshold_count = 1, .threshold = &above_two};
    lee_watch watch;
    assert_int_equal(lee_watch_init(1, &station, &watch, NULL), LEE_OK);
    const double high = 9.0;
    const double low = 1.0;
    lee_watch_see(&watch, 0.0, &high, false);
    lee_watch_see(&watch, 600.0, &low, true);
    assert_near(watch.station[0].max, 1.0, 0.0);
    assert_false(watch.station[0].threshold[0].is_reached);
    lee_watch_free(&watch);
}

static void a_gap_parts_two_occasions(void **state) {
    (void)state;
    const lee_station station = {
        .at = 0.0, .threshold_count = 1, .threshold = &above_two};
    lee_watch watch;
    assert_int_equal(lee_watch_init(1, &station, &watch, NULL), LEE_OK);
    const double high = 3.0;
    lee_watch_see(&watch, 0.0, &high, true);
    lee_watch_see(&watch, 600.0, &high, true);
    lee_watch_break(&watch);
    lee_watch_see(&watch, 90000.0, &high, true);
    lee_watch_see(&watch, 90600.0, &high, true);
    lee_watch_break(&watch);
    const lee_watched_threshold *seen = &watch.station[0].threshold[0];
    assert_int_equal(seen->times, 2);
    assert_near(seen->total, 1200.0, 1e-9);
    assert_near(seen->longest, 600.0, 1e-9);
    lee_watch_free(&watch);
}

/* The level is first seen under it again after the gap. */
static void what_is_left_within_a_gap_is_back_when_seen_again(void **state) {
    (void)state;
    const lee_station station = {
        .at = 0.0, .threshold_count = 1, .threshold = &above_two};
    lee_watch watch;
    assert_int_equal(lee_watch_init(1, &station, &watch, NULL), LEE_OK);
    const double high = 3.0;
    const double low = 1.0;
    lee_watch_see(&watch, 0.0, &high, true);
    lee_watch_see(&watch, 600.0, &high, true);
    lee_watch_break(&watch);
    lee_watch_see(&watch, 90000.0, &low, false); /* spin-up */
    lee_watch_see(&watch, 90600.0, &low, true);
    lee_watch_see(&watch, 91200.0, &low, true);
    lee_watch_break(&watch);
    const lee_watched_threshold *seen = &watch.station[0].threshold[0];
    assert_true(seen->has_returned);
    assert_near(seen->returned, 90600.0, 0.0);
    assert_near(seen->total, 600.0, 1e-9);
    lee_watch_free(&watch);
}

static void a_threshold_never_reached_has_no_return(void **state) {
    (void)state;
    lee_watch watch;
    lee_threshold above_nine = {.level = 9.0};
    see_all(&watch, &above_nine, rise_and_fall);
    assert_false(watch.station[0].threshold[0].has_returned);
    lee_watch_free(&watch);
}

/* A level that follows its pool has not departed from it. */
static void the_residual_counts_from_the_still_water_of_its_time(void **state) {
    (void)state;
    const lee_station station = {.at = 0.0};
    lee_watch watch;
    assert_int_equal(lee_watch_init(1, &station, &watch, NULL), LEE_OK);
    watch.residual_from = 0.0;
    watch.residual_to = 600.0;
    const double level[] = {1.25, 5.0};
    watch.still_water = 1.0;
    lee_watch_see(&watch, 0.0, &level[0], true);
    watch.still_water = 5.0;
    lee_watch_see(&watch, 600.0, &level[1], true);
    assert_near(watch.station[0].residual, 0.25, 0.0);
    assert_near(watch.station[0].departure, 0.25, 0.0);
    lee_watch_free(&watch);
}

static void the_residual_is_looked_for_in_its_window_only(void **state) {
    (void)state;
    const lee_station station = {.at = 0.0};
    lee_watch watch;
    assert_int_equal(lee_watch_init(1, &station, &watch, NULL), LEE_OK);
    watch.still_water = 1.0;
    watch.residual_from = 1200.0;
    watch.residual_to = 2400.0;
    for (size_t i = 0; i < SIGHTS; i++) {
        lee_watch_see(&watch, 600.0 * (double)i, &rise_and_fall[i], true);
    }
    assert_near(watch.station[0].residual, 1.5, 0.0);
    assert_near(watch.station[0].residual_time, 2400.0, 0.0);
    lee_watch_free(&watch);
}

static void see_these(lee_watch *watch, size_t count, const double level[],
                      size_t spun_up) {
    const lee_station station = {.at = 0.0};
    assert_int_equal(lee_watch_init(1, &station, watch, NULL), LEE_OK);
    for (size_t i = 0; i < count; i++) {
        lee_watch_see(watch, 600.0 * (double)i, &level[i], i >= spun_up);
    }
}

static void a_highest_level_that_lasts_is_told_with_its_begin(void **state) {
    (void)state;
    const double level[] = {1.0, 3.0, 3.0, 1.0, 1.0};
    lee_watch watch;
    see_these(&watch, 5, level, 0);
    assert_near(watch.station[0].max_time, 600.0, 0.0);
    assert_near(watch.station[0].min_time, 0.0, 0.0);
    lee_watch_free(&watch);
}

static void a_spin_up_is_no_dry_time(void **state) {
    (void)state;
    const double level[] = {(double)NAN, (double)NAN, (double)NAN};
    lee_watch watch;
    see_these(&watch, 3, level, 1);
    assert_near(watch.station[0].dry_time, 600.0, 0.0);
    lee_watch_free(&watch);
}

static void a_level_after_the_window_is_no_residual(void **state) {
    (void)state;
    const lee_station station = {.at = 0.0};
    const double level[] = {5.0, 1.2, 1.1, 7.0};
    lee_watch watch;
    assert_int_equal(lee_watch_init(1, &station, &watch, NULL), LEE_OK);
    watch.still_water = 1.0;
    watch.residual_from = 600.0;
    watch.residual_to = 1200.0;
    for (size_t i = 0; i < 4; i++) {
        lee_watch_see(&watch, 600.0 * (double)i, &level[i], true);
    }
    assert_near(watch.station[0].residual, 0.2, 1e-15); /* rounding */
    assert_near(watch.station[0].residual_time, 600.0, 0.0);
    lee_watch_free(&watch);
}

static void a_level_at_the_threshold_does_not_reach_it(void **state) {
    (void)state;
    const double at_two[SIGHTS] = {2.0, 2.0, 2.0, 2.0, 2.0, 2.0, 2.0};
    lee_watch watch;
    see_all(&watch, &above_two, at_two);
    assert_false(watch.station[0].threshold[0].is_reached);
    lee_watch_free(&watch);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_first_crossing_is_linear_between_sights),
        cmocka_unit_test(two_occasions_are_counted_as_two),
        cmocka_unit_test(total_and_longest_are_sums_of_the_linear_pieces),
        cmocka_unit_test(the_return_is_the_last_time_it_was_left),
        cmocka_unit_test(an_occasion_at_the_end_has_not_returned),
        cmocka_unit_test(a_dry_station_is_under_every_level),
        cmocka_unit_test(a_dry_station_is_over_no_level),
        cmocka_unit_test(highest_and_lowest_carry_their_times),
        cmocka_unit_test(a_spin_up_is_judged_by_nothing),
        cmocka_unit_test(a_gap_parts_two_occasions),
        cmocka_unit_test(what_is_left_within_a_gap_is_back_when_seen_again),
        cmocka_unit_test(a_threshold_never_reached_has_no_return),
        cmocka_unit_test(the_residual_counts_from_the_still_water_of_its_time),
        cmocka_unit_test(the_residual_is_looked_for_in_its_window_only),
        cmocka_unit_test(a_highest_level_that_lasts_is_told_with_its_begin),
        cmocka_unit_test(a_spin_up_is_no_dry_time),
        cmocka_unit_test(a_level_after_the_window_is_no_residual),
        cmocka_unit_test(a_level_at_the_threshold_does_not_reach_it),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
