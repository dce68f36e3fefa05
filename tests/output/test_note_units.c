/* Notes are told in the units of the text, no finer than they were made. */
#include "support/check.h"

#include "output/note_units.h"

/* International units: 1 ft is 0.3048 m, 1 mi 1609.344 m, 1 mph 0.44704 m/s;
 * 0 degC is 32 degF and 5 degC are 9 degF. */
static void reads_in_us(const char *note, const char *expected) {
    char text[256];
    assert_string_equal(
        lee_note_in_units(note, LEE_UNITS_US, sizeof text, text), expected);
}

static void a_length_is_told_in_feet(void **state) {
    (void)state;
    reads_in_us("the tilt across the axis, 0.412 m, passes a fifth",
                "the tilt across the axis, 1.35 ft, passes a fifth");
}

static void a_speed_is_told_in_miles_an_hour(void **state) {
    (void)state;
    reads_in_us("drag extrapolated: 22.4 m/s is outside",
                "drag extrapolated: 50 mph is outside");
}

static void a_distance_is_told_in_miles(void **state) {
    (void)state;
    reads_in_us("11.80 km away", "7.33 mi away");
}

static void a_small_error_is_told_in_feet(void **state) {
    (void)state;
    reads_in_us("error 5.6 mm (1.6 mm from the step)",
                "error 0.0184 ft (0.0052 ft from the step)");
}

static void a_temperature_moves_its_zero(void **state) {
    (void)state;
    reads_in_us("dry air at 970.0 hPa (given) and 15.0 degC (assumed)",
                "dry air at 970.0 hPa (given) and 59 degF (assumed)");
}

static void a_small_length_keeps_a_digit(void **state) {
    (void)state;
    reads_in_us("depth: 0.2 m either way", "depth: 0.7 ft either way");
}

static void a_length_given_in_feet_comes_back(void **state) {
    (void)state;
    reads_in_us("depth: 0.152 m either way", "depth: 0.50 ft either way");
}

static void a_sign_stays(void **state) {
    (void)state;
    reads_in_us("bed +3.05 m, then -3.05 m", "bed +10.0 ft, then -10.0 ft");
}

static void both_ends_of_a_span_change(void **state) {
    (void)state;
    reads_in_us("expected 10 to 200 m", "expected 33 to 656 ft");
}

static void other_units_and_bare_numbers_stay(void **state) {
    (void)state;
    static const char *const note =
        "2 and 3 more, 60 min, 3 h, 7 m2, 9 m-1, 0.025 s m-1/3, 4 miles, "
        "2031-01-10 06:30 UTC, C10 m";
    reads_in_us(note, note);
}

static void names_between_quotes_stay(void **state) {
    (void)state;
    reads_in_us("at 'Mole 5 m' it is 5 m deep",
                "at 'Mole 5 m' it is 16 ft deep");
}

static void an_apostrophe_quotes_nothing(void **state) {
    (void)state;
    reads_in_us("the lake's 10 m and the bed's",
                "the lake's 33 ft and the bed's");
}

static void in_si_a_note_stays_as_it_is(void **state) {
    (void)state;
    char text[32];
    assert_string_equal(
        lee_note_in_units("22.4 m/s at 10 m", LEE_UNITS_SI, sizeof text, text),
        "22.4 m/s at 10 m");
}

static void what_finds_no_room_is_cut(void **state) {
    (void)state;
    char text[8];
    assert_string_equal(lee_note_in_units("a gap of 10 m and more",
                                          LEE_UNITS_US, sizeof text, text),
                        "a gap o");
    assert_string_equal(lee_note_in_units("a gap of 10 m and more",
                                          LEE_UNITS_SI, sizeof text, text),
                        "a gap o");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_length_is_told_in_feet),
        cmocka_unit_test(a_speed_is_told_in_miles_an_hour),
        cmocka_unit_test(a_distance_is_told_in_miles),
        cmocka_unit_test(a_small_error_is_told_in_feet),
        cmocka_unit_test(a_temperature_moves_its_zero),
        cmocka_unit_test(a_small_length_keeps_a_digit),
        cmocka_unit_test(a_length_given_in_feet_comes_back),
        cmocka_unit_test(a_sign_stays),
        cmocka_unit_test(both_ends_of_a_span_change),
        cmocka_unit_test(other_units_and_bare_numbers_stay),
        cmocka_unit_test(names_between_quotes_stay),
        cmocka_unit_test(an_apostrophe_quotes_nothing),
        cmocka_unit_test(what_finds_no_room_is_cut),
        cmocka_unit_test(in_si_a_note_stays_as_it_is),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
