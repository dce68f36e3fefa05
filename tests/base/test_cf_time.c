/* A number since a date is the second it means, or it is refused. */
#include "support/check.h"

#include <string.h>

#include "base/cf_time.h"

#include "leewater/calendar.h"

static lee_cf_clock clock_of(const char *text, lee_cf_calendar calendar) {
    lee_cf_clock clock = {0};
    lee_error error = {0};
    (void)lee_cf_clock_parse(text, calendar, &clock, &error);
    assert_string_equal(error.message, "");
    return clock;
}

/* The time of a number as ISO 8601. */
static void assert_is(const char *units, lee_cf_calendar calendar, double value,
                      const char *expected) {
    const lee_cf_clock clock = clock_of(units, calendar);
    char text[LEE_TIME_TEXT];
    int64_t time = 0;
    assert_int_equal(lee_cf_time(&clock, value, &time, NULL), LEE_OK);
    assert_string_equal(lee_time_format(time, text), expected);
}

static void a_number_counts_units_from_the_reference(void **state) {
    (void)state;
    assert_is("seconds since 2000-01-01", LEE_CF_STANDARD, 61.0,
              "2000-01-01T00:01:01Z");
    assert_is("minutes since 2000-01-01", LEE_CF_STANDARD, 1500.0,
              "2000-01-02T01:00:00Z");
    assert_is("hours since 2000-01-01", LEE_CF_STANDARD, -1.5,
              "1999-12-31T22:30:00Z");
    assert_is("days since 2000-01-01", LEE_CF_STANDARD, 59.25,
              "2000-02-29T06:00:00Z");
    assert_is("milliseconds since 1970-01-01", LEE_CF_STANDARD, 86400000.0,
              "1970-01-02T00:00:00Z");
    assert_is("microseconds since 1970-01-01", LEE_CF_STANDARD, 2e6,
              "1970-01-01T00:00:02Z");
}

static void units_are_known_in_all_their_spellings(void **state) {
    (void)state;
    static const struct {
        const char *text;
        int64_t unit; /* s */
    } spelled[] = {
        {"s since 2000-01-01",       1    },
        {"sec since 2000-01-01",     1    },
        {"secs since 2000-01-01",    1    },
        {"second since 2000-01-01",  1    },
        {"Seconds Since 2000-01-01", 1    },
        {"min since 2000-01-01",     60   },
        {"mins since 2000-01-01",    60   },
        {"minute since 2000-01-01",  60   },
        {"h since 2000-01-01",       3600 },
        {"hr since 2000-01-01",      3600 },
        {"hrs since 2000-01-01",     3600 },
        {"hour since 2000-01-01",    3600 },
        {"HOURS since 2000-01-01",   3600 },
        {"d since 2000-01-01",       86400},
        {"day since 2000-01-01",     86400},
        {" days  since 2000-01-01 ", 86400},
    };
    for (size_t i = 0; i < sizeof spelled / sizeof spelled[0]; i++) {
        const lee_cf_clock clock = clock_of(spelled[i].text, LEE_CF_STANDARD);
        assert_true(clock.unit == spelled[i].unit * 1000000);
    }
}

static void the_reference_is_read_in_all_its_forms(void **state) {
    (void)state;
    static const struct {
        const char *text;
        const char *expected;
    } forms[] = {
        {"days since 1990-1-2",                        "1990-01-02T00:00:00Z"},
        {"days since 1-1-1",                           "0001-01-01T00:00:00Z"},
        {"hours since 1900-01-01 00:00:0.0",           "1900-01-01T00:00:00Z"},
        {"hours since 1990-01-02T03:04",               "1990-01-02T03:04:00Z"},
        {"hours since 1990-01-02 3",                   "1990-01-02T03:00:00Z"},
        {"hours since 1990-01-02 03:04:05",            "1990-01-02T03:04:05Z"},
        {"hours since 1990-01-02 03:04:05.000000",     "1990-01-02T03:04:05Z"},
        {"hours since 1990-01-02T03:04:05Z",           "1990-01-02T03:04:05Z"},
        {"hours since 1990-01-02 03:04 UTC",           "1990-01-02T03:04:00Z"},
        {"hours since 1990-01-02 03:04:05 GMT",        "1990-01-02T03:04:05Z"},
        {"hours since 1990-01-02 03:04 +01:00",        "1990-01-02T02:04:00Z"},
        {"hours since 1990-01-02 03:04:05-6:30",       "1990-01-02T09:34:05Z"},
        {"hours since 1990-01-02 03:04 +0530",         "1990-01-01T21:34:00Z"},
        {"hours since 1990-01-02 03:04:00 -6",         "1990-01-02T09:04:00Z"},
        {"seconds since 1970-01-01 00:00:00.25 +0:00", NULL                  },
    };
    for (size_t i = 0; i < sizeof forms / sizeof forms[0]; i++) {
        if (forms[i].expected != NULL) {
            assert_is(forms[i].text, LEE_CF_PROLEPTIC_GREGORIAN, 0.0,
                      forms[i].expected);
        } else {
            const lee_cf_clock clock =
                clock_of(forms[i].text, LEE_CF_PROLEPTIC_GREGORIAN);
            assert_true(clock.reference == 250000);
        }
    }
}

/* The mixed calendar's year 1 begins two days before the Gregorian rule's
 * (Julian lag of -2 days then): 0000-12-30. */
static void an_old_reference_counts_real_days(void **state) {
    (void)state;
    const lee_cf_clock mixed =
        clock_of("days since 0001-01-01", LEE_CF_STANDARD);
    const lee_cf_clock proleptic =
        clock_of("days since 0001-01-01", LEE_CF_PROLEPTIC_GREGORIAN);
    assert_true(proleptic.reference - mixed.reference ==
                INT64_C(2) * 86400 * 1000000);
    assert_is("days since 1582-10-04", LEE_CF_STANDARD, 1.0,
              "1582-10-15T00:00:00Z");
}

static void a_julian_date_is_the_real_day_it_names(void **state) {
    (void)state;
    assert_is("hours since 2000-01-01", LEE_CF_JULIAN, 6.0,
              "2000-01-14T06:00:00Z");
}

static void a_date_of_a_model_calendar_is_the_day_of_its_name(void **state) {
    (void)state;
    /* 59 days of January and February, then March. */
    assert_is("days since 2000-01-01", LEE_CF_NOLEAP, 60.5,
              "2000-03-02T12:00:00Z");
    assert_is("days since 2000-01-01", LEE_CF_NOLEAP, 365.0,
              "2001-01-01T00:00:00Z");
    /* 60 days of January and February in every year. */
    assert_is("days since 2001-01-01", LEE_CF_ALL_LEAP, 60.0,
              "2001-03-01T00:00:00Z");
    assert_is("days since 2000-01-01", LEE_CF_ALL_LEAP, 59.0,
              "2000-02-29T00:00:00Z");
    /* Months of 30 days. */
    assert_is("days since 2000-01-01", LEE_CF_360_DAY, 45.0,
              "2000-02-16T00:00:00Z");
    assert_is("hours since 2000-12-30", LEE_CF_360_DAY, 24.0,
              "2001-01-01T00:00:00Z");
}

static void assert_refused(const char *units, lee_cf_calendar calendar,
                           double value, const char *expected) {
    const lee_cf_clock clock = clock_of(units, calendar);
    lee_error error = {0};
    int64_t time = 7;
    assert_int_equal(lee_cf_time(&clock, value, &time, &error), LEE_ERR_FORMAT);
    assert_string_equal(error.message, expected);
}

static void a_day_that_does_not_exist_is_refused_by_name(void **state) {
    (void)state;
    assert_refused("days since 2000-01-01", LEE_CF_360_DAY, 59.0,
                   "time 59 is 2000-02-30 of the calendar '360_day', a day "
                   "that does not exist");
    assert_refused("days since 2001-01-01", LEE_CF_ALL_LEAP, 59.0,
                   "time 59 is 2001-02-29 of the calendar 'all_leap', a day "
                   "that does not exist");
    assert_refused("days since 2001-02-28", LEE_CF_360_DAY, 1.0,
                   "time 1 is 2001-02-29 of the calendar '360_day', a day "
                   "that does not exist");
}

/* 10 minutes are no binary share of a day; the count is rounded to the
 * microsecond, never cut. */
static void shares_of_a_day_are_whole_seconds_again(void **state) {
    (void)state;
    const lee_cf_clock clock =
        clock_of("days since 1850-01-01", LEE_CF_STANDARD);
    int64_t first = 0;
    assert_int_equal(lee_cf_time(&clock, 60000.0, &first, NULL), LEE_OK);
    for (int i = 0; i < 144 * 400; i++) {
        int64_t time = 0;
        assert_int_equal(lee_cf_time(&clock, 60000.0 + i / 144.0, &time, NULL),
                         LEE_OK);
        assert_true(time == first + 600 * i);
    }
}

static void half_a_millisecond_off_is_the_nearest_second(void **state) {
    (void)state;
    assert_is("seconds since 2000-01-01", LEE_CF_STANDARD, 5.0005,
              "2000-01-01T00:00:05Z");
    assert_is("seconds since 2000-01-01", LEE_CF_STANDARD, 4.9995,
              "2000-01-01T00:00:05Z");
    assert_is("seconds since 2000-01-01", LEE_CF_STANDARD, -0.0004,
              "2000-01-01T00:00:00Z");
}

static void more_than_half_a_millisecond_off_is_refused(void **state) {
    (void)state;
    assert_refused("seconds since 2000-01-01", LEE_CF_STANDARD, 0.25,
                   "time 0.25 lies between two seconds; expected a whole "
                   "second, to half a millisecond");
    assert_refused("milliseconds since 2000-01-01", LEE_CF_STANDARD, 1001.0,
                   "time 1001 lies between two seconds; expected a whole "
                   "second, to half a millisecond");
}

static void times_beyond_the_years_are_refused(void **state) {
    (void)state;
    static const double far[] = {1e9, -1e9, 1e300, -1e300};
    const lee_cf_clock clock =
        clock_of("days since 2000-01-01", LEE_CF_STANDARD);
    for (size_t i = 0; i < sizeof far / sizeof far[0]; i++) {
        int64_t time = 0;
        assert_int_equal(lee_cf_time(&clock, far[i], &time, NULL),
                         LEE_ERR_FORMAT);
    }
    int64_t time = 0;
    assert_int_equal(lee_cf_time(&clock, NAN, &time, NULL), LEE_ERR_FORMAT);
    assert_int_equal(lee_cf_time(&clock, INFINITY, &time, NULL),
                     LEE_ERR_FORMAT);
    const lee_cf_clock year_0 =
        clock_of("days since 0000-01-01", LEE_CF_NOLEAP);
    assert_int_equal(lee_cf_time(&year_0, 364.0, &time, NULL), LEE_ERR_FORMAT);
    assert_int_equal(lee_cf_time(&year_0, 365.0, &time, NULL), LEE_OK);
}

static void texts_that_are_no_clock_are_refused(void **state) {
    (void)state;
    static const struct {
        const char *text;
        const char *why;
    } slips[] = {
        {"",                                "does not begin with a unit"    },
        {"hours",                           "does not say since when"       },
        {"hours after 2000-01-01",          "does not say since when"       },
        {"fortnights since 2000-01-01",     "does not begin with a unit"    },
        {"months since 2000-01-01",         "counts months or years"        },
        {"year since 2000-01-01",           "counts months or years"        },
        {"month",                           "counts months or years"        },
        {"hours since",                     "has no date that can be read"  },
        {"hours since noon",                "has no date that can be read"  },
        {"hours since 2000-01",             "has no date that can be read"  },
        {"hours since 20000-01-01",         "has no date that can be read"  },
        {"hours since 2000/01/01",          "has no date that can be read"  },
        {"hours since 2000-01-01 24:00",    "has no date that can be read"  },
        {"hours since 2000-01-01 12:60",    "has no date that can be read"  },
        {"h since 2000-01-01 12:00:60",     "has no date that can be read"  },
        {"h since 2000-01-01 12:00 CET",    "has no date that can be read"  },
        {"h since 2000-01-01 12:00 +15:00", "has no date that can be read"  },
        {"h since 2000-01-01 12:00 Zulu",   "has no date that can be read"  },
        {"hours since 2000-13-01",          "counts from a date that is not"},
        {"minutes since 2000-02-30",        "counts from a date that is not"},
        {"days since 1582-10-10",           "counts from a date that is not"},
        {"days since 0000-01-01",           "counts from a date that is not"},
    };
    for (size_t i = 0; i < sizeof slips / sizeof slips[0]; i++) {
        lee_cf_clock clock;
        lee_error error = {0};
        assert_int_equal(
            lee_cf_clock_parse(slips[i].text, LEE_CF_STANDARD, &clock, &error),
            LEE_ERR_FORMAT);
        if (strstr(error.message, slips[i].why) == NULL) {
            print_error("'%s' is told as: %s\n", slips[i].text, error.message);
            fail();
        }
    }
}

static void a_zone_is_known_to_be_there_or_not(void **state) {
    (void)state;
    assert_false(
        clock_of("hours since 2000-01-01 00:00", LEE_CF_STANDARD).is_zoned);
    assert_true(
        clock_of("hours since 2000-01-01 00:00 UTC", LEE_CF_STANDARD).is_zoned);
    assert_true(
        clock_of("hours since 2000-01-01 00:00 +02", LEE_CF_STANDARD).is_zoned);
}

static void a_clock_is_known_by_its_since(void **state) {
    (void)state;
    assert_true(lee_cf_is_clock("months since 2000-01-01"));
    assert_true(lee_cf_is_clock("hour Since 1980-01-14 14:00:00"));
    assert_false(lee_cf_is_clock("days"));
    assert_false(lee_cf_is_clock("m s-1"));
    assert_false(lee_cf_is_clock(""));
    assert_false(lee_cf_is_clock("a-word-that-is-longer-than-any-unit since"));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_number_counts_units_from_the_reference),
        cmocka_unit_test(units_are_known_in_all_their_spellings),
        cmocka_unit_test(the_reference_is_read_in_all_its_forms),
        cmocka_unit_test(an_old_reference_counts_real_days),
        cmocka_unit_test(a_julian_date_is_the_real_day_it_names),
        cmocka_unit_test(a_date_of_a_model_calendar_is_the_day_of_its_name),
        cmocka_unit_test(a_day_that_does_not_exist_is_refused_by_name),
        cmocka_unit_test(shares_of_a_day_are_whole_seconds_again),
        cmocka_unit_test(half_a_millisecond_off_is_the_nearest_second),
        cmocka_unit_test(more_than_half_a_millisecond_off_is_refused),
        cmocka_unit_test(times_beyond_the_years_are_refused),
        cmocka_unit_test(texts_that_are_no_clock_are_refused),
        cmocka_unit_test(a_zone_is_known_to_be_there_or_not),
        cmocka_unit_test(a_clock_is_known_by_its_since),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
