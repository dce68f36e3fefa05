/* Numeric columns are found by name and brought to SI, or refused. */
#include "support/files.h"

#include "formats/csv_column.h"

static lee_csv *table(const char *text) {
    lee_csv *csv = NULL;
    const char *path = folder_write(&folder, "table.csv", text);
    assert_int_equal(lee_csv_open(path, &csv, NULL), LEE_OK);
    return csv;
}

static void a_column_is_there_whatever_the_case_of_its_letters(void **state) {
    (void)state;
    lee_csv *csv = table("Speed [kn],n\n1,2\n");
    assert_true(lee_csv_has_column(csv, "speed"));
    assert_false(lee_csv_has_column(csv, "width"));
    lee_csv_close(csv);
}

/* 1 knot is 1852 m in 3600 s (international nautical mile). */
static void a_number_is_brought_to_the_unit_asked_for(void **state) {
    (void)state;
    lee_csv *csv = table("speed [kn]\n10\n");
    lee_csv_column column;
    const lee_csv_field *fields = NULL;
    double value = 0.0;
    assert_int_equal(lee_csv_find_column(csv, "speed", "m s-1", &column, NULL),
                     LEE_OK);
    assert_int_equal(lee_csv_next(csv, &fields, NULL), LEE_OK);
    assert_int_equal(lee_csv_column_number(csv, fields, &column, &value, NULL),
                     LEE_OK);
    assert_near(value, 10.0 * 1852.0 / 3600.0, 1e-12); /* rounding */
    lee_csv_close(csv);
}

static void a_pure_number_may_lack_a_unit(void **state) {
    (void)state;
    lee_csv *csv = table("share\n0.5\n");
    lee_csv_column column;
    assert_int_equal(lee_csv_find_column(csv, "share", "1", &column, NULL),
                     LEE_OK);
    assert_near(column.to_si.factor, 1.0, 0.0);
    lee_csv_close(csv);
}

static void a_quantity_without_a_unit_is_refused_with_a_hint(void **state) {
    (void)state;
    lee_csv *csv = table("speed\n0.5\n");
    lee_csv_column column;
    lee_error error = {0};
    assert_int_equal(
        lee_csv_find_column(csv, "speed", "m s-1", &column, &error),
        LEE_ERR_FORMAT);
    assert_non_null(strstr(error.message,
                           "table.csv:1: column 'speed' has no unit; write it "
                           "in the header, as in \"speed [m s-1]\""));
    lee_csv_close(csv);
}

static void a_field_that_is_no_number_leaves_the_value_alone(void **state) {
    (void)state;
    lee_csv *csv = table("share\nhalf\n");
    lee_csv_column column;
    const lee_csv_field *fields = NULL;
    double value = 7.0;
    assert_int_equal(lee_csv_find_column(csv, "share", "1", &column, NULL),
                     LEE_OK);
    assert_int_equal(lee_csv_next(csv, &fields, NULL), LEE_OK);
    assert_int_equal(lee_csv_column_number(csv, fields, &column, &value, NULL),
                     LEE_ERR_FORMAT);
    assert_near(value, 7.0, 0.0);
    lee_csv_close(csv);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_column_is_there_whatever_the_case_of_its_letters),
        cmocka_unit_test(a_number_is_brought_to_the_unit_asked_for),
        cmocka_unit_test(a_pure_number_may_lack_a_unit),
        cmocka_unit_test(a_quantity_without_a_unit_is_refused_with_a_hint),
        cmocka_unit_test(a_field_that_is_no_number_leaves_the_value_alone),
    };
    return cmocka_run_group_tests(tests, make_folder, remove_folder);
}
