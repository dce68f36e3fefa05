/* axis.h - axes dug by tests, and the wind over them. */
#ifndef LEEWATER_TESTS_AXIS_H
#define LEEWATER_TESTS_AXIS_H

#include <string.h>

#include "support/check.h"

#include "leewater/setup.h"

/* The constants of the tabulated closed forms. */
static const double axis_gravity = 9.81;   /* m s-2 */
static const double axis_density = 1000.0; /* kg m-3 */

/* An axis northward of n rows, 1 km wide. Free with lee_profile_free. */
static inline lee_profile axis_dig(size_t n, const double chainage[],
                                   const double bed[]) {
    lee_profile profile;
    assert_int_equal(lee_profile_init(&profile, n, NULL), LEE_OK);
    memcpy(profile.chainage, chainage, n * sizeof *chainage);
    memcpy(profile.bed, bed, n * sizeof *bed);
    for (size_t i = 0; i < n; i++) {
        profile.width[i] = 1000.0;
    }
    return profile;
}

/* A walled canal of uniform depth below level 0. */
static inline lee_profile axis_canal(double length, double depth) {
    const double chainage[] = {0.0, length};
    const double bed[] = {-depth, -depth};
    return axis_dig(2, chainage, bed);
}

/* A wind of `stress` Pa towards north over still water at level 0. */
static inline lee_steady_input axis_wind(const lee_profile *profile,
                                         double stress) {
    return (lee_steady_input){
        .profile = profile,
        .stress = {0.0, stress},
        .return_flow = 1.0,
        .water_density = axis_density,
        .gravity = axis_gravity,
        .dry_depth = 0.01,
        .start_level = NAN,
        .end_level = NAN,
    };
}

static inline lee_steady axis_solve(const lee_steady_input *input) {
    lee_steady steady;
    lee_error error = {0};
    if (lee_steady_solve(input, &steady, &error) != LEE_OK) {
        print_error("%s\n", error.message);
        fail();
    }
    return steady;
}

#endif
