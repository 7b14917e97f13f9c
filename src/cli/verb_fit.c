/* notchwright fit: strain-life parameters from coupon tests. */
#include "base/file.h"
#include "base/text.h"
#include "cli/verb.h"

#include <math.h>
#include <string.h>

static const nw_option options[] = {
    {"--modulus", "STRESS",
     "Young's modulus, \"206 GPa\"; needed unless plastic strain was measured"},
    {"--method", "lines|likelihood",
     "where the parameters come from (default: likelihood with run-outs)"},
    {"--distribution", "log_normal|weibull", "of life, for the likelihood (default log_normal)"},
    {"--scatter", "constant|growing", "scatter of log life, for the likelihood (default constant)"},
    {"--limits", "SHARE", "confidence of two-sided limits (default \"95 %\")"},
    {"--percentiles", "SHARE,...",
     "shares failed of percentile curves (default \"10 %,50 %,90 %\")"},
    {"--survival", "SHARE,...", "shares surviving of tolerance curves (default \"90 %,99 %\")"},
    {"--confidence", "SHARE,...", "confidences of tolerance curves (default \"95 %\")"},
    {"--least-plastic-strain", "STRAIN", "leave smaller plastic strains out (default \"0.01 %\")"},
    {"--level-width", "SHARE",
     "relative width of a level (default \"2 %\"; plastic strain alone 15 %)"},
    {"--cyclic-limit", "SHARE",
     "disagreement of the cyclic curves that is cautioned (default \"5 %\")"},
    {"--drop", "ID", "leave a test out; repeatable"},
    {"--profile", NULL, "profile-likelihood limits too"},
    {"--plan", "CYCLES", "which further tests would most narrow the 50 % curve at this life"},
    {"--plan-tests", "COUNT", "how many tests to plan (default 10)"},
    {"--decimal", "SIGN", "decimal sign of the table: . or ,"},
    {"--save", "FILE.yaml", "write a material file with scatter, tested range and covariance"},
    {"--name", "NAME", "name of the saved material (default: from the file's name)"},
    {"--group", "GROUP", "alloy group of the saved material (default other)"},
    {"--source", "TEXT", "source of the saved material (default: the table and the method)"},
    {NULL, NULL, NULL},
};

/* ---- options ---- */

/* "10 %,50 %" into values in (0, 1). */
static nw_status read_shares(const nw_arguments *arguments, const char *name, double *values,
                             size_t *count, nw_diagnostics *diagnostics)
{
    const char *text = nw_argument(arguments, name);
    if (text == NULL) {
        return NW_OK;
    }
    *count = 0;
    while (text != NULL) {
        size_t length = strcspn(text, ",");
        char item[60], why[300] = "";
        double value = NAN;
        snprintf(item, sizeof item, "%.*s", length < 59 ? (int)length : 59, text);
        if (*count == NW_FIT_LEVELS_MOST) {
            return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s: found more than %d values",
                            name, NW_FIT_LEVELS_MOST);
        }
        if (nw_quantity_read(item, NW_FRACTION, NULL, &value, why, sizeof why) != NW_OK) {
            return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s: %s", name, why);
        }
        if (!(value > 0.0 && value < 1.0)) {
            return nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                            "%s: found '%s', expected a share between 0 and 100 %% (write 90 %% or "
                            "0.9)",
                            name, item);
        }
        values[(*count)++] = value;
        text = text[length] == '\0' ? NULL : text + length + 1;
    }
    return NW_OK;
}

static nw_status read_share(const nw_arguments *arguments, const char *name, double *value,
                            nw_diagnostics *diagnostics)
{
    double values[NW_FIT_LEVELS_MOST];
    size_t count = 0;
    nw_status status = read_shares(arguments, name, values, &count, diagnostics);
    if (status == NW_OK && count > 1) {
        return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s: found %zu values, expected one",
                        name, count);
    }
    *value = count == 1 ? values[0] : *value;
    return status;
}

static nw_status read_word(const nw_arguments *arguments, const char *name,
                           const char *const *words, int *index, nw_diagnostics *diagnostics)
{
    const char *word = nw_argument(arguments, name);
    if (word == NULL) {
        return NW_OK;
    }
    for (int i = 0; words[i] != NULL; i++) {
        if (strcmp(words[i], word) == 0) {
            *index = i;
            return NW_OK;
        }
    }
    char list[200];
    return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s: found '%.60s', expected %s", name, word,
                    nw_text_join(list, sizeof list, words));
}

static nw_status read_words(const nw_arguments *arguments, nw_fit_options *o,
                            nw_diagnostics *diagnostics)
{
    static const char *const methods[] = {"lines", "likelihood", NULL};
    static const char *const distributions[] = {"log_normal", "weibull", NULL};
    static const char *const scatters[] = {"constant", "growing", NULL};
    int method = -1, distribution = NW_LOG_NORMAL, scatter = NW_SCATTER_CONSTANT;
    nw_status faults[] = {
        read_word(arguments, "--method", methods, &method, diagnostics),
        read_word(arguments, "--distribution", distributions, &distribution, diagnostics),
        read_word(arguments, "--scatter", scatters, &scatter, diagnostics)};
    o->method = method < 0 ? NW_FIT_BY_TESTS : method == 0 ? NW_FIT_LINES : NW_FIT_LIKELIHOOD;
    o->distribution = (nw_distribution)distribution;
    o->scatter = (nw_scatter_model)scatter;
    for (int i = 0; i < 3; i++) {
        if (faults[i] != NW_OK) {
            return faults[i];
        }
    }
    return NW_OK;
}

static nw_status read_number(const nw_arguments *arguments, const char *name, double low,
                             double high, bool whole, double *value, nw_diagnostics *diagnostics)
{
    const char *text = nw_argument(arguments, name);
    if (text == NULL) {
        return NW_OK;
    }
    double number;
    if (!nw_number_read(text, &number) || number < low || number > high ||
        (whole && number != floor(number))) {
        return nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                        "%s: found '%.40s', expected a %snumber from %g to %g", name, text,
                        whole ? "whole " : "", low, high);
    }
    *value = number;
    return NW_OK;
}

static nw_status read_quantity(const nw_arguments *arguments, const char *name,
                               nw_dimension dimension, double low, double high, double *value,
                               nw_diagnostics *diagnostics)
{
    if (nw_argument(arguments, name) == NULL) {
        return NW_OK;
    }
    nw_status status = nw_argument_quantity(arguments, name, dimension, value, diagnostics);
    if (status == NW_OK && !(*value >= low && *value <= high)) {
        return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s: found %s, expected %g to %g%s",
                        name, nw_argument(arguments, name), low, high,
                        dimension == NW_STRESS ? " MPa" : "");
    }
    return status;
}

/* All options are read, so that all faults come in one run. */
static nw_status read_options(const nw_arguments *arguments, nw_fit_options *o, char *decimal,
                              nw_diagnostics *diagnostics)
{
    static const char *const signs[] = {".", ",", NULL};
    int sign = 0;
    double plan_tests = (double)o->plan_tests;
    nw_status faults[] = {
        read_words(arguments, o, diagnostics),
        read_quantity(arguments, "--modulus", NW_STRESS, 1e3, 1e6, &o->youngs_modulus_mpa,
                      diagnostics),
        read_quantity(arguments, "--least-plastic-strain", NW_STRAIN, 0.0, 0.01,
                      &o->least_plastic_strain, diagnostics),
        read_share(arguments, "--limits", &o->limits, diagnostics),
        read_share(arguments, "--level-width", &o->level_width, diagnostics),
        read_share(arguments, "--cyclic-limit", &o->cyclic_disagreement_limit, diagnostics),
        read_shares(arguments, "--percentiles", o->percentile, &o->percentile_count, diagnostics),
        read_shares(arguments, "--survival", o->survival, &o->survival_count, diagnostics),
        read_shares(arguments, "--confidence", o->confidence, &o->confidence_count, diagnostics),
        read_number(arguments, "--plan", 0.5, 1e12, false, &o->plan_cycles, diagnostics),
        read_number(arguments, "--plan-tests", 1.0, NW_FIT_PLAN_MOST, true, &plan_tests,
                    diagnostics),
        read_word(arguments, "--decimal", signs, &sign, diagnostics)};
    o->plan_tests = (size_t)plan_tests;
    o->profile = nw_argument(arguments, "--profile") != NULL;
    *decimal = *signs[sign];
    for (size_t i = 0; i < sizeof faults / sizeof faults[0]; i++) {
        if (faults[i] != NW_OK) {
            return faults[i];
        }
    }
    return NW_OK;
}

/* ---- the material file ---- */

/* "folder/c45-tested.yaml" gives "c45-tested". */
static void name_of_file(const char *path, char *name, size_t capacity)
{
    const char *slash = strrchr(path, '/');
    nw_text_copy(name, capacity, slash == NULL ? path : slash + 1);
    char *dot = strrchr(name, '.');
    if (dot != NULL && dot != name) {
        *dot = '\0';
    }
}

static nw_status read_group(const nw_arguments *arguments, nw_group *group,
                            nw_diagnostics *diagnostics)
{
    const char *words[NW_GROUP_UNSTATED + 1] = {NULL};
    for (int i = 0; i < NW_GROUP_UNSTATED; i++) {
        words[i] = nw_group_name((nw_group)i);
    }
    int index = NW_OTHER_GROUP;
    nw_status status = read_word(arguments, "--group", words, &index, diagnostics);
    *group = (nw_group)index;
    return status;
}

static nw_status take_text(const nw_arguments *arguments, const char *name, char *text,
                           size_t capacity, nw_diagnostics *diagnostics)
{
    const char *given = nw_argument(arguments, name);
    if (given == NULL) {
        return NW_OK;
    }
    if (given[0] == '\0' || strlen(given) >= capacity) {
        return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s: found %zu bytes, expected 1 to %zu",
                        name, strlen(given), capacity - 1);
    }
    nw_text_copy(text, capacity, given);
    return NW_OK;
}

/* A file that the program itself would refuse is not written. */
static nw_status check_usable(const nw_material *m, nw_diagnostics *diagnostics)
{
    double b = m->fatigue_strength_exponent, c = m->fatigue_ductility_exponent;
    bool life = b < 0.0 && c < b && m->fatigue_strength_coefficient_mpa > 0.0 &&
                m->fatigue_ductility_coefficient > 0.0;
    bool cyclic = isnan(m->hardening_exponent) ||
                  (m->hardening_exponent >= 0.005 && m->hardening_exponent <= 0.6);
    if (life && cyclic) {
        return NW_OK;
    }
    return nw_fault(diagnostics, NW_COMPUTE, NULL, NULL,
                    "--save: the fitted curve cannot be used (b %.4g, c %.4g, n' %.4g): expected "
                    "c < b < 0 and n' from 0.005 to 0.6",
                    b, c, m->hardening_exponent);
}

static nw_status save(const nw_arguments *arguments, const nw_coupons *coupons, const nw_fit *fit,
                      nw_diagnostics *diagnostics)
{
    const char *path = nw_argument(arguments, "--save");
    nw_material material;
    nw_whole_file file;
    nw_status status = nw_fit_material(coupons, fit, &material, diagnostics);
    if (status == NW_OK) {
        status = check_usable(&material, diagnostics);
    }
    if (status == NW_OK) {
        name_of_file(path, material.name, sizeof material.name);
        status = take_text(arguments, "--name", material.name, sizeof material.name, diagnostics);
    }
    if (status == NW_OK) {
        status =
            take_text(arguments, "--source", material.source, sizeof material.source, diagnostics);
    }
    if (status == NW_OK) {
        status = read_group(arguments, &material.group, diagnostics);
    }
    if (status == NW_OK) {
        status = nw_whole_file_open(&file, path, diagnostics);
    }
    if (status != NW_OK) {
        return status;
    }
    nw_fit_write_material(file.stream, fit, &material); /* errors are seen by the commit */
    return nw_whole_file_commit(&file, diagnostics);
}

/* ---- the verb ---- */

typedef struct written {
    const nw_coupons *coupons;
    const nw_fit *fit;
} written;

static nw_status write_result(FILE *to, nw_format format, bool colour, const void *data)
{
    const written *w = data;
    (void)colour;
    switch (format) {
    case NW_FORMAT_JSON:
        return nw_write_fit_json(to, w->coupons, w->fit);
    case NW_FORMAT_CSV:
        return nw_write_fit_csv(to, w->fit);
    default:
        return nw_write_fit_text(to, w->coupons, w->fit);
    }
}

static nw_status fit_and_write(const nw_arguments *arguments, const nw_coupons *coupons,
                               nw_fit_options *o, nw_diagnostics *diagnostics)
{
    const char *drop[NW_MOST_GIVEN];
    nw_fit *fit = NULL;
    o->drop_count = nw_argument_all(arguments, "--drop", drop, NW_MOST_GIVEN);
    o->drop = drop;
    nw_status status = nw_fit_coupons(coupons, o, &fit, diagnostics);
    if (status == NW_OK && nw_argument(arguments, "--save") != NULL) {
        status = save(arguments, coupons, fit, diagnostics);
    }
    written w = {coupons, fit};
    if (status == NW_OK) {
        status = nw_cli_write(arguments, write_result, &w, diagnostics);
    }
    nw_fit_free(fit);
    return status;
}

static nw_status run(const nw_arguments *arguments, nw_diagnostics *diagnostics)
{
    nw_fit_options o = nw_fit_options_default();
    char decimal;
    nw_status status = read_options(arguments, &o, &decimal, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    const char *others[] = {arguments->operands[0], nw_argument(arguments, "--save")};
    status = nw_cli_refuse_overwriting(arguments, "--output", others, 2, diagnostics);
    if (status == NW_OK) {
        status = nw_cli_refuse_overwriting(arguments, "--save", others, 1, diagnostics);
    }
    if (status != NW_OK) {
        return status;
    }
    nw_coupon_options how = {o.youngs_modulus_mpa, decimal};
    nw_coupons coupons;
    status = nw_coupons_read(arguments->operands[0], &how, &coupons, diagnostics);
    if (status == NW_OK) {
        status = fit_and_write(arguments, &coupons, &o, diagnostics);
    }
    nw_coupons_clear(&coupons);
    return status;
}

const nw_verb nw_verb_fit = {
    .name = "fit",
    .operands = "TESTS.csv",
    .operand_least = 1,
    .operand_most = 1,
    .summary = "strain-life parameters from coupon tests",
    .about =
        "Strain-life parameters from coupon tests: lines by regression of life on amplitude, and\n"
        "the whole curve by maximum likelihood with run-outs; limits, percentile and tolerance\n"
        "curves, outliers, and what further tests would help. Columns of the table:\n"
        "strain_amplitude, stress_amplitude[MPa], cycles or reversals, and if there are any\n"
        "plastic_strain_amplitude, runout (0 or 1) and id. Units stand in brackets in the header;\n"
        "a strain without one is a ratio. With --format csv the curves, one point a row.",
    .options = options,
    .example = "notchwright fit examples/coupons/tests.csv --modulus \"206 GPa\" --plan 100000",
    .run = run,
};
