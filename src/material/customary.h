/* Ranges in which values usually lie: common practice, no source. Outside is no error, but worth a look. */
#ifndef NW_MATERIAL_CUSTOMARY_H
#define NW_MATERIAL_CUSTOMARY_H

#include "notchwright/material.h"

typedef struct nw_customary {
    double low, high;
} nw_customary;

/* Young's modulus of a group [MPa]; 0 to infinity where none is customary. */
nw_customary nw_customary_modulus_mpa(nw_group group);

/* How far a measured tensile strength may lie from nw_ultimate_from_hardness_mpa(), as a ratio. */
extern const double nw_customary_hardness_misfit;

/* True where both are known, the group is steel, and they disagree by more than that. */
bool nw_hardness_misfits(nw_group group, double ultimate_strength_mpa, double hardness_hb);

static inline bool nw_is_customary(nw_customary range, double value)
{
    return value >= range.low && value <= range.high;
}

#endif
