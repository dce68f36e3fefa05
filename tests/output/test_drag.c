/* Drag tables show the values of the relations and mark what is not fitted. */
#include "support/captured.h"

#include <jansson.h>

#include "leewater/output.h"

/* A relation of the test's own: C10 = 1e-4 U, fitted from 5 to 15 m/s. */
static double tenth(const lee_drag_input *in) {
    return 1e-4 * in->speed;
}

static const lee_drag_relation made_up = {
    .name = "made-up-2000",
    .paper = "madeup2000",
    .source = "Nobody (2000), eq. 1",
    .speed_min = 5.0,
    .speed_max = 15.0,
    .includes_return_flow = true,
    .coefficient = tenth,
};
static const lee_drag_relation *const relations[] = {&made_up};
static const double speeds[] = {4.0, 10.0, 20.0};

static lee_drag_table table_of(size_t n, const double speed[]) {
    return (lee_drag_table){.speeds = n,
                            .speed = speed,
                            .relations = 1,
                            .relation = relations,
                            .air_density = 1.25,
                            .water_density = 1000.0};
}

static void values_outside_the_fitted_speeds_are_marked(void **state) {
    (void)state;
    captured out;
    const lee_drag_table table = table_of(3, speeds);
    capture_begin(&out);
    assert_int_equal(lee_print_drag(out.stream, &table, LEE_UNITS_SI, NULL),
                     LEE_OK);
    assert_contains(capture_end(&out),
                    "made-up-2000  0.400*  1.000   2.000*\n");
    capture_free(&out);
}

/* 1.25 kg/m3 times 1e-3 times 100 m2/s2 is 0.125 Pa; at 4 and 20 m/s 0.008
 * and 1.000 Pa. */
static void stress_is_density_times_drag_times_speed_squared(void **state) {
    (void)state;
    captured out;
    const lee_drag_table table = table_of(3, speeds);
    capture_begin(&out);
    assert_int_equal(lee_print_drag(out.stream, &table, LEE_UNITS_SI, NULL),
                     LEE_OK);
    assert_contains(capture_end(&out),
                    "made-up-2000  0.008*  0.125   1.000*\n");
    capture_free(&out);
}

/* Seven speeds: six in the first block, one in the second. */
static void many_speeds_go_on_in_a_second_block(void **state) {
    (void)state;
    captured out;
    const double many[] = {5.0, 6.0, 7.0, 8.0, 9.0, 10.0, 13.0};
    const lee_drag_table table = table_of(7, many);
    capture_begin(&out);
    assert_int_equal(lee_print_drag(out.stream, &table, LEE_UNITS_SI, NULL),
                     LEE_OK);
    const char *text = capture_end(&out);
    assert_contains(text, "9.0    10.0\n");
    assert_contains(text, "m/s   13.0\n");
    assert_contains(text, "made-up-2000  1.300\n");
    capture_free(&out);
}

static void sources_are_told_on_request_only(void **state) {
    (void)state;
    captured out;
    lee_drag_table table = table_of(3, speeds);
    capture_begin(&out);
    assert_int_equal(lee_print_drag(out.stream, &table, LEE_UNITS_SI, NULL),
                     LEE_OK);
    assert_lacks(capture_end(&out), "Nobody");
    capture_free(&out);
    table.has_sources = true;
    capture_begin(&out);
    assert_int_equal(lee_print_drag(out.stream, &table, LEE_UNITS_SI, NULL),
                     LEE_OK);
    const char *text = capture_end(&out);
    assert_contains(text, "made-up-2000  5.0 to 15.0 m/s, fitted on set-up");
    assert_contains(text, "      Nobody (2000), eq. 1\n");
    capture_free(&out);
}

static void a_table_carries_its_method_and_the_caution(void **state) {
    (void)state;
    captured out;
    const lee_drag_table table = table_of(1, speeds);
    capture_begin(&out);
    assert_int_equal(lee_print_drag(out.stream, &table, LEE_UNITS_SI, NULL),
                     LEE_OK);
    const char *text = capture_end(&out);
    assert_contains(text, "\nMethod\n  case              none: winds taken as "
                          "they are\n");
    assert_contains(text, "each relation as published, no cap\n");
    assert_contains(text, "1.250 kg/m3, standard, sea level, 15.0 degC\n");
    assert_contains(text, "\nPlanning estimates. Flood warnings and decisions");
    capture_free(&out);
}

static void json_has_every_value_and_its_mark(void **state) {
    (void)state;
    captured out;
    const lee_drag_table table = table_of(3, speeds);
    capture_begin(&out);
    assert_int_equal(lee_json_drag(out.stream, &table, NULL), LEE_OK);
    json_t *root = json_loads(capture_end(&out), JSON_REJECT_DUPLICATES, NULL);
    capture_free(&out);
    assert_non_null(root);
    const json_t *relation =
        json_array_get(json_object_get(root, "relations"), 0);
    assert_string_equal(json_string_value(json_object_get(relation, "source")),
                        "Nobody (2000), eq. 1");
    const json_t *value =
        json_array_get(json_object_get(relation, "values"), 2);
    assert_near(json_number_value(json_object_get(value, "speed_m_s")), 20.0,
                0.0);
    assert_near(json_number_value(json_object_get(value, "drag_coefficient")),
                2e-3, 1e-12);
    assert_near(json_number_value(json_object_get(value, "stress_Pa")), 1.0,
                1e-9);
    assert_true(json_is_true(json_object_get(value, "is_extrapolated")));
    json_decref(root);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(values_outside_the_fitted_speeds_are_marked),
        cmocka_unit_test(stress_is_density_times_drag_times_speed_squared),
        cmocka_unit_test(many_speeds_go_on_in_a_second_block),
        cmocka_unit_test(sources_are_told_on_request_only),
        cmocka_unit_test(a_table_carries_its_method_and_the_caution),
        cmocka_unit_test(json_has_every_value_and_its_mark),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
