/* Manson and Halford: the mean stress lowers both terms,
 * ea = ((sf'-sm)/E)(2N)^b + ef' ((sf'-sm)/sf')^(c/b) (2N)^c, which is N = N0(ea) (1 - sm/sf')^(-1/b). */
#include "life/corrections.h"

static void prepare(const nw_strain_life *curve, double walker_gamma, const nw_loop *loops,
                    size_t count, double *y, double *factor)
{
    (void)walker_gamma;
    double exponent = 1.0 / curve->fatigue_strength_exponent;
    for (size_t i = 0; i < count; i++) {
        double u = 1.0 - nw_loop_stress_mean(&loops[i]) / curve->fatigue_strength_coefficient_mpa;
        y[i] = nw_loop_strain_amplitude(&loops[i]);
        factor[i] = u > 0.0 ? pow(u, exponent) : INFINITY;
    }
}

const nw_correction nw_correction_manson_halford = {
    .key = "manson_halford",
    .title = "Manson-Halford",
    .equation = "ea = ((sf'-sm)/E)(2N)^b + ef' ((sf'-sm)/sf')^(c/b) (2N)^c",
    .reference = "Manson & Halford, Int. J. Fract. 17 (1981) 169 (from memory)",
    .terms = nw_strain_terms,
    .prepare = prepare,
};
