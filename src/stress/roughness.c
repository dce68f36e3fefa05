/* roughness.c - the drag coefficient of a surface that the wind roughens. */
#include "stress/roughness.h"

#include <math.h>

#include "base/constants.h"
#include "numerics/roots.h"

/* Friction velocity below that of any wind above 1 cm/s, m s-1. */
static const double least_friction = 1e-5;

/* Share of the highest friction velocity in question that is left open. The
 * solution is above a hundredth of it, so C10 is known to 2e-10. */
static const double friction_tolerance = 1e-12;

/* The wind profile to be solved. */
typedef struct profile {
    double height;       /* of the wind, m            */
    double von_karman;   /* [1]                       */
    double rough;        /* alpha/g, s2 m-1           */
    double smooth;       /* 0.11 nu or 0, m2 s-1      */
    double wanted_speed; /* m s-1                     */
} profile;

/* Wind that a friction velocity goes with, m s-1. */
static double wind_of(const profile *p, double friction) {
    const double z0 = p->rough * friction * friction + p->smooth / friction;
    return friction / p->von_karman * log(p->height / z0);
}

static double excess(double friction, void *user) {
    const profile *p = user;
    return wind_of(p, friction) - p->wanted_speed;
}

/* Up to here more friction goes with more wind: with the first part alone the
 * wind is greatest where ln(10/z0) = 2, and the second part only moves that
 * up. Nor can friction exceed the wind itself: C10 would be above 1. */
static double greatest_friction(const profile *p) {
    const double most =
        p->rough > 0.0 ? sqrt(p->height * exp(-2.0) / p->rough) : INFINITY;
    return fmin(most, p->wanted_speed);
}

double lee_roughness_coefficient(const lee_roughness *roughness,
                                 const lee_drag_input *in) {
    profile p = {
        .height = lee_reference_height,
        .von_karman = roughness->von_karman,
        .rough = roughness->charnock / in->gravity,
        .smooth = roughness->has_smooth_flow ? 0.11 * in->air_viscosity : 0.0,
        .wanted_speed = in->speed,
    };
    const bool is_there = in->speed > 0.0 && p.rough >= 0.0 &&
                          p.smooth >= 0.0 && p.rough + p.smooth > 0.0;
    if (!is_there || !isfinite(p.rough + p.smooth)) {
        return NAN;
    }
    double friction = greatest_friction(&p);
    const double fastest = wind_of(&p, friction);
    if (fastest > in->speed &&
        lee_root_between(excess, &p, least_friction, friction,
                         friction_tolerance * friction, &friction,
                         NULL) != LEE_OK) {
        return NAN;
    }
    const double ratio = friction / fmin(fastest, in->speed);
    return ratio * ratio;
}
