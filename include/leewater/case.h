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
 * NetCDF files are read in the caller's process: they should be trusted, for a
 * damaged one can end it inside the NetCDF library.
 * Errors: LEE_ERR_FILE, LEE_ERR_FORMAT, LEE_ERR_DATA, LEE_ERR_MEMORY. */
lee_status lee_case_read(const char *path, lee_case *problem_case,
                         lee_error *error);

/* The same, with NetCDF files read in a child process with limits on time and
 * memory, so that a damaged one costs an error and no more. It forks: call it
 * before any thread starts. The program reads its cases by this one.
 * Errors: those of lee_case_read, and LEE_ERR_INTERRUPTED. */
lee_status lee_case_read_apart(const char *path, lee_case *problem_case,
                               lee_error *error);
void lee_case_free(lee_case *problem_case);

#endif
