/* Each handbook formula reproduces the worked examples of its sources. */
#include "support/check.h"

#include <string.h>

#include "leewater/setup.h"

static const double foot = 0.3048;
static const double mile = 1609.344;
static const double mph = 0.44704;
static const double kmh = 1.0 / 3.6;
static const double g = 9.81; /* of the worked examples */

static double apply(const char *name, double speed, double fetch,
                    double depth) {
    const lee_formula *formula = lee_formula_find(name);
    assert_non_null(formula);
    return formula->set_up(speed, fetch, depth, g);
}

/* S = U^2 F/(1400 D) worked by hand: 60 mph, 10 mi, 30 ft is 36000/42000. */
static void the_imperial_examples_hold_to_rounding(void **state) {
    (void)state;
    static const double rows[][4] = {
        {60.0,  10.0,  30.0,   36000.0 / 42000.0 },
        {80.0,  25.0,  20.0,   160000.0 / 28000.0},
        {40.0,  5.0,   50.0,   8000.0 / 70000.0  },
        {100.0, 15.0,  12.0,   150000.0 / 16800.0},
        {40.0,  5.0,   20.0,   8000.0 / 28000.0  },
        {26.2,  7.5,   73.0,   0.0503747553816   },
        {74.55, 4.354, 104.96, 0.164677          },
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        const double *r = rows[i];
        const double feet =
            apply("zuiderzee", r[0] * mph, r[1] * mile, r[2] * foot) / foot;
        assert_near_share(feet, r[3], 3e-6);
    }
}

/* Exact conversion: S = 2.063290e-7 U^2 F/D, six decimals. */
static void the_exact_conversion_gives_its_metric_values(void **state) {
    (void)state;
    assert_near(apply("zuiderzee", 25.0, 10000.0, 10.0), 0.128956, 6e-7);
    assert_near(apply("zuiderzee", 30.0, 40000.0, 4.5), 1.650632, 6e-7);
    assert_near(apply("zuiderzee", 20.0, 3000.0, 15.0), 0.016506, 6e-7);
    assert_near(apply("zuiderzee", 60.0 * mph, 10.0 * mile, 30.0 * foot),
                0.261257, 6e-7);
}

/* S = U^2 F/(4.846629e6 D), seven digits of the constant. */
static void the_exact_constant_is_that_of_the_unit_definitions(void **state) {
    (void)state;
    assert_near_share(1.0 / apply("zuiderzee", 1.0, 1.0, 1.0), 4.846629e6,
                      1.1e-7);
}

/* Free-board worksheets after IS 6512:1984 and IS 10635, printed to one and
 * two decimals. */
static void the_indian_worksheets_are_met_as_printed(void **state) {
    (void)state;
    const double full = apply("is-6512", 1.27 * 140.0 * kmh, 11e3, 18.3875);
    assert_near(full, 0.3, 0.05);
    assert_near(full, 0.305029, 6e-7);
    const double highest =
        apply("is-6512", 2.0 / 3.0 * 1.27 * 140.0 * kmh, 11e3, 18.3875);
    assert_near(highest, 0.1, 0.05);
    assert_near(highest, 0.135569, 6e-7);
    const double small = apply("is-6512", 1.10 * 17.33, 426.0, 2.9);
    assert_near(small, 0.01, 0.005);
    assert_near(small, 0.011159, 6e-7);
    assert_near(apply("is-6512", 1.1 * 26.0, 426.0, 2.5), 0.029135, 6e-7);
}

/* EM 1110-2-1420, metric form of equation C-2, six decimals. */
static void the_rounded_metric_form_gives_its_values(void **state) {
    (void)state;
    assert_near(apply("is-6512", 60.0 * kmh, 10e3, 5.0), 0.116129, 6e-7);
    assert_near(apply("is-6512", 80.0 * kmh, 20e3, 8.0), 0.258065, 6e-7);
}

/* One free-board sheet works both forms: 120 km/h, 7.0094 km, 32 m. */
static void the_two_forms_of_one_sheet_agree_within_its_rounding(void **state) {
    (void)state;
    const double metric = apply("zuiderzee-63000", 120.0 * kmh, 7009.4, 32.0);
    assert_near(metric, 0.050067, 6e-7);
    const double imperial =
        apply("zuiderzee", 74.55 * mph, 4.354 * mile, 104.96 * foot);
    assert_near(imperial, 0.050193, 6e-7);
    assert_near_share(metric, imperial, 0.003);
}

/* Course assignment: F = 225 km sin 44, U = 22 sin 44 m/s, d = 42 m; 0.155046,
 * which the note prints as 0.154 (a truncation, and not quite one). */
static void the_assignment_is_met_within_its_truncation(void **state) {
    (void)state;
    const double sine = sin(44.0 / 180.0 * 3.14159265358979323846);
    const double rise = apply("triatmodjo", 22.0 * sine, 225e3 * sine, 42.0);
    assert_near(rise, 0.155046, 6e-7);
    assert_near(rise, 0.154, 0.0011);
}

/* Implicit equation, inputs of three published cases, angle 0; six decimals,
 * the table of k_w from memory. */
static void the_implicit_formula_gives_its_values(void **state) {
    (void)state;
    assert_near(apply("snip-148", 20.0, 1900.0, 3.8), 0.042575, 6e-7);
    assert_near(apply("snip-148", 25.3, 2560.0, 11.5), 0.037370, 6e-7);
    assert_near(apply("snip-148", 20.1, 2590.0, 12.1), 0.018577, 6e-7);
}

static void the_implicit_formula_satisfies_its_equation(void **state) {
    (void)state;
    const double rise = apply("snip-148", 40.0, 30e3, 2.0);
    assert_near_share(rise, 3.9e-6 * 1600.0 * 30e3 / (g * (2.0 + 0.5 * rise)),
                      1e-13);
}

static void the_implicit_formula_holds_its_table_at_the_ends(void **state) {
    (void)state;
    /* so deep that dh = k_w U^2 L/(g d) to dh/2d < 1e-8 */
    assert_near_share(apply("snip-148", 10.0, 1e3, 1e4),
                      2.1e-6 * 100.0 * 1e3 / (g * 1e4), 1e-8);
    assert_near_share(apply("snip-148", 60.0, 1e3, 1e4),
                      4.8e-6 * 3600.0 * 1e3 / (g * 1e4), 1e-8);
}

/* kappa in S = kappa U^2 F/(g D), from the constants of the sources. */
static void each_constant_is_the_one_its_source_gives(void **state) {
    (void)state;
    static const struct {
        const char *name;
        double kappa;
        double rounding;
    } rows[] = {
        {"zuiderzee",       2.024e-6, 5e-10},
        {"is-6512",         2.051e-6, 5e-10},
        {"zuiderzee-63000", 2.018e-6, 5e-10},
        {"dvwk-246",        2.018e-6, 5e-10},
        {"novak",           2.0e-6,   1e-12},
        {"sl-274",          1.80e-6,  1e-12},
        {"triatmodjo",      1.75e-6,  1e-12},
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        const double set_up = apply(rows[i].name, 20.0, 1e4, 8.0);
        assert_near(set_up * g * 8.0 / (400.0 * 1e4), rows[i].kappa,
                    rows[i].rounding);
    }
}

/* As a whole tilt kappa stands for rho_air C10 lambda/rho: C10 between 1.4 and
 * 2.5e-3 with air of 1.225 kg m-3; as a rise, half a tilt, it would need
 * twice that. */
static void
each_formula_matches_a_whole_tilt_at_twenty_metres_a_second(void **state) {
    (void)state;
    const lee_formula *formula;
    for (size_t i = 0; (formula = lee_formula_at(i)) != NULL; i++) {
        const double set_up = formula->set_up(20.0, 1e4, 50.0, g);
        const double c10 = set_up * g * 50.0 / (400.0 * 1e4) / 1.225e-3;
        assert_true(c10 > 1.4e-3 && c10 < 2.5e-3);
        assert_int_equal(formula->matches, LEE_RESULT_TILT);
        assert_int_equal(formula->says, LEE_RESULT_RISE);
    }
}

static void each_formula_can_be_found_by_its_own_name(void **state) {
    (void)state;
    const lee_formula *formula;
    for (size_t i = 0; (formula = lee_formula_at(i)) != NULL; i++) {
        assert_ptr_equal(lee_formula_find(formula->name), formula);
    }
    assert_null(lee_formula_find("none"));
}

static void each_formula_passes_missing_numbers_on(void **state) {
    (void)state;
    const lee_formula *formula;
    for (size_t i = 0; (formula = lee_formula_at(i)) != NULL; i++) {
        assert_true(isnan(formula->set_up(NAN, 1e4, 5.0, g)));
        assert_true(isnan(formula->set_up(20.0, NAN, 5.0, g)));
        assert_true(isnan(formula->set_up(20.0, 1e4, NAN, g)));
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_imperial_examples_hold_to_rounding),
        cmocka_unit_test(the_exact_conversion_gives_its_metric_values),
        cmocka_unit_test(the_exact_constant_is_that_of_the_unit_definitions),
        cmocka_unit_test(the_indian_worksheets_are_met_as_printed),
        cmocka_unit_test(the_rounded_metric_form_gives_its_values),
        cmocka_unit_test(the_two_forms_of_one_sheet_agree_within_its_rounding),
        cmocka_unit_test(the_assignment_is_met_within_its_truncation),
        cmocka_unit_test(the_implicit_formula_gives_its_values),
        cmocka_unit_test(the_implicit_formula_satisfies_its_equation),
        cmocka_unit_test(the_implicit_formula_holds_its_table_at_the_ends),
        cmocka_unit_test(each_constant_is_the_one_its_source_gives),
        cmocka_unit_test(
            each_formula_matches_a_whole_tilt_at_twenty_metres_a_second),
        cmocka_unit_test(each_formula_can_be_found_by_its_own_name),
        cmocka_unit_test(each_formula_passes_missing_numbers_on),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
