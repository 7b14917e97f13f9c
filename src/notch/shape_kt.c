/* Kt of a shape: sizes completed, the formula chosen, its distance from finite elements. */
#include "base/text.h"
#include "notch/shapes.h"

#include <math.h>
#include <stdio.h>
#include <string.h>

/* A fit farther from finite elements than this [%] is pointed out; a high one is safe, so later. */
static const double low_worth_telling = -5.0, high_worth_telling = 10.0;

/* Sizes computed from others carry rounding; a range includes its limits. */
static const double limit_rounding = 1e-9;

/* Sizes of the load alone: those it needs, and the stress ratio, which means nothing to another load. */
static void check_load(nw_size_check *check, const nw_shape_load *load)
{
    for (int size = 0; size < NW_SIZES; size++) {
        if (load->required & 1u << size) {
            nw_size_required(check, (nw_size)size);
        }
    }
    if (!isnan(nw_size_of(check->sizes, NW_SIZE_STRESS_RATIO)) &&
        !(load->required & 1u << NW_SIZE_STRESS_RATIO)) {
        nw_size_fault(check, NW_SIZE_STRESS_RATIO,
                      "found with the load %s, which has no use for it", load->key);
    }
}

static bool complete(const nw_shape *shape, const nw_shape_load *load, const nw_kt_options *options,
                     nw_sizes *sizes, nw_diagnostics *diagnostics)
{
    nw_size_check check = {.shape = shape,
                           .sizes = sizes,
                           .path = options->path == NULL ? "" : options->path,
                           .place = options->place,
                           .diagnostics = diagnostics};
    nw_size_check_signs(&check);
    if (check.status == NW_OK) {
        shape->complete(&check);
        check_load(&check, load);
    }
    return check.status == NW_OK;
}

static bool within(const nw_kt_formula *formula, const nw_sizes *sizes, char *why, size_t capacity)
{
    nw_text_builder out = nw_text_builder_on(why, capacity);
    for (const nw_shape_range *r = formula->ranges; r->ratio != NULL; r++) {
        double value = r->value(sizes);
        if (!(value >= r->low * (1.0 - limit_rounding) &&
              value <= r->high * (1.0 + limit_rounding))) {
            nw_text_add(&out, "%s%s is %.4g, made for %g to %g", out.length > 0 ? "; " : "",
                        r->ratio, value, r->low, r->high);
        }
    }
    return out.length == 0;
}

static double reference_of(const nw_shape_load *load, const nw_sizes *sizes, double *error_percent)
{
    *error_percent = NAN;
    return load->reference == NULL ? NAN
                                   : load->reference(load->reference_data, sizes, error_percent);
}

static void fill_rows(nw_kt *result)
{
    const nw_kt_formula *const *formulas = result->load->formulas;
    for (size_t i = 0; formulas[i] != NULL && i < NW_FORMULAS_MOST; i++) {
        nw_kt_row *row = &result->rows[result->row_count++];
        row->formula = formulas[i];
        row->kt = formulas[i]->kt(formulas[i], &result->sizes);
        row->valid = within(formulas[i], &result->sizes, row->outside, sizeof row->outside);
        row->bias_percent = 100.0 * (row->kt / result->reference - 1.0);
    }
}

static const nw_kt_row *row_by_key(const nw_kt *result, const char *key)
{
    for (size_t i = 0; i < result->row_count; i++) {
        if (strcmp(result->rows[i].formula->key, key) == 0) {
            return &result->rows[i];
        }
    }
    return NULL;
}

/* The formula asked for, else the first that holds here, else the preferred one. */
static const nw_kt_row *choose(const nw_kt *result, const nw_kt_options *options,
                               nw_diagnostics *diagnostics)
{
    if (options->formula != NULL) {
        const nw_kt_row *row = row_by_key(result, options->formula);
        if (row == NULL) {
            const char *keys[NW_FORMULAS_MOST + 1] = {NULL};
            char list[120];
            for (size_t i = 0; i < result->row_count; i++) {
                keys[i] = result->rows[i].formula->key;
            }
            nw_fault(diagnostics, NW_INPUT, options->place, "formula",
                     "found '%.40s', expected %s (%s, %s)", options->formula,
                     nw_text_join(list, sizeof list, keys), result->shape->key, result->load->key);
        }
        return row;
    }
    for (size_t i = 0; i < result->row_count; i++) {
        if (result->rows[i].valid) {
            return &result->rows[i];
        }
    }
    return &result->rows[0];
}

static bool in_range_or_insisted(const nw_kt *result, const nw_kt_row *row,
                                 const nw_kt_options *options, nw_diagnostics *diagnostics)
{
    if (!row->valid && !options->extrapolate) {
        nw_fault(diagnostics, NW_INPUT, options->place, options->path,
                 "%s, %s: outside of the range of its formula%s (%s: %s); --extrapolate insists",
                 result->shape->key, result->load->key,
                 options->formula == NULL && result->row_count > 1 ? "s" : "", row->formula->key,
                 row->outside);
        return false;
    }
    if (!(row->kt > 0.0) || isinf(row->kt)) {
        nw_fault(diagnostics, NW_INPUT, options->place, options->path,
                 "%s, %s: the formula %s gives no factor so far outside of its range (%s)",
                 result->shape->key, result->load->key, row->formula->key, row->outside);
        return false;
    }
    return true;
}

static void caution_range(nw_kt *result, const nw_kt_row *row)
{
    if (!row->valid) {
        nw_caution_add(&result->cautions, "extrapolated", "kt",
                       "Kt is extrapolated: %s for the formula %s.", row->outside,
                       row->formula->key);
    } else if (row != &result->rows[0] && !result->rows[0].valid) {
        nw_caution_add(&result->cautions, "preferred_formula_out_of_range", "kt",
                       "The preferred formula %s does not reach here (%s); %s is used.",
                       result->rows[0].formula->key, result->rows[0].outside, row->formula->key);
    }
    if (row->kt < 1.0) {
        nw_caution_add(&result->cautions, "formula_below_one", "kt",
                       "The formula %s gives %.4g here; Kt is set to 1.", row->formula->key,
                       row->kt);
    }
}

static void caution_bias(nw_kt *result)
{
    double bias = result->bias_percent;
    if (isnan(bias)) {
        nw_caution_add(&result->cautions, "bias_unknown", "kt",
                       "How far this factor is from elasticity at this geometry is not known here; "
                       "fits to charts are up to 21 %% low elsewhere.");
    } else if (bias < low_worth_telling) {
        nw_caution_add(
            &result->cautions, "chart_low", "kt",
            "The formula is about %.0f %% below converged finite elements at this geometry (Kt "
            "about %.3g there), which is unsafe: at a slope of 5 to 10 that is a factor of %.2g to "
            "%.2g in life. Use the finite-element value, or your own.",
            -bias, result->reference, pow(result->reference / result->kt, 5.0),
            pow(result->reference / result->kt, 10.0));
    } else if (bias > high_worth_telling) {
        nw_caution_add(&result->cautions, "chart_high", "kt",
                       "The formula is about %.0f %% above converged finite elements at this "
                       "geometry (Kt about %.3g there).",
                       bias, result->reference);
    }
}

static void add_cautions(nw_kt *result, const nw_kt_row *row)
{
    caution_range(result, row);
    caution_bias(result);
    if (result->load->check != NULL) {
        result->load->check(&result->sizes, result->kt, &result->cautions);
    }
    for (const nw_shape_note *note = result->load->notes; note->code != NULL; note++) {
        nw_caution_add(&result->cautions, note->code, note->about, "%s", note->text);
    }
}

static void fill(nw_kt *result, const nw_kt_row *row)
{
    const nw_shape_load *load = result->load;
    result->formula = row->formula;
    result->valid = row->valid;
    result->kt = row->kt < 1.0 ? 1.0 : row->kt;
    result->bias_percent = 100.0 * (result->kt / result->reference - 1.0);
    double plain = load->plain == NULL ? 1.0 : load->plain(&result->sizes);
    result->plain = plain > result->kt ? result->kt : plain;
    result->radius_mm = nw_size_of(&result->sizes, NW_SIZE_R);
    result->gradient_per_mm = load->gradient == NULL ? NAN : load->gradient(&result->sizes);
    result->section = load->section == NULL ? NAN : load->section(&result->sizes);
    add_cautions(result, row);
}

nw_status nw_kt_evaluate(const nw_shape *shape, const nw_shape_load *load, const nw_sizes *sizes,
                         const nw_kt_options *options, nw_kt *result, nw_diagnostics *diagnostics)
{
    static const nw_kt_options none = {0};
    options = options == NULL ? &none : options;
    *result = (nw_kt){.shape = shape, .load = load, .sizes = *sizes};
    if (!complete(shape, load, options, &result->sizes, diagnostics)) {
        return NW_INPUT;
    }
    result->reference = reference_of(load, &result->sizes, &result->reference_error_percent);
    fill_rows(result);
    const nw_kt_row *row = choose(result, options, diagnostics);
    if (row == NULL || !in_range_or_insisted(result, row, options, diagnostics)) {
        return NW_INPUT;
    }
    fill(result, row);
    return NW_OK;
}

double nw_nominal_stress_mpa(const nw_kt *kt, double action)
{
    return kt->load->action == NW_ACTION_STRESS ? action : action / kt->section;
}
