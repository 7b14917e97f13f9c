/* One material looked at closely: what follows from its parameters, and what a user should know. */
#include "base/text.h"
#include "material/customary.h"
#include "notchwright/library.h"
#include "notchwright/life.h"

#include <math.h>
#include <string.h>

/* ---- derived ---- */

static nw_material_derived derive(const nw_material *m, double cycles)
{
    double sf = m->fatigue_strength_coefficient_mpa, b = m->fatigue_strength_exponent;
    double ef = m->fatigue_ductility_coefficient, c = m->fatigue_ductility_exponent;
    nw_strain_life curve = {m->youngs_modulus_mpa, sf, b, ef, c};
    double coefficient = sf * pow(2.0, b);
    return (nw_material_derived){
        .transition_reversals = pow(ef * m->youngs_modulus_mpa / sf, 1.0 / (b - c)),
        .cyclic_yield_mpa = nw_material_cyclic_yield_mpa(m),
        .basquin_coefficient_mpa = coefficient,
        .basquin_exponent = b,
        .basquin_slope = -1.0 / b,
        .basquin_log10_constant = -log10(coefficient) / b,
        .cycles = cycles,
        .stress_amplitude_mpa = sf * pow(2.0 * cycles, b),
        .strain_amplitude = nw_strain_life_amplitude(&curve, cycles),
        .compatible_exponent = b / c,
        .compatible_strength_mpa = sf / pow(ef, m->hardening_exponent),
    };
}

/* ---- cautions ---- */

static void curve_cautions(const nw_material *m, const nw_material_derived *d, nw_cautions *out)
{
    double n = m->hardening_exponent, k = m->strength_coefficient_mpa;
    if (fabs(d->compatible_exponent - n) > 0.3 * n) {
        nw_caution_add(out, "curves_disagree", "hardening_exponent",
                       "n' = %.3g and b/c = %.3g differ by more than 30 %%: the cyclic curve and "
                       "the strain-life set were fitted separately. Both are used as given.",
                       n, d->compatible_exponent);
    }
    if (fabs(d->compatible_strength_mpa - k) > 0.1 * k) {
        nw_caution_add(out, "strength_coefficients_disagree", "strength_coefficient_mpa",
                       "K' = %.4g MPa and sf'/ef'^n' = %.4g MPa differ by more than 10 %%: the "
                       "cyclic curve and the strain-life set were fitted separately. Both are used "
                       "as given.",
                       k, d->compatible_strength_mpa);
    }
}

/* What is customary: b and c in most texts, the ratio of the elastic line at 1e6 cycles to Su over the
 * materials of this library (common practice, no source). */
static void range_cautions(const nw_material *m, nw_cautions *out)
{
    nw_customary modulus = nw_customary_modulus_mpa(m->group);
    double ratio = m->fatigue_strength_coefficient_mpa * pow(2e6, m->fatigue_strength_exponent) /
                   m->ultimate_strength_mpa;
    const struct {
        const char *about, *name;
        double value;
        nw_customary range;
    } rows[] = {
        {"youngs_modulus_mpa",
         "Young's modulus in GPa",
         m->youngs_modulus_mpa / 1e3,
         {modulus.low / 1e3, modulus.high / 1e3}},
        {"fatigue_strength_exponent", "b", m->fatigue_strength_exponent, {-0.12, -0.05}},
        {"fatigue_ductility_exponent", "c", m->fatigue_ductility_exponent, {-0.7, -0.5}},
        {"fatigue_strength_coefficient_mpa",
         "stress amplitude at 1e6 cycles over Su",
         ratio,
         {0.25, 0.55}},
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        if (!isnan(rows[i].value) && !nw_is_customary(rows[i].range, rows[i].value)) {
            nw_caution_add(out, "outside_customary_range", rows[i].about,
                           "%s is %.4g, outside what is customary (%g to %g; common practice, no "
                           "source).",
                           rows[i].name, rows[i].value, rows[i].range.low, rows[i].range.high);
        }
    }
    if (m->fatigue_strength_coefficient_mpa < m->ultimate_strength_mpa) {
        nw_caution_add(
            out, "outside_customary_range", "ultimate_strength_mpa",
            "sf' = %.4g MPa is below the tensile strength, %.4g MPa; it is usually above "
            "(common practice, no source).",
            m->fatigue_strength_coefficient_mpa, m->ultimate_strength_mpa);
    }
    if (nw_hardness_misfits(m->group, m->ultimate_strength_mpa, m->hardness_hb)) {
        nw_caution_add(
            out, "hardness_and_strength_disagree", "hardness_hb",
            "A steel of %g HB has about %.0f MPa tensile strength (0.0012 HB^2 + 3.3 HB, "
            "Roessle & Fatemi 2000); %g MPa is more than %.0f %% off.",
            m->hardness_hb, nw_ultimate_from_hardness_mpa(m->hardness_hb), m->ultimate_strength_mpa,
            100.0 * nw_customary_hardness_misfit);
    }
}

static void basis_cautions(const nw_material *m, nw_cautions *out)
{
    if (m->basis == NW_ESTIMATED) {
        const nw_estimate *estimate = m->estimate == NULL ? NULL : nw_estimate_find(m->estimate);
        nw_caution_add(out, "estimated_material", "basis",
                       "Estimated without tests%s%s. Lives from such estimates are commonly off by "
                       "a factor of 3 to 10.",
                       estimate == NULL ? "" : " by ", estimate == NULL ? "" : estimate->key);
    }
    if (isnan(m->valid_cycles[0]) && isnan(m->valid_strain_amplitude[0])) {
        nw_caution_add(out, "range_unknown", "valid",
                       "The range of the tests is not stated, so no result can say when it is "
                       "extrapolated.");
    }
    if (isnan(m->log10_life_sd)) {
        nw_caution_add(out, "scatter_unknown", "scatter",
                       "The scatter of life is not stated: only the 50 %% curve can be used.");
    }
}

void nw_material_review_make(const nw_material *material, double cycles, nw_material_review *review)
{
    if (isnan(cycles)) {
        cycles = isnan(material->endurance_cycles) ? 1e6 : material->endurance_cycles;
    }
    *review = (nw_material_review){.material = *material};
    review->derived = derive(material, cycles);
    curve_cautions(material, &review->derived, &review->cautions);
    range_cautions(material, &review->cautions);
    basis_cautions(material, &review->cautions);
}

nw_status nw_material_review_read(const char *name, double cycles, nw_material_review *review,
                                  nw_diagnostics *diagnostics)
{
    char path[sizeof review->file];
    bool is_path =
        strchr(name, '/') != NULL || nw_text_ends(name, ".yaml") || nw_text_ends(name, ".yml");
    nw_status status = NW_OK;
    if (is_path) {
        nw_text_copy(path, sizeof path, name);
    } else {
        status = nw_material_find(name, path, sizeof path, diagnostics);
    }
    nw_material material;
    if (status == NW_OK) {
        status = nw_material_read(path, &material, diagnostics);
    }
    if (status == NW_OK) {
        nw_material_review_make(&material, cycles, review);
        nw_text_copy(review->file, sizeof review->file, path);
    }
    return status;
}
