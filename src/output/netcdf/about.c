/* about.c - origin, method and caution as attributes of a whole file. */
#include "output/netcdf/parts.h"

#include <math.h>
#include <stdio.h>

#include "base/text.h"
#include "leewater/calendar.h"
#include "output/print.h"

/* Sentences as one attribute, one a line; none when there is none. */
static void put_notes(lee_netcdf_out *out, const char *name,
                      const lee_notes *notes) {
    lee_text all = {0};
    for (size_t i = 0; notes != NULL && i < notes->n; i++) {
        lee_text_add(&all, "%s%s", i > 0 ? "\n" : "", notes->text[i]);
    }
    lee_netcdf_put_built(out, LEE_NETCDF_GLOBAL, name, &all);
}

static void add_link(lee_text *all, const lee_correction *link) {
    const lee_link_spread *spread = &link->spread;
    lee_text_add(all, "%s%s, %s (%s)%s%s", all->length > 0 ? "\n" : "",
                 lee_show_link(link, 4).text, link->method, link->source,
                 link->is_extrapolated ? ", extrapolated" : "",
                 link->is_missing ? ", a temperature is missing" : "");
    if (link->has_spread) {
        lee_text_add(all,
                     "\nover the record: %.4f to %.4f, median %.4f; %zu winds "
                     "extrapolated, %zu lack a temperature",
                     spread->least, spread->greatest, spread->median,
                     spread->extrapolated, spread->missing);
    }
}

static void put_corrections(lee_netcdf_out *out, const lee_method *method) {
    lee_text all = {0};
    for (size_t i = 0; i < method->correction_count; i++) {
        add_link(&all, &method->correction[i]);
    }
    if (method->correction_count == 0) {
        lee_text_add(&all, "none");
    } else if (!isnan(method->corrected.speed)) {
        lee_text_add(&all, "\n(factors at a measured %.2f m s-1)",
                     method->corrected.speed);
    }
    lee_netcdf_put_built(out, LEE_NETCDF_GLOBAL, "wind_corrections", &all);
}

static void put_method(lee_netcdf_out *out, const lee_method *method) {
    const int all = LEE_NETCDF_GLOBAL;
    lee_netcdf_put_text(out, all, "drag_relation", method->drag);
    lee_netcdf_put_number(out, all, "wind_reference_height_m",
                          method->reference_height);
    put_corrections(out, method);
    lee_netcdf_put_number(out, all, "air_density_kg_m3",
                          method->air_density_value);
    lee_netcdf_put_text(out, all, "air_density_from", method->air_density);
    lee_netcdf_put_number(out, all, "water_density_kg_m3",
                          method->water_density_value);
    lee_netcdf_put_number(out, all, "gravity_m_s2", method->gravity);
    lee_netcdf_put_text(out, all, "bed_friction", method->bed);
    lee_netcdf_put_number(out, all, "return_flow", method->return_flow);
    lee_netcdf_put_text(out, all, "return_flow_from", method->return_flow_how);
    put_notes(out, "range_members", &method->range_members);
    put_notes(out, "record_check", &method->record);
    put_notes(out, "read_not_used", &method->not_used);
}

static void put_limits(lee_netcdf_out *out) {
    lee_text all = {0};
    const char *limit;
    for (size_t i = 0; (limit = lee_limit_at(i)) != NULL; i++) {
        lee_text_add(&all, "%s%s", i > 0 ? "\n" : "", limit);
    }
    lee_netcdf_put_built(out, LEE_NETCDF_GLOBAL, "limits", &all);
    lee_netcdf_put_text(out, LEE_NETCDF_GLOBAL, "caution", lee_caution());
}

/* One line of history, and where all comes from. */
static void put_source(lee_netcdf_out *out, const lee_nc_about *about,
                       int64_t date) {
    char when[LEE_TIME_TEXT];
    char line[1200];
    const char *path = about->from->path;
    const lee_drag_relation *drag = about->from->problem.drag.relation;
    (void)lee_time_format(date, when);
    (void)snprintf(line, sizeof line, "%s leewater %s %s %.1000s", when,
                   lee_version(), about->command, path != NULL ? path : "");
    lee_netcdf_put_text(out, LEE_NETCDF_GLOBAL, "history", line);
    lee_netcdf_put_text(out, LEE_NETCDF_GLOBAL, "date_created", when);
    (void)snprintf(line, sizeof line,
                   "leewater %s: depth-averaged model of wind set-up along "
                   "the axis of a lake",
                   lee_version());
    lee_netcdf_put_text(out, LEE_NETCDF_GLOBAL, "source", line);
    lee_netcdf_put_text(out, LEE_NETCDF_GLOBAL, "references",
                        drag != NULL ? drag->source : NULL);
}

void lee_nc_put_about(lee_netcdf_out *out, const lee_nc_about *about,
                      int64_t date) {
    const int all = LEE_NETCDF_GLOBAL;
    const lee_case *from = about->from;
    lee_netcdf_put_text(out, all, "Conventions", "CF-1.6, ACDD-1.3");
    lee_netcdf_put_text(out, all, "title",
                        from->title != NULL ? from->title : about->title);
    lee_netcdf_put_text(out, all, "summary", about->summary);
    lee_netcdf_put_text(out, all, "keywords",
                        "lake, water level, wind set-up, seiche, wind stress");
    lee_netcdf_put_text(out, all, "institution", from->institution);
    lee_netcdf_put_text(out, all, "creator_name", from->creator);
    lee_netcdf_put_text(out, all, "license", from->license);
    lee_netcdf_put_text(out, all, "standard_name_vocabulary",
                        "CF Standard Name Table v83");
    put_source(out, about, date);
    lee_netcdf_put_text(out, all, "case", from->path);
    lee_netcdf_put_text(out, all, "lake", from->problem.lake.name);
    put_notes(out, "remarks", &from->notes);
    put_method(out, about->method);
    put_notes(out, "warnings", about->warnings);
    put_limits(out);
}

/* Step of the output times; 0 when they are uneven. */
static int64_t even_step(const lee_run_result *result) {
    const int64_t step = result->n > 1 ? result->time[1] - result->time[0] : 0;
    for (size_t i = 2; i < result->n; i++) {
        if (result->time[i] - result->time[i - 1] != step) {
            return 0;
        }
    }
    return step;
}

void lee_nc_put_run(lee_netcdf_out *out, const lee_run_result *result) {
    char text[LEE_TIME_TEXT];
    const int all = LEE_NETCDF_GLOBAL;
    const int64_t first = result->time[0];
    const int64_t last = result->time[result->n - 1];
    const int64_t step = even_step(result);
    lee_netcdf_put_text(out, all, "time_coverage_start",
                        lee_time_format(first, text));
    lee_netcdf_put_text(out, all, "time_coverage_end",
                        lee_time_format(last, text));
    (void)snprintf(text, sizeof text, "PT%lldS", (long long)(last - first));
    lee_netcdf_put_text(out, all, "time_coverage_duration", text);
    if (step > 0) {
        (void)snprintf(text, sizeof text, "PT%lldS", (long long)step);
        lee_netcdf_put_text(out, all, "time_coverage_resolution", text);
    }
    lee_netcdf_put_number(out, all, "numerical_error_m",
                          result->numerical_error);
}
