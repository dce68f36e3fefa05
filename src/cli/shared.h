/* shared.h - what several commands do alike. */
#ifndef LEEWATER_CLI_SHARED_H
#define LEEWATER_CLI_SHARED_H

#include "leewater/status.h"
#include "leewater/stress.h"

/* The drag relation of this name.
 * Errors: LEE_ERR_ARGUMENT, naming the nearest one. */
lee_status find_relation(const char *name, const lee_drag_relation **relation,
                         lee_error *error);

/* 0 for `first`, 1 for `second`, -1 for any other word. */
int choose(const char *word, const char *first, const char *second);

/* An angle brought into [0, 2 pi). */
double turn_of(double angle);

#endif
