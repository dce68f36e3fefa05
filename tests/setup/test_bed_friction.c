/* Bed laws give their textbook values; the return flow follows from them. */
#include "support/check.h"

#include "leewater/setup.h"

static const double gravity = 9.81; /* of the tabulated values, m s-2 */

/* Values computed from the textbook identities, six digits; the tolerance is
 * half a unit of the last. Roughness z0 = ks/30. */
static const struct {
    lee_bed_kind kind;
    double value;
    double depth;
    double expected;
    double rounding;
} tabulated[] = {
    {LEE_BED_MANNING,   0.015,       1.0,  0.00220725, 5e-9},
    {LEE_BED_MANNING,   0.015,       2.0,  0.0017519,  5e-8},
    {LEE_BED_MANNING,   0.015,       5.0,  0.00129081, 5e-9},
    {LEE_BED_MANNING,   0.015,       10.0, 0.00102451, 5e-9},
    {LEE_BED_MANNING,   0.020,       1.0,  0.003924,   5e-9},
    {LEE_BED_MANNING,   0.020,       2.0,  0.00311448, 5e-9},
    {LEE_BED_MANNING,   0.020,       5.0,  0.00229477, 5e-9},
    {LEE_BED_MANNING,   0.020,       10.0, 0.00182136, 5e-9},
    {LEE_BED_MANNING,   0.025,       1.0,  0.00613125, 5e-9},
    {LEE_BED_MANNING,   0.025,       2.0,  0.00486638, 5e-9},
    {LEE_BED_MANNING,   0.025,       5.0,  0.00358558, 5e-9},
    {LEE_BED_MANNING,   0.025,       10.0, 0.00284587, 5e-9},
    {LEE_BED_MANNING,   0.030,       1.0,  0.008829,   5e-9},
    {LEE_BED_MANNING,   0.030,       2.0,  0.00700758, 5e-9},
    {LEE_BED_MANNING,   0.030,       5.0,  0.00516323, 5e-9},
    {LEE_BED_MANNING,   0.030,       10.0, 0.00409806, 5e-9},
    {LEE_BED_MANNING,   0.035,       1.0,  0.0120173,  5e-8},
    {LEE_BED_MANNING,   0.035,       2.0,  0.0095381,  5e-8},
    {LEE_BED_MANNING,   0.035,       5.0,  0.00702773, 5e-9},
    {LEE_BED_MANNING,   0.035,       10.0, 0.00557791, 5e-9},
    {LEE_BED_CHEZY,     40.0,        3.0,  0.00613125, 5e-9},
    {LEE_BED_CHEZY,     50.0,        3.0,  0.003924,   5e-9},
    {LEE_BED_CHEZY,     60.0,        3.0,  0.002725,   5e-9},
    {LEE_BED_CHEZY,     65.0,        3.0,  0.00232189, 5e-9},
    {LEE_BED_ROUGHNESS, 0.001 / 30., 2.0,  0.00159933, 5e-9},
    {LEE_BED_ROUGHNESS, 0.001 / 30., 5.0,  0.00134216, 5e-9},
    {LEE_BED_ROUGHNESS, 0.001 / 30., 10.0, 0.0011867,  5e-8},
    {LEE_BED_ROUGHNESS, 0.01 / 30.,  2.0,  0.00269894, 5e-9},
    {LEE_BED_ROUGHNESS, 0.01 / 30.,  5.0,  0.0021554,  5e-8},
    {LEE_BED_ROUGHNESS, 0.03 / 30.,  2.0,  0.00367209, 5e-9},
    {LEE_BED_ROUGHNESS, 0.03 / 30.,  5.0,  0.00283145, 5e-9},
    {LEE_BED_ROUGHNESS, 0.1 / 30.,   5.0,  0.00401438, 5e-9},
    {LEE_BED_DRAG,      0.0025,      5.0,  0.0025,     0.0 },
    {LEE_BED_LINEAR,    1e-4,        5.0,  0.0,        0.0 },
    {LEE_BED_NONE,      0.0,         5.0,  0.0,        0.0 },
};

static void each_law_gives_its_tabulated_coefficient(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof tabulated / sizeof tabulated[0]; i++) {
        const lee_bed_law law = {tabulated[i].kind, tabulated[i].value};
        assert_near(lee_bed_coefficient(&law, tabulated[i].depth, gravity),
                    tabulated[i].expected, tabulated[i].rounding);
    }
}

/* Manning's n and Chezy's C = H^(1/6)/n are one law: C = 44.8985 m^0.5/s for
 * n = 0.025 in 2 m (textbook identity). */
static void manning_and_chezy_agree_where_they_meet(void **state) {
    (void)state;
    const lee_bed_law manning = {LEE_BED_MANNING, 0.025};
    const lee_bed_law chezy = {LEE_BED_CHEZY, 44.8985};
    assert_near_share(lee_bed_coefficient(&chezy, 2.0, gravity),
                      lee_bed_coefficient(&manning, 2.0, gravity), 3e-6);
}

static void the_log_law_is_held_in_very_thin_water(void **state) {
    (void)state;
    const lee_bed_law law = {LEE_BED_ROUGHNESS, 0.01};
    const double held = lee_bed_coefficient(&law, 0.1, gravity);
    /* [0.40/(ln 10 - 1)]^2 */
    assert_near(held, 0.0942991, 5e-7);
    assert_near(lee_bed_coefficient(&law, 0.02, gravity), held, 0.0);
    assert_near(lee_bed_coefficient(&law, 0.0, gravity), held, 0.0);
}

/* Parabolic eddy viscosity without slip at z0: 1 + 1/(ln(h/z0) - 1), derived;
 * h/z0 = 1e3, 1e4, 1e5. */
static void the_computed_factor_is_that_of_parabolic_viscosity(void **state) {
    (void)state;
    const lee_return_flow rule = {.is_computed = true};
    const lee_bed_law law = {LEE_BED_ROUGHNESS, 1e-3};
    assert_near(lee_return_flow_factor(&rule, &law, 1.0, gravity, false),
                1.16927, 5e-6);
    assert_near(lee_return_flow_factor(&rule, &law, 10.0, gravity, false),
                1.12180, 5e-6);
    assert_near(lee_return_flow_factor(&rule, &law, 100.0, gravity, false),
                1.09512, 5e-6);
}

static void a_very_rough_bed_stops_at_the_laminar_bound(void **state) {
    (void)state;
    const lee_return_flow rule = {.is_computed = true};
    const lee_bed_law law = {LEE_BED_DRAG, 0.09};
    assert_near(lee_return_flow_factor(&rule, &law, 5.0, gravity, false), 1.5,
                0.0);
}

static void a_bed_without_quadratic_drag_adds_nothing(void **state) {
    (void)state;
    const lee_return_flow rule = {.is_computed = true};
    const lee_bed_law linear = {LEE_BED_LINEAR, 1e-4};
    const lee_bed_law none = {LEE_BED_NONE, 0.0};
    assert_near(lee_return_flow_factor(&rule, &linear, 5.0, gravity, false),
                1.0, 0.0);
    assert_near(lee_return_flow_factor(&rule, &none, 5.0, gravity, false), 1.0,
                0.0);
}

static void a_given_factor_is_kept_unless_forced_to_one(void **state) {
    (void)state;
    const lee_return_flow rule = {.value = 1.2};
    const lee_bed_law law = {LEE_BED_MANNING, 0.025};
    assert_near(lee_return_flow_factor(&rule, &law, 5.0, gravity, false), 1.2,
                0.0);
    assert_near(lee_return_flow_factor(&rule, &law, 5.0, gravity, true), 1.0,
                0.0);
}

static void an_unknown_depth_gives_an_unknown_factor(void **state) {
    (void)state;
    const lee_return_flow rule = {.is_computed = true};
    const lee_bed_law rough = {LEE_BED_ROUGHNESS, 1e-3};
    const lee_bed_law manning = {LEE_BED_MANNING, 0.025};
    assert_true(
        isnan(lee_return_flow_factor(&rule, &rough, NAN, gravity, false)));
    assert_true(
        isnan(lee_return_flow_factor(&rule, &manning, NAN, gravity, false)));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(each_law_gives_its_tabulated_coefficient),
        cmocka_unit_test(manning_and_chezy_agree_where_they_meet),
        cmocka_unit_test(the_log_law_is_held_in_very_thin_water),
        cmocka_unit_test(the_computed_factor_is_that_of_parabolic_viscosity),
        cmocka_unit_test(a_very_rough_bed_stops_at_the_laminar_bound),
        cmocka_unit_test(a_bed_without_quadratic_drag_adds_nothing),
        cmocka_unit_test(a_given_factor_is_kept_unless_forced_to_one),
        cmocka_unit_test(an_unknown_depth_gives_an_unknown_factor),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
