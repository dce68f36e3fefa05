/* bench_drag.c - what a drag coefficient costs: a formula, a solved table, a
 * solution.
 *
 * Prints CPU time per coefficient over winds in no order, the
 * least and the median of several rounds, each as a ratio to the least of
 * Garratt's line; and what it costs to solve a table. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

#include "leewater/stress.h"

enum { ROUNDS = 9, WINDS = 20000 };

static double now(void) {
    struct timespec t;
    (void)clock_gettime(CLOCK_PROCESS_CPUTIME_ID, &t);
    return (double)t.tv_sec + 1e-9 * (double)t.tv_nsec;
}

static int is_less(const void *a, const void *b) {
    const double x = *(const double *)a;
    const double y = *(const double *)b;
    return (x > y) - (x < y);
}

/* Sorted times per coefficient, s; returns a sum that keeps them needed. */
static double measure(const lee_drag *drag, const lee_drag_input *fluids,
                      double rounds[ROUNDS]) {
    double wind[WINDS];
    double sum = 0.0;
    for (size_t i = 0; i < WINDS; i++) {
        /* Fractions of the golden section fill 0 to 30 m s-1 evenly. */
        wind[i] = 30.0 * fmod(0.6180339887498949 * (double)i, 1.0);
    }
    for (size_t r = 0; r < ROUNDS; r++) {
        lee_drag_input in = *fluids;
        const double before = now();
        for (size_t i = 0; i < WINDS; i++) {
            in.speed = wind[i];
            sum += lee_drag_coefficient(drag, &in, NULL, NULL);
        }
        rounds[r] = (now() - before) / WINDS;
    }
    qsort(rounds, ROUNDS, sizeof rounds[0], is_less);
    return sum;
}

static void print(const char *what, const double rounds[ROUNDS], double unit) {
    printf("%-34s %8.1f %8.1f ns %8.2f\n", what, 1e9 * rounds[0],
           1e9 * rounds[ROUNDS / 2], rounds[0] / unit);
}

static int compare(const char *name, const lee_drag_input *fluids,
                   double unit) {
    const lee_drag direct = {.relation = lee_drag_find(name), .cap = INFINITY};
    lee_drag table;
    lee_error error = {0};
    double rounds[ROUNDS];
    char what[80];
    const double before = now();
    if (lee_drag_solve(&direct, fluids, &table, &error) != LEE_OK) {
        fprintf(stderr, "%s: %s\n", name, error.message);
        return 1;
    }
    const double solving = now() - before;
    double sum = measure(&table, fluids, rounds);
    (void)snprintf(what, sizeof what, "%s, table", name);
    print(what, rounds, unit);
    sum -= measure(&direct, fluids, rounds);
    (void)snprintf(what, sizeof what, "%s, solved", name);
    print(what, rounds, unit);
    printf("    its table: %zu rows in %.2f ms; sums %.0e apart\n", table.n,
           1e3 * solving, fabs(sum));
    lee_drag_free(&table);
    return 0;
}

int main(void) {
    const lee_drag_input fluids = lee_drag_input_default();
    const lee_drag line = {.relation = lee_drag_find("garratt-linear-1977"),
                           .cap = INFINITY};
    double rounds[ROUNDS];
    const double sum = measure(&line, &fluids, rounds);
    const double unit = rounds[0];
    printf("%-34s %8s %8s %11s\n", "coefficient", "least", "median", "ratio");
    print("garratt-linear-1977, formula", rounds, unit);
    int failed = !(sum > 0.0);
    failed |= compare("smith-smooth-1988", &fluids, unit);
    failed |= compare("edson-2013", &fluids, unit);
    failed |= compare("wuest-lorke-2003", &fluids, unit);
    return failed;
}
