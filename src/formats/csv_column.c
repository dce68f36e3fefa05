/* csv_column.c - numeric columns brought to SI. */
#include "formats/csv_column.h"

#include <string.h>

#include "base/text.h"

bool lee_csv_has_column(const lee_csv *csv, const char *name) {
    for (size_t i = 0; i < lee_csv_columns(csv); i++) {
        if (lee_text_same(lee_csv_header_at(csv, i)->name, name)) {
            return true;
        }
    }
    return false;
}

lee_status lee_csv_find_column(const lee_csv *csv, const char *name,
                               const char *unit, lee_csv_column *column,
                               lee_error *error) {
    *column = (lee_csv_column){.name = name};
    lee_status status = lee_csv_find(csv, name, &column->index, error);
    if (status != LEE_OK) {
        return status;
    }
    const char *given = lee_csv_header_at(csv, column->index)->unit;
    const bool is_pure = strcmp(unit, "1") == 0;
    if (given == NULL && !is_pure) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s:%zu: column '%s' has no unit; write it in the "
                        "header, as in \"%s [%s]\"",
                        lee_csv_path(csv), lee_csv_line(csv), name, name, unit);
    }
    status = lee_unit_conversion(given == NULL ? unit : given, unit,
                                 &column->to_si, error);
    if (status != LEE_OK) {
        lee_context(error, "%s:%zu: column '%s': ", lee_csv_path(csv),
                    lee_csv_line(csv), name);
    }
    return status;
}

lee_status lee_csv_column_number(const lee_csv *csv,
                                 const lee_csv_field fields[],
                                 const lee_csv_column *column, double *value,
                                 lee_error *error) {
    double found;
    const lee_status status =
        lee_csv_number(csv, &fields[column->index], &found, error);
    if (status == LEE_OK) {
        *value = column->to_si.factor * found + column->to_si.offset;
    }
    return status;
}
