/* method_text.c - head, method and caution, the same in every text. */
#include "output/print.h"

#include <math.h>

void lee_print_head(const lee_printer *to, const lee_case *from,
                    double still_water) {
    const lee_lake *lake = &from->problem.lake;
    if (from->title != NULL) {
        lee_print_wrapped(to, 0, "", from->title);
    }
    lee_print_sentence(to, 0, "", "%s, still water %s above %s",
                       lake->name != NULL ? lake->name : "Lake",
                       lee_show_length(to, still_water).text,
                       lee_datum_of(from));
    for (size_t i = 0; i < from->notes.n; i++) {
        lee_print_note(to, "! ", "", from->notes.text[i]);
    }
}

static void print_corrections(const lee_printer *to, const lee_method *method) {
    for (size_t i = 0; i < method->correction_count; i++) {
        const lee_correction *link = &method->correction[i];
        lee_print_row(to, i == 0 ? "corrections" : "", "%s x %.3f: %s",
                      link->name, link->factor, link->method);
    }
    if (method->correction_count == 0) {
        lee_print_row(to, "corrections", "none");
    } else if (!isnan(method->correction_speed)) {
        lee_print_row(to, "", "(factors at a measured %s)",
                      lee_show_speed(to, method->correction_speed).text);
    }
}

static void print_not_used(const lee_printer *to, const lee_notes *not_used) {
    for (size_t i = 0; i < not_used->n; i++) {
        lee_print_row(to, i == 0 ? "read, not used" : "", "%s",
                      not_used->text[i]);
    }
}

void lee_print_method(const lee_printer *to, const lee_method *method) {
    (void)fputs("\nMethod\n", to->stream);
    lee_print_row(to, "drag", "%s", method->drag);
    print_corrections(to, method);
    lee_cell air;
    (void)snprintf(air.text, sizeof air.text, "%.3f kg/m3, ",
                   method->air_density_value);
    lee_print_note_row(to, "air", air.text, method->air_density);
    lee_print_row(to, "water", "%.1f kg/m3, gravity %.5g m/s2",
                  method->water_density_value, method->gravity);
    lee_print_note_row(to, "bed", "", method->bed);
    lee_cell factor;
    (void)snprintf(factor.text, sizeof factor.text, "%.3f, ",
                   method->return_flow);
    lee_print_note_row(to, "return flow", factor.text, method->return_flow_how);
    print_not_used(to, &method->not_used);
    lee_print_notes(to, "The range holds", &method->range_members);
    lee_print_notes(to, "Record", &method->record);
}

void lee_print_caution(const lee_printer *to) {
    (void)fputs("\nLimits\n", to->stream);
    const char *limit;
    for (size_t i = 0; (limit = lee_limit_at(i)) != NULL; i++) {
        lee_print_wrapped(to, 4, "- ", limit);
    }
    (void)fputc('\n', to->stream);
    lee_print_wrapped(to, 0, "", lee_caution());
}
