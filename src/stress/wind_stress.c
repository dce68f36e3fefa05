/* wind_stress.c - the stress vector that a wind vector puts on the water. */
#include "leewater/stress.h"

#include <math.h>

void lee_wind_stress(const lee_drag *drag, double air_density,
                     double water_density, const double wind[2],
                     double stress[2]) {
    const lee_drag_input in = {
        .speed = hypot(wind[0], wind[1]),
        .air_density = air_density,
        .water_density = water_density,
    };
    const double c10 = lee_drag_coefficient(drag, &in, NULL, NULL);
    const double per_wind = air_density * c10 * in.speed;
    const double east = per_wind * wind[0];
    const double north = per_wind * wind[1];
    stress[0] = east;
    stress[1] = north;
}
