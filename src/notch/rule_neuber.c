/* Neuber's rule: the product of stress and strain is that of the elastic notch, s e = L^2/E.
 * With a plastic net section the nominal response lies on the cyclic curve too: s e = K^2 S e(S). */
#include "notch/rules.h"

#include <math.h>

static void residual(const nw_rule_input *input, double load_mpa, double x, double y,
                     double *residual, double derivative[2])
{
    double nominal = 0.0;
    if (input->plastic_net_section) {
        nominal = log1p(nw_plastic_ratio(input, load_mpa / input->factor));
    }
    *residual = x + y - nominal;
    derivative[0] = 1.0;
    derivative[1] = 1.0;
}

const nw_notch_rule nw_notch_rule_neuber = {
    .key = "neuber",
    .title = "Neuber",
    .equation = "s e = L^2/E  (plastic net section: s e = K^2 S e(S))",
    .reference = "Neuber, J. Appl. Mech. 28 (1961) 544; Topper, Wetzel & Morrow, J. Materials 4 "
                 "(1969) 200",
    .takes_plastic_net_section = true,
    .residual = residual,
};
