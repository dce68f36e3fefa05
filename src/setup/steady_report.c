/* steady_report.c - what a settled lake tells: waters, nodes, surface. */
#include "setup/steady_report.h"

#include <assert.h>
#include <math.h>
#include <stdlib.h>

/* About how many points draw the surface, how many a piece at least and at
 * most, and how far the depth may change between two, in e-foldings. */
static const double drawn_points = 400.0;
static const double least_points = 4.0;
static const double most_points = 256.0;
static const double drawn_fold = 0.1;

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
    lee_surface *surface;
    size_t *first; /* [pools->count + 1] first piece of each water told */
    size_t stills;
    still_water *still;
    size_t row; /* first profile row not drawn yet */
} gathering;

/* Chainage of the solver's x, on the axis to the last digit. */
static double chainage_of(const gathering *g, double x) {
    const lee_profile *p = g->in->profile;
    const double first = p->chainage[0];
    const double last = p->chainage[p->n - 1];
    return g->is_mirrored ? fmax(last - x, first) : fmin(first + x, last);
}

static void keep_piece(void *user, const lee_piece *piece) {
    gathering *g = user;
    g->surface->piece[g->surface->pieces++] = *piece;
}

/* Points that draw a piece. */
static size_t points_of(const gathering *g, const lee_piece *piece) {
    const double even = drawn_points / (double)g->pools->reach.n;
    const double folds =
        piece->is_curved ? fabs(piece->slope * piece->span) : 0.0;
    const double points = fmax(even, ceil(folds / drawn_fold));
    return (size_t)fmin(fmax(points, least_points), most_points);
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
    for (size_t i = 0; i < count; i++) {
        const size_t k = points_of(g, &piece[i]);
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
    for (size_t i = 0; i < count; i++) {
        const size_t k = points_of(g, &piece[i]);
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

/* Levels and nodes of one water; a puddle is passed over. */
static lee_status tell_water(gathering *g, const lee_pool *pool,
                             lee_steady *steady, lee_error *error) {
    const size_t first = g->surface->pieces;
    const lee_room room = lee_pools_room(g->pools, pool);
    const lee_march march =
        lee_march_through(&g->pools->reach, &room, pool->start, keep_piece, g);
    const size_t count = g->surface->pieces - first;
    const lee_piece *piece = &g->surface->piece[first];
    if (count == 0 || deepest_of(piece, count) < g->in->dry_depth) {
        g->surface->pieces = first;
        return LEE_OK;
    }
    lee_steady_water *water = &steady->water[steady->count++];
    *water = (lee_steady_water){
        .set_up = NAN, .set_down = NAN, .volume = march.volume};
    g->first[steady->count] = g->surface->pieces;
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
    water->volume_defect =
        pool->is_held ? 0.0 : fabs(march.volume - pool->volume);
    note_nodes(g, piece, count, water);
    put_ends(g, piece[0].x, march.x, water);
    return LEE_OK;
}

/* Draws the surface, water by water in the order of the solver's x. */
static lee_status draw_surface(gathering *g, lee_steady *steady,
                               lee_error *error) {
    const lee_surface *surface = g->surface;
    size_t points = g->pools->reach.n + 1 + 2 * steady->count;
    for (size_t i = 0; i < surface->pieces; i++) {
        points += points_of(g, &surface->piece[i]);
    }
    steady->x = calloc(points, sizeof *steady->x);
    steady->level = calloc(points, sizeof *steady->level);
    if (steady->x == NULL || steady->level == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY,
                        "no room for a surface of %zu points", points);
    }
    for (size_t i = 0; i < steady->count; i++) {
        lee_steady_water *water = &steady->water[i];
        const lee_piece *piece = &surface->piece[g->first[i]];
        const size_t count = g->first[i + 1] - g->first[i];
        draw_dry(g, steady, piece[0].x);
        const drawn d = draw_water(g, piece, count, steady);
        pass_rows(g, d.last.x);
        water->volume_defect /= fmax(0.5 * d.moved, 1e-3 * d.area);
        note_cross(g, piece, count, water->volume / d.area, steady);
    }
    draw_dry(g, steady, INFINITY);
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
    const lee_period_input input = {
        .profile = in->profile,
        .level = in->still_water,
        .x = chainage_of(g, 0.5 * (still->from + still->to)),
        .gravity = in->gravity,
        .start_held = !isnan(in->start_level),
        .end_held = !isnan(in->end_level),
    };
    return lee_first_period(&input, &still->period, error);
}

/* A place on the axis and its bed. */
typedef struct bed_spot {
    double x;
    double bed;
} bed_spot;

/* Lowest (sign -1) or highest (1) bed from one chainage to another. */
static bed_spot extreme_bed(const lee_profile *p, double from, double to,
                            double sign) {
    bed_spot best = {from, lee_profile_bed(p, from)};
    const double end = lee_profile_bed(p, to);
    if (sign * end > sign * best.bed) {
        best = (bed_spot){to, end};
    }
    for (size_t i = 0; i < p->n; i++) {
        if (p->chainage[i] > from && p->chainage[i] < to &&
            sign * p->bed[i] > sign * best.bed) {
            best = (bed_spot){p->chainage[i], p->bed[i]};
        }
    }
    return best;
}

double lee_steady_crest(const lee_profile *profile, const lee_steady_water *a,
                        const lee_steady_water *b) {
    const double rounding = 1e-9; /* m */
    const lee_steady_water *left = a->from < b->from ? a : b;
    const lee_steady_water *right = left == a ? b : a;
    const double low = fmax(extreme_bed(profile, a->from, a->to, -1.0).bed,
                            extreme_bed(profile, b->from, b->to, -1.0).bed);
    const bed_spot top = extreme_bed(profile, left->to, right->from, 1.0);
    return top.bed > low + rounding ? top.x : NAN;
}

/* Notes neighbours that were one water at rest, or of which one was none. */
static void note_partings(const gathering *g, lee_steady *steady) {
    for (size_t i = 1; i < steady->count; i++) {
        const lee_steady_water *a = &steady->water[i - 1];
        const lee_steady_water *b = &steady->water[i];
        const still_water *one = still_of(g, a);
        const still_water *other = still_of(g, b);
        const bool has_new = one == NULL || other == NULL;
        if (has_new ? steady->count <= g->stills : one != other) {
            continue; /* apart at rest too, maybe elsewhere */
        }
        const bool has_crest = !isnan(lee_steady_crest(g->in->profile, a, b));
        steady->is_parted = steady->is_parted || !has_crest;
        steady->has_sill = steady->has_sill || (has_crest && one == other);
    }
}

/* Notes waters that joined or went over land. Less than a billionth of the
 * lake that spills is a puddle. */
static void note_joinings(const gathering *g, lee_steady *steady) {
    const lee_profile *p = g->in->profile;
    const double touch = 1e-9 * (p->chainage[p->n - 1] - p->chainage[0]);
    for (size_t i = 0; i < steady->count; i++) {
        size_t stills = 0;
        for (size_t k = 0; k < g->stills; k++) {
            stills += shared(g, &g->still[k], &steady->water[i]) > touch;
        }
        steady->has_sill = steady->has_sill || stills > 1;
    }
    if (g->pools->spilled > 1e-9 * g->pools->volume) {
        steady->has_sill = true;
    }
}

/* What the waters share with the lake at rest. */
static lee_status compare_with_rest(gathering *g, lee_steady *steady,
                                    lee_error *error) {
    note_remains(g, steady);
    note_partings(g, steady);
    note_joinings(g, steady);
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

static lee_status make_room(gathering *g, lee_steady *steady,
                            lee_error *error) {
    const lee_profile *p = g->in->profile;
    const size_t n = g->pools->reach.n;
    const size_t count = g->pools->count;
    g->first = calloc(count + 1, sizeof *g->first);
    g->still = calloc(n, sizeof *g->still);
    steady->water = calloc(count, sizeof *steady->water);
    steady->surface = calloc(1, sizeof *steady->surface);
    if (steady->surface != NULL) {
        g->surface = steady->surface;
        *g->surface = (lee_surface){
            .origin = p->chainage[g->is_mirrored ? n : 0],
            .sense = g->is_mirrored ? -1.0 : 1.0,
            .still_water = g->in->still_water,
            .piece = calloc(2 * (n + count), sizeof *g->surface->piece),
        };
    }
    if (g->first == NULL || g->still == NULL || steady->water == NULL ||
        g->surface == NULL || g->surface->piece == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu waters", count);
    }
    return LEE_OK;
}

static lee_status gather(gathering *g, lee_steady *steady, lee_error *error) {
    lee_status status = make_room(g, steady, error);
    assert(status != LEE_OK || (g->surface != NULL && g->still != NULL));
    if (status != LEE_OK) {
        return status;
    }
    find_stills(g);
    steady->cross_tilt_at = NAN;
    for (size_t i = 0; i < g->pools->count && status == LEE_OK; i++) {
        if (g->pools->pool[i].volume > 0.0) {
            status = tell_water(g, &g->pools->pool[i], steady, error);
        }
    }
    if (status == LEE_OK) {
        status = draw_surface(g, steady, error);
    }
    if (status == LEE_OK) {
        status = compare_with_rest(g, steady, error);
    }
    if (status == LEE_OK && g->is_mirrored) {
        turn_back(steady);
    }
    return status;
}

lee_status lee_steady_report(const lee_steady_input *input,
                             const lee_pools *pools, bool is_mirrored,
                             lee_steady *steady, lee_error *error) {
    gathering g = {.in = input, .pools = pools, .is_mirrored = is_mirrored};
    const lee_status status = gather(&g, steady, error);
    free(g.first);
    free(g.still);
    return status;
}

void lee_steady_free(lee_steady *steady) {
    for (size_t i = 0; i < steady->count; i++) {
        free(steady->water[i].node);
    }
    free(steady->water);
    free(steady->x);
    free(steady->level);
    if (steady->surface != NULL) {
        free(steady->surface->piece);
    }
    free(steady->surface);
    *steady = (lee_steady){0};
}

/* Last piece that begins at or before x. */
static const lee_piece *piece_at(const lee_surface *surface, double x) {
    size_t low = 0;
    size_t high = surface->pieces;
    while (high - low > 1) {
        const size_t middle = low + (high - low) / 2;
        if (surface->piece[middle].x <= x) {
            low = middle;
        } else {
            high = middle;
        }
    }
    return &surface->piece[low];
}

double lee_steady_level_at(const lee_steady *steady, double x) {
    const lee_surface *surface = steady->surface;
    if (surface == NULL || surface->pieces == 0 || isnan(x)) {
        return NAN;
    }
    const double at = (x - surface->origin) * surface->sense;
    const lee_piece *piece = piece_at(surface, at);
    const double rounding = 1e-12 * (fabs(x) + fabs(surface->origin));
    const double distance = at - piece->x;
    const double length = lee_piece_at(piece, 1.0).x - piece->x;
    if (!(distance >= -rounding && distance <= length + rounding)) {
        return NAN;
    }
    return surface->still_water +
           lee_piece_level(piece, fmin(fmax(distance, 0.0), length));
}

/* Level of a piece at the solver's x, kept on the piece. */
static double piece_level_near(const lee_piece *piece, double x) {
    const double length = lee_piece_at(piece, 1.0).x - piece->x;
    return lee_piece_level(piece, fmin(fmax(x - piece->x, 0.0), length));
}

lee_level_extremes lee_steady_extremes(const lee_steady *steady, double from,
                                       double to) {
    lee_level_extremes all = {NAN, NAN};
    const lee_surface *surface = steady->surface;
    if (surface == NULL) {
        return all;
    }
    const double a = (from - surface->origin) * surface->sense;
    const double b = (to - surface->origin) * surface->sense;
    for (size_t i = 0; i < surface->pieces; i++) {
        const lee_piece *piece = &surface->piece[i];
        if (!(piece->x <= fmax(a, b)) ||
            !(lee_piece_at(piece, 1.0).x >= fmin(a, b))) {
            continue;
        }
        /* along a piece the level only rises or only falls */
        const double one =
            surface->still_water + piece_level_near(piece, fmin(a, b));
        const double other =
            surface->still_water + piece_level_near(piece, fmax(a, b));
        all.lowest = fmin(all.lowest, fmin(one, other));
        all.highest = fmax(all.highest, fmax(one, other));
    }
    return all;
}
