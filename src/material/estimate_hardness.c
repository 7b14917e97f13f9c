/* Hardness method for steels of 150 to 700 HB:
 *   sf' = 4.25 HB + 225 MPa, b = -0.09, ef' = (0.32 HB^2 - 487 HB + 191000 MPa)/E, c = -0.56. */
#include "material/estimates.h"

static bool limits(const nw_estimate_input *input, char *why, size_t capacity)
{
    if (input->hardness_hb < 150.0 || input->hardness_hb > 700.0) {
        snprintf(why, capacity, "it was made for 150 to 700 HB; the hardness is %g HB",
                 input->hardness_hb);
        return false;
    }
    return true;
}

static void evaluate(const nw_estimate_input *input, nw_estimate_values *values)
{
    double hb = input->hardness_hb;
    *values = nw_estimate_compatible(
        4.25 * hb + 225.0, -0.09,
        (0.32 * hb * hb - 487.0 * hb + 191000.0) / input->youngs_modulus_mpa, -0.56);
}

const nw_estimate nw_estimate_hardness = {
    .key = "hardness",
    .title = "Hardness method (Roessle & Fatemi)",
    .range = "steels of 150 to 700 HB",
    .equation = "sf' = 4.25 HB + 225 MPa, b = -0.09, ef' = (0.32 HB^2 - 487 HB + 191000 MPa)/E, "
                "c = -0.56",
    .reference = "Roessle & Fatemi, Int. J. Fatigue 22 (2000) 495",
    .accuracy = "excellent for steels in a later comparison (Lee & Song, Int. J. Fatigue 28 (2006) "
                "386, abstract)",
    .check = "formula from memory; agrees with a row printed in Metals 15 (2025) 780",
    .groups = NW_GROUP_BIT(NW_STEEL),
    .needs = NW_NEEDS_HARDNESS | NW_NEEDS_MODULUS,
    .limits = limits,
    .evaluate = evaluate,
};
