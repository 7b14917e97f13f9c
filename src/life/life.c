/* Life of loops, many at a time: one table lookup each. */
#include "base/bin_table.h"
#include "life/corrections.h"

#include <math.h>
#include <stdlib.h>

/* Range of the table: an octave above the largest argument expected, and so far down that what is smaller
 * is rare. A product of stress and strain falls twice as fast as a strain. */
enum { OCTAVES_DOWN = 12, BATCH = 256 };
static const double life_tolerance = 5e-10;

struct nw_life {
    nw_life_options options;
    nw_strain_life curve;
    nw_two_terms terms;
    bool cuts_below_endurance;
    nw_bin_table table; /* 1/N of y, survival included */
};

static double rate_at(const nw_life *life, double y)
{
    return 2.0 / (nw_two_terms_reversals(&life->terms, y) * life->options.life_factor);
}

static nw_status rate_for_table(void *data, double y, double *value)
{
    *value = rate_at(data, y);
    return isnormal(*value) ? NW_OK : NW_COMPUTE;
}

nw_status nw_life_create(const nw_material *material, const nw_life_options *options,
                         double strain_max, double stress_max_mpa, nw_life **life,
                         nw_diagnostics *diagnostics)
{
    *life = NULL;
    nw_life *made = calloc(1, sizeof *made);
    if (made == NULL) {
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL,
                        "out of memory preparing the life curve");
    }
    made->options = *options;
    made->curve = nw_strain_life_of(material, options->surface_factor, options->surface_reversals);
    made->terms = options->correction->terms(&made->curve);
    made->cuts_below_endurance = options->below_endurance == NW_HARMLESS;
    bool product = options->correction == &nw_correction_swt;
    double high = 2.0 * strain_max * (product ? stress_max_mpa : 1.0);
    nw_status status = nw_bin_table_build(&made->table, 1,
                                          ldexp(high, product ? -2 * OCTAVES_DOWN : -OCTAVES_DOWN),
                                          high, life_tolerance, rate_for_table, made);
    if (status != NW_OK && status != NW_COMPUTE) {
        nw_life_free(made);
        return nw_fault(diagnostics, status, NULL, NULL, "out of memory preparing the life curve");
    }
    /* Where lives leave the range of doubles there is no table (no bins): each loop is solved instead. */
    *life = made;
    return NW_OK;
}

void nw_life_free(nw_life *life)
{
    if (life != NULL) {
        nw_bin_table_clear(&life->table);
        free(life);
    }
}

nw_strain_life nw_life_curve(const nw_life *life)
{
    return life->curve;
}

static inline double looked_up(const nw_life *life, double y)
{
    uint64_t bin = nw_bin_of(&life->table, y);
    if (bin >= life->table.bins) {
        return rate_at(life, y);
    }
    const double *c = life->table.coefficients + bin * NW_BIN_COEFFICIENTS;
    return nw_bin_polynomial(c, nw_bin_position(&life->table, y));
}

/* An infinite factor says that the loop fails in its first cycle. */
static inline double with_factor(double rate, double factor)
{
    return factor == INFINITY ? 1.0 : rate * factor;
}

static bool is_below_endurance(const nw_life *life, const nw_loop *loop)
{
    return nw_loop_strain_amplitude(loop) < life->options.endurance_strain_amplitude;
}

static void rates_of_batch(const nw_life *life, const nw_loop *loops, size_t count, double *rates)
{
    double y[BATCH], factor[BATCH];
    life->options.correction->prepare(&life->curve, life->options.walker_gamma, loops, count, y,
                                      factor);
    for (size_t i = 0; i < count; i++) {
        bool none = factor[i] == 0.0 || y[i] == 0.0;
        rates[i] = none ? 0.0 : with_factor(looked_up(life, y[i]), factor[i]);
    }
    if (life->cuts_below_endurance) {
        for (size_t i = 0; i < count; i++) {
            rates[i] = is_below_endurance(life, &loops[i]) ? 0.0 : rates[i];
        }
    }
}

void nw_life_rates(const nw_life *life, const nw_loop *loops, size_t count, double *rates)
{
    for (size_t first = 0; first < count; first += BATCH) {
        size_t size = count - first < BATCH ? count - first : BATCH;
        rates_of_batch(life, loops + first, size, rates + first);
    }
}

double nw_life_rate_solved(const nw_life *life, const nw_loop *loop)
{
    double y, factor;
    life->options.correction->prepare(&life->curve, life->options.walker_gamma, loop, 1, &y,
                                      &factor);
    if (factor == 0.0 || y == 0.0 ||
        (life->cuts_below_endurance && is_below_endurance(life, loop))) {
        return 0.0;
    }
    return with_factor(rate_at(life, y), factor);
}
