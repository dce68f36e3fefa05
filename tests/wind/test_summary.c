/* A record in sums: coverage, rose, percentiles, storms. Counted by hand. */
#include "wind/support.h"

#include <stdlib.h>

#include "leewater/calendar.h"

static const int64_t hour = 3600;
static const int64_t day = 86400;

/* Shares are ratios of whole numbers; their rounding is far below this. */
static const double rounding = 1e-12;

static int64_t date(int year, int month, int day_of_month, int at_hour) {
    int64_t time = 0;
    assert_true(
        lee_time_from_civil(year, month, day_of_month, at_hour, 0, 0, &time));
    return time;
}

static lee_wind_summary sum_up(const lee_wind_record *record) {
    lee_wind_summary summary;
    lee_wind_check check;
    const lee_gap_rule rule = {.largest = 0};
    assert_int_equal(lee_wind_check_record(record, &rule, &check, NULL),
                     LEE_OK);
    assert_int_equal(lee_wind_summarise(record, check.step, &summary, NULL),
                     LEE_OK);
    lee_wind_check_free(&check);
    return summary;
}

/* n hourly winds of one speed and direction from `start` on. */
static lee_wind_record hourly(size_t n, int64_t start, double speed,
                              double from) {
    lee_wind_record record;
    assert_int_equal(lee_wind_record_init(&record, n, NULL), LEE_OK);
    for (size_t i = 0; i < n; i++) {
        record.time[i] = start + (int64_t)i * hour;
        lee_wind_components(speed, from * degree, &record.east[i],
                            &record.north[i]);
    }
    return record;
}

static void set_speed(lee_wind_record *record, size_t index, double speed) {
    lee_wind_components(speed, 200.0 * degree, &record->east[index],
                        &record->north[index]);
}

static lee_wind_summary sum_up_observed(size_t n, const observed wind[],
                                        lee_stamp stamp) {
    lee_wind_record record = record_of(n, wind, stamp);
    const lee_wind_summary summary = sum_up(&record);
    lee_wind_record_free(&record);
    return summary;
}

static double sector_share(const lee_wind_summary *summary, size_t sector) {
    double share = 0.0;
    for (size_t k = 0; k < LEE_ROSE_CLASSES; k++) {
        share += summary->rose[sector][k];
    }
    return share;
}

static double whole_rose(const lee_wind_summary *summary) {
    double share = summary->calm;
    for (size_t i = 0; i < LEE_ROSE_DIRECTIONS; i++) {
        share += sector_share(summary, i);
    }
    return share;
}

/* 30 January 00:00 to 2 March 23:00 of a leap year: 48 of 744 h, all 696 h,
 * 48 of 744 h. Of February's a day is missing, and of its last a day is not
 * there at all. */
static void months_are_covered_by_what_has_wind_in_them(void **state) {
    (void)state;
    lee_wind_record record = hourly(33 * 24, date(2032, 1, 30, 0), 5.0, 200.0);
    for (size_t i = 0; i < 24; i++) {
        record.east[240 + i] = NAN;
        record.north[240 + i] = NAN;
    }
    const size_t gone = (2 + 28) * 24; /* 29 February */
    for (size_t i = gone; i + 24 < record.n; i++) {
        record.time[i] = record.time[i + 24];
    }
    record.n -= 24;
    lee_wind_summary summary = sum_up(&record);
    assert_int_equal(summary.month_count, 3);
    assert_int_equal(summary.month[1].year, 2032);
    assert_int_equal(summary.month[1].month, 2);
    assert_int_equal(summary.month[0].samples, 48);
    assert_int_equal(summary.month[1].samples, 696 - 24);
    assert_int_equal(summary.month[1].with_wind, 696 - 48);
    assert_near(summary.month[0].coverage, 48.0 / 744.0, rounding);
    assert_near(summary.month[1].coverage, (696.0 - 48.0) / 696.0, rounding);
    assert_near(summary.month[2].coverage, 48.0 / 744.0, rounding);
    assert_near(summary.coverage, (33.0 * 24.0 - 48.0) / (33.0 * 24.0),
                rounding);
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

static void a_month_without_samples_is_there_and_empty(void **state) {
    (void)state;
    const observed wind[] = {
        {date(2031, 12, 31, 22), 4.0, 10},
        {date(2031, 12, 31, 23), 4.0, 10},
        {date(2032, 2,  1,  0),  4.0, 10},
        {date(2032, 2,  1,  1),  4.0, 10},
    };
    lee_wind_summary summary = sum_up_observed(4, wind, LEE_STAMP_INSTANT);
    assert_int_equal(summary.month_count, 3);
    assert_int_equal(summary.month[1].year, 2032);
    assert_int_equal(summary.month[1].month, 1);
    assert_int_equal(summary.month[1].samples, 0);
    assert_near(summary.month[1].coverage, 0.0, 0.0);
    assert_int_equal(summary.month[2].samples, 2);
    lee_wind_summary_free(&summary);
}

/* The mean that ends at midnight of the 1st belongs to the month before. */
static void a_mean_belongs_to_the_month_in_which_it_begins(void **state) {
    (void)state;
    lee_wind_record record = hourly(2, date(2031, 2, 1, 0), 5.0, 200.0);
    record.stamp = LEE_STAMP_END;
    lee_wind_summary summary = sum_up(&record);
    assert_int_equal(summary.month_count, 2);
    assert_int_equal(summary.month[0].month, 1);
    assert_int_equal(summary.month[0].samples, 1);
    assert_int_equal(summary.month[1].samples, 1);
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

/* Hours, and one more at half past three: six samples of five hours. */
static void a_special_sample_covers_no_time_twice(void **state) {
    (void)state;
    const observed wind[] = {
        {0,               5.0, 0 },
        {hour,            5.0, 0 },
        {2 * hour,        5.0, 0 },
        {3 * hour,        5.0, 0 },
        {3 * hour + 1800, 5.0, 90},
        {4 * hour,        5.0, 0 },
    };
    lee_wind_summary summary = sum_up_observed(6, wind, LEE_STAMP_INSTANT);
    assert_near(summary.coverage, 1.0, rounding);
    assert_near(sector_share(&summary, 4), 0.5 / 5.0, rounding);
    assert_near(summary.month[0].coverage, 5.0 / 744.0, rounding);
    lee_wind_summary_free(&summary);
}

/* The same times as ends: the one at half past three stands for the half hour
 * before it, the one at four for the other half. */
static void a_mean_covers_the_time_before_its_end(void **state) {
    (void)state;
    const observed wind[] = {
        {0,               5.0, 0  },
        {hour,            5.0, 0  },
        {2 * hour,        5.0, 0  },
        {3 * hour,        5.0, 0  },
        {3 * hour + 1800, 5.0, 90 },
        {5 * hour,        5.0, 180},
    };
    lee_wind_summary summary = sum_up_observed(6, wind, LEE_STAMP_END);
    assert_near(sector_share(&summary, 4), 0.5 / 5.5, rounding);
    assert_near(sector_share(&summary, 8), 1.0 / 5.5, rounding);
    assert_near(summary.coverage, 5.5 / 6.0, rounding);
    lee_wind_summary_free(&summary);
}

/* Two calms, one missing, and one wind for each of five sectors. */
static void the_rose_counts_hours_by_sector_and_class(void **state) {
    (void)state;
    const observed wind[] = {
        {0,        0.0,  0    },
        {hour,     0.0,  0    },
        {2 * hour, NAN,  0    },
        {3 * hour, 2.9,  348.8},
        {4 * hour, 3.0,  11.2 },
        {5 * hour, 9.9,  11.3 },
        {6 * hour, 10.0, 270  },
        {7 * hour, 40.0, 348.7},
    };
    lee_wind_summary summary = sum_up_observed(8, wind, LEE_STAMP_INSTANT);
    assert_near(summary.calm, 2.0 / 7.0, rounding);
    assert_near(summary.rose[0][0], 1.0 / 7.0, rounding);
    assert_near(summary.rose[0][1], 1.0 / 7.0, rounding);
    assert_near(summary.rose[1][2], 1.0 / 7.0, rounding);
    assert_near(summary.rose[12][3], 1.0 / 7.0, rounding);
    assert_near(summary.rose[15][5], 1.0 / 7.0, rounding);
    assert_near(whole_rose(&summary), 1.0, rounding);
    assert_int_equal(summary.with_wind, 7);
    lee_wind_summary_free(&summary);
}

static lee_wind_record random_record(size_t n, double turned, double grain) {
    uint64_t seed = 11;
    lee_wind_record record;
    assert_int_equal(lee_wind_record_init(&record, n, NULL), LEE_OK);
    for (size_t i = 0; i < n; i++) {
        const double speed = 25.0 * uniform(&seed) * uniform(&seed);
        const double from = grain * floor(360.0 / grain * uniform(&seed));
        const bool is_there = uniform(&seed) < 0.9;
        record.time[i] = (int64_t)i * hour;
        if (is_there) {
            lee_wind_components(speed, (from + turned) * degree,
                                &record.east[i], &record.north[i]);
        }
    }
    return record;
}

/* Bounds of sectors lie at odd quarters of a degree, these directions at 0.1
 * and 0.6. */
static void a_turned_record_turns_its_rose(void **state) {
    (void)state;
    for (size_t turn = 0; turn < LEE_ROSE_DIRECTIONS; turn++) {
        lee_wind_record still = random_record(500, 0.1, 1.0);
        lee_wind_record turned =
            random_record(500, 0.1 + 22.5 * (double)turn, 1.0);
        lee_wind_summary a = sum_up(&still);
        lee_wind_summary b = sum_up(&turned);
        assert_near(whole_rose(&a), 1.0, rounding);
        for (size_t i = 0; i < LEE_ROSE_DIRECTIONS; i++) {
            const size_t there = (i + turn) % LEE_ROSE_DIRECTIONS;
            for (size_t k = 0; k < LEE_ROSE_CLASSES; k++) {
                assert_near(b.rose[there][k], a.rose[i][k], rounding);
            }
        }
        lee_wind_summary_free(&a);
        lee_wind_summary_free(&b);
        lee_wind_record_free(&still);
        lee_wind_record_free(&turned);
    }
}

/* One wind from each ten degrees, four times round: 36 directions, so each
 * sector holds 2.25 of them. Unspread, north would hold 3 and its neighbour
 * 2. */
static void even_tens_of_degrees_make_an_even_rose(void **state) {
    (void)state;
    enum { N = 144 };
    lee_wind_record record = hourly(N, 0, 5.0, 0.0);
    for (size_t i = 0; i < N; i++) {
        lee_wind_components(5.0, (double)(i % 36) * 10.0 * degree,
                            &record.east[i], &record.north[i]);
    }
    lee_wind_summary summary = sum_up(&record);
    assert_true(summary.is_spread);
    for (size_t i = 0; i < LEE_ROSE_DIRECTIONS; i++) {
        assert_near(sector_share(&summary, i), 1.0 / 16.0, rounding);
    }
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

/* 10 degrees reach from 5 to 15; the northern sector ends at 11.25. */
static void a_ten_is_shared_by_the_sectors_it_touches(void **state) {
    (void)state;
    lee_wind_record record = hourly(100, 0, 5.0, 10.0);
    lee_wind_summary summary = sum_up(&record);
    assert_near(sector_share(&summary, 0), 0.625, 1e-9);
    assert_near(sector_share(&summary, 1), 0.375, 1e-9);
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

static void few_tens_and_other_directions_are_not_spread(void **state) {
    (void)state;
    lee_wind_record few = hourly(99, 0, 5.0, 10.0);
    lee_wind_summary summary = sum_up(&few);
    assert_false(summary.is_spread);
    assert_near(sector_share(&summary, 0), 1.0, rounding);
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&few);
    lee_wind_record many = hourly(200, 0, 5.0, 10.0);
    lee_wind_components(5.0, 11.0 * degree, &many.east[7], &many.north[7]);
    summary = sum_up(&many);
    assert_false(summary.is_spread);
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&many);
}

/* Speeds 1 to 1000 by chance order: the p-th of a hundred parts is 10 p. */
static void percentiles_are_ranks_of_the_sorted_speeds(void **state) {
    (void)state;
    enum { N = 1000 };
    static const double expected[] = {500, 750, 900, 950, 990, 999};
    lee_wind_record record = hourly(N, 0, 1.0, 200.0);
    uint64_t seed = 3;
    double speed[N];
    for (size_t i = 0; i < N; i++) {
        speed[i] = (double)i + 1.0;
    }
    for (size_t i = N - 1; i > 0; i--) {
        const size_t j = (size_t)((double)(i + 1) * uniform(&seed));
        const double kept = speed[i];
        speed[i] = speed[j];
        speed[j] = kept;
    }
    for (size_t i = 0; i < N; i++) {
        set_speed(&record, i, speed[i]);
    }
    lee_wind_summary summary = sum_up(&record);
    for (size_t i = 0; i < LEE_WIND_PERCENTILES; i++) {
        assert_near(summary.percentile[i], expected[i], 1e-9);
    }
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

static int compare(const void *left, const void *right) {
    const double a = *(const double *)left;
    const double b = *(const double *)right;
    return (a > b) - (a < b);
}

/* Ties, which a record of whole numbers is full of, and all small sizes;
 * against the C library's sort. */
static void percentiles_of_ties_agree_with_sorting(void **state) {
    (void)state;
    uint64_t seed = 5;
    for (size_t n = 1; n <= 120; n++) {
        lee_wind_record record = hourly(n, 0, 1.0, 200.0);
        double sorted[120];
        for (size_t i = 0; i < n; i++) {
            set_speed(&record, i, floor(7.0 * uniform(&seed)));
            sorted[i] = hypot(record.east[i], record.north[i]);
        }
        qsort(sorted, n, sizeof sorted[0], compare);
        lee_wind_summary summary = sum_up(&record);
        for (size_t i = 0; i < LEE_WIND_PERCENTILES; i++) {
            /* Tenths of a percent as whole numbers: n p / 1000, rounded up. */
            const size_t p = (size_t)llround(10.0 * lee_wind_percent(i));
            const size_t rank = (n * p + 999) / 1000;
            assert_near(summary.percentile[i], sorted[rank - 1], 0.0);
        }
        lee_wind_summary_free(&summary);
        lee_wind_record_free(&record);
    }
}

/* Peaks of 20 at 100 h, 15 at 160 h, 18 at 200 h: 40 h from the second, so
 * that is its flank; and 12 at 300 h. The rest is a breeze of 2. */
static void storms_are_the_fastest_winds_of_48_hours_either_way(void **state) {
    (void)state;
    lee_wind_record record = hourly(400, 0, 2.0, 200.0);
    set_speed(&record, 100, 20.0);
    set_speed(&record, 160, 15.0);
    set_speed(&record, 200, 18.0);
    set_speed(&record, 300, 12.0);
    lee_wind_summary summary = sum_up(&record);
    static const size_t at[] = {100, 200, 300};
    static const double speed[] = {20.0, 18.0, 12.0};
    assert_true(summary.storm_count >= 3);
    for (size_t i = 0; i < 3; i++) {
        assert_int_equal(summary.storm[i].time, (int64_t)at[i] * hour);
        assert_near(summary.storm[i].speed, speed[i], 1e-12);
        assert_near(summary.storm[i].from, 200.0 * degree, 1e-12);
    }
    for (size_t i = 3; i < summary.storm_count; i++) {
        assert_near(summary.storm[i].speed, 2.0, 1e-12);
    }
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

/* The slow way: each sample against all others. */
static bool is_storm(const lee_wind_record *record, size_t i) {
    const double here = hypot(record->east[i], record->north[i]);
    bool is_one = here > 0.0;
    for (size_t j = 0; j < record->n; j++) {
        const double there = hypot(record->east[j], record->north[j]);
        const int64_t apart = record->time[j] - record->time[i];
        if (apart < 0 && apart >= -LEE_STORM_PARTED) {
            is_one = is_one && !(there >= here);
        } else if (apart > 0 && apart <= LEE_STORM_PARTED) {
            is_one = is_one && !(there > here);
        }
    }
    return is_one;
}

static void storms_are_those_that_a_search_of_all_pairs_finds(void **state) {
    (void)state;
    lee_wind_record record = random_record(600, 0.0, 1.0);
    lee_wind_summary summary = sum_up(&record);
    size_t found = 0;
    for (size_t i = 0; i < record.n; i++) {
        bool is_listed = false;
        for (size_t k = 0; k < summary.storm_count; k++) {
            is_listed = is_listed || summary.storm[k].time == record.time[i];
        }
        if (is_listed) {
            assert_true(is_storm(&record, i));
        } else if (is_storm(&record, i)) {
            assert_int_equal(summary.storm_count, LEE_WIND_STORMS);
            assert_true(hypot(record.east[i], record.north[i]) <=
                        summary.storm[LEE_WIND_STORMS - 1].speed);
        }
        found += is_listed;
    }
    assert_int_equal(found, summary.storm_count);
    for (size_t k = 1; k < summary.storm_count; k++) {
        assert_true(summary.storm[k - 1].speed >= summary.storm[k].speed);
    }
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

static void a_steady_wind_is_one_storm_that_the_record_cuts(void **state) {
    (void)state;
    lee_wind_record record = hourly(1000, 0, 8.0, 200.0);
    lee_wind_summary summary = sum_up(&record);
    assert_int_equal(summary.storm_count, 1);
    assert_int_equal(summary.storm[0].time, 0);
    assert_true(summary.storm[0].is_cut);
    assert_near(summary.storm[0].duration, 999.0 * 3600.0, 0.0);
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

/* 0, 20, 0: three quarters are crossed a quarter of an hour either way. */
static void a_storm_of_instants_lasts_between_its_crossings(void **state) {
    (void)state;
    const observed wind[] = {
        {0,        0.0,  0  },
        {hour,     20.0, 200},
        {2 * hour, 0.0,  0  },
    };
    lee_wind_summary summary = sum_up_observed(3, wind, LEE_STAMP_INSTANT);
    assert_int_equal(summary.storm_count, 1);
    assert_false(summary.storm[0].is_cut);
    assert_near(summary.storm[0].duration, 1800.0, 1e-6);
    lee_wind_summary_free(&summary);
}

/* 16 of 20 is above three quarters, 14 is not: two steps. */
static void a_storm_of_means_lasts_whole_steps(void **state) {
    (void)state;
    static const lee_stamp stamps[] = {LEE_STAMP_START, LEE_STAMP_MIDDLE,
                                       LEE_STAMP_END};
    const observed wind[] = {
        {0,        14.0, 200},
        {hour,     20.0, 200},
        {2 * hour, 16.0, 200},
        {3 * hour, 1.0,  200},
    };
    for (size_t i = 0; i < 3; i++) {
        lee_wind_summary summary = sum_up_observed(4, wind, stamps[i]);
        assert_false(summary.storm[0].is_cut);
        assert_near(summary.storm[0].duration, 7200.0, 0.0);
        lee_wind_summary_free(&summary);
    }
}

static void a_missing_sample_cuts_a_storm(void **state) {
    (void)state;
    const observed wind[] = {
        {0,        0.0,  0  },
        {hour,     20.0, 200},
        {2 * hour, NAN,  0  },
        {3 * hour, 20.0, 200},
    };
    lee_wind_summary summary = sum_up_observed(4, wind, LEE_STAMP_INSTANT);
    assert_true(summary.storm[0].is_cut);
    assert_near(summary.storm[0].duration, 900.0, 1e-6);
    lee_wind_summary_free(&summary);
}

static void a_sample_that_is_not_there_cuts_a_storm(void **state) {
    (void)state;
    const observed wind[] = {
        {0,        0.0,  0  },
        {hour,     20.0, 200},
        {3 * hour, 20.0, 200},
        {4 * hour, 0.0,  0  },
        {5 * hour, 0.0,  0  },
    };
    lee_wind_summary summary = sum_up_observed(5, wind, LEE_STAMP_INSTANT);
    assert_int_equal(summary.storm_count, 1);
    assert_true(summary.storm[0].is_cut);
    assert_near(summary.storm[0].duration, 900.0, 1e-6);
    lee_wind_summary_free(&summary);
}

static void a_spike_among_the_storms_is_marked(void **state) {
    (void)state;
    lee_wind_record record = hourly(200, 0, 4.0, 200.0);
    set_speed(&record, 50, 30.0);
    set_speed(&record, 150, 12.0);
    lee_wind_summary summary = sum_up(&record);
    assert_true(summary.storm[0].is_spike);
    assert_false(summary.storm[1].is_spike);
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

static void a_single_sample_has_a_rose_and_no_coverage(void **state) {
    (void)state;
    const observed wind[] = {
        {day, 7.0, 90}
    };
    lee_wind_summary summary = sum_up_observed(1, wind, LEE_STAMP_INSTANT);
    assert_int_equal(summary.month_count, 1);
    assert_int_equal(summary.month[0].with_wind, 1);
    assert_true(isnan(summary.month[0].coverage) != 0);
    assert_true(isnan(summary.coverage) != 0);
    assert_near(summary.rose[4][2], 1.0, 0.0);
    assert_near(summary.percentile[0], 7.0, 1e-12);
    assert_int_equal(summary.storm_count, 1);
    assert_true(summary.storm[0].is_cut);
    assert_near(summary.storm[0].duration, 0.0, 0.0);
    lee_wind_summary_free(&summary);
}

static void a_calm_record_has_no_storm(void **state) {
    (void)state;
    lee_wind_record record = hourly(100, 0, 0.0, 0.0);
    lee_wind_summary summary = sum_up(&record);
    assert_near(summary.calm, 1.0, 0.0);
    assert_near(whole_rose(&summary), 1.0, 0.0);
    assert_int_equal(summary.storm_count, 0);
    assert_near(summary.percentile[5], 0.0, 0.0);
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

static void a_record_without_wind_has_no_shares(void **state) {
    (void)state;
    lee_wind_record record = hourly(3, 0, NAN, 0.0);
    lee_wind_summary summary = sum_up(&record);
    assert_int_equal(summary.with_wind, 0);
    assert_int_equal(summary.storm_count, 0);
    assert_near(summary.coverage, 0.0, 0.0);
    assert_true(isnan(summary.calm) != 0);
    assert_true(isnan(summary.rose[3][2]) != 0);
    assert_true(isnan(summary.percentile[0]) != 0);
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

static void the_months_hold_every_sample(void **state) {
    (void)state;
    lee_wind_record record = random_record(20000, 0.0, 1.0);
    lee_wind_summary summary = sum_up(&record);
    size_t samples = 0;
    size_t with_wind = 0;
    for (size_t i = 0; i < summary.month_count; i++) {
        samples += summary.month[i].samples;
        with_wind += summary.month[i].with_wind;
    }
    assert_int_equal(samples, record.n);
    assert_int_equal(with_wind, summary.with_wind);
    lee_wind_summary_free(&summary);
    lee_wind_record_free(&record);
}

int main(void) {
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(months_are_covered_by_what_has_wind_in_them),
        cmocka_unit_test(a_month_without_samples_is_there_and_empty),
        cmocka_unit_test(a_mean_belongs_to_the_month_in_which_it_begins),
        cmocka_unit_test(a_special_sample_covers_no_time_twice),
        cmocka_unit_test(a_mean_covers_the_time_before_its_end),
        cmocka_unit_test(the_rose_counts_hours_by_sector_and_class),
        cmocka_unit_test(a_turned_record_turns_its_rose),
        cmocka_unit_test(even_tens_of_degrees_make_an_even_rose),
        cmocka_unit_test(a_ten_is_shared_by_the_sectors_it_touches),
        cmocka_unit_test(few_tens_and_other_directions_are_not_spread),
        cmocka_unit_test(percentiles_are_ranks_of_the_sorted_speeds),
        cmocka_unit_test(percentiles_of_ties_agree_with_sorting),
        cmocka_unit_test(storms_are_the_fastest_winds_of_48_hours_either_way),
        cmocka_unit_test(storms_are_those_that_a_search_of_all_pairs_finds),
        cmocka_unit_test(a_steady_wind_is_one_storm_that_the_record_cuts),
        cmocka_unit_test(a_storm_of_instants_lasts_between_its_crossings),
        cmocka_unit_test(a_storm_of_means_lasts_whole_steps),
        cmocka_unit_test(a_missing_sample_cuts_a_storm),
        cmocka_unit_test(a_sample_that_is_not_there_cuts_a_storm),
        cmocka_unit_test(a_spike_among_the_storms_is_marked),
        cmocka_unit_test(a_single_sample_has_a_rose_and_no_coverage),
        cmocka_unit_test(a_calm_record_has_no_storm),
        cmocka_unit_test(a_record_without_wind_has_no_shares),
        cmocka_unit_test(the_months_hold_every_sample),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
