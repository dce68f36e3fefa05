/* Days of the conventions' calendars follow each other, and none is made up. */
#include "support/check.h"

#include <stdio.h>
#include <string.h>

#include "base/cf_calendar.h"

#include "leewater/calendar.h"

static int64_t days_of(lee_cf_calendar calendar, int year, int month, int day) {
    const lee_cf_date date = {year, month, day};
    int64_t days = 0;
    assert_true(lee_cf_days(calendar, &date, &days));
    return days;
}

static bool has(lee_cf_calendar calendar, int year, int month, int day) {
    const lee_cf_date date = {year, month, day};
    int64_t days = 0;
    return lee_cf_days(calendar, &date, &days);
}

static const lee_cf_calendar all[] = {
    LEE_CF_STANDARD, LEE_CF_PROLEPTIC_GREGORIAN,
    LEE_CF_JULIAN,   LEE_CF_NOLEAP,
    LEE_CF_ALL_LEAP, LEE_CF_360_DAY,
};
enum { CALENDARS = sizeof all / sizeof all[0] };

static void every_date_follows_the_one_before(void **state) {
    (void)state;
    for (size_t i = 0; i < CALENDARS; i++) {
        int64_t expected = days_of(all[i], 1480, 1, 1);
        for (int year = 1480; year <= 2420; year++) {
            for (int k = 0; k < 12 * 31; k++) {
                const lee_cf_date date = {year, k / 31 + 1, k % 31 + 1};
                int64_t days = 0;
                if (lee_cf_days(all[i], &date, &days)) {
                    assert_true(days == expected);
                    expected++;
                }
            }
        }
    }
}

static void counts_of_days_come_back_from_their_dates(void **state) {
    (void)state;
    for (size_t i = 0; i < CALENDARS; i++) {
        const int64_t last = days_of(all[i], 9999, 12, 30);
        for (int64_t days = days_of(all[i], 1, 1, 1); days <= last;
             days += 13) {
            const lee_cf_date date = lee_cf_date_of(all[i], days);
            int64_t back = 0;
            assert_true(lee_cf_days(all[i], &date, &back) && back == days);
        }
    }
}

/* Days from the first of January 1601 to that of 2001: 97 leap years in 400
 * for the Gregorian rule, 100 for the Julian, none and all for two others. */
static void four_centuries_have_the_days_of_their_rule(void **state) {
    (void)state;
    static const struct {
        lee_cf_calendar calendar;
        int64_t days;
    } rules[] = {
        {LEE_CF_STANDARD,            400 * 365 + 97 },
        {LEE_CF_PROLEPTIC_GREGORIAN, 400 * 365 + 97 },
        {LEE_CF_JULIAN,              400 * 365 + 100},
        {LEE_CF_NOLEAP,              400 * 365      },
        {LEE_CF_ALL_LEAP,            400 * 366      },
        {LEE_CF_360_DAY,             400 * 360      },
    };
    for (size_t i = 0; i < sizeof rules / sizeof rules[0]; i++) {
        assert_true(days_of(rules[i].calendar, 2001, 1, 1) -
                        days_of(rules[i].calendar, 1601, 1, 1) ==
                    rules[i].days);
    }
}

static void the_first_of_january_1970_is_day_zero(void **state) {
    (void)state;
    for (size_t i = 0; i < CALENDARS; i++) {
        if (all[i] != LEE_CF_JULIAN) {
            assert_true(days_of(all[i], 1970, 1, 1) == 0);
        }
    }
}

/* The Julian calendar lags by 13 days from 1900-03-01 to 2100-02-28
 * (Gregorian): common knowledge. */
static void the_julian_calendar_lags_by_13_days_now(void **state) {
    (void)state;
    assert_true(days_of(LEE_CF_JULIAN, 2000, 1, 1) ==
                days_of(LEE_CF_PROLEPTIC_GREGORIAN, 2000, 1, 14));
}

/* Pope Gregory's reform: Thursday the 4th, then Friday the 15th. */
static void the_standard_calendar_leaps_over_ten_days_of_1582(void **state) {
    (void)state;
    assert_true(days_of(LEE_CF_STANDARD, 1582, 10, 15) ==
                days_of(LEE_CF_STANDARD, 1582, 10, 4) + 1);
    for (int day = 5; day < 15; day++) {
        assert_false(has(LEE_CF_STANDARD, 1582, 10, day));
    }
    assert_true(days_of(LEE_CF_STANDARD, 1582, 10, 4) ==
                days_of(LEE_CF_JULIAN, 1582, 10, 4));
}

static void the_gregorian_rule_counts_like_our_own_times(void **state) {
    (void)state;
    for (int year = 1; year <= 9999; year += 7) {
        int64_t time = 0;
        assert_true(lee_time_from_civil(year, year % 12 + 1, year % 28 + 1, 0,
                                        0, 0, &time));
        assert_true(days_of(LEE_CF_PROLEPTIC_GREGORIAN, year, year % 12 + 1,
                            year % 28 + 1) *
                        86400 ==
                    time);
    }
}

static void february_ends_as_its_calendar_says(void **state) {
    (void)state;
    static const struct {
        lee_cf_calendar calendar;
        int year;
        int last; /* day of February */
    } ends[] = {
        {LEE_CF_STANDARD,            1900, 28},
        {LEE_CF_STANDARD,            1500, 29},
        {LEE_CF_STANDARD,            2000, 29},
        {LEE_CF_PROLEPTIC_GREGORIAN, 1500, 28},
        {LEE_CF_JULIAN,              1900, 29},
        {LEE_CF_JULIAN,              1901, 28},
        {LEE_CF_NOLEAP,              2000, 28},
        {LEE_CF_ALL_LEAP,            2001, 29},
        {LEE_CF_360_DAY,             2001, 30},
    };
    for (size_t i = 0; i < sizeof ends / sizeof ends[0]; i++) {
        assert_true(has(ends[i].calendar, ends[i].year, 2, ends[i].last));
        assert_false(has(ends[i].calendar, ends[i].year, 2, ends[i].last + 1));
    }
}

static void a_year_of_360_days_has_no_31st(void **state) {
    (void)state;
    for (int month = 1; month <= 12; month++) {
        assert_true(has(LEE_CF_360_DAY, 2000, month, 30));
        assert_false(has(LEE_CF_360_DAY, 2000, month, 31));
    }
}

static void year_0_is_known_to_calendars_of_models_alone(void **state) {
    (void)state;
    for (size_t i = 0; i < CALENDARS; i++) {
        const bool is_strict =
            all[i] == LEE_CF_STANDARD || all[i] == LEE_CF_JULIAN;
        assert_true(has(all[i], 0, 1, 1) == !is_strict);
    }
}

static void fields_beyond_their_range_are_no_date(void **state) {
    (void)state;
    for (size_t i = 0; i < CALENDARS; i++) {
        assert_false(has(all[i], 2000, 0, 1));
        assert_false(has(all[i], 2000, 13, 1));
        assert_false(has(all[i], 2000, 1, 0));
        assert_false(has(all[i], 2000, 1, 32));
        assert_false(has(all[i], 10000, 1, 1));
        assert_false(has(all[i], -1, 1, 1));
    }
}

static void every_name_of_the_conventions_is_known(void **state) {
    (void)state;
    static const struct {
        const char *name;
        lee_cf_calendar calendar;
    } names[] = {
        {NULL,                  LEE_CF_STANDARD           },
        {"",                    LEE_CF_STANDARD           },
        {"standard",            LEE_CF_STANDARD           },
        {"Gregorian",           LEE_CF_STANDARD           },
        {"proleptic_gregorian", LEE_CF_PROLEPTIC_GREGORIAN},
        {"julian",              LEE_CF_JULIAN             },
        {"noleap",              LEE_CF_NOLEAP             },
        {"365_day",             LEE_CF_NOLEAP             },
        {"all_leap",            LEE_CF_ALL_LEAP           },
        {"366_day",             LEE_CF_ALL_LEAP           },
        {"360_DAY",             LEE_CF_360_DAY            },
    };
    for (size_t i = 0; i < sizeof names / sizeof names[0]; i++) {
        lee_cf_calendar found = LEE_CF_JULIAN;
        assert_int_equal(lee_cf_calendar_find(names[i].name, &found, NULL),
                         LEE_OK);
        assert_int_equal(found, names[i].calendar);
    }
}

static void other_calendars_are_refused_by_name(void **state) {
    (void)state;
    static const char *const others[] = {"none", "utc", "tai", "lunar"};
    for (size_t i = 0; i < sizeof others / sizeof others[0]; i++) {
        lee_cf_calendar found = LEE_CF_JULIAN;
        lee_error error = {0};
        char expected[64];
        (void)snprintf(expected, sizeof expected, "calendar '%s' is not read;",
                       others[i]);
        assert_int_equal(lee_cf_calendar_find(others[i], &found, &error),
                         LEE_ERR_FORMAT);
        assert_memory_equal(error.message, expected, strlen(expected));
    }
}

static void each_calendar_is_shown_by_a_name_that_finds_it(void **state) {
    (void)state;
    for (size_t i = 0; i < CALENDARS; i++) {
        lee_cf_calendar found = LEE_CF_STANDARD;
        assert_int_equal(
            lee_cf_calendar_find(lee_cf_calendar_name(all[i]), &found, NULL),
            LEE_OK);
        assert_int_equal(found, all[i]);
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(every_date_follows_the_one_before),
        cmocka_unit_test(counts_of_days_come_back_from_their_dates),
        cmocka_unit_test(four_centuries_have_the_days_of_their_rule),
        cmocka_unit_test(the_first_of_january_1970_is_day_zero),
        cmocka_unit_test(the_julian_calendar_lags_by_13_days_now),
        cmocka_unit_test(the_standard_calendar_leaps_over_ten_days_of_1582),
        cmocka_unit_test(the_gregorian_rule_counts_like_our_own_times),
        cmocka_unit_test(february_ends_as_its_calendar_says),
        cmocka_unit_test(a_year_of_360_days_has_no_31st),
        cmocka_unit_test(year_0_is_known_to_calendars_of_models_alone),
        cmocka_unit_test(fields_beyond_their_range_are_no_date),
        cmocka_unit_test(every_name_of_the_conventions_is_known),
        cmocka_unit_test(other_calendars_are_refused_by_name),
        cmocka_unit_test(each_calendar_is_shown_by_a_name_that_finds_it),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
