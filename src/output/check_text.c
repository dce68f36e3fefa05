/* check_text.c - what was understood of a case, as text. */
#include <math.h>
#include <stdbool.h>
#include <string.h>

#include "output/print.h"
#include "output/record_picture.h"

#include "base/constants.h"
#include "leewater/output.h"

static const char *stamp_name(lee_stamp stamp) {
    switch (stamp) {
    case LEE_STAMP_INSTANT:
        return "instants";
    case LEE_STAMP_START:
        return "means over the step that begins at their time";
    case LEE_STAMP_MIDDLE:
        return "means over the step around their time";
    case LEE_STAMP_END:
        return "means over the step that ends at their time";
    }
    return "";
}

/* Least, greatest of n numbers, n > 0. */
static void span_of(size_t n, const double value[], double *low, double *high) {
    *low = value[0];
    *high = value[0];
    for (size_t i = 1; i < n; i++) {
        *low = fmin(*low, value[i]);
        *high = fmax(*high, value[i]);
    }
}

static void print_end(const lee_printer *to, const char *label,
                      const lee_end *end) {
    if (!end->is_held) {
        lee_print_row(to, label, "closed");
    } else if (end->level.n == 1) {
        lee_print_row(to, label, "held at %s",
                      lee_show_length(to, end->level.level[0]).text);
    } else {
        lee_print_row(to, label, "held at a series of %zu levels",
                      end->level.n);
    }
}

static void print_span(const lee_printer *to, const char *label,
                       const char *low, const char *high) {
    if (strcmp(low, high) == 0) {
        lee_print_row(to, label, "%s throughout", low);
    } else {
        lee_print_row(to, label, "%s to %s", low, high);
    }
}

static void print_axis(const lee_printer *to, const lee_profile *profile) {
    double low;
    double high;
    const size_t last = profile->n - 1;
    lee_print_row(to, "axis", "%zu rows, chainage %s to %s", profile->n,
                  lee_show_distance(to, profile->chainage[0]).text,
                  lee_show_distance(to, profile->chainage[last]).text);
    span_of(profile->n, profile->bearing, &low, &high);
    if (high - low < 1e-9) { /* rad */
        lee_print_row(to, "bearing", "%s", lee_show_direction(low).text);
    } else {
        lee_print_row(to, "bearing", "bent: %s at the start, %s at the end",
                      lee_show_direction(profile->bearing[0]).text,
                      lee_show_direction(profile->bearing[last]).text);
    }
    span_of(profile->n, profile->bed, &low, &high);
    print_span(to, "bed", lee_show_length(to, low).text,
               lee_show_length(to, high).text);
    span_of(profile->n, profile->width, &low, &high);
    print_span(to, "width", lee_show_distance(to, low).text,
               lee_show_distance(to, high).text);
}

static void print_lake(const lee_printer *to, const lee_case *from,
                       const lee_problem_check *check) {
    const lee_lake *lake = &from->problem.lake;
    (void)fputs("\nLake\n", to->stream);
    print_axis(to, &lake->profile);
    print_end(to, "start", &lake->start);
    print_end(to, "end", &lake->end);
    if (lake->still_water.n > 1) {
        lee_print_row(to, "still water", "a series of %zu levels",
                      lake->still_water.n);
    }
    lee_print_row(to, "wetted length", "%s",
                  lee_show_distance(to, check->lake.wet_length).text);
    lee_print_row(to, "area, volume", "%s, %s",
                  lee_show_area(to, check->lake.area).text,
                  lee_show_volume(to, check->lake.volume).text);
    lee_print_row(to, "depth", "mean %s, greatest %s",
                  lee_show_length(to, check->lake.mean_depth).text,
                  lee_show_length(to, check->lake.max_depth).text);
}

static void print_station(const lee_printer *to, const lee_lake *lake,
                          const lee_station *station, double still_water) {
    const bool has_bed = !isnan(station->bed);
    const double bed =
        has_bed ? station->bed : lee_profile_bed(&lake->profile, station->at);
    lee_print_row(to, station->name, "chainage %s, %s %s",
                  lee_show_distance(to, station->at).text,
                  has_bed ? "depth" : "section depth",
                  lee_show_length(to, still_water - bed).text);
    for (size_t i = 0; i < station->threshold_count; i++) {
        const lee_threshold *threshold = &station->threshold[i];
        lee_print_row(to, "", "watched %s %s",
                      threshold->is_below ? "below" : "above",
                      lee_show_length(to, threshold->level).text);
    }
}

static void print_stations(const lee_printer *to, const lee_case *from,
                           double still_water) {
    const lee_problem *problem = &from->problem;
    if (problem->station_count > 0) {
        (void)fputs("\nStations\n", to->stream);
    }
    for (size_t i = 0; i < problem->station_count; i++) {
        print_station(to, &problem->lake, &problem->station[i], still_water);
    }
}

static void print_gaps(const lee_printer *to, const lee_wind_check *record) {
    enum { SHOWN = 5 };
    size_t longest[SHOWN];
    const size_t shown = lee_wind_longest_gaps(record, SHOWN, longest);
    for (size_t i = 0; i < shown; i++) {
        const lee_wind_gap *gap = &record->gap[longest[i]];
        lee_print_row(
            to, i == 0 ? "gaps" : "", "%s after %s, %s",
            lee_show_duration((double)(gap->before - gap->after)).text,
            lee_show_time(gap->after).text,
            gap->is_long ? "beyond the rule" : "bridged");
    }
    if (record->gap_count > shown) {
        lee_print_row(to, "", "and %zu more, none longer",
                      record->gap_count - shown);
    }
    if (record->gap_count == 0) {
        lee_print_row(to, "gaps", "none");
    }
}

/* Counts that are only worth a row when they are not zero. */
static void print_doubts(const lee_printer *to, const lee_wind_check *record) {
    const struct {
        const char *label;
        size_t count;
        const char *words;
    } doubts[] = {
        {"irregular steps", record->irregular,        ""                     },
        {"missing",         record->missing,          " without wind"        },
        {"repeated rows",   record->duplicates,       ", dropped"            },
        {"in two files",    record->merged,           ", merged"             },
        {"completed",       record->completed,        " out of another file" },
        {"variable",        record->variable_calm,    " light, kept as calm" },
        {"variable",        record->variable_missing, " strong, left missing"},
    };
    for (size_t i = 0; i < sizeof doubts / sizeof doubts[0]; i++) {
        if (doubts[i].count > 0) {
            lee_print_row(to, doubts[i].label, "%zu%s", doubts[i].count,
                          doubts[i].words);
        }
    }
    if (record->beyond_belief > 0) {
        lee_print_row(to, "beyond belief", "%zu, faster than %s, the first %s",
                      record->beyond_belief, lee_show_speed(to, 75.0).text,
                      lee_show_time(record->beyond_belief_time).text);
    }
    if (record->spikes > 0) {
        lee_print_row(to, "spikes", "%zu, the first %s", record->spikes,
                      lee_show_time(record->spike_time).text);
    }
}

static void print_files(const lee_printer *to, const lee_wind_source *wind) {
    enum { SHOWN = 5 };
    const size_t count = wind->record_count;
    if (count == 0) {
        lee_print_row(to, "file", "not named");
    }
    for (size_t i = 0; i < count && i < SHOWN; i++) {
        lee_print_row(to,
                      i > 0       ? ""
                      : count > 1 ? "files"
                                  : "file",
                      "%s", wind->record_path[i]);
    }
    if (count > SHOWN) {
        lee_print_row(to, "", "and %zu more", count - SHOWN);
    }
}

static void print_record(const lee_printer *to, const lee_case *from,
                         const lee_problem_check *check) {
    const lee_wind_check *record = &check->record;
    const lee_wind_source *wind = &from->problem.wind;
    print_files(to, wind);
    for (size_t i = 0; i < wind->record_told.n; i++) {
        lee_print_row(to, i == 0 ? "read" : "", "%s",
                      wind->record_told.text[i]);
    }
    lee_print_row(to, "samples", "%zu, %s", record->samples,
                  stamp_name(wind->record.stamp));
    lee_print_row(to, "from, to", "%s, %s", lee_show_time(record->first).text,
                  lee_show_time(record->last).text);
    lee_print_row(to, "usual step", "%s",
                  lee_show_duration((double)record->step).text);
    print_doubts(to, record);
    print_gaps(to, record);
    lee_print_row(to, "pieces", "%zu", check->pieces);
    lee_print_row(to, "calms", "%zu", record->calms);
    lee_print_row(to, "mean wind", "%s",
                  lee_show_speed(to, record->mean_speed).text);
    lee_print_row(to, "fastest wind", "%s from %s, %s",
                  lee_show_speed(to, record->fastest).text,
                  lee_show_direction(record->fastest_from).text,
                  lee_show_time(record->fastest_time).text);
}

static void print_storm(const lee_printer *to, const lee_storm *storm) {
    lee_print_row(to, "peak", "%s from %s",
                  lee_show_speed(to, storm->peak).text,
                  lee_show_direction(storm->from).text);
    lee_print_row(to, "turn", "%.0f degrees", storm->turn * 180.0 / lee_pi);
    lee_print_row(to, "rise, hold, fall", "%s, %s, %s",
                  lee_show_duration(storm->rise).text,
                  lee_show_duration(storm->hold).text,
                  lee_show_duration(storm->fall).text);
}

static void print_given(const lee_printer *to, const lee_wind_source *wind) {
    if (wind->kind == LEE_WIND_SCAN) {
        lee_print_row(to, "scan", "%s from %zu directions",
                      lee_show_speed(to, wind->given[0].speed).text,
                      wind->directions);
        return;
    }
    for (size_t i = 0; i < wind->given_count; i++) {
        const lee_given_wind *given = &wind->given[i];
        const bool lasts = !isnan(given->duration);
        lee_print_row(to, "given", "%s from %s degrees%s%s",
                      lee_show_speed(to, given->speed).text,
                      lee_show_bare_direction(given->from).text,
                      lasts ? " for " : "",
                      lasts ? lee_show_duration(given->duration).text : "");
    }
}

/* What the speeds are, up to the duration that follows. */
static const char *what_speeds_are(const lee_exposure *exposure) {
    if (exposure->is_gust) {
        return ", gusts";
    }
    if (isnan(exposure->averaging)) {
        return "";
    }
    return exposure->is_maximum ? ", highest of the hour over "
                                : ", means over ";
}

static void print_wind(const lee_printer *to, const lee_case *from,
                       const lee_problem_check *check) {
    const lee_wind_source *wind = &from->problem.wind;
    const lee_exposure *exposure = &from->problem.exposure;
    (void)fputs("\nWind\n", to->stream);
    if (check->has_record && wind->kind == LEE_WIND_RECORD) {
        print_record(to, from, check);
    } else if (wind->kind == LEE_WIND_STORM) {
        print_storm(to, &wind->storm);
    } else if (wind->kind == LEE_WIND_NONE) {
        lee_print_row(to, "wind", "none");
    } else {
        print_given(to, wind);
    }
    lee_print_row(to, "measured", "at %s over %s%s%s",
                  lee_show_height(to, exposure->height).text,
                  exposure->is_over_land ? "land" : "water",
                  what_speeds_are(exposure),
                  exposure->is_gust || isnan(exposure->averaging)
                      ? ""
                      : lee_show_duration(exposure->averaging).text);
}

lee_status lee_print_check(FILE *stream, const lee_case *from,
                           const lee_problem_check *check,
                           lee_unit_system units, lee_error *error) {
    const lee_printer to = {stream, units};
    lee_method method = check->method;
    method.record = (lee_notes){0}; /* told in full under "Wind" */
    lee_print_head(&to, from, check->still_water);
    print_lake(&to, from, check);
    print_stations(&to, from, check->still_water);
    print_wind(&to, from, check);
    lee_print_record_picture(&to, check);
    lee_print_notes(&to, "Warnings", &check->warnings);
    lee_print_method(&to, &method);
    lee_print_caution(&to);
    return lee_print_end(&to, error);
}
