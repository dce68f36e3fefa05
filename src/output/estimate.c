/* estimate.c - the answer of `estimate`: a closed lake of even depth, with
 * the handbook formulas beside it. As text and as JSON. */
#include <math.h>
#include <stdbool.h>

#include "output/formulas.h"
#include "output/json_parts.h"
#include "output/print.h"

#include "leewater/output.h"
#include "leewater/setup.h"

static double fetch_of(const lee_case *from) {
    const lee_profile *profile = &from->problem.lake.profile;
    return profile->chainage[profile->n - 1] - profile->chainage[0];
}

static double depth_of(const lee_case *from, double still_water) {
    return still_water - from->problem.lake.profile.bed[0];
}

/* The one water of an even lake. Without any, nothing about it is known. */
static const lee_water_estimate *water_of(const lee_wind_estimate *wind) {
    static const lee_water_estimate none = {.first_period = NAN,
                                            .develop_time = NAN};
    return wind->water_count > 0 ? &wind->water[0] : &none;
}

/* Whether a wind of this length brings the steady level about. A wind that
 * sets in at once passes it after a quarter of the first period and swings to
 * twice of it without friction (docs/theory.md). */
static const char *duration_verdict(const lee_wind_estimate *wind,
                                    const lee_water_estimate *water) {
    if (wind->wind.duration >= water->first_period) {
        return "long enough; a sudden wind swings past these levels first";
    }
    if (wind->wind.duration >= water->develop_time) {
        return "enough to reach these levels, not for the swing to calm";
    }
    if (isnan(water->develop_time)) {
        return "cannot be judged: this water has no period of its own";
    }
    return "shorter than half the first period: see leewater run";
}

static void print_question(const lee_printer *to, const lee_case *from,
                           const lee_steady_result *result) {
    const lee_exposure *exposure = &from->problem.exposure;
    const lee_wind_estimate *wind = &result->wind[0];
    lee_print_wrapped(to, 0, "",
                      "Wind set-up on a closed lake of even depth and width");
    (void)fputc('\n', to->stream);
    lee_print_row(to, "fetch", "%s",
                  lee_show_distance(to, fetch_of(from)).text);
    lee_print_row(
        to, "depth", "%s",
        lee_show_height(to, depth_of(from, result->still_water)).text);
    lee_print_row(to, "wind", "%s, measured at %s over %s",
                  lee_show_speed(to, wind->wind.speed).text,
                  lee_show_height(to, exposure->height).text,
                  exposure->is_over_land ? "land" : "water");
    lee_print_row(to, "10 m over water", "%s",
                  lee_show_speed(to, wind->speed).text);
}

static void print_answer(const lee_printer *to, const lee_wind_estimate *wind) {
    const lee_water_estimate *water = water_of(wind);
    (void)fputc('\n', to->stream);
    lee_print_row(to, "set-up", "%s at the lee shore",
                  lee_show_ranged(to, &wind->set_up).text);
    lee_print_row(to, "set-down", "%s at the windward shore",
                  lee_show_ranged(to, &wind->set_down).text);
    lee_print_row(to, "tilt", "%s from shore to shore",
                  lee_show_ranged(to, &wind->tilt).text);
    if (wind->dry_length > 0.0) {
        lee_print_row(to, "fallen dry", "%s from the windward shore",
                      lee_show_distance(to, wind->dry_length).text);
    }
    (void)fputc('\n', to->stream);
    lee_print_row(to, "wind stress", "%.3f Pa", wind->stress);
    lee_print_row(to, "drag coefficient", "%.2f / 1000",
                  1e3 * wind->coefficient);
    lee_print_row(to, "return flow", "%.3f", wind->return_flow);
    lee_print_row(to, "first period", "%s, develops in %s",
                  lee_show_duration(water->first_period).text,
                  lee_show_duration(water->develop_time).text);
    if (!isnan(wind->wind.duration)) {
        lee_print_row(to, "duration", "%s: %s",
                      lee_show_duration(wind->wind.duration).text,
                      duration_verdict(wind, water));
    }
}

lee_status lee_print_estimate(FILE *stream, const lee_case *from,
                              const lee_steady_result *result,
                              lee_unit_system units, lee_error *error) {
    const lee_printer to = {stream, units};
    print_question(&to, from, result);
    print_answer(&to, &result->wind[0]);
    lee_print_notes(&to, "Warnings", &result->wind[0].warnings);
    lee_print_notes(&to, "Warnings on the case", &result->warnings);
    const lee_formula_question asked =
        lee_ask_formulas(from, result, &result->wind[0]);
    lee_print_formulas(&to, &asked);
    lee_print_method(&to, &result->method);
    lee_print_caution(&to);
    return lee_print_end(&to, error);
}

static void put_question(lee_json *json, const lee_case *from,
                         const lee_steady_result *result) {
    const lee_exposure *exposure = &from->problem.exposure;
    lee_json_put_case(json, from, result->still_water);
    lee_json_put_number(json, "fetch_m", fetch_of(from));
    lee_json_put_number(json, "depth_m", depth_of(from, result->still_water));
    lee_json_put_number(json, "measured_at_m", exposure->height);
    lee_json_put_text(json, "measured_over",
                      exposure->is_over_land ? "land" : "water");
}

lee_status lee_json_estimate(FILE *stream, const lee_case *from,
                             const lee_steady_result *result,
                             lee_error *error) {
    const lee_wind_estimate *wind = &result->wind[0];
    lee_json json = {0};
    lee_json_begin(&json, "estimate");
    put_question(&json, from, result);
    lee_json_put_winds(&json, from, result);
    if (!isnan(wind->wind.duration)) {
        lee_json_put_text(&json, "duration",
                          duration_verdict(wind, water_of(wind)));
    }
    lee_json_put_notes(&json, "warnings", &result->warnings);
    lee_json_put_method(&json, &result->method);
    lee_json_put_caution(&json);
    return lee_json_write(&json, stream, error);
}
