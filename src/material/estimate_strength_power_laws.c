/* Power laws of tensile strength, with ef' capped for steel; n' is the method's own and K' = sf'/ef'^n'.
 *   steel:             sf' = 3.1148 Su^0.897, b = -0.097, ef' = min(0.338, 1033 Su^-1.235), c = -0.52,
 *                      n' = 0.187, 121 <= Su <= 2296 MPa
 *   cast steel:        sf' = 1.732 Su^0.982, b = -0.102, ef' = 0.847 Su^-0.181, c = -0.58, n' = 0.176,
 *                      496 <= Su <= 1144 MPa
 *   wrought aluminium: sf' = 9.12 Su^0.742, b = -0.106, ef' = 895.9 Su^-1.183, c = -0.83, n' = 0.128,
 *                      216 <= Su <= 649 MPa
 */
#include "material/estimates.h"

#include <math.h>

/* coefficient Su^exponent, Su in MPa */
typedef struct power_law {
    double coefficient, exponent;
} power_law;

typedef struct group_laws {
    nw_group group;
    double low_mpa, high_mpa; /* tensile strengths of the data */
    power_law strength, ductility;
    double ductility_cap;
    double b, c, n;
} group_laws;

static const group_laws laws[] = {
    {NW_STEEL, 121, 2296, {3.1148, 0.897}, {1033.0, -1.235}, 0.338, -0.097, -0.52, 0.187},
    {NW_CAST_STEEL, 496, 1144, {1.732, 0.982}, {0.847, -0.181}, INFINITY, -0.102, -0.58, 0.176},
    {NW_ALUMINIUM, 216, 649, {9.12, 0.742}, {895.9, -1.183}, INFINITY, -0.106, -0.83, 0.128},
};

static const group_laws *laws_of(nw_group group)
{
    for (size_t i = 0; i < sizeof laws / sizeof laws[0]; i++) {
        if (laws[i].group == group) {
            return &laws[i];
        }
    }
    return NULL;
}

static bool limits(const nw_estimate_input *input, char *why, size_t capacity)
{
    const group_laws *law = laws_of(input->group);
    double su = input->ultimate_strength_mpa;
    if (su < law->low_mpa || su > law->high_mpa) {
        snprintf(why, capacity,
                 "its data for this group go from %g to %g MPa tensile strength; this one has "
                 "%.4g MPa",
                 law->low_mpa, law->high_mpa, su);
        return false;
    }
    return true;
}

static void evaluate(const nw_estimate_input *input, nw_estimate_values *values)
{
    const group_laws *law = laws_of(input->group);
    double su = input->ultimate_strength_mpa;
    double strength = law->strength.coefficient * pow(su, law->strength.exponent);
    double ductility =
        fmin(law->ductility_cap, law->ductility.coefficient * pow(su, law->ductility.exponent));
    *values = nw_estimate_compatible(strength, law->b, ductility, law->c);
    values->hardening_exponent = law->n;
    values->strength_coefficient_mpa = strength / pow(ductility, law->n);
    values->cyclic_curve_origin = NW_FROM_ESTIMATE;
}

const nw_estimate nw_estimate_strength_power_laws = {
    .key = "strength_power_laws",
    .title = "Power laws of strength (Waechter & Esderts)",
    .range = "steels of 121 to 2296 MPa, cast steels of 496 to 1144 MPa and wrought aluminium "
             "alloys of 216 to 649 MPa tensile strength",
    .equation = "steel: sf' = 3.1148 Su^0.897, b = -0.097, ef' = min(0.338, 1033 Su^-1.235), "
                "c = -0.52, n' = 0.187; cast steel: sf' = 1.732 Su^0.982, b = -0.102, ef' = 0.847 "
                "Su^-0.181, c = -0.58, n' = 0.176; wrought aluminium: sf' = 9.12 Su^0.742, "
                "b = -0.106, ef' = 895.9 Su^-1.183, c = -0.83, n' = 0.128; K' = sf'/ef'^n'; Su in "
                "MPa",
    .reference =
        "Waechter & Esderts, Materials Testing 60 (2018) 953; used in the FKM guideline on "
        "nonlinear strength assessment",
    .accuracy = "no figure at hand; the guideline that uses it is written for design with its own "
                "safety factors, which are not applied here",
    .check = "formula from memory; no printed result was at hand",
    .doubt = "Coefficients and ranges were not read in the paper or the guideline.",
    .groups = NW_GROUP_BIT(NW_STEEL) | NW_GROUP_BIT(NW_CAST_STEEL) | NW_GROUP_BIT(NW_ALUMINIUM),
    .needs = NW_NEEDS_ULTIMATE,
    .limits = limits,
    .evaluate = evaluate,
};
