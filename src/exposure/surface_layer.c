/* surface_layer.c - the neutral 10 m wind of a wind measured over water. */
#include "exposure/surface_layer.h"

#include <math.h>

#include "base/constants.h"

/* Steps of a search. The first go by secants, which end in four or five where
 * a relation is smooth; the rest halve what is left, so a hundred end any
 * search that can end. */
enum { MOST_SECANTS = 20, MAX_STEPS = 120 };
static const double speed_tolerance = 1e-10; /* share of U10N */

/* Where the profile functions end, [1]: they were fitted for |z/L| up to some
 * 1 or 2 (common practice). */
static const double most_zeta = 2.0;
static const double zeta_tolerance = 1e-12;

/* Fall of temperature with height in well-mixed air, g/c_p, K m-1 (common
 * practice, c_p = 1005 J kg-1 K-1). */
static const double adiabatic_fall = 9.80665 / 1005.0;

/* What one step of the search for U10N leaves for the next. */
typedef struct state {
    double zeta;
    bool is_held;
} state;

/* Fairall et al. (2003) eq. 28 (from memory): roughness of the temperature
 * profile by the roughness Reynolds number z0 u-star/nu. */
static double temperature_roughness(double reynolds) {
    return fmin(1.1e-4, 5.5e-5 * pow(reynolds, -0.6));
}

/* The equation of z/L at a known friction velocity:
 *     zeta [ln(zt/z0t) - psi_h(zeta zt/z)] = kappa^2 g z dtheta/(T u-star^2) */
typedef struct zeta_equation {
    const lee_stability_functions *functions;
    double log_ratio;    /* ln(zt/z0t) */
    double height_ratio; /* zt/z */
    double buoyancy;     /* right-hand side */
} zeta_equation;

static double excess(const zeta_equation *equation, double zeta) {
    const double psi = equation->functions->heat(zeta * equation->height_ratio);
    return zeta * (equation->log_ratio - psi) - equation->buoyancy;
}

/* The left-hand side grows with zeta: secants from `guess`, kept between what
 * is known to be too low and too high. Runs for each step of each wind of a
 * record, so it begins where the step before ended. */
static double solve_zeta(const zeta_equation *equation, double guess,
                         bool *is_held) {
    const double limit = copysign(most_zeta, equation->buoyancy);
    *is_held = !(excess(equation, limit) * limit > 0.0);
    if (*is_held) {
        return limit;
    }
    double low = fmin(0.0, limit);
    double high = fmax(0.0, limit);
    double last = 0.0;
    double last_excess = -equation->buoyancy;
    double zeta = guess > low && guess < high ? guess : 0.5 * limit;
    for (int i = 0; i < MAX_STEPS; i++) {
        const double over = excess(equation, zeta);
        if (over > 0.0) {
            high = zeta;
        } else {
            low = zeta;
        }
        double next = zeta - over * (zeta - last) / (over - last_excess);
        if (!(next >= low && next <= high) || i > MOST_SECANTS) {
            next = 0.5 * (low + high);
        }
        if (fabs(next - zeta) <= zeta_tolerance) {
            return next;
        }
        last = zeta;
        last_excess = over;
        zeta = next;
    }
    return NAN;
}

/* z/L over water by the bulk method: temperatures of air and water, friction
 * velocity sqrt(C10) U10N and roughness of the drag relation. */
static double find_zeta(const lee_surface_layer *layer, double u10, double c10,
                        state *now) {
    const double z = layer->height;
    const double zt = layer->temperature_height;
    const double difference =
        layer->air_temperature - layer->water_temperature + adiabatic_fall * zt;
    if (fabs(difference) <= 0.0) {
        return 0.0;
    }
    const double friction = sqrt(c10) * u10;
    const double roughness =
        lee_reference_height * exp(-lee_von_karman / sqrt(c10));
    const double reynolds =
        roughness * friction / lee_air_viscosity(layer->air_temperature);
    const zeta_equation equation = {
        .functions = layer->functions,
        .log_ratio = log(zt / temperature_roughness(reynolds)),
        .height_ratio = zt / z,
        .buoyancy = lee_von_karman * lee_von_karman * lee_standard_gravity * z *
                    difference / (layer->air_temperature * friction * friction),
    };
    return solve_zeta(&equation, now->zeta, &now->is_held);
}

/* Speed at the height as a share of U10N. With z0 = 10 exp(-kappa/sqrt(C10)),
 *     [ln(z/z0) - psi]/ln(10/z0) = 1 + sqrt(C10)/kappa [ln(z/10) - psi],
 * not positive where the roughness reaches the height. */
static double share_of(const lee_surface_layer *layer, double u10, state *now) {
    lee_drag_input in = *layer->fluids;
    in.speed = u10;
    const double c10 = lee_drag_coefficient(layer->drag, &in, NULL, NULL);
    double profile = log(layer->height / lee_reference_height);
    now->is_held = false;
    if (layer->functions != NULL) {
        now->zeta = find_zeta(layer, u10, c10, now);
        profile -= layer->functions->momentum(now->zeta);
    }
    return 1.0 + sqrt(c10) / lee_von_karman * profile;
}

/* U10N becomes measured/share(U10N), then goes by secants, until it stays. The
 * bounds catch what these would not: a relation that jumps has no solution
 * inside its jump, and there U10N is the speed of the jump. */
double lee_surface_layer_speed(const lee_surface_layer *layer, double measured,
                               bool *is_held) {
    state now = {0};
    double low = 0.0;
    double high = INFINITY;
    double u10 = measured;
    double last = 0.0;
    double last_speed = 0.0;
    *is_held = false;
    for (int i = 0; i < MAX_STEPS; i++) {
        const double share = share_of(layer, u10, &now);
        const double speed = share * u10;
        double next = measured / share;
        *is_held = now.is_held;
        if (isnan(share) || fabs(next - u10) <= speed_tolerance * u10) {
            return next;
        }
        if (speed < measured) {
            low = u10;
        } else {
            high = u10;
        }
        if (i > 0) {
            next =
                u10 + (measured - speed) * (u10 - last) / (speed - last_speed);
        }
        if (!(next > low && next < high) ||
            (i > MOST_SECANTS && high < INFINITY)) {
            next = isinf(high) ? 2.0 * low : 0.5 * (low + high);
        }
        if (high <= low * (1.0 + speed_tolerance)) {
            return next;
        }
        last = u10;
        last_speed = speed;
        u10 = next;
    }
    return NAN;
}

double lee_surface_layer_calm_ratio(const lee_surface_layer *layer) {
    state now = {0};
    return 1.0 / share_of(layer, 0.0, &now);
}
