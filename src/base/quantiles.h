/* Roots of increasing functions, and quantiles found with them. GSL's own inverse functions call its error
 * handler where they do not converge, which a library must not do. */
#ifndef NW_BASE_QUANTILES_H
#define NW_BASE_QUANTILES_H

typedef double (*nw_increasing)(double x, const void *data);

/* x in [low, high] at which an increasing function takes the value `target`, to rounding; the nearer end where
 * the target lies outside. */
double nw_increasing_root(nw_increasing function, const void *data, double target, double low,
                          double high);

/* Quantiles: p in (0, 1). */
double nw_normal_quantile(double p);
double nw_t_quantile(double p, double degrees);
double nw_f_quantile(double p, double degrees1, double degrees2);
double nw_chi_square_quantile(double p, double degrees);

#endif
