/* steady.c - equilibrium levels of a lake under a steady wind. */
#include "leewater/setup.h"

#include <math.h>

#include "setup/steady_pools.h"
#include "setup/steady_report.h"

static lee_status check_numbers(const lee_steady_input *in, lee_error *error) {
    const struct {
        const char *name;
        double value;
        double least;
        bool may_equal;
    } rows[] = {
        {"still water",        in->still_water,   -INFINITY, false},
        {"eastward stress",    in->stress[0],     -INFINITY, false},
        {"northward stress",   in->stress[1],     -INFINITY, false},
        {"return-flow factor", in->return_flow,   1.0,       true },
        {"water density",      in->water_density, 0.0,       false},
        {"gravity",            in->gravity,       0.0,       false},
        {"dry depth",          in->dry_depth,     0.0,       true },
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        const double value = rows[i].value;
        const bool is_large =
            rows[i].may_equal ? value >= rows[i].least : value > rows[i].least;
        if (!isfinite(value) || !is_large) {
            return lee_fail(error, LEE_ERR_ARGUMENT,
                            "%s %g is outside its range", rows[i].name, value);
        }
    }
    return LEE_OK;
}

static lee_status check_end(double level, double bed, const char *end,
                            lee_error *error) {
    if (isnan(level)) {
        return LEE_OK;
    }
    if (!isfinite(level)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "the level held at the %s is not finite", end);
    }
    if (!(level > bed)) {
        return lee_fail(error, LEE_ERR_DATA,
                        "the level held at the %s, %g m, is not above the bed "
                        "there, %g m",
                        end, level, bed);
    }
    return LEE_OK;
}

static double lowest_bed(const lee_profile *profile) {
    double lowest = profile->bed[0];
    for (size_t i = 1; i < profile->n; i++) {
        lowest = fmin(lowest, profile->bed[i]);
    }
    return lowest;
}

static lee_status check_input(const lee_steady_input *in, lee_error *error) {
    lee_status status = lee_profile_check(in->profile, error);
    if (status == LEE_OK) {
        status = check_numbers(in, error);
    }
    if (status != LEE_OK) {
        return status;
    }
    const lee_profile *p = in->profile;
    if (!isnan(in->start_level) && !isnan(in->end_level)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "one end at most may be held in a steady state");
    }
    status = check_end(in->start_level, p->bed[0], "start", error);
    if (status == LEE_OK) {
        status = check_end(in->end_level, p->bed[p->n - 1], "end", error);
    }
    if (status != LEE_OK) {
        return status;
    }
    const bool has_held = !isnan(in->start_level) || !isnan(in->end_level);
    if (!has_held && !(in->still_water > lowest_bed(p))) {
        return lee_fail(error, LEE_ERR_DATA,
                        "no water: still water %g m is not above the lowest "
                        "bed, %g m",
                        in->still_water, lowest_bed(p));
    }
    return LEE_OK;
}

/* a along and across the axis on the segment behind row i, m. What rounding
 * leaves of a wind straight across or along is none. */
static void drive_at(const lee_steady_input *in, size_t i, double *along,
                     double *across) {
    const double bearing = in->profile->bearing[i];
    const double per_stress =
        in->return_flow / (in->water_density * in->gravity);
    const double e = in->stress[0];
    const double n = in->stress[1];
    const double forward = e * sin(bearing) + n * cos(bearing);
    *along = fabs(forward) > 1e-14 * hypot(e, n) ? per_stress * forward : 0.0;
    const double sideways = fabs(e * cos(bearing) - n * sin(bearing));
    *across = sideways > 1e-14 * hypot(e, n) ? per_stress * sideways : 0.0;
}

/* The axis as the solver sees it, from x = 0; mirrored on request. */
static void lay_legs(const lee_steady_input *in, bool is_mirrored,
                     lee_reach *reach) {
    const lee_profile *p = in->profile;
    const size_t n = reach->n;
    for (size_t j = 0; j < n; j++) {
        const size_t i = is_mirrored ? n - 1 - j : j;
        const size_t near = is_mirrored ? i + 1 : i;
        const size_t far = is_mirrored ? i : i + 1;
        lee_leg *leg = &reach->leg[j];
        leg->x = fabs(p->chainage[near] - p->chainage[is_mirrored ? n : 0]);
        leg->length = p->chainage[i + 1] - p->chainage[i];
        leg->bed = p->bed[near] - in->still_water;
        leg->slope = (p->bed[far] - p->bed[near]) / leg->length;
        leg->width = p->width[near];
        leg->widening = (p->width[far] - p->width[near]) / leg->length;
        drive_at(in, i, &leg->full, &leg->cross);
        leg->full = is_mirrored ? -leg->full : leg->full;
    }
}

/* Mean of a over the still lake, m. */
static double mean_drive(const lee_reach *reach) {
    double sum = 0.0;
    double area = 0.0;
    for (size_t i = 0; i < reach->n; i++) {
        const lee_cover s = lee_leg_still(&reach->leg[i]);
        sum += s.area * reach->leg[i].full;
        area += s.area;
    }
    return area > 0.0 ? sum / area : 0.0;
}

/* Lays the axis, solves along it and tells what part of its volume a water
 * missed at most; infinite when the waters found no rest. */
static lee_status solve_laid(const lee_steady_input *in, lee_pools *pools,
                             bool is_mirrored, double *miss, lee_error *error) {
    const double held = is_mirrored ? in->end_level : in->start_level;
    lay_legs(in, is_mirrored, &pools->reach);
    pools->start_level = held - in->still_water;
    pools->partings = 0;
    pools->miss = 0.0;
    pools->spilled = 0.0;
    lee_status status = lee_pools_rest(pools, error);
    if (status == LEE_OK) {
        status = lee_pools_blow(pools, error);
    }
    *miss = status == LEE_ERR_CONVERGENCE ? INFINITY : pools->miss;
    return status == LEE_ERR_CONVERGENCE ? LEE_OK : status;
}

/* Solves with the held end or the windward side first: the march with the
 * wind is the stable one. Where winds of two ways drive sheets of water the
 * other side may be better, and is tried. */
static lee_status solve_axis(const lee_steady_input *in, lee_pools *pools,
                             bool *is_mirrored, lee_error *error) {
    static const double good_miss = 1e-13;
    static const double largest_miss = 1e-3;
    const bool has_start = !isnan(in->start_level);
    const bool has_end = !isnan(in->end_level);
    double miss = 0.0;
    lay_legs(in, false, &pools->reach);
    *is_mirrored = has_end || (!has_start && mean_drive(&pools->reach) < 0.0);
    lee_status status = solve_laid(in, pools, *is_mirrored, &miss, error);
    if (status == LEE_OK && miss > good_miss && !has_start && !has_end) {
        double other = 0.0;
        status = solve_laid(in, pools, !*is_mirrored, &other, error);
        if (status == LEE_OK && other < miss) {
            *is_mirrored = !*is_mirrored;
            miss = other;
        } else if (status == LEE_OK) {
            status = solve_laid(in, pools, *is_mirrored, &miss, error);
        }
    }
    if (status == LEE_OK && miss > largest_miss) {
        status = lee_fail(error, LEE_ERR_CONVERGENCE,
                          "no steady surface keeps the water's volume: the "
                          "nearest misses %.2g of it",
                          miss);
    }
    return status;
}

/* Mean of the projected stress over the lake, as a share of the stress. */
static double along_of(const lee_steady_input *in, const lee_pools *pools,
                       bool is_mirrored) {
    const double full = in->return_flow * hypot(in->stress[0], in->stress[1]) /
                        (in->water_density * in->gravity);
    const double mean = mean_drive(&pools->reach);
    return full > 0.0 ? (is_mirrored ? -mean : mean) / full : 0.0;
}

lee_status lee_steady_solve(const lee_steady_input *input, lee_steady *steady,
                            lee_error *error) {
    *steady = (lee_steady){0};
    lee_status status = check_input(input, error);
    if (status != LEE_OK) {
        return status;
    }
    lee_pools pools = {0};
    bool is_mirrored = false;
    status = lee_pools_init(&pools, input->profile->n - 1, error);
    if (status == LEE_OK) {
        status = solve_axis(input, &pools, &is_mirrored, error);
    }
    if (status == LEE_OK) {
        status = lee_steady_report(input, &pools, is_mirrored, steady, error);
        steady->along = along_of(input, &pools, is_mirrored);
    }
    lee_pools_free(&pools);
    if (status != LEE_OK) {
        lee_steady_free(steady);
    }
    return status;
}
