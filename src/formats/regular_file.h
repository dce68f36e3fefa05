/* regular_file.h - the files that are read: regular ones, and no others. */
#ifndef LEEWATER_FORMATS_REGULAR_FILE_H
#define LEEWATER_FORMATS_REGULAR_FILE_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/status.h"

/* Opens a regular file for reading. Never waits: a pipe that nobody writes to
 * is refused like any other.
 *
 *   descriptor  out: close() it; -1 after an error
 *   size        out: bytes
 *
 * Errors, all beginning "path: ": LEE_ERR_FILE (missing, a directory, a pipe
 * or a device, not to be read). */
lee_status lee_regular_open(const char *path, int *descriptor, size_t *size,
                            lee_error *error);

/* Whether two paths lead to one and the same file, however they are spelt and
 * through whatever links, hard or symbolic. False when either leads nowhere. */
bool lee_is_same_file(const char *left, const char *right);

#endif
