/* The notch curve's inside, for the loops that ask it millions of times. */
#ifndef NW_NOTCH_CURVE_H
#define NW_NOTCH_CURVE_H

#include "base/bin_table.h"
#include "notchwright/notch.h"

struct nw_notch_curve {
    double load_max_mpa;
    double compliance; /* 1/E */
    nw_bin_table bins; /* two functions of L: s/L and e E/L; the first bin holds every smaller L */
    /* rule "curve" */
    size_t points;
    double *load, *stress, *strain, *stress_slope, *strain_slope;
};

void nw_notch_curve_at_table(const nw_notch_curve *curve, double load, double *stress,
                             double *strain);

/* Stress and strain at load >= 0. */
static inline void nw_notch_curve_positive(const nw_notch_curve *curve, double load, double *stress,
                                           double *strain)
{
    if (curve->points > 0) {
        nw_notch_curve_at_table(curve, load, stress, strain);
        return;
    }
    int64_t bin = (int64_t)nw_bin_of(&curve->bins, load);
    bin = bin < 0 ? 0 : bin;
    double t = nw_bin_position(&curve->bins, load);
    const double *c = curve->bins.coefficients + bin * 2 * NW_BIN_COEFFICIENTS;
    *stress = load * nw_bin_polynomial(c, t);
    *strain = load * curve->compliance * nw_bin_polynomial(c + NW_BIN_COEFFICIENTS, t);
}

#endif
