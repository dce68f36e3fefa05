/* json_parts.c - what every JSON summary carries. */
#include "output/json_parts.h"

#include <math.h>

#include "base/constants.h"
#include "leewater/calendar.h"
#include "output/print.h"

void lee_json_begin(lee_json *json, const char *command) {
    lee_json_open_object(json, NULL);
    lee_json_put_text(json, "program", "leewater");
    lee_json_put_text(json, "version", lee_version());
    lee_json_put_text(json, "command", command);
}

void lee_json_put_notes(lee_json *json, const char *name,
                        const lee_notes *notes) {
    lee_json_open_list(json, name);
    for (size_t i = 0; i < notes->n; i++) {
        lee_json_put_text(json, NULL, notes->text[i]);
    }
    lee_json_close(json);
}

static void put_about(lee_json *json, const lee_case *from) {
    lee_json_open_object(json, "about");
    lee_json_put_text(json, "institution", from->institution);
    lee_json_put_text(json, "creator", from->creator);
    lee_json_put_text(json, "license", from->license);
    lee_json_close(json);
}

void lee_json_put_case(lee_json *json, const lee_case *from,
                       double still_water) {
    lee_json_put_text(json, "case", from->path);
    lee_json_put_text(json, "title", from->title);
    lee_json_put_text(json, "lake", from->problem.lake.name);
    lee_json_put_text(json, "datum", from->problem.lake.datum);
    lee_json_put_number(json, "still_water_m", still_water);
    put_about(json, from);
    lee_json_put_notes(json, "remarks", &from->notes);
}

/* What a link does to the wind it is shown for, and did to a record. */
static void put_effect(lee_json *json, const lee_correction *link) {
    const lee_link_spread *spread = &link->spread;
    lee_json_put_number(json, "turn_degree", link->turn * 180.0 / lee_pi);
    lee_json_put_number(json, "factor", link->factor);
    lee_json_put_flag(json, "is_extrapolated", link->is_extrapolated);
    lee_json_put_flag(json, "lacks_temperature", link->is_missing);
    if (!link->has_spread) {
        return;
    }
    lee_json_open_object(json, "over_the_record");
    lee_json_put_number(json, "least", spread->least);
    lee_json_put_number(json, "median", spread->median);
    lee_json_put_number(json, "greatest", spread->greatest);
    lee_json_put_count(json, "extrapolated", spread->extrapolated);
    lee_json_put_count(json, "lack_temperature", spread->missing);
    lee_json_close(json);
}

static void put_corrections(lee_json *json, const lee_method *method) {
    lee_json_open_list(json, "corrections");
    for (size_t i = 0; i < method->correction_count; i++) {
        const lee_correction *link = &method->correction[i];
        lee_json_open_object(json, NULL);
        lee_json_put_text(json, "name", link->name);
        lee_json_put_text(json, "method", link->method);
        lee_json_put_text(json, "source", link->source);
        put_effect(json, link);
        lee_json_close(json);
    }
    lee_json_close(json);
    lee_json_put_number(json, "factors_at_m_s", method->corrected.speed);
    lee_json_put_number(json, "factors_at_air_K",
                        method->corrected.air_temperature);
    lee_json_put_number(json, "factors_at_water_K",
                        method->corrected.water_temperature);
}

/* null for what a method has none of. */
static void put_known(lee_json *json, const char *name, const char *text) {
    lee_json_put_text(json, name, text[0] != '\0' ? text : NULL);
}

void lee_json_put_method(lee_json *json, const lee_method *method) {
    lee_json_open_object(json, "method");
    lee_json_put_text(json, "drag", method->drag);
    lee_json_put_number(json, "reference_height_m", method->reference_height);
    put_corrections(json, method);
    lee_json_put_number(json, "air_density_kg_m3", method->air_density_value);
    lee_json_put_text(json, "air_density_from", method->air_density);
    lee_json_put_number(json, "water_density_kg_m3",
                        method->water_density_value);
    lee_json_put_number(json, "gravity_m_s2", method->gravity);
    put_known(json, "bed", method->bed);
    lee_json_put_number(json, "return_flow", method->return_flow);
    put_known(json, "return_flow_from", method->return_flow_how);
    lee_json_put_notes(json, "range_members", &method->range_members);
    lee_json_put_notes(json, "record", &method->record);
    lee_json_put_notes(json, "read_not_used", &method->not_used);
    lee_json_close(json);
}

void lee_json_put_caution(lee_json *json) {
    lee_json_open_list(json, "limits");
    const char *limit;
    for (size_t i = 0; (limit = lee_limit_at(i)) != NULL; i++) {
        lee_json_put_text(json, NULL, limit);
    }
    lee_json_close(json);
    lee_json_put_text(json, "caution", lee_caution());
}

void lee_json_put_ranged(lee_json *json, const char *name, const char *range,
                         const lee_ranged *ranged) {
    lee_json_put_number(json, name, ranged->value);
    lee_json_open_list(json, range);
    lee_json_put_number(json, NULL, ranged->low);
    lee_json_put_number(json, NULL, ranged->high);
    lee_json_close(json);
    if (isnan(ranged->value)) {
        lee_json_put_text(json, "reason", "dry");
    }
}

void lee_json_put_time(lee_json *json, const char *name, bool is_known,
                       int64_t time) {
    char text[LEE_TIME_TEXT];
    lee_json_put_text(json, name,
                      is_known ? lee_time_format(time, text) : NULL);
}

void lee_json_put_degrees(lee_json *json, const char *name, double radians) {
    lee_json_put_number(json, name, lee_compass_degrees(radians));
}
