/* cf_time.h - times told as a number since a date: "hours since 1900-01-01".
 *
 * Source: CF Conventions 1.8, section 4.4 [cfconventions]; spellings of units
 * as in UDUNITS-2. */
#ifndef LEEWATER_BASE_CF_TIME_H
#define LEEWATER_BASE_CF_TIME_H

#include <stdbool.h>
#include <stdint.h>

#include "base/cf_calendar.h"

#include "leewater/status.h"

/* How numbers become times. */
typedef struct lee_cf_clock {
    lee_cf_calendar calendar;
    int64_t unit;      /* microseconds                                      */
    int64_t reference; /* microseconds since 1970-01-01 of the calendar,
                          UTC when `is_zoned`                               */
    bool is_zoned;     /* the text names the zone of its date               */
} lee_cf_clock;

/* Does the text have the form of a unit of time since a date? */
bool lee_cf_is_clock(const char *text);

/* Reads "UNIT since Y-M-D[ T]h[:m[:s[.f]]] [Z|UTC|GMT|+-hh[:mm]]", all after
 * the day optional; figures need no leading zeros. Units are seconds, minutes,
 * hours and days in their spellings, milliseconds and microseconds. A month
 * and a year are no units of time here: they are of no fixed length. A date
 * without a zone is UTC.
 *
 * Errors: LEE_ERR_FORMAT, as "'month since 2000-01-01': ..." */
lee_status lee_cf_clock_parse(const char *text, lee_cf_calendar calendar,
                              lee_cf_clock *clock, lee_error *error);

/* The time of a number, s since 1970 UTC. In whole microseconds from the
 * number on, so that no digit is lost; a time that is more than half a
 * millisecond off a whole second is refused.
 *
 * In the standard, the proleptic Gregorian and the Julian calendar days are
 * real days: the time is that many after the reference. Dates of the other
 * calendars are taken by their name: 1 March of noleap is 1 March. Those that
 * have no day of that name (30 February of 360_day, 29 February 2001 of
 * all_leap) have no time.
 *
 * Errors: LEE_ERR_FORMAT, naming the date. */
lee_status lee_cf_time(const lee_cf_clock *clock, double value, int64_t *time,
                       lee_error *error);

#endif
