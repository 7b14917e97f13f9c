/* What the files of the coupon fit share. */
#ifndef NW_MATERIAL_FIT_PARTS_H
#define NW_MATERIAL_FIT_PARTS_H

#include "notchwright/fit.h"

/* ---- levels ---- */

/* Numbers the levels of values[count] (all above 0), lowest first: a value opens a new level when it is more than
 * `width` (relative) above the lowest of the present one. level[count] receives the numbers, *levels how many.
 * Returns NW_OK or NW_MEMORY. */
nw_status nw_levels_of(const double *values, size_t count, double width, size_t *level,
                       size_t *levels);

/* What so many specimens and such replication are customarily held to be good for. */
const char *nw_sample_verdict(size_t count, double replication_percent);

/* ---- the strain-life curve as log life ---- */

/* theta[4] = ln(sf'/E), b, ln ef', c. */
typedef struct nw_fit_root {
    double w;           /* ln(2N) at which the curve takes the strain amplitude */
    double gradient[4]; /* of w by theta */
} nw_fit_root;

/* False where the curve does not fall (b or c not below 0) or overflows. */
bool nw_fit_root_at(const double theta[4], double log_strain, nw_fit_root *root);

/* ---- the tests in use ---- */

/* One test in use. Numbers that do not exist are NAN. */
typedef struct nw_fit_test {
    size_t index; /* into the coupons */
    size_t level;
    double strain, stress_mpa, plastic; /* amplitudes, measured or computed */
    double log10_life;
    bool runout;
} nw_fit_test;

/* Sums of the two lines over the tests they use, for the covariance of their parameters: rows are
 * (1, log10 amplitude). `cross` runs over the tests that both use. */
typedef struct nw_fit_sums {
    double elastic[4], plastic[4], cross[4];
    double elastic_variance, plastic_variance, cross_covariance; /* of the residuals */
} nw_fit_sums;

typedef struct nw_fit_work {
    const nw_coupons *coupons;
    nw_fit *fit;
    nw_fit_test *tests; /* [count] */
    size_t count;
    bool has_strain, has_stress, has_plastic; /* known for every test (plastic: for some) */
    nw_fit_sums sums;
    nw_diagnostics *diagnostics;
} nw_fit_work;

/* Chooses the tests, amplitudes and levels. Returns NW_OK, NW_INPUT or NW_MEMORY. */
nw_status nw_fit_select(nw_fit_work *work);

/* Plastic, elastic and cyclic line with what each leaves out. Returns NW_OK or NW_MEMORY. */
nw_status nw_fit_lines(nw_fit_work *work);

/* Covariance of theta (with ln sf'/E or ln sf', which does not matter) from the sums of the two lines; false
 * when a line is not determined. */
bool nw_fit_lines_covariance(const nw_fit_sums *sums, const nw_line *elastic,
                             const nw_line *plastic, double covariance[16]);

/* theta of the two lines (ln(sf'/E) needs the modulus). */
void nw_fit_lines_theta(const nw_fit *fit, double theta[4]);

/* The likelihood of the model asked for and of its three companions, and profile limits on request. Returns NW_OK
 * (whether a maximum was found or not) or NW_MEMORY. */
nw_status nw_fit_likelihoods(nw_fit_work *work);

/* Parameters, covariance and scatter by the method in use; K' and n'. */
void nw_fit_parameters(nw_fit_work *work);

/* The 50 % curve of a fit and its scatter, ready for evaluation. */
typedef struct nw_fit_whole {
    double theta[4]; /* with ln(sf'/E) */
    double scale;    /* ln of life for one unit of the standard variable; corrected for few tests */
    double plain_scale;      /* as the method has it */
    double slope, reference; /* ln scale changes by slope (w - reference) */
    nw_distribution distribution;
} nw_fit_whole;

/* False when the fit has no whole curve. */
bool nw_fit_whole_of(const nw_fit *fit, nw_fit_whole *whole);

nw_status nw_fit_curves(nw_fit_work *work);
nw_status nw_fit_outliers(nw_fit_work *work);
void nw_fit_plan_tests(nw_fit_work *work);
void nw_fit_cautions(nw_fit_work *work);

#endif
