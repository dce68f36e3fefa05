/* transient.c - levels in time: the life of an engine and what it tells. */
#include "leewater/setup.h"

#include <math.h>
#include <stdlib.h>

#include "base/constants.h"
#include "setup/transient_internal.h"

lee_transient_options lee_transient_defaults(void) {
    return (lee_transient_options){
        .gravity = lee_standard_gravity,
        .water_density = 1000.0,
        .return_flow = 1.0,
        .bed = {LEE_BED_NONE, 0.0},
        .theta = 0.52,
        .dry_depth = 0.01,
        .has_advection = true,
    };
}

/* Hands out the arrays of the pool; every one has room for nodes + 2. */
static lee_status take_arrays(lee_transient *engine, lee_error *error) {
    double **const arrays[] = {
        &engine->bed,          &engine->area,
        &engine->inverse_area, &engine->link_bed,
        &engine->closing_bed,  &engine->width,
        &engine->inverse_step, &engine->rise,
        &engine->now.level,    &engine->now.volume,
        &engine->now.speed,    &engine->next.level,
        &engine->next.volume,  &engine->next.speed,
        &engine->shown_level,  &engine->forcing.stress,
        &engine->push,         &engine->forcing.pressure_gradient,
        &engine->middle,       &engine->depth,
        &engine->per_depth,    &engine->friction,
        &engine->carried,      &engine->section,
        &engine->predicted,    &engine->response,
        &engine->transport,    &engine->share,
        &engine->offset,
    };
    const size_t count = sizeof arrays / sizeof arrays[0];
    const size_t room = engine->nodes + 2;
    engine->pool = calloc(count * room, sizeof *engine->pool);
    if (engine->pool == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a run of %zu cells",
                        engine->nodes);
    }
    for (size_t k = 0; k < count; k++) {
        *arrays[k] = engine->pool + k * room;
    }
    engine->now.speed += 1; /* ghosts before and after */
    engine->next.speed += 1;
    engine->carried += 1;
    return LEE_OK;
}

static void fill_constants(lee_transient *engine) {
    const lee_channel *c = engine->channel;
    const double g = engine->options.gravity;
    double sum = 0.0;
    for (size_t i = 0; i < engine->nodes; i++) {
        sum += c->bed[i] / (double)engine->nodes;
    }
    engine->reference = round(sum);
    for (size_t i = 0; i < engine->nodes; i++) {
        engine->bed[i] = c->bed[i] - engine->reference;
        engine->area[i] = c->area[i];
        engine->inverse_area[i] = 1.0 / c->area[i];
    }
    for (size_t f = 0; f < engine->links; f++) {
        const double left = engine->bed[f];
        const double right = engine->bed[f + 1];
        engine->link_bed[f] = c->link_bed[f] - engine->reference;
        engine->closing_bed[f] = larger(left, right);
        engine->width[f] = c->width[f];
        engine->inverse_step[f] = 1.0 / c->spacing[f];
        engine->rise[f] = g * (right - left) / c->spacing[f];
        /* Laws that depend on depth are filled again in every step. */
        engine->friction[f] = lee_bed_coefficient(&engine->options.bed, 1.0, g);
    }
}

/* Weight of the neighbour in a held node's level: the given level stands half
 * a cell away, the neighbour one spacing. */
static transient_end end_of(bool is_held, double length, double spacing) {
    return (transient_end){
        .is_held = is_held,
        .weight = 0.5 * length / (0.5 * length + spacing),
    };
}

lee_status lee_transient_new(const lee_channel *channel,
                             const lee_transient_options *options,
                             lee_transient **engine, lee_error *error) {
    *engine = NULL;
    lee_status status = lee_transient_check(channel, options, error);
    if (status != LEE_OK) {
        return status;
    }
    const size_t nodes = channel->nodes;
    lee_transient *made = calloc(1, sizeof *made);
    if (made == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a run");
    }
    made->options = *options;
    made->channel = channel;
    made->nodes = nodes;
    made->links = nodes - 1;
    made->start =
        end_of(options->start_held, channel->length[0], channel->spacing[0]);
    made->end = end_of(options->end_held, channel->length[nodes - 1],
                       channel->spacing[nodes - 2]);
    status = take_arrays(made, error);
    if (status != LEE_OK) {
        free(made);
        return status;
    }
    fill_constants(made);
    lee_transient_start(made, 0.0, channel->bed);
    *engine = made;
    return LEE_OK;
}

void lee_transient_free(lee_transient *engine) {
    if (engine != NULL) {
        free(engine->pool);
        free(engine);
    }
}

void lee_transient_show(lee_transient *engine) {
    const transient_state *now = &engine->now;
    for (size_t i = 0; i < engine->nodes; i++) {
        engine->shown_level[i] = now->level[i] == engine->bed[i]
                                     ? engine->channel->bed[i]
                                     : now->level[i] + engine->reference;
    }
}

void lee_transient_start(lee_transient *engine, double t,
                         const double level[]) {
    transient_state *now = &engine->now;
    for (size_t i = 0; i < engine->nodes; i++) {
        const double depth = level[i] - engine->reference - engine->bed[i];
        now->volume[i] = engine->area[i] * larger(0.0, depth);
        now->level[i] =
            now->volume[i] * engine->inverse_area[i] + engine->bed[i];
    }
    for (size_t f = 0; f < engine->links; f++) {
        now->speed[f] = 0.0;
        engine->transport[f] = 0.0;
    }
    engine->time = t;
    engine->inflow = (lee_sum){0};
    engine->counts = (lee_transient_counts){0};
    lee_transient_show(engine);
    if (engine->options.is_linear) {
        lee_transient_freeze(engine);
    }
}

void lee_transient_pour(lee_transient *engine, const double volume[]) {
    transient_state *now = &engine->now;
    for (size_t i = 0; i < engine->nodes; i++) {
        const double before = now->volume[i];
        now->volume[i] = larger(0.0, before + volume[i]);
        now->level[i] =
            now->volume[i] * engine->inverse_area[i] + engine->bed[i];
        lee_sum_add(&engine->inflow, now->volume[i] - before);
    }
    lee_transient_show(engine);
}

double lee_transient_time(const lee_transient *engine) {
    return engine->time;
}

const double *lee_transient_level(const lee_transient *engine) {
    return engine->shown_level;
}

const double *lee_transient_speed(const lee_transient *engine) {
    return engine->now.speed;
}

const double *lee_transient_transport(const lee_transient *engine) {
    return engine->transport;
}

double lee_transient_volume(const lee_transient *engine) {
    lee_sum sum = {0};
    for (size_t i = 0; i < engine->nodes; i++) {
        lee_sum_add(&sum, engine->now.volume[i]);
    }
    return lee_sum_value(&sum);
}

double lee_transient_inflow(const lee_transient *engine) {
    return lee_sum_value(&engine->inflow);
}

lee_transient_counts lee_transient_count(const lee_transient *engine) {
    return engine->counts;
}

static bool is_wet(const lee_transient *engine, size_t node) {
    return engine->now.level[node] - engine->bed[node] >=
           engine->options.dry_depth;
}

/* The node whose stretch of the axis holds x. */
static size_t node_at(const lee_channel *channel, double x) {
    size_t low = 0;
    size_t high = channel->nodes;
    while (high - low > 1) {
        const size_t middle = low + (high - low) / 2;
        if (x >= channel->chainage[middle] - 0.5 * channel->length[middle]) {
            low = middle;
        } else {
            high = middle;
        }
    }
    return low;
}

/* The bed at x in a node's cell, m above the datum: a line from the node's
 * mean to the bed of the face on that side; at an outer face, whose bed nobody
 * keeps, the line from the inner face goes on. */
static double bed_at(const lee_channel *c, size_t node, double x) {
    const double from_middle =
        (x - c->chainage[node]) / (0.5 * c->length[node]);
    const bool is_beyond = from_middle >= 0.0;
    const bool is_outer = is_beyond ? node == c->links : node == 0;
    const bool takes_right = is_beyond != is_outer;
    const double face = c->link_bed[takes_right ? node : node - 1];
    const double share = is_outer ? -fabs(from_middle) : fabs(from_middle);
    return c->bed[node] + share * (face - c->bed[node]);
}

double lee_transient_level_at(const lee_transient *engine, double x) {
    const lee_channel *c = engine->channel;
    const size_t last = engine->nodes - 1;
    const double *level = engine->shown_level;
    const bool is_on_axis = x >= c->chainage[0] - 0.5 * c->length[0] &&
                            x <= c->chainage[last] + 0.5 * c->length[last];
    const size_t node = is_on_axis ? node_at(c, x) : 0;
    if (!is_on_axis || !is_wet(engine, node)) {
        return NAN;
    }
    const bool is_beyond = x >= c->chainage[node];
    size_t neighbour = is_beyond ? node + 1 : node - 1;
    if (is_beyond && node == last) {
        neighbour = last - 1;
    }
    if (!is_beyond && node == 0) {
        neighbour = 1;
    }
    if (!is_wet(engine, neighbour)) {
        return level[node];
    }
    const double share =
        (x - c->chainage[node]) / (c->chainage[neighbour] - c->chainage[node]);
    const double found = level[node] + share * (level[neighbour] - level[node]);
    return found - bed_at(c, node, x) >= engine->options.dry_depth ? found
                                                                   : NAN;
}
