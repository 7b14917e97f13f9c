/* Morrow: the mean stress lowers the elastic term, ea = ((sf'-sm)/E)(2N)^b + ef'(2N)^c.
 * With u = 1 - sm/sf' and X = X0 u^(-1/(b-c)) the equation is the plain one at ea u^(c/(b-c)), so
 * 1/N(ea, sm) = u^(1/(b-c)) / N0(ea u^(c/(b-c))). */
#include "life/corrections.h"

static void prepare(const nw_strain_life *curve, double walker_gamma, const nw_loop *loops,
                    size_t count, double *y, double *factor)
{
    (void)walker_gamma;
    double b = curve->fatigue_strength_exponent, c = curve->fatigue_ductility_exponent;
    for (size_t i = 0; i < count; i++) {
        double u = 1.0 - nw_loop_stress_mean(&loops[i]) / curve->fatigue_strength_coefficient_mpa;
        y[i] = nw_loop_strain_amplitude(&loops[i]);
        factor[i] = INFINITY;
        if (u > 0.0) {
            double log_u = log(u) / (b - c);
            y[i] *= exp(c * log_u);
            factor[i] = exp(log_u);
        }
    }
}

const nw_correction nw_correction_morrow = {
    .key = "morrow",
    .title = "Morrow",
    .equation = "ea = ((sf'-sm)/E)(2N)^b + ef'(2N)^c",
    .reference = "Morrow, in: SAE Fatigue Design Handbook AE-4 (1968) 21",
    .terms = nw_strain_terms,
    .prepare = prepare,
};
