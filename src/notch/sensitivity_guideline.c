/* Support by the stress gradient in the form of the FKM guideline: Kf = Kt/n. */
#include "notch/sensitivities.h"

#include <math.h>
#include <stdio.h>

static const struct {
    nw_group group;
    double a, b_mpa;
} groups[] = {
    {NW_STEEL, 0.50, 2700.0},
    {NW_CAST_STEEL, 0.25, 2000.0},
    {NW_CAST_IRON, 0.05, 3200.0}, /* nodular; grey and malleable iron have -0.05 */
    {NW_ALUMINIUM, 0.05, 850.0},  /* wrought */
};
enum { GROUPS = sizeof groups / sizeof groups[0] };

static const double largest_gradient = 100.0;

/* Continuous at G = 0.1 and 1. */
static double support(double gradient, double power)
{
    if (gradient <= 0.1) {
        return 1.0 + gradient * pow(10.0, 0.5 - power);
    }
    return 1.0 + pow(gradient, gradient <= 1.0 ? 0.5 : 0.25) * pow(10.0, -power);
}

static bool evaluate(const nw_sensitivity_input *input, double *kf, char *why, size_t capacity)
{
    int i = 0;
    while (i < GROUPS && groups[i].group != input->group) {
        i++;
    }
    if (i == GROUPS) {
        snprintf(why, capacity, "no constants for the group %s", nw_group_name(input->group));
        return false;
    }
    if (input->torsion) {
        snprintf(why, capacity, "its form for shear stress is not built in");
        return false;
    }
    if (!nw_sensitivity_needs(input->gradient_per_mm,
                              "a stress gradient, which is not known for this shape and load", why,
                              capacity) ||
        !nw_sensitivity_needs(input->ultimate_strength_mpa, "the tensile strength", why,
                              capacity)) {
        return false;
    }
    if (input->gradient_per_mm > largest_gradient) {
        snprintf(why, capacity, "made for gradients up to %g/mm, this is %.4g/mm", largest_gradient,
                 input->gradient_per_mm);
    }
    double power = groups[i].a + input->ultimate_strength_mpa / groups[i].b_mpa;
    *kf = input->kt / support(input->gradient_per_mm, power);
    return true;
}

const nw_sensitivity nw_sensitivity_guideline = {
    .key = "guideline",
    .title = "Stress gradient (form of the FKM guideline)",
    .equation =
        "Kf = Kt/n; n = 1 + G 10^-(a - 0.5 + Su/b) for G up to 0.1/mm, 1 + sqrt(G) 10^-(a + "
        "Su/b) up to 1/mm, 1 + G^(1/4) 10^-(a + Su/b) up to 100/mm; a, b by group: steel 0.50, "
        "2700 MPa; cast steel 0.25, 2000; nodular iron 0.05, 3200; wrought aluminium 0.05, 850",
    .reference = "FKM guideline, Analytical Strength Assessment (from memory)",
    .range =
        "steel, cast steel, nodular cast iron, wrought aluminium; normal stress; gradient up to "
        "100/mm",
    .evaluate = evaluate,
};
