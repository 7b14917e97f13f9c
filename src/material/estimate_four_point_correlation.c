/* Four-point correlation: each line through two points set by static values, in ranges de and cycles N.
 *   elastic line: 2.5 st/E at N = 1/4 and 0.9 Su/E at N = 1e5;
 *   plastic line: D^0.75/4 at N = 10, and 0.0132 - dee* at N = 1e4, with dee* the elastic line there.
 * In amplitudes and reversals:
 *   b = log(2.5 (st/Su)/0.9)/log(1/4e5), sf' = 1.25 st 2^b,
 *   dee* = (2.5 st/E) (4e4)^b, c = (1/3) log((0.0132 - dee*)/1.91) - (1/3) log(D^0.75/4),
 *   ef' = 0.125 D^0.75 20^-c,
 * where st, the true fracture stress, is Su (1 + D) unless it is measured. */
#include "material/estimates.h"

#include <math.h>

typedef struct elastic_line {
    double b;
    double range_at_1e4; /* elastic strain range at 1e4 cycles */
} elastic_line;

static elastic_line elastic_of(const nw_estimate_input *input)
{
    double fracture = nw_estimate_fracture_stress_mpa(input);
    double b = log10(2.5 * fracture / (0.9 * input->ultimate_strength_mpa)) / log10(1.0 / 4e5);
    return (elastic_line){b, 2.5 * fracture / input->youngs_modulus_mpa * pow(4e4, b)};
}

static bool limits(const nw_estimate_input *input, char *why, size_t capacity)
{
    elastic_line line = elastic_of(input);
    if (line.range_at_1e4 >= 0.0132) {
        snprintf(why, capacity,
                 "its elastic strain range at 1e4 cycles, %.4f, leaves nothing plastic of the "
                 "total of 0.0132 that it sets there (too strong for its modulus)",
                 line.range_at_1e4);
        return false;
    }
    return true;
}

static void evaluate(const nw_estimate_input *input, nw_estimate_values *values)
{
    double d = nw_estimate_fracture_strain(input);
    elastic_line line = elastic_of(input);
    double c = (log10((0.0132 - line.range_at_1e4) / 1.91) - log10(0.25 * pow(d, 0.75))) / 3.0;
    *values =
        nw_estimate_compatible(1.25 * nw_estimate_fracture_stress_mpa(input) * pow(2.0, line.b),
                               line.b, 0.125 * pow(d, 0.75) * pow(20.0, -c), c);
}

const nw_estimate nw_estimate_four_point_correlation = {
    .key = "four_point_correlation",
    .title = "Four-point correlation",
    .range = "wrought steels, aluminium, titanium and nickel alloys (29 metals in all)",
    .equation = "b = log(2.5 (st/Su)/0.9)/log(1/4e5), sf' = 1.25 st 2^b, dee* = (2.5 st/E) "
                "(4e4)^b, c = (1/3) log((0.0132 - dee*)/1.91) - (1/3) log(D^0.75/4), "
                "ef' = 0.125 D^0.75 20^-c",
    .reference = "Manson, Exp. Mech. 5 (1965) 193",
    .accuracy = "behind the modified universal slopes, the uniform material law and its own "
                "modified form in a comparison on 116 steels, 16 aluminium and 6 titanium alloys "
                "(Park & Song, Int. J. Fatigue 17 (1995) 365, abstract)",
    .check =
        "formula from memory; within 0.05 MPa in sf' and 0.0003 in b, ef' and c of a row printed "
        "in Metals 15 (2025) 780",
    .doubt = "That nickel alloys were among its 29 metals is from memory. For large D some authors "
             "cap it or reject the method.",
    .groups = NW_GROUP_BIT(NW_STEEL) | NW_GROUP_BIT(NW_ALUMINIUM) | NW_GROUP_BIT(NW_TITANIUM) |
              NW_GROUP_BIT(NW_NICKEL),
    .needs =
        NW_NEEDS_ULTIMATE | NW_NEEDS_MODULUS | NW_NEEDS_FRACTURE_STRAIN | NW_USES_FRACTURE_STRESS,
    .limits = limits,
    .evaluate = evaluate,
};
