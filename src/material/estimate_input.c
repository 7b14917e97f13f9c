/* What goes into an estimate: derived quantities, checks, and the same in words. */
#include "base/text.h"
#include "material/estimates.h"

#include <math.h>

nw_estimate_input nw_estimate_input_unknown(nw_group group)
{
    return (nw_estimate_input){group, NAN, NAN, NAN, NAN, NAN, NAN, NAN};
}

nw_estimate_input nw_estimate_input_of(const nw_material *m)
{
    return (nw_estimate_input){.group = m->group,
                               .ultimate_strength_mpa = m->ultimate_strength_mpa,
                               .youngs_modulus_mpa = m->youngs_modulus_mpa,
                               .yield_strength_mpa = m->yield_strength_mpa,
                               .hardness_hb = m->hardness_hb,
                               .reduction_of_area = m->reduction_of_area,
                               .fracture_strain = m->fracture_strain,
                               .fracture_stress_mpa = m->fracture_stress_mpa};
}

double nw_estimate_fracture_strain(const nw_estimate_input *input)
{
    return isnan(input->fracture_strain) ? -log1p(-input->reduction_of_area)
                                         : input->fracture_strain;
}

double nw_estimate_fracture_stress_mpa(const nw_estimate_input *input)
{
    return isnan(input->fracture_stress_mpa)
               ? input->ultimate_strength_mpa * (1.0 + nw_estimate_fracture_strain(input))
               : input->fracture_stress_mpa;
}

double nw_ultimate_from_hardness_mpa(double hardness_hb)
{
    return 0.0012 * hardness_hb * hardness_hb + 3.3 * hardness_hb;
}

/* The limits are those of the same keys in a material file. */
typedef struct limit {
    const char *key;
    const char *unit;
    double value, low, high;
    bool high_open;
} limit;

static void check_limit(const limit *row, nw_status *status, nw_diagnostics *diagnostics)
{
    bool below = row->high_open ? row->value < row->high : row->value <= row->high;
    bool above = row->low > 0.0 ? row->value >= row->low : row->value > 0.0;
    if (!isnan(row->value) && !(above && below)) {
        *status = nw_fault(diagnostics, NW_INPUT, NULL, row->key,
                           "found %.6g%s, expected a value %s %g%s and %s %g%s", row->value,
                           row->unit, row->low > 0.0 ? "at least" : "above", row->low, row->unit,
                           row->high_open ? "below" : "at most", row->high, row->unit);
    }
}

static void check_pairs(const nw_estimate_input *input, nw_status *status,
                        nw_diagnostics *diagnostics)
{
    double su = input->ultimate_strength_mpa;
    if (input->yield_strength_mpa > su) {
        *status = nw_fault(diagnostics, NW_INPUT, NULL, "yield_strength",
                           "found %g MPa, expected at most the ultimate strength (%g MPa)",
                           input->yield_strength_mpa, su);
    }
    if (su > 0.1 * input->youngs_modulus_mpa) {
        *status = nw_fault(diagnostics, NW_INPUT, NULL, "ultimate_strength",
                           "found %g MPa, expected below a tenth of Young's modulus (%g MPa); "
                           "check the units",
                           su, input->youngs_modulus_mpa);
    }
    if (input->fracture_stress_mpa < su) {
        *status = nw_fault(diagnostics, NW_INPUT, NULL, "fracture_stress",
                           "found %g MPa, expected the true stress at fracture, which is at least "
                           "the ultimate strength (%g MPa)",
                           input->fracture_stress_mpa, su);
    }
}

nw_status nw_estimate_input_check(const nw_estimate_input *input, nw_diagnostics *diagnostics)
{
    const limit limits[] = {
        {"ultimate_strength", " MPa", input->ultimate_strength_mpa, 0.0, 1e4, false},
        {"youngs_modulus", " MPa", input->youngs_modulus_mpa, 1e3, 1e6, false},
        {"yield_strength", " MPa", input->yield_strength_mpa, 0.0, 1e4, false},
        {"hardness", " HB", input->hardness_hb, 0.0, 1e3, false},
        {"reduction_of_area", "", input->reduction_of_area, 0.0, 1.0, true},
        {"fracture_strain", "", input->fracture_strain, 0.0, 10.0, false},
        {"fracture_stress", " MPa", input->fracture_stress_mpa, 0.0, 1e4, false},
    };
    nw_status status = NW_OK;
    for (size_t i = 0; i < sizeof limits / sizeof limits[0]; i++) {
        check_limit(&limits[i], &status, diagnostics);
    }
    if (status == NW_OK) { /* a value that cannot be makes comparisons with it idle */
        check_pairs(input, &status, diagnostics);
    }
    return status;
}

static void add_fracture(nw_text_builder *out, const nw_estimate_input *input)
{
    double strain = nw_estimate_fracture_strain(input);
    if (isnan(input->fracture_strain)) {
        nw_text_add(out, ", fracture strain %.4g (from reduction of area %.4g %%)", strain,
                    100.0 * input->reduction_of_area);
    } else {
        nw_text_add(out, ", fracture strain %.4g", strain);
    }
}

char *nw_estimate_inputs_text(const nw_estimate *record, const nw_estimate_input *input, char *text,
                              size_t capacity)
{
    nw_text_builder out = nw_text_builder_on(text, capacity);
    nw_text_add(&out, "Young's modulus %.6g GPa", input->youngs_modulus_mpa / 1e3);
    if (record->needs & NW_NEEDS_ULTIMATE) {
        nw_text_add(&out, ", ultimate strength %.6g MPa", input->ultimate_strength_mpa);
    }
    if (record->needs & NW_NEEDS_HARDNESS) {
        nw_text_add(&out, ", hardness %.6g HB", input->hardness_hb);
    }
    if (record->needs & NW_NEEDS_FRACTURE_STRAIN) {
        add_fracture(&out, input);
    }
    if (record->needs & NW_USES_FRACTURE_STRESS) {
        nw_text_add(&out, ", fracture stress %.6g MPa%s", nw_estimate_fracture_stress_mpa(input),
                    isnan(input->fracture_stress_mpa) ? " (Su (1 + D))" : "");
    }
    return text;
}
