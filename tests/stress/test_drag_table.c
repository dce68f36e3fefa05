/* A drag solved ahead is the drag, and quick. */
#include "support/check.h"

#include <stdlib.h>
#include <string.h>

#include "leewater/stress.h"

#define COUNT(array) (sizeof(array) / sizeof(array)[0])

/* What lee_drag_solve promises, as a share of C10. */
static const double promised = 1e-6;

static lee_drag uncapped(const char *name) {
    return (lee_drag){.relation = lee_drag_find(name), .cap = INFINITY};
}

static lee_drag solved(const lee_drag *drag, const lee_drag_input *fluids) {
    lee_drag quick;
    assert_int_equal(lee_drag_solve(drag, fluids, &quick, NULL), LEE_OK);
    return quick;
}

static double coefficient(const lee_drag *drag, lee_drag_input in,
                          double speed) {
    in.speed = speed;
    return lee_drag_coefficient(drag, &in, NULL, NULL);
}

/* Compares table and solution at one speed; false when they differ by more
 * than is promised. */
static bool agrees(const lee_drag *quick, const lee_drag *drag,
                   const lee_drag_input *fluids, double speed) {
    const double table = coefficient(quick, *fluids, speed);
    const double solution = coefficient(drag, *fluids, speed);
    if (!(fabs(table - solution) <= promised * solution)) {
        print_error("%s at %.9g m/s: %.9g, solved %.9g\n", drag->relation->name,
                    speed, table, solution);
        return false;
    }
    return true;
}

/* 7919 speeds from rest to beyond the table, in no step with its bins. */
static void every_table_keeps_its_promise(void **state) {
    (void)state;
    const lee_drag_input fluids = lee_drag_input_default();
    const lee_drag_relation *relation;
    for (size_t i = 0; (relation = lee_drag_at(i)) != NULL; i++) {
        if (relation->is_solved) {
            const lee_drag drag = {.relation = relation, .cap = INFINITY};
            lee_drag quick = solved(&drag, &fluids);
            for (int k = 0; k <= 7919; k++) {
                const double share = k / 7919.0;
                assert_true(
                    agrees(&quick, &drag, &fluids, 125.0 * share * share));
            }
            lee_drag_free(&quick);
        }
    }
}

/* Within a thousandth of a bend on either side: where alpha bends, where the
 * laws of Wuest and Lorke meet, where relations are held. */
static void tables_keep_their_promise_around_bends(void **state) {
    (void)state;
    static const struct {
        const char *name;
        double speed;
    } bends[] = {
        {"fairall-2003",     10.0      },
        {"fairall-2003",     18.0      },
        {"edson-2013",       2.94117647},
        {"edson-2013",       19.0      },
        {"wuest-lorke-2003", 0.1       },
        {"wuest-lorke-2003", 3.98684   },
        {"edson-2013",       0.5       },
        {"edson-2013",       60.0      },
    };
    const lee_drag_input fluids = lee_drag_input_default();
    for (size_t i = 0; i < COUNT(bends); i++) {
        const lee_drag drag = uncapped(bends[i].name);
        lee_drag quick = solved(&drag, &fluids);
        for (int k = -1000; k <= 1000; k++) {
            assert_true(agrees(&quick, &drag, &fluids,
                               bends[i].speed + 1e-6 * k * bends[i].speed));
        }
        lee_drag_free(&quick);
    }
}

/* Cold air, warm air, another planet. */
static void the_table_is_that_of_its_fluids(void **state) {
    (void)state;
    const double viscosity[] = {1.2e-5, 1.6e-5, 1.3e-5};
    const double gravity[] = {9.78, 9.83, 3.7};
    const lee_drag drag = uncapped("edson-2013");
    for (size_t i = 0; i < COUNT(gravity); i++) {
        lee_drag_input fluids = lee_drag_input_default();
        fluids.air_viscosity = viscosity[i];
        fluids.gravity = gravity[i];
        lee_drag quick = solved(&drag, &fluids);
        for (double u = 0.0; u <= 50.0; u += 0.173) {
            assert_true(agrees(&quick, &drag, &fluids, u));
        }
        lee_drag_free(&quick);
    }
}

static void a_solved_drag_keeps_its_name_range_and_cap(void **state) {
    (void)state;
    const lee_drag_input fluids = lee_drag_input_default();
    lee_drag drag = uncapped("edson-2013");
    drag.cap = 2.5e-3;
    lee_drag quick = solved(&drag, &fluids);
    char text[80];
    assert_string_equal(lee_drag_describe(&quick, sizeof text, text),
                        "edson-2013, capped at 0.0025");
    lee_drag_input in = fluids;
    bool extrapolated = false;
    bool capped = false;
    in.speed = 24.0;
    assert_near(lee_drag_coefficient(&quick, &in, &extrapolated, &capped),
                2.5e-3, 0.0);
    assert_true(capped && !extrapolated);
    in.speed = 26.0;
    (void)lee_drag_coefficient(&quick, &in, &extrapolated, &capped);
    assert_true(extrapolated);
    lee_drag_free(&quick);
}

static void a_missing_wind_stays_missing(void **state) {
    (void)state;
    const lee_drag_input fluids = lee_drag_input_default();
    const lee_drag drag = uncapped("fairall-2003");
    lee_drag quick = solved(&drag, &fluids);
    assert_true(isnan(coefficient(&quick, fluids, NAN)));
    lee_drag_free(&quick);
}

static void a_formula_is_left_as_it_is(void **state) {
    (void)state;
    const lee_drag_input fluids = lee_drag_input_default();
    const lee_drag drag = uncapped("van-dorn-1953");
    lee_drag quick = solved(&drag, &fluids);
    assert_int_equal(quick.n, 0);
    lee_drag_input heavy = fluids;
    heavy.air_density = 1.4;
    assert_true(coefficient(&quick, heavy, 12.0) ==
                coefficient(&drag, heavy, 12.0));
    lee_drag_free(&quick);
}

static void a_constant_is_left_as_it_is(void **state) {
    (void)state;
    const lee_drag_input fluids = lee_drag_input_default();
    const lee_drag drag = {.constant = 1.7e-3, .cap = INFINITY};
    lee_drag quick = solved(&drag, &fluids);
    assert_near(coefficient(&quick, fluids, 12.0), 1.7e-3, 0.0);
    lee_drag_free(&quick);
}

static void a_table_of_the_user_is_copied(void **state) {
    (void)state;
    const lee_drag_input fluids = lee_drag_input_default();
    lee_drag drag = {.n = 2,
                     .speed = calloc(2, sizeof(double)),
                     .coefficient = calloc(2, sizeof(double)),
                     .cap = INFINITY};
    assert_true(drag.speed != NULL && drag.coefficient != NULL);
    drag.speed[1] = 20.0;
    drag.coefficient[0] = 1e-3;
    drag.coefficient[1] = 3e-3;
    lee_drag quick = solved(&drag, &fluids);
    lee_drag_free(&drag);
    assert_near(coefficient(&quick, fluids, 5.0), 1.5e-3, 1e-15);
    lee_drag_free(&quick);
}

static void fluids_without_a_solution_are_refused(void **state) {
    (void)state;
    lee_drag_input fluids = lee_drag_input_default();
    fluids.air_viscosity = NAN;
    const lee_drag drag = uncapped("fairall-2003");
    lee_drag quick;
    lee_error error = {0};
    assert_int_equal(lee_drag_solve(&drag, &fluids, &quick, &error),
                     LEE_ERR_ARGUMENT);
    assert_string_equal(error.message,
                        "fairall-2003 has no solution at 0 m/s with gravity "
                        "9.80665 m/s2 and air of viscosity nan m2/s");
    assert_null(quick.speed);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(every_table_keeps_its_promise),
        cmocka_unit_test(tables_keep_their_promise_around_bends),
        cmocka_unit_test(the_table_is_that_of_its_fluids),
        cmocka_unit_test(a_solved_drag_keeps_its_name_range_and_cap),
        cmocka_unit_test(a_missing_wind_stays_missing),
        cmocka_unit_test(a_formula_is_left_as_it_is),
        cmocka_unit_test(a_constant_is_left_as_it_is),
        cmocka_unit_test(a_table_of_the_user_is_copied),
        cmocka_unit_test(fluids_without_a_solution_are_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
