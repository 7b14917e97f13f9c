/* Walker in strain form: with k = (1-R)/2 = sa/smax, ea = (sf'/E) k^(1-g) (2N)^b + ef' k^(c(1-g)/b) (2N)^c,
 * which is N = N0(ea) k^(-(1-g)/b); no damage for smax <= 0, the limit of k -> infinity. */
#include "life/corrections.h"

static void prepare(const nw_strain_life *curve, double walker_gamma, const nw_loop *loops,
                    size_t count, double *y, double *factor)
{
    double exponent = (1.0 - walker_gamma) / curve->fatigue_strength_exponent;
    for (size_t i = 0; i < count; i++) {
        double stress_max = nw_loop_stress_max(&loops[i]);
        double amplitude = stress_max - nw_loop_stress_mean(&loops[i]);
        y[i] = nw_loop_strain_amplitude(&loops[i]);
        factor[i] = stress_max > 0.0 ? pow(amplitude / stress_max, exponent) : 0.0;
    }
}

const nw_correction nw_correction_walker = {
    .key = "walker",
    .title = "Walker",
    .equation = "ea = (sf'/E) k^(1-g) (2N)^b + ef' k^(c(1-g)/b) (2N)^c, k = (1-R)/2",
    .reference = "Walker, ASTM STP 462 (1970) 1; strain form: Dowling, Fatigue Fract. Eng. Mater. "
                 "Struct. 32 (2009) 1004",
    .uses_walker_gamma = true,
    .terms = nw_strain_terms,
    .prepare = prepare,
};
