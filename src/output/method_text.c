/* method_text.c - head, method and caution, the same in every text. */
#include "output/print.h"

#include <math.h>

#include "base/constants.h"

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

/* Spreads narrower than the digits shown say nothing. */
static const double shown_spread = 5e-4;

static void print_link(const lee_printer *to, const char *label,
                       const lee_correction *link) {
    lee_print_row(to, label, "%s: %s%s%s", lee_show_link(link, 3).text,
                  link->method, link->is_extrapolated ? ", extrapolated" : "",
                  link->is_missing ? ", a temperature is missing" : "");
}

static void print_spread(const lee_printer *to, const lee_correction *link) {
    const lee_link_spread *spread = &link->spread;
    if (spread->greatest - spread->least > shown_spread) {
        lee_print_row(to, "", "    over the record %.3f to %.3f, median %.3f",
                      spread->least, spread->greatest, spread->median);
    }
    if (spread->extrapolated > 0) {
        lee_print_row(to, "", "    extrapolated in %zu winds",
                      spread->extrapolated);
    }
    if (spread->missing > 0) {
        lee_print_row(to, "",
                      "    not corrected in %zu winds that lack a "
                      "temperature",
                      spread->missing);
    }
}

static void print_shown_for(const lee_printer *to,
                            const lee_exposure_sample *shown) {
    char warmth[64] = "";
    if (!isnan(shown->air_temperature) && !isnan(shown->water_temperature)) {
        (void)snprintf(warmth, sizeof warmth, ", air %.1f, water %.1f degC",
                       shown->air_temperature - lee_celsius_zero,
                       shown->water_temperature - lee_celsius_zero);
    }
    lee_print_row(to, "", "(factors at a measured %s%s)",
                  lee_show_speed(to, shown->speed).text, warmth);
}

static void print_corrections(const lee_printer *to, const lee_method *method) {
    for (size_t i = 0; i < method->correction_count; i++) {
        const lee_correction *link = &method->correction[i];
        print_link(to, i == 0 ? "corrections" : "", link);
        if (link->has_spread) {
            print_spread(to, link);
        }
    }
    if (method->correction_count == 0) {
        lee_print_row(to, "corrections", "none");
    } else if (!isnan(method->corrected.speed)) {
        print_shown_for(to, &method->corrected);
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
