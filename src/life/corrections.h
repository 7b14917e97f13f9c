/* The mean-stress records, one file each, and the terms most of them share. */
#ifndef NW_LIFE_CORRECTIONS_H
#define NW_LIFE_CORRECTIONS_H

#include "notchwright/life.h"

#include <math.h>

extern const nw_correction nw_correction_none;
extern const nw_correction nw_correction_morrow;
extern const nw_correction nw_correction_manson_halford;
extern const nw_correction nw_correction_swt;
extern const nw_correction nw_correction_walker;

/* The plain strain-life curve as two terms. */
nw_two_terms nw_strain_terms(const nw_strain_life *curve);

static inline double nw_loop_strain_amplitude(const nw_loop *loop)
{
    return 0.5 * fabs(loop->start.strain - loop->tip.strain);
}

static inline double nw_loop_stress_max(const nw_loop *loop)
{
    double a = loop->start.stress_mpa, b = loop->tip.stress_mpa;
    return a > b ? a : b;
}

static inline double nw_loop_stress_mean(const nw_loop *loop)
{
    return 0.5 * (loop->start.stress_mpa + loop->tip.stress_mpa);
}

#endif
