/* steady_march.h - one connected water: from a windward edge to its lee, and
 * the edge that holds a given volume. */
#ifndef LEEWATER_SETUP_STEADY_MARCH_H
#define LEEWATER_SETUP_STEADY_MARCH_H

#include "setup/steady_leg.h"

/* The axis as the solver sees it; row i is where leg i begins. */
typedef struct lee_reach {
    size_t n; /* legs */
    lee_leg *leg;
} lee_reach;

/* The room of one water: from the crest or wall at row `left` to that at row
 * `right`. Thin water within runs to a sink; with several sinks the crests
 * between them lie below the water. */
typedef struct lee_room {
    size_t left;
    size_t right;
    size_t first_sink;
    size_t last_sink;
} lee_room;

/* Where a march stopped. */
typedef enum lee_march_end {
    LEE_MARCH_SHORT,  /* dry before the last sink: a crest parts the water */
    LEE_MARCH_INSIDE, /* at a shore or wall past the last sink             */
    LEE_MARCH_OVER    /* still wet at the right crest                      */
} lee_march_end;

typedef struct lee_march {
    lee_march_end end;
    double volume; /* m3, of the room */
    double x;      /* where it stopped */
    size_t leg;    /* leg on which it stopped */
} lee_march;

typedef void lee_visit_piece(void *user, const lee_piece *piece);

/* Marches through a room.
 *
 *   start  where it begins: depth at the left wall when positive, else minus
 *          the place of the dry edge in rows from the left one (2.25: a
 *          quarter along the third leg), which keeps its digits on any bank
 *   visit  called for each piece in order of x; may be NULL */
lee_march lee_march_through(const lee_reach *reach, const lee_room *room,
                            double start, lee_visit_piece *visit, void *user);

/* How a volume fits its room. */
typedef enum lee_fit_kind {
    LEE_FIT_INSIDE,
    LEE_FIT_SHORT, /* less than covers the inner crests: `leg` is where the
                      march stopped short                                 */
    LEE_FIT_OVER_LEFT,
    LEE_FIT_OVER_RIGHT
} lee_fit_kind;

typedef struct lee_fit {
    lee_fit_kind kind;
    double start;  /* of the fitting water, or of the one at the limit */
    double volume; /* its volume */
    size_t leg;
} lee_fit;

/* Finds the start that holds `volume` (> 0, may be INFINITY when the left row
 * is no wall), as near as a double can name it: where sheets of water are
 * marched against the wind two neighbouring starts may hold volumes far apart
 * (fit->volume tells).
 *
 *   guess  start to try first
 *   area   plan area, m2, for the second try; 0 when unknown */
void lee_march_fit(const lee_reach *reach, const lee_room *room, double volume,
                   double guess, double area, lee_fit *fit);

#endif
