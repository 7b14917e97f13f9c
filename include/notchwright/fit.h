/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Coupon tests and what is fitted to them: lines by regression, the whole strain-life curve by maximum
 * likelihood with run-outs, percentile and tolerance curves, outliers, and which further tests would help.
 *
 *   strain-life curve   ea = (sf'/E)(2N)^b + ef'(2N)^c
 *   cyclic curve        sa = K' ep^n'
 *   ea, sa, ep          amplitudes of total strain, stress, plastic strain; N life in cycles
 */
#ifndef NOTCHWRIGHT_FIT_H
#define NOTCHWRIGHT_FIT_H

#include "notchwright/material.h"

#include <stdio.h>

#ifdef __cplusplus
extern "C" {
#endif

/* ---- the tests ---- */

/* One specimen. Amplitudes that were not measured are NAN. */
typedef struct nw_coupon {
    char id[32];
    double strain_amplitude; /* total, ratio */
    double stress_amplitude_mpa;
    double plastic_strain_amplitude; /* measured, ratio */
    double cycles;                   /* to failure, or to the stop of a run-out */
    bool runout;
    size_t line; /* in the file, 0: none */
} nw_coupon;

/* A table of specimens. Plain values; `tests` is owned by whoever filled it. */
typedef struct nw_coupons {
    char file[256]; /* "" : none */
    nw_coupon *tests;
    size_t count;
    nw_cautions cautions;
} nw_coupons;

typedef struct nw_coupon_options {
    double youngs_modulus_mpa; /* NAN: unknown; else stress/E is checked against the strain */
    char decimal;              /* '.' (also 0) or ',' */
} nw_coupon_options;

/* Reads CSV, TSV or blank-separated text with a header, UTF-8, LF or CRLF, '#' comments. Columns, units in
 * brackets ("strain_amplitude[%]"):
 *   strain_amplitude, plastic_strain_amplitude   ratio where no unit is given; 0 < plastic <= total < 0.2
 *   stress_amplitude[UNIT]                       the unit is required ("stress_amplitude_mpa" is MPa)
 *   cycles or reversals                          life, above 0
 *   runout                                       0 or 1 (absent: 0)
 *   id                                           a name of at most 31 bytes, once (absent: the row number)
 * A life and at least one amplitude are needed; a field of plastic_strain_amplitude may be empty. Other
 * columns are not read, which a caution says. All faults found in one run go to `diagnostics`, each with file,
 * line and column.
 *   coupons  clear with nw_coupons_clear() whatever is returned
 * Returns NW_OK, NW_INPUT, NW_FILE or NW_MEMORY. */
NW_API nw_status nw_coupons_read(const char *path, const nw_coupon_options *options,
                                 nw_coupons *coupons, nw_diagnostics *diagnostics);

NW_API void nw_coupons_clear(nw_coupons *coupons);

/* ---- a line by least squares ---- */

/* y = a + b x fitted by least squares, y being the dependent variable (for fatigue: log10 life; ASTM E739-10,
 * sec. 8): b = Sxy/Sxx, a = ymean - b xmean, sd^2 = sum(y - a - b x)^2/(n - 2). Limits are two-sided by
 * Student's t with n - 2 degrees of freedom.
 * Linearity: F = [sum m_i (a + b xmean_i - ymean_i)^2/(l - 2)] / [sum sum (y_ij - ymean_i)^2/(n - l)] over l
 * levels of m_i points, against the 95 % point of F(l - 2, n - l); a larger F speaks against a straight line.
 * Numbers that do not exist (no replicates, two points) are NAN. */
typedef struct nw_line {
    size_t points, levels;
    double a, b;
    double a_standard_error, b_standard_error, a_b_covariance;
    double a_low, a_high, b_low, b_high;
    double sd;
    double degrees; /* n - 2 */
    double confidence;
    double x_mean, y_mean, sxx, x_min, x_max;
    double f_linearity, f_critical, f_degrees[2];
    double replication_percent; /* 100 (1 - l/n) */
} nw_line;

/* Fits a line.
 *   x, y        [count]
 *   level       [count] number of the level each point belongs to, from 0; NULL: equal x are a level
 *   confidence  of the limits, in (0, 1)
 * Returns NW_OK; NW_COMPUTE with fewer than two points or two different x; NW_MEMORY. */
NW_API nw_status nw_line_fit(const double *x, const double *y, const size_t *level, size_t count,
                             double confidence, nw_line *line);

/* Band that holds the whole line with the given confidence (ASTM E739-10, eq. for the confidence band):
 *   a + b x -+ sqrt(2 F_p(2, n - 2)) sd sqrt(1/n + (x - xmean)^2/Sxx).
 *   half_width  receives the half-width in y; NAN with fewer than three points
 * Returns the line's y at x. */
NW_API double nw_line_band(const nw_line *line, double x, double confidence, double *half_width);

/* The x at which the line takes the value y, with two-sided limits by Fieller's theorem (J. R. Stat. Soc. B 16
 * (1954) 175): all x for which y is within t standard errors of the line. limits[0] and limits[1] are infinite
 * where the slope is not known well enough to close them. */
NW_API double nw_line_inverse(const nw_line *line, double y, double limits[2]);

/* ---- tolerance ---- */

/* Distribution function of Student's noncentral t, P(T <= t), by Gauss-Legendre quadrature of
 *   integral of Phi(t u - delta) f(u) du,  u^2 = chi-square/degrees;  absolute error below 1e-12. */
NW_API double nw_noncentral_t(double t, double degrees, double delta);

/* One-sided tolerance factor k: with confidence `confidence`, at least the share `survival` of a normal
 * population lies above  estimate - k s  (Owen, Technometrics 10 (1968) 445, for a fitted line):
 *   k = t'_confidence(degrees; z_survival/sqrt(h)) sqrt(h)
 *   leverage  h: variance of the estimate in units of s^2; 1/n for a mean, 1/n + (x - xmean)^2/Sxx on a line
 *   degrees   of s: n - 1 for a mean, n - 2 for a line
 * Accuracy 1e-9. NAN for arguments outside (0,1), (0,1), > 0, > 0. */
NW_API double nw_tolerance_factor(double survival, double confidence, double leverage,
                                  double degrees);

/* ---- censored regression ---- */

typedef enum nw_distribution { NW_LOG_NORMAL, NW_WEIBULL } nw_distribution;

NW_API const char *nw_distribution_name(nw_distribution distribution);

enum { NW_REGRESSION_MOST = 8 };

/* ln(life) = beta_0 + beta_1 x + ... + sigma Z, with Z standard normal (log-normal life) or smallest extreme
 * value (Weibull life), ln(sigma) = gamma_0 + gamma_1 x + ...; Meeker & Escobar, Statistical Methods for
 * Reliability Data, Wiley 1998, ch. 17. Coefficients: beta, then gamma. */
typedef struct nw_regression {
    size_t count; /* of coefficients */
    double coefficient[NW_REGRESSION_MOST];
    double standard_error[NW_REGRESSION_MOST];
    double covariance[NW_REGRESSION_MOST * NW_REGRESSION_MOST]; /* row after row */
    double log_likelihood;                                      /* of the lives, in their unit */
    double aic;                                                 /* 2 count - 2 log_likelihood */
} nw_regression;

/* Fits it by maximum likelihood. A run-out contributes the probability to survive its life. The score equations
 * are solved by KINSOL with the analytic matrix of second derivatives; standard errors come from the
 * observed information.
 *   x, life, runout   [count]; life > 0, any unit
 *   location_degree   of the polynomial for the location (1: straight line)
 *   scatter_degree    of the polynomial for ln(sigma) (0: constant)
 * Returns NW_OK; NW_INPUT when there are not more failures than location coefficients; NW_COMPUTE when no maximum
 * is found (for example when the points lie on the curve); NW_MEMORY. */
NW_API nw_status nw_censored_regression(const double *x, const double *life, const bool *runout,
                                        size_t count, size_t location_degree, size_t scatter_degree,
                                        nw_distribution distribution, nw_regression *result,
                                        nw_diagnostics *diagnostics);

/* ---- the fit of coupon tests ---- */

typedef enum nw_fit_method { NW_FIT_BY_TESTS, NW_FIT_LINES, NW_FIT_LIKELIHOOD } nw_fit_method;
typedef enum nw_scatter_model { NW_SCATTER_CONSTANT, NW_SCATTER_GROWING } nw_scatter_model;

NW_API const char *nw_fit_method_name(nw_fit_method method);
NW_API const char *nw_scatter_model_name(nw_scatter_model model);

enum { NW_FIT_LEVELS_MOST = 16, NW_FIT_GRID = 41, NW_FIT_PLAN_MOST = 60 };

typedef struct nw_fit_options {
    double
        youngs_modulus_mpa; /* NAN: from the tests, where stress and plastic strain were measured */
    nw_fit_method method;   /* NW_FIT_BY_TESTS: likelihood when there are run-outs, else lines */
    nw_distribution distribution; /* of the likelihood */
    nw_scatter_model scatter;
    double least_plastic_strain; /* smaller plastic strain amplitudes are left out of the lines */
    double
        level_width; /* relative width of a level; NAN: 2 % of strain or stress, 15 % of plastic strain */
    double limits;                         /* confidence of two-sided limits */
    double percentile[NW_FIT_LEVELS_MOST]; /* shares failed, in (0,1) */
    size_t percentile_count;
    double survival[NW_FIT_LEVELS_MOST], confidence[NW_FIT_LEVELS_MOST]; /* of tolerance curves */
    size_t survival_count, confidence_count;
    double
        cyclic_disagreement_limit; /* relative stress between direct and compatible cyclic curve */
    const char *const *drop;       /* ids to leave out */
    size_t drop_count;
    bool profile;       /* profile-likelihood limits */
    double plan_cycles; /* life at which the 50 % curve is wanted narrower; NAN: no plan */
    size_t plan_tests;  /* further tests to place, at most NW_FIT_PLAN_MOST */
} nw_fit_options;

/* Defaults: method by tests, log-normal, constant scatter, 1e-4 least plastic strain, 95 % limits, percentiles
 * 10, 50, 90 %, tolerance at 90 % and 99 % survival with 95 % confidence, disagreement limit 5 %, 10 tests to plan. */
NW_API nw_fit_options nw_fit_options_default(void);

/* A test that a line does not use. */
typedef struct nw_fit_left_out {
    size_t test;        /* index into the coupons */
    const char *reason; /* static text */
} nw_fit_left_out;

/* One fitted line: log10 N on log10 amplitude, or log10 stress on log10 plastic strain. */
typedef struct nw_fit_line {
    bool available;
    char why[160]; /* when not available */
    nw_line line;
    nw_fit_left_out *left_out;
    size_t left_out_count;
} nw_fit_line;

/* A parameter: NAN where it does not exist; limits infinite or NAN where they do not close. `from` says what it
 * rests on ("lines", "likelihood", "direct", "compatibility") and how its limits were found. */
typedef struct nw_fit_parameter {
    double value, standard_error, low, high;
    double profile_low, profile_high; /* NAN unless asked for */
    const char *from, *limits_by;
} nw_fit_parameter;

typedef enum nw_fit_parameter_index {
    NW_FIT_STRENGTH_COEFFICIENT,  /* sf' [MPa] */
    NW_FIT_STRENGTH_EXPONENT,     /* b */
    NW_FIT_DUCTILITY_COEFFICIENT, /* ef' */
    NW_FIT_DUCTILITY_EXPONENT,    /* c */
    NW_FIT_CYCLIC_COEFFICIENT,    /* K' [MPa] */
    NW_FIT_CYCLIC_EXPONENT,       /* n' */
    NW_FIT_PARAMETERS
} nw_fit_parameter_index;

/* Keys of the parameters in JSON and material files ("fatigue_strength_coefficient_mpa", ...). */
NW_API const char *nw_fit_parameter_key(nw_fit_parameter_index index);

/* The whole strain-life curve by maximum likelihood: the total strain amplitude as given, ln(2N) = w(ea) + sigma
 * Z with w the root of the strain-life curve and Z centred at its median, so that the parameters are
 * those of the 50 % curve; ln(sigma) = theta[4] + theta[5] (w - ln 2 reference_cycles).
 * theta: ln(sf'/E), b, ln ef', c, ln(sigma) at reference_cycles, and its slope (growing scatter only). */
typedef struct nw_likelihood {
    bool available;
    char why[160];
    nw_distribution distribution;
    nw_scatter_model scatter;
    size_t parameters, failures, runouts;
    double theta[6], covariance[36]; /* covariance: parameters x parameters, row after row */
    double reference_cycles;         /* geometric mean of the lives */
    double log10_life_sd;  /* of log10 life at reference_cycles, as the likelihood has it */
    double log_likelihood; /* of the lives in cycles */
    double aic;
} nw_likelihood;

/* One point of a fitted curve; limits are those of the curve, two-sided. */
typedef struct nw_fit_point {
    double strain_amplitude, cycles, low, high;
} nw_fit_point;

typedef struct nw_fit_curve {
    bool
        tolerance; /* one-sided: `cycles` is survived by `survival` with `confidence`; no low, high */
    double survival;   /* 1 - share failed */
    double confidence; /* tolerance only, else NAN */
    nw_fit_point points[NW_FIT_GRID];
} nw_fit_curve;

/* A test whose residual is too large for its company. */
typedef struct nw_fit_outlier {
    size_t test;
    double residual;    /* of log10 life about the 50 % curve or line */
    double studentised; /* by the scatter without this test */
    double critical;    /* two-sided 5 % over all tests (Bonferroni) */
    const char *about;  /* "curve", "plastic line", "elastic line" */
} nw_fit_outlier;

/* Further tests at one amplitude. */
typedef struct nw_fit_plan_row {
    double strain_amplitude, cycles; /* life expected there */
    size_t tests;
} nw_fit_plan_row;

typedef struct nw_fit_plan {
    bool available;
    char why[160];
    double cycles, strain_amplitude;           /* life asked for, and the 50 % curve there */
    double factor_now;                         /* limits of life: divided and multiplied by this */
    double factor_after[NW_FIT_PLAN_MOST + 1]; /* [tests added] */
    size_t tests;
    nw_fit_plan_row rows[NW_FIT_PLAN_MOST];
    size_t row_count;
} nw_fit_plan;

typedef struct nw_fit {
    nw_fit_options options; /* in use; pointers cleared */
    nw_fit_method method;   /* that the parameters come from */
    double youngs_modulus_mpa;
    bool modulus_from_tests;
    size_t tests, failures, runouts, levels, least_replicates, dropped_count;
    size_t *dropped; /* indices of the tests left out on request */
    size_t plastic_measured, plastic_computed;
    double replication_percent;
    const char *verdict; /* what so many tests and replicates are customarily good for */
    double life_min, life_max, strain_min, strain_max; /* tested: failures; all tests */
    nw_fit_line plastic, elastic, cyclic;
    double compatible_coefficient_mpa, compatible_exponent; /* K', n' from compatibility */
    double
        cyclic_disagreement; /* largest |sa_direct/sa_compatible - 1| over the tested plastic strains */
    nw_likelihood likelihood;    /* of the model asked for */
    nw_likelihood candidates[4]; /* both distributions, both scatter models */
    nw_fit_parameter parameter[NW_FIT_PARAMETERS];
    double theta[4],
        covariance[16]; /* ln sf' [MPa], b, ln ef', c of the method; NAN when not all exist */
    double log10_life_sd, log10_life_sd_low, log10_life_sd_high;
    double
        log10_life_sd_corrected; /* likelihood: times sqrt(n/(n - p)); lines: the same as log10_life_sd */
    double degrees;              /* of the scatter */
    double scatter_slope;        /* d ln(sd)/d log10 N; 0: constant */
    nw_fit_curve *curves;
    size_t curve_count;
    nw_fit_outlier *outliers;
    size_t outlier_count;
    nw_fit_plan plan;
    nw_cautions cautions;
} nw_fit;

/* Fits coupon tests.
 *   result  NULL on failure; free with nw_fit_free()
 * Limits: lines by Student's t (coefficients by Fieller's theorem), exact when log life is normal about the line;
 * likelihood: value -+ t(n - p) times the standard error times sqrt(n/(n - p)), n failures, p parameters, in the
 * scale of theta, where `standard_error` itself is that of the information matrix.
 * Returns NW_OK, NW_INPUT (one level, no failure, unknown id to drop, modulus missing), NW_COMPUTE (the method
 * asked for finds no curve) or NW_MEMORY. */
NW_API nw_status nw_fit_coupons(const nw_coupons *coupons, const nw_fit_options *options,
                                nw_fit **result, nw_diagnostics *diagnostics);

NW_API void nw_fit_free(nw_fit *result);

/* Life in cycles of a curve of the fit at a strain amplitude, with two-sided limits at `confidence`.
 *   survival  share that lives longer (0.5: the 50 % curve)
 *   limits    [2] receives low and high; may be NULL
 * NAN when the fit has no whole curve. */
NW_API double nw_fit_life(const nw_fit *fit, double strain_amplitude, double survival,
                          double confidence, double *limits);

/* The fit as a material (basis tested), without name and group. NW_INPUT when a parameter is missing. */
NW_API nw_status nw_fit_material(const nw_coupons *coupons, const nw_fit *fit,
                                 nw_material *material, nw_diagnostics *diagnostics);

/* ---- written down ---- */

/* The material file: nw_material_write() and a section `fit` with method and covariance of the parameters. */
NW_API nw_status nw_fit_write_material(FILE *to, const nw_fit *fit, const nw_material *material);

/* For a person to read. */
NW_API nw_status nw_write_fit_text(FILE *to, const nw_coupons *coupons, const nw_fit *fit);

/* One object, format "notchwright.fit/1"; stress in MPa, strain as a ratio, life in cycles; numbers that do not
 * exist are null. Returns NW_OK, NW_MEMORY or NW_FILE. */
NW_API nw_status nw_write_fit_json(FILE *to, const nw_coupons *coupons, const nw_fit *fit);

/* The curves, one point a row. */
NW_API nw_status nw_write_fit_csv(FILE *to, const nw_fit *fit);

#ifdef __cplusplus
}
#endif
#endif
