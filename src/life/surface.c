#include "life/surface.h"

#include <math.h>
#include <stdio.h>

static const struct {
    nw_group group;
    double slope, least_strength_mpa;
} groups[] = {
    {NW_STEEL, 0.22, 400.0},
    {NW_CAST_STEEL, 0.20, 400.0},
    {NW_CAST_IRON, 0.16, 400.0}, /* nodular; grey and malleable iron differ */
    {NW_ALUMINIUM, 0.22, 133.0},
};

double nw_roughness_factor(const nw_material *material, double roughness_um, char *why,
                           size_t capacity)
{
    if (isnan(material->ultimate_strength_mpa)) {
        snprintf(why, capacity, "the material gives no ultimate_strength, which it needs");
        return NAN;
    }
    for (size_t i = 0; i < sizeof groups / sizeof groups[0]; i++) {
        if (groups[i].group != material->group) {
            continue;
        }
        if (roughness_um <= 1.0) {
            return 1.0;
        }
        double strength = 2.0 * material->ultimate_strength_mpa / groups[i].least_strength_mpa;
        double factor = 1.0 - groups[i].slope * log10(roughness_um) * log10(strength);
        return factor > 1.0 ? 1.0 : factor;
    }
    snprintf(why, capacity, "no formula for the material group %s; give surface_factor instead",
             nw_group_name(material->group));
    return NAN;
}
