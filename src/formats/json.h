/* json.h - building a JSON document and writing it, by jansson: valid in every
 * locale and for every input. Keys keep the order in which they were put. */
#ifndef LEEWATER_FORMATS_JSON_H
#define LEEWATER_FORMATS_JSON_H

#include <stdbool.h>
#include <stddef.h>
#include <stdio.h>

#include "leewater/status.h"

enum { LEE_JSON_DEPTH = 16 }; /* objects and lists that can stand open */

/* A document in the making. {0} is empty. Owns what it points to. A failure is
 * kept in `has_failed` and told by lee_json_write; later calls do nothing. */
typedef struct lee_json {
    struct json_t *open[LEE_JSON_DEPTH]; /* the innermost last */
    size_t depth;
    bool has_failed;
} lee_json;

/* Opens an object or a list under `key` (NULL: the root, or in a list), and
 * closes the innermost one. The root stays. */
void lee_json_open_object(lee_json *json, const char *key);
void lee_json_open_list(lee_json *json, const char *key);
void lee_json_close(lee_json *json);

/* Puts a value under `key` (NULL in a list). A number that is not finite and a
 * text that is NULL become null; bytes that are not UTF-8 become U+FFFD. */
void lee_json_put_number(lee_json *json, const char *key, double value);
void lee_json_put_count(lee_json *json, const char *key, size_t value);
void lee_json_put_flag(lee_json *json, const char *key, bool value);
void lee_json_put_text(lee_json *json, const char *key, const char *text);

/* Writes the document, numbers to 9 digits, with a newline at its end, and
 * empties `json` whether or not that went well.
 * Errors: LEE_ERR_FILE, LEE_ERR_MEMORY. */
lee_status lee_json_write(lee_json *json, FILE *stream, lee_error *error);

/* Drops a document that will not be written. Safe on {0}. */
void lee_json_discard(lee_json *json);

#endif
