/* steady.c - equilibrium levels of a lake under a steady wind. */
#include "leewater/setup.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

#include "setup/steady_pools.h"

/* About how many points draw the surface. */
static const double drawn_points = 400.0;

/* ---- what goes in ---- */

static lee_status check_numbers(const lee_steady_input *in, lee_error *error) {
    const struct {
        const char *name;
        double value;
        double least;
        bool may_equal;
    } rows[] = {
        {"still water",        in->still_water,   -INFINITY, false},
        {"eastward stress",    in->stress[0],     -INFINITY, false},
        {"northward stress",   in->stress[1],     -INFINITY, false},
        {"return-flow factor", in->return_flow,   1.0,       true },
        {"water density",      in->water_density, 0.0,       false},
        {"gravity",            in->gravity,       0.0,       false},
        {"dry depth",          in->dry_depth,     0.0,       true },
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        const double value = rows[i].value;
        const bool is_large =
            rows[i].may_equal ? value >= rows[i].least : value > rows[i].least;
        if (!isfinite(value) || !is_large) {
            return lee_fail(error, LEE_ERR_ARGUMENT,
                            "%s %g is outside its range", rows[i].name, value);
        }
    }
    return LEE_OK;
}

static lee_status check_end(double level, double bed, const char *end,
                            lee_error *error) {
    if (isnan(level)) {
        return LEE_OK;
    }
    if (!isfinite(level)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "the level held at the %s is not finite", end);
    }
    if (!(level > bed)) {
        return lee_fail(error, LEE_ERR_DATA,
                        "the level held at the %s, %g m, is not above the bed "
                        "there, %g m",
                        end, level, bed);
    }
    return LEE_OK;
}

static double lowest_bed(const lee_profile *profile) {
    double lowest = profile->bed[0];
    for (size_t i = 1; i < profile->n; i++) {
        lowest = fmin(lowest, profile->bed[i]);
    }
    return lowest;
}

static lee_status check_input(const lee_steady_input *in, lee_error *error) {
    lee_status status = lee_profile_check(in->profile, error);
    if (status == LEE_OK) {
        status = check_numbers(in, error);
    }
    if (status != LEE_OK) {
        return status;
    }
    const lee_profile *p = in->profile;
    if (!isnan(in->start_level) && !isnan(in->end_level)) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "one end at most may be held in a steady state");
    }
    status = check_end(in->start_level, p->bed[0], "start", error);
    if (status == LEE_OK) {
        status = check_end(in->end_level, p->bed[p->n - 1], "end", error);
    }
    if (status != LEE_OK) {
        return status;
    }
    const bool has_held = !isnan(in->start_level) || !isnan(in->end_level);
    if (!has_held && !(in->still_water > lowest_bed(p))) {
        return lee_fail(error, LEE_ERR_DATA,
                        "no water: still water %g m is not above the lowest "
                        "bed, %g m",
                        in->still_water, lowest_bed(p));
    }
    return LEE_OK;
}

/* a along and across the axis on the segment behind row i, m. What rounding
 * leaves of a wind straight across is no wind along. */
static void drive_at(const lee_steady_input *in, size_t i, double *along,
                     double *across) {
    const double bearing = in->profile->bearing[i];
    const double per_stress =
        in->return_flow / (in->water_density * in->gravity);
    const double e = in->stress[0];
    const double n = in->stress[1];
    const double forward = e * sin(bearing) + n * cos(bearing);
    *along = fabs(forward) > 1e-14 * hypot(e, n) ? per_stress * forward : 0.0;
    *across = per_stress * fabs(e * cos(bearing) - n * sin(bearing));
}

/* The axis as the solver sees it, from x = 0; mirrored on request. */
static void lay_legs(const lee_steady_input *in, bool is_mirrored,
                     lee_reach *reach) {
    const lee_profile *p = in->profile;
    const size_t n = reach->n;
    for (size_t j = 0; j < n; j++) {
        const size_t i = is_mirrored ? n - 1 - j : j;
        const size_t near = is_mirrored ? i + 1 : i;
        const size_t far = is_mirrored ? i : i + 1;
        lee_leg *leg = &reach->leg[j];
        leg->x = fabs(p->chainage[near] - p->chainage[is_mirrored ? n : 0]);
        leg->length = p->chainage[i + 1] - p->chainage[i];
        leg->bed = p->bed[near] - in->still_water;
        leg->slope = (p->bed[far] - p->bed[near]) / leg->length;
        leg->width = p->width[near];
        leg->widening = (p->width[far] - p->width[near]) / leg->length;
        drive_at(in, i, &leg->full, &leg->cross);
        leg->full = is_mirrored ? -leg->full : leg->full;
    }
}

/* Mean of a over the still lake, m. */
static double mean_drive(const lee_reach *reach) {
    double sum = 0.0;
    double area = 0.0;
    for (size_t i = 0; i < reach->n; i++) {
        const lee_cover s = lee_leg_still(&reach->leg[i]);
        sum += s.area * reach->leg[i].full;
        area += s.area;
    }
    return area > 0.0 ? sum / area : 0.0;
}

/* Solves along the axis as it is laid. */
static lee_status solve_laid(lee_pools *pools, double start_level,
                             lee_error *error) {
    pools->start_level = start_level;
    pools->partings = 0;
    pools->has_sill = false;
    const lee_status status = lee_pools_rest(pools, error);
    return status == LEE_OK ? lee_pools_blow(pools, error) : status;
}

/* Lays the axis with its held end or its windward side first and solves; the
 * march with the wind is the stable one. Where winds of two ways make the
 * other side the stable one, that is tried too. */
static lee_status solve_axis(const lee_steady_input *in, lee_pools *pools,
                             bool *is_mirrored, lee_error *error) {
    const bool has_start = !isnan(in->start_level);
    const bool has_end = !isnan(in->end_level);
    lay_legs(in, false, &pools->reach);
    *is_mirrored = has_end || (!has_start && mean_drive(&pools->reach) < 0.0);
    double held = has_end ? in->end_level : in->start_level;
    held -= in->still_water;
    lay_legs(in, *is_mirrored, &pools->reach);
    lee_status status = solve_laid(pools, held, error);
    if (status == LEE_ERR_CONVERGENCE && !has_start && !has_end) {
        *is_mirrored = !*is_mirrored;
        lay_legs(in, *is_mirrored, &pools->reach);
        status = solve_laid(pools, NAN, error);
    }
    return status;
}

/* ---- what comes out ---- */

/* A still water's stretch of the axis and its first period. */
typedef struct still_water {
    double from;
    double to;
    double period;
    size_t waters; /* that are left of it */
} still_water;

/* What the result is gathered from. */
typedef struct gathering {
    const lee_steady_input *in;
    const lee_pools *pools;
    bool is_mirrored;
    size_t pieces;
    lee_piece *piece; /* of all waters, in order of x */
    size_t stills;
    still_water *still;
    size_t step; /* points a piece */
    size_t row;  /* first profile row not drawn yet */
} gathering;

/* Chainage of the solver's x. */
static double chainage_of(const gathering *g, double x) {
    const lee_profile *p = g->in->profile;
    return g->is_mirrored ? p->chainage[p->n - 1] - x : p->chainage[0] + x;
}

static void keep_piece(void *user, const lee_piece *piece) {
    gathering *g = user;
    g->piece[g->pieces++] = *piece;
}

static void put_point(const gathering *g, lee_steady *steady, double x,
                      double level) {
    steady->x[steady->n] = chainage_of(g, x);
    steady->level[steady->n] = isnan(level) ? NAN : g->in->still_water + level;
    steady->n++;
}

/* Highest and lowest of a level at x. */
static void note_level(lee_steady_water *water, double x, double level) {
    if (!(level <= water->set_up)) {
        water->set_up = level;
        water->set_up_at = x;
    }
    if (!(level >= water->set_down)) {
        water->set_down = level;
        water->set_down_at = x;
    }
}

static int sign_of(double level) {
    const double noise = 1e-11; /* m, what rounding leaves of a still level */
    return level > noise ? 1 : level < -noise ? -1 : 0;
}

/* Where the level passes through still water. */
static void note_nodes(const gathering *g, const lee_piece piece[],
                       size_t count, lee_steady_water *water) {
    int last = sign_of(piece[0].bed + piece[0].depth);
    for (size_t i = 0; i < count; i++) {
        const int sign = sign_of(lee_piece_at(&piece[i], 1.0).level);
        if (last * sign < 0) {
            const double share =
                fmin(fmax(lee_piece_node(&piece[i]), 0.0), 1.0);
            water->node[water->node_count++] =
                chainage_of(g, lee_piece_at(&piece[i], share).x);
        }
        last = sign != 0 ? sign : last;
    }
}

/* Sums over the drawn surface of one water. */
typedef struct drawn {
    double area;
    double moved; /* integral of width times |level| */
    lee_spot last;
    bool has_last;
} drawn;

static void draw_spot(const gathering *g, lee_steady *steady, drawn *d,
                      lee_spot spot) {
    if (d->has_last) {
        const double dx = spot.x - d->last.x;
        const double b = 0.5 * (spot.width + d->last.width);
        d->area += dx * b;
        d->moved += 0.5 * dx * b * (fabs(spot.level) + fabs(d->last.level));
    }
    d->last = spot;
    d->has_last = true;
    put_point(g, steady, spot.x, spot.level);
}

static drawn draw_water(const gathering *g, const lee_piece piece[],
                        size_t count, lee_steady *steady) {
    drawn d = {0};
    const size_t k = g->step;
    for (size_t i = 0; i < count; i++) {
        for (size_t j = 0; j < k; j++) {
            draw_spot(g, steady, &d,
                      lee_piece_at(&piece[i], (double)j / (double)k));
        }
    }
    draw_spot(g, steady, &d, lee_piece_at(&piece[count - 1], 1.0));
    return d;
}

/* The tilt across, where the water is at least half as deep as on average:
 * nearer the beaches the estimate has no meaning. */
static void note_cross(const gathering *g, const lee_piece piece[],
                       size_t count, double mean_depth, lee_steady *steady) {
    const size_t k = g->step;
    for (size_t i = 0; i < count; i++) {
        for (size_t j = 0; j <= k; j++) {
            const lee_spot s = lee_piece_at(&piece[i], (double)j / (double)k);
            const double tilt = piece[i].cross * s.width / s.depth;
            if (s.depth >= 0.5 * mean_depth && tilt > steady->cross_tilt) {
                steady->cross_tilt = tilt;
                steady->cross_tilt_at = chainage_of(g, s.x);
            }
        }
    }
}

static double row_x(const gathering *g, size_t row) {
    const lee_reach *reach = &g->pools->reach;
    const lee_leg *end = &reach->leg[reach->n - 1];
    return row < reach->n ? reach->leg[row].x : end->x + end->length;
}

/* Profile rows before x, left dry by the surface; at least one point where a
 * water ended before. */
static void draw_dry(gathering *g, lee_steady *steady, double x) {
    const size_t before = steady->n;
    for (; g->row <= g->pools->reach.n && row_x(g, g->row) < x; g->row++) {
        put_point(g, steady, row_x(g, g->row), NAN);
    }
    if (before > 0 && steady->n == before && isfinite(x)) {
        put_point(g, steady, x, NAN);
    }
}

/* Passes the rows that a water covers, up to x. */
static void pass_rows(gathering *g, double x) {
    while (g->row <= g->pools->reach.n && row_x(g, g->row) <= x) {
        g->row++;
    }
}

static double deepest_of(const lee_piece piece[], size_t count) {
    double deepest = 0.0;
    for (size_t i = 0; i < count; i++) {
        deepest = fmax(
            deepest, fmax(piece[i].depth, lee_piece_at(&piece[i], 1.0).depth));
    }
    return deepest;
}

static void put_ends(const gathering *g, double from, double to,
                     lee_steady_water *water) {
    const double a = chainage_of(g, from);
    const double b = chainage_of(g, to);
    water->from = fmin(a, b);
    water->to = fmax(a, b);
}

/* Levels, nodes and surface of one water. */
static lee_status tell_water(gathering *g, const lee_pool *pool,
                             lee_steady *steady, lee_error *error) {
    const size_t first = g->pieces;
    const lee_room room = lee_pools_room(g->pools, pool);
    const lee_march march =
        lee_march_through(&g->pools->reach, &room, pool->start, keep_piece, g);
    const size_t count = g->pieces - first;
    const lee_piece *piece = &g->piece[first];
    if (count == 0 || deepest_of(piece, count) < g->in->dry_depth) {
        return LEE_OK;
    }
    lee_steady_water *water = &steady->water[steady->count++];
    *water = (lee_steady_water){
        .set_up = NAN, .set_down = NAN, .volume = march.volume};
    water->node = calloc(count, sizeof *water->node);
    if (water->node == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for nodes");
    }
    for (size_t i = 0; i < count; i++) {
        const lee_spot end = lee_piece_at(&piece[i], 1.0);
        note_level(water, chainage_of(g, piece[i].x),
                   piece[i].bed + piece[i].depth);
        note_level(water, chainage_of(g, end.x), end.level);
    }
    water->tilt = water->set_up - water->set_down;
    note_nodes(g, piece, count, water);
    draw_dry(g, steady, piece[0].x);
    const drawn d = draw_water(g, piece, count, steady);
    pass_rows(g, march.x);
    const double scale = fmax(0.5 * d.moved, 1e-3 * d.area);
    water->volume_defect =
        pool->is_held ? 0.0 : fabs(march.volume - pool->volume) / scale;
    note_cross(g, piece, count, march.volume / d.area, steady);
    put_ends(g, piece[0].x, march.x, water);
    return LEE_OK;
}

/* The waters of the lake at rest. */
static void find_stills(gathering *g) {
    const lee_reach *reach = &g->pools->reach;
    for (size_t i = 0; i < reach->n; i++) {
        const lee_cover s = lee_leg_still(&reach->leg[i]);
        still_water *last = g->stills > 0 ? &g->still[g->stills - 1] : NULL;
        if (!(s.to > s.from)) {
            continue;
        }
        if (last != NULL && s.from <= last->to && reach->leg[i].bed < 0.0) {
            last->to = s.to;
        } else {
            g->still[g->stills++] =
                (still_water){.from = s.from, .to = s.to, .period = NAN};
        }
    }
}

/* Length of axis that a water shares with a still water. */
static double shared(const gathering *g, const still_water *still,
                     const lee_steady_water *water) {
    const double a = chainage_of(g, still->from);
    const double b = chainage_of(g, still->to);
    return fmin(water->to, fmax(a, b)) - fmax(water->from, fmin(a, b));
}

/* Notes on each still water which waters are left of it, and the axis of it
 * that is dry. */
static void note_remains(gathering *g, lee_steady *steady) {
    for (size_t i = 0; i < g->stills; i++) {
        still_water *still = &g->still[i];
        double dry = still->to - still->from;
        for (size_t k = 0; k < steady->count; k++) {
            const double cover = shared(g, still, &steady->water[k]);
            still->waters += cover > 0.0;
            dry -= fmax(0.0, cover);
        }
        steady->dry_length += fmax(0.0, dry);
    }
}

/* The still water of which a water covers most; NULL for none. */
static still_water *still_of(const gathering *g,
                             const lee_steady_water *water) {
    still_water *best = NULL;
    double most = 0.0;
    for (size_t i = 0; i < g->stills; i++) {
        const double cover = shared(g, &g->still[i], water);
        if (cover > most) {
            most = cover;
            best = &g->still[i];
        }
    }
    return best;
}

/* First period of a still water, reckoned once. */
static lee_status period_of(const gathering *g, still_water *still,
                            lee_error *error) {
    const lee_steady_input *in = g->in;
    if (!isnan(still->period)) {
        return LEE_OK;
    }
    return lee_first_period(in->profile, in->still_water,
                            chainage_of(g, 0.5 * (still->from + still->to)),
                            in->gravity, !isnan(in->start_level),
                            !isnan(in->end_level), &still->period, error);
}

/* What the waters share with the lake at rest. */
static lee_status compare_with_rest(gathering *g, lee_steady *steady,
                                    lee_error *error) {
    note_remains(g, steady);
    for (size_t i = 0; i < steady->count; i++) {
        lee_steady_water *water = &steady->water[i];
        still_water *still = still_of(g, water);
        water->first_period = NAN;
        if (still == NULL) {
            continue;
        }
        const lee_status status = period_of(g, still, error);
        if (status != LEE_OK) {
            return status;
        }
        water->was_parted = still->waters > 1;
        water->first_period = still->period;
    }
    return LEE_OK;
}

static void reverse(size_t n, double values[]) {
    for (size_t i = 0; i < n / 2; i++) {
        const double kept = values[i];
        values[i] = values[n - 1 - i];
        values[n - 1 - i] = kept;
    }
}

/* Turns what a mirrored axis gave to growing chainage. */
static void turn_back(lee_steady *steady) {
    const size_t count = steady->count;
    reverse(steady->n, steady->x);
    reverse(steady->n, steady->level);
    for (size_t i = 0; i < count / 2; i++) {
        const lee_steady_water kept = steady->water[i];
        steady->water[i] = steady->water[count - 1 - i];
        steady->water[count - 1 - i] = kept;
    }
    for (size_t i = 0; i < count; i++) {
        reverse(steady->water[i].node_count, steady->water[i].node);
    }
}

/* Mean of the projected stress over the lake, as a share of the stress. */
static double along_of(const lee_steady_input *in, const lee_pools *pools,
                       bool is_mirrored) {
    const double full = in->return_flow * hypot(in->stress[0], in->stress[1]) /
                        (in->water_density * in->gravity);
    const double mean = mean_drive(&pools->reach);
    return full > 0.0 ? (is_mirrored ? -mean : mean) / full : 0.0;
}

static lee_status make_room(gathering *g, lee_steady *steady,
                            lee_error *error) {
    const size_t n = g->pools->reach.n;
    const size_t pieces = 2 * (n + g->pools->count);
    g->step = (size_t)fmin(fmax(drawn_points / (double)n, 4.0), 64.0);
    const size_t points = pieces * g->step + n + 1 + 2 * g->pools->count;
    g->piece = calloc(pieces, sizeof *g->piece);
    g->still = calloc(n, sizeof *g->still);
    steady->water = calloc(g->pools->count, sizeof *steady->water);
    steady->x = calloc(points, sizeof *steady->x);
    steady->level = calloc(points, sizeof *steady->level);
    if (g->piece == NULL || g->still == NULL || steady->water == NULL ||
        steady->x == NULL || steady->level == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY,
                        "no room for a surface of %zu points", points);
    }
    return LEE_OK;
}

static lee_status gather(gathering *g, lee_steady *steady, lee_error *error) {
    lee_status status = make_room(g, steady, error);
    steady->cross_tilt_at = NAN;
    for (size_t i = 0; i < g->pools->count && status == LEE_OK; i++) {
        if (g->pools->pool[i].volume > 0.0) {
            status = tell_water(g, &g->pools->pool[i], steady, error);
        }
    }
    if (status != LEE_OK) {
        return status;
    }
    draw_dry(g, steady, INFINITY);
    find_stills(g);
    status = compare_with_rest(g, steady, error);
    steady->has_sill = g->pools->has_sill;
    steady->along = along_of(g->in, g->pools, g->is_mirrored);
    if (g->is_mirrored) {
        turn_back(steady);
    }
    return status;
}

lee_status lee_steady_solve(const lee_steady_input *input, lee_steady *steady,
                            lee_error *error) {
    *steady = (lee_steady){0};
    lee_status status = check_input(input, error);
    if (status != LEE_OK) {
        return status;
    }
    lee_pools pools = {0};
    gathering g = {.in = input, .pools = &pools};
    status = lee_pools_init(&pools, input->profile->n - 1, error);
    if (status == LEE_OK) {
        status = solve_axis(input, &pools, &g.is_mirrored, error);
    }
    if (status == LEE_OK) {
        status = gather(&g, steady, error);
    }
    free(g.piece);
    free(g.still);
    lee_pools_free(&pools);
    if (status != LEE_OK) {
        lee_steady_free(steady);
    }
    return status;
}

void lee_steady_free(lee_steady *steady) {
    for (size_t i = 0; i < steady->count; i++) {
        free(steady->water[i].node);
    }
    free(steady->water);
    free(steady->x);
    free(steady->level);
    *steady = (lee_steady){0};
}

double lee_steady_level_at(const lee_steady *steady, double x) {
    for (size_t i = 0; i + 1 < steady->n; i++) {
        const double x0 = steady->x[i];
        const double x1 = steady->x[i + 1];
        if (!(x >= x0 && x <= x1) || isnan(steady->level[i]) ||
            isnan(steady->level[i + 1])) {
            continue;
        }
        const double share = x1 > x0 ? (x - x0) / (x1 - x0) : 0.0;
        return steady->level[i] +
               share * (steady->level[i + 1] - steady->level[i]);
    }
    return NAN;
}
