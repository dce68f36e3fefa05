/* series.h - from a problem (lake, wind, stress, stations) to levels with
 * their range: the main jobs of the program, for callers in C. */
#ifndef LEEWATER_SERIES_H
#define LEEWATER_SERIES_H

#include <stdbool.h>
#include <stddef.h>
#include <stdint.h>

#include "leewater/basin.h"
#include "leewater/exposure.h"
#include "leewater/setup.h"
#include "leewater/status.h"
#include "leewater/stress.h"
#include "leewater/wind.h"

/* Air over the lake. NaN: not given. */
typedef struct lee_air {
    double density;     /* kg m-3, given outright */
    double pressure;    /* Pa */
    double temperature; /* K */
    double humidity;    /* relative, 0 to 1; not given: dry air */
} lee_air;

/* Air density, kg m-3, for a lake at `altitude` (m; NaN: sea level): given
 * outright, else that of air at the given or the standard pressure and the
 * given temperature or 288.15 K: moist by CIPM-2007 where humidity is given,
 * else dry. Writes how into text[size]. */
double lee_air_density_of(const lee_air *air, double altitude, size_t size,
                          char text[]);

/* Half-widths of what is not known, for the range. NaN: not stated. */
typedef struct lee_uncertainty {
    double wind;  /* share of the speed, 0.1 is 10 % */
    double depth; /* m on the bed */
    double bed;   /* share of the bed law's value */
} lee_uncertainty;

typedef struct lee_threshold {
    double level;  /* m above the datum */
    bool is_below; /* counts when the level goes under it */
} lee_threshold;

/* A place on the axis. Owns its texts and thresholds. */
typedef struct lee_station {
    char *name;
    double at;        /* chainage, m */
    double bed;       /* m above the datum; NaN when not given */
    double longitude; /* degrees; NaN */
    double latitude;
    size_t threshold_count;
    lee_threshold *threshold;
} lee_station;

typedef enum lee_wind_kind {
    LEE_WIND_NONE,
    LEE_WIND_GIVEN,  /* a list of winds, one or more */
    LEE_WIND_SCAN,   /* one speed from `directions` directions */
    LEE_WIND_RECORD, /* read from a file */
    LEE_WIND_STORM
} lee_wind_kind;

typedef struct lee_given_wind {
    double speed;    /* m s-1, as measured */
    double from;     /* radians */
    double duration; /* s; NaN when not stated */
} lee_given_wind;

typedef struct lee_wind_source {
    lee_wind_kind kind;
    size_t given_count; /* GIVEN; for SCAN one, its `from` ignored */
    lee_given_wind *given;
    size_t directions;
    lee_storm storm;
    lee_wind_record record;
    size_t record_count;   /* files it was read from, joined when several */
    char **record_path;    /* [record_count] as named, beside the case    */
    lee_notes record_told; /* what was read of NetCDF files: variables, station,
                              grid point                                  */
    lee_gap_rule gap;
} lee_wind_source;

typedef enum lee_run_start { LEE_START_REST, LEE_START_STEADY } lee_run_start;

typedef struct lee_run_window {
    bool has_from;
    bool has_to;
    int64_t from; /* s since 1970; the record's own when not given */
    int64_t to;
    lee_run_start start;
    int64_t every; /* s between output times; 0: the record's step or 10 min */
} lee_run_window;

typedef struct lee_solver {
    size_t cells;     /* 0: automatic */
    double step;      /* s; 0: automatic */
    double dry_depth; /* m */
    bool has_advection;
} lee_solver;

/* Everything one estimate needs. Owns what it points to. */
typedef struct lee_problem {
    lee_lake lake;
    lee_bed_law bed;
    lee_wind_source wind;
    lee_exposure exposure;
    lee_drag drag;
    lee_air air;
    double ice; /* share of the water under ice, 0 to 1, where no record says
                   otherwise: the wind pulls on the rest alone */
    lee_return_flow return_flow;
    bool return_flow_given; /* by the user: an open end then keeps it */
    lee_uncertainty uncertainty;
    size_t station_count;
    lee_station *station;
    lee_run_window run;
    lee_solver solver;
} lee_problem;

/* All defaults of docs/formats.md; no lake, no wind. */
lee_problem lee_problem_default(void);
void lee_problem_free(lee_problem *problem);

/* What stands behind the numbers; the same in every output. Owns its lists. */
typedef struct lee_method {
    char drag[160];
    char air_density[160];
    double air_density_value;   /* kg m-3 */
    double water_density_value; /* kg m-3 */
    double gravity;
    double return_flow; /* lambda used */
    char return_flow_how[160];
    char bed[80];
    size_t correction_count;
    lee_correction correction[LEE_CORRECTIONS];
    lee_exposure_sample corrected; /* measured wind the factors are shown for;
                                      temperatures NaN where none is used */
    double reference_height;       /* 10 m */
    lee_notes range_members;       /* what the range is made of */
    lee_notes record;              /* what the record check found and did */
    lee_notes not_used;            /* what was read and takes no part yet */
} lee_method;
void lee_method_free(lee_method *method);

/* A number with its range; NaN when there is none (dry). */
typedef struct lee_ranged {
    double value;
    double low;
    double high;
} lee_ranged;

typedef struct lee_station_level {
    lee_ranged level;     /* m above the datum; NaN where dry */
    double section_depth; /* m: level minus the section's bed; NaN where dry */
    double depth;         /* m: level minus the station's own bed; NaN when
                             not given, dry or not above it */
} lee_station_level;

/* One connected water, with ranges. */
typedef struct lee_water_estimate {
    double from;
    double to;
    lee_ranged set_up;
    double set_up_at;
    lee_ranged set_down;
    double set_down_at;
    lee_ranged tilt;
    size_t node_count;
    double *node;
    double volume_defect;
    double first_period; /* s */
    double develop_time; /* s: half the first period */
} lee_water_estimate;

typedef struct lee_wind_estimate {
    lee_given_wind wind; /* as measured */
    double speed;        /* 10 m over open water, m s-1 */
    double coefficient;  /* C10 */
    double stress;       /* Pa, full */
    double along;        /* share of it along the axis, signed */
    bool is_across;      /* below 1 %: no end is named */
    double return_flow;
    size_t water_count;
    lee_water_estimate *water;
    lee_ranged set_up;   /* highest of all waters */
    lee_ranged set_down; /* lowest of all waters */
    lee_ranged tilt;     /* largest of all waters */
    double set_up_at;    /* chainage */
    double set_down_at;
    double cross_tilt;
    double cross_tilt_at;
    double dry_length;
    double volume_defect;       /* largest of all waters */
    lee_station_level *station; /* [station_count] */
    lee_notes warnings;
} lee_wind_estimate;

/* Owns everything. */
typedef struct lee_steady_result {
    lee_method method;
    double still_water; /* m above the datum */
    size_t count;
    lee_wind_estimate *wind; /* [count] */
    size_t station_count;
    lee_notes warnings;
} lee_steady_result;

/* How a level stands to a threshold. */
typedef enum lee_reach {
    LEE_REACH_NOT,
    LEE_REACH_RANGE, /* only the high end of its range is over it, or the low
                        end under it */
    LEE_REACH_VALUE  /* the estimate itself is */
} lee_reach;

/* A place fallen dry is under every level. */
lee_reach lee_threshold_reach(const lee_threshold *threshold,
                              const lee_ranged *level);

/* Equilibrium levels for every wind of a problem whose wind is GIVEN or SCAN.
 * Errors: those of the stages; LEE_ERR_DATA when the wind is a record. */
lee_status lee_estimate_steady(const lee_problem *problem,
                               lee_steady_result *result, lee_error *error);
void lee_steady_result_free(lee_steady_result *result);

/* One threshold over a run. Times are s since 1970. */
typedef struct lee_exceedance {
    lee_threshold threshold;
    bool is_reached;
    int64_t first_time; /* first crossing */
    bool has_returned;
    int64_t return_time; /* when it was last left again; where that was in a
                            gap of the record, the first time seen after it */
    double longest;      /* s */
    double total;        /* s */
    size_t times;        /* separate occasions */
} lee_exceedance;

/* Why a station has no residual seiche. */
typedef enum lee_residual {
    LEE_RESIDUAL_FOUND,
    LEE_RESIDUAL_NO_WIND, /* nothing blew in what is judged */
    LEE_RESIDUAL_NO_DROP, /* the wind stays over a quarter of its stress */
    LEE_RESIDUAL_DRY,     /* the station lies dry then */
    LEE_RESIDUAL_UNSEEN   /* a gap or a start at rest is then */
} lee_residual;

typedef struct lee_station_series {
    double *level; /* [n] m above the datum; NaN where dry */
    double *low;   /* [n] range; NULL when not asked for; NaN where the
                      estimate or a member of the range is dry */
    double *high;
    lee_ranged max; /* over every solver step, not only output times; low is
                       NaN when a member is dry throughout */
    int64_t max_time;
    lee_ranged min; /* lowest while wet; low is NaN when the estimate or a
                       member falls dry */
    int64_t min_time;
    double dry_time; /* s that the station lay dry */
    double residual; /* m: largest |level - still water of that time| in
                        the two first periods after the strongest wind has
                        dropped below a quarter of its stress; NaN: none */
    lee_residual residual_state;
    int64_t residual_time;
    size_t exceedance_count;
    lee_exceedance *exceedance;
} lee_station_series;

/* Least depth over the station's own bed, m; NaN when it has none, when the
 * level falls to it, or when the section falls dry: its level is not known
 * then. */
double lee_least_depth(const lee_station *station,
                       const lee_station_series *series);

/* Water along the axis at one output time of the estimate itself. The arrays
 * belong to the run and hold for one call. */
typedef struct lee_field {
    const lee_channel *channel;
    size_t index;            /* of the output time */
    size_t count;            /* of output times */
    int64_t time;            /* s since 1970 */
    double still_water;      /* m above the datum */
    double wind[2];          /* east, north; 10 m over open water, m s-1 */
    const double *level;     /* [nodes] m above the datum; NaN where dry */
    const double *transport; /* [links] m3 s-1 along growing chainage, mean of
                                the step that ends there; 0 at a start      */
    const double *stress; /* [links] of the wind, Pa along growing chainage */
} lee_field;

typedef struct lee_run_options {
    bool has_range;     /* run the members of the range: on by default */
    bool keep_range;    /* keep low and high series */
    bool has_own_error; /* second passes for the numerical error: on */
    /* Called between steps, about once a millisecond, with the share done, 0
     * to 1; false stops the run with LEE_ERR_INTERRUPTED. May be NULL. */
    bool (*keep_going)(void *user, double share);
    void *user;
    /* Called at every output time, in order; a status that is not LEE_OK ends
     * the run with it. May be NULL. */
    lee_status (*take_field)(void *field_user, const lee_field *field,
                             lee_error *error);
    void *field_user;
} lee_run_options;

lee_run_options lee_run_options_default(void);

/* Owns everything. */
typedef struct lee_run_result {
    lee_method method;
    double still_water; /* at the begin, m above the datum */
    size_t n;
    int64_t *time;    /* [n] s since 1970 */
    double *speed;    /* [n] 10 m wind over open water */
    double *from;     /* [n] radians */
    bool *is_spin_up; /* [n] within two first periods after a start at rest */
    double strongest; /* the record's strongest wind within the run, or one
                         between samples at an output time; 10 m over open
                         water, m s-1; 0 in a calm */
    double strongest_from; /* radians */
    int64_t strongest_time;
    size_t station_count;
    lee_station_series *station;
    size_t cells;
    double step;         /* longest, s: never over the steps of the record and
                            of the output */
    double first_period; /* s, of the longest water */
    double volume_defect;
    double numerical_error; /* m, over the strongest events; NaN if not run, or
                               if every station lay dry */
    double numerical_error_time;  /* its part from the step, m  */
    double numerical_error_space; /* its part from the cells, m */
    size_t pieces;
    lee_notes warnings;
} lee_run_result;

/* Levels in time for a problem whose wind is a RECORD, a STORM or one GIVEN
 * wind with a duration.
 * Errors: those of the stages; LEE_ERR_DATA as docs/formats.md says. */
lee_status lee_estimate_run(const lee_problem *problem,
                            const lee_run_options *options,
                            lee_run_result *result, lee_error *error);
void lee_run_result_free(lee_run_result *result);

/* What `check` tells: nothing is computed but sums over what was read. */
typedef struct lee_problem_check {
    lee_method method;
    lee_basin_summary lake; /* at still water */
    double still_water;
    bool has_record;
    lee_wind_check record;
    lee_wind_summary summary; /* of the record; empty without one */
    size_t pieces;
    lee_notes warnings;
} lee_problem_check;
lee_status lee_check_problem(const lee_problem *problem,
                             lee_problem_check *check, lee_error *error);
void lee_problem_check_free(lee_problem_check *check);

#endif
