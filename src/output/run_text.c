/* run_text.c - a level series as text: what each station saw. */
#include "output/print.h"

#include <math.h>
#include <stdbool.h>

static void print_span(const lee_printer *to, const lee_run_result *result) {
    if (result->n == 0) {
        return;
    }
    (void)fprintf(to->stream, "%s to %s, %zu times\n",
                  lee_show_time(result->time[0]).text,
                  lee_show_time(result->time[result->n - 1]).text, result->n);
}

static void print_strongest(const lee_printer *to,
                            const lee_run_result *result) {
    if (!(result->strongest > 0.0)) {
        (void)fputs("calm throughout\n", to->stream);
        return;
    }
    (void)fprintf(to->stream,
                  "strongest wind %s from %s (10 m over water), %s\n",
                  lee_show_speed(to, result->strongest).text,
                  lee_show_direction(result->strongest_from).text,
                  lee_show_time(result->strongest_time).text);
}

static void print_extreme(const lee_printer *to, const char *label,
                          const lee_ranged *level, int64_t time) {
    if (isnan(level->value)) {
        lee_print_row(to, label, "dry throughout");
        return;
    }
    lee_print_row(to, label, "%s, %s", lee_show_ranged(to, level).text,
                  lee_show_time(time).text);
}

/* "above 102.200 m" -> first time, occasions, durations, return. */
static void print_exceedance(const lee_printer *to,
                             const lee_exceedance *seen) {
    lee_cell label;
    const char *side = seen->threshold.is_below ? "below" : "above";
    const char *back = seen->threshold.is_below ? "above" : "below";
    (void)snprintf(label.text, sizeof label.text, "%s %.40s", side,
                   lee_show_length(to, seen->threshold.level).text);
    if (!seen->is_reached) {
        lee_print_row(to, label.text, "not reached");
        return;
    }
    lee_cell end;
    if (seen->has_returned) {
        (void)snprintf(end.text, sizeof end.text, "back %s since %.40s", back,
                       lee_show_time(seen->return_time).text);
    } else {
        (void)snprintf(end.text, sizeof end.text, "still %s at the end", side);
    }
    if (seen->times == 1) {
        lee_print_row(to, label.text, "once, %s, for %s, %s",
                      lee_show_time(seen->first_time).text,
                      lee_show_duration(seen->total).text, end.text);
        return;
    }
    lee_print_row(to, label.text,
                  "first %s, %zu times, longest %s, total %s, %s",
                  lee_show_time(seen->first_time).text, seen->times,
                  lee_show_duration(seen->longest).text,
                  lee_show_duration(seen->total).text, end.text);
}

static void print_least_depth(const lee_printer *to, const lee_station *station,
                              const lee_station_series *series) {
    const double depth = lee_least_depth(station, series);
    if (isnan(station->bed) || isnan(series->min.value)) {
        return;
    }
    if (!isnan(depth)) {
        lee_print_row(to, "least depth", "%s over its bed",
                      lee_show_length(to, depth).text);
        return;
    }
    if (series->dry_time > 0.0) {
        lee_print_row(to, "least depth", "none, the section falls dry");
        return;
    }
    lee_print_row(to, "least depth", "none, its bed of %s falls dry",
                  lee_show_length(to, station->bed).text);
}

static void print_station(const lee_printer *to, const lee_station *station,
                          const lee_station_series *series) {
    (void)fputc('\n', to->stream);
    lee_print_sentence(to, 0, "", "%s, chainage %s", station->name,
                       lee_show_distance(to, station->at).text);
    print_extreme(to, "highest", &series->max, series->max_time);
    print_extreme(to, "lowest", &series->min, series->min_time);
    print_least_depth(to, station, series);
    for (size_t i = 0; i < series->exceedance_count; i++) {
        print_exceedance(to, &series->exceedance[i]);
    }
    if (series->dry_time > 0.0) {
        lee_print_row(to, "dry for", "%s",
                      lee_show_duration(series->dry_time).text);
    }
    if (!isnan(series->residual)) {
        lee_print_row(to, "residual seiche", "%s from still water, %s",
                      lee_show_length(to, series->residual).text,
                      lee_show_time(series->residual_time).text);
    }
}

static void print_computation(const lee_printer *to,
                              const lee_run_result *result) {
    (void)fputs("\nComputation\n", to->stream);
    lee_print_row(to, "cells, step", "%zu, %.4g s", result->cells,
                  result->step);
    lee_print_row(to, "first period", "%s",
                  lee_show_duration(result->first_period).text);
    if (result->pieces > 1) {
        lee_print_row(to, "pieces", "%zu, parted by gaps of the record",
                      result->pieces);
    }
    lee_print_row(to, "volume defect", "%.1e", result->volume_defect);
    if (isnan(result->numerical_error)) {
        lee_print_row(to, "numerical error", "not computed");
        return;
    }
    lee_print_row(to, "numerical error", "%s (from the step %s, cells %s)",
                  lee_show_small(to, result->numerical_error).text,
                  lee_show_small(to, result->numerical_error_time).text,
                  lee_show_small(to, result->numerical_error_space).text);
}

lee_status lee_print_run(FILE *stream, const lee_case *from,
                         const lee_run_result *result, lee_unit_system units,
                         lee_error *error) {
    const lee_printer to = {stream, units};
    lee_print_head(&to, from, result->still_water);
    print_span(&to, result);
    print_strongest(&to, result);
    (void)fprintf(stream, "levels in %s above %s\n", lee_length_unit(&to),
                  lee_datum_of(from));
    for (size_t i = 0; i < result->station_count; i++) {
        print_station(&to, &from->problem.station[i], &result->station[i]);
    }
    print_computation(&to, result);
    lee_print_notes(&to, "Warnings", &result->warnings);
    lee_print_method(&to, &result->method);
    lee_print_caution(&to);
    return lee_print_end(&to, error);
}
