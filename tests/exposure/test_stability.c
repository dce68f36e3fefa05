/* The profile functions of stratified air are those of their papers. */
#include "support/check.h"

#include "leewater/exposure.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

/* psi at z/L, worked to six digits from the functions as published (Paulson
 * 1970 and Dyer 1974; Edson et al. 2013; Fairall et al. 2003). */
static const struct {
    double zeta;
    double dyer_momentum;
    double dyer_heat;
    double coare_35;
    double coare_30;
} worked[] = {
    {-2.0, 1.49469,  2.43118,  1.53235,   1.53235  },
    {-1.0, 1.11623,  1.88123,  1.11049,   1.11049  },
    {-0.5, 0.793359, 1.38629,  0.770783,  0.770783 },
    {-0.1, 0.283614, 0.534284, 0.270064,  0.270064 },
    {0.1,  -0.5,     -0.5,     -0.510934, -0.492246},
    {0.5,  -2.5,     -2.5,     -2.3849,   -2.30933 },
    {1.0,  -5.0,     -5.0,     -4.39257,  -4.28304 },
};

/* Half a unit of the sixth digit. */
static double sixth_digit(double value) {
    return (fabs(value) < 1.0 ? 0.5e-6 : 0.5e-5) + 1e-12;
}

static const lee_stability_functions *set(const char *name) {
    const lee_stability_functions *found = lee_stability_functions_find(name);
    assert_non_null(found);
    return found;
}

static void assert_worked(double actual, double expected) {
    assert_near(actual, expected, sixth_digit(expected));
}

static void businger_and_dyer_are_the_worked_ones(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(worked); i++) {
        const lee_stability_functions *dyer = set("businger-dyer");
        assert_worked(dyer->momentum(worked[i].zeta), worked[i].dyer_momentum);
        assert_worked(dyer->heat(worked[i].zeta), worked[i].dyer_heat);
    }
}

static void coare_is_the_worked_one(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(worked); i++) {
        const double zeta = worked[i].zeta;
        assert_worked(set("coare-3.5")->momentum(zeta), worked[i].coare_35);
        assert_worked(set("coare-3.0")->momentum(zeta), worked[i].coare_30);
    }
}

static void neutral_air_has_no_function(void **state) {
    (void)state;
    const lee_stability_functions *each;
    for (size_t i = 0; (each = lee_stability_functions_at(i)) != NULL; i++) {
        assert_near(each->momentum(0.0), 0.0, 1e-14);
        assert_near(each->heat(0.0), 0.0, 1e-14);
    }
}

/* The older set leaves 2.4e-4 above neutral by its rounded constants. */
static void the_functions_are_continuous_at_neutral(void **state) {
    (void)state;
    const lee_stability_functions *each;
    for (size_t i = 0; (each = lee_stability_functions_at(i)) != NULL; i++) {
        assert_near(each->momentum(-1e-9), each->momentum(1e-9), 2.5e-4);
        assert_near(each->heat(-1e-9), each->heat(1e-9), 1e-7);
    }
}

static void more_stable_air_always_lowers_the_functions(void **state) {
    (void)state;
    const lee_stability_functions *each;
    for (size_t i = 0; (each = lee_stability_functions_at(i)) != NULL; i++) {
        for (double zeta = -5.0; zeta < 5.0; zeta += 0.01) {
            assert_true(each->momentum(zeta + 0.01) < each->momentum(zeta));
            assert_true(each->heat(zeta + 0.01) < each->heat(zeta));
        }
    }
}

/* Slope of psi at neutral: -5.2 by 0.7 + 0.75 (1 + 5), and -5 by Dyer;
 * psi_h of COARE, 1 + 0.667 (1 + 5) = 5.002. The half step is 1e-6. */
static void just_stable_air_follows_the_known_slopes(void **state) {
    (void)state;
    const double step = 1e-6;
    assert_near(set("coare-3.5")->momentum(step) / step, -5.2, 1e-4);
    assert_near(set("coare-3.5")->heat(step) / step, -5.002, 1e-4);
    assert_near(set("businger-dyer")->momentum(step) / step, -5.0, 1e-9);
}

/* psi is the integral of (1 - phi)/zeta with phi = (1 - 16 zeta)^(-1/4) and
 * (1 - 16 zeta)^(-1/2): midpoint rule of 20000 cells, error below 1e-8. */
static void unstable_functions_integrate_their_gradients(void **state) {
    (void)state;
    double momentum = 0.0;
    double heat = 0.0;
    const double width = 1.0 / 20000.0;
    for (int i = 0; i < 20000; i++) {
        const double zeta = -(i + 0.5) * width;
        momentum += (1.0 - pow(1.0 - 16.0 * zeta, -0.25)) / -zeta * width;
        heat += (1.0 - pow(1.0 - 16.0 * zeta, -0.5)) / -zeta * width;
    }
    assert_near(set("businger-dyer")->momentum(-1.0), momentum, 1e-6);
    assert_near(set("businger-dyer")->heat(-1.0), heat, 1e-6);
}

/* At zeta = -1 half of each: phi = (1 - 15 zeta)^(-1/2) near neutral,
 * (1 - 34.15 zeta)^(-1/3) in convection, integrated as above. */
static void unstable_heat_by_coare_blends_two_integrals(void **state) {
    (void)state;
    double neutral_side = 0.0;
    double convective = 0.0;
    const double width = 1.0 / 20000.0;
    for (int i = 0; i < 20000; i++) {
        const double zeta = -(i + 0.5) * width;
        neutral_side += (1.0 - pow(1.0 - 15.0 * zeta, -0.5)) / -zeta * width;
        convective +=
            (1.0 - pow(1.0 - 34.15 * zeta, -1.0 / 3.0)) / -zeta * width;
    }
    assert_near(set("coare-3.5")->heat(-1.0), 0.5 * (neutral_side + convective),
                1e-6);
}

/* Equivalent neutral wind by Businger and Dyer, worked to six digits. */
static const struct {
    double height;
    double length;
    double roughness;
    double expected;
} neutral[] = {
    {5.0, -50.0, 2e-4, 1.09923},
    {5.0, -20.0, 2e-4, 1.12767},
    {5.0, 50.0,  2e-4, 1.01818},
    {5.0, 200.0, 2e-4, 1.05542},
};

static void the_neutral_wind_is_the_worked_one(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(neutral); i++) {
        assert_worked(lee_neutral_ratio(set("businger-dyer"), neutral[i].height,
                                        neutral[i].roughness,
                                        neutral[i].length),
                      neutral[i].expected);
    }
}

static void an_infinite_length_is_the_logarithmic_profile(void **state) {
    (void)state;
    const lee_stability_functions *each;
    for (size_t i = 0; (each = lee_stability_functions_at(i)) != NULL; i++) {
        assert_near_share(lee_neutral_ratio(each, 4.0, 2e-4, INFINITY),
                          lee_log_profile_ratio(4.0, 2e-4), 1e-14);
    }
}

static void a_mast_inside_the_roughness_has_no_neutral_wind(void **state) {
    (void)state;
    assert_true(isnan(lee_neutral_ratio(set("coare-3.5"), 1.0, 1.0, 50.0)));
    assert_true(isnan(lee_neutral_ratio(set("coare-3.5"), NAN, 1e-4, 50.0)));
    assert_true(isnan(lee_neutral_ratio(set("coare-3.5"), 5.0, NAN, 50.0)));
}

static void sets_are_found_by_their_own_names(void **state) {
    (void)state;
    const lee_stability_functions *each;
    for (size_t i = 0; (each = lee_stability_functions_at(i)) != NULL; i++) {
        assert_ptr_equal(lee_stability_functions_find(each->name), each);
    }
    assert_null(lee_stability_functions_find("coare"));
}

/* Fit to SPM (1984) fig. 3-14 (from memory), worked to six digits; K. */
static const struct {
    double difference;
    double ratio;
} amplification[] = {
    {-20.0, 1.21542 },
    {-10.0, 1.16541 },
    {-5.0,  1.12701 },
    {0.0,   1.0     },
    {5.0,   0.872989},
    {10.0,  0.83459 },
    {20.0,  0.784581},
};

static void the_air_water_ratio_is_the_worked_one(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(amplification); i++) {
        assert_worked(lee_air_water_ratio(amplification[i].difference),
                      amplification[i].ratio);
    }
}

static void the_air_water_ratio_mirrors_at_1(void **state) {
    (void)state;
    for (double difference = 0.0; difference <= 25.0; difference += 0.5) {
        assert_near(lee_air_water_ratio(difference) +
                        lee_air_water_ratio(-difference),
                    2.0, 1e-15);
    }
}

static void warmer_air_always_lowers_the_air_water_ratio(void **state) {
    (void)state;
    for (double difference = -20.0; difference < 20.0; difference += 0.1) {
        assert_true(lee_air_water_ratio(difference + 0.1) <
                    lee_air_water_ratio(difference));
    }
}

static void beyond_20_kelvin_the_air_water_ratio_is_held(void **state) {
    (void)state;
    assert_near(lee_air_water_ratio(35.0), lee_air_water_ratio(20.0), 0.0);
    assert_near(lee_air_water_ratio(-35.0), lee_air_water_ratio(-20.0), 0.0);
    assert_true(isnan(lee_air_water_ratio(NAN)));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(businger_and_dyer_are_the_worked_ones),
        cmocka_unit_test(coare_is_the_worked_one),
        cmocka_unit_test(neutral_air_has_no_function),
        cmocka_unit_test(the_functions_are_continuous_at_neutral),
        cmocka_unit_test(more_stable_air_always_lowers_the_functions),
        cmocka_unit_test(just_stable_air_follows_the_known_slopes),
        cmocka_unit_test(unstable_functions_integrate_their_gradients),
        cmocka_unit_test(unstable_heat_by_coare_blends_two_integrals),
        cmocka_unit_test(the_neutral_wind_is_the_worked_one),
        cmocka_unit_test(an_infinite_length_is_the_logarithmic_profile),
        cmocka_unit_test(a_mast_inside_the_roughness_has_no_neutral_wind),
        cmocka_unit_test(sets_are_found_by_their_own_names),
        cmocka_unit_test(the_air_water_ratio_is_the_worked_one),
        cmocka_unit_test(the_air_water_ratio_mirrors_at_1),
        cmocka_unit_test(warmer_air_always_lowers_the_air_water_ratio),
        cmocka_unit_test(beyond_20_kelvin_the_air_water_ratio_is_held),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
