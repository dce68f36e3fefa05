/* setting.h - the numbers a problem settles before any level is computed. */
#ifndef LEEWATER_SERIES_SETTING_H
#define LEEWATER_SERIES_SETTING_H

#include <math.h>
#include <stdbool.h>
#include <stddef.h>

#include "leewater/series.h"
#include "leewater/status.h"

/* Divisor of the tilt at the low end of a range, [1]: a table of bed and width
 * hides the depth across the lake, and gyres over uneven depth lower the tilt
 * (docs/theory.md, "Range"). */
static const double lee_lateral_depth_divisor = 1.2;

/* Added to lambda at the high end of a range, [1] (docs/theory.md). */
static const double lee_return_flow_margin = 0.1;

/* Owns its drags. */
typedef struct lee_setting {
    double still_water; /* m above the datum */
    lee_basin_summary lake;
    double gravity;
    lee_drag_input fluids;   /* air and water; its speed is not used */
    lee_drag drag;           /* the problem's, solved ahead */
    size_t member_count;     /* relations of the range, one a paper */
    lee_drag *member;        /* [member_count] solved ahead */
    double return_flow;      /* lambda of the estimate */
    double return_flow_high; /* lambda at the high end of the range */
    bool return_flow_forced; /* to 1, by the relation or by an open end */
    double start_level;      /* held level at the begin; NaN: wall */
    double end_level;
} lee_setting;

/* When a problem begins, s since 1970: at run.from, else with its record, else
 * `undated`. */
double lee_setting_begin(const lee_problem *problem, double undated);

/* Settles densities, drags, lambda and levels at `time` (s since 1970).
 * Errors: LEE_ERR_DATA when the lake holds no water at its still level, or
 * would hold none were it shallower by its depth uncertainty;
 * LEE_ERR_MEMORY. */
lee_status lee_setting_init(const lee_problem *problem, double time,
                            lee_setting *setting, lee_error *error);
void lee_setting_free(lee_setting *setting);

/* A measured speed whose temperatures, if they matter, the problem itself
 * gives. */
static inline lee_exposure_sample lee_measured(double speed) {
    return (lee_exposure_sample){speed, NAN, NAN};
}

/* 10 m wind speed over open water from a measured wind, by the problem's
 * exposure and drag. */
double lee_setting_speed(const lee_problem *problem, const lee_setting *setting,
                         const lee_exposure_sample *measured);

/* A record corrected. Owns its record. */
typedef struct lee_corrections {
    lee_wind_record water; /* at 10 m over open water: times, stamp, winds */
    lee_exposure_summary summary;
    lee_exposure_sample strongest; /* over the water; as measured */
    int64_t step;                  /* s */
} lee_corrections;

/* Sample `index` of the record as measured, with its temperatures. */
lee_exposure_sample lee_corrections_sample(const lee_problem *problem,
                                           const lee_corrections *corrections,
                                           const lee_wind_record *record,
                                           size_t index);

/* Corrects a record whose usual step (s) is known, once: what is asked for
 * between samples is then interpolated. Errors: LEE_ERR_MEMORY. */
lee_status lee_corrections_find(const lee_problem *problem,
                                const lee_setting *setting,
                                const lee_wind_record *record, int64_t step,
                                lee_corrections *found, lee_error *error);
void lee_corrections_free(lee_corrections *corrections);

/* Warns of winds that could not be corrected. Errors: LEE_ERR_MEMORY. */
lee_status lee_corrections_warn(const lee_corrections *corrections,
                                lee_notes *warnings, lee_error *error);

/* Warns where the drag is extrapolated or capped at the strongest speed, at
 * 10 m over open water, of a wind. Errors: LEE_ERR_MEMORY. */
lee_status lee_setting_warn_of_drag(const lee_problem *problem,
                                    const lee_setting *setting, double speed,
                                    lee_notes *warnings, lee_error *error);

/* Least and greatest pull lambda tau, Pa, of a measured wind on the
 * water: over one relation a paper, the stated wind uncertainty, lambda and
 * (low end) the hidden lateral depth. */
typedef struct lee_pull_range {
    double low;
    double main; /* lambda tau of the estimate itself */
    double high;
} lee_pull_range;
lee_pull_range lee_setting_pull(const lee_problem *problem,
                                const lee_setting *setting,
                                const lee_exposure_sample *measured);

/* Tells in `method` what stands behind the numbers; `measured` is the wind
 * the corrections are shown for, `summary` what they did to a record, or NULL.
 * Errors: LEE_ERR_MEMORY. */
lee_status lee_setting_tell(const lee_problem *problem,
                            const lee_setting *setting,
                            const lee_exposure_sample *measured,
                            const lee_exposure_summary *summary,
                            lee_method *method, lee_error *error);

/* Tells what a record holds; what in it is hard to believe goes to `warnings`
 * as well, for it drives the water. Errors: LEE_ERR_MEMORY. */
lee_status lee_record_tell(const lee_wind_check *check,
                           const lee_gap_rule *rule, lee_notes *notes,
                           lee_notes *warnings, lee_error *error);

/* Tells what of a problem was read and is not used. Errors: LEE_ERR_MEMORY. */
lee_status lee_unused_tell(const lee_problem *problem, lee_notes *unused,
                           lee_error *error);

#endif
