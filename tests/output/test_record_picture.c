/* A record is drawn on one screen, whatever it holds. */
#include "support/captured.h"
#include "support/results.h"

#include "output/record_picture.h"

#include "leewater/calendar.h"

static const int64_t hour = 3600;

/* A record, what the checks make of it, and its picture. */
typedef struct drawn {
    lee_wind_record record;
    lee_problem_check check;
    captured out;
} drawn;

static void begin(drawn *all, size_t n, int64_t start, int64_t step) {
    *all = (drawn){0};
    assert_int_equal(lee_wind_record_init(&all->record, n, NULL), LEE_OK);
    for (size_t i = 0; i < n; i++) {
        all->record.time[i] = start + (int64_t)i * step;
    }
}

/* Winds from i to j, speed in m s-1, direction in degrees. */
static void blow(drawn *all, size_t i, size_t j, double speed, double from) {
    for (; i < j; i++) {
        lee_wind_components(speed, degrees(from), &all->record.east[i],
                            &all->record.north[i]);
    }
}

static const char *draw(drawn *all, lee_unit_system units) {
    const lee_gap_rule rule = {.largest = 0};
    assert_int_equal(
        lee_wind_check_record(&all->record, &rule, &all->check.record, NULL),
        LEE_OK);
    assert_int_equal(lee_wind_summarise(&all->record, all->check.record.step,
                                        &all->check.summary, NULL),
                     LEE_OK);
    capture_begin(&all->out);
    const lee_printer to = {all->out.stream, units};
    lee_print_record_picture(&to, &all->check);
    return capture_end(&all->out);
}

static void forget(drawn *all) {
    lee_wind_record_free(&all->record);
    lee_wind_check_free(&all->check.record);
    lee_wind_summary_free(&all->check.summary);
    capture_free(&all->out);
}

/* One screen: 40 rows of 80 printable ASCII characters, no blank at an end. */
static void assert_fits(const char *text) {
    size_t rows = 0;
    size_t width = 0;
    for (const char *c = text; *c != '\0'; c++) {
        if (*c == '\n') {
            assert_true(width == 0 || c[-1] != ' ');
            rows++;
            width = 0;
            continue;
        }
        assert_in_range(*c, ' ', '~');
        assert_true(++width <= 80);
    }
    assert_in_range(rows, 1, 40);
}

/* 1 January 2001. */
static int64_t year_2001(void) {
    int64_t time = 0;
    assert_true(lee_time_from_civil(2001, 1, 1, 0, 0, 0, &time));
    return time;
}

static void one_sample_is_drawn(void **state) {
    (void)state;
    drawn all;
    begin(&all, 1, year_2001(), hour);
    blow(&all, 0, 1, 7.0, 90.0);
    const char *text = draw(&all, LEE_UNITS_SI);
    assert_fits(text);
    assert_contains(text, "Coverage: one sample has no step");
    assert_contains(text, "  2001 ?\n");
    assert_contains(text, "E    100.0  --------------------");
    assert_contains(text, "2001-01-01 00:00    7.0   90    >=0.0\n");
    forget(&all);
}

static void three_hours_are_drawn(void **state) {
    (void)state;
    drawn all;
    begin(&all, 3, year_2001(), hour);
    blow(&all, 0, 3, 7.0, 90.0);
    const char *text = draw(&all, LEE_UNITS_SI);
    assert_fits(text);
    assert_contains(text, "Coverage: 100.0 % of the time has wind");
    assert_contains(text, "  2001 -\n");
    forget(&all);
}

static void a_record_that_is_all_calm_is_drawn(void **state) {
    (void)state;
    drawn all;
    begin(&all, 3, year_2001(), hour);
    blow(&all, 0, 3, 0.0, 0.0);
    const char *text = draw(&all, LEE_UNITS_SI);
    assert_fits(text);
    assert_contains(text, "calm 100.0\n");
    assert_contains(text, "  none\n");
    forget(&all);
}

static void a_record_that_is_all_missing_is_drawn(void **state) {
    (void)state;
    drawn all;
    begin(&all, 3, year_2001(), hour);
    const char *text = draw(&all, LEE_UNITS_SI);
    assert_fits(text);
    assert_contains(text, "Coverage: 0.0 % of the time has wind");
    assert_contains(text, "  2001 .\n");
    assert_contains(text, "  no wind at all");
    assert_lacks(text, "nan");
    forget(&all);
}

/* Daily, so that the test is short. Of the second year all of February, 18
 * of 31 days of March, 13 of 30 of April, 1 of May and 2 of June are lost. */
static void forty_years_are_drawn_a_year_by_twelve_months(void **state) {
    (void)state;
    drawn all;
    begin(&all, 14610, year_2001(), 24 * hour);
    for (size_t i = 0; i < 14610; i++) {
        blow(&all, i, i + 1, (double)(i * 37 % 250) / 10.0,
             (double)(i * 11 % 360) + 0.5);
    }
    blow(&all, 365 + 31, 365 + 59 + 18, NAN, 0.0);
    blow(&all, 365 + 90, 365 + 90 + 13, NAN, 0.0);
    blow(&all, 365 + 120, 365 + 120 + 1, NAN, 0.0);
    blow(&all, 365 + 151, 365 + 151 + 2, NAN, 0.0);
    const char *text = draw(&all, LEE_UNITS_SI);
    assert_fits(text);
    assert_contains(text, "  2001 ############  2002 #.-+#+######  2003 ");
    assert_contains(text, "  2037 ############  2038 ############  2039 "
                          "############  2040 ############\n");
    forget(&all);
    begin(&all, 14610, year_2001(), 24 * hour);
    blow(&all, 0, 14610, 11.0, 222.0);
    assert_fits(draw(&all, LEE_UNITS_US));
    forget(&all);
}

/* 300 years of days: 9 years a cell, of which the last holds three. */
static void many_years_are_drawn_several_to_a_cell(void **state) {
    (void)state;
    drawn all;
    int64_t start = 0;
    assert_true(lee_time_from_civil(1700, 1, 1, 0, 0, 0, &start));
    begin(&all, 300 * 365 + 72, start, 24 * hour);
    blow(&all, 0, all.record.n, 5.0, 45.5);
    const char *text = draw(&all, LEE_UNITS_SI);
    assert_fits(text);
    assert_contains(text, "  years     JFMAMJJASOND  years     JFMAMJJASOND");
    assert_contains(text, "  1700-1708 ############  1709-1717 ############");
    assert_contains(text, "  1997-2005 ############\n");
    forget(&all);
}

static void months_that_the_record_does_not_reach_are_blank(void **state) {
    (void)state;
    drawn all;
    /* 1 March to 20 July 2001: 141 days. */
    begin(&all, 141, year_2001() + 59 * 24 * hour, 24 * hour);
    blow(&all, 0, 141, 5.0, 45.5);
    assert_contains(draw(&all, LEE_UNITS_SI), "  2001   ####+\n");
    forget(&all);
}

/* 40 % of south in two classes, 10 % of north: a character is 2 %. */
static void bars_are_as_long_as_their_shares(void **state) {
    (void)state;
    drawn all;
    begin(&all, 40, year_2001(), hour);
    blow(&all, 0, 12, 2.0, 181.0);
    blow(&all, 12, 16, 22.0, 181.0);
    blow(&all, 16, 20, 7.0, 1.0);
    blow(&all, 20, 40, 0.0, 0.0);
    const char *text = draw(&all, LEE_UNITS_SI);
    assert_contains(text, "a character is 2 %");
    assert_contains(text, "S     40.0  ...............#####\n");
    assert_contains(text, "N     10.0  ----- ");
    assert_contains(text, "calm  50.0\n");
    forget(&all);
}

static void speeds_are_told_in_the_units_asked_for(void **state) {
    (void)state;
    drawn all;
    begin(&all, 30, year_2001(), hour);
    blow(&all, 0, 30, 4.4704, 45.5); /* 10 mph */
    const char *text = draw(&all, LEE_UNITS_US);
    assert_fits(text);
    assert_contains(text, "mph from");
    assert_contains(text, "  10.0  10.0  10.0");
    assert_contains(text, "+ 33.6-44.7  # 44.7 up\n");
    assert_lacks(text, "m/s");
    forget(&all);
}

static void spread_tens_are_told(void **state) {
    (void)state;
    drawn all;
    begin(&all, 100, year_2001(), hour);
    blow(&all, 0, 100, 5.0, 40.0);
    const char *text = draw(&all, LEE_UNITS_SI);
    assert_fits(text);
    assert_contains(text, "each is spread over its ten");
    forget(&all);
}

static void what_was_corrected_is_told(void **state) {
    (void)state;
    drawn all;
    begin(&all, 3, year_2001(), hour);
    blow(&all, 0, 3, 5.0, 40.0);
    all.record.duplicates = 12;
    all.record.merged = 3;
    all.check.method.correction_count = 2;
    all.check.method.correction[0] =
        (lee_correction){.name = "height", .factor = 1.1};
    all.check.method.correction[1] =
        (lee_correction){.name = "land to water", .factor = 1.2};
    const char *text = draw(&all, LEE_UNITS_SI);
    assert_contains(text, "repeated dropped 12, merged 3\n");
    assert_contains(text, "the strongest is taken x 1.320 over the water:\n");
    assert_contains(text, "height x 1.100, land to water x 1.200\n");
    forget(&all);
}

static void nothing_is_drawn_without_a_record(void **state) {
    (void)state;
    drawn all;
    begin(&all, 0, 0, hour);
    assert_string_equal(draw(&all, LEE_UNITS_SI), "");
    forget(&all);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(one_sample_is_drawn),
        cmocka_unit_test(three_hours_are_drawn),
        cmocka_unit_test(a_record_that_is_all_calm_is_drawn),
        cmocka_unit_test(a_record_that_is_all_missing_is_drawn),
        cmocka_unit_test(forty_years_are_drawn_a_year_by_twelve_months),
        cmocka_unit_test(many_years_are_drawn_several_to_a_cell),
        cmocka_unit_test(months_that_the_record_does_not_reach_are_blank),
        cmocka_unit_test(bars_are_as_long_as_their_shares),
        cmocka_unit_test(speeds_are_told_in_the_units_asked_for),
        cmocka_unit_test(spread_tens_are_told),
        cmocka_unit_test(what_was_corrected_is_told),
        cmocka_unit_test(nothing_is_drawn_without_a_record),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
