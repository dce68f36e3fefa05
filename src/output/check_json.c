/* check_json.c - what was understood of a case, as JSON. */
#include <stdbool.h>

#include "output/json_parts.h"

#include "leewater/output.h"

static const char *wind_kind(const lee_wind_source *wind) {
    switch (wind->kind) {
    case LEE_WIND_NONE:
        return "none";
    case LEE_WIND_GIVEN:
        return "given";
    case LEE_WIND_SCAN:
        return "scan";
    case LEE_WIND_RECORD:
        return "record";
    case LEE_WIND_STORM:
        return "storm";
    }
    return "";
}

static const char *stamp_name(lee_stamp stamp) {
    switch (stamp) {
    case LEE_STAMP_INSTANT:
        return "instant";
    case LEE_STAMP_START:
        return "start";
    case LEE_STAMP_MIDDLE:
        return "middle";
    case LEE_STAMP_END:
        return "end";
    }
    return "";
}

static void put_lake(lee_json *json, const lee_case *from,
                     const lee_problem_check *check) {
    const lee_profile *profile = &from->problem.lake.profile;
    lee_json_open_object(json, "water");
    lee_json_put_count(json, "profile_rows", profile->n);
    lee_json_put_number(json, "from_m", profile->chainage[0]);
    lee_json_put_number(json, "to_m", profile->chainage[profile->n - 1]);
    lee_json_put_flag(json, "start_is_held", from->problem.lake.start.is_held);
    lee_json_put_flag(json, "end_is_held", from->problem.lake.end.is_held);
    lee_json_put_number(json, "wetted_length_m", check->lake.wet_length);
    lee_json_put_number(json, "area_m2", check->lake.area);
    lee_json_put_number(json, "volume_m3", check->lake.volume);
    lee_json_put_number(json, "mean_depth_m", check->lake.mean_depth);
    lee_json_put_number(json, "greatest_depth_m", check->lake.max_depth);
    lee_json_close(json);
}

static void put_gaps(lee_json *json, const lee_wind_check *record) {
    lee_json_open_list(json, "gaps");
    for (size_t i = 0; i < record->gap_count; i++) {
        lee_json_open_object(json, NULL);
        lee_json_put_time(json, "after", true, record->gap[i].after);
        lee_json_put_time(json, "before", true, record->gap[i].before);
        lee_json_put_flag(json, "is_long", record->gap[i].is_long);
        lee_json_close(json);
    }
    lee_json_close(json);
}

static void put_months(lee_json *json, const lee_wind_summary *summary) {
    lee_json_open_list(json, "months");
    for (size_t i = 0; i < summary->month_count; i++) {
        const lee_wind_month *month = &summary->month[i];
        lee_json_open_object(json, NULL);
        lee_json_put_count(json, "year", (size_t)month->year);
        lee_json_put_count(json, "month", (size_t)month->month);
        lee_json_put_count(json, "samples", month->samples);
        lee_json_put_count(json, "with_wind", month->with_wind);
        lee_json_put_number(json, "coverage", month->coverage);
        lee_json_close(json);
    }
    lee_json_close(json);
}

static void put_rose(lee_json *json, const lee_wind_summary *summary) {
    lee_json_open_object(json, "rose");
    lee_json_open_list(json, "class_from_m_s");
    for (size_t k = 0; k < LEE_ROSE_CLASSES; k++) {
        lee_json_put_number(json, NULL, lee_rose_class_from(k));
    }
    lee_json_close(json);
    lee_json_put_flag(json, "tens_are_spread", summary->is_spread);
    lee_json_put_number(json, "calm_share", summary->calm);
    lee_json_open_list(json, "sectors");
    for (size_t i = 0; i < LEE_ROSE_DIRECTIONS; i++) {
        lee_json_open_object(json, NULL);
        lee_json_put_number(json, "from_degree",
                            360.0 / LEE_ROSE_DIRECTIONS * (double)i);
        lee_json_open_list(json, "class_shares");
        for (size_t k = 0; k < LEE_ROSE_CLASSES; k++) {
            lee_json_put_number(json, NULL, summary->rose[i][k]);
        }
        lee_json_close(json);
        lee_json_close(json);
    }
    lee_json_close(json);
    lee_json_close(json);
}

static void put_storms(lee_json *json, const lee_wind_summary *summary) {
    lee_json_open_list(json, "storms");
    for (size_t i = 0; i < summary->storm_count; i++) {
        const lee_wind_storm *storm = &summary->storm[i];
        lee_json_open_object(json, NULL);
        lee_json_put_time(json, "time", true, storm->time);
        lee_json_put_number(json, "speed_m_s", storm->speed);
        lee_json_put_degrees(json, "from_degree", storm->from);
        lee_json_put_number(json, "duration_s", storm->duration);
        lee_json_put_flag(json, "is_cut", storm->is_cut);
        lee_json_put_flag(json, "is_spike", storm->is_spike);
        lee_json_close(json);
    }
    lee_json_close(json);
}

static void put_summary(lee_json *json, const lee_wind_summary *summary) {
    lee_json_put_number(json, "coverage", summary->coverage);
    put_months(json, summary);
    put_rose(json, summary);
    lee_json_open_list(json, "percentiles");
    for (size_t i = 0; i < LEE_WIND_PERCENTILES; i++) {
        lee_json_open_object(json, NULL);
        lee_json_put_number(json, "percent", lee_wind_percent(i));
        lee_json_put_number(json, "speed_m_s", summary->percentile[i]);
        lee_json_close(json);
    }
    lee_json_close(json);
    put_storms(json, summary);
}

static void put_record(lee_json *json, const lee_case *from,
                       const lee_problem_check *check) {
    const lee_wind_check *record = &check->record;
    lee_json_open_list(json, "files");
    for (size_t i = 0; i < from->problem.wind.record_count; i++) {
        lee_json_put_text(json, NULL, from->problem.wind.record_path[i]);
    }
    lee_json_close(json);
    if (from->problem.wind.record_told.n > 0) {
        lee_json_put_notes(json, "read", &from->problem.wind.record_told);
    }
    lee_json_put_text(json, "stamp",
                      stamp_name(from->problem.wind.record.stamp));
    lee_json_put_count(json, "samples", record->samples);
    lee_json_put_time(json, "first", true, record->first);
    lee_json_put_time(json, "last", true, record->last);
    lee_json_put_number(json, "step_s", (double)record->step);
    lee_json_put_count(json, "irregular", record->irregular);
    lee_json_put_count(json, "missing", record->missing);
    lee_json_put_count(json, "duplicates", record->duplicates);
    lee_json_put_count(json, "merged", record->merged);
    lee_json_put_count(json, "completed", record->completed);
    lee_json_put_count(json, "variable_calm", record->variable_calm);
    lee_json_put_count(json, "variable_missing", record->variable_missing);
    lee_json_put_count(json, "beyond_belief", record->beyond_belief);
    lee_json_put_count(json, "spikes", record->spikes);
    lee_json_put_count(json, "calms", record->calms);
    lee_json_put_count(json, "pieces", check->pieces);
    lee_json_put_number(json, "mean_m_s", record->mean_speed);
    lee_json_put_number(json, "fastest_m_s", record->fastest);
    lee_json_put_degrees(json, "fastest_from_degree", record->fastest_from);
    lee_json_put_time(json, "fastest_time", true, record->fastest_time);
    put_gaps(json, record);
    put_summary(json, &check->summary);
}

static void put_stations(lee_json *json, const lee_problem *problem) {
    lee_json_open_list(json, "stations");
    for (size_t i = 0; i < problem->station_count; i++) {
        const lee_station *station = &problem->station[i];
        lee_json_open_object(json, NULL);
        lee_json_put_text(json, "name", station->name);
        lee_json_put_number(json, "chainage_m", station->at);
        lee_json_put_number(json, "bed_m", station->bed);
        lee_json_put_count(json, "thresholds", station->threshold_count);
        lee_json_close(json);
    }
    lee_json_close(json);
}

lee_status lee_json_check(FILE *stream, const lee_case *from,
                          const lee_problem_check *check, lee_error *error) {
    const lee_wind_source *wind = &from->problem.wind;
    lee_json json = {0};
    lee_json_begin(&json, "check");
    lee_json_put_case(&json, from, check->still_water);
    put_lake(&json, from, check);
    put_stations(&json, &from->problem);
    lee_json_open_object(&json, "wind");
    lee_json_put_text(&json, "kind", wind_kind(wind));
    if (check->has_record && wind->kind == LEE_WIND_RECORD) {
        put_record(&json, from, check);
    }
    lee_json_close(&json);
    lee_json_put_notes(&json, "warnings", &check->warnings);
    lee_json_put_method(&json, &check->method);
    lee_json_put_caution(&json);
    return lee_json_write(&json, stream, error);
}
