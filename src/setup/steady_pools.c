/* steady_pools.c - waters that part, spill and join as the wind grows. */
#include "setup/steady_pools.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

lee_status lee_pools_init(lee_pools *pools, size_t n, lee_error *error) {
    *pools = (lee_pools){
        .reach = {.n = n, .leg = calloc(n, sizeof *pools->reach.leg)},
        .start_level = NAN,
        .crest = calloc(n + 2, sizeof *pools->crest),
        .sink = calloc(n + 1, sizeof *pools->sink),
        .pool = calloc(n + 1, sizeof *pools->pool),
        .kept = calloc(n + 1, sizeof *pools->kept),
    };
    if (pools->reach.leg == NULL || pools->crest == NULL ||
        pools->sink == NULL || pools->pool == NULL || pools->kept == NULL) {
        lee_pools_free(pools);
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu segments", n);
    }
    return LEE_OK;
}

void lee_pools_free(lee_pools *pools) {
    free(pools->reach.leg);
    free(pools->crest);
    free(pools->sink);
    free(pools->pool);
    free(pools->kept);
    *pools = (lee_pools){0};
}

lee_room lee_pools_room(const lee_pools *pools, const lee_pool *pool) {
    return (lee_room){
        .left = pools->crest[pool->first],
        .right = pools->crest[pool->last + 1],
        .first_sink = pools->sink[pool->first],
        .last_sink = pools->sink[pool->last],
    };
}

/* Puts every leg under a share of the wind and finds the catchments. */
static void cut_catchments(lee_pools *pools, double share) {
    const size_t n = pools->reach.n;
    lee_leg *leg = pools->reach.leg;
    int way = 1;
    for (size_t i = 0; i < n; i++) {
        lee_leg_blow(&leg[i], share);
        way = leg[i].way != 0 ? leg[i].way : way; /* level ground: as before */
        leg[i].way = way;
    }
    size_t k = 0;
    size_t i = 0;
    do {
        pools->crest[k] = i;
        while (i < n && leg[i].way > 0) {
            i++;
        }
        pools->sink[k] = i;
        while (i < n && leg[i].way < 0) {
            i++;
        }
        k++;
    } while (i < n);
    pools->crest[k] = n;
    pools->catchments = k;
}

/* Catchment that holds a row; of two that share it the left or the right. */
static size_t catchment_of(const lee_pools *pools, size_t row, bool wants_right,
                           size_t from) {
    size_t j = from;
    while (j + 1 < pools->catchments &&
           (row > pools->crest[j + 1] ||
            (wants_right && row == pools->crest[j + 1]))) {
        j++;
    }
    return j;
}

static void append(lee_pools *pools, lee_pool pool) {
    pools->pool[pools->count++] = pool;
}

/* Dry hollows for the catchments from `next` up to `end`. */
static void append_hollows(lee_pools *pools, size_t next, size_t end) {
    for (size_t j = next; j < end; j++) {
        append(pools, (lee_pool){.first = j, .last = j, .is_settled = true});
    }
}

/* Adds b to a: one water from now on. */
static void absorb(lee_pool *a, const lee_pool *b) {
    a->last = b->last > a->last ? b->last : a->last;
    a->volume += b->volume;
    a->is_held = a->is_held || b->is_held;
    a->is_full_right = b->is_full_right;
    a->is_settled = false;
}

/* A start that means the same whatever the room: a depth, or minus the row of
 * the dry edge. */
static double free_of_room(const lee_pools *pools, const lee_pool *pool) {
    const double left = (double)pools->crest[pool->first];
    return pool->start > 0.0 ? pool->start : pool->start - left;
}

static double within_room(const lee_pools *pools, const lee_pool *pool) {
    const double left = (double)pools->crest[pool->first];
    if (pool->start > 0.0) {
        return left > 0.0 ? 0.0 : pool->start;
    }
    return fmin(0.0, pool->start + left);
}

/* Adds a water to the new list, after the hollows before it; what overlaps
 * the last one joins it. */
static void append_water(lee_pools *pools, lee_pool p) {
    lee_pool *last = pools->count > 0 ? &pools->pool[pools->count - 1] : NULL;
    const size_t next = last != NULL ? last->last + 1 : 0;
    if (p.first < next) {
        absorb(last, &p);
        return;
    }
    append_hollows(pools, next, p.first);
    p.start = within_room(pools, &p);
    append(pools, p);
}

static double bed_at_row(const lee_pools *pools, size_t row) {
    const size_t n = pools->reach.n;
    const lee_leg *leg = &pools->reach.leg[row < n ? row : n - 1];
    return row < n ? leg->bed : leg->bed + leg->slope * leg->length;
}

/* Whether the bed between two rows rises above both and above the water at
 * rest. */
static bool has_land_between(const lee_pools *pools, size_t from, size_t to) {
    double top = -INFINITY;
    for (size_t row = from; row <= to; row++) {
        top = fmax(top, bed_at_row(pools, row));
    }
    return top >= 0.0 && top > bed_at_row(pools, from) &&
           top > bed_at_row(pools, to);
}

/* Takes the pools over into the catchments of a new wind: each water goes
 * where thin water at its old sinks would run. */
static void carry_over(lee_pools *pools, double share) {
    size_t kept = 0;
    for (size_t i = 0; i < pools->count; i++) {
        const lee_room room = lee_pools_room(pools, &pools->pool[i]);
        lee_pool p = pools->pool[i];
        p.start = free_of_room(pools, &p);
        p.first = room.first_sink;
        p.last = room.last_sink;
        p.is_full_left = false;
        p.is_full_right = false;
        p.is_settled = false;
        if (p.volume > 0.0) {
            pools->kept[kept++] = p;
        }
    }
    cut_catchments(pools, share);
    pools->count = 0;
    size_t from = 0;
    for (size_t i = 0; i < kept; i++) {
        lee_pool p = pools->kept[i];
        const size_t last_row = p.last;
        p.first = p.is_held ? 0 : catchment_of(pools, p.first, false, from);
        p.last = catchment_of(pools, last_row, true, p.first);
        from = p.first;
        const size_t before = pools->count;
        append_water(pools, p);
        if (pools->count == before &&
            has_land_between(pools, pools->kept[i - 1].last,
                             pools->kept[i].first)) {
            pools->spilled += fmin(pools->kept[i - 1].volume, p.volume);
        }
    }
    const size_t next =
        pools->count > 0 ? pools->pool[pools->count - 1].last + 1 : 0;
    append_hollows(pools, next, pools->catchments);
}

static void join(lee_pools *pools, size_t i) {
    absorb(&pools->pool[i], &pools->pool[i + 1]);
    memmove(&pools->pool[i + 1], &pools->pool[i + 2],
            (pools->count - i - 2) * sizeof *pools->pool);
    pools->count--;
}

/* Parts pool i behind catchment `last`, leaving it `volume`; of a boundless
 * water both parts are boundless. */
static void part(lee_pools *pools, size_t i, size_t last, double volume) {
    memmove(&pools->pool[i + 1], &pools->pool[i],
            (pools->count - i) * sizeof *pools->pool);
    pools->count++;
    lee_pool *left = &pools->pool[i];
    lee_pool *right = &pools->pool[i + 1];
    const bool is_boundless = isinf(left->volume);
    right->is_held = false;
    right->volume = is_boundless ? INFINITY : left->volume - volume;
    right->first = last + 1;
    right->start = 0.0;
    right->is_full_left = false;
    right->is_settled = false;
    left->volume = is_boundless ? INFINITY : volume;
    left->last = last;
    left->is_full_right = false;
    left->is_settled = false;
    pools->partings++;
}

/* Catchment of a pool on whose lee shore a march stopped short. */
static size_t stopped_in(const lee_pools *pools, const lee_pool *pool,
                         size_t leg) {
    size_t j = pool->first;
    while (j < pool->last && leg >= pools->crest[j + 1]) {
        j++;
    }
    return j;
}

/* Sums the volume left of a place. */
typedef struct left_part {
    double x;
    double volume;
} left_part;

static void add_left(void *user, const lee_piece *piece) {
    left_part *part_of = user;
    if (piece->x < part_of->x) {
        part_of->volume += lee_piece_volume(piece);
    }
}

/* A crest within pool i fell dry. The side that spills over it is full to the
 * crest, the other has the rest; where the wind draws the water apart both
 * keep their shares. */
static void part_at_crest(lee_pools *pools, size_t i, const lee_fit *fit) {
    const lee_pool *pool = &pools->pool[i];
    const size_t last = stopped_in(pools, pool, fit->leg);
    const lee_leg *after = &pools->reach.leg[pools->crest[last + 1]];
    const lee_leg *before = after - 1;
    const lee_room room = lee_pools_room(pools, pool);
    left_part left = {.x = after->x};
    const lee_march whole =
        lee_march_through(&pools->reach, &room, fit->start, add_left, &left);
    double volume = left.volume;
    if (before->drive < 0.0 && after->drive > 0.0) {
        volume = pool->volume * (left.volume / whole.volume);
    } else if (before->drive < 0.0 || after->drive < 0.0) {
        volume = pool->volume - (whole.volume - left.volume);
    }
    part(pools, i, last, fmin(fmax(volume, 0.0), pool->volume));
}

/* Lowest bed of a pool's catchments. */
static double lowest_of(const lee_pools *pools, const lee_pool *pool) {
    const size_t last = pools->crest[pool->last + 1];
    double lowest = INFINITY;
    for (size_t row = pools->crest[pool->first]; row <= last; row++) {
        lowest = fmin(lowest, bed_at_row(pools, row));
    }
    return lowest;
}

/* Whether land at rest lies between a pool and the next: a crest of the bed,
 * not only the foot of a gentle slope up which thin water runs. */
static bool is_over_land(const lee_pools *pools, const lee_pool *left) {
    const double crest = bed_at_row(pools, pools->crest[left->last + 1]);
    return crest >= 0.0 && crest > lowest_of(pools, left) &&
           crest > lowest_of(pools, left + 1);
}

/* Moves what pool i holds too much to its neighbour. */
static void spill(lee_pools *pools, size_t i, bool goes_right,
                  const lee_fit *fit) {
    lee_pool *pool = &pools->pool[i];
    lee_pool *next = goes_right ? pool + 1 : pool - 1;
    if (goes_right ? next->is_full_left : next->is_full_right) {
        join(pools, goes_right ? i : i - 1);
        return;
    }
    if (isfinite(pool->volume)) {
        next->volume += pool->volume - fit->volume;
        next->is_settled = next->is_held;
        if (is_over_land(pools, goes_right ? pool : next)) {
            pools->spilled += pool->volume - fit->volume;
        }
    }
    pool->volume = fit->volume;
    pool->start = fit->start;
    pool->is_full_right = pool->is_full_right || goes_right;
    pool->is_full_left = pool->is_full_left || !goes_right;
    pool->is_settled = true;
}

/* The water with a held end goes as far as it goes. */
static void settle_held(lee_pools *pools, size_t i) {
    lee_pool *pool = &pools->pool[i];
    const lee_room room = lee_pools_room(pools, pool);
    pool->start = pools->start_level - pools->reach.leg[0].bed;
    const lee_march march =
        lee_march_through(&pools->reach, &room, pool->start, NULL, NULL);
    switch (march.end) {
    case LEE_MARCH_INSIDE:
        pool->is_settled = true;
        break;
    case LEE_MARCH_OVER:
        join(pools, i);
        break;
    case LEE_MARCH_SHORT:
        part(pools, i, stopped_in(pools, pool, march.leg), INFINITY);
        break;
    }
}

/* Plan area of a room, for a first guess. */
static double room_area(const lee_pools *pools, const lee_room *room) {
    double area = 0.0;
    for (size_t i = room->left; i < room->right; i++) {
        const lee_leg *leg = &pools->reach.leg[i];
        area += leg->length * (leg->width + 0.5 * leg->widening * leg->length);
    }
    return area;
}

/* Puddles of a billionth of the lake may miss what they like. */
static void note_miss(lee_pools *pools, double miss, double volume) {
    if (volume > 1e-9 * pools->volume) {
        pools->miss = fmax(pools->miss, miss / volume);
    }
}

static void settle_one(lee_pools *pools, size_t i) {
    lee_pool *pool = &pools->pool[i];
    if (pool->is_held) {
        settle_held(pools, i);
        return;
    }
    const lee_room room = lee_pools_room(pools, pool);
    lee_fit fit;
    lee_march_fit(&pools->reach, &room, pool->volume, pool->start,
                  room_area(pools, &room), &fit);
    switch (fit.kind) {
    case LEE_FIT_INSIDE:
        note_miss(pools, fabs(fit.volume - pool->volume), pool->volume);
        pool->start = fit.start;
        pool->is_settled = true;
        break;
    case LEE_FIT_SHORT:
        part_at_crest(pools, i, &fit);
        break;
    case LEE_FIT_OVER_LEFT:
        spill(pools, i, false, &fit);
        break;
    case LEE_FIT_OVER_RIGHT:
        spill(pools, i, true, &fit);
        break;
    }
}

/* First pool that holds water and is not settled; count when all are. */
static size_t next_unsettled(const lee_pools *pools) {
    size_t i = 0;
    while (i < pools->count &&
           (pools->pool[i].is_settled || !(pools->pool[i].volume > 0.0))) {
        i++;
    }
    return i;
}

static lee_status settle(lee_pools *pools, lee_error *error) {
    const size_t most = 200 + 60 * pools->catchments;
    for (size_t k = 0; k < most; k++) {
        const size_t i = next_unsettled(pools);
        if (i == pools->count) {
            return LEE_OK;
        }
        settle_one(pools, i);
    }
    return lee_fail(error, LEE_ERR_CONVERGENCE,
                    "waters over sills still part and join after %zu changes",
                    most);
}

/* Start of still water in the room of a pool: depth at its left wall or the
 * shore left of its first sink. */
static double still_start(const lee_pools *pools, const lee_room *room) {
    const lee_leg *leg = pools->reach.leg;
    if (room->left == 0 && leg[0].bed < 0.0) {
        return -leg[0].bed;
    }
    size_t i = room->left;
    while (i < room->first_sink &&
           leg[i].bed + leg[i].slope * leg[i].length >= 0.0) {
        i++;
    }
    const double share = -leg[i].bed / (leg[i].slope * leg[i].length);
    return -((double)(i - room->left) + fmax(0.0, share));
}

/* One pool a connected still water, one hollow a dry catchment. */
static void group_still_waters(lee_pools *pools) {
    pools->count = 0;
    for (size_t j = 0; j < pools->catchments; j++) {
        const bool is_held = j == 0 && !isnan(pools->start_level);
        const bool is_wet = is_held || bed_at_row(pools, pools->sink[j]) < 0.0;
        lee_pool *before = j > 0 ? &pools->pool[pools->count - 1] : NULL;
        if (before != NULL && before->volume > 0.0 &&
            bed_at_row(pools, pools->crest[j]) < 0.0) {
            before->last = j;
            continue;
        }
        append(pools, (lee_pool){.first = j,
                                 .last = j,
                                 .volume = is_held  ? INFINITY
                                           : is_wet ? 1.0
                                                    : 0.0,
                                 .is_held = is_held,
                                 .is_settled = !is_held});
    }
}

lee_status lee_pools_rest(lee_pools *pools, lee_error *error) {
    cut_catchments(pools, 0.0);
    group_still_waters(pools);
    pools->volume = 0.0;
    for (size_t i = 0; i < pools->count; i++) {
        lee_pool *pool = &pools->pool[i];
        if (pool->volume > 0.0 && !pool->is_held) {
            const lee_room room = lee_pools_room(pools, pool);
            pool->start = still_start(pools, &room);
            pool->volume =
                lee_march_through(&pools->reach, &room, pool->start, NULL, NULL)
                    .volume;
            pools->volume += pool->volume;
        }
    }
    return settle(pools, error);
}

/* Whether the wind blows one way along the whole axis. */
static bool is_one_way(const lee_pools *pools) {
    bool has_with = false;
    bool has_against = false;
    for (size_t i = 0; i < pools->reach.n; i++) {
        has_with = has_with || pools->reach.leg[i].full > 0.0;
        has_against = has_against || pools->reach.leg[i].full < 0.0;
    }
    return !(has_with && has_against);
}

/* Takes the pools from one share of the wind to another. Where winds of two
 * ways draw a water apart, how it parts depends on when: the step is halved
 * until the parting is known to a thousandth of the wind. */
static lee_status grow(lee_pools *pools, double from, double to,
                       lee_error *error) {
    static const double least_step = 1e-3;
    const size_t count = pools->count;
    const size_t partings = pools->partings;
    const double spilled = pools->spilled;
    lee_pool *saved = calloc(count > 0 ? count : 1, sizeof *saved);
    if (saved == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu pools", count);
    }
    memcpy(saved, pools->pool, count * sizeof *saved);
    carry_over(pools, to);
    lee_status status = settle(pools, error);
    if (status == LEE_OK && pools->partings > partings &&
        to - from > least_step) {
        cut_catchments(pools, from);
        memcpy(pools->pool, saved, count * sizeof *saved);
        pools->count = count;
        pools->partings = partings;
        pools->spilled = spilled;
        status = grow(pools, from, 0.5 * (from + to), error);
        if (status == LEE_OK) {
            status = grow(pools, 0.5 * (from + to), to, error);
        }
    }
    free(saved);
    return status;
}

lee_status lee_pools_blow(lee_pools *pools, lee_error *error) {
    if (is_one_way(pools)) {
        /* Crests only let more through as such a wind grows: the last state
         * does not depend on those before. */
        carry_over(pools, 1.0);
        return settle(pools, error);
    }
    enum { STEPS = 16 };
    lee_status status = LEE_OK;
    for (int k = 0; k < STEPS && status == LEE_OK; k++) {
        status = grow(pools, (double)k / STEPS, (k + 1.0) / STEPS, error);
    }
    return status;
}
