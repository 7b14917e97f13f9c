/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Quantities: a number with its unit, as typed by a person. Inside the library everything is in MPa,
 * mm, strain as a pure ratio and cycles; units exist only here.
 */
#ifndef NOTCHWRIGHT_QUANTITY_H
#define NOTCHWRIGHT_QUANTITY_H

#include "notchwright/status.h"

#ifdef __cplusplus
extern "C" {
#endif

typedef enum nw_dimension {
    NW_PURE,     /* exponents, factors, counts */
    NW_STRESS,   /* MPa */
    NW_LENGTH,   /* mm */
    NW_STRAIN,   /* ratio */
    NW_FRACTION, /* ratio; written as a number or in percent */
    NW_HARDNESS, /* HB */
    NW_FORCE,    /* N */
    NW_MOMENT,   /* N mm */
    NW_DIMENSIONS
} nw_dimension;

/* Units that stand for bare numbers, one for each dimension; NULL where bare numbers are refused.
 * NW_PURE and NW_FRACTION need none. */
typedef struct nw_default_units {
    const char *unit[NW_DIMENSIONS];
} nw_default_units;

/* Name of a dimension ("stress"). */
NW_API const char *nw_dimension_name(nw_dimension dimension);

/* Units accepted for a dimension, "Pa, kPa, MPa, GPa, ...". */
NW_API const char *nw_dimension_units(nw_dimension dimension);

/* Factor that takes `unit` to the internal unit of `dimension`.
 *   factor  result; untouched on failure
 * Returns false when the unit is not one of that dimension. Conversion factors are exact by definition:
 * inch 25.4 mm (international yard and pound agreement 1959), pound-force 4.4482216152605 N. */
NW_API bool nw_unit_factor(const char *unit, nw_dimension dimension, double *factor);

/* Reads "820 MPa", "0.35 %", "1500 microstrain", "-0.087".
 *   text       the scalar as written
 *   dimension  what it must be
 *   defaults   may be NULL: then a bare number with a dimension is refused
 *   value      result in the internal unit; untouched on failure
 *   why        receives the reason on failure ("found ..., expected ..."), `capacity` characters
 * Returns NW_OK or NW_INPUT. NaN and infinities are refused. */
NW_API nw_status nw_quantity_read(const char *text, nw_dimension dimension,
                                  const nw_default_units *defaults, double *value, char *why,
                                  size_t capacity);

/* Reads a plain finite number that fills the whole text. Returns false when it does not. Independent
 * of the locale. */
NW_API bool nw_number_read(const char *text, double *value);

#ifdef __cplusplus
}
#endif
#endif
