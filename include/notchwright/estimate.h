/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Strain-life parameters without tests: every published method side by side, the one to prefer, and what
 * their spread means in life.
 */
#ifndef NOTCHWRIGHT_ESTIMATE_H
#define NOTCHWRIGHT_ESTIMATE_H

#include "notchwright/material.h"

#ifdef __cplusplus
extern "C" {
#endif

enum {
    NW_ESTIMATES_MOST = 16,  /* methods compared */
    NW_AMPLITUDES_MOST = 16, /* strain amplitudes at which lives are compared */
    NW_PLAN_LEVELS = 5
};

/* One method for one input. Values are NAN where it does not apply. */
typedef struct nw_estimate_row {
    const nw_estimate *record;
    bool applies;
    char reason[300]; /* why not, or what it was made for */
    nw_estimate_values values;
    double transition_reversals;       /* 2Nt = (ef' E/sf')^(1/(b - c)) */
    double stress_amplitude_1e6_mpa;   /* elastic line at 1e6 cycles */
    double cycles[NW_AMPLITUDES_MOST]; /* life at each amplitude, zero mean stress */
} nw_estimate_row;

/* Shortest and longest life over the methods that apply, at one amplitude; NAN when none applies. */
typedef struct nw_estimate_spread {
    double shortest_cycles, longest_cycles, ratio;
    const nw_estimate *shortest, *longest;
} nw_estimate_spread;

/* A strain level at which tests would settle what the estimates leave open. */
typedef struct nw_plan_level {
    double strain_amplitude;
    double expected_cycles; /* by the recommended method */
    int specimens;
} nw_plan_level;

typedef struct nw_estimate_comparison {
    nw_estimate_input input;
    double fracture_strain, fracture_stress_mpa; /* in use; NAN where unknown */
    bool fracture_stress_derived;                /* Su (1 + D), not measured */
    nw_estimate_row rows[NW_ESTIMATES_MOST];
    size_t row_count, applicable;
    double amplitudes[NW_AMPLITUDES_MOST];
    size_t amplitude_count;
    nw_estimate_spread spread[NW_AMPLITUDES_MOST];
    const nw_estimate *recommended; /* NULL when none applies */
    const char *because;
    nw_plan_level plan[NW_PLAN_LEVELS]; /* zeroed when nothing is recommended */
    nw_cautions cautions;
} nw_estimate_comparison;

/* Strain amplitudes used when none are given: 0.2, 0.35, 0.6 and 1 %. */
enum { NW_DEFAULT_AMPLITUDES = 4 };
NW_API extern const double nw_default_amplitudes[NW_DEFAULT_AMPLITUDES];

/* Compares all methods.
 *   input             checked with nw_estimate_input_check(); Young's modulus must be known
 *   amplitudes        [count] strain amplitudes, each above 0 and at most 0.2; NULL with count 0: the default
 *   result            overwritten
 * Lives are of (sf'/E)(2N)^b + ef'(2N)^c at zero mean stress, N in cycles.
 * Returns NW_OK (also when no method applies: `recommended` is NULL) or NW_INPUT with every fault. */
NW_API nw_status nw_estimate_compare(const nw_estimate_input *input, const double *amplitudes,
                                     size_t count, nw_estimate_comparison *result,
                                     nw_diagnostics *diagnostics);

/* The row of a method, or NULL. */
NW_API const nw_estimate_row *nw_estimate_row_of(const nw_estimate_comparison *comparison,
                                                 const nw_estimate *record);

/* Written down; `chosen` is the method asked for, or NULL: the recommended one. Text shows the verdict
 * first; JSON has format "notchwright.estimate/1"; CSV one row a method. NW_OK, NW_MEMORY or NW_FILE. */
NW_API nw_status nw_write_estimate_text(FILE *to, const nw_estimate_comparison *result,
                                        const nw_estimate *chosen, bool colour);
NW_API nw_status nw_write_estimate_json(FILE *to, const nw_estimate_comparison *result,
                                        const nw_estimate *chosen);
NW_API nw_status nw_write_estimate_csv(FILE *to, const nw_estimate_comparison *result);

#ifdef __cplusplus
}
#endif
#endif
