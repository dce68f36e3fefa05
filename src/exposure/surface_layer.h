/* surface_layer.h - the wind near the water, with the roughness of the drag
 * relation, in air of any stability. */
#ifndef LEEWATER_EXPOSURE_SURFACE_LAYER_H
#define LEEWATER_EXPOSURE_SURFACE_LAYER_H

#include <stdbool.h>

#include "leewater/exposure.h"
#include "leewater/stress.h"

/* Where a wind blows, and over what. Borrows. */
typedef struct lee_surface_layer {
    const lee_drag *drag;
    const lee_drag_input *fluids;
    double height; /* of the wind, m */

    /* NULL: neutral, and the rest is not asked for. */
    const lee_stability_functions *functions;
    double temperature_height; /* m */
    double air_temperature;    /* K */
    double water_temperature;  /* K */
} lee_surface_layer;

/* Neutral 10 m speed U10N whose own profile passes through the speed measured
 * at the height, to 1e-10. Inside a jump of the relation, where no U10N solves
 * it, U10N is the speed of the jump. NaN when the roughness reaches the
 * height.
 *
 *   is_held  out: z/L was beyond 2 either way and is held there */
double lee_surface_layer_speed(const lee_surface_layer *layer, double measured,
                               bool *is_held);

/* Limit of U10N over the measured speed as both go to 0. */
double lee_surface_layer_calm_ratio(const lee_surface_layer *layer);

#endif
