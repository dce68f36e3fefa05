/* print.h - text for reading: quantities with their units, rows, notes. */
#ifndef LEEWATER_OUTPUT_PRINT_H
#define LEEWATER_OUTPUT_PRINT_H

#include <stddef.h>
#include <stdint.h>
#include <stdio.h>

#include "leewater/output.h"
#include "leewater/series.h"
#include "leewater/status.h"

typedef struct lee_printer {
    FILE *stream;
    lee_unit_system units;
} lee_printer;

/* One quantity as text, returned by value: no buffers at the caller's. */
typedef struct lee_cell {
    char text[64];
} lee_cell;

/* Levels and depths to the millimetre or a hundredth of a foot, "dry" for
 * NaN: "0.412 m", "1.35 ft". */
lee_cell lee_show_length(const lee_printer *to, double metres);

/* "0.412 m (0.310 to 0.550)"; without range only the value. */
lee_cell lee_show_ranged(const lee_printer *to, const lee_ranged *ranged);

/* Its range alone, "(0.310 to 0.550)"; empty when there is none. */
lee_cell lee_show_range_only(const lee_printer *to, const lee_ranged *ranged);

/* The bare number of lee_show_length, and its unit, "m" or "ft". */
lee_cell lee_show_bare_length(const lee_printer *to, double metres);
const char *lee_length_unit(const lee_printer *to);

/* Heights and depths as they were given, as fine as levels, no zeros at the
 * end: "10 m", "4.25 m", "13.12 ft". */
lee_cell lee_show_height(const lee_printer *to, double metres);

/* Errors of computation: "0.5 mm", "0.0017 ft"; from 0.1 m on "0.35 m",
 * "1.15 ft". */
lee_cell lee_show_small(const lee_printer *to, double metres);

/* Chainage, fetch, width: "11.80 km", "7.33 mi"; the bare number; the unit. */
lee_cell lee_show_distance(const lee_printer *to, double metres);
lee_cell lee_show_bare_distance(const lee_printer *to, double metres);
const char *lee_distance_unit(const lee_printer *to);

/* "25.3 km2", "9.77 mi2"; "113.33 million m3", "91.88 thousand acre-feet". */
lee_cell lee_show_area(const lee_printer *to, double area);
lee_cell lee_show_volume(const lee_printer *to, double volume);

/* "22.0 m/s", "49.2 mph"; the bare number; the unit. */
lee_cell lee_show_link(const lee_correction *link, int decimals);
lee_cell lee_show_speed(const lee_printer *to, double speed);
lee_cell lee_show_bare_speed(const lee_printer *to, double speed);
const char *lee_speed_unit(const lee_printer *to);

/* Degrees of a wind that was given, to a tenth when not whole: "22.5". */
lee_cell lee_show_bare_direction(double radians);

/* Radians as degrees of [0, 360). */
double lee_compass_degrees(double radians);

/* Radians as whole degrees of [0, 360); "240 degrees". */
double lee_whole_degrees(double radians);
lee_cell lee_show_direction(double radians);

/* "35 s", "45 min", "2 h 10 min", "3 d 4 h". */
lee_cell lee_show_duration(double seconds);

/* "2031-01-10 06:30 UTC". */
lee_cell lee_show_time(int64_t time);

/* "Marrow gauge zero", or "the datum" when a lake has none. */
const char *lee_datum_of(const lee_case *from);

/* A row of a block: "  label               words". */
void lee_print_row(const lee_printer *to, const char *label, const char *format,
                   ...) LEE_PRINTF(3, 4);

/* `text` and blanks up to `width` characters (not bytes). */
void lee_print_padded(const lee_printer *to, const char *text, size_t width);

/* Characters in UTF-8 text: bytes that do not continue another. */
size_t lee_text_width(const char *text);

/* Text broken at blanks to lines of 80 characters, each indented; the first
 * begins with `mark` inside the indentation. */
void lee_print_wrapped(const lee_printer *to, size_t indent, const char *mark,
                       const char *text);

/* The same of a formatted text. Both take no memory that could run out. */
void lee_print_sentence(const lee_printer *to, size_t indent, const char *mark,
                        const char *format, ...) LEE_PRINTF(4, 5);

/* A note as an item marked "- " or the like, `lead` in front of its text; its
 * quantities in the units of the text, as in the next two. */
void lee_print_note(const lee_printer *to, const char *mark, const char *lead,
                    const char *note);

/* A row that tells a note. */
void lee_print_note_row(const lee_printer *to, const char *label,
                        const char *lead, const char *note);

/* A heading and its notes, or nothing when there are none. */
void lee_print_notes(const lee_printer *to, const char *heading,
                     const lee_notes *notes);

/* Title, lake, still water. `still_water` in m above the datum. */
void lee_print_head(const lee_printer *to, const lee_case *from,
                    double still_water);

/* What stands behind the numbers; then stated limits and caution. */
void lee_print_method(const lee_printer *to, const lee_method *method);
void lee_print_caution(const lee_printer *to);

/* LEE_OK, or LEE_ERR_FILE when anything could not be written. */
lee_status lee_print_end(const lee_printer *to, lee_error *error);

#endif
