/* Percentile and tolerance curves: life against strain amplitude.
 *
 * With log-normal life and constant scatter the estimate of a percentile is  w + z s, and its limits follow from
 * the noncentral t with the variance of w in units of s^2; else from the linearised formula and Student's t. */
#include "base/quantiles.h"
#include "base/small_matrix.h"
#include "material/fit_parts.h"
#include "material/location_scale.h"

#include <math.h>
#include <stdlib.h>

bool nw_fit_whole_of(const nw_fit *fit, nw_fit_whole *whole)
{
    bool likelihood = fit->method == NW_FIT_LIKELIHOOD;
    nw_distribution distribution = likelihood ? fit->likelihood.distribution : NW_LOG_NORMAL;
    double unit = M_LN10 / nw_ls_standard_sd(distribution);
    *whole = (nw_fit_whole){.scale = fit->log10_life_sd_corrected * unit,
                            .plain_scale = fit->log10_life_sd * unit,
                            .slope = fit->scatter_slope / M_LN10,
                            .distribution = distribution};
    whole->reference = likelihood ? log(2.0 * fit->likelihood.reference_cycles) : 0.0;
    for (int i = 0; i < 4; i++) {
        whole->theta[i] = fit->theta[i] - (i == 0 ? log(fit->youngs_modulus_mpa) : 0.0);
        if (isnan(whole->theta[i])) {
            return false;
        }
    }
    return whole->theta[1] < 0.0 && whole->theta[3] < 0.0;
}

static double centred_quantile(const nw_fit_whole *whole, double survival)
{
    return nw_ls_standard_quantile(whole->distribution, 1.0 - survival) -
           nw_ls_standard_quantile(whole->distribution, 0.5);
}

/* Standard error of w + z scale by the linearised formula; likelihood only. */
static double percentile_error(const nw_fit *fit, const nw_fit_whole *whole,
                               const nw_fit_root *root, double z)
{
    const nw_likelihood *l = &fit->likelihood;
    double scale = z * exp(l->theta[4] + whole->slope * (root->w - whole->reference));
    double gradient[6] = {0.0};
    for (int i = 0; i < 4; i++) {
        gradient[i] = root->gradient[i] * (1.0 + scale * whole->slope);
    }
    gradient[4] = scale;
    gradient[5] = scale * (root->w - whole->reference);
    double correction = (double)l->failures / fit->degrees;
    return sqrt(nw_small_form(l->covariance, l->parameters, gradient) * correction);
}

/* One-sided lower limit of the percentile with confidence `confidence`, as ln(2N). */
static double lower_limit(const nw_fit *fit, const nw_fit_whole *whole, const nw_fit_root *root,
                          double survival, double confidence)
{
    if (!(fit->degrees >= 1.0)) {
        return NAN;
    }
    double variance = nw_small_form(fit->covariance, 4, root->gradient);
    if (whole->distribution == NW_LOG_NORMAL && whole->slope == 0.0) {
        double square = whole->scale * whole->scale;
        /* No scatter at all: the curve is its own limit. */
        return square > 0.0 && variance > 0.0
                   ? root->w - whole->scale * nw_tolerance_factor(survival, confidence,
                                                                  variance / square, fit->degrees)
                   : root->w;
    }
    double z = centred_quantile(whole, survival);
    double at = root->w + z * whole->scale * exp(whole->slope * (root->w - whole->reference));
    return at - nw_t_quantile(confidence, fit->degrees) * percentile_error(fit, whole, root, z);
}

static double cycles_of(double w)
{
    return 0.5 * exp(w);
}

double nw_fit_life(const nw_fit *fit, double strain_amplitude, double survival, double confidence,
                   double *limits)
{
    nw_fit_whole whole;
    nw_fit_root root;
    if (limits != NULL) {
        limits[0] = limits[1] = NAN;
    }
    if (!nw_fit_whole_of(fit, &whole) ||
        !nw_fit_root_at(whole.theta, log(strain_amplitude), &root)) {
        return NAN;
    }
    double z = survival == 0.5 ? 0.0 : centred_quantile(&whole, survival);
    double shift =
        z == 0.0 ? 0.0 : z * whole.plain_scale * exp(whole.slope * (root.w - whole.reference));
    if (limits != NULL) {
        double upper = 0.5 + 0.5 * confidence;
        limits[0] = cycles_of(lower_limit(fit, &whole, &root, survival, upper));
        limits[1] = cycles_of(lower_limit(fit, &whole, &root, survival, 1.0 - upper));
    }
    return cycles_of(root.w + shift);
}

static void fill(const nw_fit *fit, const nw_fit_whole *whole, nw_fit_curve *curve)
{
    double low = log(fit->strain_min), high = log(fit->strain_max);
    for (int i = 0; i < NW_FIT_GRID; i++) {
        nw_fit_point *point = &curve->points[i];
        double log_strain = low + (high - low) * i / (NW_FIT_GRID - 1);
        double limits[2] = {NAN, NAN};
        nw_fit_root root;
        point->strain_amplitude = exp(log_strain);
        if (!curve->tolerance) {
            point->cycles = nw_fit_life(fit, point->strain_amplitude, curve->survival,
                                        fit->options.limits, limits);
        } else {
            point->cycles =
                nw_fit_root_at(whole->theta, log_strain, &root)
                    ? cycles_of(lower_limit(fit, whole, &root, curve->survival, curve->confidence))
                    : NAN;
        }
        point->low = limits[0];
        point->high = limits[1];
    }
}

nw_status nw_fit_curves(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    const nw_fit_options *o = &fit->options;
    nw_fit_whole whole;
    if (!work->has_strain || !nw_fit_whole_of(fit, &whole)) {
        return NW_OK;
    }
    size_t count = o->percentile_count + o->survival_count * o->confidence_count;
    fit->curves = calloc(count + 1, sizeof *fit->curves);
    if (fit->curves == NULL) {
        return NW_MEMORY;
    }
    for (size_t i = 0; i < o->percentile_count; i++) {
        fit->curves[fit->curve_count++] =
            (nw_fit_curve){.survival = 1.0 - o->percentile[i], .confidence = NAN};
    }
    for (size_t i = 0; i < o->survival_count; i++) {
        for (size_t j = 0; j < o->confidence_count; j++) {
            fit->curves[fit->curve_count++] = (nw_fit_curve){
                .tolerance = true, .survival = o->survival[i], .confidence = o->confidence[j]};
        }
    }
    for (size_t i = 0; i < fit->curve_count; i++) {
        fill(fit, &whole, &fit->curves[i]);
    }
    return NW_OK;
}
