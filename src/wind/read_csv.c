/* read_csv.c - a wind record out of a CSV file, row by row. */
#include "leewater/wind.h"

#include <math.h>
#include <stdlib.h>

#include "base/constants.h"
#include "formats/csv.h"
#include "leewater/calendar.h"
#include "wind/columns.h"
#include "wind/csv/csv_layout.h"

/* A wind of no direction below this speed is calm (common practice). */
static const double variable_calm_speed = 3.0; /* m s-1 */

enum { OPTIONAL = LEE_WIND_COLUMNS - LEE_WIND_PRESSURE, FIRST_ROOM = 1024 };

/* A record that grows. The row being read stands at record.n, just past the
 * rows that are kept. */
typedef struct growing {
    const lee_wind_layout *layout;
    lee_wind_record record;
    size_t room;
    size_t optional_count;
    lee_wind_column optional[OPTIONAL];
    bool is_variable_calm; /* of the row being read */
    bool is_variable_missing;
} growing;

static void list_optional(growing *rows) {
    for (size_t i = 0; i < OPTIONAL; i++) {
        const lee_wind_column column =
            (lee_wind_column)((size_t)LEE_WIND_PRESSURE + i);
        if (rows->layout->is_there[column]) {
            rows->optional[rows->optional_count++] = column;
        }
    }
}

static bool stretch(double **values, size_t room) {
    double *grown = realloc(*values, room * sizeof *grown);
    if (grown != NULL) {
        *values = grown;
    }
    return grown != NULL;
}

static bool stretch_all(growing *rows, size_t room) {
    lee_wind_record *record = &rows->record;
    int64_t *time = realloc(record->time, room * sizeof *time);
    if (time == NULL) {
        return false;
    }
    record->time = time;
    bool is_done =
        stretch(&record->east, room) && stretch(&record->north, room);
    for (size_t i = 0; i < rows->optional_count && is_done; i++) {
        is_done = stretch(lee_wind_optional(record, rows->optional[i]), room);
    }
    return is_done;
}

static lee_status make_room(growing *rows, lee_error *error) {
    if (rows->record.n < rows->room) {
        return LEE_OK;
    }
    const size_t room = rows->room > 0 ? 2 * rows->room : FIRST_ROOM;
    if (!stretch_all(rows, room)) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu winds", room);
    }
    rows->room = room;
    return LEE_OK;
}

static lee_status read_components(growing *rows, const lee_csv_field fields[],
                                  lee_error *error) {
    double *east = &rows->record.east[rows->record.n];
    double *north = &rows->record.north[rows->record.n];
    lee_status status = lee_wind_layout_number(rows->layout, fields,
                                               LEE_WIND_EASTWARD, east, error);
    if (status == LEE_OK) {
        status = lee_wind_layout_number(rows->layout, fields,
                                        LEE_WIND_NORTHWARD, north, error);
    }
    if (isnan(*east) || isnan(*north)) {
        *east = NAN;
        *north = NAN;
    }
    return status;
}

static bool is_variable(const lee_wind_layout *layout,
                        const lee_csv_field fields[]) {
    const lee_csv_field *field = &fields[layout->index[LEE_WIND_FROM]];
    return layout->variable.text != NULL &&
           lee_wind_code_is(&layout->variable, field, layout->decimal);
}

static lee_status read_speed_from(growing *rows, const lee_csv_field fields[],
                                  lee_error *error) {
    const lee_wind_layout *layout = rows->layout;
    double speed = NAN;
    double from = NAN;
    lee_status status =
        lee_wind_layout_number(layout, fields, LEE_WIND_SPEED, &speed, error);
    if (status != LEE_OK) {
        return status;
    }
    if (is_variable(layout, fields)) {
        rows->is_variable_calm = speed < variable_calm_speed;
        rows->is_variable_missing = speed >= variable_calm_speed;
        speed = rows->is_variable_calm ? 0.0 : NAN;
    } else {
        status =
            lee_wind_layout_number(layout, fields, LEE_WIND_FROM, &from, error);
    }
    if (speed == 0.0) {
        from = 0.0; /* calm needs no direction */
    }
    lee_wind_components(speed, from * (lee_pi / 180.0),
                        &rows->record.east[rows->record.n],
                        &rows->record.north[rows->record.n]);
    return status;
}

static lee_status read_row(growing *rows, const lee_csv_field fields[],
                           lee_error *error) {
    const lee_wind_layout *layout = rows->layout;
    const size_t n = rows->record.n;
    lee_status status =
        lee_wind_layout_time(layout, fields, &rows->record.time[n], error);
    if (status != LEE_OK) {
        return status;
    }
    rows->is_variable_calm = false;
    rows->is_variable_missing = false;
    status = layout->is_there[LEE_WIND_SPEED]
                 ? read_speed_from(rows, fields, error)
                 : read_components(rows, fields, error);
    for (size_t i = 0; i < rows->optional_count && status == LEE_OK; i++) {
        double *values = *lee_wind_optional(&rows->record, rows->optional[i]);
        status = lee_wind_layout_number(layout, fields, rows->optional[i],
                                        &values[n], error);
    }
    return status;
}

static bool is_equal(const double values[], size_t i, size_t j) {
    return values[i] == values[j] || (isnan(values[i]) && isnan(values[j]));
}

/* Does the row being read repeat all values of the one before? */
static bool is_repeated(growing *rows) {
    lee_wind_record *record = &rows->record;
    const size_t n = record->n;
    bool is_same =
        is_equal(record->east, n - 1, n) && is_equal(record->north, n - 1, n);
    for (size_t i = 0; i < rows->optional_count && is_same; i++) {
        is_same =
            is_equal(*lee_wind_optional(record, rows->optional[i]), n - 1, n);
    }
    return is_same;
}

static lee_status refuse_order(const growing *rows,
                               const lee_csv_field fields[], lee_error *error) {
    const int64_t *time = &rows->record.time[rows->record.n];
    const lee_csv_field *field =
        lee_wind_layout_time_field(rows->layout, fields);
    char now[LEE_TIME_TEXT];
    char before[LEE_TIME_TEXT];
    (void)lee_time_format(time[0], now);
    if (time[0] == time[-1]) {
        return lee_csv_fail(rows->layout->csv, field, error,
                            "time %s is here again with other values", now);
    }
    return lee_csv_fail(rows->layout->csv, field, error,
                        "time %s runs backwards: the row before has %s", now,
                        lee_time_format(time[-1], before));
}

/* Keeps the row just read, or drops it when it repeats the one before. */
static lee_status keep_row(growing *rows, const lee_csv_field fields[],
                           lee_error *error) {
    lee_wind_record *record = &rows->record;
    const size_t n = record->n;
    if (n > 0 && record->time[n] <= record->time[n - 1]) {
        if (record->time[n] < record->time[n - 1] || !is_repeated(rows)) {
            return refuse_order(rows, fields, error);
        }
        record->duplicates++;
        return LEE_OK;
    }
    record->variable_calm += rows->is_variable_calm;
    record->variable_missing += rows->is_variable_missing;
    record->n++;
    return LEE_OK;
}

static lee_status read_rows(growing *rows, lee_csv *csv, lee_error *error) {
    const lee_csv_field *fields = NULL;
    lee_status status;
    while ((status = lee_csv_next(csv, &fields, error)) == LEE_OK &&
           fields != NULL) {
        status = make_room(rows, error);
        if (status == LEE_OK) {
            status = read_row(rows, fields, error);
        }
        if (status == LEE_OK) {
            status = keep_row(rows, fields, error);
        }
        if (status != LEE_OK) {
            return status;
        }
    }
    return status;
}

static lee_status check_content(const lee_csv *csv,
                                const lee_wind_record *record,
                                lee_error *error) {
    if (record->n == 0) {
        return lee_fail(error, LEE_ERR_DATA, "%s: no row follows the header",
                        lee_csv_path(csv));
    }
    for (size_t i = 0; i < record->n; i++) {
        if (!isnan(record->east[i])) {
            return LEE_OK;
        }
    }
    return lee_fail(error, LEE_ERR_DATA,
                    "%s: the wind is missing from all %zu rows",
                    lee_csv_path(csv), record->n);
}

static lee_status read_open(lee_csv *csv, const lee_wind_csv *how,
                            lee_wind_record *record, lee_error *error) {
    lee_wind_layout layout;
    lee_status status = lee_wind_layout_init(&layout, csv, how, error);
    if (status != LEE_OK) {
        return status;
    }
    growing rows = {.layout = &layout, .record = {.stamp = how->stamp}};
    list_optional(&rows);
    status = read_rows(&rows, csv, error);
    if (status == LEE_OK) {
        status = check_content(csv, &rows.record, error);
    }
    lee_wind_layout_free(&layout);
    if (status != LEE_OK) {
        lee_wind_record_free(&rows.record);
        return status;
    }
    (void)stretch_all(&rows, rows.record.n); /* gives back what is too much */
    *record = rows.record;
    return LEE_OK;
}

lee_status lee_wind_read_csv(const char *path, const lee_wind_csv *csv,
                             lee_wind_record *record, lee_error *error) {
    *record = (lee_wind_record){0};
    lee_csv *file = NULL;
    lee_status status = lee_csv_open(path, &file, error);
    if (status == LEE_OK) {
        status = read_open(file, csv, record, error);
    }
    lee_csv_close(file);
    return status;
}
