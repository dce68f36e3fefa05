/* atomic_file.h - files that appear whole or not at all. */
#ifndef LEEWATER_FORMATS_ATOMIC_FILE_H
#define LEEWATER_FORMATS_ATOMIC_FILE_H

#include <stdbool.h>
#include <stdio.h>

#include "leewater/status.h"

/* {0} is closed. Owns everything. */
typedef struct lee_atomic_file {
    FILE *stream; /* write here */
    char *path;
    char *temporary; /* beside the target; NULL when stream is stdout */
    bool may_replace;
} lee_atomic_file;

/* Opens a temporary file beside `path`; "-" is stdout. An existing regular
 * file needs `force`; anything but a regular or a new file is refused (the
 * file behind a symbolic link is judged and replaced).
 * Errors: LEE_ERR_FILE, LEE_ERR_MEMORY. */
lee_status lee_atomic_open(const char *path, bool force, lee_atomic_file *file,
                           lee_error *error);

/* Checks the stream, flushes, syncs, closes and renames. On failure the
 * temporary file is gone and the target is as it was. Without `force` a file
 * that appeared meanwhile is kept and it is an error.
 * Errors: LEE_ERR_FILE. */
lee_status lee_atomic_commit(lee_atomic_file *file, lee_error *error);

/* Drops what was written. Safe after commit and on {0}. */
void lee_atomic_discard(lee_atomic_file *file);

#endif
