/* period.c - the first natural period of a water of varying bed and width.
 *
 * Transport Q and level of a small free motion obey b eta_t = -Q_x and
 * Q_t = -g A eta_x; with cos(omega t)
 *
 *     -(Q'/b)' = omega^2 Q/(g A),   Q = 0 at walls, Q' = 0 at held ends
 *
 * (Chrystal 1905 [chrystal1905], derived again). Q stands at the faces of equal
 * cells; a cell's plan area and a face's share of the integral of 1/(g A) are
 * the profile's own, and two grids are put together by Richardson's rule. */
#include "leewater/setup.h"

#include <math.h>
#include <stdlib.h>

#include "base/constants.h"
#include "numerics/tridiagonal.h"

enum { COARSE = 64 }; /* cells; the finer grid has twice as many */

/* One water of a lake at rest. */
typedef struct basin {
    const lee_profile *profile;
    double level;
    double gravity;
    double from;
    double to;
    bool start_held; /* held at `from` */
    bool end_held;
} basin;

static bool is_wet(const basin *b, size_t row) {
    return b->profile->bed[row] < b->level;
}

/* Shore between two rows of which one is dry. */
static double shore_between(const basin *b, size_t i) {
    const lee_profile *p = b->profile;
    const double share = (b->level - p->bed[i]) / (p->bed[i + 1] - p->bed[i]);
    return p->chainage[i] + share * (p->chainage[i + 1] - p->chainage[i]);
}

/* Finds the shores of the water that covers x; false when x is dry. */
static bool find_shores(basin *b, double x) {
    const lee_profile *p = b->profile;
    if (!(x >= p->chainage[0] && x <= p->chainage[p->n - 1]) ||
        !(lee_profile_bed(p, x) < b->level)) {
        return false;
    }
    size_t i = 0; /* last row at or before x, not the last of all */
    while (i + 2 < p->n && p->chainage[i + 1] <= x) {
        i++;
    }
    size_t left = i;
    while (left > 0 && is_wet(b, left)) {
        left--;
    }
    size_t right = i + 1;
    while (right + 1 < p->n && is_wet(b, right)) {
        right++;
    }
    b->from = is_wet(b, left) ? p->chainage[0] : shore_between(b, left);
    b->to =
        is_wet(b, right) ? p->chainage[p->n - 1] : shore_between(b, right - 1);
    b->start_held = b->start_held && is_wet(b, left);
    b->end_held = b->end_held && is_wet(b, right);
    return b->to > b->from;
}

static double conveyance(const basin *b, double x) {
    const double depth = b->level - lee_profile_bed(b->profile, x);
    return b->gravity * depth * lee_profile_width(b->profile, x);
}

/* Integrals over a stretch, row by row: of the width, and of 1/(g A) by
 * Gauss and Legendre's three points. */
typedef struct integrals {
    double area;
    double inertia;
} integrals;

static integrals over_part(const basin *b, double x0, double x1) {
    const double middle = 0.5 * (x0 + x1);
    const double half = 0.5 * (x1 - x0);
    const double reach = half * 0.77459666924148337704; /* sqrt(3/5) */
    return (integrals){
        .area = 2.0 * half * lee_profile_width(b->profile, middle),
        .inertia =
            half / 9.0 *
            (5.0 / conveyance(b, middle - reach) + 8.0 / conveyance(b, middle) +
             5.0 / conveyance(b, middle + reach)),
    };
}

/* Walks along the profile; stretches are asked for in order of x. */
static integrals over_stretch(const basin *b, double x0, double x1,
                              size_t *row) {
    const lee_profile *p = b->profile;
    integrals sum = {0};
    while (x0 < x1) {
        while (*row + 1 < p->n && p->chainage[*row] <= x0) {
            (*row)++;
        }
        const double to =
            p->chainage[*row] > x0 ? fmin(x1, p->chainage[*row]) : x1;
        const integrals part = over_part(b, x0, to);
        sum.area += part.area;
        sum.inertia += part.inertia;
        x0 = to;
    }
    return sum;
}

/* Integrals of the halves of the cells: half[2 i] and half[2 i + 1] are those
 * of cell i. */
static void integrate_halves(const basin *b, size_t cells, integrals half[]) {
    const double step = 0.5 * (b->to - b->from) / (double)cells;
    size_t row = 0;
    for (size_t i = 0; i < 2 * cells; i++) {
        half[i] = over_stretch(b, b->from + (double)i * step,
                               b->from + (double)(i + 1) * step, &row);
    }
}

/* The symmetrised matrix on the faces first to last; face i lies between
 * cells i - 1 and i. Returns its size. */
static size_t assemble(const basin *b, size_t cells, const integrals half[],
                       double d[], double e[]) {
    const size_t first = b->start_held ? 0 : 1;
    const size_t last = b->end_held ? cells : cells - 1;
    double inertia_before = 0.0;
    for (size_t i = first; i <= last; i++) {
        double stiffness = 0.0;
        double inertia = 0.0;
        double area = INFINITY; /* of the cell before */
        if (i > 0) {
            area = half[2 * i - 2].area + half[2 * i - 1].area;
            stiffness += 1.0 / area;
            inertia += half[2 * i - 1].inertia;
        }
        if (i < cells) {
            stiffness += 1.0 / (half[2 * i].area + half[2 * i + 1].area);
            inertia += half[2 * i].inertia;
        }
        d[i - first] = stiffness / inertia;
        if (i > first) {
            e[i - first - 1] = -1.0 / (area * sqrt(inertia * inertia_before));
        }
        inertia_before = inertia;
    }
    return last - first + 1;
}

/* Smallest omega^2 > 0 on a grid: with both ends held an even flow through
 * the lake is a mode of its own, omega = 0. Scratch: half[2 cells], d and
 * e[cells + 1]. */
static double square_on(const basin *b, size_t cells, integrals half[],
                        double d[], double e[]) {
    integrate_halves(b, cells, half);
    const size_t n = assemble(b, cells, half, d, e);
    const size_t still = b->start_held && b->end_held;
    return lee_tridiagonal_eigenvalue(n, d, e, still);
}

/* Smallest omega^2 by two grids and Richardson's rule; NaN without memory. */
static double square_of(const basin *b) {
    const size_t fine = 2 * (size_t)COARSE;
    integrals *half = calloc(2 * fine, sizeof *half);
    double *d = calloc(fine + 1, sizeof *d);
    double *e = calloc(fine + 1, sizeof *e);
    double square = NAN;
    if (half != NULL && d != NULL && e != NULL) {
        const double on_coarse = square_on(b, COARSE, half, d, e);
        const double on_fine = square_on(b, fine, half, d, e);
        square = on_fine + (on_fine - on_coarse) / 3.0;
    }
    free(half);
    free(d);
    free(e);
    return square;
}

lee_status lee_first_period(const lee_period_input *input, double *period,
                            lee_error *error) {
    basin b = {
        .profile = input->profile,
        .level = input->level,
        .gravity = input->gravity,
        .start_held = input->start_held,
        .end_held = input->end_held,
    };
    *period = NAN;
    const lee_status status = lee_profile_check(b.profile, error);
    if (status != LEE_OK) {
        return status;
    }
    if (!isfinite(b.level) || !(b.gravity > 0.0) || !isfinite(b.gravity)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "level %g m or gravity %g m s-2 is outside its range",
                        b.level, b.gravity);
    }
    if (!find_shores(&b, input->x)) {
        return LEE_OK;
    }
    const double square = square_of(&b);
    if (isnan(square)) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a grid");
    }
    *period = 2.0 * lee_pi / sqrt(square);
    return LEE_OK;
}
