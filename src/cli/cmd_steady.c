/* cmd_steady.c - "steady": equilibrium levels for given winds. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

#include "cli/commands.h"
#include "cli/options.h"
#include "cli/shared.h"
#include "cli/target.h"
#include "leewater/case.h"
#include "leewater/output.h"
#include "leewater/series.h"

/* A wind given on the command line instead of the case's. */
typedef struct other_wind {
    double speed; /* NaN when not given */
    double from;
    double duration;
    size_t directions; /* 0 when not given */
} other_wind;

static bool is_any(const other_wind *other) {
    return !isnan(other->speed) || !isnan(other->from) ||
           !isnan(other->duration) || other->directions > 0;
}

/* The case's own given wind is the base that options change. */
static lee_status replace_wind(const other_wind *other, lee_wind_source *wind,
                               lee_error *error) {
    const bool has_base = wind->given_count == 1;
    lee_given_wind next = {NAN, NAN, NAN};
    if (has_base) {
        next = wind->given[0];
    }
    next.speed = isnan(other->speed) ? next.speed : other->speed;
    next.from = isnan(other->from) ? next.from : turn_of(other->from);
    next.duration = isnan(other->duration) ? next.duration : other->duration;
    const bool is_scan = other->directions > 0 ||
                         (wind->kind == LEE_WIND_SCAN && isnan(other->from));
    if (isnan(next.speed)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "the case gives no single wind speed: add --wind");
    }
    if (!is_scan && isnan(next.from)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "from where does the wind blow? Add --from or --scan");
    }
    lee_given_wind *given = realloc(wind->given, sizeof *given);
    if (given == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a wind");
    }
    given[0] = next;
    wind->given = given;
    wind->given_count = 1;
    wind->directions =
        other->directions > 0 ? other->directions : wind->directions;
    wind->kind = is_scan ? LEE_WIND_SCAN : LEE_WIND_GIVEN;
    return LEE_OK;
}

/* A case and what was found for it. */
typedef struct outcome {
    lee_case from;
    lee_steady_result result;
} outcome;

static lee_status write_levels(const void *what, const lee_target *output,
                               lee_error *error) {
    const outcome *out = what;
    return lee_write_steady(output, &out->from, &out->result, error);
}

static lee_status show_levels(const void *what, const request *asked,
                              lee_error *error) {
    const outcome *out = what;
    return asked->is_json
               ? lee_json_steady(stdout, &out->from, &out->result, error)
               : lee_print_steady(stdout, &out->from, &out->result,
                                  asked->units, error);
}

static lee_status estimate(const request *asked, const other_wind *other,
                           const lee_target *output, lee_error *error) {
    outcome out = {0};
    const delivery results = {&out, write_levels, show_levels};
    lee_status status = lee_case_read_apart(asked->case_path, &out.from, error);
    if (status == LEE_OK) {
        status = check_target(output, &out.from, error);
    }
    if (status == LEE_OK && is_any(other)) {
        status = replace_wind(other, &out.from.problem.wind, error);
    }
    if (status == LEE_OK) {
        status = lee_estimate_steady(&out.from.problem, &out.result, error);
    }
    if (status == LEE_OK) {
        status = deliver(&results, asked, output, error);
    }
    lee_steady_result_free(&out.result);
    lee_case_free(&out.from);
    return status;
}

lee_status cmd_steady(int argc, char *argv[], lee_error *error) {
    other_wind other = {.speed = NAN, .from = NAN, .duration = NAN};
    lee_target output = {0};
    const option options[] = {
        positive_option("wind", &quantity_speed,
                        "instead of the case's wind, as \"22 m/s\"",
                        &other.speed),
        quantity_option("from", &quantity_direction,
                        "where it blows from, as \"240 degree\"", &other.from),
        positive_option("duration", &quantity_duration,
                        "how long it blows, as \"6 h\"", &other.duration),
        count_option("scan", "from N directions, evenly round", 3600.0,
                     &other.directions),
        text_option("o,output", "FILE",
                    "also write a table: a .csv or .nc; - is CSV",
                    &output.path),
        flag_option("force", "replace FILE, unless the case reads it",
                    &output.force),
        end_of_options(),
    };
    request asked = {.command = "steady",
                     .summary = "equilibrium levels for given winds",
                     .has_case = true,
                     .has_levels = true,
                     .options = options};
    lee_status status = options_parse(&asked, argc, argv, error);
    if (status != LEE_OK || asked.is_done) {
        return status;
    }
    status = check_choice(&asked, &output, false, error);
    if (status == LEE_OK && other.directions > 0 && !isnan(other.from)) {
        status = lee_fail(error, LEE_ERR_ARGUMENT,
                          "--from and --scan exclude each other");
    }
    return status == LEE_OK ? estimate(&asked, &other, &output, error) : status;
}
