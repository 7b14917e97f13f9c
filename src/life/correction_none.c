/* No mean-stress correction: the strain-life curve as tested at zero mean. */
#include "life/corrections.h"

nw_two_terms nw_strain_terms(const nw_strain_life *c)
{
    return (nw_two_terms){c->fatigue_strength_coefficient_mpa / c->youngs_modulus_mpa,
                          c->fatigue_strength_exponent, c->fatigue_ductility_coefficient,
                          c->fatigue_ductility_exponent};
}

static void prepare(const nw_strain_life *curve, double walker_gamma, const nw_loop *loops,
                    size_t count, double *y, double *factor)
{
    (void)curve;
    (void)walker_gamma;
    for (size_t i = 0; i < count; i++) {
        y[i] = nw_loop_strain_amplitude(&loops[i]);
        factor[i] = 1.0;
    }
}

const nw_correction nw_correction_none = {
    .key = "none",
    .title = "None",
    .equation = "ea = (sf'/E)(2N)^b + ef'(2N)^c",
    .reference =
        "Basquin, Proc. ASTM 10 (1910); Manson, NACA TN 2933 (1953); Coffin, Trans. ASME 76 "
        "(1954)",
    .terms = nw_strain_terms,
    .prepare = prepare,
};
