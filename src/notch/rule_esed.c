/* Equivalent strain energy density: the energy density at the root is that of the elastic notch,
 * s^2/(2E) + s/(n'+1) (s/K')^(1/n') = L^2/(2E); with a plastic net section K^2 times the nominal energy. */
#include "notch/rules.h"

#include <math.h>

static void residual(const nw_rule_input *input, double load_mpa, double x, double y,
                     double *residual, double derivative[2])
{
    (void)y;
    double share = 2.0 / (input->hardening_exponent + 1.0);
    double plastic = share * nw_plastic_ratio(input, load_mpa * exp(x));
    double nominal = 0.0;
    if (input->plastic_net_section) {
        nominal = log1p(share * nw_plastic_ratio(input, load_mpa / input->factor));
    }
    *residual = 2.0 * x + log1p(plastic) - nominal;
    double slope = 1.0 / input->hardening_exponent - 1.0;
    derivative[0] = 2.0 + slope * plastic / (1.0 + plastic);
    derivative[1] = 0.0;
}

const nw_notch_rule nw_notch_rule_esed = {
    .key = "esed",
    .title = "Equivalent strain energy density (Molski-Glinka)",
    .equation = "s^2/(2E) + s/(n'+1) (s/K')^(1/n') = L^2/(2E)  (plastic net section: K^2 times the "
                "nominal energy)",
    .reference = "Molski & Glinka, Mater. Sci. Eng. 50 (1981) 93",
    .takes_plastic_net_section = true,
    .residual = residual,
};
