/* course.h - one run of the engine over the spans of a record: one member of
 * the range, or one pass of the error estimate. */
#ifndef LEEWATER_SERIES_COURSE_H
#define LEEWATER_SERIES_COURSE_H

#include "leewater/series.h"
#include "series/drive.h"
#include "series/members.h"
#include "series/watch.h"

/* An unbroken stretch to run: inside one piece of the record. */
typedef struct lee_span {
    lee_wind_piece piece;
    int64_t from; /* s since 1970 */
    int64_t to;
    int64_t judged_from; /* levels before are spin-up and judge nothing */
    bool starts_steady;  /* else at rest */
} lee_span;

/* Share done of several courses, told to the caller of a run. */
typedef struct lee_progress {
    const lee_run_options *options;
    double total; /* work of all courses, cell-steps */
    double done;
    double told; /* what was done when it was told last */
} lee_progress;

/* What to run. Borrows everything. */
typedef struct lee_course {
    const lee_problem *problem;
    const lee_setting *setting;
    const lee_run_wind *wind;
    const lee_pull_table *table; /* for bounds; NULL for the estimate */
    lee_member member;
    size_t cells;
    double step; /* longest step, s */
    size_t span_count;
    const lee_span *span;
    size_t time_count;
    const int64_t *time; /* [time_count] output times, increasing; all hit */
    lee_watch *watch;
    double **level;   /* [stations][time_count] out, NaN where dry; or NULL */
    bool gives_field; /* to the caller of the run, when it takes one */
    lee_progress *progress;
} lee_course;

/* How a course went, over all its spans. */
typedef struct lee_course_report {
    double volume_defect;
    double fastest; /* current at output times, m s-1 */
} lee_course_report;

/* Runs a course. Errors: those of the engine; LEE_ERR_INTERRUPTED. */
lee_status lee_course_run(const lee_course *course, lee_course_report *report,
                          lee_error *error);

/* Work of a course, cell-steps. */
double lee_course_work(const lee_course *course);

#endif
