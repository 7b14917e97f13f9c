/* Which further tests would most narrow the 50 % curve at a life: one test after the other is placed at the
 * amplitude of the tested range (widened to the amplitude asked about) where it lowers the variance of log life at the strain of that life most (a greedy
 * c-optimal augmentation; Atkinson & Donev, Optimum Experimental Designs, 1992, from memory). The scatter is taken
 * to stay as it is. */
#include "base/quantiles.h"
#include "base/small_matrix.h"
#include "material/fit_parts.h"

#include <math.h>
#include <stdio.h>
#include <string.h>

enum { CANDIDATES = 41 };

typedef struct plan {
    const nw_fit *fit;
    nw_fit_whole whole;
    nw_fit_root wanted; /* at the life asked for */
    bool by_lines;
    nw_fit_sums sums;       /* by lines: grows with each test */
    double information[16]; /* by likelihood: grows with each test */
} plan;

/* Variance of w at the life asked for; INFINITY where the tests do not determine it. */
static double variance_of(const plan *p)
{
    double covariance[16];
    bool found = p->by_lines ? nw_fit_lines_covariance(&p->sums, &p->fit->elastic.line,
                                                       &p->fit->plastic.line, covariance)
                             : nw_small_inverse(p->information, 4, covariance);
    return found ? nw_small_form(covariance, 4, p->wanted.gradient) : INFINITY;
}

static void add_row(double sums[4], double left, double right)
{
    sums[0] += 1.0;
    sums[1] += right;
    sums[2] += left;
    sums[3] += left * right;
}

/* A test at an amplitude, on the fitted curve. */
static void add_test(plan *p, double log_strain)
{
    nw_fit_root root;
    if (!nw_fit_root_at(p->whole.theta, log_strain, &root)) {
        return;
    }
    if (!p->by_lines) {
        double scale = p->whole.scale * exp(p->whole.slope * (root.w - p->whole.reference));
        for (int i = 0; i < 4; i++) {
            for (int j = 0; j < 4; j++) {
                p->information[4 * i + j] += root.gradient[i] * root.gradient[j] / (scale * scale);
            }
        }
        return;
    }
    const double *theta = p->whole.theta;
    double elastic = theta[0] + theta[1] * root.w, plastic = theta[2] + theta[3] * root.w;
    double xe = (elastic + log(p->fit->youngs_modulus_mpa)) / M_LN10, xp = plastic / M_LN10;
    add_row(p->sums.elastic, xe, xe);
    if (exp(plastic) >= p->fit->options.least_plastic_strain) {
        add_row(p->sums.plastic, xp, xp);
        add_row(p->sums.cross, xe, xp);
    }
}

static double best_place(const plan *p)
{
    double at = log(p->fit->plan.strain_amplitude);
    double low = fmin(log(p->fit->strain_min), at), high = fmax(log(p->fit->strain_max), at);
    double best = low, least = INFINITY;
    for (int i = 0; i < CANDIDATES; i++) {
        double log_strain = low + (high - low) * i / (CANDIDATES - 1);
        plan tried = *p;
        add_test(&tried, log_strain);
        double variance = variance_of(&tried);
        if (variance < least) {
            least = variance;
            best = log_strain;
        }
    }
    return best;
}

/* Rows stay sorted by amplitude, largest first. */
static void count_test(nw_fit_plan *result, double strain, double cycles)
{
    size_t at = 0;
    while (at < result->row_count && result->rows[at].strain_amplitude > strain) {
        at++;
    }
    if (at < result->row_count && result->rows[at].strain_amplitude == strain) {
        result->rows[at].tests++;
        return;
    }
    memmove(&result->rows[at + 1], &result->rows[at],
            (result->row_count - at) * sizeof result->rows[0]);
    result->rows[at] = (nw_fit_plan_row){strain, cycles, 1};
    result->row_count++;
}

static double factor(const plan *p, double more)
{
    double t = nw_t_quantile(0.5 + 0.5 * p->fit->options.limits, p->fit->degrees + more);
    return exp(t * sqrt(variance_of(p)));
}

static bool begin(nw_fit_work *work, plan *p)
{
    nw_fit *fit = work->fit;
    nw_fit_plan *result = &fit->plan;
    *p = (plan){.fit = fit, .by_lines = fit->method == NW_FIT_LINES, .sums = work->sums};
    if (!work->has_strain || !nw_fit_whole_of(fit, &p->whole) || !(fit->degrees > 0.0) ||
        !(p->whole.scale > 0.0)) {
        snprintf(result->why, sizeof result->why,
                 "there is no whole curve with a scatter to plan from");
        return false;
    }
    double w = log(2.0 * result->cycles), elastic = p->whole.theta[0] + p->whole.theta[1] * w;
    double plastic = p->whole.theta[2] + p->whole.theta[3] * w;
    double log_strain = fmax(elastic, plastic) + log1p(exp(-fabs(elastic - plastic)));
    result->strain_amplitude = exp(log_strain);
    bool found = nw_fit_root_at(p->whole.theta, log_strain, &p->wanted) &&
                 (p->by_lines || nw_small_inverse(fit->covariance, 4, p->information));
    if (!found || !isfinite(variance_of(p))) {
        snprintf(result->why, sizeof result->why,
                 "the tests do not determine the curve well enough to plan from");
        return false;
    }
    return true;
}

void nw_fit_plan_tests(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    nw_fit_plan *result = &fit->plan;
    result->cycles = fit->options.plan_cycles;
    plan p;
    if (isnan(result->cycles) || !begin(work, &p)) {
        return;
    }
    result->available = true;
    result->factor_now = result->factor_after[0] = factor(&p, 0.0);
    for (size_t i = 0; i < fit->options.plan_tests && i < NW_FIT_PLAN_MOST; i++) {
        nw_fit_root root;
        double log_strain = best_place(&p);
        add_test(&p, log_strain);
        nw_fit_root_at(p.whole.theta, log_strain, &root);
        count_test(result, exp(log_strain), 0.5 * exp(root.w));
        result->tests = i + 1;
        result->factor_after[i + 1] = factor(&p, (double)(i + 1));
    }
}
