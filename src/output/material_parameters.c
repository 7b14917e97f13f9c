/* The parameters of a material as JSON, the same wherever a result names one. */
#include "output/json.h"

static json_t *range(const double *values)
{
    return isnan(values[0]) ? json_null() : json_pack("[f, f]", values[0], values[1]);
}

json_t *nw_json_material(const nw_material *m)
{
    json_t *object = json_pack("{s:o, s:s, s:s, s:o, s:o, s:o}", "name", nw_json_text(m->name),
                               "group", nw_group_name(m->group), "basis", nw_basis_name(m->basis),
                               "source", nw_json_text(m->source), "note", nw_json_text(m->note),
                               "estimate", nw_json_text(m->estimate));
    if (object == NULL) {
        return NULL;
    }
    const struct {
        const char *key;
        double value;
    } numbers[] = {
        {"youngs_modulus_mpa", m->youngs_modulus_mpa},
        {"poisson_ratio", m->poisson_ratio},
        {"yield_strength_mpa", m->yield_strength_mpa},
        {"ultimate_strength_mpa", m->ultimate_strength_mpa},
        {"reduction_of_area", m->reduction_of_area},
        {"fracture_stress_mpa", m->fracture_stress_mpa},
        {"fracture_strain", m->fracture_strain},
        {"hardness_hb", m->hardness_hb},
        {"strength_coefficient_mpa", m->strength_coefficient_mpa},
        {"hardening_exponent", m->hardening_exponent},
        {"fatigue_strength_coefficient_mpa", m->fatigue_strength_coefficient_mpa},
        {"fatigue_strength_exponent", m->fatigue_strength_exponent},
        {"fatigue_ductility_coefficient", m->fatigue_ductility_coefficient},
        {"fatigue_ductility_exponent", m->fatigue_ductility_exponent},
        {"endurance_strain_amplitude", m->endurance_strain_amplitude},
        {"endurance_cycles", m->endurance_cycles},
        {"log10_life_sd", m->log10_life_sd},
        {"tests", m->scatter_tests},
    };
    int failed = 0;
    for (size_t i = 0; i < sizeof numbers / sizeof numbers[0]; i++) {
        failed |= json_object_set_new(object, numbers[i].key, nw_json_number(numbers[i].value));
    }
    failed |= json_object_set_new(object, "strength_coefficient_from",
                                  json_string(nw_origin_name(m->strength_coefficient_origin)));
    failed |= json_object_set_new(object, "hardening_exponent_from",
                                  json_string(nw_origin_name(m->hardening_exponent_origin)));
    failed |= json_object_set_new(object, "valid_cycles", range(m->valid_cycles));
    failed |=
        json_object_set_new(object, "valid_strain_amplitude", range(m->valid_strain_amplitude));
    if (failed) {
        json_decref(object);
        return NULL;
    }
    return object;
}
