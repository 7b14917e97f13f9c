/* Uniform material law: strain-life parameters from tensile strength and Young's modulus.
 *
 * Unalloyed and low-alloy steels:
 *   sf' = 1.5 Su, b = -0.087, ef' = 0.59 psi, c = -0.58, K' = 1.65 Su, n' = 0.15,
 *   psi = 1 for Su/E <= 0.003, else 1.375 - 125 Su/E; endurance 0.45 Su at 5e5 cycles.
 * Aluminium and titanium alloys:
 *   sf' = 1.67 Su, b = -0.095, ef' = 0.35, c = -0.69, K' = 1.61 Su, n' = 0.11;
 *   endurance 0.42 Su at 1e6 cycles.
 * K' and n' of the second set are printed so; they are not compatible with b/c.
 */
#include "material/estimates.h"

static double ductility_factor(const nw_estimate_input *input)
{
    double ratio = input->ultimate_strength_mpa / input->youngs_modulus_mpa;
    return ratio <= 0.003 ? 1.0 : 1.375 - 125.0 * ratio;
}

static bool limits(const nw_estimate_input *input, char *why, size_t capacity)
{
    if (input->group == NW_STEEL && ductility_factor(input) <= 0.0) {
        snprintf(
            why, capacity,
            "its ductility factor 1.375 - 125 Su/E is not positive at Su/E = %.4f (needs below "
            "0.011)",
            input->ultimate_strength_mpa / input->youngs_modulus_mpa);
        return false;
    }
    return true;
}

static void evaluate(const nw_estimate_input *input, nw_estimate_values *values)
{
    double su = input->ultimate_strength_mpa, e = input->youngs_modulus_mpa;
    if (input->group == NW_STEEL) {
        double psi = ductility_factor(input);
        *values = (nw_estimate_values){
            .fatigue_strength_coefficient_mpa = 1.5 * su,
            .fatigue_strength_exponent = -0.087,
            .fatigue_ductility_coefficient = 0.59 * psi,
            .fatigue_ductility_exponent = -0.58,
            .strength_coefficient_mpa = 1.65 * su,
            .hardening_exponent = 0.15,
            .cyclic_curve_origin = NW_FROM_ESTIMATE,
            .endurance_stress_mpa = 0.45 * su,
            .endurance_strain_amplitude = 0.45 * su / e + 1.95e-4 * psi,
            .endurance_cycles = 5e5,
        };
    } else {
        *values = (nw_estimate_values){
            .fatigue_strength_coefficient_mpa = 1.67 * su,
            .fatigue_strength_exponent = -0.095,
            .fatigue_ductility_coefficient = 0.35,
            .fatigue_ductility_exponent = -0.69,
            .strength_coefficient_mpa = 1.61 * su,
            .hardening_exponent = 0.11,
            .cyclic_curve_origin = NW_FROM_ESTIMATE,
            .endurance_stress_mpa = 0.42 * su,
            .endurance_strain_amplitude = 0.42 * su / e,
            .endurance_cycles = 1e6,
        };
    }
}

const nw_estimate nw_estimate_uniform_material_law = {
    .key = "uniform_material_law",
    .title = "Uniform material law",
    .range = "unalloyed and low-alloy steels with Su/E below 0.011; aluminium and titanium alloys",
    .equation = "steels: sf' = 1.5 Su, b = -0.087, ef' = 0.59 psi, c = -0.58, K' = 1.65 Su, "
                "n' = 0.15, psi = 1 up to Su/E = 0.003, else 1.375 - 125 Su/E; aluminium and "
                "titanium: sf' = 1.67 Su, b = -0.095, ef' = 0.35, c = -0.69, K' = 1.61 Su, "
                "n' = 0.11",
    .reference = "Baeumel & Seeger, Materials Data for Cyclic Loading, Supplement 1, Elsevier 1990",
    .accuracy = "next to the modified universal slopes in a comparison on 116 steels, 16 aluminium "
                "and 6 titanium alloys (Park & Song, Int. J. Fatigue 17 (1995) 365, abstract)",
    .check = "formula from memory; agrees with a row printed in Metals 15 (2025) 780",
    .groups = NW_GROUP_BIT(NW_STEEL) | NW_GROUP_BIT(NW_ALUMINIUM) | NW_GROUP_BIT(NW_TITANIUM),
    .needs = NW_NEEDS_ULTIMATE | NW_NEEDS_MODULUS,
    .limits = limits,
    .evaluate = evaluate,
};
