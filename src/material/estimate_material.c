/* An estimate as a material. */
#include "base/text.h"
#include "material/estimates.h"

#include <math.h>

static nw_material static_values(const nw_estimate_input *input)
{
    return (nw_material){
        .group = input->group,
        .basis = NW_ESTIMATED,
        .youngs_modulus_mpa = input->youngs_modulus_mpa,
        .poisson_ratio = NAN,
        .yield_strength_mpa = input->yield_strength_mpa,
        .ultimate_strength_mpa = input->ultimate_strength_mpa,
        .reduction_of_area = input->reduction_of_area,
        .hardness_hb = input->hardness_hb,
        .fracture_stress_mpa = input->fracture_stress_mpa,
        .fracture_strain = input->fracture_strain,
        .log10_life_sd = NAN,
        .scatter_tests = NAN,
        .valid_cycles = {NAN, NAN},
        .valid_strain_amplitude = {NAN, NAN},
    };
}

static void put_values(nw_material *m, const nw_estimate_values *v)
{
    m->fatigue_strength_coefficient_mpa = v->fatigue_strength_coefficient_mpa;
    m->fatigue_strength_exponent = v->fatigue_strength_exponent;
    m->fatigue_ductility_coefficient = v->fatigue_ductility_coefficient;
    m->fatigue_ductility_exponent = v->fatigue_ductility_exponent;
    m->strain_life_origin = NW_FROM_ESTIMATE;
    m->strength_coefficient_mpa = v->strength_coefficient_mpa;
    m->hardening_exponent = v->hardening_exponent;
    m->strength_coefficient_origin = m->hardening_exponent_origin = v->cyclic_curve_origin;
    m->endurance_strain_amplitude = v->endurance_strain_amplitude;
    m->endurance_cycles = v->endurance_cycles;
}

static void put_words(nw_material *m, const nw_estimate *record, const nw_estimate_input *input)
{
    char inputs[240];
    nw_estimate_inputs_text(record, input, inputs, sizeof inputs);
    nw_text_builder source = nw_text_builder_on(m->source, sizeof m->source);
    nw_text_add(&source, "Estimated without tests by %s from %s. %s.", record->key, inputs,
                record->reference);
    nw_text_builder note = nw_text_builder_on(m->note, sizeof m->note);
    nw_text_add(&note, "Method made for %s. Reported: %s.", record->range, record->accuracy);
    if (m->strength_coefficient_origin == NW_COMPATIBILITY) {
        nw_text_add(&note, " K' and n' by compatibility.");
    }
}

nw_status nw_estimate_material(const nw_estimate *record, const nw_estimate_input *input,
                               const char *name, nw_material *material, nw_diagnostics *diagnostics)
{
    nw_estimate_values values;
    char why[300];
    if (isnan(input->youngs_modulus_mpa)) {
        return nw_fault(diagnostics, NW_INPUT, NULL, "youngs_modulus",
                        "missing, expected it in every material");
    }
    if (!nw_estimate_apply(record, input, &values, why, sizeof why)) {
        return nw_fault(diagnostics, NW_INPUT, NULL, NULL, "the estimate %s does not apply: %s",
                        record->key, why);
    }
    *material = static_values(input);
    nw_text_copy(material->name, sizeof material->name, name);
    put_values(material, &values);
    put_words(material, record, input);
    return NW_OK;
}
