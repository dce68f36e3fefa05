/* print.c - text for reading: quantities with their units, rows, notes. */
#include "output/print.h"

#include <errno.h>
#include <math.h>
#include <stdarg.h>
#include <stdbool.h>
#include <string.h>

#include "base/constants.h"
#include "output/note_units.h"

#include "leewater/calendar.h"

enum { LINE_WIDTH = 80, LABEL_WIDTH = 16 };

/* Bytes of a row or a sentence: room for a path and for words around it. */
enum { LONGEST_TEXT = 4096 + 512 };

static const double foot = 0.3048;       /* m (international foot, 1959)     */
static const double mile = 1609.344;     /* m (5280 feet)                    */
static const double acre = 4046.8564224; /* m2 (43560 square feet)           */
static const double mile_hour = 0.44704; /* m s-1 (mile per 3600 s)          */

static bool is_us(const lee_printer *to) {
    return to->units == LEE_UNITS_US;
}

const char *lee_length_unit(const lee_printer *to) {
    return is_us(to) ? "ft" : "m";
}

/* Adding 0.0 turns a rounded -0.0 into 0.0, so no "-0.000" is shown. */
static double rounded(double value, double step) {
    return round(value / step) * step + 0.0;
}

lee_cell lee_show_bare_length(const lee_printer *to, double metres) {
    lee_cell cell;
    if (isnan(metres)) {
        (void)snprintf(cell.text, sizeof cell.text, "dry");
    } else if (is_us(to)) {
        (void)snprintf(cell.text, sizeof cell.text, "%.2f",
                       rounded(metres / foot, 0.01));
    } else {
        (void)snprintf(cell.text, sizeof cell.text, "%.3f",
                       rounded(metres, 0.001));
    }
    return cell;
}

lee_cell lee_show_length(const lee_printer *to, double metres) {
    const lee_cell bare = lee_show_bare_length(to, metres);
    if (isnan(metres)) {
        return bare;
    }
    lee_cell cell;
    (void)snprintf(cell.text, sizeof cell.text, "%.40s %s", bare.text,
                   lee_length_unit(to));
    return cell;
}

lee_cell lee_show_height(const lee_printer *to, double metres) {
    lee_cell cell;
    const double value =
        is_us(to) ? rounded(metres / foot, 0.01) : rounded(metres, 0.001);
    (void)snprintf(cell.text, sizeof cell.text, "%.12g %s", value,
                   lee_length_unit(to));
    return cell;
}

lee_cell lee_show_small(const lee_printer *to, double metres) {
    lee_cell cell;
    if (is_us(to)) {
        /* rounded as notes are, which tell the same in SI */
        (void)snprintf(
            cell.text, sizeof cell.text, "%.*f ft", metres < 0.1 ? 4 : 2,
            (metres < 0.1 ? 1e-4 * round(1e4 * metres) : metres) / foot);
    } else if (metres >= 0.1) {
        (void)snprintf(cell.text, sizeof cell.text, "%.2f m", metres);
    } else {
        (void)snprintf(cell.text, sizeof cell.text, "%.1f mm", 1e3 * metres);
    }
    return cell;
}

static bool has_range(const lee_ranged *ranged) {
    return !isnan(ranged->low) || !isnan(ranged->high);
}

lee_cell lee_show_range_only(const lee_printer *to, const lee_ranged *ranged) {
    lee_cell cell = {{0}};
    if (has_range(ranged)) {
        (void)snprintf(cell.text, sizeof cell.text, "(%.24s to %.24s)",
                       lee_show_bare_length(to, ranged->low).text,
                       lee_show_bare_length(to, ranged->high).text);
    }
    return cell;
}

lee_cell lee_show_ranged(const lee_printer *to, const lee_ranged *ranged) {
    lee_cell cell;
    (void)snprintf(cell.text, sizeof cell.text, "%.24s%s%.36s",
                   lee_show_length(to, ranged->value).text,
                   has_range(ranged) ? " " : "",
                   lee_show_range_only(to, ranged).text);
    return cell;
}

const char *lee_distance_unit(const lee_printer *to) {
    return is_us(to) ? "mi" : "km";
}

lee_cell lee_show_bare_distance(const lee_printer *to, double metres) {
    lee_cell cell;
    (void)snprintf(cell.text, sizeof cell.text, "%.2f",
                   rounded(metres / (is_us(to) ? mile : 1000.0), 0.01));
    return cell;
}

lee_cell lee_show_distance(const lee_printer *to, double metres) {
    lee_cell cell;
    (void)snprintf(cell.text, sizeof cell.text, "%.40s %s",
                   lee_show_bare_distance(to, metres).text,
                   lee_distance_unit(to));
    return cell;
}

lee_cell lee_show_area(const lee_printer *to, double area) {
    lee_cell cell;
    (void)snprintf(cell.text, sizeof cell.text, "%.4g %s",
                   area / (is_us(to) ? mile * mile : 1e6),
                   is_us(to) ? "mi2" : "km2");
    return cell;
}

lee_cell lee_show_volume(const lee_printer *to, double volume) {
    lee_cell cell;
    (void)snprintf(cell.text, sizeof cell.text, "%.5g %s",
                   volume / (is_us(to) ? 1e3 * acre * foot : 1e6),
                   is_us(to) ? "thousand acre-feet" : "million m3");
    return cell;
}

const char *lee_speed_unit(const lee_printer *to) {
    return is_us(to) ? "mph" : "m/s";
}

lee_cell lee_show_bare_speed(const lee_printer *to, double speed) {
    lee_cell cell;
    (void)snprintf(cell.text, sizeof cell.text, "%.1f",
                   rounded(speed / (is_us(to) ? mile_hour : 1.0), 0.1));
    return cell;
}

lee_cell lee_show_speed(const lee_printer *to, double speed) {
    lee_cell cell;
    (void)snprintf(cell.text, sizeof cell.text, "%.40s %s",
                   lee_show_bare_speed(to, speed).text, lee_speed_unit(to));
    return cell;
}

lee_cell lee_show_bare_direction(double radians) {
    lee_cell cell;
    const double degrees = fmod(rounded(radians * 180.0 / lee_pi, 0.1), 360.0);
    const double turned = (degrees < 0.0 ? degrees + 360.0 : degrees) + 0.0;
    const bool is_whole = fabs(turned - round(turned)) < 0.05;
    (void)snprintf(cell.text, sizeof cell.text, "%.*f", is_whole ? 0 : 1,
                   is_whole ? fmod(round(turned), 360.0) : turned);
    return cell;
}

double lee_compass_degrees(double radians) {
    const double degrees = fmod(radians * 180.0 / lee_pi, 360.0);
    return degrees < 0.0 ? degrees + 360.0 : degrees;
}

double lee_whole_degrees(double radians) {
    const double degrees = fmod(round(radians * 180.0 / lee_pi), 360.0);
    return (degrees < 0.0 ? degrees + 360.0 : degrees) + 0.0;
}

lee_cell lee_show_link(const lee_correction *link, int decimals) {
    lee_cell cell;
    if (link->turn != 0.0) {
        (void)snprintf(cell.text, sizeof cell.text, "%s %+.1f degrees",
                       link->name, link->turn * 180.0 / lee_pi);
    } else {
        (void)snprintf(cell.text, sizeof cell.text, "%s x %.*f", link->name,
                       decimals, link->factor);
    }
    return cell;
}

lee_cell lee_show_direction(double radians) {
    lee_cell cell;
    (void)snprintf(cell.text, sizeof cell.text, "%.0f degrees",
                   lee_whole_degrees(radians));
    return cell;
}

/* Two neighbouring units: 130 min -> "2 h 10 min"; a zero is not said. */
static lee_cell two_units(int64_t count, int64_t each, const char *large,
                          const char *small) {
    lee_cell cell;
    const long long whole = (long long)(count / each);
    const long long rest = (long long)(count % each);
    if (rest == 0) {
        (void)snprintf(cell.text, sizeof cell.text, "%lld %s", whole, large);
    } else {
        (void)snprintf(cell.text, sizeof cell.text, "%lld %s %lld %s", whole,
                       large, rest, small);
    }
    return cell;
}

lee_cell lee_show_duration(double seconds) {
    lee_cell cell;
    if (!isfinite(seconds) || fabs(seconds) > 1e15) {
        (void)snprintf(cell.text, sizeof cell.text, "not known");
        return cell;
    }
    const int64_t minutes = llround(seconds / 60.0);
    if (minutes < 2) {
        (void)snprintf(cell.text, sizeof cell.text, "%.0f s", seconds);
        return cell;
    }
    if (minutes < 60) {
        (void)snprintf(cell.text, sizeof cell.text, "%lld min",
                       (long long)minutes);
        return cell;
    }
    if (minutes < INT64_C(48) * 60) {
        return two_units(minutes, 60, "h", "min");
    }
    return two_units(llround(seconds / 3600.0), 24, "d", "h");
}

lee_cell lee_show_time(int64_t time) {
    lee_cell cell;
    char text[LEE_TIME_TEXT];
    (void)snprintf(cell.text, sizeof cell.text, "%s",
                   lee_time_format_short(time, text));
    return cell;
}

const char *lee_datum_of(const lee_case *from) {
    const char *datum = from->problem.lake.datum;
    return datum != NULL ? datum : "the datum";
}

size_t lee_text_width(const char *text) {
    size_t width = 0;
    for (; *text != '\0'; text++) {
        width += ((unsigned char)*text & 0xC0) != 0x80;
    }
    return width;
}

/* Names and titles come from files: control bytes in them are shown as '?'. */
static void put_text(const lee_printer *to, size_t length, const char *text) {
    for (size_t i = 0; i < length; i++) {
        const unsigned char byte = (unsigned char)text[i];
        (void)fputc(byte < 0x20 || byte == 0x7F ? '?' : byte, to->stream);
    }
}

void lee_print_padded(const lee_printer *to, const char *text, size_t width) {
    const size_t used = lee_text_width(text);
    put_text(to, strlen(text), text);
    (void)fprintf(to->stream, "%*s", (int)(used < width ? width - used : 0),
                  "");
}

static bool is_digit(char c) {
    return c >= '0' && c <= '9';
}

/* Bytes of `text` that fit a line of `room` characters, ending at a blank. A
 * number stays with its unit unless that leaves no blank to end at; a single
 * word that is too long stays whole. */
static size_t line_length(const char *text, size_t room) {
    size_t best = 0; /* the last blank that follows no number */
    size_t any = 0;  /* the last blank                        */
    size_t word = 0; /* where the last word begins            */
    size_t width = 0;
    size_t i = 0;
    for (; text[i] != '\0' && (width <= room || any == 0); i++) {
        if (text[i] == ' ') {
            any = i;
            best = is_digit(text[word]) ? best : i;
            word = i + 1;
        }
        width += ((unsigned char)text[i] & 0xC0) != 0x80;
    }
    if (width <= room || any == 0) {
        return i;
    }
    return best > 0 ? best : any;
}

/* Prints from the column `indent` on, and continues there on further lines. */
static void put_lines(const lee_printer *to, size_t indent, const char *text) {
    for (bool is_first = true; is_first || *text != '\0'; is_first = false) {
        const size_t length = line_length(text, LINE_WIDTH - indent);
        (void)fprintf(to->stream, "%*s", is_first ? 0 : (int)indent, "");
        put_text(to, length, text);
        (void)fputc('\n', to->stream);
        text += length;
        text += *text == ' ';
    }
}

void lee_print_wrapped(const lee_printer *to, size_t indent, const char *mark,
                       const char *text) {
    const size_t marked = strlen(mark);
    (void)fprintf(to->stream, "%*s%s", (int)(indent - marked), "", mark);
    put_lines(to, indent, text);
}

void lee_print_sentence(const lee_printer *to, size_t indent, const char *mark,
                        const char *format, ...) {
    char text[LONGEST_TEXT];
    va_list arguments;
    va_start(arguments, format);
    (void)vsnprintf(text, sizeof text, format, arguments);
    va_end(arguments);
    lee_print_wrapped(to, indent, mark, text);
}

void lee_print_row(const lee_printer *to, const char *label, const char *format,
                   ...) {
    char text[LONGEST_TEXT];
    va_list arguments;
    va_start(arguments, format);
    (void)vsnprintf(text, sizeof text, format, arguments);
    va_end(arguments);
    (void)fputs("  ", to->stream);
    lee_print_padded(to, label, LABEL_WIDTH);
    (void)fputs("  ", to->stream);
    put_lines(to, LABEL_WIDTH + 4, text);
}

void lee_print_note(const lee_printer *to, const char *mark, const char *lead,
                    const char *note) {
    char text[LONGEST_TEXT];
    lee_print_sentence(to, 4, mark, "%s%s", lead,
                       lee_note_in_units(note, to->units, sizeof text, text));
}

void lee_print_note_row(const lee_printer *to, const char *label,
                        const char *lead, const char *note) {
    char text[LONGEST_TEXT];
    lee_print_row(to, label, "%s%s", lead,
                  lee_note_in_units(note, to->units, sizeof text, text));
}

void lee_print_notes(const lee_printer *to, const char *heading,
                     const lee_notes *notes) {
    if (notes->n == 0) {
        return;
    }
    (void)fprintf(to->stream, "\n%s\n", heading);
    for (size_t i = 0; i < notes->n; i++) {
        lee_print_note(to, "- ", "", notes->text[i]);
    }
}

lee_status lee_print_end(const lee_printer *to, lee_error *error) {
    if (fflush(to->stream) != 0 || ferror(to->stream)) {
        return lee_fail(error, LEE_ERR_FILE, "cannot write: %s",
                        errno != 0 ? strerror(errno) : "output failed");
    }
    return LEE_OK;
}
