#include "notch/notch_curve.h"

#include "base/newton.h"
#include "notch/monotone.h"
#include "notch/rules.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

/* Plastic share below which the response is taken as elastic, and the error allowed between knots. */
static const double negligible_plastic_ratio = 1e-12;
static const double curve_tolerance = 5e-10;
static const double root_tolerance = 1e-11;

typedef struct problem {
    const nw_notch_rule *rule;
    const nw_rule_input *input;
    nw_newton *solver;
    double load;
    double guess[2]; /* root of the neighbouring load */
} problem;

/* Row 0: the cyclic curve, y = x + ln(1 + plastic/elastic). Row 1: the notch rule. */
static void equations(const void *data, const double *unknown, double *residual, double *jacobian)
{
    const problem *p = data;
    double plastic = nw_plastic_ratio(p->input, p->load * exp(unknown[0]));
    double slope = 1.0 / p->input->hardening_exponent - 1.0;
    residual[0] = unknown[1] - unknown[0] - log1p(plastic);
    jacobian[0] = -1.0 - slope * plastic / (1.0 + plastic);
    jacobian[1] = 1.0;
    p->rule->residual(p->input, p->load, unknown[0], unknown[1], &residual[1], &jacobian[2]);
}

/* Far above yield Newton starts on the side where the plastic strain is not astronomically large. */
static double start_of(const nw_rule_input *input, double load)
{
    double yield = input->strength_coefficient_mpa * pow(0.002, input->hardening_exponent);
    return load > yield ? log(yield / load) : 0.0;
}

static nw_status solve_at(problem *p, double load, double root[2])
{
    p->load = load;
    root[0] = p->guess[0];
    root[1] = p->guess[1];
    nw_status status = nw_newton_solve(p->solver, equations, p, root_tolerance, root);
    if (status == NW_COMPUTE) {
        root[0] = start_of(p->input, load);
        root[1] = -root[0];
        status = nw_newton_solve(p->solver, equations, p, root_tolerance, root);
    }
    if (status == NW_OK) {
        p->guess[0] = root[0];
        p->guess[1] = root[1];
    }
    return status;
}

static nw_status ratios_at(void *data, double load, double *values)
{
    double root[2];
    nw_status status = solve_at(data, load, root);
    values[0] = exp(root[0]);
    values[1] = exp(root[1]);
    return status;
}

nw_status nw_notch_rule_solve(const nw_notch_rule *rule, const nw_rule_input *input,
                              double load_mpa, double *stress_mpa, double *strain)
{
    problem p = {.rule = rule, .input = input};
    if (load_mpa == 0.0) {
        *stress_mpa = *strain = 0.0;
        return NW_OK;
    }
    nw_status status = nw_newton_create(2, &p.solver);
    if (status != NW_OK) {
        return status;
    }
    double root[2], size = fabs(load_mpa);
    p.guess[0] = start_of(input, size);
    p.guess[1] = -p.guess[0];
    status = solve_at(&p, size, root);
    nw_newton_free(p.solver);
    *stress_mpa = load_mpa * exp(root[0]);
    *strain = load_mpa / input->youngs_modulus_mpa * exp(root[1]);
    return status;
}

/* Load at which the plastic share of the elastic stress itself is negligible. */
static double elastic_load(const nw_rule_input *input, double load_max)
{
    double n = input->hardening_exponent;
    double log_ratio =
        log(negligible_plastic_ratio * input->strength_coefficient_mpa / input->youngs_modulus_mpa);
    double load = input->strength_coefficient_mpa * exp(log_ratio * n / (1.0 - n));
    double least = load_max * 0x1p-60, most = load_max * 0.5;
    return load < least ? least : load > most ? most : load;
}

/* The first bin stands for every smaller load: both ratios are 1 there. */
static void make_first_bin_elastic(nw_bin_table *bins)
{
    memset(bins->coefficients, 0, 2 * NW_BIN_COEFFICIENTS * sizeof *bins->coefficients);
    bins->coefficients[0] = bins->coefficients[1] = 1.0;
}

static nw_notch_curve *new_curve(double load_max, double compliance)
{
    nw_notch_curve *curve = calloc(1, sizeof *curve);
    if (curve != NULL) {
        curve->load_max_mpa = load_max;
        curve->compliance = compliance;
    }
    return curve;
}

nw_status nw_notch_curve_build(const nw_notch_rule *rule, const nw_rule_input *input,
                               double load_max_mpa, nw_notch_curve **curve,
                               nw_diagnostics *diagnostics)
{
    *curve = NULL;
    problem p = {.rule = rule, .input = input};
    nw_notch_curve *made = new_curve(load_max_mpa, 1.0 / input->youngs_modulus_mpa);
    if (made == NULL || nw_newton_create(2, &p.solver) != NW_OK) {
        free(made);
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL,
                        "out of memory building the notch curve");
    }
    p.guess[0] = start_of(input, load_max_mpa);
    p.guess[1] = -p.guess[0];
    nw_status status = nw_bin_table_build(&made->bins, 2, elastic_load(input, load_max_mpa),
                                          load_max_mpa, curve_tolerance, ratios_at, &p);
    nw_newton_free(p.solver);
    if (status != NW_OK) {
        nw_notch_curve_free(made);
        return nw_fault(diagnostics, status, NULL, "notch.rule",
                        status == NW_MEMORY
                            ? "out of memory building the notch curve"
                            : "the notch curve of rule %s could not be solved near L = %.6g MPa",
                        rule->key, p.load);
    }
    make_first_bin_elastic(&made->bins);
    *curve = made;
    return NW_OK;
}

static nw_status check_increasing(const double *load, const double *stress, const double *strain,
                                  size_t count, nw_diagnostics *diagnostics)
{
    double before[3] = {0.0, 0.0, 0.0};
    for (size_t i = 0; i < count; i++) {
        double now[3] = {load[i], stress[i], strain[i]};
        bool origin = i == 0 && now[0] == 0.0 && now[1] == 0.0 && now[2] == 0.0;
        for (int k = 0; k < 3; k++) {
            static const char *const names[] = {"load", "stress", "strain"};
            if (!origin && !(now[k] > before[k])) {
                return nw_fault(diagnostics, NW_INPUT, NULL, "notch.curve",
                                "point %zu: found %s %g after %g, expected it to increase from 0",
                                i + 1, names[k], now[k], before[k]);
            }
            before[k] = now[k];
        }
    }
    return NW_OK;
}

nw_status nw_notch_curve_from_table(const double *load_mpa, const double *stress_mpa,
                                    const double *strain, size_t count, nw_notch_curve **curve,
                                    nw_diagnostics *diagnostics)
{
    *curve = NULL;
    if (count < 2) {
        return nw_fault(diagnostics, NW_INPUT, NULL, "notch.curve",
                        "found %zu point(s), expected at least two", count);
    }
    nw_status status = check_increasing(load_mpa, stress_mpa, strain, count, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    size_t skip = load_mpa[0] == 0.0, points = count - skip + 1;
    nw_notch_curve *made = new_curve(load_mpa[count - 1], strain[count - 1] / load_mpa[count - 1]);
    double *block = calloc(points * 5, sizeof *block);
    if (made == NULL || block == NULL) {
        free(made);
        free(block);
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory");
    }
    made->points = points;
    made->load = block;
    made->stress = block + points;
    made->strain = block + 2 * points;
    made->stress_slope = block + 3 * points;
    made->strain_slope = block + 4 * points;
    size_t bytes = (points - 1) * sizeof *block;
    memcpy(made->load + 1, load_mpa + skip, bytes);
    memcpy(made->stress + 1, stress_mpa + skip, bytes);
    memcpy(made->strain + 1, strain + skip, bytes);
    nw_monotone_slopes(made->load, made->stress, points, made->stress_slope);
    nw_monotone_slopes(made->load, made->strain, points, made->strain_slope);
    *curve = made;
    return NW_OK;
}

void nw_notch_curve_at_table(const nw_notch_curve *curve, double load, double *stress,
                             double *strain)
{
    *stress = nw_monotone_at(curve->load, curve->stress, curve->stress_slope, curve->points, load);
    *strain = nw_monotone_at(curve->load, curve->strain, curve->strain_slope, curve->points, load);
}

void nw_notch_curve_at(const nw_notch_curve *curve, double load_mpa, double *stress_mpa,
                       double *strain)
{
    nw_pair size = {0.0, 0.0};
    if (load_mpa != 0.0) {
        size = nw_notch_curve_positive(curve, fabs(load_mpa));
    }
    *stress_mpa = copysign(size[0], load_mpa);
    *strain = copysign(size[1], load_mpa);
}

double nw_notch_curve_load_max_mpa(const nw_notch_curve *curve)
{
    return curve->load_max_mpa;
}

double nw_notch_curve_error(const nw_notch_curve *curve)
{
    return curve->points > 0 ? 0.0 : curve->bins.relative_error;
}

void nw_notch_curve_free(nw_notch_curve *curve)
{
    if (curve != NULL) {
        nw_bin_table_clear(&curve->bins);
        free(curve->load);
        free(curve);
    }
}
