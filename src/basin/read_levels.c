/* read_levels.c - a series of levels from a CSV table. */
#include <math.h>
#include <stdlib.h>
#include <string.h>

#include "base/text.h"
#include "formats/csv_column.h"
#include "leewater/basin.h"
#include "leewater/calendar.h"

/* How the table is read. */
typedef struct layout {
    size_t time;
    lee_csv_column level;
    bool has_utc_offset;
    int64_t utc_offset;
} layout;

static lee_status read_time(const lee_csv *csv, const lee_csv_field *field,
                            const layout *found, int64_t *time,
                            lee_error *error) {
    char text[LEE_SHOWN];
    bool is_zoned = false;
    if (field->length >= sizeof text) {
        return lee_csv_fail(csv, field, error,
                            "'%s' is not a time such as 2031-01-10T06:30Z",
                            lee_text_show(field->length, field->bytes, text));
    }
    memcpy(text, field->bytes, field->length);
    text[field->length] = '\0';
    lee_error why = {0};
    if (lee_time_parse(text, found->utc_offset, time, &is_zoned, &why) !=
        LEE_OK) {
        return lee_csv_fail(csv, field, error, "%s", why.message);
    }
    if (!is_zoned && !found->has_utc_offset) {
        return lee_csv_fail(csv, field, error,
                            "time '%s' has no zone and no utc_offset is given",
                            text);
    }
    return LEE_OK;
}

static lee_status grow(lee_level_series *series, size_t room,
                       lee_error *error) {
    int64_t *time = realloc(series->time, room * sizeof *time);
    if (time != NULL) {
        series->time = time;
    }
    double *level =
        time == NULL ? NULL : realloc(series->level, room * sizeof *level);
    if (level == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu levels", room);
    }
    series->level = level;
    return LEE_OK;
}

static lee_status read_row(const lee_csv *csv, const lee_csv_field fields[],
                           const layout *found, lee_level_series *series,
                           lee_error *error) {
    const size_t n = series->n;
    const lee_csv_field *field = &fields[found->time];
    lee_status status = read_time(csv, field, found, &series->time[n], error);
    if (status == LEE_OK) {
        status = lee_csv_column_number(csv, fields, &found->level,
                                       &series->level[n], error);
    }
    if (status != LEE_OK) {
        return status;
    }
    if (n > 0 && series->time[n] <= series->time[n - 1]) {
        return lee_csv_fail(csv, field, error,
                            "time does not lie after the row before it");
    }
    series->n = n + 1;
    return LEE_OK;
}

static lee_status read_rows(lee_csv *csv, const layout *found,
                            lee_level_series *series, lee_error *error) {
    size_t room = 0;
    for (;;) {
        const lee_csv_field *fields = NULL;
        lee_status status = lee_csv_next(csv, &fields, error);
        if (status != LEE_OK || fields == NULL) {
            return status;
        }
        if (series->n == room) {
            room = 2 * room + 64;
            status = grow(series, room, error);
        }
        if (status == LEE_OK) {
            status = read_row(csv, fields, found, series, error);
        }
        if (status != LEE_OK) {
            return status;
        }
    }
}

static lee_status read_table(lee_csv *csv, layout *found,
                             lee_level_series *series, lee_error *error) {
    lee_status status = lee_csv_find(csv, "time", &found->time, error);
    if (status == LEE_OK) {
        status = lee_csv_find_column(csv, "level", "m", &found->level, error);
    }
    if (status == LEE_OK) {
        status = read_rows(csv, found, series, error);
    }
    if (status == LEE_OK && series->n == 0) {
        status = lee_fail(error, LEE_ERR_DATA, "%s: no level in the file",
                          lee_csv_path(csv));
    }
    return status;
}

lee_status lee_level_series_read_csv(const char *path, bool has_utc_offset,
                                     int64_t utc_offset,
                                     lee_level_series *series,
                                     lee_error *error) {
    lee_csv *csv = NULL;
    layout found = {.has_utc_offset = has_utc_offset, .utc_offset = utc_offset};
    *series = (lee_level_series){0};
    lee_status status = lee_csv_open(path, &csv, error);
    if (status == LEE_OK) {
        status = read_table(csv, &found, series, error);
    }
    if (status != LEE_OK) {
        lee_level_series_free(series);
    }
    lee_csv_close(csv);
    return status;
}
