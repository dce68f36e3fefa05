/* The drag and the return flow of a case. */
#include "support/case_text.h"

static void a_relation_keeps_the_usual_cap(void **state) {
    lee_case c = read_case(state, LAKE "stress: {drag: wu-1982}\n");
    assert_string_equal(c.problem.drag.relation->name, "wu-1982");
    assert_near(c.problem.drag.cap, 3.0e-3, 0.0);
    lee_case_free(&c);
}

static void a_constant_drag_is_not_capped_unless_told(void **state) {
    lee_case c = read_case(state, LAKE "stress: {drag: 1.8e-3}\n");
    assert_null(c.problem.drag.relation);
    assert_near(c.problem.drag.constant, 1.8e-3, 0.0);
    assert_true(isinf(c.problem.drag.cap));
    lee_case_free(&c);
}

static void a_cap_is_kept_with_any_drag(void **state) {
    lee_case c =
        read_case(state, LAKE "stress: {drag_cap: 1.5e-3, drag: 1.8e-3}\n");
    assert_near(c.problem.drag.cap, 1.5e-3, 0.0);
    lee_case_free(&c);
}

static void an_unknown_relation_is_told_with_the_nearest(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "stress: {drag: wu-1892}\n",
             "a.yaml:4:16: 'stress.drag' is 'wu-1892', which is no drag "
             "relation; did you mean 'wu-1982'?"),
        SLIP(LAKE "stress: {drag: strong}\n",
             "a.yaml:4:16: 'stress.drag' is 'strong'; expected a drag relation "
             "(the command drag lists them), a number, or {table: drag.csv}"),
    };
    assert_all_told(state, slips);
}

static void a_drag_beyond_belief_is_refused(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "stress: {drag: 1.8}\n",
             "a.yaml:4:16: 'stress.drag' is '1.8'; expected more than 0 and "
             "up to 0.02"),
        SLIP(
            LAKE "stress: {drag: 0}\n",
            "a.yaml:4:16: 'stress.drag' is '0'; expected more than 0 and up to "
            "0.02"),
        SLIP(LAKE "stress: {drag: 1e999}\n",
             "a.yaml:4:16: 'stress.drag' cannot be read: '1e999' is not a "
             "finite number"),
        SLIP(LAKE "stress: {drag_cap: 3}\n",
             "a.yaml:4:20: 'stress.drag_cap' is '3'; expected none, or 0.0005 "
             "to 0.02"),
    };
    assert_all_told(state, slips);
}

static void a_table_is_read_in_its_units(void **state) {
    folder_write(*state, "drag.csv",
                 "speed [knots],coefficient\n0,0.001\n10,0.0015\n"
                 "40,0.0025\n");
    lee_case c = read_case(state, LAKE "stress: {drag: {table: drag.csv}}\n");
    const lee_drag *drag = &c.problem.drag;
    assert_null(drag->relation);
    assert_int_equal(drag->n, 3);
    assert_near(drag->speed[1], 10.0 * 1852.0 / 3600.0, 1e-14);
    assert_near(drag->coefficient[2], 0.0025, 0.0);
    assert_true(isinf(drag->cap));
    lee_case_free(&c);
}

static void a_bad_table_is_told_with_its_line(void **state) {
    static const struct {
        const char *table;
        lee_status status;
        const char *message;
    } tables[] = {
        {"speed [m/s],coefficient\n0,1e-3\n0,2e-3\n",    LEE_ERR_FORMAT,
         "drag.csv:3:1: speed 0 m/s does not grow from row to row, from "
         "0 on (named at a.yaml:4:24)"   },
        {"speed [m/s],coefficient\n-0.5,1e-3\n2,2e-3\n", LEE_ERR_FORMAT,
         "drag.csv:2:1: speed -0.5 m/s does not grow from row to row, from "
         "0 on (named at a.yaml:4:24)"   },
        {"speed [m/s],coefficient\n0,1e-3\n9,2\n",       LEE_ERR_FORMAT,
         "drag.csv:3:3: drag coefficient 2; expected more than 0 and up to "
         "0.02 (named at a.yaml:4:24)"   },
        {"speed [m/s],coefficient\n0,-1e-3\n9,2e-3\n",   LEE_ERR_FORMAT,
         "drag.csv:2:3: drag coefficient -0.001; expected more than 0 and up "
         "to 0.02 (named at a.yaml:4:24)"},
        {"speed [m/s],coefficient\n0,1e-3\n",            LEE_ERR_DATA,
         "drag.csv: a drag table needs two rows, this one has 1 (named at "
         "a.yaml:4:24)"                  },
        {"speed [kg],coefficient\n0,1e-3\n1,1e-3\n",     LEE_ERR_FORMAT,
         "drag.csv:1: column 'speed': unit 'kg' cannot be converted to m s-1 "
         "(named at a.yaml:4:24)"        },
    };
    for (size_t i = 0; i < sizeof tables / sizeof tables[0]; i++) {
        folder_write(*state, "drag.csv", tables[i].table);
        assert_told_as(state, LAKE "stress: {drag: {table: drag.csv}}\n",
                       tables[i].status, tables[i].message);
    }
}

static void a_table_without_a_unit_of_speed_is_refused(void **state) {
    folder_write(*state, "drag.csv", "speed,coefficient\n0,1e-3\n9,2e-3\n");
    lee_case c = {0};
    lee_error error = {0};
    const char *path = folder_write(*state, "a.yaml",
                                    LAKE "stress: {drag: {table: drag.csv}}\n");
    assert_int_equal(lee_case_read(path, &c, &error), LEE_ERR_FORMAT);
    assert_non_null(
        strstr(error.message, "drag.csv:1: column 'speed' has no unit"));
}

static void air_density_stands_alone(void **state) {
    assert_told(state,
                LAKE "stress: {air_density: 1.2 kg m-3, air_pressure: "
                     "1000 hPa, air_temperature: 4 degC}\n",
                "a.yaml:4:35: 'air_density' and 'air_pressure' exclude each "
                "other in 'stress'\n"
                "a.yaml:4:59: 'air_density' and 'air_temperature' exclude "
                "each other in 'stress'");
}

static void moist_air_and_ice_are_read_in_their_units(void **state) {
    lee_case c = read_case(state, LAKE
                           "stress: {air_pressure: 970 hPa, air_temperature: "
                           "-4 degC, humidity: 85 percent, ice: 0.3}\n");
    assert_near(c.problem.air.pressure, 97000.0, 1e-9);
    assert_near(c.problem.air.temperature, 269.15, 1e-9);
    assert_near(c.problem.air.humidity, 0.85, 1e-12);
    assert_near(c.problem.ice, 0.3, 1e-12);
    lee_case_free(&c);
}

static void a_case_without_them_has_dry_air_and_no_ice(void **state) {
    lee_case c = read_case(state, LAKE);
    assert_true(isnan(c.problem.air.humidity));
    assert_near(c.problem.ice, 0.0, 0.0);
    lee_case_free(&c);
}

static void humidity_and_ice_are_shares(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "stress: {humidity: 120 percent}\n",
             "a.yaml:4:20: 'stress.humidity' is '120 percent'; expected 0 to "
             "1"),
        SLIP(LAKE "stress: {ice: -5 percent}\n",
             "a.yaml:4:15: 'stress.ice' is '-5 percent'; expected 0 to 1"),
        SLIP(LAKE "stress: {ice: 30 cm}\n",
             "a.yaml:4:15: 'stress.ice' cannot be read: unit 'cm' cannot be "
             "converted to a plain number"),
        SLIP(LAKE "stress: {air_density: 1.2 kg m-3, humidity: 0.8}\n",
             "a.yaml:4:35: 'air_density' and 'humidity' exclude each other in "
             "'stress'"),
    };
    assert_all_told(state, slips);
}

static void a_return_flow_below_one_is_refused(void **state) {
    assert_told(state, LAKE "stress: {return_flow: 0.9}\n",
                "a.yaml:4:23: 'stress.return_flow' is '0.9'; expected "
                "computed, or 1 to 3");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        CASE_TEST(a_relation_keeps_the_usual_cap),
        CASE_TEST(a_constant_drag_is_not_capped_unless_told),
        CASE_TEST(a_cap_is_kept_with_any_drag),
        CASE_TEST(an_unknown_relation_is_told_with_the_nearest),
        CASE_TEST(a_drag_beyond_belief_is_refused),
        CASE_TEST(a_table_is_read_in_its_units),
        CASE_TEST(a_bad_table_is_told_with_its_line),
        CASE_TEST(a_table_without_a_unit_of_speed_is_refused),
        CASE_TEST(air_density_stands_alone),
        CASE_TEST(moist_air_and_ice_are_read_in_their_units),
        CASE_TEST(a_case_without_them_has_dry_air_and_no_ice),
        CASE_TEST(humidity_and_ice_are_shares),
        CASE_TEST(a_return_flow_below_one_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
