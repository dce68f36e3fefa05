/* drag_table.c - implicit drag relations solved ahead, for speed. */
#include "leewater/stress.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

/* Up to here a table goes; the relations are held before (m s-1). */
enum { FASTEST = 120, BINS_A_UNIT = 4, BINS = FASTEST * BINS_A_UNIT };

/* Between rows C10 is the parabola through its solutions at both rows and in
 * the middle. A smooth curve leaves it most near the quarters, where it is
 * solved again and may be this far off, half of what is promised: a bend
 * beside a quarter leaves it more elsewhere. */
static const double quarter_tolerance = 0.5e-6;

/* A bend is halved around and a jump cut off so often: to 3e-10 m s-1. */
enum { MOST_HALVINGS = 30 };

typedef struct row {
    double speed;
    double coefficient;
} row;

/* A table in the making. */
typedef struct builder {
    const lee_drag_relation *relation;
    lee_drag_input in;
    size_t room;
    lee_drag *table;
    lee_error *error;
} builder;

static row solved_at(const builder *b, double speed) {
    lee_drag_input in = b->in;
    in.speed = speed;
    return (row){speed, b->relation->coefficient(&in)};
}

static bool grow(double **column, size_t room) {
    double *grown = realloc(*column, room * sizeof *grown);
    *column = grown != NULL ? grown : *column;
    return grown != NULL;
}

static lee_status make_room(builder *b) {
    lee_drag *table = b->table;
    b->room = b->room > 0 ? 2 * b->room : 1024;
    if (!grow(&table->speed, b->room) || !grow(&table->coefficient, b->room) ||
        !grow(&table->bend, b->room)) {
        return lee_fail(b->error, LEE_ERR_MEMORY,
                        "no room for a drag table of %zu rows", b->room);
    }
    return LEE_OK;
}

static lee_status append(builder *b, row next) {
    lee_drag *table = b->table;
    if (!(next.coefficient > 0.0) || !isfinite(next.coefficient)) {
        return lee_fail(b->error, LEE_ERR_ARGUMENT,
                        "%s has no solution at %g m/s with gravity %g m/s2 "
                        "and air of viscosity %g m2/s",
                        b->relation->name, next.speed, b->in.gravity,
                        b->in.air_viscosity);
    }
    if (table->n == b->room) {
        const lee_status status = make_room(b);
        if (status != LEE_OK) {
            return status;
        }
    }
    table->speed[table->n] = next.speed;
    table->coefficient[table->n] = next.coefficient;
    table->bend[table->n] = 0.0;
    table->n++;
    return LEE_OK;
}

/* Solutions at the ends, the middle and the quarters of a stretch. */
typedef struct stretch {
    row at[5];
} stretch;

static double bend_of(const stretch *s) {
    return s->at[2].coefficient -
           0.5 * (s->at[0].coefficient + s->at[4].coefficient);
}

/* Does the parabola through ends and middle meet a quarter? */
static bool meets(const stretch *s, size_t quarter) {
    const double share = 0.25 * (double)quarter;
    const double a = s->at[0].coefficient;
    const double b = s->at[4].coefficient;
    const double found =
        a + share * (b - a) + 4.0 * share * (1.0 - share) * bend_of(s);
    return fabs(found - s->at[quarter].coefficient) <=
           quarter_tolerance * s->at[quarter].coefficient;
}

static row middle_of(const builder *b, row left, row right) {
    return solved_at(b, 0.5 * (left.speed + right.speed));
}

/* Rows from the left end, which stands already, up to the right end. */
static lee_status fill(builder *b, const row at[3], int halvings) {
    const stretch s = {
        {at[0], middle_of(b, at[0], at[1]), at[1], middle_of(b, at[1], at[2]),
         at[2]}
    };
    if (halvings == MOST_HALVINGS || (meets(&s, 1) && meets(&s, 3))) {
        b->table->bend[b->table->n - 1] = bend_of(&s);
        return append(b, at[2]);
    }
    const lee_status status = fill(b, &s.at[0], halvings + 1);
    return status == LEE_OK ? fill(b, &s.at[2], halvings + 1) : status;
}

static lee_status solve_relation(builder *b) {
    lee_drag *table = b->table;
    table->bins = BINS;
    table->bin = calloc(BINS, sizeof *table->bin);
    if (table->bin == NULL) {
        return lee_fail(b->error, LEE_ERR_MEMORY, "no room for a drag table");
    }
    row left = solved_at(b, 0.0);
    lee_status status = append(b, left);
    for (size_t k = 0; k < BINS && status == LEE_OK; k++) {
        const row right = solved_at(b, (double)(k + 1) / BINS_A_UNIT);
        const row at[3] = {left, middle_of(b, left, right), right};
        table->bin[k] = table->n - 1;
        status = fill(b, at, 0);
        left = right;
    }
    return status;
}

static lee_status copy_rows(const lee_drag *from, lee_drag *to,
                            lee_error *error) {
    to->speed = calloc(from->n, sizeof *to->speed);
    to->coefficient = calloc(from->n, sizeof *to->coefficient);
    if (to->speed == NULL || to->coefficient == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a drag table");
    }
    memcpy(to->speed, from->speed, from->n * sizeof *to->speed);
    memcpy(to->coefficient, from->coefficient, from->n * sizeof *to->speed);
    to->n = from->n;
    return LEE_OK;
}

lee_status lee_drag_solve(const lee_drag *drag, const lee_drag_input *fluids,
                          lee_drag *solved, lee_error *error) {
    *solved = (lee_drag){
        .relation = drag->relation,
        .constant = drag->constant,
        .cap = drag->cap,
    };
    lee_status status = LEE_OK;
    if (drag->relation != NULL && drag->relation->is_solved) {
        builder b = {.relation = drag->relation,
                     .in = *fluids,
                     .table = solved,
                     .error = error};
        status = solve_relation(&b);
    } else if (drag->relation == NULL && drag->n > 0) {
        status = copy_rows(drag, solved, error);
    }
    if (status != LEE_OK) {
        lee_drag_free(solved);
    }
    return status;
}
