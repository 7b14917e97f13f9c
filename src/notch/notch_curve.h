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

/* {stress, strain} at load >= 0 of a curve made of bins. */
static inline nw_pair nw_notch_curve_in_bins(const nw_bin_table *bins, double compliance,
                                             double load)
{
    int64_t bin = (int64_t)nw_bin_of(bins, load);
    bin = bin < 0 ? 0 : bin;
    nw_pair scale = {load, load * compliance};
    return scale * nw_bin_polynomial_pair(bins->coefficients + bin * 2 * NW_BIN_COEFFICIENTS,
                                          nw_bin_position(bins, load));
}

/* {stress, strain} at load >= 0. */
static inline nw_pair nw_notch_curve_positive(const nw_notch_curve *curve, double load)
{
    if (curve->points == 0) {
        return nw_notch_curve_in_bins(&curve->bins, curve->compliance, load);
    }
    double stress, strain;
    nw_notch_curve_at_table(curve, load, &stress, &strain);
    return (nw_pair){stress, strain};
}

#endif
