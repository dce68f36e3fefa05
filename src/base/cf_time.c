/* cf_time.c - reads "hours since 1900-01-01 00:00" and counts from there. */
#include "base/cf_time.h"

#include <math.h>
#include <stdio.h>
#include <string.h>

#include "base/text.h"

#include "leewater/calendar.h"

#define MICROSECOND INT64_C(1)
#define MILLISECOND INT64_C(1000)
#define SECOND      INT64_C(1000000)
#define MINUTE      (60 * SECOND)
#define HOUR        (60 * MINUTE)
#define DAY         (24 * HOUR)

enum { LONGEST_UNIT = 16, LAST_OFFSET_HOUR = 14 };

/* Some ten thousand years; reference and count stay far from overflow. */
static const double farthest = 4e17; /* microseconds */

static const struct {
    const char *name;
    int64_t size; /* microseconds; 0: of no fixed length */
} units[] = {
    {"s",            SECOND     },
    {"sec",          SECOND     },
    {"secs",         SECOND     },
    {"second",       SECOND     },
    {"seconds",      SECOND     },
    {"min",          MINUTE     },
    {"mins",         MINUTE     },
    {"minute",       MINUTE     },
    {"minutes",      MINUTE     },
    {"h",            HOUR       },
    {"hr",           HOUR       },
    {"hrs",          HOUR       },
    {"hour",         HOUR       },
    {"hours",        HOUR       },
    {"d",            DAY        },
    {"day",          DAY        },
    {"days",         DAY        },
    {"ms",           MILLISECOND},
    {"msec",         MILLISECOND},
    {"msecs",        MILLISECOND},
    {"millisecond",  MILLISECOND},
    {"milliseconds", MILLISECOND},
    {"microsecond",  MICROSECOND},
    {"microseconds", MICROSECOND},
    {"month",        0          },
    {"months",       0          },
    {"mon",          0          },
    {"year",         0          },
    {"years",        0          },
    {"yr",           0          },
    {"yrs",          0          },
    {"common_year",  0          },
    {"common_years", 0          },
};
enum { UNITS = sizeof units / sizeof units[0] };

static bool is_blank(char c) {
    return c == ' ' || c == '\t' || c == '\n' || c == '\r';
}

static void skip_blanks(const char **p) {
    while (is_blank(**p)) {
        (*p)++;
    }
}

/* Steps over a word; true when it fits and is not empty. */
static bool take_word(const char **p, char word[LONGEST_UNIT]) {
    size_t length = 0;
    skip_blanks(p);
    while (**p != '\0' && !is_blank(**p)) {
        if (length + 1 == LONGEST_UNIT) {
            return false;
        }
        word[length++] = *(*p)++;
    }
    word[length] = '\0';
    return length > 0;
}

bool lee_cf_is_clock(const char *text) {
    char unit[LONGEST_UNIT];
    char since[LONGEST_UNIT];
    return take_word(&text, unit) && take_word(&text, since) &&
           lee_text_same(since, "since");
}

static bool is_digit(char c) {
    return c >= '0' && c <= '9';
}

static bool take(const char **p, char c) {
    if (**p != c) {
        return false;
    }
    (*p)++;
    return true;
}

/* Reads a number of 1 to `most` digits. */
static bool take_digits(const char **p, int most, int *value) {
    int read = 0;
    int count = 0;
    while (is_digit(**p) && count < most) {
        read = 10 * read + (*(*p)++ - '0');
        count++;
    }
    *value = read;
    return count > 0 && !is_digit(**p);
}

/* Reads the digits behind the seconds' point; those past the sixth are left
 * out. */
static void take_fraction(const char **p, int64_t *microseconds) {
    int64_t unit = SECOND / 10;
    *microseconds = 0;
    for (; is_digit(**p); (*p)++) {
        *microseconds += (**p - '0') * unit;
        unit /= 10;
    }
}

/* Reads "h[:m[:s[.f]]]" within its day. */
static bool take_clock(const char **p, int64_t *clock) {
    int hour = 0;
    int minute = 0;
    int second = 0;
    int64_t fraction = 0;
    if (!take_digits(p, 2, &hour) ||
        (take(p, ':') && !take_digits(p, 2, &minute)) ||
        (take(p, ':') && !take_digits(p, 2, &second))) {
        return false;
    }
    if (take(p, '.')) {
        take_fraction(p, &fraction);
    }
    *clock = hour * HOUR + minute * MINUTE + second * SECOND + fraction;
    return hour < 24 && minute < 60 && second < 60;
}

/* Reads "+hh", "-h:mm", "+hhmm"; microseconds east. */
static bool take_offset(const char **p, int64_t *offset) {
    const bool is_west = **p == '-';
    int hours = 0;
    int minutes = 0;
    (*p)++;
    if (!take_digits(p, 4, &hours)) {
        return false;
    }
    if (hours >= 100) {
        minutes = hours % 100;
        hours /= 100;
    } else if (take(p, ':') && !take_digits(p, 2, &minutes)) {
        return false;
    }
    const int64_t size = hours * HOUR + minutes * MINUTE;
    *offset = is_west ? -size : size;
    return minutes < 60 && size <= LAST_OFFSET_HOUR * HOUR;
}

/* Reads what may follow the clock, to the end of the text. */
static bool take_zone(const char *p, bool *is_zoned, int64_t *offset) {
    static const char *const utc[] = {"Z", "UTC", "GMT"};
    skip_blanks(&p);
    *offset = 0;
    *is_zoned = *p != '\0';
    for (size_t i = 0; i < sizeof utc / sizeof utc[0]; i++) {
        const size_t length = strlen(utc[i]);
        if (strncmp(p, utc[i], length) == 0) {
            p += length;
            skip_blanks(&p);
            return *p == '\0';
        }
    }
    if ((*p == '+' || *p == '-') && !take_offset(&p, offset)) {
        return false;
    }
    skip_blanks(&p);
    return *p == '\0';
}

/* What the text says behind "since". */
typedef struct moment {
    lee_cf_date date;
    int64_t clock;
    bool is_zoned;
    int64_t offset; /* microseconds east */
} moment;

static bool take_moment(const char *p, moment *read) {
    int year = 0;
    *read = (moment){0};
    skip_blanks(&p);
    if (!take_digits(&p, 4, &year) || !take(&p, '-') ||
        !take_digits(&p, 2, &read->date.month) || !take(&p, '-') ||
        !take_digits(&p, 2, &read->date.day)) {
        return false;
    }
    read->date.year = year;
    if (*p != 'T' && *p != '\0' && !is_blank(*p)) {
        return take_zone(p, &read->is_zoned, &read->offset);
    }
    (void)take(&p, 'T');
    skip_blanks(&p);
    if (is_digit(*p) && !take_clock(&p, &read->clock)) {
        return false;
    }
    return take_zone(p, &read->is_zoned, &read->offset);
}

static lee_status refuse(const char *text, lee_error *error, const char *why) {
    char shown[LEE_SHOWN];
    return lee_fail(error, LEE_ERR_FORMAT, "'%s' %s",
                    lee_text_show(strlen(text), text, shown), why);
}

static lee_status find_unit(const char *text, const char *word, int64_t *size,
                            lee_error *error) {
    for (size_t i = 0; i < UNITS; i++) {
        if (!lee_text_same(units[i].name, word)) {
            continue;
        }
        *size = units[i].size;
        return units[i].size > 0
                   ? LEE_OK
                   : refuse(text, error,
                            "counts months or years, which are of no fixed "
                            "length; expected seconds, minutes, hours or "
                            "days since a date");
    }
    return refuse(text, error,
                  "does not begin with a unit of time; expected seconds, "
                  "minutes, hours or days since a date");
}

lee_status lee_cf_clock_parse(const char *text, lee_cf_calendar calendar,
                              lee_cf_clock *clock, lee_error *error) {
    char unit[LONGEST_UNIT];
    char since[LONGEST_UNIT];
    const char *p = text;
    int64_t size = 0;
    const lee_status status =
        find_unit(text, take_word(&p, unit) ? unit : "", &size, error);
    if (status != LEE_OK) {
        return status;
    }
    if (!take_word(&p, since) || !lee_text_same(since, "since")) {
        return refuse(text, error,
                      "does not say since when; expected such as 'hours since "
                      "1990-01-01 00:00'");
    }
    moment reference;
    if (!take_moment(p, &reference)) {
        return refuse(text, error,
                      "has no date that can be read behind 'since'; expected "
                      "such as 'hours since 1990-01-01 00:00'");
    }
    int64_t days = 0;
    if (!lee_cf_days(calendar, &reference.date, &days)) {
        char why[96];
        (void)snprintf(why, sizeof why,
                       "counts from a date that is not in the calendar '%s'",
                       lee_cf_calendar_name(calendar));
        return refuse(text, error, why);
    }
    *clock = (lee_cf_clock){
        .calendar = calendar,
        .unit = size,
        .reference = days * DAY + reference.clock - reference.offset,
        .is_zoned = reference.is_zoned,
    };
    return LEE_OK;
}

static int64_t floor_divide(int64_t a, int64_t b) {
    return a / b - (a % b < 0 ? 1 : 0);
}

/* Whole seconds of a count of microseconds, at most half a millisecond off. */
static bool whole_seconds(int64_t microseconds, int64_t *seconds) {
    const int64_t nearest = floor_divide(microseconds + SECOND / 2, SECOND);
    const int64_t residue = microseconds - nearest * SECOND;
    *seconds = nearest;
    return residue >= -MILLISECOND / 2 && residue <= MILLISECOND / 2;
}

/* Seconds since 1970 of a date by its name. */
static bool named_time(const lee_cf_clock *clock, int64_t seconds,
                       int64_t *time, lee_cf_date *date) {
    const int64_t day = floor_divide(seconds, 86400);
    *date = lee_cf_date_of(clock->calendar, day);
    if (date->year < 1 || date->year > 9999) {
        return false;
    }
    int64_t midnight = 0;
    const bool is_there = lee_time_from_civil((int)date->year, date->month,
                                              date->day, 0, 0, 0, &midnight);
    *time = midnight + seconds - day * 86400;
    return is_there;
}

static bool is_in_years(int64_t time) {
    int64_t first = 0;
    int64_t last = 0;
    return lee_time_from_civil(1, 1, 1, 0, 0, 0, &first) &&
           lee_time_from_civil(9999, 12, 31, 23, 59, 59, &last) &&
           time >= first && time <= last;
}

lee_status lee_cf_time(const lee_cf_clock *clock, double value, int64_t *time,
                       lee_error *error) {
    const double whole = floor(value);
    if (!(fabs(value) * (double)clock->unit <= farthest)) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "time %.10g lies beyond the years 1 to 9999", value);
    }
    const int64_t microseconds = clock->reference +
                                 (int64_t)whole * clock->unit +
                                 llround((value - whole) * (double)clock->unit);
    int64_t seconds = 0;
    if (!whole_seconds(microseconds, &seconds)) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "time %.17g lies between two seconds; expected a "
                        "whole second, to half a millisecond",
                        value);
    }
    if (lee_cf_calendar_is_real(clock->calendar)) {
        *time = seconds;
    } else {
        lee_cf_date date;
        if (!named_time(clock, seconds, time, &date)) {
            return lee_fail(error, LEE_ERR_FORMAT,
                            "time %.10g is %04lld-%02d-%02d of the calendar "
                            "'%s', a day that does not exist",
                            value, (long long)date.year, date.month, date.day,
                            lee_cf_calendar_name(clock->calendar));
        }
    }
    if (!is_in_years(*time)) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "time %.10g lies beyond the years 1 to 9999", value);
    }
    return LEE_OK;
}
