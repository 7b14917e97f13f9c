/* The tests in use: dropped ones taken out, missing amplitudes computed, levels numbered. */
#include "base/text.h"
#include "material/fit_parts.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

static nw_status fault(nw_fit_work *work, nw_status status, const char *text)
{
    nw_place place = {.line = 0};
    nw_text_copy(place.file, sizeof place.file, work->coupons->file);
    return nw_fault(work->diagnostics, status, &place, NULL, "%s", text);
}

static bool is_dropped(const nw_fit_options *options, const char *id, bool *found)
{
    for (size_t i = 0; i < options->drop_count; i++) {
        if (strcmp(options->drop[i], id) == 0) {
            found[i] = true;
            return true;
        }
    }
    return false;
}

static nw_status drop_and_keep(nw_fit_work *work, bool *found)
{
    nw_fit *fit = work->fit;
    const nw_fit_options *o = &fit->options;
    for (size_t i = 0; i < work->coupons->count; i++) {
        if (is_dropped(o, work->coupons->tests[i].id, found)) {
            fit->dropped[fit->dropped_count++] = i;
        } else {
            work->tests[work->count++].index = i;
        }
    }
    nw_status status = NW_OK;
    for (size_t i = 0; i < o->drop_count; i++) {
        if (!found[i]) {
            char text[160];
            snprintf(text, sizeof text, "no test is called '%.60s', which was to be dropped",
                     o->drop[i]);
            status = fault(work, NW_INPUT, text);
        }
    }
    return status;
}

static int by_size(const void *left, const void *right)
{
    double a = *(const double *)left, b = *(const double *)right;
    return (a > b) - (a < b);
}

/* Median of stress/(total - plastic) where all three were measured; NAN where none was. */
static nw_status modulus_of_tests(const nw_coupons *coupons, double *modulus)
{
    double *values = malloc((coupons->count + 1) * sizeof *values);
    size_t count = 0;
    *modulus = NAN;
    if (values == NULL) {
        return NW_MEMORY;
    }
    for (size_t i = 0; i < coupons->count; i++) {
        const nw_coupon *c = &coupons->tests[i];
        double elastic = c->strain_amplitude - c->plastic_strain_amplitude;
        if (elastic > 0.0 && c->stress_amplitude_mpa > 0.0) {
            values[count++] = c->stress_amplitude_mpa / elastic;
        }
    }
    if (count > 0) {
        qsort(values, count, sizeof *values, by_size);
        *modulus = 0.5 * (values[(count - 1) / 2] + values[count / 2]);
    }
    free(values);
    return NW_OK;
}

/* Total, stress and plastic strain from those two of them (and the modulus) that were measured. */
static void amplitudes(nw_fit_work *work, nw_fit_test *test)
{
    const nw_coupon *c = &work->coupons->tests[test->index];
    double modulus = work->fit->youngs_modulus_mpa;
    test->strain = c->strain_amplitude;
    test->stress_mpa = c->stress_amplitude_mpa;
    test->plastic = c->plastic_strain_amplitude;
    if (isnan(test->plastic)) {
        test->plastic = test->strain - test->stress_mpa / modulus;
        work->fit->plastic_computed += !isnan(test->plastic);
    } else {
        work->fit->plastic_measured++;
        if (isnan(test->strain)) {
            test->strain = test->plastic + test->stress_mpa / modulus;
        } else if (isnan(test->stress_mpa) && test->plastic < test->strain) {
            test->stress_mpa = modulus * (test->strain - test->plastic);
        }
    }
    test->log10_life = log10(c->cycles);
    test->runout = c->runout;
}

static void count_up(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    work->has_strain = work->has_stress = true;
    fit->life_min = fit->strain_min = INFINITY;
    fit->life_max = fit->strain_max = 0.0;
    for (size_t i = 0; i < work->count; i++) {
        nw_fit_test *t = &work->tests[i];
        amplitudes(work, t);
        work->has_strain = work->has_strain && !isnan(t->strain);
        work->has_stress = work->has_stress && !isnan(t->stress_mpa);
        work->has_plastic = work->has_plastic || !isnan(t->plastic);
        fit->strain_min = fmin(fit->strain_min, t->strain);
        fit->strain_max = fmax(fit->strain_max, t->strain);
        if (t->runout) {
            fit->runouts++;
        } else {
            double cycles = work->coupons->tests[t->index].cycles;
            fit->failures++;
            fit->life_min = fmin(fit->life_min, cycles);
            fit->life_max = fmax(fit->life_max, cycles);
        }
    }
    if (!work->has_strain) {
        fit->strain_min = fit->strain_max = NAN;
    }
    fit->tests = work->count;
}

/* Levels by total strain, else by stress, else by plastic strain. */
static nw_status number_levels(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    double *values = malloc(work->count * sizeof *values);
    size_t *level = calloc(work->count, sizeof *level), *members = NULL;
    nw_status status = values == NULL || level == NULL ? NW_MEMORY : NW_OK;
    if (status == NW_OK) {
        bool plastic_only = !work->has_strain && !work->has_stress;
        for (size_t i = 0; i < work->count; i++) {
            const nw_fit_test *t = &work->tests[i];
            values[i] = work->has_strain ? t->strain : plastic_only ? t->plastic : t->stress_mpa;
        }
        if (isnan(fit->options.level_width)) {
            fit->options.level_width = plastic_only ? 0.15 : 0.02;
        }
        status = nw_levels_of(values, work->count, fit->options.level_width, level, &fit->levels);
    }
    if (status == NW_OK) {
        members = calloc(fit->levels, sizeof *members);
        status = members == NULL ? NW_MEMORY : NW_OK;
    }
    if (status == NW_OK) {
        for (size_t i = 0; i < work->count; i++) {
            work->tests[i].level = level[i];
            members[level[i]]++;
        }
        fit->least_replicates = work->count;
        for (size_t i = 0; i < fit->levels; i++) {
            fit->least_replicates =
                members[i] < fit->least_replicates ? members[i] : fit->least_replicates;
        }
        fit->replication_percent = 100.0 * (1.0 - (double)fit->levels / (double)work->count);
        fit->verdict = nw_sample_verdict(work->count, fit->replication_percent);
    }
    free(values);
    free(level);
    free(members);
    return status;
}

static nw_status check(nw_fit_work *work)
{
    const nw_fit *fit = work->fit;
    char text[300];
    if (fit->failures == 0) {
        snprintf(text, sizeof text,
                 "found %zu run-outs and no failure, expected failures to fit a curve to",
                 fit->runouts);
        return fault(work, NW_INPUT, text);
    }
    if (fit->levels < 2) {
        snprintf(text, sizeof text,
                 "found one level of amplitude in %zu tests (within %.3g %%), expected at least "
                 "two, and five for a curve worth using",
                 work->count, 100.0 * fit->options.level_width);
        return fault(work, NW_INPUT, text);
    }
    return NW_OK;
}

static nw_status resolve_modulus(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    double measured;
    nw_status status = modulus_of_tests(work->coupons, &measured);
    fit->youngs_modulus_mpa = fit->options.youngs_modulus_mpa;
    if (status != NW_OK) {
        return status;
    }
    if (isnan(fit->youngs_modulus_mpa) && !isnan(measured)) {
        fit->youngs_modulus_mpa = measured;
        fit->modulus_from_tests = true;
    } else if (fabs(measured / fit->youngs_modulus_mpa - 1.0) > 0.1) {
        nw_caution_add(&fit->cautions, "modulus_disagrees", "youngs_modulus_mpa",
                       "Stress over elastic strain of the tests gives a modulus of %.4g MPa, "
                       "%.0f %% from the %.4g MPa given.",
                       measured, 100.0 * (measured / fit->youngs_modulus_mpa - 1.0),
                       fit->youngs_modulus_mpa);
    }
    return NW_OK;
}

static bool strain_without_modulus(const nw_fit_work *work)
{
    for (size_t i = 0; i < work->count; i++) {
        const nw_coupon *c = &work->coupons->tests[work->tests[i].index];
        if (!isnan(c->strain_amplitude) && isnan(c->plastic_strain_amplitude)) {
            return isnan(work->fit->youngs_modulus_mpa);
        }
    }
    return false;
}

nw_status nw_fit_select(nw_fit_work *work)
{
    size_t count = work->coupons->count;
    nw_fit *fit = work->fit;
    bool *found = calloc(fit->options.drop_count + 1, sizeof *found);
    work->tests = calloc(count + 1, sizeof *work->tests);
    fit->dropped = calloc(count + 1, sizeof *fit->dropped);
    nw_status status =
        found == NULL || work->tests == NULL || fit->dropped == NULL ? NW_MEMORY : NW_OK;
    if (status == NW_OK) {
        status = drop_and_keep(work, found);
    }
    free(found);
    if (status == NW_OK && work->count == 0) {
        return fault(work, NW_INPUT, "found no tests, expected some");
    }
    if (status == NW_OK) {
        status = resolve_modulus(work);
    }
    if (status == NW_OK && strain_without_modulus(work)) {
        return fault(work, NW_INPUT,
                     "plastic strain was not measured in all tests, so Young's modulus is needed: "
                     "give it, as in --modulus \"206 GPa\"");
    }
    if (status == NW_OK) {
        count_up(work);
        status = number_levels(work);
    }
    return status == NW_OK ? check(work) : status;
}
