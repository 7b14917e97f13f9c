/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * The material library: what is in it, and one material looked at closely.
 */
#ifndef NOTCHWRIGHT_LIBRARY_H
#define NOTCHWRIGHT_LIBRARY_H

#include "notchwright/material.h"

#ifdef __cplusplus
extern "C" {
#endif

/* ---- one material looked at closely ---- */

/* What follows from the parameters. */
typedef struct nw_material_derived {
    double transition_reversals; /* 2Nt = (ef' E/sf')^(1/(b - c)) */
    double cyclic_yield_mpa;     /* K' 0.002^n' */
    /* Basquin's law both ways: sa = A N^b with A = sf' 2^b, and N sa^k = C with k = -1/b, C = A^k. C
     * overflows easily, so its logarithm is given. */
    double basquin_coefficient_mpa; /* A */
    double basquin_exponent;        /* b */
    double basquin_slope;           /* k */
    double basquin_log10_constant;  /* log10 C, sa in MPa, N in cycles */
    double cycles;                  /* life at which the next two hold */
    double stress_amplitude_mpa;    /* elastic line, sf' (2N)^b */
    double strain_amplitude;        /* elastic and plastic */
    double compatible_exponent;     /* b/c, beside n' */
    double compatible_strength_mpa; /* sf'/ef'^n', beside K' */
} nw_material_derived;

typedef struct nw_material_review {
    nw_material material;
    char file[1024];
    nw_material_derived derived;
    nw_cautions cautions;
} nw_material_review;

/* Looks at a material.
 *   cycles  life for the amplitudes, above 0.25; NAN: the material's endurance life, else 1e6
 * Cautions: curves that disagree (n' against b/c past 30 %, K' against sf'/ef'^n' past 10 %), values
 * outside customary ranges, hardness against strength, an estimated basis, range or scatter of tests not
 * stated. */
NW_API void nw_material_review_make(const nw_material *material, double cycles,
                                    nw_material_review *review);

/* Reads a library name or a file (a name with '/' or ending in .yaml or .yml) and looks at it.
 * Returns NW_OK, NW_INPUT, NW_FILE or NW_MEMORY. */
NW_API nw_status nw_material_review_read(const char *name, double cycles,
                                         nw_material_review *review, nw_diagnostics *diagnostics);

NW_API nw_status nw_write_material_text(FILE *to, const nw_material_review *review, bool colour);
NW_API nw_status nw_write_material_json(FILE *to, const nw_material_review *review);
NW_API nw_status nw_write_material_csv(FILE *to, const nw_material_review *review);

/* ---- the library as a whole ---- */

/* The library's files, sorted by name. A name that several folders have is listed once, from the folder in
 * which nw_material_find() finds it. */
typedef struct nw_library {
    char **paths; /* [count] */
    size_t count;
} nw_library;

/* Lists the folders that nw_material_find() looks in; those that do not exist are passed over.
 * Returns NW_OK (clear with nw_library_clear) or NW_MEMORY. */
NW_API nw_status nw_library_list(nw_library *library, nw_diagnostics *diagnostics);
NW_API void nw_library_clear(nw_library *library);

/* Which materials of a list to show. */
typedef struct nw_material_filter {
    nw_group group;          /* NW_GROUP_UNSTATED: all */
    double strength_low_mpa; /* NAN: no limit */
    double strength_high_mpa;
} nw_material_filter;

/* Materials as a list; `cautions` names the files that could not be read. */
typedef struct nw_material_list {
    nw_material *materials; /* [count] */
    size_t count;
    size_t total; /* before the filter */
    nw_cautions cautions;
} nw_material_list;

/* Reads the library and keeps what passes the filter. A material of unknown strength does not pass a limit
 * of strength. Returns NW_OK (clear with nw_material_list_clear) or NW_MEMORY. */
NW_API nw_status nw_material_list_read(const nw_material_filter *filter, nw_material_list *list,
                                       nw_diagnostics *diagnostics);
NW_API void nw_material_list_clear(nw_material_list *list);

NW_API nw_status nw_write_material_list_text(FILE *to, const nw_material_list *list);
NW_API nw_status nw_write_material_list_json(FILE *to, const nw_material_list *list);
NW_API nw_status nw_write_material_list_csv(FILE *to, const nw_material_list *list);

/* ---- files checked ---- */

/* What was found in one file. */
typedef struct nw_material_check {
    const char *name; /* as given to the check; the caller's */
    nw_status status;
    char material[96];     /* its name, where it was read */
    nw_diagnostic *faults; /* [fault_count] */
    size_t fault_count;
    size_t faults_omitted;
    nw_cautions cautions; /* where it was accepted */
} nw_material_check;

typedef struct nw_material_checks {
    nw_material_check *items; /* [count] */
    size_t count, refused;
} nw_material_checks;

/* Checks files or library names, each on its own; a fault in one does not stop the others. All faults also go
 * to `diagnostics`.
 * Returns NW_OK (also when files are refused: see `refused`; clear with nw_material_checks_clear) or
 * NW_MEMORY. */
NW_API nw_status nw_material_checks_run(const char *const *names, size_t count,
                                        nw_material_checks *checks, nw_diagnostics *diagnostics);
NW_API void nw_material_checks_clear(nw_material_checks *checks);

NW_API nw_status nw_write_material_checks_text(FILE *to, const nw_material_checks *checks,
                                               bool colour);
NW_API nw_status nw_write_material_checks_json(FILE *to, const nw_material_checks *checks);
NW_API nw_status nw_write_material_checks_csv(FILE *to, const nw_material_checks *checks);

#ifdef __cplusplus
}
#endif
#endif
