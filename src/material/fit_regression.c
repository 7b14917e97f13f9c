/* Censored regression of log life on a polynomial: location and log-scale are both polynomials in x. */
#include "base/small_matrix.h"
#include "material/location_scale.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

const char *nw_distribution_name(nw_distribution distribution)
{
    return distribution == NW_WEIBULL ? "weibull" : "log_normal";
}

/* x is moved and scaled to mean 0 and size 1: powers of x themselves are nearly alike. */
typedef struct polynomials {
    const double *x;
    size_t location, scatter; /* numbers of coefficients */
    double middle, size;
} polynomials;

static bool model(const void *data, size_t index, const double *theta, nw_ls_point *point)
{
    const polynomials *p = data;
    double u = (p->x[index] - p->middle) / p->size, power = 1.0;
    point->mu = point->s = 0.0;
    for (size_t i = 0; i < p->location || i < p->scatter; i++, power *= u) {
        if (i < p->location) {
            point->mu1[i] = power;
            point->mu += theta[i] * power;
        }
        if (i < p->scatter) {
            point->s1[p->location + i] = power;
            point->s += theta[p->location + i] * power;
        }
    }
    return point->s > -18.0; /* scatter this small: the points lie on the curve */
}

/* Least squares on the failures. */
static bool start_values(const polynomials *p, const double *log_life, const bool *runout,
                         size_t count, double *theta)
{
    double normal[NW_LS_MOST * NW_LS_MOST] = {0.0}, squares = 0.0;
    size_t n = p->location, failures = 0;
    nw_ls_point point;
    memset(&point, 0, sizeof point);
    memset(theta, 0, (n + p->scatter) * sizeof *theta);
    double right[NW_LS_MOST] = {0.0}, none[NW_LS_MOST] = {0.0};
    for (size_t k = 0; k < count; k++) {
        if (runout[k]) {
            continue;
        }
        model(p, k, none, &point);
        failures++;
        for (size_t i = 0; i < n; i++) {
            right[i] += point.mu1[i] * log_life[k];
            for (size_t j = 0; j < n; j++) {
                normal[i * n + j] += point.mu1[i] * point.mu1[j];
            }
        }
    }
    if (failures <= n || !nw_small_factor(normal, n)) {
        return false;
    }
    nw_small_solve(normal, n, right);
    memcpy(theta, right, n * sizeof *theta);
    for (size_t k = 0; k < count; k++) {
        model(p, k, theta, &point);
        squares += runout[k] ? 0.0 : (log_life[k] - point.mu) * (log_life[k] - point.mu);
    }
    theta[n] = 0.5 * log(squares / (double)failures);
    return squares > 0.0;
}

/* Rows of the matrix that takes coefficients in u = (x - middle)/size to coefficients in x. */
static void expansion(const polynomials *p, size_t first, size_t count, size_t total,
                      double *matrix)
{
    for (size_t k = 0; k < count; k++) {
        double binomial = 1.0;
        for (size_t j = k + 1; j-- > 0;) {
            matrix[(first + j) * total + first + k] =
                binomial * pow(-p->middle, (double)(k - j)) / pow(p->size, (double)k);
            binomial *= (double)j / (double)(k - j + 1);
        }
    }
}

static void in_x(const polynomials *p, const double *theta, const double *covariance,
                 nw_regression *result)
{
    size_t n = result->count;
    double matrix[NW_LS_MOST * NW_LS_MOST] = {0.0}, half[NW_LS_MOST * NW_LS_MOST] = {0.0};
    expansion(p, 0, p->location, n, matrix);
    expansion(p, p->location, p->scatter, n, matrix);
    for (size_t i = 0; i < n; i++) {
        for (size_t j = 0; j < n; j++) {
            result->coefficient[i] += matrix[i * n + j] * theta[j];
            for (size_t k = 0; k < n; k++) {
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
        result->standard_error[i] = sqrt(result->covariance[i * n + i]);
    }
}

static polynomials polynomials_of(const double *x, size_t count, size_t location, size_t scatter)
{
    double low = x[0], high = x[0], sum = 0.0;
    for (size_t i = 0; i < count; i++) {
        low = fmin(low, x[i]);
        high = fmax(high, x[i]);
        sum += x[i];
    }
    double size = 0.5 * (high - low);
    return (polynomials){x, location, scatter, sum / (double)count, size > 0.0 ? size : 1.0};
}

static nw_status fit(const nw_ls_problem *problem, const polynomials *p, nw_regression *result)
{
    double theta[NW_LS_MOST], covariance[NW_LS_MOST * NW_LS_MOST], value;
    if (!start_values(p, problem->log_life, problem->runout, problem->count, theta) ||
        !nw_ls_climb(problem, theta, &value)) {
        return NW_COMPUTE;
    }
    nw_status status = nw_ls_solve(problem, theta, &value);
    if (status == NW_OK && !nw_ls_covariance(problem, theta, covariance)) {
        status = NW_COMPUTE;
    }
    if (status == NW_OK) {
        for (size_t i = 0; i < problem->count; i++) {
            value -=
                problem->runout[i] ? 0.0 : problem->log_life[i]; /* density of the life itself */
        }
        result->log_likelihood = value;
        result->aic = 2.0 * (double)result->count - 2.0 * value;
        in_x(p, theta, covariance, result);
    }
    return status;
}

nw_status nw_censored_regression(const double *x, const double *life, const bool *runout,
                                 size_t count, size_t location_degree, size_t scatter_degree,
                                 nw_distribution distribution, nw_regression *result,
                                 nw_diagnostics *diagnostics)
{
    size_t location = location_degree + 1, scatter = scatter_degree + 1, failures = 0;
    *result = (nw_regression){.count = location + scatter};
    for (size_t i = 0; i < count; i++) {
        failures += !runout[i];
    }
    if (location > NW_LS_MOST || scatter > NW_LS_MOST || result->count > NW_LS_MOST ||
        failures <= location) {
        return nw_fault(diagnostics, NW_INPUT, NULL, NULL,
                        "found %zu failures and %zu coefficients, expected more failures than "
                        "location coefficients, and at most %d coefficients",
                        failures, result->count, NW_LS_MOST);
    }
    double *log_life = malloc(count * sizeof *log_life);
    if (log_life == NULL) {
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory");
    }
    for (size_t i = 0; i < count; i++) {
        log_life[i] = log(life[i]);
    }
    polynomials p = polynomials_of(x, count, location, scatter);
    nw_ls_problem problem = {.count = count,
                             .parameters = result->count,
                             .log_life = log_life,
                             .runout = runout,
                             .distribution = distribution,
                             .model = model,
                             .data = &p};
    nw_status status = fit(&problem, &p, result);
    free(log_life);
    return status == NW_OK ? NW_OK
                           : nw_fault(diagnostics, status, NULL, NULL,
                                      "the likelihood has no maximum that can be found");
}
