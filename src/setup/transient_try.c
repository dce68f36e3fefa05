/* transient_try.c - one try of a step: coefficients, solution, new state.
 *
 * The scheme and the reason for each of its parts: docs/theory.md, "Levels in
 * time". Passes run over links or nodes in order, each short and without
 * calls where the bed law allows it. */
#include "setup/transient_internal.h"

#include <math.h>

/* Depth that does not flow, m: nodes keep a film that rounding cannot turn
 * negative, and a link that could pass less than this again is closed, so that
 * a film dries out instead of creeping for ever. */
static const double left_behind = 2e-6;

/* Wind climbs a slope of its own accord while the film it would hold there is
 * thicker than this, m. */
static const double film_cap = 0.25;

/* Depth of the flow on a link: the mean level over the link's bed, but at most
 * twice what stands over the step between the nodes; <= 0 is closed. */
static void measure_depths(lee_transient *engine, const double middle[]) {
    const double least = engine->options.dry_depth;
    const double *link_bed = engine->link_bed;
    const double *closing_bed = engine->closing_bed;
    double *depth = engine->depth;
    double *per_depth = engine->per_depth;
    for (size_t f = 0; f < engine->links; f++) {
        const double left = middle[f];
        const double right = middle[f + 1];
        const double central = 0.5 * (left + right) - link_bed[f];
        const double over_step = larger(left, right) - closing_bed[f];
        depth[f] = smaller(central, 2.0 * over_step);
        per_depth[f] = 1.0 / larger(depth[f], least);
    }
}

/* Depth below which the film drag sets in, m (design choice). */
static const double film_depth = 0.1;

/* C_f under a law that has none: the film drag, in thin water only. */
static void fill_film(lee_transient *engine) {
    const double most = engine->options.film_drag;
    for (size_t f = 0; f < engine->links; f++) {
        const double share = 1.0 - engine->depth[f] / film_depth;
        engine->friction[f] = most * smaller(1.0, larger(0.0, share));
    }
}

/* C_f of every link; constant laws were filled once. */
static void fill_friction(lee_transient *engine) {
    const lee_transient_options *o = &engine->options;
    const lee_bed_law *bed = &o->bed;
    double *friction = engine->friction;
    if (bed->kind == LEE_BED_MANNING) {
        const double factor = o->gravity * bed->value * bed->value;
        for (size_t f = 0; f < engine->links; f++) {
            const double depth = larger(engine->depth[f], o->dry_depth);
            friction[f] = factor * inverse_cube_root(depth);
        }
    }
    if (bed->kind == LEE_BED_ROUGHNESS) {
        for (size_t f = 0; f < engine->links; f++) {
            const double depth = larger(engine->depth[f], o->dry_depth);
            friction[f] = lee_bed_coefficient(bed, depth, o->gravity);
        }
    }
    if (o->film_drag > 0.0 &&
        (bed->kind == LEE_BED_NONE || bed->kind == LEE_BED_LINEAR)) {
        fill_film(engine);
    }
}

/* Transport of every link at the old speed; ghosts mirror a held end and are
 * still at a wall. */
static void fill_carried(lee_transient *engine) {
    double *u = engine->now.speed;
    double *carried = engine->carried;
    const size_t links = engine->links;
    for (size_t f = 0; f < links; f++) {
        carried[f] = engine->width[f] * larger(0.0, engine->depth[f]) * u[f];
    }
    const bool is_open_left = engine->start.is_held;
    const bool is_open_right = engine->end.is_held;
    u[-1] = is_open_left ? u[0] : 0.0;
    u[links] = is_open_right ? u[links - 1] : 0.0;
    carried[-1] = is_open_left ? carried[0] : 0.0;
    carried[links] = is_open_right ? carried[links - 1] : 0.0;
}

/* Wind acceleration. Where the bed rises with the wind it is held at half of
 * what the slope gives back, as long as the film so held is thin. */
static inline double wind_acceleration(double push, double per_depth,
                                       double rise) {
    const double acceleration = push * per_depth;
    const bool is_uphill = push * rise > 0.0;
    const bool is_thin = 2.0 * fabs(push) <= film_cap * fabs(rise);
    if (is_uphill && is_thin && 2.0 * fabs(acceleration) > fabs(rise)) {
        return 0.5 * rise;
    }
    return acceleration;
}

/* Change of speed by (Q^2/A)_x - u Q_x over theta dt, upwind, from the
 * transports through the nodes on either side; k = theta dt/(b H dx). */
static inline double advected(const double u[], const double carried[],
                              double k) {
    const double q_left = 0.5 * (carried[-1] + carried[0]);
    const double q_right = 0.5 * (carried[0] + carried[1]);
    const double from_left = smaller(1.0, k * larger(q_left, 0.0));
    const double from_right = smaller(1.0, -k * smaller(q_right, 0.0));
    return from_left * (u[0] - u[-1]) + from_right * (u[0] - u[1]);
}

/* Predicted speed and response of each link: gravity from the old levels,
 * wind, pressure, advection, then friction by one Newton step. */
static void predict(lee_transient *engine, double dt, const double middle[]) {
    const lee_transient_options *o = &engine->options;
    const double step = o->theta * dt;
    const double r = o->bed.kind == LEE_BED_LINEAR ? o->bed.value : 0.0;
    const double linear = 1.0 + step * r;
    const double step_left = step / linear;
    const double *level = engine->now.level;
    const double *bed = engine->bed;
    const double *speed = engine->now.speed;
    for (size_t f = 0; f < engine->links; f++) {
        const double u = speed[f];
        const double per_depth = engine->per_depth[f];
        const double pull = o->gravity * engine->inverse_step[f];
        const double wind =
            wind_acceleration(engine->push[f], per_depth, engine->rise[f]);
        const double pressure =
            engine->forcing.pressure_gradient[f] / o->water_density;
        double y =
            u + step * (wind - pressure - pull * (level[f + 1] - level[f]));
        const size_t upstream = y >= 0.0 ? f : f + 1;
        const double offered = 2.0 * (middle[upstream] - bed[upstream]);
        const double flowing = smaller(engine->depth[f], offered - left_behind);
        engine->section[f] =
            flowing > left_behind ? engine->width[f] * flowing : 0.0;
        if (o->has_advection) {
            const double k =
                step * per_depth * engine->inverse_step[f] / engine->width[f];
            y -= advected(speed + f, engine->carried + f, k);
        }
        const double c = step_left * engine->friction[f] * per_depth;
        const double lost = c * fabs(u);
        const double slope = 1.0 + 2.0 * lost;
        /* 1/(1 + gamma): C_f acts on what a linear law has left of y */
        const double kept =
            slope / (linear * (1.0 + lost) * (1.0 + lost) + c * fabs(y));
        engine->predicted[f] = y * kept;
        engine->response[f] = step * pull * o->theta * kept;
    }
}

/* The linear variant: frozen depths and sections, no advection. */
static void predict_linear(lee_transient *engine, double dt) {
    const lee_transient_options *o = &engine->options;
    const double step = o->theta * dt;
    const double r = o->bed.kind == LEE_BED_LINEAR ? o->bed.value : 0.0;
    const double kept = 1.0 / (1.0 + step * r);
    const double *level = engine->now.level;
    for (size_t f = 0; f < engine->links; f++) {
        const double pull = o->gravity * engine->inverse_step[f];
        const double wind = engine->push[f] * engine->per_depth[f];
        const double pressure =
            engine->forcing.pressure_gradient[f] / o->water_density;
        const double y =
            engine->now.speed[f] +
            step * (wind - pressure - pull * (level[f + 1] - level[f]));
        engine->predicted[f] = y * kept;
        engine->response[f] = step * pull * o->theta * kept;
    }
}

/* The line for a held node's level change: offset + share * (neighbour's).
 * Across an open link the level lies on the line from the given level, at the
 * face, to the neighbour; else it is the given level. */
static void held_line(const lee_transient *engine, const transient_end *end,
                      size_t node, double *offset, double *share) {
    const bool is_first = node == 0;
    const size_t neighbour = is_first ? 1 : node - 1;
    const size_t link = is_first ? 0 : node - 1;
    const double *level = engine->now.level;
    const bool is_joined = engine->section[link] > 0.0 &&
                           engine->now.volume[neighbour] > 0.0 &&
                           end->given > engine->bed[node];
    const double target = larger(end->given, engine->bed[node]);
    *share = is_joined ? end->weight : 0.0;
    *offset = target + *share * (level[neighbour] - target) - level[node];
}

/* Level changes of all nodes, (area/dt) d_i + outgoing transport = 0, by
 * elimination without subtraction: pivots stay positive. `offset` holds the
 * changes in the end. */
static void solve(lee_transient *engine, double dt) {
    const size_t links = engine->links;
    double *share = engine->share;
    double *d = engine->offset;
    const double rate = 1.0 / dt;
    double pivot = engine->area[0] * rate;
    double right = 0.0;
    for (size_t f = 0; f < links; f++) {
        const double conductance = engine->section[f] * engine->response[f];
        const double flow = engine->section[f] * engine->predicted[f];
        if (f == 0 && engine->start.is_held) {
            held_line(engine, &engine->start, 0, &d[0], &share[0]);
            pivot = conductance * (1.0 - share[0]);
            right = conductance * d[0] + flow;
        } else {
            /* Two divisions side by side are faster than one in a chain. */
            const double sum = pivot + conductance;
            const double inverse = 1.0 / sum;
            share[f] = conductance * inverse;
            d[f] = (right - flow) * inverse;
            right = share[f] * (right - flow) + flow;
            pivot = conductance * pivot / sum;
        }
        pivot += engine->area[f + 1] * rate;
    }
    d[links] = right / pivot;
    if (engine->end.is_held) {
        double offset;
        double slope;
        held_line(engine, &engine->end, links, &offset, &slope);
        d[links] =
            (offset + slope * d[links - 1]) / (1.0 - slope * share[links - 1]);
    }
    for (size_t f = links; f-- > 0;) {
        d[f] += share[f] * d[f + 1];
    }
}

/* New speeds and transports. */
static void move_water(lee_transient *engine) {
    const double *d = engine->offset;
    const double *u = engine->now.speed;
    const double per_theta = 1.0 / engine->options.theta;
    for (size_t f = 0; f < engine->links; f++) {
        const double at_theta =
            engine->predicted[f] + engine->response[f] * (d[f] - d[f + 1]);
        const bool is_open = engine->section[f] > 0.0;
        engine->transport[f] = engine->section[f] * at_theta;
        engine->next.speed[f] =
            is_open ? u[f] + (at_theta - u[f]) * per_theta : 0.0;
    }
}

/* A held node takes its level; what it holds then came through the end. */
static void settle_held(lee_transient *engine, size_t node) {
    const double level = engine->now.level[node] + engine->offset[node];
    const double volume = engine->area[node] * (level - engine->bed[node]);
    const bool may_be_negative = engine->options.is_linear;
    engine->next.volume[node] = may_be_negative ? volume : larger(0.0, volume);
}

/* New volumes from the transports. Returns the least. */
static double fill_volumes(lee_transient *engine, double dt) {
    const double *volume = engine->now.volume;
    const double *transport = engine->transport;
    const size_t last = engine->links;
    double *next = engine->next.volume;
    next[0] = volume[0] - dt * transport[0];
    for (size_t i = 1; i < last; i++) {
        next[i] = volume[i] + dt * (transport[i - 1] - transport[i]);
    }
    next[last] = volume[last] + dt * transport[last - 1];
    if (engine->start.is_held) {
        settle_held(engine, 0);
    }
    if (engine->end.is_held) {
        settle_held(engine, last);
    }
    double least = next[0];
    for (size_t i = 1; i <= last; i++) {
        least = smaller(least, next[i]);
    }
    return least;
}

/* Levels of the new volumes. Returns their sum, NaN or infinite when one is. */
static double fill_levels(lee_transient *engine) {
    double sum = 0.0;
    for (size_t i = 0; i < engine->nodes; i++) {
        engine->next.level[i] =
            engine->next.volume[i] * engine->inverse_area[i] + engine->bed[i];
        sum += engine->next.level[i];
    }
    return sum;
}

static double courant(const lee_transient *engine, double dt) {
    double most = 0.0;
    for (size_t f = 0; f < engine->links; f++) {
        const double rate = fabs(engine->next.speed[f]);
        most = larger(rate * engine->inverse_step[f], most);
    }
    return most * dt;
}

/* Volumes that rounding left a hair below nothing. */
static void clip_volumes(lee_transient *engine) {
    for (size_t i = 0; i < engine->nodes; i++) {
        engine->next.volume[i] = larger(0.0, engine->next.volume[i]);
    }
}

double lee_transient_try(lee_transient *engine, double dt,
                         const double middle[]) {
    const bool is_linear = engine->options.is_linear;
    if (is_linear) {
        predict_linear(engine, dt);
    } else {
        measure_depths(engine, middle);
        fill_friction(engine);
        if (engine->options.has_advection) {
            fill_carried(engine);
        }
        predict(engine, dt, middle);
    }
    engine->has_limited = false;
    solve(engine, dt);
    move_water(engine);
    if (fill_volumes(engine, dt) < 0.0 && !is_linear) {
        engine->has_limited = lee_transient_limit(engine, dt);
        (void)fill_volumes(engine, dt);
        clip_volumes(engine);
    }
    if (!isfinite(fill_levels(engine))) {
        return NAN;
    }
    return courant(engine, dt);
}

void lee_transient_freeze(lee_transient *engine) {
    measure_depths(engine, engine->now.level);
    for (size_t f = 0; f < engine->links; f++) {
        engine->section[f] = engine->width[f] * larger(0.0, engine->depth[f]);
    }
}
