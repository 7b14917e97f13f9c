/* Peterson: q = 1/(1 + a/r), a a length of the material. */
#include "notch/sensitivities.h"

#include <math.h>
#include <stdio.h>

/* Aluminium alloys: published values run from 0.51 to 0.64 mm; the smallest gives the largest Kf. */
static const double aluminium_length_mm = 0.51;
static const double least_strength_mpa = 550.0, torsion_share = 0.6;

static bool length_of(const nw_sensitivity_input *input, double *length, char *why, size_t capacity)
{
    if (input->group == NW_ALUMINIUM) {
        *length = aluminium_length_mm;
        if (input->torsion) {
            snprintf(why, capacity, "no length is published for aluminium alloys in torsion");
        }
        return !input->torsion;
    }
    if (input->group != NW_STEEL) {
        snprintf(why, capacity, "no length is published for the group %s",
                 nw_group_name(input->group));
        return false;
    }
    if (!nw_sensitivity_needs(input->ultimate_strength_mpa, "the tensile strength", why,
                              capacity)) {
        return false;
    }
    *length = 0.0254 * pow(2079.0 / input->ultimate_strength_mpa, 1.8);
    if (input->torsion) {
        *length *= torsion_share;
    }
    if (input->ultimate_strength_mpa < least_strength_mpa) {
        snprintf(why, capacity,
                 "made for steels of at least %g MPa tensile strength, this is %g MPa",
                 least_strength_mpa, input->ultimate_strength_mpa);
    }
    return true;
}

static bool evaluate(const nw_sensitivity_input *input, double *kf, char *why, size_t capacity)
{
    double length;
    if (!length_of(input, &length, why, capacity)) {
        return false;
    }
    *kf = 1.0 + (input->kt - 1.0) / (1.0 + length / input->radius_mm);
    return true;
}

const nw_sensitivity nw_sensitivity_peterson = {
    .key = "peterson",
    .title = "Peterson",
    .equation =
        "Kf = 1 + (Kt - 1)/(1 + a/r); steels a = 0.0254 mm (2079 MPa/Su)^1.8, in torsion 0.6 "
        "a; aluminium alloys a = 0.51 mm",
    .reference =
        "Peterson, in Metal Fatigue, ed. Sines & Waisman, McGraw-Hill 1959, 293 (from memory)",
    .range = "steels with Su of at least 550 MPa; aluminium alloys, not in torsion",
    .evaluate = evaluate,
};
