/* csv_support.h - small CSV files for the tests that read them. */
#ifndef LEEWATER_TESTS_WIND_CSV_SUPPORT_H
#define LEEWATER_TESTS_WIND_CSV_SUPPORT_H

#include "wind/support.h"

#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "support/files.h"

#include "leewater/calendar.h"

/* A few rounding errors of a wind of some tens of m s-1. */
static const double rounding = 1e-13;

static const char *path; /* of the one file in the folder */

static inline int make_record(void **state) {
    const int made = make_folder(state);
    path = folder_write(&folder, "wind.csv", "");
    return made;
}

static inline void write_bytes(size_t length, const char bytes[]) {
    (void)folder_write_bytes(&folder, "wind.csv", length, bytes);
}

static const lee_wind_csv plain = {
    .column[LEE_WIND_TIME] = {.name = "time"},
    .column[LEE_WIND_SPEED] = {.name = "speed"},
    .column[LEE_WIND_FROM] = {.name = "from"},
};

static inline lee_wind_record read_text(const lee_wind_csv *how,
                                        const char *text) {
    write_bytes(strlen(text), text);
    lee_wind_record record;
    lee_error error = {0};
    const lee_status status = lee_wind_read_csv(path, how, &record, &error);
    assert_string_equal(error.message, "");
    assert_int_equal(status, LEE_OK);
    return record;
}

/* The text is refused; what follows the path in the message is `expected`. */
static inline void assert_refused(const lee_wind_csv *how, const char *text,
                                  lee_status status, const char *expected) {
    write_bytes(strlen(text), text);
    lee_wind_record record;
    lee_error error = {0};
    assert_int_equal(lee_wind_read_csv(path, how, &record, &error), status);
    assert_int_equal(strncmp(error.message, path, strlen(path)), 0);
    assert_string_equal(error.message + strlen(path), expected);
    assert_null(record.time);
    assert_int_equal(record.n, 0);
}

static inline int64_t time_of(const char *text) {
    int64_t time = 0;
    assert_int_equal(lee_time_parse(text, 0, &time, NULL, NULL), LEE_OK);
    return time;
}

static inline void assert_wind(const lee_wind_record *record, size_t index,
                               double speed, double from_deg) {
    double east;
    double north;
    lee_wind_components(speed, from_deg * degree, &east, &north);
    assert_near(record->east[index], east, rounding);
    assert_near(record->north[index], north, rounding);
}

static inline void assert_missing(const lee_wind_record *record, size_t index) {
    assert_true(isnan(record->east[index]) && isnan(record->north[index]));
}

#endif
