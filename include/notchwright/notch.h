/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Notch rules and the notch curve they all end in: the odd, increasing pair of functions from the
 * pseudo-elastic notch stress L to local stress and strain at first loading.
 */
#ifndef NOTCHWRIGHT_NOTCH_H
#define NOTCHWRIGHT_NOTCH_H

#include "notchwright/material.h"
#include "notchwright/status.h"

#ifdef __cplusplus
extern "C" {
#endif

/* What a notch rule works on. */
typedef struct nw_rule_input {
    double youngs_modulus_mpa;
    double strength_coefficient_mpa; /* K' */
    double hardening_exponent;       /* n' */
    double factor;                   /* Kt or Kf: L = factor x nominal stress */
    double limit_load_ratio;  /* Kp: plastic limit load over load at first yield of the notch */
    bool plastic_net_section; /* nominal stress on the cyclic curve too */
} nw_rule_input;

/* A notch rule as one equation beside the cyclic curve, in the unknowns
 *   x = ln(s/L), y = ln(e E/L)   (both 0 while elastic). */
typedef struct nw_notch_rule {
    const char *key;      /* "neuber" */
    const char *title;    /* "Neuber" */
    const char *equation; /* in words and symbols, for output and docs */
    const char *reference;
    bool takes_plastic_net_section;
    bool needs_limit_load_ratio;
    bool is_table; /* the curve comes from a table, not from an equation */
    /* Residual and its derivatives (d/dx, d/dy) at load L > 0 [MPa]; NULL for a table. */
    void (*residual)(const nw_rule_input *input, double load_mpa, double x, double y,
                     double *residual, double derivative[2]);
} nw_notch_rule;

/* The records in the order shown; NULL past the last. */
NW_API const nw_notch_rule *nw_notch_rule_at(size_t index);

/* The record of a key, or NULL. */
NW_API const nw_notch_rule *nw_notch_rule_find(const char *key);

typedef struct nw_notch_curve nw_notch_curve;

/* Builds the notch curve of a rule for loads up to `load_max_mpa` > 0.
 *   rule   not a table
 *   curve  result; free with nw_notch_curve_free
 * Each knot is the root of the rule's equation and the cyclic curve (KINSOL); between knots a polynomial
 * is within 1e-9 (relative) of the root, checked while building. Below the load at which the plastic share
 * is 1e-12 the response is s = L, e = L/E.
 * Returns NW_OK, NW_COMPUTE with the reason, or NW_MEMORY. */
NW_API nw_status nw_notch_curve_build(const nw_notch_rule *rule, const nw_rule_input *input,
                                      double load_max_mpa, nw_notch_curve **curve,
                                      nw_diagnostics *diagnostics);

/* A notch curve through given points (rule "curve"), by shape-preserving cubics (Fritsch & Butland,
 * SIAM J. Sci. Stat. Comput. 5, 1984). Past the last point it goes on straight.
 *   load_mpa, stress_mpa, strain   [count], count >= 2, each strictly increasing from above 0 (a first
 *                                  point 0, 0, 0 is allowed); copied
 * Returns NW_OK, NW_INPUT naming the row that does not increase, or NW_MEMORY. */
NW_API nw_status nw_notch_curve_from_table(const double *load_mpa, const double *stress_mpa,
                                           const double *strain, size_t count,
                                           nw_notch_curve **curve, nw_diagnostics *diagnostics);

/* Local stress [MPa] and strain at first loading to load_mpa (any sign) within the curve's range. */
NW_API void nw_notch_curve_at(const nw_notch_curve *curve, double load_mpa, double *stress_mpa,
                              double *strain);

/* Largest load the curve was made for [MPa]. A table may be asked beyond it, at the caller's caution. */
NW_API double nw_notch_curve_load_max_mpa(const nw_notch_curve *curve);

/* Largest relative error of the interpolation seen while building (0 for a table). */
NW_API double nw_notch_curve_error(const nw_notch_curve *curve);

/* One point of a rule's curve without a table: the equation solved at this load. */
NW_API nw_status nw_notch_rule_solve(const nw_notch_rule *rule, const nw_rule_input *input,
                                     double load_mpa, double *stress_mpa, double *strain);

NW_API void nw_notch_curve_free(nw_notch_curve *curve);

/* Strain on the cyclic curve, e = s/E + sign(s) (|s|/K')^(1/n'). */
NW_API double nw_cyclic_strain(const nw_rule_input *input, double stress_mpa);

#ifdef __cplusplus
}
#endif
#endif
