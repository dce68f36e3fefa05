/* tables_csv.c - results as CSV with a commented head, whole or not at all. */
#include "output/files/tables_csv.h"

#include <math.h>
#include <stdbool.h>
#include <stddef.h>
#include <string.h>

#include "formats/atomic_file.h"

#include "output/print.h"

#include "leewater/calendar.h"
#include "leewater/output.h"

/* A head line: text from a case may not break out of its line. */
static void comment(FILE *out, const char *label, const char *text) {
    (void)fprintf(out, "# %s: ", label);
    for (; *text != '\0'; text++) {
        (void)fputc((unsigned char)*text < 0x20 ? ' ' : *text, out);
    }
    (void)fputc('\n', out);
}

static void comment_if_given(FILE *out, const char *label, const char *text) {
    if (text != NULL) {
        comment(out, label, text);
    }
}

static void write_head(FILE *out, const lee_case *from,
                       const lee_method *method, double still_water) {
    const lee_lake *lake = &from->problem.lake;
    (void)fprintf(out, "# leewater %s\n", lee_version());
    comment(out, "case", from->path != NULL ? from->path : "none");
    comment_if_given(out, "title", from->title);
    comment_if_given(out, "institution", from->institution);
    comment_if_given(out, "creator", from->creator);
    comment_if_given(out, "license", from->license);
    comment_if_given(out, "lake", lake->name);
    comment(out, "levels above",
            lake->datum != NULL ? lake->datum : "datum not named");
    (void)fprintf(out, "# still water: %.3f m\n", still_water);
    for (size_t i = 0; i < from->notes.n; i++) {
        comment(out, "remark", from->notes.text[i]);
    }
    comment(out, "drag", method->drag);
    for (size_t i = 0; i < method->correction_count; i++) {
        const lee_correction *link = &method->correction[i];
        (void)fprintf(out, "# correction: %s, %s\n",
                      lee_show_link(link, 4).text, link->method);
        if (link->has_spread) {
            (void)fprintf(out,
                          "# over the record: %.4f to %.4f, median %.4f; "
                          "%zu winds extrapolated, %zu lack a temperature\n",
                          link->spread.least, link->spread.greatest,
                          link->spread.median, link->spread.extrapolated,
                          link->spread.missing);
        }
    }
    (void)fprintf(out,
                  "# air density: %.4f kg m-3; water density: %.2f kg m-3;"
                  " gravity: %.5f m s-2\n",
                  method->air_density_value, method->water_density_value,
                  method->gravity);
    comment(out, "bed", method->bed);
    (void)fprintf(out, "# return flow: %.4f, %s\n", method->return_flow,
                  method->return_flow_how);
    for (size_t i = 0; i < method->range_members.n; i++) {
        comment(out, "range", method->range_members.text[i]);
    }
    for (size_t i = 0; i < method->record.n; i++) {
        comment(out, "record", method->record.text[i]);
    }
    for (size_t i = 0; i < method->not_used.n; i++) {
        comment(out, "read, not used", method->not_used.text[i]);
    }
}

static void write_foot_of_head(FILE *out, const lee_notes *warnings) {
    for (size_t i = 0; i < warnings->n; i++) {
        comment(out, "warning", warnings->text[i]);
    }
    comment(out, "caution", lee_caution());
}

/* Text of a quoted field. */
static void write_quoted(FILE *out, const char *text) {
    for (const char *c = text; *c != '\0'; c++) {
        (void)fputs(*c == '"' ? "\"" : "", out);
        (void)fputc(*c, out);
    }
}

/* A header of a name and what follows it, quoted where RFC 4180 asks. */
static void write_header(FILE *out, const char *name, const char *rest) {
    const bool quoted =
        strpbrk(name, ",\"\r\n;\t") != NULL || name[0] == '#' || name[0] == ' ';
    (void)fputs(quoted ? ",\"" : ",", out);
    write_quoted(out, name);
    (void)fprintf(out, "%s%s", rest, quoted ? "\"" : "");
}

/* "NAME above 101.65 m" for each threshold. */
static void write_threshold_headers(FILE *out, const lee_station *station) {
    for (size_t i = 0; i < station->threshold_count; i++) {
        const lee_threshold *threshold = &station->threshold[i];
        char rest[64];
        (void)snprintf(rest, sizeof rest, " %s %.10g m",
                       threshold->is_below ? "below" : "above",
                       threshold->level);
        write_header(out, station->name, rest);
    }
}

static const char *reach_word(lee_reach reach) {
    switch (reach) {
    case LEE_REACH_NOT:
        return "no";
    case LEE_REACH_RANGE:
        return "range";
    case LEE_REACH_VALUE:
        return "yes";
    }
    return "";
}

/* All warnings of a wind in one field. */
static void write_warnings(FILE *out, const lee_notes *warnings) {
    (void)fputs(warnings->n > 0 ? ",\"" : ",", out);
    for (size_t i = 0; i < warnings->n; i++) {
        (void)fputs(i > 0 ? "; " : "", out);
        write_quoted(out, warnings->text[i]);
    }
    (void)fputs(warnings->n > 0 ? "\"" : "", out);
}

/* A value to `decimals`; an empty field for NaN. */
static void write_value(FILE *out, double value, int decimals) {
    if (!isnan(value)) {
        (void)fprintf(out, "%.*f", decimals, value);
    }
}

static void write_next(FILE *out, double value, int decimals) {
    (void)fputc(',', out);
    write_value(out, value, decimals);
}

/* What a table is written from. */
typedef struct table {
    const lee_case *from;
    const lee_steady_result *steady; /* or */
    const lee_run_result *run;
    bool with_wind;
} table;

/* Writes a table to a file: whole or not at all. */
static lee_status write_file(const lee_target *target,
                             void (*write)(FILE *out, const table *what),
                             const table *what, lee_error *error) {
    lee_atomic_file file = {0};
    lee_status status =
        lee_atomic_open(target->path, target->force, &file, error);
    if (status == LEE_OK) {
        write(file.stream, what);
        status = lee_atomic_commit(&file, error);
    }
    lee_atomic_discard(&file);
    return status;
}

/* ---- steady ---- */

#define AT(member) offsetof(lee_wind_estimate, member)

/* One number of a wind's estimate: where it stands in the struct. */
static const struct {
    const char *header;
    size_t offset;
    int decimals;
    bool is_angle; /* radians, to be degrees */
} columns[] = {
    {"wind [m s-1]",                 AT(wind.speed),     3, false},
    {"wind from [degree]",           AT(wind.from),      2, true },
    {"wind 10 m over water [m s-1]", AT(speed),          3, false},
    {"drag coefficient [1]",         AT(coefficient),    6, false},
    {"stress [Pa]",                  AT(stress),         5, false},
    {"along share [1]",              AT(along),          4, false},
    {"set-up [m]",                   AT(set_up.value),   4, false},
    {"set-up_low [m]",               AT(set_up.low),     4, false},
    {"set-up_high [m]",              AT(set_up.high),    4, false},
    {"set-up at [m]",                AT(set_up_at),      1, false},
    {"set-down [m]",                 AT(set_down.value), 4, false},
    {"set-down_low [m]",             AT(set_down.low),   4, false},
    {"set-down_high [m]",            AT(set_down.high),  4, false},
    {"set-down at [m]",              AT(set_down_at),    1, false},
    {"tilt [m]",                     AT(tilt.value),     4, false},
    {"tilt_low [m]",                 AT(tilt.low),       4, false},
    {"tilt_high [m]",                AT(tilt.high),      4, false},
    {"cross-axis tilt [m]",          AT(cross_tilt),     4, false},
    {"fallen dry [m]",               AT(dry_length),     1, false},
};
enum { COLUMNS = sizeof columns / sizeof columns[0] };

static void write_steady_header(FILE *out, const lee_case *from) {
    for (size_t k = 0; k < COLUMNS; k++) {
        (void)fprintf(out, "%s%s", k > 0 ? "," : "", columns[k].header);
    }
    for (size_t i = 0; i < from->problem.station_count; i++) {
        const char *name = from->problem.station[i].name;
        write_header(out, name, " [m]");
        write_header(out, name, "_low [m]");
        write_header(out, name, "_high [m]");
        write_threshold_headers(out, &from->problem.station[i]);
    }
    (void)fputs(",warnings", out);
    (void)fputc('\n', out);
}

static void write_steady_row(FILE *out, const lee_wind_estimate *wind,
                             const lee_problem *problem) {
    for (size_t k = 0; k < COLUMNS; k++) {
        double value;
        memcpy(&value, (const char *)wind + columns[k].offset, sizeof value);
        (void)fputs(k > 0 ? "," : "", out);
        write_value(out,
                    columns[k].is_angle ? lee_compass_degrees(value) : value,
                    columns[k].decimals);
    }
    for (size_t i = 0; i < problem->station_count; i++) {
        const lee_ranged *level = &wind->station[i].level;
        write_next(out, level->value, 4);
        write_next(out, level->low, 4);
        write_next(out, level->high, 4);
        const lee_station *station = &problem->station[i];
        for (size_t k = 0; k < station->threshold_count; k++) {
            (void)fprintf(
                out, ",%s",
                reach_word(lee_threshold_reach(&station->threshold[k], level)));
        }
    }
    write_warnings(out, &wind->warnings);
    (void)fputc('\n', out);
}

static void write_steady(FILE *out, const table *what) {
    const lee_steady_result *result = what->steady;
    write_head(out, what->from, &result->method, result->still_water);
    write_foot_of_head(out, &result->warnings);
    write_steady_header(out, what->from);
    for (size_t i = 0; i < result->count; i++) {
        write_steady_row(out, &result->wind[i], &what->from->problem);
    }
}

lee_status lee_csv_steady(const lee_target *target, const lee_case *from,
                          const lee_steady_result *result, lee_error *error) {
    const table what = {.from = from, .steady = result};
    return write_file(target, write_steady, &what, error);
}

/* ---- run ---- */

static void write_run_header(FILE *out, const lee_case *from,
                             const lee_run_result *result, bool with_wind) {
    (void)fputs("time,spin-up", out);
    if (with_wind) {
        (void)fputs(",wind 10 m over water [m s-1],wind from [degree]", out);
    }
    for (size_t i = 0; i < result->station_count; i++) {
        const char *name = from->problem.station[i].name;
        write_header(out, name, " [m]");
        if (result->station[i].low != NULL) {
            write_header(out, name, "_low [m]");
            write_header(out, name, "_high [m]");
        }
    }
    (void)fputc('\n', out);
}

static void write_run_row(FILE *out, const lee_run_result *result, size_t row,
                          bool with_wind) {
    char text[LEE_TIME_TEXT];
    (void)fprintf(out, "%s,%d", lee_time_format(result->time[row], text),
                  result->is_spin_up[row] ? 1 : 0);
    if (with_wind) {
        write_next(out, result->speed[row], 3);
        write_next(out, lee_compass_degrees(result->from[row]), 1);
    }
    for (size_t i = 0; i < result->station_count; i++) {
        const lee_station_series *series = &result->station[i];
        write_next(out, series->level[row], 4);
        if (series->low != NULL) {
            write_next(out, series->low[row], 4);
            write_next(out, series->high[row], 4);
        }
    }
    (void)fputc('\n', out);
}

static void write_run(FILE *out, const table *what) {
    const lee_run_result *result = what->run;
    write_head(out, what->from, &result->method, result->still_water);
    write_foot_of_head(out, &result->warnings);
    write_run_header(out, what->from, result, what->with_wind);
    for (size_t i = 0; i < result->n; i++) {
        write_run_row(out, result, i, what->with_wind);
    }
}

lee_status lee_csv_run(const lee_target *target, const lee_case *from,
                       const lee_run_result *result, lee_error *error) {
    const table what = {
        .from = from, .run = result, .with_wind = target->with_wind};
    return write_file(target, write_run, &what, error);
}
