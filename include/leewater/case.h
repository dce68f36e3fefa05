/* case.h - the case file: what a user writes down (docs/formats.md). */
#ifndef LEEWATER_CASE_H
#define LEEWATER_CASE_H

#include "leewater/series.h"
#include "leewater/status.h"

/* A case as read. Owns everything. */
typedef struct lee_case {
    char *path;
    char *title; /* may be NULL, like the next three */
    char *institution;
    char *creator;
    char *license;
    lee_notes notes;  /* remarks on what was read, for every output */
    lee_notes inputs; /* paths of the files it was read from, its own first:
                         no output replaces one of them */
    lee_problem problem;
} lee_case;

/* Reads a case file and the files it names (relative to the case file).
 * Everything is read and checked for form; nothing is computed. Up to 20
 * problems are gathered, one a line, as "case.yaml:4:3: unknown key 'fech' in
 * 'lake'; did you mean 'fetch'?".
 * Errors: LEE_ERR_FILE, LEE_ERR_FORMAT, LEE_ERR_DATA, LEE_ERR_MEMORY. */
lee_status lee_case_read(const char *path, lee_case *problem_case,
                         lee_error *error);
void lee_case_free(lee_case *problem_case);

#endif
