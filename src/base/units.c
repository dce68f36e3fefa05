/* units.c - quantities with units: UDUNITS-2 behind a front table. */
#include "leewater/units.h"

#include <locale.h>
#include <math.h>
#include <stdbool.h>
#include <stdlib.h>
#include <string.h>

#include <udunits2.h>

#include "base/text.h"

/* How this trade writes a unit, and how UDUNITS reads the same one. Without
 * its row UDUNITS 2.2.28 does not know the spelling or takes it for another
 * unit: mph for milliphot, kph for kilophot, nmi for a nano-mile, mb for a
 * millibarn. A row matches a whole unit or a word within one. */
static const struct {
    const char *written;
    const char *read;
    bool is_exact; /* letters of the other case mean something else */
} mended[] = {
    {"mph",          "mi/h",          false},
    {"kph",          "km/h",          false},
    {"kmh",          "km/h",          false},
    {"kmph",         "km/h",          false},
    {"KM/H",         "km/h",          false},
    {"M/S",          "m/s",           false},
    {"mps",          "m/s",           false},
    {"fps",          "ft/s",          false},
    {"kn",           "knot",          true }, /* kN is a kilonewton */
    {"KN",           "knot",          true },
    {"kt",           "knot",          false},
    {"kts",          "knot",          false},
    {"nmi",          "nautical_mile", false},
    {"KM",           "km",            true },
    {"FT",           "ft",            false},
    {"mb",           "mbar",          false},
    {"mbs",          "mbar",          false},
    {"hpa",          "hPa",           false},
    {"deg",          "degree",        false},
    {"degs",         "degree",        false},
    {"degT",         "degree",        true },
    {"deg T",        "degree",        true },
    {"deg true",     "degree",        false},
    {"degrees true", "degree",        false},
    {"\u00B0T",      "degree",        true },
    {"deg C",        "degC",          true },
    {"Deg C",        "degC",          true },
    {"degree C",     "degC",          true },
    {"degrees C",    "degC",          true },
    {"deg F",        "degF",          true },
    {"degree F",     "degF",          true },
    {"degrees F",    "degF",          true },
    {"\u00B0 C",     "degC",          true },
    {"\u00B0 F",     "degF",          true },
    {"\xB0",         "degree",        true }, /* Latin-1 degree sign */
    {"\xB0T",        "degree",        true },
    {"\260C",        "degC",          true },
    {"\260F",        "degF",          true },
    {"pct",          "percent",       false},
    {"hrs",          "hours",         false},
    {"mins",         "minutes",       false},
};

/* Characters of print, and what UDUNITS reads in their place. */
static const struct {
    const char *written;
    const char *read;
} characters[] = {
    {"\u207B", "-"}, /* superscript minus */
    {"\u00B9", "1"}, /* superscript one, two, three */
    {"\u00B2", "2"},
    {"\u00B3", "3"},
    {"\u2212", "-"}, /* minus sign */
    {"\u00B7", "."}, /* middle dot */
    {"\u22C5", "."}, /* dot operator */
};

/* Units that UDUNITS reads by their rules but that nobody here means. */
static const struct {
    const char *written;
    const char *means;
    const char *write;
} refused[] = {
    {"C",      "coulomb",              "degC"                  },
    {"F",      "farad",                "degF"                  },
    {"nm",     "nanometre",            "nmi for nautical miles"},
    {"NM",     "nothing sure",         "nmi for nautical miles"},
    {"M",      "nothing sure",         "m for metres"          },
    {"ms-1",   "one in a millisecond", "m s-1 or m/s"          },
    {"ms^-1",  "one in a millisecond", "m s-1 or m/s"          },
    {"month",  "no fixed time",        "days"                  },
    {"months", "no fixed time",        "days"                  },
    {"year",   "no fixed time",        "days"                  },
    {"years",  "no fixed time",        "days"                  },
    {"yr",     "no fixed time",        "days"                  },
};

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

static bool is_digit(char c) {
    return c >= '0' && c <= '9';
}

/* Reading of text[length] by the front table, or NULL when it has no row. */
static const char *mended_as(size_t length, const char text[]) {
    char word[24];
    if (length >= sizeof word) {
        return NULL;
    }
    memcpy(word, text, length);
    word[length] = '\0';
    for (size_t i = 0; i < COUNT(mended); i++) {
        if (mended[i].is_exact ? strcmp(word, mended[i].written) == 0
                               : lee_text_same(word, mended[i].written)) {
            return mended[i].read;
        }
    }
    return NULL;
}

static size_t word_length(const char *text) {
    size_t n = 0;
    while ((text[n] >= 'a' && text[n] <= 'z') ||
           (text[n] >= 'A' && text[n] <= 'Z') || text[n] == '_') {
        n++;
    }
    return n;
}

/* Adds the character at `text` as UDUNITS reads it; returns its length. */
static size_t add_character(lee_text *out, const char *text) {
    for (size_t i = 0; i < COUNT(characters); i++) {
        const size_t length = strlen(characters[i].written);
        if (strncmp(text, characters[i].written, length) == 0) {
            lee_text_add(out, "%s", characters[i].read);
            return length;
        }
    }
    lee_text_add(out, "%c", *text);
    return 1;
}

/* The unit as UDUNITS should read it. */
static lee_text mend(const char *unit) {
    lee_text out = {0};
    const char *whole = mended_as(strlen(unit), unit);
    if (whole != NULL) {
        lee_text_add(&out, "%s", whole);
        return out;
    }
    while (*unit != '\0') {
        const size_t length = word_length(unit);
        const char *word = length > 0 ? mended_as(length, unit) : NULL;
        if (length == 0) {
            unit += add_character(&out, unit);
            continue;
        }
        if (word != NULL) {
            lee_text_add(&out, "(%s)", word);
        } else {
            lee_text_add(&out, "%.*s", (int)length, unit);
        }
        unit += length;
    }
    return out;
}

static lee_status not_known(const char *unit, lee_error *error) {
    char shown[LEE_SHOWN];
    return lee_fail(error, LEE_ERR_FORMAT, "unit '%s' is not known",
                    lee_text_show(strlen(unit), unit, shown));
}

/* Refuses what UDUNITS would read as something nobody means: a blank, a
 * number ("15 knots" as a unit), a date count, a row of `refused`. */
static lee_status check_unit(const char *unit, lee_error *error) {
    if (*unit == '\0') {
        return lee_fail(error, LEE_ERR_FORMAT, "the unit is blank");
    }
    const bool has_number =
        is_digit(*unit) || *unit == '.' || *unit == '-' || *unit == '+';
    const bool is_one = *unit == '1' && (unit[1] == '\0' || unit[1] == '/');
    if ((has_number && !is_one) || strchr(unit, '@') != NULL ||
        strstr(unit, " since ") != NULL) {
        return not_known(unit, error);
    }
    for (size_t i = 0; i < COUNT(refused); i++) {
        if (strcmp(unit, refused[i].written) == 0) {
            return lee_fail(error, LEE_ERR_FORMAT,
                            "unit '%s' means %s; write %s", unit,
                            refused[i].means, refused[i].write);
        }
    }
    return LEE_OK;
}

/* The system of units, read once and kept to the end of the process: reading
 * it takes milliseconds and UDUNITS keeps state of its own anyway. This is
 * the one variable of the library that outlives a call. */
static lee_status unit_system(ut_system **system, lee_error *error) {
    static ut_system *kept;
    if (kept == NULL) {
        (void)ut_set_error_message_handler(ut_ignore);
        kept = ut_read_xml(NULL);
    }
    if (kept == NULL) {
        return lee_fail(error, LEE_ERR_FILE,
                        "the unit database of UDUNITS-2 cannot be read; "
                        "install libudunits2-0 or set UDUNITS2_XML_PATH");
    }
    *system = kept;
    return LEE_OK;
}

static lee_status parse_unit(ut_system *system, const char *unit,
                             ut_unit **parsed, lee_error *error) {
    lee_text text = mend(unit);
    if (text.has_failed) {
        lee_text_free(&text);
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a unit");
    }
    *parsed = ut_parse(system, text.bytes, UT_UTF8);
    lee_text_free(&text);
    return *parsed == NULL ? not_known(unit, error) : LEE_OK;
}

/* Angles are plain numbers to UDUNITS. Here 10 degrees are no 17 percent:
 * the quotient of two alike units is free of radians. */
static bool is_angle_for_number(const ut_unit *from, const ut_unit *to) {
    char definition[128] = "";
    ut_unit *quotient = ut_divide(from, to);
    if (quotient == NULL) {
        return false; /* units with an offset: temperatures */
    }
    const int length = ut_format(quotient, definition, sizeof definition,
                                 UT_ASCII | UT_DEFINITION);
    ut_free(quotient);
    return length > 0 && strstr(definition, "rad") != NULL;
}

/* Factor and offset of a converter; false when it is not a straight line.
 * UDUNITS bends in two ways, and both end at infinity: the reciprocal (from
 * seconds to hertz) at 0, logarithm and exponential at 0 or far out. */
static bool straight_line(const cv_converter *converter, lee_conversion *line) {
    /* 2^64: beside it the offset of a temperature is lost to rounding. */
    static const double span = 18446744073709551616.0;
    const double at_zero = cv_convert_double(converter, 0.0);
    const double at_one = cv_convert_double(converter, 1.0);
    const double at_span = cv_convert_double(converter, span);
    line->offset = at_zero;
    line->factor = at_zero == 0.0 ? at_one : (at_span - at_zero) / span;
    return isfinite(at_zero) && isfinite(at_span) && line->factor > 0.0;
}

static bool convert(ut_unit *from, ut_unit *to, lee_conversion *line) {
    if (!ut_are_convertible(from, to) || is_angle_for_number(from, to)) {
        return false;
    }
    cv_converter *converter = ut_get_converter(from, to);
    if (converter == NULL) {
        return false;
    }
    const bool is_line = straight_line(converter, line);
    cv_free(converter);
    return is_line;
}

/* Conversion between two trimmed units, in the C locale. */
static lee_status find_conversion(const char *from, const char *to,
                                  lee_conversion *conversion,
                                  lee_error *error) {
    ut_unit *source = NULL;
    ut_unit *target = NULL;
    ut_system *system = NULL;
    lee_status status = unit_system(&system, error);
    if (status == LEE_OK) {
        status = parse_unit(system, to, &target, error);
    }
    if (status == LEE_OK) {
        status = parse_unit(system, from, &source, error);
    }
    lee_conversion line = {0};
    if (status == LEE_OK && convert(source, target, &line)) {
        *conversion = line;
    } else if (status == LEE_OK) {
        char shown[LEE_SHOWN];
        status = lee_fail(error, LEE_ERR_FORMAT,
                          "unit '%s' cannot be converted to %s",
                          lee_text_show(strlen(from), from, shown),
                          strcmp(to, "1") == 0 ? "a plain number" : to);
    }
    ut_free(source);
    ut_free(target);
    return status;
}

lee_status lee_unit_conversion(const char *from, const char *to,
                               lee_conversion *conversion, lee_error *error) {
    const locale_t plain = newlocale(LC_ALL_MASK, "C", (locale_t)0);
    char *source = lee_text_trimmed(from);
    char *target = lee_text_trimmed(to);
    lee_status status = LEE_OK;
    if (plain == (locale_t)0 || source == NULL || target == NULL) {
        status = lee_fail(error, LEE_ERR_MEMORY, "no room for a unit");
        goto done;
    }
    status = check_unit(source, error);
    if (status == LEE_OK) {
        /* In a locale with a decimal comma UDUNITS cannot read its database. */
        const locale_t callers = uselocale(plain);
        status = find_conversion(source, target, conversion, error);
        (void)uselocale(callers);
    }

done:
    free(target);
    free(source);
    if (plain != (locale_t)0) {
        freelocale(plain);
    }
    return status;
}
