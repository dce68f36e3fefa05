/* cf_calendar.h - the calendars of model output, as counts of days.
 *
 * Source: CF Conventions 1.8, section 4.4.1 [cfconventions]. */
#ifndef LEEWATER_BASE_CF_CALENDAR_H
#define LEEWATER_BASE_CF_CALENDAR_H

#include <stdbool.h>
#include <stdint.h>

#include "leewater/status.h"

typedef enum lee_cf_calendar {
    LEE_CF_STANDARD,            /* Julian up to 1582-10-04, then Gregorian */
    LEE_CF_PROLEPTIC_GREGORIAN, /* the Gregorian rule in all years         */
    LEE_CF_JULIAN,
    LEE_CF_NOLEAP,   /* 365 days in every year  */
    LEE_CF_ALL_LEAP, /* 366 days in every year  */
    LEE_CF_360_DAY   /* 30 days in every month  */
} lee_cf_calendar;

typedef struct lee_cf_date {
    int64_t year;
    int month;
    int day;
} lee_cf_date;

/* The calendar of an attribute's text, letters of either case alike. NULL or
 * empty is the standard one, as the conventions say.
 * Errors: LEE_ERR_FORMAT for any other, naming those that are read. */
lee_status lee_cf_calendar_find(const char *name, lee_cf_calendar *calendar,
                                lee_error *error);

/* The name that the conventions give it: "noleap". */
const char *lee_cf_calendar_name(lee_cf_calendar calendar);

/* Do its days follow each other as real days do? Then a count of days is a
 * real time, whatever its date is called. */
bool lee_cf_calendar_is_real(lee_cf_calendar calendar);

/* Days from 1970-01-01 of the proleptic Gregorian calendar for real calendars
 * and of its own 1970-01-01 for the others. False when the calendar has no
 * such date: 30 February, 1582-10-10 in the standard calendar, year 0 in the
 * standard and the Julian one, any year beyond 0 to 9999. */
bool lee_cf_days(lee_cf_calendar calendar, const lee_cf_date *date,
                 int64_t *days);

/* The date of a count of days (a million years either way). */
lee_cf_date lee_cf_date_of(lee_cf_calendar calendar, int64_t days);

#endif
