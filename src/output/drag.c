/* drag.c - drag relations side by side, as text and as JSON. */
#include <math.h>
#include <stdbool.h>
#include <stdio.h>
#include <string.h>

#include "base/constants.h"
#include "output/json_parts.h"
#include "output/print.h"

#include "leewater/output.h"

enum { SPEEDS_A_LINE = 6 };

typedef double table_value(const lee_drag_table *table,
                           const lee_drag_relation *relation, double speed);

static double thousandfold(const lee_drag_table *table,
                           const lee_drag_relation *relation, double speed) {
    lee_drag_input in = lee_drag_input_default();
    in.speed = speed;
    in.air_density = table->air_density;
    in.water_density = table->water_density;
    return 1e3 * relation->coefficient(&in);
}

static double stress_of(const lee_drag_table *table,
                        const lee_drag_relation *relation, double speed) {
    return 1e-3 * thousandfold(table, relation, speed) * table->air_density *
           speed * speed;
}

/* What of a method a table has: no lake, no correction, no range. */
static lee_method method_of(const lee_drag_table *table) {
    lee_method method = {
        .air_density_value = table->air_density,
        .water_density_value = table->water_density,
        .gravity = NAN,
        .return_flow = NAN,
        .corrected = {NAN, NAN, NAN},
        .reference_height = lee_reference_height
    };
    (void)snprintf(method.drag, sizeof method.drag,
                   "each relation as published, no cap");
    (void)snprintf(method.air_density, sizeof method.air_density, "%s",
                   table->has_given_air ? "given"
                                        : "standard, sea level, 15.0 degC");
    return method;
}

static bool is_fitted(const lee_drag_relation *relation, double speed) {
    return speed >= relation->speed_min && speed <= relation->speed_max;
}

static bool has_unfitted(const lee_drag_table *table) {
    for (size_t i = 0; i < table->relations; i++) {
        for (size_t k = 0; k < table->speeds; k++) {
            if (!is_fitted(table->relation[i], table->speed[k])) {
                return true;
            }
        }
    }
    return false;
}

static size_t name_width(const lee_drag_table *table) {
    size_t width = 0;
    for (size_t i = 0; i < table->relations; i++) {
        const size_t own = strlen(table->relation[i]->name);
        width = own > width ? own : width;
    }
    return width;
}

static void print_speeds(const lee_printer *to, const lee_drag_table *table,
                         size_t first, size_t end) {
    (void)fprintf(to->stream, "  %*s", (int)name_width(table),
                  lee_speed_unit(to));
    for (size_t k = first; k < end; k++) {
        (void)fprintf(to->stream, " %6s%s",
                      lee_show_bare_speed(to, table->speed[k]).text,
                      k + 1 < end ? " " : "");
    }
    (void)fputc('\n', to->stream);
}

static void print_values(const lee_printer *to, const lee_drag_table *table,
                         table_value *value, size_t first) {
    const size_t left = table->speeds - first;
    const size_t end = first + (left < SPEEDS_A_LINE ? left : SPEEDS_A_LINE);
    print_speeds(to, table, first, end);
    for (size_t i = 0; i < table->relations; i++) {
        const lee_drag_relation *relation = table->relation[i];
        (void)fprintf(to->stream, "  %-*s", (int)name_width(table),
                      relation->name);
        for (size_t k = first; k < end; k++) {
            const double speed = table->speed[k];
            const char *unmarked = k + 1 < end ? " " : "";
            (void)fprintf(to->stream, " %6.3f%s", value(table, relation, speed),
                          is_fitted(relation, speed) ? unmarked : "*");
        }
        (void)fputc('\n', to->stream);
    }
}

static void print_all(const lee_printer *to, const lee_drag_table *table,
                      const char *heading, table_value *value) {
    (void)fprintf(to->stream, "\n%s\n", heading);
    for (size_t k = 0; k < table->speeds; k += SPEEDS_A_LINE) {
        print_values(to, table, value, k);
    }
}

static void print_sources(const lee_printer *to, const lee_drag_table *table) {
    (void)fputs("\nSources, and the speeds that were fitted\n", to->stream);
    for (size_t i = 0; i < table->relations; i++) {
        const lee_drag_relation *relation = table->relation[i];
        (void)fprintf(to->stream, "  %-*s  %s to %s%s%s\n",
                      (int)name_width(table), relation->name,
                      lee_show_bare_speed(to, relation->speed_min).text,
                      lee_show_speed(to, relation->speed_max).text,
                      relation->is_from_memory ? ", from memory" : "",
                      relation->includes_return_flow
                          ? ", fitted on set-up: holds the return flow"
                          : "");
        lee_print_wrapped(to, 6, "", relation->source);
    }
}

static void print_method(const lee_printer *to, const lee_drag_table *table) {
    const lee_method method = method_of(table);
    (void)fputs("\nMethod\n", to->stream);
    lee_print_row(to, "case", "none: winds taken as they are");
    lee_print_row(to, "drag", "%s", method.drag);
    lee_cell air;
    (void)snprintf(air.text, sizeof air.text, "%.3f kg/m3, ",
                   method.air_density_value);
    lee_print_note_row(to, "air", air.text, method.air_density);
    lee_print_row(to, "water", "%.1f kg/m3", method.water_density_value);
}

lee_status lee_print_drag(FILE *stream, const lee_drag_table *table,
                          lee_unit_system units, lee_error *error) {
    const lee_printer to = {stream, units};
    (void)fprintf(stream, "Drag relations by the wind at 10 m over water\n");
    print_all(&to, table, "Drag coefficient, 1000 C10", thousandfold);
    print_all(&to, table, "Wind stress, Pa", stress_of);
    if (has_unfitted(table)) {
        (void)fputs("\n  * outside the speeds the relation was fitted on\n",
                    stream);
    }
    if (table->has_sources) {
        print_sources(&to, table);
    }
    print_method(&to, table);
    lee_print_caution(&to);
    return lee_print_end(&to, error);
}

static void put_relation(lee_json *json, const lee_drag_table *table,
                         const lee_drag_relation *relation) {
    lee_json_open_object(json, NULL);
    lee_json_put_text(json, "name", relation->name);
    lee_json_put_text(json, "source", relation->source);
    lee_json_put_flag(json, "is_from_memory", relation->is_from_memory);
    lee_json_put_flag(json, "includes_return_flow",
                      relation->includes_return_flow);
    lee_json_put_number(json, "fitted_from_m_s", relation->speed_min);
    lee_json_put_number(json, "fitted_to_m_s", relation->speed_max);
    lee_json_open_list(json, "values");
    for (size_t k = 0; k < table->speeds; k++) {
        const double speed = table->speed[k];
        lee_json_open_object(json, NULL);
        lee_json_put_number(json, "speed_m_s", speed);
        lee_json_put_number(json, "drag_coefficient",
                            1e-3 * thousandfold(table, relation, speed));
        lee_json_put_number(json, "stress_Pa",
                            stress_of(table, relation, speed));
        lee_json_put_flag(json, "is_extrapolated", !is_fitted(relation, speed));
        lee_json_close(json);
    }
    lee_json_close(json);
    lee_json_close(json);
}

lee_status lee_json_drag(FILE *stream, const lee_drag_table *table,
                         lee_error *error) {
    const lee_case none = {0};
    const lee_method method = method_of(table);
    lee_json json = {0};
    lee_json_begin(&json, "drag");
    lee_json_put_case(&json, &none, NAN);
    lee_json_put_number(&json, "reference_height_m", lee_reference_height);
    lee_json_put_number(&json, "air_density_kg_m3", table->air_density);
    lee_json_put_number(&json, "water_density_kg_m3", table->water_density);
    lee_json_open_list(&json, "relations");
    for (size_t i = 0; i < table->relations; i++) {
        put_relation(&json, table, table->relation[i]);
    }
    lee_json_close(&json);
    lee_json_put_notes(&json, "warnings", &none.notes);
    lee_json_put_method(&json, &method);
    lee_json_put_caution(&json);
    return lee_json_write(&json, stream, error);
}
