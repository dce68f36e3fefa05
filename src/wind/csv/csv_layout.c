/* csv_layout.c - finds the columns of a CSV record and reads their numbers. */
#include "wind/csv/csv_layout.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

#include "base/number.h"
#include "base/text.h"
#include "formats/csv_column.h"
#include "leewater/calendar.h"
#include "wind/columns.h"

static bool has(const lee_wind_csv *how, lee_wind_column column) {
    return how->column[column].name != NULL;
}

/* Is the time given in exactly one of its three ways? */
static bool has_one_time(const lee_wind_csv *how) {
    const bool is_split = has(how, LEE_WIND_YEAR);
    const bool is_dated = has(how, LEE_WIND_DATE);
    const bool is_whole = has(how, LEE_WIND_TIME);
    return is_whole + is_dated + is_split == 1 &&
           has(how, LEE_WIND_CLOCK) == is_dated &&
           has(how, LEE_WIND_MONTH) == is_split &&
           has(how, LEE_WIND_DAY) == is_split &&
           (is_split || !has(how, LEE_WIND_HOUR)) &&
           (has(how, LEE_WIND_HOUR) || !has(how, LEE_WIND_MINUTE));
}

static lee_status check_choice(const lee_wind_csv *how, lee_error *error) {
    if (!has_one_time(how)) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "the record's time is one column 'time', or 'date' "
                        "and 'clock', or 'year', 'month', 'day' with 'hour' "
                        "and 'minute' if there are any: name one of these");
    }
    const bool is_polar = has(how, LEE_WIND_SPEED) || has(how, LEE_WIND_FROM);
    const bool is_vector =
        has(how, LEE_WIND_EASTWARD) || has(how, LEE_WIND_NORTHWARD);
    if (is_polar == is_vector) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "the record's wind is 'speed' and 'from', or "
                        "'eastward' and 'northward': name one of these pairs");
    }
    const lee_wind_column pair[] = {
        is_polar ? LEE_WIND_SPEED : LEE_WIND_EASTWARD,
        is_polar ? LEE_WIND_FROM : LEE_WIND_NORTHWARD,
    };
    for (size_t i = 0; i < 2; i++) {
        if (!has(how, pair[i])) {
            return lee_fail(error, LEE_ERR_FORMAT,
                            "a wind needs a speed and a direction: name the "
                            "column '%s' beside '%s'",
                            lee_wind_column_name(pair[i]),
                            lee_wind_column_name(pair[1 - i]));
        }
    }
    return LEE_OK;
}

/* Two-digit years count from a whole century of four digits. */
static lee_status check_century(const lee_wind_csv *how, lee_error *error) {
    const int century = how->century;
    if (century != 0 &&
        (century % 100 != 0 || century < 1000 || century > 9900)) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "century %d is not one of 1000, 1100, ... 9900",
                        century);
    }
    return LEE_OK;
}

static lee_status check_how(const lee_csv *csv, const lee_wind_csv *how,
                            lee_error *error) {
    lee_status status = check_choice(how, error);
    if (status == LEE_OK) {
        status = check_century(how, error);
    }
    if (status != LEE_OK) {
        lee_context(error, "%s: ", lee_csv_path(csv));
    }
    return status;
}

static lee_wind_code code_of(const char *text) {
    lee_wind_code code = {.text = text};
    if (text != NULL) {
        code.length = strlen(text);
        code.is_number =
            lee_number_parse(code.length, text, '.', &code.value) ||
            lee_number_parse(code.length, text, ',', &code.value);
    }
    return code;
}

static lee_status copy_codes(lee_wind_layout *layout, const lee_wind_csv *how,
                             lee_error *error) {
    const size_t n = how->missing_count;
    layout->variable = code_of(how->variable);
    layout->missing = calloc(n > 0 ? n : 1, sizeof *layout->missing);
    if (layout->missing == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu codes", n);
    }
    layout->missing_count = n;
    for (size_t i = 0; i < n; i++) {
        layout->missing[i] = code_of(how->missing[i]);
    }
    return LEE_OK;
}

/* The way from the unit a file or a case names to the column's own. */
static lee_status convert_from(const char *unit, lee_wind_column column,
                               lee_conversion *conversion, lee_error *error) {
    const lee_wind_column_facts *facts = lee_wind_column_facts_of(column);
    const lee_status status =
        lee_unit_conversion(unit, facts->unit, conversion, error);
    if (status != LEE_OK) {
        lee_context(error, "column '%s': ", facts->name);
    }
    return status;
}

static bool is_same(const lee_conversion *a, const lee_conversion *b) {
    return a->factor == b->factor && a->offset == b->offset;
}

static lee_status find_unit(lee_wind_layout *layout, const lee_wind_csv *how,
                            lee_wind_column column, lee_error *error) {
    const lee_wind_column_facts *facts = lee_wind_column_facts_of(column);
    const lee_csv_header *header =
        lee_csv_header_at(layout->csv, layout->index[column]);
    const char *given = how->column[column].unit;
    const char *unit = given != NULL ? given : header->unit;
    lee_conversion *conversion = &layout->conversion[column];
    if (unit == NULL && facts->may_lack_unit) {
        *conversion = (lee_conversion){.factor = 1.0};
        return LEE_OK;
    }
    if (unit == NULL) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "column '%s' has no unit; write '%s [%s]' in the "
                        "header, or give the unit of '%s' in the case",
                        header->name, header->name, facts->unit, facts->name);
    }
    lee_status status = convert_from(unit, column, conversion, error);
    if (status != LEE_OK || given == NULL || header->unit == NULL) {
        return status;
    }
    lee_conversion other;
    status = convert_from(header->unit, column, &other, error);
    if (status == LEE_OK && !is_same(conversion, &other)) {
        status = lee_fail(error, LEE_ERR_FORMAT,
                          "column '%s' is in %s by its header and in %s by "
                          "the case; leave one out",
                          header->name, header->unit, given);
    }
    return status;
}

/* A time's header may name the zone: "time [UTC]", "clock [+01:00]". */
static lee_status find_zone(lee_wind_layout *layout, lee_wind_column column,
                            lee_error *error) {
    const lee_csv_header *header =
        lee_csv_header_at(layout->csv, layout->index[column]);
    if (header->unit == NULL) {
        return LEE_OK;
    }
    int64_t offset = 0;
    if (!lee_text_same(header->unit, "UTC")) {
        const lee_status status =
            lee_utc_offset_parse(header->unit, &offset, error);
        if (status != LEE_OK) {
            lee_context(error, "column '%s': ", header->name);
            return status;
        }
    }
    if (layout->has_utc_offset && layout->utc_offset != offset) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "column '%s' is in zone %s by its header and in "
                        "another by 'utc_offset'; leave one out",
                        header->name, header->unit);
    }
    layout->has_utc_offset = true;
    layout->utc_offset = offset;
    return LEE_OK;
}

static lee_status find_meaning(lee_wind_layout *layout, const lee_wind_csv *how,
                               lee_wind_column column, lee_error *error) {
    lee_status status = LEE_OK;
    if (lee_wind_column_unit(column) != NULL) {
        status = find_unit(layout, how, column, error);
    } else if (column == LEE_WIND_TIME || column == LEE_WIND_CLOCK) {
        status = find_zone(layout, column, error);
    }
    if (status != LEE_OK) {
        lee_context(error, "%s: ", lee_csv_path(layout->csv));
    }
    return status;
}

static lee_status find_column(lee_wind_layout *layout, const lee_wind_csv *how,
                              lee_wind_column column, lee_error *error) {
    const lee_status status = lee_csv_find(
        layout->csv, how->column[column].name, &layout->index[column], error);
    if (status != LEE_OK) {
        return status;
    }
    layout->is_there[column] = true;
    return find_meaning(layout, how, column, error);
}

/* May the file do without a column that the case names? */
static bool may_lack(const lee_csv *csv, const lee_wind_csv *how,
                     lee_wind_column column) {
    return how->may_lack_quantities && column >= LEE_WIND_PRESSURE &&
           how->column[column].name[0] != '#' &&
           !lee_csv_has_column(csv, how->column[column].name);
}

static lee_status find_columns(lee_wind_layout *layout, const lee_wind_csv *how,
                               lee_error *error) {
    for (size_t i = 0; i < LEE_WIND_COLUMNS; i++) {
        const lee_wind_column column = (lee_wind_column)i;
        if (!has(how, column) || may_lack(layout->csv, how, column)) {
            continue;
        }
        const lee_status status = find_column(layout, how, column, error);
        if (status != LEE_OK) {
            return status;
        }
    }
    return LEE_OK;
}

lee_status lee_wind_layout_init(lee_wind_layout *layout, const lee_csv *csv,
                                const lee_wind_csv *how, lee_error *error) {
    *layout = (lee_wind_layout){
        .csv = csv,
        .decimal = lee_csv_decimal(csv),
        .has_utc_offset = how->has_utc_offset,
        .utc_offset = how->utc_offset,
        .century = how->century,
    };
    lee_status status = check_how(csv, how, error);
    if (status == LEE_OK) {
        status = copy_codes(layout, how, error);
    }
    if (status == LEE_OK) {
        status = find_columns(layout, how, error);
    }
    if (status != LEE_OK) {
        lee_wind_layout_free(layout);
    }
    return status;
}

void lee_wind_layout_free(lee_wind_layout *layout) {
    free(layout->missing);
    *layout = (lee_wind_layout){0};
}
