/* cf_calendar.c - dates of model calendars as counts of days, and back.
 *
 * Years are counted from the first of March, so that the leap day is the last
 * of the year: one form serves all calendars whose months are the usual. */
#include "base/cf_calendar.h"

#include <string.h>

#include "base/text.h"

enum {
    /* From 0000-03-01 to 1970-01-01 of each calendar's own dates. */
    GREGORIAN_TO_1970 = 719468,
    JULIAN_TO_1970 = 719470, /* ... of the Gregorian 1970-01-01; 0000-03-01
                                stands two days earlier in the Julian one */
    NOLEAP_TO_1970 = 365 * 1969 + 306,
    ALL_LEAP_TO_1970 = 366 * 1969 + 306,
    MONTHS_360_TO_1970 = 1970 * 12,
    LAST_YEAR = 9999,
};

static const struct {
    const char *name;
    lee_cf_calendar calendar;
} names[] = {
  /* The first name of each is the one that is shown. */
    {"standard",            LEE_CF_STANDARD           },
    {"gregorian",           LEE_CF_STANDARD           },
    {"proleptic_gregorian", LEE_CF_PROLEPTIC_GREGORIAN},
    {"julian",              LEE_CF_JULIAN             },
    {"noleap",              LEE_CF_NOLEAP             },
    {"365_day",             LEE_CF_NOLEAP             },
    {"all_leap",            LEE_CF_ALL_LEAP           },
    {"366_day",             LEE_CF_ALL_LEAP           },
    {"360_day",             LEE_CF_360_DAY            },
};
enum { NAMES = sizeof names / sizeof names[0] };

lee_status lee_cf_calendar_find(const char *name, lee_cf_calendar *calendar,
                                lee_error *error) {
    if (name == NULL || name[0] == '\0') {
        *calendar = LEE_CF_STANDARD;
        return LEE_OK;
    }
    for (size_t i = 0; i < NAMES; i++) {
        if (lee_text_same(names[i].name, name)) {
            *calendar = names[i].calendar;
            return LEE_OK;
        }
    }
    char shown[LEE_SHOWN];
    return lee_fail(error, LEE_ERR_FORMAT,
                    "calendar '%s' is not read; expected standard (or "
                    "gregorian), proleptic_gregorian, julian, noleap (or "
                    "365_day), all_leap (or 366_day) or 360_day",
                    lee_text_show(strlen(name), name, shown));
}

const char *lee_cf_calendar_name(lee_cf_calendar calendar) {
    size_t i = 0;
    while (names[i].calendar != calendar) {
        i++;
    }
    return names[i].name;
}

bool lee_cf_calendar_is_real(lee_cf_calendar calendar) {
    return calendar == LEE_CF_STANDARD ||
           calendar == LEE_CF_PROLEPTIC_GREGORIAN || calendar == LEE_CF_JULIAN;
}

/* Quotient rounded down, for a positive divisor. */
static int64_t floor_divide(int64_t a, int64_t b) {
    return a / b - (a % b < 0 ? 1 : 0);
}

/* Days from 1970-01-01 to the first of March of a year; the standard calendar
 * asks for one of its two parts. */
static int64_t days_to_march(lee_cf_calendar calendar, int64_t year) {
    switch (calendar) {
    case LEE_CF_STANDARD:
    case LEE_CF_PROLEPTIC_GREGORIAN:
        return 365 * year + floor_divide(year, 4) - floor_divide(year, 100) +
               floor_divide(year, 400) - GREGORIAN_TO_1970;
    case LEE_CF_JULIAN:
        return 365 * year + floor_divide(year, 4) - JULIAN_TO_1970;
    case LEE_CF_NOLEAP:
        return 365 * year - NOLEAP_TO_1970;
    case LEE_CF_ALL_LEAP:
        return 366 * year - ALL_LEAP_TO_1970;
    case LEE_CF_360_DAY:
        return 360 * year + 60 - 30 * (int64_t)MONTHS_360_TO_1970;
    }
    return 0;
}

/* Days from the first of March to the first of a month counted from March;
 * months of 31 and 30 days repeat every five: 153 days (common practice). */
static int days_to_month(lee_cf_calendar calendar, int from_march) {
    return calendar == LEE_CF_360_DAY ? 30 * from_march
                                      : (153 * from_march + 2) / 5;
}

static int64_t count_days(lee_cf_calendar calendar, const lee_cf_date *date) {
    const int from_march = (date->month + 9) % 12;
    const int64_t march_year = date->month < 3 ? date->year - 1 : date->year;
    return days_to_march(calendar, march_year) +
           days_to_month(calendar, from_march) + date->day - 1;
}

static lee_cf_date date_in(lee_cf_calendar calendar, int64_t days) {
    int64_t year = 1970 + floor_divide(days, 366); /* that one or near */
    while (days_to_march(calendar, year) > days) {
        year--;
    }
    while (days_to_march(calendar, year + 1) <= days) {
        year++;
    }
    const int day_of_year = (int)(days - days_to_march(calendar, year));
    const int from_march = calendar == LEE_CF_360_DAY
                               ? day_of_year / 30
                               : (5 * day_of_year + 2) / 153;
    return (lee_cf_date){
        .year = from_march < 10 ? year : year + 1,
        .month = from_march < 10 ? from_march + 3 : from_march - 9,
        .day = day_of_year - days_to_month(calendar, from_march) + 1,
    };
}

/* The rule that the standard calendar follows on a date. */
static lee_cf_calendar rule_of(lee_cf_calendar calendar,
                               const lee_cf_date *date) {
    if (calendar != LEE_CF_STANDARD) {
        return calendar;
    }
    const int64_t digits =
        date->year * 10000 + (int64_t)date->month * 100 + date->day;
    return digits < 15821015 ? LEE_CF_JULIAN : LEE_CF_PROLEPTIC_GREGORIAN;
}

lee_cf_date lee_cf_date_of(lee_cf_calendar calendar, int64_t days) {
    static const lee_cf_date first_gregorian = {1582, 10, 15};
    if (calendar != LEE_CF_STANDARD) {
        return date_in(calendar, days);
    }
    const int64_t turn =
        count_days(LEE_CF_PROLEPTIC_GREGORIAN, &first_gregorian);
    return date_in(days < turn ? LEE_CF_JULIAN : LEE_CF_PROLEPTIC_GREGORIAN,
                   days);
}

bool lee_cf_days(lee_cf_calendar calendar, const lee_cf_date *date,
                 int64_t *days) {
    const bool has_year_0 =
        calendar != LEE_CF_STANDARD && calendar != LEE_CF_JULIAN;
    if (date->year < (has_year_0 ? 0 : 1) || date->year > LAST_YEAR ||
        date->month < 1 || date->month > 12 || date->day < 1 ||
        date->day > 31) {
        return false;
    }
    const int64_t counted = count_days(rule_of(calendar, date), date);
    /* A date that is not in the calendar comes back as another one. */
    const lee_cf_date back = lee_cf_date_of(calendar, counted);
    if (back.year != date->year || back.month != date->month ||
        back.day != date->day) {
        return false;
    }
    *days = counted;
    return true;
}
