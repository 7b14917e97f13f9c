/* How often the limits of a coupon fit hold the truth:  bench_fit_coverage [SETS [CONFIDENCE]]
 *
 * Makes SETS (2000) tables of coupon tests from a known material, fits each, and counts. The material: E 206 GPa,
 * sf' 1100 MPa, b -0.09, ef' 0.5, c -0.6, K' and n' compatible; log10 life scatters normally by 0.12, log10 stress
 * by 0.004. Seeds are fixed, so the counts can be repeated. */
#include "notchwright/notchwright.h"

#include <math.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

static const double modulus = 206000.0, life_sd = 0.12, stress_sd = 0.004;
static const double ln_strength = 7.00306545878646, b = -0.09, ductility = 0.5, c = -0.6;

enum { MOST_TESTS = 64, LIVES = 3 };

typedef struct scenario {
    const char *title;
    nw_fit_method method;
    size_t levels, replicates;
    double shortest, longest; /* lives of the end levels */
    double stop;              /* run-outs stop here */
} scenario;

static const scenario scenarios[] = {
    {"lines, 6 levels of 3, no run-outs", NW_FIT_LINES, 6, 3, 100.0, 1e5, 1e99},
    {"lines, 5 levels of 2, no run-outs", NW_FIT_LINES, 5, 2, 100.0, 1e5, 1e99},
    {"likelihood, 7 levels of 4, no run-outs", NW_FIT_LIKELIHOOD, 7, 4, 20.0, 5e6, 1e99},
    {"likelihood, 7 levels of 4, run-outs at 2e6 cycles", NW_FIT_LIKELIHOOD, 7, 4, 20.0, 2e6, 2e6},
};

static double uniform(uint64_t *state)
{
    uint64_t z = (*state += 0x9E3779B97F4A7C15u);
    z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9u;
    z = (z ^ (z >> 27)) * 0x94D049BB133111EBu;
    return ((double)((z ^ (z >> 31)) >> 11) + 0.5) * 0x1p-53;
}

static double normal(uint64_t *state)
{
    double radius = sqrt(-2.0 * log(uniform(state)));
    return radius * cos(2.0 * 3.14159265358979324 * uniform(state));
}

static double stress_at(double cycles)
{
    return exp(ln_strength + b * log(2.0 * cycles));
}

static double strain_at(double cycles)
{
    return stress_at(cycles) / modulus + ductility * pow(2.0 * cycles, c);
}

static size_t make_tests(const scenario *s, uint64_t *state, nw_coupon *tests)
{
    size_t count = 0;
    for (size_t i = 0; i < s->levels; i++) {
        double share = (double)i / (double)(s->levels - 1);
        double median = s->shortest * pow(s->longest / s->shortest, share);
        for (size_t k = 0; k < s->replicates; k++) {
            double cycles = median * pow(10.0, life_sd * normal(state));
            nw_coupon *t = &tests[count];
            *t = (nw_coupon){.strain_amplitude = strain_at(median),
                             .stress_amplitude_mpa =
                                 stress_at(median) * pow(10.0, stress_sd * normal(state)),
                             .plastic_strain_amplitude = NAN,
                             .cycles = fmin(cycles, s->stop),
                             .runout = cycles > s->stop};
            snprintf(t->id, sizeof t->id, "%zu", ++count);
        }
    }
    return count;
}

typedef struct tally {
    size_t fitted, open[NW_FIT_PARAMETERS];
    size_t inside[NW_FIT_PARAMETERS], profile[NW_FIT_PARAMETERS];
    size_t scatter, curve[LIVES], tolerance[LIVES];
} tally;

static bool holds(double low, double value, double high)
{
    return low <= value && value <= high;
}

static void count_up(const scenario *s, const nw_fit *fit, double confidence, tally *t)
{
    const double truth[] = {
        exp(ln_strength), b, ductility, c, exp(ln_strength - b / c * log(ductility)), b / c};
    t->fitted++;
    for (int i = 0; i < NW_FIT_PARAMETERS; i++) {
        const nw_fit_parameter *p = &fit->parameter[i];
        double low = isnan(p->profile_low) ? -INFINITY : p->profile_low;
        double high = isnan(p->profile_high) ? INFINITY : p->profile_high;
        t->inside[i] += holds(p->low, truth[i], p->high);
        t->profile[i] += holds(low, truth[i], high);
        t->open[i] += isinf(low) || isinf(high);
    }
    t->scatter += holds(fit->log10_life_sd_low, life_sd, fit->log10_life_sd_high);
    for (int i = 0; i < LIVES; i++) {
        double share = 0.1 + 0.4 * i, limits[2], bound[2];
        double median = s->shortest * pow(fmin(s->longest, s->stop) / s->shortest, share);
        nw_fit_life(fit, strain_at(median), 0.5, confidence, limits);
        t->curve[i] += holds(limits[0], median, limits[1]);
        /* The one-sided limit at confidence C is the lower of two-sided limits at 2 C - 1. */
        nw_fit_life(fit, strain_at(median), 0.9, 2.0 * confidence - 1.0, bound);
        t->tolerance[i] += bound[0] <= median * pow(10.0, -1.2815515655446004 * life_sd);
    }
}

static void run(const scenario *s, size_t sets, double confidence)
{
    tally t = {.fitted = 0};
    uint64_t state = 2024;
    for (size_t i = 0; i < sets; i++) {
        nw_coupon tests[MOST_TESTS];
        nw_coupons coupons = {.tests = tests, .count = make_tests(s, &state, tests)};
        nw_fit_options o = nw_fit_options_default();
        nw_fit *fit = NULL;
        o.youngs_modulus_mpa = modulus;
        o.method = s->method;
        o.limits = confidence;
        o.profile = s->method == NW_FIT_LIKELIHOOD;
        o.percentile_count = o.survival_count = 0;
        if (nw_fit_coupons(&coupons, &o, &fit, NULL) == NW_OK) {
            count_up(s, fit, confidence, &t);
        }
        nw_fit_free(fit);
    }
    double all = (double)t.fitted / 100.0;
    printf("%s: %zu sets, %zu with a fit; limits at %g %%\n", s->title, sets, t.fitted,
           100.0 * confidence);
    for (int i = 0; i < NW_FIT_PARAMETERS; i++) {
        printf("  %-34s %5.1f %%", nw_fit_parameter_key((nw_fit_parameter_index)i),
               (double)t.inside[i] / all);
        if (s->method == NW_FIT_LIKELIHOOD && i < NW_FIT_CYCLIC_COEFFICIENT) {
            printf("   profile %5.1f %% (open in %.1f %%)", (double)t.profile[i] / all,
                   (double)t.open[i] / all);
        }
        putchar('\n');
    }
    printf("  %-34s %5.1f %%\n", "log10_life_sd", (double)t.scatter / all);
    for (int i = 0; i < LIVES; i++) {
        printf(
            "  50 %% curve, %2.0f %% along the lives    %5.1f %%   below the 10 %% life with %g %% "
            "confidence: %5.1f %%\n",
            10.0 + 40.0 * i, (double)t.curve[i] / all, 100.0 * confidence,
            (double)t.tolerance[i] / all);
    }
}

int main(int count, char **words)
{
    size_t sets = count > 1 ? strtoul(words[1], NULL, 10) : 2000;
    double confidence = count > 2 ? strtod(words[2], NULL) : 0.9;
    for (size_t i = 0; i < sizeof scenarios / sizeof scenarios[0]; i++) {
        run(&scenarios[i], sets, confidence);
    }
    return 0;
}
