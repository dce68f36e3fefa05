/* transient_guard.c - the outflow limiter, the safety net of a step. */
#include "setup/transient_internal.h"

#include <math.h>

/* Cuts the transport of a link to `allowed` (same sign, smaller), and the
 * speed at theta with it: a cut speed is not extrapolated. */
static void cut(lee_transient *engine, size_t link, double allowed) {
    engine->next.speed[link] = allowed / engine->section[link];
    engine->transport[link] = allowed;
}

static bool is_held(const lee_transient *engine, size_t node) {
    return (node == 0 && engine->start.is_held) ||
           (node == engine->links && engine->end.is_held);
}

/* Transport out of the node along x, and into it. */
static double outward(const lee_transient *engine, size_t node) {
    return node < engine->links ? larger(0.0, engine->transport[node]) : 0.0;
}

static double inward(const lee_transient *engine, size_t node) {
    return node > 0 ? larger(0.0, engine->transport[node - 1]) : 0.0;
}

/* The same against x. */
static double outward_against(const lee_transient *engine, size_t node) {
    return node > 0 ? larger(0.0, -engine->transport[node - 1]) : 0.0;
}

static double inward_against(const lee_transient *engine, size_t node) {
    return node < engine->links ? larger(0.0, -engine->transport[node]) : 0.0;
}

/* Along x, then against it: what a node may give is what it holds and what
 * has already been settled to come in; where it gives on both sides, in
 * proportion. The second sweep only cuts what the first has left open, so the
 * balance of the first still holds. */
bool lee_transient_limit(lee_transient *engine, double dt) {
    const size_t nodes = engine->nodes;
    const double *volume = engine->now.volume;
    const double rate = 1.0 / dt;
    bool has_cut = false;
    for (size_t i = 0; i + 1 < nodes; i++) {
        const double out = outward(engine, i);
        const double total = out + outward_against(engine, i);
        const double supply = volume[i] * rate + inward(engine, i);
        if (!is_held(engine, i) && out > 0.0 && total > supply) {
            cut(engine, i, supply * (out / total));
            has_cut = true;
        }
    }
    for (size_t i = nodes; i-- > 1;) {
        const double out = outward_against(engine, i);
        const double supply = volume[i] * rate + inward(engine, i) +
                              inward_against(engine, i) - outward(engine, i);
        if (!is_held(engine, i) && out > supply) {
            cut(engine, i - 1, -larger(0.0, supply));
            has_cut = true;
        }
    }
    return has_cut;
}
