/* Symmetric systems of a few unknowns (normal equations, information matrices), row after row. */
#ifndef NW_BASE_SMALL_MATRIX_H
#define NW_BASE_SMALL_MATRIX_H

#include <stdbool.h>
#include <stddef.h>

enum { NW_SMALL_MOST = 16 };

/* Cholesky factor of a symmetric positive definite matrix[n][n], in place (lower triangle). False when it is
 * not positive definite to working accuracy: then the matrix is spoilt. */
bool nw_small_factor(double *matrix, size_t n);

/* Solves with a factor; right[n] receives the solution. */
void nw_small_solve(const double *factor, size_t n, double *right);

/* Inverse of a symmetric positive definite matrix; false (inverse spoilt) when it is not. The matrix is scaled
 * to a unit diagonal first, so that parameters of different size do no harm. */
bool nw_small_inverse(const double *matrix, size_t n, double *inverse);

/* v' M v. */
double nw_small_form(const double *matrix, size_t n, const double *v);

#endif
