/* quantity.c - a number and its unit, in one text. */
#include "leewater/units.h"

#include <math.h>
#include <stdbool.h>
#include <stdlib.h>
#include <string.h>

#include "base/number.h"
#include "base/text.h"

/* Bytes of the number that text begins with; 0 when there is none. */
static size_t number_length(const char *text) {
    size_t n = *text == '+' || *text == '-' ? 1 : 0;
    const size_t whole = strspn(text + n, "0123456789");
    n += whole;
    size_t fraction = 0;
    if (text[n] == '.') {
        fraction = strspn(text + n + 1, "0123456789");
        n += 1 + fraction;
    }
    if (whole + fraction == 0) {
        return 0;
    }
    if (text[n] == 'e' || text[n] == 'E') {
        const size_t sign = text[n + 1] == '+' || text[n + 1] == '-' ? 1 : 0;
        const size_t digits = strspn(text + n + 1 + sign, "0123456789");
        n += digits == 0 ? 0 : 1 + sign + digits;
    }
    return n;
}

/* What follows a number cannot be its unit: "12,5 m", "1 000 m". A unit may
 * begin as "1/s" does. */
static bool is_more_number(const char *unit) {
    const bool is_one = *unit == '1' && (unit[1] == '\0' || unit[1] == '/');
    return strchr(",.0123456789", *unit) != NULL && *unit != '\0' && !is_one;
}

/* The quantity in trimmed text; `number` is what it begins with. */
static lee_status convert_quantity(const char *text, size_t number,
                                   const char *to, double *value,
                                   lee_error *error) {
    char shown[LEE_SHOWN];
    const char *unit = text + number;
    unit += strspn(unit, " \t\r\n");
    double read = 0.0;
    const bool is_plain = strcmp(to, "1") == 0;
    if (number == 0 || is_more_number(unit) ||
        !lee_number_parse(number, text, '.', &read)) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "'%s' is not a number%s; expected one such as 12%s%s",
                        lee_text_show(strlen(text), text, shown),
                        is_plain ? "" : " with its unit", is_plain ? ".5" : " ",
                        is_plain ? "" : to);
    }
    if (*unit == '\0' && !is_plain) {
        return lee_fail(error, LEE_ERR_FORMAT, "'%s' has no unit; write %s %s",
                        lee_text_show(strlen(text), text, shown), shown, to);
    }
    lee_conversion line = {1.0, 0.0};
    const lee_status status =
        *unit == '\0' ? LEE_OK : lee_unit_conversion(unit, to, &line, error);
    if (status != LEE_OK) {
        return status;
    }
    read = line.factor * read + line.offset;
    if (!isfinite(read)) {
        return lee_fail(error, LEE_ERR_FORMAT, "'%s' is not a finite number",
                        lee_text_show(strlen(text), text, shown));
    }
    *value = read;
    return LEE_OK;
}

lee_status lee_quantity_parse(const char *text, const char *to, double *value,
                              lee_error *error) {
    char *trimmed = lee_text_trimmed(text);
    if (trimmed == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a quantity");
    }
    const lee_status status =
        convert_quantity(trimmed, number_length(trimmed), to, value, error);
    free(trimmed);
    return status;
}
