/* output.h - results as text, JSON, CSV and NetCDF. All of them carry units,
 * datum, method and caution. */
#ifndef LEEWATER_OUTPUT_H
#define LEEWATER_OUTPUT_H

#include <stdbool.h>
#include <stdint.h>
#include <stdio.h>

#include "leewater/case.h"
#include "leewater/series.h"
#include "leewater/status.h"

typedef enum lee_unit_system { LEE_UNITS_SI, LEE_UNITS_US } lee_unit_system;

/* Text made for reading: aligned, few decimals, both ends named; notes in the
 * same units. Each function writes all it can, flushes, and then looks.
 * Errors: LEE_ERR_FILE when the stream could not be written to the end;
 * LEE_ERR_MEMORY. */
lee_status lee_print_steady(FILE *stream, const lee_case *from,
                            const lee_steady_result *result,
                            lee_unit_system units, lee_error *error);
lee_status lee_print_run(FILE *stream, const lee_case *from,
                         const lee_run_result *result, lee_unit_system units,
                         lee_error *error);
lee_status lee_print_check(FILE *stream, const lee_case *from,
                           const lee_problem_check *check,
                           lee_unit_system units, lee_error *error);

/* The answer of `estimate`: the first wind of a closed lake of even depth and
 * width, given as a case whose profile has two rows, with the handbook
 * formulas beside it. */
lee_status lee_print_estimate(FILE *stream, const lee_case *from,
                              const lee_steady_result *result,
                              lee_unit_system units, lee_error *error);

/* Drag relations side by side, as published, without a cap. Borrows its
 * lists. */
typedef struct lee_drag_table {
    size_t speeds;
    const double *speed; /* [speeds] m s-1 at 10 m over water */
    size_t relations;
    const lee_drag_relation *const *relation; /* [relations] */
    double air_density;                       /* kg m-3 */
    bool has_given_air;   /* the density was asked for, not the usual one */
    double water_density; /* kg m-3 */
    bool has_sources;     /* text: name the source of each */
} lee_drag_table;
lee_status lee_print_drag(FILE *stream, const lee_drag_table *table,
                          lee_unit_system units, lee_error *error);

/* JSON summaries of docs/formats.md; always SI. A number that there is none of
 * is null.
 * Errors: LEE_ERR_FILE when the stream could not be written to the end;
 * LEE_ERR_MEMORY, and nothing is written. */
lee_status lee_json_steady(FILE *stream, const lee_case *from,
                           const lee_steady_result *result, lee_error *error);
lee_status lee_json_run(FILE *stream, const lee_case *from,
                        const lee_run_result *result, lee_error *error);
lee_status lee_json_check(FILE *stream, const lee_case *from,
                          const lee_problem_check *check, lee_error *error);
lee_status lee_json_estimate(FILE *stream, const lee_case *from,
                             const lee_steady_result *result, lee_error *error);
lee_status lee_json_drag(FILE *stream, const lee_drag_table *table,
                         lee_error *error);

/* A file that results go to. Borrows its path. */
typedef struct lee_target {
    const char *path; /* "-": CSV on stdout */
    bool force;       /* replace a file that exists */
    bool with_wind;   /* CSV of a run: add the wind; NetCDF always holds it */
    int64_t date;     /* s since 1970: when it is written, for the history of
                         a NetCDF file; all else depends on the results only */
} lee_target;

/* Writes results by the ending of the file, whole or not at all: to a
 * temporary name beside the target, synced, renamed. An existing file needs
 * `force`; anything but a regular or a new file is refused, and so is a file
 * that the case reads.
 *
 *   .csv  a table with a commented head (method, datum, caution). Low and high
 *         stand beside a level when they were kept; `spin-up` is 1 at the
 *         times that still feel the start at rest, else 0
 *   .nc   NetCDF by CF-1.6 and ACDD-1.3 (docs/formats.md). A case without a
 *         station is LEE_ERR_DATA. Not thread-safe, like NetCDF-C
 *
 * Errors: LEE_ERR_ARGUMENT for another ending; LEE_ERR_FILE, LEE_ERR_MEMORY.*/
lee_status lee_write_steady(const lee_target *target, const lee_case *from,
                            const lee_steady_result *result, lee_error *error);
lee_status lee_write_run(const lee_target *target, const lee_case *from,
                         const lee_run_result *result, lee_error *error);

/* Whether the two functions above could write there, without leaving
 * anything: ask before a long run. Errors: theirs. */
lee_status lee_check_target(const lee_target *target, const lee_case *from,
                            lee_error *error);

/* The water along the axis at every output time of a run as NetCDF, written
 * while the run goes on: memory holds one block of times. Levels at the nodes,
 * transports and wind stress at the links of the channel, wind, still water,
 * stations, thresholds, method (docs/formats.md). */
typedef struct lee_field_file lee_field_file;

/* Asks whether the target can be written and nothing more; `target->path` and
 * `from` are borrowed until the file is freed.
 * Errors: LEE_ERR_ARGUMENT for an ending other than .nc; LEE_ERR_FILE,
 * LEE_ERR_MEMORY. */
lee_status lee_field_file_new(const lee_target *target, const lee_case *from,
                              lee_field_file **file, lee_error *error);

/* For lee_run_options.take_field; field_user, here `user`, is the file.
 * Errors: LEE_ERR_FILE, LEE_ERR_MEMORY. */
lee_status lee_field_file_take(void *user, const lee_field *field,
                               lee_error *error);

/* Adds what is known when the run has ended and gives the file its name.
 * Errors: LEE_ERR_FILE, LEE_ERR_MEMORY; LEE_ERR_ARGUMENT when the run was
 * another one. */
lee_status lee_field_file_finish(lee_field_file *file,
                                 const lee_run_result *result,
                                 lee_error *error);

/* Without a finish nothing is left of the file. NULL is allowed. */
void lee_field_file_free(lee_field_file *file);

#endif
