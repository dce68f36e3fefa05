/* join.c - several records made one. */
#include <math.h>
#include <stdlib.h>

#include "wind/columns.h"
#include "wind/spacing.h"

#include "leewater/calendar.h"
#include "leewater/wind.h"

/* Values this close are one value: room for the rounding of a conversion of
 * units and of single precision (6e-8), far below any instrument. */
static const double equal_share = 1e-6;

/* The two components, then the optional quantities in the order of
 * lee_wind_column. */
enum {
    EAST,
    NORTH,
    FIRST_OPTIONAL,
    OPTIONAL = LEE_WIND_COLUMNS - LEE_WIND_PRESSURE,
    COLUMNS = FIRST_OPTIONAL + OPTIONAL
};

/* A record on its way into the joined one. */
typedef struct source {
    const char *name;
    const lee_wind_record *record;
    const double *column[COLUMNS]; /* NULL when it has no such quantity */
    int64_t step;                  /* its usual one, s                  */
    size_t next;                   /* first sample not yet taken        */
} source;

typedef struct joining {
    size_t count;
    source *source; /* [count] none empty, by first time, then as given */
    size_t begin;   /* sources before it are spent                      */
    size_t end;     /* sources from it on begin later                   */
    lee_wind_record joined;
    double *column[COLUMNS]; /* of the joined record */
} joining;

static lee_wind_column optional_column(size_t index) {
    return (lee_wind_column)((size_t)LEE_WIND_PRESSURE + index);
}

static int64_t first_of(const source *one) {
    return one->record->time[0];
}

static int64_t last_of(const source *one) {
    return one->record->time[one->record->n - 1];
}

static void list_columns(lee_wind_record *record, double *column[COLUMNS]) {
    column[EAST] = record->east;
    column[NORTH] = record->north;
    for (size_t i = 0; i < OPTIONAL; i++) {
        column[FIRST_OPTIONAL + i] =
            *lee_wind_optional(record, optional_column(i));
    }
}

static lee_status open_source(const lee_wind_part *part, source *one,
                              lee_error *error) {
    lee_wind_record view = *part->record;
    double *column[COLUMNS];
    list_columns(&view, column);
    *one = (source){.name = part->name, .record = part->record};
    for (size_t i = 0; i < COLUMNS; i++) {
        one->column[i] = column[i];
    }
    return lee_wind_usual_step(part->record, &one->step, error);
}

/* Puts a source behind those that begin no later. */
static void put_in_order(joining *all, const source *one) {
    size_t place = all->count++;
    while (place > 0 && first_of(&all->source[place - 1]) > first_of(one)) {
        all->source[place] = all->source[place - 1];
        place--;
    }
    all->source[place] = *one;
}

static lee_status open_sources(joining *all, size_t count,
                               const lee_wind_part part[], lee_error *error) {
    all->source = calloc(count, sizeof *all->source);
    if (all->source == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu records",
                        count);
    }
    for (size_t i = 0; i < count; i++) {
        source one;
        const lee_status status = open_source(&part[i], &one, error);
        if (status != LEE_OK) {
            return status;
        }
        if (part[i].record->n > 0) {
            put_in_order(all, &one);
        }
    }
    return LEE_OK;
}

static const char *stamp_words(lee_stamp stamp) {
    switch (stamp) {
    case LEE_STAMP_INSTANT:
        return "instants";
    case LEE_STAMP_START:
        return "means stamped at their start";
    case LEE_STAMP_MIDDLE:
        return "means stamped at their middle";
    case LEE_STAMP_END:
        return "means stamped at their end";
    }
    return "";
}

/* Two records must hold the same kind of sample. */
static lee_status judge_kind(const source *a, const source *b,
                             lee_notes *remarks, lee_error *error) {
    const lee_stamp stamp = a->record->stamp;
    if (stamp != b->record->stamp) {
        return lee_fail(error, LEE_ERR_DATA,
                        "%s holds %s and %s %s: one record holds one kind",
                        a->name, stamp_words(stamp), b->name,
                        stamp_words(b->record->stamp));
    }
    if (a->step == b->step) {
        return LEE_OK;
    }
    if (stamp != LEE_STAMP_INSTANT) {
        return lee_fail(error, LEE_ERR_DATA,
                        "%s holds means over %.6g min and %s over %.6g min: "
                        "one record of means has one step",
                        a->name, (double)a->step / 60.0, b->name,
                        (double)b->step / 60.0);
    }
    return lee_notes_add(
        remarks, error, "usual steps differ: %.6g min in %s, %.6g min in %s",
        (double)a->step / 60.0, a->name, (double)b->step / 60.0, b->name);
}

static size_t first_not_before(const lee_wind_record *record, int64_t time) {
    size_t low = 0;
    size_t high = record->n;
    while (low < high) {
        const size_t middle = low + (high - low) / 2;
        if (record->time[middle] < time) {
            low = middle + 1;
        } else {
            high = middle;
        }
    }
    return low;
}

/* Times that both records have. */
static size_t count_shared(const lee_wind_record *a, const lee_wind_record *b,
                           int64_t from, int64_t to) {
    size_t i = first_not_before(a, from);
    size_t j = first_not_before(b, from);
    size_t shared = 0;
    while (i < a->n && j < b->n && a->time[i] <= to && b->time[j] <= to) {
        const int64_t left = a->time[i];
        const int64_t right = b->time[j];
        shared += left == right;
        i += left <= right;
        j += right <= left;
    }
    return shared;
}

static size_t count_within(const lee_wind_record *record, int64_t from,
                           int64_t to) {
    return first_not_before(record, to + 1) - first_not_before(record, from);
}

/* Where two records overlap, enough times must be the same to tell whether
 * they agree. A record inside a hole of the other is welcome. */
static lee_status judge_overlap(const source *a, const source *b,
                                lee_error *error) {
    const int64_t from = first_of(b);
    const int64_t to = last_of(a) < last_of(b) ? last_of(a) : last_of(b);
    const size_t in_a = count_within(a->record, from, to);
    const size_t in_b = count_within(b->record, from, to);
    const size_t fewer = in_a < in_b ? in_a : in_b;
    const size_t shared = count_shared(a->record, b->record, from, to);
    if (2 * shared >= fewer) {
        return LEE_OK;
    }
    char begin[LEE_TIME_TEXT];
    char end[LEE_TIME_TEXT];
    return lee_fail(error, LEE_ERR_DATA,
                    "%s and %s overlap from %s to %s, but only %zu of %zu "
                    "times are the same there: nothing tells whether they "
                    "agree",
                    a->name, b->name, lee_time_format(from, begin),
                    lee_time_format(to, end), shared, fewer);
}

static lee_status judge_kinds(const joining *all, lee_notes *remarks,
                              lee_error *error) {
    const source *before = all->source;
    lee_status status = LEE_OK;
    for (size_t i = 1; i < all->count && status == LEE_OK; i++) {
        const source *one = &all->source[i];
        const bool is_single = one->step == 0; /* and goes with any step */
        source known = *before;
        known.step = is_single || known.step == 0 ? one->step : known.step;
        status = judge_kind(&known, one, remarks, error);
        before = is_single ? before : one;
    }
    return status;
}

static lee_status judge_overlaps(const joining *all, lee_error *error) {
    const source *one = all->source;
    lee_status status = LEE_OK;
    for (size_t i = 0; i < all->count; i++) {
        for (size_t j = i + 1; j < all->count && status == LEE_OK &&
                               first_of(&one[j]) <= last_of(&one[i]);
             j++) {
            status = judge_overlap(&one[i], &one[j], error);
        }
    }
    return status;
}

/* Gives the joined record a quantity that any record has, and tells which
 * lack it. */
static lee_status make_optional(joining *all, size_t room, size_t index,
                                lee_notes *remarks, lee_error *error) {
    const char *without = NULL;
    size_t lacking = 0;
    for (size_t i = all->count; i-- > 0;) {
        if (all->source[i].column[FIRST_OPTIONAL + index] == NULL) {
            without = all->source[i].name;
            lacking++;
        }
    }
    if (lacking == all->count) {
        return LEE_OK;
    }
    const lee_wind_column column = optional_column(index);
    double **values = lee_wind_optional(&all->joined, column);
    *values = calloc(room + 1, sizeof **values);
    if (*values == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for %zu values", room);
    }
    if (lacking == 0) {
        return LEE_OK;
    }
    return lee_notes_add(remarks, error,
                         "%s: in %zu of the %zu files there is none, the first "
                         "of them %s; it is missing there",
                         lee_wind_column_name(column), lacking, all->count,
                         without);
}

static lee_status make_joined(joining *all, lee_notes *remarks,
                              lee_error *error) {
    size_t room = 0;
    for (size_t i = 0; i < all->count; i++) {
        room += all->source[i].record->n;
    }
    lee_status status = lee_wind_record_init(&all->joined, room, error);
    for (size_t i = 0; i < OPTIONAL && status == LEE_OK; i++) {
        status = make_optional(all, room, i, remarks, error);
    }
    if (status != LEE_OK) {
        return status;
    }
    list_columns(&all->joined, all->column);
    for (size_t i = 0; i < all->count; i++) {
        const lee_wind_record *record = all->source[i].record;
        all->joined.stamp = record->stamp;
        all->joined.duplicates += record->duplicates;
        all->joined.variable_calm += record->variable_calm;
        all->joined.variable_missing += record->variable_missing;
        all->joined.merged += record->merged;
        all->joined.completed += record->completed;
    }
    return LEE_OK;
}

static bool has_time(const source *one, int64_t time) {
    return one->next < one->record->n && one->record->time[one->next] == time;
}

static bool is_spent(const source *one) {
    return one->next == one->record->n;
}

/* The earliest time that is not yet taken, INT64_MAX when all are spent. */
static int64_t find_time(joining *all) {
    const source *one = all->source;
    int64_t time = INT64_MAX;
    while (all->begin < all->end && is_spent(&one[all->begin])) {
        all->begin++;
    }
    for (size_t i = all->begin; i < all->end; i++) {
        if (!is_spent(&one[i]) && one[i].record->time[one[i].next] < time) {
            time = one[i].record->time[one[i].next];
        }
    }
    while (all->end < all->count && first_of(&one[all->end]) <= time) {
        time = first_of(&one[all->end]);
        all->end++;
    }
    return time;
}

static bool is_same(double a, double b) {
    const double size = fmax(1.0, fmax(fabs(a), fabs(b)));
    return fabs(a - b) <= equal_share * size;
}

static lee_status refuse_values(const source *a, const source *b, int64_t time,
                                size_t column, lee_error *error) {
    char text[LEE_TIME_TEXT];
    const char *what =
        column < FIRST_OPTIONAL
            ? "wind"
            : lee_wind_column_name(optional_column(column - FIRST_OPTIONAL));
    return lee_fail(error, LEE_ERR_DATA,
                    "%s and %s both have a sample at %s, with different %s",
                    a->name, b->name, lee_time_format(time, text), what);
}

/* One quantity at one time out of all records that have the time. Sets
 * `is_taken` when one of them lacks what another has. */
static lee_status settle(joining *all, int64_t time, size_t column,
                         bool *is_taken, lee_error *error) {
    const source *giver = NULL;
    bool is_lacking = false;
    double value = NAN;
    for (size_t i = all->begin; i < all->end; i++) {
        const source *one = &all->source[i];
        if (!has_time(one, time)) {
            continue;
        }
        const double *values = one->column[column];
        const double here = values != NULL ? values[one->next] : NAN;
        if (isnan(here)) {
            is_lacking = true;
        } else if (giver == NULL) {
            giver = one;
            value = here;
        } else if (!is_same(value, here)) {
            return refuse_values(giver, one, time, column, error);
        }
    }
    all->column[column][all->joined.n] = value;
    *is_taken = *is_taken || (giver != NULL && is_lacking);
    return LEE_OK;
}

static lee_status take_time(joining *all, int64_t time, lee_error *error) {
    bool is_taken = false;
    for (size_t i = 0; i < COLUMNS; i++) {
        if (all->column[i] != NULL) {
            const lee_status status = settle(all, time, i, &is_taken, error);
            if (status != LEE_OK) {
                return status;
            }
        }
    }
    size_t meeting = 0;
    for (size_t i = all->begin; i < all->end; i++) {
        const bool is_there = has_time(&all->source[i], time);
        all->source[i].next += is_there;
        meeting += is_there;
    }
    all->joined.time[all->joined.n++] = time;
    all->joined.merged += meeting - 1;
    all->joined.completed += is_taken;
    return LEE_OK;
}

static lee_status take_all(joining *all, lee_error *error) {
    lee_status status = LEE_OK;
    all->joined.n = 0;
    int64_t time = find_time(all);
    while (status == LEE_OK && time != INT64_MAX) {
        status = take_time(all, time, error);
        time = find_time(all);
    }
    return status;
}

lee_status lee_wind_join(size_t count, const lee_wind_part part[],
                         lee_wind_record *joined, lee_notes *remarks,
                         lee_error *error) {
    *joined = (lee_wind_record){0};
    if (count == 0) {
        return lee_fail(error, LEE_ERR_ARGUMENT, "there is no record to join");
    }
    joining all = {0};
    lee_status status = open_sources(&all, count, part, error);
    if (status == LEE_OK) {
        status = judge_kinds(&all, remarks, error);
    }
    if (status == LEE_OK) {
        status = judge_overlaps(&all, error);
    }
    if (status == LEE_OK) {
        status = make_joined(&all, remarks, error);
    }
    if (status == LEE_OK) {
        status = take_all(&all, error);
    }
    free(all.source);
    if (status != LEE_OK) {
        lee_wind_record_free(&all.joined);
        return status;
    }
    *joined = all.joined;
    return LEE_OK;
}
