/* Relations without a formula for C10 give what their roughness asks for. */
#include "support/check.h"

#include "leewater/stress.h"
#include "stress/roughness.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

/* Half a unit of the sixth significant digit, and a few roundings. */
static double sixth_digit(double expected) {
    return 0.5 * pow(10.0, floor(log10(expected)) - 5.0) + 1e-12;
}

/* Air of 1.5e-5 m2 s-1 unless said otherwise. */
static const double viscosity = 1.5e-5;

/* The same at 15 degC by Andreas (1989), as his polynomial gives it. */
static const double viscosity_at_15 = 1.45858e-5;

static lee_drag_input wind(double speed, double air_viscosity) {
    return (lee_drag_input){speed, 1.225, 1000.0, 9.81, air_viscosity};
}

static double coefficient(const char *name, double speed,
                          double air_viscosity) {
    const lee_drag_relation *relation = lee_drag_find(name);
    const lee_drag_input in = wind(speed, air_viscosity);
    assert_non_null(relation);
    return relation->coefficient(&in);
}

/* Solved by halving from the printed equations, g = 9.81 m s-2 and kappa =
 * 0.40 (Garratt: 0.41), outside of this program, to six digits. */
static const struct {
    const char *name;
    double speed;    /* m s-1    */
    double expected; /* 1000 C10 */
} worked[] = {
    {"charnock-rough-1955",  5.0,  0.990938},
    {"charnock-rough-1955",  10.0, 1.31295 },
    {"charnock-rough-1955",  15.0, 1.58788 },
    {"charnock-rough-1955",  20.0, 1.84488 },
    {"charnock-rough-1955",  30.0, 2.34369 },
    {"charnock-smooth-1955", 2.0,  0.99462 },
    {"charnock-smooth-1955", 5.0,  1.04449 },
    {"charnock-smooth-1955", 10.0, 1.32104 },
    {"charnock-smooth-1955", 20.0, 1.84595 },
    {"garratt-rough-1977",   5.0,  1.08777 },
    {"garratt-rough-1977",   10.0, 1.45318 },
    {"garratt-rough-1977",   15.0, 1.76916 },
    {"garratt-rough-1977",   20.0, 2.0678  },
    {"garratt-smooth-1977",  2.0,  1.04819 },
    {"garratt-smooth-1977",  5.0,  1.13338 },
    {"garratt-smooth-1977",  10.0, 1.45983 },
    {"garratt-smooth-1977",  20.0, 2.06868 },
    {"smith-rough-1980",     5.0,  1.07079 },
    {"smith-rough-1980",     10.0, 1.43987 },
    {"smith-rough-1980",     15.0, 1.7623  },
    {"smith-rough-1980",     20.0, 2.06977 },
    {"smith-rough-1980",     30.0, 2.68352 },
    {"smith-smooth-1980",    2.0,  1.00625 },
    {"smith-smooth-1980",    5.0,  1.10913 },
    {"smith-smooth-1980",    10.0, 1.44536 },
    {"smith-smooth-1980",    20.0, 2.0705  },
    {"wu-rough-1980",        5.0,  1.07655 },
    {"wu-rough-1980",        10.0, 1.44916 },
    {"wu-rough-1980",        15.0, 1.7752  },
    {"wu-rough-1980",        20.0, 2.08658 },
    {"wu-rough-1980",        30.0, 2.70943 },
    {"wu-smooth-1980",       2.0,  1.00721 },
    {"wu-smooth-1980",       5.0,  1.114   },
    {"wu-smooth-1980",       10.0, 1.4545  },
    {"wu-smooth-1980",       20.0, 2.08729 },
    {"smith-rough-1988",     5.0,  0.975037},
    {"smith-rough-1988",     10.0, 1.28806 },
    {"smith-rough-1988",     15.0, 1.5541  },
    {"smith-rough-1988",     20.0, 1.80181 },
    {"smith-rough-1988",     30.0, 2.28003 },
    {"smith-smooth-1988",    2.0,  0.992647},
    {"smith-smooth-1988",    5.0,  1.03238 },
    {"smith-smooth-1988",    10.0, 1.29685 },
    {"smith-smooth-1988",    20.0, 1.80298 },
    {"zeng-rough-1998",      5.0,  1.00593 },
    {"zeng-rough-1998",      10.0, 1.33654 },
    {"zeng-rough-1998",      15.0, 1.62002 },
    {"zeng-rough-1998",      20.0, 1.886   },
    {"zeng-rough-1998",      30.0, 2.4049  },
    {"zeng-smooth-1998",     2.0,  0.996583},
    {"zeng-smooth-1998",     5.0,  1.05616 },
    {"zeng-smooth-1998",     10.0, 1.34404 },
    {"zeng-smooth-1998",     20.0, 1.88699 },
};

static void each_relation_gives_what_its_roughness_gives(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(worked); i++) {
        assert_near(1e3 *
                        coefficient(worked[i].name, worked[i].speed, viscosity),
                    worked[i].expected, sixth_digit(worked[i].expected));
    }
}

/* COARE, worked in the same way with the viscosity at 15 degC. */
static const struct {
    const char *name;
    double speed;
    double expected; /* 1000 C10 */
} coare[] = {
    {"fairall-2003", 2.0,  0.989078},
    {"fairall-2003", 5.0,  1.03105 },
    {"fairall-2003", 8.0,  1.1877  },
    {"fairall-2003", 10.0, 1.29661 },
    {"fairall-2003", 15.0, 1.69285 },
    {"fairall-2003", 20.0, 2.07048 },
    {"fairall-2003", 25.0, 2.37495 },
    {"edson-2013",   2.0,  0.966347},
    {"edson-2013",   5.0,  0.920369},
    {"edson-2013",   8.0,  1.13459 },
    {"edson-2013",   10.0, 1.32082 },
    {"edson-2013",   15.0, 1.82639 },
    {"edson-2013",   19.0, 2.27735 },
    {"edson-2013",   20.0, 2.35246 },
    {"edson-2013",   25.0, 2.73318 },
};

static void each_coare_version_gives_its_own_coefficient(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(coare); i++) {
        /* The viscosity has six digits; C10 feels a tenth of its error. */
        assert_near(
            1e3 * coefficient(coare[i].name, coare[i].speed, viscosity_at_15),
            coare[i].expected, sixth_digit(coare[i].expected) + 1e-6);
    }
}

/* The alpha that a coefficient goes with: z0 - 0.11 nu/u* in units of
 * u*^2/g. */
static double alpha_behind(const char *name, double speed) {
    const double c10 = coefficient(name, speed, viscosity);
    const double friction = speed * sqrt(c10);
    const double z0 = 10.0 * exp(-0.40 / sqrt(c10));
    return (z0 - 0.11 * viscosity / friction) * 9.81 / (friction * friction);
}

/* Fairall et al. (2003): 0.011 to 10 m s-1, 0.018 from 18 m s-1. Edson et al.
 * (2013) with the corrigendum of 2014: 0.0017 U - 0.005, held above 19 m s-1;
 * below 2.94 m s-1 held at 0. */
static const struct {
    const char *name;
    double speed;
    double alpha;
} printed_alpha[] = {
    {"fairall-2003", 5.0,     0.011  },
    {"fairall-2003", 10.0,    0.011  },
    {"fairall-2003", 12.0,    0.01275},
    {"fairall-2003", 14.0,    0.0145 },
    {"fairall-2003", 18.0,    0.018  },
    {"fairall-2003", 25.0,    0.018  },
    {"edson-2013",   0.5,     0.0    },
    {"edson-2013",   2.94118, 0.0    },
    {"edson-2013",   5.0,     0.0035 },
    {"edson-2013",   10.0,    0.012  },
    {"edson-2013",   15.0,    0.0205 },
    {"edson-2013",   19.0,    0.0273 },
    {"edson-2013",   25.0,    0.0273 },
};

static void each_coare_version_has_its_own_alpha(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(printed_alpha); i++) {
        /* 2.94118 is rounded: 1e-6 m s-1 of slope 0.0017 s m-1; and alpha
         * comes out of z0 with 1e-9 of it, a small difference in light wind. */
        assert_near(alpha_behind(printed_alpha[i].name, printed_alpha[i].speed),
                    printed_alpha[i].alpha, 2e-8);
    }
}

/* Law of light wind up to the crossing, worked: 0.0044 U^-1.15; of strong
 * wind beyond it, solved by halving. */
static const struct {
    double speed;
    double expected; /* 1000 C10 */
} lakes[] = {
    {0.5,  9.76421 },
    {1.0,  4.4     },
    {2.0,  1.98275 },
    {3.0,  1.24384 },
    {3.85, 0.933626},
    {5.0,  0.973211},
    {8.0,  1.1691  },
    {10.0, 1.28521 },
    {15.0, 1.55024 },
    {20.0, 1.7969  },
};

static void the_lake_law_has_its_two_branches(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(lakes); i++) {
        assert_near(
            1e3 * coefficient("wuest-lorke-2003", lakes[i].speed, viscosity),
            lakes[i].expected, sixth_digit(lakes[i].expected));
    }
}

/* C10 = [ln(10 g/(C10 U^2))/kappa + 11.3]^-2, put back into itself. */
static void the_strong_lake_law_satisfies_its_equation(void **state) {
    (void)state;
    for (double u = 4.0; u <= 40.0; u += 0.5) {
        const double c10 = coefficient("wuest-lorke-2003", u, viscosity);
        const double root = log(10.0 * 9.81 / (c10 * u * u)) / 0.40 + 11.3;
        assert_near_share(c10 * root * root, 1.0, 1e-8);
    }
}

/* The branches meet at 3.98684 m s-1, where C10 is least. */
static void the_lake_law_is_least_where_its_branches_meet(void **state) {
    (void)state;
    const double crossing = 3.98684;
    const double least = coefficient("wuest-lorke-2003", crossing, viscosity);
    for (double u = 0.1; u <= 30.0; u += 0.01) {
        /* 1e-5 m s-1 of the steeper slope, 2.6e-4 s m-1. */
        assert_true(coefficient("wuest-lorke-2003", u, viscosity) >=
                    least - 3e-9);
    }
    assert_near_share(least, 0.0044 * pow(crossing, -1.15), 5e-6);
}

/* Charnock (1955) in the form of Smith (1988), solved by halving: alpha,
 * kappa, smooth flow or not, speed; 1000 C10. The first rows are the published
 * alpha with the common kappa, among them Garratt's. */
static const struct {
    lee_roughness roughness;
    double speed;
    double expected;
} surfaces[] = {
    {{0.0144, 0.40, false}, 5.0,  1.02563 },
    {{0.0144, 0.40, false}, 10.0, 1.36769 },
    {{0.0144, 0.40, false}, 15.0, 1.66266 },
    {{0.0144, 0.40, false}, 20.0, 1.94078 },
    {{0.0144, 0.40, false}, 30.0, 2.48707 },
    {{0.0144, 0.41, false}, 5.0,  1.08777 },
    {{0.0144, 0.41, false}, 20.0, 2.0678  },
    {{0.0144, 0.40, true},  2.0,  0.999315},
    {{0.0144, 0.40, true},  5.0,  1.07184 },
    {{0.0144, 0.40, true},  10.0, 1.37449 },
    {{0.0144, 0.40, true},  20.0, 1.94168 },
};

static void a_rough_surface_has_the_worked_coefficient(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(surfaces); i++) {
        const lee_drag_input in = wind(surfaces[i].speed, viscosity);
        assert_near(1e3 *
                        lee_roughness_coefficient(&surfaces[i].roughness, &in),
                    surfaces[i].expected, sixth_digit(surfaces[i].expected));
    }
}

/* Friction velocity (m s-1) and roughness length (m) with smooth flow. */
static const struct {
    double alpha;
    double speed;
    double friction;
    double length;
} lengths[] = {
    {0.011,  2.0,  0.0630126, 3.06375e-5},
    {0.011,  5.0,  0.160654,  3.92110e-5},
    {0.011,  10.0, 0.360118,  1.49998e-4},
    {0.011,  20.0, 0.849230,  8.10619e-4},
    {0.0144, 2.0,  0.0632239, 3.19653e-5},
    {0.0144, 5.0,  0.163695,  4.94132e-5},
    {0.0144, 10.0, 0.370741,  2.06211e-4},
    {0.0144, 20.0, 0.881289,  1.14194e-3},
    {0.0185, 2.0,  0.0634730, 3.35930e-5},
    {0.0185, 5.0,  0.166884,  6.24077e-5},
    {0.0185, 10.0, 0.381379,  2.78621e-4},
    {0.0185, 20.0, 0.913738,  1.57632e-3},
};

static void friction_and_roughness_are_the_worked_ones(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(lengths); i++) {
        const lee_roughness surface = {lengths[i].alpha, 0.40, true};
        const lee_drag_input in = wind(lengths[i].speed, viscosity);
        const double c10 = lee_roughness_coefficient(&surface, &in);
        assert_near(in.speed * sqrt(c10), lengths[i].friction,
                    sixth_digit(lengths[i].friction));
        assert_near(10.0 * exp(-0.40 / sqrt(c10)), lengths[i].length,
                    sixth_digit(lengths[i].length));
    }
}

/* U^2/g is the only length that roughness without smooth flow has beside the
 * 10 m: gravity four times as large and wind twice as fast change nothing. */
static void without_smooth_flow_the_froude_number_decides(void **state) {
    (void)state;
    const lee_roughness surface = {0.0144, 0.40, false};
    for (double u = 1.0; u <= 30.0; u += 0.5) {
        const lee_drag_input slow = wind(u, viscosity);
        lee_drag_input fast = wind(2.0 * u, viscosity);
        fast.gravity *= 4.0;
        assert_near_share(lee_roughness_coefficient(&surface, &fast),
                          lee_roughness_coefficient(&surface, &slow), 1e-9);
    }
}

/* Where ln(10/z0) = 2 the wind of alpha 0.0185 is greatest, 133.9 m s-1; C10
 * is (kappa/2)^2 there and beyond. */
static void beyond_the_fastest_wind_the_coefficient_is_held(void **state) {
    (void)state;
    const lee_roughness surface = {0.0185, 0.40, false};
    const double friction = sqrt(10.0 * exp(-2.0) * 9.81 / 0.0185);
    const double fastest = friction / 0.40 * 2.0;
    const double factor[] = {1.0 + 1e-9, 1.1, 10.0};
    for (size_t i = 0; i < COUNT(factor); i++) {
        const lee_drag_input in = wind(factor[i] * fastest, viscosity);
        assert_near_share(lee_roughness_coefficient(&surface, &in), 0.04,
                          1e-12);
    }
    const lee_drag_input below = wind(0.99 * fastest, viscosity);
    assert_true(lee_roughness_coefficient(&surface, &below) < 0.04);
}

static void a_roughness_that_misses_something_has_no_coefficient(void **state) {
    (void)state;
    const lee_roughness surface = {0.0144, 0.40, true};
    const lee_drag_input bad[] = {
        {NAN,  1.2, 1000.0, 9.81,  1.5e-5 },
        {-1.0, 1.2, 1000.0, 9.81,  1.5e-5 },
        {0.0,  1.2, 1000.0, 9.81,  1.5e-5 },
        {5.0,  1.2, 1000.0, 0.0,   1.5e-5 },
        {5.0,  1.2, 1000.0, NAN,   1.5e-5 },
        {5.0,  1.2, 1000.0, -9.81, 1.5e-5 },
        {5.0,  1.2, 1000.0, 9.81,  -1.5e-5},
        {5.0,  1.2, 1000.0, 9.81,  NAN    },
    };
    for (size_t i = 0; i < COUNT(bad); i++) {
        assert_true(isnan(lee_roughness_coefficient(&surface, &bad[i])));
    }
}

/* Where alpha bends, and where the solution is held. */
static const struct {
    const char *name;
    double speed;
} bends[] = {
    {"fairall-2003",     0.5           },
    {"fairall-2003",     10.0          },
    {"fairall-2003",     18.0          },
    {"fairall-2003",     60.0          },
    {"edson-2013",       0.5           },
    {"edson-2013",       0.005 / 0.0017},
    {"edson-2013",       19.0          },
    {"edson-2013",       60.0          },
    {"wu-smooth-1980",   0.5           },
    {"wu-smooth-1980",   60.0          },
    {"wuest-lorke-2003", 0.1           },
    {"wuest-lorke-2003", 3.98684       },
    {"wuest-lorke-2003", 60.0          },
};

static void each_solution_is_continuous_where_it_bends(void **state) {
    (void)state;
    for (size_t i = 0; i < COUNT(bends); i++) {
        const double u = bends[i].speed;
        const double below = coefficient(bends[i].name, u - 1e-9, viscosity);
        const double above = coefficient(bends[i].name, u + 1e-9, viscosity);
        /* 2e-9 m s-1 of at most 0.7 s m-1, and what the solution leaves. */
        assert_near(above, below, 2e-9 * 0.75 + 2e-11);
    }
}

static void the_solution_is_held_in_calm_and_beyond_any_wind(void **state) {
    (void)state;
    assert_true(coefficient("edson-2013", 0.0, viscosity) ==
                coefficient("edson-2013", 0.5, viscosity));
    assert_true(coefficient("edson-2013", 300.0, viscosity) ==
                coefficient("edson-2013", 60.0, viscosity));
    assert_true(coefficient("edson-2013", 59.99, viscosity) <
                coefficient("edson-2013", 60.0, viscosity));
}

/* Smooth flow adds roughness, most of it in light wind. */
static void smooth_flow_adds_less_and_less_drag(void **state) {
    (void)state;
    double last = INFINITY;
    for (double u = 1.0; u <= 40.0; u += 0.5) {
        const double more = coefficient("smith-smooth-1988", u, viscosity) /
                                coefficient("smith-rough-1988", u, viscosity) -
                            1.0;
        assert_true(more > 0.0 && more < last);
        last = more;
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(each_relation_gives_what_its_roughness_gives),
        cmocka_unit_test(each_coare_version_gives_its_own_coefficient),
        cmocka_unit_test(each_coare_version_has_its_own_alpha),
        cmocka_unit_test(the_lake_law_has_its_two_branches),
        cmocka_unit_test(the_strong_lake_law_satisfies_its_equation),
        cmocka_unit_test(the_lake_law_is_least_where_its_branches_meet),
        cmocka_unit_test(a_rough_surface_has_the_worked_coefficient),
        cmocka_unit_test(friction_and_roughness_are_the_worked_ones),
        cmocka_unit_test(without_smooth_flow_the_froude_number_decides),
        cmocka_unit_test(beyond_the_fastest_wind_the_coefficient_is_held),
        cmocka_unit_test(a_roughness_that_misses_something_has_no_coefficient),
        cmocka_unit_test(each_solution_is_continuous_where_it_bends),
        cmocka_unit_test(the_solution_is_held_in_calm_and_beyond_any_wind),
        cmocka_unit_test(smooth_flow_adds_less_and_less_drag),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
