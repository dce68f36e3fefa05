/* own_error.h - how far the engine's numbers are from converged ones. */
#ifndef LEEWATER_SERIES_OWN_ERROR_H
#define LEEWATER_SERIES_OWN_ERROR_H

#include "series/course.h"
#include "series/run_plan.h"

/* Most events that are looked at: three strong winds and a start at rest. */
enum { LEE_EVENTS = 4 };

/* Parts of the error, m: the largest over stations (both ends of the axis
 * when there are none), events, highest and lowest level. A place that is dry
 * in the run itself has none; NaN where no place has one. All 0 when no wind
 * blows. */
typedef struct lee_own_error {
    double total;
    double time;
    double space;
} lee_own_error;

/* Runs the strongest events again at half and twice the step and the cells,
 * and extrapolates (Richardson 1911) [richardson1911] with the observed order
 * kept between 1 and 2. `progress` counts its work.
 * Errors: those of the engine. */
lee_status lee_own_error_find(const lee_problem *problem,
                              const lee_run_plan *plan, lee_progress *progress,
                              lee_own_error *own, lee_error *error);

/* Error of the middle of three numbers whose mesh halves from one to the next:
 * coarse, middle, fine. NaN is a dry place: with one of the outer numbers the
 * order is 1; without both, or without the middle one, there is nothing to
 * judge: NaN. */
double lee_richardson_error(double coarse, double middle, double fine);

/* Work of lee_own_error_find, cell-steps. */
double lee_own_error_work(const lee_problem *problem, const lee_run_plan *plan);

#endif
