/* A problem starts with the documented defaults and gives everything back. */
#include "support/check.h"

#include <stdlib.h>
#include <string.h>

#include "leewater/series.h"

static void a_new_problem_has_no_lake_and_no_wind(void **state) {
    (void)state;
    lee_problem problem = lee_problem_default();
    assert_int_equal(problem.lake.profile.n, 0);
    assert_int_equal(problem.wind.kind, LEE_WIND_NONE);
    assert_int_equal(problem.station_count, 0);
    lee_problem_free(&problem);
}

/* Kell (1975) at 10 degC to half a unit of the last digit given. */
static void the_water_is_fresh_at_ten_degrees_unless_told(void **state) {
    (void)state;
    lee_problem problem = lee_problem_default();
    assert_near(problem.lake.water_density, 999.69963, 5e-6);
    assert_near(problem.lake.gravity, 9.80665, 0.0);
    lee_problem_free(&problem);
}

static void the_bed_is_manning_of_a_general_lake_unless_told(void **state) {
    (void)state;
    lee_problem problem = lee_problem_default();
    assert_int_equal(problem.bed.kind, LEE_BED_MANNING);
    assert_near(problem.bed.value, 0.025, 0.0);
    lee_problem_free(&problem);
}

static void a_gap_of_three_hours_is_bridged_unless_told(void **state) {
    (void)state;
    lee_problem problem = lee_problem_default();
    assert_int_equal(problem.wind.gap.largest, 10800);
    assert_false(problem.wind.gap.split);
    lee_problem_free(&problem);
}

static void the_return_flow_is_computed_unless_told(void **state) {
    (void)state;
    lee_problem problem = lee_problem_default();
    assert_true(problem.return_flow.is_computed);
    assert_false(problem.return_flow_given);
    lee_problem_free(&problem);
}

static void what_is_not_stated_is_not_a_number(void **state) {
    (void)state;
    lee_problem problem = lee_problem_default();
    assert_true(isnan(problem.lake.altitude));
    assert_true(isnan(problem.air.density));
    assert_true(isnan(problem.air.pressure));
    assert_true(isnan(problem.air.temperature));
    assert_true(isnan(problem.uncertainty.wind));
    assert_true(isnan(problem.uncertainty.depth));
    assert_true(isnan(problem.uncertainty.bed));
    lee_problem_free(&problem);
}

static void the_solver_is_automatic_unless_told(void **state) {
    (void)state;
    lee_problem problem = lee_problem_default();
    assert_int_equal(problem.solver.cells, 0);
    assert_near(problem.solver.step, 0.0, 0.0);
    assert_near(problem.solver.dry_depth, 0.01, 0.0);
    assert_true(problem.solver.has_advection);
    lee_problem_free(&problem);
}

/* The leak check of the sanitizer build watches what is given back. */
static void a_freed_problem_is_empty_and_may_be_freed_again(void **state) {
    (void)state;
    lee_problem problem = lee_problem_default();
    problem.station = calloc(1, sizeof *problem.station);
    assert_non_null(problem.station);
    problem.station_count = 1;
    problem.station[0].name = calloc(1, 8);
    problem.station[0].threshold = calloc(1, sizeof(lee_threshold));
    problem.wind.given = calloc(1, sizeof *problem.wind.given);
    problem.wind.record_path = calloc(1, sizeof *problem.wind.record_path);
    assert_non_null(problem.wind.record_path);
    problem.wind.record_count = 1;
    problem.wind.record_path[0] = calloc(1, 8);
    lee_problem_free(&problem);
    assert_int_equal(problem.station_count, 0);
    assert_null(problem.station);
    assert_null(problem.wind.given);
    lee_problem_free(&problem);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_new_problem_has_no_lake_and_no_wind),
        cmocka_unit_test(the_water_is_fresh_at_ten_degrees_unless_told),
        cmocka_unit_test(the_bed_is_manning_of_a_general_lake_unless_told),
        cmocka_unit_test(a_gap_of_three_hours_is_bridged_unless_told),
        cmocka_unit_test(the_return_flow_is_computed_unless_told),
        cmocka_unit_test(what_is_not_stated_is_not_a_number),
        cmocka_unit_test(the_solver_is_automatic_unless_told),
        cmocka_unit_test(a_freed_problem_is_empty_and_may_be_freed_again),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
