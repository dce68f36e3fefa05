/* Numbers for reading carry units, few decimals, and no surprise. */
#include "support/captured.h"

#include "output/print.h"

static const lee_printer si = {NULL, LEE_UNITS_SI};
static const lee_printer us = {NULL, LEE_UNITS_US};

static void levels_are_shown_to_the_millimetre(void **state) {
    (void)state;
    assert_string_equal(lee_show_length(&si, 0.41249).text, "0.412 m");
    assert_string_equal(lee_show_length(&si, -1.2).text, "-1.200 m");
}

/* 1 ft is 0.3048 m: 0.4 m is 1.312 ft. */
static void levels_are_shown_to_a_hundredth_of_a_foot(void **state) {
    (void)state;
    assert_string_equal(lee_show_length(&us, 0.4).text, "1.31 ft");
}

static void a_level_that_rounds_to_nothing_has_no_sign(void **state) {
    (void)state;
    assert_string_equal(lee_show_length(&si, -0.0004).text, "0.000 m");
    assert_string_equal(lee_show_length(&us, -0.001).text, "0.00 ft");
}

static void a_level_that_is_none_reads_dry(void **state) {
    (void)state;
    const lee_ranged dry = {(double)NAN, (double)NAN, (double)NAN};
    assert_string_equal(lee_show_length(&si, (double)NAN).text, "dry");
    assert_string_equal(lee_show_ranged(&si, &dry).text, "dry");
}

static void a_range_stands_behind_its_value(void **state) {
    (void)state;
    const lee_ranged level = {0.412, 0.31, 0.55};
    assert_string_equal(lee_show_ranged(&si, &level).text,
                        "0.412 m (0.310 to 0.550)");
    assert_string_equal(lee_show_range_only(&si, &level).text,
                        "(0.310 to 0.550)");
}

static void a_value_without_range_stands_alone(void **state) {
    (void)state;
    const lee_ranged level = {0.412, (double)NAN, (double)NAN};
    assert_string_equal(lee_show_ranged(&si, &level).text, "0.412 m");
    assert_string_equal(lee_show_range_only(&si, &level).text, "");
}

static void a_range_that_may_fall_dry_says_so(void **state) {
    (void)state;
    const lee_ranged level = {0.412, (double)NAN, 0.55};
    assert_string_equal(lee_show_ranged(&si, &level).text,
                        "0.412 m (dry to 0.550)");
}

/* 4 m is 13.123 ft. */
static void heights_have_no_zeros_at_the_end(void **state) {
    (void)state;
    assert_string_equal(lee_show_height(&si, 10.0).text, "10 m");
    assert_string_equal(lee_show_height(&si, 4.2564).text, "4.256 m");
    assert_string_equal(lee_show_height(&us, 4.0).text, "13.12 ft");
}

/* 0.51 mm is told as 0.5 mm, 0.00164 ft: notes and rows agree. */
static void
errors_are_shown_in_millimetres_or_small_parts_of_feet(void **state) {
    (void)state;
    assert_string_equal(lee_show_small(&si, 5.1e-4).text, "0.5 mm");
    assert_string_equal(lee_show_small(&us, 5.1e-4).text, "0.0016 ft");
}

/* 153.7289 m are 504.36 ft. */
static void a_large_error_is_no_crowd_of_millimetres(void **state) {
    (void)state;
    assert_string_equal(lee_show_small(&si, 153.7289).text, "153.73 m");
    assert_string_equal(lee_show_small(&us, 153.7289).text, "504.36 ft");
}

/* 1 mile is 1609.344 m. */
static void chainage_is_shown_in_kilometres_or_miles(void **state) {
    (void)state;
    assert_string_equal(lee_show_distance(&si, 11800.0).text, "11.80 km");
    assert_string_equal(lee_show_distance(&us, 1609344.0).text, "1000.00 mi");
}

/* 1 square mile is 2.589988 km2, an acre-foot 43560 cubic feet or 1233.482
 * m3: 25 km2 are 9.6526 mi2, 113.33e6 m3 are 91878 acre-feet. */
static void areas_and_volumes_take_the_units_of_the_trade(void **state) {
    (void)state;
    assert_string_equal(lee_show_area(&si, 25e6).text, "25 km2");
    assert_string_equal(lee_show_area(&us, 25e6).text, "9.653 mi2");
    assert_string_equal(lee_show_volume(&si, 113.33e6).text,
                        "113.33 million m3");
    assert_string_equal(lee_show_volume(&us, 113.33e6).text,
                        "91.878 thousand acre-feet");
}

/* 1 mph is 0.44704 m/s: 22 m/s is 49.21 mph. */
static void
speed_is_shown_in_metres_per_second_or_miles_per_hour(void **state) {
    (void)state;
    assert_string_equal(lee_show_speed(&si, 22.04).text, "22.0 m/s");
    assert_string_equal(lee_show_speed(&us, 22.0).text, "49.2 mph");
}

static void directions_stay_below_a_full_turn(void **state) {
    (void)state;
    const double degree = acos(-1.0) / 180.0;
    assert_string_equal(lee_show_direction(240.0 * degree).text, "240 degrees");
    assert_string_equal(lee_show_direction(359.7 * degree).text, "0 degrees");
    assert_string_equal(lee_show_direction(-90.0 * degree).text, "270 degrees");
}

static void directions_that_were_given_keep_their_tenth(void **state) {
    (void)state;
    const double degree = acos(-1.0) / 180.0;
    assert_string_equal(lee_show_bare_direction(22.5 * degree).text, "22.5");
    assert_string_equal(lee_show_bare_direction(67.5 * degree).text, "67.5");
    assert_string_equal(lee_show_bare_direction(240.0 * degree).text, "240");
    assert_string_equal(lee_show_bare_direction(359.97 * degree).text, "0");
    assert_string_equal(lee_show_bare_direction(-0.5 * degree).text, "359.5");
}

static void durations_take_the_two_units_that_tell(void **state) {
    (void)state;
    assert_string_equal(lee_show_duration(35.0).text, "35 s");
    assert_string_equal(lee_show_duration(45.0 * 60.0).text, "45 min");
    assert_string_equal(lee_show_duration(7800.0).text, "2 h 10 min");
    assert_string_equal(lee_show_duration(7200.0).text, "2 h");
    assert_string_equal(lee_show_duration(76.0 * 3600.0).text, "3 d 4 h");
    assert_string_equal(lee_show_duration((double)NAN).text, "not known");
}

/* Half a minute below the hour must not become "60 min". */
static void durations_round_across_the_hour(void **state) {
    (void)state;
    assert_string_equal(lee_show_duration(3599.0).text, "1 h");
}

static void width_counts_characters_not_bytes(void **state) {
    (void)state;
    assert_int_equal(lee_text_width("M\xC3\xBChle"), 5);
}

static void padding_fills_up_to_the_width(void **state) {
    (void)state;
    captured out;
    capture_begin(&out);
    const lee_printer to = {out.stream, LEE_UNITS_SI};
    lee_print_padded(&to, "M\xC3\xBChle", 7);
    lee_print_padded(&to, "longer than that", 7);
    assert_string_equal(capture_end(&out), "M\xC3\xBChle  longer than that");
    capture_free(&out);
}

static void control_bytes_of_a_file_do_not_reach_the_terminal(void **state) {
    (void)state;
    captured out;
    capture_begin(&out);
    const lee_printer to = {out.stream, LEE_UNITS_SI};
    lee_print_wrapped(&to, 0, "", "red \x1B[31m quay");
    lee_print_row(&to, "na\x07me", "%s", "a\nb");
    assert_string_equal(capture_end(&out),
                        "red ?[31m quay\n  na?me             a?b\n");
    capture_free(&out);
}

static void long_text_is_broken_at_blanks_before_column_80(void **state) {
    (void)state;
    captured out;
    capture_begin(&out);
    const lee_printer to = {out.stream, LEE_UNITS_SI};
    lee_print_wrapped(&to, 4, "- ",
                      "one two three four five six seven eight nine ten "
                      "eleven twelve thirteen fourteen fifteen");
    /* The first line holds 4 + 71 characters; "fourteen" would make 84. */
    assert_string_equal(capture_end(&out),
                        "  - one two three four five six seven eight nine ten "
                        "eleven twelve thirteen\n    fourteen fifteen\n");
    capture_free(&out);
}

static void a_number_stays_with_its_unit(void **state) {
    (void)state;
    captured out;
    capture_begin(&out);
    const lee_printer to = {out.stream, LEE_UNITS_SI};
    lee_print_wrapped(&to, 4, "- ",
                      "one two three four five six seven eight nine ten "
                      "eleven twelve thirteen 14 metres");
    /* "14" would end the first line at column 80. */
    assert_string_equal(capture_end(&out),
                        "  - one two three four five six seven eight nine ten "
                        "eleven twelve thirteen\n    14 metres\n");
    capture_free(&out);
}

static void numbers_alone_are_broken_at_any_blank(void **state) {
    (void)state;
    captured out;
    capture_begin(&out);
    const lee_printer to = {out.stream, LEE_UNITS_SI};
    lee_print_wrapped(&to, 0, "",
                      "1234567890123456789012345678901234567890 "
                      "1234567890123456789012345678901234567890");
    assert_string_equal(capture_end(&out),
                        "1234567890123456789012345678901234567890\n"
                        "1234567890123456789012345678901234567890\n");
    capture_free(&out);
}

static void a_word_longer_than_the_line_stays_whole(void **state) {
    (void)state;
    char word[121];
    memset(word, 'x', 120);
    word[120] = '\0';
    captured out;
    capture_begin(&out);
    const lee_printer to = {out.stream, LEE_UNITS_SI};
    lee_print_wrapped(&to, 0, "", word);
    assert_int_equal(strlen(capture_end(&out)), 121);
    capture_free(&out);
}

static void an_empty_list_of_notes_has_no_heading(void **state) {
    (void)state;
    captured out;
    lee_notes notes = {0};
    capture_begin(&out);
    const lee_printer to = {out.stream, LEE_UNITS_SI};
    lee_print_notes(&to, "Warnings", &notes);
    assert_int_equal(lee_notes_add(&notes, NULL, "a sill"), LEE_OK);
    lee_print_notes(&to, "Record", &notes);
    assert_string_equal(capture_end(&out), "\nRecord\n  - a sill\n");
    lee_notes_free(&notes);
    capture_free(&out);
}

static void text_that_cannot_be_written_is_a_file_error(void **state) {
    (void)state;
    lee_error error = {0};
    FILE *full = fopen("/dev/full", "w");
    assert_non_null(full);
    const lee_printer to = {full, LEE_UNITS_SI};
    lee_print_caution(&to);
    assert_int_equal(lee_print_end(&to, &error), LEE_ERR_FILE);
    assert_string_equal(error.message, "cannot write: No space left on device");
    (void)fclose(full);
}

static void two_days_are_days(void **state) {
    (void)state;
    assert_string_equal(lee_show_duration(48.0 * 3600.0).text, "2 d");
    assert_string_equal(lee_show_duration(47.0 * 3600.0).text, "47 h");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(levels_are_shown_to_the_millimetre),
        cmocka_unit_test(levels_are_shown_to_a_hundredth_of_a_foot),
        cmocka_unit_test(a_level_that_rounds_to_nothing_has_no_sign),
        cmocka_unit_test(a_level_that_is_none_reads_dry),
        cmocka_unit_test(a_range_stands_behind_its_value),
        cmocka_unit_test(a_value_without_range_stands_alone),
        cmocka_unit_test(a_range_that_may_fall_dry_says_so),
        cmocka_unit_test(heights_have_no_zeros_at_the_end),
        cmocka_unit_test(
            errors_are_shown_in_millimetres_or_small_parts_of_feet),
        cmocka_unit_test(a_large_error_is_no_crowd_of_millimetres),
        cmocka_unit_test(chainage_is_shown_in_kilometres_or_miles),
        cmocka_unit_test(areas_and_volumes_take_the_units_of_the_trade),
        cmocka_unit_test(speed_is_shown_in_metres_per_second_or_miles_per_hour),
        cmocka_unit_test(directions_stay_below_a_full_turn),
        cmocka_unit_test(directions_that_were_given_keep_their_tenth),
        cmocka_unit_test(durations_take_the_two_units_that_tell),
        cmocka_unit_test(durations_round_across_the_hour),
        cmocka_unit_test(width_counts_characters_not_bytes),
        cmocka_unit_test(padding_fills_up_to_the_width),
        cmocka_unit_test(control_bytes_of_a_file_do_not_reach_the_terminal),
        cmocka_unit_test(long_text_is_broken_at_blanks_before_column_80),
        cmocka_unit_test(a_number_stays_with_its_unit),
        cmocka_unit_test(numbers_alone_are_broken_at_any_blank),
        cmocka_unit_test(a_word_longer_than_the_line_stays_whole),
        cmocka_unit_test(an_empty_list_of_notes_has_no_heading),
        cmocka_unit_test(text_that_cannot_be_written_is_a_file_error),
        cmocka_unit_test(two_days_are_days),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
