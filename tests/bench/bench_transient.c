/* bench_transient.c - what a step of the transient engine costs.
 *
 * Prints CPU time per cell and asked step: the least and the median of several
 * rounds, for a lake that stays wet, one whose ends fall dry, and one in a
 * storm fast enough for second passes and halved steps. Other work on the
 * machine shows in the median first. */
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

#include "leewater/basin.h"
#include "leewater/setup.h"

enum { CELLS = 200, ROUNDS = 9, STEPS = 2880 }; /* ten days of 300 s */

static const double length = 60e3; /* m */

/* Ten days of wind: two storms that turn. [Pa] */
static double stress_at(double t) {
    const double day = t / 86400.0;
    return 1.8 * sin(1.3 * day) * fabs(sin(0.7 * day));
}

static void blow(void *user, double t, lee_forcing *forcing) {
    const double stress = *(const double *)user * stress_at(t);
    for (size_t f = 0; f + 1 < CELLS; f++) {
        forcing->stress[f] = stress;
    }
}

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

typedef struct basin_case {
    const char *name;
    double depth;    /* m, in the middle */
    double shelf;    /* m, at the ends   */
    double strength; /* of the wind      */
    double level[CELLS];
} basin_case;

static lee_status fill(const basin_case *lake, lee_channel *channel,
                       lee_error *error) {
    lee_profile profile;
    lee_status status = lee_profile_init(&profile, CELLS + 1, error);
    if (status != LEE_OK) {
        return status;
    }
    for (size_t i = 0; i <= CELLS; i++) {
        const double s = 2.0 * (double)i / CELLS - 1.0;
        profile.chainage[i] = length * (double)i / CELLS;
        profile.bed[i] =
            -lake->depth + (lake->depth - lake->shelf) * s * s * s * s * s * s;
        profile.width[i] = 8e3 - 3e3 * s;
    }
    status = lee_channel_from_profile(&profile, CELLS, channel, error);
    lee_profile_free(&profile);
    return status;
}

static lee_status run(basin_case *lake, lee_transient *engine, double *rounds,
                      lee_error *error) {
    lee_status status = LEE_OK;
    for (size_t r = 0; r < ROUNDS; r++) {
        lee_transient_start(engine, 0.0, lake->level);
        const double before = now();
        for (size_t k = 0; k < STEPS && status == LEE_OK; k++) {
            status =
                lee_transient_step(engine, 300.0, blow, &lake->strength, error);
        }
        rounds[r] = (now() - before) / ((double)CELLS * STEPS);
    }
    return status;
}

static lee_status measure(basin_case *lake, lee_error *error) {
    lee_channel channel = {0};
    lee_transient *engine = NULL;
    double rounds[ROUNDS];
    lee_transient_options options = lee_transient_defaults();
    options.bed = (lee_bed_law){LEE_BED_MANNING, 0.025};
    lee_status status = fill(lake, &channel, error);
    if (status == LEE_OK) {
        status = lee_transient_new(&channel, &options, &engine, error);
    }
    if (status == LEE_OK) {
        status = run(lake, engine, rounds, error);
    }
    if (status == LEE_OK) {
        const lee_transient_counts counts = lee_transient_count(engine);
        qsort(rounds, ROUNDS, sizeof rounds[0], is_less);
        printf("%-10s %6.1f %6.1f ns per cell and step; %zu steps, %zu second "
               "passes, %zu halvings, %zu limited\n",
               lake->name, 1e9 * rounds[0], 1e9 * rounds[ROUNDS / 2],
               counts.steps, counts.second_passes, counts.halvings,
               counts.limited);
    }
    lee_transient_free(engine);
    lee_channel_free(&channel);
    return status;
}

int main(void) {
    basin_case lakes[] = {
        {.name = "wet",     .depth = 12.0, .shelf = 3.0, .strength = 1.0},
        {.name = "drying",  .depth = 3.5,  .shelf = 0.1, .strength = 1.5},
        {.name = "violent", .depth = 3.5,  .shelf = 0.1, .strength = 3.0},
    };
    printf("%-10s %6s %6s\n", "lake", "least", "median");
    for (size_t i = 0; i < sizeof lakes / sizeof lakes[0]; i++) {
        lee_error error = {0};
        if (measure(&lakes[i], &error) != LEE_OK) {
            fprintf(stderr, "%s: %s\n", lakes[i].name, error.message);
            return 1;
        }
    }
    return 0;
}
