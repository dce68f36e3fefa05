/* transient_internal.h - what the files of the transient engine share.
 *
 * Arrays run over nodes or links with the run index still to come: a later
 * engine for many runs puts it innermost. Heights inside count from
 * `reference`, a whole number of metres near the bed, so that a lake far
 * above its datum loses no digits. */
#ifndef LEEWATER_SETUP_TRANSIENT_INTERNAL_H
#define LEEWATER_SETUP_TRANSIENT_INTERNAL_H

#include <stdint.h>
#include <string.h>

#include "base/sum.h"
#include "leewater/setup.h"

/* What moves. One is kept, one is tried; accepting swaps them. `speed` has a
 * ghost on either side: speed[-1] and speed[links] belong to the ends. */
typedef struct transient_state {
    double *level;  /* [nodes] m above the reference; the bed where dry */
    double *volume; /* [nodes] m3, >= 0                                  */
    double *speed;  /* [links] m s-1; 0 on closed links                  */
} transient_state;

/* One end of the reach. */
typedef struct transient_end {
    bool is_held;
    double given;  /* m above the reference, at the end of the step      */
    double weight; /* of the neighbour in the node's level: the line from
                      the given level at the face to the neighbour        */
} transient_end;

struct lee_transient {
    lee_transient_options options;
    const lee_channel *channel; /* borrowed */
    size_t nodes;
    size_t links;
    double reference; /* m above the datum */
    double *pool;     /* all arrays below  */

    /* fixed, [nodes] */
    double *bed;  /* m above the reference */
    double *area; /* m2                    */
    double *inverse_area;

    /* fixed, [links] */
    double *link_bed;     /* m above the reference        */
    double *closing_bed;  /* higher bed of the two nodes  */
    double *width;        /* m                            */
    double *inverse_step; /* 1/spacing, m-1               */
    double *rise;         /* g (z_r - z_l)/spacing, m s-2 */

    transient_state now;
    transient_state next;
    double *shown_level; /* [nodes] m above the datum */
    double time;         /* s */
    lee_sum inflow;      /* m3 */
    transient_end start;
    transient_end end;
    lee_transient_counts counts;
    bool has_limited; /* the last try */

    /* of one step, [links] but where said */
    lee_forcing forcing;
    double *push;      /* lambda tau/rho, m2 s-2                        */
    double *middle;    /* [nodes] level that the depths are taken from  */
    double *depth;     /* m, of the flow; <= 0 when closed              */
    double *per_depth; /* 1/max(depth, dry depth), m-1                  */
    double *friction;  /* C_f                                           */
    double *carried;   /* b H u, m3 s-1, with ghosts                    */
    double *section;   /* W: width times the depth that may flow, m2    */
    double *predicted; /* speed at theta without new levels, m s-1      */
    double *response;  /* speed at theta gained for a level step of 1 m */
    double *transport; /* Q over the step, m3 s-1                       */
    double *share;     /* [nodes] d_i = offset_i + share_i d_(i+1)      */
    double *offset;    /* [nodes] m                                     */
};

static inline double larger(double a, double b) {
    return a > b ? a : b;
}

static inline double smaller(double a, double b) {
    return a < b ? a : b;
}

/* x^(-1/3) for positive normal x, to a few units of rounding. A first value
 * comes from the bits: a third of the exponent, taken from a constant found by
 * trial for the least error (3.5 %). Then twice
 *
 *     r <- r (1 + e/3 + 2 e^2/9 + 14 e^3/81),   e = 1 - x r^3,
 *
 * the binomial series of (1 - e)^(-1/3), whose error is of the order of e^4.
 * No state, no division, no call. */
static inline double inverse_cube_root(double x) {
    uint64_t bits;
    memcpy(&bits, &x, sizeof bits);
    bits = UINT64_C(0x553ee00000000000) - bits / 3;
    double r;
    memcpy(&r, &bits, sizeof r);
    for (int k = 0; k < 2; k++) {
        const double e = 1.0 - x * (r * r * r);
        r += r * e * (1.0 / 3.0 + e * (2.0 / 9.0 + e * (14.0 / 81.0)));
    }
    return r;
}

lee_status lee_transient_check(const lee_channel *channel,
                               const lee_transient_options *options,
                               lee_error *error);

/* Fills the levels that are told; where dry, the bed to the bit. */
void lee_transient_show(lee_transient *engine);

/* Tries a step of dt from `now` into `next` with the forcing as filled;
 * depths are those of the levels middle[nodes], which may be now.level.
 * Returns the largest |u| dt/dx over open links, NaN when a level is not
 * finite. */
double lee_transient_try(lee_transient *engine, double dt,
                         const double middle[]);

/* Depths and flow sections of the linear variant, from the levels of `now`. */
void lee_transient_freeze(lee_transient *engine);

/* Cuts transports so that no node gives more than it holds and receives, and
 * the speeds with them. Returns true when it had to. */
bool lee_transient_limit(lee_transient *engine, double dt);

#endif
