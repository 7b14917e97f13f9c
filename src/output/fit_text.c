/* The fit of coupon tests for a person to read. */
#include "base/text.h"
#include "notchwright/notchwright.h"
#include "output/page.h"

#include <math.h>
#include <string.h>

enum { LINE = 400, NUMBER = 40, SHOWN = 10 };

static void cautions_about(FILE *to, const nw_fit *fit, const char *about)
{
    size_t length = strlen(about);
    for (size_t i = 0; i < fit->cautions.count; i++) {
        const nw_caution *c = &fit->cautions.items[i];
        if (strncmp(c->about, about, length) == 0 &&
            (c->about[length] == '\0' || c->about[length] == '.')) {
            nw_page_paragraph(to, "    ! ", c->text);
        }
    }
}

static const char *rounded(double value, int digits, char text[NUMBER])
{
    if (isnan(value)) {
        return "-";
    }
    return isinf(value) ? (value > 0.0 ? "open" : "-open")
                        : nw_page_rounded(value, digits, text, NUMBER);
}

static void write_tests(FILE *to, const nw_coupons *coupons, const nw_fit *fit)
{
    char line[LINE];
    fprintf(to, "Tests    %s\n", coupons->file[0] == '\0' ? "" : coupons->file);
    snprintf(
        line, sizeof line,
        "%zu tests (%zu failed, %zu run-outs) at %zu levels (within %.3g %%), at least %zu each; "
        "replication %.0f %%: enough for %s",
        fit->tests, fit->failures, fit->runouts, fit->levels, 100.0 * fit->options.level_width,
        fit->least_replicates, fit->replication_percent, fit->verdict);
    nw_page_paragraph(to, "         ", line);
    nw_text_builder out = nw_text_builder_on(line, sizeof line);
    if (fit->plastic_measured > 0) {
        nw_text_add(&out, "plastic strain measured in %zu tests", fit->plastic_measured);
    }
    if (fit->plastic_computed > 0) {
        nw_text_add(&out, "%splastic strain as total minus stress/E in %zu tests",
                    out.length == 0 ? "" : "; ", fit->plastic_computed);
    }
    if (!isnan(fit->youngs_modulus_mpa)) {
        nw_text_add(&out, "%sE %.6g MPa", out.length == 0 ? "" : "; ", fit->youngs_modulus_mpa);
    }
    if (out.length > 0) {
        nw_page_paragraph(to, "         ", line);
    }
    for (size_t i = 0; i < fit->dropped_count && i < SHOWN; i++) {
        fprintf(to, "         dropped on request: %s\n", coupons->tests[fit->dropped[i]].id);
    }
    cautions_about(to, fit, "tests");
    cautions_about(to, fit, "youngs_modulus_mpa");
}

static void write_parameter(FILE *to, const nw_fit *fit, nw_fit_parameter_index index,
                            const char *name, int digits)
{
    const nw_fit_parameter *p = &fit->parameter[index];
    char value[NUMBER], error[NUMBER], low[NUMBER], high[NUMBER];
    if (isnan(p->value)) {
        fprintf(to, "  %-9s %10s\n", name, "-");
        return;
    }
    fprintf(to, "  %-9s %10s %11s %11s %11s   %s\n", name, rounded(p->value, digits, value),
            rounded(p->standard_error, 2, error), rounded(p->low, digits, low),
            rounded(p->high, digits, high), p->from);
    if (fit->options.profile && index < NW_FIT_CYCLIC_COEFFICIENT) {
        fprintf(to, "  %-9s %10s %11s %11s %11s   profile\n", "", "", "",
                rounded(p->profile_low, digits, low), rounded(p->profile_high, digits, high));
    }
}

static void write_parameters(FILE *to, const nw_fit *fit)
{
    fprintf(to, "\nParameters by %s, limits at %.4g %%\n", nw_fit_method_name(fit->method),
            100.0 * fit->options.limits);
    fputs("                 value  std. error         low        high   from\n", to);
    write_parameter(to, fit, NW_FIT_STRENGTH_COEFFICIENT, "sf' MPa", 4);
    write_parameter(to, fit, NW_FIT_STRENGTH_EXPONENT, "b", 4);
    write_parameter(to, fit, NW_FIT_DUCTILITY_COEFFICIENT, "ef'", 4);
    write_parameter(to, fit, NW_FIT_DUCTILITY_EXPONENT, "c", 4);
    write_parameter(to, fit, NW_FIT_CYCLIC_COEFFICIENT, "K' MPa", 4);
    write_parameter(to, fit, NW_FIT_CYCLIC_EXPONENT, "n'", 4);
    cautions_about(to, fit, "parameters");
    if (!isnan(fit->cyclic_disagreement)) {
        fprintf(
            to,
            "  compatible  K' %.4g MPa, n' %.4g; stress differs by up to %.1f %% from the direct "
            "curve\n",
            fit->compatible_coefficient_mpa, fit->compatible_exponent,
            100.0 * fit->cyclic_disagreement);
        cautions_about(to, fit, "cyclic");
    }
    char sd[NUMBER], low[NUMBER], high[NUMBER];
    fprintf(to, "\nScatter  log10 life: standard deviation %s (%s to %s)\n",
            rounded(fit->log10_life_sd, 3, sd), rounded(fit->log10_life_sd_low, 3, low),
            rounded(fit->log10_life_sd_high, 3, high));
    if (fit->log10_life_sd_corrected != fit->log10_life_sd && !isnan(fit->log10_life_sd)) {
        fprintf(to, "         %s when corrected for the number of parameters\n",
                rounded(fit->log10_life_sd_corrected, 3, sd));
    }
    cautions_about(to, fit, "scatter");
}

static void write_line(FILE *to, const nw_coupons *coupons, const nw_fit_line *source,
                       const char *name, const char *x, const char *y)
{
    const nw_line *line = &source->line;
    if (!source->available) {
        fprintf(to, "  %-8s not fitted: %s\n", name, source->why);
    } else {
        char f[NUMBER], critical[NUMBER];
        fprintf(to, "  %-8s log10 %s = %.5f (%.4f to %.4f) %+.5f (%.4f to %.4f) log10 %s\n", name,
                y, line->a, line->a_low, line->a_high, line->b, line->b_low, line->b_high, x);
        fprintf(to, "           s %.4f, %zu points, %zu levels, replication %.1f %%", line->sd,
                line->points, line->levels, line->replication_percent);
        if (isnan(line->f_linearity)) {
            fputs("; no test of linearity (needs replicates)\n", to);
        } else {
            fprintf(to, "; linearity F %s against %s: %s\n", rounded(line->f_linearity, 3, f),
                    rounded(line->f_critical, 3, critical),
                    line->f_linearity <= line->f_critical ? "straight" : "NOT straight");
        }
    }
    for (size_t i = 0; i < source->left_out_count && i < SHOWN; i++) {
        fprintf(to, "           left out: %s (%s)\n", coupons->tests[source->left_out[i].test].id,
                source->left_out[i].reason);
    }
    if (source->left_out_count > SHOWN) {
        fprintf(to, "           and %zu more\n", source->left_out_count - SHOWN);
    }
}

static void write_lines(FILE *to, const nw_coupons *coupons, const nw_fit *fit)
{
    fputs("\nLines    ep, sa: amplitudes of plastic strain and stress; N cycles\n", to);
    write_line(to, coupons, &fit->plastic, "plastic", "ep", "N");
    cautions_about(to, fit, "lines.plastic");
    write_line(to, coupons, &fit->elastic, "elastic", "sa", "N");
    cautions_about(to, fit, "lines.elastic");
    write_line(to, coupons, &fit->cyclic, "cyclic", "ep", "sa");
    cautions_about(to, fit, "lines.cyclic");
    for (size_t i = 0; i < fit->cautions.count; i++) {
        if (strcmp(fit->cautions.items[i].about, "lines") == 0) {
            nw_page_paragraph(to, "    ! ", fit->cautions.items[i].text);
        }
    }
}

static void write_likelihood(FILE *to, const nw_fit *fit)
{
    fputs("\nLikelihood of the whole curve, run-outs as lives survived\n", to);
    if (fit->likelihood.available) {
        fputs("  life        scatter      log-likelihood        AIC   sd log10\n", to);
        for (int i = 0; i < 4; i++) {
            const nw_likelihood *l = &fit->candidates[i];
            bool chosen = l->distribution == fit->likelihood.distribution &&
                          l->scatter == fit->likelihood.scatter;
            if (l->available) {
                fprintf(to, "  %-11s %-11s %15.4f %10.3f %10.4f%s\n",
                        nw_distribution_name(l->distribution), nw_scatter_model_name(l->scatter),
                        l->log_likelihood, l->aic, l->log10_life_sd, chosen ? "  in use" : "");
            } else {
                fprintf(to, "  %-11s %-11s none: %s\n", nw_distribution_name(l->distribution),
                        nw_scatter_model_name(l->scatter), l->why);
            }
        }
    }
    cautions_about(to, fit, "likelihood");
}

static void write_outliers(FILE *to, const nw_coupons *coupons, const nw_fit *fit)
{
    if (fit->outlier_count == 0) {
        fputs("\nOutliers none by studentised residuals (5 % over all tests)\n", to);
        return;
    }
    fputs("\nOutliers\n", to);
    for (size_t i = 0; i < fit->outlier_count && i < SHOWN; i++) {
        const nw_fit_outlier *o = &fit->outliers[i];
        fprintf(
            to,
            "  %s (line %zu): life %.3g times the %s's; studentised residual %.2f, critical %.2f\n",
            coupons->tests[o->test].id, coupons->tests[o->test].line, pow(10.0, o->residual),
            o->about, o->studentised, o->critical);
    }
    cautions_about(to, fit, "outliers");
}

static void curve_heading(const nw_fit_curve *curve, double limits, char text[LINE])
{
    if (curve->tolerance) {
        snprintf(text, LINE, "survived by %.4g %% with %.4g %% confidence", 100.0 * curve->survival,
                 100.0 * curve->confidence);
    } else {
        snprintf(text, LINE, "%.4g %% failed, limits at %.4g %%", 100.0 * (1.0 - curve->survival),
                 100.0 * limits);
    }
}

/* Five points of each curve; all of them are in the CSV. */
static void write_curves(FILE *to, const nw_fit *fit)
{
    if (fit->curve_count == 0) {
        return;
    }
    fputs("\nCurves   cycles at a strain amplitude of\n        ", to);
    for (int i = 0; i < NW_FIT_GRID; i += (NW_FIT_GRID - 1) / 4) {
        fprintf(to, " %13.4f %%", 100.0 * fit->curves[0].points[i].strain_amplitude);
    }
    fputc('\n', to);
    for (size_t k = 0; k < fit->curve_count; k++) {
        const nw_fit_curve *curve = &fit->curves[k];
        char heading[LINE];
        curve_heading(curve, fit->options.limits, heading);
        fprintf(to, "  %s\n        ", heading);
        for (int i = 0; i < NW_FIT_GRID; i += (NW_FIT_GRID - 1) / 4) {
            char life[NUMBER];
            fprintf(to, " %15s", rounded(curve->points[i].cycles, 3, life));
        }
        fputs(curve->tolerance ? "\n" : "\n        ", to);
        for (int i = 0; i < NW_FIT_GRID && !curve->tolerance; i += (NW_FIT_GRID - 1) / 4) {
            char low[NUMBER], high[NUMBER], both[2 * NUMBER + 2];
            snprintf(both, sizeof both, "%s-%s", rounded(curve->points[i].low, 2, low),
                     rounded(curve->points[i].high, 2, high));
            fprintf(to, " %15s", both);
        }
        fputs(curve->tolerance ? "" : "\n", to);
    }
}

static void write_plan(FILE *to, const nw_fit *fit)
{
    const nw_fit_plan *plan = &fit->plan;
    if (isnan(fit->options.plan_cycles)) {
        return;
    }
    fprintf(to, "\nPlan     to narrow the 50 %% curve at %.4g cycles\n", plan->cycles);
    if (!plan->available) {
        fprintf(to, "         none: %s\n", plan->why);
        return;
    }
    fprintf(to,
            "         strain amplitude there %.4f %%; the life is now known to within a factor of "
            "%.3g (%.4g %%)\n",
            100.0 * plan->strain_amplitude, plan->factor_now, 100.0 * fit->options.limits);
    for (size_t i = 0; i < plan->row_count; i++) {
        fprintf(to, "         %3zu test%s at %.4f %%, about %.3g cycles each\n",
                plan->rows[i].tests, plan->rows[i].tests == 1 ? " " : "s",
                100.0 * plan->rows[i].strain_amplitude, plan->rows[i].cycles);
    }
    fputs("         factor after each further test:", to);
    for (size_t i = 1; i <= plan->tests; i++) {
        fprintf(to, "%s %.3g", i % 12 == 0 ? "\n        " : "", plan->factor_after[i]);
    }
    fputc('\n', to);
    cautions_about(to, fit, "plan");
}

nw_status nw_write_fit_text(FILE *to, const nw_coupons *coupons, const nw_fit *fit)
{
    write_tests(to, coupons, fit);
    write_parameters(to, fit);
    write_lines(to, coupons, fit);
    write_likelihood(to, fit);
    write_outliers(to, coupons, fit);
    write_curves(to, fit);
    write_plan(to, fit);
    fputs("\nMethods\n", to);
    nw_page_paragraph(to, "  lines: ",
                      "least squares of log life on log amplitude, limits, band and test of "
                      "linearity as in ASTM E739-10; coefficients by Fieller's theorem");
    nw_page_paragraph(to, "  likelihood: ",
                      "log life about the strain-life curve, run-outs censored (Meeker & Escobar, "
                      "Statistical Methods for Reliability Data, 1998, ch. 17)");
    nw_page_paragraph(to, "  tolerance: ",
                      "noncentral t (Owen, Technometrics 10 (1968) 445); with the likelihood an "
                      "approximation");
    return ferror(to) ? NW_FILE : NW_OK;
}
