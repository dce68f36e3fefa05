/* What was understood is told before anything is computed. */
#include "support/lake.h"

/* Hourly wind; two samples are missing at 10 h, and twelve at 30 h. */
static lee_problem broken_record(bool is_split) {
    enum { HOURS = 60 };
    lee_problem problem = even_lake(20e3, 5.0);
    lee_wind_record *record = &problem.wind.record;
    problem.wind.kind = LEE_WIND_RECORD;
    problem.wind.gap = (lee_gap_rule){.largest = 3 * 3600, .split = is_split};
    assert_int_equal(lee_wind_record_init(record, HOURS, NULL), LEE_OK);
    for (size_t i = 0; i < HOURS; i++) {
        const bool is_missing = (i >= 10 && i < 12) || (i >= 30 && i < 42);
        record->time[i] = (int64_t)i * 3600;
        record->east[i] = is_missing ? NAN : 10.0;
        record->north[i] = is_missing ? NAN : 0.0;
    }
    return problem;
}

static lee_problem_check check(const lee_problem *problem) {
    lee_problem_check found;
    assert_int_equal(lee_check_problem(problem, &found, NULL), LEE_OK);
    return found;
}

static void a_long_gap_parts_the_record_and_a_short_one_does_not(void **state) {
    (void)state;
    lee_problem problem = broken_record(false);
    lee_problem_check found = check(&problem);
    assert_int_equal(found.record.gap_count, 2);
    assert_int_equal(found.pieces, 2);
    lee_problem_check_free(&found);
    lee_problem_free(&problem);
}

static void a_record_that_no_run_takes_is_warned_of(void **state) {
    (void)state;
    lee_problem problem = broken_record(false);
    lee_problem_check found = check(&problem);
    assert_int_equal(found.warnings.n, 1);
    assert_non_null(strstr(found.warnings.text[0], "1 gap is longer"));
    lee_problem_check_free(&found);
    lee_problem_free(&problem);
}

static void a_record_that_may_be_parted_is_not_warned_of(void **state) {
    (void)state;
    lee_problem problem = broken_record(true);
    lee_problem_check found = check(&problem);
    assert_int_equal(found.pieces, 2);
    assert_int_equal(found.warnings.n, 0);
    lee_problem_check_free(&found);
    lee_problem_free(&problem);
}

static void corrections_are_shown_for_the_peak_of_a_storm(void **state) {
    (void)state;
    lee_problem problem = even_lake(20e3, 5.0);
    problem.wind.kind = LEE_WIND_STORM;
    problem.wind.storm = (lee_storm){
        .peak = 25.0, .rise = 3600.0, .fall = 3600.0, .before = 5.0};
    lee_problem_check found = check(&problem);
    assert_near(found.method.corrected.speed, 25.0, 0.0);
    lee_problem_check_free(&found);
    lee_problem_free(&problem);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_long_gap_parts_the_record_and_a_short_one_does_not),
        cmocka_unit_test(a_record_that_no_run_takes_is_warned_of),
        cmocka_unit_test(a_record_that_may_be_parted_is_not_warned_of),
        cmocka_unit_test(corrections_are_shown_for_the_peak_of_a_storm),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
