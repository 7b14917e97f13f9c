/* Siebel and Stieler's support by the stress gradient, in the form of DIN 743-2: Kf = Kt/n. */
#include "notch/sensitivities.h"

#include <math.h>
#include <stdio.h>

static bool evaluate(const nw_sensitivity_input *input, double *kf, char *why, size_t capacity)
{
    if (input->group != NW_STEEL) {
        snprintf(why, capacity, "made for steels, this is %s", nw_group_name(input->group));
        return false;
    }
    if (!nw_sensitivity_needs(input->gradient_per_mm,
                              "a stress gradient, which is not known for this shape and load", why,
                              capacity) ||
        (!input->surface_hardened &&
         !nw_sensitivity_needs(input->yield_strength_mpa, "the yield strength", why, capacity))) {
        return false;
    }
    double power = input->surface_hardened ? -0.7 : -(0.33 + input->yield_strength_mpa / 712.0);
    *kf = input->kt / (1.0 + sqrt(input->gradient_per_mm) * pow(10.0, power));
    return true;
}

const nw_sensitivity nw_sensitivity_gradient = {
    .key = "gradient",
    .title = "Stress gradient (Siebel & Stieler, form of DIN 743-2)",
    .equation = "Kf = Kt/n, n = 1 + sqrt(G) 10^-(0.33 + Sy/712), surface-hardened n = 1 + sqrt(G) "
                "10^-0.7; G in 1/mm, Sy in MPa",
    .reference = "Siebel & Stieler, Z. VDI 97 (1955) 121; DIN 743-2 (from memory)",
    .range = "steels",
    .evaluate = evaluate,
};
