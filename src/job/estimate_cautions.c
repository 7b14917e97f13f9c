/* Cautions of a comparison of estimates. */
#include "job/estimate_parts.h"
#include "material/customary.h"

#include <math.h>
#include <string.h>

static void input_cautions(nw_estimate_comparison *result)
{
    nw_cautions *out = &result->cautions;
    const nw_estimate_input *in = &result->input;
    nw_customary modulus = nw_customary_modulus_mpa(in->group);
    if (!nw_is_customary(modulus, in->youngs_modulus_mpa)) {
        nw_caution_add(out, "modulus_unusual", "inputs",
                       "Young's modulus %g GPa is outside what is customary for %s (%g to %g GPa; "
                       "common practice, no source): check group and unit.",
                       in->youngs_modulus_mpa / 1e3, nw_group_name(in->group), modulus.low / 1e3,
                       modulus.high / 1e3);
    }
    if (nw_hardness_misfits(in->group, in->ultimate_strength_mpa, in->hardness_hb)) {
        nw_caution_add(
            out, "hardness_and_strength_disagree", "inputs",
            "A steel of %g HB has about %.0f MPa tensile strength (0.0012 HB^2 + 3.3 HB, "
            "Roessle & Fatemi 2000); %g MPa is more than %.0f %% off. One of the two may "
            "be of another condition or unit.",
            in->hardness_hb, nw_ultimate_from_hardness_mpa(in->hardness_hb),
            in->ultimate_strength_mpa, 100.0 * nw_customary_hardness_misfit);
    }
    double from_area = -log1p(-in->reduction_of_area);
    if (fabs(in->fracture_strain - from_area) > 0.05 * from_area) {
        nw_caution_add(out, "fracture_strain_given", "inputs",
                       "The fracture strain given, %.4g, is used; the reduction of area would give "
                       "%.4g.",
                       in->fracture_strain, from_area);
    }
    if (result->fracture_strain > 1.2) {
        nw_caution_add(out, "fracture_strain_large", "inputs",
                       "Fracture strain %.3g (reduction of area %.0f %%): for more than about 1.2 "
                       "some authors cap it, or reject the methods that use it.",
                       result->fracture_strain, -100.0 * expm1(-result->fracture_strain));
    }
    if (isnan(in->ultimate_strength_mpa) && in->group == NW_STEEL) {
        nw_caution_add(out, "ultimate_strength_missing", "inputs",
                       "Most methods need the tensile strength. From %g HB it would be about %.0f "
                       "MPa (0.0012 HB^2 + 3.3 HB, Roessle & Fatemi 2000); it is not taken unless "
                       "given.",
                       in->hardness_hb, nw_ultimate_from_hardness_mpa(in->hardness_hb));
    }
}

static void method_cautions(nw_estimate_comparison *result)
{
    nw_cautions *out = &result->cautions;
    bool uses_fracture_stress = false, compatible = false;
    for (size_t i = 0; i < result->row_count; i++) {
        const nw_estimate_row *row = &result->rows[i];
        uses_fracture_stress |= row->applies && (row->record->needs & NW_USES_FRACTURE_STRESS);
        compatible |= row->applies && row->values.cyclic_curve_origin == NW_COMPATIBILITY;
    }
    if (uses_fracture_stress && result->fracture_stress_derived) {
        nw_caution_add(out, "fracture_stress_derived", "methods",
                       "True fracture stress not given: Su (1 + D) = %.0f MPa is taken by the "
                       "four-point methods.",
                       result->fracture_stress_mpa);
    }
    if (compatible) {
        nw_caution_add(out, "cyclic_curve_from_compatibility", "methods",
                       "Where a method gives no K' and n' of its own they follow from "
                       "compatibility (n' = b/c, K' = sf'/ef'^n').");
    }
    if (result->input.group == NW_STEEL) {
        nw_caution_add(out, "steel_kinds", "recommended",
                       "These methods were made for unalloyed and low-alloy steels for the most "
                       "part. The group 'steel' does not tell austenitic and other high-alloy "
                       "steels apart, for which they can be far off.");
    }
}

static void life_cautions(nw_estimate_comparison *result)
{
    nw_cautions *out = &result->cautions;
    for (size_t i = 0; i < result->amplitude_count; i++) {
        const nw_estimate_spread *spread = &result->spread[i];
        if (spread->shortest_cycles < 0.5) {
            nw_caution_add(out, "life_below_one_reversal", "spread",
                           "At %.3g %% a life is below one reversal (%.2g cycles): the strain-life "
                           "curve does not reach there.",
                           100.0 * result->amplitudes[i], spread->shortest_cycles);
        }
        if (spread->longest_cycles > 1e7) {
            nw_caution_add(out, "life_extrapolated", "spread",
                           "At %.3g %% a life is above 1e7 cycles, where the estimates are "
                           "extrapolated and an endurance limit may matter (common practice, no "
                           "source).",
                           100.0 * result->amplitudes[i]);
        }
    }
}

void nw_estimate_cautions(nw_estimate_comparison *result)
{
    nw_cautions *out = &result->cautions;
    if (result->recommended == NULL) {
        nw_caution_add(out, "no_method_applies", "recommended",
                       "No method applies; the reasons stand beside each.");
    } else {
        nw_caution_add(out, "estimated_material", "recommended",
                       "Estimated without tests. Lives from such estimates are commonly off by a "
                       "factor of 3 to 10; the authors of a comparison on 724 steels and 81 "
                       "aluminium alloys hold that none should be used in design without a test "
                       "(Meggiolaro & Castro, Int. J. Fatigue 26 (2004) 463, from memory).");
        if (result->recommended->doubt != NULL) {
            nw_caution_add(out, "method_doubtful", "recommended", "%s", result->recommended->doubt);
        }
    }
    input_cautions(result);
    method_cautions(result);
    life_cautions(result);
    nw_caution_add(out, "scope", "spread",
                   "Lives at zero mean stress, smooth polished specimens, to a small crack. Tests, "
                   "applicable codes and the judgement of a qualified engineer come first.");
}
