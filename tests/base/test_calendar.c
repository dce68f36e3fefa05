/* Times are the seconds that the C library counts, or they are refused. */
#define _DEFAULT_SOURCE 1 /* timegm */

#include "support/check.h"

#include <limits.h>
#include <stdbool.h>
#include <stdio.h>
#include <string.h>
#include <time.h>

#include "leewater/calendar.h"

/* Seconds since 1970 by the C library, which follows the Gregorian rule in
 * all years. */
static int64_t library_time(int year, int month, int day, int clock) {
    struct tm tm = {.tm_year = year - 1900,
                    .tm_mon = month - 1,
                    .tm_mday = day,
                    .tm_sec = clock};
    return timegm(&tm);
}

static int64_t civil(int year, int month, int day) {
    int64_t time = 0;
    assert_true(lee_time_from_civil(year, month, day, 0, 0, 0, &time));
    return time;
}

static void
every_day_of_ten_thousand_years_follows_the_one_before(void **state) {
    (void)state;
    int64_t expected = civil(1, 1, 1);
    for (int year = 1; year <= 9999; year++) {
        for (int month = 1; month <= 12; month++) {
            int64_t time = 0;
            for (int day = 1;
                 lee_time_from_civil(year, month, day, 0, 0, 0, &time); day++) {
                assert_true(time == expected);
                expected += 86400;
            }
        }
    }
    /* 9999 years of the Gregorian calendar hold 2424 leap days. */
    assert_true(expected - civil(1, 1, 1) == (9999 * 365LL + 2424) * 86400);
}

static void days_are_counted_as_the_c_library_counts_them(void **state) {
    (void)state;
    for (int year = 1; year <= 9999; year += 3) {
        for (int month = 1; month <= 12; month++) {
            const int day = 1 + (year + month) % 28;
            const int clock = (year * 7919 + month) % 86400;
            int64_t time = 0;
            assert_true(lee_time_from_civil(year, month, day, clock / 3600,
                                            clock / 60 % 60, clock % 60,
                                            &time));
            assert_true(time == library_time(year, month, day, clock));
        }
    }
}

static void a_formatted_time_reads_back_to_itself(void **state) {
    (void)state;
    const int64_t first = civil(1, 1, 1);
    const int64_t last = civil(9999, 12, 31) + 86399;
    /* A step of 37.5 days and a bit meets every month and all hours. */
    for (int64_t time = first; time <= last; time += 3245677) {
        char text[LEE_TIME_TEXT];
        int64_t read = 0;
        bool is_zoned = false;
        assert_int_equal(lee_time_parse(lee_time_format(time, text), 12345,
                                        &read, &is_zoned, NULL),
                         LEE_OK);
        assert_true(read == time);
        assert_true(is_zoned);
    }
}

static void leap_days_follow_the_gregorian_rule(void **state) {
    (void)state;
    int64_t time = 0;
    assert_true(lee_time_from_civil(2028, 2, 29, 0, 0, 0, &time));
    assert_true(lee_time_from_civil(2000, 2, 29, 0, 0, 0, &time));
    assert_false(lee_time_from_civil(1900, 2, 29, 0, 0, 0, &time));
    assert_false(lee_time_from_civil(2031, 2, 29, 0, 0, 0, &time));
}

static void fields_outside_the_calendar_leave_the_time_alone(void **state) {
    (void)state;
    static const int fields[][6] = {
        {2031,    0,       1,  0,  0,  0 },
        {2031,    13,      1,  0,  0,  0 },
        {2031,    1,       0,  0,  0,  0 },
        {2031,    1,       32, 0,  0,  0 },
        {2031,    2,       30, 0,  0,  0 },
        {2031,    4,       31, 0,  0,  0 },
        {2031,    1,       1,  24, 0,  0 },
        {2031,    1,       1,  -1, 0,  0 },
        {2031,    1,       1,  0,  60, 0 },
        {2031,    1,       1,  0,  -1, 0 },
        {2031,    1,       1,  0,  0,  60},
        {2031,    1,       1,  0,  0,  -1},
        {0,       1,       1,  0,  0,  0 },
        {10000,   1,       1,  0,  0,  0 },
        {2031,    INT_MIN, 1,  0,  0,  0 },
        {INT_MAX, 1,       1,  0,  0,  0 },
    };
    for (size_t i = 0; i < sizeof fields / sizeof fields[0]; i++) {
        const int *f = fields[i];
        int64_t time = 42;
        assert_false(
            lee_time_from_civil(f[0], f[1], f[2], f[3], f[4], f[5], &time));
        assert_true(time == 42);
    }
}

/* Texts and the same instant counted in seconds by hand: 2031-01-10 is day
 * 22289 after 1970-01-01 (61 years, 15 leap days, 9 days). */
enum { DAY = 22289 * 86400LL };
static const struct {
    const char *text;
    int64_t time;
    bool is_zoned;
} spellings[] = {
    {"2031-01-10",                       DAY,         false},
    {"2031-01-10T06:30",                 DAY + 23400, false},
    {"2031-01-10 06:30",                 DAY + 23400, false},
    {"2031-01-10T06:30:15",              DAY + 23415, false},
    {"2031-01-10 06:30:00.000Z",         DAY + 23400, true },
    {"2031-01-10T06:30:00,0",            DAY + 23400, false},
    {"2031-01-10T06:30Z",                DAY + 23400, true },
    {"2031-01-10T06:30+01:00",           DAY + 19800, true },
    {"2031-01-10T06:30+0100",            DAY + 19800, true },
    {"2031-01-10T06:30-03",              DAY + 34200, true },
    {"2031-01-10T00:30+05:45",           DAY - 18900, true },
    {"2031-01-10 06:30:15.0005",         DAY + 23415, false},
    {"2031-01-10 06:30:14.9995",         DAY + 23415, false},
    {"2031-01-10 06:30:14.999999999999", DAY + 23415, false},
    {"2031-01-09 23:59:59.9996Z",        DAY,         true },
};

static void each_spelling_reads_as_its_instant(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof spellings / sizeof spellings[0]; i++) {
        int64_t time = 0;
        bool is_zoned = !spellings[i].is_zoned;
        lee_error error = {0};
        const lee_status status =
            lee_time_parse(spellings[i].text, 0, &time, &is_zoned, &error);
        assert_string_equal(error.message, "");
        assert_int_equal(status, LEE_OK);
        assert_true(time == spellings[i].time);
        assert_true(is_zoned == spellings[i].is_zoned);
    }
}

static void the_given_offset_holds_only_without_a_zone(void **state) {
    (void)state;
    int64_t time = 0;
    assert_int_equal(
        lee_time_parse("2031-01-10T01:00", 3600, &time, NULL, NULL), LEE_OK);
    assert_true(time == DAY);
    assert_int_equal(
        lee_time_parse("2031-01-10T01:00Z", 7200, &time, NULL, NULL), LEE_OK);
    assert_true(time == DAY + 3600);
}

static void what_is_no_time_is_refused(void **state) {
    (void)state;
    static const char *const others[] = {
        "",
        "now",
        "2031",
        "2031-01",
        "2031-1-10",
        "31-01-10",
        "10.01.2031",
        "01/10/2031",
        "20310110",
        "2031-01-10T",
        "2031-01-10T06",
        "2031-01-10T6:30",
        "2031-01-10  06:30",
        "2031-01-10t06:30",
        "2031-01-10T06:30 Z",
        "2031-01-10T06:30:00.",
        "2031-01-10T06:30:00ZZ",
        "2031-01-10T06:30+1",
        "2031-01-10T06:30+01:",
        "2031-01-10T06:30+01:60",
        "2031-01-10T06:30+14:01",
        "2031-01-10T06:30+010",
        "2031-01-10Z",
        " 2031-01-10",
        "2031-01-10 ",
        "2031-01-10T06:30:00x",
        "+2031-01-10",
        "-031-01-10",
    };
    for (size_t i = 0; i < sizeof others / sizeof others[0]; i++) {
        int64_t time = 42;
        bool is_zoned = true;
        assert_int_equal(lee_time_parse(others[i], 0, &time, &is_zoned, NULL),
                         LEE_ERR_FORMAT);
        assert_true(time == 42);
    }
}

static void a_text_that_is_no_time_is_named_beside_an_example(void **state) {
    (void)state;
    int64_t time = 0;
    lee_error error = {0};
    lee_time_parse("10.01.2031", 0, &time, NULL, &error);
    assert_string_equal(error.message,
                        "'10.01.2031' is not a time; expected ISO 8601 such "
                        "as 2031-01-10T06:30Z");
}

static void a_day_that_does_not_exist_is_refused_as_such(void **state) {
    (void)state;
    static const char *const others[] = {
        "2031-02-29",       "2031-13-01",       "0000-01-01",
        "2031-01-10T24:00", "2031-01-10T06:60", "2031-06-30T23:59:60Z",
    };
    for (size_t i = 0; i < sizeof others / sizeof others[0]; i++) {
        int64_t time = 0;
        lee_error error = {0};
        assert_int_equal(lee_time_parse(others[i], 0, &time, NULL, &error),
                         LEE_ERR_FORMAT);
        assert_non_null(strstr(error.message, "is not in the calendar"));
        assert_non_null(strstr(error.message, others[i]));
    }
}

static void a_time_between_two_seconds_is_refused_as_such(void **state) {
    (void)state;
    static const char *const others[] = {
        "2031-01-10 06:30:15.5",
        "2031-01-10 06:30:15.000501",
        "2031-01-10 06:30:15.9994Z",
    };
    for (size_t i = 0; i < sizeof others / sizeof others[0]; i++) {
        int64_t time = 0;
        lee_error error = {0};
        assert_int_equal(lee_time_parse(others[i], 0, &time, NULL, &error),
                         LEE_ERR_FORMAT);
        assert_non_null(strstr(error.message, "lies between two seconds"));
    }
}

static void a_short_time_shows_minutes_and_utc(void **state) {
    (void)state;
    char text[LEE_TIME_TEXT];
    assert_string_equal(lee_time_format_short(DAY + 23400, text),
                        "2031-01-10 06:30 UTC");
    assert_string_equal(lee_time_format_short(-60, text),
                        "1969-12-31 23:59 UTC");
}

static void a_time_shows_seconds_and_zone(void **state) {
    (void)state;
    char text[LEE_TIME_TEXT];
    assert_string_equal(lee_time_format(0, text), "1970-01-01T00:00:00Z");
    assert_string_equal(lee_time_format(-1, text), "1969-12-31T23:59:59Z");
}

/* The last instant of a 64-bit clock is a known date, 292277026596-12-04
 * 15:30:07 (common knowledge, from memory); so is its first. */
static void the_last_second_there_is_can_be_written(void **state) {
    (void)state;
    char text[LEE_TIME_TEXT];
    assert_string_equal(lee_time_format(INT64_MAX, text),
                        "292277026596-12-04T15:30:07Z");
    assert_string_equal(lee_time_format(INT64_MIN, text),
                        "-292277022657-01-27T08:29:52Z");
}

static void offsets_read_as_seconds_east(void **state) {
    (void)state;
    static const struct {
        const char *text;
        int64_t offset;
    } offsets[] = {
        {"Z",      0     },
        {"+01:00", 3600  },
        {"-0330",  -12600},
        {"+05",    18000 },
        {"+00:00", 0     },
        {"-00:00", 0     },
        {"+14:00", 50400 },
        {"-14:00", -50400},
    };
    for (size_t i = 0; i < sizeof offsets / sizeof offsets[0]; i++) {
        int64_t offset = 42;
        assert_int_equal(lee_utc_offset_parse(offsets[i].text, &offset, NULL),
                         LEE_OK);
        assert_true(offset == offsets[i].offset);
    }
}

static void what_is_no_offset_is_refused(void **state) {
    (void)state;
    static const char *const others[] = {"",     "1",       "+1",    "+1:00",
                                         "0100", "+01:0",   "+15",   "UTC",
                                         "Z ",   "+01:00x", "+-1:00"};
    for (size_t i = 0; i < sizeof others / sizeof others[0]; i++) {
        int64_t offset = 42;
        lee_error error = {0};
        assert_int_equal(lee_utc_offset_parse(others[i], &offset, &error),
                         LEE_ERR_FORMAT);
        assert_non_null(strstr(error.message, "is not an offset from UTC"));
        assert_true(offset == 42);
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(
            every_day_of_ten_thousand_years_follows_the_one_before),
        cmocka_unit_test(days_are_counted_as_the_c_library_counts_them),
        cmocka_unit_test(a_formatted_time_reads_back_to_itself),
        cmocka_unit_test(leap_days_follow_the_gregorian_rule),
        cmocka_unit_test(fields_outside_the_calendar_leave_the_time_alone),
        cmocka_unit_test(each_spelling_reads_as_its_instant),
        cmocka_unit_test(the_given_offset_holds_only_without_a_zone),
        cmocka_unit_test(what_is_no_time_is_refused),
        cmocka_unit_test(a_text_that_is_no_time_is_named_beside_an_example),
        cmocka_unit_test(a_day_that_does_not_exist_is_refused_as_such),
        cmocka_unit_test(a_time_between_two_seconds_is_refused_as_such),
        cmocka_unit_test(a_short_time_shows_minutes_and_utc),
        cmocka_unit_test(a_time_shows_seconds_and_zone),
        cmocka_unit_test(the_last_second_there_is_can_be_written),
        cmocka_unit_test(offsets_read_as_seconds_east),
        cmocka_unit_test(what_is_no_offset_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
