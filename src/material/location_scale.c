#include "material/location_scale.h"

#include "base/newton.h"
#include "base/quantiles.h"
#include "base/small_matrix.h"

#include <math.h>
#include <string.h>

/* Log-density or log-survival of the standard variable, and its first and second derivative. */
typedef struct log_term {
    double value, first, second;
} log_term;

static const double half_log_two_pi = 0.91893853320467274178;

/* phi(z)/Q(z); beyond the reach of erfc by its asymptotic series (Abramowitz & Stegun 26.2.12). */
static double normal_hazard(double z)
{
    if (z > 30.0) {
        double v = 1.0 / (z * z);
        return z / (1.0 - v * (1.0 - 3.0 * v * (1.0 - 5.0 * v * (1.0 - 7.0 * v))));
    }
    return exp(-0.5 * z * z - half_log_two_pi) / (0.5 * erfc(z * M_SQRT1_2));
}

static log_term normal_term(double z, bool runout)
{
    if (!runout) {
        return (log_term){-0.5 * z * z - half_log_two_pi, -z, -1.0};
    }
    double hazard = normal_hazard(z);
    double value =
        z > 30.0 ? -0.5 * z * z - half_log_two_pi - log(hazard) : log(0.5 * erfc(z * M_SQRT1_2));
    return (log_term){value, -hazard, -hazard * (hazard - z)};
}

static log_term extreme_value_term(double z, bool runout)
{
    double e = exp(z);
    return runout ? (log_term){-e, -e, -e} : (log_term){z - e, 1.0 - e, -e};
}

double nw_ls_standard_quantile(nw_distribution distribution, double p)
{
    return distribution == NW_WEIBULL ? log(-log1p(-p)) : nw_normal_quantile(p);
}

double nw_ls_standard_sd(nw_distribution distribution)
{
    return distribution == NW_WEIBULL ? M_PI / sqrt(6.0) : 1.0;
}

/* With r = (y - mu) e^-s and z = r + centre:
 *   z_i  = -mu_i e^-s - r s_i
 *   z_ij = -mu_ij e^-s + e^-s (mu_i s_j + mu_j s_i) + r s_i s_j - r s_ij
 * and l = term(z) - s for a failure, term(z) for a run-out. */
static double add_point(const nw_ls_problem *p, size_t index, const nw_ls_point *point,
                        double *gradient, double *hessian)
{
    size_t n = p->parameters;
    double scale = exp(-point->s), r = (p->log_life[index] - point->mu) * scale;
    double z = r + p->centre, failed = p->runout[index] ? 0.0 : 1.0;
    log_term t = p->distribution == NW_WEIBULL ? extreme_value_term(z, p->runout[index])
                                               : normal_term(z, p->runout[index]);
    double z1[NW_LS_MOST];
    for (size_t i = 0; i < n; i++) {
        z1[i] = -point->mu1[i] * scale - r * point->s1[i];
        gradient[i] += t.first * z1[i] - failed * point->s1[i];
    }
    for (size_t i = 0; i < n; i++) {
        for (size_t j = 0; j <= i; j++) {
            size_t at = i * NW_LS_MOST + j;
            double z2 = -point->mu2[at] * scale +
                        scale * (point->mu1[i] * point->s1[j] + point->mu1[j] * point->s1[i]) +
                        r * point->s1[i] * point->s1[j] - r * point->s2[at];
            hessian[i * n + j] += t.second * z1[i] * z1[j] + t.first * z2 - failed * point->s2[at];
        }
    }
    return t.value - failed * point->s;
}

double nw_ls_evaluate(const nw_ls_problem *p, const double *theta, double *gradient,
                      double *hessian)
{
    size_t n = p->parameters;
    memset(gradient, 0, n * sizeof *gradient);
    memset(hessian, 0, n * n * sizeof *hessian);
    nw_ls_point point;
    memset(&point, 0, sizeof point);
    double value = 0.0;
    for (size_t i = 0; i < p->count; i++) {
        if (!p->model(p->data, i, theta, &point)) {
            return -INFINITY;
        }
        value += add_point(p, i, &point, gradient, hessian);
    }
    for (size_t i = 0; i < n; i++) {
        for (size_t j = 0; j < i; j++) {
            hessian[j * n + i] = hessian[i * n + j];
        }
    }
    return isfinite(value) ? value : -INFINITY;
}

/* ---- the free parameters, in units of their own curvature ---- */

typedef struct reduced {
    const nw_ls_problem *problem;
    const double *start; /* all parameters */
    size_t free_count;
    size_t place[NW_LS_MOST]; /* of the free ones among all */
    double unit[NW_LS_MOST];  /* 1/sqrt|d2l/dtheta2| at the start */
} reduced;

static void full_theta(const reduced *r, const double *u, double *theta)
{
    memcpy(theta, r->start, r->problem->parameters * sizeof *theta);
    for (size_t i = 0; i < r->free_count; i++) {
        theta[r->place[i]] += r->unit[i] * u[i];
    }
}

/* Value, gradient and hessian by u. */
static double reduced_evaluate(const reduced *r, const double *u, double *gradient, double *hessian)
{
    double theta[NW_LS_MOST], g[NW_LS_MOST], h[NW_LS_MOST * NW_LS_MOST];
    size_t n = r->problem->parameters, m = r->free_count;
    full_theta(r, u, theta);
    double value = nw_ls_evaluate(r->problem, theta, g, h);
    for (size_t i = 0; i < m; i++) {
        gradient[i] = g[r->place[i]] * r->unit[i];
        for (size_t j = 0; j < m; j++) {
            hessian[i * m + j] = h[r->place[i] * n + r->place[j]] * r->unit[i] * r->unit[j];
        }
    }
    return value;
}

static bool reduce(const nw_ls_problem *problem, const double *theta, reduced *r)
{
    double g[NW_LS_MOST], h[NW_LS_MOST * NW_LS_MOST];
    *r = (reduced){.problem = problem, .start = theta};
    if (!isfinite(nw_ls_evaluate(problem, theta, g, h))) {
        return false;
    }
    for (size_t i = 0; i < problem->parameters; i++) {
        if (!problem->fixed[i]) {
            double curvature = fabs(h[i * problem->parameters + i]);
            r->place[r->free_count] = i;
            r->unit[r->free_count++] = curvature > 0.0 ? 1.0 / sqrt(curvature) : 1.0;
        }
    }
    return true;
}

/* One damped Newton step: (-H + damping diag|H|) step = g. */
static bool damped_step(const double *gradient, const double *hessian, size_t n, double damping,
                        double *step)
{
    double matrix[NW_LS_MOST * NW_LS_MOST];
    for (size_t i = 0; i < n; i++) {
        for (size_t j = 0; j < n; j++) {
            matrix[i * n + j] = -hessian[i * n + j];
        }
        matrix[i * n + i] += damping * (fabs(hessian[i * n + i]) + 1e-12);
        step[i] = gradient[i];
    }
    if (!nw_small_factor(matrix, n)) {
        return false;
    }
    nw_small_solve(matrix, n, step);
    return true;
}

enum { MOST_STEPS = 300 };

bool nw_ls_climb(const nw_ls_problem *problem, double *theta, double *value)
{
    reduced r;
    double start[NW_LS_MOST], u[NW_LS_MOST] = {0.0}, g[NW_LS_MOST], h[NW_LS_MOST * NW_LS_MOST];
    memcpy(start, theta, problem->parameters * sizeof *start);
    if (!reduce(problem, start, &r)) {
        return false;
    }
    double damping = 1e-2, now = reduced_evaluate(&r, u, g, h);
    for (int steps = 0; steps < MOST_STEPS && damping < 1e12; steps++) {
        double step[NW_LS_MOST], next[NW_LS_MOST], g2[NW_LS_MOST], h2[NW_LS_MOST * NW_LS_MOST];
        double gain = 0.0;
        if (!damped_step(g, h, r.free_count, damping, step)) {
            damping = fmax(10.0 * damping, 1e-6);
            continue;
        }
        for (size_t i = 0; i < r.free_count; i++) {
            next[i] = u[i] + step[i];
            gain += step[i] * g[i];
        }
        double then = reduced_evaluate(&r, next, g2, h2);
        if (!(then >= now - 1e-12 * fabs(now))) {
            damping = fmax(10.0 * damping, 1e-6);
            continue;
        }
        memcpy(u, next, sizeof u);
        memcpy(g, g2, sizeof g);
        memcpy(h, h2, sizeof h);
        now = then;
        damping = damping > 1e-9 ? 0.1 * damping : 0.0;
        if (gain < 1e-10 && damping < 1e-4) {
            full_theta(&r, u, theta);
            *value = now;
            return true;
        }
    }
    return false;
}

static void score_equations(const void *data, const double *unknown, double *residual,
                            double *jacobian)
{
    double value = reduced_evaluate(data, unknown, residual, jacobian);
    if (!isfinite(value)) {
        residual[0] = NAN;
    }
}

static bool is_maximum(const reduced *r, const double *u)
{
    double g[NW_LS_MOST], h[NW_LS_MOST * NW_LS_MOST];
    size_t n = r->free_count;
    reduced_evaluate(r, u, g, h);
    for (size_t i = 0; i < n * n; i++) {
        h[i] = -h[i];
    }
    return nw_small_factor(h, n);
}

nw_status nw_ls_solve(const nw_ls_problem *problem, double *theta, double *value)
{
    /* Scores are in units of standard errors; this much moves the estimate by nothing that is printed. */
    static const double tolerance = 1e-7;
    reduced r;
    double start[NW_LS_MOST], u[NW_LS_MOST] = {0.0}, g[NW_LS_MOST], h[NW_LS_MOST * NW_LS_MOST];
    memcpy(start, theta, problem->parameters * sizeof *start);
    if (!reduce(problem, start, &r) || r.free_count == 0) {
        return NW_COMPUTE;
    }
    nw_newton *solver = NULL;
    nw_status status = nw_newton_create(r.free_count, &solver);
    if (status == NW_OK) {
        status = nw_newton_solve(solver, score_equations, &r, tolerance, u);
    }
    nw_newton_free(solver);
    if (status == NW_OK && !is_maximum(&r, u)) {
        status = NW_COMPUTE;
    }
    if (status == NW_OK) {
        *value = reduced_evaluate(&r, u, g, h);
        full_theta(&r, u, theta);
    }
    return status;
}

bool nw_ls_covariance(const nw_ls_problem *problem, const double *theta, double *covariance)
{
    double g[NW_LS_MOST], h[NW_LS_MOST * NW_LS_MOST];
    size_t n = problem->parameters;
    if (!isfinite(nw_ls_evaluate(problem, theta, g, h))) {
        return false;
    }
    for (size_t i = 0; i < n * n; i++) {
        h[i] = -h[i];
    }
    return nw_small_inverse(h, n, covariance);
}
