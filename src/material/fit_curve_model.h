/* The strain-life curve as a model of location and scale. */
#ifndef NW_MATERIAL_FIT_CURVE_MODEL_H
#define NW_MATERIAL_FIT_CURVE_MODEL_H

#include "material/location_scale.h"

typedef struct nw_curve_data {
    const double *log_strain;
    double origin[2]; /* ln(2N) about which the elastic and the plastic line are written */
    double reference; /* ln(2N) at which theta[4] is ln sigma */
    bool growing;
} nw_curve_data;

bool nw_curve_model(const void *data, size_t index, const double *theta, nw_ls_point *point);

/* Profile-likelihood limits of the four parameters, into fit->parameter[].profile_low and _high.
 *   theta  the maximum, both lines about curve->reference
 * Returns NW_OK or NW_MEMORY. */
nw_status nw_fit_profile(const nw_ls_problem *problem, const nw_curve_data *curve,
                         const double *theta, nw_fit *fit);

#endif
