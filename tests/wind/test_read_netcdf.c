/* A NetCDF record is read in every layout of the conventions. */
#include "wind/netcdf_support.h"

#define SERIES                                                      \
    "dimensions: time = 3; variables:" TIME_OF("time") EAST("time") \
        NORTH("time") DATA("time = 6, 7, 8; u = 1, 2, 3; v = 4, 5, 6;")

static void a_series_of_components_is_found_by_standard_names(void **state) {
    (void)state;
    lee_wind_record record = read_cdl(&plain, SERIES);
    assert_int_equal(record.n, 3);
    assert_int_equal(record.time[0], time_of("2031-01-10T06:00Z"));
    assert_int_equal(record.time[2], time_of("2031-01-10T08:00Z"));
    for (size_t i = 0; i < 3; i++) {
        assert_components(&record, i, 1.0 + (double)i, 4.0 + (double)i);
    }
    assert_null(record.pressure);
    lee_wind_record_free(&record);
}

static void a_record_read_apart_is_the_same(void **state) {
    (void)state;
    lee_wind_netcdf how = {.is_apart = true, .stamp = LEE_STAMP_END};
    how.column[LEE_WIND_ICE].name = "ice";
    static const char text[] =
        "dimensions: time = 3; variables:" TIME_OF("time") EAST("time")
            NORTH("time") "float ice(time); data: time = 6, 7, 7;"
                          "u = 1, 2, 2; v = 4, 5, 5; ice = 0.5, 0.25, 0.25;";
    (void)folder_write_cdl(&folder, "wind.nc", "classic", text);
    lee_notes told = {0};
    lee_wind_record record = read_wind(&how, &told);
    assert_int_equal(record.n, 2);
    assert_int_equal(record.duplicates, 1);
    assert_int_equal(record.stamp, LEE_STAMP_END);
    assert_int_equal(record.time[1], time_of("2031-01-10T07:00Z"));
    assert_components(&record, 1, 2.0, 5.0);
    assert_near(record.ice[1], 0.25, 0.0);
    assert_null(record.pressure);
    assert_true(is_told(&told, "eastward: 'u' in m s-1"));
    assert_true(is_told(&told, "time: 'time', hours since 2031-01-10, "
                               "calendar standard"));
    lee_notes_free(&told);
    lee_wind_record_free(&record);
}

static void speed_and_direction_are_read_where_components_are_not(void **s) {
    (void)s;
    lee_wind_record record =
        read_cdl(&plain,
                 "dimensions: time = 2; variables:" TIME_OF("time") //
                 "float spd(time); spd:units = \"knots\";"
                 "spd:standard_name = \"wind_speed\";"
                 "float dir(time); dir:units = \"degree\";"
                 "dir:standard_name = \"wind_from_direction\";" DATA(
                     "time = 0, 1; spd = 10, 0; dir = 270, _;"));
    /* A knot is 1852/3600 m s-1 exactly; west wind blows east. */
    assert_near(record.east[0], 18520.0 / 3600.0, 1e-12);
    assert_near(record.north[0], 0.0, 1e-12);
    assert_components(&record, 1, 0.0, 0.0); /* calm needs no direction */
    lee_wind_record_free(&record);
}

static void a_direction_the_wind_blows_to_is_turned(void **state) {
    (void)state;
    lee_wind_record record =
        read_cdl(&plain,
                 "dimensions: time = 2; variables:" TIME_OF("time") //
                 "float spd(time); spd:units = \"m/s\";"
                 "spd:standard_name = \"wind_speed\";"
                 "float dir(time); dir:units = \"degree\";"
                 "dir:standard_name = \"wind_to_direction\";" DATA(
                     "time = 0, 1; spd = 5, 5; dir = 90, 0;"));
    assert_components(&record, 0, 5.0, 0.0);
    assert_components(&record, 1, 0.0, 5.0);
    lee_wind_record_free(&record);
}

static void variables_are_read_by_the_names_of_the_case(void **state) {
    (void)state;
    lee_wind_netcdf how = {0};
    how.column[LEE_WIND_TIME].name = "step";
    how.column[LEE_WIND_TIME].unit = "hours since 1996-01-05 00:00";
    how.column[LEE_WIND_EASTWARD].name = "a";
    how.column[LEE_WIND_EASTWARD].unit = "m s-1";
    how.column[LEE_WIND_NORTHWARD].name = "b";
    how.column[LEE_WIND_NORTHWARD].unit = "km/h";
    lee_wind_record record =
        read_cdl(&how, "dimensions: step = 2; variables: int step(step);"
                       "float a(step); float b(step);" DATA(
                           "step = 0, 6; a = 1, 2; b = 36, 72;"));
    assert_int_equal(record.time[1], time_of("1996-01-05T06:00Z"));
    assert_components(&record, 1, 2.0, 20.0);
    lee_wind_record_free(&record);
}

static void components_may_stand_in_two_files(void **state) {
    (void)state;
    char other[FOLDER_PATH];
    (void)snprintf(
        other, sizeof other, "%s",
        folder_write_cdl(&folder, "north.nc", "classic",
                         "dimensions: time = 2; variables:" TIME_OF("time")
                             NORTH("time") DATA("time = 0, 1; v = 7, _;")));
    lee_wind_netcdf how = {0};
    how.column[LEE_WIND_NORTHWARD].path = other;
    lee_wind_record record =
        read_cdl(&how, "dimensions: time = 2; variables:" TIME_OF("time")
                           EAST("time") DATA("time = 0, 1; u = 1, 2;"));
    assert_components(&record, 0, 1.0, 7.0);
    assert_missing(&record, 1); /* half a wind is none */
    lee_wind_record_free(&record);
}

static void two_files_of_other_times_are_refused(void **state) {
    (void)state;
    char other[FOLDER_PATH];
    char expected[160];
    (void)snprintf(
        other, sizeof other, "%s",
        folder_write_cdl(&folder, "north.nc", "classic",
                         "dimensions: time = 2; variables:" TIME_OF("time")
                             NORTH("time") DATA("time = 0, 2; v = 7, 8;")));
    lee_wind_netcdf how = {0};
    how.column[LEE_WIND_NORTHWARD].path = other;
    (void)snprintf(expected, sizeof expected,
                   "north.nc: 'v' has other times than 'u', from sample 1 on");
    assert_refused(&how,
                   "dimensions: time = 2; variables:" TIME_OF("time")
                       EAST("time") DATA("time = 0, 1; u = 1, 2;"),
                   LEE_ERR_DATA, expected);
}

static void optional_columns_are_kept_in_si(void **state) {
    (void)state;
    lee_wind_netcdf how = {0};
    how.column[LEE_WIND_PRESSURE].name = "ps";
    how.column[LEE_WIND_AIR_TEMPERATURE].name = "ta";
    how.column[LEE_WIND_WATER_TEMPERATURE].name = "tw";
    how.column[LEE_WIND_HUMIDITY].name = "rh";
    how.column[LEE_WIND_ICE].name = "ice";
    lee_wind_record record = read_cdl(
        &how,
        "dimensions: time = 2; variables:" TIME_OF("time") EAST("time")
            NORTH("time") "double ps(time); ps:units = \"hPa\";"
                          "double ta(time); ta:units = \"degC\";"
                          "double tw(time); tw:units = \"K\";"
                          "double rh(time); rh:units = \"percent\";"
                          "double ice(time);" DATA(
                              "time = 0, 1; u = 1, 2; v = 3, 4; ps = 987, _;"
                              "ta = -3.5, _; tw = 274.4, _;"
                              "rh = 85, _; ice = 0.4, _;"));
    assert_near(record.pressure[0], 98700.0, 1e-9);
    assert_near(record.air_temperature[0], 269.65, 1e-12);
    assert_near(record.water_temperature[0], 274.4, 1e-12);
    assert_near(record.humidity[0], 0.85, 1e-15);
    assert_near(record.ice[0], 0.4, 0.0);
    assert_true(isnan(record.pressure[1]) && isnan(record.ice[1]));
    assert_components(&record, 1, 2.0, 4.0);
    lee_wind_record_free(&record);
}

/* Three stations, two times; station s has winds 10 s + t. */
#define STATIONS                                                             \
    "dimensions: time = 2; station = 3; len = 5; variables:" TIME_OF("time") \
        EAST("time, station") NORTH("time, station") NAMES("station, len")   \
            LAT("station") LON("station") DATA(                              \
                "time = 0, 1; u = 10, 20, 30, 11, 21, 31;"                   \
                "v = 0, 0, 0, 0, 0, 0; name = \"quay\", \"lee\", \"mole\";"  \
                "lat = 47, 47.5, 48; lon = 8, 8, 8;")

static void a_station_is_found_by_its_name(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.station = "lee"};
    lee_wind_record record = read_cdl(&how, STATIONS);
    assert_components(&record, 0, 20.0, 0.0);
    assert_components(&record, 1, 21.0, 0.0);
    lee_wind_record_free(&record);
}

static void a_station_is_found_by_its_number(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.station = "#3"};
    lee_wind_record record = read_cdl(&how, STATIONS);
    assert_components(&record, 1, 31.0, 0.0);
    lee_wind_record_free(&record);
}

static void the_station_nearest_to_a_position_is_found(void **state) {
    (void)state;
    const lee_wind_netcdf how = {
        .has_position = true, .longitude = 8.0, .latitude = 47.6};
    lee_notes told = {0};
    (void)folder_write_cdl(&folder, "wind.nc", "classic", STATIONS);
    lee_wind_record record = read_wind(&how, &told);
    assert_components(&record, 0, 20.0, 0.0);
    assert_true(is_told(&told, "station 'lee', number 2 of 3"));
    /* 0.1 degrees of 6371.0088 km pi/180 each: 11.12 km. */
    assert_true(is_told(&told, "the station nearest to the position stands at "
                               "47.5000 N 8.0000 E, 11.1 km from it"));
    lee_notes_free(&told);
    lee_wind_record_free(&record);
}

static void names_may_be_strings_and_stations_come_first(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.station = "North quay"};
    lee_wind_record record = read_cdl(
        &how,
        "dimensions: s = 2; time = 2; variables:" TIME_OF("time")
            EAST("s, time") NORTH(
                "s, time") "string name(s);"
                           "name:cf_role = \"timeseries_id\";" DATA(
                               "time = 0, 1; u = 1, 2, 3, 4; v = 5, 6, 7, 8;"
                               "name = \"Mole\", \"North quay\";"));
    assert_components(&record, 0, 3.0, 7.0);
    assert_components(&record, 1, 4.0, 8.0);
    lee_wind_record_free(&record);
}

static void numbers_may_be_names(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.station = "6602"};
    lee_wind_record record = read_cdl(
        &how,
        "dimensions: s = 2; time = 1; variables:" TIME_OF("time") EAST(
            "s, time")
            NORTH("s, time") "int id(s); id:cf_role = \"timeseries_id\";" DATA(
                "time = 0; u = 1, 2; v = 5, 6; id = 6601, 6602;"));
    assert_components(&record, 0, 2.0, 6.0);
    lee_wind_record_free(&record);
}

static void stations_may_have_padded_times_of_their_own(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.station = "b"};
    lee_wind_record record = read_cdl(
        &how, "dimensions: s = 2; obs = 3; l = 1; variables:" TIME_OF("s, obs")
                  EAST("s, obs") NORTH("s, obs") NAMES("s, l")
                      DATA("time = 0, 1, 2, 5, 7, _; u = 1, 2, 3, 4, 5, _;"
                           "v = 1, 2, 3, 4, 5, _; name = \"a\", \"b\";"));
    assert_int_equal(record.n, 2);
    assert_int_equal(record.time[1], time_of("2031-01-10T07:00Z"));
    assert_components(&record, 1, 5.0, 5.0);
    lee_wind_record_free(&record);
}

#define RAGGED_NAMES NAMES("s, l")

static void stations_may_follow_each_other(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.station = "b"};
    lee_wind_record record = read_cdl(
        &how, "dimensions: s = 3; obs = 6; l = 1; variables:" TIME_OF("obs")
                  EAST("obs") NORTH("obs") RAGGED_NAMES
        "int rows(s); rows:sample_dimension = \"obs\";" DATA(
            "time = 0, 1, 4, 5, 6, 0; u = 1, 2, 3, 4, 5, 6;"
            "v = 0, 0, 0, 0, 0, 0; rows = 2, 3, 1;"
            "name = \"a\", \"b\", \"c\";"));
    assert_int_equal(record.n, 3);
    assert_int_equal(record.time[0], time_of("2031-01-10T04:00Z"));
    assert_components(&record, 0, 3.0, 0.0);
    assert_components(&record, 2, 5.0, 0.0);
    lee_wind_record_free(&record);
}

static void samples_of_stations_may_be_mixed(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.station = "b"};
    lee_wind_record record = read_cdl(
        &how, "dimensions: s = 3; obs = 6; l = 1; variables:" TIME_OF("obs")
                  EAST("obs") NORTH("obs") RAGGED_NAMES
        "int of(obs); of:instance_dimension = \"s\";" DATA(
            "time = 0, 0, 1, 1, 2, 2; u = 1, 2, 3, 4, 5, 6;"
            "v = 0, 0, 0, 0, 0, 0; name = \"a\", \"b\", \"c\";"
            "of = 0, 1, 2, 1, 0, 1;"));
    assert_int_equal(record.n, 3);
    assert_components(&record, 0, 2.0, 0.0);
    assert_components(&record, 1, 4.0, 0.0);
    assert_components(&record, 2, 6.0, 0.0);
    assert_int_equal(record.time[2], time_of("2031-01-10T02:00Z"));
    lee_wind_record_free(&record);
}

static void a_record_may_lie_in_a_group(void **state) {
    (void)state;
    lee_wind_netcdf how = {0};
    how.column[LEE_WIND_EASTWARD].name = "mast/u";
    how.column[LEE_WIND_NORTHWARD].name = "mast/v";
    lee_wind_record record = read_cdl(
        &how, "group: mast { dimensions: time = 2; variables:" TIME_OF("time")
                  EAST("time") NORTH("time")
                      DATA("time = 0, 1; u = 1, 2; v = 3, 4; }"));
    assert_components(&record, 1, 2.0, 4.0);
    lee_wind_record_free(&record);
}

static void an_offset_moves_a_reference_without_a_zone(void **state) {
    (void)state;
    const lee_wind_netcdf how = {.has_utc_offset = true, .utc_offset = 3600};
    lee_wind_record record = read_cdl(&how, SERIES);
    assert_int_equal(record.time[0], time_of("2031-01-10T05:00Z"));
    lee_wind_record_free(&record);
}

static void the_calendar_of_the_file_is_kept(void **state) {
    (void)state;
    lee_wind_record record = read_cdl(
        &plain, "dimensions: time = 2; variables: double time(time);"
                "time:units = \"days since 2000-02-28\";"
                "time:calendar = \"noleap\";" EAST("time") NORTH("time")
                    DATA("time = 0, 1; u = 1, 2; v = 3, 4;"));
    assert_int_equal(record.time[1], time_of("2000-03-01"));
    lee_wind_record_free(&record);
}

static void codes_of_the_case_are_missing(void **state) {
    (void)state;
    static const double code[] = {-70.0};
    const lee_wind_netcdf how = {.missing_count = 1, .missing = code};
    lee_wind_record record = read_cdl(
        &how, "dimensions: time = 2; variables:" TIME_OF("time") EAST("time")
                  NORTH("time") DATA("time = 0, 1; u = 1, -70; v = 3, 4;"));
    assert_components(&record, 0, 1.0, 3.0);
    assert_missing(&record, 1);
    lee_wind_record_free(&record);
}

static void equal_repeated_samples_are_dropped_and_counted(void **state) {
    (void)state;
    lee_wind_record record = read_cdl(
        &plain,
        "dimensions: time = 4; variables:" TIME_OF("time") EAST("time")
            NORTH("time")
                DATA("time = 0, 1, 1, 2; u = 1, 2, 2, 3; v = 1, _, _, 3;"));
    assert_int_equal(record.n, 3);
    assert_int_equal(record.duplicates, 1);
    assert_int_equal(record.time[2], time_of("2031-01-10T02:00Z"));
    lee_wind_record_free(&record);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        FOLDER_TEST(a_series_of_components_is_found_by_standard_names),
        FOLDER_TEST(a_record_read_apart_is_the_same),
        FOLDER_TEST(speed_and_direction_are_read_where_components_are_not),
        FOLDER_TEST(a_direction_the_wind_blows_to_is_turned),
        FOLDER_TEST(variables_are_read_by_the_names_of_the_case),
        FOLDER_TEST(components_may_stand_in_two_files),
        FOLDER_TEST(two_files_of_other_times_are_refused),
        FOLDER_TEST(optional_columns_are_kept_in_si),
        FOLDER_TEST(a_station_is_found_by_its_name),
        FOLDER_TEST(a_station_is_found_by_its_number),
        FOLDER_TEST(the_station_nearest_to_a_position_is_found),
        FOLDER_TEST(names_may_be_strings_and_stations_come_first),
        FOLDER_TEST(numbers_may_be_names),
        FOLDER_TEST(stations_may_have_padded_times_of_their_own),
        FOLDER_TEST(stations_may_follow_each_other),
        FOLDER_TEST(samples_of_stations_may_be_mixed),
        FOLDER_TEST(a_record_may_lie_in_a_group),
        FOLDER_TEST(an_offset_moves_a_reference_without_a_zone),
        FOLDER_TEST(the_calendar_of_the_file_is_kept),
        FOLDER_TEST(codes_of_the_case_are_missing),
        FOLDER_TEST(equal_repeated_samples_are_dropped_and_counted),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
