/* json_parts.h - what every JSON summary carries. */
#ifndef LEEWATER_OUTPUT_JSON_PARTS_H
#define LEEWATER_OUTPUT_JSON_PARTS_H

#include <stdint.h>

#include "formats/json.h"
#include "leewater/case.h"
#include "leewater/series.h"

/* Opens the root: program, version, command. */
void lee_json_begin(lee_json *json, const char *command);

/* Case, title, lake, datum, still water, remarks of the reader. */
void lee_json_put_case(lee_json *json, const lee_case *from,
                       double still_water);

void lee_json_put_method(lee_json *json, const lee_method *method);

/* The list "winds" of a steady result. */
void lee_json_put_winds(lee_json *json, const lee_case *from,
                        const lee_steady_result *result);

/* Caution and limits, the last keys of every document. */
void lee_json_put_caution(lee_json *json);

/* A number and its range: `name` and `range` as keys; a value that is NaN is
 * null, and `"reason": "dry"` follows. */
void lee_json_put_ranged(lee_json *json, const char *name, const char *range,
                         const lee_ranged *ranged);

/* ISO 8601, UTC; null when `is_known` is false. */
void lee_json_put_time(lee_json *json, const char *name, bool is_known,
                       int64_t time);

/* Radians as degrees of [0, 360). */
void lee_json_put_degrees(lee_json *json, const char *name, double radians);

/* A list of sentences. */
void lee_json_put_notes(lee_json *json, const char *name,
                        const lee_notes *notes);

#endif
