/* One-sided tolerance factors by Student's noncentral t.
 *
 *   T = (Z + delta)/U with U^2 = chi-square(nu)/nu, so  P(T <= t) = integral of Phi(t u - delta) f(u) du.
 * The integrand is smooth but for a step of width 1/|t| at u = delta/t; panels are set around both that step
 * and the peak of f. Reference: Owen, Technometrics 10 (1968) 445. */
#include "base/quantiles.h"
#include "notchwright/fit.h"

#include <gsl/gsl_cdf.h>
#include <gsl/gsl_sf_gamma.h>
#include <math.h>

enum { POINTS = 16 };

/* Gauss-Legendre rule of 16 points on [-1, 1], the positive half: the roots of P16 and 2/((1 - x^2) P16'(x)^2),
 * worked out to 50 digits. GSL's own tables cannot be had without an allocation. */
static const double nodes[POINTS / 2] = {
    0.095012509837637440, 0.281603550779258913, 0.458016777657227386, 0.617876244402643748,
    0.755404408355003033, 0.865631202387831743, 0.944575023073232576, 0.989400934991649932};
static const double weights[POINTS / 2] = {
    0.189450610455068496, 0.182603415044923588, 0.169156519395002538, 0.149595988816576732,
    0.124628971255533872, 0.095158511682492784, 0.062253523938647892, 0.027152459411754094};

typedef struct noncentral {
    double degrees, delta;
    double log_constant; /* of the density of U */
} noncentral;

/* ln f(u) = ln 2 + a ln a - ln Gamma(a) + (nu - 1) ln u - a u^2 with a = nu/2, arranged so that nothing large
 * cancels: ln Gamma(a) by its Stirling part, and the rest about u = 1. */
static double log_density(const noncentral *n, double u)
{
    double d = u - 1.0;
    return n->log_constant + 0.5 * n->degrees * (2.0 * (log1p(d) - d) - d * d) - log1p(d);
}

static double integrand(const noncentral *n, double t, double u)
{
    return exp(log_density(n, u)) * gsl_cdf_ugaussian_P(t * u - n->delta);
}

static double panel(const noncentral *n, double t, double from, double to)
{
    double middle = 0.5 * (from + to), half = 0.5 * (to - from), sum = 0.0;
    for (size_t i = 0; i < POINTS / 2; i++) {
        double step = half * nodes[i];
        sum += weights[i] * (integrand(n, t, middle - step) + integrand(n, t, middle + step));
    }
    return half * sum;
}

static double stretch(const noncentral *n, double t, double from, double to, double width)
{
    if (!(to > from)) {
        return 0.0;
    }
    double panels = ceil((to - from) / width), sum = 0.0;
    for (double i = 0.0; i < panels; i += 1.0) {
        sum +=
            panel(n, t, from + (to - from) * i / panels, from + (to - from) * (i + 1.0) / panels);
    }
    return sum;
}

static double clamped(double value, double low, double high)
{
    return fmin(fmax(value, low), high);
}

static double distribution(double t, const void *data)
{
    const noncentral *n = data;
    double width = 1.0 / sqrt(n->degrees);
    double mode = sqrt(fmax(n->degrees - 1.0, 0.0) / n->degrees);
    double low = fmax(0.0, mode - 9.0 * width), high = mode + 9.0 * width;
    double step = t == 0.0 ? low : n->delta / t, reach = t == 0.0 ? 0.0 : 9.0 / fabs(t);
    double before = clamped(step - reach, low, high), after = clamped(step + reach, low, high);
    double narrow = reach > 0.0 ? fmin(width, reach / 6.0) : width;
    return stretch(n, t, low, before, width) + stretch(n, t, before, after, narrow) +
           stretch(n, t, after, high, width);
}

static noncentral noncentral_of(double degrees, double delta)
{
    double a = 0.5 * degrees;
    double constant = log(2.0) - 0.5 * log(2.0 * M_PI) + 0.5 * log(a) - log(gsl_sf_gammastar(a));
    return (noncentral){degrees, delta, constant};
}

double nw_noncentral_t(double t, double degrees, double delta)
{
    if (!(degrees >= 1.0)) {
        return NAN;
    }
    noncentral n = noncentral_of(degrees, delta);
    return clamped(distribution(t, &n), 0.0, 1.0);
}

static double quantile(const noncentral *n, double p)
{
    double reach = 1.0 + fabs(n->delta), low = -reach, high = reach;
    while (distribution(high, n) < p && high < 1e100) {
        high *= 2.0;
    }
    while (distribution(low, n) > p && low > -1e100) {
        low *= 2.0;
    }
    return nw_increasing_root(distribution, n, p, low, high);
}

double nw_tolerance_factor(double survival, double confidence, double leverage, double degrees)
{
    bool sensible = survival > 0.0 && survival < 1.0 && confidence > 0.0 && confidence < 1.0 &&
                    leverage > 0.0 && isfinite(leverage) && degrees >= 1.0 && isfinite(degrees);
    if (!sensible) {
        return NAN;
    }
    double root = sqrt(leverage);
    noncentral n = noncentral_of(degrees, nw_normal_quantile(survival) / root);
    return quantile(&n, confidence) * root;
}
