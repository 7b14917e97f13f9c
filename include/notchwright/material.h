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
 * NOTCHWRIGHT_MATERIALS (separated by ":"), then in ../share/notchwright/materials seen from the program, then
 * in the folder installed with the library, then in
 * `materials/` of the source tree it was built from.
 *   path  receives the file found, `capacity` characters
 * Returns NW_OK, or NW_INPUT with the nearest known name in the fault. */
NW_API nw_status nw_material_find(const char *name, char *path, size_t capacity,
                                  nw_diagnostics *diagnostics);

/* ---- estimates: one record each ---- */

/* What an estimate may use. All are positive; a value that is unknown is NAN. */
typedef struct nw_estimate_input {
    nw_group group;
    double ultimate_strength_mpa; /* Su, engineering tensile strength */
    double youngs_modulus_mpa;    /* E */
    double yield_strength_mpa;    /* no method uses it; it is checked against Su and kept */
    double hardness_hb;           /* Brinell */
    double reduction_of_area;     /* RA, a ratio below 1 */
    double fracture_strain;       /* D, true; where it is unknown D = ln(1/(1 - RA)) */
    double fracture_stress_mpa;   /* true; where it is unknown Su (1 + D) */
} nw_estimate_input;

/* An input of which only the group is known. */
NW_API nw_estimate_input nw_estimate_input_unknown(nw_group group);

/* What a material says of itself, for an estimate. */
NW_API nw_estimate_input nw_estimate_input_of(const nw_material *material);

/* True fracture strain D: as given, else from reduction of area; NAN when neither is known. */
NW_API double nw_estimate_fracture_strain(const nw_estimate_input *input);

/* True fracture stress [MPa]: as given, else Su (1 + D) (Manson, Exp. Mech. 5 (1965) 193, from memory); NAN
 * when neither is known. */
NW_API double nw_estimate_fracture_stress_mpa(const nw_estimate_input *input);

/* Tensile strength of a steel from its hardness, 0.0012 HB^2 + 3.3 HB [MPa] (Roessle & Fatemi, Int. J. Fatigue
 * 22 (2000) 495, from memory). */
NW_API double nw_ultimate_from_hardness_mpa(double hardness_hb);

/* Refuses what cannot be: values not above 0, RA of 1 or more, yield above Su, Su above E/10, fracture
 * stress below Su. Every fault is added. Returns NW_OK or NW_INPUT. */
NW_API nw_status nw_estimate_input_check(const nw_estimate_input *input,
                                         nw_diagnostics *diagnostics);

typedef struct nw_estimate_values {
    double fatigue_strength_coefficient_mpa;
    double fatigue_strength_exponent;
    double fatigue_ductility_coefficient;
    double fatigue_ductility_exponent;
    double strength_coefficient_mpa;
    double hardening_exponent;
    nw_origin cyclic_curve_origin; /* NW_FROM_ESTIMATE: the method's own; else NW_COMPATIBILITY */
    double endurance_stress_mpa;   /* NAN when the method gives none, as the next two */
    double endurance_strain_amplitude;
    double endurance_cycles;
} nw_estimate_values;

/* Inputs that a method needs, as bits. */
enum {
    NW_NEEDS_ULTIMATE = 1u,
    NW_NEEDS_MODULUS = 2u,
    NW_NEEDS_HARDNESS = 4u,
    NW_NEEDS_FRACTURE_STRAIN = 8u, /* or reduction of area */
    NW_USES_FRACTURE_STRESS = 16u  /* measured, or Su (1 + D) */
};

typedef struct nw_estimate {
    const char *key;       /* "uniform_material_law" */
    const char *title;     /* "Uniform material law" */
    const char *range;     /* what it was made for, in words */
    const char *equation;  /* with the symbols of nw_estimate_input */
    const char *reference; /* published source */
    const char *accuracy;  /* what is reported about it */
    const char *check;     /* what its formula was held against */
    const char *doubt;     /* what about its published form could not be confirmed, or NULL */
    unsigned groups;       /* bits 1u << nw_group */
    unsigned needs;        /* bits NW_NEEDS_..., NW_USES_... */
    /* False with the reason in `why` beyond its range; NULL: none but groups and needs. */
    bool (*limits)(const nw_estimate_input *input, char *why, size_t capacity);
    void (*evaluate)(const nw_estimate_input *input, nw_estimate_values *values);
} nw_estimate;

/* The records, in the order in which they are shown; NULL past the last. */
NW_API const nw_estimate *nw_estimate_at(size_t index);

/* The record of a key, or NULL. */
NW_API const nw_estimate *nw_estimate_find(const char *key);

/* Whether a method applies: made for the group, its inputs known, within its range, and its values of use
 * (positive coefficients, c < b < 0, n' from 0.005 to 0.6).
 *   why     receives the reason when it does not, `capacity` characters
 *   values  receives the values when it does; may be NULL */
NW_API bool nw_estimate_apply(const nw_estimate *record, const nw_estimate_input *input,
                              nw_estimate_values *values, char *why, size_t capacity);

/* The method to prefer among those that apply, by the published comparisons, or NULL when none applies.
 *   because  receives the reason (a static string); may be NULL */
NW_API const nw_estimate *nw_estimate_recommended(const nw_estimate_input *input,
                                                  const char **because);

/* "ultimate strength 820 MPa, Young's modulus 206 GPa, ...": the inputs that a method uses and where derived
 * ones come from. Returns `text`. */
NW_API char *nw_estimate_inputs_text(const nw_estimate *record, const nw_estimate_input *input,
                                     char *text, size_t capacity);

/* The material that a method gives, basis "estimated", source and note naming method, inputs, range and
 * accuracy.
 * Returns NW_OK, or NW_INPUT with the reason when the method does not apply. */
NW_API nw_status nw_estimate_material(const nw_estimate *record, const nw_estimate_input *input,
                                      const char *name, nw_material *material,
                                      nw_diagnostics *diagnostics);

/* Stress amplitude on the cyclic curve at which the plastic strain is 0.2 %: K' 0.002^n' [MPa]. */
NW_API double nw_material_cyclic_yield_mpa(const nw_material *material);

#ifdef __cplusplus
}
#endif
#endif
