/* cf_times.c - reads lines "UNITS<tab>CALENDAR<tab>NUMBER" and prints the time
 * of each, or "none" with the reason, for a judge that knows the calendars. */
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/cf_time.h"

#include "leewater/calendar.h"

static lee_status convert(char *line, int64_t *time, lee_error *error) {
    char *rest = NULL;
    const char *units = strtok_r(line, "\t\n", &rest);
    const char *name = strtok_r(NULL, "\t\n", &rest);
    const char *number = strtok_r(NULL, "\t\n", &rest);
    if (units == NULL || name == NULL || number == NULL) {
        return lee_fail(error, LEE_ERR_FORMAT, "a line has three parts");
    }
    lee_cf_calendar calendar;
    lee_cf_clock clock;
    lee_status status = lee_cf_calendar_find(name, &calendar, error);
    if (status == LEE_OK) {
        status = lee_cf_clock_parse(units, calendar, &clock, error);
    }
    return status == LEE_OK
               ? lee_cf_time(&clock, strtod(number, NULL), time, error)
               : status;
}

int main(void) {
    char line[256];
    while (fgets(line, sizeof line, stdin) != NULL) {
        lee_error error = {0};
        char text[LEE_TIME_TEXT];
        int64_t time = 0;
        if (convert(line, &time, &error) == LEE_OK) {
            (void)puts(lee_time_format(time, text));
        } else {
            (void)printf("none %s\n", error.message);
        }
    }
    return 0;
}
