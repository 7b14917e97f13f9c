/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * The factors of one notch: elastic Kt from its drawing, fatigue Kf by every method that applies, nominal and
 * elastic notch stress of an action, and the factor of a rough surface.
 */
#ifndef NOTCHWRIGHT_NOTCH_FACTORS_H
#define NOTCHWRIGHT_NOTCH_FACTORS_H

#include "notchwright/fatigue_factor.h"
#include "notchwright/shape.h"

#include <stdio.h>

#ifdef __cplusplus
extern "C" {
#endif

enum { NW_SENSITIVITIES_MOST = 8 };

/* What is asked. Numbers that are not given are NAN. */
typedef struct nw_notch_question {
    const nw_shape *shape;
    const nw_shape_load *load;
    nw_sizes sizes;
    nw_kt_options options; /* extrapolate holds for Kf too */
    nw_group group;        /* NW_GROUP_UNSTATED: steel is assumed, with a caution */
    double ultimate_strength_mpa, yield_strength_mpa;
    bool surface_hardened;
    const nw_sensitivity *sensitivity; /* NULL: the first that applies */
    double action;                     /* [N], [N mm] or [MPa], as the load has it */
    double roughness_um;               /* Rz */
} nw_notch_question;

/* A question of which nothing is known but shape and load. */
NW_API nw_notch_question nw_notch_question_of(const nw_shape *shape, const nw_shape_load *load);

typedef struct nw_notch_factors {
    nw_notch_question question;
    nw_kt kt;
    nw_kf rows[NW_SENSITIVITIES_MOST]; /* every method */
    size_t row_count;
    const nw_sensitivity *sensitivity; /* in use, or NULL when none applies */
    double kf, q;                      /* NAN when none applies */
    double nominal_stress_mpa;         /* of the action; NAN without */
    double notch_elastic_stress_mpa;   /* Kt S, signed */
    double surface_factor;             /* K_R; NAN without */
    nw_cautions cautions;              /* all, those of kt among them */
} nw_notch_factors;

/* Answers.
 *   result  overwritten; plain values
 * Returns NW_OK, or NW_INPUT with every fault: see nw_kt_evaluate(); a strength that cannot be, a method that was
 * asked for and does not apply, an action on a section whose thickness is not given. */
NW_API nw_status nw_notch_factors_of(const nw_notch_question *question, nw_notch_factors *result,
                                     nw_diagnostics *diagnostics);

/* Written down. Text shows Kt first; JSON has format "notchwright.notch/1"; CSV one row a formula. */
NW_API nw_status nw_write_notch_text(FILE *to, const nw_notch_factors *result, bool colour);
NW_API nw_status nw_write_notch_json(FILE *to, const nw_notch_factors *result);
NW_API nw_status nw_write_notch_csv(FILE *to, const nw_notch_factors *result);

/* The shapes with their sizes, loads, formulas and ranges, made from the records; `only` is one shape, or NULL for
 * all. JSON has format "notchwright.shapes/1"; CSV one row a formula. */
NW_API nw_status nw_write_shapes_text(FILE *to, const nw_shape *only);
NW_API nw_status nw_write_shapes_json(FILE *to, const nw_shape *only);
NW_API nw_status nw_write_shapes_csv(FILE *to, const nw_shape *only);

#ifdef __cplusplus
}
#endif
#endif
