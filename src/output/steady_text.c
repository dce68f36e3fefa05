/* steady_text.c - equilibrium levels as text: a block for a few winds, a
 * table for many. */
#include "output/formulas.h"
#include "output/print.h"

#include <math.h>
#include <stdbool.h>
#include <string.h>

enum { BLOCKS_UP_TO = 3 }; /* winds that get a block of their own */

/* What stands at a place: "lee shore, 11.80 km". */
static lee_cell where(const lee_printer *to, const lee_wind_estimate *wind,
                      const char *shore, double chainage) {
    lee_cell cell;
    (void)snprintf(cell.text, sizeof cell.text, "%s%.24s",
                   wind->is_across ? "at " : shore,
                   lee_show_distance(to, chainage).text);
    return cell;
}

static void print_wind(const lee_printer *to, const lee_wind_estimate *wind) {
    (void)fprintf(to->stream, "\nWind %s from %s degrees\n",
                  lee_show_speed(to, wind->wind.speed).text,
                  lee_show_bare_direction(wind->wind.from).text);
    lee_print_row(to, "10 m over water", "%s",
                  lee_show_speed(to, wind->speed).text);
    lee_print_row(to, "drag coefficient", "%.2f / 1000",
                  1e3 * wind->coefficient);
    if (wind->is_across) {
        lee_print_row(to, "wind stress",
                      "%.3f Pa, across the axis: no end is the lee",
                      wind->stress);
    } else {
        lee_print_row(to, "wind stress",
                      "%.3f Pa, %.0f %% of it along the axis", wind->stress,
                      100.0 * fabs(wind->along));
    }
    lee_print_row(to, "return flow", "%.3f", wind->return_flow);
}

static void print_nodes(const lee_printer *to,
                        const lee_water_estimate *water) {
    enum { SHOWN = 40 };
    char line[SHOWN * sizeof(lee_cell)];
    size_t length = 0;
    for (size_t i = 0; i < water->node_count && i < SHOWN; i++) {
        length += (size_t)snprintf(line + length, sizeof line - length,
                                   "%s%.48s", i > 0 ? ", " : "at ",
                                   lee_show_distance(to, water->node[i]).text);
    }
    if (water->node_count > SHOWN) {
        lee_print_row(to, "nodes", "%s and %zu more", line,
                      water->node_count - SHOWN);
    } else if (water->node_count > 0) {
        lee_print_row(to, water->node_count > 1 ? "nodes" : "node", "%s", line);
    }
}

static void print_ends(const lee_printer *to, const lee_wind_estimate *wind,
                       const lee_water_estimate *water) {
    lee_print_row(to, "set-up", "%s, %s",
                  lee_show_ranged(to, &water->set_up).text,
                  where(to, wind, "lee shore, ", water->set_up_at).text);
    lee_print_row(to, "set-down", "%s, %s",
                  lee_show_ranged(to, &water->set_down).text,
                  where(to, wind, "windward shore, ", water->set_down_at).text);
    lee_print_row(to, "tilt", "%s", lee_show_ranged(to, &water->tilt).text);
    print_nodes(to, water);
    lee_print_row(to, "first period", "%s, develops in %s",
                  lee_show_duration(water->first_period).text,
                  lee_show_duration(water->develop_time).text);
}

static void print_waters(const lee_printer *to, const lee_wind_estimate *wind) {
    for (size_t i = 0; i < wind->water_count; i++) {
        const lee_water_estimate *water = &wind->water[i];
        if (wind->water_count > 1) {
            (void)fprintf(to->stream, "  Water %zu of %zu, %s to %s\n", i + 1,
                          wind->water_count,
                          lee_show_distance(to, water->from).text,
                          lee_show_distance(to, water->to).text);
        }
        print_ends(to, wind, water);
    }
    const double least_shown = 0.0005; /* m: less reads 0.000 */
    if (isnan(wind->cross_tilt_at) || wind->cross_tilt < least_shown) {
        lee_print_row(to, "cross-axis tilt", "none");
    } else {
        lee_print_row(to, "cross-axis tilt", "%s at %s",
                      lee_show_length(to, wind->cross_tilt).text,
                      lee_show_distance(to, wind->cross_tilt_at).text);
    }
    if (wind->dry_length > 0.0) {
        lee_print_row(to, "fallen dry", "%s of the axis",
                      lee_show_distance(to, wind->dry_length).text);
    }
    lee_print_row(to, "volume defect", "%.1e", wind->volume_defect);
}

static size_t name_width(const lee_problem *problem) {
    size_t width = strlen("station");
    for (size_t i = 0; i < problem->station_count; i++) {
        const size_t own = lee_text_width(problem->station[i].name);
        width = own > width ? own : width;
    }
    return width;
}

/* "above 101.650 m: reached". */
static void print_reach(const lee_printer *to, const lee_threshold *threshold,
                        const lee_ranged *level) {
    const char *words = "not reached";
    switch (lee_threshold_reach(threshold, level)) {
    case LEE_REACH_NOT:
        break;
    case LEE_REACH_RANGE:
        words = threshold->is_below ? "only by the low end of the range"
                                    : "only by the high end of the range";
        break;
    case LEE_REACH_VALUE:
        words = "reached";
        break;
    }
    (void)fprintf(to->stream, "    %s %s: %s\n",
                  threshold->is_below ? "below" : "above",
                  lee_show_length(to, threshold->level).text, words);
}

/* "depth 1.850 m", over the station's own bed or the section's. */
static lee_cell depth_of(const lee_printer *to, const lee_station *station,
                         const lee_station_level *at) {
    lee_cell cell;
    if (isnan(station->bed)) {
        (void)snprintf(cell.text, sizeof cell.text, "section depth %.40s",
                       lee_show_length(to, at->section_depth).text);
    } else if (isnan(at->depth)) {
        (void)snprintf(cell.text, sizeof cell.text, "its bed is dry");
    } else {
        (void)snprintf(cell.text, sizeof cell.text, "depth %.40s",
                       lee_show_length(to, at->depth).text);
    }
    return cell;
}

static void print_stations(const lee_printer *to, const lee_case *from,
                           const lee_wind_estimate *wind) {
    const lee_problem *problem = &from->problem;
    const size_t width = name_width(problem);
    if (problem->station_count == 0) {
        return;
    }
    (void)fprintf(to->stream, "\n  Levels, %s above %s\n", lee_length_unit(to),
                  lee_datum_of(from));
    for (size_t i = 0; i < problem->station_count; i++) {
        const lee_station_level *at = &wind->station[i];
        const lee_station *station = &problem->station[i];
        (void)fputs("  ", to->stream);
        lee_print_padded(to, station->name, width);
        (void)fprintf(to->stream, "  %9s  %8s  %-20s  %s\n",
                      lee_show_distance(to, station->at).text,
                      lee_show_bare_length(to, at->level.value).text,
                      lee_show_range_only(to, &at->level).text,
                      depth_of(to, station, at).text);
        for (size_t k = 0; k < station->threshold_count; k++) {
            print_reach(to, &station->threshold[k], &at->level);
        }
    }
}

static void print_block(const lee_printer *to, const lee_case *from,
                        const lee_wind_estimate *wind) {
    print_wind(to, wind);
    print_waters(to, wind);
    print_stations(to, from, wind);
    for (size_t i = 0; i < wind->warnings.n; i++) {
        if (i == 0) {
            (void)fputc('\n', to->stream);
        }
        lee_print_note(to, "! ", "", wind->warnings.text[i]);
    }
}

static void print_line(const lee_printer *to, const lee_wind_estimate *wind) {
    (void)fprintf(
        to->stream, "  %6s  %5s  %5.0f  %6s  %7s %-18s  %7s %-20s  %6s\n",
        lee_show_bare_speed(to, wind->wind.speed).text,
        lee_show_bare_direction(wind->wind.from).text,
        round(100.0 * wind->along) + 0.0,
        wind->is_across ? "across"
                        : lee_show_bare_distance(to, wind->set_up_at).text,
        lee_show_bare_length(to, wind->set_up.value).text,
        lee_show_range_only(to, &wind->set_up).text,
        lee_show_bare_length(to, wind->set_down.value).text,
        lee_show_range_only(to, &wind->set_down).text,
        lee_show_bare_length(to, wind->tilt.value).text);
}

/* Levels that differ by less are one, m. */
static const double rounding = 1e-6;

/* The first of the highest set-ups. */
static size_t highest(const lee_steady_result *result) {
    size_t best = 0;
    for (size_t i = 1; i < result->count; i++) {
        if (result->wind[i].set_up.value >
            result->wind[best].set_up.value + rounding) {
            best = i;
        }
    }
    return best;
}

/* The first of the lowest set-downs. */
static size_t lowest(const lee_steady_result *result) {
    size_t best = 0;
    for (size_t i = 1; i < result->count; i++) {
        if (result->wind[i].set_down.value <
            result->wind[best].set_down.value - rounding) {
            best = i;
        }
    }
    return best;
}

/* The wind that raises most and, when it is another, the one that lowers
 * most. */
static void print_worst(const lee_printer *to, const lee_case *from,
                        const lee_steady_result *result) {
    const size_t up = highest(result);
    const size_t down = lowest(result);
    (void)fputs(up == down ? "\nHighest set-up and lowest set-down"
                           : "\nHighest set-up",
                to->stream);
    print_block(to, from, &result->wind[up]);
    if (down != up) {
        (void)fputs("\nLowest set-down", to->stream);
        print_block(to, from, &result->wind[down]);
    }
}

/* The wind under which a station stands highest (sign 1) or lowest (-1); a
 * station fallen dry stands lowest. */
static const lee_wind_estimate *worst_at(const lee_steady_result *result,
                                         size_t station, double sign) {
    const lee_wind_estimate *worst = NULL;
    double most = -INFINITY;
    for (size_t i = 0; i < result->count; i++) {
        const double level = result->wind[i].station[station].level.value;
        const double height = isnan(level) ? -INFINITY : level;
        if (worst == NULL || sign * height > most + rounding) {
            worst = &result->wind[i];
            most = sign * height;
        }
    }
    return worst;
}

static void print_extreme(const lee_printer *to, const char *what,
                          const lee_wind_estimate *wind, size_t station) {
    const lee_ranged *level = &wind->station[station].level;
    (void)fprintf(to->stream, "    %-8s %8s  %-20s  wind %s from %s degrees\n",
                  what, lee_show_bare_length(to, level->value).text,
                  lee_show_range_only(to, level).text,
                  lee_show_speed(to, wind->wind.speed).text,
                  lee_show_bare_direction(wind->wind.from).text);
}

/* A threshold of a station, over all winds. */
typedef struct crossing {
    const lee_steady_result *result;
    size_t station;
    const lee_threshold *threshold;
    bool is_scan; /* the winds go round */
} crossing;

/* Whether wind `index`, counted round, reaches the threshold so. */
static bool does_reach(const crossing *at, size_t index, lee_reach reach) {
    const lee_wind_estimate *wind =
        &at->result->wind[index % at->result->count];
    return lee_threshold_reach(at->threshold,
                               &wind->station[at->station].level) == reach;
}

/* A line of bounded length, in parts: text takes no memory. */
typedef struct parts {
    size_t length;
    char text[1024];
} parts;

static void add(parts *line, const char *text) {
    const size_t rest = sizeof line->text - line->length;
    const int more = snprintf(line->text + line->length, rest, "%.200s", text);
    line->length += more > 0 && (size_t)more < rest ? (size_t)more : 0;
}

/* "22.0 m/s from 240", or of a scan "210 to 270". */
static void add_winds(const lee_printer *to, const crossing *at, size_t first,
                      size_t last, parts *line) {
    const size_t count = at->result->count;
    const lee_given_wind *one = &at->result->wind[first % count].wind;
    const lee_given_wind *other = &at->result->wind[last % count].wind;
    if (!at->is_scan) {
        add(line, lee_show_speed(to, one->speed).text);
        add(line, " from ");
    }
    add(line, lee_show_bare_direction(one->from).text);
    if (first != last) {
        add(line, " to ");
        add(line, lee_show_bare_direction(other->from).text);
    }
}

/* Adds the winds that reach so, those of a scan that follow each other as
 * one; nothing when there are none. */
static void add_reach(const lee_printer *to, const crossing *at,
                      lee_reach reach, const char *words, parts *line) {
    enum { SHOWN = 16 };
    const size_t count = at->result->count;
    size_t start = 0;
    while (at->is_scan && start < count && does_reach(at, start, reach)) {
        start++;
    }
    size_t shown = 0;
    for (size_t i = start % count; i < start % count + count; i++) {
        if (!does_reach(at, i, reach)) {
            continue;
        }
        const size_t first = i;
        while (at->is_scan && i + 1 < start % count + count &&
               does_reach(at, i + 1, reach)) {
            i++;
        }
        if (shown == 0) {
            add(line, line->length > 0 ? "; " : "");
            add(line, words);
            add(line, at->is_scan ? " from " : " by ");
        } else if (shown <= SHOWN) {
            add(line, shown < SHOWN ? ", " : " degrees and others");
        }
        if (shown < SHOWN) {
            add_winds(to, at, first, i, line);
        }
        shown++;
    }
    add(line, shown > 0 && shown <= SHOWN ? " degrees" : "");
}

static void print_crossing(const lee_printer *to, const crossing *at) {
    parts line = {0};
    add_reach(to, at, LEE_REACH_VALUE, "reached", &line);
    add_reach(to, at, LEE_REACH_RANGE, "only within the range", &line);
    lee_print_sentence(to, 6, "  ", "%s %s: %s",
                       at->threshold->is_below ? "below" : "above",
                       lee_show_length(to, at->threshold->level).text,
                       line.length > 0 ? line.text : "not reached");
}

/* Highest and lowest level of each station over all winds, and which winds
 * reach its thresholds. */
static void print_station_extremes(const lee_printer *to, const lee_case *from,
                                   const lee_steady_result *result) {
    const lee_problem *problem = &from->problem;
    if (problem->station_count == 0) {
        return;
    }
    (void)fprintf(to->stream, "\nStations over all winds, %s above %s\n",
                  lee_length_unit(to), lee_datum_of(from));
    for (size_t i = 0; i < problem->station_count; i++) {
        (void)fprintf(to->stream, "  %s, chainage %s\n",
                      problem->station[i].name,
                      lee_show_distance(to, problem->station[i].at).text);
        print_extreme(to, "highest", worst_at(result, i, 1.0), i);
        print_extreme(to, "lowest", worst_at(result, i, -1.0), i);
        for (size_t k = 0; k < problem->station[i].threshold_count; k++) {
            const crossing at = {result, i, &problem->station[i].threshold[k],
                                 problem->wind.kind == LEE_WIND_SCAN};
            print_crossing(to, &at);
        }
    }
}

static void print_table(const lee_printer *to,
                        const lee_steady_result *result) {
    const char *unit = lee_length_unit(to);
    static const char layout[] = "  %6s  %5s  %5s  %6s  %7s %-18s  %7s %-20s  "
                                 "%6s\n";
    (void)fputc('\n', to->stream);
    (void)fprintf(to->stream, layout, "wind", "from", "along", "lee at",
                  "set-up", "(range)", "set-down", "(range)", "tilt");
    (void)fprintf(to->stream, layout, lee_speed_unit(to), "deg", "%",
                  lee_distance_unit(to), unit, "", unit, "", unit);
    for (size_t i = 0; i < result->count; i++) {
        print_line(to, &result->wind[i]);
    }
}

/* A warning that several winds share but for its numbers. */
typedef struct shared_warning {
    const char *text; /* of the first wind that has it */
    double from;      /* of that wind */
    size_t count;
} shared_warning;

enum { MOST_SHARED = 32 };

static bool is_of_a_number(char c) {
    return (c >= '0' && c <= '9') || c == '.';
}

/* Equal when every run of digits and dots is left out. */
static bool is_same_but_numbers(const char *a, const char *b) {
    while (*a != '\0' || *b != '\0') {
        if (is_of_a_number(*a) || is_of_a_number(*b)) {
            while (is_of_a_number(*a)) {
                a++;
            }
            while (is_of_a_number(*b)) {
                b++;
            }
        } else if (*a++ != *b++) {
            return false;
        }
    }
    return true;
}

/* Counts a warning with its like; returns how many kinds there are then. */
static size_t count_warning(shared_warning seen[], size_t n, const char *text,
                            double from) {
    for (size_t i = 0; i < n; i++) {
        if (is_same_but_numbers(seen[i].text, text)) {
            seen[i].count++;
            return n;
        }
    }
    if (n < MOST_SHARED) {
        seen[n++] = (shared_warning){text, from, 1};
    }
    return n;
}

static void print_shared(const lee_printer *to, const shared_warning *seen) {
    lee_cell more = {{0}};
    if (seen->count > 1) {
        (void)snprintf(more.text, sizeof more.text,
                       ", and %zu more wind%s alike", seen->count - 1,
                       seen->count > 2 ? "s" : "");
    }
    lee_cell lead;
    (void)snprintf(lead.text, sizeof lead.text, "from %.10s degrees%.36s: ",
                   lee_show_bare_direction(seen->from).text, more.text);
    lee_print_note(to, "- ", lead.text, seen->text);
}

static void print_warnings(const lee_printer *to,
                           const lee_steady_result *result) {
    shared_warning seen[MOST_SHARED];
    size_t n = 0;
    for (size_t i = 0; i < result->count; i++) {
        const lee_wind_estimate *wind = &result->wind[i];
        for (size_t k = 0; k < wind->warnings.n; k++) {
            n = count_warning(seen, n, wind->warnings.text[k], wind->wind.from);
        }
    }
    if (n > 0) {
        (void)fputs("\nWarnings\n", to->stream);
    }
    for (size_t i = 0; i < n; i++) {
        print_shared(to, &seen[i]);
    }
}

/* The formulas for the wind that raises most. */
static void print_beside(const lee_printer *to, const lee_case *from,
                         const lee_steady_result *result) {
    const lee_wind_estimate *wind = &result->wind[highest(result)];
    if (result->count > 1) {
        (void)fprintf(to->stream, "\nBeside it, for %s from %s degrees:",
                      lee_show_speed(to, wind->wind.speed).text,
                      lee_show_bare_direction(wind->wind.from).text);
    }
    const lee_formula_question asked = lee_ask_formulas(from, result, wind);
    lee_print_formulas(to, &asked);
}

lee_status lee_print_steady(FILE *stream, const lee_case *from,
                            const lee_steady_result *result,
                            lee_unit_system units, lee_error *error) {
    const lee_printer to = {stream, units};
    lee_print_head(&to, from, result->still_water);
    if (result->count > BLOCKS_UP_TO) {
        print_table(&to, result);
        print_station_extremes(&to, from, result);
        print_worst(&to, from, result);
        print_warnings(&to, result);
    } else {
        for (size_t i = 0; i < result->count; i++) {
            print_block(&to, from, &result->wind[i]);
        }
    }
    lee_print_notes(&to, "Warnings on the case", &result->warnings);
    print_beside(&to, from, result);
    lee_print_method(&to, &result->method);
    lee_print_caution(&to);
    return lee_print_end(&to, error);
}
