/* Steady levels keep the symmetries of the lake and its water. */
#include "support/axis.h"

/* An uneven lake with beaches for the symmetries. */
static lee_profile uneven(bool is_mirrored, double datum, double scale) {
    static const double x[] = {0.0, 1500.0, 6000.0, 9000.0, 14e3, 15e3};
    static const double z[] = {2.0, -1.0, -6.0, -2.0, -4.0, 1.5};
    static const double b[] = {300.0, 900.0, 2500.0, 800.0, 1200.0, 400.0};
    lee_profile p = axis_dig(6, x, z);
    for (size_t i = 0; i < 6; i++) {
        const size_t k = is_mirrored ? 5 - i : i;
        p.chainage[i] = is_mirrored ? 15e3 - x[k] : x[k];
        p.bed[i] = datum + z[k];
        p.width[i] = scale * b[k];
    }
    return p;
}

static void a_mirrored_lake_under_a_mirrored_wind_is_the_mirror(void **state) {
    (void)state;
    lee_profile p = uneven(false, 0.0, 1.0);
    lee_profile q = uneven(true, 0.0, 1.0);
    const lee_steady_input in = axis_wind(&p, 0.8);
    const lee_steady_input mirrored = axis_wind(&q, -0.8);
    lee_steady s = axis_solve(&in);
    lee_steady t = axis_solve(&mirrored);
    assert_int_equal(s.count, t.count);
    assert_near(t.water[0].set_up, s.water[0].set_up, 1e-13);
    assert_near(t.water[0].set_down, s.water[0].set_down, 1e-13);
    assert_near(t.water[0].from, 15e3 - s.water[0].to, 1e-9);
    assert_near(t.water[0].node[0], 15e3 - s.water[0].node[0], 1e-7);
    assert_near(lee_steady_level_at(&t, 15e3 - 5000.0),
                lee_steady_level_at(&s, 5000.0), 1e-12);
    assert_near(t.along, -s.along, 1e-15);
    lee_steady_free(&s);
    lee_steady_free(&t);
    lee_profile_free(&p);
    lee_profile_free(&q);
}

static void a_shifted_datum_shifts_levels_and_nothing_else(void **state) {
    (void)state;
    lee_profile p = uneven(false, 0.0, 1.0);
    lee_profile q = uneven(false, 431.0, 1.0);
    const lee_steady_input in = axis_wind(&p, 0.8);
    lee_steady_input shifted = axis_wind(&q, 0.8);
    shifted.still_water = 431.0;
    lee_steady s = axis_solve(&in);
    lee_steady t = axis_solve(&shifted);
    /* 431 m keeps 1e-13 m */
    assert_near(t.water[0].set_up, s.water[0].set_up, 1e-12);
    assert_near(t.water[0].set_down, s.water[0].set_down, 1e-12);
    assert_near(lee_steady_level_at(&t, 5000.0),
                431.0 + lee_steady_level_at(&s, 5000.0), 1e-12);
    lee_steady_free(&s);
    lee_steady_free(&t);
    lee_profile_free(&p);
    lee_profile_free(&q);
}

static void a_lake_twice_as_wide_has_the_same_levels(void **state) {
    (void)state;
    lee_profile p = uneven(false, 0.0, 1.0);
    lee_profile q = uneven(false, 0.0, 2.0);
    const lee_steady_input in = axis_wind(&p, 0.8);
    const lee_steady_input wide = axis_wind(&q, 0.8);
    lee_steady s = axis_solve(&in);
    lee_steady t = axis_solve(&wide);
    assert_near(t.water[0].set_up, s.water[0].set_up, 1e-12);
    assert_near_share(t.water[0].volume, 2.0 * s.water[0].volume, 1e-13);
    lee_steady_free(&s);
    lee_steady_free(&t);
    lee_profile_free(&p);
    lee_profile_free(&q);
}

static void the_wind_neither_adds_nor_removes_water(void **state) {
    (void)state;
    lee_profile p = uneven(false, 0.0, 1.0);
    const lee_steady_input in = axis_wind(&p, 0.8);
    lee_steady s = axis_solve(&in);
    assert_near_share(s.water[0].volume, lee_profile_summary(&p, 0.0).volume,
                      1e-14);
    assert_true(s.water[0].volume_defect <= 1e-10);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

static void without_wind_the_lake_is_at_rest_exactly(void **state) {
    (void)state;
    lee_profile p = uneven(false, 431.0, 1.0);
    lee_steady_input in = axis_wind(&p, 0.0);
    in.still_water = 431.0;
    lee_steady s = axis_solve(&in);
    assert_int_equal(s.count, 1);
    assert_near(s.water[0].set_up, 0.0, 1e-14);
    assert_near(s.water[0].set_down, 0.0, 1e-14);
    assert_near(s.water[0].from, 1000.0, 1e-9);
    assert_int_equal(s.water[0].node_count, 0);
    assert_near(s.dry_length, 0.0, 1e-9);
    assert_near(s.along, 0.0, 0.0);
    assert_false(s.has_sill);
    lee_steady_free(&s);
    lee_profile_free(&p);
}

static void the_drawn_surface_holds_every_row_of_the_profile(void **state) {
    (void)state;
    lee_profile p = uneven(false, 0.0, 1.0);
    const lee_steady_input in = axis_wind(&p, -0.8);
    lee_steady s = axis_solve(&in);
    for (size_t i = 0; i < p.n; i++) {
        bool is_there = false;
        for (size_t k = 0; k < s.n; k++) {
            is_there = is_there || fabs(s.x[k] - p.chainage[i]) < 1e-9;
        }
        assert_true(is_there);
    }
    for (size_t k = 1; k < s.n; k++) {
        assert_true(s.x[k] >= s.x[k - 1]);
    }
    assert_true(s.n > 100);
    assert_true(isnan(s.level[0]));
    assert_true(isnan(s.level[s.n - 1]));
    lee_steady_free(&s);
    lee_profile_free(&p);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(a_mirrored_lake_under_a_mirrored_wind_is_the_mirror),
        cmocka_unit_test(a_shifted_datum_shifts_levels_and_nothing_else),
        cmocka_unit_test(a_lake_twice_as_wide_has_the_same_levels),
        cmocka_unit_test(the_wind_neither_adds_nor_removes_water),
        cmocka_unit_test(without_wind_the_lake_is_at_rest_exactly),
        cmocka_unit_test(the_drawn_surface_holds_every_row_of_the_profile),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
