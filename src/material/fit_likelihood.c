/* The whole strain-life curve by maximum likelihood, run-outs as censored observations.
 *
 * ln(2N) = w(ea; theta) + sigma Z with Z centred at its median; ln sigma = theta4 + theta5 (w - w_r).
 * Each line is written about the point w_r in the middle of the lives, exp(A + b (w - w_r)): A and b are then
 * nearly independent. A profile wants the coefficient itself as a coordinate and writes its line about w = 0. */
#include "base/quantiles.h"
#include "base/small_matrix.h"
#include "material/fit_curve_model.h"
#include "material/fit_parts.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

static const double least_log_scatter = -16.0; /* below it the points lie on the curve */

bool nw_curve_model(const void *data, size_t index, const double *theta, nw_ls_point *point)
{
    const nw_curve_data *d = data;
    double plain[4] = {theta[0] - theta[1] * d->origin[0], theta[1],
                       theta[2] - theta[3] * d->origin[1], theta[3]};
    nw_fit_root root;
    if (!nw_fit_root_at(plain, d->log_strain[index], &root)) {
        return false;
    }
    double w = root.w, b = theta[1], c = theta[3];
    double elastic = -root.gradient[0], plastic = -root.gradient[2]; /* share over slope */
    double slope = 1.0 / (elastic + plastic);
    double p = elastic * slope, q = plastic * slope;
    double u1[4] = {1.0, w - d->origin[0], 0.0, 0.0}, u2[4] = {0.0, 0.0, 1.0, w - d->origin[1]};
    double first[4], by_w[4], both = p * q, bent = both * (b - c) * (b - c);
    point->mu = w;
    for (int i = 0; i < 4; i++) {
        first[i] = p * u1[i] + q * u2[i];
        by_w[i] = both * (u1[i] - u2[i]) * (b - c);
        point->mu1[i] = -first[i] / slope;
    }
    by_w[1] += p;
    by_w[3] += q;
    for (int i = 0; i < 4; i++) {
        for (int j = 0; j < 4; j++) {
            double second = both * (u1[i] - u2[i]) * (u1[j] - u2[j]);
            point->mu2[i * NW_LS_MOST + j] =
                -(second + by_w[i] * point->mu1[j] + by_w[j] * point->mu1[i] +
                  bent * point->mu1[i] * point->mu1[j]) /
                slope;
        }
    }
    point->s = theta[4];
    point->s1[4] = 1.0;
    if (d->growing) {
        point->s += theta[5] * (w - d->reference);
        point->s1[5] = w - d->reference;
        for (int i = 0; i < 4; i++) {
            point->s1[i] = theta[5] * point->mu1[i];
            point->s2[i * NW_LS_MOST + 5] = point->s2[5 * NW_LS_MOST + i] = point->mu1[i];
            for (int j = 0; j < 4; j++) {
                point->s2[i * NW_LS_MOST + j] = theta[5] * point->mu2[i * NW_LS_MOST + j];
            }
        }
    }
    return point->s > least_log_scatter && point->s < 30.0;
}

/* ---- start values ---- */

/* Given both slopes, the coefficients by relative least squares on the failures; false when one would not be
 * positive. */
static bool coefficients_for(const nw_ls_problem *problem, double *theta)
{
    const nw_curve_data *d = problem->data;
    double pp = 0.0, pq = 0.0, qq = 0.0, p1 = 0.0, q1 = 0.0;
    for (size_t i = 0; i < problem->count; i++) {
        if (!problem->runout[i]) {
            double dw = problem->log_life[i] - d->reference;
            double p = exp(theta[1] * dw - d->log_strain[i]),
                   q = exp(theta[3] * dw - d->log_strain[i]);
            pp += p * p;
            pq += p * q;
            qq += q * q;
            p1 += p;
            q1 += q;
        }
    }
    double det = pp * qq - pq * pq, elastic = (p1 * qq - q1 * pq) / det;
    double plastic = (q1 * pp - p1 * pq) / det;
    if (!(elastic > 0.0 && plastic > 0.0 && isfinite(elastic) && isfinite(plastic))) {
        return false;
    }
    theta[0] = log(elastic);
    theta[2] = log(plastic);
    return true;
}

static bool scatter_for(const nw_ls_problem *problem, double *theta)
{
    const nw_curve_data *d = problem->data;
    double plain[4] = {theta[0] - theta[1] * d->origin[0], theta[1],
                       theta[2] - theta[3] * d->origin[1], theta[3]};
    double squares = 0.0, failures = 0.0;
    for (size_t i = 0; i < problem->count; i++) {
        nw_fit_root root;
        if (problem->runout[i]) {
            continue;
        }
        if (!nw_fit_root_at(plain, d->log_strain[i], &root)) {
            return false;
        }
        squares += (problem->log_life[i] - root.w) * (problem->log_life[i] - root.w);
        failures += 1.0;
    }
    theta[4] = fmax(0.5 * log(squares / failures), least_log_scatter + 1.0);
    theta[5] = 0.0;
    return true;
}

static void climb_from(const nw_ls_problem *problem, const double *start, double *best,
                       double *best_value)
{
    double theta[NW_LS_MOST] = {0.0}, value;
    memcpy(theta, start, 6 * sizeof *theta);
    if (scatter_for(problem, theta) && nw_ls_climb(problem, theta, &value) &&
        value > *best_value + 1e-9) {
        *best_value = value;
        memcpy(best, theta, 6 * sizeof *best);
    }
}

/* Slopes that bracket those of metals; the lines' own come first. */
static bool find_start(const nw_ls_problem *problem, const nw_fit *fit, double *best)
{
    static const double elastic[] = {-0.1, -0.06, -0.15}, plastic[] = {-0.6, -0.5, -0.8};
    const nw_curve_data *d = problem->data;
    double best_value = -INFINITY;
    if (fit->elastic.available && fit->plastic.available) {
        double plain[4];
        nw_fit_lines_theta(fit, plain);
        double theta[6] = {plain[0] + plain[1] * d->reference, plain[1],
                           plain[2] + plain[3] * d->reference, plain[3]};
        climb_from(problem, theta, best, &best_value);
    }
    for (size_t i = 0; i < 9; i++) {
        double theta[6] = {0.0, elastic[i % 3], 0.0, plastic[i / 3]};
        bool enough = isfinite(best_value) && (problem->count > 2000 || i >= 3);
        if (!enough && coefficients_for(problem, theta)) {
            climb_from(problem, theta, best, &best_value);
        }
    }
    return isfinite(best_value);
}

/* ---- result ---- */

/* The elastic line is the flatter one: exchanged where the climb ended the other way round. */
static void put_in_order(double *theta)
{
    if (theta[1] < theta[3]) {
        for (int i = 0; i < 2; i++) {
            double keep = theta[i];
            theta[i] = theta[i + 2];
            theta[i + 2] = keep;
        }
    }
}

/* Theta and covariance with both lines about w = 0. */
static void move_to_origin(const nw_curve_data *d, const double *theta, const double *covariance,
                           nw_likelihood *result)
{
    size_t n = result->parameters;
    double matrix[36] = {0.0}, half[36] = {0.0};
    for (size_t i = 0; i < n; i++) {
        matrix[i * n + i] = 1.0;
    }
    matrix[0 * n + 1] = -d->origin[0];
    matrix[2 * n + 3] = -d->origin[1];
    memset(result->covariance, 0, sizeof result->covariance);
    for (size_t i = 0; i < n; i++) {
        result->theta[i] = 0.0;
        for (size_t k = 0; k < n; k++) {
            result->theta[i] += matrix[i * n + k] * theta[k];
            for (size_t j = 0; j < n; j++) {
                half[i * n + j] += matrix[i * n + k] * covariance[k * n + j];
            }
        }
    }
    for (size_t i = 0; i < n; i++) {
        for (size_t j = 0; j < n; j++) {
            for (size_t k = 0; k < n; k++) {
                result->covariance[i * n + j] += half[i * n + k] * matrix[j * n + k];
            }
        }
    }
}

/* With equal slopes the two terms are one line, and its share between them is not determined. */
static const double least_difference_of_slopes = 1e-3;

static void fill_in(const nw_ls_problem *problem, const double *theta, double value,
                    nw_likelihood *result)
{
    const nw_curve_data *d = problem->data;
    double covariance[NW_LS_MOST * NW_LS_MOST];
    if (!(theta[1] - theta[3] > least_difference_of_slopes)) {
        snprintf(
            result->why, sizeof result->why,
            "the tests do not show both an elastic and a plastic part: one line fits them as well "
            "as two");
        return;
    }
    if (!nw_ls_covariance(problem, theta, covariance)) {
        snprintf(result->why, sizeof result->why,
                 "the tests do not determine all parameters of the curve");
        return;
    }
    for (size_t i = 0; i < problem->count; i++) {
        /* Density of N: d ln(2N)/dN = 1/N. */
        value -= problem->runout[i] ? 0.0 : problem->log_life[i] - M_LN2;
    }
    move_to_origin(d, theta, covariance, result);
    result->available = true;
    result->log_likelihood = value;
    result->aic = 2.0 * (double)result->parameters - 2.0 * value;
    result->reference_cycles = 0.5 * exp(d->reference);
    result->log10_life_sd =
        exp(result->theta[4]) * nw_ls_standard_sd(result->distribution) / M_LN10;
}

static nw_status maximise(nw_ls_problem *problem, const nw_fit *fit, double *start, bool has_start,
                          nw_likelihood *result)
{
    double theta[NW_LS_MOST] = {0.0}, value;
    bool found;
    if (has_start) {
        memcpy(theta, start, 6 * sizeof *theta);
        found = nw_ls_climb(problem, theta, &value);
    } else {
        found = find_start(problem, fit, theta);
    }
    if (!found) {
        snprintf(result->why, sizeof result->why,
                 "the likelihood has no maximum: the points lie on a curve, do not show both an "
                 "elastic and a plastic part, or (with run-outs) ask for a flat elastic line");
        return NW_OK;
    }
    put_in_order(theta);
    nw_status status = nw_ls_solve(problem, theta, &value);
    if (status == NW_OK) {
        fill_in(problem, theta, value, result);
        memcpy(start, theta, 6 * sizeof *start);
    } else if (status == NW_COMPUTE) {
        snprintf(result->why, sizeof result->why, "the score equations have no solution nearby");
    }
    return status == NW_MEMORY ? NW_MEMORY : NW_OK;
}

typedef struct data {
    double *log_life, *log_strain;
    bool *runout;
} data;

static bool collect(const nw_fit_work *work, data *d, double *reference)
{
    d->log_life = malloc(work->count * sizeof *d->log_life);
    d->log_strain = malloc(work->count * sizeof *d->log_strain);
    d->runout = malloc(work->count * sizeof *d->runout);
    if (d->log_life == NULL || d->log_strain == NULL || d->runout == NULL) {
        return false;
    }
    *reference = 0.0;
    for (size_t i = 0; i < work->count; i++) {
        const nw_fit_test *t = &work->tests[i];
        d->log_life[i] = t->log10_life * M_LN10 + M_LN2;
        d->log_strain[i] = log(t->strain);
        d->runout[i] = t->runout;
        *reference += d->log_life[i] / (double)work->count;
    }
    return true;
}

/* So many tests that models nobody asked for are not worth the time. */
enum { MANY_TESTS = 20000 };

static const char *cannot(const nw_fit_work *work)
{
    const nw_fit *fit = work->fit;
    if (work->count > MANY_TESTS && fit->options.method == NW_FIT_LINES) {
        return "not asked for, and there are more than 20000 tests";
    }
    if (!work->has_strain) {
        return "needs the total strain amplitude";
    }
    if (fit->failures < 6) {
        return "needs at least 6 failures for its 5 parameters";
    }
    return fit->levels < 4 ? "needs at least 4 levels for the 4 parameters of the curve" : NULL;
}

static nw_likelihood *candidate(nw_fit *fit, nw_distribution distribution, nw_scatter_model scatter)
{
    return &fit->candidates[2 * distribution + scatter];
}

static nw_status all_models(nw_fit_work *work, const data *d, double reference)
{
    nw_fit *fit = work->fit;
    nw_status status = NW_OK;
    for (int k = 0; k < 4 && status == NW_OK; k++) {
        nw_distribution distribution = (nw_distribution)(k / 2);
        nw_scatter_model scatter = (nw_scatter_model)(k % 2);
        nw_likelihood *result = candidate(fit, distribution, scatter);
        bool asked = distribution == fit->options.distribution && scatter == fit->options.scatter;
        if (work->count > MANY_TESTS && !asked) {
            snprintf(result->why, sizeof result->why,
                     "not asked for, and there are more than %d tests", MANY_TESTS);
            continue;
        }
        nw_curve_data curve = {d->log_strain, {reference, reference}, reference, scatter != 0};
        nw_ls_problem problem = {.count = work->count,
                                 .parameters = result->parameters,
                                 .log_life = d->log_life,
                                 .runout = d->runout,
                                 .distribution = distribution,
                                 .centre = nw_ls_standard_quantile(distribution, 0.5),
                                 .model = nw_curve_model,
                                 .data = &curve};
        /* The constant model of the same distribution is where growing scatter starts. */
        double start[6] = {0.0};
        const nw_likelihood *constant = candidate(fit, distribution, NW_SCATTER_CONSTANT);
        bool has_start = scatter == NW_SCATTER_GROWING && constant->available;
        if (has_start) {
            memcpy(start, constant->theta, 5 * sizeof *start);
            start[0] += start[1] * reference;
            start[2] += start[3] * reference;
        }
        status = maximise(&problem, fit, start, has_start, result);
        if (status == NW_OK && result->available && fit->options.profile && asked) {
            status = nw_fit_profile(&problem, &curve, start, fit);
        }
    }
    return status;
}

nw_status nw_fit_likelihoods(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    const char *why = cannot(work);
    for (int k = 0; k < 4; k++) {
        fit->candidates[k] = (nw_likelihood){.distribution = (nw_distribution)(k / 2),
                                             .scatter = (nw_scatter_model)(k % 2),
                                             .parameters = 5 + (size_t)(k % 2),
                                             .failures = fit->failures,
                                             .runouts = fit->runouts};
        snprintf(fit->candidates[k].why, sizeof fit->candidates[k].why, "%s",
                 why == NULL ? "" : why);
    }
    nw_status status = NW_OK;
    if (why == NULL) {
        data d = {NULL, NULL, NULL};
        double reference;
        status = collect(work, &d, &reference) ? all_models(work, &d, reference) : NW_MEMORY;
        free(d.log_life);
        free(d.log_strain);
        free(d.runout);
    }
    fit->likelihood = *candidate(fit, fit->options.distribution, fit->options.scatter);
    return status;
}
