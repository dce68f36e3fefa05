/* calendar.c - civil dates, ISO 8601 text and seconds since 1970. */
#include "leewater/calendar.h"

#include <stdio.h>
#include <string.h>

#include "base/text.h"

enum {
    SECONDS_A_DAY = 86400,
    SECONDS_AN_HOUR = 3600,
    DAYS_IN_400_YEARS = 146097,
    /* 0000-03-01 to 1970-01-01 */
    DAYS_TO_1970 = 719468,
    LAST_OFFSET_HOUR = 14, /* east or west of UTC; no zone is farther */
};

/* Quotient rounded down, for a positive divisor. */
static int64_t floor_divide(int64_t a, int64_t b) {
    return a / b - (a % b < 0 ? 1 : 0);
}

/* Days from 0000-03-01 to the first of March of a year of the proleptic
 * Gregorian calendar (leap rule: ISO 8601). */
static int64_t days_to_march(int64_t year) {
    return 365 * year + floor_divide(year, 4) - floor_divide(year, 100) +
           floor_divide(year, 400);
}

/* Days from the first of March to the first of a month counted from March;
 * months of 31 and 30 days repeat every five: 153 days (common practice). */
static int days_to_month(int from_march) {
    return (153 * from_march + 2) / 5;
}

static int64_t days_from_civil(int year, int month, int day) {
    const int from_march = (month + 9) % 12;
    const int64_t march_year = month < 3 ? year - 1 : year;
    return days_to_march(march_year) + days_to_month(from_march) + day - 1 -
           DAYS_TO_1970;
}

static bool is_leap(int year) {
    return year % 4 == 0 && (year % 100 != 0 || year % 400 == 0);
}

static int days_in_month(int year, int month) {
    static const int days[] = {31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31};
    return month == 2 && is_leap(year) ? 29 : days[month - 1];
}

static bool is_within(int value, int low, int high) {
    return value >= low && value <= high;
}

/* A civil time has six parts. NOLINTNEXTLINE(readability-function-size) */
bool lee_time_from_civil(int year, int month, int day, int hour, int minute,
                         int second, int64_t *time) {
    if (!is_within(year, 1, 9999) || !is_within(month, 1, 12) ||
        !is_within(day, 1, days_in_month(year, month)) ||
        !is_within(hour, 0, 23) || !is_within(minute, 0, 59) ||
        !is_within(second, 0, 59)) {
        return false;
    }
    const int clock = hour * SECONDS_AN_HOUR + minute * 60 + second;
    *time = days_from_civil(year, month, day) * SECONDS_A_DAY + clock;
    return true;
}

/* Reads exactly two digits and steps over them. */
static bool take_two(const char **p, int *value) {
    const int tens = (*p)[0] - '0';
    if (tens < 0 || tens > 9) {
        return false;
    }
    const int ones = (*p)[1] - '0';
    if (ones < 0 || ones > 9) {
        return false;
    }
    *p += 2;
    *value = 10 * tens + ones;
    return true;
}

static bool take_year(const char **p, int *value) {
    int century = 0;
    int year = 0;
    const bool is_taken = take_two(p, &century) && take_two(p, &year);
    *value = 100 * century + year;
    return is_taken;
}

/* Steps over `c` when it comes next. */
static bool take(const char **p, char c) {
    if (**p != c) {
        return false;
    }
    (*p)++;
    return true;
}

/* Reads "Z", "+05", "-0330", "+01:00" to the end of the text. */
static bool take_zone(const char *p, int64_t *offset) {
    if (take(&p, 'Z')) {
        *offset = 0;
        return *p == '\0';
    }
    const bool is_west = *p == '-';
    int hours = 0;
    int minutes = 0;
    if (!(take(&p, '+') || take(&p, '-')) || !take_two(&p, &hours)) {
        return false;
    }
    if (*p != '\0') {
        (void)take(&p, ':');
        if (!take_two(&p, &minutes) || *p != '\0') {
            return false;
        }
    }
    const int size = hours * SECONDS_AN_HOUR + minutes * 60;
    *offset = is_west ? -size : size;
    return minutes < 60 && size <= LAST_OFFSET_HOUR * SECONDS_AN_HOUR;
}

/* What a text says, before the calendar is asked. */
typedef struct spelled {
    int year, month, day, hour, minute, second;
    int nanoseconds; /* digits past the ninth are left out */
    bool has_zone;
    int64_t offset;
} spelled;

/* Reads the digits behind the seconds' decimal sign, at least one. */
static bool take_fraction(const char **p, int *nanoseconds) {
    int unit = 100000000;
    int read = 0;
    const char *first = *p;
    for (; **p >= '0' && **p <= '9'; (*p)++) {
        read += (**p - '0') * unit;
        unit /= 10;
    }
    *nanoseconds = read;
    return *p > first;
}

/* Reads what may follow the date: hour, minute, second, fraction, zone. */
static bool take_clock(const char *p, spelled *s) {
    if (!take_two(&p, &s->hour) || !take(&p, ':') ||
        !take_two(&p, &s->minute)) {
        return false;
    }
    if (take(&p, ':')) {
        if (!take_two(&p, &s->second)) {
            return false;
        }
        if ((take(&p, '.') || take(&p, ',')) &&
            !take_fraction(&p, &s->nanoseconds)) {
            return false;
        }
    }
    s->has_zone = *p != '\0';
    return !s->has_zone || take_zone(p, &s->offset);
}

static bool take_time(const char *p, spelled *s) {
    if (!take_year(&p, &s->year) || !take(&p, '-') ||
        !take_two(&p, &s->month) || !take(&p, '-') || !take_two(&p, &s->day)) {
        return false;
    }
    return *p == '\0' || ((take(&p, 'T') || take(&p, ' ')) && take_clock(p, s));
}

static lee_status refuse(const char *text, const char *why, lee_error *error) {
    char shown[LEE_SHOWN];
    return lee_fail(error, LEE_ERR_FORMAT, "'%s' %s",
                    lee_text_show(strlen(text), text, shown), why);
}

lee_status lee_time_parse(const char *text, int64_t offset, int64_t *time,
                          bool *zoned, lee_error *error) {
    enum { HALF_A_MILLISECOND = 500000, SECOND = 1000000000 };
    spelled s = {0};
    if (!take_time(text, &s)) {
        return refuse(text,
                      "is not a time; expected ISO 8601 such as "
                      "2031-01-10T06:30Z",
                      error);
    }
    int64_t read = 0;
    if (!lee_time_from_civil(s.year, s.month, s.day, s.hour, s.minute, s.second,
                             &read)) {
        return refuse(text,
                      "is not in the calendar; expected an existing day of "
                      "the years 1 to 9999 and a time from 00:00:00 to "
                      "23:59:59",
                      error);
    }
    const bool is_early = s.nanoseconds >= SECOND - HALF_A_MILLISECOND;
    if (s.nanoseconds > HALF_A_MILLISECOND && !is_early) {
        return refuse(text, "lies between two seconds; expected a whole second",
                      error);
    }
    *time = read + (is_early ? 1 : 0) - (s.has_zone ? s.offset : offset);
    if (zoned != NULL) {
        *zoned = s.has_zone;
    }
    return LEE_OK;
}

/* Civil date of a time; the clock as the seconds of its day. */
typedef struct civil {
    int64_t year;
    int month, day, clock;
} civil;

static civil civil_from_time(int64_t time) {
    const int64_t from_march_0 =
        floor_divide(time, SECONDS_A_DAY) + DAYS_TO_1970;
    const int64_t cycle = floor_divide(from_march_0, DAYS_IN_400_YEARS);
    const int64_t day_of_cycle = from_march_0 - cycle * DAYS_IN_400_YEARS;
    int64_t year = 400 * cycle + day_of_cycle / 366; /* that one or before */
    while (days_to_march(year + 1) <= from_march_0) {
        year++;
    }
    const int clock = (int)(time % SECONDS_A_DAY);
    const int day_of_year = (int)(from_march_0 - days_to_march(year));
    const int from_march = (5 * day_of_year + 2) / 153;
    return (civil){
        .year = from_march < 10 ? year : year + 1,
        .month = from_march < 10 ? from_march + 3 : from_march - 9,
        .day = day_of_year - days_to_month(from_march) + 1,
        .clock = clock < 0 ? clock + SECONDS_A_DAY : clock,
    };
}

char *lee_time_format(int64_t time, char text[LEE_TIME_TEXT]) {
    const civil c = civil_from_time(time);
    (void)snprintf(text, LEE_TIME_TEXT, "%04lld-%02d-%02dT%02d:%02d:%02dZ",
                   (long long)c.year, c.month, c.day, c.clock / SECONDS_AN_HOUR,
                   c.clock / 60 % 60, c.clock % 60);
    return text;
}

char *lee_time_format_short(int64_t time, char text[LEE_TIME_TEXT]) {
    const civil c = civil_from_time(time);
    (void)snprintf(text, LEE_TIME_TEXT, "%04lld-%02d-%02d %02d:%02d UTC",
                   (long long)c.year, c.month, c.day, c.clock / SECONDS_AN_HOUR,
                   c.clock / 60 % 60);
    return text;
}

lee_status lee_utc_offset_parse(const char *text, int64_t *offset,
                                lee_error *error) {
    int64_t read = 0;
    if (!take_zone(text, &read)) {
        return refuse(text,
                      "is not an offset from UTC; expected Z or -14:00 to "
                      "+14:00, such as +01:00",
                      error);
    }
    *offset = read;
    return LEE_OK;
}
