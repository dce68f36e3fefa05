/* A whole case is read field by field, and defaults fill what it leaves. */
#include "support/case_text.h"

#include "leewater/calendar.h"

static const char axis_csv[] = "chainage [km],bed [m],width [km]\n"
                               "0,99,0.5\n6,97,1.5\n12,100,0.4\n";
static const char wind_csv[] = "time,speed [knots],from [degree]\n"
                               "2031-01-10T00:00Z,10,240\n"
                               "2031-01-10T01:00Z,20,250\n";

static const char whole[] =
    "title: January gale\n"
    "about: {institution: Marrow harbour office, creator: J. Example, "
    "license: CC-BY-4.0}\n"
    "lake:\n"
    "  name: Marrow Tarn\n"
    "  still_water: 101.35 m\n"
    "  datum: Marrow gauge zero\n"
    "  altitude: 340 m\n"
    "  water_density: 999.5 kg m-3\n"
    "  gravity: 9.81 m s-2\n"
    "  axis:\n"
    "    bearing: 65 degree\n"
    "    profile: axis.csv\n"
    "    made_for: 101.35 m\n"
    "    start: closed\n"
    "    end: {level: 101.20 m}\n"
    "  bed: {manning: 0.022}\n"
    "wind:\n"
    "  record: wind.csv\n"
    "  time: time\n"
    "  speed: speed\n"
    "  from: from\n"
    "  stamp: end\n"
    "  height: 12 m\n"
    "  height_method: power\n"
    "  averaging: 10 min\n"
    "  over: {land: {roughness_length: 0.03 m, to_water: 1.2}}\n"
    "  largest_gap: 2 h\n"
    "  gaps: split\n"
    "stress:\n"
    "  drag: smith-banke-1975\n"
    "  drag_cap: 2.5e-3\n"
    "  air_temperature: 5 degC\n"
    "  air_pressure: 970 hPa\n"
    "  return_flow: 1.2\n"
    "uncertainty: {wind: 10 percent, depth: 0.2 m, bed: 20 %}\n"
    "stations:\n"
    "  - {name: North quay, at: 0.4 km, bed: 99.1 m, below: 100.9 m}\n"
    "  - {name: Lee landing, at: 11.8 km, above: [102.2 m, 102.5 m], "
    "below: 100 m, lon: 8.01 degree, lat: 47.30 degree}\n"
    "run: {from: 2031-01-10, to: '2031-01-20T01:00+01:00', start: steady, "
    "every: 10 min}\n"
    "solver: {cells: 120, step: 30 s, dry_depth: 2 cm, advection: off}\n";

static lee_case read_whole(void **state) {
    folder_write(*state, "axis.csv", axis_csv);
    folder_write(*state, "wind.csv", wind_csv);
    return read_case(state, whole);
}

static void a_case_keeps_who_it_is_from(void **state) {
    lee_case c = read_whole(state);
    assert_string_equal(c.title, "January gale");
    assert_string_equal(c.institution, "Marrow harbour office");
    assert_string_equal(c.creator, "J. Example");
    assert_string_equal(c.license, "CC-BY-4.0");
    assert_string_equal(strrchr(c.path, '/'), "/a.yaml");
    lee_case_free(&c);
}

static void a_case_keeps_the_paths_of_all_that_it_was_read_from(void **state) {
    lee_case c = read_whole(state);
    assert_int_equal(c.inputs.n, 3);
    assert_string_equal(c.inputs.text[0], c.path);
    assert_string_equal(strrchr(c.inputs.text[1], '/'), "/axis.csv");
    assert_string_equal(strrchr(c.inputs.text[2], '/'), "/wind.csv");
    lee_case_free(&c);
}

static void a_case_keeps_its_lake(void **state) {
    lee_case c = read_whole(state);
    const lee_lake *lake = &c.problem.lake;
    assert_string_equal(lake->name, "Marrow Tarn");
    assert_string_equal(lake->datum, "Marrow gauge zero");
    assert_near(lee_level_at(&lake->still_water, 0.0), 101.35, 0.0);
    assert_near(lake->altitude, 340.0, 0.0);
    assert_near(lake->water_density, 999.5, 0.0);
    assert_near(lake->gravity, 9.81, 0.0);
    lee_case_free(&c);
}

/* Kilometres and degrees convert within a rounding or two. */
static void a_case_keeps_its_axis(void **state) {
    lee_case c = read_whole(state);
    const lee_profile *axis = &c.problem.lake.profile;
    assert_int_equal(axis->n, 3);
    assert_near(axis->chainage[1], 6000.0, 1e-9);
    assert_near(axis->bed[2], 100.0, 0.0);
    assert_near(axis->width[0], 500.0, 1e-9);
    assert_near(axis->bearing[2], 65.0 * 3.14159265358979323846 / 180.0, 1e-15);
    lee_case_free(&c);
}

static void a_case_keeps_its_ends(void **state) {
    lee_case c = read_whole(state);
    assert_false(c.problem.lake.start.is_held);
    assert_true(c.problem.lake.end.is_held);
    assert_near(lee_level_at(&c.problem.lake.end.level, 0.0), 101.2, 0.0);
    lee_case_free(&c);
}

static void a_case_keeps_its_bed_law(void **state) {
    lee_case c = read_whole(state);
    assert_int_equal(c.problem.bed.kind, LEE_BED_MANNING);
    assert_near(c.problem.bed.value, 0.022, 0.0);
    lee_case_free(&c);
}

/* A knot is 1852/3600 m/s (definition); a wind from 240 degrees goes to 60,
 * whose cosine is a half. */
static void a_case_keeps_its_record(void **state) {
    lee_case c = read_whole(state);
    const lee_wind_source *wind = &c.problem.wind;
    assert_int_equal(wind->kind, LEE_WIND_RECORD);
    assert_int_equal(wind->record.n, 2);
    assert_int_equal(wind->record.stamp, LEE_STAMP_END);
    const double knot = 1852.0 / 3600.0;
    assert_near(wind->record.north[0], 10.0 * knot * 0.5, 1e-12);
    assert_int_equal(wind->gap.largest, 7200);
    assert_true(wind->gap.split);
    assert_int_equal(wind->record_count, 1);
    assert_string_equal(strrchr(wind->record_path[0], '/'), "/wind.csv");
    lee_case_free(&c);
}

static void a_case_keeps_its_exposure(void **state) {
    lee_case c = read_whole(state);
    const lee_exposure *exposure = &c.problem.exposure;
    assert_near(exposure->height, 12.0, 0.0);
    assert_int_equal(exposure->height_method, LEE_HEIGHT_POWER);
    assert_near(exposure->averaging, 600.0, 0.0);
    assert_false(exposure->is_maximum);
    assert_true(exposure->is_over_land);
    assert_near(exposure->land_roughness, 0.03, 0.0);
    assert_near(exposure->land_to_water, 1.2, 0.0);
    lee_case_free(&c);
}

static void a_case_keeps_its_stress(void **state) {
    lee_case c = read_whole(state);
    const lee_problem *problem = &c.problem;
    assert_string_equal(problem->drag.relation->name, "smith-banke-1975");
    assert_near(problem->drag.cap, 2.5e-3, 0.0);
    assert_true(isnan(problem->air.density));
    assert_near(problem->air.temperature, 278.15, 1e-12);
    assert_near(problem->air.pressure, 97000.0, 1e-9);
    assert_true(problem->return_flow_given);
    assert_false(problem->return_flow.is_computed);
    assert_near(problem->return_flow.value, 1.2, 0.0);
    lee_case_free(&c);
}

static void a_case_keeps_what_is_uncertain(void **state) {
    lee_case c = read_whole(state);
    assert_near(c.problem.uncertainty.wind, 0.1, 1e-16);
    assert_near(c.problem.uncertainty.depth, 0.2, 0.0);
    assert_near(c.problem.uncertainty.bed, 0.2, 1e-16);
    lee_case_free(&c);
}

static void a_case_keeps_its_stations(void **state) {
    lee_case c = read_whole(state);
    assert_int_equal(c.problem.station_count, 2);
    const lee_station *quay = &c.problem.station[0];
    const lee_station *landing = &c.problem.station[1];
    assert_string_equal(quay->name, "North quay");
    assert_near(quay->at, 400.0, 1e-12);
    assert_near(quay->bed, 99.1, 0.0);
    assert_true(isnan(quay->longitude) && isnan(quay->latitude));
    assert_near(landing->at, 11800.0, 1e-11);
    assert_true(isnan(landing->bed));
    assert_near(landing->longitude, 8.01, 0.0);
    assert_near(landing->latitude, 47.3, 0.0);
    lee_case_free(&c);
}

static void a_case_keeps_the_thresholds_of_its_stations(void **state) {
    lee_case c = read_whole(state);
    const lee_station *quay = &c.problem.station[0];
    const lee_station *landing = &c.problem.station[1];
    assert_int_equal(quay->threshold_count, 1);
    assert_true(quay->threshold[0].is_below);
    assert_near(quay->threshold[0].level, 100.9, 0.0);
    assert_int_equal(landing->threshold_count, 3);
    assert_false(landing->threshold[1].is_below);
    assert_near(landing->threshold[1].level, 102.5, 0.0);
    assert_true(landing->threshold[2].is_below);
    lee_case_free(&c);
}

static void a_case_keeps_its_window_in_utc(void **state) {
    lee_case c = read_whole(state);
    const lee_run_window *run = &c.problem.run;
    char text[LEE_TIME_TEXT];
    assert_true(run->has_from && run->has_to);
    assert_string_equal(lee_time_format(run->from, text),
                        "2031-01-10T00:00:00Z");
    assert_string_equal(lee_time_format(run->to, text), "2031-01-20T00:00:00Z");
    assert_int_equal(run->start, LEE_START_STEADY);
    assert_int_equal(run->every, 600);
    lee_case_free(&c);
}

static void a_case_keeps_its_solver(void **state) {
    lee_case c = read_whole(state);
    assert_int_equal(c.problem.solver.cells, 120);
    assert_near(c.problem.solver.step, 30.0, 0.0);
    assert_near(c.problem.solver.dry_depth, 0.02, 1e-17);
    assert_false(c.problem.solver.has_advection);
    lee_case_free(&c);
}

static void a_lake_alone_is_a_case(void **state) {
    lee_case c = read_case(state, LAKE);
    assert_int_equal(c.problem.wind.kind, LEE_WIND_NONE);
    assert_null(c.title);
    assert_null(c.problem.lake.name);
    assert_int_equal(c.problem.station_count, 0);
    lee_case_free(&c);
}

static void what_a_case_leaves_out_is_the_default(void **state) {
    lee_case c = read_case(state, LAKE);
    lee_problem usual = lee_problem_default();
    const lee_problem *read = &c.problem;
    assert_near(read->lake.water_density, usual.lake.water_density, 0.0);
    assert_near(read->lake.gravity, usual.lake.gravity, 0.0);
    assert_int_equal(read->bed.kind, usual.bed.kind);
    assert_near(read->bed.value, usual.bed.value, 0.0);
    assert_ptr_equal(read->drag.relation, usual.drag.relation);
    assert_near(read->drag.cap, usual.drag.cap, 0.0);
    assert_near(read->exposure.height, usual.exposure.height, 0.0);
    assert_near(read->solver.dry_depth, usual.solver.dry_depth, 0.0);
    assert_int_equal(read->wind.gap.largest, usual.wind.gap.largest);
    assert_false(read->return_flow_given);
    lee_problem_free(&usual);
    lee_case_free(&c);
}

static void words_for_automatic_and_none_are_read(void **state) {
    lee_case c = read_case(state, LAKE "stress: {drag_cap: none, "
                                       "return_flow: computed}\n"
                                       "solver: {cells: auto, step: auto}\n");
    assert_true(isinf(c.problem.drag.cap));
    assert_true(c.problem.return_flow.is_computed);
    assert_true(c.problem.return_flow_given);
    assert_int_equal(c.problem.solver.cells, 0);
    assert_near(c.problem.solver.step, 0.0, 0.0);
    lee_case_free(&c);
}

static void a_freed_case_is_empty_and_may_be_freed_again(void **state) {
    lee_case c = read_whole(state);
    lee_case_free(&c);
    assert_null(c.title);
    assert_null(c.problem.station);
    lee_case_free(&c);
}

static void a_missing_case_is_named(void **state) {
    (void)state;
    lee_case c = {0};
    lee_error error = {0};
    assert_int_equal(lee_case_read("not-there.yaml", &c, &error), LEE_ERR_FILE);
    assert_string_equal(
        error.message,
        "not-there.yaml: cannot be opened: No such file or directory");
}

static void a_missing_profile_is_told_with_who_named_it(void **state) {
    assert_told_as(state,
                   "lake:\n  still_water: 1 m\n"
                   "  axis: {bearing: 0 degree, profile: gone.csv}\n",
                   LEE_ERR_FILE,
                   "gone.csv: cannot be opened: No such file or "
                   "directory (named at a.yaml:3:38)");
}

static void a_bad_record_speaks_for_itself(void **state) {
    folder_write(*state, "wind.csv",
                 "time,speed [m/s],from [degree]\n2031-01-10T00:00Z,5,400\n");
    lee_case c = {0};
    lee_error error = {0};
    const char *path =
        folder_write(*state, "a.yaml", LAKE "wind: {record: wind.csv}\n");
    assert_int_equal(lee_case_read(path, &c, &error), LEE_ERR_FORMAT);
    hide_folder(*state, error.message);
    assert_ptr_equal(strstr(error.message, "wind.csv:2:21: "), error.message);
    assert_non_null(strstr(error.message, " (named at a.yaml:4:16)"));
}

static void several_bad_files_are_told_at_once(void **state) {
    assert_told_as(state,
                   "lake:\n  still_water: 1 m\n"
                   "  axis: {bearing: 0 degree, profile: gone.csv}\n"
                   "wind: {record: lost.csv}\n"
                   "stress: {drag: {table: none.csv}}\n",
                   LEE_ERR_FILE,
                   "gone.csv: cannot be opened: No such file or "
                   "directory (named at a.yaml:3:38)\n"
                   "lost.csv: cannot be opened: No such file or "
                   "directory (named at a.yaml:4:16)\n"
                   "none.csv: cannot be opened: No such file or "
                   "directory (named at a.yaml:5:24)");
}

static void the_status_is_that_of_the_first_problem(void **state) {
    folder_write(*state, "axis.csv", "chainage [km],bed [m]\n0,1\n");
    lee_case c = {0};
    lee_error error = {0};
    const char *path =
        folder_write(*state, "a.yaml",
                     "lake:\n  still_water: 1 m\n"
                     "  axis: {bearing: 0 degree, profile: axis.csv}\n"
                     "wind: {record: lost.csv}\n");
    assert_int_equal(lee_case_read(path, &c, &error), LEE_ERR_FORMAT);
    assert_non_null(strstr(error.message, "width"));
    assert_non_null(strstr(error.message, "lost.csv: cannot be opened"));
}

static void a_file_with_a_whole_path_is_found(void **state) {
    char here[512];
    assert_non_null(getcwd(here, sizeof here));
    const char *axis = folder_write(*state, "axis.csv", axis_csv);
    char text[1024];
    (void)snprintf(text, sizeof text,
                   "lake:\n  still_water: 1 m\n"
                   "  axis: {bearing: 0 degree, profile: %s/%s}\n",
                   here, axis);
    lee_case c = read_case(state, text);
    assert_int_equal(c.problem.lake.profile.n, 3);
    lee_case_free(&c);
}

static void files_are_read_only_for_a_case_in_order(void **state) {
    assert_told(state,
                "lake:\n  still_water: 1 m\n"
                "  axis: {bearing: 0 degree, profile: gone.csv}\n"
                "run: {strat: rest}\n",
                "a.yaml:4:7: unknown key 'strat' in 'run'; did you mean "
                "'start'?");
}

static void a_window_that_ends_before_it_begins_is_refused(void **state) {
    assert_told(state, LAKE "run: {from: 2031-01-10, to: 2031-01-10}\n",
                "a.yaml:4:29: 'run.to' is not later than 'run.from'");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        CASE_TEST(a_case_keeps_who_it_is_from),
        CASE_TEST(a_case_keeps_the_paths_of_all_that_it_was_read_from),
        CASE_TEST(a_case_keeps_its_lake),
        CASE_TEST(a_case_keeps_its_axis),
        CASE_TEST(a_case_keeps_its_ends),
        CASE_TEST(a_case_keeps_its_bed_law),
        CASE_TEST(a_case_keeps_its_record),
        CASE_TEST(a_case_keeps_its_exposure),
        CASE_TEST(a_case_keeps_its_stress),
        CASE_TEST(a_case_keeps_what_is_uncertain),
        CASE_TEST(a_case_keeps_its_stations),
        CASE_TEST(a_case_keeps_the_thresholds_of_its_stations),
        CASE_TEST(a_case_keeps_its_window_in_utc),
        CASE_TEST(a_case_keeps_its_solver),
        CASE_TEST(a_lake_alone_is_a_case),
        CASE_TEST(what_a_case_leaves_out_is_the_default),
        CASE_TEST(words_for_automatic_and_none_are_read),
        CASE_TEST(a_freed_case_is_empty_and_may_be_freed_again),
        CASE_TEST(a_missing_case_is_named),
        CASE_TEST(a_missing_profile_is_told_with_who_named_it),
        CASE_TEST(a_bad_record_speaks_for_itself),
        CASE_TEST(several_bad_files_are_told_at_once),
        CASE_TEST(the_status_is_that_of_the_first_problem),
        CASE_TEST(a_file_with_a_whole_path_is_found),
        CASE_TEST(files_are_read_only_for_a_case_in_order),
        CASE_TEST(a_window_that_ends_before_it_begins_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
