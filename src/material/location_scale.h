/* Maximum likelihood of log life with location and scale that depend on parameters, run-outs as censored
 * observations. Internal: regression and the strain-life curve are two models of it. */
#ifndef NW_MATERIAL_LOCATION_SCALE_H
#define NW_MATERIAL_LOCATION_SCALE_H

#include "notchwright/fit.h"

enum { NW_LS_MOST = NW_REGRESSION_MOST };

/* Location mu and log-scale s of one observation, with first and second derivatives by the parameters
 * (row after row in steps of NW_LS_MOST). */
typedef struct nw_ls_point {
    double mu, s;
    double mu1[NW_LS_MOST], s1[NW_LS_MOST];
    double mu2[NW_LS_MOST * NW_LS_MOST], s2[NW_LS_MOST * NW_LS_MOST];
} nw_ls_point;

typedef struct nw_ls_problem {
    size_t count, parameters;
    const double *log_life; /* natural logarithm */
    const bool *runout;
    nw_distribution distribution;
    double centre; /* Z is shifted so that mu is where the standard variable has this value */
    /* False where the model does not exist. `point` is zeroed before the first call of a run. */
    bool (*model)(const void *data, size_t index, const double *theta, nw_ls_point *point);
    const void *data;
    bool fixed[NW_LS_MOST]; /* parameters that are held */
} nw_ls_problem;

/* Log-likelihood of log_life (density of the logarithm), with gradient[parameters] and
 * hessian[parameters^2]; -INFINITY where the model does not exist. */
double nw_ls_evaluate(const nw_ls_problem *problem, const double *theta, double *gradient,
                      double *hessian);

/* Climbs from theta by damped Newton steps; *value receives the log-likelihood reached. False when no maximum
 * comes near. */
bool nw_ls_climb(const nw_ls_problem *problem, double *theta, double *value);

/* Solves the score equations from a climbed theta by KINSOL. NW_OK with the root a maximum; NW_COMPUTE;
 * NW_MEMORY. */
nw_status nw_ls_solve(const nw_ls_problem *problem, double *theta, double *value);

/* Inverse of the observed information of all parameters. */
bool nw_ls_covariance(const nw_ls_problem *problem, const double *theta, double *covariance);

/* Value below which a share p of the standard variable lies, before centring. */
double nw_ls_standard_quantile(nw_distribution distribution, double p);

/* Standard deviation of the standard variable. */
double nw_ls_standard_sd(nw_distribution distribution);

#endif
