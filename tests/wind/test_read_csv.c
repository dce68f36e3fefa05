/* A CSV record is read as it was meant, or refused as a whole. */
#include "wind/csv_support.h"

static const lee_wind_csv components = {
    .column[LEE_WIND_TIME] = {.name = "time"},
    .column[LEE_WIND_EASTWARD] = {.name = "u"},
    .column[LEE_WIND_NORTHWARD] = {.name = "v"},
};

static void a_plain_record_is_read(void **state) {
    (void)state;
    lee_wind_record record =
        read_text(&plain, "time,speed [m s-1],from [degree]\n"
                          "2031-01-10T06:00Z,5.5,240\n"
                          "2031-01-10T06:10Z,6,250\n");
    assert_int_equal(record.n, 2);
    assert_int_equal(record.time[0], time_of("2031-01-10T06:00Z"));
    assert_int_equal(record.time[1], time_of("2031-01-10T06:10Z"));
    assert_wind(&record, 0, 5.5, 240.0);
    assert_wind(&record, 1, 6.0, 250.0);
    assert_null(record.pressure);
    lee_wind_record_free(&record);
}

static void one_row_is_a_record(void **state) {
    (void)state;
    lee_wind_record record = read_text(
        &plain, "time,speed [m/s],from [deg]\n2031-01-10T06:00Z,5.5,240\n");
    assert_int_equal(record.n, 1);
    lee_wind_record_free(&record);
}

static void a_long_record_keeps_all_its_rows(void **state) {
    (void)state;
    enum { N = 5000 };
    FILE *file = fopen(path, "wb");
    assert_non_null(file);
    (void)fputs("time,speed [m/s],from [deg]\n", file);
    for (int i = 0; i < N; i++) {
        char text[LEE_TIME_TEXT];
        (void)fprintf(file, "%s,%d.5,%d\n",
                      lee_time_format(INT64_C(600) * i, text), i % 30, i % 361);
    }
    assert_int_equal(fclose(file), 0);
    lee_wind_record record;
    assert_int_equal(lee_wind_read_csv(path, &plain, &record, NULL), LEE_OK);
    assert_int_equal(record.n, N);
    for (int i = 0; i < N; i++) {
        assert_int_equal(record.time[i], INT64_C(600) * i);
        assert_wind(&record, (size_t)i, i % 30 + 0.5, i % 361);
    }
    lee_wind_record_free(&record);
}

static void the_stamp_is_the_one_asked_for(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.stamp = LEE_STAMP_END;
    lee_wind_record record = read_text(
        &how, "time,speed [m/s],from [deg]\n2031-01-10T06:00Z,5.5,240\n");
    assert_int_equal(record.stamp, LEE_STAMP_END);
    lee_wind_record_free(&record);
}

static void north_is_both_0_and_360(void **state) {
    (void)state;
    lee_wind_record record = read_text(&plain, "time,speed [m/s],from [deg]\n"
                                               "2031-01-10T06:00Z,10,0\n"
                                               "2031-01-10T06:10Z,10,360\n");
    assert_wind(&record, 0, 10.0, 0.0);
    assert_wind(&record, 1, 10.0, 0.0);
    lee_wind_record_free(&record);
}

static void a_decimal_comma_is_read_between_semicolons(void **state) {
    (void)state;
    lee_wind_record record = read_text(&plain, "time;speed [m/s];from [deg]\r\n"
                                               "2031-01-10T06:00Z;5,5;240\r\n");
    assert_wind(&record, 0, 5.5, 240.0);
    lee_wind_record_free(&record);
}

static void two_components_are_a_wind(void **state) {
    (void)state;
    lee_wind_record record =
        read_text(&components, "time,u [m s-1],v [m s-1]\n"
                               "2031-01-10T06:00Z,-3.5,4\n");
    assert_near(record.east[0], -3.5, 0.0);
    assert_near(record.north[0], 4.0, 0.0);
    lee_wind_record_free(&record);
}

static void half_a_vector_is_missing(void **state) {
    (void)state;
    lee_wind_record record = read_text(&components, "time,u [m s-1],v [m s-1]\n"
                                                    "2031-01-10T06:00Z,-3.5,4\n"
                                                    "2031-01-10T12:00Z,-3.5,\n"
                                                    "2031-01-10T18:00Z,NA,4\n");
    assert_int_equal(record.n, 3);
    assert_missing(&record, 1);
    assert_missing(&record, 2);
    lee_wind_record_free(&record);
}

static void optional_columns_are_kept_in_si(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.column[LEE_WIND_PRESSURE].name = "p";
    how.column[LEE_WIND_AIR_TEMPERATURE].name = "ta";
    how.column[LEE_WIND_WATER_TEMPERATURE].name = "tw";
    how.column[LEE_WIND_HUMIDITY].name = "rh";
    how.column[LEE_WIND_ICE].name = "ice";
    lee_wind_record record =
        read_text(&how, "time,speed [m/s],from [deg],p [hPa],ta [degC],"
                        "tw [degC],rh [percent],ice\n"
                        "2031-01-10T06:00Z,5,240,1013.25,-3.5,1.25,85,0.4\n"
                        "2031-01-10T07:00Z,5,240,,,,,\n");
    assert_near(record.pressure[0], 101325.0, 1e-9);
    assert_near(record.air_temperature[0], 269.65, 1e-12);
    assert_near(record.water_temperature[0], 274.4, 1e-12);
    assert_near(record.humidity[0], 0.85, 1e-15);
    assert_near(record.ice[0], 0.4, 0.0);
    assert_true(isnan(record.pressure[1]) && isnan(record.ice[1]));
    assert_wind(&record, 1, 5.0, 240.0);
    lee_wind_record_free(&record);
}

static void a_speed_of_zero_without_direction_is_calm(void **state) {
    (void)state;
    lee_wind_record record = read_text(&plain, "time,speed [m/s],from [deg]\n"
                                               "2031-01-10T06:00Z,0,\n"
                                               "2031-01-10T07:00Z,0.0,NA\n");
    for (size_t i = 0; i < 2; i++) {
        assert_near(record.east[i], 0.0, 0.0);
        assert_near(record.north[i], 0.0, 0.0);
    }
    lee_wind_record_free(&record);
}

static void a_speed_above_zero_without_direction_is_missing(void **state) {
    (void)state;
    lee_wind_record record = read_text(&plain, "time,speed [m/s],from [deg]\n"
                                               "2031-01-10T06:00Z,4,90\n"
                                               "2031-01-10T07:00Z,0.1,\n");
    assert_missing(&record, 1);
    lee_wind_record_free(&record);
}

static void a_variable_wind_below_3_m_s_is_calm_else_missing(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.variable = "VRB";
    lee_wind_record record = read_text(&how, "time,speed [m/s],from [deg]\n"
                                             "2031-01-10T06:00Z,2.999,VRB\n"
                                             "2031-01-10T07:00Z,3,VRB\n"
                                             "2031-01-10T07:30Z,2,90\n"
                                             "2031-01-10T08:00Z,,VRB\n"
                                             "2031-01-10T09:00Z,0,VRB\n"
                                             "2031-01-10T10:00Z,2,90\n");
    assert_near(record.east[0], 0.0, 0.0);
    assert_near(record.north[0], 0.0, 0.0);
    assert_missing(&record, 1);
    assert_wind(&record, 2, 2.0, 90.0);
    assert_missing(&record, 3);
    assert_near(record.east[4], 0.0, 0.0);
    assert_wind(&record, 5, 2.0, 90.0);
    assert_int_equal(record.variable_calm, 2);
    assert_int_equal(record.variable_missing, 1);
    lee_wind_record_free(&record);
}

static void variable_is_judged_in_metres_per_second(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.variable = "VRB";
    lee_wind_record record = read_text(&how, "time,speed [knots],from [deg]\n"
                                             "2031-01-10T06:00Z,5,VRB\n"
                                             "2031-01-10T07:00Z,6,VRB\n");
    assert_int_equal(record.variable_calm, 1);
    assert_int_equal(record.variable_missing, 1);
    lee_wind_record_free(&record);
}

static void a_variable_wind_may_be_coded_as_a_number(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.variable = "990";
    lee_wind_record record = read_text(&how, "time,speed [m/s],from [deg]\n"
                                             "2031-01-10T06:00Z,4,90\n"
                                             "2031-01-10T07:00Z,8,990.0\n");
    assert_missing(&record, 1);
    assert_int_equal(record.variable_missing, 1);
    lee_wind_record_free(&record);
}

static void a_record_without_any_wind_is_refused(void **state) {
    (void)state;
    assert_refused(&plain,
                   "time,speed [m/s],from [deg]\n"
                   "2031-01-10T06:00Z,,\n2031-01-10T07:00Z,4,\n",
                   LEE_ERR_DATA, ": the wind is missing from all 2 rows");
}

static void a_header_alone_is_refused(void **state) {
    (void)state;
    assert_refused(&plain, "time,speed [m/s],from [deg]\n", LEE_ERR_DATA,
                   ": no row follows the header");
}

static void a_repeated_row_is_dropped_and_counted(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.variable = "VRB";
    lee_wind_record record = read_text(&how, "time,speed [m/s],from [deg]\n"
                                             "2031-01-10T06:00Z,4,90\n"
                                             "2031-01-10T06:00Z,4.0,90\n"
                                             "2031-01-10T07:00Z,,90\n"
                                             "2031-01-10T07:00Z,NA,90\n"
                                             "2031-01-10T08:00Z,1,VRB\n"
                                             "2031-01-10T08:00Z,1,VRB\n");
    assert_int_equal(record.n, 3);
    assert_int_equal(record.duplicates, 3);
    assert_int_equal(record.variable_calm, 1);
    lee_wind_record_free(&record);
}

static void a_repeated_time_with_another_wind_is_refused(void **state) {
    (void)state;
    assert_refused(&plain,
                   "time,speed [m/s],from [deg]\n"
                   "2031-01-10T06:00Z,4,90\n2031-01-10T06:00Z,4,91\n",
                   LEE_ERR_FORMAT,
                   ":3:1: time 2031-01-10T06:00:00Z is here again with other "
                   "values");
}

static void a_repeated_time_with_one_other_component_is_refused(void **state) {
    (void)state;
    static const char *const rows[] = {"4,5", "3,6"};
    for (size_t i = 0; i < 2; i++) {
        char text[200];
        (void)snprintf(text, sizeof text,
                       "time,u [m/s],v [m/s]\n"
                       "2031-01-10T06:00Z,3,5\n2031-01-10T06:00Z,%s\n",
                       rows[i]);
        assert_refused(&components, text, LEE_ERR_FORMAT,
                       ":3:1: time 2031-01-10T06:00:00Z is here again with "
                       "other values");
    }
}

static void a_repeated_time_with_another_pressure_is_refused(void **state) {
    (void)state;
    lee_wind_csv how = plain;
    how.column[LEE_WIND_PRESSURE].name = "p";
    assert_refused(&how,
                   "time,speed [m/s],from [deg],p [hPa]\n"
                   "2031-01-10T06:00Z,4,90,1000\n2031-01-10T06:00Z,4,90,\n",
                   LEE_ERR_FORMAT,
                   ":3:1: time 2031-01-10T06:00:00Z is here again with other "
                   "values");
}

static void a_time_that_runs_backwards_is_refused(void **state) {
    (void)state;
    assert_refused(&plain,
                   "speed [m/s],time,from [deg]\n"
                   "4,2031-01-10T06:00Z,90\n# a remark\n"
                   "4,2031-01-10T05:59Z,90\n",
                   LEE_ERR_FORMAT,
                   ":4:3: time 2031-01-10T05:59:00Z runs backwards: the row "
                   "before has 2031-01-10T06:00:00Z");
}

static void a_file_that_is_not_there_is_refused(void **state) {
    (void)state;
    lee_wind_record record;
    lee_error error = {0};
    assert_int_equal(
        lee_wind_read_csv("/nowhere/wind.csv", &plain, &record, &error),
        LEE_ERR_FILE);
    assert_non_null(strstr(error.message, "/nowhere/wind.csv"));
    assert_null(record.time);
}

/* Overwrites, drops or doubles a stretch of bytes; returns the new length. */
static size_t damage(size_t length, char bytes[], uint64_t *seed) {
    static const char odd[] = ",;\t\"\n\r#-+.eE0129 Z:T\0\377[]N";
    const size_t at = (size_t)((double)length * uniform(seed));
    const size_t size = 1 + (size_t)(8.0 * uniform(seed));
    const size_t end = at + size < length ? at + size : length;
    const double kind = uniform(seed);
    if (kind < 0.6) {
        for (size_t i = at; i < end && i < at + 2; i++) {
            bytes[i] = odd[(size_t)((double)(sizeof odd - 1) * uniform(seed))];
        }
        return length;
    }
    if (kind < 0.8) {
        memmove(bytes + at, bytes + end, length - end);
        return length - (end - at);
    }
    memmove(bytes + end, bytes + at, length - at);
    return length + (end - at);
}

static void assert_sound(const lee_wind_record *record) {
    assert_true(record->n > 0);
    size_t winds = 0;
    for (size_t i = 0; i < record->n; i++) {
        assert_true(i == 0 || record->time[i] > record->time[i - 1]);
        assert_true(isnan(record->east[i]) == isnan(record->north[i]));
        winds += isnan(record->east[i]) ? 0 : 1;
        assert_false(hypot(record->east[i], record->north[i]) > 341.0);
    }
    assert_true(winds > 0);
}

static void a_damaged_record_is_read_clean_or_refused_once(void **state) {
    (void)state;
    enum { TRIES = 1000 };
    static const char good[] = "time,speed [knots],from [degree]\n"
                               "2031-01-10T06:00Z,10,240\n"
                               "2031-01-10T06:10Z,11.5,250\n"
                               "2031-01-10T06:20Z,,\n"
                               "2031-01-10T06:30Z,0,\n"
                               "\"2031-01-10T06:40Z\",12.25,260\n";
    uint64_t seed = 20310110;
    size_t refused = 0;
    for (int i = 0; i < TRIES; i++) {
        char bytes[2 * sizeof good] = {0};
        size_t length = sizeof good - 1;
        memcpy(bytes, good, length);
        for (double more = 0.0; more < 0.5; more = uniform(&seed)) {
            length = damage(length, bytes, &seed);
            if (length < 20 || length > sizeof good + 40) {
                break;
            }
        }
        write_bytes(length, bytes);
        lee_wind_record record;
        lee_error error = {0};
        const lee_status status =
            lee_wind_read_csv(path, &plain, &record, &error);
        assert_int_equal(status, error.status);
        if (status == LEE_OK) {
            assert_sound(&record);
        } else {
            refused++;
            assert_int_equal(strncmp(error.message, path, strlen(path)), 0);
            assert_null(strchr(error.message, '\n'));
            assert_null(record.time);
        }
        lee_wind_record_free(&record);
    }
    /* Both happen, or the damage is not worth its name. */
    assert_true(refused > TRIES / 4 && refused < TRIES);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_plain_record_is_read),
        cmocka_unit_test(one_row_is_a_record),
        cmocka_unit_test(a_long_record_keeps_all_its_rows),
        cmocka_unit_test(the_stamp_is_the_one_asked_for),
        cmocka_unit_test(north_is_both_0_and_360),
        cmocka_unit_test(a_decimal_comma_is_read_between_semicolons),
        cmocka_unit_test(two_components_are_a_wind),
        cmocka_unit_test(half_a_vector_is_missing),
        cmocka_unit_test(optional_columns_are_kept_in_si),
        cmocka_unit_test(a_speed_of_zero_without_direction_is_calm),
        cmocka_unit_test(a_speed_above_zero_without_direction_is_missing),
        cmocka_unit_test(a_variable_wind_below_3_m_s_is_calm_else_missing),
        cmocka_unit_test(variable_is_judged_in_metres_per_second),
        cmocka_unit_test(a_variable_wind_may_be_coded_as_a_number),
        cmocka_unit_test(a_record_without_any_wind_is_refused),
        cmocka_unit_test(a_header_alone_is_refused),
        cmocka_unit_test(a_repeated_row_is_dropped_and_counted),
        cmocka_unit_test(a_repeated_time_with_another_wind_is_refused),
        cmocka_unit_test(a_repeated_time_with_one_other_component_is_refused),
        cmocka_unit_test(a_repeated_time_with_another_pressure_is_refused),
        cmocka_unit_test(a_time_that_runs_backwards_is_refused),
        cmocka_unit_test(a_file_that_is_not_there_is_refused),
        cmocka_unit_test(a_damaged_record_is_read_clean_or_refused_once),
    };
    return cmocka_run_group_tests(tests, make_record, remove_folder);
}
