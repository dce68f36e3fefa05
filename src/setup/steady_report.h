/* steady_report.h - what a settled lake tells: waters, nodes, surface. */
#ifndef LEEWATER_SETUP_STEADY_REPORT_H
#define LEEWATER_SETUP_STEADY_REPORT_H

#include "setup/steady_pools.h"

#include "leewater/setup.h"

/* The exact surface behind lee_steady_level_at. */
typedef struct lee_surface {
    double origin;      /* chainage of the solver's x = 0       */
    double sense;       /* 1, or -1 when the axis was mirrored  */
    double still_water; /* m above the datum                    */
    size_t pieces;
    lee_piece *piece; /* [pieces] of the waters told, in order of x */
} lee_surface;

/* Fills `steady`, all but `along`, from pools that are settled. What was
 * filled before a failure is freed by lee_steady_free.
 * Errors: LEE_ERR_MEMORY. */
lee_status lee_steady_report(const lee_steady_input *input,
                             const lee_pools *pools, bool is_mirrored,
                             lee_steady *steady, lee_error *error);

#endif
