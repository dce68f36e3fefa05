/* Every JSON summary holds the keys that docs/formats.md promises of all. */
#include "support/captured.h"
#include "support/results.h"

#include <jansson.h>

static const char *const promised[] = {
    "program",  "version", "command",       "case",    "title",
    "lake",     "datum",   "still_water_m", "about",   "remarks",
    "warnings", "method",  "limits",        "caution",
};

static const char *const promised_of_method[] = {
    "drag",
    "reference_height_m",
    "corrections",
    "factors_at_m_s",
    "air_density_kg_m3",
    "air_density_from",
    "water_density_kg_m3",
    "gravity_m_s2",
    "bed",
    "return_flow",
    "return_flow_from",
    "range_members",
    "record",
    "read_not_used",
};

static void assert_holds_all(const json_t *object, size_t n,
                             const char *const keys[]) {
    for (size_t i = 0; i < n; i++) {
        if (json_object_get(object, keys[i]) == NULL) {
            fail_msg("there is no key %s", keys[i]);
        }
    }
}

/* The summary that was captured, once it holds all keys; json_decref it. */
static json_t *summary_of(captured *out, lee_status status) {
    assert_int_equal(status, LEE_OK);
    json_t *root = json_loads(capture_end(out), JSON_REJECT_DUPLICATES, NULL);
    capture_free(out);
    assert_non_null(root);
    assert_holds_all(root, sizeof promised / sizeof promised[0], promised);
    assert_holds_all(json_object_get(root, "method"),
                     sizeof promised_of_method / sizeof promised_of_method[0],
                     promised_of_method);
    return root;
}

static void steady_holds_them(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    capture_begin(&out);
    json_decref(summary_of(
        &out, lee_json_steady(out.stream, &made.from, &made.steady, NULL)));
}

static void estimate_holds_them(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    capture_begin(&out);
    json_decref(summary_of(
        &out, lee_json_estimate(out.stream, &made.from, &made.steady, NULL)));
}

static void run_holds_them(void **state) {
    (void)state;
    hand_made made;
    captured out;
    make(&made);
    capture_begin(&out);
    json_decref(summary_of(
        &out, lee_json_run(out.stream, &made.from, &made.run, NULL)));
}

static void check_holds_them(void **state) {
    (void)state;
    hand_made made;
    captured out;
    const lee_problem_check check = {0};
    make(&made);
    capture_begin(&out);
    json_decref(
        summary_of(&out, lee_json_check(out.stream, &made.from, &check, NULL)));
}

static void drag_holds_them_and_has_no_case(void **state) {
    (void)state;
    captured out;
    const double speed[] = {10.0};
    const lee_drag_relation *const relation[] = {lee_drag_at(0)};
    const lee_drag_table table = {.speeds = 1,
                                  .speed = speed,
                                  .relations = 1,
                                  .relation = relation,
                                  .air_density = 1.2,
                                  .has_given_air = true,
                                  .water_density = 1000.0};
    capture_begin(&out);
    json_t *root = summary_of(&out, lee_json_drag(out.stream, &table, NULL));
    const json_t *method = json_object_get(root, "method");
    assert_true(json_is_null(json_object_get(root, "case")));
    assert_true(json_is_null(json_object_get(root, "still_water_m")));
    assert_true(json_is_null(json_object_get(method, "bed")));
    assert_true(json_is_null(json_object_get(method, "return_flow")));
    assert_string_equal(
        json_string_value(json_object_get(method, "air_density_from")),
        "given");
    json_decref(root);
}

static void a_summary_says_whom_its_case_is_about(void **state) {
    (void)state;
    hand_made made;
    captured out;
    char office[] = "Marrow harbour office";
    make(&made);
    made.from.institution = office;
    capture_begin(&out);
    json_t *root =
        summary_of(&out, lee_json_run(out.stream, &made.from, &made.run, NULL));
    const json_t *about = json_object_get(root, "about");
    assert_string_equal(
        json_string_value(json_object_get(about, "institution")), office);
    assert_true(json_is_null(json_object_get(about, "license")));
    json_decref(root);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(steady_holds_them),
        cmocka_unit_test(estimate_holds_them),
        cmocka_unit_test(run_holds_them),
        cmocka_unit_test(check_holds_them),
        cmocka_unit_test(drag_holds_them_and_has_no_case),
        cmocka_unit_test(a_summary_says_whom_its_case_is_about),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
