/* steady_pools.h - the waters of a lake while the wind grows from rest: they
 * part over sills that fall dry, spill over crests and join. */
#ifndef LEEWATER_SETUP_STEADY_POOLS_H
#define LEEWATER_SETUP_STEADY_POOLS_H

#include "setup/steady_march.h"

#include "leewater/status.h"

/* One water, or a dry hollow when its volume is zero. */
typedef struct lee_pool {
    size_t first; /* catchments it covers */
    size_t last;
    double volume; /* m3; INFINITY with a held end */
    double start;  /* as lee_march_through takes it */
    bool is_held;
    bool is_settled;
    bool is_full_left; /* it spilled there under the present wind */
    bool is_full_right;
} lee_pool;

/* The axis cut into catchments of thin water: catchment j runs from row
 * crest[j] to row crest[j + 1] and drains to row sink[j]. Owns its arrays. */
typedef struct lee_pools {
    lee_reach reach;
    double start_level; /* m above still water at row 0; NaN: a wall */
    size_t catchments;
    size_t *crest; /* [reach.n + 2] */
    size_t *sink;  /* [reach.n + 1] */
    size_t count;
    lee_pool *pool;  /* [reach.n + 1] in order of x */
    lee_pool *kept;  /* [reach.n + 1] scratch */
    double volume;   /* m3, of the closed waters at rest             */
    double miss;     /* largest part of its volume that a fit missed */
    size_t partings; /* how often a sill fell dry                    */
    double spilled;  /* m3 that went over land from pool to pool     */
} lee_pools;

/* Room for an axis of n legs, to be filled by the caller.
 * Errors: LEE_ERR_MEMORY. */
lee_status lee_pools_init(lee_pools *pools, size_t n, lee_error *error);
void lee_pools_free(lee_pools *pools);

/* Fills the lake to still water (level 0), then lets a held end's level in.
 * Errors: LEE_ERR_CONVERGENCE. */
lee_status lee_pools_rest(lee_pools *pools, lee_error *error);

/* Lets the wind grow from rest to its full strength.
 * Errors: LEE_ERR_CONVERGENCE, LEE_ERR_MEMORY. */
lee_status lee_pools_blow(lee_pools *pools, lee_error *error);

/* The room that a pool covers. */
lee_room lee_pools_room(const lee_pools *pools, const lee_pool *pool);

#endif
