/* Net sections: what a force or a moment is divided by to give the nominal stress. */
#include "notch/shapes.h"

static const double pi = 3.14159265358979323846;

double nw_section_round_area(const nw_sizes *sizes)
{
    double d = nw_size_of(sizes, NW_SIZE_D_NET);
    return pi * d * d / 4.0;
}

double nw_section_round_bending(const nw_sizes *sizes)
{
    double d = nw_size_of(sizes, NW_SIZE_D_NET);
    return pi * d * d * d / 32.0;
}

double nw_section_round_torsion(const nw_sizes *sizes)
{
    return 2.0 * nw_section_round_bending(sizes);
}

double nw_section_flat_area(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_H) * nw_size_of(sizes, NW_SIZE_D_NET);
}

double nw_section_flat_bending(const nw_sizes *sizes)
{
    return nw_section_flat_area(sizes) * nw_size_of(sizes, NW_SIZE_D_NET) / 6.0;
}
