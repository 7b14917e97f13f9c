/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Materials: the cyclic stress-strain curve and the strain-life curve, where they come from, and the
 * estimates that stand in for tests.
 *
 *   cyclic curve (Ramberg & Osgood, NACA TN 902, 1943):  e = s/E + (s/K')^(1/n')
 *   strain-life (Basquin 1910; Manson 1953; Coffin 1954; Morrow 1965):
 *       ea = (sf'/E) (2N)^b + ef' (2N)^c
 */
#ifndef NOTCHWRIGHT_MATERIAL_H
#define NOTCHWRIGHT_MATERIAL_H

#include "notchwright/status.h"

#include <stdio.h>

#ifdef __cplusplus
extern "C" {
#endif

typedef enum nw_group {
    NW_STEEL,
    NW_CAST_STEEL,
    NW_ALUMINIUM,
    NW_TITANIUM,
    NW_NICKEL,
    NW_CAST_IRON,
    NW_OTHER_GROUP,
    NW_GROUP_UNSTATED
} nw_group;

typedef enum nw_basis { NW_TESTED, NW_HANDBOOK, NW_ESTIMATED, NW_BASIS_UNSTATED } nw_basis;

/* How a pair of parameters came about. */
typedef enum nw_origin {
    NW_GIVEN,         /* stands in the material file */
    NW_COMPATIBILITY, /* from the strain-life set: n' = b/c, K' = sf'/ef'^n' */
    NW_FROM_ESTIMATE  /* from the estimate named in `estimate` */
} nw_origin;

/* A material. Plain values; numbers that are not known are NAN. */
typedef struct nw_material {
    char name[96];
    char source[480];
    char note[480];
    nw_group group;
    nw_basis basis;
    double youngs_modulus_mpa;
    double poisson_ratio;
    double yield_strength_mpa;
    double ultimate_strength_mpa;
    double reduction_of_area; /* ratio */
    double hardness_hb;
    double fracture_stress_mpa; /* true stress at fracture */
    double fracture_strain;     /* true strain at fracture, ln(1/(1 - reduction of area)) */

    double strength_coefficient_mpa; /* K' */
    double hardening_exponent;       /* n' */
    nw_origin strength_coefficient_origin;
    nw_origin hardening_exponent_origin;

    double fatigue_strength_coefficient_mpa; /* sf' */
    double fatigue_strength_exponent;        /* b, negative */
    double fatigue_ductility_coefficient;    /* ef' */
    double fatigue_ductility_exponent;       /* c, negative */
    nw_origin strain_life_origin;
    const char *estimate; /* key of the estimate used, or NULL */

    double endurance_strain_amplitude;
    double endurance_cycles;
    double log10_life_sd; /* scatter of log10 life */
    double scatter_tests;
    double valid_cycles[2];
    double valid_strain_amplitude[2];
} nw_material;

/* Words used in files and output. */
NW_API const char *nw_group_name(nw_group group);
NW_API const char *nw_basis_name(nw_basis basis);
NW_API const char *nw_origin_name(nw_origin origin);

/* Reads a material file (format "notchwright_material: 1"), completes it (estimate, compatibility) and
 * checks it. All faults found in one run go to `diagnostics`.
 * Returns NW_OK, NW_INPUT, NW_FILE or NW_MEMORY. */
NW_API nw_status nw_material_read(const char *path, nw_material *material,
                                  nw_diagnostics *diagnostics);

/* Writes a material file that nw_material_read() reads back to the same numbers, bit by bit. Group and basis
 * must be stated and the curves complete. Values that are unknown (NAN, or not above 0 where only positive
 * ones make sense) are left out; a text longer than its array is cut. The key `estimate` is not written: the
 * parameters stand in the file.
 * Returns NW_OK or NW_FILE (the stream's error). */
NW_API nw_status nw_material_write(FILE *to, const nw_material *material);

/* Finds a library material by name: in the folders of the environment variable
 * NOTCHWRIGHT_MATERIALS (separated by ':'), then in the folder installed with the library, then in
 * `materials/` of the source tree it was built from.
 *   path  receives the file found, `capacity` characters
 * Returns NW_OK, or NW_INPUT with the nearest known name in the fault. */
NW_API nw_status nw_material_find(const char *name, char *path, size_t capacity,
                                  nw_diagnostics *diagnostics);

/* ---- estimates: one record each ---- */

/* What an estimate may use; NAN where unknown. */
typedef struct nw_estimate_input {
    nw_group group;
    double ultimate_strength_mpa;
    double youngs_modulus_mpa;
} nw_estimate_input;

typedef struct nw_estimate_values {
    double fatigue_strength_coefficient_mpa;
    double fatigue_strength_exponent;
    double fatigue_ductility_coefficient;
    double fatigue_ductility_exponent;
    double strength_coefficient_mpa;
    double hardening_exponent;
    double endurance_strain_amplitude; /* NAN when the method gives none */
    double endurance_cycles;
} nw_estimate_values;

typedef struct nw_estimate {
    const char *key;       /* "uniform_material_law" */
    const char *title;     /* "Uniform material law" */
    const char *range;     /* what it was made for, in words */
    const char *reference; /* published source */
    /* False with the reason in `why` when the method does not apply. */
    bool (*applies)(const nw_estimate_input *input, char *why, size_t capacity);
    void (*evaluate)(const nw_estimate_input *input, nw_estimate_values *values);
} nw_estimate;

/* The records, in the order in which they are shown; NULL past the last. */
NW_API const nw_estimate *nw_estimate_at(size_t index);

/* The record of a key, or NULL. */
NW_API const nw_estimate *nw_estimate_find(const char *key);

/* Stress amplitude on the cyclic curve at which the plastic strain is 0.2 %: K' 0.002^n' [MPa]. */
NW_API double nw_material_cyclic_yield_mpa(const nw_material *material);

#ifdef __cplusplus
}
#endif
#endif
