/* tridiagonal.c - eigenvalues of symmetric tridiagonal matrices. */
#include "numerics/tridiagonal.h"

#include <float.h>
#include <math.h>

/* Reach of the row's disc: what Gershgorin adds to the diagonal. */
static double disc(size_t n, const double e[], size_t i) {
    const double before = i > 0 ? fabs(e[i - 1]) : 0.0;
    const double after = i + 1 < n ? fabs(e[i]) : 0.0;
    return before + after;
}

/* Number of eigenvalues below x: signs in the Sturm sequence of pivots. */
static size_t count_below(size_t n, const double d[], const double e[],
                          double x, double least_pivot) {
    double pivot = d[0] - x;
    size_t count = pivot < 0.0;
    for (size_t i = 1; i < n; i++) {
        if (fabs(pivot) < least_pivot) {
            pivot = pivot < 0.0 ? -least_pivot : least_pivot;
        }
        pivot = (d[i] - x) - e[i - 1] * e[i - 1] / pivot;
        count += pivot < 0.0;
    }
    return count;
}

double lee_tridiagonal_eigenvalue(size_t n, const double d[], const double e[],
                                  size_t k) {
    double low = INFINITY;
    double high = -INFINITY;
    for (size_t i = 0; i < n; i++) {
        const double reach = disc(n, e, i);
        low = fmin(low, d[i] - reach);
        high = fmax(high, d[i] + reach);
    }
    const double largest = fmax(fabs(low), fabs(high));
    const double least_pivot =
        fmax(DBL_MIN, DBL_EPSILON * DBL_EPSILON * largest);
    low -= DBL_EPSILON * largest;
    high += DBL_EPSILON * largest;
    while (high - low > 0.25 * DBL_EPSILON * largest) {
        const double middle = low + 0.5 * (high - low);
        if (!(middle > low && middle < high)) {
            break;
        }
        if (count_below(n, d, e, middle, least_pivot) > k) {
            high = middle;
        } else {
            low = middle;
        }
    }
    return 0.5 * (low + high);
}
