/* A case says how its NetCDF record is to be read. */
#include "support/case_text.h"
#include "support/cdl.h"

#include "leewater/calendar.h"

/* Two stations, components without units, times without units. */
#define BARE                                                         \
    "dimensions: step = 2; s = 2; l = 4; variables: int step(step);" \
    " float u(step, s); float v(step, s); char name(s, l);"          \
    " name:cf_role = \"timeseries_id\"; float lat(s); float lon(s);" \
    " lat:units = \"degrees_north\"; lon:units = \"degrees_east\";"  \
    " data: step = 0, 6; u = 1, 2, 3, 4; v = 5, 6, 7, -70;"          \
    " name = \"quay\", \"lee\"; lat = 47, 48; lon = 8, 8;"
#define HOW(more)                                                       \
    LAKE "wind: {record: w.nc, time: {column: step, unit: hours since " \
         "1996-01-05 00:00}, eastward: {column: u, unit: m/s}, "        \
         "northward: {column: v, unit: km/h}" more "}\n"

static void write_bare(void **state) {
    (void)folder_write_cdl(*state, "w.nc", "classic", BARE);
}

static void names_units_and_station_of_the_case_are_used(void **state) {
    write_bare(state);
    lee_case c =
        read_case(state, HOW(", station: lee, missing: -70, stamp: end"));
    const lee_wind_record *record = &c.problem.wind.record;
    char text[LEE_TIME_TEXT];
    assert_int_equal(c.problem.wind.kind, LEE_WIND_RECORD);
    assert_int_equal(record->n, 2);
    assert_string_equal(lee_time_format(record->time[1], text),
                        "1996-01-05T06:00:00Z");
    assert_near(record->east[0], 2.0, 0.0);
    /* 6 km/h; a division and a multiplication. */
    assert_near(record->north[0], 6.0 / 3.6, 1e-15);
    assert_true(isnan(record->east[1]));
    assert_int_equal(record->stamp, LEE_STAMP_END);
    lee_case_free(&c);
}

static void a_position_finds_the_station_near_it(void **state) {
    write_bare(state);
    lee_case c =
        read_case(state, HOW(", position: {lon: 8 degree, lat: 47.1 degree}"));
    assert_near(c.problem.wind.record.east[0], 1.0, 0.0);
    lee_case_free(&c);
}

static void what_was_read_is_kept_for_check(void **state) {
    write_bare(state);
    lee_case c = read_case(state, HOW(", station: '#1', calendar: noleap"));
    static const char *const expected[] = {
        "eastward: 'u' in m/s, as the case says",
        "time: 'step', hours since 1996-01-05 00:00, calendar noleap",
        "station 'quay', number 1 of 2",
        "northward: 'v' in km/h, as the case says",
    };
    const lee_notes *told = &c.problem.wind.record_told;
    assert_int_equal(told->n, 4);
    for (size_t i = 0; i < 4; i++) {
        assert_string_equal(told->text[i], expected[i]);
    }
    lee_case_free(&c);
}

static void a_case_read_apart_is_the_same(void **state) {
    write_bare(state);
    lee_case c = {0};
    const char *path = folder_write(*state, "a.yaml", HOW(", station: lee"));
    assert_int_equal(lee_case_read_apart(path, &c, NULL), LEE_OK);
    assert_near(c.problem.wind.record.east[1], 4.0, 0.0);
    assert_int_equal(c.problem.wind.record_told.n, 4);
    lee_case_free(&c);
}

static void a_component_may_stand_in_a_file_of_its_own(void **state) {
    write_bare(state);
    (void)folder_write_cdl(*state, "v.nc", "classic",
                           "dimensions: step = 2; variables: int step(step);"
                           " float v(step); data: step = 0, 6; v = 36, 72;");
    lee_case c = read_case(
        state, LAKE "wind: {record: w.nc, time: {column: step, unit: hours "
                    "since 1996-01-05 00:00}, eastward: {column: u, unit: m/s},"
                    " northward: {column: v, unit: km/h, file: v.nc}, station: "
                    "quay, gaps: split}\n");
    assert_near(c.problem.wind.record.north[1], 20.0, 1e-14);
    /* The case, both files: none of them is ever written over. */
    assert_int_equal(c.inputs.n, 3);
    lee_case_free(&c);
}

static void files_of_both_kinds_are_joined(void **state) {
    (void)folder_write_cdl(
        *state, "w.nc", "classic",
        "dimensions: time = 2; variables: int time(time);"
        " time:units = \"hours since 2031-01-01\"; float speed(time);"
        " speed:units = \"m/s\"; float from(time); from:units = \"degree\";"
        " data: time = 0, 1; speed = 5, 6; from = 270, 270;");
    (void)folder_write(*state, "b.csv",
                       "time,speed [m/s],from [degree]\n"
                       "2031-01-01T02:00Z,7,270\n2031-01-01T03:00Z,8,270\n");
    lee_case c =
        read_case(state, LAKE
                  "wind: {record: [w.nc, b.csv], speed: speed, from: from}\n");
    assert_int_equal(c.problem.wind.record.n, 4);
    assert_near(c.problem.wind.record.east[3], 8.0, 1e-12);
    lee_case_free(&c);
}

static void the_readers_message_is_passed_on_with_its_place(void **state) {
    write_bare(state);
    assert_told_as(state, HOW(", station: mole"), LEE_ERR_DATA,
                   "w.nc: no station is called 'mole'; there are 2, such as "
                   "'quay', 'lee' (named at a.yaml:4:16)");
}

static void keys_of_netcdf_are_refused_for_csv(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "wind: {record: w.csv, station: quay}\n",
             "a.yaml:4:32: 'wind.station' is for NetCDF records; this one is "
             "CSV"),
        SLIP(LAKE "wind: {record: w.csv, calendar: noleap}\n",
             "a.yaml:4:33: 'wind.calendar' is for NetCDF records; this one is "
             "CSV"),
        SLIP(LAKE "wind: {record: w.csv, position: {lon: 8 degree, lat: 47 "
                  "degree}}\n",
             "a.yaml:4:33: 'wind.position' is for NetCDF records; this one is "
             "CSV"),
        SLIP(LAKE "wind: {record: w.csv, speed: {column: s, file: x.csv}}\n",
             "a.yaml:4:30: 'wind.speed' has a file of its own, which only a "
             "NetCDF record may"),
        SLIP(LAKE "wind: {record: w.csv, time: {column: t, unit: hours since "
                  "2000-01-01}}\n",
             "a.yaml:4:47: 'wind.time' takes no unit"),
    };
    assert_all_told(state, slips);
}

static void keys_of_csv_are_refused_for_netcdf(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "wind: {record: w.nc, variable: VRB}\n",
             "a.yaml:4:32: 'wind.variable' is for CSV records; this one is "
             "NetCDF"),
        SLIP(LAKE "wind: {record: w.cdf, date: d, clock: c}\n",
             "a.yaml:4:29: 'wind.date' is for CSV records; this one is NetCDF\n"
             "a.yaml:4:39: 'wind.clock' is for CSV records; this one is "
             "NetCDF"),
        SLIP(LAKE "wind: {record: w.nc, missing: x}\n",
             "a.yaml:4:31: 'wind.missing' lists 'x'; a NetCDF file holds "
             "numbers"),
    };
    assert_all_told(state, slips);
}

static void what_makes_no_sense_together_is_refused(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "wind: {record: w.nc, station: a, position: {lon: 8 degree, "
                  "lat: 47 degree}}\n",
             "a.yaml:4:34: 'station' and 'position' exclude each other in "
             "'wind'"),
        SLIP(LAKE "wind: {record: w.nc, position: {lon: 8 degree}}\n",
             "a.yaml:4:32: required key 'lat' is missing from "
             "'wind.position'"),
        SLIP(LAKE "wind: {record: w.nc, position: {lon: 8 degree, lat: 97 "
                  "degree}}\n",
             "a.yaml:4:53: 'wind.position.lat' is '97 degree'; expected -90 "
             "to 90 degree"),
        SLIP(LAKE "wind: {record: w.nc, position: {lon: 8 degree, lat: 47 "
                  "degree, method: spline}}\n",
             "a.yaml:4:72: 'wind.position.method' is 'spline'; expected one of "
             "nearest, bilinear"),
        SLIP(LAKE "wind: {record: [w.nc, x.nc], eastward: u, northward: "
                  "{column: v, file: v.nc}}\n",
             "a.yaml:4:54: 'wind.northward' has a file of its own beside a "
             "list of files; only one record may"),
    };
    assert_all_told(state, slips);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        CASE_TEST(names_units_and_station_of_the_case_are_used),
        CASE_TEST(a_position_finds_the_station_near_it),
        CASE_TEST(what_was_read_is_kept_for_check),
        CASE_TEST(a_case_read_apart_is_the_same),
        CASE_TEST(a_component_may_stand_in_a_file_of_its_own),
        CASE_TEST(files_of_both_kinds_are_joined),
        CASE_TEST(the_readers_message_is_passed_on_with_its_place),
        CASE_TEST(keys_of_netcdf_are_refused_for_csv),
        CASE_TEST(keys_of_csv_are_refused_for_netcdf),
        CASE_TEST(what_makes_no_sense_together_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
