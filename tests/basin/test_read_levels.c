/* A series of levels is read as it was meant, or refused with its place. */
#include "support/files.h"

#include "leewater/basin.h"

static lee_status read_text(const char *text, bool has_offset, int64_t offset,
                            lee_level_series *series, lee_error *error) {
    const char *path = folder_write(&folder, "pool.csv", text);
    return lee_level_series_read_csv(path, has_offset, offset, series, error);
}

static void refuses(const char *text, lee_status status, const char *message) {
    lee_level_series series;
    lee_error error = {0};
    assert_int_equal(read_text(text, false, 0, &series, &error), status);
    const char *place = strstr(error.message, "pool.csv");
    assert_non_null(place);
    assert_string_equal(place, message);
    assert_int_equal(series.n, 0);
}

static void times_and_levels_are_brought_to_seconds_and_metres(void **state) {
    (void)state;
    lee_level_series series;
    assert_int_equal(read_text("level [cm],time\n150,1970-01-01T00:00Z\n"
                               "250,1970-01-02T01:00+01:00\n",
                               false, 0, &series, NULL),
                     LEE_OK);
    assert_int_equal(series.n, 2);
    assert_int_equal(series.time[1], 86400);
    assert_near(series.level[0], 1.5, 1e-12); /* rounding of a factor */
    assert_near(lee_level_at(&series, 43200.0), 2.0, 1e-12);
    lee_level_series_free(&series);
}

static void a_given_offset_serves_times_without_a_zone(void **state) {
    (void)state;
    lee_level_series series;
    assert_int_equal(read_text("time,level [m]\n1970-01-01T01:00,2\n", true,
                               3600, &series, NULL),
                     LEE_OK);
    assert_int_equal(series.time[0], 0);
    lee_level_series_free(&series);
}

static void a_time_without_any_zone_is_refused(void **state) {
    (void)state;
    refuses("time,level [m]\n1970-01-01T01:00,2\n", LEE_ERR_FORMAT,
            "pool.csv:2:1: time '1970-01-01T01:00' has no zone and no "
            "utc_offset is given");
}

static void a_time_that_does_not_go_on_is_refused(void **state) {
    (void)state;
    refuses("time,level [m]\n1970-01-02T00:00Z,2\n1970-01-01T00:00Z,2\n",
            LEE_ERR_FORMAT,
            "pool.csv:3:1: time does not lie after the row before it");
}

static void a_file_without_levels_is_refused(void **state) {
    (void)state;
    refuses("time,level [m]\n", LEE_ERR_DATA, "pool.csv: no level in the file");
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(times_and_levels_are_brought_to_seconds_and_metres),
        cmocka_unit_test(a_given_offset_serves_times_without_a_zone),
        cmocka_unit_test(a_time_without_any_zone_is_refused),
        cmocka_unit_test(a_time_that_does_not_go_on_is_refused),
        cmocka_unit_test(a_file_without_levels_is_refused),
    };
    return cmocka_run_group_tests(tests, make_folder, remove_folder);
}
