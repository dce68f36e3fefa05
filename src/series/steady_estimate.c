/* steady_estimate.c - equilibrium levels with their range for given winds. */
#include <math.h>
#include <stdlib.h>

#include "base/constants.h"
#include "leewater/series.h"
#include "series/air.h"
#include "series/members.h"
#include "series/setting.h"

/* Cross-axis tilt above this share of the tilt along the axis is warned of
 * (design choice; docs/theory.md, "Range"). */
static const double cross_tilt_share = 0.2;

/* Projected stress below this share of the full one is "across the axis". */
static const double across_share = 0.01;

/* The equilibria of one wind: the estimate first, then the bounds. */
typedef struct solutions {
    size_t count;
    lee_steady steady[LEE_MEMBERS];
} solutions;

static void free_solutions(solutions *all) {
    for (size_t i = 0; i < LEE_MEMBERS; i++) {
        lee_steady_free(&all->steady[i]);
    }
}

static lee_status solve_member(const lee_problem *problem,
                               const lee_setting *setting,
                               const lee_member *member, const double pull[2],
                               lee_steady *steady, lee_error *error) {
    lee_profile profile = {0};
    lee_status status = lee_member_profile(&problem->lake.profile,
                                           member->bed_shift, &profile, error);
    if (status == LEE_OK) {
        const lee_steady_input input = {
            .profile = &profile,
            .still_water = setting->still_water,
            .stress = {pull[0], pull[1]},
            .return_flow = 1.0, /* lambda is in the pull */
            .water_density = setting->fluids.water_density,
            .gravity = setting->gravity,
            .dry_depth = problem->solver.dry_depth,
            .start_level = setting->start_level,
            .end_level = setting->end_level,
        };
        status = lee_steady_solve(&input, steady, error);
    }
    lee_profile_free(&profile);
    return status;
}

static lee_status solve_all(const lee_problem *problem,
                            const lee_setting *setting,
                            const lee_given_wind *wind, solutions *all,
                            lee_error *error) {
    lee_member member[LEE_MEMBERS];
    all->count = lee_members_list(problem, member);
    const lee_exposure_sample measured = lee_measured(wind->speed);
    const lee_pull_range range = lee_setting_pull(problem, setting, &measured);
    const double from = lee_exposure_from(&problem->exposure, wind->from);
    for (size_t i = 0; i < all->count; i++) {
        double pull[2];
        lee_wind_components((1.0 - problem->ice) *
                                lee_pull_of(&range, member[i].pull),
                            from, &pull[0], &pull[1]);
        const lee_status status = solve_member(problem, setting, &member[i],
                                               pull, &all->steady[i], error);
        if (status != LEE_OK) {
            if (member[i].bed_shift != 0.0) {
                lee_context(error,
                            "with the bed %+.3g m: ", member[i].bed_shift);
            }
            return status;
        }
    }
    return LEE_OK;
}

/* A low end that is none, of a place fallen dry, stays none. */
static void widen(lee_ranged *ranged, double value) {
    ranged->low = isnan(ranged->low) ? NAN : fmin(ranged->low, value);
    ranged->high = fmax(ranged->high, value);
}

static lee_ranged point(double value) {
    return (lee_ranged){value, value, value};
}

/* Where the stretches of two neighbouring waters meet: at the crest between
 * them, or half way without one. */
static double meeting(const lee_profile *profile, const lee_steady_water *left,
                      const lee_steady_water *right) {
    const double crest = lee_steady_crest(profile, left, right);
    return isnan(crest) ? 0.5 * (left->to + right->from) : crest;
}

/* Levels of a member on the stretch of axis that is one water's, whatever
 * parts or joins there. */
static lee_level_extremes levels_on_stretch(const lee_profile *profile,
                                            const solutions *all, size_t member,
                                            size_t water) {
    const lee_steady *main = &all->steady[0];
    const lee_steady_water *own = &main->water[water];
    const double from =
        water > 0 ? meeting(profile, own - 1, own) : profile->chainage[0];
    const double to = water + 1 < main->count
                          ? meeting(profile, own, own + 1)
                          : profile->chainage[profile->n - 1];
    return lee_steady_extremes(&all->steady[member], from, to);
}

/* Widens a water's numbers by the highest and the lowest level that a member
 * has on its stretch, whether there as one water or as several; where the
 * member leaves it dry there is no low end. */
static void widen_water(const lee_level_extremes *levels, double still_water,
                        lee_water_estimate *water) {
    if (isnan(levels->highest)) {
        water->set_up.low = NAN;
        water->set_down.low = NAN;
        water->tilt.low = 0.0;
        return;
    }
    widen(&water->set_up, levels->highest - still_water);
    widen(&water->set_down, levels->lowest - still_water);
    widen(&water->tilt, levels->highest - levels->lowest);
}

static lee_status copy_nodes(const lee_steady_water *from,
                             lee_water_estimate *water, lee_error *error) {
    water->node = calloc(from->node_count + 1, sizeof *water->node);
    if (water->node == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu nodes",
                        from->node_count);
    }
    water->node_count = from->node_count;
    for (size_t i = 0; i < from->node_count; i++) {
        water->node[i] = from->node[i];
    }
    return LEE_OK;
}

static lee_status tell_waters(const lee_profile *profile, const solutions *all,
                              double still_water, lee_wind_estimate *wind,
                              lee_error *error) {
    const lee_steady *main = &all->steady[0];
    wind->water = calloc(main->count + 1, sizeof *wind->water);
    if (wind->water == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu waters",
                        main->count);
    }
    for (size_t i = 0; i < main->count; i++) {
        const lee_steady_water *from = &main->water[i];
        lee_water_estimate *water = &wind->water[wind->water_count++];
        *water = (lee_water_estimate){
            .from = from->from,
            .to = from->to,
            .set_up = point(from->set_up),
            .set_up_at = from->set_up_at,
            .set_down = point(from->set_down),
            .set_down_at = from->set_down_at,
            .tilt = point(from->tilt),
            .volume_defect = from->volume_defect,
            .first_period = from->first_period,
            .develop_time = 0.5 * from->first_period,
        };
        const lee_status status = copy_nodes(from, water, error);
        if (status != LEE_OK) {
            return status;
        }
        for (size_t k = 1; k < all->count; k++) {
            const lee_level_extremes levels =
                levels_on_stretch(profile, all, k, i);
            widen_water(&levels, still_water, water);
        }
    }
    return LEE_OK;
}

/* Highest set-up, lowest set-down and largest tilt of all waters. */
typedef struct extremes {
    double set_up;
    double set_up_at;
    double set_down;
    double set_down_at;
    double tilt;
    double volume_defect;
} extremes;

static extremes extremes_of(const lee_steady *steady) {
    extremes all = {.set_up = NAN, .set_down = NAN, .tilt = 0.0};
    for (size_t i = 0; i < steady->count; i++) {
        const lee_steady_water *water = &steady->water[i];
        if (!(water->set_up <= all.set_up)) {
            all.set_up = water->set_up;
            all.set_up_at = water->set_up_at;
        }
        if (!(water->set_down >= all.set_down)) {
            all.set_down = water->set_down;
            all.set_down_at = water->set_down_at;
        }
        all.tilt = fmax(all.tilt, water->tilt);
        all.volume_defect = fmax(all.volume_defect, water->volume_defect);
    }
    return all;
}

static void tell_extremes(const lee_profile *profile, const solutions *all,
                          lee_wind_estimate *wind) {
    const extremes main = extremes_of(&all->steady[0]);
    wind->set_up = point(main.set_up);
    wind->set_up_at = main.set_up_at;
    wind->set_down = point(main.set_down);
    wind->set_down_at = main.set_down_at;
    wind->tilt = point(main.tilt);
    wind->volume_defect = main.volume_defect;
    for (size_t k = 1; k < all->count; k++) {
        const extremes member = extremes_of(&all->steady[k]);
        widen(&wind->set_up, member.set_up);
        widen(&wind->set_down, member.set_down);
        double tilt = 0.0;
        for (size_t i = 0; i < all->steady[0].count; i++) {
            const lee_level_extremes levels =
                levels_on_stretch(profile, all, k, i);
            tilt = fmax(tilt, levels.highest - levels.lowest);
        }
        widen(&wind->tilt, tilt);
    }
}

static lee_status tell_stations(const lee_problem *problem,
                                const solutions *all, lee_wind_estimate *wind,
                                lee_error *error) {
    wind->station = calloc(problem->station_count + 1, sizeof *wind->station);
    if (wind->station == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu stations",
                        problem->station_count);
    }
    for (size_t i = 0; i < problem->station_count; i++) {
        const lee_station *station = &problem->station[i];
        const double level = lee_steady_level_at(&all->steady[0], station->at);
        lee_station_level *out = &wind->station[i];
        out->level = point(level);
        out->section_depth =
            level - lee_profile_bed(&problem->lake.profile, station->at);
        out->depth = level > station->bed ? level - station->bed : NAN;
        bool falls_dry = isnan(level);
        for (size_t k = 1; k < all->count; k++) {
            const double other =
                lee_steady_level_at(&all->steady[k], station->at);
            falls_dry = falls_dry || isnan(other);
            widen(&out->level, other);
        }
        if (falls_dry) {
            out->level.low = NAN;
        }
    }
    return LEE_OK;
}

static lee_status warn_of_shores(const lee_steady *main,
                                 lee_wind_estimate *wind, lee_error *error) {
    lee_status status = LEE_OK;
    if (main->dry_length > 0.0) {
        status = lee_notes_add(&wind->warnings, error,
                               "%.0f m of the axis fall dry at the windward "
                               "shore or over shoals",
                               main->dry_length);
    }
    if (status == LEE_OK && main->has_sill) {
        status = lee_notes_add(&wind->warnings, error,
                               "waters part or join over a sill: the levels "
                               "are those of a wind grown slowly from rest");
    }
    if (status == LEE_OK && main->is_parted && !main->has_sill) {
        status = lee_notes_add(&wind->warnings, error,
                               "the wind parts the water where it falls dry: "
                               "the levels are those of a wind grown slowly "
                               "from rest");
    }
    if (status == LEE_OK && wind->is_across && wind->stress > 0.0) {
        status = lee_notes_add(&wind->warnings, error,
                               "the wind blows across the axis: no end is "
                               "named lee or windward");
    }
    if (status == LEE_OK && !wind->is_across &&
        wind->cross_tilt > cross_tilt_share * wind->tilt.value) {
        status = lee_notes_add(&wind->warnings, error,
                               "the tilt across the axis, %.3f m, passes a "
                               "fifth of the tilt along it",
                               wind->cross_tilt);
    }
    return status;
}

static lee_status warn_of_duration(lee_wind_estimate *wind, lee_error *error) {
    double longest = 0.0;
    for (size_t i = 0; i < wind->water_count; i++) {
        longest = fmax(longest, wind->water[i].develop_time);
    }
    if (wind->wind.duration < longest) {
        return lee_notes_add(
            &wind->warnings, error,
            "the wind lasts %.3g min, less than half the first "
            "period (%.3g min): levels in time tell what it "
            "reaches",
            wind->wind.duration / 60.0, longest / 60.0);
    }
    return LEE_OK;
}

static lee_status tell_wind(const lee_problem *problem,
                            const lee_setting *setting, const solutions *all,
                            lee_wind_estimate *wind, lee_error *error) {
    const lee_steady *main = &all->steady[0];
    const lee_exposure_sample measured = lee_measured(wind->wind.speed);
    wind->speed = lee_setting_speed(problem, setting, &measured);
    wind->along = main->along;
    wind->is_across = !(fabs(main->along) >= across_share);
    wind->return_flow = setting->return_flow;
    wind->cross_tilt = main->cross_tilt;
    wind->cross_tilt_at = main->cross_tilt_at;
    wind->dry_length = main->dry_length;
    tell_extremes(&problem->lake.profile, all, wind);
    lee_drag_input in = setting->fluids;
    in.speed = wind->speed;
    wind->coefficient = lee_drag_coefficient(&setting->drag, &in, NULL, NULL);
    wind->stress = (1.0 - problem->ice) * in.air_density * wind->coefficient *
                   wind->speed * wind->speed;
    lee_status status = lee_setting_warn_of_drag(problem, setting, wind->speed,
                                                 &wind->warnings, error);
    if (status == LEE_OK) {
        status = tell_waters(&problem->lake.profile, all, setting->still_water,
                             wind, error);
    }
    if (status == LEE_OK) {
        status = tell_stations(problem, all, wind, error);
    }
    if (status == LEE_OK) {
        status = warn_of_shores(main, wind, error);
    }
    return status == LEE_OK ? warn_of_duration(wind, error) : status;
}

static lee_status estimate_wind(const lee_problem *problem,
                                const lee_setting *setting,
                                const lee_given_wind *given,
                                lee_wind_estimate *wind, lee_error *error) {
    wind->wind = *given;
    solutions all = {0};
    lee_status status = solve_all(problem, setting, given, &all, error);
    if (status == LEE_OK) {
        status = tell_wind(problem, setting, &all, wind, error);
    }
    free_solutions(&all);
    return status;
}

/* The index-th wind of a list or a scan. */
static lee_given_wind wind_at(const lee_wind_source *source, size_t index) {
    if (source->kind != LEE_WIND_SCAN) {
        return source->given[index];
    }
    lee_given_wind wind = source->given[0];
    wind.from = 2.0 * lee_pi * (double)index / (double)source->directions;
    return wind;
}

static lee_status estimate_winds(const lee_problem *problem,
                                 const lee_setting *setting,
                                 lee_steady_result *result, lee_error *error) {
    const lee_wind_source *source = &problem->wind;
    double fastest = 0.0;
    for (size_t i = 0; i < result->count; i++) {
        const lee_given_wind given = wind_at(source, i);
        const lee_status status =
            estimate_wind(problem, setting, &given, &result->wind[i], error);
        if (status != LEE_OK) {
            return status;
        }
        fastest = fmax(fastest, given.speed);
    }
    const lee_exposure_sample measured = lee_measured(fastest);
    return lee_setting_tell(problem, setting, &measured, NULL, &result->method,
                            error);
}

/* A steady state has one level of each kind: says which one of a series. */
static lee_status warn_of_series(const lee_problem *problem, const char *what,
                                 const lee_level_series *series, double level,
                                 lee_steady_result *result, lee_error *error) {
    if (series->n < 2) {
        return LEE_OK;
    }
    return lee_notes_add(
        &result->warnings, error, "%s is a series: its %s, %.3f m, is used",
        what, problem->run.has_from ? "level at run.from" : "first level",
        level);
}

static lee_status warn_of_levels(const lee_problem *problem,
                                 const lee_setting *setting,
                                 lee_steady_result *result, lee_error *error) {
    const lee_lake *lake = &problem->lake;
    lee_status status =
        warn_of_series(problem, "still water", &lake->still_water,
                       setting->still_water, result, error);
    if (status == LEE_OK && lake->start.is_held) {
        status = warn_of_series(problem, "the level held at the start",
                                &lake->start.level, setting->start_level,
                                result, error);
    }
    if (status == LEE_OK && lake->end.is_held) {
        status =
            warn_of_series(problem, "the level held at the end",
                           &lake->end.level, setting->end_level, result, error);
    }
    return status;
}

lee_status lee_estimate_steady(const lee_problem *problem,
                               lee_steady_result *result, lee_error *error) {
    const lee_wind_source *source = &problem->wind;
    *result = (lee_steady_result){.station_count = problem->station_count};
    if (source->kind != LEE_WIND_GIVEN && source->kind != LEE_WIND_SCAN) {
        return lee_fail(error, LEE_ERR_DATA,
                        "steady levels need a given wind (speed and from, a "
                        "list of winds, or speed and directions), not a "
                        "record or a storm");
    }
    lee_setting setting = {0};
    lee_status status = lee_exposure_check(&problem->exposure, error);
    if (status == LEE_OK) {
        status = lee_setting_init(
            problem, lee_setting_begin(problem, -INFINITY), &setting, error);
    }
    if (status != LEE_OK) {
        return status;
    }
    result->still_water = setting.still_water;
    result->count = source->kind == LEE_WIND_SCAN ? source->directions
                                                  : source->given_count;
    result->wind = calloc(result->count + 1, sizeof *result->wind);
    if (result->wind == NULL) {
        result->count = 0;
        status = lee_fail(error, LEE_ERR_MEMORY, "no room for the winds");
    }
    if (status == LEE_OK) {
        status = estimate_winds(problem, &setting, result, error);
    }
    if (status == LEE_OK) {
        status = warn_of_levels(problem, &setting, result, error);
    }
    lee_setting_free(&setting);
    if (status == LEE_OK) {
        status = lee_air_tell(problem, NULL, &result->method, &result->warnings,
                              error);
    }
    if (status != LEE_OK) {
        lee_steady_result_free(result);
    }
    return status;
}

static bool is_past(const lee_threshold *threshold, double level) {
    if (isnan(level)) {
        return threshold->is_below;
    }
    return threshold->is_below ? level < threshold->level
                               : level > threshold->level;
}

lee_reach lee_threshold_reach(const lee_threshold *threshold,
                              const lee_ranged *level) {
    if (is_past(threshold, level->value)) {
        return LEE_REACH_VALUE;
    }
    return is_past(threshold, threshold->is_below ? level->low : level->high)
               ? LEE_REACH_RANGE
               : LEE_REACH_NOT;
}

static void free_wind(lee_wind_estimate *wind) {
    for (size_t i = 0; i < wind->water_count; i++) {
        free(wind->water[i].node);
    }
    free(wind->water);
    free(wind->station);
    lee_notes_free(&wind->warnings);
}

void lee_steady_result_free(lee_steady_result *result) {
    for (size_t i = 0; i < result->count; i++) {
        free_wind(&result->wind[i]);
    }
    free(result->wind);
    lee_method_free(&result->method);
    lee_notes_free(&result->warnings);
    *result = (lee_steady_result){0};
}
