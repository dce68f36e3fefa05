/* formulas.c - the handbook formulas and closed forms beside an estimate. */
#include "output/formulas.h"

#include <math.h>

#include "leewater/setup.h"

lee_formula_question lee_ask_formulas(const lee_case *from,
                                      const lee_steady_result *result,
                                      const lee_wind_estimate *wind) {
    const lee_basin_summary water = lee_profile_longest_water(
        &from->problem.lake.profile, result->still_water);
    const lee_basin_summary lake =
        lee_profile_summary(&from->problem.lake.profile, result->still_water);
    const lee_method *method = &result->method;
    const double along = fabs(wind->along);
    return (lee_formula_question){
        .speed = wind->speed,
        .along = along,
        .fetch = water.wet_length,
        .depth = water.mean_depth,
        .is_part = water.wet_length < lake.wet_length,
        .gravity = method->gravity,
        .pull = wind->return_flow * wind->stress * along /
                (method->water_density_value * method->gravity),
    };
}

static double closed_even(const lee_formula_question *asked) {
    return lee_closed_parabola(asked->pull, asked->fetch, asked->depth).set_up;
}

static double open_even(const lee_formula_question *asked) {
    return lee_open_uniform(asked->pull, asked->fetch, asked->depth);
}

/* Twice the mean depth at the open end, none at the lee shore. */
static double open_slope(const lee_formula_question *asked) {
    return lee_open_slope(asked->pull, asked->fetch, 2.0 * asked->depth);
}

/* Closed forms with the estimate's own stress; all return a rise. */
static const struct {
    const char *name;
    const char *source; /* key in docs/references.md */
    double (*rise)(const lee_formula_question *asked);
} closed_forms[] = {
    {"closed-even-depth", "derived",  closed_even},
    {"open-even-depth",   "dean1991", open_even  },
    {"open-even-slope",   "dean1991", open_slope },
};
enum { CLOSED_FORMS = sizeof closed_forms / sizeof closed_forms[0] };

static double formula_level(const lee_formula *formula,
                            const lee_formula_question *asked) {
    return asked->along * formula->set_up(asked->speed, asked->fetch,
                                          asked->depth, asked->gravity);
}

static const char *result_name(lee_formula_result what) {
    switch (what) {
    case LEE_RESULT_TILT:
        return "tilt";
    case LEE_RESULT_RISE:
        return "rise";
    }
    return "";
}

static bool is_outside(const lee_formula *formula, double speed) {
    return !(speed >= formula->speed_min && speed <= formula->speed_max);
}

static const char layout[] = "  %-18s  %8s%1s  %-9s  %s\n";

static void print_closed_forms(const lee_printer *to,
                               const lee_formula_question *asked) {
    for (size_t i = 0; i < CLOSED_FORMS; i++) {
        const double rise = closed_forms[i].rise(asked);
        (void)fprintf(to->stream, layout, closed_forms[i].name,
                      isnan(rise) ? "none"
                                  : lee_show_bare_length(to, rise).text,
                      "", "rise", "rise");
    }
}

void lee_print_formulas(const lee_printer *to,
                        const lee_formula_question *asked) {
    bool has_outside = false;
    const lee_formula *formula;
    (void)fputc('\n', to->stream);
    lee_print_wrapped(to, 0, "", "Handbook formulas and closed forms");
    (void)fprintf(to->stream,
                  "  %s %s, mean depth %s, %.0f %% of the stress along it\n",
                  asked->is_part ? "longest water" : "wetted axis",
                  lee_show_distance(to, asked->fetch).text,
                  lee_show_length(to, asked->depth).text, 100.0 * asked->along);
    (void)fprintf(to->stream, layout, "", lee_length_unit(to), "", "is called",
                  "equals");
    for (size_t i = 0; (formula = lee_formula_at(i)) != NULL; i++) {
        const bool outside = is_outside(formula, asked->speed);
        const double level = formula_level(formula, asked);
        (void)fprintf(to->stream, layout, formula->name,
                      lee_show_bare_length(to, level).text, outside ? "*" : "",
                      result_name(formula->says),
                      result_name(formula->matches));
        has_outside = has_outside || outside;
    }
    print_closed_forms(to, asked);
    lee_print_wrapped(to, 2, "",
                      "rise: above still water at the end it blows to; tilt: "
                      "that level minus the other end's; open: still water "
                      "held at the end it comes from");
    if (has_outside) {
        lee_print_wrapped(to, 4, "* ",
                          "outside the wind speeds it was made for");
    }
    lee_print_wrapped(to, 2, "",
                      "sources, and which were not re-read: --json and "
                      "docs/references.md");
}

static void put_formula(lee_json *json, const lee_formula *formula,
                        const lee_formula_question *asked) {
    lee_json_open_object(json, NULL);
    lee_json_put_text(json, "name", formula->name);
    lee_json_put_text(json, "source", formula->source);
    lee_json_put_flag(json, "is_from_memory", formula->is_from_memory);
    lee_json_put_number(json, "result_m", formula_level(formula, asked));
    lee_json_put_text(json, "is_called", result_name(formula->says));
    lee_json_put_text(json, "equals", result_name(formula->matches));
    lee_json_put_flag(json, "is_extrapolated",
                      is_outside(formula, asked->speed));
    lee_json_close(json);
}

void lee_json_put_formulas(lee_json *json, const lee_formula_question *asked) {
    const lee_formula *formula;
    lee_json_open_list(json, "formulas");
    for (size_t i = 0; (formula = lee_formula_at(i)) != NULL; i++) {
        put_formula(json, formula, asked);
    }
    for (size_t i = 0; i < CLOSED_FORMS; i++) {
        lee_json_open_object(json, NULL);
        lee_json_put_text(json, "name", closed_forms[i].name);
        lee_json_put_text(json, "source", closed_forms[i].source);
        lee_json_put_flag(json, "is_from_memory", false);
        lee_json_put_number(json, "result_m", closed_forms[i].rise(asked));
        lee_json_put_text(json, "is_called", result_name(LEE_RESULT_RISE));
        lee_json_put_text(json, "equals", result_name(LEE_RESULT_RISE));
        lee_json_put_flag(json, "is_extrapolated", false);
        lee_json_close(json);
    }
    lee_json_close(json);
}
