/* coordinates.c - finds the variables that say when and where. */
#include "wind/netcdf/coordinates.h"

#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/text.h"
#include "wind/netcdf/series.h"

enum { LONGEST_PATH = 1024 };

size_t lee_dimension_place(const lee_netcdf_variable *variable, int id) {
    for (size_t i = 0; i < variable->rank; i++) {
        if (variable->dimension[i].id == id) {
            return i;
        }
    }
    return LEE_NETCDF_RANK;
}

/* A variable by name, in the group of `of` first. */
static const lee_netcdf_variable *look_up(const lee_netcdf *file,
                                          const lee_netcdf_variable *of,
                                          const char *name) {
    char path[LONGEST_PATH];
    const char *slash = strrchr(of->name, '/');
    const int folder = slash == NULL ? 0 : (int)(slash - of->name) + 1;
    const int length =
        snprintf(path, sizeof path, "%.*s%s", folder, of->name, name);
    const lee_netcdf_variable *found =
        length > 0 && (size_t)length < sizeof path ? lee_netcdf_find(file, path)
                                                   : NULL;
    return found != NULL ? found : lee_netcdf_find(file, name);
}

static lee_status try_one(const lee_netcdf *file,
                          const lee_netcdf_variable *candidate,
                          lee_coordinate_test *test, int kind,
                          const lee_netcdf_variable **found, lee_error *error) {
    bool is_it = false;
    const lee_status status =
        candidate == NULL ? LEE_OK : test(file, candidate, kind, &is_it, error);
    *found = is_it ? candidate : *found;
    return status;
}

static lee_status try_named(const lee_netcdf *file,
                            const lee_netcdf_variable *of,
                            lee_coordinate_test *test, int kind,
                            const lee_netcdf_variable **found,
                            lee_error *error) {
    char *names = NULL;
    char *rest = NULL;
    if (of->id < 0) {
        return LEE_OK; /* stands for a dimension, and has no attributes */
    }
    lee_status status =
        lee_netcdf_attribute(file, of, "coordinates", &names, error);
    char *name = names == NULL ? NULL : strtok_r(names, " ,\t\n", &rest);
    while (name != NULL && *found == NULL && status == LEE_OK) {
        status =
            try_one(file, look_up(file, of, name), test, kind, found, error);
        name = strtok_r(NULL, " ,\t\n", &rest);
    }
    free(names);
    return status;
}

static bool is_along(const lee_netcdf_variable *candidate,
                     const lee_netcdf_variable *of) {
    for (size_t i = 0; i < candidate->rank; i++) {
        if (lee_dimension_place(of, candidate->dimension[i].id) ==
            LEE_NETCDF_RANK) {
            return false;
        }
    }
    return true;
}

lee_status lee_coordinate_find(const lee_netcdf *file,
                               const lee_netcdf_variable *of,
                               lee_coordinate_test *test, int kind,
                               const lee_netcdf_variable **found,
                               lee_error *error) {
    *found = NULL;
    lee_status status = try_named(file, of, test, kind, found, error);
    for (size_t i = 0; i < of->rank && *found == NULL && status == LEE_OK;
         i++) {
        status = try_one(file, look_up(file, of, of->dimension[i].name), test,
                         kind, found, error);
    }
    const lee_netcdf_variable *each;
    for (size_t i = 0; *found == NULL && status == LEE_OK &&
                       (each = lee_netcdf_at(file, i)) != NULL;
         i++) {
        if (is_along(each, of)) {
            status = try_one(file, each, test, kind, found, error);
        }
    }
    return status;
}

lee_status lee_coordinate_says(const lee_netcdf *file,
                               const lee_netcdf_variable *variable,
                               char **standard_name, char **units,
                               lee_error *error) {
    *standard_name = NULL;
    *units = NULL;
    const lee_status status = lee_netcdf_attribute(
        file, variable, "standard_name", standard_name, error);
    return status == LEE_OK
               ? lee_netcdf_attribute(file, variable, "units", units, error)
               : status;
}

/* Is a variable latitudes (kind 1) or longitudes (0)? By standard name, by
 * the units of the conventions [cfconventions 4.1, 4.2], or, when it has
 * neither, by its usual name. */
static lee_status is_degrees(const lee_netcdf *file,
                             const lee_netcdf_variable *variable, int is_north,
                             bool *is_it, lee_error *error) {
    static const char *const standard[] = {"longitude", "latitude"};
    static const char *const usual[2][2] = {
        {"lon", "longitude"},
        {"lat", "latitude" }
    };
    static const char *const units[2][6] = {
        {"degrees_east",  "degree_east",  "degree_E", "degrees_E", "degreeE",
         "degreesE"},
        {"degrees_north", "degree_north", "degree_N", "degrees_N", "degreeN",
         "degreesN"},
    };
    char *name;
    char *unit;
    if (variable->kind != LEE_NETCDF_NUMBERS) {
        return LEE_OK;
    }
    const lee_status status =
        lee_coordinate_says(file, variable, &name, &unit, error);
    *is_it = name != NULL && strcmp(name, standard[is_north]) == 0;
    for (size_t i = 0; i < 6 && name == NULL && unit != NULL; i++) {
        *is_it = *is_it || strcmp(unit, units[is_north][i]) == 0;
    }
    const char *slash = strrchr(variable->name, '/');
    const char *short_name = slash == NULL ? variable->name : slash + 1;
    for (size_t i = 0; i < 2 && name == NULL && unit == NULL; i++) {
        *is_it = *is_it || lee_text_same(short_name, usual[is_north][i]);
    }
    free(name);
    free(unit);
    return status;
}

lee_status lee_wind_degrees_find(const lee_netcdf *file,
                                 const lee_netcdf_variable *of, bool is_north,
                                 const lee_netcdf_variable **found,
                                 lee_error *error) {
    return lee_coordinate_find(file, of, is_degrees, is_north ? 1 : 0, found,
                               error);
}
