/* Densities and pressures are those of the sources, and of mechanics. */
#include "support/check.h"

#include "leewater/stress.h"

static const double celsius_zero = 273.15;

/* Kell (1975), worked from the printed equation to five decimals. */
static const struct {
    double celsius;
    double expected; /* kg m-3 */
} kell[] = {
    {0.0,  999.83952},
    {4.0,  999.97199},
    {5.0,  999.96382},
    {10.0, 999.69963},
    {15.0, 999.09961},
    {20.0, 998.20413},
    {25.0, 997.04490},
    {30.0, 995.64726},
};

static void water_is_as_dense_as_kell_says(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof kell / sizeof kell[0]; i++) {
        assert_near(lee_water_density(celsius_zero + kell[i].celsius),
                    kell[i].expected, 0.5e-5);
    }
}

/* The transposed denominator 16.897850e-3 gives 997.93555. */
static void the_denominator_is_not_the_transposed_one(void **state) {
    (void)state;
    assert_true(lee_water_density(celsius_zero + 20.0) > 998.2);
}

/* Millero and Poisson (1981), an independent equation, agrees with Kell
 * within 0.004 kg m-3 from 0 to 30 C. */
static void water_agrees_with_the_equation_of_state_of_the_sea(void **state) {
    (void)state;
    for (double t = 0.0; t <= 30.0; t += 0.5) {
        const double sea =
            999.842594 +
            t * (6.793952e-2 + t * (-9.095290e-3 +
                                    t * (1.001685e-4 + t * (-1.120083e-6 +
                                                            t * 6.536332e-9))));
        assert_near(lee_water_density(celsius_zero + t), sea, 0.004);
    }
}

static void water_is_densest_near_four_degrees(void **state) {
    (void)state;
    const double most = lee_water_density(celsius_zero + 3.98);
    assert_true(lee_water_density(celsius_zero + 3.5) < most);
    assert_true(lee_water_density(celsius_zero + 4.5) < most);
}

static void water_outside_its_range_has_no_density(void **state) {
    (void)state;
    assert_true(isnan(lee_water_density(celsius_zero - 0.1)));
    assert_true(isnan(lee_water_density(celsius_zero + 150.1)));
    assert_true(isnan(lee_water_density(20.0)));
    assert_true(isnan(lee_water_density(NAN)));
    /* What 32 degrees Fahrenheit become may miss zero by a rounding. */
    assert_near(lee_water_density(celsius_zero - 1e-13), 999.83952, 0.5e-5);
}

/* p/(R T) worked for the dry cases of the moist-air equations. */
static void dry_air_follows_the_gas_law(void **state) {
    (void)state;
    assert_near(lee_air_density(101325.0, 273.15), 1.292284, 0.5e-6);
    assert_near(lee_air_density(101325.0, 288.15), 1.225012, 0.5e-6);
}

/* Picard et al. (2008), real dry air: the ideal gas is within 0.08 %. */
static void dry_air_is_close_to_the_metrologists_air(void **state) {
    (void)state;
    assert_near_share(lee_air_density(101325.0, 273.15), 1.293049, 0.8e-3);
    assert_near_share(lee_air_density(101325.0, 288.15), 1.225521, 0.8e-3);
}

static void missing_air_has_no_density(void **state) {
    (void)state;
    assert_true(isnan(lee_air_density(NAN, 288.15)));
    assert_true(isnan(lee_air_density(101325.0, NAN)));
}

/* CIPM-2007 (Picard et al. 2008), worked from the printed equations outside
 * of this program, to six decimals; in the second column the simpler form
 * (p - 0.378 e)/(287.05 T) with the vapour pressure e of Magnus as WMO-No. 8
 * has it (from memory). */
static const struct {
    double celsius;
    double pressure; /* Pa */
    double humidity;
    double expected; /* kg m-3 */
    double simpler;
} moist[] = {
    {20.0,  101325.0, 0.5, 1.199314, 1.198879},
    {0.0,   101325.0, 0.0, 1.293049, 1.292284},
    {15.0,  101325.0, 0.0, 1.225521, 1.225012},
    {10.0,  101325.0, 0.8, 1.242672, 1.242083},
    {25.0,  100000.0, 0.6, 1.160430, 1.160069},
    {30.0,  95000.0,  0.9, 1.075457, 1.075161},
    {-10.0, 101325.0, 0.7, 1.341371, 1.340386},
    {20.0,  85000.0,  0.4, 1.006230, 1.005925},
};

static void moist_air_is_the_metrologists_air(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof moist / sizeof moist[0]; i++) {
        assert_near(lee_moist_air_density(moist[i].pressure,
                                          celsius_zero + moist[i].celsius,
                                          moist[i].humidity),
                    moist[i].expected, 0.5e-6);
    }
}

/* e = h 611.2 exp(17.62 t/(243.12 + t)) Pa. */
static void a_simpler_form_agrees_with_moist_air(void **state) {
    (void)state;
    for (size_t i = 0; i < sizeof moist / sizeof moist[0]; i++) {
        const double t = moist[i].celsius;
        const double e =
            moist[i].humidity * 611.2 * exp(17.62 * t / (243.12 + t));
        const double simpler =
            (moist[i].pressure - 0.378 * e) / (287.05 * (celsius_zero + t));
        assert_near(simpler, moist[i].simpler, 0.5e-6);
        assert_near_share(lee_moist_air_density(moist[i].pressure,
                                                celsius_zero + t,
                                                moist[i].humidity),
                          simpler, 0.8e-3);
    }
}

static void moisture_makes_air_lighter(void **state) {
    (void)state;
    double last = INFINITY;
    for (double h = 0.0; h <= 1.0; h += 0.125) {
        const double density = lee_moist_air_density(1e5, 298.15, h);
        assert_true(density < last);
        last = density;
    }
}

static void moist_air_outside_its_ranges_has_no_density(void **state) {
    (void)state;
    assert_true(isnan(lee_moist_air_density(NAN, 288.15, 0.5)));
    assert_true(isnan(lee_moist_air_density(1e5, NAN, 0.5)));
    assert_true(isnan(lee_moist_air_density(1e5, 288.15, NAN)));
    assert_true(isnan(lee_moist_air_density(1e5, 288.15, 1.01)));
    assert_true(isnan(lee_moist_air_density(1e5, 288.15, -0.01)));
    assert_true(isnan(lee_moist_air_density(0.0, 288.15, 0.5)));
    assert_true(isnan(lee_moist_air_density(1e5, 0.0, 0.5)));
}

/* Chen and Millero (1986), an equation for lakes without salt (from memory),
 * agrees with Kell within 1e-4 kg m-3 from 0 to 30 degC; its own values to
 * five digits behind the point. */
static void water_agrees_with_the_equation_of_state_of_lakes(void **state) {
    (void)state;
    static const struct {
        double celsius;
        double expected;
    } lakes[] = {
        {0.0,  999.8395 },
        {4.0,  999.97192},
        {5.0,  999.96378},
        {10.0, 999.69967},
        {15.0, 999.09957},
        {20.0, 998.20405},
        {25.0, 997.04486},
        {30.0, 995.64725},
    };
    for (size_t i = 0; i < sizeof lakes / sizeof lakes[0]; i++) {
        assert_near(lee_water_density(celsius_zero + lakes[i].celsius),
                    lakes[i].expected, 1.05e-4);
    }
}

/* The standard's primary constants (from memory): 288.15 K, -6.5 K per km,
 * 287.05287 J kg-1 K-1, 9.80665 m s-2. The three constants of the short form
 * carry six digits: worth 1e-6 of the pressure at 9 km. */
/* Andreas (1989), worked from the printed polynomial to six digits. */
static void air_is_as_viscous_as_andreas_says(void **state) {
    (void)state;
    static const struct {
        double celsius;
        double expected; /* m2 s-1 */
    } air[] = {
        {-10.0, 1.24036e-5},
        {0.0,   1.32600e-5},
        {10.0,  1.41384e-5},
        {15.0,  1.45858e-5},
        {20.0,  1.50385e-5},
        {30.0,  1.59597e-5},
    };
    for (size_t i = 0; i < sizeof air / sizeof air[0]; i++) {
        assert_near(lee_air_viscosity(celsius_zero + air[i].celsius),
                    air[i].expected, 0.5e-10);
    }
}

static void air_outside_its_range_has_no_viscosity(void **state) {
    (void)state;
    assert_true(isnan(lee_air_viscosity(celsius_zero - 174.0)));
    assert_true(isnan(lee_air_viscosity(celsius_zero + 278.0)));
    assert_true(isnan(lee_air_viscosity(NAN)));
}

static void pressure_is_that_of_the_standard_atmosphere(void **state) {
    (void)state;
    for (double z = -500.0; z <= 9000.0; z += 250.0) {
        const double exact = 101325.0 * pow(1.0 - 0.0065 * z / 288.15,
                                            9.80665 / (0.0065 * 287.05287));
        assert_near_share(lee_standard_pressure(z), exact, 1e-6);
    }
}

/* ISO 2533:1975, table of geopotential altitudes (from memory). */
static void pressure_is_the_tabulated_one(void **state) {
    (void)state;
    assert_near(lee_standard_pressure(0.0), 101325.0, 1e-9);
    assert_near(lee_standard_pressure(1000.0), 89874.6, 0.05);
    assert_near(lee_standard_pressure(5000.0), 54019.9, 0.05);
}

/* dp/dz = -rho g with the density of the standard's own temperature. */
static void pressure_falls_by_the_weight_of_the_air(void **state) {
    (void)state;
    for (double z = 0.0; z <= 8000.0; z += 500.0) {
        const double slope =
            (lee_standard_pressure(z + 1.0) - lee_standard_pressure(z - 1.0)) /
            2.0;
        const double weight =
            9.80665 *
            lee_air_density(lee_standard_pressure(z), 288.15 - 0.0065 * z);
        /* 287.05 for 287.05287 is 1e-5; six digits of constants as much. */
        assert_near_share(slope, -weight, 2e-5);
    }
}

static void pressure_outside_the_troposphere_is_not_given(void **state) {
    (void)state;
    assert_true(isnan(lee_standard_pressure(-501.0)));
    assert_true(isnan(lee_standard_pressure(9001.0)));
    assert_true(isnan(lee_standard_pressure(NAN)));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(water_is_as_dense_as_kell_says),
        cmocka_unit_test(the_denominator_is_not_the_transposed_one),
        cmocka_unit_test(water_agrees_with_the_equation_of_state_of_the_sea),
        cmocka_unit_test(water_is_densest_near_four_degrees),
        cmocka_unit_test(water_outside_its_range_has_no_density),
        cmocka_unit_test(dry_air_follows_the_gas_law),
        cmocka_unit_test(dry_air_is_close_to_the_metrologists_air),
        cmocka_unit_test(missing_air_has_no_density),
        cmocka_unit_test(moist_air_is_the_metrologists_air),
        cmocka_unit_test(a_simpler_form_agrees_with_moist_air),
        cmocka_unit_test(moisture_makes_air_lighter),
        cmocka_unit_test(moist_air_outside_its_ranges_has_no_density),
        cmocka_unit_test(water_agrees_with_the_equation_of_state_of_lakes),
        cmocka_unit_test(air_is_as_viscous_as_andreas_says),
        cmocka_unit_test(air_outside_its_range_has_no_viscosity),
        cmocka_unit_test(pressure_is_that_of_the_standard_atmosphere),
        cmocka_unit_test(pressure_is_the_tabulated_one),
        cmocka_unit_test(pressure_falls_by_the_weight_of_the_air),
        cmocka_unit_test(pressure_outside_the_troposphere_is_not_given),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
