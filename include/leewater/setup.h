/* setup.h - wind set-up: closed forms, steady levels, the transient engine. */
#ifndef LEEWATER_SETUP_H
#define LEEWATER_SETUP_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/basin.h"
#include "leewater/status.h"

/* ---- bed friction ---- */

typedef enum lee_bed_kind {
    LEE_BED_NONE,
    LEE_BED_MANNING,   /* n, s m-1/3: C_f = g n^2 / H^(1/3)                 */
    LEE_BED_CHEZY,     /* C, m1/2 s-1: C_f = g / C^2                        */
    LEE_BED_ROUGHNESS, /* z0, m: C_f = [kappa / (ln(H/z0) - 1)]^2           */
    LEE_BED_DRAG,      /* C_f                                               */
    LEE_BED_LINEAR     /* r, s-1: tau_b = rho H r u                         */
} lee_bed_kind;

typedef struct lee_bed_law {
    lee_bed_kind kind;
    double value;
} lee_bed_law;

/* Quadratic bed coefficient C_f at depth H (m, > 0), tau_b = rho C_f |u| u.
 * 0 for LEE_BED_NONE and LEE_BED_LINEAR. The log law is held at H = 10 z0
 * below that depth. Sources beside each law in docs/theory.md. */
double lee_bed_coefficient(const lee_bed_law *law, double depth,
                           double gravity);

/* Return-flow factor lambda, 1 - tau_b/tau_s: the shear that the return flow
 * puts on the bed of a closed basin adds to the wind. */
typedef struct lee_return_flow {
    bool is_computed; /* 1 + sqrt(C_f)/kappa, at most 1.5; else `value`     */
    double value;     /* >= 1                                               */
} lee_return_flow;

/* lambda for a mean depth (m, > 0) by the rule:
 *
 *     lambda = 1 + sqrt(C_f)/0.40, at most 1.5
 *
 * C_f = 0 gives 1. `forced_to_one` for relations fitted on set-up itself and
 * for lakes with a held end when computed.
 * Source: exact for the parabolic eddy viscosity; 3/2 is that of a constant
 * one over a bed without slip (both derived; docs/theory.md). */
double lee_return_flow_factor(const lee_return_flow *rule,
                              const lee_bed_law *bed, double depth,
                              double gravity, bool forced_to_one);

/* ---- closed forms and handbook formulas ---- */

/* a = lambda tau / (rho g), m; every function propagates NaN. */

/* Uniform depth h, length L, closed, volume kept: H^2 = H0^2 + 2 a x.
 * Returns rise at the lee wall and fall at the windward wall (negative; -h
 * when dry), node, wet length; all by bisection to rounding.
 * Source: first integral of d(eta)/dx = a/H (derived; docs/theory.md). */
typedef struct lee_parabola {
    double set_up;     /* m, lee wall                        */
    double set_down;   /* m, windward wall, -h when dried    */
    double node;       /* m from the windward wall, level = still water */
    double wet_length; /* m */
} lee_parabola;
lee_parabola lee_closed_parabola(double a, double length, double depth);

/* Open end at the windward side held at still water, uniform depth:
 * eta(L) = h (sqrt(1 + 2 a L/h^2) - 1). Dean & Dalrymple (1991) [dean1991]. */
double lee_open_uniform(double a, double length, double depth);

/* Open end, depth falling evenly from h0 to 0 over L: level at the shore.
 * x/L = (1 - H/h0) - A ln[(H/h0 - A)/(1 - A)], A = a L/h0^2 < 1
 * NaN for A outside [0, 1).
 * Source: Dean & Dalrymple (1991) [dean1991] (from memory, derived again;
 * docs/theory.md). */
double lee_open_slope(double a, double length, double depth);

/* What a handbook's number stands for. */
typedef enum lee_formula_result {
    LEE_RESULT_TILT, /* lee level minus windward level                      */
    LEE_RESULT_RISE  /* lee level above still water                         */
} lee_formula_result;

/* One handbook formula for set-up over a fetch F with mean depth D. */
typedef struct lee_formula {
    const char *name;
    const char *source;
    lee_formula_result says;    /* what its source says it returns        */
    lee_formula_result matches; /* what it equals with C10 of 1.5-2.5e-3  */
    double speed_min;           /* m s-1; 0 and INFINITY where the      */
    double speed_max;           /*   source states no range             */
    bool is_from_memory;        /* a constant of it was not re-read     */
    /* U m s-1 at 10 m, F m, D m, g m s-2 -> m */
    double (*set_up)(double speed, double fetch, double depth, double gravity);
} lee_formula;
const lee_formula *lee_formula_find(const char *name);
const lee_formula *lee_formula_at(size_t index);

/* ---- steady levels ---- */

typedef struct lee_steady_input {
    const lee_profile *profile;
    double still_water;   /* m above the datum */
    double stress[2];     /* east, north, Pa */
    double return_flow;   /* lambda, >= 1; the estimates of series.h fold it
                             into the stress and give 1 here */
    double water_density; /* kg m-3 */
    double gravity;       /* m s-2 */
    double dry_depth;     /* m, 0.01 by default: thinner water counts as dry */
    double start_level;   /* held level at the first chainage; NaN: wall */
    double end_level;     /* held level at the last chainage; NaN: wall;
                             at most one may be held */
} lee_steady_input;

/* One connected water of the equilibrium. Owns `node`. */
typedef struct lee_steady_water {
    double from; /* m, chainage of its shores, where the depth is zero; a
                    shore beyond the profile is a wall at its end */
    double to;
    double set_up;    /* highest level minus still water, m */
    double set_up_at; /* chainage, m */
    double set_down;  /* lowest level minus still water, m */
    double set_down_at;
    double tilt; /* set_up - set_down, m */
    size_t node_count;
    double *node;         /* [node_count] chainages where level = still water */
    double volume;        /* m3 */
    double volume_defect; /* |V - V0| / max(integral b|eta|/2, 1 mm area);
                             0 with a held end; far below 1e-10 but where
                             winds of two ways along a bent axis drive sheets
                             of water, which a double cannot always place */
    double first_period;  /* s, of the water at rest in the still lake that
                             holds this stretch; NaN when it has no area */
    bool was_parted;      /* its still water fell apart under the wind */
} lee_steady_water;

/* Owns its arrays. */
typedef struct lee_steady {
    size_t count;
    lee_steady_water *water; /* [count] in order of chainage; may be 0 */
    size_t n;
    double *x;         /* [n] m: the surface drawn, all profile rows in; not
                      decreasing */
    double *level;     /* [n] m above the datum; NaN where dry */
    double dry_length; /* m of the still lake's wetted axis fallen dry */
    double cross_tilt; /* largest lambda |tau_n| b/(rho g H), m, where the
                          water is at least half as deep as on average:
                          nearer the beaches it means nothing */
    double cross_tilt_at;
    bool has_sill;  /* waters stand apart, spilled or joined over a crest of
                       the bed, other than at rest */
    bool is_parted; /* waters stand apart that no crest of the bed parts: where
                       a shoal or a bend fell dry, or up a gentle shore */
    double along;   /* area-mean of projected stress over full stress,
                       -1 to 1; |along| < 0.01: wind across the axis */
    struct lee_surface *surface; /* exact, for lee_steady_level_at */
} lee_steady;

/* Equilibrium levels d(eta)/dx = lambda tau_x/(rho g H) on the profile itself,
 * crossed segment by segment in closed form; volume of each connected water
 * kept; shores dry and flood. Over sills the limit of a wind grown slowly from
 * rest: a pool spills only while its lee level stands above its crest, and
 * keeps its volume once parted. On a bed that rises with the wind by m, where
 * 2a/m <= 0.25 m with a = lambda tau/(rho g), the surface is no steeper than
 * m/2 (film rule; the transient engine keeps it too). Without stress the lake
 * is at rest.
 * Errors: LEE_ERR_ARGUMENT, LEE_ERR_DATA (a faulty profile, no water at this
 * still water, a held level below the bed), LEE_ERR_CONVERGENCE and
 * LEE_ERR_MEMORY; `steady` is then empty. */
lee_status lee_steady_solve(const lee_steady_input *input, lee_steady *steady,
                            lee_error *error);
void lee_steady_free(lee_steady *steady);

/* Level at chainage x, exact; NaN where dry or off the axis. */
double lee_steady_level_at(const lee_steady *steady, double x);

/* Chainage of the highest bed between two neighbouring waters; NaN when it is
 * no crest: nowhere above the deepest places of both. */
double lee_steady_crest(const lee_profile *profile, const lee_steady_water *a,
                        const lee_steady_water *b);

/* Lowest and highest level of a surface over a stretch of the axis. */
typedef struct lee_level_extremes {
    double lowest; /* m above the datum; NaN where all is dry */
    double highest;
} lee_level_extremes;
lee_level_extremes lee_steady_extremes(const lee_steady *steady, double from,
                                       double to);

/* The water whose first period is asked for. */
typedef struct lee_period_input {
    const lee_profile *profile;
    double level;    /* m above the datum, at rest */
    double x;        /* a chainage that it covers, m */
    double gravity;  /* m s-2 */
    bool start_held; /* levels held at the axis' ends, when it reaches them */
    bool end_held;
} lee_period_input;

/* First natural period, s: smallest omega^2 > 0 of
 *
 *     -(Q'/b)' = omega^2 Q/(g A),   Q = 0 at walls, Q' = 0 at held ends
 *
 * on two grids by Richardson's rule. Within 0.1 % on smooth beds. NaN when x
 * is dry or off the axis.
 * Errors: LEE_ERR_ARGUMENT, LEE_ERR_DATA (a faulty profile), LEE_ERR_MEMORY.
 * Source: Chrystal (1905) [chrystal1905], derived again. */
lee_status lee_first_period(const lee_period_input *input, double *period,
                            lee_error *error);

/* ---- transient engine ---- */

typedef struct lee_transient_options {
    double gravity;
    double water_density;
    double return_flow; /* lambda >= 1: bed acts as
                            rho C_f |u| u - (lambda - 1) tau_s; the estimates
                            of series.h fold it into the stress, lambda tau_s,
                            which is the same, and give 1 here */
    lee_bed_law bed;
    double theta;       /* 0.52 by default */
    double dry_depth;   /* m, 0.01 by default */
    bool has_advection; /* on by default */
    double film_drag;   /* C_f added in water thinner than 0.1 m, growing
                           evenly from 0 there to this where there is none; 0
                           by default. Without it wind drives a film at tens
                           of m s-1 under a linear law or none, which let go
                           of thin water */
    bool is_linear;     /* levels move, depths stay those of the start; no
                            advection, no film rule, linear friction only:
                            for checks and screening */
    bool start_held;    /* the level at the first face of the axis is given
                            by the forcing; the first node lies on the line
                            from there to its neighbour */
    bool end_held;
} lee_transient_options;

lee_transient_options lee_transient_defaults(void);

/* Forcing at one instant. The arrays belong to the engine, the callback fills
 * them. */
typedef struct lee_forcing {
    double *stress;            /* [links] Pa along growing chainage */
    double *pressure_gradient; /* [links] Pa m-1; both zero unless filled */
    double start_level;        /* m, for held ends; NaN unless filled */
    double end_level;
} lee_forcing;

/* Fills `forcing` for time t (s, on the clock that lee_transient_start set).
 * Asked in the middle of each step: stress and pressure are then the mean of
 * whatever is linear or held over the step, and a mean that changes between
 * steps is never asked for at the moment of its change. With a held end asked
 * at the end of the step first, for its level only. A step that is halved
 * asks for each half. */
typedef void lee_forcing_at(void *user, double t, lee_forcing *forcing);

typedef struct lee_transient lee_transient;

/* A solver for one run. The channel is borrowed and must outlive it. One
 * reach of one class; other channels are LEE_ERR_ARGUMENT.
 * Scheme: docs/theory.md. Free with lee_transient_free. */
lee_status lee_transient_new(const lee_channel *channel,
                             const lee_transient_options *options,
                             lee_transient **engine, lee_error *error);
void lee_transient_free(lee_transient *engine);

/* Puts the engine at time t with the given levels (m; nodes at or below their
 * bed are dry) and no current. level[nodes]. */
void lee_transient_start(lee_transient *engine, double t, const double level[]);

/* Pours volume[nodes] (m3; negative takes away, at most what the node holds)
 * into the nodes between two steps, currents unchanged: a pool that rises or
 * falls, rain. Counts as inflow. Not for the linear variant, whose depths
 * stay. */
void lee_transient_pour(lee_transient *engine, const double volume[]);

/* Advances by dt. Halves the step by itself where the current asks for it.
 * Errors: LEE_ERR_ARGUMENT when dt is not positive and finite or the forcing
 * is not finite; LEE_ERR_CONVERGENCE when even the fifth halving is too long
 * or a level is not finite. The engine then stands at the last time it
 * reached, in a sound state: lee_transient_time. */
lee_status lee_transient_step(lee_transient *engine, double dt,
                              lee_forcing_at *forcing_at, void *user,
                              lee_error *error);

double lee_transient_time(const lee_transient *engine);
const double *
lee_transient_level(const lee_transient *engine); /* [nodes] m; bed where dry */
const double *
lee_transient_speed(const lee_transient *engine); /* [links] m s-1 */
/* [links] m3 s-1, mean of the last step taken; 0 before the first */
const double *lee_transient_transport(const lee_transient *engine);
double lee_transient_volume(const lee_transient *engine); /* m3 */
/* m3 through held ends and poured, since the start */
double lee_transient_inflow(const lee_transient *engine);

/* Level of the water at chainage x: linear between nodes that are wet (deeper
 * than the dry depth); towards a wall or a held end the line of the last two
 * wet nodes goes on, second order like the rest; in the last wet cell before
 * a shore the level of its node holds to the cell's end, for the line of a
 * film may lie below the bed. NaN off the axis, in a dry cell, and where the
 * line stands less than the dry depth over the cell's bed, which is a line
 * too: through the node and the inner faces. */
double lee_transient_level_at(const lee_transient *engine, double x);

/* How the steps went since the start. */
typedef struct lee_transient_counts {
    size_t steps;         /* taken, halves counted each              */
    size_t second_passes; /* tries repeated with depths of mid-step  */
    size_t halvings;      /* tries given up for two of half length   */
    size_t limited;       /* steps in which a transport was cut      */
} lee_transient_counts;
lee_transient_counts lee_transient_count(const lee_transient *engine);

#endif
