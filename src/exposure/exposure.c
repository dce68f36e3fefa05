/* exposure.c - the chain from the anemometer to 10 m over open water. */
#include "leewater/exposure.h"

#include <math.h>

#include "base/constants.h"

/* Bounds of what can be a correction of a wind. A factor beyond these is a
 * slip of the pen, not an exposure (own judgement). */
static const double least_factor = 0.2;
static const double greatest_factor = 5.0;

/* A factor this near to 1 corrects nothing. */
static const double identity = 1e-12;

/* Steps of the search for U10. Each second one halves what is left, so a
 * hundred pairs end any search that can end. */
enum { MAX_STEPS = 200 };
static const double speed_tolerance = 1e-10; /* share of U10 */

lee_exposure lee_exposure_default(void) {
    return (lee_exposure){
        .height = lee_reference_height,
        .averaging = NAN,
        .land_roughness = NAN,
        .height_method = LEE_HEIGHT_LOG,
        .height_factor = 1.0,
        .land_to_water = 1.0,
    };
}

static bool is_factor(double factor) {
    return factor >= least_factor && factor <= greatest_factor;
}

static lee_status check_averaging(const lee_exposure *exposure,
                                  lee_error *error) {
    const double t = exposure->averaging;
    if (exposure->is_maximum && isnan(t)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "a wind that is a maximum needs its averaging time");
    }
    if (exposure->is_maximum && !(t >= 1.0 && t <= 36000.0)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "averaging time of a maximum is %g s, expected 1 to "
                        "36000 s",
                        t);
    }
    if (!isnan(t) && !(t >= 0.0 && isfinite(t))) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "averaging time is %g s, expected 0 or more", t);
    }
    return LEE_OK;
}

static lee_status check_height(const lee_exposure *exposure, lee_error *error) {
    const double z = exposure->height;
    if (!(z >= LEE_LOWEST_MAST && z <= LEE_HIGHEST_MAST)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "anemometer height is %g m, expected %g to %g m", z,
                        LEE_LOWEST_MAST, LEE_HIGHEST_MAST);
    }
    if (exposure->height_method == LEE_HEIGHT_FACTOR &&
        !is_factor(exposure->height_factor)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "height factor is %g, expected %g to %g",
                        exposure->height_factor, least_factor, greatest_factor);
    }
    return LEE_OK;
}

static lee_status check_roughness(const lee_exposure *exposure,
                                  lee_error *error) {
    const double z0 = exposure->land_roughness;
    if (exposure->height_method != LEE_HEIGHT_LOG) {
        return LEE_OK;
    }
    if (!(z0 > 0.0 && z0 < lee_reference_height)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "roughness length of the land is %g m, expected more "
                        "than 0 and less than %g m",
                        z0, lee_reference_height);
    }
    if (!(exposure->height > z0)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "anemometer height %g m is not above the roughness "
                        "length %g m of the land",
                        exposure->height, z0);
    }
    return LEE_OK;
}

static lee_status check_land_to_water(const lee_exposure *exposure,
                                      lee_error *error) {
    const double factor = exposure->land_to_water;
    if (!exposure->is_over_land) {
        return fabs(factor - 1.0) <= identity
                   ? LEE_OK
                   : lee_fail(error, LEE_ERR_ARGUMENT,
                              "land-to-water factor is %g for a wind measured "
                              "over water, expected 1",
                              factor);
    }
    if (isnan(factor)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "a wind measured over land needs a land-to-water "
                        "factor");
    }
    if (!is_factor(factor)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "land-to-water factor is %g, expected %g to %g", factor,
                        least_factor, greatest_factor);
    }
    return LEE_OK;
}

lee_status lee_exposure_check(const lee_exposure *exposure, lee_error *error) {
    lee_status status = check_averaging(exposure, error);
    if (status == LEE_OK) {
        status = check_height(exposure, error);
    }
    if (status == LEE_OK && exposure->is_over_land) {
        status = check_roughness(exposure, error);
    }
    return status == LEE_OK ? check_land_to_water(exposure, error) : status;
}

/* Speed at the anemometer as a share of U10 in the neutral logarithmic
 * profile over water. With z0 = 10 exp(-kappa/sqrt(C10)),
 *     ln(z/z0)/ln(10/z0) = 1 + sqrt(C10)/kappa ln(z/10),
 * not positive where the roughness reaches the anemometer. */
static double share_at_mast(double height, const lee_drag *drag,
                            const lee_drag_input *fluids, double u10) {
    lee_drag_input in = *fluids;
    in.speed = u10;
    const double c10 = lee_drag_coefficient(drag, &in, NULL, NULL);
    return 1.0 +
           sqrt(c10) / lee_von_karman * log(height / lee_reference_height);
}

/* U10 whose own profile passes through the measured speed: U10 becomes
 * measured/share(U10) until it stays. The bounds catch what that would not:
 * a relation that jumps has no solution inside its jump, and there U10 is the
 * speed of the jump. NaN when the roughness reaches the anemometer. */
static double over_water(double height, const lee_drag *drag,
                         const lee_drag_input *fluids, double measured) {
    double low = 0.0;
    double high = INFINITY;
    double u10 = measured;
    for (int i = 0; i < MAX_STEPS; i++) {
        const double share = share_at_mast(height, drag, fluids, u10);
        double next = measured / share;
        if (isnan(share) || fabs(next - u10) <= speed_tolerance * u10) {
            return next;
        }
        if (share * u10 < measured) {
            low = u10;
        } else {
            high = u10;
        }
        if (!(next > low && next < high)) {
            next = isinf(high) ? 2.0 * low : 0.5 * (low + high);
        }
        if (high <= low * (1.0 + speed_tolerance)) {
            return next;
        }
        u10 = next;
    }
    return NAN;
}

/* Factor that brings a speed at the anemometer to 10 m. */
static double height_factor(const lee_exposure *exposure, const lee_drag *drag,
                            const lee_drag_input *fluids, double speed) {
    switch (exposure->height_method) {
    case LEE_HEIGHT_POWER:
        return lee_power_profile_ratio(exposure->height);
    case LEE_HEIGHT_FACTOR:
        return exposure->height_factor;
    case LEE_HEIGHT_LOG:
        break;
    }
    if (exposure->is_over_land) {
        return lee_log_profile_ratio(exposure->height,
                                     exposure->land_roughness);
    }
    if (speed > 0.0) {
        return over_water(exposure->height, drag, fluids, speed) / speed;
    }
    return 1.0 / share_at_mast(exposure->height, drag, fluids, speed);
}

static const char *height_words(const lee_exposure *exposure,
                                const char **source) {
    *source = "common practice";
    switch (exposure->height_method) {
    case LEE_HEIGHT_POWER:
        *source = "EM 1110-2-1100 eq. II-2-9";
        return "1/7 power profile";
    case LEE_HEIGHT_FACTOR:
        *source = "given";
        return "given factor";
    case LEE_HEIGHT_LOG:
        break;
    }
    return exposure->is_over_land
               ? "neutral log profile, roughness of the land"
               : "neutral log profile, roughness of the drag relation";
}

enum { LINKS = 3 };

/* Every link in order, identities too. */
static void all_links(const lee_exposure *exposure, const lee_drag *drag,
                      const lee_drag_input *fluids, double measured,
                      lee_correction link[LINKS]) {
    link[0] = (lee_correction){
        .name = "averaging",
        .method = "highest mean to hourly mean",
        .source = "EM 1110-2-1100 fig. II-2-1",
        .factor = exposure->is_maximum
                      ? 1.0 / lee_averaging_ratio(exposure->averaging)
                      : 1.0,
    };
    link[1] = (lee_correction){.name = "height"};
    link[1].method = height_words(exposure, &link[1].source);
    link[1].factor =
        height_factor(exposure, drag, fluids, measured * link[0].factor);
    link[2] = (lee_correction){
        .name = "land to water",
        .method = "given factor",
        .source = "given",
        .factor = exposure->is_over_land ? exposure->land_to_water : 1.0,
    };
}

double lee_exposure_speed(const lee_exposure *exposure, const lee_drag *drag,
                          const lee_drag_input *fluids, double measured) {
    lee_correction link[LINKS];
    all_links(exposure, drag, fluids, measured, link);
    double speed = measured;
    for (size_t i = 0; i < LINKS && !(speed <= 0.0); i++) {
        speed *= link[i].factor;
    }
    return speed;
}

size_t lee_exposure_chain(const lee_exposure *exposure, const lee_drag *drag,
                          const lee_drag_input *fluids, double measured,
                          lee_correction chain[LEE_CORRECTIONS]) {
    lee_correction link[LINKS];
    all_links(exposure, drag, fluids, measured, link);
    size_t count = 0;
    for (size_t i = 0; i < LINKS; i++) {
        if (!(fabs(link[i].factor - 1.0) <= identity)) {
            chain[count++] = link[i];
        }
    }
    return count;
}
