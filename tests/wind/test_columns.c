/* Each column has the name, unit and range that the manual says. */
#include "wind/support.h"

#include <string.h>

#include "wind/columns.h"

static void each_column_is_called_what_the_case_file_calls_it(void **state) {
    (void)state;
    const struct {
        lee_wind_column column;
        const char *name;
    } expected[] = {
        {LEE_WIND_TIME,              "time"             },
        {LEE_WIND_DATE,              "date"             },
        {LEE_WIND_CLOCK,             "clock"            },
        {LEE_WIND_YEAR,              "year"             },
        {LEE_WIND_MONTH,             "month"            },
        {LEE_WIND_DAY,               "day"              },
        {LEE_WIND_HOUR,              "hour"             },
        {LEE_WIND_MINUTE,            "minute"           },
        {LEE_WIND_SPEED,             "speed"            },
        {LEE_WIND_FROM,              "from"             },
        {LEE_WIND_EASTWARD,          "eastward"         },
        {LEE_WIND_NORTHWARD,         "northward"        },
        {LEE_WIND_PRESSURE,          "pressure"         },
        {LEE_WIND_AIR_TEMPERATURE,   "air_temperature"  },
        {LEE_WIND_WATER_TEMPERATURE, "water_temperature"},
        {LEE_WIND_HUMIDITY,          "humidity"         },
        {LEE_WIND_ICE,               "ice"              },
    };
    assert_int_equal(sizeof expected / sizeof expected[0], LEE_WIND_COLUMNS);
    for (size_t i = 0; i < LEE_WIND_COLUMNS; i++) {
        assert_string_equal(lee_wind_column_name(expected[i].column),
                            expected[i].name);
    }
}

static void times_have_no_unit_and_all_else_has_one(void **state) {
    (void)state;
    for (int i = 0; i < LEE_WIND_COLUMNS; i++) {
        const char *unit = lee_wind_column_unit((lee_wind_column)i);
        assert_true((unit == NULL) == (i < LEE_WIND_SPEED));
    }
    assert_string_equal(lee_wind_column_unit(LEE_WIND_SPEED), "m s-1");
    assert_string_equal(lee_wind_column_unit(LEE_WIND_FROM), "degree");
    assert_string_equal(lee_wind_column_unit(LEE_WIND_PRESSURE), "Pa");
    assert_string_equal(lee_wind_column_unit(LEE_WIND_AIR_TEMPERATURE), "K");
}

static void each_quantity_has_a_range(void **state) {
    (void)state;
    for (int i = LEE_WIND_SPEED; i < LEE_WIND_COLUMNS; i++) {
        const lee_wind_column_facts *facts =
            lee_wind_column_facts_of((lee_wind_column)i);
        assert_true(facts->low < facts->high);
    }
}

static void a_record_keeps_each_optional_column_in_its_own_place(void **state) {
    (void)state;
    lee_wind_record record = {0};
    assert_ptr_equal(lee_wind_optional(&record, LEE_WIND_PRESSURE),
                     &record.pressure);
    assert_ptr_equal(lee_wind_optional(&record, LEE_WIND_AIR_TEMPERATURE),
                     &record.air_temperature);
    assert_ptr_equal(lee_wind_optional(&record, LEE_WIND_WATER_TEMPERATURE),
                     &record.water_temperature);
    assert_ptr_equal(lee_wind_optional(&record, LEE_WIND_HUMIDITY),
                     &record.humidity);
    assert_ptr_equal(lee_wind_optional(&record, LEE_WIND_ICE), &record.ice);
    assert_null(lee_wind_optional(&record, LEE_WIND_SPEED));
}

static void a_quantity_is_found_where_the_record_keeps_it(void **state) {
    (void)state;
    double ice[] = {0.5};
    const lee_wind_record record = {.n = 1, .ice = ice};
    assert_ptr_equal(lee_wind_quantity(&record, LEE_WIND_ICE), ice);
    assert_null(lee_wind_quantity(&record, LEE_WIND_PRESSURE));
    assert_null(lee_wind_quantity(&record, LEE_WIND_SPEED));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(each_column_is_called_what_the_case_file_calls_it),
        cmocka_unit_test(times_have_no_unit_and_all_else_has_one),
        cmocka_unit_test(each_quantity_has_a_range),
        cmocka_unit_test(a_record_keeps_each_optional_column_in_its_own_place),
        cmocka_unit_test(a_quantity_is_found_where_the_record_keeps_it),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
