/* The fit of coupon tests, step after step. */
#include "material/fit_parts.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

const char *nw_fit_method_name(nw_fit_method method)
{
    return method == NW_FIT_LIKELIHOOD ? "likelihood" : "lines";
}

const char *nw_scatter_model_name(nw_scatter_model model)
{
    return model == NW_SCATTER_GROWING ? "growing" : "constant";
}

nw_fit_options nw_fit_options_default(void)
{
    return (nw_fit_options){.youngs_modulus_mpa = NAN,
                            .method = NW_FIT_BY_TESTS,
                            .distribution = NW_LOG_NORMAL,
                            .scatter = NW_SCATTER_CONSTANT,
                            .least_plastic_strain = 1e-4,
                            .level_width = NAN,
                            .limits = 0.95,
                            .percentile = {0.1, 0.5, 0.9},
                            .percentile_count = 3,
                            .survival = {0.9, 0.99},
                            .survival_count = 2,
                            .confidence = {0.95},
                            .confidence_count = 1,
                            .cyclic_disagreement_limit = 0.05,
                            .plan_cycles = NAN,
                            .plan_tests = 10};
}

static nw_fit *begin(const nw_fit_options *options)
{
    nw_fit *fit = calloc(1, sizeof *fit);
    if (fit == NULL) {
        return NULL;
    }
    fit->options = *options;
    fit->log10_life_sd = fit->log10_life_sd_low = fit->log10_life_sd_high = NAN;
    fit->log10_life_sd_corrected = fit->degrees = NAN;
    fit->compatible_coefficient_mpa = fit->compatible_exponent = fit->cyclic_disagreement = NAN;
    for (int i = 0; i < 4; i++) {
        fit->theta[i] = NAN;
    }
    for (int i = 0; i < 16; i++) {
        fit->covariance[i] = NAN;
    }
    for (int i = 0; i < NW_FIT_PARAMETERS; i++) {
        fit->parameter[i] = (nw_fit_parameter){NAN, NAN, NAN, NAN, NAN, NAN, NULL, NULL};
    }
    return fit;
}

/* The likelihood when asked for, or by default when there are run-outs and it can be had. */
static nw_status choose_method(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    bool has_lines = fit->plastic.available || fit->elastic.available;
    bool wanted = fit->options.method == NW_FIT_LIKELIHOOD ||
                  (fit->options.method == NW_FIT_BY_TESTS && (fit->runouts > 0 || !has_lines));
    fit->method = wanted && fit->likelihood.available ? NW_FIT_LIKELIHOOD : NW_FIT_LINES;
    if (fit->options.method == NW_FIT_LIKELIHOOD && !fit->likelihood.available) {
        return nw_fault(work->diagnostics, NW_COMPUTE, NULL, NULL, "likelihood: %s",
                        fit->likelihood.why);
    }
    if (fit->method == NW_FIT_LINES && !has_lines) {
        return nw_fault(
            work->diagnostics, NW_COMPUTE, NULL, NULL,
            "no curve can be fitted: plastic line: %s; elastic line: %s; likelihood: %s",
            fit->plastic.why, fit->elastic.why, fit->likelihood.why);
    }
    return NW_OK;
}

typedef nw_status (*step)(nw_fit_work *work);

static nw_status settle(nw_fit_work *work)
{
    nw_fit_parameters(work);
    return NW_OK;
}

static nw_status plan(nw_fit_work *work)
{
    nw_fit_plan_tests(work);
    nw_fit_cautions(work);
    return NW_OK;
}

nw_status nw_fit_coupons(const nw_coupons *coupons, const nw_fit_options *options, nw_fit **result,
                         nw_diagnostics *diagnostics)
{
    static const step steps[] = {nw_fit_select, nw_fit_lines,  nw_fit_likelihoods, choose_method,
                                 settle,        nw_fit_curves, nw_fit_outliers,    plan};
    nw_fit_work work = {.coupons = coupons, .fit = begin(options), .diagnostics = diagnostics};
    *result = NULL;
    nw_status status = work.fit == NULL ? NW_MEMORY : NW_OK;
    for (size_t i = 0; i < sizeof steps / sizeof steps[0] && status == NW_OK; i++) {
        status = steps[i](&work);
    }
    free(work.tests);
    if (status == NW_OK) {
        work.fit->options.drop = NULL;
        *result = work.fit;
        return NW_OK;
    }
    nw_fit_free(work.fit);
    return status == NW_MEMORY ? nw_fault(diagnostics, status, NULL, NULL, "out of memory")
                               : status;
}

void nw_fit_free(nw_fit *fit)
{
    if (fit != NULL) {
        free(fit->dropped);
        free(fit->plastic.left_out);
        free(fit->elastic.left_out);
        free(fit->cyclic.left_out);
        free(fit->curves);
        free(fit->outliers);
        free(fit);
    }
}

static const char *base_name(const char *path)
{
    const char *slash = strrchr(path, '/');
    return slash == NULL ? path : slash + 1;
}

/* What the numbers of a material file do not tell: it goes with them as a note. */
static void note_limits(const nw_fit *fit, nw_material *m)
{
    bool plain =
        fit->options.distribution == NW_LOG_NORMAL && fit->options.scatter == NW_SCATTER_CONSTANT;
    bool other_model = fit->method == NW_FIT_LIKELIHOOD && !plain;
    snprintf(m->note, sizeof m->note, "%s%s%s%s%s", other_model ? "Lives were fitted as " : "",
             other_model ? nw_distribution_name(fit->options.distribution) : "",
             other_model ? " with scatter " : "",
             other_model ? nw_scatter_model_name(fit->options.scatter) : "",
             other_model
                 ? "; the standard deviation given is that at the mean life and stands for a "
                   "log-normal life. "
                 : "");
    if (strcmp(fit->verdict, "less than preliminary work") == 0) {
        size_t used = strlen(m->note);
        snprintf(m->note + used, sizeof m->note - used,
                 "Fewer tests than is customary even for preliminary work.");
    }
}

nw_status nw_fit_material(const nw_coupons *coupons, const nw_fit *fit, nw_material *m,
                          nw_diagnostics *diagnostics)
{
    const nw_fit_parameter *p = fit->parameter;
    for (int i = 0; i < NW_FIT_PARAMETERS; i++) {
        if (isnan(p[i].value) || isnan(fit->youngs_modulus_mpa)) {
            return nw_fault(diagnostics, NW_INPUT, NULL, NULL,
                            "a material needs %s, which these tests do not give",
                            isnan(p[i].value) ? nw_fit_parameter_key((nw_fit_parameter_index)i)
                                              : "Young's modulus (--modulus)");
        }
    }
    bool compatible = strcmp(p[NW_FIT_CYCLIC_COEFFICIENT].from, "compatibility") == 0;
    nw_origin cyclic = compatible ? NW_COMPATIBILITY : NW_GIVEN;
    *m = (nw_material){.group = NW_GROUP_UNSTATED,
                       .basis = NW_TESTED,
                       .youngs_modulus_mpa = fit->youngs_modulus_mpa,
                       .poisson_ratio = NAN,
                       .yield_strength_mpa = NAN,
                       .ultimate_strength_mpa = NAN,
                       .reduction_of_area = NAN,
                       .hardness_hb = NAN,
                       .fracture_stress_mpa = NAN,
                       .fracture_strain = NAN,
                       .strength_coefficient_mpa = p[NW_FIT_CYCLIC_COEFFICIENT].value,
                       .hardening_exponent = p[NW_FIT_CYCLIC_EXPONENT].value,
                       .strength_coefficient_origin = cyclic,
                       .hardening_exponent_origin = cyclic,
                       .fatigue_strength_coefficient_mpa = p[0].value,
                       .fatigue_strength_exponent = p[1].value,
                       .fatigue_ductility_coefficient = p[2].value,
                       .fatigue_ductility_exponent = p[3].value,
                       .strain_life_origin = NW_GIVEN,
                       .endurance_strain_amplitude = NAN,
                       .endurance_cycles = NAN,
                       .log10_life_sd = fit->log10_life_sd_corrected,
                       .scatter_tests = (double)fit->failures,
                       .valid_cycles = {fit->life_min, fit->life_max},
                       .valid_strain_amplitude = {fit->strain_min, fit->strain_max}};
    snprintf(m->source, sizeof m->source,
             "fitted to %.200s: %zu tests at %zu levels, %zu run-outs; by %s",
             base_name(coupons->file), fit->tests, fit->levels, fit->runouts,
             nw_fit_method_name(fit->method));
    if (fit->dropped_count > 0) {
        size_t used = strlen(m->source);
        snprintf(m->source + used, sizeof m->source - used, "; %zu tests dropped",
                 fit->dropped_count);
    }
    note_limits(fit, m);
    return NW_OK;
}
