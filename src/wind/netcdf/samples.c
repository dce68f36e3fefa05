/* samples.c - the times of a NetCDF series, in each of its layouts.
 *
 * Source: CF Conventions 1.8, chapter 9 and appendix H [cfconventions]. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "base/cf_time.h"
#include "base/text.h"
#include "wind/netcdf/coordinates.h"
#include "wind/netcdf/series.h"

/* What is known of the time variable. */
typedef struct timing {
    const lee_netcdf *file;
    const lee_wind_netcdf *how;
    const lee_netcdf_variable *variable;
    lee_cf_clock clock;
} timing;

/* Is a variable a time? By standard name, or by units since a date. */
static lee_status is_time(const lee_netcdf *file,
                          const lee_netcdf_variable *variable, int kind,
                          bool *is_it, lee_error *error) {
    char *name;
    char *unit;
    (void)kind;
    if (variable->kind != LEE_NETCDF_NUMBERS) {
        return LEE_OK;
    }
    const lee_status status =
        lee_coordinate_says(file, variable, &name, &unit, error);
    *is_it = name != NULL ? strcmp(name, "time") == 0
                          : unit != NULL && lee_cf_is_clock(unit);
    free(name);
    free(unit);
    return status;
}

/* A coordinate that is called time, whatever it says of itself. */
static lee_status is_called_time(const lee_netcdf *file,
                                 const lee_netcdf_variable *variable, int kind,
                                 bool *is_it, lee_error *error) {
    (void)file;
    (void)kind;
    (void)error;
    const char *slash = strrchr(variable->name, '/');
    *is_it = lee_text_same(slash == NULL ? variable->name : slash + 1, "time");
    return LEE_OK;
}

static lee_status find_time(timing *t, const lee_netcdf_variable *of,
                            lee_error *error) {
    const char *name = t->how->column[LEE_WIND_TIME].name;
    lee_status status = LEE_OK;
    if (name != NULL) {
        t->variable = lee_netcdf_find(t->file, name);
    } else {
        status =
            lee_coordinate_find(t->file, of, is_time, 0, &t->variable, error);
        if (status == LEE_OK && t->variable == NULL) {
            status = lee_coordinate_find(t->file, of, is_called_time, 0,
                                         &t->variable, error);
        }
    }
    if (status != LEE_OK) {
        return status;
    }
    if (t->variable == NULL) {
        return lee_fail(error, LEE_ERR_FORMAT, "%s: %s%s%s%s",
                        lee_netcdf_path(t->file),
                        name == NULL ? "no time was found for variable '"
                                     : "there is no variable '",
                        name == NULL ? of->name : name,
                        name == NULL ? "'; the case has to name it" : "'", "");
    }
    if (t->variable->kind != LEE_NETCDF_NUMBERS) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: the time '%s' is text; expected numbers since a "
                        "date",
                        lee_netcdf_path(t->file), t->variable->name);
    }
    return LEE_OK;
}

static lee_status in_time(const timing *t, lee_error *error) {
    lee_context(error, "%s: time '%s': ", lee_netcdf_path(t->file),
                t->variable->name);
    return error == NULL ? LEE_ERR_FORMAT : error->status;
}

static lee_status parse_clock(timing *t, const char *unit, const char *calendar,
                              lee_error *error) {
    const char *said = t->how->column[LEE_WIND_TIME].unit;
    const bool is_whole = unit != NULL && lee_cf_is_clock(unit);
    if (is_whole && said != NULL && strcmp(said, unit) != 0) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: time '%s' counts '%s', but the case says '%s'",
                        lee_netcdf_path(t->file), t->variable->name, unit,
                        said);
    }
    const char *used = is_whole || said == NULL ? unit : said;
    if (used == NULL) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: time '%s' has no units; the case has to say them, "
                        "such as 'hours since 1996-01-05 00:00'",
                        lee_netcdf_path(t->file), t->variable->name);
    }
    lee_cf_calendar of_file = LEE_CF_STANDARD;
    lee_cf_calendar of_case = LEE_CF_STANDARD;
    if (lee_cf_calendar_find(calendar, &of_file, error) != LEE_OK ||
        lee_cf_calendar_find(t->how->calendar, &of_case, error) != LEE_OK) {
        return in_time(t, error);
    }
    if (calendar != NULL && t->how->calendar != NULL && of_file != of_case) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: time '%s' keeps the calendar '%s', but the case "
                        "says '%s'",
                        lee_netcdf_path(t->file), t->variable->name, calendar,
                        t->how->calendar);
    }
    const lee_cf_calendar kept = calendar != NULL ? of_file : of_case;
    return lee_cf_clock_parse(used, kept, &t->clock, error) == LEE_OK
               ? LEE_OK
               : in_time(t, error);
}

static lee_status find_clock(timing *t, lee_notes *told, lee_error *error) {
    char *unit = NULL;
    char *calendar = NULL;
    lee_status status =
        lee_netcdf_attribute(t->file, t->variable, "units", &unit, error);
    if (status == LEE_OK) {
        status = lee_netcdf_attribute(t->file, t->variable, "calendar",
                                      &calendar, error);
    }
    if (status == LEE_OK) {
        status = parse_clock(t, unit, calendar, error);
    }
    const bool is_own = unit != NULL && lee_cf_is_clock(unit);
    if (status == LEE_OK && told != NULL) {
        status = lee_notes_add(
            told, error, "time: '%s', %s, calendar %s", t->variable->name,
            is_own ? unit : t->how->column[LEE_WIND_TIME].unit,
            lee_cf_calendar_name(t->clock.calendar));
    }
    free(unit);
    free(calendar);
    return status;
}

static lee_status no_room(size_t n, lee_error *error) {
    return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu times", n);
}

/* Times of the samples [first, first + n) of a box with one long dimension.
 * Missing ones are left out when the layout pads with them. */
static lee_status convert(const timing *t, const double number[], bool may_lack,
                          lee_wind_samples *samples, lee_error *error) {
    const bool is_shifted = t->how->has_utc_offset && !t->clock.is_zoned;
    const int64_t shift = is_shifted ? t->how->utc_offset : 0;
    size_t kept = 0;
    for (size_t i = 0; i < samples->n; i++) {
        const size_t at =
            samples->index != NULL ? samples->index[i] : samples->first + i;
        if (isnan(number[i]) && may_lack) {
            continue;
        }
        if (isnan(number[i])) {
            return lee_fail(error, LEE_ERR_FORMAT,
                            "%s: time '%s' is missing at index %zu",
                            lee_netcdf_path(t->file), t->variable->name, at);
        }
        int64_t time = 0;
        if (lee_cf_time(&t->clock, number[i], &time, error) != LEE_OK) {
            lee_context(error, "%s: time '%s' at index %zu: ",
                        lee_netcdf_path(t->file), t->variable->name, at);
            return LEE_ERR_FORMAT;
        }
        samples->time[kept] = time - shift;
        if (samples->index != NULL) {
            samples->index[kept] = at;
        }
        kept++;
    }
    samples->n = kept;
    return LEE_OK;
}

/* Reads the numbers at the samples: `box` covers their range, all there are
 * when the samples have an index. */
static lee_status read_times(const timing *t, const lee_netcdf_box *box,
                             size_t room, bool may_lack,
                             lee_wind_samples *samples, lee_error *error) {
    double *number = calloc(room + 1, sizeof *number);
    samples->time = calloc(samples->n + 1, sizeof *samples->time);
    if (number == NULL || samples->time == NULL) {
        free(number);
        return no_room(room, error);
    }
    lee_status status =
        lee_netcdf_read(t->file, t->variable, box, NULL, number, error);
    for (size_t i = 0;
         i < samples->n && samples->index != NULL && status == LEE_OK; i++) {
        number[i] = number[samples->index[i]]; /* never to the left */
    }
    if (status == LEE_OK) {
        status = convert(t, number, may_lack, samples, error);
    }
    free(number);
    return status;
}

/* The variable whose attribute names a dimension; NULL. */
static lee_status find_naming(const lee_netcdf *file, const char *attribute,
                              const char *dimension, int along,
                              const lee_netcdf_variable **found,
                              lee_error *error) {
    const lee_netcdf_variable *each;
    *found = NULL;
    for (size_t i = 0; (each = lee_netcdf_at(file, i)) != NULL; i++) {
        char *name = NULL;
        const lee_status status =
            lee_netcdf_attribute(file, each, attribute, &name, error);
        const bool is_it =
            name != NULL && each->rank == 1 &&
            each->kind == LEE_NETCDF_NUMBERS &&
            (dimension == NULL || strcmp(name, dimension) == 0) &&
            (along < 0 || each->dimension[0].id == along);
        free(name);
        if (status != LEE_OK) {
            return status;
        }
        if (is_it) {
            *found = each;
            return LEE_OK;
        }
    }
    return LEE_OK;
}

static lee_status read_counts(const lee_netcdf *file,
                              const lee_netcdf_variable *variable,
                              double **counts, lee_error *error) {
    const lee_netcdf_box box = lee_netcdf_whole(variable);
    const size_t n = variable->dimension[0].length;
    *counts = calloc(n + 1, sizeof **counts);
    return *counts == NULL
               ? no_room(n, error)
               : lee_netcdf_read(file, variable, &box, NULL, *counts, error);
}

/* Contiguous ragged array: each station's samples stand together, and a
 * variable counts them [cfconventions H.2.4]. */
static lee_status contiguous(const timing *t, const lee_netcdf_variable *sizes,
                             lee_wind_samples *samples, lee_notes *told,
                             lee_error *error) {
    size_t station = 0;
    double *size = NULL;
    lee_status status = lee_wind_station_find(
        t->file, t->how, &sizes->dimension[0], &station, told, error);
    if (status == LEE_OK) {
        status = read_counts(t->file, sizes, &size, error);
    }
    const size_t length = t->variable->dimension[0].length;
    size_t end = 0;
    for (size_t i = 0; i <= station && status == LEE_OK; i++) {
        samples->first = end;
        if (!(size[i] >= 0.0 && size[i] <= (double)(length - end)) ||
            size[i] != floor(size[i])) {
            status = lee_fail(error, LEE_ERR_FORMAT,
                              "%s: '%s' counts %g samples at index %zu; "
                              "expected a whole number, and %zu are left",
                              lee_netcdf_path(t->file), sizes->name, size[i], i,
                              length - end);
        } else {
            end += (size_t)size[i];
        }
    }
    free(size);
    samples->n = end - samples->first;
    return status;
}

/* Indexed ragged array: each sample says its station [cfconventions H.2.5]. */
static lee_status indexed(const timing *t, const lee_netcdf_variable *owner,
                          lee_wind_samples *samples, lee_notes *told,
                          lee_error *error) {
    char *name = NULL;
    size_t station = 0;
    double *number = NULL;
    lee_netcdf_dimension along = {.id = -1};
    lee_status status = lee_netcdf_attribute(
        t->file, owner, "instance_dimension", &name, error);
    const lee_netcdf_variable *each;
    for (size_t i = 0; along.id < 0 && name != NULL &&
                       (each = lee_netcdf_at(t->file, i)) != NULL;
         i++) {
        for (size_t k = 0; k < each->rank; k++) {
            if (strcmp(each->dimension[k].name, name) == 0) {
                along = each->dimension[k];
            }
        }
    }
    if (status == LEE_OK && along.id < 0) {
        status = lee_fail(error, LEE_ERR_FORMAT,
                          "%s: nothing runs along the dimension '%s' that '%s' "
                          "counts in",
                          lee_netcdf_path(t->file), name, owner->name);
    }
    free(name);
    if (status == LEE_OK) {
        status = lee_wind_station_find(t->file, t->how, &along, &station, told,
                                       error);
    }
    if (status == LEE_OK) {
        status = read_counts(t->file, owner, &number, error);
    }
    const size_t length = t->variable->dimension[0].length;
    samples->index = calloc(length + 1, sizeof *samples->index);
    if (status == LEE_OK && samples->index == NULL) {
        status = no_room(length, error);
    }
    samples->n = 0;
    for (size_t i = 0; i < length && status == LEE_OK && samples->index != NULL;
         i++) {
        if (number[i] == (double)station) {
            samples->index[samples->n++] = i;
        }
    }
    free(number);
    return status;
}

/* Times of one dimension: of all, or ragged. */
static lee_status along_one(const timing *t, lee_wind_samples *samples,
                            lee_notes *told, lee_error *error) {
    const lee_netcdf_dimension *along = &t->variable->dimension[0];
    const lee_netcdf_variable *helper = NULL;
    samples->dimension = along->id;
    samples->n = along->length;
    lee_status status = find_naming(t->file, "sample_dimension", along->name,
                                    -1, &helper, error);
    if (status == LEE_OK && helper != NULL) {
        status = contiguous(t, helper, samples, told, error);
    } else if (status == LEE_OK) {
        status = find_naming(t->file, "instance_dimension", NULL, along->id,
                             &helper, error);
        if (status == LEE_OK && helper != NULL) {
            status = indexed(t, helper, samples, told, error);
        }
    }
    if (status != LEE_OK) {
        return status;
    }
    lee_netcdf_box box = lee_netcdf_whole(t->variable);
    if (samples->index == NULL) {
        box.start[0] = samples->first;
        box.count[0] = samples->n;
    }
    return read_times(t, &box, box.count[0], false, samples, error);
}

/* Every station has times of its own: time(station, obs), padded
 * [cfconventions H.2.2]. */
static lee_status along_two(const timing *t, const lee_netcdf_variable *of,
                            lee_wind_samples *samples, lee_notes *told,
                            lee_error *error) {
    const lee_netcdf_dimension *stations = &t->variable->dimension[0];
    const lee_netcdf_dimension *along = &t->variable->dimension[1];
    if (lee_dimension_place(of, stations->id) == LEE_NETCDF_RANK ||
        lee_dimension_place(of, along->id) == LEE_NETCDF_RANK) {
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: time '%s' runs along other dimensions than '%s'",
                        lee_netcdf_path(t->file), t->variable->name, of->name);
    }
    size_t station = 0;
    const lee_status status =
        lee_wind_station_find(t->file, t->how, stations, &station, told, error);
    if (status != LEE_OK) {
        return status;
    }
    samples->dimension = along->id;
    samples->n = along->length;
    samples->index = calloc(samples->n + 1, sizeof *samples->index);
    if (samples->index == NULL) {
        return no_room(samples->n, error);
    }
    for (size_t i = 0; i < samples->n; i++) {
        samples->index[i] = i;
    }
    const lee_netcdf_box box = {
        .start = {station, 0            },
          .count = {1,       along->length}
    };
    return read_times(t, &box, along->length, true, samples, error);
}

static lee_status read_layout(const timing *t, const lee_netcdf_variable *of,
                              lee_wind_samples *samples, lee_notes *told,
                              lee_error *error) {
    const lee_netcdf_box one = {{0}, {0}};
    switch (t->variable->rank) {
    case 0:
        samples->dimension = -1;
        samples->n = 1;
        return read_times(t, &one, 1, false, samples, error);
    case 1:
        return along_one(t, samples, told, error);
    case 2:
        return along_two(t, of, samples, told, error);
    default:
        return lee_fail(error, LEE_ERR_FORMAT,
                        "%s: time '%s' runs along %zu dimensions; at most two "
                        "are read",
                        lee_netcdf_path(t->file), t->variable->name,
                        t->variable->rank);
    }
}

lee_status lee_wind_samples_find(const lee_wind_variable *of,
                                 const lee_wind_netcdf *how,
                                 lee_wind_samples *samples, lee_notes *told,
                                 lee_error *error) {
    timing t = {.file = of->file, .how = how};
    *samples = (lee_wind_samples){.dimension = -1};
    lee_status status = find_time(&t, of->variable, error);
    if (status == LEE_OK) {
        status = find_clock(&t, told, error);
    }
    if (status == LEE_OK) {
        status = read_layout(&t, of->variable, samples, told, error);
    }
    if (status == LEE_OK && samples->dimension >= 0 &&
        lee_dimension_place(of->variable, samples->dimension) ==
            LEE_NETCDF_RANK) {
        status = lee_fail(error, LEE_ERR_FORMAT,
                          "%s: variable '%s' does not run along the time '%s'",
                          lee_netcdf_path(of->file), of->variable->name,
                          t.variable->name);
    }
    if (status == LEE_OK && samples->n == 0) {
        status =
            lee_fail(error, LEE_ERR_DATA, "%s: variable '%s' holds no sample",
                     lee_netcdf_path(of->file), of->variable->name);
    }
    if (status != LEE_OK) {
        lee_wind_samples_free(samples);
    }
    return status;
}

void lee_wind_samples_free(lee_wind_samples *samples) {
    free(samples->index);
    free(samples->time);
    *samples = (lee_wind_samples){.dimension = -1};
}
