/* Log life on the strain-life curve: w = ln(2N) with
 *   G(w) = ln(exp(ln(sf'/E) + b w) + exp(ln ef' + c w)) = ln ea.
 * G is convex and falls, so Newton's method goes straight to the root from the side where G is too large. */
#include "material/fit_parts.h"

#include <math.h>

enum { MOST_STEPS = 100 };

bool nw_fit_root_at(const double theta[4], double log_strain, nw_fit_root *root)
{
    double b = theta[1], c = theta[3];
    if (!(b < 0.0 && c < 0.0)) {
        return false;
    }
    double w = fmax((log_strain - theta[0]) / b, (log_strain - theta[2]) / c);
    double share = 0.0, slope = b;
    for (int i = 0; i < MOST_STEPS; i++) {
        double elastic = theta[0] + b * w, plastic = theta[2] + c * w;
        double difference = elastic - plastic;
        share = 1.0 / (1.0 + exp(-difference)); /* of the elastic term */
        slope = share * b + (1.0 - share) * c;
        double sum = fmax(elastic, plastic) + log1p(exp(-fabs(difference)));
        double step = (log_strain - sum) / slope;
        w += step;
        if (!(fabs(step) > 1e-15 * (1.0 + fabs(w)))) {
            break;
        }
    }
    root->w = w;
    root->gradient[0] = -share / slope;
    root->gradient[1] = -share * w / slope;
    root->gradient[2] = -(1.0 - share) / slope;
    root->gradient[3] = -(1.0 - share) * w / slope;
    return isfinite(w);
}
