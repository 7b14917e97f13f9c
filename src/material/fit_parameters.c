/* The parameters and the scatter of the method in use, each with its limits. */
#include "base/quantiles.h"
#include "base/small_matrix.h"
#include "material/fit_parts.h"
#include "material/location_scale.h"

#include <math.h>
#include <string.h>

static const char *const keys[NW_FIT_PARAMETERS] = {
    "fatigue_strength_coefficient_mpa", "fatigue_strength_exponent",
    "fatigue_ductility_coefficient",    "fatigue_ductility_exponent",
    "strength_coefficient_mpa",         "hardening_exponent"};

const char *nw_fit_parameter_key(nw_fit_parameter_index index)
{
    return index < NW_FIT_PARAMETERS ? keys[index] : "";
}

static const char *const by_t = "Student's t", *const by_fieller = "Student's t (Fieller)";
static const char *const by_delta = "Student's t on the linearised formula";
static const char *const by_information = "Student's t on the information matrix";

static double student(const nw_fit *fit, double degrees)
{
    return degrees > 0.0 ? nw_t_quantile(0.5 + 0.5 * fit->options.limits, degrees) : NAN;
}

/* Coefficient 10^x where the line reaches one reversal, log10 N = -log10 2; exponent 1/b. */
static void from_line(const nw_fit_line *source, nw_fit_parameter *coefficient,
                      nw_fit_parameter *exponent)
{
    if (!source->available) {
        return;
    }
    const nw_line *line = &source->line;
    double limits[2], y = -log10(2.0), b = line->b;
    double x = nw_line_inverse(line, y, limits), d = (y - line->a) / b;
    double variance = line->a_standard_error * line->a_standard_error +
                      d * d * line->b_standard_error * line->b_standard_error +
                      2.0 * d * line->a_b_covariance;
    coefficient->value = pow(10.0, x);
    coefficient->standard_error = coefficient->value * M_LN10 * sqrt(fmax(variance, 0.0)) / fabs(b);
    if (isnan(variance)) {
        coefficient->standard_error = NAN;
    }
    coefficient->low = pow(10.0, limits[0]);
    coefficient->high = pow(10.0, limits[1]);
    coefficient->from = exponent->from = "lines";
    coefficient->limits_by = by_fieller;
    exponent->value = 1.0 / b;
    exponent->standard_error = line->b_standard_error / (b * b);
    exponent->limits_by = by_t;
    bool closed = line->b_low * line->b_high > 0.0;
    exponent->low = closed ? 1.0 / line->b_high : -INFINITY;
    exponent->high = closed ? 1.0 / line->b_low : INFINITY;
    if (isnan(line->b_low)) {
        exponent->low = exponent->high = NAN;
    }
}

static void scatter_by_chi_square(nw_fit *fit)
{
    double tail = 0.5 - 0.5 * fit->options.limits, nu = fit->degrees;
    double sd = fit->log10_life_sd_corrected;
    fit->log10_life_sd_low = sd * sqrt(nu / nw_chi_square_quantile(1.0 - tail, nu));
    fit->log10_life_sd_high = sd * sqrt(nu / nw_chi_square_quantile(tail, nu));
}

/* Sum of the leverages of the failures: the degrees of freedom that the two lines take up. Where both say the
 * same of every test (compatible stress and plastic strain) that is two, not four. */
static double degrees_taken(const nw_fit_work *work, const double plain[4])
{
    nw_fit_sums unit = work->sums;
    double both = sqrt(unit.elastic_variance * unit.plastic_variance);
    unit.cross_covariance = both > 0.0 ? unit.cross_covariance / both : 1.0;
    unit.elastic_variance = unit.plastic_variance = 1.0;
    double covariance[16], sum = 0.0;
    const nw_fit *fit = work->fit;
    if (!nw_fit_lines_covariance(&unit, &fit->elastic.line, &fit->plastic.line, covariance)) {
        return 4.0;
    }
    for (size_t i = 0; i < work->count; i++) {
        nw_fit_root root;
        if (!work->tests[i].runout && nw_fit_root_at(plain, log(work->tests[i].strain), &root)) {
            sum += nw_small_form(covariance, 4, root.gradient) / (M_LN10 * M_LN10);
        }
    }
    return fmin(fmax(sum, 2.0), 4.0);
}

/* Scatter of the failures about the curve of the two lines. */
static void scatter_of_lines(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    double plain[4], squares = 0.0, count = 0.0;
    nw_fit_root root;
    memcpy(plain, fit->theta, sizeof plain);
    plain[0] -= log(fit->youngs_modulus_mpa);
    for (size_t i = 0; i < work->count; i++) {
        const nw_fit_test *t = &work->tests[i];
        if (!t->runout && nw_fit_root_at(plain, log(t->strain), &root)) {
            double residual = t->log10_life - (root.w - M_LN2) / M_LN10;
            squares += residual * residual;
            count += 1.0;
        }
    }
    fit->degrees = count - degrees_taken(work, plain);
    if (fit->degrees > 0.0) {
        fit->log10_life_sd = fit->log10_life_sd_corrected = sqrt(squares / fit->degrees);
        scatter_by_chi_square(fit);
    }
}

static void by_lines(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    nw_fit_parameter *p = fit->parameter;
    from_line(&fit->elastic, &p[0], &p[1]);
    from_line(&fit->plastic, &p[2], &p[3]);
    const nw_fit_line *only = fit->plastic.available ? &fit->plastic : &fit->elastic;
    if (!fit->plastic.available || !fit->elastic.available) {
        /* One line alone: its own scatter. */
        if (only->available && only->line.degrees > 0.0) {
            fit->log10_life_sd = fit->log10_life_sd_corrected = only->line.sd;
            fit->degrees = only->line.degrees;
            scatter_by_chi_square(fit);
        }
        return;
    }
    for (int i = 0; i < 4; i++) {
        fit->theta[i] = i % 2 == 0 ? log(p[i].value) : p[i].value;
    }
    if (!nw_fit_lines_covariance(&work->sums, &fit->elastic.line, &fit->plastic.line,
                                 fit->covariance)) {
        for (int i = 0; i < 16; i++) {
            fit->covariance[i] = NAN;
        }
    }
    if (work->has_strain && !isnan(fit->youngs_modulus_mpa)) {
        scatter_of_lines(work);
    }
}

static void by_likelihood(nw_fit *fit)
{
    const nw_likelihood *l = &fit->likelihood;
    size_t k = l->parameters;
    double n = (double)l->failures;
    fit->degrees = n - (double)k;
    double correction = fit->degrees > 0.0 ? n / fit->degrees : NAN;
    double t = student(fit, fit->degrees);
    for (size_t i = 0; i < 4; i++) {
        nw_fit_parameter *p = &fit->parameter[i];
        bool coefficient = i % 2 == 0;
        double shift = i == 0 ? log(fit->youngs_modulus_mpa) : 0.0;
        double at = l->theta[i] + shift, error = sqrt(l->covariance[i * k + i]);
        double reach = t * error * sqrt(correction);
        fit->theta[i] = at;
        p->value = coefficient ? exp(at) : at;
        p->standard_error = coefficient ? exp(at) * error : error;
        p->low = coefficient ? exp(at - reach) : at - reach;
        p->high = coefficient ? exp(at + reach) : at + reach;
        if (coefficient && fit->options.profile) {
            p->profile_low = exp(p->profile_low + shift);
            p->profile_high = exp(p->profile_high + shift);
        }
        p->from = "likelihood";
        p->limits_by = by_information;
        for (size_t j = 0; j < 4; j++) {
            fit->covariance[4 * i + j] = l->covariance[i * k + j] * correction;
        }
    }
    fit->scatter_slope = l->scatter == NW_SCATTER_GROWING ? l->theta[5] * M_LN10 : 0.0;
    fit->log10_life_sd = l->log10_life_sd;
    fit->log10_life_sd_corrected = l->log10_life_sd * sqrt(correction);
    double error = sqrt(l->covariance[4 * k + 4] * correction);
    fit->log10_life_sd_low = fit->log10_life_sd_corrected * exp(-t * error);
    fit->log10_life_sd_high = fit->log10_life_sd_corrected * exp(t * error);
}

/* ---- cyclic curve ---- */

/* Standard errors of the cyclic line. Where plastic strain is total minus stress/E, an error d of log stress moves
 * log plastic strain by -d stress/(E ep), so the residual is f d with f = 1 + n' stress/(E ep): the points of
 * small plastic strain scatter more, and least squares must be told by how much. f = 1 where it was measured. */
static void errors_of_cyclic_line(const nw_fit_work *work, double *error_a, double *error_b)
{
    const nw_fit *fit = work->fit;
    const nw_line *line = &fit->cyclic.line;
    double squares = 0.0, expected = 0.0, of_a = 0.0, of_b = 0.0, n = (double)line->points;
    size_t next = 0; /* left_out is in the order of the tests */
    for (size_t i = 0; i < work->count; i++) {
        const nw_fit_test *t = &work->tests[i];
        if (next < fit->cyclic.left_out_count && fit->cyclic.left_out[next].test == t->index) {
            next++;
            continue;
        }
        double dx = log10(t->plastic) - line->x_mean;
        double r = log10(t->stress_mpa) - line->y_mean - line->b * dx;
        bool measured = !isnan(work->coupons->tests[t->index].plastic_strain_amplitude);
        double f =
            measured ? 1.0 : 1.0 + line->b * t->stress_mpa / (fit->youngs_modulus_mpa * t->plastic);
        double to_a = 1.0 / n - line->x_mean * dx / line->sxx, to_b = dx / line->sxx;
        squares += r * r;
        expected += f * f * (1.0 - 1.0 / n - dx * dx / line->sxx);
        of_a += f * f * to_a * to_a;
        of_b += f * f * to_b * to_b;
    }
    double variance = line->degrees > 0.0 ? squares / expected : NAN;
    *error_a = sqrt(variance * of_a);
    *error_b = sqrt(variance * of_b);
}

static void direct(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    const nw_line *line = &fit->cyclic.line;
    nw_fit_parameter *k = &fit->parameter[NW_FIT_CYCLIC_COEFFICIENT];
    nw_fit_parameter *n = &fit->parameter[NW_FIT_CYCLIC_EXPONENT];
    double error_a, error_b, t = student(fit, line->degrees);
    errors_of_cyclic_line(work, &error_a, &error_b);
    k->value = pow(10.0, line->a);
    k->standard_error = k->value * M_LN10 * error_a;
    k->low = pow(10.0, line->a - t * error_a);
    k->high = pow(10.0, line->a + t * error_a);
    n->value = line->b;
    n->standard_error = error_b;
    n->low = line->b - t * error_b;
    n->high = line->b + t * error_b;
    k->from = n->from = "direct";
    k->limits_by = n->limits_by = fit->plastic_computed > 0
                                      ? "Student's t, error of stress carried into plastic strain"
                                      : by_t;
}

/* n' = b/c and ln K' = ln sf' - (b/c) ln ef', with errors by the linearised formulas. */
static void compatible(nw_fit *fit)
{
    const double *theta = fit->theta;
    double b = theta[1], c = theta[3], ratio = b / c;
    double of_k[4] = {1.0, -theta[2] / c, -ratio, ratio * theta[2] / c};
    double of_n[4] = {0.0, 1.0 / c, 0.0, -ratio / c};
    double error_k = sqrt(nw_small_form(fit->covariance, 4, of_k));
    double error_n = sqrt(nw_small_form(fit->covariance, 4, of_n));
    double t = student(fit, fit->degrees);
    nw_fit_parameter *k = &fit->parameter[NW_FIT_CYCLIC_COEFFICIENT];
    nw_fit_parameter *n = &fit->parameter[NW_FIT_CYCLIC_EXPONENT];
    k->value = fit->compatible_coefficient_mpa;
    k->standard_error = k->value * error_k;
    k->low = k->value * exp(-t * error_k);
    k->high = k->value * exp(t * error_k);
    n->value = fit->compatible_exponent;
    n->standard_error = error_n;
    n->low = ratio - t * error_n;
    n->high = ratio + t * error_n;
    k->from = n->from = "compatibility";
    k->limits_by = n->limits_by = by_delta;
}

/* Largest relative difference of stress between the two curves; both are straight in logarithms, so it stands
 * at an end of the tested plastic strains. */
static double disagreement(const nw_fit *fit)
{
    const nw_line *line = &fit->cyclic.line;
    double most = 0.0;
    for (int i = 0; i < 2; i++) {
        double x = i == 0 ? line->x_min : line->x_max;
        double log_ratio = line->a + line->b * x - log10(fit->compatible_coefficient_mpa) -
                           fit->compatible_exponent * x;
        most = fmax(most, fabs(pow(10.0, log_ratio) - 1.0));
    }
    return most;
}

static void cyclic_curve(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    bool whole = !isnan(fit->theta[0]) && !isnan(fit->theta[2]);
    if (whole) {
        fit->compatible_exponent = fit->theta[1] / fit->theta[3];
        fit->compatible_coefficient_mpa =
            exp(fit->theta[0] - fit->compatible_exponent * fit->theta[2]);
    }
    if (fit->cyclic.available) {
        direct(work);
    } else if (whole) {
        compatible(fit);
    }
    if (whole && fit->cyclic.available) {
        fit->cyclic_disagreement = disagreement(fit);
    }
}

void nw_fit_parameters(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    if (fit->method == NW_FIT_LIKELIHOOD) {
        by_likelihood(fit);
    } else {
        by_lines(work);
    }
    cyclic_curve(work);
}
