/* support.h - small records for the tests of the wind. */
#ifndef LEEWATER_TESTS_WIND_SUPPORT_H
#define LEEWATER_TESTS_WIND_SUPPORT_H

#include "support/check.h"

#include "leewater/wind.h"

static const double degree = 3.14159265358979323846 / 180.0;

/* One wind as an observer writes it down. */
typedef struct observed {
    int64_t time; /* s                        */
    double speed; /* m s-1; NaN when missing  */
    double from;  /* degrees                  */
} observed;

/* A record of n observed winds; free it with lee_wind_record_free. */
static inline lee_wind_record record_of(size_t n, const observed wind[],
                                        lee_stamp stamp) {
    lee_wind_record record;
    assert_int_equal(lee_wind_record_init(&record, n, NULL), LEE_OK);
    record.stamp = stamp;
    for (size_t i = 0; i < n; i++) {
        record.time[i] = wind[i].time;
        lee_wind_components(wind[i].speed, wind[i].from * degree,
                            &record.east[i], &record.north[i]);
    }
    return record;
}

/* Uniform numbers in [0, 1): a 64-bit congruential generator (multiplier and
 * increment of Knuth's MMIX, from memory), upper 53 bits. */
static inline double uniform(uint64_t *state) {
    *state =
        *state * UINT64_C(6364136223846793005) + UINT64_C(1442695040888963407);
    return (double)(*state >> 11) * 0x1p-53;
}

#endif
