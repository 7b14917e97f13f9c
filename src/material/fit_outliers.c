/* Outliers by externally studentised residuals (Cook & Weisberg, Residuals and Influence in Regression, 1982):
 *   t_i = r_i/(s_(i) sqrt(1 - h_i)),  s_(i)^2 = (SS - r_i^2/(1 - h_i))/(n - p - 1)
 * against Student's t with n - p - 1 degrees of freedom, the 5 % shared by all tests (Bonferroni). They are
 * shown, never dropped. */
#include "base/quantiles.h"
#include "base/small_matrix.h"
#include "material/fit_parts.h"

#include <math.h>
#include <stdlib.h>

typedef struct residual {
    size_t test;
    double value, leverage; /* log10 life, in units that do not grow with life */
} residual;

typedef struct residuals {
    residual *items;
    size_t count;
    double parameters;
} residuals;

static void about_curve(const nw_fit_work *work, const nw_fit_whole *whole, residuals *r)
{
    double square = whole->scale * whole->scale;
    r->parameters = 4.0;
    for (size_t i = 0; i < work->count; i++) {
        const nw_fit_test *t = &work->tests[i];
        nw_fit_root root;
        if (t->runout || !nw_fit_root_at(whole->theta, log(t->strain), &root)) {
            continue;
        }
        double growth = exp(whole->slope * (root.w - whole->reference));
        double variance = nw_small_form(work->fit->covariance, 4, root.gradient);
        r->items[r->count++] =
            (residual){t->index, (t->log10_life - (root.w - M_LN2) / M_LN10) / growth,
                       variance / (square * growth * growth)};
    }
}

static void about_line(const nw_fit_work *work, const nw_fit_line *source, bool plastic,
                       residuals *r)
{
    const nw_line *line = &source->line;
    size_t next = 0; /* left_out is in the order of the tests */
    r->parameters = 2.0;
    for (size_t i = 0; i < work->count; i++) {
        const nw_fit_test *t = &work->tests[i];
        if (next < source->left_out_count && source->left_out[next].test == t->index) {
            next++;
            continue;
        }
        double x = log10(plastic ? t->plastic : t->stress_mpa), dx = x - line->x_mean;
        r->items[r->count++] = (residual){t->index, t->log10_life - line->a - line->b * x,
                                          1.0 / (double)line->points + dx * dx / line->sxx};
    }
}

static nw_status flag(nw_fit *fit, const residuals *r, const char *about)
{
    double n = (double)r->count, squares = 0.0, degrees = n - r->parameters - 1.0;
    if (!(degrees > 0.0)) {
        return NW_OK;
    }
    for (size_t i = 0; i < r->count; i++) {
        squares += r->items[i].value * r->items[i].value;
    }
    double critical = nw_t_quantile(1.0 - 0.025 / n, degrees);
    for (size_t i = 0; i < r->count; i++) {
        const residual *item = &r->items[i];
        double room = 1.0 - item->leverage;
        double rest = squares - item->value * item->value / room;
        /* Residuals of rounding size about an exact curve say nothing. */
        if (!(room > 1e-9) || fabs(item->value) < 1e-9) {
            continue;
        }
        double t = item->value / sqrt(fmax(rest, 0.0) / degrees * room);
        if (!(fabs(t) > critical)) {
            continue;
        }
        nw_fit_outlier *larger =
            realloc(fit->outliers, (fit->outlier_count + 1) * sizeof *fit->outliers);
        if (larger == NULL) {
            return NW_MEMORY;
        }
        fit->outliers = larger;
        fit->outliers[fit->outlier_count++] =
            (nw_fit_outlier){item->test, item->value, t, critical, about};
    }
    return NW_OK;
}

nw_status nw_fit_outliers(nw_fit_work *work)
{
    nw_fit *fit = work->fit;
    nw_fit_whole whole;
    residuals r = {calloc(work->count, sizeof *r.items), 0, 0.0};
    nw_status status = r.items == NULL ? NW_MEMORY : NW_OK;
    if (status == NW_OK && work->has_strain && nw_fit_whole_of(fit, &whole)) {
        about_curve(work, &whole, &r);
        status = flag(fit, &r, "curve");
    } else if (status == NW_OK) {
        if (fit->plastic.available) {
            about_line(work, &fit->plastic, true, &r);
            status = flag(fit, &r, "plastic line");
        }
        if (status == NW_OK && fit->elastic.available) {
            r.count = 0;
            about_line(work, &fit->elastic, false, &r);
            status = flag(fit, &r, "elastic line");
        }
    }
    free(r.items);
    return status;
}
