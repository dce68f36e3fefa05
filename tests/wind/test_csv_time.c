/* The time of a row is read as it was written, and never guessed. */
#include "wind/csv_support.h"

static const lee_wind_csv split = {
    .column[LEE_WIND_YEAR] = {.name = "y"},
    .column[LEE_WIND_MONTH] = {.name = "m"},
    .column[LEE_WIND_DAY] = {.name = "d"},
    .column[LEE_WIND_SPEED] = {.name = "speed"},
    .column[LEE_WIND_FROM] = {.name = "from"},
    .has_utc_offset = true,
};

static void a_zone_in_the_text_is_obeyed(void **state) {
    (void)state;
    lee_wind_record record = read_text(&plain, "time,speed [m/s],from [deg]\n"
                                               "2031-01-10T06:00+01:00,4,90\n");
    assert_int_equal(record.time[0], time_of("2031-01-10T05:00Z"));
    lee_wind_record_free(&record);
}

static void a_given_offset_is_used_where_the_text_has_no_zone(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.has_utc_offset = true;
    how.utc_offset = -5 * 3600;
    lee_wind_record record = read_text(&how, "time,speed [m/s],from [deg]\n"
                                             "2031-01-10 06:00,4,90\n"
                                             "2031-01-10 12:00Z,4,90\n");
    assert_int_equal(record.time[0], time_of("2031-01-10T11:00Z"));
    assert_int_equal(record.time[1], time_of("2031-01-10T12:00Z"));
    lee_wind_record_free(&record);
}

static void a_zone_in_the_header_is_obeyed(void **state) {
    (void)state;
    lee_wind_record utc =
        read_text(&plain, "time [UTC],speed [m/s],from [deg]\n"
                          "2031-01-10 06:00,4,90\n");
    assert_int_equal(utc.time[0], time_of("2031-01-10T06:00Z"));
    lee_wind_record_free(&utc);
    lee_wind_record east =
        read_text(&plain, "time [+02:00],speed [m/s],from [deg]\n"
                          "2031-01-10 06:00,4,90\n");
    assert_int_equal(east.time[0], time_of("2031-01-10T04:00Z"));
    lee_wind_record_free(&east);
}

static void a_zone_is_never_guessed(void **state) {
    (void)state;
    assert_refused(&plain,
                   "time,speed [m/s],from [deg]\n2031-01-10T06:00,4,90\n",
                   LEE_ERR_FORMAT,
                   ":2:1: time '2031-01-10T06:00' has no zone; give "
                   "'utc_offset' in the case (Z for UTC, +01:00 for an hour "
                   "east)");
}

static void a_zone_may_not_be_told_in_two_ways(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.has_utc_offset = true;
    how.utc_offset = 3600;
    assert_refused(&how,
                   "time [UTC],speed [m/s],from [deg]\n2031-01-10T06:00,4,90\n",
                   LEE_ERR_FORMAT,
                   ": column 'time' is in zone UTC by its header and in "
                   "another by 'utc_offset'; leave one out");
}

static void date_and_clock_make_a_time(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.column[LEE_WIND_TIME].name = NULL;
    how.column[LEE_WIND_DATE].name = "date";
    how.column[LEE_WIND_CLOCK].name = "hour";
    how.has_utc_offset = true;
    lee_wind_record record =
        read_text(&how, "date,hour,speed [m/s],from [deg]\n"
                        "2031-01-10,06:30,4,90\n2031-01-10,06:40:30,4,90\n");
    assert_int_equal(record.time[0], time_of("2031-01-10T06:30Z"));
    assert_int_equal(record.time[1], time_of("2031-01-10T06:40:30Z"));
    lee_wind_record_free(&record);
}

static void year_month_and_day_make_a_time(void **state) {
    (void)state;
    lee_wind_record record = read_text(&split, "y,m,d,speed [m/s],from [deg]\n"
                                               "2031,1,10,4,90\n"
                                               "2031,01,11,4,90\n");
    assert_int_equal(record.time[0], time_of("2031-01-10"));
    assert_int_equal(record.time[1], time_of("2031-01-11"));
    lee_wind_record_free(&record);
}

static void hour_and_minute_may_follow(void **state) {
    (void)state;
    lee_wind_csv how = split;
    how.column[LEE_WIND_HOUR].name = "h";
    how.column[LEE_WIND_MINUTE].name = "min";
    how.utc_offset = 3600;
    lee_wind_record record =
        read_text(&how, "y,m,d,h,min,speed [m/s],from [deg]\n"
                        "2031,1,10,6,30,4,90\n");
    assert_int_equal(record.time[0], time_of("2031-01-10T05:30Z"));
    lee_wind_record_free(&record);
}

static void hour_24_is_midnight_at_the_end_of_the_day(void **state) {
    (void)state;
    lee_wind_csv how = split;
    how.column[LEE_WIND_HOUR].name = "h";
    lee_wind_record record = read_text(&how, "y,m,d,h,speed [m/s],from [deg]\n"
                                             "2031,12,31,23,4,90\n"
                                             "2031,12,31,24,4,90\n");
    assert_int_equal(record.time[1], time_of("2032-01-01T00:00Z"));
    lee_wind_record_free(&record);
}

static void a_minute_past_hour_24_is_refused(void **state) {
    (void)state;
    lee_wind_csv how = split;
    how.column[LEE_WIND_HOUR].name = "h";
    how.column[LEE_WIND_MINUTE].name = "min";
    assert_refused(&how,
                   "y,m,d,h,min,speed [m/s],from [deg]\n"
                   "2031,12,31,24,1,4,90\n",
                   LEE_ERR_FORMAT,
                   ":2:1: 2031-12-31 24:01 is not in the calendar");
}

static void two_digit_years_need_a_century(void **state) {
    (void)state;
    lee_wind_csv how = split;
    const char *text = "y,m,d,speed [m/s],from [deg]\n61,1,1,4,90\n";
    assert_refused(&how, text, LEE_ERR_FORMAT,
                   ":2:1: year 61 has not four digits; two are read when the "
                   "case says 'century: 1900' or the like");
    how.century = 1900;
    lee_wind_record record = read_text(&how, text);
    assert_int_equal(record.time[0], time_of("1961-01-01"));
    lee_wind_record_free(&record);
}

static void a_year_of_three_digits_is_refused(void **state) {
    (void)state;
    lee_wind_csv how = split;
    how.century = 1900;
    assert_refused(&how, "y,m,d,speed [m/s],from [deg]\n196,1,1,4,90\n",
                   LEE_ERR_FORMAT,
                   ":2:1: year 196 has not four digits; two are read when the "
                   "case says 'century: 1900' or the like");
}

static void a_century_is_a_whole_one(void **state) {
    (void)state;
    static const int centuries[] = {19, 1950, 900, -1900, 10000};
    for (size_t i = 0; i < sizeof centuries / sizeof centuries[0]; i++) {
        lee_wind_csv how = split;
        how.century = centuries[i];
        char expected[100];
        (void)snprintf(expected, sizeof expected,
                       ": century %d is not one of 1000, 1100, ... 9900",
                       centuries[i]);
        assert_refused(&how, "y,m,d,speed [m/s],from [deg]\n61,1,1,4,90\n",
                       LEE_ERR_FORMAT, expected);
    }
}

static void a_day_outside_the_calendar_is_refused(void **state) {
    (void)state;
    assert_refused(&split,
                   "y,m,d,speed [m/s],from [deg]\n2031,2,28,4,90\n"
                   "2031,2,29,4,90\n",
                   LEE_ERR_FORMAT,
                   ":3:1: 2031-02-29 00:00 is not in the calendar");
}

static void part_of_a_date_that_is_no_number_is_named(void **state) {
    (void)state;
    assert_refused(&split, "y,m,d,speed [m/s],from [deg]\n2031,Jan,1,4,90\n",
                   LEE_ERR_FORMAT,
                   ":2:6: month 'Jan' is not a whole number from 1 to 12");
}

static void a_split_time_needs_an_offset_too(void **state) {
    (void)state;
    lee_wind_csv how = split;
    how.has_utc_offset = false;
    assert_refused(&how, "y,m,d,speed [m/s],from [deg]\n2031,1,1,4,90\n",
                   LEE_ERR_FORMAT,
                   ":2:1: time '2031' has no zone; give 'utc_offset' in the "
                   "case (Z for UTC, +01:00 for an hour east)");
}

static void a_text_that_is_no_time_is_refused(void **state) {
    (void)state;
    assert_refused(&plain,
                   "time,speed [m/s],from [deg]\n10.01.2031 06:00,4,90\n",
                   LEE_ERR_FORMAT,
                   ":2:1: '10.01.2031 06:00' is not a time; expected ISO 8601 "
                   "such as 2031-01-10T06:30Z");
}

static void an_endless_time_is_refused(void **state) {
    (void)state;
    char text[400] = "time,speed [m/s],from [deg]\n";
    const size_t begin = strlen(text);
    memset(text + begin, '1', 300);
    memcpy(text + begin + 300, ",4,90\n", sizeof ",4,90\n");
    assert_refused(&plain, text, LEE_ERR_FORMAT,
                   ":2:1: '1111111111111111111111111111111111111111...' is too "
                   "long for a time");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_zone_in_the_text_is_obeyed),
        cmocka_unit_test(a_given_offset_is_used_where_the_text_has_no_zone),
        cmocka_unit_test(a_zone_in_the_header_is_obeyed),
        cmocka_unit_test(a_zone_is_never_guessed),
        cmocka_unit_test(a_zone_may_not_be_told_in_two_ways),
        cmocka_unit_test(date_and_clock_make_a_time),
        cmocka_unit_test(year_month_and_day_make_a_time),
        cmocka_unit_test(hour_and_minute_may_follow),
        cmocka_unit_test(hour_24_is_midnight_at_the_end_of_the_day),
        cmocka_unit_test(a_minute_past_hour_24_is_refused),
        cmocka_unit_test(two_digit_years_need_a_century),
        cmocka_unit_test(a_year_of_three_digits_is_refused),
        cmocka_unit_test(a_century_is_a_whole_one),
        cmocka_unit_test(a_day_outside_the_calendar_is_refused),
        cmocka_unit_test(part_of_a_date_that_is_no_number_is_named),
        cmocka_unit_test(a_split_time_needs_an_offset_too),
        cmocka_unit_test(a_text_that_is_no_time_is_refused),
        cmocka_unit_test(an_endless_time_is_refused),
    };
    return cmocka_run_group_tests(tests, make_record, remove_folder);
}
