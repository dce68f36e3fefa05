/* lake.h - problems small enough to know the answer of. */
#ifndef LEEWATER_TESTS_LAKE_H
#define LEEWATER_TESTS_LAKE_H

#include <stdlib.h>
#include <string.h>

#include "leewater/series.h"
#include "support/check.h"

enum { LAKE_STATIONS = 3 };

static const double lake_east = 1.5707963267948966; /* rad, pi/2 */

static inline void place_station(lee_station *station, const char *name,
                                 double at) {
    *station = (lee_station){.at = at,
                             .bed = NAN,
                             .longitude = NAN,
                             .latitude = NAN,
                             .name = malloc(strlen(name) + 1)};
    assert_non_null(station->name);
    memcpy(station->name, name, strlen(name) + 1);
}

/* A closed lake of even depth (still water at 0) along an axis that runs
 * east, stations at both walls and in the middle, drag 1.5e-3 whatever the
 * wind, air 1.25, water 1000 kg m-3, gravity 9.81, no bed friction, lambda 1.
 * No wind. */
static inline lee_problem even_lake(double length, double depth) {
    lee_problem problem = lee_problem_default();
    lee_lake *lake = &problem.lake;
    assert_int_equal(lee_profile_init(&lake->profile, 2, NULL), LEE_OK);
    for (size_t i = 0; i < 2; i++) {
        lake->profile.chainage[i] = (double)i * length;
        lake->profile.bed[i] = -depth;
        lake->profile.width[i] = 1000.0;
        lake->profile.bearing[i] = lake_east;
    }
    lee_level_series_free(&lake->still_water);
    assert_int_equal(lee_level_constant(0.0, &lake->still_water, NULL), LEE_OK);
    lake->water_density = 1000.0;
    lake->gravity = 9.81;
    problem.air.density = 1.25;
    problem.drag = (lee_drag){.constant = 1.5e-3, .cap = INFINITY};
    problem.bed = (lee_bed_law){.kind = LEE_BED_NONE};
    problem.return_flow = (lee_return_flow){.value = 1.0};
    problem.return_flow_given = true;
    problem.station_count = LAKE_STATIONS;
    problem.station = calloc(LAKE_STATIONS, sizeof *problem.station);
    assert_non_null(problem.station);
    place_station(&problem.station[0], "west", 0.0);
    place_station(&problem.station[1], "middle", 0.5 * length);
    place_station(&problem.station[2], "east", length);
    return problem;
}

/* One given wind; from in radians. */
static inline void blow(lee_problem *problem, double speed, double from,
                        double duration) {
    lee_wind_source *wind = &problem->wind;
    free(wind->given);
    wind->kind = LEE_WIND_GIVEN;
    wind->given_count = 1;
    wind->given = calloc(1, sizeof *wind->given);
    assert_non_null(wind->given);
    wind->given[0] = (lee_given_wind){speed, from, duration};
}

/* lambda tau / (rho g) of such a lake, m. */
static inline double lake_pull(double speed) {
    return 1.25 * 1.5e-3 * speed * speed / (1000.0 * 9.81);
}

#endif
