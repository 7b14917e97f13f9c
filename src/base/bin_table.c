#include "base/bin_table.h"

#include <math.h>
#include <stdlib.h>

enum { FIRST_TOP_BITS = 4, LAST_TOP_BITS = 9 };

/* Chebyshev-Lobatto points cos(i pi/5)/2. */
static const double nodes[NW_BIN_COEFFICIENTS] = {
    -0.5, -0.40450849718747373, -0.15450849718747373, 0.15450849718747373, 0.40450849718747373, 0.5,
};

/* Where the interpolation error is checked: between the outer and between the inner points. */
static const double checks[] = {-0.465, 0.0, 0.29};

void nw_bin_table_clear(nw_bin_table *table)
{
    free(table->coefficients);
    table->coefficients = NULL;
    table->bins = 0;
}

/* Newton's divided differences, then powers of t; writes every `stride`-th coefficient. */
static void interpolate(const double *values, double *to, unsigned stride)
{
    double d[NW_BIN_COEFFICIENTS], c[NW_BIN_COEFFICIENTS];
    for (int i = 0; i < NW_BIN_COEFFICIENTS; i++) {
        d[i] = values[i];
    }
    for (int level = 1; level < NW_BIN_COEFFICIENTS; level++) {
        for (int i = NW_BIN_COEFFICIENTS - 1; i >= level; i--) {
            d[i] = (d[i] - d[i - 1]) / (nodes[i] - nodes[i - level]);
        }
    }
    for (int i = 0; i < NW_BIN_COEFFICIENTS; i++) {
        c[i] = 0.0;
    }
    for (int level = NW_BIN_COEFFICIENTS - 1; level >= 0; level--) {
        for (int i = NW_BIN_COEFFICIENTS - 1; i > 0; i--) {
            c[i] = c[i - 1] - nodes[level] * c[i];
        }
        c[0] = d[level] - nodes[level] * c[0];
    }
    for (int i = 0; i < NW_BIN_COEFFICIENTS; i++) {
        to[(unsigned)i * stride] = c[i];
    }
}

static double polynomial_at(const double *c, unsigned stride, double t)
{
    double own[NW_BIN_COEFFICIENTS];
    for (int i = 0; i < NW_BIN_COEFFICIENTS; i++) {
        own[i] = c[(unsigned)i * stride];
    }
    return nw_bin_polynomial(own, t);
}

/* x at position t of a bin; t = 1/2 is the first x of the next bin. */
static double x_at(const nw_bin_table *table, uint64_t bin, double t)
{
    double edges[2];
    for (int i = 0; i < 2; i++) {
        uint64_t bits = (table->first + bin + (uint64_t)i) << (52 - table->top_bits);
        memcpy(&edges[i], &bits, sizeof bits);
    }
    return edges[0] + (edges[1] - edges[0]) * (t + 0.5);
}

static nw_status build_bin(nw_bin_table *table, uint64_t bin, nw_bin_function function, void *data)
{
    double samples[NW_BIN_WIDTH][NW_BIN_COEFFICIENTS], values[NW_BIN_WIDTH];
    for (int i = 0; i < NW_BIN_COEFFICIENTS; i++) {
        nw_status status = function(data, x_at(table, bin, nodes[i]), values);
        if (status != NW_OK) {
            return status;
        }
        for (unsigned f = 0; f < table->width; f++) {
            samples[f][i] = values[f];
        }
    }
    double *c = table->coefficients + bin * table->width * NW_BIN_COEFFICIENTS;
    for (unsigned f = 0; f < table->width; f++) {
        interpolate(samples[f], c + f, table->width);
    }
    for (size_t i = 0; i < sizeof checks / sizeof checks[0]; i++) {
        nw_status status = function(data, x_at(table, bin, checks[i]), values);
        if (status != NW_OK) {
            return status;
        }
        for (unsigned f = 0; f < table->width; f++) {
            double found = polynomial_at(c + f, table->width, checks[i]);
            double error = fabs(found - values[f]) / fabs(values[f]);
            if (!(error <= table->relative_error)) {
                table->relative_error = error;
            }
        }
    }
    return NW_OK;
}

static nw_status build_at(nw_bin_table *table, double low, double high, double tolerance,
                          nw_bin_function function, void *data)
{
    unsigned shift = 52 - table->top_bits;
    table->first = nw_bits_of(low) >> shift;
    table->bins = (nw_bits_of(high) >> shift) - table->first + 1;
    table->relative_error = 0.0;
    table->coefficients = malloc(table->bins * table->width * NW_BIN_COEFFICIENTS * sizeof(double));
    if (table->coefficients == NULL) {
        return NW_MEMORY;
    }
    /* Downwards: a stiff function (large x) shows at once that the bins are too wide. */
    for (uint64_t bin = table->bins; bin-- > 0;) {
        nw_status status = build_bin(table, bin, function, data);
        if (status != NW_OK) {
            return status;
        }
        if (!(table->relative_error <= tolerance)) {
            return NW_COMPUTE;
        }
    }
    return NW_OK;
}

nw_status nw_bin_table_build(nw_bin_table *table, unsigned width, double low, double high,
                             double tolerance, nw_bin_function function, void *data)
{
    nw_status status = NW_COMPUTE;
    for (unsigned top = FIRST_TOP_BITS; status == NW_COMPUTE && top <= LAST_TOP_BITS; top++) {
        *table = (nw_bin_table){.top_bits = top, .width = width};
        status = build_at(table, low, high, tolerance, function, data);
        if (status != NW_OK) {
            nw_bin_table_clear(table);
        }
    }
    return status;
}
