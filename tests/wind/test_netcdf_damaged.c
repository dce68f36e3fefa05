/* A damaged NetCDF file costs one message that names it, never the process. */
#include "support/damage.h"

/* tests/bench/bench_damaged.c does a thousand of each kind. */
static int how_many(void) {
    return getenv("LEE_REDUCED") != NULL ? 15 : 60;
}

static void every_damaged_file_is_read_or_told_by_name(void **state) {
    dice d = {20};
    for (size_t kind = 0; kind < DAMAGE_KINDS; kind++) {
        const int count = how_many();
        const damage_tally tally = damage_many(*state, kind, count, &d);
        assert_int_equal(tally.untold, 0);
        assert_int_equal(tally.read + tally.refused + tally.broke, count);
        assert_true(tally.refused > 0);
    }
}

static void an_unhurt_file_is_read_whole(void **state) {
    const lee_wind_netcdf how = {.is_apart = true};
    for (size_t kind = 0; kind < DAMAGE_KINDS; kind++) {
        lee_wind_record record;
        lee_error error = {0};
        (void)lee_wind_read_netcdf(damage_base(*state, kind), &how, &record,
                                   NULL, &error);
        assert_string_equal(error.message, "");
        assert_int_equal(record.n, 400);
        assert_near(record.east[399], 399 % 37 - 18, 0.0);
        /* A whole number times 0.01: half a unit of the last place. */
        assert_near(record.north[399], 0.01 * (399 * 7 % 2000 - 1000), 1e-15);
        lee_wind_record_free(&record);
    }
}

int main(void) {
    const struct CMUnitTest tests[] = {
        FOLDER_TEST(an_unhurt_file_is_read_whole),
        FOLDER_TEST(every_damaged_file_is_read_or_told_by_name),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
