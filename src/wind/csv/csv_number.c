/* csv_number.c - numbers of a CSV record: missing, converted, in range. */
#include "wind/csv/csv_layout.h"

#include <math.h>
#include <string.h>

#include "base/number.h"
#include "base/text.h"
#include "wind/columns.h"

/* Directions in radians may round to a hair beyond the circle. */
static const double circle_rounding = 1e-9; /* relative */

static bool is_text_of(const char *word, const lee_csv_field *field) {
    char text[8];
    if (field->length >= sizeof text) {
        return false;
    }
    memcpy(text, field->bytes, field->length);
    text[field->length] = '\0';
    return lee_text_same(text, word);
}

static bool is_text(const lee_wind_code *code, const lee_csv_field *field) {
    return code->text != NULL && code->length == field->length &&
           memcmp(code->text, field->bytes, field->length) == 0;
}

bool lee_wind_code_is(const lee_wind_code *code, const lee_csv_field *field,
                      char decimal) {
    double value;
    return is_text(code, field) ||
           (code->is_number &&
            lee_number_parse(field->length, field->bytes, decimal, &value) &&
            value == code->value);
}

static bool is_missing_text(const lee_wind_layout *layout,
                            const lee_csv_field *field) {
    static const char *const always[] = {"", "NA", "NaN", "null"};
    for (size_t i = 0; i < sizeof always / sizeof always[0]; i++) {
        if (is_text_of(always[i], field)) {
            return true;
        }
    }
    for (size_t i = 0; i < layout->missing_count; i++) {
        if (is_text(&layout->missing[i], field)) {
            return true;
        }
    }
    return false;
}

static bool is_missing_number(const lee_wind_layout *layout, double value) {
    for (size_t i = 0; i < layout->missing_count; i++) {
        if (layout->missing[i].is_number && layout->missing[i].value == value) {
            return true;
        }
    }
    return false;
}

static lee_status refuse_range(const lee_wind_layout *layout,
                               const lee_csv_field *field,
                               lee_wind_column column, double value,
                               lee_error *error) {
    const lee_wind_column_facts *facts = lee_wind_column_facts_of(column);
    const char *unit = strcmp(facts->unit, "1") == 0 ? "" : facts->unit;
    const char *blank = unit[0] == '\0' ? "" : " ";
    char shown[LEE_SHOWN];
    return lee_csv_fail(
        layout->csv, field, error,
        "%s '%s' is %g%s%s, not in [%g, %g]; should it mean missing, list it "
        "under 'missing'",
        facts->name, lee_text_show(field->length, field->bytes, shown), value,
        blank, unit, facts->low, facts->high);
}

static bool has_letter_first(const lee_csv_field *field) {
    if (field->length == 0) {
        return false;
    }
    const char c = field->bytes[0];
    return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z');
}

/* Refuses what is no number; of a word it says what the case may call it. */
static lee_status refuse_text(const lee_wind_layout *layout,
                              const lee_csv_field *field,
                              lee_wind_column column, lee_error *error) {
    double ignored;
    if (!has_letter_first(field)) {
        return lee_csv_number(layout->csv, field, &ignored, error);
    }
    char name[LEE_SHOWN];
    char shown[LEE_SHOWN];
    const char *header =
        lee_csv_header_at(layout->csv, layout->index[column])->name;
    (void)lee_text_show(strlen(header), header, name);
    (void)lee_text_show(field->length, field->bytes, shown);
    if (column == LEE_WIND_FROM && layout->variable.text == NULL) {
        return lee_csv_fail(layout->csv, field, error,
                            "'%s' is '%s'; expected a number; should it mean "
                            "that the direction varies, write 'variable: %s' "
                            "in the case's wind",
                            name, shown, shown);
    }
    return lee_csv_fail(layout->csv, field, error,
                        "'%s' is '%s'; expected a number; should it mean "
                        "missing, list it under 'missing'",
                        name, shown);
}

lee_status lee_wind_layout_number(const lee_wind_layout *layout,
                                  const lee_csv_field fields[],
                                  lee_wind_column column, double *value,
                                  lee_error *error) {
    const lee_csv_field *field = &fields[layout->index[column]];
    const lee_wind_column_facts *facts = lee_wind_column_facts_of(column);
    double raw = NAN;
    *value = NAN;
    if (!lee_number_parse(field->length, field->bytes, layout->decimal, &raw) ||
        !isfinite(raw)) {
        return is_missing_text(layout, field)
                   ? LEE_OK
                   : refuse_text(layout, field, column, error);
    }
    if (is_missing_number(layout, raw)) {
        return LEE_OK;
    }
    const lee_conversion *conversion = &layout->conversion[column];
    const double converted = conversion->factor * raw + conversion->offset;
    const double rounding = circle_rounding * facts->high;
    if (!(converted >= facts->low && converted <= facts->high + rounding)) {
        return refuse_range(layout, field, column, converted, error);
    }
    *value = converted;
    return LEE_OK;
}
