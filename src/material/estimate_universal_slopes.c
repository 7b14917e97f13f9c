/* Universal slopes: de = 3.5 (Su/E) N^-0.12 + D^0.6 N^-0.6, in ranges and cycles. In amplitudes and reversals:
 *   sf' = (3.5/2) 2^0.12 Su, ef' = (1/2) 2^0.6 D^0.6, with coefficients as they are printed: 1.9018, 0.7579. */
#include "material/estimates.h"

#include <math.h>

static void evaluate(const nw_estimate_input *input, nw_estimate_values *values)
{
    double d = nw_estimate_fracture_strain(input);
    *values = nw_estimate_compatible(1.9018 * input->ultimate_strength_mpa, -0.12,
                                     0.7579 * pow(d, 0.6), -0.6);
}

const nw_estimate nw_estimate_universal_slopes = {
    .key = "universal_slopes",
    .title = "Universal slopes",
    .range = "wrought steels, aluminium, titanium and nickel alloys (29 metals in all)",
    .equation = "de = 3.5 (Su/E) N^-0.12 + D^0.6 N^-0.6 in ranges and cycles: sf' = 1.9018 Su, "
                "b = -0.12, ef' = 0.7579 D^0.6, c = -0.6",
    .reference = "Manson, Exp. Mech. 5 (1965) 193",
    .accuracy = "behind its modified form, the uniform material law and the modified four-point "
                "correlation in a comparison on 116 steels, 16 aluminium and 6 titanium alloys "
                "(Park & Song, Int. J. Fatigue 17 (1995) 365, abstract)",
    .check = "formula from memory; agrees with a row printed in Metals 15 (2025) 780",
    .doubt = "That nickel alloys were among its 29 metals is from memory.",
    .groups = NW_GROUP_BIT(NW_STEEL) | NW_GROUP_BIT(NW_ALUMINIUM) | NW_GROUP_BIT(NW_TITANIUM) |
              NW_GROUP_BIT(NW_NICKEL),
    .needs = NW_NEEDS_ULTIMATE | NW_NEEDS_MODULUS | NW_NEEDS_FRACTURE_STRAIN,
    .evaluate = evaluate,
};
