/* levels_json.c - steady levels and level series as JSON summaries. */
#include <math.h>

#include "output/formulas.h"
#include "output/json_parts.h"

#include "leewater/output.h"

/* ---- steady ---- */

static void put_water(lee_json *json, const lee_water_estimate *water) {
    lee_json_open_object(json, NULL);
    lee_json_put_number(json, "from_m", water->from);
    lee_json_put_number(json, "to_m", water->to);
    lee_json_put_ranged(json, "set_up_m", "set_up_range_m", &water->set_up);
    lee_json_put_number(json, "set_up_at_m", water->set_up_at);
    lee_json_put_ranged(json, "set_down_m", "set_down_range_m",
                        &water->set_down);
    lee_json_put_number(json, "set_down_at_m", water->set_down_at);
    lee_json_put_ranged(json, "tilt_m", "tilt_range_m", &water->tilt);
    lee_json_open_list(json, "nodes_m");
    for (size_t i = 0; i < water->node_count; i++) {
        lee_json_put_number(json, NULL, water->node[i]);
    }
    lee_json_close(json);
    lee_json_put_number(json, "first_period_s", water->first_period);
    lee_json_put_number(json, "develop_time_s", water->develop_time);
    lee_json_put_number(json, "volume_defect", water->volume_defect);
    lee_json_close(json);
}

static void put_station_level(lee_json *json, const lee_station *station,
                              const lee_station_level *at) {
    lee_json_open_object(json, NULL);
    lee_json_put_text(json, "name", station->name);
    lee_json_put_number(json, "chainage_m", station->at);
    lee_json_put_ranged(json, "level_m", "range_m", &at->level);
    lee_json_put_number(json, "section_depth_m", at->section_depth);
    if (!isnan(station->bed)) {
        lee_json_put_number(json, "depth_m", at->depth);
    }
    if (!isnan(station->bed) && isnan(at->depth)) {
        lee_json_put_text(json, "depth_reason", "its bed is dry");
    }
    lee_json_open_list(json, "thresholds");
    for (size_t i = 0; i < station->threshold_count; i++) {
        const lee_threshold *threshold = &station->threshold[i];
        const lee_reach reach = lee_threshold_reach(threshold, &at->level);
        lee_json_open_object(json, NULL);
        lee_json_put_number(json, "level_m", threshold->level);
        lee_json_put_text(json, "side",
                          threshold->is_below ? "below" : "above");
        lee_json_put_flag(json, "is_reached", reach == LEE_REACH_VALUE);
        lee_json_put_flag(json, "is_reached_in_range", reach != LEE_REACH_NOT);
        lee_json_close(json);
    }
    lee_json_close(json);
    lee_json_close(json);
}

static void put_wind_levels(lee_json *json, const lee_wind_estimate *wind) {
    lee_json_put_ranged(json, "set_up_m", "set_up_range_m", &wind->set_up);
    lee_json_put_number(json, "set_up_at_m", wind->set_up_at);
    lee_json_put_ranged(json, "set_down_m", "set_down_range_m",
                        &wind->set_down);
    lee_json_put_number(json, "set_down_at_m", wind->set_down_at);
    lee_json_put_ranged(json, "tilt_m", "tilt_range_m", &wind->tilt);
    lee_json_put_number(json, "cross_tilt_m", wind->cross_tilt);
    lee_json_put_number(json, "cross_tilt_at_m", wind->cross_tilt_at);
    lee_json_put_number(json, "dry_m", wind->dry_length);
    lee_json_put_number(json, "volume_defect", wind->volume_defect);
}

static void put_wind(lee_json *json, const lee_case *from,
                     const lee_steady_result *result,
                     const lee_wind_estimate *wind) {
    const lee_problem *problem = &from->problem;
    const lee_formula_question asked = lee_ask_formulas(from, result, wind);
    lee_json_open_object(json, NULL);
    lee_json_put_number(json, "speed_m_s", wind->wind.speed);
    lee_json_put_degrees(json, "from_degree", wind->wind.from);
    if (!isnan(wind->wind.duration)) {
        lee_json_put_number(json, "duration_s", wind->wind.duration);
    }
    lee_json_put_number(json, "speed_10_m_over_water_m_s", wind->speed);
    lee_json_put_number(json, "drag_coefficient", wind->coefficient);
    lee_json_put_number(json, "stress_Pa", wind->stress);
    lee_json_put_number(json, "along_share", wind->along);
    lee_json_put_flag(json, "is_across", wind->is_across);
    lee_json_put_number(json, "return_flow", wind->return_flow);
    lee_json_open_list(json, "waters");
    for (size_t i = 0; i < wind->water_count; i++) {
        put_water(json, &wind->water[i]);
    }
    lee_json_close(json);
    put_wind_levels(json, wind);
    lee_json_open_list(json, "stations");
    for (size_t i = 0; i < problem->station_count; i++) {
        put_station_level(json, &problem->station[i], &wind->station[i]);
    }
    lee_json_close(json);
    lee_json_put_formulas(json, &asked);
    lee_json_put_notes(json, "warnings", &wind->warnings);
    lee_json_close(json);
}

void lee_json_put_winds(lee_json *json, const lee_case *from,
                        const lee_steady_result *result) {
    lee_json_open_list(json, "winds");
    for (size_t i = 0; i < result->count; i++) {
        put_wind(json, from, result, &result->wind[i]);
    }
    lee_json_close(json);
}

lee_status lee_json_steady(FILE *stream, const lee_case *from,
                           const lee_steady_result *result, lee_error *error) {
    lee_json json = {0};
    lee_json_begin(&json, "steady");
    lee_json_put_case(&json, from, result->still_water);
    lee_json_put_winds(&json, from, result);
    lee_json_put_notes(&json, "warnings", &result->warnings);
    lee_json_put_method(&json, &result->method);
    lee_json_put_caution(&json);
    return lee_json_write(&json, stream, error);
}

/* ---- run ---- */

static void put_exceedance(lee_json *json, const lee_exceedance *seen) {
    lee_json_open_object(json, NULL);
    lee_json_put_number(json, "level_m", seen->threshold.level);
    lee_json_put_text(json, "side",
                      seen->threshold.is_below ? "below" : "above");
    lee_json_put_time(json, "first_time", seen->is_reached, seen->first_time);
    lee_json_put_number(json, "longest_s", seen->longest);
    lee_json_put_number(json, "total_s", seen->total);
    lee_json_put_count(json, "times", seen->times);
    lee_json_put_time(json, "return_time",
                      seen->is_reached && seen->has_returned,
                      seen->return_time);
    lee_json_close(json);
}

static const char *residual_reason(lee_residual state) {
    switch (state) {
    case LEE_RESIDUAL_NO_WIND:
        return "no wind blows in the run";
    case LEE_RESIDUAL_NO_DROP:
        return "the strongest wind does not drop within the run";
    case LEE_RESIDUAL_DRY:
        return "the station lies dry once the wind drops";
    case LEE_RESIDUAL_UNSEEN:
        return "a gap or a start at rest follows the strongest wind";
    case LEE_RESIDUAL_FOUND:
        break;
    }
    return "";
}

static void put_residual(lee_json *json, const lee_station_series *series) {
    const bool is_known = !isnan(series->residual);
    lee_json_put_number(json, "residual_m", series->residual);
    lee_json_put_time(json, "residual_time", is_known, series->residual_time);
    if (!is_known) {
        lee_json_put_text(json, "residual_reason",
                          residual_reason(series->residual_state));
    }
}

static void put_least_depth(lee_json *json, const lee_station *station,
                            const lee_station_series *series) {
    const double depth = lee_least_depth(station, series);
    if (isnan(station->bed)) {
        return;
    }
    lee_json_put_number(json, "least_depth_m", depth);
    if (isnan(depth)) {
        lee_json_put_text(json, "least_depth_reason",
                          series->dry_time > 0.0 ? "the section falls dry"
                                                 : "its bed falls dry");
    }
}

static void put_station_series(lee_json *json, const lee_station *station,
                               const lee_station_series *series) {
    const bool is_wet = !isnan(series->max.value);
    lee_json_open_object(json, NULL);
    lee_json_put_text(json, "name", station->name);
    lee_json_put_number(json, "chainage_m", station->at);
    lee_json_put_ranged(json, "max_m", "max_range_m", &series->max);
    lee_json_put_time(json, "max_time", is_wet, series->max_time);
    lee_json_put_ranged(json, "min_m", "min_range_m", &series->min);
    lee_json_put_time(json, "min_time", is_wet, series->min_time);
    put_least_depth(json, station, series);
    lee_json_put_number(json, "dry_s", series->dry_time);
    put_residual(json, series);
    lee_json_open_list(json, "thresholds");
    for (size_t i = 0; i < series->exceedance_count; i++) {
        put_exceedance(json, &series->exceedance[i]);
    }
    lee_json_close(json);
    lee_json_close(json);
}

static void put_strongest(lee_json *json, const lee_run_result *result) {
    const bool blows = result->strongest > 0.0;
    lee_json_open_object(json, "strongest_wind");
    lee_json_put_number(json, "speed_10_m_over_water_m_s", result->strongest);
    if (blows) {
        lee_json_put_degrees(json, "from_degree", result->strongest_from);
    } else {
        lee_json_put_number(json, "from_degree", NAN);
    }
    lee_json_put_time(json, "time", blows, result->strongest_time);
    if (!blows) {
        lee_json_put_text(json, "reason", "calm throughout");
    }
    lee_json_close(json);
}

static void put_computation(lee_json *json, const lee_run_result *result) {
    lee_json_put_number(json, "volume_defect", result->volume_defect);
    lee_json_put_number(json, "step_s", result->step);
    lee_json_put_count(json, "cells", result->cells);
    lee_json_put_number(json, "first_period_s", result->first_period);
    lee_json_put_count(json, "pieces", result->pieces);
    lee_json_put_number(json, "numerical_error_m", result->numerical_error);
    lee_json_put_number(json, "numerical_error_step_m",
                        result->numerical_error_time);
    lee_json_put_number(json, "numerical_error_cells_m",
                        result->numerical_error_space);
    if (isnan(result->numerical_error)) {
        lee_json_put_text(json, "numerical_error_reason", "not computed");
    }
}

lee_status lee_json_run(FILE *stream, const lee_case *from,
                        const lee_run_result *result, lee_error *error) {
    lee_json json = {0};
    lee_json_begin(&json, "run");
    lee_json_put_case(&json, from, result->still_water);
    lee_json_put_time(&json, "from", result->n > 0,
                      result->n > 0 ? result->time[0] : 0);
    lee_json_put_time(&json, "to", result->n > 0,
                      result->n > 0 ? result->time[result->n - 1] : 0);
    lee_json_put_count(&json, "times", result->n);
    put_strongest(&json, result);
    lee_json_open_list(&json, "stations");
    for (size_t i = 0; i < result->station_count; i++) {
        put_station_series(&json, &from->problem.station[i],
                           &result->station[i]);
    }
    lee_json_close(&json);
    put_computation(&json, result);
    lee_json_put_notes(&json, "warnings", &result->warnings);
    lee_json_put_method(&json, &result->method);
    lee_json_put_caution(&json);
    return lee_json_write(&json, stream, error);
}
