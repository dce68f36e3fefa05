/* What a NetCDF file does not say, or says wrong, is refused by name. */
#include "wind/netcdf_support.h"

#define TIMES(n) "dimensions: time = " n "; variables:" TIME_OF("time")
#define WIND     EAST("time") NORTH("time")

static const lee_wind_netcdf named = {
    .column[LEE_WIND_EASTWARD] = {.name = "u"},
    .column[LEE_WIND_NORTHWARD] = {.name = "v"},
};

static void a_file_without_wind_is_refused(void **state) {
    (void)state;
    assert_refused(&plain, TIMES("1") "float t(time); data: time = 0; t = 1;",
                   LEE_ERR_FORMAT,
                   "wind.nc: no variables are eastward_wind and "
                   "northward_wind, or wind_speed and wind_from_direction, by "
                   "their standard names; the case has to name them");
}

static void half_a_wind_is_refused(void **state) {
    (void)state;
    assert_refused(&plain, TIMES("1") EAST("time") DATA("time = 0; u = 1;"),
                   LEE_ERR_FORMAT,
                   "wind.nc: there is 'eastward' but nothing that is "
                   "'northward' by its standard name; the case has to name it");
}

static void a_name_that_is_not_there_is_refused_with_the_nearest(void **s) {
    (void)s;
    const lee_wind_netcdf how = {
        .column[LEE_WIND_EASTWARD] = {.name = "uwint"},
        .column[LEE_WIND_NORTHWARD] = {.name = "v"},
    };
    assert_refused(&how, TIMES("1") "float uwind(time); data: time = 0;",
                   LEE_ERR_FORMAT,
                   "wind.nc: there is no variable 'uwint'; did you mean "
                   "'uwind'?");
}

static void two_variables_of_one_standard_name_are_refused(void **state) {
    (void)state;
    assert_refused(&plain,
                   TIMES("1") WIND
                   "float u100(time); u100:units = \"m/s\";"
                   "u100:standard_name = \"eastward_wind\";" DATA(
                       "time = 0; u = 1; v = 1; u100 = 1;"),
                   LEE_ERR_FORMAT,
                   "wind.nc: both 'u' and 'u100' are eastward_wind by their "
                   "standard name; the case has to name one");
}

static void a_variable_of_another_meaning_is_refused(void **state) {
    (void)state;
    const lee_wind_netcdf how = {
        .column[LEE_WIND_EASTWARD] = {.name = "v"},
        .column[LEE_WIND_NORTHWARD] = {.name = "u"},
    };
    assert_refused(&how, TIMES("1") WIND DATA("time = 0; u = 1; v = 1;"),
                   LEE_ERR_FORMAT,
                   "wind.nc: variable 'v' is northward_wind by its standard "
                   "name, and cannot be 'eastward'");
}

#define GRID_END                                                          \
    "; such a wind is not read as eastward or northward: turn it first, " \
    "or give speed and direction"

static void a_wind_along_the_grid_is_refused(void **state) {
    (void)state;
    assert_refused(
        &named,
        TIMES("1") "float u(time); u:units = \"m/s\";"
                   "u:standard_name = \"x_wind\"; float v(time);" DATA(
                       "time = 0; u = 1; v = 1;"),
        LEE_ERR_FORMAT,
        "wind.nc: variable 'u' is a wind along an axis of the grid "
        "by its standard name" GRID_END);
}

static void attributes_that_say_grid_are_heeded(void **state) {
    (void)state;
    static const char *const says[] = {
        "u:uvRelativeToGrid = 1;", ":uvRelativeToGrid = \"yes\";",
        "u:GRIB_uvRelativeToGrid = 1b;",
        "u:resolution_and_component_flags = 136;",
        "u:vector_reference = \"grid relative\";"};
    for (size_t i = 0; i < sizeof says / sizeof says[0]; i++) {
        char text[1024];
        (void)snprintf(text, sizeof text, "%s%s data: time = 0; u = 1; v = 1;",
                       TIMES("1") WIND, says[i]);
        assert_refused(&plain, text, LEE_ERR_FORMAT,
                       "wind.nc: variable 'u' follows the axes of the grid, as "
                       "an attribute says" GRID_END);
    }
}

static void pressure_reduced_to_sea_level_is_refused(void **state) {
    (void)state;
    static const char *const says[] = {
        "p:standard_name = \"air_pressure_at_mean_sea_level\";",
        "p:standard_name = \"air_pressure_at_sea_level\";",
        "p:long_name = \"Pressure reduced to Mean Sea Level\";",
        "p:long_name = \"Pressure reduced to MSL\";",
        "p:long_name = \"mean sea-level pressure\";"};
    lee_wind_netcdf how = {0};
    how.column[LEE_WIND_PRESSURE].name = "p";
    for (size_t i = 0; i < sizeof says / sizeof says[0]; i++) {
        char text[1024];
        (void)snprintf(text, sizeof text,
                       "%s float p(time); p:units = \"Pa\"; %s" DATA(
                           "time = 0; u = 1; v = 1; p = 1e5;"),
                       TIMES("1") WIND, says[i]);
        assert_refused(&how, text, LEE_ERR_FORMAT,
                       "wind.nc: variable 'p' is pressure reduced to sea "
                       "level, not the pressure at the station");
    }
}

static void a_variable_without_unit_needs_one_from_the_case(void **state) {
    (void)state;
    assert_refused(&named,
                   TIMES("1") "float u(time); float v(time);" DATA(
                       "time = 0; u = 1; v = 1;"),
                   LEE_ERR_FORMAT,
                   "wind.nc: variable 'u' has no unit; the case has to say it");
}

static void units_of_file_and_case_must_agree(void **state) {
    (void)state;
    lee_wind_netcdf how = named;
    how.column[LEE_WIND_EASTWARD].unit = "knots";
    assert_refused(&how, TIMES("1") WIND DATA("time = 0; u = 1; v = 1;"),
                   LEE_ERR_FORMAT,
                   "wind.nc: variable 'u' is in 'm s-1', but the case says "
                   "'knots'");
}

static void a_unit_that_is_none_is_refused(void **state) {
    (void)state;
    assert_refused(&named,
                   TIMES("1") "float u(time); u:units = \"furlongs\";"
                              "float v(time); data: time = 0; u = 1; v = 1;",
                   LEE_ERR_FORMAT,
                   "wind.nc: variable 'u': unit 'furlongs' cannot be converted "
                   "to m s-1");
}

#define CLOCK(text)                                                       \
    "dimensions: time = 2; variables: double time(time);" text WIND DATA( \
        "time = 0, 1; u = 1, 2; v = 1, 2;")

static void months_are_no_unit_of_time(void **state) {
    (void)state;
    assert_refused(&plain, CLOCK("time:units = \"months since 2000-01-01\";"),
                   LEE_ERR_FORMAT,
                   "wind.nc: time 'time': 'months since 2000-01-01' counts "
                   "months or years, which are of no fixed length; expected "
                   "seconds, minutes, hours or days since a date");
}

static void a_time_without_units_needs_them_from_the_case(void **state) {
    (void)state;
    assert_refused(&plain, CLOCK(""), LEE_ERR_FORMAT,
                   "wind.nc: time 'time' has no units; the case has to say "
                   "them, such as 'hours since 1996-01-05 00:00'");
}

static void a_calendar_that_is_none_is_refused(void **state) {
    (void)state;
    assert_refused(&plain,
                   CLOCK("time:units = \"days since 2000-01-01\";"
                         "time:calendar = \"none\";"),
                   LEE_ERR_FORMAT,
                   "wind.nc: time 'time': calendar 'none' is not read; "
                   "expected standard (or gregorian), proleptic_gregorian, "
                   "julian, noleap (or 365_day), all_leap (or 366_day) or "
                   "360_day");
}

static void a_calendar_against_the_files_own_is_refused(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.calendar = "360_day"};
    assert_refused(&how,
                   CLOCK("time:units = \"days since 2000-01-01\";"
                         "time:calendar = \"noleap\";"),
                   LEE_ERR_FORMAT,
                   "wind.nc: time 'time' keeps the calendar 'noleap', but the "
                   "case says '360_day'");
}

static void a_day_that_is_none_is_refused_with_its_index(void **state) {
    (void)state;
    assert_refused(&plain,
                   CLOCK("time:units = \"days since 2000-02-29\";"
                         "time:calendar = \"360_day\";"),
                   LEE_ERR_FORMAT,
                   "wind.nc: time 'time' at index 1: time 1 is 2000-02-30 of "
                   "the calendar '360_day', a day that does not exist");
}

static void a_missing_time_is_refused_with_its_index(void **state) {
    (void)state;
    assert_refused(
        &plain, TIMES("2") WIND DATA("time = 0, _; u = 1, 2; v = 1, 2;"),
        LEE_ERR_FORMAT, "wind.nc: time 'time' is missing at index 1");
}

static void a_time_that_runs_backwards_is_refused_with_its_index(void **s) {
    (void)s;
    assert_refused(&plain,
                   TIMES("3")
                       WIND DATA("time = 0, 2, 1; u = 1, 2, 3; v = 1, 2, 3;"),
                   LEE_ERR_FORMAT,
                   "wind.nc: 'u' at index 2: time 2031-01-10T01:00:00Z runs "
                   "backwards: the sample before has 2031-01-10T02:00:00Z");
}

static void a_time_twice_with_other_values_is_refused(void **state) {
    (void)state;
    assert_refused(&plain,
                   TIMES("3")
                       WIND DATA("time = 0, 1, 1; u = 1, 2, 3; v = 1, 2, 2;"),
                   LEE_ERR_FORMAT,
                   "wind.nc: 'u' at index 2: time 2031-01-10T01:00:00Z is here "
                   "again with other values");
}

static void a_value_out_of_range_is_refused_with_its_index(void **state) {
    (void)state;
    assert_refused(&plain,
                   TIMES("2") WIND DATA("time = 0, 1; u = 1, 2; v = 1, -999;"),
                   LEE_ERR_FORMAT,
                   "wind.nc: variable 'v' at index 1, 2031-01-10T01:00:00Z: "
                   "northward is -999 m s-1, not in [-340, 340]; should it "
                   "mean missing, list it under 'missing' as it is stored");
    assert_refused(&plain,
                   TIMES("2")
                       WIND DATA("time = 0, 1; u = 1, Infinityf; v = 1, 1;"),
                   LEE_ERR_FORMAT,
                   "wind.nc: variable 'u' at index 1, 2031-01-10T01:00:00Z: "
                   "eastward is inf m s-1, not in [-340, 340]; should it mean "
                   "missing, list it under 'missing' as it is stored");
}

static void a_record_without_any_wind_is_refused(void **state) {
    (void)state;
    assert_refused(
        &plain, TIMES("2") WIND DATA("time = 0, 1; u = 1, 2; v = _, _;"),
        LEE_ERR_DATA, "wind.nc: the wind is missing from all 2 samples");
}

static void a_record_of_no_length_is_refused(void **state) {
    (void)state;
    assert_refused(
        &plain, "dimensions: time = UNLIMITED; variables:" TIME_OF("time") WIND,
        LEE_ERR_DATA, "wind.nc: variable 'u' holds no sample");
}

static void another_long_dimension_is_refused(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.station = "#1"};
    assert_refused(
        &how,
        "dimensions: time = 1; lev = 3; s = 2; variables:" TIME_OF("time")
            EAST("time, s, lev") NORTH("time, s, lev") DATA("time = 0;"),
        LEE_ERR_FORMAT,
        "wind.nc: variable 'u' also runs along 'lev', of length 3; "
        "only time, one row of stations, latitude and longitude may "
        "be longer than 1");
}

#define STATIONS                                                     \
    "dimensions: time = 1; s = 3; l = 4; variables:" TIME_OF("time") \
        EAST("time, s") NORTH("time, s") NAMES("s, l")               \
            DATA("time = 0; u = 1, 2, 3; v = 1, 2, 3;"               \
                 "name = \"quay\", \"lee\", \"quay\";")

static void several_stations_need_a_name(void **state) {
    (void)state;
    assert_refused(&plain, STATIONS, LEE_ERR_FORMAT,
                   "wind.nc: there are 3 stations along 's', such as 'quay', "
                   "'lee', 'quay'; the case has to name one, or say which by "
                   "number as '#1'");
}

static void a_station_that_is_not_there_is_refused(void **state) {
    (void)state;
    const lee_wind_netcdf by_name = {.station = "Mole"};
    assert_refused(&by_name, STATIONS, LEE_ERR_DATA,
                   "wind.nc: no station is called 'Mole'; there are 3, such as "
                   "'quay', 'lee', 'quay'");
    const lee_wind_netcdf by_number = {.station = "#4"};
    assert_refused(&by_number, STATIONS, LEE_ERR_DATA,
                   "wind.nc: station '#4' is not one of the 3 there are");
}

static void a_name_that_two_stations_have_is_refused(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.station = "quay"};
    assert_refused(&how, STATIONS, LEE_ERR_DATA,
                   "wind.nc: 2 stations are called 'quay'; name one by its "
                   "number, such as '#3'");
}

static void a_time_of_text_is_refused(void **state) {
    (void)state;
    lee_wind_netcdf how = {.column[LEE_WIND_TIME] = {.name = "stamp"}};
    assert_refused(
        &how,
        "dimensions: time = 1; l = 4; variables: char stamp(time,l);" WIND DATA(
            "u = 1; v = 1;"),
        LEE_ERR_FORMAT,
        "wind.nc: the time 'stamp' is text; expected numbers since "
        "a date");
}

static void row_sizes_beyond_the_samples_are_refused(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.station = "#2"};
    assert_refused(
        &how,
        "dimensions: s = 2; obs = 3; variables:" TIME_OF("obs") EAST("obs")
            NORTH("obs") "int rows(s); rows:sample_dimension = \"obs\";" DATA(
                "time = 0, 1, 2; u = 1, 2, 3; v = 1, 2, 3;"
                "rows = 2, 9;"),
        LEE_ERR_FORMAT,
        "wind.nc: 'rows' counts 9 samples at index 1; expected a "
        "whole number, and 1 are left");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        FOLDER_TEST(a_file_without_wind_is_refused),
        FOLDER_TEST(half_a_wind_is_refused),
        FOLDER_TEST(a_name_that_is_not_there_is_refused_with_the_nearest),
        FOLDER_TEST(two_variables_of_one_standard_name_are_refused),
        FOLDER_TEST(a_variable_of_another_meaning_is_refused),
        FOLDER_TEST(a_wind_along_the_grid_is_refused),
        FOLDER_TEST(attributes_that_say_grid_are_heeded),
        FOLDER_TEST(pressure_reduced_to_sea_level_is_refused),
        FOLDER_TEST(a_variable_without_unit_needs_one_from_the_case),
        FOLDER_TEST(units_of_file_and_case_must_agree),
        FOLDER_TEST(a_unit_that_is_none_is_refused),
        FOLDER_TEST(months_are_no_unit_of_time),
        FOLDER_TEST(a_time_without_units_needs_them_from_the_case),
        FOLDER_TEST(a_calendar_that_is_none_is_refused),
        FOLDER_TEST(a_calendar_against_the_files_own_is_refused),
        FOLDER_TEST(a_day_that_is_none_is_refused_with_its_index),
        FOLDER_TEST(a_missing_time_is_refused_with_its_index),
        FOLDER_TEST(a_time_that_runs_backwards_is_refused_with_its_index),
        FOLDER_TEST(a_time_twice_with_other_values_is_refused),
        FOLDER_TEST(a_value_out_of_range_is_refused_with_its_index),
        FOLDER_TEST(a_record_without_any_wind_is_refused),
        FOLDER_TEST(a_record_of_no_length_is_refused),
        FOLDER_TEST(another_long_dimension_is_refused),
        FOLDER_TEST(several_stations_need_a_name),
        FOLDER_TEST(a_station_that_is_not_there_is_refused),
        FOLDER_TEST(a_name_that_two_stations_have_is_refused),
        FOLDER_TEST(a_time_of_text_is_refused),
        FOLDER_TEST(row_sizes_beyond_the_samples_are_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
