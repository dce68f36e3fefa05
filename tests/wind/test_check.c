/* A check counts what is odd in a record and changes nothing. */
#include "wind/support.h"

#include <stdlib.h>

static const lee_gap_rule three_hours = {.largest = 3 * 3600};

/* The check of n winds with its list of gaps; free it. */
static lee_wind_check gaps_of(size_t n, const observed wind[]) {
    lee_wind_record record = record_of(n, wind, LEE_STAMP_INSTANT);
    lee_wind_check check;
    assert_int_equal(lee_wind_check_record(&record, &three_hours, &check, NULL),
                     LEE_OK);
    lee_wind_record_free(&record);
    return check;
}

/* The check of n winds without the list. */
static lee_wind_check check_of(size_t n, const observed wind[]) {
    lee_wind_check check = gaps_of(n, wind);
    free(check.gap);
    check.gap = NULL;
    return check;
}

static void a_check_tells_first_last_and_count(void **state) {
    (void)state;
    const observed wind[] = {
        {600,  5, 0},
        {1200, 6, 0},
        {1800, 7, 0}
    };
    const lee_wind_check check = check_of(3, wind);
    assert_int_equal(check.samples, 3);
    assert_int_equal(check.first, 600);
    assert_int_equal(check.last, 1800);
}

static void the_usual_step_is_the_most_frequent_one(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    5, 0},
        {600,  5, 0},
        {1200, 5, 0},
        {9000, 5, 0},
        {9600, 5, 0},
    };
    const lee_wind_check check = check_of(5, wind);
    assert_int_equal(check.step, 600);
    assert_int_equal(check.irregular, 1);
}

/* 5, 7, 5, 9, 7: neither 5 nor 7 is a majority, both come twice. */
static void of_equally_frequent_steps_the_shortest_is_usual(void **state) {
    (void)state;
    const observed wind[] = {
        {0,  5, 0},
        {5,  5, 0},
        {12, 5, 0},
        {17, 5, 0},
        {26, 5, 0},
        {33, 5, 0},
    };
    const lee_wind_check check = check_of(6, wind);
    assert_int_equal(check.step, 5);
    assert_int_equal(check.irregular, 3);
}

/* 9, 5, 7, 7, 8: seven is most frequent though no majority. */
static void a_frequent_step_need_not_be_a_majority(void **state) {
    (void)state;
    const observed wind[] = {
        {0,  5, 0},
        {9,  5, 0},
        {14, 5, 0},
        {21, 5, 0},
        {28, 5, 0},
        {36, 5, 0},
    };
    assert_int_equal(check_of(6, wind).step, 7);
}

static void a_single_sample_has_no_step(void **state) {
    (void)state;
    const observed wind[] = {
        {60, 5, 90}
    };
    const lee_wind_check check = check_of(1, wind);
    assert_int_equal(check.step, 0);
    assert_int_equal(check.gap_count, 0);
    assert_near(check.mean_speed, 5.0, 1e-15);
}

static void missing_winds_and_calms_are_told_apart(void **state) {
    (void)state;
    const observed wind[] = {
        {0,   0,   90},
        {60,  NAN, 0 },
        {120, 0,   0 },
        {180, 4,   0 }
    };
    const lee_wind_check check = check_of(4, wind);
    assert_int_equal(check.calms, 2);
    assert_int_equal(check.missing, 1);
}

static void the_mean_speed_counts_calms_but_not_missing_winds(void **state) {
    (void)state;
    const observed wind[] = {
        {0,   0,   0 },
        {60,  NAN, 0 },
        {120, 4,   10},
        {180, 8,   99}
    };
    assert_near(check_of(4, wind).mean_speed, 4.0, 1e-14);
}

static void the_fastest_wind_is_told_with_its_direction_and_time(void **state) {
    (void)state;
    const observed wind[] = {
        {0,   5, 10 },
        {60,  9, 240},
        {120, 9, 10 }
    };
    const lee_wind_check check = check_of(3, wind);
    assert_near(check.fastest, 9.0, 1e-14);
    assert_near(check.fastest_from, 240.0 * degree, 1e-14);
    assert_int_equal(check.fastest_time, 60);
}

static void a_record_without_wind_has_no_fastest_and_no_mean(void **state) {
    (void)state;
    const observed wind[] = {
        {0,  NAN, 0},
        {60, NAN, 0}
    };
    const lee_wind_check check = check_of(2, wind);
    assert_int_equal(check.missing, 2);
    assert_true(isnan(check.fastest) && isnan(check.fastest_from));
    assert_true(isnan(check.mean_speed));
}

static void winds_above_75_m_s_are_beyond_belief(void **state) {
    (void)state;
    const observed wind[] = {
        {0,   74.9, 0},
        {60,  75.1, 0},
        {120, 406,  0}
    };
    const lee_wind_check check = check_of(3, wind);
    assert_int_equal(check.beyond_belief, 2);
    assert_int_equal(check.beyond_belief_time, 60);
    assert_near(check.fastest, 406.0, 1e-12);
}

static void a_lone_peak_is_a_spike(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    5,  0},
        {600,  21, 0},
        {1200, 6,  0}
    };
    const lee_wind_check check = check_of(3, wind);
    assert_int_equal(check.spikes, 1);
    assert_int_equal(check.spike_time, 600);
}

static void the_first_of_two_spikes_is_named(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    2,  0},
        {600,  40, 0},
        {1200, 2,  0},
        {1800, 30, 0},
        {2400, 2,  0},
    };
    const lee_wind_check check = check_of(5, wind);
    assert_int_equal(check.spikes, 2);
    assert_int_equal(check.spike_time, 600);
}

static void a_peak_of_less_than_three_times_is_no_spike(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    12, 0},
        {600,  35, 0},
        {1200, 12, 0}
    };
    assert_int_equal(check_of(3, wind).spikes, 0);
}

static void a_peak_of_less_than_15_m_s_is_no_spike(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    1,  0},
        {600,  15, 0},
        {1200, 1,  0}
    };
    assert_int_equal(check_of(3, wind).spikes, 0);
}

static void a_front_is_no_spike(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    3,  0},
        {600,  24, 0},
        {1200, 20, 0}
    };
    assert_int_equal(check_of(3, wind).spikes, 0);
}

static void a_spike_is_seen_across_a_missing_neighbour(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    3,   0},
        {600,  NAN, 0},
        {1200, 30,  0},
        {1800, 3,   0}
    };
    assert_int_equal(check_of(4, wind).spikes, 1);
}

static void neighbours_three_steps_away_prove_a_spike(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    3,  0},
        {600,  3,  0},
        {1200, 3,  0},
        {3000, 30, 0},
        {4800, 3,  0}
    };
    assert_int_equal(check_of(5, wind).spikes, 1);
}

static void neighbours_beyond_three_steps_prove_no_spike(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    3,  0},
        {600,  3,  0},
        {1200, 3,  0},
        {3600, 30, 0},
        {4200, 3,  0}
    };
    assert_int_equal(check_of(5, wind).spikes, 0);
}

static void a_gap_lies_between_samples_with_wind(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    3,   0},
        {600,  3,   0},
        {1200, NAN, 0},
        {1800, NAN, 0},
        {2400, 3,   0}
    };
    const lee_wind_check check = gaps_of(5, wind);
    assert_int_equal(check.gap_count, 1);
    assert_int_equal(check.gap[0].after, 600);
    assert_int_equal(check.gap[0].before, 2400);
    assert_false(check.gap[0].is_long);
    free(check.gap);
}

/* Step 600 s, rule 10800 s: 11400 s apart is bridged, 11401 s is not. */
static void a_gap_is_long_beyond_the_rule_and_one_step(void **state) {
    (void)state;
    const observed wind[] = {
        {0,     3, 0},
        {600,   3, 0},
        {12000, 3, 0},
        {12600, 3, 0},
        {24001, 3, 0}
    };
    const lee_wind_check check = gaps_of(5, wind);
    assert_int_equal(check.gap_count, 2);
    assert_false(check.gap[0].is_long);
    assert_true(check.gap[1].is_long);
    free(check.gap);
}

static void missing_winds_at_the_ends_are_no_gap(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    NAN, 0},
        {600,  3,   0},
        {1200, 3,   0},
        {1800, NAN, 0}
    };
    assert_int_equal(check_of(4, wind).gap_count, 0);
}

static void what_the_reader_counted_is_passed_on(void **state) {
    (void)state;
    const observed wind[] = {
        {0,   3, 0},
        {600, 3, 0}
    };
    lee_wind_record record = record_of(2, wind, LEE_STAMP_INSTANT);
    record.duplicates = 4;
    record.variable_calm = 5;
    record.variable_missing = 6;
    lee_wind_check check;
    assert_int_equal(lee_wind_check_record(&record, &three_hours, &check, NULL),
                     LEE_OK);
    assert_int_equal(check.duplicates, 4);
    assert_int_equal(check.variable_calm, 5);
    assert_int_equal(check.variable_missing, 6);
    lee_wind_record_free(&record);
}

static void
a_rotated_record_has_the_same_check_but_for_direction(void **state) {
    (void)state;
    uint64_t seed = 7;
    observed wind[200];
    observed rotated[200];
    for (size_t i = 0; i < 200; i++) {
        wind[i] = (observed){(int64_t)i * 600, 40.0 * uniform(&seed),
                             360.0 * uniform(&seed)};
        rotated[i] = wind[i];
        rotated[i].from += 101.0;
    }
    const lee_wind_check a = check_of(200, wind);
    const lee_wind_check b = check_of(200, rotated);
    assert_int_equal(a.spikes, b.spikes);
    assert_int_equal(a.fastest_time, b.fastest_time);
    assert_near(a.mean_speed, b.mean_speed, 1e-12);
    assert_near(a.fastest, b.fastest, 1e-12);
}

static void a_freed_check_is_empty(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    3, 0},
        {60,   3, 0},
        {120,  3, 0},
        {6000, 3, 0}
    };
    lee_wind_check check = gaps_of(4, wind);
    assert_int_equal(check.gap_count, 1);
    lee_wind_check_free(&check);
    lee_wind_check_free(&check);
    assert_null(check.gap);
    assert_int_equal(check.samples, 0);
}

static void an_empty_record_can_be_checked(void **state) {
    (void)state;
    const lee_wind_record record = {0};
    lee_wind_check check;
    assert_int_equal(lee_wind_check_record(&record, &three_hours, &check, NULL),
                     LEE_OK);
    assert_int_equal(check.samples, 0);
    assert_int_equal(check.gap_count, 0);
}

/* A check of gaps of these lengths, s, one behind the other. */
static lee_wind_check gaps_like(size_t n, const int64_t length[],
                                lee_wind_gap gap[]) {
    int64_t t = 0;
    for (size_t i = 0; i < n; i++) {
        gap[i] = (lee_wind_gap){.after = t, .before = t + length[i]};
        t += length[i] + 60;
    }
    return (lee_wind_check){.gap_count = n, .gap = gap};
}

static void the_longest_gaps_are_found_in_order_of_time(void **state) {
    (void)state;
    const int64_t length[] = {5, 9, 7, 6, 8, 5};
    lee_wind_gap gap[6];
    size_t index[3];
    const lee_wind_check check = gaps_like(6, length, gap);
    assert_int_equal(lee_wind_longest_gaps(&check, 3, index), 3);
    assert_int_equal(index[0], 1);
    assert_int_equal(index[1], 2);
    assert_int_equal(index[2], 4);
}

static void of_equal_gaps_the_earlier_is_longest(void **state) {
    (void)state;
    const int64_t length[] = {5, 7, 7, 7};
    lee_wind_gap gap[4];
    size_t index[2];
    const lee_wind_check check = gaps_like(4, length, gap);
    assert_int_equal(lee_wind_longest_gaps(&check, 2, index), 2);
    assert_int_equal(index[0], 1);
    assert_int_equal(index[1], 2);
}

static void where_all_gaps_find_room_all_are_longest(void **state) {
    (void)state;
    const int64_t length[] = {5, 7};
    lee_wind_gap gap[2];
    size_t index[3];
    const lee_wind_check check = gaps_like(2, length, gap);
    assert_int_equal(lee_wind_longest_gaps(&check, 3, index), 2);
    assert_int_equal(index[0], 0);
    assert_int_equal(index[1], 1);
    assert_int_equal(lee_wind_longest_gaps(&check, 0, index), 0);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_check_tells_first_last_and_count),
        cmocka_unit_test(the_usual_step_is_the_most_frequent_one),
        cmocka_unit_test(of_equally_frequent_steps_the_shortest_is_usual),
        cmocka_unit_test(a_frequent_step_need_not_be_a_majority),
        cmocka_unit_test(a_single_sample_has_no_step),
        cmocka_unit_test(missing_winds_and_calms_are_told_apart),
        cmocka_unit_test(the_mean_speed_counts_calms_but_not_missing_winds),
        cmocka_unit_test(the_fastest_wind_is_told_with_its_direction_and_time),
        cmocka_unit_test(a_record_without_wind_has_no_fastest_and_no_mean),
        cmocka_unit_test(winds_above_75_m_s_are_beyond_belief),
        cmocka_unit_test(a_lone_peak_is_a_spike),
        cmocka_unit_test(the_first_of_two_spikes_is_named),
        cmocka_unit_test(a_peak_of_less_than_three_times_is_no_spike),
        cmocka_unit_test(a_peak_of_less_than_15_m_s_is_no_spike),
        cmocka_unit_test(a_front_is_no_spike),
        cmocka_unit_test(a_spike_is_seen_across_a_missing_neighbour),
        cmocka_unit_test(neighbours_three_steps_away_prove_a_spike),
        cmocka_unit_test(neighbours_beyond_three_steps_prove_no_spike),
        cmocka_unit_test(a_gap_lies_between_samples_with_wind),
        cmocka_unit_test(a_gap_is_long_beyond_the_rule_and_one_step),
        cmocka_unit_test(missing_winds_at_the_ends_are_no_gap),
        cmocka_unit_test(what_the_reader_counted_is_passed_on),
        cmocka_unit_test(a_rotated_record_has_the_same_check_but_for_direction),
        cmocka_unit_test(a_freed_check_is_empty),
        cmocka_unit_test(an_empty_record_can_be_checked),
        cmocka_unit_test(the_longest_gaps_are_found_in_order_of_time),
        cmocka_unit_test(of_equal_gaps_the_earlier_is_longest),
        cmocka_unit_test(where_all_gaps_find_room_all_are_longest),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
