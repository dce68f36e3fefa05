/* A record is brought to 10 m over water sample by sample, and what was done
 * is counted. */
#include "support/check.h"

#include <stdlib.h>

#include "leewater/exposure.h"

enum { HOUR = 3600, N = 5 };

static const lee_drag_input fluids = {.air_density = 1.225,
                                      .water_density = 1000.0,
                                      .gravity = 9.80665,
                                      .air_viscosity = 1.46e-5};
static const lee_gap_rule rule = {.largest = 2 * HOUR};
static const double pi = 3.14159265358979323846;

/* Hourly winds from the west: calm, 6, missing, 10, 14 m/s. */
static lee_wind_record winds(void) {
    static const double speed[N] = {0.0, 6.0, NAN, 10.0, 14.0};
    lee_wind_record record;
    assert_int_equal(lee_wind_record_init(&record, N, NULL), LEE_OK);
    record.stamp = LEE_STAMP_END;
    for (size_t i = 0; i < N; i++) {
        record.time[i] = (int64_t)i * HOUR;
        record.east[i] = speed[i];
        record.north[i] = isnan(speed[i]) ? NAN : 0.0;
    }
    return record;
}

static void warm(lee_wind_record *record, const double air[N]) {
    record->air_temperature = calloc(N, sizeof *record->air_temperature);
    record->water_temperature = calloc(N, sizeof *record->water_temperature);
    assert_non_null(record->air_temperature);
    assert_non_null(record->water_temperature);
    for (size_t i = 0; i < N; i++) {
        record->air_temperature[i] = air[i];
        record->water_temperature[i] = 280.0;
    }
}

static lee_exposure_summary correct(const lee_exposure *exposure,
                                    const lee_wind_record *record,
                                    lee_wind_record *corrected) {
    const lee_drag drag = lee_drag_default();
    const lee_exposure_task task = {exposure, &drag, &fluids,
                                    record,   &rule, HOUR};
    lee_exposure_summary summary;
    assert_int_equal(lee_exposure_record(&task, corrected, &summary, NULL),
                     LEE_OK);
    return summary;
}

static void nothing_to_correct_leaves_every_bit(void **state) {
    (void)state;
    const lee_exposure exposure = lee_exposure_default();
    lee_wind_record record = winds();
    lee_wind_record same;
    (void)correct(&exposure, &record, &same);
    assert_int_equal(same.n, N);
    assert_int_equal(same.stamp, LEE_STAMP_END);
    for (size_t i = 0; i < N; i++) {
        assert_int_equal(same.time[i], record.time[i]);
        assert_true(isnan(same.east[i]) == isnan(record.east[i]));
        assert_true(isnan(same.east[i]) || same.east[i] == record.east[i]);
        assert_true(isnan(same.north[i]) || same.north[i] == record.north[i]);
    }
    lee_wind_record_free(&same);
    lee_wind_record_free(&record);
}

/* From 270 degrees and 30 more: from 300, toward 120. */
static void the_offset_turns_the_record_once(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.direction_offset = pi / 6.0;
    lee_wind_record record = winds();
    lee_wind_record turned;
    record.east[3] = 0.0;
    record.north[3] = 10.0;
    (void)correct(&exposure, &record, &turned);
    /* from 180 and 30 more: from 210, toward 30 */
    assert_near(turned.east[3], 5.0, 1e-13);
    assert_near(turned.north[3], 10.0 * cos(pi / 6.0), 1e-13);
    assert_near(turned.east[4], 14.0 * sin(pi * 120.0 / 180.0), 1e-13);
    assert_near(turned.north[4], 14.0 * cos(pi * 120.0 / 180.0), 1e-13);
    lee_wind_record_free(&turned);
    lee_wind_record_free(&record);
}

static void each_sample_is_what_the_chain_gives(void **state) {
    (void)state;
    static const double air[N] = {280.0, 272.0, 280.0, 280.0, 290.0};
    lee_exposure exposure = lee_exposure_default();
    exposure.height = 4.0;
    exposure.stability = LEE_STABILITY_MONIN_OBUKHOV;
    const lee_drag drag = lee_drag_default();
    lee_wind_record record = winds();
    warm(&record, air);
    lee_wind_record water;
    (void)correct(&exposure, &record, &water);
    for (size_t i = 0; i < N; i++) {
        const lee_exposure_sample sample = {record.east[i], air[i], 280.0};
        const double u10 =
            lee_exposure_speed(&exposure, &drag, &fluids, &sample);
        assert_true(isnan(u10) == isnan(water.east[i]));
        assert_true(isnan(u10) || fabs(water.east[i] - u10) <= 1e-14 * u10);
    }
    lee_wind_record_free(&water);
    lee_wind_record_free(&record);
}

/* R_T at -5, 0 and 10 K (fit to SPM 1984 fig. 3-14): 1.12701, 1, 0.834590. */
static void the_spread_is_over_winds_that_are_no_calm(void **state) {
    (void)state;
    static const double air[N] = {250.0, 275.0, 250.0, 280.0, 290.0};
    lee_exposure exposure = lee_exposure_default();
    exposure.stability = LEE_STABILITY_RATIO;
    lee_wind_record record = winds();
    warm(&record, air);
    const lee_exposure_summary summary = correct(&exposure, &record, NULL);
    const lee_link_spread *spread = &summary.link[LEE_LINK_STABILITY];
    assert_int_equal(summary.winds, 3);
    assert_near(spread->least, 0.834590, 0.5e-6);
    assert_near(spread->median, 1.0, 0.0);
    assert_near(spread->greatest, 1.12701, 0.5e-5);
    assert_int_equal(spread->missing, 0);
    assert_int_equal(spread->extrapolated, 0);
    lee_wind_record_free(&record);
}

/* The gap rule bridges 2 h beyond the step, and nothing before the first. */
static void winds_without_temperature_are_counted_and_kept(void **state) {
    (void)state;
    static const double air[N] = {NAN, NAN, NAN, 270.0, 270.0};
    lee_exposure exposure = lee_exposure_default();
    exposure.stability = LEE_STABILITY_RATIO;
    lee_wind_record record = winds();
    warm(&record, air);
    lee_wind_record water;
    const lee_exposure_summary summary = correct(&exposure, &record, &water);
    assert_int_equal(summary.link[LEE_LINK_STABILITY].missing, 1);
    assert_near(water.east[1], 6.0, 0.0);
    assert_near(water.east[3], 11.6541, 0.5e-4);
    lee_wind_record_free(&water);
    lee_wind_record_free(&record);
}

static void samples_outside_a_source_are_counted(void **state) {
    (void)state;
    lee_exposure exposure = lee_exposure_default();
    exposure.is_over_land = true;
    exposure.land_roughness = 0.03;
    exposure.to_water_method = LEE_TO_WATER_HSU_1980;
    lee_wind_record record = winds();
    record.east[1] = 2.0;
    const lee_exposure_summary summary = correct(&exposure, &record, NULL);
    assert_int_equal(summary.link[LEE_LINK_TO_WATER].extrapolated, 1);
    assert_near_share(summary.link[LEE_LINK_TO_WATER].greatest, 3.0 / cbrt(3.0),
                      1e-14);
    assert_near_share(summary.link[LEE_LINK_TO_WATER].least, 3.0 / cbrt(14.0),
                      1e-14);
    lee_wind_record_free(&record);
}

static void a_record_of_calms_has_no_spread(void **state) {
    (void)state;
    const lee_exposure exposure = lee_exposure_default();
    lee_wind_record record = winds();
    for (size_t i = 0; i < N; i++) {
        record.east[i] = 0.0;
        record.north[i] = 0.0;
    }
    const lee_exposure_summary summary = correct(&exposure, &record, NULL);
    assert_int_equal(summary.winds, 0);
    assert_true(isnan(summary.link[LEE_LINK_HEIGHT].median));
    lee_wind_record_free(&record);
}

static void the_chain_tells_the_spread_of_its_record(void **state) {
    (void)state;
    static const double air[N] = {280.0, 275.0, 280.0, 280.0, 290.0};
    lee_exposure exposure = lee_exposure_default();
    exposure.stability = LEE_STABILITY_RATIO;
    const lee_drag drag = lee_drag_default();
    lee_wind_record record = winds();
    warm(&record, air);
    const lee_exposure_task task = {&exposure, &drag, &fluids,
                                    &record,   &rule, HOUR};
    const lee_exposure_summary summary = correct(&exposure, &record, NULL);
    const lee_exposure_sample last = lee_exposure_sample_of(&task, 4);
    lee_correction chain[LEE_CORRECTIONS];
    assert_int_equal(
        lee_exposure_chain(&exposure, &drag, &fluids, &last, &summary, chain),
        1);
    assert_near(last.air_temperature, 290.0, 0.0);
    assert_near(chain[0].factor, chain[0].spread.least, 0.0);
    assert_near(chain[0].spread.greatest, 1.12701, 0.5e-5);
    lee_wind_record_free(&record);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(nothing_to_correct_leaves_every_bit),
        cmocka_unit_test(the_offset_turns_the_record_once),
        cmocka_unit_test(each_sample_is_what_the_chain_gives),
        cmocka_unit_test(the_spread_is_over_winds_that_are_no_calm),
        cmocka_unit_test(winds_without_temperature_are_counted_and_kept),
        cmocka_unit_test(samples_outside_a_source_are_counted),
        cmocka_unit_test(a_record_of_calms_has_no_spread),
        cmocka_unit_test(the_chain_tells_the_spread_of_its_record),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
