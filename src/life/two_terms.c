/* y = a X^p + b X^q inverted. With r = ln of the second over the first term the equation is
 *   g r + ln(1 + e^r) = ln(y/a) + g ln(b/a),   g = p/(q - p) > 0,
 * convex and increasing in r; from the starts below Newton steps down to the root without overshoot. */
#include "notchwright/life.h"

#include <math.h>

static double log_one_plus_exp(double r)
{
    return r > 0.0 ? r + log1p(exp(-r)) : log1p(exp(r));
}

double nw_two_terms_reversals(const nw_two_terms *terms, double y)
{
    double g = terms->p / (terms->q - terms->p);
    double log_ratio = log(terms->b / terms->a);
    double right = log(y / terms->a) + g * log_ratio;
    double r = right < 0.0 ? right / g : right / (1.0 + g);
    for (int i = 0; i < 100; i++) {
        double share = 1.0 / (1.0 + exp(-r));
        double step = (g * r + log_one_plus_exp(r) - right) / (g + share);
        r -= step;
        if (!(fabs(step) > 1e-15 * (1.0 + fabs(r)))) {
            break;
        }
    }
    return exp((r - log_ratio) / (terms->q - terms->p));
}
