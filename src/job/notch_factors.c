/* The factors of one notch. */
#include "notchwright/notch_factors.h"

#include "life/surface.h"

#include <math.h>

/* Tensile strength of the strongest steels there are, with room above [MPa]. */
static const double most_strength_mpa = 5000.0;

nw_notch_question nw_notch_question_of(const nw_shape *shape, const nw_shape_load *load)
{
    return (nw_notch_question){.shape = shape,
                               .load = load,
                               .sizes = nw_sizes_unknown(),
                               .group = NW_GROUP_UNSTATED,
                               .ultimate_strength_mpa = NAN,
                               .yield_strength_mpa = NAN,
                               .action = NAN,
                               .roughness_um = NAN};
}

/* ---- what cannot be ---- */

static nw_status check_strength(double value, const char *what, nw_diagnostics *diagnostics)
{
    if (isnan(value) || (value > 0.0 && value <= most_strength_mpa)) {
        return NW_OK;
    }
    return nw_fault(diagnostics, NW_INPUT, NULL, what,
                    "found %g MPa, expected above 0 and at most %g MPa", value, most_strength_mpa);
}

static nw_status check_material(const nw_notch_question *q, nw_diagnostics *diagnostics)
{
    nw_status faults[] = {
        check_strength(q->ultimate_strength_mpa, "ultimate", diagnostics),
        check_strength(q->yield_strength_mpa, "yield", diagnostics),
    };
    nw_status status = faults[0] != NW_OK ? faults[0] : faults[1];
    if (q->yield_strength_mpa > q->ultimate_strength_mpa) {
        status = nw_fault(diagnostics, NW_INPUT, NULL, "yield",
                          "found %g MPa, expected at most the tensile strength (%g MPa)",
                          q->yield_strength_mpa, q->ultimate_strength_mpa);
    }
    if (q->roughness_um < 0.0) {
        status = nw_fault(diagnostics, NW_INPUT, NULL, "roughness",
                          "found %g um, expected at least 0", q->roughness_um);
    }
    return status;
}

/* ---- Kf ---- */

static nw_group group_of(const nw_notch_question *q)
{
    return q->group == NW_GROUP_UNSTATED ? NW_STEEL : q->group;
}

static void fill_rows(nw_notch_factors *result)
{
    const nw_notch_question *q = &result->question;
    nw_sensitivity_input input = {
        .group = group_of(q),
        .ultimate_strength_mpa = q->ultimate_strength_mpa,
        .yield_strength_mpa = q->yield_strength_mpa,
        .radius_mm = result->kt.radius_mm,
        .gradient_per_mm = result->kt.gradient_per_mm,
        .kt = result->kt.kt,
        .plain = result->kt.plain,
        .torsion = q->load->is_shear,
        .surface_hardened = q->surface_hardened,
    };
    const nw_sensitivity *record;
    for (size_t i = 0; i < NW_SENSITIVITIES_MOST && (record = nw_sensitivity_at(i)) != NULL; i++) {
        result->rows[result->row_count++] = nw_kf_evaluate(record, &input, q->options.extrapolate);
    }
}

/* The method asked for; else the first in its range, else the first that applies at all. */
static const nw_kf *choose(const nw_notch_factors *result)
{
    const nw_kf *first = NULL;
    for (size_t i = 0; i < result->row_count; i++) {
        const nw_kf *row = &result->rows[i];
        if (row->record == result->question.sensitivity) {
            return row;
        }
        if (row->applies && (first == NULL || (row->in_range && !first->in_range))) {
            first = row;
        }
    }
    return result->question.sensitivity == NULL ? first : NULL;
}

static void caution_kf(nw_notch_factors *result, const nw_kf *row)
{
    nw_cautions *cautions = &result->cautions;
    nw_caution_add(cautions, "kt_for_local_strain", "kf",
                   "Local strain is calculated with Kt by default. With Kf in its place strain is "
                   "lower and life longer: Kf belongs to long lives, where it was measured, and "
                   "must not be used on top of another allowance for size or gradient.");
    if (!row->in_range) {
        nw_caution_add(cautions, "sensitivity_extrapolated", "kf", "Kf is extrapolated: %s.",
                       row->reason);
    }
    if (row->clamped) {
        nw_caution_add(
            cautions, "kf_clamped", "kf",
            "The formula left the range of 1 to Kt; Kf is set to the nearest of the two.");
    }
    if (result->question.group == NW_GROUP_UNSTATED) {
        nw_caution_add(cautions, "group_assumed", "kf",
                       "The alloy group was not given: steel is assumed (--group).");
    }
}

static nw_status fill_kf(nw_notch_factors *result, nw_diagnostics *diagnostics)
{
    fill_rows(result);
    const nw_kf *row = choose(result);
    result->kf = result->q = NAN;
    if (row == NULL) {
        return NW_OK;
    }
    if (!row->applies) {
        return nw_fault(diagnostics, NW_INPUT, NULL, "sensitivity", "%s does not apply: %s%s",
                        row->record->key, row->reason,
                        row->beyond_range ? "; --extrapolate insists" : "");
    }
    result->sensitivity = row->record;
    result->kf = row->kf;
    result->q = row->q;
    caution_kf(result, row);
    return NW_OK;
}

/* ---- stresses and surface ---- */

static nw_status fill_stress(nw_notch_factors *result, nw_diagnostics *diagnostics)
{
    const nw_notch_question *q = &result->question;
    result->nominal_stress_mpa = nw_nominal_stress_mpa(&result->kt, q->action);
    result->notch_elastic_stress_mpa = result->kt.kt * result->nominal_stress_mpa;
    if (!isnan(q->action) && isnan(result->nominal_stress_mpa)) {
        return nw_fault(diagnostics, NW_INPUT, NULL, "h",
                        "missing, expected the thickness: the nominal stress of a %s needs it (%s)",
                        nw_action_name(q->load->action), q->load->nominal);
    }
    return NW_OK;
}

static nw_status fill_surface(nw_notch_factors *result, nw_diagnostics *diagnostics)
{
    const nw_notch_question *q = &result->question;
    result->surface_factor = NAN;
    if (isnan(q->roughness_um)) {
        return NW_OK;
    }
    nw_material material = {.group = group_of(q),
                            .ultimate_strength_mpa = q->ultimate_strength_mpa};
    char why[200] = "";
    result->surface_factor = nw_roughness_factor(&material, q->roughness_um, why, sizeof why);
    return isnan(result->surface_factor)
               ? nw_fault(diagnostics, NW_INPUT, NULL, "roughness", "no surface factor: %s", why)
               : NW_OK;
}

nw_status nw_notch_factors_of(const nw_notch_question *question, nw_notch_factors *result,
                              nw_diagnostics *diagnostics)
{
    *result = (nw_notch_factors){.question = *question};
    nw_status material = check_material(question, diagnostics);
    nw_status status = nw_kt_evaluate(question->shape, question->load, &question->sizes,
                                      &question->options, &result->kt, diagnostics);
    if (status != NW_OK || material != NW_OK) {
        return NW_INPUT;
    }
    result->cautions = result->kt.cautions;
    nw_status faults[] = {
        fill_kf(result, diagnostics),
        fill_stress(result, diagnostics),
        fill_surface(result, diagnostics),
    };
    for (size_t i = 0; i < sizeof faults / sizeof faults[0]; i++) {
        status = faults[i] != NW_OK ? faults[i] : status;
    }
    return status;
}
