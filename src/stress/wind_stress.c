/* wind_stress.c - the stress vector that a wind vector puts on the water. */
#include "leewater/stress.h"

#include <math.h>

void lee_wind_stress(const lee_drag *drag, const lee_drag_input *fluids,
                     const double wind[2], double stress[2]) {
    lee_drag_input in = *fluids;
    in.speed = hypot(wind[0], wind[1]);
    const double c10 = lee_drag_coefficient(drag, &in, NULL, NULL);
    const double per_wind = fluids->air_density * c10 * in.speed;
    const double east = per_wind * wind[0];
    const double north = per_wind * wind[1];
    stress[0] = east;
    stress[1] = north;
}
