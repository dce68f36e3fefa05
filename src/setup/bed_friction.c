/* bed_friction.c - bed laws, and the return flow's share of the tilt. */
#include "leewater/setup.h"

#include <math.h>

#include "base/constants.h"

/* The log law has no meaning where the depth nears its roughness; below this
 * many roughness lengths it is held. */
static const double least_depth_in_roughness = 10.0;

/* Depth mean of the rough log law, [kappa/(ln(H/z0) - 1)]^2 (integral of
 * u = u_f/kappa ln(z/z0) from z0 to H >> z0; derived). */
static double roughness_coefficient(double roughness, double depth) {
    const double ratio = fmax(depth / roughness, least_depth_in_roughness);
    const double root = lee_von_karman / (log(ratio) - 1.0);
    return root * root;
}

double lee_bed_coefficient(const lee_bed_law *law, double depth,
                           double gravity) {
    const double value = law->value;
    if (isnan(depth)) {
        return NAN;
    }
    switch (law->kind) {
    case LEE_BED_NONE:
    case LEE_BED_LINEAR:
        return 0.0;
    case LEE_BED_MANNING:
        return gravity * value * value / cbrt(depth);
    case LEE_BED_CHEZY:
        return gravity / (value * value);
    case LEE_BED_ROUGHNESS:
        return roughness_coefficient(value, depth);
    case LEE_BED_DRAG:
        return value;
    }
    return NAN;
}

double lee_return_flow_factor(const lee_return_flow *rule,
                              const lee_bed_law *bed, double depth,
                              double gravity, bool forced_to_one) {
    /* Constant eddy viscosity over a bed without slip, the exact upper bound
     * of the closed basin (derived; docs/theory.md). */
    const double largest = 1.5;
    if (forced_to_one) {
        return 1.0;
    }
    if (!rule->is_computed) {
        return rule->value;
    }
    const double coefficient = lee_bed_coefficient(bed, depth, gravity);
    const double factor = 1.0 + sqrt(coefficient) / lee_von_karman;
    return factor > largest ? largest : factor; /* NaN stays NaN */
}
