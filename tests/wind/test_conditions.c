/* Air, water and ice are known where the record knows them, and nowhere
 * else. */
#include "wind/support.h"

#include <stdlib.h>

/* A few rounding errors of a pressure of some 1e5 Pa. */
static const double rounding = 1e-10;

enum { HOUR = 3600 };

static const lee_gap_rule three_hours = {.largest = 3 * HOUR};

/* An hourly record with a temperature of each sample, NaN where missing, and
 * no wind at all. */
static lee_wind_record warmth(size_t n, const double kelvin[],
                              lee_stamp stamp) {
    lee_wind_record record;
    assert_int_equal(lee_wind_record_init(&record, n, NULL), LEE_OK);
    record.stamp = stamp;
    record.air_temperature = calloc(n, sizeof *record.air_temperature);
    assert_non_null(record.air_temperature);
    for (size_t i = 0; i < n; i++) {
        record.time[i] = (int64_t)i * HOUR;
        record.air_temperature[i] = kelvin[i];
    }
    return record;
}

static double warmth_at(const lee_wind_record *record, double hours) {
    size_t hint = 0;
    return lee_wind_conditions_at(record, &three_hours, HOUR, hours * HOUR,
                                  &hint)
        .air_temperature;
}

static void a_sample_has_its_own_value(void **state) {
    (void)state;
    const double kelvin[] = {280.1, 283.7, 281.3};
    lee_wind_record record = warmth(3, kelvin, LEE_STAMP_INSTANT);
    for (size_t i = 0; i < 3; i++) {
        assert_true(warmth_at(&record, (double)i) == kelvin[i]);
    }
    lee_wind_record_free(&record);
}

static void
instants_are_linear_between_samples_that_have_the_value(void **state) {
    (void)state;
    const double kelvin[] = {280.0, NAN, NAN, 286.0};
    lee_wind_record record = warmth(4, kelvin, LEE_STAMP_INSTANT);
    for (double hours = 0.0; hours <= 3.0; hours += 0.25) {
        assert_near(warmth_at(&record, hours), 280.0 + 2.0 * hours, rounding);
    }
    lee_wind_record_free(&record);
}

/* Four hours apart is an excess of three over the step of one. */
static void a_gap_as_long_as_the_rule_is_bridged(void **state) {
    (void)state;
    const double kelvin[] = {280.0, NAN, NAN, NAN, 288.0};
    lee_wind_record record = warmth(5, kelvin, LEE_STAMP_INSTANT);
    for (double hours = 0.125; hours < 4.0; hours += 0.125) {
        assert_near(warmth_at(&record, hours), 280.0 + 2.0 * hours, rounding);
    }
    lee_wind_record_free(&record);
}

static void a_longer_gap_is_not_bridged(void **state) {
    (void)state;
    const double kelvin[] = {280.0, NAN, NAN, NAN, NAN, 290.0};
    lee_wind_record record = warmth(6, kelvin, LEE_STAMP_INSTANT);
    for (double hours = 0.25; hours < 5.0; hours += 0.25) {
        assert_true(isnan(warmth_at(&record, hours)));
    }
    assert_near(warmth_at(&record, 0.0), 280.0, 0.0);
    assert_near(warmth_at(&record, 5.0), 290.0, 0.0);
    lee_wind_record_free(&record);
}

static void
before_the_first_and_after_the_last_value_nothing_is_known(void **state) {
    (void)state;
    const double kelvin[] = {NAN, 280.0, 281.0, NAN};
    lee_wind_record record = warmth(4, kelvin, LEE_STAMP_INSTANT);
    const double unknown[] = {-1.0, 0.0, 0.5, 2.5, 3.0, 7.0, NAN};
    for (size_t i = 0; i < sizeof unknown / sizeof unknown[0]; i++) {
        assert_true(isnan(warmth_at(&record, unknown[i])));
    }
    lee_wind_record_free(&record);
}

static const lee_stamp means[] = {LEE_STAMP_START, LEE_STAMP_MIDDLE,
                                  LEE_STAMP_END};
static const double lead[] = {0.0, 0.5, 1.0}; /* h */

static void means_are_held_over_their_step(void **state) {
    (void)state;
    const double kelvin[] = {280.0, 284.0};
    for (size_t k = 0; k < 3; k++) {
        lee_wind_record record = warmth(2, kelvin, means[k]);
        assert_near(warmth_at(&record, 0.0 - lead[k]), 280.0, 0.0);
        assert_near(warmth_at(&record, 0.99 - lead[k]), 280.0, 0.0);
        assert_near(warmth_at(&record, 1.0 - lead[k]), 284.0, 0.0);
        assert_near(warmth_at(&record, 2.0 - lead[k]), 284.0, 0.0);
        assert_true(isnan(warmth_at(&record, -0.01 - lead[k])));
        assert_true(isnan(warmth_at(&record, 2.01 - lead[k])));
        lee_wind_record_free(&record);
    }
}

/* Steps [0, 1 h) and [3 h, 4 h): the two hours between are linear. */
static void the_time_between_two_steps_is_bridged(void **state) {
    (void)state;
    const double kelvin[] = {280.0, NAN, NAN, 284.0};
    for (size_t k = 0; k < 3; k++) {
        lee_wind_record record = warmth(4, kelvin, means[k]);
        assert_near(warmth_at(&record, 0.5 - lead[k]), 280.0, 0.0);
        assert_near(warmth_at(&record, 1.5 - lead[k]), 281.0, rounding);
        assert_near(warmth_at(&record, 2.0 - lead[k]), 282.0, rounding);
        assert_near(warmth_at(&record, 3.5 - lead[k]), 284.0, 0.0);
        lee_wind_record_free(&record);
    }
}

static void
a_mean_without_neighbours_is_known_for_its_step_alone(void **state) {
    (void)state;
    const double kelvin[] = {NAN, NAN, 280.0, NAN, NAN};
    for (size_t k = 0; k < 3; k++) {
        lee_wind_record record = warmth(5, kelvin, means[k]);
        assert_near(warmth_at(&record, 2.01 - lead[k]), 280.0, 0.0);
        assert_near(warmth_at(&record, 2.99 - lead[k]), 280.0, 0.0);
        assert_true(isnan(warmth_at(&record, 1.9 - lead[k])));
        assert_true(isnan(warmth_at(&record, 3.1 - lead[k])));
        lee_wind_record_free(&record);
    }
}

static void a_record_without_columns_knows_nothing(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    4, 90},
        {HOUR, 9, 90}
    };
    lee_wind_record record = record_of(2, wind, LEE_STAMP_INSTANT);
    size_t hint = 0;
    const lee_wind_conditions at =
        lee_wind_conditions_at(&record, &three_hours, HOUR, 60.0, &hint);
    assert_true(isnan(at.pressure) && isnan(at.air_temperature) &&
                isnan(at.water_temperature) && isnan(at.humidity) &&
                isnan(at.ice));
    lee_wind_record_free(&record);
}

/* Five columns of two instants that rise from 10 k to 10 k + 2. */
static void each_column_gives_its_own_value(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    4, 90},
        {HOUR, 9, 90}
    };
    lee_wind_record record = record_of(2, wind, LEE_STAMP_INSTANT);
    double **column[] = {&record.pressure, &record.air_temperature,
                         &record.water_temperature, &record.humidity,
                         &record.ice};
    for (size_t k = 0; k < 5; k++) {
        *column[k] = calloc(2, sizeof(double));
        assert_non_null(*column[k]);
        (*column[k])[0] = 10.0 * (double)k;
        (*column[k])[1] = 10.0 * (double)k + 2.0;
    }
    size_t hint = 0;
    const lee_wind_conditions at =
        lee_wind_conditions_at(&record, &three_hours, HOUR, HOUR / 2.0, &hint);
    assert_near(at.pressure, 1.0, rounding);
    assert_near(at.air_temperature, 11.0, rounding);
    assert_near(at.water_temperature, 21.0, rounding);
    assert_near(at.humidity, 31.0, rounding);
    assert_near(at.ice, 41.0, rounding);
    lee_wind_record_free(&record);
}

static void the_hint_does_not_change_what_is_known(void **state) {
    (void)state;
    enum { N = 60 };
    double kelvin[N];
    uint64_t seed = 7;
    for (size_t i = 0; i < N; i++) {
        kelvin[i] = uniform(&seed) < 0.6 ? NAN : 270.0 + 20.0 * uniform(&seed);
    }
    lee_wind_record record = warmth(N, kelvin, LEE_STAMP_INSTANT);
    size_t known = 0;
    for (int j = 0; j < 500; j++) {
        const double t = N * HOUR * uniform(&seed);
        size_t hint = (size_t)(2.0 * N * uniform(&seed));
        const double a =
            lee_wind_conditions_at(&record, &three_hours, HOUR, t, &hint)
                .air_temperature;
        const double b = warmth_at(&record, t / HOUR);
        assert_true(isnan(a) ? isnan(b) : fabs(a - b) <= rounding);
        known += isnan(a) ? 0 : 1;
    }
    assert_true(known > 100 && known < 500);
    lee_wind_record_free(&record);
}

static double warmth_of(const lee_wind_record *record, size_t index) {
    return lee_wind_conditions_of(record, &three_hours, HOUR, index)
        .air_temperature;
}

/* A jump belongs to the later step, so the time of an END stamp would give the
 * next sample. */
static void a_mean_knows_the_value_of_its_own_step(void **state) {
    (void)state;
    const double kelvin[] = {280.0, 284.0, 288.0};
    for (size_t k = 0; k < 3; k++) {
        lee_wind_record record = warmth(3, kelvin, means[k]);
        for (size_t i = 0; i < 3; i++) {
            assert_near(warmth_of(&record, i), kelvin[i], 0.0);
        }
        lee_wind_record_free(&record);
    }
}

static void
a_sample_without_the_value_takes_it_from_its_neighbours(void **state) {
    (void)state;
    const double kelvin[] = {280.0, NAN, 284.0, NAN};
    lee_wind_record instants = warmth(4, kelvin, LEE_STAMP_INSTANT);
    assert_near(warmth_of(&instants, 1), 282.0, rounding);
    assert_true(isnan(warmth_of(&instants, 3)));
    lee_wind_record_free(&instants);
    for (size_t k = 0; k < 3; k++) {
        lee_wind_record record = warmth(4, kelvin, means[k]);
        assert_near(warmth_of(&record, 1), 282.0, rounding);
        assert_true(isnan(warmth_of(&record, 3)));
        lee_wind_record_free(&record);
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_sample_has_its_own_value),
        cmocka_unit_test(
            instants_are_linear_between_samples_that_have_the_value),
        cmocka_unit_test(a_gap_as_long_as_the_rule_is_bridged),
        cmocka_unit_test(a_longer_gap_is_not_bridged),
        cmocka_unit_test(
            before_the_first_and_after_the_last_value_nothing_is_known),
        cmocka_unit_test(means_are_held_over_their_step),
        cmocka_unit_test(the_time_between_two_steps_is_bridged),
        cmocka_unit_test(a_mean_without_neighbours_is_known_for_its_step_alone),
        cmocka_unit_test(a_record_without_columns_knows_nothing),
        cmocka_unit_test(each_column_gives_its_own_value),
        cmocka_unit_test(the_hint_does_not_change_what_is_known),
        cmocka_unit_test(a_mean_knows_the_value_of_its_own_step),
        cmocka_unit_test(
            a_sample_without_the_value_takes_it_from_its_neighbours),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
