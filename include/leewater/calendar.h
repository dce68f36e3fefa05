/* calendar.h - times as people write them, and as seconds.
 *
 * Inside the library a time is int64_t seconds since 1970-01-01T00:00:00Z in
 * the proleptic Gregorian calendar without leap seconds. */
#ifndef LEEWATER_CALENDAR_H
#define LEEWATER_CALENDAR_H

#include <stdbool.h>
#include <stdint.h>

#include "leewater/status.h"

enum { LEE_TIME_TEXT = 32 }; /* room for a formatted time */

/* Seconds since 1970 of a civil date and time. Fields outside the calendar
 * (year 0 or 10000, month 13, 30 February, hour 24, second 60) return false
 * and leave *time. */
bool lee_time_from_civil(int year, int month, int day, int hour, int minute,
                         int second, int64_t *time);

/* Reads "2031-01-10", "2031-01-10T06:30", "2031-01-10 06:30:00.000Z",
 * "2031-01-10T06:30+01:00" (ISO 8601; T or one space; zone Z, +hh, +hhmm or
 * +hh:mm). Fractions of a second up to half a millisecond off a whole second
 * are rounded; more is refused. They stand behind '.' or ','.
 *
 *   text    zero-terminated, no blanks around
 *   offset  seconds east of UTC of a text without a zone
 *   time    out: seconds since 1970, UTC
 *   zoned   out (may be NULL): the text carried a zone of its own
 *
 * Errors: LEE_ERR_FORMAT, saying what was found and what was expected. */
lee_status lee_time_parse(const char *text, int64_t offset, int64_t *time,
                          bool *zoned, lee_error *error);

/* Writes "2031-01-10T06:30:00Z" into text[LEE_TIME_TEXT]; returns text. */
char *lee_time_format(int64_t time, char text[LEE_TIME_TEXT]);

/* Writes "2031-01-10 06:30 UTC", for reading; returns text. */
char *lee_time_format_short(int64_t time, char text[LEE_TIME_TEXT]);

/* Reads an offset from UTC: "Z", "+01:00", "-0330", "+05", at most 14 hours.
 * Seconds east.
 * Errors: LEE_ERR_FORMAT. */
lee_status lee_utc_offset_parse(const char *text, int64_t *offset,
                                lee_error *error);

#endif
