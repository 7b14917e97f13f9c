#include "notch/monotone.h"

#include <math.h>

static double inner_slope(double h0, double h1, double d0, double d1)
{
    if (d0 * d1 <= 0.0) {
        return 0.0;
    }
    double w0 = 2.0 * h1 + h0, w1 = h1 + 2.0 * h0;
    return (w0 + w1) / (w0 / d0 + w1 / d1);
}

static double end_slope(double h0, double h1, double d0, double d1)
{
    double slope = ((2.0 * h0 + h1) * d0 - h0 * d1) / (h0 + h1);
    if (slope * d0 <= 0.0) {
        return 0.0;
    }
    if (d0 * d1 <= 0.0 && fabs(slope) > 3.0 * fabs(d0)) {
        return 3.0 * d0;
    }
    return slope;
}

void nw_monotone_slopes(const double *x, const double *y, size_t count, double *slope)
{
    if (count == 2) {
        slope[0] = slope[1] = (y[1] - y[0]) / (x[1] - x[0]);
        return;
    }
    for (size_t i = 1; i + 1 < count; i++) {
        double h0 = x[i] - x[i - 1], h1 = x[i + 1] - x[i];
        slope[i] = inner_slope(h0, h1, (y[i] - y[i - 1]) / h0, (y[i + 1] - y[i]) / h1);
    }
    double h0 = x[1] - x[0], h1 = x[2] - x[1];
    slope[0] = end_slope(h0, h1, (y[1] - y[0]) / h0, (y[2] - y[1]) / h1);
    size_t n = count - 1;
    h0 = x[n] - x[n - 1];
    h1 = x[n - 1] - x[n - 2];
    slope[n] = end_slope(h0, h1, (y[n] - y[n - 1]) / h0, (y[n - 1] - y[n - 2]) / h1);
}

double nw_monotone_at(const double *x, const double *y, const double *slope, size_t count,
                      double at)
{
    size_t n = count - 1;
    if (at >= x[n]) {
        double end = slope[n] > 0.0 ? slope[n] : (y[n] - y[n - 1]) / (x[n] - x[n - 1]);
        return y[n] + end * (at - x[n]);
    }
    size_t low = 0, high = n;
    while (high - low > 1) {
        size_t middle = (low + high) / 2;
        *(at < x[middle] ? &high : &low) = middle;
    }
    double h = x[high] - x[low], t = (at - x[low]) / h, u = 1.0 - t;
    return u * u * ((1.0 + 2.0 * t) * y[low] + t * h * slope[low]) +
           t * t * ((1.0 + 2.0 * u) * y[high] - u * h * slope[high]);
}
