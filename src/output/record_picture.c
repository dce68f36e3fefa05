/* record_picture.c - a record drawn on one screen, in plain ASCII. */
#include "output/record_picture.h"

#include <math.h>
#include <stdarg.h>
#include <stdbool.h>

/* Two panels side by side below the coverage: rose left, storms right. */
enum { PANEL_ROWS = 20, PANEL_WIDTH = 40, LEFT_WIDTH = 38, BAR = 25 };

typedef struct panel {
    char line[PANEL_ROWS][PANEL_WIDTH];
    size_t count;
} panel;

/* Speed classes in a bar, the darker the faster. */
static const char class_mark[LEE_ROSE_CLASSES] = {'.', ':', '-', '=', '+', '#'};

static const char *const sectors[LEE_ROSE_DIRECTIONS] = {
    "N", "NNE", "NE", "ENE", "E", "ESE", "SE", "SSE",
    "S", "SSW", "SW", "WSW", "W", "WNW", "NW", "NNW",
};

static void add_line(panel *into, const char *format, ...) LEE_PRINTF(2, 3);

static void add_line(panel *into, const char *format, ...) {
    va_list arguments;
    va_start(arguments, format);
    (void)vsnprintf(into->line[into->count++], PANEL_WIDTH, format, arguments);
    va_end(arguments);
}

/* A line that grows; what is beyond its room is not drawn. */
typedef struct line {
    char text[256];
    size_t length;
} line;

static void extend(line *into, const char *format, ...) LEE_PRINTF(2, 3);

static void extend(line *into, const char *format, ...) {
    const size_t room = sizeof into->text - into->length;
    va_list arguments;
    va_start(arguments, format);
    const int added =
        vsnprintf(into->text + into->length, room, format, arguments);
    va_end(arguments);
    const size_t wanted = added > 0 ? (size_t)added : 0;
    into->length += wanted < room ? wanted : room - 1;
}

/* Prints a line without the blanks at its end, and empties it. */
static void put_line(const lee_printer *to, line *from) {
    while (from->length > 0 && from->text[from->length - 1] == ' ') {
        from->length--;
    }
    (void)fprintf(to->stream, "%.*s\n", (int)from->length, from->text);
    *from = (line){.length = 0};
}

/* Coverage. */

/* How the years are laid out: `together` years share a cell, `across` blocks
 * of twelve months stand side by side. */
typedef struct calendar {
    int first_year;
    int together;
    size_t cells;
    size_t across;
} calendar;

static calendar lay_out(const lee_wind_summary *summary) {
    enum { ACROSS = 4, ACROSS_TOGETHER = 3, ROWS = 10, ROWS_TOGETHER = 12 };
    const int first = summary->month[0].year;
    const int last = summary->month[summary->month_count - 1].year;
    const int years = last - first + 1;
    calendar plan = {first, 1, (size_t)years, ACROSS};
    if (years > ACROSS * ROWS) {
        const int most = ACROSS_TOGETHER * ROWS_TOGETHER;
        plan.together = (years + most - 1) / most;
        plan.cells = (size_t)((years + plan.together - 1) / plan.together);
        plan.across = ACROSS_TOGETHER;
    }
    plan.across = plan.cells < plan.across ? plan.cells : plan.across;
    return plan;
}

static char coverage_mark(double coverage) {
    if (isnan(coverage)) {
        return '?';
    }
    if (coverage >= 0.95) {
        return '#';
    }
    if (coverage >= 0.5) {
        return '+';
    }
    return coverage > 0.0 ? '-' : '.';
}

/* The mean over the years of a cell that the record reaches into; a blank
 * when there is none. */
static char month_mark(const lee_wind_summary *summary, const calendar *plan,
                       size_t cell, int month) {
    const lee_wind_month *start = &summary->month[0];
    const int from = plan->first_year + (int)cell * plan->together;
    double sum = 0.0;
    size_t count = 0;
    for (int year = from; year < from + plan->together; year++) {
        const int index = 12 * (year - start->year) + month - start->month;
        if (index >= 0 && (size_t)index < summary->month_count) {
            sum += summary->month[index].coverage;
            count++;
        }
    }
    if (count == 0) {
        return ' ';
    }
    return coverage_mark(sum / (double)count);
}

static void add_year(line *row, const lee_wind_summary *summary,
                     const calendar *plan, size_t cell) {
    const int from = plan->first_year + (int)cell * plan->together;
    char months[13] = {0};
    for (int i = 0; i < 12; i++) {
        months[i] = month_mark(summary, plan, cell, i + 1);
    }
    if (plan->together > 1) {
        extend(row, "  %4d-%4d %s", from, from + plan->together - 1, months);
    } else {
        extend(row, "  %4d %s", from, months);
    }
}

/* Only a whole record has 100.0 %. */
static double covered_percent(double coverage) {
    return coverage < 1.0 ? fmin(100.0 * coverage, 99.9) : 100.0;
}

static void print_coverage(const lee_printer *to,
                           const lee_wind_summary *summary) {
    const calendar plan = lay_out(summary);
    const char *label = plan.together > 1 ? "years    " : "year";
    line row = {.length = 0};
    if (isnan(summary->coverage)) {
        extend(&row, "\nCoverage: one sample has no step");
    } else {
        extend(&row, "\nCoverage: %.1f %% of the time has wind",
               covered_percent(summary->coverage));
    }
    extend(&row, "   # 95 %% and more  + 50 %%  - less  . none");
    put_line(to, &row);
    for (size_t i = 0; i < plan.across; i++) {
        extend(&row, "  %s JFMAMJJASOND", label);
    }
    put_line(to, &row);
    for (size_t i = 0; i < plan.cells; i++) {
        add_year(&row, summary, &plan, i);
        if ((i + 1) % plan.across == 0 || i + 1 == plan.cells) {
            put_line(to, &row);
        }
    }
}

/* Wind rose. */

static double sector_share(const lee_wind_summary *summary, size_t sector) {
    double share = 0.0;
    for (size_t k = 0; k < LEE_ROSE_CLASSES; k++) {
        share += summary->rose[sector][k];
    }
    return share;
}

/* Share that a character of a bar stands for: the least round one by which
 * the longest bar fits. */
static double bar_scale(const lee_wind_summary *summary) {
    static const double scales[] = {0.001, 0.002, 0.005, 0.01, 0.02};
    double largest = 0.0;
    for (size_t i = 0; i < LEE_ROSE_DIRECTIONS; i++) {
        largest = fmax(largest, sector_share(summary, i));
    }
    for (size_t i = 0; i < sizeof scales / sizeof scales[0]; i++) {
        if (largest <= BAR * scales[i]) {
            return scales[i];
        }
    }
    return 0.05;
}

/* Each class ends where the sum up to it ends, so that the length of the bar
 * is right whatever its parts are rounded to. */
static void draw_bar(const double share[], double scale, char bar[BAR + 1]) {
    double sum = 0.0;
    size_t length = 0;
    for (size_t k = 0; k < LEE_ROSE_CLASSES; k++) {
        sum += share[k];
        while (length < BAR && (double)length + 0.5 <= sum / scale) {
            bar[length++] = class_mark[k];
        }
    }
    bar[length] = '\0';
}

static void draw_rose(const lee_wind_summary *summary, panel *into) {
    const double scale = bar_scale(summary);
    add_line(into, "Wind from, share of the time with wind");
    if (summary->with_wind == 0) {
        add_line(into, "  no wind at all");
        return;
    }
    add_line(into, "        %%  a character is %g %%", 100.0 * scale);
    for (size_t i = 0; i < LEE_ROSE_DIRECTIONS; i++) {
        char bar[BAR + 1];
        draw_bar(summary->rose[i], scale, bar);
        add_line(into, "%-4s%6.1f  %s", sectors[i],
                 100.0 * sector_share(summary, i), bar);
    }
    add_line(into, "calm%6.1f", 100.0 * summary->calm);
}

static void print_classes(const lee_printer *to,
                          const lee_wind_summary *summary) {
    line row = {.length = 0};
    const size_t last = LEE_ROSE_CLASSES - 1;
    extend(&row, "  %s:  ", lee_speed_unit(to));
    for (size_t k = 0; k < last; k++) {
        const double from = lee_rose_class_from(k);
        extend(&row, "%c %s-%s  ", class_mark[k],
               k == 0 ? "0" : lee_show_bare_speed(to, from).text,
               lee_show_bare_speed(to, lee_rose_class_from(k + 1)).text);
    }
    extend(&row, "%c %s up", class_mark[last],
           lee_show_bare_speed(to, lee_rose_class_from(last)).text);
    put_line(to, &row);
    if (summary->is_spread) {
        (void)fputs("  (directions are in tens of degrees: each is spread over "
                    "its ten)\n",
                    to->stream);
    }
}

/* Storms and percentiles. */

static void draw_storm(const lee_printer *to, const lee_wind_storm *storm,
                       panel *into) {
    const lee_cell time = lee_show_time(storm->time);
    char hours[16];
    (void)snprintf(hours, sizeof hours, "%s%.1f", storm->is_cut ? ">=" : "",
                   storm->duration / 3600.0);
    add_line(into, "%.16s %6s %4.0f %8s%s", time.text,
             lee_show_bare_speed(to, storm->speed).text,
             lee_whole_degrees(storm->from), hours,
             storm->is_spike ? " ?" : "");
}

static void draw_storms(const lee_printer *to, const lee_wind_summary *summary,
                        panel *into) {
    bool has_cut = false;
    bool has_spike = false;
    add_line(into, "Largest storms, hours at 3/4 and more");
    if (summary->storm_count == 0) {
        add_line(into, "  none");
        return;
    }
    add_line(into, "UTC              %6s from    hours", lee_speed_unit(to));
    for (size_t i = 0; i < summary->storm_count; i++) {
        draw_storm(to, &summary->storm[i], into);
        has_cut = has_cut || summary->storm[i].is_cut;
        has_spike = has_spike || summary->storm[i].is_spike;
    }
    if (has_cut || has_spike) {
        add_line(into, "%s%s%s", has_cut ? ">= cut off" : "",
                 has_cut && has_spike ? ", " : "",
                 has_spike ? "? looks like a spike" : "");
    }
}

static void draw_percentiles(const lee_printer *to,
                             const lee_wind_summary *summary, panel *into) {
    line head = {.length = 0};
    line values = {.length = 0};
    if (summary->with_wind == 0) {
        return;
    }
    for (size_t i = 0; i < LEE_WIND_PERCENTILES; i++) {
        extend(&head, " %5g", lee_wind_percent(i));
        extend(&values, " %5s",
               lee_show_bare_speed(to, summary->percentile[i]).text);
    }
    add_line(into, "%s", "");
    add_line(into, "Winds at or below, %% and %s", lee_speed_unit(to));
    add_line(into, "%s", head.text);
    add_line(into, "%s", values.text);
}

static void print_panels(const lee_printer *to, const panel *left,
                         const panel *right) {
    const size_t rows = left->count > right->count ? left->count : right->count;
    for (size_t i = 0; i < rows; i++) {
        line row = {.length = 0};
        extend(&row, "%-*s  %s", LEFT_WIDTH,
               i < left->count ? left->line[i] : "",
               i < right->count ? right->line[i] : "");
        put_line(to, &row);
    }
}

/* What was done to samples, and to speeds. */

static void add_count(line *row, size_t count, const char *words) {
    if (count > 0) {
        extend(row, "%s%s %zu", row->length > 0 ? ", " : "", words, count);
    }
}

static void print_counts(const lee_printer *to, const lee_wind_check *record) {
    line row = {.length = 0};
    add_count(&row, record->duplicates, "repeated dropped");
    add_count(&row, record->merged, "merged");
    add_count(&row, record->completed, "completed");
    add_count(&row, record->variable_calm, "variable as calm");
    add_count(&row, record->variable_missing, "variable as missing");
    add_count(&row, record->spikes, "spikes kept");
    add_count(&row, record->beyond_belief, "beyond belief kept");
    lee_print_row(to, "record", "%s",
                  row.length > 0 ? row.text : "kept as it is");
}

static void print_links(const lee_printer *to, const lee_method *method) {
    line row = {.length = 0};
    double factor = 1.0;
    if (method->correction_count == 0) {
        lee_print_row(to, "speeds", "as measured, and taken as they are");
        return;
    }
    for (size_t i = 0; i < method->correction_count; i++) {
        const lee_correction *link = &method->correction[i];
        factor *= link->factor;
        extend(&row, "%s%s", i > 0 ? ", " : "", lee_show_link(link, 3).text);
    }
    lee_print_row(
        to, "speeds",
        "as measured; the strongest is taken x %.3f over the water:", factor);
    lee_print_row(to, "", "%s", row.text);
}

void lee_print_record_picture(const lee_printer *to,
                              const lee_problem_check *check) {
    const lee_wind_summary *summary = &check->summary;
    panel rose = {.count = 0};
    panel storms = {.count = 0};
    if (summary->month_count == 0) {
        return;
    }
    draw_rose(summary, &rose);
    draw_storms(to, summary, &storms);
    draw_percentiles(to, summary, &storms);
    print_coverage(to, summary);
    (void)fputc('\n', to->stream);
    print_panels(to, &rose, &storms);
    print_classes(to, summary);
    (void)fputc('\n', to->stream);
    print_counts(to, &check->record);
    print_links(to, &check->method);
}
