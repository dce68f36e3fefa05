/* Columns and units are found, or the want of them is told. */
#include "wind/csv_support.h"

static const lee_wind_csv components = {
    .column[LEE_WIND_TIME] = {.name = "time"},
    .column[LEE_WIND_EASTWARD] = {.name = "u"},
    .column[LEE_WIND_NORTHWARD] = {.name = "v"},
};

/* 1 knot = 1852 m/3600 s (definition). */
static void knots_in_the_header_become_metres_per_second(void **state) {
    (void)state;
    lee_wind_record record =
        read_text(&plain, "time,speed [knots],from [degree]\n"
                          "2031-01-10T06:00Z,36,270\n");
    assert_wind(&record, 0, 36.0 * 1852.0 / 3600.0, 270.0);
    lee_wind_record_free(&record);
}

static void a_unit_in_the_case_stands_in_for_the_header(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.column[LEE_WIND_SPEED].unit = "km/h";
    how.column[LEE_WIND_FROM].unit = "degree";
    lee_wind_record record =
        read_text(&how, "time,speed,from\n2031-01-10T06:00Z,36,270\n");
    assert_wind(&record, 0, 10.0, 270.0);
    lee_wind_record_free(&record);
}

static void a_unit_may_be_given_twice_when_it_is_the_same(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.column[LEE_WIND_SPEED].unit = "kt";
    lee_wind_record record = read_text(
        &how, "time,speed [knots],from [deg]\n2031-01-10T06:00Z,36,270\n");
    assert_wind(&record, 0, 36.0 * 1852.0 / 3600.0, 270.0);
    lee_wind_record_free(&record);
}

static void a_direction_in_radians_is_converted(void **state) {
    (void)state;
    lee_wind_record record =
        read_text(&plain, "time,speed [m/s],from [radian]\n"
                          "2031-01-10T06:00Z,10,1.5707963267948966\n");
    assert_wind(&record, 0, 10.0, 90.0);
    lee_wind_record_free(&record);
}

/* 6.2831853072 is 2 pi rounded up in its tenth decimal. */
static void a_circle_in_radians_may_be_rounded_up(void **state) {
    (void)state;
    lee_wind_record record =
        read_text(&plain, "time,speed [m/s],from [radian]\n"
                          "2031-01-10T06:00Z,10,6.2831853072\n");
    assert_near(record.east[0], 0.0, 10.0 * 0.5e-10);
    assert_near(record.north[0], -10.0, rounding);
    lee_wind_record_free(&record);
}

static void columns_can_be_called_by_number(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.column[LEE_WIND_TIME].name = "#2";
    how.column[LEE_WIND_SPEED].name = "#4";
    how.column[LEE_WIND_FROM].name = "#1";
    lee_wind_record record = read_text(&how, "a [deg],b,c,d [m/s]\n"
                                             "90,2031-01-10T06:00Z,77,3\n");
    assert_wind(&record, 0, 3.0, 90.0);
    lee_wind_record_free(&record);
}

static void a_unit_is_never_guessed(void **state) {
    (void)state;
    assert_refused(&plain, "time,speed,from [deg]\n2031-01-10T06:00Z,4,9\n",
                   LEE_ERR_FORMAT,
                   ": column 'speed' has no unit; write 'speed [m s-1]' in the "
                   "header, or give the unit of 'speed' in the case");
    assert_refused(&plain, "time,speed [m/s],from\n2031-01-10T06:00Z,4,9\n",
                   LEE_ERR_FORMAT,
                   ": column 'from' has no unit; write 'from [degree]' in the "
                   "header, or give the unit of 'from' in the case");
}

static void two_different_units_for_a_column_are_refused(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.column[LEE_WIND_SPEED].unit = "m s-1";
    assert_refused(&how,
                   "time,speed [knots],from [deg]\n2031-01-10T06:00Z,4,9\n",
                   LEE_ERR_FORMAT,
                   ": column 'speed' is in knots by its header and in m s-1 by "
                   "the case; leave one out");
}

static void a_unit_of_something_else_is_refused(void **state) {
    (void)state;
    assert_refused(&plain,
                   "time,speed [kg],from [deg]\n2031-01-10T06:00Z,4,9\n",
                   LEE_ERR_FORMAT,
                   ": column 'speed': unit 'kg' cannot be converted to m s-1");
}

static void a_column_that_is_not_there_is_refused(void **state) {
    (void)state;
    const char *text = "time,sped [m/s],from [deg]\n2031-01-10T06:00Z,4,9\n";
    write_bytes(strlen(text), text);
    lee_wind_record record;
    lee_error error = {0};
    assert_int_equal(lee_wind_read_csv(path, &plain, &record, &error),
                     LEE_ERR_FORMAT);
    assert_non_null(strstr(error.message, "speed"));
    assert_non_null(strstr(error.message, "sped"));
}

static void a_speed_without_direction_is_refused(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.column[LEE_WIND_FROM].name = NULL;
    assert_refused(&how, "time,speed [m/s]\n2031-01-10T06:00Z,4\n",
                   LEE_ERR_FORMAT,
                   ": a wind needs a speed and a direction: name the column "
                   "'from' beside 'speed'");
}

static void one_component_without_the_other_is_refused(void **state) {
    (void)state;
    lee_wind_csv how = components;
    how.column[LEE_WIND_EASTWARD].name = NULL;
    assert_refused(&how, "time,v [m/s]\n2031-01-10T06:00Z,4\n", LEE_ERR_FORMAT,
                   ": a wind needs a speed and a direction: name the column "
                   "'eastward' beside 'northward'");
}

static void a_wind_may_not_be_told_in_two_ways(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.column[LEE_WIND_EASTWARD].name = "u";
    assert_refused(&how, "time,speed,from,u\n2031-01-10T06:00Z,4,9,3\n",
                   LEE_ERR_FORMAT,
                   ": the record's wind is 'speed' and 'from', or 'eastward' "
                   "and 'northward': name one of these pairs");
}

static void a_time_is_told_in_exactly_one_way(void **state) {
    (void)state;
    static const lee_wind_column extra[] = {
        LEE_WIND_DATE, LEE_WIND_CLOCK, LEE_WIND_YEAR,  LEE_WIND_MONTH,
        LEE_WIND_DAY,  LEE_WIND_HOUR,  LEE_WIND_MINUTE};
    for (size_t i = 0; i < sizeof extra / sizeof extra[0]; i++) {
        lee_wind_csv how = plain;
        how.column[extra[i]].name = "time";
        assert_refused(&how, "time,speed,from\n2031-01-10T06:00Z,4,9\n",
                       LEE_ERR_FORMAT,
                       ": the record's time is one column 'time', or 'date' "
                       "and 'clock', or 'year', 'month', 'day' with 'hour' and "
                       "'minute' if there are any: name one of these");
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(knots_in_the_header_become_metres_per_second),
        cmocka_unit_test(a_unit_in_the_case_stands_in_for_the_header),
        cmocka_unit_test(a_unit_may_be_given_twice_when_it_is_the_same),
        cmocka_unit_test(a_direction_in_radians_is_converted),
        cmocka_unit_test(a_circle_in_radians_may_be_rounded_up),
        cmocka_unit_test(columns_can_be_called_by_number),
        cmocka_unit_test(a_unit_is_never_guessed),
        cmocka_unit_test(two_different_units_for_a_column_are_refused),
        cmocka_unit_test(a_unit_of_something_else_is_refused),
        cmocka_unit_test(a_column_that_is_not_there_is_refused),
        cmocka_unit_test(a_speed_without_direction_is_refused),
        cmocka_unit_test(one_component_without_the_other_is_refused),
        cmocka_unit_test(a_wind_may_not_be_told_in_two_ways),
        cmocka_unit_test(a_time_is_told_in_exactly_one_way),
    };
    return cmocka_run_group_tests(tests, make_record, remove_folder);
}
