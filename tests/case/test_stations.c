/* The stations of a case stand on its axis and have names of their own. */
#include "support/case_text.h"

static void a_station_off_the_axis_is_refused_with_both_ends(void **state) {
    assert_told_as(state,
                   LAKE "stations:\n  - {name: quay, at: 1 km}\n"
                        "  - {name: dam, at: 12.1 km}\n"
                        "  - {name: inlet, at: -1 m}\n",
                   LEE_ERR_DATA,
                   "a.yaml:6:21: station 'dam' at 12100 m is off the axis, "
                   "which runs from 0 m to 12000 m\n"
                   "a.yaml:7:23: station 'inlet' at -1 m is off the axis, "
                   "which runs from 0 m to 12000 m");
}

static void a_station_at_either_end_is_on_the_axis(void **state) {
    lee_case c = read_case(state, LAKE "stations: [{name: a, at: 0 m}, "
                                       "{name: b, at: 12 km}]\n");
    assert_int_equal(c.problem.station_count, 2);
    lee_case_free(&c);
}

static void a_name_given_twice_is_refused(void **state) {
    assert_told(state,
                LAKE "stations: [{name: quay, at: 1 km},\n"
                     "{name: quay, at: 2 km}]\n",
                "a.yaml:5:8: 'stations' holds the name 'quay' twice");
}

static void a_list_without_stations_is_refused(void **state) {
    assert_told(state, LAKE "stations: []\n",
                "a.yaml:4:11: 'stations' should be a list of 1 to 1000 "
                "stations such as [{name: North quay, at: 0.4 km}]");
}

static void a_list_without_thresholds_is_refused(void **state) {
    assert_told(state, LAKE "stations: [{name: a, at: 1 km, above: []}]\n",
                "a.yaml:4:39: 'stations[1].above' is an empty list; expected "
                "one level at least");
}

static void each_threshold_of_a_list_is_checked(void **state) {
    assert_told(state,
                LAKE "stations: [{name: a, at: 1 km, above: [101 m, 102]}]\n",
                "a.yaml:4:47: 'stations[1].above' cannot be read: '102' has "
                "no unit; write 102 m");
}

static void a_position_has_two_coordinates(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "stations: [{name: a, at: 1 km, lon: 8 degree}]\n",
             "a.yaml:4:32: 'lon' needs 'lat', which is missing from "
             "'stations[1]'"),
        SLIP(
            LAKE "stations: [{name: a, at: 1 km, lat: 91 degree, lon: 8 "
                 "degree}]\n",
            "a.yaml:4:37: 'stations[1].lat' is '91 degree'; expected -90 to 90 "
            "degree"),
    };
    assert_all_told(state, slips);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        CASE_TEST(a_station_off_the_axis_is_refused_with_both_ends),
        CASE_TEST(a_station_at_either_end_is_on_the_axis),
        CASE_TEST(a_name_given_twice_is_refused),
        CASE_TEST(a_list_without_stations_is_refused),
        CASE_TEST(a_list_without_thresholds_is_refused),
        CASE_TEST(each_threshold_of_a_list_is_checked),
        CASE_TEST(a_position_has_two_coordinates),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
