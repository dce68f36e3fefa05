/* An axis is read as it was meant, or refused with its place. */
#include "support/files.h"

#include "leewater/basin.h"

static lee_status read_text(const char *text, lee_profile *profile,
                            lee_error *error) {
    const char *path = folder_write(&folder, "axis.csv", text);
    return lee_profile_read_csv(path, 0.5, 100.0, profile, error);
}

/* The message without the folder, which has a random name. */
static void refuses(const char *text, lee_status status, const char *message) {
    lee_profile profile;
    lee_error error = {0};
    assert_int_equal(read_text(text, &profile, &error), status);
    const char *place = strstr(error.message, "axis.csv");
    assert_non_null(place);
    assert_string_equal(place, message);
}

static void columns_are_found_in_any_order_and_brought_to_si(void **state) {
    (void)state;
    lee_profile profile;
    assert_int_equal(
        read_text("width [km];bed [ft];bearing [degree];chainage [km]\n"
                  "1,5;300;90;0\n0,5;310;180;2,5\n",
                  &profile, NULL),
        LEE_OK);
    assert_int_equal(profile.n, 2);
    assert_near(profile.chainage[1], 2500.0, 1e-9); /* rounding of factors */
    assert_near(profile.bed[0], 300.0 * 0.3048, 1e-9);
    assert_near(profile.width[1], 500.0, 1e-9);
    assert_near(profile.bearing[1], 3.14159265358979, 1e-12);
    lee_profile_free(&profile);
}

static void rows_without_a_bearing_take_the_axis_bearing(void **state) {
    (void)state;
    lee_profile profile;
    assert_int_equal(
        read_text("chainage [m],bed [m],width [m]\n0,95,10\n9,96,10\n",
                  &profile, NULL),
        LEE_OK);
    assert_near(profile.bearing[0], 0.5, 0.0);
    lee_profile_free(&profile);
}

static void a_depth_counts_down_from_still_water(void **state) {
    (void)state;
    lee_profile profile;
    assert_int_equal(
        read_text("chainage [m],depth [m],width [m]\n0,5,10\n9,0,10\n",
                  &profile, NULL),
        LEE_OK);
    assert_near(profile.bed[0], 95.0, 0.0);
    assert_near(profile.bed[1], 100.0, 0.0);
    lee_profile_free(&profile);
}

static void a_negative_depth_is_refused_with_its_place(void **state) {
    (void)state;
    refuses("chainage [m],depth [m],width [m]\n0,5,10\n9,-1,10\n",
            LEE_ERR_FORMAT,
            "axis.csv:3:3: depth -1 m is negative; land above the still water "
            "is told as 'bed'");
}

static void a_repeated_chainage_is_refused_with_its_place(void **state) {
    (void)state;
    refuses("chainage [m],bed [m],width [m]\n0,1,10\n5,1,10\n5,1,10\n",
            LEE_ERR_FORMAT,
            "axis.csv:4:1: chainage 5 m does not lie beyond the row before "
            "it, 5 m");
}

static void a_chainage_that_falls_is_refused_with_its_place(void **state) {
    (void)state;
    refuses("bed [m],chainage [m],width [m]\n1,0,10\n1,5,10\n1,3,10\n",
            LEE_ERR_FORMAT,
            "axis.csv:4:3: chainage 3 m does not lie beyond the row before "
            "it, 5 m");
}

static void a_width_of_nothing_is_refused(void **state) {
    (void)state;
    refuses("chainage [m],bed [m],width [m]\n0,1,10\n5,1,0\n", LEE_ERR_FORMAT,
            "axis.csv:3:5: width 0 m is not positive");
}

static void a_column_without_a_unit_is_refused_with_a_hint(void **state) {
    (void)state;
    refuses("chainage [m],bed,width [m]\n0,1,10\n5,1,10\n", LEE_ERR_FORMAT,
            "axis.csv:1: column 'bed' has no unit; write it in the header, as "
            "in \"bed [m]\"");
}

static void a_unit_of_another_kind_is_refused(void **state) {
    (void)state;
    refuses("chainage [m],bed [kg],width [m]\n0,1,10\n5,1,10\n", LEE_ERR_FORMAT,
            "axis.csv:1: column 'bed': unit 'kg' cannot be converted to m");
}

static void bed_and_depth_exclude_each_other(void **state) {
    (void)state;
    refuses("chainage [m],bed [m],depth [m],width [m]\n0,1,1,10\n",
            LEE_ERR_FORMAT,
            "axis.csv:1: columns 'bed' and 'depth' exclude each other");
}

static void a_bearing_off_the_compass_is_refused(void **state) {
    (void)state;
    refuses("chainage [m],bed [m],width [m],bearing [degree]\n0,1,10,361\n",
            LEE_ERR_FORMAT,
            "axis.csv:2:8: bearing 361 degree is not in [0, 360]");
}

static void one_row_is_no_axis(void **state) {
    (void)state;
    refuses("chainage [m],bed [m],width [m]\n0,1,10\n", LEE_ERR_DATA,
            "axis.csv: an axis needs two rows at least, found 1");
}

static void no_bearing_anywhere_is_refused(void **state) {
    (void)state;
    lee_profile profile;
    lee_error error = {0};
    const char *path = folder_write(
        &folder, "axis.csv", "chainage [m],bed [m],width [m]\n0,1,9\n5,1,9\n");
    assert_int_equal(lee_profile_read_csv(path, NAN, 0.0, &profile, &error),
                     LEE_ERR_FORMAT);
    assert_non_null(strstr(error.message, "no bearing of the axis"));
}

static void a_depth_without_one_still_water_is_refused(void **state) {
    (void)state;
    lee_profile profile;
    lee_error error = {0};
    const char *path =
        folder_write(&folder, "axis.csv",
                     "chainage [m],depth [m],width [m]\n0,1,9\n5,1,9\n");
    assert_int_equal(lee_profile_read_csv(path, 0.0, NAN, &profile, &error),
                     LEE_ERR_FORMAT);
    assert_non_null(strstr(error.message, "needs one still-water level"));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(columns_are_found_in_any_order_and_brought_to_si),
        cmocka_unit_test(rows_without_a_bearing_take_the_axis_bearing),
        cmocka_unit_test(a_depth_counts_down_from_still_water),
        cmocka_unit_test(a_negative_depth_is_refused_with_its_place),
        cmocka_unit_test(a_repeated_chainage_is_refused_with_its_place),
        cmocka_unit_test(a_chainage_that_falls_is_refused_with_its_place),
        cmocka_unit_test(a_width_of_nothing_is_refused),
        cmocka_unit_test(a_column_without_a_unit_is_refused_with_a_hint),
        cmocka_unit_test(a_unit_of_another_kind_is_refused),
        cmocka_unit_test(bed_and_depth_exclude_each_other),
        cmocka_unit_test(a_bearing_off_the_compass_is_refused),
        cmocka_unit_test(one_row_is_no_axis),
        cmocka_unit_test(no_bearing_anywhere_is_refused),
        cmocka_unit_test(a_depth_without_one_still_water_is_refused),
    };
    return cmocka_run_group_tests(tests, make_folder, remove_folder);
}
