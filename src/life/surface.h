/* Surface roughness as a factor on the endurance amplitude. */
#ifndef NW_LIFE_SURFACE_H
#define NW_LIFE_SURFACE_H

#include "notchwright/material.h"

/* K_R = 1 - a_R log10(Rz/um) log10(2 Rm/R_mN), at most 1, with a_R and R_mN by material group (FKM
 * guideline, Analytical strength assessment; table in the handbook of that guideline).
 * Returns NAN with the reason when the group or the strength is not covered. */
double nw_roughness_factor(const nw_material *material, double roughness_um, char *why,
                           size_t capacity);

#endif
