/* roots.h - roots of one function, by GSL. */
#ifndef LEEWATER_NUMERICS_ROOTS_H
#define LEEWATER_NUMERICS_ROOTS_H

#include "leewater/status.h"

typedef double lee_function(double x, void *user);

/* Root of f in [low, high], where f changes sign, by Brent's method [gsl].
 *
 *   tolerance  in the unit of x
 *   root       out
 *
 * Errors: LEE_ERR_ARGUMENT when the ends have one sign or a value is NaN;
 * LEE_ERR_CONVERGENCE. */
lee_status lee_root_between(lee_function *f, void *user, double low,
                            double high, double tolerance, double *root,
                            lee_error *error);

#endif
