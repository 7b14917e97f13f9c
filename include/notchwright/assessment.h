/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * The case (one notch, one block of loading, one material) and its assessment.
 */
#ifndef NOTCHWRIGHT_ASSESSMENT_H
#define NOTCHWRIGHT_ASSESSMENT_H

#include "notchwright/history.h"
#include "notchwright/life.h"
#include "notchwright/material.h"
#include "notchwright/notch.h"
#include "notchwright/response.h"

#ifdef __cplusplus
extern "C" {
#endif

/* What the values of a history are, after scale and offset. */
typedef enum nw_load_kind {
    NW_NOMINAL_STRESS,
    NW_NOTCH_ELASTIC_STRESS,
    NW_NOTCH_STRAIN
} nw_load_kind;

NW_API const char *nw_load_kind_name(nw_load_kind kind);

/* One event of the block. Stresses in MPa; for NW_NOTCH_STRAIN scale and offset are strains. */
typedef struct nw_load {
    char *history;  /* path as opened, or NULL for inline values */
    char *label;    /* as written in the case, or "inline" */
    double *values; /* [value_count] inline values in column units */
    size_t value_count;
    char column[96]; /* "" : the only one */
    char decimal;
    nw_load_kind kind;
    double scale; /* NAN: the unit in the file's header */
    double offset;
    double repeats;
    double ignore_ranges_below_mpa; /* in L */
    nw_place place;
} nw_load;

/* A case, as read. Numbers that were not given are NAN. */
typedef struct nw_case {
    char *file;
    char title[240];
    nw_material material;
    double kt, kf;
    double factor; /* in use: kf where given, else kt; NAN when no load is a nominal stress */
    const nw_notch_rule *rule;
    bool rule_given;
    bool plastic_net_section;
    double limit_load_ratio;
    char *curve_file;
    double
        curve_stress_factor; /* MPa per bare stress unit of the curve file; NAN: its header must say */
    double residual_stress_mpa;
    nw_load *loads; /* [load_count] */
    size_t load_count;
    const nw_correction *correction;
    double walker_gamma;
    bool walker_gamma_estimated;
    double damage_sum;
    nw_below_endurance below_endurance;
    double endurance_strain_amplitude;
    double surface_factor;
    double surface_reversals;
    double roughness_um;
    double survival; /* probability, 0.5 is the median curve */
    double target_blocks;
    nw_place load_place, curve_place;
} nw_case;

/* Reads a case file (format "notchwright: 1").
 *   settings  [setting_count] "PATH=VALUE" overrides, applied before checking; may be NULL
 * All faults found in one run go to `diagnostics`. The case is to be cleared with nw_case_clear() whatever is
 * returned. Returns NW_OK, NW_INPUT, NW_FILE or NW_MEMORY. */
NW_API nw_status nw_case_read(const char *path, const char *const *settings, size_t setting_count,
                              nw_case *result, nw_diagnostics *diagnostics);

NW_API void nw_case_clear(nw_case *result);

/* Where a turning point stands: event from 0, sample from 0. */
typedef struct nw_history_place {
    size_t event;
    uint64_t sample;
} nw_history_place;

/* One distinct closed loop of the repeating block. */
typedef struct nw_loop_result {
    nw_loop_values values;
    double count;  /* a block */
    double cycles; /* to initiation; infinite where it does no damage */
    double damage; /* a block */
    double share;  /* of the damage a block */
    nw_history_place start, tip;
} nw_loop_result;

/* What was left out on request (ignore_ranges_below). */
typedef struct nw_left_out {
    double loops;
    double damage; /* that they would have done a block */
} nw_left_out;

/* The result. All numbers a block unless said; plain values, owned by the assessment. */
typedef struct nw_assessment {
    double samples;        /* of one block, repeats counted */
    double turning_points; /* reversals of one repeating block */
    double load_max_mpa, load_min_mpa;
    nw_extremes extremes; /* over first and repeating block */
    double damage_first_block, damage_per_block;
    double life_blocks; /* infinite: no damage */
    bool has_target, target_reached;
    double loops_total;    /* closed loops of the repeating block */
    nw_loop_result *loops; /* [loop_count], most damaging first */
    size_t loop_count;     /* all distinct ones, or the worst when not all were asked for */
    nw_left_out left_out;
    double nominal_max_mpa;    /* largest |nominal stress|; NAN where unknown */
    const nw_notch_rule *rule; /* in use */
    bool endurance_exceeded;
    double notch_curve_error;
    nw_strain_life curve;
    nw_cautions cautions;
} nw_assessment;

/* Told now and then while a long history is read. */
typedef void (*nw_progress)(void *data, const char *history, uint64_t samples);

typedef struct nw_assess_options {
    bool all_loops;       /* keep every distinct loop; else the worst ones */
    size_t worst;         /* how many, without all_loops (at most 64) */
    nw_progress progress; /* may be NULL */
    void *progress_data;
} nw_assess_options;

/* Assesses a case.
 *   result  NULL on failure; free with nw_assessment_free
 * Returns NW_OK, NW_INPUT (history, curve), NW_COMPUTE, NW_FILE or NW_MEMORY. */
NW_API nw_status nw_assess(const nw_case *input, const nw_assess_options *options,
                           nw_assessment **result, nw_diagnostics *diagnostics);

NW_API void nw_assessment_free(nw_assessment *result);

#ifdef __cplusplus
}
#endif
#endif
