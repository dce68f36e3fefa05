/* station.c - finds one station among those of a NetCDF file. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/number.h"
#include "base/text.h"
#include "wind/netcdf/series.h"

/* A station farther from the position than this is not meant. */
static const double farthest = 100.0; /* km */

/* Texts that name the stations, of one variable along their dimension. */
static lee_status read_names(const lee_netcdf *file,
                             const lee_netcdf_variable *variable, size_t *count,
                             char ***names, lee_error *error) {
    if (variable->kind == LEE_NETCDF_TEXT) {
        return lee_netcdf_texts(file, variable, count, names, error);
    }
    const lee_netcdf_box box = lee_netcdf_whole(variable);
    const size_t n = variable->dimension[0].length;
    double *number = calloc(n + 1, sizeof *number);
    char **read = calloc(n + 1, sizeof *read);
    lee_status status = LEE_ERR_MEMORY;
    if (number != NULL && read != NULL) {
        status = lee_netcdf_read(file, variable, &box, NULL, number, error);
    } else {
        (void)lee_fail(error, LEE_ERR_MEMORY, "no room for %zu names", n);
    }
    for (size_t i = 0; i < n && status == LEE_OK; i++) {
        char text[32];
        (void)snprintf(text, sizeof text, "%.15g", number[i]);
        read[i] = lee_text_copy(text);
        if (read[i] == NULL) {
            status = lee_fail(error, LEE_ERR_MEMORY, "no room for names");
        }
    }
    free(number);
    if (status != LEE_OK) {
        lee_netcdf_texts_free(n, read);
        return status;
    }
    *count = n;
    *names = read;
    return LEE_OK;
}

/* Does a variable name the stations: by its role, or as text along their
 * dimension? [cfconventions 9.5] */
static lee_status names_stations(const lee_netcdf *file,
                                 const lee_netcdf_variable *variable,
                                 const lee_netcdf_dimension *along, bool *does,
                                 lee_error *error) {
    char *role = NULL;
    *does = false;
    if (variable->rank == 0 || variable->dimension[0].id != along->id) {
        return LEE_OK;
    }
    const bool is_text =
        variable->kind == LEE_NETCDF_TEXT && variable->rank <= 2;
    const lee_status status =
        lee_netcdf_attribute(file, variable, "cf_role", &role, error);
    const bool has_role = role != NULL && strcmp(role, "timeseries_id") == 0;
    *does = is_text || (has_role && variable->rank == 1 &&
                        variable->kind == LEE_NETCDF_NUMBERS);
    free(role);
    return status;
}

/* What is looked for, and what was found. */
typedef struct search {
    const char *name;
    size_t matches;
    size_t station;
    lee_text few; /* the first names there are, for the message */
} search;

static void look_through(search *s, size_t count, char *const names[],
                         bool is_first) {
    enum { FEW = 5 };
    for (size_t i = 0; i < count; i++) {
        if (is_first && i < FEW) {
            char shown[LEE_SHOWN];
            lee_text_add(&s->few, "%s'%s'", i == 0 ? "" : ", ",
                         lee_text_show(strlen(names[i]), names[i], shown));
        }
        if (s->name != NULL && strcmp(names[i], s->name) == 0 &&
            (s->matches == 0 || s->station != i)) {
            s->matches++;
            s->station = i;
        }
    }
}

static lee_status search_names(const lee_netcdf *file,
                               const lee_netcdf_dimension *along, search *s,
                               lee_error *error) {
    const lee_netcdf_variable *each;
    bool is_first = true;
    for (size_t i = 0; (each = lee_netcdf_at(file, i)) != NULL; i++) {
        bool does = false;
        lee_status status = names_stations(file, each, along, &does, error);
        if (status == LEE_OK && does) {
            size_t count = 0;
            char **names = NULL;
            status = read_names(file, each, &count, &names, error);
            look_through(s, count, names, is_first);
            lee_netcdf_texts_free(count, names);
            is_first = false;
        }
        if (status != LEE_OK) {
            return status;
        }
    }
    return LEE_OK;
}

/* "#3" is the third. */
static bool take_number(const char *asked, int64_t *number) {
    return asked[0] == '#' &&
           lee_integer_parse(strlen(asked + 1), asked + 1, number);
}

static lee_status by_name(const lee_netcdf *file, const char *asked,
                          const lee_netcdf_dimension *along, search *s,
                          lee_error *error) {
    char shown[LEE_SHOWN];
    int64_t number = 0;
    if (take_number(asked, &number)) {
        if (number < 1 || (uint64_t)number > along->length) {
            return lee_fail(error, LEE_ERR_DATA,
                            "%s: station '%s' is not one of the %zu there are",
                            lee_netcdf_path(file), asked, along->length);
        }
        s->station = (size_t)number - 1;
        return LEE_OK;
    }
    s->name = asked;
    const lee_status status = search_names(file, along, s, error);
    if (status != LEE_OK || s->matches == 1) {
        return status;
    }
    (void)lee_text_show(strlen(asked), asked, shown);
    if (s->matches > 1) {
        return lee_fail(error, LEE_ERR_DATA,
                        "%s: %zu stations are called '%s'; name one by its "
                        "number, such as '#%zu'",
                        lee_netcdf_path(file), s->matches, shown,
                        s->station + 1);
    }
    return lee_fail(error, LEE_ERR_DATA,
                    "%s: no station is called '%s'; there are %zu%s%s",
                    lee_netcdf_path(file), shown, along->length,
                    s->few.length > 0 ? ", such as " : "",
                    s->few.length > 0 ? s->few.bytes : "");
}

/* Reads latitudes or longitudes of all stations. */
static lee_status read_degrees(const lee_netcdf *file,
                               const lee_netcdf_dimension *along, bool is_north,
                               double degrees[], lee_error *error) {
    const lee_netcdf_variable line = {
        .id = -1, .name = along->name, .rank = 1, .dimension = {*along}};
    const lee_netcdf_variable *found = NULL;
    const lee_status status =
        lee_wind_degrees_find(file, &line, is_north, &found, error);
    if (status != LEE_OK) {
        return status;
    }
    if (found == NULL || found->rank != 1) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: the stations along '%s' have no %s; name one "
                        "instead of a position",
                        lee_netcdf_path(file), along->name,
                        is_north ? "latitude" : "longitude");
    }
    const lee_netcdf_box box = lee_netcdf_whole(found);
    return lee_netcdf_read(file, found, &box, NULL, degrees, error);
}

static lee_status nearest_of(const lee_netcdf *file, const lee_wind_netcdf *how,
                             size_t count, double *const degrees[2], search *s,
                             lee_error *error) {
    double nearest = INFINITY;
    for (size_t i = 0; i < count; i++) {
        const double distance = lee_wind_distance_km(
            how->longitude, how->latitude, degrees[0][i], degrees[1][i]);
        if (distance < nearest) {
            nearest = distance;
            s->station = i;
        }
    }
    if (!(nearest <= farthest)) {
        return lee_fail(error, LEE_ERR_DATA,
                        "%s: the station nearest to %.4g N %.4g E is %.0f km "
                        "away; at most %g km are taken",
                        lee_netcdf_path(file), how->latitude, how->longitude,
                        nearest, farthest);
    }
    return LEE_OK;
}

static lee_status by_position(const lee_netcdf *file,
                              const lee_wind_netcdf *how,
                              const lee_netcdf_dimension *along, search *s,
                              lee_notes *told, lee_error *error) {
    const size_t n = along->length;
    double *const degrees[2] = {calloc(n + 1, sizeof(double)),
                                calloc(n + 1, sizeof(double))};
    lee_status status = LEE_OK;
    if (degrees[0] == NULL || degrees[1] == NULL) {
        status = lee_fail(error, LEE_ERR_MEMORY, "no room for %zu stations", n);
        goto done;
    }
    for (int k = 0; k < 2 && status == LEE_OK; k++) {
        status = read_degrees(file, along, k == 1, degrees[k], error);
    }
    if (status == LEE_OK) {
        status = nearest_of(file, how, n, degrees, s, error);
    }
    if (status == LEE_OK && told != NULL) {
        const double longitude = degrees[0][s->station];
        const double latitude = degrees[1][s->station];
        status = lee_notes_add(
            told, error,
            "the station nearest to the position stands at %.4f N %.4f E, "
            "%.1f km from it",
            latitude, longitude,
            lee_wind_distance_km(how->longitude, how->latitude, longitude,
                                 latitude));
    }

done:
    free(degrees[0]);
    free(degrees[1]);
    return status;
}

static lee_status refuse_many(const lee_netcdf *file,
                              const lee_netcdf_dimension *along, search *s,
                              lee_error *error) {
    const lee_status status = search_names(file, along, s, error);
    if (status != LEE_OK) {
        return status;
    }
    return lee_fail(error, LEE_ERR_FORMAT,
                    "%s: there are %zu stations along '%s'%s%s; the case has "
                    "to name one, or say which by number as '#1'",
                    lee_netcdf_path(file), along->length, along->name,
                    s->few.length > 0 ? ", such as " : "",
                    s->few.length > 0 ? s->few.bytes : "");
}

/* What is told of the station: its first name and its number. */
static lee_status tell(const lee_netcdf *file,
                       const lee_netcdf_dimension *along, size_t station,
                       lee_notes *told, lee_error *error) {
    const lee_netcdf_variable *each;
    for (size_t i = 0; (each = lee_netcdf_at(file, i)) != NULL; i++) {
        bool does = false;
        size_t count = 0;
        char **names = NULL;
        lee_status status = names_stations(file, each, along, &does, error);
        if (status == LEE_OK && does) {
            status = read_names(file, each, &count, &names, error);
        }
        if (status == LEE_OK && station < count) {
            char shown[LEE_SHOWN];
            status = lee_notes_add(
                told, error, "station '%s', number %zu of %zu",
                lee_text_show(strlen(names[station]), names[station], shown),
                station + 1, along->length);
        }
        const bool is_told = does && station < count;
        lee_netcdf_texts_free(count, names);
        if (status != LEE_OK || is_told) {
            return status;
        }
    }
    return lee_notes_add(told, error, "station number %zu of %zu", station + 1,
                         along->length);
}

lee_status lee_wind_station_find(const lee_netcdf *file,
                                 const lee_wind_netcdf *how,
                                 const lee_netcdf_dimension *along,
                                 size_t *station, lee_notes *told,
                                 lee_error *error) {
    search s = {0};
    lee_status status = LEE_OK;
    if (how->station != NULL) {
        status = by_name(file, how->station, along, &s, error);
    } else if (how->has_position) {
        status = by_position(file, how, along, &s, told, error);
    } else if (along->length != 1) {
        status = refuse_many(file, along, &s, error);
    }
    lee_text_free(&s.few);
    *station = s.station;
    return status == LEE_OK && told != NULL
               ? tell(file, along, s.station, told, error)
               : status;
}
