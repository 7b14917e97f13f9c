/* Medians of 724 steels and 81 aluminium alloys:
 *   steels: sf' = 1.5 Su, b = -0.09, ef' = 0.45, c = -0.59;
 *   aluminium: sf' = 1.9 Su, b = -0.11, ef' = 0.28, c = -0.66. */
#include "material/estimates.h"

static void evaluate(const nw_estimate_input *input, nw_estimate_values *values)
{
    double su = input->ultimate_strength_mpa;
    *values = input->group == NW_ALUMINIUM ? nw_estimate_compatible(1.9 * su, -0.11, 0.28, -0.66)
                                           : nw_estimate_compatible(1.5 * su, -0.09, 0.45, -0.59);
}

const nw_estimate nw_estimate_medians = {
    .key = "medians",
    .title = "Medians (Meggiolaro & Castro)",
    .range = "steels (724 of them) and aluminium alloys (81)",
    .equation = "steels: sf' = 1.5 Su, b = -0.09, ef' = 0.45, c = -0.59; aluminium: sf' = 1.9 Su, "
                "b = -0.11, ef' = 0.28, c = -0.66",
    .reference = "Meggiolaro & Castro, Int. J. Fatigue 26 (2004) 463",
    .accuracy = "best for aluminium alloys in a later comparison (Lee & Song, Int. J. Fatigue 28 "
                "(2006) 386, abstract); its own authors say that no estimate should be used in "
                "design without a test (from memory)",
    .check = "formula from memory; agrees with a row printed in Metals 15 (2025) 780",
    .groups = NW_GROUP_BIT(NW_STEEL) | NW_GROUP_BIT(NW_ALUMINIUM),
    .needs = NW_NEEDS_ULTIMATE,
    .evaluate = evaluate,
};
