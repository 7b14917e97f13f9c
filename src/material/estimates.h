/* The estimate records, one file each. */
#ifndef NW_MATERIAL_ESTIMATES_H
#define NW_MATERIAL_ESTIMATES_H

#include "notchwright/material.h"

extern const nw_estimate nw_estimate_uniform_material_law;

#endif
