/* Seeger and Beste: with u = (pi/2)(L/s - 1)/(Kp - 1) and e* = L/(Kp E) + (L/(Kp K'))^(1/n'),
 *   e = (s/E) [(L/s)^2 (2/u^2) ln(1/cos u) + 1 - L/s] (e* E Kp/L).
 * The root lies between L/Kp, where u = pi/2 and the strain is without limit, and L, where u = 0. */
#include "notch/rules.h"

#include <math.h>

static const double half_pi = 1.57079632679489661923;

/* u/(pi/2) up to which the equation is used as it stands: past it, and so past the pole, a straight line goes
 * on, which brings Newton's method back. */
static const double last_share = 1.0 - 1e-3;

/* Kp from 1 to here: the notch yields with its section, s = L. */
static const double no_notch = 1e-6;

/* (2/u^2) ln(1/cos u) and its derivative by u; series where u is small. */
static double pole(double u, double *slope)
{
    if (u < 1e-2) {
        double u2 = u * u;
        *slope = u * (1.0 / 3.0 + u2 * (8.0 / 45.0 + u2 * 17.0 / 210.0));
        return 1.0 + u2 * (1.0 / 6.0 + u2 * (2.0 / 45.0 + u2 * 17.0 / 1260.0));
    }
    double value = -2.0 * log(cos(u)) / (u * u);
    *slope = 2.0 * (tan(u) / u - value) / u;
    return value;
}

/* ln of the bracket at x = ln(s/L), and its derivative by x. */
static double log_bracket(double x, double kp, double *slope)
{
    double r = exp(-x), share = (r - 1.0) / (kp - 1.0), g_slope;
    double u = share > 0.0 ? half_pi * share : 0.0;
    double g = pole(u, &g_slope);
    double value = r * r * g + 1.0 - r;
    double u_slope = share > 0.0 ? -half_pi * r / (kp - 1.0) : 0.0;
    *slope = (-2.0 * r * r * g + r * r * g_slope * u_slope + r) / value;
    return log(value);
}

static void residual(const nw_rule_input *input, double load_mpa, double x, double y,
                     double *residual, double derivative[2])
{
    double kp = input->limit_load_ratio;
    if (kp <= 1.0 + no_notch) {
        *residual = x;
        derivative[0] = 1.0;
        derivative[1] = 0.0;
        return;
    }
    double lowest = -log1p(last_share * (kp - 1.0)), slope;
    double bracket = log_bracket(x < lowest ? lowest : x, kp, &slope);
    bracket += x < lowest ? slope * (x - lowest) : 0.0;
    *residual = y - x - bracket - log1p(nw_plastic_ratio(input, load_mpa / kp));
    derivative[0] = -1.0 - slope;
    derivative[1] = 1.0;
}

const nw_notch_rule nw_notch_rule_seeger_beste = {
    .key = "seeger_beste",
    .title = "Seeger-Beste",
    .equation =
        "e = (s/E) [(L/s)^2 (2/u^2) ln(1/cos u) + 1 - L/s] (e* E Kp/L), u = (pi/2)(L/s - 1)/(Kp "
        "- 1), e* = L*/E + (L*/K')^(1/n'), L* = L/Kp",
    .reference = "Seeger & Beste, VDI-Fortschrittberichte 18 no. 2 (1977) (form from memory, not "
                 "re-read: doubtful; its limits were checked)",
    .needs_limit_load_ratio = true,
    .residual = residual,
};
