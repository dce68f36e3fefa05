/* steady_leg.h - the exact steady surface over one segment of a profile.
 *
 * Along a segment bed and width are linear and the wind's part a is constant:
 *
 *     dH/dx = a/H - m
 *
 * With t defined by dx = H dt this is linear, dH/dt = a - m H, so depth and
 * place are explicit in t, also where H falls to zero as a square root, and
 * the level rises by a in each unit of t (derived; docs/theory.md). Heights
 * are metres above still water; the way of march is towards growing x. */
#ifndef LEEWATER_SETUP_STEADY_LEG_H
#define LEEWATER_SETUP_STEADY_LEG_H

#include <stdbool.h>
#include <stddef.h>

/* One segment under a wind. */
typedef struct lee_leg {
    double x;        /* m, where it begins                                */
    double length;   /* m                                                 */
    double bed;      /* m, where it begins                                */
    double slope;    /* m: the bed's rise with x                          */
    double width;    /* m, where it begins                                */
    double widening; /* the width's growth with x                         */
    double full;     /* a of the full wind, m                             */
    double drive;    /* a of the present wind, m                          */
    double cross;    /* |a| of the full wind across the axis, m           */
    bool has_film;   /* thin water cannot climb here: the film rule holds */
    int way;         /* where thin water goes: 1 with x, -1 against it    */
} lee_leg;

/* Puts the leg under `share` of the full wind.
 *
 * Film rule: where the bed rises with the wind by m and 2a/m <= 0.25 m, the
 * surface is no steeper than m/2, so that water thinner than 2a/m slides
 * back; without it a film of depth a/m would climb for ever. Gentler slopes
 * are flooded. The transient engine keeps the same rule. */
void lee_leg_blow(lee_leg *leg, double share);

/* The part of a leg that still water covers; empty when from == to. */
typedef struct lee_cover {
    double from; /* m, x */
    double to;
    double area; /* m2 */
} lee_cover;
lee_cover lee_leg_still(const lee_leg *leg);

/* A part of a leg with one formula for the depth. */
typedef struct lee_piece {
    double x;
    double bed;
    double slope;
    double width;
    double widening;
    double cross; /* of its leg                       */
    double depth; /* where it begins, m               */
    double drive; /* a, m; of a curved piece          */
    double fall;  /* dH/dx; of a straight piece       */
    double span;  /* t of a curved piece, else metres */
    bool is_curved;
} lee_piece;

/* A place on a piece. */
typedef struct lee_spot {
    double x;
    double depth;
    double level;
    double width;
} lee_spot;

/* The place at `share` (0 to 1) of a piece's span. */
lee_spot lee_piece_at(const lee_piece *piece, double share);

/* Level `distance` metres behind the piece's beginning. */
double lee_piece_level(const lee_piece *piece, double distance);

/* Share of the span at which the level is zero; outside 0 to 1 or not finite
 * when it is not on the piece. */
double lee_piece_node(const lee_piece *piece);

/* Integral of width times depth, to rounding. */
double lee_piece_volume(const lee_piece *piece);

/* What crossing a leg led to. */
typedef struct lee_crossing {
    size_t count;
    lee_piece piece[2];
    double offset; /* where the march stopped: the leg's end or a shore */
    double depth;
    bool is_dry; /* the depth fell to zero at x */
} lee_crossing;

/* Marches from depth `depth` (>= 0), `offset` metres behind the leg's
 * beginning, to its end. */
lee_crossing lee_leg_cross(const lee_leg *leg, double offset, double depth);

#endif
