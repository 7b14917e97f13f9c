/* Relative stress gradients at the root: |ds/dn|/s_max [1/mm]. */
#include "notch/shapes.h"

#include <math.h>

const char nw_gradient_din_743[] =
    "DIN 743-2, table of relative stress gradients (from memory); the gradient of nominal bending "
    "itself, 2/d, is not added";
const char nw_gradient_kirsch[] = "hole in a wide plate, exact (Kirsch, Z. VDI 42 (1898) 797)";

/* phi = 1/(4 sqrt(t/r) + 2) where d/D > 0.67, else 0. */
static double depth_term(const nw_sizes *sizes)
{
    return 1.0 / nw_ratio_gross_net(sizes) > 0.67
               ? 1.0 / (4.0 * sqrt(nw_ratio_depth_radius(sizes)) + 2.0)
               : 0.0;
}

double nw_gradient_shoulder(const nw_sizes *sizes)
{
    return 2.3 * (1.0 + depth_term(sizes)) / nw_size_of(sizes, NW_SIZE_R);
}

double nw_gradient_shoulder_torsion(const nw_sizes *sizes)
{
    return 1.15 / nw_size_of(sizes, NW_SIZE_R);
}

double nw_gradient_groove(const nw_sizes *sizes)
{
    return 2.0 * (1.0 + depth_term(sizes)) / nw_size_of(sizes, NW_SIZE_R);
}

double nw_gradient_groove_torsion(const nw_sizes *sizes)
{
    return 1.0 / nw_size_of(sizes, NW_SIZE_R);
}

double nw_gradient_hole(const nw_sizes *sizes)
{
    return 7.0 / (3.0 * nw_size_of(sizes, NW_SIZE_R));
}

double nw_gradient_hole_shear(const nw_sizes *sizes)
{
    return 3.0 / nw_size_of(sizes, NW_SIZE_R);
}
