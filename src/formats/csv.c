/* csv.c - columns with names and units, and numbers in rows. */
#include "formats/csv.h"

#include <math.h>
#include <stdarg.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/number.h"
#include "base/text.h"
#include "formats/csv_rows.h"

struct lee_csv {
    lee_csv_rows rows;
    char *path;
    char decimal;
    size_t n;
    size_t header_line;
    lee_csv_header *header; /* [n] */
};

static char *copy_bytes(size_t length, const char bytes[]) {
    char *copy = malloc(length + 1);
    if (copy != NULL) {
        memcpy(copy, bytes, length);
        copy[length] = '\0';
    }
    return copy;
}

/* Parts "speed [knots]"; false without memory. */
static bool part_header(const lee_csv_field *field, lee_csv_header *header) {
    char *all = copy_bytes(field->length, field->bytes);
    if (all == NULL) {
        return false;
    }
    char *open = strrchr(all, '[');
    const bool has_unit =
        open != NULL && field->length > 0 && all[field->length - 1] == ']';
    if (has_unit) {
        all[field->length - 1] = '\0';
        *open = '\0';
        header->unit = lee_text_trimmed(open + 1);
    }
    header->name = lee_text_trimmed(all);
    free(all);
    if (header->name == NULL || (has_unit && header->unit == NULL)) {
        return false;
    }
    if (has_unit && *header->unit == '\0') {
        free(header->unit);
        header->unit = NULL;
    }
    return true;
}

/* A column without a name may stand beside another; it is found by number. */
static lee_status refuse_repeated_name(const lee_csv *csv, size_t column,
                                       lee_error *error) {
    const char *name = csv->header[column].name;
    for (size_t i = 0; i < column && *name != '\0'; i++) {
        if (lee_text_same(csv->header[i].name, name)) {
            char shown[LEE_SHOWN];
            return lee_csv_fail(csv, &csv->rows.fields[column], error,
                                "column '%s' is there already, as number %zu",
                                lee_text_show(strlen(name), name, shown),
                                i + 1);
        }
    }
    return LEE_OK;
}

/* A header row holds names. When all of it begins as numbers do it is data,
 * and would be lost. */
static lee_status refuse_missing_header(const lee_csv *csv, lee_error *error) {
    for (size_t i = 0; i < csv->n; i++) {
        const char *name = csv->header[i].name;
        const char first = name[strspn(name, "+-.")];
        if (*name != '\0' && (first < '0' || first > '9')) {
            return LEE_OK;
        }
    }
    return lee_csv_fail(csv, &csv->rows.fields[0], error,
                        "no name in the first row; expected a header such as "
                        "time,speed [m/s]");
}

static lee_status read_headers(lee_csv *csv, lee_error *error) {
    csv->n = csv->rows.n;
    csv->header_line = csv->rows.row_line;
    csv->header = calloc(csv->n, sizeof *csv->header);
    for (size_t i = 0; i < csv->n; i++) {
        if (csv->header == NULL ||
            !part_header(&csv->rows.fields[i], &csv->header[i])) {
            return lee_fail(error, LEE_ERR_MEMORY, "%s: no room for its header",
                            csv->path);
        }
        const lee_status status = refuse_repeated_name(csv, i, error);
        if (status != LEE_OK) {
            return status;
        }
    }
    return refuse_missing_header(csv, error);
}

/* 1 for a number with a decimal comma, -1 for one with a point, 0 for what
 * tells nothing. */
static int comma_vote(size_t length, const char bytes[]) {
    double value = 0.0;
    const bool is_comma = lee_number_parse(length, bytes, ',', &value);
    const bool is_point = lee_number_parse(length, bytes, '.', &value);
    return (is_comma ? 1 : 0) - (is_point ? 1 : 0);
}

/* The decimal sign that most of the first numbers use. Looks at the bytes
 * behind the header that are at hand and reads nothing. */
static char vote_for_decimal(const lee_csv_rows *rows) {
    enum { LOOK_AHEAD = 1 << 16 };
    if (rows->separator == ',') {
        return '.';
    }
    const lee_csv_block *block = &rows->block;
    const char *end = block->end - block->next > LOOK_AHEAD
                          ? block->next + LOOK_AHEAD
                          : block->end;
    const char marks[] = {rows->separator, ' ', '"', '\r', '\n', '\0'};
    int votes = 0;
    const char *first = block->next;
    for (const char *p = first; p < end; p++) {
        if (strchr(marks, *p) != NULL) {
            votes += comma_vote((size_t)(p - first), first);
            first = p + 1;
        }
    }
    return votes > 0 ? ',' : '.';
}

lee_status lee_csv_open(const char *path, lee_csv **csv, lee_error *error) {
    lee_csv *opened = calloc(1, sizeof *opened);
    char *copy = lee_text_copy(path);
    if (opened == NULL || copy == NULL) {
        free(copy);
        free(opened);
        return lee_fail(error, LEE_ERR_MEMORY, "%s: no room to read it", path);
    }
    opened->path = copy;
    lee_status status = lee_csv_rows_open(copy, &opened->rows, error);
    if (status == LEE_OK) {
        status = read_headers(opened, error);
    }
    if (status != LEE_OK) {
        lee_csv_close(opened);
        return status;
    }
    opened->decimal = vote_for_decimal(&opened->rows);
    *csv = opened;
    return LEE_OK;
}

void lee_csv_close(lee_csv *csv) {
    if (csv == NULL) {
        return;
    }
    for (size_t i = 0; i < csv->n && csv->header != NULL; i++) {
        free(csv->header[i].name);
        free(csv->header[i].unit);
    }
    free(csv->header);
    free(csv->path);
    lee_csv_rows_close(&csv->rows);
    free(csv);
}

const char *lee_csv_path(const lee_csv *csv) {
    return csv->path;
}

char lee_csv_decimal(const lee_csv *csv) {
    return csv->decimal;
}

size_t lee_csv_columns(const lee_csv *csv) {
    return csv->n;
}

const lee_csv_header *lee_csv_header_at(const lee_csv *csv, size_t column) {
    return column < csv->n ? &csv->header[column] : NULL;
}

size_t lee_csv_line(const lee_csv *csv) {
    return csv->rows.row_line;
}

/* Adds "time, speed, from", at most MOST_NAMED of them. */
static void add_names(const lee_csv *csv, lee_text *text) {
    enum { MOST_NAMED = 20 };
    for (size_t i = 0; i < csv->n && i < MOST_NAMED; i++) {
        char shown[LEE_SHOWN];
        const char *name = csv->header[i].name;
        lee_text_add(text, "%s%s", i == 0 ? "" : ", ",
                     lee_text_show(strlen(name), name, shown));
    }
    if (csv->n > MOST_NAMED) {
        lee_text_add(text, " and %zu more", csv->n - MOST_NAMED);
    }
}

static const char *nearest_name(const lee_csv *csv, const char *name) {
    const char **names = calloc(csv->n + 1, sizeof *names);
    if (names == NULL) {
        return NULL;
    }
    for (size_t i = 0; i < csv->n; i++) {
        names[i] = csv->header[i].name;
    }
    const char *nearest = lee_text_nearest(name, csv->n, names);
    free(names);
    return nearest;
}

static lee_status not_found(const lee_csv *csv, const char *name,
                            lee_error *error) {
    char shown[LEE_SHOWN];
    char meant[LEE_SHOWN];
    lee_text names = {0};
    const char *nearest = nearest_name(csv, name);
    lee_text_show(strlen(name), name, shown);
    add_names(csv, &names);
    const char *all = names.has_failed ? "" : names.bytes;
    if (nearest != NULL) {
        lee_fail(error, LEE_ERR_FORMAT,
                 "%s:%zu: no column '%s'; did you mean '%s'? The columns are "
                 "%s",
                 csv->path, csv->header_line, shown,
                 lee_text_show(strlen(nearest), nearest, meant), all);
    } else {
        lee_fail(error, LEE_ERR_FORMAT,
                 "%s:%zu: no column '%s'; the columns are %s", csv->path,
                 csv->header_line, shown, all);
    }
    lee_text_free(&names);
    return LEE_ERR_FORMAT;
}

lee_status lee_csv_find(const lee_csv *csv, const char *name, size_t *column,
                        lee_error *error) {
    for (size_t i = 0; i < csv->n && *name != '\0'; i++) {
        if (lee_text_same(csv->header[i].name, name)) {
            *column = i;
            return LEE_OK;
        }
    }
    int64_t number = 0;
    if (name[0] != '#' ||
        !lee_integer_parse(strlen(name + 1), name + 1, &number)) {
        return not_found(csv, name, error);
    }
    if (number < 1 || (uint64_t)number > csv->n) {
        char shown[LEE_SHOWN];
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s:%zu: no column %s; there are %zu, #1 to #%zu",
                        csv->path, csv->header_line,
                        lee_text_show(strlen(name), name, shown), csv->n,
                        csv->n);
    }
    *column = (size_t)number - 1;
    return LEE_OK;
}

lee_status lee_csv_next(lee_csv *csv, const lee_csv_field **fields,
                        lee_error *error) {
    bool is_row = false;
    const lee_status status = lee_csv_rows_next(&csv->rows, &is_row, error);
    *fields = status == LEE_OK && is_row ? csv->rows.fields : NULL;
    return status;
}

/* Column of a field of the current row. */
static size_t index_of(const lee_csv *csv, const lee_csv_field *field) {
    return (size_t)(field - csv->rows.fields);
}

lee_status lee_csv_fail(const lee_csv *csv, const lee_csv_field *field,
                        lee_error *error, const char *format, ...) {
    char message[1024];
    va_list arguments;
    va_start(arguments, format);
    (void)vsnprintf(message, sizeof message, format, arguments);
    va_end(arguments);
    return lee_fail(error, LEE_ERR_FORMAT, "%s:%zu:%zu: %s", csv->path,
                    lee_csv_rows_field_line(&csv->rows, index_of(csv, field)),
                    field->column, message);
}

/* Says what a field that is no finite number holds. */
static lee_status refuse_number(const lee_csv *csv, const lee_csv_field *field,
                                lee_error *error) {
    char shown[LEE_SHOWN];
    char name[LEE_SHOWN];
    const char *header = csv->header[index_of(csv, field)].name;
    lee_text_show(strlen(header), header, name);
    lee_text_show(field->length, field->bytes, shown);
    const char other = csv->decimal == '.' ? ',' : '.';
    double value = 0.0;
    if (field->length == 0) {
        return lee_csv_fail(csv, field, error,
                            "'%s' is empty; expected a number", name);
    }
    if (lee_number_parse(field->length, field->bytes, csv->decimal, &value)) {
        return lee_csv_fail(csv, field, error,
                            "'%s' is %s, too large for a number", name, shown);
    }
    if (lee_number_parse(field->length, field->bytes, other, &value)) {
        return lee_csv_fail(csv, field, error,
                            "'%s' is '%s'; expected the decimal sign '%c'",
                            name, shown, csv->decimal);
    }
    return lee_csv_fail(csv, field, error, "'%s' is '%s'; expected a number",
                        name, shown);
}

lee_status lee_csv_number(const lee_csv *csv, const lee_csv_field *field,
                          double *value, lee_error *error) {
    double read = NAN;
    if (!lee_number_parse(field->length, field->bytes, csv->decimal, &read) ||
        !isfinite(read)) {
        return refuse_number(csv, field, error);
    }
    *value = read;
    return LEE_OK;
}
