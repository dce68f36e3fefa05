/* The field of a run holds the water along the axis at every output time.
 * NetCDF-C reads it back. */
#include "support/case_text.h"

#include <math.h>
#include <sys/stat.h>

#include <netcdf.h>

#include "leewater/output.h"

enum { CELLS = 20, FACES = CELLS - 1, TIMES = 2000 };

/* A canal of 10 km by 200 m, 3 m deep, that a wind along it blows over for an
 * hour; levels every minute, which is the step. */
static const char canal[] =
    "lake:\n"
    "  name: Long Pool\n"
    "  still_water: 100 m\n"
    "  axis:\n"
    "    bearing: 90 degree\n"
    "    uniform: {length: 10 km, depth: 3 m, width: 200 m}\n"
    "  bed: {manning: 0.02}\n"
    "wind: {speed: 12 m/s, from: 270 degree, duration: 1 h}\n"
    "stress: {drag: 1.5e-3, air_density: 1.25 kg m-3, return_flow: 1.1}\n"
    "stations:\n"
    "  - {name: Near, at: 250 m, above: 100.2 m}\n"
    "  - {name: Far, at: 9750 m}\n"
    "run: {every: 1 min}\n"
    "solver: {cells: 20, step: 60 s}\n";

/* A run and its field, read back. */
typedef struct outcome {
    lee_case from;
    lee_run_result result;
    size_t n;
    double level[TIMES][CELLS];
    double transport[TIMES][FACES];
    double stress[TIMES][FACES];
    double time[TIMES];
    signed char spin_up[TIMES];
    double area[CELLS];
    int drag_length; /* of the attribute that tells the drag */
} outcome;

static void path_in(const test_folder *in, char path[FOLDER_PATH]) {
    (void)snprintf(path, FOLDER_PATH, "%s/field.nc", in->path);
}

static lee_run_options options_for(lee_field_file *file) {
    lee_run_options options = lee_run_options_default();
    options.has_own_error = false;
    options.take_field = lee_field_file_take;
    options.field_user = file;
    return options;
}

static void read_all(int id, const char *name, void *values) {
    int variable;
    assert_int_equal(nc_inq_varid(id, name, &variable), NC_NOERR);
    assert_int_equal(nc_get_var(id, variable, values), NC_NOERR);
}

static void read_field(const char *path, outcome *out) {
    int id;
    int dimension;
    size_t length = 0;
    assert_int_equal(nc_open(path, NC_NOWRITE, &id), NC_NOERR);
    assert_int_equal(nc_inq_dimid(id, "time", &dimension), NC_NOERR);
    assert_int_equal(nc_inq_dimlen(id, dimension, &out->n), NC_NOERR);
    assert_true(out->n > 100 && out->n <= TIMES);
    read_all(id, "water_level", out->level);
    read_all(id, "transport", out->transport);
    read_all(id, "wind_stress", out->stress);
    read_all(id, "time", out->time);
    read_all(id, "spin_up", out->spin_up);
    read_all(id, "cell_area", out->area);
    assert_int_equal(nc_inq_attlen(id, NC_GLOBAL, "drag_relation", &length),
                     NC_NOERR);
    out->drag_length = (int)length;
    assert_int_equal(nc_close(id), NC_NOERR);
    (void)unlink(path);
}

static outcome *run_canal(test_folder *in) {
    static outcome out;
    char path[FOLDER_PATH];
    lee_error error = {0};
    lee_field_file *file = NULL;
    path_in(in, path);
    out = (outcome){0};
    const char *text = folder_write(in, "case.yaml", canal);
    if (lee_case_read(text, &out.from, &error) != LEE_OK) {
        fail_msg("%s", error.message);
    }
    const lee_target target = {.path = path};
    assert_int_equal(lee_field_file_new(&target, &out.from, &file, NULL),
                     LEE_OK);
    const lee_run_options options = options_for(file);
    if (lee_estimate_run(&out.from.problem, &options, &out.result, &error) !=
            LEE_OK ||
        lee_field_file_finish(file, &out.result, &error) != LEE_OK) {
        fail_msg("%s", error.message);
    }
    lee_field_file_free(file);
    read_field(path, &out);
    return &out;
}

static void release(outcome *out) {
    lee_run_result_free(&out->result);
    lee_case_free(&out->from);
}

static void its_times_are_those_of_the_run(void **state) {
    outcome *out = run_canal(*state);
    assert_int_equal(out->n, out->result.n);
    for (size_t i = 0; i < out->n; i++) {
        assert_true(out->time[i] == (double)out->result.time[i]);
    }
    release(out);
}

static void a_level_at_a_node_is_that_of_a_station_there(void **state) {
    outcome *out = run_canal(*state);
    for (size_t i = 0; i < out->n; i++) {
        /* the line through two nodes, in another order of sums */
        assert_near(out->level[i][0], out->result.station[0].level[i], 1e-12);
        assert_near(out->level[i][CELLS - 1], out->result.station[1].level[i],
                    1e-12);
    }
    release(out);
}

/* b dx (eta - eta_before) = dt (Q_in - Q_out), exactly but for rounding of
 * levels of 100 m: 2e-14 m over 1e5 m2. */
static void transports_carry_what_levels_gain(void **state) {
    outcome *out = run_canal(*state);
    for (size_t i = 1; i < out->n; i++) {
        const double step = out->time[i] - out->time[i - 1];
        for (size_t k = 0; k < CELLS; k++) {
            const double in = k > 0 ? out->transport[i][k - 1] : 0.0;
            const double left = k < FACES ? out->transport[i][k] : 0.0;
            const double gain = out->level[i][k] - out->level[i - 1][k];
            assert_near(out->area[k] * gain, step * (in - left), 1e-7);
        }
    }
    release(out);
}

/* 1.25 x 1.5e-3 x 12^2 = 0.27 Pa, without the return-flow factor. */
static void the_stress_is_that_of_the_wind_alone(void **state) {
    outcome *out = run_canal(*state);
    assert_near(out->stress[30][7], 0.27, 1e-12);
    assert_near(out->stress[out->n - 1][7], 0.0, 0.0);
    release(out);
}

static void its_spin_up_is_that_of_the_run(void **state) {
    outcome *out = run_canal(*state);
    for (size_t i = 0; i < out->n; i++) {
        assert_int_equal(out->spin_up[i], out->result.is_spin_up[i]);
    }
    release(out);
}

static void the_method_is_told_though_it_is_known_last(void **state) {
    outcome *out = run_canal(*state);
    assert_int_equal(out->drag_length, strlen("constant 0.0015"));
    release(out);
}

static bool stop_half_way(void *user, double share) {
    (void)user;
    return share < 0.1;
}

static void a_run_that_is_stopped_leaves_no_file(void **state) {
    test_folder *in = *state;
    lee_case from = {0};
    lee_run_result result = {0};
    lee_field_file *file = NULL;
    struct stat about;
    char path[FOLDER_PATH];
    path_in(in, path);
    assert_int_equal(
        lee_case_read(folder_write(in, "case.yaml", canal), &from, NULL),
        LEE_OK);
    const lee_target target = {.path = path};
    assert_int_equal(lee_field_file_new(&target, &from, &file, NULL), LEE_OK);
    lee_run_options options = options_for(file);
    options.keep_going = stop_half_way;
    assert_int_equal(lee_estimate_run(&from.problem, &options, &result, NULL),
                     LEE_ERR_INTERRUPTED);
    lee_field_file_free(file);
    assert_int_equal(stat(path, &about), -1);
    lee_case_free(&from);
}

static void another_ending_than_nc_is_refused(void **state) {
    test_folder *in = *state;
    lee_case from = {0};
    lee_error error = {0};
    lee_field_file *file = NULL;
    assert_int_equal(
        lee_case_read(folder_write(in, "case.yaml", canal), &from, NULL),
        LEE_OK);
    const lee_target target = {.path = "field.csv"};
    assert_int_equal(lee_field_file_new(&target, &from, &file, &error),
                     LEE_ERR_ARGUMENT);
    assert_non_null(strstr(error.message, "a field is written as .nc"));
    lee_case_free(&from);
}

static void what_the_case_reads_is_never_replaced(void **state) {
    test_folder *in = *state;
    lee_case from = {0};
    lee_field_file *file = NULL;
    const char *path = folder_write(in, "case.nc", canal);
    assert_int_equal(lee_case_read(path, &from, NULL), LEE_OK);
    const lee_target target = {.path = path, .force = true};
    assert_int_equal(lee_field_file_new(&target, &from, &file, NULL),
                     LEE_ERR_FILE);
    lee_case_free(&from);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        FOLDER_TEST(its_times_are_those_of_the_run),
        FOLDER_TEST(a_level_at_a_node_is_that_of_a_station_there),
        FOLDER_TEST(transports_carry_what_levels_gain),
        FOLDER_TEST(the_stress_is_that_of_the_wind_alone),
        FOLDER_TEST(its_spin_up_is_that_of_the_run),
        FOLDER_TEST(the_method_is_told_though_it_is_known_last),
        FOLDER_TEST(a_run_that_is_stopped_leaves_no_file),
        FOLDER_TEST(another_ending_than_nc_is_refused),
        FOLDER_TEST(what_the_case_reads_is_never_replaced),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
