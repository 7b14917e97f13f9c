/* The estimate records, one file each, and what they share. */
#ifndef NW_MATERIAL_ESTIMATES_H
#define NW_MATERIAL_ESTIMATES_H

#include "notchwright/material.h"

#define NW_GROUP_BIT(group) (1u << (group))

extern const nw_estimate nw_estimate_uniform_material_law;
extern const nw_estimate nw_estimate_hardness;
extern const nw_estimate nw_estimate_modified_universal_slopes;
extern const nw_estimate nw_estimate_universal_slopes;
extern const nw_estimate nw_estimate_four_point_correlation;
extern const nw_estimate nw_estimate_modified_four_point;
extern const nw_estimate nw_estimate_mitchell;
extern const nw_estimate nw_estimate_medians;
extern const nw_estimate nw_estimate_strength_power_laws;

/* The four strain-life parameters with K' and n' by compatibility and no endurance: what most methods
 * give. */
nw_estimate_values nw_estimate_compatible(double strength_mpa, double b, double ductility,
                                          double c);

#endif
