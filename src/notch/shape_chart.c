/* Polynomials fitted to the charts of Peterson and Roark. */
#include "notch/shapes.h"

#include <math.h>

const char nw_chart_equation[] =
    "Kt = C1 + C2 x + C3 x^2 + C4 x^3, Ci = a + b sqrt(t/r) + c t/r by ranges of t/r; x = 2t/D or "
    "2t/W, t/W for a notch in one edge";
const char nw_chart_equation_plain[] =
    "Kt = C1 + C2 x + C3 x^2 + C4 x^3, Ci = a + b t/r + c (t/r)^2 by ranges of t/r; x = 2t/D or "
    "2t/W, t/W for a notch in one edge";
const char nw_source_peterson[] =
    "fit to Peterson's chart (Pilkey & Pilkey, Peterson's Stress Concentration Factors, 3rd ed. "
    "2008)";
const char nw_source_peterson_memory[] =
    "fit to Peterson's chart (Pilkey & Pilkey, Peterson's Stress Concentration Factors, 3rd ed. "
    "2008; coefficients from memory)";
const char nw_source_roark[] =
    "Roark's Formulas for Stress and Strain, Table 17.1 (Young & Budynas, 7th ed. 2002)";
const char nw_source_roark_memory[] =
    "Roark's Formulas for Stress and Strain, Table 17.1 (Young & Budynas, 7th ed. 2002; "
    "coefficients from memory)";

double nw_chart_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    const nw_chart *chart = formula->chart;
    double q = nw_ratio_depth_radius(sizes), x = chart->x(sizes);
    int branch = chart->branches[1].high > 0.0 && q > chart->branches[0].high;
    double p = chart->plain ? q : sqrt(q), kt = 0.0;
    for (int i = 3; i >= 0; i--) {
        const double *c = chart->branches[branch].c[i];
        kt = kt * x + c[0] + p * (c[1] + p * c[2]);
    }
    return kt;
}
