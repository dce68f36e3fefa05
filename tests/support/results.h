/* results.h - results filled by hand, for what prints them. Every number was
 * chosen to be told apart; none comes from a computation. */
#ifndef LEEWATER_TESTS_RESULTS_H
#define LEEWATER_TESTS_RESULTS_H

#include "support/check.h"

#include "leewater/output.h"

/* All of one steady result: a lake of two stations under one wind. */
typedef struct hand_made {
    double chainage[3];
    double bed[3];
    double width[3];
    double bearing[3];
    double still_water[1];
    lee_threshold threshold[2];
    lee_station station[2];
    lee_case from;
    double node[1];
    lee_water_estimate water[1];
    lee_station_level level[2];
    lee_wind_estimate wind[1];
    lee_steady_result steady;
    int64_t time[3];
    double speed[3];
    double wind_from[3];
    bool spin_up[3];
    double quay[3];
    double landing[3];
    double low[3];
    double high[3];
    lee_exceedance exceedance[2];
    lee_station_series series[2];
    lee_run_result run;
    char text[8][64];
} hand_made;

static inline double degrees(double angle) {
    return angle * acos(-1.0) / 180.0;
}

static inline char *word(hand_made *made, size_t slot, const char *text) {
    (void)snprintf(made->text[slot], sizeof made->text[slot], "%s", text);
    return made->text[slot];
}

static inline void make_case(hand_made *made) {
    const double unknown = (double)NAN;
    for (size_t i = 0; i < 3; i++) {
        made->chainage[i] = 6000.0 * (double)i;
        made->bed[i] = 97.0;
        made->width[i] = 2000.0;
        made->bearing[i] = degrees(65.0);
    }
    made->still_water[0] = 101.35;
    made->threshold[0] = (lee_threshold){101.8, false};
    made->threshold[1] = (lee_threshold){100.9, true};
    made->station[0] = (lee_station){.name = word(made, 0, "North quay"),
                                     .at = 400.0,
                                     .bed = 99.1,
                                     .longitude = unknown,
                                     .latitude = unknown};
    made->station[1] = (lee_station){.name = word(made, 1, "Lee landing"),
                                     .at = 11800.0,
                                     .bed = unknown,
                                     .longitude = unknown,
                                     .latitude = unknown,
                                     .threshold_count = 2,
                                     .threshold = made->threshold};
    made->from = (lee_case){.path = word(made, 2, "marrow.yaml"),
                            .title = word(made, 3, "January gale")};
    lee_problem *problem = &made->from.problem;
    problem->lake.name = word(made, 4, "Marrow Tarn");
    problem->lake.datum = word(made, 5, "Marrow gauge zero");
    problem->lake.datum_altitude = unknown;
    problem->lake.still_water = (lee_level_series){1, NULL, made->still_water};
    problem->lake.profile =
        (lee_profile){3, made->chainage, made->bed, made->width, made->bearing};
    problem->wind.kind = LEE_WIND_RECORD;
    problem->exposure.height = 10.0;
    problem->exposure.averaging = unknown;
    problem->station_count = 2;
    problem->station = made->station;
}

static inline lee_method made_method(void) {
    lee_method method = {
        .air_density_value = 1.225,
        .water_density_value = 999.7,
        .gravity = 9.80665,
        .return_flow = 1.072,
        .correction_count = 1,
        .corrected = {22.0, NAN, NAN},
        .reference_height = 10.0,
    };
    (void)snprintf(method.drag, sizeof method.drag, "garratt-linear-1977");
    (void)snprintf(method.air_density, sizeof method.air_density, "standard");
    (void)snprintf(method.return_flow_how, sizeof method.return_flow_how,
                   "computed");
    (void)snprintf(method.bed, sizeof method.bed, "Manning n = 0.022");
    method.correction[0] = (lee_correction){.name = "height",
                                            .method = "neutral log profile",
                                            .source = "a source",
                                            .factor = 1.094};
    return method;
}

static inline void make_steady(hand_made *made) {
    const double unknown = (double)NAN;
    made->node[0] = 5900.0;
    made->water[0] = (lee_water_estimate){
        .from = 0.0,
        .to = 12000.0,
        .set_up = {0.412, 0.31, 0.55 },
        .set_up_at = 12000.0,
        .set_down = {-0.43, -0.6, -0.32},
        .set_down_at = 0.0,
        .tilt = {0.842, 0.63, 1.15 },
        .node_count = 1,
        .node = made->node,
        .volume_defect = 1e-14,
        .first_period = 3720.0,
        .develop_time = 1860.0
    };
    made->level[0] = (lee_station_level){
        {100.95, 100.8, 101.05},
        3.95, 1.85
    };
    made->level[1] = (lee_station_level){
        {101.755, 101.65, 101.89},
        4.755, unknown
    };
    made->wind[0] = (lee_wind_estimate){
        .wind = {22.0, degrees(240.0), unknown},
        .speed = 24.07,
        .coefficient = 2.36e-3,
        .stress = 1.675,
        .along = 0.98,
        .return_flow = 1.072,
        .water_count = 1,
        .water = made->water,
        .set_up = made->water[0].set_up,
        .set_down = made->water[0].set_down,
        .tilt = made->water[0].tilt,
        .set_up_at = 12000.0,
        .set_down_at = 0.0,
        .cross_tilt = 0.021,
        .cross_tilt_at = 4000.0,
        .volume_defect = 1e-14,
        .station = made->level,
    };
    made->steady = (lee_steady_result){.method = made_method(),
                                       .still_water = 101.35,
                                       .count = 1,
                                       .wind = made->wind,
                                       .station_count = 2};
}

/* 2031-01-14T00:00:00Z, by the calendar: 22293 days after 1970-01-01. */
static const int64_t made_day = (int64_t)22293 * 86400;

static inline void make_series(hand_made *made) {
    const double unknown = (double)NAN;
    for (size_t i = 0; i < 3; i++) {
        made->time[i] = made_day + 600 * (int64_t)i;
        made->speed[i] = 20.0 + (double)i;
        made->wind_from[i] = degrees(240.0 + (double)i);
        made->quay[i] = 101.0 + 0.1 * (double)i;
        made->landing[i] = 101.7 - 0.1 * (double)i;
        made->low[i] = made->quay[i] - 0.05;
        made->high[i] = made->quay[i] + 0.05;
    }
    made->landing[2] = unknown;
    made->spin_up[0] = true;
    made->exceedance[0] = (lee_exceedance){
        .threshold = {101.8, false},
        .is_reached = true,
        .first_time = made_day + 300,
        .has_returned = true,
        .return_time = made_day + 8100,
        .longest = 7800.0,
        .total = 9000.0,
        .times = 2
    };
    made->exceedance[1] = (lee_exceedance){
        .threshold = {100.9, true}
    };
    made->series[0] = (lee_station_series){
        .level = made->quay,
        .max = {101.2, 101.15, 101.25},
        .max_time = made_day + 1200,
        .min = {101.0, 100.95, 101.05},
        .min_time = made_day,
        .residual = 0.12,
        .residual_time = made_day + 900
    };
    made->series[1] = (lee_station_series){
        .level = made->landing,
        .max = {101.85, 101.7, 102.0},
        .max_time = made_day + 600,
        .min = {101.6,  101.5, 101.7},
        .min_time = made_day + 60,
        .dry_time = 600.0,
        .residual = unknown,
        .residual_state = LEE_RESIDUAL_DRY,
        .exceedance_count = 2,
        .exceedance = made->exceedance
    };
}

static inline void make_run(hand_made *made) {
    make_series(made);
    made->run = (lee_run_result){.method = made_method(),
                                 .still_water = 101.35,
                                 .n = 3,
                                 .time = made->time,
                                 .speed = made->speed,
                                 .from = made->wind_from,
                                 .is_spin_up = made->spin_up,
                                 .strongest = 23.0,
                                 .strongest_from = degrees(243.0),
                                 .strongest_time = made_day + 1140,
                                 .station_count = 2,
                                 .station = made->series,
                                 .cells = 200,
                                 .step = 60.0,
                                 .first_period = 3720.0,
                                 .volume_defect = 2e-14,
                                 .numerical_error = 0.003,
                                 .numerical_error_time = 0.002,
                                 .numerical_error_space = 0.001,
                                 .pieces = 1};
}

static inline void make(hand_made *made) {
    *made = (hand_made){0};
    make_case(made);
    make_steady(made);
    make_run(made);
}

#endif
