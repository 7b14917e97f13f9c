/* Mitchell's method for steels below 500 HB:
 *   sf' = Su + 345 MPa, b = -(1/6) log(2 (Su + 345)/Su), ef' = D,
 *   c = -0.6 for ductile steels (D about 1), -0.5 for strong ones (D about 0.5).
 * No border between the two is printed; here D below 0.5 counts as strong. */
#include "material/estimates.h"

#include <math.h>

enum { HARDNESS_LIMIT_HB = 500 };

/* About 3.45 MPa tensile strength a unit of Brinell hardness (common practice, no source). */
static const double mpa_per_hb = 3.45;

static bool limits(const nw_estimate_input *input, char *why, size_t capacity)
{
    bool measured = !isnan(input->hardness_hb);
    double hardness = measured ? input->hardness_hb : input->ultimate_strength_mpa / mpa_per_hb;
    if (hardness >= HARDNESS_LIMIT_HB) {
        snprintf(why, capacity, "it was made for steels below %d HB; this one has %s%.0f HB%s",
                 HARDNESS_LIMIT_HB, measured ? "" : "about ", hardness,
                 measured ? "" : " (Su/3.45)");
        return false;
    }
    return true;
}

static void evaluate(const nw_estimate_input *input, nw_estimate_values *values)
{
    double su = input->ultimate_strength_mpa, d = nw_estimate_fracture_strain(input);
    *values = nw_estimate_compatible(su + 345.0, -log10(2.0 * (su + 345.0) / su) / 6.0, d,
                                     d < 0.5 ? -0.5 : -0.6);
}

const nw_estimate nw_estimate_mitchell = {
    .key = "mitchell",
    .title = "Mitchell's method",
    .range = "steels below 500 HB",
    .equation = "sf' = Su + 345 MPa, b = -(1/6) log(2 (Su + 345 MPa)/Su), ef' = D, c = -0.6, or "
                "-0.5 for D below 0.5",
    .reference = "Mitchell, in Fatigue and Microstructure, American Society for Metals 1979",
    .accuracy = "no figure of its own at hand; like all such methods, not for design without a "
                "test (Meggiolaro & Castro, Int. J. Fatigue 26 (2004) 463, on 724 steels, from "
                "memory)",
    .check = "formula from memory; no printed result was at hand",
    .doubt =
        "The method says -0.6 for ductile and -0.5 for strong steels; the border at D = 0.5 is "
        "this program's.",
    .groups = NW_GROUP_BIT(NW_STEEL),
    .needs = NW_NEEDS_ULTIMATE | NW_NEEDS_FRACTURE_STRAIN,
    .limits = limits,
    .evaluate = evaluate,
};
