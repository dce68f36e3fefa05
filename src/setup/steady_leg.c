/* steady_leg.c - the exact steady surface over one segment of a profile. */
#include "setup/steady_leg.h"

#include <float.h>
#include <math.h>

/* Thickest film that the film rule holds back, m. */
static const double film_cap = 0.25;

void lee_leg_blow(lee_leg *leg, double share) {
    const double a = leg->full * share;
    const double climb = a < 0.0 ? -leg->slope : leg->slope;
    leg->drive = a;
    leg->has_film = fabs(a) > 0.0 && film_cap * climb >= 2.0 * fabs(a);
    const bool is_still = !(fabs(a) > 0.0);
    if (is_still || leg->has_film) {
        leg->way = leg->slope > 0.0 ? -1 : leg->slope < 0.0 ? 1 : 0;
    } else {
        leg->way = a > 0.0 ? 1 : -1;
    }
}

lee_cover lee_leg_still(const lee_leg *leg) {
    const double z0 = leg->bed;
    const double z1 = leg->bed + leg->slope * leg->length;
    if (z0 >= 0.0 && z1 >= 0.0) {
        return (lee_cover){leg->x, leg->x, 0.0};
    }
    const double s0 = z0 >= 0.0 ? -z0 / leg->slope : 0.0;
    const double s1 = z1 >= 0.0 ? -z0 / leg->slope : leg->length;
    return (lee_cover){
        .from = leg->x + s0,
        .to = leg->x + s1,
        .area = (s1 - s0) * (leg->width + 0.5 * leg->widening * (s0 + s1)),
    };
}

/* phi1 = (1 - e^-z)/z and phi2 = (1 - phi1)/z, without cancellation. */
typedef struct phis {
    double one;
    double two;
} phis;

static const double inverse[] = {
    1.0 / 18.0, 1.0 / 17.0, 1.0 / 16.0, 1.0 / 15.0, 1.0 / 14.0, 1.0 / 13.0,
    1.0 / 12.0, 1.0 / 11.0, 1.0 / 10.0, 1.0 / 9.0,  1.0 / 8.0,  1.0 / 7.0,
    1.0 / 6.0,  1.0 / 5.0,  1.0 / 4.0,  1.0 / 3.0,  1.0 / 2.0};

enum { TERMS = sizeof inverse / sizeof inverse[0] };

/* phi2 is the sum of (-z)^k/(k + 2)!, by Horner: to rounding with all terms up
 * to |z| = 1 (1/19!), with those from 1/10 on up to 1/8 ((1/8)^9/11!). */
static size_t first_term(double z) {
    return fabs(z) < 0.125 ? 8 : 0;
}

static phis phi(double z) {
    if (fabs(z) > 1.0) {
        const double one = -expm1(-z) / z;
        return (phis){one, (1.0 - one) / z};
    }
    double two = 0.0;
    for (size_t i = first_term(z); i < TERMS; i++) {
        two = inverse[i] * (1.0 - z * two);
    }
    return (phis){1.0 - z * two, two};
}

/* Depth and distance after t along dH/dt = a - m H, dx/dt = H. */
typedef struct advance {
    double depth;
    double distance;
} advance;

static advance advance_by(double depth, double a, double m, double t) {
    const phis p = phi(m * t);
    const double c = a - m * depth;
    return (advance){
        .depth = fmax(0.0, depth + c * t * p.one),
        .distance = t * (depth + c * t * p.two),
    };
}

/* First guess of the t that covers `length`. While the depth grows each of
 * the three is the exact answer of a slower growth: even, that of a level bed,
 * that of an edge on a bed that falls away, e^z - 1 - z = m^2 X/c. */
static double guess_span(double depth, double c, double m, double length) {
    if (c < 0.0) {
        const double after = depth + c * length / depth;
        return 2.0 * length / (depth + fmax(after, 0.0));
    }
    const double level =
        2.0 * length / (depth + sqrt(depth * depth + 2.0 * c * length));
    if (m >= 0.0) {
        return level;
    }
    const double ratio = m * m * length / c;
    return fmin(level, -log1p(ratio + log1p(ratio)) / m);
}

/* The t that covers `length`: Halley's iteration within a bracket. */
static double span_over(double depth, double a, double m, double length,
                        double longest) {
    const double c = a - m * depth;
    double low = 0.0;
    double high = longest;
    double t = fmin(guess_span(depth, c, m, length), 0.5 * longest);
    for (int k = 0; k < 200; k++) {
        const phis p = phi(m * t);
        const double miss = t * (depth + c * t * p.two) - length;
        const double h = depth + c * t * p.one;
        const double bend = c * (1.0 - m * t * p.one);
        const double newton = miss / h;
        const double step = newton / (1.0 - 0.5 * newton * bend / h);
        if (fabs(step) <= 2.0 * DBL_EPSILON * t) {
            return t - step;
        }
        if (miss < 0.0) {
            low = t;
        } else {
            high = t;
        }
        double next = t - step;
        if (!(next > low && next < high)) {
            next = isinf(high) ? 4.0 * t
                   : low > 0.0 ? sqrt(low * high)
                               : 0.25 * high;
        }
        if (fabs(next - t) <= DBL_EPSILON * t) {
            return next;
        }
        t = next;
    }
    return t;
}

/* The t at which the depth has fallen to `stop`; infinite when it never does.
 * From e^(-mt) = (a - m stop)/(a - m H). */
static double span_to_depth(double depth, double a, double m, double stop) {
    const double c = a - m * depth;
    const double c_stop = a - m * stop;
    if (!(c < 0.0 && c_stop < 0.0)) {
        return INFINITY;
    }
    const double y = m * (depth - stop) / c; /* c_stop/c - 1 */
    if (fabs(y) > 0.5) {
        return -log(c_stop / c) / m;
    }
    const double shape = fabs(y) > 1e-8 ? log1p(y) / y : 1.0 - 0.5 * y;
    return -(depth - stop) / c * shape;
}

/* Adds a piece from where the crossing stands, and moves it on. */
static void add_piece(const lee_leg *leg, lee_crossing *crossing,
                      lee_piece piece, advance to) {
    const double offset = crossing->offset;
    piece.x = leg->x + offset;
    piece.bed = leg->bed + leg->slope * offset;
    piece.slope = leg->slope;
    piece.width = leg->width + leg->widening * offset;
    piece.widening = leg->widening;
    piece.cross = leg->cross;
    piece.depth = crossing->depth;
    crossing->piece[crossing->count++] = piece;
    crossing->offset += to.distance;
    crossing->depth = to.depth;
}

static double rest_of(const lee_leg *leg, const lee_crossing *crossing) {
    return fmax(0.0, leg->length - crossing->offset);
}

/* Follows the curve down to depth `stop` or to the end of the leg. Returns
 * whether it came to `stop` first. */
static bool follow_curve(const lee_leg *leg, double stop,
                         lee_crossing *crossing) {
    const double a = leg->drive;
    const double m = leg->slope;
    const double rest = rest_of(leg, crossing);
    const double depth = crossing->depth;
    const double t_stop = span_to_depth(depth, a, m, stop);
    if (!isinf(t_stop)) {
        const double distance = advance_by(depth, a, m, t_stop).distance;
        if (distance <= rest) {
            add_piece(
                leg, crossing,
                (lee_piece){.drive = a, .span = t_stop, .is_curved = true},
                (advance){stop, distance});
            return true;
        }
    }
    const double t = span_over(depth, a, m, rest, t_stop);
    const advance to = {advance_by(depth, a, m, t).depth, rest};
    add_piece(leg, crossing,
              (lee_piece){.drive = a, .span = t, .is_curved = true}, to);
    return false;
}

/* Follows a straight surface on which the depth changes by `fall` a metre,
 * until the depth is `stop` or the leg ends. Returns whether it came to `stop`
 * first. */
static bool follow_line(const lee_leg *leg, double fall, double stop,
                        lee_crossing *crossing) {
    const double rest = rest_of(leg, crossing);
    const double gap = stop - crossing->depth;
    const bool is_towards = fall * gap > 0.0;
    if (is_towards && fabs(gap) <= fabs(fall) * rest) {
        const double distance = gap / fall;
        add_piece(leg, crossing, (lee_piece){.fall = fall, .span = distance},
                  (advance){stop, distance});
        return true;
    }
    const double after = fmax(0.0, crossing->depth + fall * rest);
    add_piece(leg, crossing, (lee_piece){.fall = fall, .span = rest},
              (advance){after, rest});
    return false;
}

/* Over a slope with the film rule. */
static void cross_film(const lee_leg *leg, lee_crossing *crossing) {
    const double film = 2.0 * leg->drive / leg->slope;
    const double half = -0.5 * leg->slope;
    if (leg->drive > 0.0) {
        const bool is_thin =
            crossing->depth <= film || follow_curve(leg, film, crossing);
        crossing->is_dry = is_thin && follow_line(leg, half, 0.0, crossing);
        return;
    }
    if (crossing->depth >= film || follow_line(leg, half, film, crossing)) {
        (void)follow_curve(leg, 0.0, crossing);
    }
}

lee_crossing lee_leg_cross(const lee_leg *leg, double offset, double depth) {
    lee_crossing crossing = {.offset = offset, .depth = depth};
    if (!(depth > 0.0) && leg->way < 0) {
        crossing.is_dry = true;
    } else if (leg->has_film) {
        cross_film(leg, &crossing);
    } else if (fabs(leg->drive) > 0.0) {
        crossing.is_dry = follow_curve(leg, 0.0, &crossing);
    } else {
        crossing.is_dry = follow_line(leg, -leg->slope, 0.0, &crossing);
    }
    return crossing;
}

lee_spot lee_piece_at(const lee_piece *piece, double share) {
    const double s = share * piece->span;
    const advance to =
        piece->is_curved
            ? advance_by(piece->depth, piece->drive, piece->slope, s)
            : (advance){fmax(0.0, piece->depth + piece->fall * s), s};
    return (lee_spot){
        .x = piece->x + to.distance,
        .depth = to.depth,
        .level = piece->bed + piece->slope * to.distance + to.depth,
        .width = piece->width + piece->widening * to.distance,
    };
}

double lee_piece_level(const lee_piece *piece, double distance) {
    const double level = piece->bed + piece->depth;
    if (!piece->is_curved) {
        return level + (piece->slope + piece->fall) * distance;
    }
    if (!(distance > 0.0)) {
        return level;
    }
    const double t =
        span_over(piece->depth, piece->drive, piece->slope, distance, INFINITY);
    return level + piece->drive * fmin(t, piece->span);
}

double lee_piece_node(const lee_piece *piece) {
    const double level = piece->bed + piece->depth;
    const double rise =
        piece->is_curved ? piece->drive : piece->slope + piece->fall;
    return -level / (rise * piece->span);
}

/* Gauss and Legendre's nodes and weights on 0 to 1, eight points (the values
 * of Abramowitz & Stegun 1964 [abramowitz1964], table 25.4, from memory). */
static const double node[8] = {
    0.01985507175123188416, 0.10166676129318663020, 0.23723379504183550709,
    0.40828267875217509753, 0.59171732124782490247, 0.76276620495816449291,
    0.89833323870681336980, 0.98014492824876811584,
};
static const double weight[8] = {
    0.05061426814518812958, 0.11119051722668723527, 0.15685332293894364367,
    0.18134189168918099148, 0.18134189168918099148, 0.15685332293894364367,
    0.11119051722668723527, 0.05061426814518812958,
};

/* Integral over a panel of t short enough (|m t| <= 1) for eight points. The
 * points go through the series of phi side by side. */
static double panel_volume(const lee_piece *piece, double distance,
                           double depth, double t) {
    const double m = piece->slope;
    const double c = piece->drive - m * depth;
    double two[8] = {0.0};
    for (size_t k = first_term(m * t); k < TERMS; k++) {
        for (size_t i = 0; i < 8; i++) {
            two[i] = inverse[k] * (1.0 - m * t * node[i] * two[i]);
        }
    }
    double sum = 0.0;
    for (size_t i = 0; i < 8; i++) {
        const double s = node[i] * t;
        const double h = depth + c * s * (1.0 - m * s * two[i]);
        const double x = distance + s * (depth + c * s * two[i]);
        sum += weight[i] * (piece->width + piece->widening * x) * h * h;
    }
    return sum * t;
}

static double curve_volume(const lee_piece *piece) {
    const double a = piece->drive;
    const double m = piece->slope;
    /* After forty e-foldings the depth is its equilibrium to rounding. */
    const double t_end = m * piece->span > 40.0 ? 40.0 / m : piece->span;
    const size_t panels = (size_t)fmax(1.0, ceil(fabs(m * t_end)));
    const double t = t_end / (double)panels;
    double distance = 0.0;
    double depth = piece->depth;
    double volume = 0.0;
    for (size_t k = 0; k < panels; k++) {
        volume += panel_volume(piece, distance, depth, t);
        const advance to = advance_by(depth, a, m, t);
        distance += to.distance;
        depth = to.depth;
    }
    const double rest = (piece->span - t_end) * depth;
    return volume +
           rest * depth *
               (piece->width + piece->widening * (distance + 0.5 * rest));
}

double lee_piece_volume(const lee_piece *piece) {
    if (piece->is_curved) {
        return curve_volume(piece);
    }
    const double h0 = piece->depth;
    const double h1 = fmax(0.0, h0 + piece->fall * piece->span);
    const double b0 = piece->width;
    const double b1 = b0 + piece->widening * piece->span;
    /* Simpson's rule is exact for the product of two lines. */
    return piece->span / 6.0 *
           (2.0 * h0 * b0 + h0 * b1 + h1 * b0 + 2.0 * h1 * b1);
}
