#include "base/quantiles.h"

#include <gsl/gsl_cdf.h>
#include <math.h>

enum { MOST_STEPS = 300 };

/* False position with the Illinois rule; every third step halves the bracket, so it cannot stall. */
double nw_increasing_root(nw_increasing function, const void *data, double target, double low,
                          double high)
{
    double f_low = function(low, data) - target, f_high = function(high, data) - target;
    if (!(f_low < 0.0)) {
        return low;
    }
    if (!(f_high > 0.0)) {
        return high;
    }
    int side = 0;
    for (int step = 1; step < MOST_STEPS && high - low > 1e-15 * (fabs(low) + fabs(high)); step++) {
        double x = (low * f_high - high * f_low) / (f_high - f_low);
        if (step % 3 == 0 || !(x > low && x < high)) {
            x = 0.5 * (low + high);
        }
        double f = function(x, data) - target;
        if (f == 0.0) {
            return x;
        }
        if (f < 0.0) {
            low = x;
            f_low = f;
            f_high *= side == -1 ? 0.5 : 1.0;
            side = -1;
        } else {
            high = x;
            f_high = f;
            f_low *= side == 1 ? 0.5 : 1.0;
            side = 1;
        }
    }
    return 0.5 * (low + high);
}

typedef struct degrees {
    double first, second;
} degrees;

static double t_below(double t, const void *data)
{
    return gsl_cdf_tdist_P(t, ((const degrees *)data)->first);
}

static double f_below(double f, const void *data)
{
    const degrees *d = data;
    return gsl_cdf_fdist_P(f, d->first, d->second);
}

static double chi_square_below(double x, const void *data)
{
    return gsl_cdf_chisq_P(x, ((const degrees *)data)->first);
}

double nw_normal_quantile(double p)
{
    return gsl_cdf_ugaussian_Pinv(p);
}

/* Upper end of a bracket: doubled until the function passes the target. */
static double upper_end(nw_increasing function, const void *data, double target)
{
    double high = 1.0;
    while (high < 1e300 && function(high, data) < target) {
        high *= 2.0;
    }
    return high;
}

double nw_t_quantile(double p, double nu)
{
    if (p < 0.5) {
        return -nw_t_quantile(1.0 - p, nu);
    }
    degrees d = {nu, 0.0};
    return p == 0.5 ? 0.0 : nw_increasing_root(t_below, &d, p, 0.0, upper_end(t_below, &d, p));
}

double nw_f_quantile(double p, double nu1, double nu2)
{
    degrees d = {nu1, nu2};
    return nw_increasing_root(f_below, &d, p, 0.0, upper_end(f_below, &d, p));
}

double nw_chi_square_quantile(double p, double nu)
{
    degrees d = {nu, 0.0};
    return nw_increasing_root(chi_square_below, &d, p, 0.0, upper_end(chi_square_below, &d, p));
}
