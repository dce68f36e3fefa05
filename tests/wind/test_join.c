/* Several records become one, in order of time, and overlaps are judged. */
#include "wind/support.h"

#include <stdlib.h>

static const int64_t hour = 3600;

enum { MOST = 4, LONGEST = 40 };

/* Records by name, joined. */
typedef struct joint {
    size_t count;
    lee_wind_record record[MOST];
    lee_wind_part part[MOST];
    lee_wind_record joined;
    lee_notes remarks;
    lee_error error;
    lee_status status;
} joint;

static lee_wind_record *add(joint *all, const char *name, size_t n,
                            const observed wind[]) {
    lee_wind_record *record = &all->record[all->count];
    *record = record_of(n, wind, LEE_STAMP_INSTANT);
    all->part[all->count++] = (lee_wind_part){name, record};
    return record;
}

/* n winds each `step` from `start` on, of a speed that tells the time. */
static lee_wind_record *add_even(joint *all, const char *name, size_t n,
                                 int64_t start, int64_t step) {
    observed wind[LONGEST] = {0};
    assert_true(n <= LONGEST);
    for (size_t i = 0; i < n; i++) {
        const int64_t time = start + (int64_t)i * step;
        wind[i] = (observed){time, 1.0 + (double)time / 36000.0, 200.0};
    }
    return add(all, name, n, wind);
}

static void join(joint *all) {
    all->status = lee_wind_join(all->count, all->part, &all->joined,
                                &all->remarks, &all->error);
}

static void forget(joint *all) {
    for (size_t i = 0; i < all->count; i++) {
        lee_wind_record_free(&all->record[i]);
    }
    lee_wind_record_free(&all->joined);
    lee_notes_free(&all->remarks);
}

static double speed_at(const lee_wind_record *record, size_t index) {
    return hypot(record->east[index], record->north[index]);
}

static void assert_refused(joint *all, const char *message) {
    join(all);
    assert_int_equal(all->status, LEE_ERR_DATA);
    assert_string_equal(all->error.message, message);
    assert_int_equal(all->joined.n, 0);
    assert_null(all->joined.time);
    forget(all);
}

static void
files_follow_each_other_in_whatever_order_they_are_named(void **state) {
    (void)state;
    joint all = {0};
    add_even(&all, "c", 2, 20 * hour, hour);
    add_even(&all, "a", 3, 0, hour);
    add_even(&all, "b", 2, 10 * hour, hour);
    join(&all);
    const int64_t expected[] = {0, 1, 2, 10, 11, 20, 21};
    assert_int_equal(all.status, LEE_OK);
    assert_int_equal(all.joined.n, 7);
    for (size_t i = 0; i < 7; i++) {
        assert_int_equal(all.joined.time[i], expected[i] * hour);
        assert_near(speed_at(&all.joined, i), 1.0 + 0.1 * (double)expected[i],
                    1e-12);
    }
    assert_int_equal(all.joined.merged, 0);
    assert_int_equal(all.joined.completed, 0);
    assert_int_equal(all.remarks.n, 0);
    forget(&all);
}

/* 5 + 5 samples, of which 3 and 4 h stand in both. */
static void equal_samples_are_merged_and_counted(void **state) {
    (void)state;
    joint all = {0};
    add_even(&all, "a", 5, 0, hour);
    add_even(&all, "b", 5, 3 * hour, hour);
    join(&all);
    assert_int_equal(all.status, LEE_OK);
    assert_int_equal(all.joined.n, 8);
    assert_int_equal(all.joined.merged, 2);
    assert_int_equal(all.joined.completed, 0);
    for (size_t i = 0; i < 8; i++) {
        assert_int_equal(all.joined.time[i], (int64_t)i * hour);
    }
    forget(&all);
}

static void a_missing_wind_takes_the_wind_of_the_other_file(void **state) {
    (void)state;
    const observed a[] = {
        {0,    4.0, 10},
        {3600, NAN, 0 },
        {7200, NAN, 0 }
    };
    const observed b[] = {
        {0,    NAN, 0 },
        {3600, 7.0, 90},
        {7200, NAN, 0 }
    };
    joint all = {0};
    add(&all, "a", 3, a);
    add(&all, "b", 3, b);
    join(&all);
    assert_int_equal(all.status, LEE_OK);
    assert_int_equal(all.joined.n, 3);
    assert_int_equal(all.joined.merged, 3);
    assert_int_equal(all.joined.completed, 2);
    assert_near(speed_at(&all.joined, 0), 4.0, 1e-12);
    assert_near(all.joined.east[1], -7.0, 1e-12);
    assert_true(isnan(all.joined.east[2]) && isnan(all.joined.north[2]));
    forget(&all);
}

/* A third file tells of the second what the first lacks. */
static void
different_winds_are_refused_with_both_files_and_the_time(void **state) {
    (void)state;
    const observed a[] = {
        {0,    4.0, 10},
        {3600, NAN, 0 }
    };
    const observed b[] = {
        {0,    4.0, 10},
        {3600, 7.0, 90}
    };
    const observed c[] = {
        {0,    4.0,    10},
        {3600, 7.0001, 90}
    };
    joint all = {0};
    add(&all, "a.csv", 2, a);
    add(&all, "b.csv", 2, b);
    add(&all, "c.csv", 2, c);
    assert_refused(&all, "b.csv and c.csv both have a sample at "
                         "1970-01-01T01:00:00Z, with different wind");
}

/* 2e-6 of 7 m s-1: a few units of single precision, 5e-7 m s-1 there. */
static void rounding_of_units_is_no_difference(void **state) {
    (void)state;
    const observed a[] = {
        {0, 7.0, 90}
    };
    const observed b[] = {
        {0, 7.0 + 2e-6, 90}
    };
    joint all = {0};
    add(&all, "a", 1, a);
    add(&all, "b", 1, b);
    join(&all);
    assert_int_equal(all.status, LEE_OK);
    assert_near(speed_at(&all.joined, 0), 7.0, 1e-12);
    forget(&all);
}

static void different_pressures_are_refused_by_name(void **state) {
    (void)state;
    const observed one[] = {
        {0, 7.0, 90}
    };
    joint all = {0};
    add(&all, "a", 1, one)->pressure = calloc(1, sizeof(double));
    add(&all, "b", 1, one)->pressure = calloc(1, sizeof(double));
    all.record[0].pressure[0] = 101300.0;
    all.record[1].pressure[0] = 101310.0;
    assert_refused(&all, "a and b both have a sample at "
                         "1970-01-01T00:00:00Z, with different pressure");
}

static void
a_quantity_that_one_file_lacks_is_missing_there_and_told(void **state) {
    (void)state;
    joint all = {0};
    add_even(&all, "a", 2, 0, hour);
    lee_wind_record *b = add_even(&all, "b", 2, 2 * hour, hour);
    b->ice = calloc(2, sizeof *b->ice);
    assert_non_null(b->ice);
    b->ice[1] = 0.25;
    join(&all);
    assert_int_equal(all.status, LEE_OK);
    assert_true(isnan(all.joined.ice[0]) && isnan(all.joined.ice[1]));
    assert_near(all.joined.ice[2], 0.0, 0.0);
    assert_near(all.joined.ice[3], 0.25, 0.0);
    assert_null(all.joined.pressure);
    assert_int_equal(all.remarks.n, 1);
    assert_string_equal(all.remarks.text[0],
                        "ice: in 1 of the 2 files there is none, the first "
                        "of them a; it is missing there");
    forget(&all);
}

static void different_stamps_are_refused(void **state) {
    (void)state;
    joint all = {0};
    add_even(&all, "a", 2, 0, hour);
    add_even(&all, "b", 2, 9 * hour, hour)->stamp = LEE_STAMP_END;
    assert_refused(&all, "a holds instants and b means stamped at their end: "
                         "one record holds one kind");
}

static void means_of_different_steps_are_refused(void **state) {
    (void)state;
    joint all = {0};
    add_even(&all, "a", 3, 0, hour)->stamp = LEE_STAMP_START;
    add_even(&all, "one", 1, 5 * hour, hour)->stamp = LEE_STAMP_START;
    add_even(&all, "b", 3, 9 * hour, 600)->stamp = LEE_STAMP_START;
    assert_refused(&all, "a holds means over 60 min and b over 10 min: one "
                         "record of means has one step");
}

static void instants_of_different_steps_are_joined_and_told(void **state) {
    (void)state;
    joint all = {0};
    add_even(&all, "a", 3, 0, hour);
    add_even(&all, "b", 3, 9 * hour, 600);
    join(&all);
    assert_int_equal(all.status, LEE_OK);
    assert_int_equal(all.joined.n, 6);
    assert_int_equal(all.remarks.n, 1);
    assert_string_equal(all.remarks.text[0],
                        "usual steps differ: 60 min in a, 10 min in b");
    forget(&all);
}

/* All hours of the first are times of the second: 0 to 12 h each 20 min. */
static void a_finer_file_that_agrees_may_overlap_a_coarser_one(void **state) {
    (void)state;
    joint all = {0};
    add_even(&all, "a", 13, 0, hour);
    add_even(&all, "b", 37, 0, 1200);
    join(&all);
    assert_int_equal(all.status, LEE_OK);
    assert_int_equal(all.joined.n, 37);
    assert_int_equal(all.joined.merged, 13);
    forget(&all);
}

static void an_overlap_without_common_times_is_refused(void **state) {
    (void)state;
    joint all = {0};
    add_even(&all, "a", 6, 0, hour);
    add_even(&all, "b", 8, 2 * hour + 1800, hour);
    assert_refused(&all,
                   "a and b overlap from 1970-01-01T02:30:00Z to "
                   "1970-01-01T05:00:00Z, but only 0 of 3 times are the same "
                   "there: nothing tells whether they agree");
}

/* Between 3 and 40 h the first has nothing. */
static void a_file_may_stand_in_a_hole_of_another(void **state) {
    (void)state;
    const observed a[] = {
        {0,         4.0, 10},
        {3600,      4.0, 10},
        {40 * 3600, 4.0, 10},
        {41 * 3600, 4.0, 10}
    };
    joint all = {0};
    add(&all, "a", 4, a);
    add_even(&all, "b", 3, 10 * hour + 900, hour);
    join(&all);
    assert_int_equal(all.status, LEE_OK);
    assert_int_equal(all.joined.n, 7);
    assert_int_equal(all.joined.time[2], 10 * hour + 900);
    forget(&all);
}

static void the_counts_of_the_readers_are_added(void **state) {
    (void)state;
    joint all = {0};
    for (size_t i = 0; i < 2; i++) {
        lee_wind_record *one =
            add_even(&all, "x", 2, (int64_t)i * 9 * hour, hour);
        one->duplicates = 1 + i;
        one->variable_calm = 3 + i;
        one->variable_missing = 5 + i;
    }
    join(&all);
    assert_int_equal(all.joined.duplicates, 3);
    assert_int_equal(all.joined.variable_calm, 7);
    assert_int_equal(all.joined.variable_missing, 11);
    forget(&all);
}

static void empty_records_add_nothing(void **state) {
    (void)state;
    joint all = {0};
    add_even(&all, "none", 0, 0, hour);
    add_even(&all, "a", 2, 0, hour);
    join(&all);
    assert_int_equal(all.status, LEE_OK);
    assert_int_equal(all.joined.n, 2);
    forget(&all);
}

static void a_join_of_nothing_is_refused(void **state) {
    (void)state;
    joint all = {0};
    join(&all);
    assert_int_equal(all.status, LEE_ERR_ARGUMENT);
    assert_string_equal(all.error.message, "there is no record to join");
}

/* A record dealt out by chance to three files, some samples to two or all of
 * them, comes back whole: nothing lost, nothing made up. */
static void a_record_dealt_out_to_files_comes_back_whole(void **state) {
    (void)state;
    const size_t n = 400;
    uint64_t seed = 7;
    observed dealt[3][400];
    size_t count[3] = {0};
    for (size_t i = 0; i < n; i++) {
        const observed one = {(int64_t)i * hour, 20.0 * uniform(&seed),
                              360.0 * uniform(&seed)};
        for (size_t k = 0; k < 3; k++) {
            if (k == i % 3 || uniform(&seed) < 0.8) {
                dealt[k][count[k]++] = one;
            }
        }
    }
    joint all = {0};
    for (size_t k = 0; k < 3; k++) {
        add(&all, "x", count[k], dealt[k]);
    }
    join(&all);
    assert_int_equal(all.status, LEE_OK);
    assert_int_equal(all.joined.n, n);
    assert_int_equal(all.joined.merged, count[0] + count[1] + count[2] - n);
    for (size_t i = 0; i < n; i++) {
        assert_int_equal(all.joined.time[i], (int64_t)i * hour);
        assert_true(isfinite(all.joined.east[i]) != 0);
    }
    forget(&all);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(
            files_follow_each_other_in_whatever_order_they_are_named),
        cmocka_unit_test(equal_samples_are_merged_and_counted),
        cmocka_unit_test(a_missing_wind_takes_the_wind_of_the_other_file),
        cmocka_unit_test(
            different_winds_are_refused_with_both_files_and_the_time),
        cmocka_unit_test(rounding_of_units_is_no_difference),
        cmocka_unit_test(different_pressures_are_refused_by_name),
        cmocka_unit_test(
            a_quantity_that_one_file_lacks_is_missing_there_and_told),
        cmocka_unit_test(different_stamps_are_refused),
        cmocka_unit_test(means_of_different_steps_are_refused),
        cmocka_unit_test(instants_of_different_steps_are_joined_and_told),
        cmocka_unit_test(a_finer_file_that_agrees_may_overlap_a_coarser_one),
        cmocka_unit_test(an_overlap_without_common_times_is_refused),
        cmocka_unit_test(a_file_may_stand_in_a_hole_of_another),
        cmocka_unit_test(the_counts_of_the_readers_are_added),
        cmocka_unit_test(empty_records_add_nothing),
        cmocka_unit_test(a_join_of_nothing_is_refused),
        cmocka_unit_test(a_record_dealt_out_to_files_comes_back_whole),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
