/* cmd_estimate.c - "estimate": set-up from fetch, depth and wind. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "cli/commands.h"
#include "cli/options.h"
#include "cli/shared.h"
#include "leewater/case.h"
#include "leewater/output.h"
#include "leewater/series.h"
#include "leewater/units.h"

/* The width takes no part where it is even. */
static const double any_width = 1000.0; /* m */

/* What was asked. NaN: not given. */
typedef struct question {
    double fetch;
    double depth;
    double wind;
    double duration;
    double height;
    const char *over; /* NULL: water */
    double roughness;
    const char *land_to_water; /* NULL: not given */
    const char *drag;          /* NULL: the usual relation */
} question;

static lee_status need(const question *asked, lee_error *error) {
    const struct {
        const char *option;
        const char *example;
        double value;
    } needed[] = {
        {"fetch", "12 km",  asked->fetch},
        {"depth", "4 m",    asked->depth},
        {"wind",  "22 m/s", asked->wind },
    };
    for (size_t i = 0; i < sizeof needed / sizeof needed[0]; i++) {
        if (isnan(needed[i].value)) {
            return lee_fail(error, LEE_ERR_ARGUMENT,
                            "--%s is missing: give one, as --%s \"%s\"",
                            needed[i].option, needed[i].option,
                            needed[i].example);
        }
    }
    return LEE_OK;
}

/* An even lake along the wind: wind from the west, axis to the east. */
static lee_status fill_lake(const question *asked, lee_problem *problem,
                            lee_error *error) {
    const double quarter_turn = 2.0 * atan(1.0);
    lee_profile *profile = &problem->lake.profile;
    lee_status status = lee_profile_init(profile, 2, error);
    if (status == LEE_OK) {
        status = lee_level_constant(0.0, &problem->lake.still_water, error);
    }
    if (status != LEE_OK) {
        return status;
    }
    for (size_t i = 0; i < 2; i++) {
        profile->chainage[i] = i == 0 ? 0.0 : asked->fetch;
        profile->bed[i] = -asked->depth;
        profile->width[i] = any_width;
        profile->bearing[i] = quarter_turn;
    }
    lee_given_wind *given = malloc(sizeof *given);
    if (given == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a wind");
    }
    *given = (lee_given_wind){.speed = asked->wind,
                              .from = 3.0 * quarter_turn,
                              .duration = asked->duration};
    problem->wind.kind = LEE_WIND_GIVEN;
    problem->wind.given = given;
    problem->wind.given_count = 1;
    return LEE_OK;
}

/* The way from land to water: a relation by its name, or a factor. */
static lee_status fill_way(const question *asked, lee_exposure *exposure,
                           lee_error *error) {
    static const struct {
        const char *word;
        lee_to_water_method method;
    } ways[] = {
        {"reservoir", LEE_TO_WATER_RESERVOIR},
        {"hsu-1980",  LEE_TO_WATER_HSU_1980 },
        {"hsu-1981",  LEE_TO_WATER_HSU_1981 },
    };
    for (size_t i = 0; i < sizeof ways / sizeof ways[0]; i++) {
        if (strcmp(asked->land_to_water, ways[i].word) == 0) {
            exposure->to_water_method = ways[i].method;
            exposure->to_water_fetch = asked->fetch;
            return LEE_OK;
        }
    }
    if (lee_quantity_parse(asked->land_to_water, "1", &exposure->land_to_water,
                           NULL) != LEE_OK) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "--land-to-water: expected a factor as 1.2, reservoir, "
                        "hsu-1980 or hsu-1981");
    }
    return LEE_OK;
}

static lee_status fill_exposure(const question *asked, lee_problem *problem,
                                lee_error *error) {
    lee_exposure *exposure = &problem->exposure;
    const int over =
        asked->over == NULL ? 0 : choose(asked->over, "water", "land");
    if (over < 0) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "--over: expected water or land");
    }
    exposure->is_over_land = over == 1;
    exposure->height = isnan(asked->height) ? exposure->height : asked->height;
    const bool has_land =
        !isnan(asked->roughness) || asked->land_to_water != NULL;
    if (exposure->is_over_land &&
        (isnan(asked->roughness) || asked->land_to_water == NULL)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "a wind over land needs --roughness (as \"0.03 m\") "
                        "and --land-to-water (as 1.2)");
    }
    if (!exposure->is_over_land && has_land) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "--roughness and --land-to-water go with --over land");
    }
    if (exposure->is_over_land) {
        exposure->land_roughness = asked->roughness;
        return fill_way(asked, exposure, error);
    }
    return LEE_OK;
}

static lee_status fill(const question *asked, lee_case *from,
                       lee_error *error) {
    from->problem = lee_problem_default();
    lee_status status = fill_lake(asked, &from->problem, error);
    if (status == LEE_OK) {
        status = fill_exposure(asked, &from->problem, error);
    }
    if (status == LEE_OK && asked->drag != NULL) {
        status =
            find_relation(asked->drag, &from->problem.drag.relation, error);
        if (status != LEE_OK) {
            lee_context(error, "--drag: ");
        }
    }
    return status;
}

static lee_status answer(const question *asked, const request *how,
                         lee_error *error) {
    lee_case from = {0};
    lee_steady_result result = {0};
    lee_status status = fill(asked, &from, error);
    if (status == LEE_OK) {
        status = lee_estimate_steady(&from.problem, &result, error);
    }
    if (status == LEE_OK && how->is_json) {
        status = lee_json_estimate(stdout, &from, &result, error);
    } else if (status == LEE_OK) {
        status = lee_print_estimate(stdout, &from, &result, how->units, error);
    }
    lee_steady_result_free(&result);
    lee_problem_free(&from.problem); /* owns all that was filled */
    return status;
}

lee_status cmd_estimate(int argc, char *argv[], lee_error *error) {
    question asked = {NAN, NAN, NAN, NAN, NAN, NULL, NAN, NULL, NULL};
    const option options[] = {
        positive_option("fetch", &quantity_fetch,
                        "open water along the wind, as \"12 km\"",
                        &asked.fetch),
        positive_option("depth", &quantity_depth, "mean depth, as \"4 m\"",
                        &asked.depth),
        positive_option("wind", &quantity_speed, "as \"22 m/s\"", &asked.wind),
        positive_option("duration", &quantity_duration,
                        "how long it blows, as \"6 h\"", &asked.duration),
        positive_option("height", &quantity_height,
                        "of the anemometer; 10 m when not given",
                        &asked.height),
        text_option("over", "SURFACE", "measured over water (default) or land",
                    &asked.over),
        positive_option("roughness", &quantity_roughness,
                        "of that land, as \"0.03 m\"", &asked.roughness),
        text_option("land-to-water", "WAY",
                    "a factor, or reservoir, hsu-1980, hsu-1981",
                    &asked.land_to_water),
        text_option("drag", "NAME", "drag relation; 'leewater drag' lists them",
                    &asked.drag),
        end_of_options(),
    };
    request how = {.command = "estimate",
                   .summary = "set-up from fetch, depth and wind",
                   .has_levels = true,
                   .options = options};
    lee_status status = options_parse(&how, argc, argv, error);
    if (status != LEE_OK || how.is_done) {
        return status;
    }
    status = need(&asked, error);
    return status == LEE_OK ? answer(&asked, &how, error) : status;
}
