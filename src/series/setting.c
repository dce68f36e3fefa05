/* setting.c - densities, return flow and the pull of the wind. */
#include "series/setting.h"

#include <math.h>
#include <stdio.h>
#include <stdlib.h>

#include "series/air.h"

static double highest_return_flow(const lee_problem *problem,
                                  const lee_setting *setting) {
    const bool is_open =
        !isnan(setting->start_level) || !isnan(setting->end_level);
    const double share =
        isnan(problem->uncertainty.bed) ? 0.0 : problem->uncertainty.bed;
    const lee_return_flow computed = {.is_computed = true};
    double highest = setting->return_flow;
    for (int sign = -1; sign <= 1; sign += 2) {
        lee_bed_law bed = problem->bed;
        bed.value *= 1.0 + sign * share;
        highest = fmax(highest, lee_return_flow_factor(
                                    &computed, &bed, setting->lake.mean_depth,
                                    setting->gravity, is_open));
    }
    return highest + lee_return_flow_margin;
}

static void settle_return_flow(const lee_problem *problem,
                               lee_setting *setting) {
    const lee_lake *lake = &problem->lake;
    const lee_drag_relation *relation = problem->drag.relation;
    const bool is_open = lake->start.is_held || lake->end.is_held;
    setting->return_flow_forced =
        (relation != NULL && relation->includes_return_flow) ||
        (is_open && !problem->return_flow_given);
    setting->return_flow = lee_return_flow_factor(
        &problem->return_flow, &problem->bed, setting->lake.mean_depth,
        setting->gravity, setting->return_flow_forced);
    setting->return_flow_high = highest_return_flow(problem, setting);
}

/* Solves the drag of the estimate and those of its range. */
static lee_status settle_drags(const lee_problem *problem, lee_setting *setting,
                               lee_error *error) {
    size_t count = 0;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        count += relation->is_for_range ? 1 : 0;
    }
    setting->member = calloc(count + 1, sizeof *setting->member);
    if (setting->member == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu relations",
                        count);
    }
    lee_status status =
        lee_drag_solve(&problem->drag, &setting->fluids, &setting->drag, error);
    for (size_t i = 0; status == LEE_OK && (relation = lee_drag_at(i)) != NULL;
         i++) {
        const lee_drag drag = {.relation = relation, .cap = problem->drag.cap};
        if (relation->is_for_range) {
            status = lee_drag_solve(&drag, &setting->fluids,
                                    &setting->member[setting->member_count++],
                                    error);
        }
    }
    return status;
}

double lee_setting_begin(const lee_problem *problem, double undated) {
    if (problem->run.has_from) {
        return (double)problem->run.from;
    }
    return problem->wind.record.n > 0 ? (double)problem->wind.record.time[0]
                                      : undated;
}

/* The range needs water in the shallow lake too. */
static lee_status check_depth_uncertainty(const lee_problem *problem,
                                          const lee_setting *setting,
                                          lee_error *error) {
    const lee_profile *profile = &problem->lake.profile;
    const double doubt = problem->uncertainty.depth;
    double greatest = -INFINITY;
    for (size_t i = 0; i < profile->n; i++) {
        greatest = fmax(greatest, setting->still_water - profile->bed[i]);
    }
    if (isnan(doubt) || doubt < greatest) {
        return LEE_OK;
    }
    return lee_fail(error, LEE_ERR_DATA,
                    "uncertainty.depth, %.3f m, is not less than the greatest "
                    "depth of the lake, %.3f m at the still-water level %.3f "
                    "m: the shallow end of the range holds no water",
                    doubt, greatest, setting->still_water);
}

lee_status lee_setting_init(const lee_problem *problem, double time,
                            lee_setting *setting, lee_error *error) {
    const lee_lake *lake = &problem->lake;
    char how[160];
    *setting = (lee_setting){
        .still_water = lee_level_at(&lake->still_water, time),
        .gravity = lake->gravity,
        .start_level = NAN,
        .end_level = NAN,
    };
    setting->fluids = (lee_drag_input){
        .air_density =
            lee_air_density_of(&problem->air, lake->altitude, sizeof how, how),
        .water_density = lake->water_density,
        .gravity = lake->gravity,
        .air_viscosity =
            lee_air_viscosity(lee_air_temperature_of(&problem->air)),
    };
    setting->lake = lee_profile_summary(&lake->profile, setting->still_water);
    if (!(setting->lake.volume > 0.0)) {
        return lee_fail(error, LEE_ERR_DATA,
                        "the lake holds no water at the still-water level "
                        "%.3f m: its bed is nowhere below it",
                        setting->still_water);
    }
    lee_status status = check_depth_uncertainty(problem, setting, error);
    if (status != LEE_OK) {
        return status;
    }
    if (lake->start.is_held) {
        setting->start_level = lee_level_at(&lake->start.level, time);
    }
    if (lake->end.is_held) {
        setting->end_level = lee_level_at(&lake->end.level, time);
    }
    settle_return_flow(problem, setting);
    status = settle_drags(problem, setting, error);
    if (status != LEE_OK) {
        lee_setting_free(setting);
    }
    return status;
}

void lee_setting_free(lee_setting *setting) {
    for (size_t i = 0; i < setting->member_count; i++) {
        lee_drag_free(&setting->member[i]);
    }
    free(setting->member);
    lee_drag_free(&setting->drag);
    *setting = (lee_setting){0};
}

static double stress_of(const lee_problem *problem, const lee_setting *setting,
                        const lee_drag *drag,
                        const lee_exposure_sample *measured) {
    lee_drag_input in = setting->fluids;
    in.speed = lee_exposure_speed(&problem->exposure, drag, &setting->fluids,
                                  measured);
    const double coefficient = lee_drag_coefficient(drag, &in, NULL, NULL);
    return in.air_density * coefficient * in.speed * in.speed;
}

double lee_setting_speed(const lee_problem *problem, const lee_setting *setting,
                         const lee_exposure_sample *measured) {
    return lee_exposure_speed(&problem->exposure, &setting->drag,
                              &setting->fluids, measured);
}

/* Widens `range` by what one drag makes of the wind and its uncertainty. */
static void widen(const lee_problem *problem, const lee_setting *setting,
                  const lee_drag *drag, const lee_exposure_sample *measured,
                  lee_pull_range *range) {
    const double share =
        isnan(problem->uncertainty.wind) ? 0.0 : problem->uncertainty.wind;
    const bool holds_it =
        drag->relation != NULL && drag->relation->includes_return_flow;
    lee_exposure_sample slower = *measured;
    lee_exposure_sample faster = *measured;
    slower.speed *= fmax(0.0, 1.0 - share);
    faster.speed *= 1.0 + share;
    const double least = stress_of(problem, setting, drag, &slower);
    const double greatest = stress_of(problem, setting, drag, &faster);
    const double lambda = holds_it ? 1.0 : setting->return_flow_high;
    range->low = fmin(range->low, least / lee_lateral_depth_divisor);
    range->high = fmax(range->high, lambda * greatest);
}

lee_pull_range lee_setting_pull(const lee_problem *problem,
                                const lee_setting *setting,
                                const lee_exposure_sample *measured) {
    lee_pull_range range = {.low = INFINITY, .high = 0.0};
    range.main = setting->return_flow *
                 stress_of(problem, setting, &setting->drag, measured);
    widen(problem, setting, &setting->drag, measured, &range);
    for (size_t i = 0; i < setting->member_count; i++) {
        widen(problem, setting, &setting->member[i], measured, &range);
    }
    return range;
}
