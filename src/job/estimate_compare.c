/* Every estimate for one input, side by side, and the life each one means. */
#include "job/estimate_parts.h"
#include "notchwright/life.h"

#include <math.h>

const double nw_default_amplitudes[NW_DEFAULT_AMPLITUDES] = {0.002, 0.0035, 0.006, 0.01};

/* Largest amplitude for which a strain-life curve is asked; beyond it is a slip of units. */
static const double amplitude_limit = 0.2;

static nw_status check(const nw_estimate_input *input, const double *amplitudes, size_t count,
                       nw_diagnostics *diagnostics)
{
    nw_status status = nw_estimate_input_check(input, diagnostics);
    if (isnan(input->youngs_modulus_mpa)) {
        status = nw_fault(diagnostics, NW_INPUT, NULL, "youngs_modulus",
                          "missing, expected it: no life follows without it");
    }
    if (count > NW_AMPLITUDES_MOST) {
        return nw_fault(diagnostics, NW_INPUT, NULL, "strain_amplitudes",
                        "found %zu, expected at most %d", count, NW_AMPLITUDES_MOST);
    }
    for (size_t i = 0; i < count; i++) {
        if (!(amplitudes[i] > 0.0 && amplitudes[i] <= amplitude_limit)) {
            status = nw_fault(diagnostics, NW_INPUT, NULL, "strain_amplitudes",
                              "found %g, expected a value above 0 and at most %g", amplitudes[i],
                              amplitude_limit);
        }
    }
    return status;
}

static double cycles_at(const nw_estimate_input *input, const nw_estimate_values *v,
                        double amplitude)
{
    nw_two_terms terms = {v->fatigue_strength_coefficient_mpa / input->youngs_modulus_mpa,
                          v->fatigue_strength_exponent, v->fatigue_ductility_coefficient,
                          v->fatigue_ductility_exponent};
    return 0.5 * nw_two_terms_reversals(&terms, amplitude);
}

static double amplitude_at(const nw_estimate_input *input, const nw_estimate_values *v,
                           double cycles)
{
    nw_strain_life curve = {input->youngs_modulus_mpa, v->fatigue_strength_coefficient_mpa,
                            v->fatigue_strength_exponent, v->fatigue_ductility_coefficient,
                            v->fatigue_ductility_exponent};
    return nw_strain_life_amplitude(&curve, cycles);
}

static void fill_row(nw_estimate_comparison *result, nw_estimate_row *row)
{
    const nw_estimate_input *input = &result->input;
    nw_estimate_values *v = &row->values;
    *v = (nw_estimate_values){NAN, NAN, NAN, NAN, NAN, NAN, NW_FROM_ESTIMATE, NAN, NAN, NAN};
    row->transition_reversals = row->stress_amplitude_1e6_mpa = NAN;
    row->applies = nw_estimate_apply(row->record, input, v, row->reason, sizeof row->reason);
    if (row->applies) {
        snprintf(row->reason, sizeof row->reason, "made for %s", row->record->range);
        row->transition_reversals =
            pow(v->fatigue_ductility_coefficient * input->youngs_modulus_mpa /
                    v->fatigue_strength_coefficient_mpa,
                1.0 / (v->fatigue_strength_exponent - v->fatigue_ductility_exponent));
        row->stress_amplitude_1e6_mpa =
            v->fatigue_strength_coefficient_mpa * pow(2e6, v->fatigue_strength_exponent);
        result->applicable++;
    }
    for (size_t i = 0; i < result->amplitude_count; i++) {
        row->cycles[i] = row->applies ? cycles_at(input, v, result->amplitudes[i]) : NAN;
    }
}

static nw_estimate_spread spread_at(const nw_estimate_comparison *result, size_t amplitude)
{
    nw_estimate_spread spread = {NAN, NAN, NAN, NULL, NULL};
    for (size_t i = 0; i < result->row_count; i++) {
        const nw_estimate_row *row = &result->rows[i];
        double cycles = row->cycles[amplitude];
        if (!row->applies) {
            continue;
        }
        if (spread.shortest == NULL || cycles < spread.shortest_cycles) {
            spread.shortest_cycles = cycles;
            spread.shortest = row->record;
        }
        if (spread.longest == NULL || cycles > spread.longest_cycles) {
            spread.longest_cycles = cycles;
            spread.longest = row->record;
        }
    }
    spread.ratio = spread.longest_cycles / spread.shortest_cycles;
    return spread;
}

/* The customary least, five levels of three specimens each (common practice, no source), evenly spread in
 * the logarithm of life from 1e3 to 1e6 cycles by the recommended curve. */
static void plan_tests(nw_estimate_comparison *result)
{
    const nw_estimate_row *row = nw_estimate_row_of(result, result->recommended);
    for (int i = 0; row != NULL && i < NW_PLAN_LEVELS; i++) {
        double cycles = pow(10.0, 3.0 + 3.0 * i / (NW_PLAN_LEVELS - 1));
        result->plan[i] = (nw_plan_level){
            .strain_amplitude = amplitude_at(&result->input, &row->values, cycles),
            .expected_cycles = cycles,
            .specimens = 3,
        };
    }
}

nw_status nw_estimate_compare(const nw_estimate_input *input, const double *amplitudes,
                              size_t count, nw_estimate_comparison *result,
                              nw_diagnostics *diagnostics)
{
    *result = (nw_estimate_comparison){.input = *input};
    if (count == 0) {
        amplitudes = nw_default_amplitudes;
        count = NW_DEFAULT_AMPLITUDES;
    }
    if (check(input, amplitudes, count, diagnostics) != NW_OK) {
        return NW_INPUT;
    }
    for (size_t i = 0; i < count; i++) {
        result->amplitudes[i] = amplitudes[i];
    }
    result->amplitude_count = count;
    result->fracture_strain = nw_estimate_fracture_strain(input);
    result->fracture_stress_mpa = nw_estimate_fracture_stress_mpa(input);
    result->fracture_stress_derived = isnan(input->fracture_stress_mpa);
    const nw_estimate *record;
    for (size_t i = 0; i < NW_ESTIMATES_MOST && (record = nw_estimate_at(i)) != NULL; i++) {
        result->rows[i].record = record;
        fill_row(result, &result->rows[i]);
        result->row_count++;
    }
    for (size_t i = 0; i < count; i++) {
        result->spread[i] = spread_at(result, i);
    }
    result->recommended = nw_estimate_recommended(input, &result->because);
    plan_tests(result);
    nw_estimate_cautions(result);
    return NW_OK;
}

const nw_estimate_row *nw_estimate_row_of(const nw_estimate_comparison *comparison,
                                          const nw_estimate *record)
{
    for (size_t i = 0; i < comparison->row_count; i++) {
        if (comparison->rows[i].record == record) {
            return &comparison->rows[i];
        }
    }
    return NULL;
}
