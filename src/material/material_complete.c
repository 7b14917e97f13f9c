/* What follows from what is given: the estimate, compatibility of the two curves, and checks that need
 * more than one value. */
#include "base/fields.h"
#include "base/text.h"
#include "material/material_file.h"

#include <math.h>

static bool known(double value)
{
    return !isnan(value);
}

static nw_status fill_from_estimate(nw_material *m, const nw_estimate *estimate,
                                    nw_field_reader *reader, const nw_node *map, const char *path)
{
    nw_estimate_input input = nw_estimate_input_of(m);
    nw_estimate_values values;
    char why[300];
    if (!nw_estimate_apply(estimate, &input, &values, why, sizeof why)) {
        nw_field_fault(reader, map, path, "",
                       "no strain_life, and the estimate %s does not apply: %s", estimate->key,
                       why);
        return NW_INPUT;
    }
    m->fatigue_strength_coefficient_mpa = values.fatigue_strength_coefficient_mpa;
    m->fatigue_strength_exponent = values.fatigue_strength_exponent;
    m->fatigue_ductility_coefficient = values.fatigue_ductility_coefficient;
    m->fatigue_ductility_exponent = values.fatigue_ductility_exponent;
    m->strain_life_origin = NW_FROM_ESTIMATE;
    m->estimate = estimate->key;
    m->basis = NW_ESTIMATED;
    if (!known(m->strength_coefficient_mpa) && !known(m->hardening_exponent) &&
        values.cyclic_curve_origin == NW_FROM_ESTIMATE) { /* else compatibility gives the same */
        m->strength_coefficient_mpa = values.strength_coefficient_mpa;
        m->hardening_exponent = values.hardening_exponent;
        m->strength_coefficient_origin = m->hardening_exponent_origin = NW_FROM_ESTIMATE;
    }
    if (!known(m->endurance_strain_amplitude) && !known(m->endurance_cycles)) {
        m->endurance_strain_amplitude = values.endurance_strain_amplitude;
        m->endurance_cycles = values.endurance_cycles;
    }
    if (m->source[0] == '\0') {
        char inputs[240];
        nw_text_builder source = nw_text_builder_on(m->source, sizeof m->source);
        nw_text_add(&source, "estimated by %s from %s: %s", estimate->key,
                    nw_estimate_inputs_text(estimate, &input, inputs, sizeof inputs),
                    estimate->reference);
    }
    return NW_OK;
}

/* Compatibility of elastic and plastic lines with the cyclic curve (Morrow, ASTM STP 378, 1965). */
static void fill_by_compatibility(nw_material *m)
{
    if (!known(m->hardening_exponent)) {
        m->hardening_exponent = m->fatigue_strength_exponent / m->fatigue_ductility_exponent;
        m->hardening_exponent_origin = NW_COMPATIBILITY;
    }
    if (!known(m->strength_coefficient_mpa)) {
        m->strength_coefficient_mpa = m->fatigue_strength_coefficient_mpa /
                                      pow(m->fatigue_ductility_coefficient, m->hardening_exponent);
        m->strength_coefficient_origin = NW_COMPATIBILITY;
    }
}

static void check_set(const nw_material *m, nw_field_reader *reader, const nw_node *map,
                      const char *path)
{
    if (!(m->fatigue_strength_exponent > m->fatigue_ductility_exponent)) {
        nw_field_fault(reader, map, path, "strain_life.fatigue_ductility_exponent",
                       "found %g, expected a steeper line than the elastic one (%g)",
                       m->fatigue_ductility_exponent, m->fatigue_strength_exponent);
    }
    if (!(m->hardening_exponent >= 0.005 && m->hardening_exponent <= 0.6)) {
        nw_field_fault(reader, map, path, "cyclic_curve.hardening_exponent",
                       "found %g from compatibility (b/c), expected 0.005 to 0.6",
                       m->hardening_exponent);
    }
    if (!(m->strength_coefficient_mpa > 0.0 && m->strength_coefficient_mpa <= 1e5)) {
        nw_field_fault(reader, map, path, "cyclic_curve.strength_coefficient",
                       "found %g MPa from compatibility, expected above 0 and at most 100000 MPa",
                       m->strength_coefficient_mpa);
    }
    if (known(m->yield_strength_mpa) && known(m->ultimate_strength_mpa) &&
        m->yield_strength_mpa > m->ultimate_strength_mpa) {
        nw_field_fault(reader, map, path, "yield_strength",
                       "found %g MPa, expected at most the ultimate strength (%g MPa)",
                       m->yield_strength_mpa, m->ultimate_strength_mpa);
    }
    if (m->fracture_stress_mpa < m->ultimate_strength_mpa) {
        nw_field_fault(reader, map, path, "fracture_stress",
                       "found %g MPa, expected the true stress at fracture, which is at least the "
                       "ultimate strength (%g MPa)",
                       m->fracture_stress_mpa, m->ultimate_strength_mpa);
    }
    if (known(m->ultimate_strength_mpa) &&
        m->ultimate_strength_mpa < 1e-4 * m->youngs_modulus_mpa) {
        nw_field_fault(
            reader, map, path, "ultimate_strength",
            "found %g MPa, expected above a ten-thousandth of Young's modulus (%g MPa); check "
            "the units",
            m->ultimate_strength_mpa, m->youngs_modulus_mpa);
    }
    if (known(m->ultimate_strength_mpa) && m->ultimate_strength_mpa > 0.1 * m->youngs_modulus_mpa) {
        nw_field_fault(reader, map, path, "ultimate_strength",
                       "found %g MPa, expected below a tenth of Young's modulus (%g MPa); check "
                       "the units",
                       m->ultimate_strength_mpa, m->youngs_modulus_mpa);
    }
}

nw_status nw_material_complete(nw_material *m, const nw_node *map, const char *path,
                               const char *estimate, nw_diagnostics *diagnostics)
{
    nw_field_reader reader = {.diagnostics = diagnostics};
    if (!known(m->poisson_ratio)) {
        m->poisson_ratio = 0.3;
    }
    bool has_life = known(m->fatigue_strength_coefficient_mpa);
    if (has_life && estimate != NULL) {
        nw_field_fault(&reader, map, path, "estimate",
                       "found both 'estimate' and 'strain_life', expected one of them");
        return reader.status;
    }
    if (!has_life) {
        const nw_estimate *record =
            nw_estimate_find(estimate == NULL ? "uniform_material_law" : estimate);
        if (fill_from_estimate(m, record, &reader, map, path) != NW_OK) {
            return reader.status;
        }
    }
    fill_by_compatibility(m);
    check_set(m, &reader, map, path);
    return reader.status;
}

double nw_material_cyclic_yield_mpa(const nw_material *m)
{
    return m->strength_coefficient_mpa * pow(0.002, m->hardening_exponent);
}
