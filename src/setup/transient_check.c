/* transient_check.c - what the transient engine asks of channel and options. */
#include <math.h>

#include "setup/transient_internal.h"

static bool is_positive(double value) {
    return value > 0.0 && isfinite(value);
}

static lee_status check_bed(const lee_transient_options *o, lee_error *error) {
    const lee_bed_law *bed = &o->bed;
    const bool may_be_zero = bed->kind == LEE_BED_MANNING ||
                             bed->kind == LEE_BED_DRAG ||
                             bed->kind == LEE_BED_LINEAR;
    const bool is_fit = bed->kind == LEE_BED_NONE || is_positive(bed->value) ||
                        (may_be_zero && bed->value == 0.0);
    if (!is_fit) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "bed friction %g is not positive and finite",
                        bed->value);
    }
    if (o->is_linear && bed->kind != LEE_BED_NONE &&
        bed->kind != LEE_BED_LINEAR) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "the linear variant takes linear bed friction only");
    }
    return LEE_OK;
}

static lee_status refuse(lee_error *error, const char *name, double value,
                         const char *expected) {
    return lee_fail(error, LEE_ERR_ARGUMENT, "%s %g is not %s", name, value,
                    expected);
}

static lee_status check_options(const lee_transient_options *o,
                                lee_error *error) {
    const char *const positive = "positive and finite";
    if (!is_positive(o->gravity)) {
        return refuse(error, "gravity", o->gravity, positive);
    }
    if (!is_positive(o->water_density)) {
        return refuse(error, "water density", o->water_density, positive);
    }
    if (!(o->return_flow >= 1.0) || !isfinite(o->return_flow)) {
        return refuse(error, "return flow", o->return_flow,
                      "at least 1 and finite");
    }
    if (!(o->theta >= 0.5 && o->theta <= 1.0)) {
        return refuse(error, "theta", o->theta, "in [0.5, 1]");
    }
    if (!is_positive(o->dry_depth)) {
        return refuse(error, "dry depth", o->dry_depth, positive);
    }
    if (!(o->film_drag >= 0.0) || !isfinite(o->film_drag)) {
        return refuse(error, "film drag", o->film_drag,
                      "at least 0 and finite");
    }
    return check_bed(o, error);
}

static lee_status check_channel(const lee_channel *c, lee_error *error) {
    if (c->classes != 1 || c->nodes < 2 || c->links != c->nodes - 1) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "the engine takes one reach of one class, this channel "
                        "has %zu nodes, %zu links and %zu classes",
                        c->nodes, c->links, c->classes);
    }
    for (size_t i = 0; i < c->nodes; i++) {
        if (!is_positive(c->area[i]) || !is_positive(c->length[i]) ||
            !isfinite(c->bed[i]) || !isfinite(c->chainage[i])) {
            return lee_fail(error, LEE_ERR_ARGUMENT,
                            "node %zu of the channel has no area, length, bed "
                            "or chainage",
                            i);
        }
    }
    for (size_t f = 0; f < c->links; f++) {
        if (c->from[f] != f || c->to[f] != f + 1) {
            return lee_fail(error, LEE_ERR_ARGUMENT,
                            "link %zu of the channel leads from node %zu to "
                            "%zu: not one reach",
                            f, c->from[f], c->to[f]);
        }
        if (!is_positive(c->spacing[f]) || !is_positive(c->width[f]) ||
            !isfinite(c->link_bed[f])) {
            return lee_fail(error, LEE_ERR_ARGUMENT,
                            "link %zu of the channel has no spacing, width or "
                            "bed",
                            f);
        }
    }
    return LEE_OK;
}

lee_status lee_transient_check(const lee_channel *channel,
                               const lee_transient_options *options,
                               lee_error *error) {
    const lee_status status = check_options(options, error);
    return status == LEE_OK ? check_channel(channel, error) : status;
}
