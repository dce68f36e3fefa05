/* place.c - one station, or the points of a grid that speak for a position. */
#include <math.h>
#include <stdint.h>
#include <stdlib.h>
#include <string.h>

#include "base/constants.h"
#include "wind/netcdf/coordinates.h"
#include "wind/netcdf/series.h"

static const double earth_radius = 6371.0088; /* km */

/* Of a grid of one point along an axis, half a cell is not known. */
static const double lone_half_cell = 0.5; /* degrees */

/* Rounding of degrees kept as floats. */
static const double slack = 1e-4; /* degrees */

/* A row and a column of points, or latitudes and longitudes of each. */
typedef struct grid {
    const lee_wind_variable *of;
    const lee_wind_netcdf *how;
    const lee_netcdf_variable *latitude; /* NULL: none */
    const lee_netcdf_variable *longitude;
} grid;

double lee_wind_distance_km(double lon_a, double lat_a, double lon_b,
                            double lat_b) {
    const double radian = lee_pi / 180.0;
    const double north = sin(0.5 * (lat_b - lat_a) * radian);
    const double east = sin(0.5 * (lon_b - lon_a) * radian);
    const double h =
        north * north + cos(lat_a * radian) * cos(lat_b * radian) * east * east;
    return isnan(h) ? NAN : 2.0 * earth_radius * asin(fmin(1.0, sqrt(h)));
}

static lee_status refuse_off(const grid *g, double lon, double lat,
                             lee_error *error) {
    return lee_fail(
        error, LEE_ERR_DATA,
        "%s: position %.4f N %.4f E is off the grid of '%s': its "
        "nearest point, %.4f N %.4f E, is %.0f km away",
        lee_netcdf_path(g->of->file), g->how->latitude, g->how->longitude,
        g->of->variable->name, lat, lon,
        lee_wind_distance_km(g->how->longitude, g->how->latitude, lon, lat));
}

static lee_status read_all(const grid *g, const lee_netcdf_variable *variable,
                           const lee_netcdf_box *box, double **values,
                           lee_error *error) {
    size_t n = 1;
    for (size_t i = 0; i < variable->rank; i++) {
        n = box->count[i] != 0 && n > SIZE_MAX / 8 / box->count[i]
                ? SIZE_MAX / 8
                : n * box->count[i];
    }
    *values = n < SIZE_MAX / 8 ? calloc(n + 1, sizeof **values) : NULL;
    if (*values == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "%s: no room for '%s'",
                        lee_netcdf_path(g->of->file), variable->name);
    }
    return lee_netcdf_read(g->of->file, variable, box, NULL, *values, error);
}

/* Degrees along one dimension, and what of them brackets the position. */
typedef struct axis {
    size_t n;
    double *value;  /* [n] strictly up or down */
    bool is_circle; /* longitudes all the way round */
    size_t index[2];
    double share; /* of index[1] */
    bool is_off;
} axis;

/* Takes whole turns out of steps between longitudes, so that they go on. */
static void unwrap(axis *a) {
    for (size_t i = 1; i < a->n; i++) {
        const double step = a->value[i] - a->value[i - 1];
        a->value[i] = a->value[i - 1] + (step - 360.0 * rint(step / 360.0));
    }
}

static bool is_monotone(const axis *a) {
    for (size_t i = 1; i < a->n; i++) {
        const double step = a->value[i] - a->value[i - 1];
        const double first = a->value[1] - a->value[0];
        if (!(step * first > 0.0)) {
            return false;
        }
    }
    return a->n > 0 && isfinite(a->value[0]);
}

/* Half the distance to the next point at an end. */
static double half_cell(const axis *a, bool at_start) {
    if (a->n == 1) {
        return lone_half_cell;
    }
    const size_t i = at_start ? 0 : a->n - 2;
    return 0.5 * fabs(a->value[i + 1] - a->value[i]);
}

static void take_nearest(axis *a, double wanted) {
    size_t best = 0;
    for (size_t i = 1; i < a->n; i++) {
        if (fabs(a->value[i] - wanted) < fabs(a->value[best] - wanted)) {
            best = i;
        }
    }
    a->index[0] = best;
    a->index[1] = best;
    a->share = 0.0;
    const double beyond = fabs(a->value[best] - wanted);
    const bool is_end = best == 0 || best == a->n - 1;
    a->is_off = is_end && beyond > half_cell(a, best == 0) + slack;
}

/* The two points around, or none. */
static void take_pair(axis *a, double wanted) {
    take_nearest(a, wanted);
    if (fabs(a->value[a->index[0]] - wanted) <= slack) {
        a->is_off = false;
        return; /* on a point: its neighbour does not matter */
    }
    a->is_off = true;
    for (size_t i = 0; i + 1 < a->n; i++) {
        const double share =
            (wanted - a->value[i]) / (a->value[i + 1] - a->value[i]);
        if (share >= 0.0 && share <= 1.0) {
            a->index[0] = i;
            a->index[1] = i + 1;
            a->share = share;
            a->is_off = false;
            return;
        }
    }
}

/* Between the last longitude and the first, once round. */
static void take_seam(axis *a, double wanted) {
    const bool is_up = a->value[a->n - 1] > a->value[0];
    const size_t west = is_up ? a->n - 1 : 0;
    const size_t east = is_up ? 0 : a->n - 1;
    const double gap = a->value[east] + 360.0 - a->value[west];
    a->index[0] = west;
    a->index[1] = east;
    a->share = (wanted - a->value[west]) / gap;
    a->is_off = false;
}

/* A longitude brought to where the axis is. */
static double turned_to(const axis *a, double wanted) {
    const double first = a->value[0];
    const double last = a->value[a->n - 1];
    const double low = fmin(first, last) - slack;
    const double turned = low + fmod(fmod(wanted - low, 360.0) + 360.0, 360.0);
    const double high = fmax(first, last);
    /* Just west of the first is nearer than a turn beyond the last. */
    const bool is_before =
        turned > high && low - (turned - 360.0) < turned - high;
    return is_before && !a->is_circle ? turned - 360.0 : turned;
}

static void locate(axis *a, double wanted, bool is_longitude,
                   lee_grid_method method) {
    if (is_longitude) {
        const double span = fabs(a->value[a->n - 1] - a->value[0]);
        const double step = a->n > 1 ? span / (double)(a->n - 1) : 0.0;
        a->is_circle = a->n > 2 && 360.0 - span <= 1.01 * step + slack;
        wanted = turned_to(a, wanted);
    }
    const double high = fmax(a->value[0], a->value[a->n - 1]);
    if (a->is_circle && wanted > high + slack) {
        take_seam(a, wanted);
        if (method == LEE_GRID_NEAREST) {
            a->index[0] = a->share > 0.5 ? a->index[1] : a->index[0];
            a->index[1] = a->index[0];
            a->share = 0.0;
        }
    } else if (method == LEE_GRID_NEAREST) {
        take_nearest(a, wanted);
    } else {
        take_pair(a, wanted);
    }
}

static lee_status read_axis(const grid *g, const lee_netcdf_variable *variable,
                            bool is_longitude, axis *a, lee_error *error) {
    const lee_netcdf_box box = lee_netcdf_whole(variable);
    *a = (axis){.n = variable->dimension[0].length};
    const lee_status status = read_all(g, variable, &box, &a->value, error);
    if (status != LEE_OK || a->value == NULL) {
        return status;
    }
    if (is_longitude) {
        unwrap(a);
    }
    if (!is_monotone(a)) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: '%s' does not grow or fall from point to point",
                        lee_netcdf_path(g->of->file), variable->name);
    }
    locate(a, is_longitude ? g->how->longitude : g->how->latitude, is_longitude,
           g->how->method);
    return LEE_OK;
}

static void add_corner(lee_wind_place *place, size_t row, size_t column,
                       double weight) {
    if (weight > 0.0) {
        place->row[place->corners] = row;
        place->column[place->corners] = column;
        place->weight[place->corners++] = weight;
    }
}

/* A longitude as people write it, -180 to 180. */
static double usual(double longitude) {
    return longitude - 360.0 * rint(longitude / 360.0);
}

static lee_status tell_points(const grid *g, const axis *rows,
                              const axis *columns, const lee_wind_place *place,
                              lee_notes *told, lee_error *error) {
    lee_status status = LEE_OK;
    for (size_t i = 0; i < place->corners && status == LEE_OK; i++) {
        const double lat = rows->value[place->row[i]];
        const double lon = usual(columns->value[place->column[i]]);
        const double distance =
            lee_wind_distance_km(g->how->longitude, g->how->latitude, lon, lat);
        status = place->corners == 1
                     ? lee_notes_add(told, error,
                                     "grid point %.4f N %.4f E, %.1f km from "
                                     "the position",
                                     lat, lon, distance)
                     : lee_notes_add(told, error,
                                     "grid point %.4f N %.4f E, %.1f km from "
                                     "the position, weight %.3f",
                                     lat, lon, distance, place->weight[i]);
    }
    return status;
}

static lee_status place_on_axes(const grid *g, const axis *rows,
                                const axis *columns, lee_wind_place *place,
                                lee_notes *told, lee_error *error) {
    if (rows->is_off || columns->is_off) {
        axis r = *rows;
        axis c = *columns;
        take_nearest(&r, g->how->latitude);
        take_nearest(&c, turned_to(columns, g->how->longitude));
        return refuse_off(g, usual(c.value[c.index[0]]), r.value[r.index[0]],
                          error);
    }
    place->corners = 0;
    const double north = rows->share;
    const double east = columns->share;
    add_corner(place, rows->index[0], columns->index[0],
               (1.0 - north) * (1.0 - east));
    add_corner(place, rows->index[0], columns->index[1], (1.0 - north) * east);
    add_corner(place, rows->index[1], columns->index[0], north * (1.0 - east));
    add_corner(place, rows->index[1], columns->index[1], north * east);
    return told == NULL ? LEE_OK
                        : tell_points(g, rows, columns, place, told, error);
}

static lee_status refuse_unplaced(const grid *g, lee_error *error) {
    return lee_fail(error, LEE_ERR_FORMAT,
                    "%s: variable '%s' lies on a grid; the case has to give a "
                    "position, such as {lon: 8.0 degree, lat: 47.3 degree}",
                    lee_netcdf_path(g->of->file), g->of->variable->name);
}

/* Latitudes along one dimension, longitudes along another. */
static lee_status place_regular(const grid *g, lee_wind_place *place,
                                lee_notes *told, lee_error *error) {
    axis rows = {0};
    axis columns = {0};
    place->row_dimension = g->latitude->dimension[0].id;
    place->column_dimension = g->longitude->dimension[0].id;
    if (!g->how->has_position) {
        const bool is_lone = g->latitude->dimension[0].length == 1 &&
                             g->longitude->dimension[0].length == 1;
        return is_lone ? LEE_OK : refuse_unplaced(g, error);
    }
    lee_status status = read_axis(g, g->latitude, false, &rows, error);
    if (status == LEE_OK) {
        status = read_axis(g, g->longitude, true, &columns, error);
    }
    if (status == LEE_OK) {
        status = place_on_axes(g, &rows, &columns, place, told, error);
    }
    free(rows.value);
    free(columns.value);
    return status;
}

/* The largest distance from a point of a curved grid to its neighbours. */
static double spacing_at(size_t rows, size_t columns, size_t at,
                         const double lon[], const double lat[]) {
    const size_t r = at / columns;
    const size_t c = at % columns;
    const struct {
        bool is_there;
        size_t index;
    } next[] = {
        {r > 0,           at - columns},
        {r + 1 < rows,    at + columns},
        {c > 0,           at - 1      },
        {c + 1 < columns, at + 1      },
    };
    double most = 0.0;
    for (size_t i = 0; i < sizeof next / sizeof next[0]; i++) {
        if (next[i].is_there) {
            const size_t k = next[i].index;
            const double distance =
                lee_wind_distance_km(lon[at], lat[at], lon[k], lat[k]);
            most = distance > most ? distance : most;
        }
    }
    return most;
}

static lee_status nearest_of_all(const grid *g, const size_t shape[2],
                                 double *const degrees[2],
                                 lee_wind_place *place, lee_notes *told,
                                 lee_error *error) {
    const double *lon = degrees[0];
    const double *lat = degrees[1];
    size_t best = 0;
    double nearest = INFINITY;
    for (size_t i = 0; i < shape[0] * shape[1]; i++) {
        const double distance = lee_wind_distance_km(
            g->how->longitude, g->how->latitude, lon[i], lat[i]);
        if (distance < nearest) {
            nearest = distance;
            best = i;
        }
    }
    /* Half the diagonal of a square cell is 0.71 of its side. */
    if (!(nearest <=
          0.75 * spacing_at(shape[0], shape[1], best, lon, lat) + 1e-3)) {
        return refuse_off(g, usual(lon[best]), lat[best], error);
    }
    place->corners = 1;
    place->row[0] = best / shape[1];
    place->column[0] = best % shape[1];
    place->weight[0] = 1.0;
    return told == NULL
               ? LEE_OK
               : lee_notes_add(told, error,
                               "grid point %.4f N %.4f E, %.1f km from the "
                               "position",
                               lat[best], usual(lon[best]), nearest);
}

/* Latitudes and longitudes of each point. They may be given at every time,
 * alike: then those of the first are taken. */
static lee_status place_curved(const grid *g, lee_wind_place *place,
                               lee_notes *told, lee_error *error) {
    const lee_netcdf_variable *latitude = g->latitude;
    const size_t skip = latitude->rank - 2;
    const size_t shape[2] = {latitude->dimension[skip].length,
                             latitude->dimension[skip + 1].length};
    double *degrees[2] = {NULL, NULL}; /* east, north */
    place->row_dimension = latitude->dimension[skip].id;
    place->column_dimension = latitude->dimension[skip + 1].id;
    if (!g->how->has_position) {
        return refuse_unplaced(g, error);
    }
    if (g->how->method != LEE_GRID_NEAREST) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: the grid of '%s' has a latitude and longitude of "
                        "its own at each point; only the nearest is read there",
                        lee_netcdf_path(g->of->file), g->of->variable->name);
    }
    lee_netcdf_box box = lee_netcdf_whole(latitude);
    for (size_t i = 0; i < skip; i++) {
        box.count[i] = 1;
    }
    lee_status status = read_all(g, latitude, &box, &degrees[1], error);
    if (status == LEE_OK) {
        status = read_all(g, g->longitude, &box, &degrees[0], error);
    }
    if (status == LEE_OK && degrees[0] != NULL && degrees[1] != NULL) {
        status = nearest_of_all(g, shape, degrees, place, told, error);
    }
    free(degrees[0]);
    free(degrees[1]);
    return status;
}

/* Do latitude and longitude run along the same dimensions? */
static bool is_alike(const grid *g) {
    if (g->latitude->rank != g->longitude->rank) {
        return false;
    }
    for (size_t i = 0; i < g->latitude->rank; i++) {
        if (g->latitude->dimension[i].id != g->longitude->dimension[i].id) {
            return false;
        }
    }
    return true;
}

/* The dimension that is neither that of the samples nor of length one; NULL
 * when there is none. */
static const lee_netcdf_dimension *open_dimension(const lee_wind_variable *of,
                                                  int samples) {
    for (size_t i = 0; i < of->variable->rank; i++) {
        const lee_netcdf_dimension *dimension = &of->variable->dimension[i];
        if (dimension->id != samples && dimension->length != 1) {
            return dimension;
        }
    }
    return NULL;
}

/* The distance of the only place there is, when a position was asked for. */
static lee_status tell_single(const grid *g, lee_notes *told,
                              lee_error *error) {
    double *lat = NULL;
    double *lon = NULL;
    if (!g->how->has_position || told == NULL) {
        return LEE_OK;
    }
    if (g->latitude == NULL || g->longitude == NULL || g->latitude->rank > 1 ||
        !is_alike(g)) {
        return lee_notes_add(told, error,
                             "the file does not say where its only series "
                             "stands");
    }
    const lee_netcdf_box box = {.count = {1}};
    lee_status status = read_all(g, g->latitude, &box, &lat, error);
    if (status == LEE_OK) {
        status = read_all(g, g->longitude, &box, &lon, error);
    }
    if (status == LEE_OK) {
        status = lee_notes_add(
            told, error,
            "the only series stands at %.4f N %.4f E, %.1f km from the "
            "position",
            lat[0], usual(lon[0]),
            lee_wind_distance_km(g->how->longitude, g->how->latitude, lon[0],
                                 lat[0]));
    }
    free(lat);
    free(lon);
    return status;
}

static bool runs_along(const lee_netcdf_variable *variable,
                       const lee_wind_variable *of, size_t rank) {
    return variable != NULL && variable->rank == rank &&
           lee_dimension_place(of->variable, variable->dimension[0].id) <
               LEE_NETCDF_RANK;
}

static lee_status find_degrees(grid *g, lee_error *error) {
    const lee_wind_variable *of = g->of;
    lee_status status = lee_wind_degrees_find(of->file, of->variable, true,
                                              &g->latitude, error);
    if (status == LEE_OK) {
        status = lee_wind_degrees_find(of->file, of->variable, false,
                                       &g->longitude, error);
    }
    return status;
}

static lee_status check_rest(const lee_wind_variable *of,
                             const lee_wind_samples *samples,
                             const lee_wind_place *place, lee_error *error) {
    for (size_t i = 0; i < of->variable->rank; i++) {
        const lee_netcdf_dimension *d = &of->variable->dimension[i];
        if (d->length != 1 && d->id != samples->dimension &&
            d->id != place->station_dimension &&
            d->id != place->row_dimension && d->id != place->column_dimension) {
            return lee_fail(error, LEE_ERR_FORMAT,
                            "%s: variable '%s' also runs along '%s', of "
                            "length %zu; only time, one row of stations, "
                            "latitude and longitude may be longer than 1",
                            lee_netcdf_path(of->file), of->variable->name,
                            d->name, d->length);
        }
    }
    return LEE_OK;
}

lee_status lee_wind_place_find(const lee_wind_variable *of,
                               const lee_wind_netcdf *how,
                               const lee_wind_samples *samples,
                               lee_wind_place *place, lee_notes *told,
                               lee_error *error) {
    grid g = {.of = of, .how = how};
    *place = (lee_wind_place){.station_dimension = -1,
                              .row_dimension = -1,
                              .column_dimension = -1,
                              .corners = 1,
                              .weight = {1.0}};
    const lee_netcdf_dimension *open = open_dimension(of, samples->dimension);
    lee_status status = find_degrees(&g, error);
    if (status != LEE_OK) {
        return status;
    }
    const bool has_both = g.latitude != NULL && g.longitude != NULL;
    if (has_both && runs_along(g.latitude, of, 1) &&
        runs_along(g.longitude, of, 1) && !is_alike(&g)) {
        status = place_regular(&g, place, told, error);
    } else if (has_both && is_alike(&g) && g.latitude->rank >= 2 &&
               g.latitude->rank <= 3) {
        status = place_curved(&g, place, told, error);
    } else if (open != NULL) {
        place->station_dimension = open->id;
        status = lee_wind_station_find(of->file, how, open, &place->station,
                                       told, error);
    } else {
        status = tell_single(&g, told, error);
    }
    return status == LEE_OK ? check_rest(of, samples, place, error) : status;
}
