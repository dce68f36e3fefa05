/* The stress of a wind is a vector along it. */
#include "support/check.h"

#include "leewater/stress.h"

static const double pi = 3.14159265358979323846;
static const lee_drag_input fluids = {0.0, 1.225, 1000.0, 9.81, 1.5e-5};

static void stress_of(const lee_drag *drag, double east, double north,
                      double stress[2]) {
    const double wind[2] = {east, north};
    lee_wind_stress(drag, &fluids, wind, stress);
}

static lee_drag constant(double c10) {
    return (lee_drag){.constant = c10, .cap = INFINITY};
}

/* rho (0.75 + 0.067 U) 1e-3 U^2 with rho 1.225, worked to six decimals. */
static void garratts_stress_is_the_worked_one(void **state) {
    (void)state;
    static const struct {
        double speed;
        double expected; /* Pa */
    } worked[] = {
        {5.0,  0.033228},
        {10.0, 0.173950},
        {15.0, 0.483722},
        {20.0, 1.024100},
        {30.0, 3.042900},
    };
    const lee_drag drag = lee_drag_default();
    for (size_t i = 0; i < sizeof worked / sizeof worked[0]; i++) {
        double tau[2];
        stress_of(&drag, worked[i].speed, 0.0, tau);
        assert_near(tau[0], worked[i].expected, 0.5e-6 + 1e-12);
        assert_near(tau[1], 0.0, 0.0);
    }
}

/* k rho_w U^2 whatever the air: 1.6356e-6 x 1000 x 100. */
static void a_share_of_the_water_does_not_ask_for_the_air(void **state) {
    (void)state;
    const lee_drag drag = {.relation = lee_drag_find("van-dorn-1953"),
                           .cap = INFINITY};
    const double wind[2] = {10.0, 0.0};
    double light[2];
    double heavy[2];
    lee_drag_input air = fluids;
    air.air_density = 1.0;
    lee_wind_stress(&drag, &air, wind, light);
    air.air_density = 1.3;
    lee_wind_stress(&drag, &air, wind, heavy);
    assert_near(light[0], 0.16356, 1e-12);
    assert_near(heavy[0], 0.16356, 1e-12);
}

static void a_wind_60_degrees_off_gives_half_the_stress(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    double along[2];
    double off[2];
    stress_of(&drag, 15.0, 0.0, along);
    stress_of(&drag, 15.0 * cos(pi / 3.0), 15.0 * sin(pi / 3.0), off);
    assert_near_share(off[0], 0.5 * along[0], 1e-14);
}

static void the_stress_points_where_the_wind_goes(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    double tau[2];
    stress_of(&drag, -3.0, 4.0, tau);
    assert_near(tau[0] * 4.0, tau[1] * -3.0, 1e-16);
    assert_true(tau[0] < 0.0 && tau[1] > 0.0);
}

static void
with_constant_drag_twice_the_wind_is_four_times_the_stress(void **state) {
    (void)state;
    const lee_drag drag = constant(1.5e-3);
    double once[2];
    double twice[2];
    stress_of(&drag, 6.0, 8.0, once);
    stress_of(&drag, 12.0, 16.0, twice);
    assert_near_share(twice[0], 4.0 * once[0], 1e-15);
    assert_near_share(twice[1], 4.0 * once[1], 1e-15);
}

static void the_opposite_wind_has_the_opposite_stress(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    double there[2];
    double back[2];
    stress_of(&drag, 7.0, -11.0, there);
    stress_of(&drag, -7.0, 11.0, back);
    assert_near(there[0], -back[0], 0.0);
    assert_near(there[1], -back[1], 0.0);
}

static void a_turned_wind_has_the_turned_stress(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    double tau[2];
    double turned[2];
    stress_of(&drag, 9.0, 2.0, tau);
    stress_of(&drag, -2.0, 9.0, turned);
    assert_near(turned[0], -tau[1], 1e-16);
    assert_near(turned[1], tau[0], 1e-16);
}

static void calm_air_does_not_pull(void **state) {
    (void)state;
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        const lee_drag drag = {.relation = relation, .cap = INFINITY};
        double tau[2] = {1.0, 1.0};
        stress_of(&drag, 0.0, 0.0, tau);
        assert_near(tau[0], 0.0, 0.0);
        assert_near(tau[1], 0.0, 0.0);
    }
}

static void a_wind_with_a_missing_component_has_no_stress(void **state) {
    (void)state;
    const lee_drag drag = constant(1.5e-3);
    double tau[2] = {0.0, 0.0};
    stress_of(&drag, NAN, 3.0, tau);
    assert_true(isnan(tau[0]) && isnan(tau[1]));
    tau[0] = tau[1] = 0.0;
    stress_of(&drag, 3.0, NAN, tau);
    assert_true(isnan(tau[0]) && isnan(tau[1]));
}

static void the_stress_may_take_the_place_of_the_wind(void **state) {
    (void)state;
    const lee_drag drag = lee_drag_default();
    double apart[2];
    stress_of(&drag, 6.0, 8.0, apart);
    double vector[2] = {6.0, 8.0};
    lee_wind_stress(&drag, &fluids, vector, vector);
    assert_near(vector[0], apart[0], 0.0);
    assert_near(vector[1], apart[1], 0.0);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(garratts_stress_is_the_worked_one),
        cmocka_unit_test(a_share_of_the_water_does_not_ask_for_the_air),
        cmocka_unit_test(a_wind_60_degrees_off_gives_half_the_stress),
        cmocka_unit_test(the_stress_points_where_the_wind_goes),
        cmocka_unit_test(
            with_constant_drag_twice_the_wind_is_four_times_the_stress),
        cmocka_unit_test(the_opposite_wind_has_the_opposite_stress),
        cmocka_unit_test(a_turned_wind_has_the_turned_stress),
        cmocka_unit_test(calm_air_does_not_pull),
        cmocka_unit_test(a_wind_with_a_missing_component_has_no_stress),
        cmocka_unit_test(the_stress_may_take_the_place_of_the_wind),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
