/* A number is missing, or in range, or refused with its place. */
#include "wind/csv_support.h"

static void the_usual_words_for_missing_are_known(void **state) {
    (void)state;
    static const char *const words[] = {"", "NA", "NaN", "null", "nan", "NULL"};
    for (size_t i = 0; i < sizeof words / sizeof words[0]; i++) {
        char text[200];
        (void)snprintf(text, sizeof text,
                       "time,speed [m/s],from [deg]\n"
                       "2031-01-10T06:00Z,4,90\n2031-01-10T07:00Z,%s,90\n",
                       words[i]);
        lee_wind_record record = read_text(&plain, text);
        assert_int_equal(record.n, 2);
        assert_missing(&record, 1);
        lee_wind_record_free(&record);
    }
}

static void a_missing_code_is_a_text_and_a_number(void **state) {
    (void)state;
    static const char *const codes[] = {"-999", "M"};
    lee_wind_csv how = plain;
    how.missing = codes;
    how.missing_count = 2;
    lee_wind_record record = read_text(&how, "time,speed [knots],from [deg]\n"
                                             "2031-01-10T06:00Z,4,90\n"
                                             "2031-01-10T07:00Z,-999,90\n"
                                             "2031-01-10T08:00Z,-999.0,90\n"
                                             "2031-01-10T09:00Z,4,-9.99e2\n"
                                             "2031-01-10T10:00Z,M,90\n");
    assert_int_equal(record.n, 5);
    for (size_t i = 1; i < 5; i++) {
        assert_missing(&record, i);
    }
    lee_wind_record_free(&record);
}

static void a_missing_code_may_have_the_decimal_comma(void **state) {
    (void)state;
    static const char *const codes[] = {"-99,9"};
    lee_wind_csv how = plain;
    how.missing = codes;
    how.missing_count = 1;
    lee_wind_record record = read_text(&how, "time;speed [m/s];from [deg]\n"
                                             "2031-01-10T06:00Z;4,0;90\n"
                                             "2031-01-10T07:00Z;-99,90;90\n");
    assert_missing(&record, 1);
    lee_wind_record_free(&record);
}

static void a_direction_beyond_the_circle_is_refused(void **state) {
    (void)state;
    assert_refused(&plain,
                   "time,speed [m/s],from [deg]\n2031-01-10T06:00Z,4,361\n",
                   LEE_ERR_FORMAT,
                   ":2:21: from '361' is 361 degree, not in [0, 360]; should "
                   "it mean missing, list it under 'missing'");
    assert_refused(&plain,
                   "time,speed [m/s],from [deg]\n2031-01-10T06:00Z,4,-0.01\n",
                   LEE_ERR_FORMAT,
                   ":2:21: from '-0.01' is -0.01 degree, not in [0, 360]; "
                   "should it mean missing, list it under 'missing'");
}

static void a_negative_speed_is_refused(void **state) {
    (void)state;
    assert_refused(&plain,
                   "time,speed [km/h],from [deg]\n2031-01-10T06:00Z,-36,1\n",
                   LEE_ERR_FORMAT,
                   ":2:19: speed '-36' is -10 m s-1, not in [0, 340]; should "
                   "it mean missing, list it under 'missing'");
}

static void an_unlisted_missing_code_is_refused(void **state) {
    (void)state;
    assert_refused(&plain,
                   "time,speed [m/s],from [deg]\n2031-01-10T06:00Z,999.9,1\n",
                   LEE_ERR_FORMAT,
                   ":2:19: speed '999.9' is 999.9 m s-1, not in [0, 340]; "
                   "should it mean missing, list it under 'missing'");
}

static void a_pressure_in_the_wrong_unit_is_refused(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.column[LEE_WIND_PRESSURE].name = "p";
    assert_refused(&how,
                   "time,speed [m/s],from [deg],p [Pa]\n"
                   "2031-01-10T06:00Z,4,1,1013\n",
                   LEE_ERR_FORMAT,
                   ":2:23: pressure '1013' is 1013 Pa, not in [40000, 110000]; "
                   "should it mean missing, list it under 'missing'");
}

static void a_humidity_in_percent_must_say_so(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.column[LEE_WIND_HUMIDITY].name = "rh";
    assert_refused(&how,
                   "time,speed [m/s],from [deg],rh\n"
                   "2031-01-10T06:00Z,4,1,85\n",
                   LEE_ERR_FORMAT,
                   ":2:23: humidity '85' is 85, not in [0, 1]; should it mean "
                   "missing, list it under 'missing'");
}

static void a_speed_that_is_no_number_is_refused(void **state) {
    (void)state;
    static const char *const words[] = {"fast", "1e999", "inf", "0x10", "4 5"};
    for (size_t i = 0; i < sizeof words / sizeof words[0]; i++) {
        char text[200];
        (void)snprintf(text, sizeof text,
                       "time,speed [m/s],from [deg]\n2031-01-10T06:00Z,%s,9\n",
                       words[i]);
        write_bytes(strlen(text), text);
        lee_wind_record record;
        lee_error error = {0};
        assert_int_equal(lee_wind_read_csv(path, &plain, &record, &error),
                         LEE_ERR_FORMAT);
        assert_non_null(strstr(error.message, "wind.csv:2:19: "));
        assert_non_null(strstr(error.message, words[i]));
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_usual_words_for_missing_are_known),
        cmocka_unit_test(a_missing_code_is_a_text_and_a_number),
        cmocka_unit_test(a_missing_code_may_have_the_decimal_comma),
        cmocka_unit_test(a_direction_beyond_the_circle_is_refused),
        cmocka_unit_test(a_negative_speed_is_refused),
        cmocka_unit_test(an_unlisted_missing_code_is_refused),
        cmocka_unit_test(a_pressure_in_the_wrong_unit_is_refused),
        cmocka_unit_test(a_humidity_in_percent_must_say_so),
        cmocka_unit_test(a_speed_that_is_no_number_is_refused),
    };
    return cmocka_run_group_tests(tests, make_record, remove_folder);
}
