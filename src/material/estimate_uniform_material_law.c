/* Uniform material law: strain-life parameters from tensile strength and Young's modulus.
 *
 * Unalloyed and low-alloy steels:
 *   sf' = 1.5 Su, b = -0.087, ef' = 0.59 psi, c = -0.58, K' = 1.65 Su, n' = 0.15,
 *   psi = 1 for Su/E <= 0.003, else 1.375 - 125 Su/E; endurance 0.45 Su at 5e5 cycles.
 * Aluminium and titanium alloys:
 *   sf' = 1.67 Su, b = -0.095, ef' = 0.35, c = -0.69, K' = 1.61 Su, n' = 0.11;
 *   endurance 0.42 Su at 1e6 cycles.
 */
#include "material/estimates.h"

#include <math.h>
#include <stdio.h>

static double ductility_factor(const nw_estimate_input *input)
{
    double ratio = input->ultimate_strength_mpa / input->youngs_modulus_mpa;
    return ratio <= 0.003 ? 1.0 : 1.375 - 125.0 * ratio;
}

static bool applies(const nw_estimate_input *input, char *why, size_t capacity)
{
    if (isnan(input->ultimate_strength_mpa)) {
        snprintf(why, capacity, "ultimate_strength is missing");
        return false;
    }
    if (isnan(input->youngs_modulus_mpa)) {
        snprintf(why, capacity, "youngs_modulus is missing");
        return false;
    }
    if (input->group != NW_STEEL && input->group != NW_ALUMINIUM && input->group != NW_TITANIUM) {
        snprintf(why, capacity,
                 "it was made for unalloyed and low-alloy steels and for aluminium and titanium "
                 "alloys; the group is %s",
                 nw_group_name(input->group));
        return false;
    }
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
            .endurance_strain_amplitude = 0.42 * su / e,
            .endurance_cycles = 1e6,
        };
    }
}

const nw_estimate nw_estimate_uniform_material_law = {
    .key = "uniform_material_law",
    .title = "Uniform material law",
    .range = "unalloyed and low-alloy steels with Su/E below 0.011; aluminium and titanium alloys",
    .reference = "Baeumel & Seeger, Materials Data for Cyclic Loading, Supplement 1, Elsevier 1990",
    .applies = applies,
    .evaluate = evaluate,
};
