/* transient_step.c - advances in time: forcing, second pass, halving. */
#include <math.h>

#include "setup/transient_internal.h"

enum { MAX_HALVINGS = 5 };

/* |u| dt/dx above which the depths are taken again from the middle of the
 * step, and above which the step is halved. */
static const double courant_of_second_pass = 0.4;
static const double courant_of_halving = 1.0;

/* Who fills the forcing. */
typedef struct forcing_source {
    lee_forcing_at *at;
    void *user;
} forcing_source;

static void ask(lee_transient *engine, const forcing_source *source, double t) {
    lee_forcing *forcing = &engine->forcing;
    const size_t size = engine->links * sizeof *forcing->stress;
    memset(forcing->stress, 0, size);
    memset(forcing->pressure_gradient, 0, size);
    forcing->start_level = NAN;
    forcing->end_level = NAN;
    source->at(source->user, t, forcing);
}

static lee_status take_held(transient_end *end, double level, double t,
                            lee_error *error) {
    if (end->is_held && !isfinite(level)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "the level of a held end is not finite at %.9g s", t);
    }
    end->given = level;
    return LEE_OK;
}

/* Stress and pressure of the middle of the step: the mean of what is linear
 * or held over it, and never the moment at which a held mean changes. Levels
 * of held ends at its end, where the new levels stand. */
static lee_status ask_for_step(lee_transient *engine,
                               const forcing_source *source, double dt,
                               lee_error *error) {
    const lee_transient_options *o = &engine->options;
    if (engine->start.is_held || engine->end.is_held) {
        const double t = engine->time + dt;
        ask(engine, source, t);
        lee_status status = take_held(
            &engine->start, engine->forcing.start_level - engine->reference, t,
            error);
        if (status == LEE_OK) {
            status = take_held(&engine->end,
                               engine->forcing.end_level - engine->reference, t,
                               error);
        }
        if (status != LEE_OK) {
            return status;
        }
    }
    ask(engine, source, engine->time + 0.5 * dt);
    const double factor = o->return_flow / o->water_density;
    for (size_t f = 0; f < engine->links; f++) {
        engine->push[f] = factor * engine->forcing.stress[f];
    }
    return LEE_OK;
}

/* Why a level is not finite. */
static lee_status blame(const lee_transient *engine, double dt,
                        lee_error *error) {
    const double t = engine->time + 0.5 * dt;
    for (size_t f = 0; f < engine->links; f++) {
        if (!isfinite(engine->push[f]) ||
            !isfinite(engine->forcing.pressure_gradient[f])) {
            return lee_fail(error, LEE_ERR_ARGUMENT,
                            "the stress or pressure gradient on link %zu is "
                            "not finite at %.9g s",
                            f, t);
        }
    }
    return lee_fail(error, LEE_ERR_CONVERGENCE,
                    "a level is not finite after %.9g s", t);
}

/* Tries the step, twice where the current crosses much of a cell: the second
 * time with depths of the middle of the step, from the same old state. */
static double try_step(lee_transient *engine, double dt) {
    const double courant = lee_transient_try(engine, dt, engine->now.level);
    if (!(courant > courant_of_second_pass) || engine->options.is_linear) {
        return courant;
    }
    const double theta = engine->options.theta;
    for (size_t i = 0; i < engine->nodes; i++) {
        const double old = engine->now.level[i];
        engine->middle[i] = old + theta * (engine->next.level[i] - old);
    }
    engine->counts.second_passes++;
    return lee_transient_try(engine, dt, engine->middle);
}

/* The tried state becomes the state. What a held node gained and did not get
 * from its neighbour came through the end. */
static void accept(lee_transient *engine, double dt) {
    const transient_state old = engine->now;
    const transient_state new = engine->next;
    const size_t last = engine->links;
    if (engine->start.is_held) {
        lee_sum_add(&engine->inflow,
                    new.volume[0] - old.volume[0] + dt * engine->transport[0]);
    }
    if (engine->end.is_held) {
        lee_sum_add(&engine->inflow, new.volume[last] - old.volume[last] -
                                         dt * engine->transport[last - 1]);
    }
    engine->now = new;
    engine->next = old;
    engine->time += dt;
    engine->counts.steps++;
    engine->counts.limited += engine->has_limited ? 1 : 0;
}

static lee_status advance(lee_transient *engine, const forcing_source *source,
                          double dt, int halvings, lee_error *error) {
    lee_status status = ask_for_step(engine, source, dt, error);
    if (status != LEE_OK) {
        return status;
    }
    const double courant = try_step(engine, dt);
    if (!isfinite(courant)) {
        return blame(engine, dt, error);
    }
    if (engine->options.is_linear || courant <= courant_of_halving) {
        accept(engine, dt);
        return LEE_OK;
    }
    if (halvings == MAX_HALVINGS) {
        return lee_fail(error, LEE_ERR_CONVERGENCE,
                        "the current crosses %.3g cells in a step of %.3g s "
                        "after %.9g s: the step is too long",
                        courant, dt, engine->time);
    }
    engine->counts.halvings++;
    status = advance(engine, source, 0.5 * dt, halvings + 1, error);
    if (status == LEE_OK) {
        status = advance(engine, source, 0.5 * dt, halvings + 1, error);
    }
    return status;
}

lee_status lee_transient_step(lee_transient *engine, double dt,
                              lee_forcing_at *forcing_at, void *user,
                              lee_error *error) {
    if (!(dt > 0.0) || !isfinite(dt)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "a step of %g s is not positive and finite", dt);
    }
    const forcing_source source = {forcing_at, user};
    const double end = engine->time + dt;
    const lee_status status = advance(engine, &source, dt, 0, error);
    if (status == LEE_OK) {
        engine->time = end; /* as if in one step, to the bit */
    }
    lee_transient_show(engine);
    return status;
}
