/* run_plan.h - what a run needs before it starts: spans, cells, step, output
 * times. */
#ifndef LEEWATER_SERIES_RUN_PLAN_H
#define LEEWATER_SERIES_RUN_PLAN_H

#include "leewater/series.h"
#include "series/course.h"
#include "series/drive.h"
#include "series/setting.h"

/* Owns its arrays. */
typedef struct lee_run_plan {
    lee_setting setting;
    lee_run_wind wind;
    double *pull; /* [samples] lambda tau of the record, Pa; NaN: missing */
    double first_period; /* s, of the water with the longest; NaN: none */
    size_t cells;
    double step; /* s */
    size_t span_count;
    lee_span *span;
    size_t time_count;
    int64_t *time;    /* [time_count] output times */
    bool *is_spin_up; /* [time_count] */
    double spin_up;   /* s flagged after a start at rest; 0: none */
} lee_run_plan;

/* Plans a run and notes what a user should know in `warnings`.
 * Errors: LEE_ERR_DATA, LEE_ERR_MEMORY and those of the stages. */
lee_status lee_run_plan_init(const lee_problem *problem, lee_run_plan *plan,
                             lee_notes *warnings, lee_error *error);
void lee_run_plan_free(lee_run_plan *plan);

#endif
