/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Fatigue notch factor Kf: what a notch costs in fatigue strength at long life, between 1 and Kt.
 *   Kf = 1 + q (Kt - 1), q the notch sensitivity, or Kf = Kt/n, n the support by the stress gradient.
 *
 * Local strain is calculated with Kt by default: it is the strain that is there. Kf in its place lowers the
 * strain and lengthens the life; it is meant for long lives, where it was measured.
 */
#ifndef NOTCHWRIGHT_FATIGUE_FACTOR_H
#define NOTCHWRIGHT_FATIGUE_FACTOR_H

#include "notchwright/material.h"
#include "notchwright/status.h"

#ifdef __cplusplus
extern "C" {
#endif

/* What the methods work on; NAN where unknown. */
typedef struct nw_sensitivity_input {
    nw_group group;
    double ultimate_strength_mpa; /* Su */
    double yield_strength_mpa;
    double radius_mm;       /* of the notch root */
    double gradient_per_mm; /* relative stress gradient at the root */
    double kt;
    double
        plain; /* stress at the root over the nominal one without notch effect; 1 but for bending by the cut */
    bool torsion; /* shear stress at the root */
    bool surface_hardened;
} nw_sensitivity_input;

/* A method. */
typedef struct nw_sensitivity {
    const char *key; /* "peterson" */
    const char *title;
    const char *equation;
    const char *reference;
    const char *range; /* what it was made for, in words */
    /* False with the reason in `why` where the method has nothing to say. True: *kf unclamped; where the input
     * is beyond the method's range `why` says so, else it is "". */
    bool (*evaluate)(const nw_sensitivity_input *input, double *kf, char *why, size_t capacity);
} nw_sensitivity;

/* The records in the order of preference; NULL past the last. */
NW_API const nw_sensitivity *nw_sensitivity_at(size_t index);
NW_API const nw_sensitivity *nw_sensitivity_find(const char *key);

/* One method for one notch. */
typedef struct nw_kf {
    const nw_sensitivity *record;
    bool applies; /* within its range, or beyond it on request */
    bool in_range;
    bool beyond_range; /* there is a value, but beyond the range */
    char reason[240];  /* why not, or what is beyond the range */
    double kf;         /* 1 to Kt; NAN where it does not apply */
    double
        q; /* (Kf - plain)/(Kt - plain); NAN where it does not apply or there is no notch effect */
    bool clamped; /* the formula gave less than 1 or more than Kt */
} nw_kf;

/* Evaluates a method.
 *   extrapolate  also beyond its range */
NW_API nw_kf nw_kf_evaluate(const nw_sensitivity *record, const nw_sensitivity_input *input,
                            bool extrapolate);

#ifdef __cplusplus
}
#endif
#endif
