/* roots.c - roots of one function, by GSL's Brent solver. */
#include "numerics/roots.h"

#include <float.h>
#include <math.h>
#include <stdbool.h>

#include <gsl/gsl_errno.h>
#include <gsl/gsl_math.h>
#include <gsl/gsl_roots.h>

enum { MAX_ITERATIONS = 200 };

/* Moves `solver` until its bracket is narrower than `tolerance`. */
static int narrow(gsl_root_fsolver *solver, double tolerance) {
    for (int k = 0; k < MAX_ITERATIONS; k++) {
        const int code = gsl_root_fsolver_iterate(solver);
        if (code != GSL_SUCCESS) {
            return code;
        }
        const double low = gsl_root_fsolver_x_lower(solver);
        const double high = gsl_root_fsolver_x_upper(solver);
        const double rounding = 4.0 * DBL_EPSILON * fmax(fabs(low), fabs(high));
        if (high - low <= fmax(tolerance, rounding)) {
            return GSL_SUCCESS;
        }
    }
    return GSL_EMAXITER;
}

/* NOLINTNEXTLINE(readability-function-size): six and the error */
lee_status lee_root_between(lee_function *f, void *user, double low,
                            double high, double tolerance, double *root,
                            lee_error *error) {
    const double at_low = f(low, user);
    const double at_high = f(high, user);
    const bool has_change =
        (at_low <= 0.0 && at_high >= 0.0) || (at_low >= 0.0 && at_high <= 0.0);
    if (!(low <= high) || !has_change) {
        return lee_fail(error, LEE_ERR_ARGUMENT,
                        "no change of sign between %g and %g: values %g and "
                        "%g",
                        low, high, at_low, at_high);
    }
    if (!(fabs(at_low) > 0.0) || !(fabs(at_high) > 0.0)) {
        *root = fabs(at_low) > 0.0 ? high : low;
        return LEE_OK;
    }

    lee_status status = LEE_OK;
    gsl_function function = {.function = f, .params = user};
    gsl_root_fsolver *solver = gsl_root_fsolver_alloc(gsl_root_fsolver_brent);
    if (solver == NULL) {
        return lee_fail(error, LEE_ERR_MEMORY, "no room for a root solver");
    }
    int code = gsl_root_fsolver_set(solver, &function, low, high);
    if (code == GSL_SUCCESS) {
        code = narrow(solver, tolerance);
    }
    if (code == GSL_SUCCESS) {
        *root = gsl_root_fsolver_root(solver);
    } else {
        status = lee_fail(error, LEE_ERR_CONVERGENCE,
                          "no root between %g and %g: %s", low, high,
                          gsl_strerror(code));
    }
    gsl_root_fsolver_free(solver);
    return status;
}
