/* Modified universal slopes:
 *   de = 1.17 (Su/E)^0.832 N^-0.09 + 0.0266 D^0.155 (Su/E)^-0.53 N^-0.56, in ranges and cycles,
 * printed in amplitudes and reversals as
 *   sf' = 0.623 E (Su/E)^0.832, ef' = 0.0196 D^0.155 (Su/E)^-0.53. */
#include "material/estimates.h"

#include <math.h>

static void evaluate(const nw_estimate_input *input, nw_estimate_values *values)
{
    double e = input->youngs_modulus_mpa, ratio = input->ultimate_strength_mpa / e;
    double d = nw_estimate_fracture_strain(input);
    *values = nw_estimate_compatible(0.623 * e * pow(ratio, 0.832), -0.09,
                                     0.0196 * pow(d, 0.155) * pow(ratio, -0.53), -0.56);
}

const nw_estimate nw_estimate_modified_universal_slopes = {
    .key = "modified_universal_slopes",
    .title = "Modified universal slopes",
    .range = "wrought steels, aluminium and titanium alloys (47 metals in all)",
    .equation = "sf' = 0.623 E (Su/E)^0.832, b = -0.09, ef' = 0.0196 D^0.155 (Su/E)^-0.53, "
                "c = -0.56",
    .reference = "Muralidharan & Manson, J. Eng. Mater. Technol. 110 (1988) 55",
    .accuracy = "first in a comparison on 116 steels, 16 aluminium and 6 titanium alloys (Park & "
                "Song, Int. J. Fatigue 17 (1995) 365, abstract)",
    .check = "formula from memory; agrees with a row printed in Metals 15 (2025) 780",
    .groups = NW_GROUP_BIT(NW_STEEL) | NW_GROUP_BIT(NW_ALUMINIUM) | NW_GROUP_BIT(NW_TITANIUM),
    .needs = NW_NEEDS_ULTIMATE | NW_NEEDS_MODULUS | NW_NEEDS_FRACTURE_STRAIN,
    .evaluate = evaluate,
};
