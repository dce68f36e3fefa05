/* yaml.h - a tree of a YAML file: mappings, lists and strings with their line
 * and column. Scalars stay text until a schema reads them.
 *
 * Refused: anchors, aliases, tags, merge keys, keys that are not one word
 * (quotes allowed, so that JSON reads too), a second document, more than
 * 1 MiB, depth 32 or 200 000 nodes, invalid UTF-8, a duplicate key. */
#ifndef LEEWATER_FORMATS_YAML_H
#define LEEWATER_FORMATS_YAML_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/status.h"

typedef enum lee_yaml_kind {
    LEE_YAML_SCALAR,
    LEE_YAML_LIST,
    LEE_YAML_MAPPING
} lee_yaml_kind;

typedef struct lee_yaml_node lee_yaml_node;
struct lee_yaml_node {
    lee_yaml_kind kind;
    size_t line;   /* from 1 */
    size_t column; /* from 1 */
    char *key;     /* in a mapping: its key; else NULL */
    size_t key_line;
    size_t key_column;
    char *text;    /* of a scalar, terminated */
    bool is_plain; /* a scalar without quotes */
    size_t count;
    lee_yaml_node **child; /* [count] of a list or mapping, in order */
};

/* Reads a regular file. Errors: LEE_ERR_FILE, LEE_ERR_FORMAT ("path:line:
 * column: ..."), LEE_ERR_MEMORY. Free with lee_yaml_free. */
lee_status lee_yaml_read(const char *path, lee_yaml_node **root,
                         lee_error *error);
void lee_yaml_free(lee_yaml_node *root);

/* The child of a mapping with this key, or NULL. */
const lee_yaml_node *lee_yaml_get(const lee_yaml_node *mapping,
                                  const char *key);

#endif
