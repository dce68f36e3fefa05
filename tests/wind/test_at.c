/* Between samples: instants are linear, means are kept. */
#include "wind/support.h"

/* A few rounding errors of a wind of some tens of m s-1. */
static const double rounding = 1e-12;

enum { HOUR = 3600 };

/* Speed and direction (degrees) the record has at t; the search starts from
 * the first sample. */
static void wind_at(const lee_wind_record *record, double t, double *speed,
                    double *from) {
    const lee_wind_piece whole = {0, record->n};
    double at[2];
    size_t hint = 0;
    lee_wind_at(record, &whole, HOUR, t, at, &hint);
    lee_wind_speed_from(at[0], at[1], speed, from);
    *from /= degree;
}

static double speed_at(const lee_wind_record *record, double t) {
    double speed;
    double from;
    wind_at(record, t, &speed, &from);
    return speed;
}

/* Two instants an hour apart; the wind at a share of the hour. */
static void wind_on_the_way(double speed_a, double from_a, double speed_b,
                            double from_b, double share, double *speed,
                            double *from) {
    const observed wind[] = {
        {0,    speed_a, from_a},
        {HOUR, speed_b, from_b}
    };
    lee_wind_record record = record_of(2, wind, LEE_STAMP_INSTANT);
    wind_at(&record, share * HOUR, speed, from);
    lee_wind_record_free(&record);
}

static void the_wind_at_a_sample_is_the_sample_to_the_bit(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    7.1, 33 },
        {HOUR, 9.3, 210},
        {9000, 2.2, 190}
    };
    lee_wind_record record = record_of(3, wind, LEE_STAMP_INSTANT);
    const lee_wind_piece whole = {0, 3};
    for (size_t i = 0; i < 3; i++) {
        double at[2];
        size_t hint = 0;
        lee_wind_at(&record, &whole, HOUR, (double)record.time[i], at, &hint);
        assert_true(at[0] == record.east[i] && at[1] == record.north[i]);
    }
    lee_wind_record_free(&record);
}

static void speed_is_linear_between_instants(void **state) {
    (void)state;
    for (double share = 0.0; share <= 1.0; share += 0.125) {
        double speed;
        double from;
        wind_on_the_way(4.0, 200.0, 12.0, 290.0, share, &speed, &from);
        assert_near(speed, 4.0 + 8.0 * share, rounding);
    }
}

static void direction_is_linear_between_instants(void **state) {
    (void)state;
    for (double share = 0.0; share <= 1.0; share += 0.125) {
        double speed;
        double from;
        wind_on_the_way(4.0, 200.0, 12.0, 290.0, share, &speed, &from);
        assert_near(from, 200.0 + 90.0 * share, 1e-10);
    }
}

static void the_shorter_arc_leads_across_north(void **state) {
    (void)state;
    double speed;
    double from;
    wind_on_the_way(10.0, 350.0, 10.0, 30.0, 0.75, &speed, &from);
    assert_near(from, 20.0, 1e-10);
    wind_on_the_way(10.0, 30.0, 10.0, 350.0, 0.25, &speed, &from);
    assert_near(from, 20.0, 1e-10);
}

static void the_shorter_arc_may_turn_anticlockwise(void **state) {
    (void)state;
    double speed;
    double from;
    wind_on_the_way(10.0, 100.0, 10.0, 281.0, 0.5, &speed, &from);
    assert_near(from, 100.0 - 89.5, 1e-10);
}

static void opposite_winds_turn_clockwise(void **state) {
    (void)state;
    for (int d = 0; d < 360; d++) {
        double speed;
        double from;
        wind_on_the_way(10.0, d, 6.0, d + 180.0, 0.5, &speed, &from);
        assert_near(speed, 8.0, rounding);
        assert_near(remainder(from - (d + 90.0), 360.0), 0.0, 1e-10);
    }
}

static void out_of_calm_the_wind_has_the_later_direction(void **state) {
    (void)state;
    double speed;
    double from;
    wind_on_the_way(0.0, 0.0, 12.0, 250.0, 0.25, &speed, &from);
    assert_near(speed, 3.0, rounding);
    assert_near(from, 250.0, 1e-10);
}

static void into_calm_the_wind_keeps_its_direction(void **state) {
    (void)state;
    double speed;
    double from;
    wind_on_the_way(12.0, 250.0, 0.0, 0.0, 0.25, &speed, &from);
    assert_near(speed, 9.0, rounding);
    assert_near(from, 250.0, 1e-10);
}

static void between_calms_it_is_calm(void **state) {
    (void)state;
    double speed;
    double from;
    wind_on_the_way(0.0, 10.0, 0.0, 250.0, 0.5, &speed, &from);
    assert_near(speed, 0.0, 0.0);
}

static void instants_are_bridged_across_missing_samples(void **state) {
    (void)state;
    const observed wind[] = {
        {0,        4,   90 },
        {HOUR,     NAN, 0  },
        {2 * HOUR, NAN, 0  },
        {4 * HOUR, 12,  130}
    };
    lee_wind_record record = record_of(4, wind, LEE_STAMP_INSTANT);
    for (double t = 0.0; t <= 4.0 * HOUR; t += 600.0) {
        double speed;
        double from;
        wind_at(&record, t, &speed, &from);
        assert_near(speed, 4.0 + 8.0 * t / (4.0 * HOUR), rounding);
        assert_near(from, 90.0 + 40.0 * t / (4.0 * HOUR), 1e-10);
    }
    lee_wind_record_free(&record);
}

static void outside_its_span_a_piece_has_no_wind(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    4, 90},
        {HOUR, 5, 90}
    };
    lee_wind_record record = record_of(2, wind, LEE_STAMP_INSTANT);
    assert_true(isnan(speed_at(&record, -0.5)));
    assert_true(isnan(speed_at(&record, HOUR + 0.5)));
    assert_true(isnan(speed_at(&record, NAN)));
    lee_wind_record_free(&record);
}

static void a_piece_does_not_know_the_samples_around_it(void **state) {
    (void)state;
    const observed wind[] = {
        {0,   4, 90},
        {60,  5, 90},
        {120, 6, 90},
        {180, 7, 0 }
    };
    lee_wind_record record = record_of(4, wind, LEE_STAMP_INSTANT);
    const lee_wind_piece inner = {1, 3};
    double at[2];
    size_t hint = 0;
    lee_wind_at(&record, &inner, 60, 150.0, at, &hint);
    assert_true(isnan(at[0]) && isnan(at[1]));
    lee_wind_at(&record, &inner, 60, 90.0, at, &hint);
    assert_near(at[0], -5.5, rounding);
    lee_wind_record_free(&record);
}

static void a_lone_instant_has_its_wind_at_its_time(void **state) {
    (void)state;
    const observed wind[] = {
        {60, 4, 90}
    };
    lee_wind_record record = record_of(1, wind, LEE_STAMP_INSTANT);
    assert_near(speed_at(&record, 60.0), 4.0, rounding);
    assert_true(isnan(speed_at(&record, 60.5)));
    lee_wind_record_free(&record);
}

static const lee_stamp means[] = {LEE_STAMP_START, LEE_STAMP_MIDDLE,
                                  LEE_STAMP_END};
/* How long before its stamp the step of a mean begins. */
static const int64_t lead[] = {0, HOUR / 2, HOUR};

static void a_mean_spans_its_step(void **state) {
    (void)state;
    const observed wind[] = {
        {HOUR,     4, 90},
        {2 * HOUR, 5, 90}
    };
    for (size_t k = 0; k < 3; k++) {
        lee_wind_record record = record_of(2, wind, means[k]);
        const lee_wind_piece whole = {0, 2};
        int64_t from;
        int64_t to;
        lee_wind_piece_span(&record, &whole, HOUR, &from, &to);
        assert_int_equal(from, HOUR - lead[k]);
        assert_int_equal(to, 3 * HOUR - lead[k]);
        lee_wind_record_free(&record);
    }
}

static void instants_span_from_the_first_to_the_last(void **state) {
    (void)state;
    const observed wind[] = {
        {HOUR,     4, 90},
        {2 * HOUR, 5, 90}
    };
    lee_wind_record record = record_of(2, wind, LEE_STAMP_INSTANT);
    const lee_wind_piece whole = {0, 2};
    int64_t from;
    int64_t to;
    lee_wind_piece_span(&record, &whole, HOUR, &from, &to);
    assert_int_equal(from, HOUR);
    assert_int_equal(to, 2 * HOUR);
    lee_wind_record_free(&record);
}

/* Midpoint sums over each step; held values make them exact. */
static void the_mean_over_each_step_is_the_sample(void **state) {
    (void)state;
    const observed wind[] = {
        {0,        4, 90 },
        {HOUR,     9, 200},
        {2 * HOUR, 0, 0  },
        {3 * HOUR, 7, 310}
    };
    enum { PARTS = 60 };
    for (size_t k = 0; k < 3; k++) {
        lee_wind_record record = record_of(4, wind, means[k]);
        const lee_wind_piece whole = {0, 4};
        size_t hint = 0;
        for (size_t i = 0; i < 4; i++) {
            const double begin = (double)(record.time[i] - lead[k]);
            double sum[2] = {0.0, 0.0};
            for (int j = 0; j < PARTS; j++) {
                double at[2];
                const double t = begin + (j + 0.5) * HOUR / PARTS;
                lee_wind_at(&record, &whole, HOUR, t, at, &hint);
                sum[0] += at[0];
                sum[1] += at[1];
            }
            assert_near(sum[0] / PARTS, record.east[i], rounding);
            assert_near(sum[1] / PARTS, record.north[i], rounding);
        }
        lee_wind_record_free(&record);
    }
}

static void a_jump_belongs_to_the_later_step(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    4, 90 },
        {HOUR, 9, 200}
    };
    for (size_t k = 0; k < 3; k++) {
        lee_wind_record record = record_of(2, wind, means[k]);
        const double jump = (double)(HOUR - lead[k]);
        assert_near(speed_at(&record, jump - 1e-3), 4.0, rounding);
        assert_near(speed_at(&record, jump), 9.0, rounding);
        lee_wind_record_free(&record);
    }
}

static void the_last_mean_holds_to_the_very_end_of_its_step(void **state) {
    (void)state;
    const observed wind[] = {
        {0,    4, 90 },
        {HOUR, 9, 200}
    };
    for (size_t k = 0; k < 3; k++) {
        lee_wind_record record = record_of(2, wind, means[k]);
        assert_near(speed_at(&record, (double)(2 * HOUR - lead[k])), 9.0,
                    rounding);
        assert_true(isnan(speed_at(&record, 2.0 * HOUR - (double)lead[k] + 1)));
        lee_wind_record_free(&record);
    }
}

/* Steps [0, 1 h) and [4 h, 5 h): the three hours between are linear. */
static void the_time_between_two_distant_means_is_linear(void **state) {
    (void)state;
    for (size_t k = 0; k < 3; k++) {
        const observed wind[] = {
            {lead[k],            4,   350},
            {lead[k] + 2 * HOUR, NAN, 0  },
            {lead[k] + 4 * HOUR, 10,  20 }
        };
        lee_wind_record record = record_of(3, wind, means[k]);
        for (double t = HOUR; t <= 4.0 * HOUR; t += 600.0) {
            const double share = (t - HOUR) / (3.0 * HOUR);
            double speed;
            double from;
            wind_at(&record, t, &speed, &from);
            assert_near(speed, 4.0 + 6.0 * share, rounding);
            assert_near(remainder(from - (350.0 + 30.0 * share), 360.0), 0.0,
                        1e-10);
        }
        assert_near(speed_at(&record, 0.9 * HOUR), 4.0, rounding);
        assert_near(speed_at(&record, 4.1 * HOUR), 10.0, rounding);
        lee_wind_record_free(&record);
    }
}

/* Stamps half a step apart: START holds the first for the time between the
 * stamps, END the second, MIDDLE each for half of it. */
static void means_that_overlap_part_the_time_by_their_stamp(void **state) {
    (void)state;
    const double cut[] = {HOUR / 2.0, HOUR / 4.0, 0.0};
    for (size_t k = 0; k < 3; k++) {
        const observed wind[] = {
            {0,        4, 90},
            {HOUR / 2, 9, 90}
        };
        lee_wind_record record = record_of(2, wind, means[k]);
        assert_near(speed_at(&record, cut[k] - 1.0), 4.0, rounding);
        assert_near(speed_at(&record, cut[k] + 1.0), 9.0, rounding);
        lee_wind_record_free(&record);
    }
}

/* A random record of instants and means with missing samples. */
static lee_wind_record random_record(size_t n, uint64_t *seed, double turn) {
    lee_wind_record record;
    assert_int_equal(lee_wind_record_init(&record, n, NULL), LEE_OK);
    int64_t t = 1000;
    for (size_t i = 0; i < n; i++) {
        const double speed = uniform(seed) < 0.1 ? 0.0 : 30.0 * uniform(seed);
        const double from = 360.0 * uniform(seed);
        const bool is_there = i == 0 || i + 1 == n || uniform(seed) > 0.2;
        record.time[i] = t;
        lee_wind_components(is_there ? speed : NAN, from * degree + turn,
                            &record.east[i], &record.north[i]);
        t += 60 * (1 + (int64_t)(80.0 * uniform(seed)));
    }
    return record;
}

static const lee_stamp stamps[] = {LEE_STAMP_INSTANT, LEE_STAMP_START,
                                   LEE_STAMP_MIDDLE, LEE_STAMP_END};

static void the_wind_of_a_rotated_record_is_the_rotated_wind(void **state) {
    (void)state;
    enum { N = 40 };
    const double turn = 77.0 * degree;
    for (size_t k = 0; k < 4; k++) {
        uint64_t seed[] = {11 + k, 11 + k};
        lee_wind_record plain = random_record(N, &seed[0], 0.0);
        lee_wind_record turned = random_record(N, &seed[1], turn);
        plain.stamp = stamps[k];
        turned.stamp = stamps[k];
        const lee_wind_piece whole = {0, N};
        int64_t from;
        int64_t to;
        lee_wind_piece_span(&plain, &whole, HOUR, &from, &to);
        size_t hint[] = {0, 0};
        for (double t = (double)from; t <= (double)to; t += 97.0) {
            double a[2];
            double b[2];
            lee_wind_at(&plain, &whole, HOUR, t, a, &hint[0]);
            lee_wind_at(&turned, &whole, HOUR, t, b, &hint[1]);
            assert_near(b[0], a[0] * cos(turn) + a[1] * sin(turn), rounding);
            assert_near(b[1], a[1] * cos(turn) - a[0] * sin(turn), rounding);
        }
        lee_wind_record_free(&plain);
        lee_wind_record_free(&turned);
    }
}

static void the_mirror_of_a_record_has_the_mirrored_wind(void **state) {
    (void)state;
    enum { N = 40 };
    uint64_t seed = 5;
    lee_wind_record plain = random_record(N, &seed, 0.0);
    seed = 5;
    lee_wind_record mirror = random_record(N, &seed, 0.0);
    for (size_t i = 0; i < N; i++) {
        mirror.east[i] = -mirror.east[i];
    }
    const lee_wind_piece whole = {0, N};
    size_t hint = 0;
    for (double t = 1000.0; t <= (double)plain.time[N - 1]; t += 53.0) {
        double a[2];
        double b[2];
        lee_wind_at(&plain, &whole, HOUR, t, a, &hint);
        lee_wind_at(&mirror, &whole, HOUR, t, b, &hint);
        assert_near(b[0], -a[0], rounding);
        assert_near(b[1], a[1], rounding);
    }
    lee_wind_record_free(&plain);
    lee_wind_record_free(&mirror);
}

static void the_hint_does_not_change_the_wind(void **state) {
    (void)state;
    enum { N = 60 };
    uint64_t seed = 3;
    lee_wind_record record = random_record(N, &seed, 0.0);
    const lee_wind_piece whole = {0, N};
    for (size_t k = 0; k < 4; k++) {
        record.stamp = stamps[k];
        int64_t from;
        int64_t to;
        lee_wind_piece_span(&record, &whole, HOUR, &from, &to);
        for (int j = 0; j < 500; j++) {
            const double t =
                (double)from + (double)(to - from) * uniform(&seed);
            size_t hint = (size_t)(2.0 * N * uniform(&seed));
            size_t start = 0;
            double a[2];
            double b[2];
            lee_wind_at(&record, &whole, HOUR, t, a, &hint);
            lee_wind_at(&record, &whole, HOUR, t, b, &start);
            assert_true(a[0] == b[0] && a[1] == b[1]);
            assert_int_equal(hint, start);
        }
    }
    lee_wind_record_free(&record);
}

static void between_instants_the_speed_leaves_no_sample_behind(void **state) {
    (void)state;
    enum { N = 60 };
    uint64_t seed = 9;
    lee_wind_record record = random_record(N, &seed, 0.0);
    const lee_wind_piece whole = {0, N};
    double top = 0.0;
    for (size_t i = 0; i < N; i++) {
        const double speed = hypot(record.east[i], record.north[i]);
        top = speed > top ? speed : top;
    }
    size_t hint = 0;
    for (double t = 1000.0; t <= (double)record.time[N - 1]; t += 31.0) {
        double at[2];
        lee_wind_at(&record, &whole, HOUR, t, at, &hint);
        assert_true(hypot(at[0], at[1]) <= top + rounding);
    }
    lee_wind_record_free(&record);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(the_wind_at_a_sample_is_the_sample_to_the_bit),
        cmocka_unit_test(speed_is_linear_between_instants),
        cmocka_unit_test(direction_is_linear_between_instants),
        cmocka_unit_test(the_shorter_arc_leads_across_north),
        cmocka_unit_test(the_shorter_arc_may_turn_anticlockwise),
        cmocka_unit_test(opposite_winds_turn_clockwise),
        cmocka_unit_test(out_of_calm_the_wind_has_the_later_direction),
        cmocka_unit_test(into_calm_the_wind_keeps_its_direction),
        cmocka_unit_test(between_calms_it_is_calm),
        cmocka_unit_test(instants_are_bridged_across_missing_samples),
        cmocka_unit_test(outside_its_span_a_piece_has_no_wind),
        cmocka_unit_test(a_piece_does_not_know_the_samples_around_it),
        cmocka_unit_test(a_lone_instant_has_its_wind_at_its_time),
        cmocka_unit_test(a_mean_spans_its_step),
        cmocka_unit_test(instants_span_from_the_first_to_the_last),
        cmocka_unit_test(the_mean_over_each_step_is_the_sample),
        cmocka_unit_test(a_jump_belongs_to_the_later_step),
        cmocka_unit_test(the_last_mean_holds_to_the_very_end_of_its_step),
        cmocka_unit_test(the_time_between_two_distant_means_is_linear),
        cmocka_unit_test(means_that_overlap_part_the_time_by_their_stamp),
        cmocka_unit_test(the_wind_of_a_rotated_record_is_the_rotated_wind),
        cmocka_unit_test(the_mirror_of_a_record_has_the_mirrored_wind),
        cmocka_unit_test(the_hint_does_not_change_the_wind),
        cmocka_unit_test(between_instants_the_speed_leaves_no_sample_behind),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
