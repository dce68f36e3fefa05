/* A steady state that cannot be is refused, in words. */
#include "support/axis.h"

static void assert_refused(const lee_steady_input *in, lee_status status,
                           const char *message) {
    lee_steady s;
    lee_error error = {0};
    assert_int_equal(lee_steady_solve(in, &s, &error), status);
    assert_string_equal(error.message, message);
    assert_int_equal(s.count, 0);
    assert_null(s.x);
}

static void numbers_outside_their_range_are_refused_and_named(void **state) {
    (void)state;
    lee_profile p = axis_canal(20e3, 5.0);
    lee_steady_input in = axis_wind(&p, NAN);
    assert_refused(&in, LEE_ERR_ARGUMENT,
                   "northward stress nan is outside its range");
    in = axis_wind(&p, 0.5);
    in.return_flow = 0.9;
    assert_refused(&in, LEE_ERR_ARGUMENT,
                   "return-flow factor 0.9 is outside its range");
    in = axis_wind(&p, 0.5);
    in.water_density = 0.0;
    assert_refused(&in, LEE_ERR_ARGUMENT,
                   "water density 0 is outside its range");
    in = axis_wind(&p, 0.5);
    in.dry_depth = -0.01;
    assert_refused(&in, LEE_ERR_ARGUMENT,
                   "dry depth -0.01 is outside its range");
    lee_profile_free(&p);
}

static void a_lake_without_water_is_refused(void **state) {
    (void)state;
    lee_profile p = axis_canal(20e3, 5.0);
    lee_steady_input in = axis_wind(&p, 0.5);
    in.still_water = -5.0;
    assert_refused(&in, LEE_ERR_DATA,
                   "no water: still water -5 m is not above the lowest bed, "
                   "-5 m");
    lee_profile_free(&p);
}

static void two_held_ends_are_refused(void **state) {
    (void)state;
    lee_profile p = axis_canal(20e3, 5.0);
    lee_steady_input in = axis_wind(&p, 0.5);
    in.start_level = 0.0;
    in.end_level = 0.0;
    assert_refused(&in, LEE_ERR_ARGUMENT,
                   "one end at most may be held in a steady state");
    lee_profile_free(&p);
}

static void a_level_held_below_the_bed_is_refused(void **state) {
    (void)state;
    lee_profile p = axis_canal(20e3, 5.0);
    lee_steady_input in = axis_wind(&p, 0.5);
    in.end_level = -5.5;
    assert_refused(&in, LEE_ERR_DATA,
                   "the level held at the end, -5.5 m, is not above the bed "
                   "there, -5 m");
    in.end_level = INFINITY;
    assert_refused(&in, LEE_ERR_ARGUMENT,
                   "the level held at the end is not finite");
    lee_profile_free(&p);
}

static void a_faulty_profile_is_refused(void **state) {
    (void)state;
    lee_profile p = axis_canal(20e3, 5.0);
    p.width[1] = -1.0;
    const lee_steady_input in = axis_wind(&p, 0.5);
    assert_refused(&in, LEE_ERR_DATA,
                   "width -1 m in profile row 2 is not positive and finite");
    lee_profile_free(&p);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(numbers_outside_their_range_are_refused_and_named),
        cmocka_unit_test(a_lake_without_water_is_refused),
        cmocka_unit_test(two_held_ends_are_refused),
        cmocka_unit_test(a_level_held_below_the_bed_is_refused),
        cmocka_unit_test(a_faulty_profile_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
