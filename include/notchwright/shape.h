/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Shapes: the elastic stress concentration factor Kt of a notch from its drawing, and the nominal stress that
 * the factor belongs to.
 *
 * Most factors are fits to published charts. A fit reproduces its chart, not elasticity: where converged
 * finite elements are known, the result says how far the formula is from them at this geometry
 * (kt_bias_percent; negative: the formula is low, which is unsafe).
 */
#ifndef NOTCHWRIGHT_SHAPE_H
#define NOTCHWRIGHT_SHAPE_H

#include "notchwright/quantity.h"
#include "notchwright/status.h"

#ifdef __cplusplus
extern "C" {
#endif

/* ---- sizes ---- */

/* Every size that some shape has. Lengths in mm but for the last, a pure number. */
typedef enum nw_size {
    NW_SIZE_D_GROSS,      /* D: larger diameter, or W: larger width */
    NW_SIZE_D_NET,        /* d: smaller diameter or width, or diameter of a hole or bore */
    NW_SIZE_R,            /* r: radius of the notch, fillet or hole */
    NW_SIZE_T,            /* t: depth of the notch */
    NW_SIZE_H,            /* h: thickness of a flat bar or plate */
    NW_SIZE_A,            /* a: semi-axis across the load */
    NW_SIZE_B,            /* b: semi-axis along the load */
    NW_SIZE_C,            /* c: centre of a hole to the near edge */
    NW_SIZE_E,            /* e: centre of a hole to the far edge */
    NW_SIZE_STRESS_RATIO, /* second remote stress over the first */
    NW_SIZES
} nw_size;

/* The sizes of one part; NAN where unknown. */
typedef struct nw_sizes {
    double value[NW_SIZES];
} nw_sizes;

NW_API nw_sizes nw_sizes_unknown(void);

/* A size as a shape has it. */
typedef struct nw_shape_size {
    nw_size size;
    const char *key;     /* "D" */
    const char *other;   /* another accepted key, or NULL */
    const char *meaning; /* "larger diameter" */
    nw_dimension dimension;
    bool may_be_zero; /* else a length must be above 0 */
} nw_shape_size;

/* ---- formulas ---- */

/* A ratio of sizes and the values for which a formula holds, limits included. */
typedef struct nw_shape_range {
    const char *ratio; /* "t/r" */
    double (*value)(const nw_sizes *sizes);
    double low, high;
} nw_shape_range;

enum { NW_RANGES_MOST = 4, NW_FORMULAS_MOST = 4 };

/* A published formula for Kt. */
typedef struct nw_kt_formula {
    const char *key;                       /* "peterson" */
    const char *equation;                  /* in words and symbols */
    const char *source;                    /* says so where it is from memory */
    nw_shape_range ranges[NW_RANGES_MOST]; /* ended by ratio == NULL */
    /* Where the formula lay from converged finite elements over the solved points within its ranges, in percent of
     * their Kt; no points: never compared. */
    int fe_points;
    double fe_low_percent, fe_high_percent;
    double (*kt)(const struct nw_kt_formula *formula, const nw_sizes *sizes);
    const void *chart; /* data of `kt`, or NULL */
} nw_kt_formula;

/* ---- shapes and their loads ---- */

/* What acts on the part. */
typedef enum nw_action {
    NW_ACTION_FORCE,  /* P [N] */
    NW_ACTION_MOMENT, /* M or T [N mm] */
    NW_ACTION_STRESS  /* a remote stress [MPa]: it is the nominal stress itself */
} nw_action;

NW_API const char *nw_action_name(nw_action action);

/* A caution that belongs to a load of a shape whatever its sizes. */
typedef struct nw_shape_note {
    const char *code;
    const char *about; /* "kt" or "nominal" */
    const char *text;
} nw_shape_note;

enum { NW_NOTES_MOST = 3 };

typedef struct nw_shape_load {
    const char *key;      /* "tension" */
    const char *nominal;  /* "net section: S = 4 P/(pi d^2)" */
    const char *kt_means; /* what stress over which */
    nw_action action;
    bool is_shear;        /* nominal and local stress are shear stresses */
    unsigned required;    /* bits 1u << nw_size: sizes that this load needs beside the shape's */
    bool nominal_needs_h; /* the section needs the thickness h */
    /* S = action/section: an area [mm^2] or a section modulus [mm^3]; NULL for a remote stress. */
    double (*section)(const nw_sizes *sizes);
    const nw_kt_formula *const *formulas; /* in order of preference, ended by NULL */
    /* Kt by converged finite elements at these sizes, or NAN where none were solved nearby; `data` is
     * reference_data. *error_percent: what the value may be off. NULL: no shape nearby was solved. */
    double (*reference)(const void *data, const nw_sizes *sizes, double *error_percent);
    const void *reference_data;
    const char *reference_how;
    /* Stress at the root over S if there were no notch effect, such as the bending that the cut itself causes:
     * Kf lies between it and Kt. NULL: 1. */
    double (*plain)(const nw_sizes *sizes);
    /* Relative stress gradient at the root [1/mm] for the stress-gradient forms of Kf; NULL: none known. */
    double (*gradient)(const nw_sizes *sizes);
    const char *gradient_source;
    /* Cautions that depend on the sizes; NULL: none. */
    void (*check)(const nw_sizes *sizes, double kt, nw_cautions *cautions);
    nw_shape_note notes[NW_NOTES_MOST]; /* ended by code == NULL */
} nw_shape_load;

enum { NW_SHAPE_SIZES_MOST = 8, NW_SHAPE_LOADS_MOST = 4 };

struct nw_size_check; /* sizes being completed, and where faults go */

typedef struct nw_shape {
    const char *key;   /* "round_bar_fillet" */
    const char *title; /* "Round bar with shoulder fillet" */
    const char *needs; /* which sizes are needed, in words: "r and two of D, d and t" */
    nw_shape_size sizes[NW_SHAPE_SIZES_MOST]; /* ended by key == NULL */
    const nw_shape_load *const *loads;        /* ended by NULL */
    /* Completes sizes that follow from others and refuses what cannot be. */
    void (*complete)(struct nw_size_check *check);
    const char *applies; /* limits of the drawing: lengths, edges, symmetry */
} nw_shape;

/* The records in the order shown; NULL past the last. */
NW_API const nw_shape *nw_shape_at(size_t index);

/* The record of a key, or NULL. */
NW_API const nw_shape *nw_shape_find(const char *key);

/* A load of a shape by its key, or NULL. */
NW_API const nw_shape_load *nw_shape_load_find(const nw_shape *shape, const char *key);

/* The size of a shape that a key (or its other key) names, or NULL. */
NW_API const nw_shape_size *nw_shape_size_find(const nw_shape *shape, const char *key);

/* ---- Kt ---- */

/* One formula at one geometry. */
typedef struct nw_kt_row {
    const nw_kt_formula *formula;
    double kt;           /* as the formula gives it */
    bool valid;          /* within its ranges */
    char outside[160];   /* which ratio is not, "" when valid */
    double bias_percent; /* from finite elements; NAN where unknown */
} nw_kt_row;

typedef struct nw_kt {
    const nw_shape *shape;
    const nw_shape_load *load;
    nw_sizes sizes; /* completed */
    const nw_kt_formula *formula;
    double kt;           /* at least 1 */
    bool valid;          /* within the formula's ranges */
    double bias_percent; /* 100 (kt/reference - 1); NAN where unknown */
    double reference;    /* Kt by finite elements; NAN where unknown */
    double reference_error_percent;
    double plain; /* stress at the root over S without notch effect, 1 to kt */
    double radius_mm;
    double gradient_per_mm;           /* NAN where unknown */
    double section;                   /* [mm^2] or [mm^3]; NAN where it is not known */
    nw_kt_row rows[NW_FORMULAS_MOST]; /* every formula of the load, the preferred one first */
    size_t row_count;
    nw_cautions cautions;
} nw_kt;

typedef struct nw_kt_options {
    const char *formula;   /* key, or NULL: the first that is within its range */
    bool extrapolate;      /* go outside of a range, with a caution */
    const char *path;      /* key path of the sizes in faults; NULL: none */
    const nw_place *place; /* of faults, or NULL */
} nw_kt_options;

/* Kt of a shape under a load.
 *   sizes    what is known of the drawing; the rest follows or is refused
 *   options  may be NULL
 *   result   overwritten; plain values
 * Returns NW_OK, or NW_INPUT with every fault: sizes missing, impossible or contradicting one another, a
 * geometry outside of the range of every formula (without `extrapolate`), an unknown formula.
 * Limits: a vanishing hole in a plate gives 3 in tension; fits at a vanishing notch depth or a vanishing net
 * section keep their own limits, which are 1 within a few percent for a deep notch. */
NW_API nw_status nw_kt_evaluate(const nw_shape *shape, const nw_shape_load *load,
                                const nw_sizes *sizes, const nw_kt_options *options, nw_kt *result,
                                nw_diagnostics *diagnostics);

/* Nominal stress [MPa] of an action: force [N], moment [N mm] or remote stress [MPa]. NAN when the section is
 * not known (thickness h not given). */
NW_API double nw_nominal_stress_mpa(const nw_kt *kt, double action);

#ifdef __cplusplus
}
#endif
#endif
