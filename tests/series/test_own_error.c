/* The error of a number from three meshes, against known expansions. */
#include "support/check.h"

#include "series/own_error.h"

/* A value whose error is constant * mesh^order. */
static double measured(double mesh, double constant, double order) {
    return 2.0 + constant * pow(mesh, order);
}

static double found(double constant, double order) {
    return lee_richardson_error(measured(2.0, constant, order),
                                measured(1.0, constant, order),
                                measured(0.5, constant, order));
}

static void a_first_order_error_is_found_exactly(void **state) {
    (void)state;
    assert_near(found(0.01, 1.0), 0.01, 1e-14); /* rounding */
}

static void a_second_order_error_is_found_exactly(void **state) {
    (void)state;
    assert_near(found(-0.02, 2.0), 0.02, 1e-14); /* rounding */
}

static void an_order_above_two_is_taken_as_two(void **state) {
    (void)state;
    const double difference = 0.01 * (1.0 - 1.0 / 16.0);
    assert_near(found(0.01, 4.0), difference / (1.0 - 0.25), 1e-14);
}

static void an_order_below_one_is_taken_as_one(void **state) {
    (void)state;
    const double fine = measured(0.5, 0.01, 0.1);
    const double difference = fabs(measured(1.0, 0.01, 0.1) - fine);
    assert_near(found(0.01, 0.1), 2.0 * difference, 1e-14);
}

static void a_mesh_that_could_not_be_coarser_counts_as_order_one(void **state) {
    (void)state;
    assert_near(lee_richardson_error(1.01, 1.01, 1.005), 0.01, 1e-14);
}

/* Of order 1 the error of the middle mesh is twice its distance to the fine
 * one. */
static void a_coarse_mesh_that_is_dry_counts_as_order_one(void **state) {
    (void)state;
    assert_near(lee_richardson_error(NAN, 1.01, 1.005), 0.01, 1e-14);
}

/* ... and the distance of the coarse one to it. */
static void a_fine_mesh_that_is_dry_counts_as_order_one(void **state) {
    (void)state;
    assert_near(lee_richardson_error(1.03, 1.01, NAN), 0.02, 1e-14);
}

static void
a_place_dry_in_the_run_itself_leaves_the_error_unknown(void **state) {
    (void)state;
    assert_true(isnan(lee_richardson_error(1.0, NAN, 2.0)));
    assert_true(isnan(lee_richardson_error(NAN, 1.0, NAN)));
}

static void equal_numbers_have_no_error(void **state) {
    (void)state;
    assert_near(lee_richardson_error(1.0, 1.0, 1.0), 0.0, 0.0);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_first_order_error_is_found_exactly),
        cmocka_unit_test(a_second_order_error_is_found_exactly),
        cmocka_unit_test(an_order_above_two_is_taken_as_two),
        cmocka_unit_test(an_order_below_one_is_taken_as_one),
        cmocka_unit_test(a_mesh_that_could_not_be_coarser_counts_as_order_one),
        cmocka_unit_test(a_coarse_mesh_that_is_dry_counts_as_order_one),
        cmocka_unit_test(a_fine_mesh_that_is_dry_counts_as_order_one),
        cmocka_unit_test(
            a_place_dry_in_the_run_itself_leaves_the_error_unknown),
        cmocka_unit_test(equal_numbers_have_no_error),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
