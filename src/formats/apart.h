/* apart.h - reading done in a child process, where a crash costs a message.
 *
 * Some libraries end the process, or never return, on damaged files. Here the
 * reader runs in a forked child with limits and hands its result back through
 * a pipe. Fork before any thread is started. The child's own messages on
 * standard error are thrown away. */
#ifndef LEEWATER_FORMATS_APART_H
#define LEEWATER_FORMATS_APART_H

#include <stddef.h>

#include "leewater/status.h"

/* Bytes that grow. {0} is empty. */
typedef struct lee_parcel {
    size_t length;
    size_t room;
    char *bytes;
} lee_parcel;

/* Adds bytes; LEE_ERR_MEMORY without room. */
lee_status lee_parcel_add(lee_parcel *parcel, const void *bytes, size_t length,
                          lee_error *error);
void lee_parcel_free(lee_parcel *parcel);

/* Limits of the child. 0: none. */
typedef struct lee_apart_limits {
    unsigned processor_seconds;
    unsigned seconds;   /* by the clock on the wall */
    unsigned mebibytes; /* of addresses; not kept under sanitizers, which take
                           terabytes of them */
} lee_apart_limits;

/* Limits for reading a file of this many bytes: time for a slow disk, but not
 * for ever. */
lee_apart_limits lee_apart_usual_limits(const char *path);

/* What the child does: puts what it finds into the parcel. */
typedef lee_status lee_apart_work(const void *subject, lee_parcel *found,
                                  lee_error *error);

/* Does the work in a child process and brings its parcel, or its error, back.
 *
 *   path     the file that messages name
 *   found    out: free with lee_parcel_free
 *
 * Errors: those of the work; LEE_ERR_FORMAT when the child dies or exceeds
 * its limits: "path: is damaged ..."; LEE_ERR_INTERRUPTED when it was
 * interrupted, unless the caller ignores that; LEE_ERR_MEMORY when no child can
 * be had, or it was killed from outside. */
lee_status lee_apart(const char *path, const lee_apart_limits *limits,
                     lee_apart_work *work, const void *subject,
                     lee_parcel *found, lee_error *error);

#endif
