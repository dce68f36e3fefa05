/* target.c - the file that results go to: which kind, and whether it may be
 * written. */
#include <string.h>

#include "output/files/target.h"

#include "formats/atomic_file.h"
#include "formats/regular_file.h"

#include "leewater/output.h"
#include "output/files/tables_csv.h"
#include "output/netcdf/levels.h"

static bool ends_with(const char *path, const char *ending) {
    const size_t length = strlen(path);
    const size_t tail = strlen(ending);
    return length > tail && strcmp(path + length - tail, ending) == 0;
}

/* By its ending. */
static bool is_netcdf(const char *path) {
    return ends_with(path, ".nc");
}

static lee_status check_ending(const char *path, lee_error *error) {
    if (strcmp(path, "-") == 0 || ends_with(path, ".csv") || is_netcdf(path)) {
        return LEE_OK;
    }
    return lee_fail(error, LEE_ERR_ARGUMENT,
                    "%s: results are written as .csv or .nc; name the file so",
                    path);
}

/* Refuses to put results in the place of what they were made from. */
static lee_status spare_inputs(const char *path, const lee_case *from,
                               lee_error *error) {
    for (size_t i = 0; i < from->inputs.n; i++) {
        const char *input = from->inputs.text[i];
        if (!lee_is_same_file(path, input)) {
            continue;
        }
        return strcmp(path, input) == 0
                   ? lee_fail(error, LEE_ERR_FILE,
                              "%s: is read by this case; name another file "
                              "for the results",
                              path)
                   : lee_fail(error, LEE_ERR_FILE,
                              "%s: is the same file as %s, which this case "
                              "reads; name another file for the results",
                              path, input);
    }
    return LEE_OK;
}

/* Levels at stations need stations to hold them. */
static lee_status check_stations(const char *path, const lee_case *from,
                                 lee_error *error) {
    if (is_netcdf(path) && from->problem.station_count == 0) {
        return lee_fail(error, LEE_ERR_DATA,
                        "%s: holds levels at stations, and the case names "
                        "none",
                        path);
    }
    return LEE_OK;
}

static lee_status judge(const char *path, const lee_case *from,
                        lee_error *error) {
    lee_status status = check_ending(path, error);
    if (status == LEE_OK) {
        status = spare_inputs(path, from, error);
    }
    return status == LEE_OK ? check_stations(path, from, error) : status;
}

static lee_status try_to_open(const lee_target *target, lee_error *error) {
    lee_atomic_file file = {0};
    const lee_status status =
        lee_atomic_open(target->path, target->force, &file, error);
    lee_atomic_discard(&file);
    return status;
}

lee_status lee_target_check_field(const lee_target *target,
                                  const lee_case *from, lee_error *error) {
    if (!is_netcdf(target->path)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "%s: a field is written as .nc; name the file so",
                        target->path);
    }
    const lee_status status = spare_inputs(target->path, from, error);
    return status == LEE_OK ? try_to_open(target, error) : status;
}

lee_status lee_check_target(const lee_target *target, const lee_case *from,
                            lee_error *error) {
    const lee_status status = judge(target->path, from, error);
    return status == LEE_OK ? try_to_open(target, error) : status;
}

lee_status lee_write_steady(const lee_target *target, const lee_case *from,
                            const lee_steady_result *result, lee_error *error) {
    const lee_status status = judge(target->path, from, error);
    if (status != LEE_OK) {
        return status;
    }
    return is_netcdf(target->path)
               ? lee_netcdf_steady(target, from, result, error)
               : lee_csv_steady(target, from, result, error);
}

lee_status lee_write_run(const lee_target *target, const lee_case *from,
                         const lee_run_result *result, lee_error *error) {
    const lee_status status = judge(target->path, from, error);
    if (status != LEE_OK) {
        return status;
    }
    return is_netcdf(target->path) ? lee_netcdf_run(target, from, result, error)
                                   : lee_csv_run(target, from, result, error);
}
