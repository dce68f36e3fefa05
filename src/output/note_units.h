/* note_units.h - the quantities of a note in the units of the text. */
#ifndef LEEWATER_OUTPUT_NOTE_UNITS_H
#define LEEWATER_OUTPUT_NOTE_UNITS_H

#include <stddef.h>

#include "leewater/output.h"

/* Writes the sentence into text[size], size above 0, with its quantities in
 * `units`, and cuts what finds no room; returns text. Notes are made
 * in SI, as JSON and CSV want them: a number, a blank, and one of m/s, km, mm,
 * m or degC ("0.2 m", "5 to 12 m/s"). Text between single quotes is a name
 * and stays. Numbers are rounded to
 * what the note knew of them: "22.4 m/s" is "50 mph". */
char *lee_note_in_units(const char *note, lee_unit_system units, size_t size,
                        char text[]);

#endif
