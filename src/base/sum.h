/* sum.h - compensated summation (Neumaier 1974) [neumaier1974]. */
#ifndef LEEWATER_BASE_SUM_H
#define LEEWATER_BASE_SUM_H

#include <math.h>

/* {0} is an empty sum. */
typedef struct lee_sum {
    double total;
    double lost; /* what rounding took from total */
} lee_sum;

static inline void lee_sum_add(lee_sum *sum, double term) {
    const double next = sum->total + term;
    if (fabs(sum->total) >= fabs(term)) {
        sum->lost += (sum->total - next) + term;
    } else {
        sum->lost += (term - next) + sum->total;
    }
    sum->total = next;
}

static inline double lee_sum_value(const lee_sum *sum) {
    return sum->total + sum->lost;
}

#endif
