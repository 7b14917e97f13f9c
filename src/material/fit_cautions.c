/* What a reader of the fit must know. Ranges called usual are common practice without a source. */
#include "material/fit_parts.h"

#include <math.h>
#include <string.h>

enum { CUSTOMARY_LEVELS = 5, CUSTOMARY_REPLICATES = 3 };

/* Tests that a line leaves out because their plastic strain is too small; others have other reasons. */
static size_t left_out_as_small(const nw_fit_line *line)
{
    size_t count = 0;
    for (size_t i = 0; i < line->left_out_count; i++) {
        count += strstr(line->left_out[i].reason, "below the least") != NULL;
    }
    return count;
}

static void about_programme(const nw_fit *fit, nw_cautions *out)
{
    if (fit->levels < CUSTOMARY_LEVELS) {
        nw_caution_add(out, "few_levels", "tests",
                       "%zu level%s of amplitude; the customary least is %d.", fit->levels,
                       fit->levels == 1 ? "" : "s", CUSTOMARY_LEVELS);
    }
    if (fit->least_replicates < CUSTOMARY_REPLICATES) {
        nw_caution_add(out, "few_replicates", "tests",
                       "The level with the fewest specimens has %zu; the customary least is %d at "
                       "each.",
                       fit->least_replicates, CUSTOMARY_REPLICATES);
    }
    if (strcmp(fit->verdict, "less than preliminary work") == 0) {
        nw_caution_add(out, "small_sample", "tests",
                       "%zu tests with %.0f %% replication are less than is customary even for "
                       "preliminary work (6 tests, 17 %%).",
                       fit->tests, fit->replication_percent);
    }
    if (fit->dropped_count > 0) {
        nw_caution_add(out, "tests_dropped", "tests",
                       "%zu test%s left out on request; the fit and its limits do not know of "
                       "them.",
                       fit->dropped_count, fit->dropped_count == 1 ? " was" : "s were");
    }
    if (fit->modulus_from_tests) {
        nw_caution_add(out, "modulus_from_tests", "youngs_modulus_mpa",
                       "Young's modulus was not given: %.4g MPa is the median of stress over total "
                       "minus plastic strain.",
                       fit->youngs_modulus_mpa);
    }
}

static void about_lines(const nw_fit *fit, nw_cautions *out)
{
    const struct {
        const nw_fit_line *line;
        const char *about, *name;
    } lines[] = {{&fit->plastic, "lines.plastic", "plastic"},
                 {&fit->elastic, "lines.elastic", "elastic"},
                 {&fit->cyclic, "lines.cyclic", "cyclic"}};
    size_t small = left_out_as_small(&fit->plastic);
    if (small > 0) {
        nw_caution_add(out, "plastic_strains_left_out", "lines.plastic",
                       "%zu test%s left out of the plastic line: plastic strain amplitude below "
                       "%.3g, too small to be measured well (change it with "
                       "--least-plastic-strain).",
                       small, small == 1 ? " is" : "s are", fit->options.least_plastic_strain);
    }
    if (fit->runouts > 0 && fit->method == NW_FIT_LINES) {
        nw_caution_add(out, "runouts_left_out", "lines",
                       "%zu run-out%s not used by the lines, which so give too short a life where "
                       "run-outs are; --method likelihood uses them.",
                       fit->runouts, fit->runouts == 1 ? " is" : "s are");
    }
    for (int i = 0; i < 3; i++) {
        const nw_line *line = &lines[i].line->line;
        if (!lines[i].line->available) {
            nw_caution_add(out, "line_not_fitted", lines[i].about,
                           "The %s line cannot be fitted: %s.", lines[i].name, lines[i].line->why);
        } else if (line->f_linearity > line->f_critical) {
            nw_caution_add(out, "not_linear", lines[i].about,
                           "The %s line is not straight: F = %.3g is above the 95 %% point %.3g of "
                           "F(%.0f, %.0f).",
                           lines[i].name, line->f_linearity, line->f_critical, line->f_degrees[0],
                           line->f_degrees[1]);
        }
    }
}

static void about_likelihood(const nw_fit *fit, nw_cautions *out)
{
    const nw_likelihood *l = &fit->likelihood;
    if (!l->available) {
        nw_caution_add(out, "likelihood_not_fitted", "likelihood",
                       "No fit of the whole curve by likelihood: %s.", l->why);
        return;
    }
    const nw_likelihood *best = l;
    for (int i = 0; i < 4; i++) {
        if (fit->candidates[i].available && fit->candidates[i].aic < best->aic) {
            best = &fit->candidates[i];
        }
    }
    if (l->aic - best->aic > 2.0) {
        nw_caution_add(out, "other_model_fits_better", "likelihood",
                       "%s life with %s scatter has an AIC lower by %.1f than the model in use.",
                       best->distribution == NW_WEIBULL ? "Weibull" : "Log-normal",
                       nw_scatter_model_name(best->scatter), l->aic - best->aic);
    }
    if (fit->method == NW_FIT_LIKELIHOOD && fit->degrees < 5.0) {
        nw_caution_add(out, "few_failures", "parameters",
                       "%zu failures for %zu parameters: their limits are rough.", l->failures,
                       l->parameters);
    }
}

static void usual(const nw_fit *fit, nw_fit_parameter_index index, const char *symbol, double low,
                  double high, nw_cautions *out)
{
    double value = fit->parameter[index].value;
    char about[48];
    if (value < low || value > high) {
        snprintf(about, sizeof about, "parameters.%s", nw_fit_parameter_key(index));
        nw_caution_add(out, "outside_usual_range", about,
                       "%s = %.4g is outside the usual range of metals (%g to %g); check units, "
                       "modulus and columns.",
                       symbol, value, low, high);
    }
}

static void about_parameters(const nw_fit *fit, nw_cautions *out)
{
    usual(fit, NW_FIT_STRENGTH_EXPONENT, "b", -0.2, -0.03, out);
    usual(fit, NW_FIT_DUCTILITY_EXPONENT, "c", -1.0, -0.35, out);
    usual(fit, NW_FIT_CYCLIC_EXPONENT, "n'", 0.03, 0.4, out);
    usual(fit, NW_FIT_STRENGTH_COEFFICIENT, "sf'", 50.0, 6000.0, out);
    if (fit->cyclic_disagreement > fit->options.cyclic_disagreement_limit) {
        nw_caution_add(out, "cyclic_curves_disagree", "cyclic",
                       "Stress on the cyclic curve fitted directly and on the one from "
                       "compatibility differ by up to %.1f %% in the tested range, more than "
                       "%.1f %%.",
                       100.0 * fit->cyclic_disagreement,
                       100.0 * fit->options.cyclic_disagreement_limit);
    }
    for (int i = 0; i < 4; i++) {
        const nw_fit_parameter *p = &fit->parameter[i];
        if (!isnan(p->value) && (isinf(p->low) || isinf(p->high))) {
            nw_caution_add(out, "limits_open", "parameters",
                           "The tests do not close the limits of every parameter at %.3g %% "
                           "confidence.",
                           100.0 * fit->options.limits);
        } else if (fit->method == NW_FIT_LIKELIHOOD && p->standard_error > 0.5 * fabs(p->value)) {
            nw_caution_add(
                out, "poorly_determined", "parameters",
                "The likelihood sees total strain only, and these tests separate its "
                "elastic and plastic part poorly: at least one parameter is uncertain by "
                "half its value. The curve within the tested range is better known "
                "than its parameters; compare the lines.");
        }
    }
    if (fit->log10_life_sd < 1e-6) {
        nw_caution_add(out, "no_scatter", "scatter",
                       "The lives lie on the curve to within rounding: real tests scatter.");
    }
}

/* A failed test that did not last one reversal: a life in thousands or millions of cycles, say. */
static void about_short_lives(const nw_fit_work *work, nw_cautions *out)
{
    size_t below = 0;
    for (size_t i = 0; i < work->count; i++) {
        below += work->tests[i].log10_life < log10(0.5);
    }
    if (below > 0) {
        nw_caution_add(out, "life_below_one_reversal", "tests",
                       "%zu test%s lasted less than one reversal (half a cycle): check the unit of "
                       "the lives.",
                       below, below == 1 ? "" : "s");
    }
}

/* Elastic strain too small a share of the total in every test: a strain in percent read as a ratio, say. */
static void about_units(const nw_fit_work *work, nw_cautions *out)
{
    double most = 0.0;
    if (!work->has_strain || !work->has_stress || isnan(work->fit->youngs_modulus_mpa)) {
        return;
    }
    for (size_t i = 0; i < work->count; i++) {
        double elastic = work->tests[i].stress_mpa / work->fit->youngs_modulus_mpa;
        most = fmax(most, elastic / work->tests[i].strain);
    }
    if (most < 0.03) {
        nw_caution_add(out, "units_suspect", "tests",
                       "Stress over modulus is at most %.2g %% of the strain in every test, which "
                       "is unusual: check the units of strain and stress.",
                       100.0 * most);
    }
}

void nw_fit_cautions(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    nw_cautions *out = &fit->cautions;
    for (size_t i = 0; i < work->coupons->cautions.count; i++) {
        const nw_caution *c = &work->coupons->cautions.items[i];
        nw_caution_add(out, c->code, c->about, "%s", c->text);
    }
    about_units(work, out);
    about_short_lives(work, out);
    about_programme(fit, out);
    about_lines(fit, out);
    about_likelihood(fit, out);
    about_parameters(fit, out);
    const nw_fit_plan *plan = &fit->plan;
    if (plan->available &&
        (plan->strain_amplitude < fit->strain_min || plan->strain_amplitude > fit->strain_max)) {
        nw_caution_add(out, "plan_outside_tests", "plan",
                       "The strain amplitude at %.4g cycles is outside the tested range (%.4g to "
                       "%.4g): the plan rests on an extrapolated curve.",
                       plan->cycles, fit->strain_min, fit->strain_max);
    }
    if (fit->outlier_count > 0) {
        nw_caution_add(out, "outliers", "outliers",
                       "%zu residual%s too large for the others (studentised, 5 %% over all "
                       "tests). Nothing was left out: find the reason in the laboratory first.",
                       fit->outlier_count, fit->outlier_count == 1 ? " is" : "s are");
    }
    nw_caution_add(out, "scope", "parameters",
                   "Parameters of smooth specimens as tested, for their amplitudes and lives. "
                   "Surface, size, environment and mean stress of a part are not in them, and "
                   "codes and the judgement of a qualified engineer come first.");
}
