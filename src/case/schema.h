/* schema.h - reading a mapping of the case file by a table of its keys. */
#ifndef LEEWATER_CASE_SCHEMA_H
#define LEEWATER_CASE_SCHEMA_H

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "case/problems.h"
#include "formats/yaml.h"

#include "leewater/status.h"

/* What is being read, and what was wrong so far. */
typedef struct lee_case_reader {
    const char *path;
    char where[128];              /* "lake.axis"; empty at the top  */
    const lee_yaml_node *mapping; /* the mapping that `where` names */
    bool has_no_room;
    bool is_apart; /* NetCDF files are read in a child process */
    lee_case_problems problems;
    lee_notes inputs; /* paths of the files that were named, owned */
} lee_case_reader;

typedef struct lee_key lee_key;
typedef struct lee_key_section lee_key_section;

/* Reads the value `node` of `key` into the struct `into`; what is wrong goes
 * to the reader's problems. */
typedef void lee_key_read(lee_case_reader *reader, const lee_yaml_node *node,
                          const lee_key *key, void *into);

/* One key of a mapping. Fields that its reader does not ask for stay zero. */
struct lee_key {
    const char *name;
    lee_key_read *read;
    size_t offset;    /* of the target in `into`                  */
    const char *unit; /* of ranges and messages; "1": a number    */
    const char *si;   /* what is stored; NULL: `unit`             */
    double low;       /* range in `unit`                          */
    double high;
    const char *word;         /* may stand instead of a value,            */
    double word_value;        /*   and what is then stored                */
    const char *const *words; /* choices in order of enumerators, then NULL */
    const lee_key_section *section; /* keys of the mapping inside         */
    int stands_for; /* the enumerator that a key stands for     */
    bool is_above;  /* `low` itself is outside                  */
    bool is_required;
};

/* Two keys: they exclude each other, or the first needs the second. */
typedef struct lee_key_pair {
    const char *key;
    const char *other;
} lee_key_pair;

struct lee_key_section {
    const lee_key *keys;
    size_t count;
    const lee_key_pair *excluded; /* ended by {NULL, NULL}; may be NULL */
    const lee_key_pair *needs;    /* the same                          */
};

/* Reads a mapping: each key once by its reader, unknown ones refused with the
 * nearest known, required ones missed, pairs checked. `where` is its dotted
 * name, "" at the top. */
void lee_key_read_mapping(lee_case_reader *reader, const lee_yaml_node *node,
                          const char *where, const lee_key_section *section,
                          void *into);

/* A problem of a value: "'lake.bed' " and the formatted rest. `name` is the
 * key inside the mapping being read. */
void lee_key_problem(lee_case_reader *reader, const lee_yaml_node *node,
                     const char *name, const char *format, ...)
    LEE_PRINTF(4, 5);

/* A value that `error` says cannot be read: a problem, or no room. */
void lee_key_unreadable(lee_case_reader *reader, const lee_yaml_node *node,
                        const lee_key *key, const lee_error *error);

/* "a single value", "a list" or "a mapping". */
const char *lee_key_kind(const lee_yaml_node *node);

/* The value's text when it is a single one that is not empty; else a problem
 * and NULL. */
const char *lee_key_scalar(lee_case_reader *reader, const lee_yaml_node *node,
                           const lee_key *key);

/* A quantity by the key's unit and range, in `si`. False after a problem. */
bool lee_key_value(lee_case_reader *reader, const lee_yaml_node *node,
                   const lee_key *key, double *value);

/* Readers for tables; the target's type stands behind each. */
lee_key_read lee_key_quantity;   /* double                             */
lee_key_read lee_key_seconds;    /* int64_t; whole seconds             */
lee_key_read lee_key_count;      /* size_t                             */
lee_key_read lee_key_flag;       /* bool: on, yes, true; off, no, false */
lee_key_read lee_key_choice;     /* an enumeration; `words`            */
lee_key_read lee_key_text;       /* char *, owned                      */
lee_key_read lee_key_borrow;     /* const char *, borrowed from node   */
lee_key_read lee_key_section_of; /* the struct of `section`'s keys   */

#endif
