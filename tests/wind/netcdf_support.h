/* netcdf_support.h - small NetCDF files for the tests that read them. */
#ifndef LEEWATER_TESTS_WIND_NETCDF_SUPPORT_H
#define LEEWATER_TESTS_WIND_NETCDF_SUPPORT_H

#include "wind/support.h"

#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "support/cdl.h"

#include "leewater/calendar.h"

/* Reads "wind.nc", which has to be in order. */
static inline lee_wind_record read_wind(const lee_wind_netcdf *how,
                                        lee_notes *told) {
    char path[FOLDER_PATH];
    lee_wind_record record;
    lee_error error = {0};
    (void)snprintf(path, sizeof path, "%s/wind.nc", folder.path);
    (void)lee_wind_read_netcdf(path, how, &record, told, &error);
    assert_string_equal(error.message, "");
    return record;
}

static inline lee_wind_record read_cdl(const lee_wind_netcdf *how,
                                       const char *text) {
    (void)folder_write_cdl(&folder, "wind.nc", "netCDF-4", text);
    return read_wind(how, NULL);
}

/* The file is refused; what follows the folder's name is `expected`. */
static inline void assert_refused(const lee_wind_netcdf *how, const char *text,
                                  lee_status status, const char *expected) {
    const char *path = folder_write_cdl(&folder, "wind.nc", "netCDF-4", text);
    lee_wind_record record;
    lee_error error = {0};
    const lee_status got =
        lee_wind_read_netcdf(path, how, &record, NULL, &error);
    assert_int_equal(strncmp(error.message, folder.path, strlen(folder.path)),
                     0);
    assert_string_equal(error.message + strlen(folder.path) + 1, expected);
    assert_int_equal(got, status);
    assert_null(record.time);
    assert_int_equal(record.n, 0);
}

static inline int64_t time_of(const char *text) {
    int64_t time = 0;
    assert_int_equal(lee_time_parse(text, 0, &time, NULL, NULL), LEE_OK);
    return time;
}

static inline void assert_components(const lee_wind_record *record,
                                     size_t index, double east, double north) {
    /* Values of the files are whole or halves: exact as floats. */
    assert_near(record->east[index], east, 1e-12);
    assert_near(record->north[index], north, 1e-12);
}

static inline void assert_missing(const lee_wind_record *record, size_t index) {
    assert_true(isnan(record->east[index]) && isnan(record->north[index]));
}

static inline bool is_told(const lee_notes *told, const char *sentence) {
    for (size_t i = 0; i < told->n; i++) {
        if (strcmp(told->text[i], sentence) == 0) {
            return true;
        }
    }
    for (size_t i = 0; i < told->n; i++) {
        print_error("told: %s\n", told->text[i]);
    }
    return false;
}

/* Six hours, a wind by its components. */
#define TIME_OF(dimension)                      \
    " double time(" dimension "); "             \
    "time:units = \"hours since 2031-01-10\"; " \
    "time:standard_name = \"time\"; "
#define EAST(shape)                              \
    " float u(" shape "); u:units = \"m s-1\"; " \
    "u:standard_name = \"eastward_wind\"; "
#define NORTH(shape)                             \
    " float v(" shape "); v:units = \"m s-1\"; " \
    "v:standard_name = \"northward_wind\"; "

#define LAT(shape)   " float lat(" shape "); lat:units = \"degrees_north\"; "
#define LON(shape)   " float lon(" shape "); lon:units = \"degrees_east\"; "
#define NAMES(shape) " char name(" shape "); name:cf_role = \"timeseries_id\"; "
#define DATA(text)   " data: " text

static const lee_wind_netcdf plain = {0};

#endif
