/* Linear rule: the strain is that of the elastic notch, e = L/E; the stress follows from the cyclic curve.
 * It is also what a strain gauge at the root means, with L = E times the measured strain. */
#include "notch/rules.h"

static void residual(const nw_rule_input *input, double load_mpa, double x, double y,
                     double *residual, double derivative[2])
{
    (void)input;
    (void)load_mpa;
    (void)x;
    *residual = y;
    derivative[0] = 0.0;
    derivative[1] = 1.0;
}

const nw_notch_rule nw_notch_rule_linear = {
    .key = "linear",
    .title = "Linear (strain concentration as elastic)",
    .equation = "e = L/E",
    .reference =
        "Stephens, Fatemi, Stephens & Fuchs, Metal Fatigue in Engineering, 2nd ed., Wiley 2001",
    .residual = residual,
};
