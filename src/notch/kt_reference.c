/* Kt by finite elements between solved points.
 *
 * Kt = 1 + Y S with S = (g^-2 + f^-2)^(-1/2), g = sqrt(q) (1 + q)^(m - 1/2), f = z/(1 + z)^(1 - m), q = t/r,
 * z = q (1 - x)/x. S has the limits of shallow, deep, blunt and sharp notches; Y is a polynomial in
 * w = sqrt(q)/(1 + sqrt(q)) and x fitted to the points (tests/reference/kt_surfaces.py). Outside of the convex hull of
 * the points in (w, x) there is no answer. */
#include "notch/shapes.h"

#include <math.h>

const char nw_kt_surface_how[] = "converged finite elements (Poisson's ratio 0.3), a smooth "
                                 "surface through some 20 to 60 solved "
                                 "points of this shape and load";

static bool inside(const nw_kt_surface *surface, double w, double x)
{
    for (int i = 0; i < surface->hull_corners; i++) {
        const double *a = surface->hull[i], *b = surface->hull[(i + 1) % surface->hull_corners];
        double area = (b[0] - a[0]) * (x - a[1]) - (b[1] - a[1]) * (w - a[0]);
        if (area < -1e-6) {
            return false;
        }
    }
    return true;
}

/* Sum of Chebyshev products T_i(2w - 1) T_j(2x - 1), i + j <= degree. */
static double polynomial(const nw_kt_surface *surface, double w, double x)
{
    enum { MOST = 8 };
    double u[MOST] = {1.0, 2.0 * w - 1.0}, v[MOST] = {1.0, 2.0 * x - 1.0}, sum = 0.0;
    for (int i = 2; i <= surface->degree && i < MOST; i++) {
        u[i] = 2.0 * u[1] * u[i - 1] - u[i - 2];
        v[i] = 2.0 * v[1] * v[i - 1] - v[i - 2];
    }
    const double *c = surface->coefficients;
    for (int i = 0; i <= surface->degree; i++) {
        for (int j = 0; j <= surface->degree - i; j++) {
            sum += *c++ * u[i] * v[j];
        }
    }
    return sum;
}

static double stretch(double q, double x, double m)
{
    double z = q * (1.0 - x) / x;
    double g = sqrt(q) * pow(1.0 + q, m - 0.5), f = z / pow(1.0 + z, 1.0 - m);
    return 1.0 / sqrt(1.0 / (g * g) + 1.0 / (f * f));
}

double nw_kt_surface_at(const void *data, const nw_sizes *sizes, double *error_percent)
{
    const nw_kt_surface *surface = data;
    double q = nw_ratio_depth_radius(sizes), x = surface->x(sizes);
    double w = sqrt(q) / (1.0 + sqrt(q));
    *error_percent = surface->error_percent;
    return inside(surface, w, x)
               ? 1.0 + polynomial(surface, w, x) * stretch(q, x, surface->corner_exponent)
               : NAN;
}
