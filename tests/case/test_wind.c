/* The wind of a case: a record, given winds, a scan, a storm. */
#include "support/case_text.h"

static const double pi = 3.14159265358979323846;

static void one_wind_is_given_outright(void **state) {
    lee_case c =
        read_case(state, LAKE
                  "wind: {speed: 36 km/h, from: 240 degree, duration: 6 h}\n");
    const lee_wind_source *wind = &c.problem.wind;
    assert_int_equal(wind->kind, LEE_WIND_GIVEN);
    assert_int_equal(wind->given_count, 1);
    assert_near(wind->given[0].speed, 10.0, 1e-14);
    assert_near(wind->given[0].from, 240.0 * pi / 180.0, 1e-15);
    assert_near(wind->given[0].duration, 21600.0, 0.0);
    lee_case_free(&c);
}

static void a_duration_may_stay_open(void **state) {
    lee_case c =
        read_case(state, LAKE "wind: {speed: 5 m/s, from: 0 degree}\n");
    assert_true(isnan(c.problem.wind.given[0].duration));
    lee_case_free(&c);
}

static void a_scan_has_a_speed_and_directions(void **state) {
    lee_case c =
        read_case(state, LAKE "wind: {speed: 22 m/s, directions: 36}\n");
    const lee_wind_source *wind = &c.problem.wind;
    assert_int_equal(wind->kind, LEE_WIND_SCAN);
    assert_int_equal(wind->directions, 36);
    assert_int_equal(wind->given_count, 1);
    assert_near(wind->given[0].speed, 22.0, 0.0);
    lee_case_free(&c);
}

static void a_list_of_winds_keeps_its_order(void **state) {
    lee_case c = read_case(
        state, LAKE "wind:\n  winds:\n"
                    "    - {speed: 10 m/s, from: 90 degree}\n"
                    "    - {speed: 20 m/s, from: 180 degree, duration: 1 h}\n");
    const lee_wind_source *wind = &c.problem.wind;
    assert_int_equal(wind->kind, LEE_WIND_GIVEN);
    assert_int_equal(wind->given_count, 2);
    assert_near(wind->given[0].from, pi / 2.0, 1e-15);
    assert_near(wind->given[1].speed, 20.0, 0.0);
    assert_near(wind->given[1].duration, 3600.0, 0.0);
    assert_true(isnan(wind->given[0].duration));
    lee_case_free(&c);
}

static void a_storm_is_built(void **state) {
    lee_case c = read_case(
        state, LAKE "storm: {peak: 25 m/s, from: 240 degree, turn: -40 degree, "
                    "rise: 3 h, hold: 6 h, fall: 4 h, before: 5 m/s, after: "
                    "2 m/s}\n");
    const lee_storm *storm = &c.problem.wind.storm;
    assert_int_equal(c.problem.wind.kind, LEE_WIND_STORM);
    assert_near(storm->peak, 25.0, 0.0);
    assert_near(storm->from, 240.0 * pi / 180.0, 1e-15);
    assert_near(storm->turn, -40.0 * pi / 180.0, 1e-15);
    assert_near(storm->rise, 10800.0, 0.0);
    assert_near(storm->hold, 21600.0, 0.0);
    assert_near(storm->fall, 14400.0, 0.0);
    assert_near(storm->before, 5.0, 0.0);
    assert_near(storm->after, 2.0, 0.0);
    lee_case_free(&c);
}

static void a_storm_may_stand_beside_its_exposure(void **state) {
    lee_case c = read_case(state, LAKE
                           "storm: {peak: 25 m/s, from: 240 degree, rise: 3 h, "
                           "fall: 4 h}\nwind: {height: 20 m}\n");
    assert_int_equal(c.problem.wind.kind, LEE_WIND_STORM);
    assert_near(c.problem.exposure.height, 20.0, 0.0);
    assert_near(c.problem.wind.storm.hold, 0.0, 0.0);
    assert_near(c.problem.wind.storm.turn, 0.0, 0.0);
    lee_case_free(&c);
}

static void a_storm_that_cannot_be_is_refused(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "storm: {peak: 5 m/s, from: 4 degree, rise: 1 h, fall: 1 h,\n"
                  "before: 6 m/s, after: 7 m/s}\n",
             "a.yaml:5:9: 'storm.before' is faster than the peak\n"
             "a.yaml:5:23: 'storm.after' is faster than the peak"),
        SLIP(LAKE
             "storm: {peak: 5 m/s, from: 4 degree, rise: 0 h, fall: 0 h}\n",
             "a.yaml:4:8: 'storm' takes no time: rise, hold and fall are all "
             "zero"),
    };
    assert_all_told(state, slips);
}

static void a_case_has_one_wind(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "wind: {record: a.csv, winds: [{speed: 1 m/s, from: "
                  "1 degree}]}\n",
             "a.yaml:4:23: 'record' and 'winds' exclude each other in 'wind'"),
        SLIP(LAKE "wind: {record: a.csv, directions: 36}\n",
             "a.yaml:4:23: 'directions' needs 'speed', which is missing from "
             "'wind'\n"
             "a.yaml:4:23: 'record' and 'directions' exclude each other in "
             "'wind'"),
        SLIP(LAKE "wind: {speed: 1 m/s, from: 1 degree, directions: 36}\n",
             "a.yaml:4:38: 'from' and 'directions' exclude each other in "
             "'wind'"),
        SLIP(LAKE
             "wind: {speed: 1 m/s, from: 1 degree}\n"
             "storm: {peak: 5 m/s, from: 4 degree, rise: 1 h, fall: 1 h}\n",
             "a.yaml:5:8: 'storm' and 'wind.speed' exclude each other"),
        SLIP(LAKE
             "wind: {record: a.csv}\n"
             "storm: {peak: 5 m/s, from: 4 degree, rise: 1 h, fall: 1 h}\n",
             "a.yaml:5:8: 'storm' and 'wind.record' exclude each other"),
    };
    assert_all_told(state, slips);
}

static void half_a_wind_is_refused(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "wind: {height: 10 m}\n",
             "a.yaml:4:7: 'wind' needs one of the keys 'record', 'speed' and "
             "'winds', or a 'storm' beside it"),
        SLIP(LAKE "wind: {speed: 10 m/s}\n",
             "a.yaml:4:15: 'wind.speed' needs one of the keys 'from' and "
             "'directions'"),
        SLIP(LAKE "wind: {from: 10 degree}\n",
             "a.yaml:4:14: 'wind.from' needs one of the keys 'speed' and "
             "'record'"),
        SLIP(LAKE "wind: {winds: []}\n",
             "a.yaml:4:15: 'wind.winds' should be a list of winds such as "
             "[{speed: 20 m/s, from: 240 degree}]"),
        SLIP(
            LAKE "wind: {winds: [{speed: 20 m/s}]}\n",
            "a.yaml:4:16: required key 'from' is missing from 'wind.winds[1]'"),
    };
    assert_all_told(state, slips);
}

static void keys_of_a_record_need_the_record(void **state) {
    assert_told(state,
                LAKE "wind: {speed: 10 m/s, from: 10 degree,\n"
                     "stamp: end, gaps: split}\n",
                "a.yaml:5:1: 'stamp' needs 'record', which is missing from "
                "'wind'\n"
                "a.yaml:5:13: 'gaps' needs 'record', which is missing from "
                "'wind'");
}

static void times_of_a_record_are_told_in_one_way(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "wind: {record: a.csv, time: t, date: d, clock: c}\n",
             "a.yaml:4:32: 'time' and 'date' exclude each other in 'wind'"),
        SLIP(LAKE "wind: {record: a.csv, date: d}\n",
             "a.yaml:4:23: 'date' needs 'clock', which is missing from 'wind'"),
        SLIP(LAKE "wind: {record: a.csv, year: y, month: m}\n",
             "a.yaml:4:32: 'month' needs 'day', which is missing from 'wind'"),
        SLIP(LAKE "wind: {record: a.csv, eastward: u}\n",
             "a.yaml:4:23: 'eastward' needs 'northward', which is missing from "
             "'wind'"),
        SLIP(LAKE
             "wind: {record: a.csv, speed: s, eastward: u, northward: v}\n",
             "a.yaml:4:33: 'speed' and 'eastward' exclude each other in "
             "'wind'\n"
             "a.yaml:4:46: 'speed' and 'northward' exclude each other in "
             "'wind'"),
    };
    assert_all_told(state, slips);
}

static void units_of_columns_are_checked_in_the_case(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "wind: {record: a.csv, speed: {column: s, unit: kg}}\n",
             "a.yaml:4:48: 'wind.speed' cannot be read: unit 'kg' cannot be "
             "converted to m s-1"),
        SLIP(LAKE "wind: {record: a.csv, time: {column: t, unit: s}}\n",
             "a.yaml:4:47: 'wind.time' takes no unit"),
        SLIP(LAKE "wind: {record: a.csv, speed: {unit: knots}}\n",
             "a.yaml:4:30: required key 'column' is missing from 'wind.speed'"),
    };
    assert_all_told(state, slips);
}

static void usual_names_stand_for_columns_not_named(void **state) {
    folder_write(*state, "w.csv",
                 "time,speed [m/s],from [degree]\n2031-01-10T00:00Z,5,180\n");
    lee_case c = read_case(state, LAKE "wind: {record: w.csv}\n");
    assert_int_equal(c.problem.wind.record.n, 1);
    assert_near(c.problem.wind.record.north[0], 5.0, 1e-14);
    lee_case_free(&c);
}

static void columns_of_any_name_are_read(void **state) {
    folder_write(*state, "w.csv",
                 "y;m;d;h;u;v;p\n31;1;10;6;3;-4;970\n31;1;10;7;x;x;970\n");
    lee_case c = read_case(
        state, LAKE "wind:\n  record: w.csv\n  year: y\n  month: m\n  day: d\n"
                    "  hour: h\n  century: 2000\n  utc_offset: \"+01:00\"\n"
                    "  eastward: {column: u, unit: knots}\n"
                    "  northward: {column: '#6', unit: knots}\n"
                    "  pressure: {column: p, unit: hPa}\n"
                    "  missing: [x, -999]\n");
    const lee_wind_record *record = &c.problem.wind.record;
    assert_int_equal(record->n, 2);
    /* 2031-01-10T05:00Z: 22289 days of 86400 s since 1970 and 5 h */
    assert_int_equal(record->time[0], 22289 * (int64_t)86400 + 5 * 3600);
    assert_near(record->east[0], 3.0 * 1852.0 / 3600.0, 1e-15);
    assert_near(record->north[0], -4.0 * 1852.0 / 3600.0, 1e-15);
    assert_true(isnan(record->east[1]));
    assert_near(record->pressure[0], 97000.0, 1e-9);
    lee_case_free(&c);
}

static void one_missing_code_needs_no_list(void **state) {
    folder_write(*state, "w.csv",
                 "time,speed [m/s],from [degree]\n2031-01-10T00:00Z,5,180\n"
                 "2031-01-10T01:00Z,99,99\n");
    lee_case c = read_case(state, LAKE "wind: {record: w.csv, missing: 99}\n");
    assert_true(isnan(c.problem.wind.record.east[1]));
    lee_case_free(&c);
}

static void a_direction_called_variable_is_read(void **state) {
    folder_write(*state, "w.csv",
                 "time,speed [m/s],from [degree]\n2031-01-10T00:00Z,5,180\n"
                 "2031-01-10T01:00Z,1,VRB\n");
    lee_case c =
        read_case(state, LAKE "wind: {record: w.csv, variable: VRB}\n");
    assert_int_equal(c.problem.wind.record.variable_calm, 1);
    lee_case_free(&c);
}

static void a_century_is_whole(void **state) {
    assert_told(state,
                LAKE "wind: {record: w.csv, year: y, month: m, day: d, "
                     "century: 1950}\n",
                "a.yaml:4:59: 'wind.century' is '1950'; expected a whole "
                "century such as 1900");
}

static void the_surface_is_water_or_land(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "wind: {speed: 1 m/s, from: 1 degree, over: ice}\n",
             "a.yaml:4:44: 'wind.over' should be water, or {land: "
             "{roughness_length: 0.03 m, to_water: 1.2}}"),
        SLIP(LAKE "wind: {speed: 1 m/s, from: 1 degree, over: {land: "
                  "{roughness_length: 3 cm}}}\n",
             "a.yaml:4:51: required key 'to_water' is missing from "
             "'wind.over.land'"),
        SLIP(LAKE "wind: {speed: 1 m/s, from: 1 degree, over: [water]}\n",
             "a.yaml:4:44: 'wind.over' should be water, or {land: "
             "{roughness_length: 0.03 m, to_water: 1.2}}"),
    };
    assert_all_told(state, slips);
}

static void a_wind_over_water_is_the_default(void **state) {
    lee_case c = read_case(
        state, LAKE "wind: {speed: 1 m/s, from: 1 degree, over: water}\n");
    assert_false(c.problem.exposure.is_over_land);
    lee_case_free(&c);
}

static void a_height_factor_goes_with_its_method(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE
             "wind: {speed: 1 m/s, from: 1 degree, height_method: factor}\n",
             "a.yaml:4:53: 'wind.height_method' is 'factor' and needs "
             "'height_factor'"),
        SLIP(LAKE "wind: {speed: 1 m/s, from: 1 degree, height_factor: 1.1}\n",
             "a.yaml:4:38: 'height_factor' needs 'height_method', which is "
             "missing from 'wind'"),
        SLIP(LAKE "wind: {speed: 1 m/s, from: 1 degree, height_method: log, "
                  "height_factor: 1.1}\n",
             "a.yaml:4:53: 'wind.height_method' and 'height_factor' exclude "
             "each other unless the method is 'factor'"),
    };
    assert_all_told(state, slips);
    lee_case c =
        read_case(state, LAKE "wind: {speed: 1 m/s, from: 1 degree, "
                              "height_method: factor, height_factor: 1.1}\n");
    assert_int_equal(c.problem.exposure.height_method, LEE_HEIGHT_FACTOR);
    assert_near(c.problem.exposure.height_factor, 1.1, 0.0);
    lee_case_free(&c);
}

static void a_maximum_needs_its_averaging(void **state) {
    assert_told(state,
                LAKE "wind: {speed: 1 m/s, from: 1 degree, maximum: true}\n",
                "a.yaml:4:38: 'maximum' needs 'averaging', which is missing "
                "from 'wind'");
    lee_case c = read_case(state, LAKE "wind: {speed: 1 m/s, from: 1 degree, "
                                       "maximum: true, averaging: 1 min}\n");
    assert_true(c.problem.exposure.is_maximum);
    assert_near(c.problem.exposure.averaging, 60.0, 0.0);
    lee_case_free(&c);
}

#define RECORD "wind: {record: wind.csv, "

static const char two_samples[] = "time,speed [m/s],from [degree]\n"
                                  "2031-01-01T00:00Z,8,250\n"
                                  "2031-01-01T01:00Z,9,250\n";

static void each_word_for_a_stamp_means_its_stamp(void **state) {
    static const struct {
        const char *text;
        lee_stamp stamp;
    } words[] = {
        {LAKE RECORD "stamp: instant}\n", LEE_STAMP_INSTANT},
        {LAKE RECORD "stamp: start}\n",   LEE_STAMP_START  },
        {LAKE RECORD "stamp: middle}\n",  LEE_STAMP_MIDDLE },
        {LAKE RECORD "stamp: end}\n",     LEE_STAMP_END    },
    };
    (void)folder_write(*state, "wind.csv", two_samples);
    for (size_t i = 0; i < sizeof words / sizeof words[0]; i++) {
        lee_case c = read_case(state, words[i].text);
        assert_int_equal(c.problem.wind.record.stamp, words[i].stamp);
        lee_case_free(&c);
    }
}

static void
a_gap_of_a_leap_year_may_be_bridged_and_no_longer_one(void **state) {
    (void)folder_write(*state, "wind.csv", two_samples);
    lee_case c = read_case(state, LAKE RECORD "largest_gap: 8784 h}\n");
    assert_int_equal(c.problem.wind.gap.largest, (int64_t)366 * 86400);
    lee_case_free(&c);
    assert_told(state, LAKE RECORD "largest_gap: 8785 h}\n",
                "a.yaml:4:39: 'wind.largest_gap' is '8785 h'; expected 0 to "
                "8784 h");
}

static void an_hour_needs_the_date_it_belongs_to(void **state) {
    assert_told(state, LAKE RECORD "time: time, hour: 3}\n",
                "a.yaml:4:38: 'hour' needs 'year', which is missing from "
                "'wind'");
}

static void a_clock_and_an_hour_exclude_each_other(void **state) {
    assert_told(state,
                LAKE RECORD "date: date, clock: clock, year: y, month: m, "
                            "day: d, hour: h}\n",
                "a.yaml:4:52: 'date' and 'year' exclude each other in 'wind'\n"
                "a.yaml:4:79: 'clock' and 'hour' exclude each other in "
                "'wind'");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        CASE_TEST(one_wind_is_given_outright),
        CASE_TEST(a_duration_may_stay_open),
        CASE_TEST(a_scan_has_a_speed_and_directions),
        CASE_TEST(a_list_of_winds_keeps_its_order),
        CASE_TEST(a_storm_is_built),
        CASE_TEST(a_storm_may_stand_beside_its_exposure),
        CASE_TEST(a_storm_that_cannot_be_is_refused),
        CASE_TEST(a_case_has_one_wind),
        CASE_TEST(half_a_wind_is_refused),
        CASE_TEST(keys_of_a_record_need_the_record),
        CASE_TEST(times_of_a_record_are_told_in_one_way),
        CASE_TEST(units_of_columns_are_checked_in_the_case),
        CASE_TEST(usual_names_stand_for_columns_not_named),
        CASE_TEST(columns_of_any_name_are_read),
        CASE_TEST(one_missing_code_needs_no_list),
        CASE_TEST(a_direction_called_variable_is_read),
        CASE_TEST(a_century_is_whole),
        CASE_TEST(the_surface_is_water_or_land),
        CASE_TEST(a_wind_over_water_is_the_default),
        CASE_TEST(a_height_factor_goes_with_its_method),
        CASE_TEST(a_maximum_needs_its_averaging),
        CASE_TEST(each_word_for_a_stamp_means_its_stamp),
        CASE_TEST(a_gap_of_a_leap_year_may_be_bridged_and_no_longer_one),
        CASE_TEST(an_hour_needs_the_date_it_belongs_to),
        CASE_TEST(a_clock_and_an_hour_exclude_each_other),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
