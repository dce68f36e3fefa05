/* run_levels.c - level series at stations as NetCDF: CF discrete sampling
 * geometry, orthogonal (CF Conventions 9.3.1, H.2.1). Time stands first: CDO
 * reads no variable in which it does not. */
#include "output/netcdf/levels.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

#include "output/netcdf/parts.h"

/* Times in a chunk of a large file. */
enum { CHUNK = 8192 };

/* One number of a station or a threshold. */
typedef struct number {
    const char *name;
    const char *units; /* NULL: a time */
    const char *long_name;
} number;

static const number summaries[] = {
    {"level_max",      "m",  "highest level of the run"     },
    {"level_max_low",  "m",  "low end of the highest level" },
    {"level_max_high", "m",  "high end of the highest level"},
    {"level_max_time", NULL, "time of the highest level"    },
    {"level_min",      "m",  "lowest level of the run"      },
    {"level_min_low",  "m",  "low end of the lowest level"  },
    {"level_min_high", "m",  "high end of the lowest level" },
    {"level_min_time", NULL, "time of the lowest level"     },
    {"residual",       "m",
     "largest departure from still water in the two "
     "first periods after the wind has dropped"             },
    {"dry_time",       "s",  "time that the station lay dry"},
};
enum { SUMMARIES = sizeof summaries / sizeof summaries[0] };

/* The time of something that may not be. */
static double time_if(double value, int64_t time) {
    return isnan(value) ? NAN : (double)time;
}

static void summarise(const lee_station_series *series,
                      double value[SUMMARIES]) {
    const double all[SUMMARIES] = {
        series->max.value, series->max.low,
        series->max.high,  time_if(series->max.value, series->max_time),
        series->min.value, series->min.low,
        series->min.high,  time_if(series->min.value, series->min_time),
        series->residual,  series->dry_time,
    };
    memcpy(value, all, sizeof all);
}

static const number threshold_parts[] = {
    {"threshold_total",      "s",  "time that the level was past it in all" },
    {"threshold_longest",    "s",  "longest time that the level was past it"},
    {"threshold_times",      "1",  "separate occasions"                     },
    {"threshold_first_time", NULL, "time when it was first passed"          },
};
enum { THRESHOLD_PARTS = sizeof threshold_parts / sizeof threshold_parts[0] };

/* A file of a run being written: numbers of its variables. */
typedef struct sheet {
    lee_netcdf_out out;
    const lee_case *from;
    const lee_run_result *result;
    lee_nc_stations stations;
    bool has_range;
    lee_nc_thresholds thresholds;
    int time;
    int level;
    int low;
    int high;
    int spin_up;
    int speed;
    int blows_from;
    int still_water;
    int datum;
    int height;
    int summary[SUMMARIES];
    int threshold[THRESHOLD_PARTS];
} sheet;

static int define_level(sheet *to, const char *name, const char *what,
                        const lee_netcdf_shape *shape) {
    const lee_nc_level level = {
        .name = name,
        .what = what,
        .coordinates = lee_nc_station_coordinates(&to->stations),
        .may_miss = true,
    };
    const int id =
        lee_nc_define_level(&to->out, &to->from->problem.lake, &level, shape);
    lee_netcdf_put_text(&to->out, id, "cell_methods", "time: point");
    return id;
}

static void define_series(sheet *to, int time_dimension) {
    const size_t n = to->result->n;
    const lee_netcdf_shape shape = {
        .dimensions = 2,
        .dimension = {time_dimension,        to->stations.dimension},
        .chunk = {n < CHUNK ? n : CHUNK, 1                     },
    };
    to->level = define_level(to, "water_level", "water level", &shape);
    if (to->has_range) {
        to->low = define_level(to, "water_level_low",
                               "low end of the water level", &shape);
        to->high = define_level(to, "water_level_high",
                                "high end of the water level", &shape);
    }
    lee_netcdf_put_text(
        &to->out, to->level, "ancillary_variables",
        to->has_range ? "spin_up water_level_low water_level_high" : "spin_up");
}

static int define_number(sheet *to, const number *is, const char *coordinates,
                         const lee_netcdf_shape *shape) {
    const lee_nc_variable variable = {
        .name = is->name,
        .units = is->units,
        .long_name = is->long_name,
        .coordinates = coordinates,
        .content = "modelResult",
        .may_miss = true,
    };
    return is->units != NULL ? lee_nc_define(&to->out, &variable, shape)
                             : lee_nc_define_time(&to->out, is->name,
                                                  is->long_name, shape, false);
}

static void define_summaries(sheet *to) {
    const lee_netcdf_shape shape = {
        .dimensions = 1,
        .dimension = {to->stations.dimension},
    };
    for (size_t i = 0; i < SUMMARIES; i++) {
        to->summary[i] =
            define_number(to, &summaries[i],
                          lee_nc_station_coordinates(&to->stations), &shape);
    }
}

static void define_thresholds(sheet *to) {
    to->thresholds = lee_nc_define_thresholds(&to->out, &to->from->problem);
    if (to->thresholds.n == 0) {
        return;
    }
    const lee_netcdf_shape shape = {
        .dimensions = 1,
        .dimension = {to->thresholds.dimension},
    };
    for (size_t i = 0; i < THRESHOLD_PARTS; i++) {
        to->threshold[i] = define_number(to, &threshold_parts[i], NULL, &shape);
    }
}

static void define(sheet *to, const lee_nc_about *about, int64_t date) {
    static const lee_nc_level still_water = {
        .name = "still_water",
        .what = "still-water level at the begin of the run",
    };
    const lee_run_result *result = to->result;
    const lee_lake *lake = &to->from->problem.lake;
    const lee_netcdf_shape scalar = {.dimensions = 0};
    lee_nc_put_about(&to->out, about, date);
    lee_nc_put_run(&to->out, result);
    to->stations = lee_nc_define_stations(&to->out, &to->from->problem, true);
    const lee_netcdf_shape times = {
        .dimensions = 1,
        .dimension = {lee_netcdf_dimension(&to->out, "time", result->n)},
    };
    to->time = lee_nc_define_time(&to->out, "time", "time", &times, true);
    define_series(to, times.dimension[0]);
    to->spin_up = lee_nc_define_spin_up(&to->out, times.dimension[0]);
    to->speed = lee_nc_define_wind_speed(&to->out, &times);
    to->blows_from = lee_nc_define_wind_direction(&to->out, &times);
    to->height = lee_nc_define_height(&to->out);
    to->still_water =
        lee_nc_define_level(&to->out, lake, &still_water, &scalar);
    to->datum = lee_nc_define_datum(&to->out, lake);
    define_summaries(to);
    define_thresholds(to);
    lee_netcdf_end_definitions(&to->out, 0);
}

/* Writes one value a time, converted, in blocks. */
static void put_times(sheet *to, int variable,
                      double (*value)(const lee_run_result *result, size_t i)) {
    enum { BLOCK = 1024 };
    double block[BLOCK];
    for (size_t at = 0; at < to->result->n; at += BLOCK) {
        const size_t left = to->result->n - at;
        const size_t n = left < BLOCK ? left : BLOCK;
        for (size_t i = 0; i < n; i++) {
            block[i] = value(to->result, at + i);
        }
        lee_netcdf_put_block(&to->out, variable, &at, &n, block);
    }
}

static double time_of(const lee_run_result *result, size_t i) {
    return (double)result->time[i];
}

static double speed_of(const lee_run_result *result, size_t i) {
    return result->speed[i];
}

static double direction_of(const lee_run_result *result, size_t i) {
    return lee_nc_degrees(result->from[i]);
}

typedef const double *level_of(const lee_station_series *series);

static const double *middle_of(const lee_station_series *series) {
    return series->level;
}

static const double *low_of(const lee_station_series *series) {
    return series->low;
}

static const double *high_of(const lee_station_series *series) {
    return series->high;
}

/* Writes a level of all stations, station by station within a time: whole
 * chunks of times, so that none is packed twice. `block` has room for them. */
static void put_levels(sheet *to, int variable, level_of *of, double block[]) {
    const lee_run_result *result = to->result;
    const size_t stations = result->station_count;
    for (size_t at = 0; at < result->n; at += CHUNK) {
        const size_t left = result->n - at;
        const size_t start[] = {at, 0};
        const size_t count[] = {left < CHUNK ? left : CHUNK, stations};
        for (size_t i = 0; i < stations; i++) {
            const double *level = of(&result->station[i]);
            for (size_t t = 0; t < count[0]; t++) {
                block[t * stations + i] = level[at + t];
            }
        }
        lee_netcdf_put_block(&to->out, variable, start, count, block);
    }
}

static lee_status put_series(sheet *to, lee_error *error) {
    const size_t n = to->result->n < CHUNK ? to->result->n : CHUNK;
    double *block = calloc(n * to->result->station_count, sizeof *block);
    if (block == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY,
                        "no room for %zu times of %zu stations", n,
                        to->result->station_count);
    }
    put_levels(to, to->level, middle_of, block);
    if (to->has_range) {
        put_levels(to, to->low, low_of, block);
        put_levels(to, to->high, high_of, block);
    }
    free(block);
    return LEE_OK;
}

static void put_station(sheet *to, size_t i) {
    const size_t one = 1;
    double value[SUMMARIES];
    summarise(&to->result->station[i], value);
    for (size_t k = 0; k < SUMMARIES; k++) {
        lee_netcdf_put_block(&to->out, to->summary[k], &i, &one, &value[k]);
    }
}

static void put_threshold(sheet *to, size_t row, const lee_exceedance *past) {
    const size_t one = 1;
    const double value[THRESHOLD_PARTS] = {
        past->total,
        past->longest,
        (double)past->times,
        past->is_reached ? (double)past->first_time : NAN,
    };
    for (size_t k = 0; k < THRESHOLD_PARTS; k++) {
        lee_netcdf_put_block(&to->out, to->threshold[k], &row, &one, &value[k]);
    }
}

static lee_status put_values(sheet *to, lee_error *error) {
    size_t row = 0;
    const lee_run_result *result = to->result;
    lee_nc_put_stations(&to->out, &to->stations, &to->from->problem);
    put_times(to, to->time, time_of);
    lee_nc_put_spin_up(&to->out, to->spin_up, result);
    lee_nc_put_thresholds(&to->out, &to->thresholds, &to->from->problem);
    put_times(to, to->speed, speed_of);
    put_times(to, to->blows_from, direction_of);
    lee_nc_put_scalar(&to->out, to->still_water, result->still_water);
    lee_nc_put_scalar(&to->out, to->datum,
                      to->from->problem.lake.datum_altitude);
    lee_nc_put_scalar(&to->out, to->height, result->method.reference_height);
    for (size_t i = 0; i < result->station_count; i++) {
        const lee_station_series *series = &result->station[i];
        put_station(to, i);
        for (size_t k = 0; k < series->exceedance_count; k++) {
            put_threshold(to, row++, &series->exceedance[k]);
        }
    }
    return put_series(to, error);
}

lee_status lee_netcdf_run(const lee_target *target, const lee_case *from,
                          const lee_run_result *result, lee_error *error) {
    const lee_nc_about about = {
        .from = from,
        .method = &result->method,
        .warnings = &result->warnings,
        .command = "run",
        .title = "Water levels of a lake under wind",
        .summary = "Levels at stations along the axis of a lake, computed "
                   "from its wind; each with the range of the estimate where "
                   "that was asked for. Planning estimates.",
    };
    sheet to = {
        .from = from,
        .result = result,
        .has_range = result->station[0].low != NULL,
    };
    const size_t values =
        result->n * result->station_count * (to.has_range ? 3 : 1);
    lee_status status = lee_netcdf_create(
        target->path, target->force, values > LEE_NC_LARGE, &to.out, error);
    if (status != LEE_OK) {
        return status;
    }
    define(&to, &about, target->date);
    status = put_values(&to, error);
    if (status != LEE_OK) {
        lee_netcdf_discard(&to.out);
        return status;
    }
    return lee_netcdf_commit(&to.out, error);
}
