/* A bracketed root is found, and a missing one refused. */
#include "support/check.h"

#include "numerics/roots.h"

static double cubic(double x, void *user) {
    const double *root = user;
    return (x - *root) * (x * x + 1.0);
}

static double step(double x, void *user) {
    (void)user;
    return x < 0.3 ? -1.0 : 1.0;
}

static double broken(double x, void *user) {
    (void)x;
    (void)user;
    return NAN;
}

static void the_root_of_a_cubic_is_found(void **state) {
    (void)state;
    double expected = 0.7;
    double root = 0.0;
    assert_int_equal(
        lee_root_between(cubic, &expected, -2.0, 5.0, 1e-14, &root, NULL),
        LEE_OK);
    assert_near(root, 0.7, 1e-14);
}

static void a_root_at_an_end_is_that_end(void **state) {
    (void)state;
    double expected = 5.0;
    double root = 0.0;
    assert_int_equal(
        lee_root_between(cubic, &expected, -2.0, 5.0, 1e-14, &root, NULL),
        LEE_OK);
    assert_near(root, 5.0, 0.0);
}

static void a_jump_through_zero_counts_as_a_root(void **state) {
    (void)state;
    double root = 0.0;
    assert_int_equal(
        lee_root_between(step, NULL, -2.0, 5.0, 1e-12, &root, NULL), LEE_OK);
    assert_near(root, 0.3, 1e-12);
}

static void ends_of_one_sign_are_refused(void **state) {
    (void)state;
    double expected = 9.0;
    double root = 0.5;
    lee_error error = {0};
    assert_int_equal(
        lee_root_between(cubic, &expected, 0.0, 1.0, 1e-14, &root, &error),
        LEE_ERR_ARGUMENT);
    assert_string_equal(error.message, "no change of sign between 0 and 1: "
                                       "values -9 and -16");
    assert_near(root, 0.5, 0.0);
}

static void a_value_that_is_not_a_number_is_refused(void **state) {
    (void)state;
    double root = 0.5;
    assert_int_equal(
        lee_root_between(broken, NULL, 0.0, 1.0, 1e-14, &root, NULL),
        LEE_ERR_ARGUMENT);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_root_of_a_cubic_is_found),
        cmocka_unit_test(a_root_at_an_end_is_that_end),
        cmocka_unit_test(a_jump_through_zero_counts_as_a_root),
        cmocka_unit_test(ends_of_one_sign_are_refused),
        cmocka_unit_test(a_value_that_is_not_a_number_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
