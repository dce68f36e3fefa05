/* whole_file.h - a small regular file, read whole. */
#ifndef LEEWATER_FORMATS_WHOLE_FILE_H
#define LEEWATER_FORMATS_WHOLE_FILE_H

#include <stddef.h>

#include "leewater/status.h"

/* Reads a regular file of at most `mebibytes` MiB.
 *
 *   bytes   out: [length], free() it; not terminated
 *   length  out
 *
 * Errors, all beginning "path: ": LEE_ERR_FILE (missing, a directory, not
 * regular, unreadable); LEE_ERR_FORMAT when larger; LEE_ERR_MEMORY. */
lee_status lee_whole_file_read(const char *path, size_t mebibytes, char **bytes,
                               size_t *length, lee_error *error);

#endif
