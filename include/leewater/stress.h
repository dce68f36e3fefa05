/* stress.h - from the wind at 10 m over open water to the surface stress. */
#ifndef LEEWATER_STRESS_H
#define LEEWATER_STRESS_H

#include <stdbool.h>
#include <stddef.h>

#include "leewater/status.h"

/* Density of fresh water at temperature T (K), kg m-3; 273.15 to 423.15 K,
 * NaN outside. Kell (1975), J. Chem. Eng. Data 20, 97-105 [kell1975]. */
double lee_water_density(double temperature);

/* Density of dry air at pressure p (Pa) and temperature T (K), kg m-3:
 * p / (287.05 T) (common practice, gas constant of dry air in J kg-1 K-1). */
double lee_air_density(double pressure, double temperature);

/* Density of moist air at pressure p (Pa), temperature T (K) and relative
 * humidity h (0 to 1), kg m-3, with 400 ppm of carbon dioxide:
 *     rho = p Ma / (Z R T) (1 - x (1 - Mv/Ma))
 * x being the share of vapour and Z the compressibility. NaN when p or T is
 * not above 0 or h is outside 0 to 1.
 * Picard et al. (2008), CIPM-2007 [picard2008]; made for 15 to 27 degC and 600
 * to 1100 hPa, smooth and close to other formulas outside. */
double lee_moist_air_density(double pressure, double temperature,
                             double humidity);

/* Kinematic viscosity of dry air at temperature T (K), m2 s-1; -173 to 277
 * degC, NaN outside:
 *     1.326e-5 (1 + 6.542e-3 t + 8.301e-6 t^2 - 4.84e-9 t^3), t in degC
 * Andreas (1989), CRREL Report 89-11 [andreas1989]. */
double lee_air_viscosity(double temperature);

/* Pressure at an altitude (m, -500 to 9000) in the standard atmosphere, Pa:
 *     p = 101325 (1 - 2.25577e-5 z)^5.25588
 * ISO 2533:1975, troposphere [iso2533]. NaN outside the range. */
double lee_standard_pressure(double altitude);

/* What a drag relation may ask for. A further need is a new field. */
typedef struct lee_drag_input {
    double speed;         /* neutral 10 m wind speed, m s-1, >= 0 */
    double air_density;   /* kg m-3                               */
    double water_density; /* kg m-3                               */
    double gravity;       /* m s-2                                */
    double air_viscosity; /* kinematic, m2 s-1                    */
} lee_drag_input;

/* Air of the standard atmosphere at sea level (1.225 kg m-3, 15 degC), fresh
 * water of 1000 kg m-3, standard gravity; speed 0. */
lee_drag_input lee_drag_input_default(void);

/* One published drag relation: C10 of the neutral 10 m wind. */
typedef struct lee_drag_relation {
    const char *name;   /* spelling in case files and options, kebab-case   */
    const char *paper;  /* key of the paper in docs/references.md; relations
                           of one paper share it                            */
    const char *source; /* author, year, equation or table, journal         */
    double speed_min;   /* fitted range of the 10 m wind speed, m s-1;      */
    double speed_max;   /*   outside it the relation extrapolates           */
    bool includes_return_flow; /* fitted on set-up itself: lambda is 1      */
    bool is_from_memory;       /* coefficients not re-read in the source    */
    bool is_for_range;         /* takes part in the range of an estimate: one
                                  relation a paper                          */
    bool is_solved; /* implicit: solved anew at each call, some hundred times
                       slower than a formula; lee_drag_solve tables it      */
    double (*coefficient)(const lee_drag_input *in); /* C10, [1]            */
} lee_drag_relation;

/* Relation called `name`, or NULL when there is none. Do not free. */
const lee_drag_relation *lee_drag_find(const char *name);

/* The index-th relation in order of publication, or NULL past the last. */
const lee_drag_relation *lee_drag_at(size_t index);

/* Name of the relation nearest to a misspelt one, or NULL when none is near. Do
 * not free. */
const char *lee_drag_nearest(const char *name);

/* The drag an estimate uses: a relation, a constant or a table, and a cap.
 * Owns its table. {0} is no drag; lee_drag_default gives the usual one. */
typedef struct lee_drag {
    const lee_drag_relation *relation; /* NULL: constant or table           */
    double constant;                   /* C10 when not a relation, no table */
    size_t n;                          /* rows of the table, 0 for none     */
    double *speed;                     /* [n] m s-1, increasing             */
    double *coefficient;               /* [n] C10; linear between rows, held
                                          and "extrapolated" outside. Beside
                                          a relation: the relation solved   */
    double cap;                        /* largest C10; INFINITY for none    */
    double *bend;                      /* [n] or NULL: C10 in the middle to the
                                          next row, above the line to it    */
    size_t bins;                       /* of equal width over a solved table;
                                          0: rows are searched              */
    size_t *bin;                       /* [bins] last row at or below the
                                          begin of each                     */
} lee_drag;

/* garratt-linear-1977 capped at 3.0e-3. */
lee_drag lee_drag_default(void);
void lee_drag_free(lee_drag *drag);

/* A drag of its own like `drag`, quick to evaluate: an implicit relation is
 * solved for the densities, gravity and viscosity of `fluids` into a table,
 * from which lee_drag_coefficient reads C10 within 1e-6 of the solution,
 * whatever the fluids it is called with then. Other drags are copied.
 *
 *   fluids  its speed is not used
 *   solved  out: freed with lee_drag_free
 *
 * Errors: LEE_ERR_ARGUMENT when an implicit relation has no solution for
 * these fluids; LEE_ERR_MEMORY. */
lee_status lee_drag_solve(const lee_drag *drag, const lee_drag_input *fluids,
                          lee_drag *solved, lee_error *error);

/* C10 with its cap. NaN in, NaN out.
 *
 *   extrapolated  out (may be NULL): speed is outside the fitted range
 *   capped        out (may be NULL): the cap took effect */
double lee_drag_coefficient(const lee_drag *drag, const lee_drag_input *in,
                            bool *extrapolated, bool *capped);

/* Writes what the drag is, as "garratt-linear-1977, capped at 0.0030",
 * "constant 0.0018", "table of 5 rows" or "no drag", into text[size], size
 * above 0; returns text. */
char *lee_drag_describe(const lee_drag *drag, size_t size, char text[]);

/* Stress of a wind vector at the water surface, N m-2.
 *
 *     tau = rho_air C10(|U|) |U| U
 *
 *   drag    C10
 *   fluids  air and water; its speed is not used
 *   wind    east, north, m s-1, at 10 m over open water
 *   stress  out: east, north; both NaN when either component of the wind is;
 *           may alias wind
 *
 * Source: definition of the drag coefficient (common practice). */
void lee_wind_stress(const lee_drag *drag, const lee_drag_input *fluids,
                     const double wind[2], double stress[2]);

#endif
