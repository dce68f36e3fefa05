/* A profile is read between its rows, and its integrals are exact. */
#include "support/check.h"

#include <stdio.h>
#include <string.h>

#include "leewater/basin.h"

/* A beach that falls from +1 m to -3 m, a plain of 3 m, a wall. */
static const double chainage[] = {0.0, 4000.0, 10000.0};
static const double bed[] = {1.0, -3.0, -3.0};
static const double width[] = {200.0, 600.0, 600.0};
static const double bearing[] = {0.5, 1.0, 2.0};

static lee_profile dig(void) {
    lee_profile profile;
    assert_int_equal(lee_profile_init(&profile, 3, NULL), LEE_OK);
    memcpy(profile.chainage, chainage, sizeof chainage);
    memcpy(profile.bed, bed, sizeof bed);
    memcpy(profile.width, width, sizeof width);
    memcpy(profile.bearing, bearing, sizeof bearing);
    return profile;
}

static void bed_and_width_are_linear_between_rows(void **state) {
    (void)state;
    lee_profile profile = dig();
    assert_near(lee_profile_bed(&profile, 1000.0), 0.0, 1e-12);
    assert_near(lee_profile_width(&profile, 1000.0), 300.0, 1e-9);
    assert_near(lee_profile_bed(&profile, 4000.0), -3.0, 0.0);
    assert_near(lee_profile_bed(&profile, 7000.0), -3.0, 0.0);
    lee_profile_free(&profile);
}

static void beyond_the_axis_the_end_rows_hold(void **state) {
    (void)state;
    lee_profile profile = dig();
    assert_near(lee_profile_bed(&profile, -50.0), 1.0, 0.0);
    assert_near(lee_profile_width(&profile, -50.0), 200.0, 0.0);
    assert_near(lee_profile_bed(&profile, 10050.0), -3.0, 0.0);
    assert_near(lee_profile_width(&profile, 10050.0), 600.0, 0.0);
    lee_profile_free(&profile);
}

static void a_bearing_holds_to_the_next_row(void **state) {
    (void)state;
    lee_profile profile = dig();
    assert_near(lee_profile_bearing(&profile, -1.0), 0.5, 0.0);
    assert_near(lee_profile_bearing(&profile, 3999.0), 0.5, 0.0);
    assert_near(lee_profile_bearing(&profile, 4000.0), 1.0, 0.0);
    lee_profile_free(&profile);
}

static void the_last_stretch_keeps_its_bearing_to_the_end(void **state) {
    (void)state;
    lee_profile profile = dig();
    assert_near(lee_profile_bearing(&profile, 10000.0), 1.0, 0.0);
    lee_profile_free(&profile);
}

/* Below level 0: the beach is wet from 1000 m, depth 0 to 3 m, width 300 to
 * 600 m: area 3000 (300 + 600)/2 = 1.35e6 m2; volume, by hand,
 * 3000/6 (0 + 0 + 3*300 + 2*3*600) = 2.25e6 m3. The plain adds 3.6e6 m2 and
 * 10.8e6 m3. */
static void the_summary_integrates_a_partly_dry_beach_exactly(void **state) {
    (void)state;
    lee_profile profile = dig();
    const lee_basin_summary all = lee_profile_summary(&profile, 0.0);
    assert_near(all.wet_length, 9000.0, 1e-9);
    assert_near(all.area, 4.95e6, 1e-6);
    assert_near(all.volume, 13.05e6, 1e-5);
    assert_near(all.mean_depth, 13.05 / 4.95, 1e-12);
    assert_near(all.max_depth, 3.0, 1e-15);
    lee_profile_free(&profile);
}

static void the_summary_of_a_mirrored_lake_is_the_same(void **state) {
    (void)state;
    lee_profile profile = dig();
    const lee_basin_summary all = lee_profile_summary(&profile, 0.25);
    for (size_t i = 0; i < 3; i++) {
        profile.chainage[i] = -chainage[2 - i];
        profile.bed[i] = bed[2 - i];
        profile.width[i] = width[2 - i];
    }
    const lee_basin_summary mirrored = lee_profile_summary(&profile, 0.25);
    assert_near_share(mirrored.volume, all.volume, 1e-14);
    assert_near_share(mirrored.area, all.area, 1e-14);
    assert_near_share(mirrored.wet_length, all.wet_length, 1e-14);
    lee_profile_free(&profile);
}

/* Below level 0 a bed from -1 over 2 to -3 m parts two waters: of 4000/3 m, and
 * from 4000 + 6000 2/5 m on, 3600 m of width 600 m whose depth grows to 3 m. */
static void the_longest_water_is_told_alone(void **state) {
    (void)state;
    lee_profile profile = dig();
    profile.bed[0] = -1.0;
    profile.bed[1] = 2.0;
    const lee_basin_summary longest = lee_profile_longest_water(&profile, 0.0);
    assert_near(longest.wet_length, 3600.0, 1e-9);
    assert_near(longest.area, 3600.0 * 600.0, 1e-6);
    assert_near(longest.mean_depth, 1.5, 1e-12);
    assert_near(longest.max_depth, 3.0, 1e-15);
    profile.bed[2] = 1.0;
    const lee_basin_summary first = lee_profile_longest_water(&profile, 0.0);
    assert_near(first.wet_length, 4000.0 / 3.0, 1e-9);
    lee_profile_free(&profile);
}

static void a_lake_in_one_piece_is_its_own_longest_water(void **state) {
    (void)state;
    lee_profile profile = dig();
    const lee_basin_summary all = lee_profile_summary(&profile, 0.0);
    const lee_basin_summary longest = lee_profile_longest_water(&profile, 0.0);
    assert_near(longest.wet_length, all.wet_length, 0.0);
    assert_near(longest.volume, all.volume, 0.0);
    lee_profile_free(&profile);
}

static void a_level_below_the_bed_leaves_nothing(void **state) {
    (void)state;
    lee_profile profile = dig();
    const lee_basin_summary none = lee_profile_summary(&profile, -3.0);
    assert_near(none.wet_length, 0.0, 0.0);
    assert_near(none.volume, 0.0, 0.0);
    assert_near(none.mean_depth, 0.0, 0.0);
    lee_profile_free(&profile);
}

static void assert_refused(const lee_profile *profile, const char *message) {
    lee_error error = {0};
    assert_int_equal(lee_profile_check(profile, &error), LEE_ERR_DATA);
    assert_string_equal(error.message, message);
}

static void a_sound_profile_passes(void **state) {
    (void)state;
    lee_profile profile = dig();
    assert_int_equal(lee_profile_check(&profile, NULL), LEE_OK);
    lee_profile_free(&profile);
}

static void a_profile_of_one_row_is_refused(void **state) {
    (void)state;
    lee_profile profile = dig();
    profile.n = 1;
    assert_refused(&profile, "a profile needs two rows, this one has 1");
    lee_profile_free(&profile);
}

static void a_repeated_chainage_is_refused_and_named(void **state) {
    (void)state;
    lee_profile profile = dig();
    profile.chainage[2] = 4000.0;
    assert_refused(&profile, "chainage 4000 m in profile row 3 does not exceed "
                             "4000 m in the row before");
    lee_profile_free(&profile);
}

static void a_width_of_nothing_is_refused_and_named(void **state) {
    (void)state;
    lee_profile profile = dig();
    profile.width[1] = 0.0;
    assert_refused(&profile,
                   "width 0 m in profile row 2 is not positive and finite");
    profile.width[1] = NAN;
    assert_int_equal(lee_profile_check(&profile, NULL), LEE_ERR_DATA);
    lee_profile_free(&profile);
}

static void a_bed_that_is_not_a_number_is_refused_and_named(void **state) {
    (void)state;
    lee_profile profile = dig();
    profile.bed[0] = NAN;
    assert_refused(&profile, "profile row 1 holds a number that is not finite");
    lee_profile_free(&profile);
}

static void a_freed_profile_may_be_freed_again(void **state) {
    (void)state;
    lee_profile profile = dig();
    lee_profile_free(&profile);
    lee_profile_free(&profile);
    assert_null(profile.chainage);
    assert_int_equal(profile.n, 0);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(bed_and_width_are_linear_between_rows),
        cmocka_unit_test(beyond_the_axis_the_end_rows_hold),
        cmocka_unit_test(a_bearing_holds_to_the_next_row),
        cmocka_unit_test(the_last_stretch_keeps_its_bearing_to_the_end),
        cmocka_unit_test(the_summary_integrates_a_partly_dry_beach_exactly),
        cmocka_unit_test(the_summary_of_a_mirrored_lake_is_the_same),
        cmocka_unit_test(the_longest_water_is_told_alone),
        cmocka_unit_test(a_lake_in_one_piece_is_its_own_longest_water),
        cmocka_unit_test(a_level_below_the_bed_leaves_nothing),
        cmocka_unit_test(a_sound_profile_passes),
        cmocka_unit_test(a_profile_of_one_row_is_refused),
        cmocka_unit_test(a_repeated_chainage_is_refused_and_named),
        cmocka_unit_test(a_width_of_nothing_is_refused_and_named),
        cmocka_unit_test(a_bed_that_is_not_a_number_is_refused_and_named),
        cmocka_unit_test(a_freed_profile_may_be_freed_again),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
