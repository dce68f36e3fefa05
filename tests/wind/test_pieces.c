/* The gap rule parts a record, bridges it, or refuses it. */
#include "wind/support.h"

#include <stdlib.h>

static const lee_gap_rule refuse = {.largest = 3600, .split = false};
static const lee_gap_rule split = {.largest = 3600, .split = true};

/* Step 600 s; 1800 s of missing samples; then 7200 s without any. */
static const observed gappy[] = {
    {0,     NAN, 0},
    {600,   3,   0},
    {1200,  4,   0},
    {1800,  NAN, 0},
    {2400,  5,   0},
    {3000,  6,   0},
    {10200, 7,   0},
    {10800, 8,   0},
    {11400, 9,   0},
    {12000, NAN, 0},
};
enum { GAPPY = sizeof gappy / sizeof gappy[0] };

static void a_record_without_gaps_is_one_piece(void **state) {
    (void)state;
    lee_wind_record record = record_of(2, &gappy[1], LEE_STAMP_INSTANT);
    lee_wind_piece *piece = NULL;
    size_t count = 0;
    assert_int_equal(lee_wind_pieces(&record, &refuse, &piece, &count, NULL),
                     LEE_OK);
    assert_int_equal(count, 1);
    assert_int_equal(piece[0].first, 0);
    assert_int_equal(piece[0].end, 2);
    free(piece);
    lee_wind_record_free(&record);
}

static void missing_samples_at_the_ends_belong_to_no_piece(void **state) {
    (void)state;
    lee_wind_record record = record_of(4, gappy, LEE_STAMP_INSTANT);
    lee_wind_piece *piece = NULL;
    size_t count = 0;
    assert_int_equal(lee_wind_pieces(&record, &refuse, &piece, &count, NULL),
                     LEE_OK);
    assert_int_equal(count, 1);
    assert_int_equal(piece[0].first, 1);
    assert_int_equal(piece[0].end, 3);
    free(piece);
    lee_wind_record_free(&record);
}

static void a_long_gap_parts_the_record_when_the_rule_says_split(void **state) {
    (void)state;
    lee_wind_record record = record_of(GAPPY, gappy, LEE_STAMP_INSTANT);
    lee_wind_piece *piece = NULL;
    size_t count = 0;
    assert_int_equal(lee_wind_pieces(&record, &split, &piece, &count, NULL),
                     LEE_OK);
    assert_int_equal(count, 2);
    assert_int_equal(piece[0].first, 1);
    assert_int_equal(piece[0].end, 6);
    assert_int_equal(piece[1].first, 6);
    assert_int_equal(piece[1].end, 9);
    free(piece);
    lee_wind_record_free(&record);
}

static void a_long_gap_is_refused_and_its_times_are_named(void **state) {
    (void)state;
    lee_wind_record record = record_of(GAPPY, gappy, LEE_STAMP_INSTANT);
    lee_wind_piece *piece = NULL;
    size_t count = 0;
    lee_error error = {0};
    assert_int_equal(lee_wind_pieces(&record, &refuse, &piece, &count, &error),
                     LEE_ERR_DATA);
    assert_string_equal(
        error.message,
        "no wind between 1970-01-01 00:50 UTC and 1970-01-01 02:50 UTC: 2 h "
        "apart, at most 1.16667 h are bridged; raise 'largest_gap' or write "
        "'gaps: split'");
    assert_null(piece);
    assert_int_equal(count, 0);
    lee_wind_record_free(&record);
}

/* Step 600 s and rule 3600 s: 4200 s apart is bridged, 4201 s is not. */
static void the_rule_counts_beyond_the_own_step_of_the_record(void **state) {
    (void)state;
    const int64_t last[] = {1200 + 4200, 1200 + 4201};
    const lee_status expected[] = {LEE_OK, LEE_ERR_DATA};
    for (size_t i = 0; i < 2; i++) {
        const observed wind[] = {
            {0,       3, 0},
            {600,     3, 0},
            {1200,    3, 0},
            {last[i], 3, 0}
        };
        lee_wind_record record = record_of(4, wind, LEE_STAMP_END);
        lee_wind_piece *piece = NULL;
        size_t count = 0;
        assert_int_equal(
            lee_wind_pieces(&record, &refuse, &piece, &count, NULL),
            expected[i]);
        free(piece);
        lee_wind_record_free(&record);
    }
}

static void a_lone_sample_between_long_gaps_is_a_piece(void **state) {
    (void)state;
    const observed wind[] = {
        {0,     3, 0},
        {600,   3, 0},
        {9000,  3, 0},
        {18000, 3, 0},
        {18600, 3, 0}
    };
    lee_wind_record record = record_of(5, wind, LEE_STAMP_INSTANT);
    lee_wind_piece *piece = NULL;
    size_t count = 0;
    assert_int_equal(lee_wind_pieces(&record, &split, &piece, &count, NULL),
                     LEE_OK);
    assert_int_equal(count, 3);
    assert_int_equal(piece[1].first, 2);
    assert_int_equal(piece[1].end, 3);
    free(piece);
    lee_wind_record_free(&record);
}

static void a_record_of_one_sample_is_a_piece(void **state) {
    (void)state;
    lee_wind_record record = record_of(1, &gappy[1], LEE_STAMP_INSTANT);
    lee_wind_piece *piece = NULL;
    size_t count = 0;
    assert_int_equal(lee_wind_pieces(&record, &refuse, &piece, &count, NULL),
                     LEE_OK);
    assert_int_equal(count, 1);
    free(piece);
    lee_wind_record_free(&record);
}

static void a_record_without_any_wind_is_refused(void **state) {
    (void)state;
    lee_wind_record record = record_of(1, gappy, LEE_STAMP_INSTANT);
    lee_wind_piece *piece = NULL;
    size_t count = 0;
    lee_error error = {0};
    assert_int_equal(lee_wind_pieces(&record, &split, &piece, &count, &error),
                     LEE_ERR_DATA);
    assert_string_equal(error.message,
                        "none of the record's 1 samples has a wind");
    assert_null(piece);
    lee_wind_record_free(&record);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_record_without_gaps_is_one_piece),
        cmocka_unit_test(missing_samples_at_the_ends_belong_to_no_piece),
        cmocka_unit_test(a_long_gap_parts_the_record_when_the_rule_says_split),
        cmocka_unit_test(a_long_gap_is_refused_and_its_times_are_named),
        cmocka_unit_test(the_rule_counts_beyond_the_own_step_of_the_record),
        cmocka_unit_test(a_lone_sample_between_long_gaps_is_a_piece),
        cmocka_unit_test(a_record_of_one_sample_is_a_piece),
        cmocka_unit_test(a_record_without_any_wind_is_refused),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
