/* cmd_drag.c - "drag": the drag relations side by side. */
#include <math.h>
#include <stdio.h>

#include "cli/commands.h"
#include "cli/options.h"
#include "cli/shared.h"
#include "leewater/output.h"
#include "leewater/stress.h"

/* Of the standard atmosphere at sea level, 15 degC (ISO 2533:1975). */
static const double usual_air = 1.225; /* kg m-3 */

enum { MOST_SPEEDS = 400, MOST_RELATIONS = 64 };

/* The winds asked for: `from`, `from` + `by` ... up to `to`. */
typedef struct speeds {
    double from;
    double to;
    double by;
    size_t n;
    double at[MOST_SPEEDS];
} speeds;

static lee_status fill_speeds(speeds *winds, lee_error *error) {
    if (!(winds->to >= winds->from)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "--to is %g m/s, below --from, %g m/s", winds->to,
                        winds->from);
    }
    /* The last wind takes part although its sum is a rounding beyond `to`. */
    const double steps = floor((winds->to - winds->from) / winds->by + 1e-9);
    if (!(steps < MOST_SPEEDS)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "--by asks for more than %d winds", (int)MOST_SPEEDS);
    }
    winds->n = (size_t)steps + 1;
    for (size_t i = 0; i < winds->n; i++) {
        winds->at[i] = winds->from + (double)i * winds->by;
    }
    return LEE_OK;
}

static size_t all_relations(const lee_drag_relation *chosen[]) {
    size_t n = 0;
    const lee_drag_relation *each;
    while (n < MOST_RELATIONS && (each = lee_drag_at(n)) != NULL) {
        chosen[n++] = each;
    }
    return n;
}

static lee_status named_relations(const option_list *names,
                                  const lee_drag_relation *chosen[],
                                  size_t *count, lee_error *error) {
    for (*count = 0; *count < names->n; (*count)++) {
        const lee_status status =
            find_relation(names->text[*count], &chosen[*count], error);
        if (status != LEE_OK) {
            lee_context(error, "--relation: ");
            return status;
        }
    }
    return LEE_OK;
}

lee_status cmd_drag(int argc, char *argv[], lee_error *error) {
    speeds winds = {.from = 5.0, .to = 30.0, .by = 5.0};
    lee_drag_table table = {.air_density = NAN, .water_density = 1000.0};
    const lee_drag_relation *chosen[MOST_RELATIONS];
    option_list names = {0};
    const option options[] = {
        positive_option("from", &quantity_speed, "first wind, as \"5 m/s\"",
                        &winds.from),
        positive_option("to", &quantity_speed, "last wind", &winds.to),
        positive_option("by", &quantity_speed, "from wind to wind", &winds.by),
        list_option("relation", "NAME", "only this one; may be repeated",
                    &names),
        positive_option("air-density", &quantity_density,
                        "1.225 kg m-3 when not given", &table.air_density),
        flag_option("sources", "say where each comes from", &table.has_sources),
        end_of_options(),
    };
    request asked = {.command = "drag",
                     .summary = "compare the drag relations",
                     .has_levels = true,
                     .options = options};
    lee_status status = options_parse(&asked, argc, argv, error);
    if (status != LEE_OK || asked.is_done) {
        return status;
    }
    table.has_given_air = !isnan(table.air_density);
    if (!table.has_given_air) {
        table.air_density = usual_air;
    }
    status = fill_speeds(&winds, error);
    if (status == LEE_OK) {
        status = named_relations(&names, chosen, &table.relations, error);
    }
    if (status != LEE_OK) {
        return status;
    }
    if (names.n == 0) {
        table.relations = all_relations(chosen);
    }
    table.speeds = winds.n;
    table.speed = winds.at;
    table.relation = chosen;
    return asked.is_json ? lee_json_drag(stdout, &table, error)
                         : lee_print_drag(stdout, &table, asked.units, error);
}
