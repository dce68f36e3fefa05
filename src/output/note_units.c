/* note_units.c - the quantities of a note in the units of the text. */
#include "output/note_units.h"

#include <math.h>
#include <stdarg.h>
#include <stdbool.h>
#include <stdio.h>
#include <string.h>

#include "base/number.h"

/* A unit of notes and what stands for it. */
typedef struct exchange {
    const char *si;
    const char *us;
    double factor; /* from the one to the other */
    double zero;   /* what 0 of the SI unit is  */
    int most;      /* decimals worth telling below 1 */
} exchange;

/* A number of a note: its bytes, and its last digit. */
typedef struct number {
    size_t length;
    double value;
    int decimals;
    bool has_plus;
} number;

/* Text being written; what finds no room is cut. */
typedef struct page {
    size_t size;
    size_t length;
    char *text;
} page;

LEE_PRINTF(2, 3)
static void add(page *text, const char *format, ...) {
    const size_t room = text->size - text->length;
    va_list arguments;
    va_start(arguments, format);
    const int wanted =
        vsnprintf(text->text + text->length, room, format, arguments);
    va_end(arguments);
    if (wanted > 0) {
        text->length += (size_t)wanted < room ? (size_t)wanted : room - 1;
    }
}

static bool is_digit(char c) {
    return c >= '0' && c <= '9';
}

static bool is_letter(char c) {
    return (c >= 'a' && c <= 'z') || (c >= 'A' && c <= 'Z');
}

static size_t digits_of(const char *text) {
    size_t n = 0;
    while (is_digit(text[n])) {
        n++;
    }
    return n;
}

/* "12", "-0.25", "+3": as notes write them. */
static bool read_number(const char *text, number *found) {
    const size_t sign = text[0] == '+' || text[0] == '-';
    const size_t whole = digits_of(text + sign);
    size_t length = sign + whole;
    size_t decimals = 0;
    if (whole == 0) {
        return false;
    }
    if (text[length] == '.' && is_digit(text[length + 1])) {
        decimals = digits_of(text + length + 1);
        length += 1 + decimals;
    }
    *found = (number){.length = length,
                      .decimals = (int)decimals,
                      .has_plus = text[0] == '+'};
    return lee_number_parse(length, text, '.', &found->value);
}

/* Mile per hour, mile, foot (international, 1959); degree Fahrenheit. */
static const exchange exchanges[] = {
    {"m/s",  "mph",  1.0 / 0.44704,     0.0,  1},
    {"km",   "mi",   1000.0 / 1609.344, 0.0,  2},
    {"mm",   "ft",   0.001 / 0.3048,    0.0,  4},
    {"m",    "ft",   1.0 / 0.3048,      0.0,  2},
    {"degC", "degF", 1.8,               32.0, 1},
};

/* "m" ends in "5 m, then" but not in "5 min", "5 m/s", "5 m2" or "5 m-1". */
static bool is_end_of_unit(char next) {
    return next == '\0' ||
           (!is_digit(next) && !is_letter(next) && strchr("/-^", next) == NULL);
}

/* The exchange for the unit behind a number, " m"; NULL for any other text. */
static const exchange *exchange_at(const char *text) {
    if (text[0] != ' ') {
        return NULL;
    }
    for (size_t i = 0; i < sizeof exchanges / sizeof exchanges[0]; i++) {
        const char *unit = exchanges[i].si;
        const size_t length = strlen(unit);
        if (strncmp(text + 1, unit, length) == 0 &&
            is_end_of_unit(text[1 + length])) {
            return &exchanges[i];
        }
    }
    return NULL;
}

/* No digit that the note did not know; below 1 as many as it knew, for there
 * the last one counts. */
static int decimals_of(const number *from, const exchange *by, double value) {
    const double known = -log10(pow(10.0, -from->decimals) * by->factor);
    return fabs(value) >= 1.0 ? (int)fmax(0.0, floor(known))
                              : (int)fmin(by->most, fmax(0.0, ceil(known)));
}

static void add_exchanged(const number *from, const exchange *by, page *text) {
    const double value = from->value * by->factor + by->zero;
    add(text, "%s%.*f", from->has_plus ? "+" : "", decimals_of(from, by, value),
        value + 0.0);
}

/* Length of " to " and its like between the two numbers of a span. */
static size_t joint_of(const char *text) {
    static const char *const joints[] = {" to ", " and ", " or "};
    for (size_t i = 0; i < sizeof joints / sizeof joints[0]; i++) {
        if (strncmp(text, joints[i], strlen(joints[i])) == 0) {
            return strlen(joints[i]);
        }
    }
    return 0;
}

/* Adds the quantity that `note` begins with, or the span of two, "5 to 12
 * m/s"; returns its length, 0 when there is none. */
static size_t add_quantity(const char *note, page *text) {
    number first;
    number second;
    if (!read_number(note, &first)) {
        return 0;
    }
    const exchange *by = exchange_at(note + first.length);
    if (by != NULL) {
        add_exchanged(&first, by, text);
        add(text, " %s", by->us);
        return first.length + 1 + strlen(by->si);
    }
    const size_t joint = joint_of(note + first.length);
    const char *other = note + first.length + joint;
    if (joint == 0 || !read_number(other, &second)) {
        return 0;
    }
    by = exchange_at(other + second.length);
    if (by == NULL) {
        return 0;
    }
    add_exchanged(&first, by, text);
    add(text, "%.*s", (int)joint, note + first.length);
    add_exchanged(&second, by, text);
    add(text, " %s", by->us);
    return first.length + joint + second.length + 1 + strlen(by->si);
}

/* Length of a name between single quotes; 0 when there is none. Apostrophes
 * stand inside words, which are passed over whole. */
static size_t name_length(const char *note) {
    const char *end = note[0] == '\'' ? strchr(note + 1, '\'') : NULL;
    return end != NULL ? (size_t)(end + 1 - note) : 0;
}

/* Length of the word, number or sign that `note` begins with, at least 1. */
static size_t word_length(const char *note) {
    size_t n = 1;
    while (note[n] != '\0' && strchr(" (", note[n]) == NULL) {
        n++;
    }
    return strchr(" (", note[0]) != NULL ? 1 : n;
}

char *lee_note_in_units(const char *note, lee_unit_system units, size_t size,
                        char text[]) {
    page out = {.size = size, .text = text};
    text[0] = '\0';
    if (units == LEE_UNITS_SI) {
        add(&out, "%s", note);
        return text;
    }
    while (*note != '\0') {
        const size_t quantity = add_quantity(note, &out);
        const size_t name = quantity > 0 ? 0 : name_length(note);
        const size_t kept = name > 0 ? name : word_length(note);
        if (quantity == 0) {
            add(&out, "%.*s", (int)kept, note);
        }
        note += quantity > 0 ? quantity : kept;
    }
    return text;
}
