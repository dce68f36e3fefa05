/* table.c - reads a table of two columns, the first a speed. */
#include "case/table.h"

#include <stdlib.h>

#include "formats/csv_column.h"

typedef struct columns {
    lee_csv_column speed;
    lee_csv_column value;
} columns;

static lee_status find_columns(const lee_csv *csv,
                               const lee_speed_table_kind *kind, columns *found,
                               lee_error *error) {
    const lee_status status =
        lee_csv_find_column(csv, "speed", "m s-1", &found->speed, error);
    return status == LEE_OK ? lee_csv_find_column(csv, kind->column, "1",
                                                  &found->value, error)
                            : status;
}

static lee_status add_row(const lee_speed_table_kind *kind, const double row[2],
                          lee_speed_table *table, lee_error *error) {
    const size_t n = table->n + 1;
    double *grown = realloc(table->speed, n * sizeof *grown);
    if (grown != NULL) {
        table->speed = grown;
        grown = realloc(table->value, n * sizeof *grown);
    }
    if (grown == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %s", kind->table);
    }
    table->value = grown;
    table->speed[table->n] = row[0];
    table->value[table->n] = row[1];
    table->n = n;
    return LEE_OK;
}

static lee_status take_row(const lee_csv *csv, const lee_csv_field *fields,
                           const columns *where,
                           const lee_speed_table_kind *kind,
                           lee_speed_table *table, lee_error *error) {
    double row[2] = {0.0, 0.0};
    lee_status status =
        lee_csv_column_number(csv, fields, &where->speed, &row[0], error);
    if (status == LEE_OK) {
        status =
            lee_csv_column_number(csv, fields, &where->value, &row[1], error);
    }
    if (status != LEE_OK) {
        return status;
    }
    const double last = table->n == 0 ? -1.0 : table->speed[table->n - 1];
    if (!(row[0] >= 0.0 && row[0] > last)) {
        return lee_csv_fail(csv, &fields[where->speed.index], error,
                            "speed %g m/s does not grow from row to row, "
                            "from 0 on",
                            row[0]);
    }
    if (!(row[1] > kind->above && row[1] <= kind->highest)) {
        return lee_csv_fail(csv, &fields[where->value.index], error,
                            "%s %g; expected %s", kind->value, row[1],
                            kind->range);
    }
    return add_row(kind, row, table, error);
}

static lee_status read_rows(lee_csv *csv, const lee_speed_table_kind *kind,
                            lee_speed_table *table, lee_error *error) {
    columns where = {0};
    lee_status status = find_columns(csv, kind, &where, error);
    while (status == LEE_OK) {
        const lee_csv_field *fields = NULL;
        status = lee_csv_next(csv, &fields, error);
        if (status != LEE_OK || fields == NULL) {
            break;
        }
        status = take_row(csv, fields, &where, kind, table, error);
    }
    return status;
}

lee_status lee_speed_table_read(const char *path,
                                const lee_speed_table_kind *kind,
                                lee_speed_table *table, lee_error *error) {
    *table = (lee_speed_table){0};
    lee_csv *csv = NULL;
    lee_status status = lee_csv_open(path, &csv, error);
    if (status == LEE_OK) {
        status = read_rows(csv, kind, table, error);
    }
    lee_csv_close(csv);
    if (status == LEE_OK && table->n < 2) {
        status = lee_fail(error, LEE_ERR_DATA,
                          "%s: %s needs two rows, this one has %zu", path,
                          kind->table, table->n);
    }
    if (status != LEE_OK) {
        free(table->speed);
        free(table->value);
        *table = (lee_speed_table){0};
    }
    return status;
}
