/* Profile-likelihood limits: the values of a parameter at which the likelihood, maximised over all others, has
 * fallen by W/2. W = n ln(1 + t^2/(n - p)) with n failures and p parameters: in a normal regression without
 * run-outs that is exactly Student's t; for many tests it becomes the usual chi-square. */
#include "base/quantiles.h"
#include "material/fit_curve_model.h"

#include <math.h>
#include <string.h>

typedef struct profile {
    nw_ls_problem problem;
    nw_curve_data curve;
    size_t index; /* of the parameter held */
    double maximum;
    double last[NW_LS_MOST]; /* parameters of the last point reached */
} profile;

/* Twice the loss of likelihood with the parameter held at `value`; NAN when the climb fails. */
static double loss(profile *p, double value)
{
    double theta[NW_LS_MOST], reached;
    memcpy(theta, p->last, sizeof theta);
    theta[p->index] = value;
    if (!nw_ls_climb(&p->problem, theta, &reached)) {
        return NAN;
    }
    memcpy(p->last, theta, sizeof theta);
    return 2.0 * (p->maximum - reached);
}

enum { WALK = 60, REFINE = 60 };

/* Walks from the maximum in steps that grow, then closes in; infinite when the loss never reaches `wanted`. */
static double limit(profile *p, const double *theta, double step, double wanted)
{
    double inside = theta[p->index], outside = NAN, loss_inside = 0.0, loss_outside = 0.0;
    const double first = step;
    memcpy(p->last, theta, sizeof p->last);
    for (int i = 0; i < WALK && isnan(outside); i++) {
        double next = inside + step, found = loss(p, next);
        if (isnan(found)) {
            step *= 0.5;
            if (fabs(step) < 1e-6 * fabs(first)) {
                break; /* the other parameters run away: nothing closes the limit */
            }
        } else if (found >= wanted) {
            outside = next;
            loss_outside = found;
        } else {
            inside = next;
            loss_inside = found;
            step *= 1.2;
        }
    }
    if (isnan(outside)) {
        return step > 0.0 ? INFINITY : -INFINITY;
    }
    for (int i = 0; i < REFINE && fabs(outside - inside) > 1e-10 * (1.0 + fabs(inside)); i++) {
        /* Nearly straight in the square root of the loss. */
        double a = sqrt(fmax(loss_inside, 0.0)), b = sqrt(loss_outside);
        double share = i % 3 == 2 ? 0.5 : (sqrt(wanted) - a) / (b - a);
        double next = inside + fmin(fmax(share, 0.01), 0.99) * (outside - inside);
        double found = loss(p, next);
        if (isnan(found)) {
            return NAN;
        }
        if (found >= wanted) {
            outside = next;
            loss_outside = found;
        } else {
            inside = next;
            loss_inside = found;
        }
    }
    return 0.5 * (inside + outside);
}

static bool prepare(profile *p, const nw_ls_problem *problem, const nw_curve_data *curve,
                    size_t index, double *theta)
{
    *p = (profile){.problem = *problem, .curve = *curve, .index = index};
    p->problem.data = &p->curve;
    p->problem.fixed[index] = true;
    if (index == 0 || index == 2) {
        p->curve.origin[index / 2] = 0.0;
        theta[index] -= theta[index + 1] * curve->origin[index / 2];
    }
    double gradient[NW_LS_MOST], hessian[NW_LS_MOST * NW_LS_MOST];
    p->maximum = nw_ls_evaluate(&p->problem, theta, gradient, hessian);
    return isfinite(p->maximum);
}

nw_status nw_fit_profile(const nw_ls_problem *problem, const nw_curve_data *curve, const double *at,
                         nw_fit *fit)
{
    double n = (double)fit->failures, degrees = n - (double)problem->parameters;
    if (!(degrees > 0.0)) {
        return NW_OK;
    }
    double t = nw_t_quantile(0.5 + 0.5 * fit->options.limits, degrees);
    double wanted = n * log1p(t * t / degrees);
    for (size_t i = 0; i < 4; i++) {
        profile p;
        double theta[NW_LS_MOST] = {0.0}, covariance[NW_LS_MOST * NW_LS_MOST];
        memcpy(theta, at, 6 * sizeof *theta);
        if (!prepare(&p, problem, curve, i, theta) ||
            !nw_ls_covariance(&p.problem, theta, covariance)) {
            continue;
        }
        double step = 0.5 * t * sqrt(covariance[i * problem->parameters + i]);
        double low = limit(&p, theta, -step, wanted), high = limit(&p, theta, step, wanted);
        fit->parameter[i].profile_low = low;
        fit->parameter[i].profile_high = high;
    }
    return NW_OK;
}
