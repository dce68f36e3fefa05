/* The drag of an estimate: relation, constant or table, capped and told. */
#include "support/check.h"

#include <stdlib.h>
#include <string.h>

#include "leewater/stress.h"

static const double near_zero = 1e-15; /* a few roundings of a C10 */

static lee_drag_input at(double speed) {
    return (lee_drag_input){speed, 1.225, 1000.0, 9.81, 1.5e-5};
}

static double coefficient(const lee_drag *drag, double speed) {
    const lee_drag_input in = at(speed);
    return lee_drag_coefficient(drag, &in, NULL, NULL);
}

static bool is_extrapolated(const lee_drag *drag, double speed) {
    const lee_drag_input in = at(speed);
    bool extrapolated = false;
    (void)lee_drag_coefficient(drag, &in, &extrapolated, NULL);
    return extrapolated;
}

static bool is_capped(const lee_drag *drag, double speed) {
    const lee_drag_input in = at(speed);
    bool capped = false;
    (void)lee_drag_coefficient(drag, &in, NULL, &capped);
    return capped;
}

static lee_drag constant(double c10) {
    return (lee_drag){.constant = c10, .cap = INFINITY};
}

static lee_drag table(size_t n, const double speed[], const double c10[]) {
    lee_drag drag = {
        .n = n,
        .speed = calloc(n, sizeof *drag.speed),
        .coefficient = calloc(n, sizeof *drag.coefficient),
        .cap = INFINITY,
    };
    assert_true(drag.speed != NULL && drag.coefficient != NULL);
    memcpy(drag.speed, speed, n * sizeof *speed);
    memcpy(drag.coefficient, c10, n * sizeof *c10);
    return drag;
}

static lee_drag three_rows(void) {
    const double speed[] = {5.0, 10.0, 20.0};
    const double c10[] = {1.0e-3, 1.2e-3, 2.2e-3};
    return table(3, speed, c10);
}

/* (0.75 + 0.067 U) per thousand, Garratt (1977). */
static void the_default_is_garratts_line(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    assert_near(coefficient(&drag, 10.0), 1.42e-3, near_zero);
}

/* The line reaches 3.0 per thousand at (3.0 - 0.75)/0.067 = 33.58 m s-1. */
static void the_default_is_capped_at_three_per_thousand(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    assert_false(is_capped(&drag, 33.58));
    assert_true(is_capped(&drag, 33.59));
    assert_near(coefficient(&drag, 50.0), 3.0e-3, 0.0);
}

static void a_speed_outside_the_fitted_range_is_extrapolated(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    assert_true(is_extrapolated(&drag, 3.99));
    assert_false(is_extrapolated(&drag, 4.0));
    assert_false(is_extrapolated(&drag, 21.0));
    assert_true(is_extrapolated(&drag, 21.01));
}

static void a_constant_is_the_same_at_any_speed(void **state) {
    (void)state;
    const lee_drag drag = constant(1.8e-3);
    assert_near(coefficient(&drag, 0.0), 1.8e-3, 0.0);
    assert_near(coefficient(&drag, 60.0), 1.8e-3, 0.0);
}

static void a_constant_never_extrapolates(void **state) {
    (void)state;
    const lee_drag drag = constant(1.8e-3);
    assert_false(is_extrapolated(&drag, 0.0));
    assert_false(is_extrapolated(&drag, 60.0));
}

static void a_table_is_met_at_its_rows(void **state) {
    (void)state;
    lee_drag drag = three_rows();
    assert_near(coefficient(&drag, 5.0), 1.0e-3, near_zero);
    assert_near(coefficient(&drag, 10.0), 1.2e-3, near_zero);
    assert_near(coefficient(&drag, 20.0), 2.2e-3, near_zero);
    lee_drag_free(&drag);
}

static void a_table_is_linear_between_its_rows(void **state) {
    (void)state;
    lee_drag drag = three_rows();
    assert_near(coefficient(&drag, 7.5), 1.1e-3, near_zero);
    assert_near(coefficient(&drag, 12.0), 1.4e-3, near_zero);
    lee_drag_free(&drag);
}

static void a_table_of_many_rows_finds_the_right_pair(void **state) {
    (void)state;
    double speed[41];
    double c10[41];
    for (int i = 0; i < 41; i++) {
        speed[i] = i;
        c10[i] = 1e-6 * i * i; /* each pair of rows has a slope of its own */
    }
    lee_drag drag = table(41, speed, c10);
    for (int i = 0; i < 40; i++) {
        const double mean = 0.5e-6 * (i * i + (i + 1) * (i + 1));
        assert_near(coefficient(&drag, i + 0.5), mean, near_zero);
    }
    lee_drag_free(&drag);
}

static void a_table_is_held_and_extrapolated_outside_its_rows(void **state) {
    (void)state;
    lee_drag drag = three_rows();
    assert_near(coefficient(&drag, 1.0), 1.0e-3, 0.0);
    assert_near(coefficient(&drag, 40.0), 2.2e-3, 0.0);
    assert_true(is_extrapolated(&drag, 1.0));
    assert_true(is_extrapolated(&drag, 40.0));
    assert_false(is_extrapolated(&drag, 5.0));
    assert_false(is_extrapolated(&drag, 20.0));
    lee_drag_free(&drag);
}

static void a_table_of_one_row_is_held_everywhere(void **state) {
    (void)state;
    const double speed[] = {10.0};
    const double c10[] = {1.5e-3};
    lee_drag drag = table(1, speed, c10);
    assert_near(coefficient(&drag, 0.0), 1.5e-3, 0.0);
    assert_near(coefficient(&drag, 10.0), 1.5e-3, 0.0);
    assert_near(coefficient(&drag, 30.0), 1.5e-3, 0.0);
    lee_drag_free(&drag);
}

static void a_cap_holds_tables_and_constants_too(void **state) {
    (void)state;
    lee_drag drag = three_rows();
    drag.cap = 2.0e-3;
    assert_near(coefficient(&drag, 20.0), 2.0e-3, 0.0);
    assert_true(is_capped(&drag, 20.0));
    assert_false(is_capped(&drag, 10.0));
    lee_drag_free(&drag);
    lee_drag level = constant(2.5e-3);
    level.cap = 2.0e-3;
    assert_near(coefficient(&level, 10.0), 2.0e-3, 0.0);
}

static void a_missing_speed_has_no_coefficient(void **state) {
    (void)state;
    const lee_drag relation = lee_drag_default();
    const lee_drag level = constant(1.8e-3);
    lee_drag rows = three_rows();
    assert_true(isnan(coefficient(&relation, NAN)));
    assert_true(isnan(coefficient(&level, NAN)));
    assert_true(isnan(coefficient(&rows, NAN)));
    assert_false(is_capped(&relation, NAN));
    lee_drag_free(&rows);
}

static void a_freed_drag_is_empty_and_may_be_freed_again(void **state) {
    (void)state;
    lee_drag drag = three_rows();
    lee_drag_free(&drag);
    assert_int_equal(drag.n, 0);
    assert_null(drag.speed);
    lee_drag_free(&drag);
}

static void no_drag_has_no_coefficient_to_speak_of(void **state) {
    (void)state;
    const lee_drag drag = {0};
    assert_near(coefficient(&drag, 10.0), 0.0, 0.0);
}

static void assert_described(const lee_drag *drag, const char *expected) {
    char text[160];
    assert_string_equal(lee_drag_describe(drag, sizeof text, text), expected);
}

static void a_drag_says_what_it_is(void **state) {
    (void)state;
    const lee_drag usual = lee_drag_default();
    assert_described(&usual, "garratt-linear-1977, capped at 0.0030");
    lee_drag free_line = usual;
    free_line.cap = INFINITY;
    assert_described(&free_line, "garratt-linear-1977");
    const lee_drag level = constant(1.8e-3);
    assert_described(&level, "constant 0.0018");
    const lee_drag none = {0};
    assert_described(&none, "no drag");
    lee_drag rows = three_rows();
    assert_described(&rows, "table of 3 rows");
    lee_drag_free(&rows);
}

static void a_description_keeps_every_digit_of_a_cap(void **state) {
    (void)state;
    lee_drag drag = lee_drag_default();
    drag.cap = 2.85e-3;
    assert_described(&drag, "garratt-linear-1977, capped at 0.00285");
}

static void a_description_fits_the_room_it_has(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    char text[28] = "";
    (void)lee_drag_describe(&drag, sizeof text, text);
    assert_string_equal(text, "garratt-linear-1977, capped");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_default_is_garratts_line),
        cmocka_unit_test(the_default_is_capped_at_three_per_thousand),
        cmocka_unit_test(a_speed_outside_the_fitted_range_is_extrapolated),
        cmocka_unit_test(a_constant_is_the_same_at_any_speed),
        cmocka_unit_test(a_constant_never_extrapolates),
        cmocka_unit_test(a_table_is_met_at_its_rows),
        cmocka_unit_test(a_table_is_linear_between_its_rows),
        cmocka_unit_test(a_table_of_many_rows_finds_the_right_pair),
        cmocka_unit_test(a_table_is_held_and_extrapolated_outside_its_rows),
        cmocka_unit_test(a_table_of_one_row_is_held_everywhere),
        cmocka_unit_test(a_cap_holds_tables_and_constants_too),
        cmocka_unit_test(a_missing_speed_has_no_coefficient),
        cmocka_unit_test(a_freed_drag_is_empty_and_may_be_freed_again),
        cmocka_unit_test(no_drag_has_no_coefficient_to_speak_of),
        cmocka_unit_test(a_drag_says_what_it_is),
        cmocka_unit_test(a_description_keeps_every_digit_of_a_cap),
        cmocka_unit_test(a_description_fits_the_room_it_has),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
