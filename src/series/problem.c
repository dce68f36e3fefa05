/* problem.c - a problem with all its defaults, and its release. */
#include <math.h>
#include <stdlib.h>

#include "base/constants.h"

#include "leewater/series.h"

/* Fresh water at 10 degrees Celsius, and Manning's n of a general lake bed
 * (0.025 to 0.035: common practice). */
static const double usual_water_celsius = 10.0;
static const double usual_manning = 0.025;

enum { USUAL_GAP = 3 * 3600 }; /* s */

lee_problem lee_problem_default(void) {
    lee_problem problem = {0};
    problem.lake.altitude = NAN;
    problem.lake.datum_altitude = NAN;
    problem.lake.water_density =
        lee_water_density(lee_celsius_zero + usual_water_celsius);
    problem.lake.gravity = lee_standard_gravity;
    problem.bed = (lee_bed_law){LEE_BED_MANNING, usual_manning};
    problem.wind.kind = LEE_WIND_NONE;
    problem.wind.gap.largest = USUAL_GAP;
    problem.exposure = lee_exposure_default();
    problem.drag = lee_drag_default();
    problem.air = (lee_air){NAN, NAN, NAN, NAN};
    problem.return_flow = (lee_return_flow){true, 1.0};
    problem.uncertainty = (lee_uncertainty){NAN, NAN, NAN};
    problem.run.start = LEE_START_REST;
    problem.solver.dry_depth = 0.01;
    problem.solver.has_advection = true;
    return problem;
}

static void free_stations(lee_problem *problem) {
    for (size_t i = 0; i < problem->station_count; i++) {
        free(problem->station[i].name);
        free(problem->station[i].threshold);
    }
    free(problem->station);
}

void lee_problem_free(lee_problem *problem) {
    free_stations(problem);
    free(problem->wind.given);
    for (size_t i = 0; i < problem->wind.record_count; i++) {
        free(problem->wind.record_path[i]);
    }
    free(problem->wind.record_path);
    lee_notes_free(&problem->wind.record_told);
    lee_wind_record_free(&problem->wind.record);
    lee_exposure_free(&problem->exposure);
    lee_drag_free(&problem->drag);
    lee_lake_free(&problem->lake);
    *problem = (lee_problem){0};
}
