/* apart.c - hands a record through the pipe of a child process. */
#include "wind/netcdf/apart.h"

#include <stdbool.h>
#include <stdlib.h>
#include <string.h>

#include "formats/apart.h"
#include "wind/columns.h"

enum { OPTIONAL = LEE_WIND_COLUMNS - LEE_WIND_PRESSURE };

/* What is to be read. */
typedef struct errand {
    const char *path;
    const lee_wind_netcdf *how;
} errand;

/* First in the parcel; then times, columns, and each note with its end. */
typedef struct label {
    size_t n;
    size_t duplicates;
    size_t notes;
    lee_stamp stamp;
    bool is_there[OPTIONAL];
} label;

static lee_status pack(lee_wind_record *record, const lee_notes *told,
                       lee_parcel *found, lee_error *error) {
    const size_t n = record->n;
    label l = {.n = n,
               .duplicates = record->duplicates,
               .notes = told->n,
               .stamp = record->stamp};
    double *column[2 + OPTIONAL] = {record->east, record->north};
    for (size_t i = 0; i < OPTIONAL; i++) {
        column[2 + i] = *lee_wind_optional(
            record, (lee_wind_column)((size_t)LEE_WIND_PRESSURE + i));
        l.is_there[i] = column[2 + i] != NULL;
    }
    lee_status status = lee_parcel_add(found, &l, sizeof l, error);
    if (status == LEE_OK) {
        status = lee_parcel_add(found, record->time, n * sizeof *record->time,
                                error);
    }
    for (size_t i = 0; i < 2 + OPTIONAL && status == LEE_OK; i++) {
        if (column[i] != NULL) {
            status =
                lee_parcel_add(found, column[i], n * sizeof *column[i], error);
        }
    }
    for (size_t i = 0; i < told->n && status == LEE_OK; i++) {
        status = lee_parcel_add(found, told->text[i], strlen(told->text[i]) + 1,
                                error);
    }
    return status;
}

static lee_status work(const void *subject, lee_parcel *found,
                       lee_error *error) {
    const errand *asked = subject;
    lee_wind_record record = {0};
    lee_notes told = {0};
    lee_status status = lee_wind_netcdf_read_here(asked->path, asked->how,
                                                  &record, &told, error);
    if (status == LEE_OK) {
        status = pack(&record, &told, found, error);
    }
    lee_wind_record_free(&record);
    lee_notes_free(&told);
    return status;
}

/* Takes bytes from the front of what is left. */
static bool take(const lee_parcel *found, size_t *at, void *into,
                 size_t length) {
    if (length > found->length - *at) {
        return false;
    }
    memcpy(into, found->bytes + *at, length);
    *at += length;
    return true;
}

static bool take_columns(const lee_parcel *found, size_t *at, const label *l,
                         lee_wind_record *record) {
    const size_t size = l->n * sizeof(double);
    bool is_taken = take(found, at, record->time, size) &&
                    take(found, at, record->east, size) &&
                    take(found, at, record->north, size);
    for (size_t i = 0; i < OPTIONAL && is_taken; i++) {
        double **values = lee_wind_optional(
            record, (lee_wind_column)((size_t)LEE_WIND_PRESSURE + i));
        if (l->is_there[i]) {
            *values = malloc(size + 1);
            is_taken = *values != NULL && take(found, at, *values, size);
        }
    }
    return is_taken;
}

static lee_status unpack(const char *path, const lee_parcel *found,
                         lee_wind_record *record, lee_notes *told,
                         lee_error *error) {
    label l;
    size_t at = 0;
    if (!take(found, &at, &l, sizeof l) ||
        lee_wind_record_init(record, l.n, error) != LEE_OK ||
        !take_columns(found, &at, &l, record)) {
        return lee_fail(error, LEE_ERR_MEMORY, "%s: no room for the record",
                        path);
    }
    record->duplicates = l.duplicates;
    record->stamp = l.stamp;
    for (size_t i = 0; i < l.notes && told != NULL; i++) {
        const lee_status status =
            lee_notes_add(told, error, "%s", found->bytes + at);
        if (status != LEE_OK) {
            return status;
        }
        at += strlen(found->bytes + at) + 1;
    }
    return LEE_OK;
}

/* Time for all the files that are read. */
static lee_apart_limits limits_of(const char *path,
                                  const lee_wind_netcdf *how) {
    lee_apart_limits limits = lee_apart_usual_limits(path);
    for (size_t i = 0; i < LEE_WIND_COLUMNS; i++) {
        if (how->column[i].path != NULL) {
            const lee_apart_limits more =
                lee_apart_usual_limits(how->column[i].path);
            limits.processor_seconds += more.processor_seconds;
            limits.seconds += more.seconds;
        }
    }
    return limits;
}

lee_status lee_wind_netcdf_read_apart(const char *path,
                                      const lee_wind_netcdf *how,
                                      lee_wind_record *record, lee_notes *told,
                                      lee_error *error) {
    const errand asked = {path, how};
    const lee_apart_limits limits = limits_of(path, how);
    lee_parcel found = {0};
    *record = (lee_wind_record){0};
    lee_status status = lee_apart(path, &limits, work, &asked, &found, error);
    if (status == LEE_OK) {
        status = unpack(path, &found, record, told, error);
    }
    if (status != LEE_OK) {
        lee_wind_record_free(record);
    }
    lee_parcel_free(&found);
    return status;
}
