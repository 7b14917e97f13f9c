/* Smith, Watson and Topper: smax ea = (sf'^2/E)(2N)^(2b) + sf' ef' (2N)^(b+c); no damage for smax <= 0. */
#include "life/corrections.h"

static nw_two_terms terms(const nw_strain_life *c)
{
    double sf = c->fatigue_strength_coefficient_mpa, b = c->fatigue_strength_exponent;
    return (nw_two_terms){sf * sf / c->youngs_modulus_mpa, 2.0 * b,
                          sf * c->fatigue_ductility_coefficient, b + c->fatigue_ductility_exponent};
}

static void prepare(const nw_strain_life *curve, double walker_gamma, const nw_loop *loops,
                    size_t count, double *y, double *factor)
{
    (void)curve;
    (void)walker_gamma;
    for (size_t i = 0; i < count; i++) {
        double product = nw_loop_stress_max(&loops[i]) * nw_loop_strain_amplitude(&loops[i]);
        y[i] = product;
        factor[i] = product > 0.0 ? 1.0 : 0.0;
    }
}

const nw_correction nw_correction_swt = {
    .key = "swt",
    .title = "Smith-Watson-Topper",
    .equation = "smax ea = (sf'^2/E)(2N)^(2b) + sf' ef' (2N)^(b+c)",
    .reference = "Smith, Watson & Topper, J. Materials 5 (1970) 767",
    .terms = terms,
    .prepare = prepare,
};
