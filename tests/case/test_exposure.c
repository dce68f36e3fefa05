/* How a wind was measured, as a case says it: gusts, land, stability. */
#include "support/case_text.h"

#define WIND   LAKE "wind: {speed: 20 m/s, from: 240 degree, "
#define LAND   WIND "over: {land: {roughness_length: 3 cm, to_water: "
#define RECORD LAKE "wind: {record: w.csv, "

static const char record[] = "time,speed [m/s],from [degree],air [degC]\n"
                             "2031-01-10T06:00Z,12,240,3\n"
                             "2031-01-10T07:00Z,14,245,2\n";

static void gusts_are_told_by_duration_period_and_exposure(void **state) {
    lee_case c = read_case(state, WIND "gust: {duration: 3 s, period: 10 min, "
                                       "exposure: off-land}}\n");
    const lee_exposure *exposure = &c.problem.exposure;
    assert_true(exposure->is_gust);
    assert_near(exposure->gust_duration, 3.0, 0.0);
    assert_near(exposure->gust_period, 600.0, 0.0);
    assert_int_equal(exposure->gust_class, LEE_GUST_OFF_LAND);
    lee_case_free(&c);
}

static void every_exposure_class_has_its_word(void **state) {
    static const char *const texts[] = {
        WIND "gust: {duration: 3 s, period: 1 h, exposure: in-land}}\n",
        WIND "gust: {duration: 3 s, period: 1 h, exposure: off-land}}\n",
        WIND "gust: {duration: 3 s, period: 1 h, exposure: off-sea}}\n",
        WIND "gust: {duration: 3 s, period: 1 h, exposure: at-sea}}\n",
    };
    for (int i = 0; i < 4; i++) {
        lee_case c = read_case(state, texts[i]);
        assert_int_equal(c.problem.exposure.gust_class, i);
        lee_case_free(&c);
    }
}

static void a_gust_that_cannot_be_is_refused(void **state) {
    static const case_slip slips[] = {
        SLIP(WIND "gust: 3 s}\n",
             "a.yaml:4:47: 'wind.gust' should be {duration: 3 s, period: 10 "
             "min, exposure: in-land}: it says that the speeds are gusts"),
        SLIP(WIND "gust: {duration: 3 s, period: 10 min}}\n",
             "a.yaml:4:47: required key 'exposure' is missing from "
             "'wind.gust'"),
        SLIP(WIND "gust: {duration: 3 s, period: 2 h, exposure: at-sea}}\n",
             "a.yaml:4:71: 'wind.gust.period' is '2 h'; expected 1 to 60 min"),
        SLIP(WIND "gust: {duration: 3 s, period: 10 min, exposure: city}}\n",
             "a.yaml:4:89: 'wind.gust.exposure' is 'city'; expected one of "
             "in-land, off-land, off-sea, at-sea"),
        SLIP(WIND "gust: {duration: 5 min, period: 1 min, "
                  "exposure: at-sea}}\n",
             "a.yaml:4:7: 'wind' cannot be used: duration of the gusts is 300 "
             "s, expected 1 s to their period, 60 s"),
        SLIP(WIND "averaging: 3 s, gust: {duration: 3 s, period: 10 min, "
                  "exposure: in-land}}\n",
             "a.yaml:4:57: 'gust' and 'averaging' exclude each other in "
             "'wind'"),
    };
    assert_all_told(state, slips);
}

static void water_is_reached_by_a_relation(void **state) {
    lee_case c = read_case(state, LAND "hsu-1980}}}\n");
    assert_int_equal(c.problem.exposure.to_water_method, LEE_TO_WATER_HSU_1980);
    lee_case_free(&c);
    c = read_case(state, LAND "hsu-1981}}}\n");
    assert_int_equal(c.problem.exposure.to_water_method, LEE_TO_WATER_HSU_1981);
    lee_case_free(&c);
}

static void water_is_reached_by_a_fetch(void **state) {
    lee_case c = read_case(state, LAND "{fetch: 4 km}}}}\n");
    assert_int_equal(c.problem.exposure.to_water_method,
                     LEE_TO_WATER_RESERVOIR);
    assert_near(c.problem.exposure.to_water_fetch, 4000.0, 0.0);
    lee_case_free(&c);
}

static void water_is_reached_by_a_factor(void **state) {
    lee_case c = read_case(state, LAND "1.25}}}\n");
    assert_int_equal(c.problem.exposure.to_water_method, LEE_TO_WATER_FACTOR);
    assert_near(c.problem.exposure.land_to_water, 1.25, 0.0);
    assert_near(c.problem.exposure.land_roughness, 0.03, 1e-17);
    lee_case_free(&c);
}

static void water_is_reached_by_a_table(void **state) {
    folder_write(*state, "ratio.csv",
                 "speed [km/h],ratio\n18,1.5\n36,1.3\n72,1.1\n");
    lee_case c = read_case(state, LAND "{table: ratio.csv}}}}\n");
    const lee_ratio_table *table = &c.problem.exposure.to_water_table;
    assert_int_equal(c.problem.exposure.to_water_method, LEE_TO_WATER_TABLE);
    assert_int_equal(table->n, 3);
    assert_near(table->speed[2], 20.0, 1e-14);
    assert_near(table->ratio[0], 1.5, 0.0);
    lee_case_free(&c);
}

static void a_table_of_ratios_is_an_input_of_its_case(void **state) {
    folder_write(*state, "ratio.csv", "speed [m/s],ratio\n5,1.5\n9,1.3\n");
    lee_case c = read_case(state, LAND "{table: ratio.csv}}}}\n");
    bool is_listed = false;
    for (size_t i = 0; i < c.inputs.n; i++) {
        is_listed = is_listed || strstr(c.inputs.text[i], "ratio.csv") != NULL;
    }
    assert_true(is_listed);
    lee_case_free(&c);
}

static void another_way_to_the_water_is_refused(void **state) {
    static const case_slip slips[] = {
        SLIP(LAND "saville}}}\n",
             "a.yaml:4:89: 'wind.over.land.to_water' is 'saville'; expected a "
             "factor, hsu-1980, hsu-1981, {fetch: 4 km} or {table: "
             "ratio.csv}"),
        SLIP(LAND "0.3}}}\n",
             "a.yaml:4:89: 'wind.over.land.to_water' is '0.3'; expected 0.5 to "
             "3"),
        SLIP(LAND "{}}}}\n",
             "a.yaml:4:89: 'wind.over.land.to_water' needs one of the keys "
             "'fetch' and 'table'"),
        SLIP(LAND "{fetch: 4}}}}\n",
             "a.yaml:4:97: 'wind.over.land.to_water.fetch' cannot be read: "
             "'4' has no unit; write 4 m"),
    };
    assert_all_told(state, slips);
}

static void a_bad_table_of_ratios_is_told_with_its_line(void **state) {
    folder_write(*state, "ratio.csv", "speed [m/s],ratio\n5,1.5\n9,0.1\n");
    assert_told(state, LAND "{table: ratio.csv}}}}\n",
                "ratio.csv:3:3: ratio 0.1; expected more than 0.2 and up to 5 "
                "(named at a.yaml:4:97)");
    folder_write(*state, "ratio.csv", "speed [m/s],ratio\n5,1.5\n5,1.2\n");
    assert_told(state, LAND "{table: ratio.csv}}}}\n",
                "ratio.csv:3:1: speed 5 m/s does not grow from row to row, "
                "from 0 on (named at a.yaml:4:97)");
    folder_write(*state, "ratio.csv", "speed [m/s],ratio\n5,1.5\n");
    assert_told_as(state, LAND "{table: ratio.csv}}}}\n", LEE_ERR_DATA,
                   "ratio.csv: a table of ratios needs two rows, this one has "
                   "1 (named at a.yaml:4:97)");
}

static void stability_takes_temperatures_of_the_case(void **state) {
    lee_case c = read_case(
        state, WIND "stability: {method: monin-obukhov, air_temperature: 2 "
                    "degC, water_temperature: 9 degC, temperature_height: 4 "
                    "m, functions: businger-dyer}}\n");
    const lee_exposure *exposure = &c.problem.exposure;
    assert_int_equal(exposure->stability, LEE_STABILITY_MONIN_OBUKHOV);
    assert_near(exposure->air_temperature, 275.15, 1e-12);
    assert_near(exposure->water_temperature, 282.15, 1e-12);
    assert_near(exposure->temperature_height, 4.0, 0.0);
    assert_ptr_equal(exposure->functions,
                     lee_stability_functions_find("businger-dyer"));
    lee_case_free(&c);
}

static void every_set_of_functions_has_its_word(void **state) {
    const lee_stability_functions *set;
    for (size_t i = 0; (set = lee_stability_functions_at(i)) != NULL; i++) {
        char text[512];
        (void)snprintf(text, sizeof text,
                       "%sstability: {method: monin-obukhov, air_temperature: "
                       "2 degC, water_temperature: 9 degC, functions: %s}}\n",
                       WIND, set->name);
        lee_case c = read_case(state, text);
        assert_ptr_equal(c.problem.exposure.functions, set);
        lee_case_free(&c);
    }
}

/* The record has no water temperature; the lake gives one. */
static void stability_takes_temperatures_of_the_record_first(void **state) {
    folder_write(*state, "w.csv", record);
    lee_case c = read_case(state, "lake:\n"
                                  "  still_water: 100 m\n"
                                  "  water_temperature: 7 degC\n"
                                  "  axis: {bearing: 65 degree, uniform: "
                                  "{length: 12 km, depth: 4 m, width: 1 km}}\n"
                                  "wind: {record: w.csv, air_temperature: air, "
                                  "stability: air-water-ratio}\n"
                                  "stress: {air_temperature: 20 degC}\n");
    const lee_exposure *exposure = &c.problem.exposure;
    assert_int_equal(exposure->stability, LEE_STABILITY_RATIO);
    assert_true(isnan(exposure->air_temperature));
    assert_near(exposure->water_temperature, 280.15, 1e-12);
    lee_case_free(&c);
}

static void stability_may_be_a_factor(void **state) {
    lee_case c = read_case(state, WIND "stability: 1.1}\n");
    assert_int_equal(c.problem.exposure.stability, LEE_STABILITY_FACTOR);
    assert_near(c.problem.exposure.stability_factor, 1.1, 0.0);
    lee_case_free(&c);
}

static void stability_without_what_it_needs_is_refused(void **state) {
    folder_write(*state, "w.csv", record);
    static const case_slip slips[] = {
        SLIP(RECORD "air_temperature: air, stability: monin-obukhov}\n",
             "a.yaml:4:56: 'wind.stability' needs 'water_temperature': inside "
             "it, as a column of the record, or as 'lake.water_temperature'"),
        SLIP(RECORD "stability: {method: air-water-ratio, water_temperature: "
                    "5 degC}}\n",
             "a.yaml:4:34: 'wind.stability' needs 'air_temperature': inside "
             "it, as a column of the record, or as 'stress.air_temperature'"),
        SLIP(RECORD "stability: [monin-obukhov, air-water-ratio]}\n",
             "a.yaml:4:34: 'wind.stability' takes one method, never two; "
             "expected one of none, monin-obukhov, air-water-ratio, or a "
             "factor"),
        SLIP(RECORD "stability: richardson}\n",
             "a.yaml:4:34: 'wind.stability' is 'richardson'; expected one of "
             "none, monin-obukhov, air-water-ratio"),
        SLIP(WIND "stability: 3}\n",
             "a.yaml:4:52: 'wind.stability' is '3'; expected 0.5 to 2"),
        SLIP(WIND "stability: {method: air-water-ratio, air_temperature: 1 "
                  "degC, water_temperature: 5 degC, functions: coare-3.0}}\n",
             "a.yaml:4:141: 'wind.stability.functions' goes with the method "
             "'monin-obukhov' only"),
    };
    assert_all_told(state, slips);
}

static void directions_may_have_an_offset(void **state) {
    lee_case c = read_case(state, WIND "direction_offset: -3.5 degree}\n");
    assert_near(c.problem.exposure.direction_offset,
                -3.5 * 3.14159265358979323846 / 180.0, 1e-16);
    lee_case_free(&c);
}

static void an_offset_is_for_what_was_measured(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "wind: {speed: 20 m/s, directions: 8, "
                  "direction_offset: 3 degree}\n",
             "a.yaml:4:38: 'direction_offset' and 'directions' exclude each "
             "other in 'wind'"),
        SLIP(LAKE "wind: {direction_offset: 3 degree}\n"
                  "storm: {peak: 25 m/s, from: 240 degree, rise: 3 h, fall: "
                  "4 h}\n",
             "a.yaml:4:26: 'wind.direction_offset' is for winds that were "
             "measured, not for a storm"),
        SLIP(WIND "direction_offset: 200 degree}\n",
             "a.yaml:4:59: 'wind.direction_offset' is '200 degree'; expected "
             "-180 to 180 degree"),
    };
    assert_all_told(state, slips);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        CASE_TEST(gusts_are_told_by_duration_period_and_exposure),
        CASE_TEST(every_exposure_class_has_its_word),
        CASE_TEST(a_gust_that_cannot_be_is_refused),
        CASE_TEST(water_is_reached_by_a_relation),
        CASE_TEST(water_is_reached_by_a_fetch),
        CASE_TEST(water_is_reached_by_a_factor),
        CASE_TEST(water_is_reached_by_a_table),
        CASE_TEST(a_table_of_ratios_is_an_input_of_its_case),
        CASE_TEST(another_way_to_the_water_is_refused),
        CASE_TEST(a_bad_table_of_ratios_is_told_with_its_line),
        CASE_TEST(stability_takes_temperatures_of_the_case),
        CASE_TEST(every_set_of_functions_has_its_word),
        CASE_TEST(stability_takes_temperatures_of_the_record_first),
        CASE_TEST(stability_may_be_a_factor),
        CASE_TEST(stability_without_what_it_needs_is_refused),
        CASE_TEST(directions_may_have_an_offset),
        CASE_TEST(an_offset_is_for_what_was_measured),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
