/* Ratios of sizes that charts and their ranges use. */
#include "notch/shapes.h"

double nw_ratio_depth_radius(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_T) / nw_size_of(sizes, NW_SIZE_R);
}

double nw_ratio_depth_both(const nw_sizes *sizes)
{
    return 2.0 * nw_size_of(sizes, NW_SIZE_T) / nw_size_of(sizes, NW_SIZE_D_GROSS);
}

double nw_ratio_depth_one(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_T) / nw_size_of(sizes, NW_SIZE_D_GROSS);
}

double nw_ratio_gross_net(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_D_GROSS) / nw_size_of(sizes, NW_SIZE_D_NET);
}

double nw_ratio_radius_net(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_R) / nw_size_of(sizes, NW_SIZE_D_NET);
}

double nw_ratio_hole_width(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_D_NET) / nw_size_of(sizes, NW_SIZE_D_GROSS);
}
