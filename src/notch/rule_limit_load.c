/* Seeger and Heuler: Neuber's product with the net section's own yielding, s e = L Kp e*(L/Kp), where
 * Kp is the plastic limit load over the load at first yield of the notch. Kp -> infinity is Neuber. */
#include "notch/rules.h"

#include <math.h>

static void residual(const nw_rule_input *input, double load_mpa, double x, double y,
                     double *residual, double derivative[2])
{
    *residual = x + y - log1p(nw_plastic_ratio(input, load_mpa / input->limit_load_ratio));
    derivative[0] = 1.0;
    derivative[1] = 1.0;
}

const nw_notch_rule nw_notch_rule_limit_load = {
    .key = "limit_load",
    .title = "Limit load (Seeger-Heuler)",
    .equation = "s e = L Kp e*, e* = L*/E + (L*/K')^(1/n'), L* = L/Kp",
    .reference = "Seeger & Heuler, J. Test. Eval. 8 (1980) 199",
    .needs_limit_load_ratio = true,
    .residual = residual,
};
