/* Functions of one positive variable as a table of short polynomials.
 *
 * A bin is picked by the exponent and the top bits of the variable's floating-point form, so bins grow
 * with the variable and the RELATIVE error is uniform over any range. In each bin a polynomial of degree
 * five runs through six Chebyshev-Lobatto points, so neighbouring bins meet. The error is measured
 * against the function while building, and bins are halved until it is small enough. */
#ifndef NW_BASE_BIN_TABLE_H
#define NW_BASE_BIN_TABLE_H

#include "notchwright/status.h"

#include <stdint.h>
#include <string.h>

enum { NW_BIN_COEFFICIENTS = 6, NW_BIN_WIDTH = 2 };

typedef struct nw_bin_table {
    unsigned top_bits; /* bins an octave: 2^top_bits */
    unsigned width;    /* functions in the table, 1 or 2 */
    uint64_t first;    /* number of the first bin */
    uint64_t bins;
    double *coefficients;  /* [bins][6][width], lowest power first, in t = -1/2 .. 1/2 */
    double relative_error; /* largest seen while building */
} nw_bin_table;

/* The functions to tabulate, all of one sign and smooth over the range: values[width] at x. */
typedef nw_status (*nw_bin_function)(void *data, double x, double *values);

/* Builds over [low, high] (0 < low < high). Returns NW_OK; NW_MEMORY; NW_COMPUTE when `tolerance`
 * (relative) cannot be kept; or what the function returned. Free with nw_bin_table_clear(). */
nw_status nw_bin_table_build(nw_bin_table *table, unsigned width, double low, double high,
                             double tolerance, nw_bin_function function, void *data);

void nw_bin_table_clear(nw_bin_table *table);

static inline uint64_t nw_bits_of(double x)
{
    uint64_t bits;
    memcpy(&bits, &x, sizeof bits);
    return bits;
}

/* Bin of x > 0 counted from the table's first; past the end (or wrapped round) when x is outside. */
static inline uint64_t nw_bin_of(const nw_bin_table *table, double x)
{
    return (nw_bits_of(x) >> (52 - table->top_bits)) - table->first;
}

/* Position of x within its bin, -1/2 .. 1/2. */
static inline double nw_bin_position(const nw_bin_table *table, double x)
{
    uint64_t mantissa = (nw_bits_of(x) << table->top_bits) & 0x000FFFFFFFFFFFFFu;
    uint64_t bits = mantissa | 0x3FF0000000000000u;
    double t;
    memcpy(&t, &bits, sizeof t);
    return t - 1.5;
}

/* The polynomials of a bin, arranged for short dependency chains: of one function, and of two at once. */
static inline double nw_bin_polynomial(const double *c, double t)
{
    double t2 = t * t;
    return (c[0] + c[1] * t) + t2 * ((c[2] + c[3] * t) + t2 * (c[4] + c[5] * t));
}

typedef double nw_pair __attribute__((vector_size(16)));

static inline nw_pair nw_pair_load(const double *from)
{
    nw_pair pair;
    memcpy(&pair, from, sizeof pair);
    return pair;
}

static inline nw_pair nw_bin_polynomial_pair(const double *c, double t)
{
    nw_pair x = {t, t};
    nw_pair x2 = x * x;
    return (nw_pair_load(c) + nw_pair_load(c + 2) * x) +
           x2 * ((nw_pair_load(c + 4) + nw_pair_load(c + 6) * x) +
                 x2 * (nw_pair_load(c + 8) + nw_pair_load(c + 10) * x));
}

#endif
