/* tell.c - words for what stands behind the numbers. */
#include "series/setting.h"

#include <math.h>
#include <stddef.h>
#include <stdio.h>
#include <string.h>

#include "leewater/calendar.h"

void lee_method_free(lee_method *method) {
    lee_notes_free(&method->range_members);
    lee_notes_free(&method->record);
    lee_notes_free(&method->not_used);
    *method = (lee_method){0};
}

static void tell_bed(const lee_bed_law *bed, size_t size, char text[]) {
    static const struct {
        lee_bed_kind kind;
        const char *law;
        const char *unit;
    } words[] = {
        {LEE_BED_MANNING,   "Manning n =",               " s m-1/3" },
        {LEE_BED_CHEZY,     "Chezy C =",                 " m1/2 s-1"},
        {LEE_BED_ROUGHNESS, "log law, roughness length", " m"       },
        {LEE_BED_DRAG,      "quadratic coefficient",     ""         },
        {LEE_BED_LINEAR,    "linear, r =",               " s-1"     },
    };
    (void)snprintf(text, size, "no bed friction");
    for (size_t i = 0; i < sizeof words / sizeof words[0]; i++) {
        if (words[i].kind == bed->kind) {
            (void)snprintf(text, size, "%s %g%s", words[i].law, bed->value,
                           words[i].unit);
        }
    }
}

static void tell_return_flow(const lee_problem *problem,
                             const lee_setting *setting, size_t size,
                             char text[]) {
    const lee_drag_relation *relation = problem->drag.relation;
    if (relation != NULL && relation->includes_return_flow) {
        (void)snprintf(text, size, "%s was fitted on set-up itself",
                       relation->name);
    } else if (setting->return_flow_forced) {
        (void)snprintf(text, size, "one end is open");
    } else if (problem->return_flow.is_computed) {
        (void)snprintf(text, size,
                       "computed, 1 + sqrt(C_f)/0.40 at the mean depth %.2f m",
                       setting->lake.mean_depth);
    } else {
        (void)snprintf(text, size, "given");
    }
}

/* How many relations take part, and how many of them extrapolate. */
static lee_status tell_relations(const lee_problem *problem,
                                 const lee_setting *setting,
                                 const lee_exposure_sample *measured,
                                 lee_notes *notes, lee_error *error) {
    const double speed = lee_setting_speed(problem, setting, measured);
    size_t count = 0;
    size_t outside = 0;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        if (relation->is_for_range) {
            count++;
            outside +=
                !(speed >= relation->speed_min && speed <= relation->speed_max);
        }
    }
    if (!(speed > 0.0)) { /* a calm needs no relation */
        return lee_notes_add(notes, error,
                             "drag: %zu published relations, one a paper, and "
                             "the one used",
                             count);
    }
    return lee_notes_add(notes, error,
                         "drag: %zu published relations, one a paper, and the "
                         "one used; %zu of them extrapolate at %.1f m/s",
                         count, outside, speed);
}

static lee_status tell_share(const char *what, double share, lee_notes *notes,
                             lee_error *error) {
    if (isnan(share)) {
        return lee_notes_add(notes, error,
                             "%s: no uncertainty stated, none taken", what);
    }
    return lee_notes_add(notes, error, "%s: %.3g %% either way", what,
                         100.0 * share);
}

static lee_status tell_depth(double depth, lee_notes *notes, lee_error *error) {
    if (isnan(depth)) {
        return lee_notes_add(notes, error,
                             "depth: no uncertainty stated, none taken");
    }
    return lee_notes_add(notes, error, "depth: %.3g m either way", depth);
}

static lee_status tell_range(const lee_problem *problem,
                             const lee_setting *setting,
                             const lee_exposure_sample *measured,
                             lee_notes *notes, lee_error *error) {
    const lee_uncertainty *doubt = &problem->uncertainty;
    lee_status status =
        tell_relations(problem, setting, measured, notes, error);
    if (status == LEE_OK) {
        status = tell_share("wind speed", doubt->wind, notes, error);
    }
    if (status == LEE_OK) {
        status = tell_depth(doubt->depth, notes, error);
    }
    if (status == LEE_OK) {
        status = tell_share("bed friction", doubt->bed, notes, error);
    }
    if (status == LEE_OK) {
        status = lee_notes_add(notes, error, "return-flow factor: 1 to %.2f",
                               setting->return_flow_high);
    }
    if (status == LEE_OK) {
        status = lee_notes_add(notes, error,
                               "low end: tilt divided by %.1f, for the depth "
                               "across the lake that a table of bed and width "
                               "hides",
                               lee_lateral_depth_divisor);
    }
    return status;
}

lee_status lee_setting_tell(const lee_problem *problem,
                            const lee_setting *setting,
                            const lee_exposure_sample *measured,
                            const lee_exposure_summary *summary,
                            lee_method *method, lee_error *error) {
    *method = (lee_method){
        .air_density_value = setting->fluids.air_density,
        .water_density_value = setting->fluids.water_density,
        .gravity = setting->gravity,
        .return_flow = setting->return_flow,
        .corrected = lee_exposure_settled(&problem->exposure, measured),
        .reference_height = 10.0,
    };
    (void)lee_drag_describe(&problem->drag, sizeof method->drag, method->drag);
    (void)lee_air_density_of(&problem->air, problem->lake.altitude,
                             sizeof method->air_density, method->air_density);
    tell_return_flow(problem, setting, sizeof method->return_flow_how,
                     method->return_flow_how);
    tell_bed(&problem->bed, sizeof method->bed, method->bed);
    method->correction_count =
        lee_exposure_chain(&problem->exposure, &setting->drag, &setting->fluids,
                           measured, summary, method->correction);
    const lee_status status =
        lee_unused_tell(problem, &method->not_used, error);
    return status == LEE_OK ? tell_range(problem, setting, measured,
                                         &method->range_members, error)
                            : status;
}

lee_status lee_setting_warn_of_drag(const lee_problem *problem,
                                    const lee_setting *setting, double speed,
                                    lee_notes *warnings, lee_error *error) {
    const lee_drag_relation *relation = problem->drag.relation;
    lee_drag_input in = setting->fluids;
    in.speed = speed;
    if (!(in.speed > 0.0)) {
        return LEE_OK; /* a calm has no drag */
    }
    bool extrapolated = false;
    bool capped = false;
    (void)lee_drag_coefficient(&setting->drag, &in, &extrapolated, &capped);
    lee_status status = LEE_OK;
    if (extrapolated) {
        status = lee_notes_add(
            warnings, error,
            "drag extrapolated: %.1f m/s is outside the speeds that %s covers",
            in.speed, relation != NULL ? relation->name : "the drag table");
    }
    if (status == LEE_OK && capped) {
        status = lee_notes_add(warnings, error,
                               "drag coefficient held at its cap %.4f at %.1f "
                               "m/s",
                               problem->drag.cap, in.speed);
    }
    return status;
}

static lee_status tell_gap(const lee_wind_gap *gap, const lee_gap_rule *rule,
                           lee_notes *notes, lee_error *error) {
    char after[LEE_TIME_TEXT];
    char before[LEE_TIME_TEXT];
    return lee_notes_add(notes, error, "gap from %s to %s: %s",
                         lee_time_format_short(gap->after, after),
                         lee_time_format_short(gap->before, before),
                         rule->split ? "the record is parted there"
                                     : "longer than the gap rule allows");
}

/* Long gaps: the longest, then how many more. */
static lee_status tell_long_gaps(const lee_wind_check *check,
                                 const lee_gap_rule *rule, size_t count,
                                 lee_notes *notes, lee_error *error) {
    enum { TOLD = 3 };
    size_t longest[TOLD];
    const size_t told = lee_wind_longest_gaps(check, TOLD, longest);
    lee_status status = LEE_OK;
    for (size_t i = 0; i < told && status == LEE_OK; i++) {
        const lee_wind_gap *gap = &check->gap[longest[i]];
        if (gap->is_long) {
            status = tell_gap(gap, rule, notes, error);
        }
    }
    if (status == LEE_OK && count > told) {
        status = lee_notes_add(notes, error,
                               "gaps like these, none of them longer: %zu more",
                               count - told);
    }
    return status;
}

static lee_status tell_gaps(const lee_wind_check *check,
                            const lee_gap_rule *rule, lee_notes *notes,
                            lee_error *error) {
    size_t count = 0;
    for (size_t i = 0; i < check->gap_count; i++) {
        count += check->gap[i].is_long;
    }
    const size_t bridged = check->gap_count - count;
    lee_status status = tell_long_gaps(check, rule, count, notes, error);
    if (status == LEE_OK && bridged > 0) {
        status = lee_notes_add(notes, error,
                               "gaps bridged: %zu, each at most %.3g h beyond "
                               "the step",
                               bridged, (double)rule->largest / 3600.0);
    }
    return status;
}

static lee_status tell_oddities(const lee_wind_check *check, lee_notes *notes,
                                lee_error *error) {
    const struct {
        size_t count;
        const char *words;
    } odd[] = {
        {check->irregular,        "steps that differ from the usual one"    },
        {check->missing,          "samples without wind"                    },
        {check->calms,            "calms"                                   },
        {check->duplicates,       "equal repeated rows, dropped"            },
        {check->merged,           "samples of several files merged into one"},
        {check->completed,
         "samples that took what they lacked from another file"             },
        {check->variable_calm,    "\"variable\" below 3 m/s, taken as calm" },
        {check->variable_missing,
         "\"variable\" from 3 m/s on, taken as missing"                     },
        {check->beyond_belief,    "speeds beyond belief (over 75 m/s), kept"},
        {check->spikes,           "spikes, kept"                            },
    };
    lee_status status = LEE_OK;
    for (size_t i = 0; i < sizeof odd / sizeof odd[0] && status == LEE_OK;
         i++) {
        if (odd[i].count > 0) {
            status = lee_notes_add(notes, error, "%s: %zu", odd[i].words,
                                   odd[i].count);
        }
    }
    return status;
}

/* Nothing is changed for being hard to believe, so it drives the water. */
static lee_status warn_of_doubts(const lee_wind_check *check,
                                 lee_notes *warnings, lee_error *error) {
    const struct {
        size_t count;
        int64_t first;
        const char *what;
    } doubts[] = {
        {check->beyond_belief, check->beyond_belief_time,
         "winds beyond belief, faster than 75 m/s"                 },
        {check->spikes,        check->spike_time,
         "spikes, winds far above those just before and after them"},
    };
    lee_status status = LEE_OK;
    for (size_t i = 0; i < sizeof doubts / sizeof doubts[0] && status == LEE_OK;
         i++) {
        char first[LEE_TIME_TEXT];
        if (doubts[i].count > 0) {
            status = lee_notes_add(
                warnings, error,
                "%s: %zu in the record%s %s, kept unchanged: levels may "
                "follow a faulty reading",
                doubts[i].what, doubts[i].count,
                doubts[i].count > 1 ? ", the first on" : ", on",
                lee_time_format_short(doubts[i].first, first));
        }
    }
    return status;
}

lee_status lee_record_tell(const lee_wind_check *check,
                           const lee_gap_rule *rule, lee_notes *notes,
                           lee_notes *warnings, lee_error *error) {
    char first[LEE_TIME_TEXT];
    char last[LEE_TIME_TEXT];
    lee_status status = lee_notes_add(
        notes, error, "%zu samples from %s to %s, usual step %.4g min",
        check->samples, lee_time_format_short(check->first, first),
        lee_time_format_short(check->last, last), (double)check->step / 60.0);
    if (status == LEE_OK) {
        status = tell_oddities(check, notes, error);
    }
    if (status == LEE_OK) {
        status = tell_gaps(check, rule, notes, error);
    }
    return status == LEE_OK ? warn_of_doubts(check, warnings, error) : status;
}

/* Columns of a record that may take no part. The one place that says so: what
 * comes into use leaves its row here, and no output names it any more. */
static const struct {
    const char *name;
    size_t offset;
} columns[] = {
    {"air pressure",      offsetof(lee_wind_record, pressure)         },
    {"air temperature",   offsetof(lee_wind_record, air_temperature)  },
    {"water temperature", offsetof(lee_wind_record, water_temperature)},
    {"humidity",          offsetof(lee_wind_record, humidity)         },
};

static bool has_column(const lee_wind_record *record, size_t offset) {
    const double *values;
    memcpy(&values, (const char *)record + offset, sizeof values);
    return values != NULL;
}

/* Temperatures of the record take part where stability goes by them, its air
 * where the case does not give the density. */
static bool is_used(const lee_problem *problem, size_t offset) {
    const lee_exposure *exposure = &problem->exposure;
    const bool goes_by_them =
        exposure->stability == LEE_STABILITY_MONIN_OBUKHOV ||
        exposure->stability == LEE_STABILITY_RATIO;
    if (offset == offsetof(lee_wind_record, water_temperature)) {
        return goes_by_them && isnan(exposure->water_temperature);
    }
    if (offset == offsetof(lee_wind_record, air_temperature) && goes_by_them &&
        isnan(exposure->air_temperature)) {
        return true;
    }
    return isnan(problem->air.density);
}

lee_status lee_unused_tell(const lee_problem *problem, lee_notes *unused,
                           lee_error *error) {
    const bool has_record = problem->wind.kind == LEE_WIND_RECORD;
    lee_status status = LEE_OK;
    for (size_t i = 0; has_record && i < sizeof columns / sizeof columns[0] &&
                       status == LEE_OK;
         i++) {
        if (has_column(&problem->wind.record, columns[i].offset) &&
            !is_used(problem, columns[i].offset)) {
            status = lee_notes_add(unused, error, "%s of the record",
                                   columns[i].name);
        }
    }
    return status;
}
