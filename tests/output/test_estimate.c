/* The answer of estimate names both shores, judges the duration and sets the
 * handbook formulas beside it. */
#include "support/captured.h"
#include "support/results.h"

#include <jansson.h>

/* The hand-made wind on an even lake of 10 km and 10 m depth, 25 m/s. */
static void make_question(hand_made *made) {
    make(made);
    for (size_t i = 0; i < 2; i++) {
        made->chainage[i] = 10000.0 * (double)i;
        made->bed[i] = -10.0;
    }
    made->from = (lee_case){0};
    made->from.problem.lake.profile =
        (lee_profile){2, made->chainage, made->bed, made->width, made->bearing};
    made->from.problem.exposure.height = 10.0;
    made->wind[0].wind = (lee_given_wind){25.0, degrees(270.0), (double)NAN};
    made->wind[0].speed = 25.0;
    made->wind[0].along = 1.0;
    made->steady.still_water = 0.0;
    made->steady.station_count = 0;
}

static const char *printed(captured *out, const hand_made *made,
                           lee_unit_system units) {
    capture_begin(out);
    assert_int_equal(lee_print_estimate(out->stream, &made->from, &made->steady,
                                        units, NULL),
                     LEE_OK);
    return capture_end(out);
}

static void the_question_is_repeated_with_its_units(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make_question(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "fetch             10.00 km\n");
    assert_contains(text, "depth             10 m\n");
    assert_contains(text, "25.0 m/s, measured at 10 m over water\n");
    capture_free(&out);
}

static void both_shores_and_the_tilt_have_ranges(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make_question(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "0.412 m (0.310 to 0.550) at the lee shore\n");
    assert_contains(text, "-0.430 m (-0.600 to -0.320) at the windward "
                          "shore\n");
    assert_contains(text, "0.842 m (0.630 to 1.150) from shore to shore\n");
    capture_free(&out);
}

/* The exact SI form of U2 F/(1400 D): 2.063290e-7 * 625 * 1e4/10 is
 * 0.128956 m. Its source calls a rise what equals a tilt. */
static void the_zuiderzee_formula_stands_beside_the_answer(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make_question(&made);
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "  zuiderzee              0.129   rise       tilt\n");
    capture_free(&out);
}

/* First period 3720 s, half of it 1860 s. */
static void a_duration_is_judged_by_the_first_period(void **state) {
    (void)state;
    const struct {
        double duration;
        const char *verdict;
    } judged[] = {
        {1800.0, "duration          30 min: shorter than half the first "},
        {1860.0, "duration          31 min: enough to reach these levels"},
        {3720.0, "duration          1 h 2 min: long enough;"             },
    };
    for (size_t i = 0; i < sizeof judged / sizeof judged[0]; i++) {
        hand_made made;
        captured out;
        make_question(&made);
        made.wind[0].wind.duration = judged[i].duration;
        assert_contains(printed(&out, &made, LEE_UNITS_SI), judged[i].verdict);
        capture_free(&out);
    }
}

static void without_a_duration_none_is_judged(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make_question(&made);
    assert_lacks(printed(&out, &made, LEE_UNITS_SI), "duration");
    capture_free(&out);
}

static void without_water_no_duration_can_be_judged(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make_question(&made);
    const double none = (double)NAN;
    made.wind[0].wind.duration = 3600.0;
    made.wind[0].water_count = 0;
    made.wind[0].set_up = (lee_ranged){none, none, none};
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    assert_contains(text, "set-up            dry at the lee shore\n");
    assert_contains(text, "duration          1 h: cannot be judged");
    capture_free(&out);
}

/* Hand-made: lambda tau/(rho g) over 10 km and 10 m, closed forms of the
 * library itself; that they stand in their rows is what is said here. */
static void closed_forms_stand_below_the_formulas(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make_question(&made);
    made.wind[0].return_flow = 1.0;
    made.wind[0].stress = 1.0;
    made.steady.method.water_density_value = 1000.0;
    made.steady.method.gravity = 9.81;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    /* a = 1/9810 m: open, 10 m (sqrt(1 + 2 a 1e4/100) - 1) = 0.101421 m */
    assert_contains(text, "  open-even-depth        0.101   rise       rise\n");
    assert_contains(text, "  closed-even-depth      0.051   rise       rise\n");
    capture_free(&out);
}

static void a_wind_aslant_has_its_cosine_once(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make_question(&made);
    made.wind[0].along = -0.5;
    const char *text = printed(&out, &made, LEE_UNITS_SI);
    /* half of 0.128956 m */
    assert_contains(text, "  zuiderzee              0.064   rise       tilt\n");
    capture_free(&out);
}

static void json_carries_the_question_and_the_formulas(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make_question(&made);
    capture_begin(&out);
    assert_int_equal(
        lee_json_estimate(out.stream, &made.from, &made.steady, NULL), LEE_OK);
    json_t *root = json_loads(capture_end(&out), JSON_REJECT_DUPLICATES, NULL);
    capture_free(&out);
    assert_non_null(root);
    assert_near(json_number_value(json_object_get(root, "fetch_m")), 1e4, 0.0);
    assert_near(json_number_value(json_object_get(root, "depth_m")), 10.0, 0.0);
    assert_int_equal(json_array_size(json_object_get(root, "winds")), 1);
    const json_t *wind = json_array_get(json_object_get(root, "winds"), 0);
    const json_t *formula =
        json_array_get(json_object_get(wind, "formulas"), 0);
    assert_string_equal(json_string_value(json_object_get(formula, "name")),
                        "zuiderzee");
    /* Half a unit of the last digit of 0.128956. */
    assert_near(json_number_value(json_object_get(formula, "result_m")),
                0.128956, 5e-7);
    assert_string_equal(json_string_value(json_object_get(formula, "equals")),
                        "tilt");
    json_decref(root);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_question_is_repeated_with_its_units),
        cmocka_unit_test(both_shores_and_the_tilt_have_ranges),
        cmocka_unit_test(the_zuiderzee_formula_stands_beside_the_answer),
        cmocka_unit_test(a_duration_is_judged_by_the_first_period),
        cmocka_unit_test(without_a_duration_none_is_judged),
        cmocka_unit_test(without_water_no_duration_can_be_judged),
        cmocka_unit_test(closed_forms_stand_below_the_formulas),
        cmocka_unit_test(a_wind_aslant_has_its_cosine_once),
        cmocka_unit_test(json_carries_the_question_and_the_formulas),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
