/* check.h - cmocka with assertions that suit doubles. */
#ifndef LEEWATER_TESTS_CHECK_H
#define LEEWATER_TESTS_CHECK_H

#include <math.h>
#include <setjmp.h>
#include <stdarg.h>
#include <stddef.h>
#include <stdint.h>

#include <cmocka.h>

/* Passes when |actual - expected| <= tolerance. NaN never passes. Use it and
 * not assert_float_equal, which rounds both values to float first. */
#define assert_near(actual, expected, tolerance) \
    check_near((actual), (expected), (tolerance), #actual, __FILE__, __LINE__)

/* Passes when actual is within `share` of expected, relative to expected. */
#define assert_near_share(actual, expected, share)                    \
    check_near((actual), (expected), (share)*fabs(expected), #actual, \
               __FILE__, __LINE__)

static inline void check_near(double actual, double expected, double tolerance,
                              const char *what, const char *file, int line) {
    if (!(fabs(actual - expected) <= tolerance)) {
        print_error("%s is %.17g, expected %.17g within %g\n", what, actual,
                    expected, tolerance);
        _fail(file, line);
    }
}

#endif
