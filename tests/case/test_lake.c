/* The lake of a case: levels, ends, bed law and axis. */
#include "support/case_text.h"

static const char axis_csv[] = "chainage [km],bed [m],width [km]\n"
                               "0,99,0.5\n6,97,1.5\n12,100,0.4\n";

static void a_uniform_lake_is_a_profile_of_two_rows(void **state) {
    lee_case c = read_case(state, LAKE);
    const lee_profile *axis = &c.problem.lake.profile;
    assert_int_equal(axis->n, 2);
    for (size_t i = 0; i < 2; i++) {
        assert_near(axis->chainage[i], i == 0 ? 0.0 : 12000.0, 1e-9);
        assert_near(axis->bed[i], 96.0, 0.0);
        assert_near(axis->width[i], 1000.0, 1e-9);
        /* a degree is pi/180; within rounding */
        assert_near(axis->bearing[i], 65.0 * 3.14159265358979323846 / 180.0,
                    1e-15);
    }
    lee_case_free(&c);
}

static void the_depth_of_a_uniform_lake_hangs_from_its_own_level(void **state) {
    lee_case c = read_case(
        state, "lake:\n  still_water: 101 m\n"
               "  axis: {bearing: 65 degree, made_for: 100 m, uniform: "
               "{length: 12 km, depth: 4 m, width: 1 km}}\n");
    assert_near(c.problem.lake.profile.bed[0], 96.0, 0.0);
    lee_case_free(&c);
}

static void a_level_far_from_the_profile_is_remarked(void **state) {
    lee_case c = read_case(
        state, "lake:\n  still_water: 101.5 m\n"
               "  axis: {bearing: 65 degree, made_for: 100 m, uniform: "
               "{length: 12 km, depth: 4 m, width: 1 km}}\n");
    assert_int_equal(c.notes.n, 1);
    assert_string_equal(c.notes.text[0],
                        "still water at 101.50 m is 1.50 m above the level "
                        "the profile was made for (100.00 m): its widths and "
                        "mean depths may not fit");
    lee_case_free(&c);
}

static void a_level_below_the_profile_is_remarked(void **state) {
    lee_case c = read_case(
        state, "lake:\n  still_water: 98.75 m\n"
               "  axis: {bearing: 65 degree, made_for: 100 m, uniform: "
               "{length: 12 km, depth: 4 m, width: 1 km}}\n");
    assert_int_equal(c.notes.n, 1);
    assert_non_null(strstr(c.notes.text[0], "is 1.25 m below the level"));
    lee_case_free(&c);
}

static void a_level_a_metre_off_is_not_remarked(void **state) {
    lee_case c = read_case(
        state, "lake:\n  still_water: 101 m\n"
               "  axis: {bearing: 65 degree, made_for: 100 m, uniform: "
               "{length: 12 km, depth: 4 m, width: 1 km}}\n");
    assert_int_equal(c.notes.n, 0);
    lee_case_free(&c);
}

static void the_furthest_level_of_a_series_is_remarked(void **state) {
    folder_write(*state, "pool.csv",
                 "time,level [m]\n2031-01-10,100.5\n2031-01-11,97.0\n"
                 "2031-01-12,101.5\n");
    lee_case c = read_case(
        state,
        "lake:\n  still_water: {file: pool.csv, utc_offset: \"+01:00\"}\n"
        "  axis: {bearing: 65 degree, made_for: 100 m, uniform: "
        "{length: 12 km, depth: 4 m, width: 1 km}}\n");
    assert_int_equal(c.notes.n, 1);
    assert_non_null(strstr(c.notes.text[0], "still water at 97.00 m is 3.00 m "
                                            "below"));
    lee_case_free(&c);
}

static void a_still_water_may_be_a_series(void **state) {
    folder_write(*state, "pool.csv",
                 "time,level [ft]\n2031-01-10T01:00,100\n"
                 "2031-01-11T01:00,110\n");
    folder_write(*state, "axis.csv", axis_csv);
    lee_case c = read_case(
        state,
        "lake:\n  still_water: {file: pool.csv, utc_offset: \"+01:00\"}\n"
        "  axis: {bearing: 65 degree, profile: axis.csv}\n");
    const lee_level_series *still = &c.problem.lake.still_water;
    assert_int_equal(still->n, 2);
    /* 2031-01-10T00:00Z: 22289 days of 86400 s since 1970 */
    assert_int_equal(still->time[0], 22289 * (int64_t)86400);
    assert_near(still->level[1], 110.0 * 0.3048, 1e-12);
    lee_case_free(&c);
}

static void a_profile_in_depths_hangs_from_the_still_water(void **state) {
    folder_write(*state, "axis.csv",
                 "chainage [km],depth [m],width [km]\n0,1,0.5\n12,3,0.4\n");
    lee_case c =
        read_case(state, "lake:\n  still_water: 100 m\n"
                         "  axis: {bearing: 65 degree, profile: axis.csv}\n");
    assert_near(c.problem.lake.profile.bed[1], 97.0, 1e-12);
    lee_case_free(&c);
}

static void a_held_end_may_be_a_series(void **state) {
    folder_write(*state, "sea.csv",
                 "time,level [m]\n2031-01-10T00:00Z,1\n"
                 "2031-01-10T06:00Z,2\n");
    lee_case c = read_case(
        state, "lake:\n  still_water: 1 m\n"
               "  axis: {bearing: 65 degree, start: {file: sea.csv}, uniform: "
               "{length: 12 km, depth: 4 m, width: 1 km}}\n");
    assert_true(c.problem.lake.start.is_held);
    assert_int_equal(c.problem.lake.start.level.n, 2);
    assert_false(c.problem.lake.end.is_held);
    lee_case_free(&c);
}

static void each_bed_law_is_read(void **state) {
    static const struct {
        const char *text;
        lee_bed_law law;
    } beds[] = {
        {LAKE "  bed: {manning: 0.03}\n",            {LEE_BED_MANNING, 0.03}  },
        {LAKE "  bed: {manning: 0.03 s m-1/3}\n",    {LEE_BED_MANNING, 0.03}  },
        {LAKE "  bed: {chezy: 55}\n",                {LEE_BED_CHEZY, 55.0}    },
        {LAKE "  bed: {chezy: 55 m1/2 s-1}\n",       {LEE_BED_CHEZY, 55.0}    },
        {LAKE "  bed: {roughness_length: 0.25 m}\n", {LEE_BED_ROUGHNESS, 0.25}},
        {LAKE "  bed: {drag: 2.5e-3}\n",             {LEE_BED_DRAG, 2.5e-3}   },
        {LAKE "  bed: {linear: 1e-4 s-1}\n",         {LEE_BED_LINEAR, 1e-4}   },
        {LAKE "  bed: none\n",                       {LEE_BED_NONE, 0.0}      },
    };
    for (size_t i = 0; i < sizeof beds / sizeof beds[0]; i++) {
        lee_case c = read_case(state, beds[i].text);
        assert_int_equal(c.problem.bed.kind, beds[i].law.kind);
        assert_near(c.problem.bed.value, beds[i].law.value, 0.0);
        lee_case_free(&c);
    }
}

static void a_bed_has_one_law(void **state) {
    static const case_slip slips[] = {
        SLIP(LAKE "  bed: {manning: 0.02, chezy: 50}\n",
             "a.yaml:4:31: 'lake.bed' takes one law: 'manning' and 'chezy' "
             "exclude each other"),
        SLIP(LAKE "  bed: {}\n",
             "a.yaml:4:8: 'lake.bed' should be none, or one law such as "
             "{manning: 0.025}"),
        SLIP(LAKE "  bed: smooth\n",
             "a.yaml:4:8: 'lake.bed' should be none, or one law such as "
             "{manning: 0.025}"),
    };
    assert_all_told(state, slips);
}

static void a_linear_law_needs_its_unit(void **state) {
    assert_told(state, LAKE "  bed: {linear: 1e-4}\n",
                "a.yaml:4:17: 'lake.bed.linear' cannot be read: '1e-4' has no "
                "unit; write 1e-4 s-1");
}

/* Kell (1975) at 4 degC: 999.9720 kg m-3 (its maximum), to the digits
 * common tables print. */
static void water_temperature_gives_the_density(void **state) {
    lee_case c = read_case(state, LAKE "  water_temperature: 4 degC\n");
    assert_near(c.problem.lake.water_density, 999.972, 5e-3);
    lee_case_free(&c);
}

static void density_and_temperature_of_water_exclude_each_other(void **state) {
    assert_told(state,
                LAKE "  water_temperature: 4 degC\n"
                     "  water_density: 1000 kg m-3\n",
                "a.yaml:5:3: 'water_density' and 'water_temperature' exclude "
                "each other in 'lake'");
}

static void an_axis_has_one_shape(void **state) {
    static const case_slip slips[] = {
        SLIP("lake: {still_water: 1 m, axis: {bearing: 1 degree}}\n",
             "a.yaml:1:32: 'lake.axis' needs one of the keys 'profile' and "
             "'uniform'"),
        SLIP("lake: {still_water: 1 m, axis: {profile: a.csv, bearing: 1 deg,\n"
             "uniform: {length: 1 km, depth: 1 m, width: 1 m}}}\n",
             "a.yaml:2:1: 'profile' and 'uniform' exclude each other in "
             "'lake.axis'"),
        SLIP("lake: {still_water: 1 m, axis: {\n"
             "uniform: {length: 1 km, depth: 1 m, width: 1 m}}}\n",
             "a.yaml:2:1: 'uniform' needs 'bearing', which is missing from "
             "'lake.axis'"),
    };
    assert_all_told(state, slips);
}

static void a_uniform_lake_under_a_series_needs_its_own_level(void **state) {
    assert_told(state,
                "lake: {still_water: {file: pool.csv}, axis: {bearing: "
                "1 degree,\n"
                "uniform: {length: 1 km, depth: 1 m, width: 1 m}}}\n",
                "a.yaml:2:10: 'lake.axis.uniform' needs 'made_for', the level "
                "its depth is measured from, when 'still_water' is a series");
}

static void a_level_is_a_number_or_a_file(void **state) {
    static const case_slip slips[] = {
        SLIP(
            "lake:\n  still_water: {utc_offset: Z}\n"
            "  axis: {bearing: 1 degree, profile: a.csv}\n",
            "a.yaml:2:16: 'lake.still_water' needs one of the keys 'level' and "
            "'file'\n"
            "a.yaml:2:17: 'utc_offset' needs 'file', which is missing from "
            "'lake.still_water'"),
        SLIP("lake:\n  still_water: {level: 1 m, file: pool.csv}\n"
             "  axis: {bearing: 1 degree, profile: a.csv}\n",
             "a.yaml:2:29: 'level' and 'file' exclude each other in "
             "'lake.still_water'"),
        SLIP("lake:\n  still_water: [1 m]\n"
             "  axis: {bearing: 1 degree, profile: a.csv}\n",
             "a.yaml:2:16: 'lake.still_water' should be a single value such as "
             "'12 m', but is a list"),
    };
    assert_all_told(state, slips);
}

static void an_end_is_closed_or_held(void **state) {
    static const case_slip slips[] = {
        SLIP("lake:\n  still_water: 1 m\n"
             "  axis: {bearing: 1 degree, profile: a.csv, start: open}\n",
             "a.yaml:3:52: 'lake.axis.start' should be closed, or {level: 12 "
             "m}, or {file: level.csv}"),
        SLIP("lake:\n  still_water: 1 m\n"
             "  axis: {bearing: 1 degree, profile: a.csv, end: {level: 3}}\n",
             "a.yaml:3:58: 'lake.axis.end.level' cannot be read: '3' has no "
             "unit; write 3 m"),
    };
    assert_all_told(state, slips);
}

static void a_bad_utc_offset_is_told(void **state) {
    lee_case c = {0};
    lee_error error = {0};
    const char *path = folder_write(
        *state, "a.yaml",
        "lake:\n  still_water: {file: pool.csv, utc_offset: Paris}\n"
        "  axis: {bearing: 1 degree, profile: a.csv}\n");
    assert_int_equal(lee_case_read(path, &c, &error), LEE_ERR_FORMAT);
    assert_non_null(strstr(error.message,
                           "a.yaml:2:45: 'lake.still_water.utc_offset' cannot "
                           "be read: "));
    assert_non_null(strstr(error.message, "Paris"));
}

int main(void) {
    const struct CMUnitTest tests[] = {
        CASE_TEST(a_uniform_lake_is_a_profile_of_two_rows),
        CASE_TEST(the_depth_of_a_uniform_lake_hangs_from_its_own_level),
        CASE_TEST(a_level_far_from_the_profile_is_remarked),
        CASE_TEST(a_level_below_the_profile_is_remarked),
        CASE_TEST(a_level_a_metre_off_is_not_remarked),
        CASE_TEST(the_furthest_level_of_a_series_is_remarked),
        CASE_TEST(a_still_water_may_be_a_series),
        CASE_TEST(a_profile_in_depths_hangs_from_the_still_water),
        CASE_TEST(a_held_end_may_be_a_series),
        CASE_TEST(each_bed_law_is_read),
        CASE_TEST(a_bed_has_one_law),
        CASE_TEST(a_linear_law_needs_its_unit),
        CASE_TEST(water_temperature_gives_the_density),
        CASE_TEST(density_and_temperature_of_water_exclude_each_other),
        CASE_TEST(an_axis_has_one_shape),
        CASE_TEST(a_uniform_lake_under_a_series_needs_its_own_level),
        CASE_TEST(a_level_is_a_number_or_a_file),
        CASE_TEST(an_end_is_closed_or_held),
        CASE_TEST(a_bad_utc_offset_is_told),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
