/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Life of a loop: strain-life curve, mean-stress correction, endurance, surface and survival; damage as the
 * Palmgren-Miner sum.
 */
#ifndef NOTCHWRIGHT_LIFE_H
#define NOTCHWRIGHT_LIFE_H

#include "notchwright/material.h"
#include "notchwright/response.h"

#ifdef __cplusplus
extern "C" {
#endif

/* The strain-life curve used, after surface factor: ea = (sf'/E)(2N)^b + ef'(2N)^c. */
typedef struct nw_strain_life {
    double youngs_modulus_mpa;
    double fatigue_strength_coefficient_mpa;
    double fatigue_strength_exponent;
    double fatigue_ductility_coefficient;
    double fatigue_ductility_exponent;
} nw_strain_life;

/* A curve of two power terms in reversals, y = a X^p + b X^q with X = 2N, q < p < 0. */
typedef struct nw_two_terms {
    double a, p, b, q;
} nw_two_terms;

/* Solves y = a X^p + b X^q for X > 0 by Newton's method in the logarithm of the ratio of the terms; the
 * equation is convex and the start is on the side from which the steps are monotone. y > 0.
 * Returns X (0 or infinity only where that is the double nearest to it). */
NW_API double nw_two_terms_reversals(const nw_two_terms *terms, double y);

/* A mean-stress correction: turns a loop into the argument y of a two-term curve and a factor on 1/N. */
typedef struct nw_correction {
    const char *key;   /* "swt" */
    const char *title; /* "Smith-Watson-Topper" */
    const char *equation;
    const char *reference;
    bool uses_walker_gamma;
    nw_two_terms (*terms)(const nw_strain_life *curve);
    /* For each loop: y[i] and factor[i] on 1/N(y); factor 0: no damage; factor infinite: fails in the first
     * cycle. */
    void (*prepare)(const nw_strain_life *curve, double walker_gamma, const nw_loop *loops,
                    size_t count, double *y, double *factor);
} nw_correction;

NW_API const nw_correction *nw_correction_at(size_t index);
NW_API const nw_correction *nw_correction_find(const char *key);

typedef enum nw_below_endurance {
    NW_DAMAGES,
    NW_HARMLESS,
    NW_HARMLESS_UNTIL_EXCEEDED
} nw_below_endurance;

NW_API const char *nw_below_endurance_name(nw_below_endurance mode);

typedef struct nw_life_options {
    const nw_correction *correction;
    double walker_gamma; /* for walker */
    nw_below_endurance below_endurance;
    double endurance_strain_amplitude; /* for the two harmless options */
    double surface_factor;             /* 1: none */
    double surface_reversals;          /* reversals at which the factor is reached */
    double life_factor;                /* on every life: survival; 1 for the median */
} nw_life_options;

/* Strain-life curve with the surface factor in its elastic term: the elastic amplitude is unchanged at one
 * reversal and reaches `surface_factor` times its value at `surface_reversals`, by
 *   b' = b + log10(factor)/log10(reversals)
 * (common practice, no single source). */
NW_API nw_strain_life nw_strain_life_of(const nw_material *material, double surface_factor,
                                        double surface_reversals);

/* Strain amplitude at a life in cycles. */
NW_API double nw_strain_life_amplitude(const nw_strain_life *curve, double cycles);

/* Walker's gamma estimated: for steels -0.0002 Su + 0.8818 (Dowling, Calhoun & Arcari, Fatigue Fract. Eng.
 * Mater. Struct. 32 (2009) 163; coefficients from memory), else 0.5. NAN for a steel of unknown
 * tensile strength. */
NW_API double nw_walker_gamma_estimated(const nw_material *material);

typedef struct nw_life nw_life;

/* Prepares life evaluation: a table of 1/N, within 1e-9 (relative) of the equation's root where the table
 * reaches, the root itself elsewhere.
 *   strain_max, stress_max_mpa   largest |strain| and |stress| expected; they set the table's range only
 * Returns NW_OK (free with nw_life_free), NW_COMPUTE or NW_MEMORY. */
NW_API nw_status nw_life_create(const nw_material *material, const nw_life_options *options,
                                double strain_max, double stress_max_mpa, nw_life **life,
                                nw_diagnostics *diagnostics);

/* 1/N of each loop (rates[count]); 0 where there is no damage. With NW_HARMLESS, loops below the endurance
 * strain amplitude get 0. NW_HARMLESS_UNTIL_EXCEEDED is the caller's to decide: it needs all loops.
 * A loop with sm >= sf' (morrow, manson_halford) gets 1: it fails in the first cycle. */
NW_API void nw_life_rates(const nw_life *life, const nw_loop *loops, size_t count, double *rates);

/* The same without the table, by solving: what the tests hold the table to. */
NW_API double nw_life_rate_solved(const nw_life *life, const nw_loop *loop);

/* The curve in use. */
NW_API nw_strain_life nw_life_curve(const nw_life *life);

NW_API void nw_life_free(nw_life *life);

/* Local values of a loop. */
typedef struct nw_loop_values {
    double load_max_mpa, load_min_mpa;
    double strain_amplitude, strain_mean;
    double stress_max_mpa, stress_min_mpa, stress_mean_mpa, stress_amplitude_mpa;
} nw_loop_values;

NW_API nw_loop_values nw_loop_values_of(const nw_loop *loop);

#ifdef __cplusplus
}
#endif
#endif
