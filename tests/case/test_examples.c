/* The examples and the demo data are in order and hold what they promise. */
#include "support/check.h"

#include <stdio.h>
#include <stdlib.h>

#include "leewater/case.h"

static lee_case read_example(const char *name) {
    const char *source = getenv("LEE_SOURCE");
    assert_non_null(source);
    char path[1024];
    (void)snprintf(path, sizeof path, "%s/examples/%s", source, name);
    lee_case read = {0};
    lee_error error = {0};
    if (lee_case_read(path, &read, &error) != LEE_OK) {
        print_error("%s\n", error.message);
        fail();
    }
    return read;
}

static void the_planner_scans_all_directions(void **state) {
    (void)state;
    lee_case c = read_example("planner.yaml");
    assert_int_equal(c.problem.wind.kind, LEE_WIND_SCAN);
    assert_int_equal(c.problem.wind.directions, 36);
    assert_near(c.problem.uncertainty.wind, 0.1, 1e-16);
    assert_int_equal(c.problem.station_count, 3);
    lee_case_free(&c);
}

static void the_harbour_runs_ten_days_without_a_long_gap(void **state) {
    (void)state;
    lee_case c = read_example("harbour.yaml");
    const lee_wind_source *wind = &c.problem.wind;
    /* ten days of ten-minute samples and the last midnight */
    assert_int_equal(wind->record.n, 10 * 144 + 1);
    lee_wind_piece *pieces = NULL;
    size_t count = 0;
    assert_int_equal(
        lee_wind_pieces(&wind->record, &wind->gap, &pieces, &count, NULL),
        LEE_OK);
    assert_int_equal(count, 1);
    free(pieces);
    lee_case_free(&c);
}

static void the_research_record_falls_into_two_pieces(void **state) {
    (void)state;
    lee_case c = read_example("research.yaml");
    const lee_wind_source *wind = &c.problem.wind;
    lee_wind_piece *pieces = NULL;
    size_t count = 0;
    assert_int_equal(
        lee_wind_pieces(&wind->record, &wind->gap, &pieces, &count, NULL),
        LEE_OK);
    assert_int_equal(count, 2);
    assert_int_equal(c.problem.bed.kind, LEE_BED_CHEZY);
    free(pieces);
    lee_case_free(&c);
}

static void the_airfield_asks_for_every_link(void **state) {
    (void)state;
    lee_case c = read_example("airfield.yaml");
    const lee_exposure *exposure = &c.problem.exposure;
    assert_true(exposure->direction_offset > 0.0);
    assert_true(exposure->is_gust && exposure->is_over_land);
    assert_int_equal(exposure->to_water_method, LEE_TO_WATER_HSU_1980);
    assert_int_equal(exposure->stability, LEE_STABILITY_MONIN_OBUKHOV);
    assert_int_equal(c.problem.wind.record.n, 241);
    lee_case_free(&c);
}

static void the_demo_record_holds_a_gale_a_calm_and_gaps(void **state) {
    (void)state;
    lee_case c = read_example("harbour.yaml");
    lee_wind_check check = {0};
    assert_int_equal(lee_wind_check_record(&c.problem.wind.record,
                                           &c.problem.wind.gap, &check, NULL),
                     LEE_OK);
    assert_true(check.fastest > 22.0 && check.fastest < 25.0);
    assert_true(check.calms > 6);
    assert_int_equal(check.gap_count, 2);
    assert_int_equal(check.missing, 11);
    assert_int_equal(check.spikes, 0);
    lee_wind_check_free(&check);
    lee_case_free(&c);
}

static void the_demo_lake_bends_and_shelves(void **state) {
    (void)state;
    lee_case c = read_example("planner.yaml");
    const lee_profile *axis = &c.problem.lake.profile;
    const double still = lee_level_at(&c.problem.lake.still_water, 0.0);
    assert_int_equal(axis->n, 26);
    assert_near(axis->chainage[axis->n - 1], 12200.0, 1e-9);
    assert_true(axis->bearing[axis->n - 1] - axis->bearing[0] > 0.5);
    assert_true(still - axis->bed[0] < 0.5);
    assert_true(still - axis->bed[axis->n - 1] < 0.5);
    assert_int_equal(c.notes.n, 0);
    lee_case_free(&c);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_planner_scans_all_directions),
        cmocka_unit_test(the_harbour_runs_ten_days_without_a_long_gap),
        cmocka_unit_test(the_research_record_falls_into_two_pieces),
        cmocka_unit_test(the_airfield_asks_for_every_link),
        cmocka_unit_test(the_demo_record_holds_a_gale_a_calm_and_gaps),
        cmocka_unit_test(the_demo_lake_bends_and_shelves),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
