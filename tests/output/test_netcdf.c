/* NetCDF results hold what was computed, with units, datum, method and
 * caution. NetCDF-C reads them back. */
#include "support/files.h"
#include "support/results.h"

#include <sys/stat.h>

#include <netcdf.h>

#include "leewater/output.h"

static const char *path_of(const test_folder *in) {
    static char path[FOLDER_PATH];
    (void)snprintf(path, sizeof path, "%s/levels.nc", in->path);
    return path;
}

/* Writes the run, opens it, and takes its name away. */
static int open_run(const test_folder *in, const hand_made *made) {
    lee_error error = {0};
    int id;
    const char *path = path_of(in);
    const lee_target target = {.path = path, .date = 86400};
    if (lee_write_run(&target, &made->from, &made->run, &error) != LEE_OK) {
        fail_msg("%s", error.message);
    }
    assert_int_equal(nc_open(path, NC_NOWRITE, &id), NC_NOERR);
    (void)unlink(path);
    return id;
}

static int open_steady(const test_folder *in, const hand_made *made) {
    lee_error error = {0};
    int id;
    const char *path = path_of(in);
    const lee_target target = {.path = path, .date = 86400};
    if (lee_write_steady(&target, &made->from, &made->steady, &error) !=
        LEE_OK) {
        fail_msg("%s", error.message);
    }
    assert_int_equal(nc_open(path, NC_NOWRITE, &id), NC_NOERR);
    (void)unlink(path);
    return id;
}

static void read_all(int id, const char *name, double values[]) {
    int variable;
    assert_int_equal(nc_inq_varid(id, name, &variable), NC_NOERR);
    assert_int_equal(nc_get_var_double(id, variable, values), NC_NOERR);
}

/* An attribute of a variable, or of the whole when that is NULL; "" when
 * there is none. */
static const char *text_of(int id, const char *name, const char *attribute) {
    static char text[4096];
    int variable = NC_GLOBAL;
    memset(text, 0, sizeof text);
    if (name != NULL) {
        assert_int_equal(nc_inq_varid(id, name, &variable), NC_NOERR);
    }
    (void)nc_get_att_text(id, variable, attribute, text);
    return text;
}

/* Values of one station out of [time][station], of which there are two. */
static void assert_column(const double read[], size_t station, size_t n,
                          const double expected[]) {
    for (size_t t = 0; t < n; t++) {
        assert_memory_equal(&read[2 * t + station], &expected[t],
                            sizeof(double));
    }
}

static void levels_come_back_to_the_bit(void **state) {
    hand_made made;
    double read[6];
    make(&made);
    const int id = open_run(*state, &made);
    read_all(id, "water_level", read);
    assert_column(read, 0, 3, made.quay);
    assert_column(read, 1, 2, made.landing); /* dry in the end */
    (void)nc_close(id);
}

static void a_dry_time_is_missing(void **state) {
    hand_made made;
    double read[6];
    make(&made);
    const int id = open_run(*state, &made);
    read_all(id, "water_level", read);
    assert_true(read[5] == NC_FILL_DOUBLE);
    (void)nc_close(id);
}

static void times_are_seconds_since_1970(void **state) {
    hand_made made;
    double read[3];
    make(&made);
    const int id = open_run(*state, &made);
    read_all(id, "time", read);
    assert_true(read[2] == (double)made_day + 1200.0);
    assert_string_equal(text_of(id, "time", "units"),
                        "seconds since 1970-01-01 00:00:00");
    (void)nc_close(id);
}

static void winds_are_told_in_degrees(void **state) {
    hand_made made;
    double read[3];
    make(&made);
    const int id = open_run(*state, &made);
    read_all(id, "wind_from_direction", read);
    assert_near(read[1], 241.0, 1e-9);
    (void)nc_close(id);
}

static void a_threshold_tells_its_station_side_and_first_time(void **state) {
    hand_made made;
    double read[2];
    make(&made);
    const int id = open_run(*state, &made);
    read_all(id, "threshold_station", read);
    assert_true(read[0] == 1.0 && read[1] == 1.0);
    read_all(id, "threshold_side", read);
    assert_true(read[0] == 0.0 && read[1] == 1.0);
    read_all(id, "threshold_first_time", read);
    assert_true(read[0] == (double)made_day + 300.0);
    assert_true(read[1] == -99999999999.0); /* never reached */
    (void)nc_close(id);
}

static void the_highest_level_has_its_range_and_time(void **state) {
    hand_made made;
    double read[2];
    make(&made);
    const int id = open_run(*state, &made);
    read_all(id, "level_max_low", read);
    assert_true(read[1] == 101.7);
    read_all(id, "level_max_high", read);
    assert_true(read[1] == 102.0);
    read_all(id, "level_max_time", read);
    assert_true(read[1] == (double)made_day + 600.0);
    (void)nc_close(id);
}

static void low_and_high_stand_beside_levels_when_they_were_kept(void **state) {
    hand_made made;
    double read[6];
    make(&made);
    made.series[0].low = made.series[1].low = made.low;
    made.series[0].high = made.series[1].high = made.high;
    const int id = open_run(*state, &made);
    read_all(id, "water_level_low", read);
    assert_column(read, 0, 3, made.low);
    assert_column(read, 1, 3, made.low);
    read_all(id, "water_level_high", read);
    assert_column(read, 0, 3, made.high);
    assert_column(read, 1, 3, made.high);
    (void)nc_close(id);
}

static void without_a_range_there_is_no_low_end(void **state) {
    hand_made made;
    int variable;
    make(&made);
    const int id = open_run(*state, &made);
    assert_int_equal(nc_inq_varid(id, "water_level_low", &variable),
                     NC_ENOTVAR);
    (void)nc_close(id);
}

static void datum_method_and_caution_are_attributes(void **state) {
    hand_made made;
    make(&made);
    const int id = open_run(*state, &made);
    assert_string_equal(text_of(id, NULL, "datum"), "Marrow gauge zero");
    assert_string_equal(text_of(id, NULL, "drag_relation"),
                        "garratt-linear-1977");
    assert_non_null(strstr(text_of(id, NULL, "wind_corrections"),
                           "height x 1.0940, neutral log profile (a source)"));
    assert_string_equal(text_of(id, NULL, "caution"), lee_caution());
    (void)nc_close(id);
}

static void the_datum_has_an_altitude_where_the_case_gives_it(void **state) {
    hand_made made;
    double altitude;
    make(&made);
    made.from.problem.lake.datum_altitude = 238.5;
    const int id = open_run(*state, &made);
    read_all(id, "water_surface_reference_datum_altitude", &altitude);
    assert_true(altitude == 238.5);
    (void)nc_close(id);
}

static void without_positions_no_feature_type_is_claimed(void **state) {
    hand_made made;
    make(&made);
    const int id = open_run(*state, &made);
    assert_string_equal(text_of(id, NULL, "featureType"), "");
    assert_non_null(strstr(text_of(id, NULL, "comment"), "longitude"));
    (void)nc_close(id);
}

static void stations_with_positions_are_time_series(void **state) {
    hand_made made;
    double read[2];
    make(&made);
    for (int i = 0; i < 2; i++) {
        made.station[i].longitude = 8.0 + i;
        made.station[i].latitude = 47.0;
    }
    const int id = open_run(*state, &made);
    assert_string_equal(text_of(id, NULL, "featureType"), "timeSeries");
    assert_string_equal(text_of(id, "station_name", "cf_role"),
                        "timeseries_id");
    read_all(id, "lon", read);
    assert_true(read[0] == 8.0 && read[1] == 9.0);
    (void)nc_close(id);
}

static void the_only_date_is_the_one_given(void **state) {
    hand_made made;
    make(&made);
    const int id = open_run(*state, &made);
    assert_string_equal(text_of(id, NULL, "date_created"),
                        "1970-01-02T00:00:00Z");
    assert_non_null(
        strstr(text_of(id, NULL, "history"), "1970-01-02T00:00:00Z leewater"));
    (void)nc_close(id);
}

static void a_case_without_stations_is_refused(void **state) {
    hand_made made;
    lee_error error = {0};
    make(&made);
    made.from.problem.station_count = 0;
    assert_int_equal(lee_check_target(&(lee_target){.path = path_of(*state)},
                                      &made.from, &error),
                     LEE_ERR_DATA);
    assert_non_null(strstr(error.message, "names none"));
}

static void steady_levels_stand_by_wind_and_station(void **state) {
    hand_made made;
    double read[2];
    make(&made);
    const int id = open_steady(*state, &made);
    read_all(id, "water_level", read);
    assert_true(read[0] == 100.95 && read[1] == 101.755);
    read_all(id, "water_level_high", read);
    assert_true(read[1] == 101.89);
    (void)nc_close(id);
}

static void steady_winds_have_set_up_and_its_range(void **state) {
    hand_made made;
    double read;
    make(&made);
    const int id = open_steady(*state, &made);
    read_all(id, "set_up", &read);
    assert_true(read == 0.412);
    read_all(id, "set_up_low", &read);
    assert_true(read == 0.31);
    read_all(id, "wind_from_direction", &read);
    assert_near(read, 240.0, 1e-9);
    (void)nc_close(id);
}

static void a_steady_wind_has_its_warnings(void **state) {
    hand_made made;
    make(&made);
    char *texts[] = {word(&made, 7, "dry shore"), word(&made, 6, "a sill")};
    made.wind[0].warnings = (lee_notes){2, texts};
    const int id = open_steady(*state, &made);
    assert_string_equal(text_of(id, NULL, "wind_warnings"),
                        "22.00 m s-1 from 240.00 degree: dry shore; a sill");
    (void)nc_close(id);
}

static void a_threshold_tells_whether_a_steady_level_reaches_it(void **state) {
    hand_made made;
    signed char read[2];
    int variable;
    make(&made);
    const int id = open_steady(*state, &made);
    assert_int_equal(nc_inq_varid(id, "threshold_reached", &variable),
                     NC_NOERR);
    assert_int_equal(nc_get_var_schar(id, variable, read), NC_NOERR);
    assert_int_equal(read[0], 1); /* 101.755, high 101.89, above 101.8 */
    assert_int_equal(read[1], 0); /* low 101.65, below 100.9 */
    (void)nc_close(id);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        FOLDER_TEST(levels_come_back_to_the_bit),
        FOLDER_TEST(a_dry_time_is_missing),
        FOLDER_TEST(times_are_seconds_since_1970),
        FOLDER_TEST(winds_are_told_in_degrees),
        FOLDER_TEST(a_threshold_tells_its_station_side_and_first_time),
        FOLDER_TEST(the_highest_level_has_its_range_and_time),
        FOLDER_TEST(low_and_high_stand_beside_levels_when_they_were_kept),
        FOLDER_TEST(without_a_range_there_is_no_low_end),
        FOLDER_TEST(datum_method_and_caution_are_attributes),
        FOLDER_TEST(the_datum_has_an_altitude_where_the_case_gives_it),
        FOLDER_TEST(without_positions_no_feature_type_is_claimed),
        FOLDER_TEST(stations_with_positions_are_time_series),
        FOLDER_TEST(the_only_date_is_the_one_given),
        FOLDER_TEST(a_case_without_stations_is_refused),
        FOLDER_TEST(steady_levels_stand_by_wind_and_station),
        FOLDER_TEST(steady_winds_have_set_up_and_its_range),
        FOLDER_TEST(a_steady_wind_has_its_warnings),
        FOLDER_TEST(a_threshold_tells_whether_a_steady_level_reaches_it),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
