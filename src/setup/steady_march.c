/* steady_march.c - one connected water and the edge that holds its volume. */
#include "setup/steady_march.h"

#include <float.h>
#include <math.h>

#include "base/sum.h"

enum { MAX_PROBES = 400 };

/* Parts of the volume: what rounding may leave, and what is too little to
 * spill. */
static const double rounding = 2.0 * DBL_EPSILON;
static const double nothing = 1e-13;

/* Leg on which the edge of a start lies. */
static size_t leg_of_edge(const lee_reach *reach, const lee_room *room,
                          double start) {
    const size_t leg = room->left + (size_t)fmax(0.0, -start);
    return leg < reach->n ? leg : reach->n - 1;
}

lee_march lee_march_through(const lee_reach *reach, const lee_room *room,
                            double start, lee_visit_piece *visit, void *user) {
    size_t i = leg_of_edge(reach, room, start);
    const double share = fmax(0.0, -start) - (double)(i - room->left);
    double offset = share * reach->leg[i].length;
    double depth = fmax(0.0, start);
    lee_sum volume = {0};
    lee_march march = {
        .end = LEE_MARCH_INSIDE, .x = reach->leg[i].x + offset, .leg = i};
    bool is_dry = false;
    for (; i < room->right && !is_dry; i++) {
        const lee_crossing c = lee_leg_cross(&reach->leg[i], offset, depth);
        for (size_t k = 0; k < c.count; k++) {
            lee_sum_add(&volume, lee_piece_volume(&c.piece[k]));
            if (visit != NULL) {
                visit(user, &c.piece[k]);
            }
        }
        march.leg = i;
        march.x = reach->leg[i].x + c.offset;
        is_dry = c.is_dry;
        depth = c.depth;
        offset = 0.0;
    }
    march.volume = lee_sum_value(&volume);
    if (is_dry && march.leg < room->last_sink) {
        march.end = LEE_MARCH_SHORT;
    } else if (!is_dry && depth > 0.0 && room->right < reach->n) {
        march.end = LEE_MARCH_OVER;
    }
    return march;
}

/* One trial of a start. */
typedef struct probe {
    double start;
    double miss; /* volume minus the wanted one; only its sign counts when the
                    march was short or over */
    lee_march march;
} probe;

/* What the search works on. */
typedef struct search {
    const lee_reach *reach;
    const lee_room *room;
    double volume;
} search;

static probe try_start(const search *s, double start) {
    probe p = {.start = start};
    p.march = lee_march_through(s->reach, s->room, start, NULL, NULL);
    switch (p.march.end) {
    case LEE_MARCH_SHORT:
        p.miss = -s->volume;
        break;
    case LEE_MARCH_INSIDE:
        p.miss = p.march.volume - s->volume;
        break;
    case LEE_MARCH_OVER:
        p.miss = isinf(s->volume) ? 1.0 : s->volume;
        break;
    }
    return p;
}

/* The bracket's ends: too little below, too much above. */
typedef struct bracket {
    probe low;
    probe high;
} bracket;

/* The emptiest start: the dry edge at the first sink, no water. */
static probe emptiest(const search *s) {
    const lee_room *room = s->room;
    probe p = {.start = -(double)(room->first_sink - room->left),
               .miss = -s->volume};
    p.march.end =
        room->first_sink < room->last_sink ? LEE_MARCH_SHORT : LEE_MARCH_INSIDE;
    p.march.leg = room->first_sink;
    return p;
}

/* How far from a first probe the start should lie if the whole area moved up
 * and down with the edge; a little further, to enclose it. */
static double first_step(const search *s, const probe *first, double area) {
    const double least = 1e-12 * (1.0 + fabs(first->start));
    if (!(area > 0.0) || !isfinite(first->miss)) {
        return 1e-3;
    }
    const double rise = 1.25 * fabs(first->miss) / area;
    if (first->start > 0.0) {
        return fmax(rise, least);
    }
    const lee_leg *leg =
        &s->reach->leg[leg_of_edge(s->reach, s->room, first->start)];
    const double drop = fabs(leg->slope) * leg->length;
    return fmax(fmin(rise / fmax(drop, 1e-3), 0.5), least);
}

/* Looks upwards for an end that holds too much; false when the left crest is
 * reached first. */
static bool find_high(const search *s, double step, bracket *b) {
    const bool has_wall = s->room->left == 0;
    double start = b->low.start;
    for (int k = 0; k < MAX_PROBES; k++) {
        start += step;
        step *= 2.0;
        if (!has_wall && start >= 0.0) {
            b->high = try_start(s, 0.0);
            return b->high.miss >= 0.0;
        }
        b->high = try_start(s, start);
        if (b->high.miss >= 0.0) {
            return true;
        }
        b->low = b->high;
    }
    return false;
}

/* Looks downwards for an end that holds too little. */
static void find_low(const search *s, double step, bracket *b) {
    const probe floor = emptiest(s);
    double start = b->high.start;
    for (int k = 0; k < MAX_PROBES; k++) {
        start -= step;
        step *= 2.0;
        if (start <= floor.start) {
            break;
        }
        b->low = try_start(s, start);
        if (b->low.miss <= 0.0) {
            return;
        }
        b->high = b->low;
    }
    b->low = floor;
}

/* Brackets the start around a guess; false when even the left crest's edge
 * holds too little (b->high is that edge). */
static bool enclose(const search *s, double guess, double area, bracket *b) {
    const probe floor = emptiest(s);
    const bool has_wall = s->room->left == 0;
    const double top = has_wall ? INFINITY : 0.0;
    probe first = floor;
    if (guess > floor.start) {
        first = try_start(s, fmin(guess, top));
    }
    const double step = first_step(s, &first, area);
    if (first.miss > 0.0) {
        b->high = first;
        find_low(s, step, b);
        return true;
    }
    b->low = first;
    if (!(first.miss < 0.0)) {
        b->high = first;
        return true;
    }
    if (!(first.start < top)) {
        b->high = first;
        return false;
    }
    return find_high(s, step, b);
}

/* What is too little to spill of a volume. */
static double little(double volume) {
    return isfinite(volume) ? nothing * volume : 0.0;
}

static bool is_done(const bracket *b, double volume) {
    const double width = b->high.start - b->low.start;
    const double scale = fmax(fabs(b->high.start), fabs(b->low.start));
    const double miss = fmin(fabs(b->low.miss), fabs(b->high.miss));
    return (isfinite(volume) && miss <= 0.25 * rounding * volume) ||
           width <= rounding * scale || width <= 1e-18;
}

/* Share of the bracket to try next, from three probes, where an inverse
 * parabola is safe; else the middle (Chandrupatla 1997 [chandrupatla1997], from
 * memory). */
static double next_share(const probe *a, const probe *b, const probe *c) {
    const double xi = (a->start - b->start) / (c->start - b->start);
    const double f = (a->miss - b->miss) / (c->miss - b->miss);
    if (!(f * f < xi && (1.0 - f) * (1.0 - f) < 1.0 - xi)) {
        return 0.5;
    }
    return a->miss / (b->miss - a->miss) * (c->miss / (b->miss - c->miss)) +
           (c->start - a->start) / (b->start - a->start) *
               (a->miss / (c->miss - a->miss)) *
               (b->miss / (c->miss - b->miss));
}

/* Closes the bracket to rounding. */
static void close_in(const search *s, bracket *b) {
    probe last = b->low;
    probe other = b->high;
    double share = 0.5;
    if (last.march.end == LEE_MARCH_INSIDE &&
        other.march.end == LEE_MARCH_INSIDE && isfinite(s->volume)) {
        share = last.miss / (last.miss - other.miss);
    }
    for (int k = 0; k < MAX_PROBES && !is_done(b, s->volume); k++) {
        const double width = b->high.start - b->low.start;
        const double least =
            rounding * fmax(fabs(last.start), fabs(other.start)) / width;
        share = fmin(fmax(share, fmin(least, 0.5)), fmax(1.0 - least, 0.5));
        const double start = last.start + share * (other.start - last.start);
        const probe next = try_start(s, start);
        probe third = last;
        if ((next.miss > 0.0) != (last.miss > 0.0)) {
            third = other;
            other = last;
        }
        last = next;
        *(next.miss > 0.0 ? &b->high : &b->low) = next;
        share = next_share(&last, &other, &third);
    }
}

static lee_fit fit_of(lee_fit_kind kind, const probe *p, size_t leg) {
    return (lee_fit){kind, p->start, p->march.volume, leg};
}

static bool is_inside(const probe *p) {
    return p->march.end == LEE_MARCH_INSIDE;
}

/* Reads the closed bracket. */
static lee_fit judge(const search *s, const bracket *b) {
    const double small = little(s->volume);
    if (is_inside(&b->low) && is_inside(&b->high)) {
        const bool is_low = fabs(b->low.miss) <= fabs(b->high.miss);
        return fit_of(LEE_FIT_INSIDE, is_low ? &b->low : &b->high, 0);
    }
    if (is_inside(&b->high) && fabs(b->high.miss) <= small) {
        return fit_of(LEE_FIT_INSIDE, &b->high, 0);
    }
    if (b->low.march.end == LEE_MARCH_SHORT) {
        return fit_of(LEE_FIT_SHORT, &b->high, b->low.march.leg);
    }
    if (fabs(b->low.miss) <= small) {
        return fit_of(LEE_FIT_INSIDE, &b->low, 0);
    }
    return fit_of(LEE_FIT_OVER_RIGHT, &b->low, 0);
}

void lee_march_fit(const lee_reach *reach, const lee_room *room, double volume,
                   double guess, double area, lee_fit *fit) {
    const search s = {reach, room, volume};
    bracket b;
    if (!enclose(&s, guess, area, &b)) {
        const bool is_short = b.high.march.end == LEE_MARCH_SHORT;
        const bool fits =
            is_inside(&b.high) && fabs(b.high.miss) <= little(volume);
        *fit = fit_of(is_short ? LEE_FIT_SHORT
                      : fits   ? LEE_FIT_INSIDE
                               : LEE_FIT_OVER_LEFT,
                      &b.high, b.high.march.leg);
        return;
    }
    close_in(&s, &b);
    *fit = judge(&s, &b);
}
