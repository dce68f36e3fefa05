/* corrections.c - what exposure does to a record, for a run and for a check. */
#include <math.h>

#include "series/setting.h"

/* The wind, as measured, that is the strongest over the water; a calm when
 * there is none. */
static lee_exposure_sample strongest_of(const lee_exposure_task *task,
                                        const lee_wind_record *water) {
    double strongest = 0.0;
    size_t index = 0;
    for (size_t i = 0; i < water->n; i++) {
        const double speed = hypot(water->east[i], water->north[i]);
        if (speed > strongest) {
            strongest = speed;
            index = i;
        }
    }
    return strongest > 0.0 ? lee_exposure_sample_of(task, index)
                           : lee_measured(0.0);
}

lee_status lee_corrections_find(const lee_problem *problem,
                                const lee_setting *setting,
                                const lee_wind_record *record, int64_t step,
                                lee_corrections *found, lee_error *error) {
    const lee_exposure_task task = {
        .exposure = &problem->exposure,
        .drag = &setting->drag,
        .fluids = &setting->fluids,
        .record = record,
        .rule = &problem->wind.gap,
        .step = step,
    };
    *found = (lee_corrections){.step = step};
    const lee_status status =
        lee_exposure_record(&task, &found->water, &found->summary, error);
    if (status != LEE_OK) {
        lee_corrections_free(found);
        return status;
    }
    found->strongest = strongest_of(&task, &found->water);
    return LEE_OK;
}

lee_exposure_sample lee_corrections_sample(const lee_problem *problem,
                                           const lee_corrections *corrections,
                                           const lee_wind_record *record,
                                           size_t index) {
    const lee_exposure_task task = {
        .exposure = &problem->exposure,
        .record = record,
        .rule = &problem->wind.gap,
        .step = corrections->step,
    };
    return lee_exposure_sample_of(&task, index);
}

void lee_corrections_free(lee_corrections *corrections) {
    lee_wind_record_free(&corrections->water);
}

lee_status lee_corrections_warn(const lee_corrections *corrections,
                                lee_notes *warnings, lee_error *error) {
    const lee_exposure_summary *summary = &corrections->summary;
    const size_t missing = summary->link[LEE_LINK_STABILITY].missing;
    if (missing == 0) {
        return LEE_OK;
    }
    return lee_notes_add(warnings, error,
                         "stability is not corrected in %zu of %zu winds: air "
                         "or water temperature is missing",
                         missing, summary->winds);
}
