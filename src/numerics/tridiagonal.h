/* tridiagonal.h - symmetric tridiagonal matrices. */
#ifndef LEEWATER_NUMERICS_TRIDIAGONAL_H
#define LEEWATER_NUMERICS_TRIDIAGONAL_H

#include <stddef.h>

/* The k-th smallest eigenvalue (k from 0) of the symmetric tridiagonal matrix
 * with diagonal d[n] and off-diagonal e[n - 1], by bisection on the Sturm
 * sequence (Golub & Van Loan 2013, section 8.4.1) [golub2013], to a few units
 * of rounding of the largest eigenvalue. k < n. */
double lee_tridiagonal_eigenvalue(size_t n, const double d[], const double e[],
                                  size_t k);

#endif
