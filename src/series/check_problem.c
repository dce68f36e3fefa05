/* check_problem.c - what was understood, before anything is computed. */
#include <math.h>

#include "leewater/series.h"
#include "series/air.h"
#include "series/run_plan.h"
#include "series/setting.h"

/* The wind that corrections are shown for when it is no record: the fastest
 * there is. */
static lee_exposure_sample shown_wind(const lee_problem *problem) {
    const lee_wind_source *source = &problem->wind;
    double fastest = 0.0;
    for (size_t i = 0; i < source->given_count; i++) {
        fastest = fmax(fastest, source->given[i].speed);
    }
    if (source->kind == LEE_WIND_STORM) {
        fastest = source->storm.peak;
    }
    return lee_measured(fastest);
}

static lee_status tell_corrections(const lee_problem *problem,
                                   const lee_setting *setting,
                                   lee_problem_check *check, lee_error *error) {
    if (!check->has_record) {
        const lee_exposure_sample shown = shown_wind(problem);
        return lee_setting_tell(problem, setting, &shown, NULL, &check->method,
                                error);
    }
    lee_corrections found = {0};
    lee_status status =
        lee_corrections_find(problem, setting, &problem->wind.record,
                             check->record.step, &found, error);
    if (status == LEE_OK) {
        status = lee_corrections_warn(&found, &check->warnings, error);
    }
    if (status == LEE_OK) {
        status = lee_setting_tell(problem, setting, &found.strongest,
                                  &found.summary, &check->method, error);
    }
    lee_corrections_free(&found);
    return status;
}

/* Asks the plan of a run what it thinks of the record: too short, too coarse,
 * elsewhere in time. */
static lee_status warn_of_refusal(const lee_problem *problem,
                                  lee_problem_check *check, lee_error *error) {
    lee_run_plan plan;
    lee_notes ignored = {0};
    lee_error why = {0};
    lee_status status = lee_run_plan_init(problem, &plan, &ignored, &why);
    lee_run_plan_free(&plan);
    lee_notes_free(&ignored);
    if (status == LEE_OK) {
        return LEE_OK;
    }
    if (status == LEE_ERR_MEMORY) {
        return lee_fail(error, status, "%s", why.message);
    }
    return lee_notes_add(&check->warnings, error,
                         "`run` will refuse this case: %s", why.message);
}

static lee_status check_record(const lee_problem *problem,
                               lee_problem_check *check, lee_error *error) {
    const lee_wind_source *source = &problem->wind;
    lee_status status = lee_wind_check_record(&source->record, &source->gap,
                                              &check->record, error);
    if (status != LEE_OK) {
        return status;
    }
    status = lee_wind_summarise(&source->record, check->record.step,
                                &check->summary, error);
    if (status != LEE_OK) {
        return status;
    }
    check->has_record = true;
    check->pieces = 1;
    for (size_t i = 0; i < check->record.gap_count; i++) {
        check->pieces += check->record.gap[i].is_long;
    }
    if (check->pieces > 1 && !source->gap.split) {
        const bool is_one = check->pieces == 2;
        return lee_notes_add(&check->warnings, error,
                             "%zu gap%s longer than largest_gap allows: "
                             "`run` will refuse this record unless `gaps: "
                             "split` is set",
                             check->pieces - 1, is_one ? " is" : "s are");
    }
    return warn_of_refusal(problem, check, error);
}

static lee_status tell_air(const lee_problem *problem, lee_problem_check *check,
                           lee_error *error) {
    lee_run_air air = {0};
    lee_status status = LEE_OK;
    if (check->has_record) {
        status = lee_run_air_init(problem, &problem->wind.record,
                                  check->record.step, &air, error);
    }
    if (status == LEE_OK) {
        status = lee_air_tell(problem, check->has_record ? &air : NULL,
                              &check->method, &check->warnings, error);
    }
    lee_run_air_free(&air);
    return status;
}

lee_status lee_check_problem(const lee_problem *problem,
                             lee_problem_check *check, lee_error *error) {
    *check = (lee_problem_check){0};
    lee_setting setting = {0};
    lee_status status = lee_exposure_check(&problem->exposure, error);
    if (status == LEE_OK) {
        status = lee_setting_init(problem, lee_setting_begin(problem, 0.0),
                                  &setting, error);
    }
    if (status != LEE_OK) {
        return status;
    }
    check->still_water = setting.still_water;
    check->lake = setting.lake;
    if (problem->wind.kind == LEE_WIND_RECORD) {
        status = check_record(problem, check, error);
    }
    if (status == LEE_OK) {
        status = tell_corrections(problem, &setting, check, error);
    }
    if (status == LEE_OK && check->has_record) {
        status =
            lee_record_tell(&check->record, &problem->wind.gap,
                            &check->method.record, &check->warnings, error);
    }
    if (status == LEE_OK) {
        status = tell_air(problem, check, error);
    }
    lee_setting_free(&setting);
    if (status != LEE_OK) {
        lee_problem_check_free(check);
    }
    return status;
}

void lee_problem_check_free(lee_problem_check *check) {
    lee_wind_check_free(&check->record);
    lee_wind_summary_free(&check->summary);
    lee_method_free(&check->method);
    lee_notes_free(&check->warnings);
    *check = (lee_problem_check){0};
}
