/* read_netcdf.c - a wind record out of NetCDF, column by column. */
#include "leewater/wind.h"

#include <math.h>
#include <stdint.h>
#include <stdlib.h>
#include <string.h>

#include "base/constants.h"
#include "formats/netcdf_in.h"
#include "leewater/calendar.h"
#include "wind/columns.h"
#include "wind/netcdf/apart.h"
#include "wind/netcdf/coordinates.h"
#include "wind/netcdf/series.h"

/* Directions kept as floats may round to a hair beyond the circle. */
static const double circle_rounding = 1e-6; /* relative */

/* All that is read: files, opened once each, and series. */
typedef struct reading {
    const char *path;
    const lee_wind_netcdf *how;
    lee_notes *told;
    size_t file_count;
    lee_netcdf *file[LEE_WIND_COLUMNS];
    bool is_there[LEE_WIND_COLUMNS];
    lee_wind_series series[LEE_WIND_COLUMNS];
} reading;

static lee_status open_file(reading *r, lee_wind_column column,
                            lee_netcdf **file, lee_error *error) {
    const char *other = r->how->column[column].path;
    const char *path = other != NULL ? other : r->path;
    for (size_t i = 0; i < r->file_count; i++) {
        if (strcmp(lee_netcdf_path(r->file[i]), path) == 0) {
            *file = r->file[i];
            return LEE_OK;
        }
    }
    const lee_status status = lee_netcdf_open(path, file, error);
    if (status == LEE_OK) {
        r->file[r->file_count++] = *file;
    }
    return status;
}

/* What a corner's values are, in the column's unit and range. */
static lee_status convert(const lee_wind_series *s, double values[],
                          lee_error *error) {
    const lee_wind_column_facts *facts = lee_wind_column_facts_of(s->of.column);
    const lee_conversion *way = &s->of.conversion;
    for (size_t i = 0; i < s->samples.n; i++) {
        if (isnan(values[i])) {
            continue;
        }
        const double value = way->factor * values[i] + way->offset;
        if (!(value >= facts->low &&
              value <= facts->high * (1.0 + circle_rounding))) {
            char time[LEE_TIME_TEXT];
            const size_t at = s->samples.index != NULL ? s->samples.index[i]
                                                       : s->samples.first + i;
            return lee_fail(error, LEE_ERR_FORMAT,
                            "%s: variable '%s' at index %zu, %s: %s is %g %s, "
                            "not in [%g, %g]; should it mean missing, list it "
                            "under 'missing' as it is stored",
                            lee_netcdf_path(s->of.file), s->of.variable->name,
                            at, lee_time_format(s->samples.time[i], time),
                            facts->name, value,
                            strcmp(facts->unit, "1") == 0 ? "" : facts->unit,
                            facts->low, facts->high);
        }
        values[i] = value;
    }
    return LEE_OK;
}

/* The range of samples in the file that a series takes in. */
static void span_of(const lee_wind_samples *samples, size_t *first,
                    size_t *count) {
    const bool is_picked = samples->index != NULL && samples->n > 0;
    *first = is_picked ? samples->index[0] : samples->first;
    *count =
        is_picked ? samples->index[samples->n - 1] - *first + 1 : samples->n;
}

/* The box of corners [from, to): their rows and columns, all samples. */
static lee_netcdf_box box_of(const lee_wind_series *s, size_t from, size_t to) {
    const lee_netcdf_variable *variable = s->of.variable;
    const lee_wind_place *place = &s->place;
    lee_netcdf_box box = {0};
    for (size_t i = 0; i < variable->rank; i++) {
        const int id = variable->dimension[i].id;
        box.count[i] = 1;
        if (id == s->samples.dimension) {
            span_of(&s->samples, &box.start[i], &box.count[i]);
        } else if (id == place->station_dimension) {
            box.start[i] = place->station;
        } else if (id == place->row_dimension ||
                   id == place->column_dimension) {
            const size_t *at =
                id == place->row_dimension ? place->row : place->column;
            size_t low = at[from];
            size_t high = at[from];
            for (size_t k = from; k < to; k++) {
                low = at[k] < low ? at[k] : low;
                high = at[k] > high ? at[k] : high;
            }
            box.start[i] = low;
            box.count[i] = high - low + 1;
        }
    }
    return box;
}

/* Takes one corner out of a box that was read. */
static void take_corner(const lee_wind_series *s, size_t corner,
                        const lee_netcdf_box *box, const double values[],
                        double out[]) {
    const lee_netcdf_variable *variable = s->of.variable;
    size_t stride = 1;
    size_t offset = 0;
    size_t sample_stride = 1;
    size_t first = 0;
    for (size_t i = variable->rank; i-- > 0;) {
        const int id = variable->dimension[i].id;
        if (id == s->samples.dimension) {
            sample_stride = stride;
            first = box->start[i];
        } else if (id == s->place.row_dimension) {
            offset += (s->place.row[corner] - box->start[i]) * stride;
        } else if (id == s->place.column_dimension) {
            offset += (s->place.column[corner] - box->start[i]) * stride;
        }
        stride *= box->count[i];
    }
    for (size_t i = 0; i < s->samples.n; i++) {
        const size_t at =
            s->samples.index != NULL ? s->samples.index[i] - first : i;
        out[i] = values[offset + at * sample_stride];
    }
}

static lee_status read_corners(const lee_wind_series *s, size_t from, size_t to,
                               const lee_netcdf_codes *codes,
                               lee_error *error) {
    const lee_netcdf_box box = box_of(s, from, to);
    size_t room = 1;
    for (size_t i = 0; i < s->of.variable->rank; i++) {
        room *= box.count[i];
    }
    double *values = calloc(room + 1, sizeof *values);
    if (values == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu values", room);
    }
    lee_status status =
        lee_netcdf_read(s->of.file, s->of.variable, &box, codes, values, error);
    for (size_t k = from; k < to && status == LEE_OK; k++) {
        double *out = s->value + k * s->samples.n;
        take_corner(s, k, &box, values, out);
        status = convert(s, out, error);
    }
    free(values);
    return status;
}

/* Are all corners neighbours? Across the seam of longitudes they are not. */
static bool is_compact(const lee_wind_place *place) {
    for (size_t k = 1; k < place->corners; k++) {
        const size_t a = place->column[0];
        const size_t b = place->column[k];
        if ((a > b ? a - b : b - a) > 1) {
            return false;
        }
    }
    return true;
}

static lee_status read_values(const reading *r, lee_wind_series *s,
                              lee_error *error) {
    const lee_netcdf_codes codes = {r->how->missing_count, r->how->missing};
    const size_t corners = s->place.corners;
    s->value = calloc(corners * s->samples.n + 1, sizeof *s->value);
    if (s->value == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu winds",
                        s->samples.n);
    }
    if (is_compact(&s->place)) {
        return read_corners(s, 0, corners, &codes, error);
    }
    lee_status status = LEE_OK;
    for (size_t k = 0; k < corners && status == LEE_OK; k++) {
        status = read_corners(s, k, k + 1, &codes, error);
    }
    return status;
}

static lee_status tell_variable(const reading *r, const lee_wind_series *s,
                                lee_error *error) {
    const char *other = r->how->column[s->of.column].path;
    char *unit = NULL;
    if (r->told == NULL) {
        return LEE_OK;
    }
    lee_status status =
        lee_netcdf_attribute(s->of.file, s->of.variable, "units", &unit, error);
    const bool is_own = unit != NULL && unit[0] != '\0';
    const char *said = r->how->column[s->of.column].unit;
    if (status == LEE_OK) {
        status = lee_notes_add(
            r->told, error, "%s: '%s'%s%s%s%s%s%s",
            lee_wind_column_name(s->of.column), s->of.variable->name,
            other != NULL ? " of " : "", other != NULL ? other : "",
            is_own || said != NULL ? " in " : "",
            is_own         ? unit
            : said != NULL ? said
                           : "",
            is_own || said == NULL ? "" : ", as the case says",
            s->of.is_towards ? ", which the wind blows to" : "");
    }
    free(unit);
    return status;
}

/* Finds and reads a column; nothing when it is not there and not named. */
static lee_status read_column(reading *r, lee_wind_column column,
                              lee_error *error) {
    lee_wind_series *s = &r->series[column];
    lee_netcdf *file = NULL;
    lee_status status = open_file(r, column, &file, error);
    if (status == LEE_OK) {
        status = lee_wind_variable_find(file, r->how, column, &s->of, error);
    }
    if (status != LEE_OK || s->of.variable == NULL) {
        return status;
    }
    r->is_there[column] = true;
    status = tell_variable(r, s, error);
    if (status == LEE_OK) {
        status =
            lee_wind_samples_find(&s->of, r->how, &s->samples, r->told, error);
    }
    if (status == LEE_OK) {
        status = lee_wind_place_find(&s->of, r->how, &s->samples, &s->place,
                                     r->told, error);
    }
    return status == LEE_OK ? read_values(r, s, error) : status;
}

/* Both columns of a wind are there, or both are not. */
static lee_status check_pair(const reading *r, lee_wind_column one,
                             lee_wind_column other, lee_error *error) {
    if (r->is_there[one] == r->is_there[other]) {
        return LEE_OK;
    }
    const bool is_one = r->is_there[one];
    return lee_fail(error, LEE_ERR_FORMAT,
                    "%s: there is '%s' but nothing that is '%s' by its "
                    "standard name; the case has to name it",
                    r->path, lee_wind_column_name(is_one ? one : other),
                    lee_wind_column_name(is_one ? other : one));
}

static bool is_named(const reading *r, lee_wind_column column) {
    return r->how->column[column].name != NULL;
}

/* Components when they are named or found, else speed and direction. */
static lee_status read_wind(reading *r, lee_error *error) {
    const bool is_polar =
        is_named(r, LEE_WIND_SPEED) || is_named(r, LEE_WIND_FROM);
    lee_status status = LEE_OK;
    if (!is_polar) {
        status = read_column(r, LEE_WIND_EASTWARD, error);
        if (status == LEE_OK) {
            status = read_column(r, LEE_WIND_NORTHWARD, error);
        }
        if (status == LEE_OK) {
            status =
                check_pair(r, LEE_WIND_EASTWARD, LEE_WIND_NORTHWARD, error);
        }
    }
    if (status != LEE_OK || r->is_there[LEE_WIND_EASTWARD]) {
        return status;
    }
    status = read_column(r, LEE_WIND_SPEED, error);
    if (status == LEE_OK) {
        status = read_column(r, LEE_WIND_FROM, error);
    }
    if (status == LEE_OK) {
        status = check_pair(r, LEE_WIND_SPEED, LEE_WIND_FROM, error);
    }
    if (status == LEE_OK && !r->is_there[LEE_WIND_SPEED]) {
        status = lee_fail(error, LEE_ERR_FORMAT,
                          "%s: no variables are eastward_wind and "
                          "northward_wind, or wind_speed and "
                          "wind_from_direction, by their standard names; the "
                          "case has to name them",
                          r->path);
    }
    return status;
}

static lee_status read_optional(reading *r, lee_error *error) {
    lee_status status = LEE_OK;
    for (size_t i = LEE_WIND_PRESSURE; i < LEE_WIND_COLUMNS && status == LEE_OK;
         i++) {
        if (is_named(r, (lee_wind_column)i)) {
            status = read_column(r, (lee_wind_column)i, error);
        }
    }
    return status;
}

/* The column that gives the record its times. */
static lee_wind_column leading(const reading *r) {
    return r->is_there[LEE_WIND_EASTWARD] ? LEE_WIND_EASTWARD : LEE_WIND_SPEED;
}

static lee_status check_times(const reading *r, lee_error *error) {
    const lee_wind_series *first = &r->series[leading(r)];
    for (size_t i = 0; i < LEE_WIND_COLUMNS; i++) {
        const lee_wind_series *s = &r->series[i];
        if (!r->is_there[i]) {
            continue;
        }
        size_t k = 0;
        while (k < s->samples.n && k < first->samples.n &&
               s->samples.time[k] == first->samples.time[k]) {
            k++;
        }
        if (k < s->samples.n || k < first->samples.n) {
            return lee_fail(error, LEE_ERR_DATA,
                            "%s: '%s' has other times than '%s', from sample "
                            "%zu on",
                            lee_netcdf_path(s->of.file), s->of.variable->name,
                            first->of.variable->name, k);
        }
    }
    return LEE_OK;
}

/* A scalar between the corners; NaN when one is missing. */
static double blend(const lee_wind_series *s, size_t i) {
    double sum = 0.0;
    for (size_t k = 0; k < s->place.corners; k++) {
        sum += s->place.weight[k] * s->value[k * s->samples.n + i];
    }
    return s->place.corners == 1 ? s->value[i] : sum;
}

/* Speed and direction become components at each corner, never between. */
static void blend_polar(const lee_wind_series *speed,
                        const lee_wind_series *from, size_t i, double *east,
                        double *north) {
    const size_t n = speed->samples.n;
    *east = 0.0;
    *north = 0.0;
    for (size_t k = 0; k < speed->place.corners; k++) {
        const double u = speed->value[k * n + i];
        const double angle = from->value[k * n + i];
        const double turned = from->of.is_towards ? angle + 180.0 : angle;
        double e = NAN;
        double nn = NAN;
        lee_wind_components(u, u == 0.0 ? 0.0 : turned * (lee_pi / 180.0), &e,
                            &nn);
        const double weight =
            speed->place.corners == 1 ? 1.0 : speed->place.weight[k];
        *east += weight * e;
        *north += weight * nn;
    }
}

static void fill_wind(const reading *r, size_t i, lee_wind_record *record,
                      size_t row) {
    double *east = &record->east[row];
    double *north = &record->north[row];
    if (r->is_there[LEE_WIND_EASTWARD]) {
        *east = blend(&r->series[LEE_WIND_EASTWARD], i);
        *north = blend(&r->series[LEE_WIND_NORTHWARD], i);
    } else {
        blend_polar(&r->series[LEE_WIND_SPEED], &r->series[LEE_WIND_FROM], i,
                    east, north);
    }
    if (isnan(*east) || isnan(*north)) {
        *east = NAN;
        *north = NAN;
    }
}

static lee_status add_optional(const reading *r, lee_wind_record *record,
                               lee_error *error) {
    for (size_t i = LEE_WIND_PRESSURE; i < LEE_WIND_COLUMNS; i++) {
        double **values = lee_wind_optional(record, (lee_wind_column)i);
        if (!r->is_there[i] || values == NULL) {
            continue;
        }
        *values = calloc(record->n + 1, sizeof **values);
        if (*values == NULL) {
            return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu winds",
                            record->n);
        }
    }
    return LEE_OK;
}

static bool is_equal(double a, double b) {
    return a == b || (isnan(a) && isnan(b));
}

static bool is_repeated(lee_wind_record *record, size_t row) {
    bool is_same = is_equal(record->east[row], record->east[row - 1]) &&
                   is_equal(record->north[row], record->north[row - 1]);
    for (size_t i = LEE_WIND_PRESSURE; i < LEE_WIND_COLUMNS; i++) {
        double **values = lee_wind_optional(record, (lee_wind_column)i);
        if (values != NULL && *values != NULL) {
            is_same = is_same && is_equal((*values)[row], (*values)[row - 1]);
        }
    }
    return is_same;
}

static lee_status refuse_order(const reading *r, size_t i,
                               const lee_wind_record *record, size_t row,
                               lee_error *error) {
    const lee_wind_series *s = &r->series[leading(r)];
    const size_t at =
        s->samples.index != NULL ? s->samples.index[i] : s->samples.first + i;
    char now[LEE_TIME_TEXT];
    char before[LEE_TIME_TEXT];
    (void)lee_time_format(record->time[row], now);
    if (record->time[row] == record->time[row - 1]) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: '%s' at index %zu: time %s is here again with "
                        "other values",
                        lee_netcdf_path(s->of.file), s->of.variable->name, at,
                        now);
    }
    return lee_fail(error, LEE_ERR_FORMAT,
                    "%s: '%s' at index %zu: time %s runs backwards: the sample "
                    "before has %s",
                    lee_netcdf_path(s->of.file), s->of.variable->name, at, now,
                    lee_time_format(record->time[row - 1], before));
}

static lee_status fill_rows(const reading *r, lee_wind_record *record,
                            lee_error *error) {
    const lee_wind_samples *samples = &r->series[leading(r)].samples;
    size_t row = 0;
    for (size_t i = 0; i < samples->n; i++) {
        record->time[row] = samples->time[i];
        fill_wind(r, i, record, row);
        for (size_t c = LEE_WIND_PRESSURE; c < LEE_WIND_COLUMNS; c++) {
            double **values = lee_wind_optional(record, (lee_wind_column)c);
            if (r->is_there[c] && values != NULL) {
                (*values)[row] = blend(&r->series[c], i);
            }
        }
        if (row > 0 && record->time[row] <= record->time[row - 1]) {
            if (record->time[row] < record->time[row - 1] ||
                !is_repeated(record, row)) {
                return refuse_order(r, i, record, row, error);
            }
            record->duplicates++;
            continue;
        }
        row++;
    }
    record->n = row;
    return LEE_OK;
}

static lee_status check_content(const reading *r, const lee_wind_record *record,
                                lee_error *error) {
    for (size_t i = 0; i < record->n; i++) {
        if (!isnan(record->east[i])) {
            return LEE_OK;
        }
    }
    return lee_fail(error, LEE_ERR_DATA,
                    "%s: the wind is missing from all %zu samples", r->path,
                    record->n);
}

static lee_status build(const reading *r, lee_wind_record *record,
                        lee_error *error) {
    lee_status status = check_times(r, error);
    if (status == LEE_OK) {
        status = lee_wind_record_init(record, r->series[leading(r)].samples.n,
                                      error);
    }
    if (status == LEE_OK) {
        record->stamp = r->how->stamp;
        status = add_optional(r, record, error);
    }
    if (status == LEE_OK) {
        status = fill_rows(r, record, error);
    }
    return status == LEE_OK ? check_content(r, record, error) : status;
}

static lee_status check_asked(const char *path, const lee_wind_netcdf *how,
                              lee_error *error) {
    if (!how->has_position ||
        (how->longitude >= -180.0 && how->longitude <= 360.0 &&
         how->latitude >= -90.0 && how->latitude <= 90.0)) {
        return LEE_OK;
    }
    return lee_fail(error, LEE_ERR_ARGUMENT,
                    "%s: position %g N %g E is not on the earth", path,
                    how->latitude, how->longitude);
}

lee_status lee_wind_netcdf_read_here(const char *path,
                                     const lee_wind_netcdf *how,
                                     lee_wind_record *record, lee_notes *told,
                                     lee_error *error) {
    reading r = {.path = path, .how = how, .told = told};
    *record = (lee_wind_record){0};
    lee_status status = check_asked(path, how, error);
    if (status == LEE_OK) {
        status = read_wind(&r, error);
    }
    if (status == LEE_OK) {
        status = read_optional(&r, error);
    }
    if (status == LEE_OK) {
        status = build(&r, record, error);
    }
    for (size_t i = 0; i < LEE_WIND_COLUMNS; i++) {
        lee_wind_samples_free(&r.series[i].samples);
        free(r.series[i].value);
    }
    for (size_t i = 0; i < r.file_count; i++) {
        lee_netcdf_close(r.file[i]);
    }
    if (status != LEE_OK) {
        lee_wind_record_free(record);
    }
    return status;
}

lee_status lee_wind_read_netcdf(const char *path, const lee_wind_netcdf *how,
                                lee_wind_record *record, lee_notes *told,
                                lee_error *error) {
    return how->is_apart
               ? lee_wind_netcdf_read_apart(path, how, record, told, error)
               : lee_wind_netcdf_read_here(path, how, record, told, error);
}
