/* roughness.h - the drag coefficient of a surface that the wind roughens. */
#ifndef LEEWATER_STRESS_ROUGHNESS_H
#define LEEWATER_STRESS_ROUGHNESS_H

#include <stdbool.h>

#include "leewater/stress.h"

/* Roughness of the water under friction velocity u*:
 *
 *     z0 = alpha u*^2/g + 0.11 nu/u*
 *
 * The first part is that of Charnock (1955) [charnock1955]; the second, of
 * smooth flow, as Smith (1988) adds it [smith1988]. */
typedef struct lee_roughness {
    double charnock;      /* alpha, [1], >= 0                      */
    double von_karman;    /* kappa that alpha was found with, [1]  */
    bool has_smooth_flow; /* else the first part alone             */
} lee_roughness;

/* C10 = (u* / U)^2 with U = (u* / kappa) ln(10/z0), the lower root. Beyond the
 * fastest wind that has one, C10 is held at what it is there, (kappa/2)^2 for
 * the first part alone. NaN when the speed or what the roughness needs is not
 * above zero. */
double lee_roughness_coefficient(const lee_roughness *roughness,
                                 const lee_drag_input *in);

#endif
