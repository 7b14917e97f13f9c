/* Every estimate there is, in the order shown, and whether one applies. */
#include "base/text.h"
#include "material/estimates.h"

#include <math.h>
#include <string.h>

static const nw_estimate *const records[] = {
    &nw_estimate_uniform_material_law,
    &nw_estimate_hardness,
    &nw_estimate_modified_universal_slopes,
    &nw_estimate_universal_slopes,
    &nw_estimate_four_point_correlation,
    &nw_estimate_modified_four_point,
    &nw_estimate_mitchell,
    &nw_estimate_medians,
    &nw_estimate_strength_power_laws,
};

const nw_estimate *nw_estimate_at(size_t index)
{
    return index < sizeof records / sizeof records[0] ? records[index] : NULL;
}

const nw_estimate *nw_estimate_find(const char *key)
{
    const nw_estimate *record;
    for (size_t i = 0; (record = nw_estimate_at(i)) != NULL; i++) {
        if (strcmp(record->key, key) == 0) {
            return record;
        }
    }
    return NULL;
}

nw_estimate_values nw_estimate_compatible(double strength_mpa, double b, double ductility, double c)
{
    double exponent = b / c;
    return (nw_estimate_values){
        .fatigue_strength_coefficient_mpa = strength_mpa,
        .fatigue_strength_exponent = b,
        .fatigue_ductility_coefficient = ductility,
        .fatigue_ductility_exponent = c,
        .strength_coefficient_mpa = strength_mpa / pow(ductility, exponent),
        .hardening_exponent = exponent,
        .cyclic_curve_origin = NW_COMPATIBILITY,
        .endurance_stress_mpa = NAN,
        .endurance_strain_amplitude = NAN,
        .endurance_cycles = NAN,
    };
}

static bool made_for_group(const nw_estimate *record, const nw_estimate_input *input, char *why,
                           size_t capacity)
{
    if (record->groups & NW_GROUP_BIT(input->group)) {
        return true;
    }
    snprintf(why, capacity, "it was made for %s; the group is %s", record->range,
             nw_group_name(input->group));
    return false;
}

static bool inputs_known(const nw_estimate *record, const nw_estimate_input *input, char *why,
                         size_t capacity)
{
    const struct {
        unsigned bit;
        double value;
        const char *name;
    } rows[] = {
        {NW_NEEDS_ULTIMATE, input->ultimate_strength_mpa, "ultimate_strength"},
        {NW_NEEDS_MODULUS, input->youngs_modulus_mpa, "youngs_modulus"},
        {NW_NEEDS_HARDNESS, input->hardness_hb, "hardness"},
        {NW_NEEDS_FRACTURE_STRAIN, nw_estimate_fracture_strain(input),
         "reduction_of_area (or fracture_strain)"},
    };
    const char *missing[4];
    size_t count = 0;
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        if ((record->needs & rows[i].bit) && !(rows[i].value > 0.0)) {
            missing[count++] = rows[i].name;
        }
    }
    if (count == 0) {
        return true;
    }
    nw_text_builder out = nw_text_builder_on(why, capacity);
    for (size_t k = 0; k < count; k++) {
        nw_text_add(&out, "%s%s", k == 0 ? "" : " and ", missing[k]);
    }
    nw_text_add(&out, " %s missing", count == 1 ? "is" : "are");
    return false;
}

static bool values_usable(const nw_estimate_values *v, char *why, size_t capacity)
{
    bool usable =
        v->fatigue_strength_coefficient_mpa > 0.0 &&
        isfinite(v->fatigue_strength_coefficient_mpa) && v->fatigue_ductility_coefficient > 0.0 &&
        isfinite(v->fatigue_ductility_coefficient) && v->fatigue_strength_exponent < 0.0 &&
        v->fatigue_ductility_exponent < v->fatigue_strength_exponent &&
        v->strength_coefficient_mpa > 0.0 && v->strength_coefficient_mpa <= 1e5 &&
        v->hardening_exponent >= 0.005 && v->hardening_exponent <= 0.6;
    if (!usable) {
        snprintf(why, capacity,
                 "its values make no curves of use here (sf' %.4g MPa, b %.4g, ef' %.4g, c %.4g, "
                 "K' %.4g MPa, n' %.4g)",
                 v->fatigue_strength_coefficient_mpa, v->fatigue_strength_exponent,
                 v->fatigue_ductility_coefficient, v->fatigue_ductility_exponent,
                 v->strength_coefficient_mpa, v->hardening_exponent);
    }
    return usable;
}

bool nw_estimate_apply(const nw_estimate *record, const nw_estimate_input *input,
                       nw_estimate_values *values, char *why, size_t capacity)
{
    nw_estimate_values found;
    if (!made_for_group(record, input, why, capacity) ||
        !inputs_known(record, input, why, capacity) ||
        (record->limits != NULL && !record->limits(input, why, capacity))) {
        return false;
    }
    record->evaluate(input, &found);
    if (!values_usable(&found, why, capacity)) {
        return false;
    }
    if (values != NULL) {
        *values = found;
    }
    return true;
}
