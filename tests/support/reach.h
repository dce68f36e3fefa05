/* reach.h - short lakes for the tests of the transient engine. */
#ifndef LEEWATER_TESTS_REACH_H
#define LEEWATER_TESTS_REACH_H

#include "support/check.h"
#include "support/dice.h"

#include <stdlib.h>

#include "leewater/basin.h"
#include "leewater/setup.h"

enum { MOST_CELLS = 2000 };

/* A height (m) at chainage x, with the numbers it needs. */
typedef double height_at(const void *numbers, double x);

static inline double flat(const void *numbers, double x) {
    (void)x;
    return *(const double *)numbers;
}

/* Cuts [from, to] into cells over a bed drawn with four rows a cell. */
static inline lee_channel cut_reach(double from, double to, size_t cells,
                                    height_at *bed, const void *numbers) {
    lee_profile profile;
    const size_t rows = 4 * cells + 1;
    assert_int_equal(lee_profile_init(&profile, rows, NULL), LEE_OK);
    for (size_t i = 0; i < rows; i++) {
        const double share = (double)i / (double)(rows - 1);
        profile.chainage[i] = from + share * (to - from);
        profile.bed[i] = bed(numbers, profile.chainage[i]);
        profile.width[i] = 1000.0;
        profile.bearing[i] = 0.0;
    }
    lee_channel channel;
    assert_int_equal(lee_channel_from_profile(&profile, cells, &channel, NULL),
                     LEE_OK);
    lee_profile_free(&profile);
    return channel;
}

static inline lee_transient_options frictionless(void) {
    lee_transient_options options = lee_transient_defaults();
    options.gravity = 9.81;
    return options;
}

/* An engine at rest at time 0 with levels from `level`. */
static inline lee_transient *start_engine(const lee_channel *channel,
                                          const lee_transient_options *options,
                                          height_at *level,
                                          const void *numbers) {
    double levels[MOST_CELLS];
    assert_true(channel->nodes <= MOST_CELLS);
    for (size_t i = 0; i < channel->nodes; i++) {
        levels[i] = level(numbers, channel->chainage[i]);
    }
    lee_transient *engine;
    lee_error error = {0};
    if (lee_transient_new(channel, options, &engine, &error) != LEE_OK) {
        fail_msg("%s", error.message);
    }
    lee_transient_start(engine, 0.0, levels);
    return engine;
}

/* Stress over time, the same along the axis; ends held at `level`. */
typedef struct weather {
    size_t links;
    double (*stress)(const void *numbers, double t); /* Pa; NULL: calm */
    const void *numbers;
    double level; /* m */
} weather;

static inline double steady_stress(const void *numbers, double t) {
    (void)t;
    return *(const double *)numbers;
}

static inline void blow(void *user, double t, lee_forcing *forcing) {
    const weather *wind = user;
    const double stress =
        wind->stress == NULL ? 0.0 : wind->stress(wind->numbers, t);
    for (size_t f = 0; f < wind->links; f++) {
        forcing->stress[f] = stress;
    }
    forcing->start_level = wind->level;
    forcing->end_level = wind->level;
}

/* Takes `steps` steps of dt; a failed step fails the test. */
static inline void run_steps(lee_transient *engine, size_t steps, double dt,
                             weather *wind) {
    lee_error error = {0};
    for (size_t k = 0; k < steps; k++) {
        if (lee_transient_step(engine, dt, blow, wind, &error) != LEE_OK) {
            fail_msg("%s", error.message);
        }
    }
}

/* A number in [0, 1] drawn by lot. */
static inline double random_share(dice *d) {
    const int last = 1 << 30;
    return (double)draw(d, last) / (double)last;
}

/* Fewer steps when the build checks every access. */
static inline size_t steps_or_fewer(size_t steps, size_t reduced) {
    return getenv("LEE_REDUCED") == NULL ? steps : reduced;
}

#endif
