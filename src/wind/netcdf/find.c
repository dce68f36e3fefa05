/* find.c - finds the variable of a column, and judges whether it is meant. */
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/text.h"
#include "wind/columns.h"
#include "wind/netcdf/series.h"

enum { MOST_NAMES = 256, FOLDER = 512 };

static const struct {
    lee_wind_column column;
    const char *name;
} standard[] = {
    {LEE_WIND_EASTWARD,  "eastward_wind"      },
    {LEE_WIND_NORTHWARD, "northward_wind"     },
    {LEE_WIND_SPEED,     "wind_speed"         },
    {LEE_WIND_FROM,      "wind_from_direction"},
    {LEE_WIND_FROM,      "wind_to_direction"  },
};
enum { STANDARD = sizeof standard / sizeof standard[0] };

static lee_status has_text(const lee_netcdf *file,
                           const lee_netcdf_variable *variable,
                           const char *attribute, const char *wanted,
                           bool *is_it, lee_error *error) {
    char *text = NULL;
    const lee_status status =
        lee_netcdf_attribute(file, variable, attribute, &text, error);
    *is_it = status == LEE_OK && text != NULL && strcmp(text, wanted) == 0;
    free(text);
    return status;
}

lee_status lee_wind_standard_find(const lee_netcdf *file, const char *name,
                                  const lee_netcdf_variable **found,
                                  lee_error *error) {
    const lee_netcdf_variable *each;
    *found = NULL;
    for (size_t i = 0; (each = lee_netcdf_at(file, i)) != NULL; i++) {
        bool is_it = false;
        const lee_status status =
            has_text(file, each, "standard_name", name, &is_it, error);
        if (status != LEE_OK) {
            return status;
        }
        if (is_it && *found != NULL) {
            return lee_fail(error, LEE_ERR_FORMAT,
                            "%s: both '%s' and '%s' are %s by their standard "
                            "name; the case has to name one",
                            lee_netcdf_path(file), (*found)->name, each->name,
                            name);
        }
        *found = is_it ? each : *found;
    }
    return LEE_OK;
}

static lee_status refuse_name(const lee_netcdf *file, const char *name,
                              lee_error *error) {
    const char *names[MOST_NAMES];
    char shown[LEE_SHOWN];
    const lee_netcdf_variable *each;
    size_t count = 0;
    while (count < MOST_NAMES && (each = lee_netcdf_at(file, count)) != NULL) {
        names[count++] = each->name;
    }
    const char *nearest = lee_text_nearest(name, count, names);
    return lee_fail(
        error, LEE_ERR_FORMAT, "%s: there is no variable '%s'%s%s%s",
        lee_netcdf_path(file), lee_text_show(strlen(name), name, shown),
        nearest == NULL ? "" : "; did you mean '",
        nearest == NULL ? "" : nearest, nearest == NULL ? "" : "'?");
}

static lee_status by_name(const lee_netcdf *file, const char *name,
                          const lee_netcdf_variable **found, lee_error *error) {
    *found = lee_netcdf_find(file, name);
    if (*found == NULL) {
        return refuse_name(file, name, error);
    }
    if ((*found)->kind != LEE_NETCDF_NUMBERS) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: variable '%s' does not hold numbers",
                        lee_netcdf_path(file), name);
    }
    return LEE_OK;
}

static lee_status by_standard_name(const lee_netcdf *file,
                                   lee_wind_column column,
                                   const lee_netcdf_variable **found,
                                   lee_error *error) {
    lee_status status = LEE_OK;
    *found = NULL;
    for (size_t i = 0; i < STANDARD && *found == NULL && status == LEE_OK;
         i++) {
        if (standard[i].column == column) {
            status =
                lee_wind_standard_find(file, standard[i].name, found, error);
        }
    }
    return status;
}

/* Does an attribute of the variable, or else of the file, say that vectors
 * follow the grid? 1 yes, 0 no, -1 nothing is said. */
static lee_status along_grid(const lee_netcdf *file,
                             const lee_netcdf_variable *variable, int *is_so,
                             lee_error *error) {
    /* Flags of GRIB 1, table 7, and GRIB 2, flag table 3.3 (WMO Manual on
     * Codes, from memory): the bit of value 8 is that of the grid. */
    enum { GRID_BIT = 8 };
    static const char *const yes_or_no[] = {
        "uvRelativeToGrid", "GRIB_uvRelativeToGrid", "vector_reference"};
    static const char *const flags[] = {"resolution_and_component_flags",
                                        "ResolutionAndComponentFlags"};
    double number = 0.0;
    *is_so = -1;
    for (size_t i = 0; i < 2; i++) {
        if (lee_netcdf_number(file, variable, flags[i], &number) &&
            number >= 0.0 && number < 256.0) {
            *is_so = ((int)number & GRID_BIT) != 0;
        }
    }
    for (size_t i = 0; i < 3; i++) {
        char *text = NULL;
        if (lee_netcdf_number(file, variable, yes_or_no[i], &number)) {
            *is_so = number != 0.0;
        }
        const lee_status status =
            lee_netcdf_attribute(file, variable, yes_or_no[i], &text, error);
        if (status != LEE_OK) {
            return status;
        }
        if (text != NULL) {
            *is_so = lee_text_same(text, "yes") ||
                     lee_text_same(text, "true") || strcmp(text, "1") == 0 ||
                     strstr(text, "grid") != NULL ||
                     strstr(text, "Grid") != NULL;
        }
        free(text);
    }
    return LEE_OK;
}

/* Does a grid of two-dimensional coordinates carry the variable, so that its
 * axes may point anywhere? */
static lee_status is_on_curved_grid(const lee_netcdf *file,
                                    const lee_netcdf_variable *variable,
                                    bool *is_so, lee_error *error) {
    const lee_netcdf_variable *latitude = NULL;
    const lee_status status =
        lee_wind_degrees_find(file, variable, true, &latitude, error);
    *is_so = latitude != NULL && latitude->rank >= 2;
    return status;
}

static lee_status refuse_grid(const lee_netcdf *file,
                              const lee_netcdf_variable *variable,
                              const char *why, lee_error *error) {
    return lee_fail(error, LEE_ERR_FORMAT,
                    "%s: variable '%s' %s; such a wind is not read as eastward "
                    "or northward: turn it first, or give speed and direction",
                    lee_netcdf_path(file), variable->name, why);
}

/* A component has to point east or north, not along the axes of a grid. */
static lee_status check_component(const lee_netcdf *file,
                                  const lee_netcdf_variable *variable,
                                  const char *name, lee_error *error) {
    const bool is_named_axis = name != NULL && (strcmp(name, "x_wind") == 0 ||
                                                strcmp(name, "y_wind") == 0 ||
                                                strncmp(name, "grid_", 5) == 0);
    if (is_named_axis) {
        return refuse_grid(file, variable,
                           "is a wind along an axis of the grid by its "
                           "standard name",
                           error);
    }
    int of_variable = -1;
    int of_file = -1;
    lee_status status = along_grid(file, variable, &of_variable, error);
    if (status == LEE_OK) {
        status = along_grid(file, NULL, &of_file, error);
    }
    if (status != LEE_OK) {
        return status;
    }
    const int is_along = of_variable >= 0 ? of_variable : of_file;
    if (is_along == 1) {
        return refuse_grid(file, variable,
                           "follows the axes of the grid, as an attribute says",
                           error);
    }
    const bool is_told =
        is_along == 0 ||
        (name != NULL && (strcmp(name, "eastward_wind") == 0 ||
                          strcmp(name, "northward_wind") == 0));
    bool is_curved = false;
    if (!is_told) {
        status = is_on_curved_grid(file, variable, &is_curved, error);
    }
    return status == LEE_OK && is_curved
               ? refuse_grid(file, variable,
                             "lies on a grid of curved or turned axes, and "
                             "nothing says that it points east or north",
                             error)
               : status;
}

static lee_status check_pressure(const lee_netcdf *file,
                                 const lee_netcdf_variable *variable,
                                 const char *name, lee_error *error) {
    static const char *const words[] = {"sea level", "sea-level", "sealevel",
                                        "reduced to", "mslp"};
    char *text = NULL;
    bool is_reduced = name != NULL && strstr(name, "sea_level") != NULL;
    const lee_status status =
        lee_netcdf_attribute(file, variable, "long_name", &text, error);
    for (char *c = text; c != NULL && *c != '\0'; c++) {
        *c = (char)(*c >= 'A' && *c <= 'Z' ? *c + ('a' - 'A') : *c);
    }
    for (size_t i = 0; i < sizeof words / sizeof words[0]; i++) {
        is_reduced =
            is_reduced || (text != NULL && strstr(text, words[i]) != NULL);
    }
    free(text);
    return status == LEE_OK && is_reduced
               ? lee_fail(error, LEE_ERR_FORMAT,
                          "%s: variable '%s' is pressure reduced to sea level, "
                          "not the pressure at the station",
                          lee_netcdf_path(file), variable->name)
               : status;
}

/* Is a variable what its column asks for, by what the file says of it? */
static lee_status check_meaning(lee_wind_variable *found, lee_error *error) {
    const lee_wind_column column = found->column;
    char *name = NULL;
    lee_status status = lee_netcdf_attribute(found->file, found->variable,
                                             "standard_name", &name, error);
    if (status != LEE_OK) {
        return status;
    }
    bool is_other = false;
    for (size_t i = 0; i < STANDARD && name != NULL; i++) {
        if (strcmp(standard[i].name, name) == 0) {
            is_other = standard[i].column != column;
            found->is_towards = strcmp(name, "wind_to_direction") == 0;
        }
    }
    if (is_other) {
        status = lee_fail(error, LEE_ERR_FORMAT,
                          "%s: variable '%s' is %s by its standard name, and "
                          "cannot be '%s'",
                          lee_netcdf_path(found->file), found->variable->name,
                          name, lee_wind_column_name(column));
    } else if (column == LEE_WIND_EASTWARD || column == LEE_WIND_NORTHWARD) {
        status = check_component(found->file, found->variable, name, error);
    } else if (column == LEE_WIND_PRESSURE) {
        status = check_pressure(found->file, found->variable, name, error);
    }
    free(name);
    return status;
}

static lee_status fail_unit(const lee_wind_variable *found, lee_error *error) {
    lee_context(error, "%s: variable '%s': ", lee_netcdf_path(found->file),
                found->variable->name);
    return error == NULL ? LEE_ERR_FORMAT : error->status;
}

/* The unit of the file, of the case, or of both when they are one. */
static lee_status find_conversion(lee_wind_variable *found, const char *of_file,
                                  const char *of_case, lee_error *error) {
    const lee_wind_column_facts *facts =
        lee_wind_column_facts_of(found->column);
    const bool has_file = of_file != NULL && of_file[0] != '\0';
    const char *unit = has_file ? of_file : of_case;
    if (unit == NULL) {
        found->conversion = (lee_conversion){1.0, 0.0};
        return facts->may_lack_unit
                   ? LEE_OK
                   : lee_fail(error, LEE_ERR_FORMAT,
                              "%s: variable '%s' has no unit; the case has to "
                              "say it",
                              lee_netcdf_path(found->file),
                              found->variable->name);
    }
    if (lee_unit_conversion(unit, facts->unit, &found->conversion, error) !=
        LEE_OK) {
        return fail_unit(found, error);
    }
    lee_conversion other = found->conversion;
    if (has_file && of_case != NULL &&
        lee_unit_conversion(of_case, facts->unit, &other, error) != LEE_OK) {
        return fail_unit(found, error);
    }
    if (other.factor != found->conversion.factor ||
        other.offset != found->conversion.offset) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: variable '%s' is in '%s', but the case says '%s'",
                        lee_netcdf_path(found->file), found->variable->name,
                        of_file, of_case);
    }
    return LEE_OK;
}

lee_status lee_wind_variable_find(const lee_netcdf *file,
                                  const lee_wind_netcdf *how,
                                  lee_wind_column column,
                                  lee_wind_variable *found, lee_error *error) {
    const char *name = how->column[column].name;
    *found = (lee_wind_variable){.file = file, .column = column};
    if (column >= LEE_WIND_PRESSURE && how->may_lack_quantities &&
        name != NULL && lee_netcdf_find(file, name) == NULL) {
        return LEE_OK;
    }
    lee_status status =
        name != NULL ? by_name(file, name, &found->variable, error)
                     : by_standard_name(file, column, &found->variable, error);
    if (status != LEE_OK || found->variable == NULL) {
        return status;
    }
    status = check_meaning(found, error);
    if (status != LEE_OK) {
        return status;
    }
    char *unit = NULL;
    status = lee_netcdf_attribute(file, found->variable, "units", &unit, error);
    if (status == LEE_OK) {
        status = find_conversion(found, unit, how->column[column].unit, error);
    }
    free(unit);
    return status;
}
