/* Shape-preserving cubic interpolation of increasing points (Fritsch & Butland 1984; end slopes by the
 * three-point formula, kept monotone as in Moler, Numerical Computing with MATLAB, ch. 3). */
#ifndef NW_NOTCH_MONOTONE_H
#define NW_NOTCH_MONOTONE_H

#include <stddef.h>

/* Slopes at the points; x and y strictly increasing, count >= 2. */
void nw_monotone_slopes(const double *x, const double *y, size_t count, double *slope);

/* Value at x[0] <= at; goes on straight past the last point. */
double nw_monotone_at(const double *x, const double *y, const double *slope, size_t count,
                      double at);

#endif
