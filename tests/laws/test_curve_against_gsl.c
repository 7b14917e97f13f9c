/* The notch curve against the root of each rule's own equation, written down here once more and bracketed
 * by the GNU Scientific Library (gsl_root_fsolver_brent), over random materials, rules and loads. */
#include "support/support.h"

#include <gsl/gsl_errno.h>
#include <gsl/gsl_roots.h>

enum { CURVES = 350, LOADS = 8 };

/* Relative error the curve promises. */
static const double promised = 1e-9;

typedef struct point {
    nw_rule_input material;
    const char *rule;
    double load;
} point;

/* Random exponents and strengths well past what metals have. */
static nw_rule_input random_input(test_random *random)
{
    double exponent = exp(test_random_between(random, log(0.02), log(0.5)));
    double yield = exp(test_random_between(random, log(80.0), log(2500.0)));
    return (nw_rule_input){
        .youngs_modulus_mpa = test_random_between(random, 4e4, 2.2e5),
        .strength_coefficient_mpa = yield / pow(0.002, exponent),
        .hardening_exponent = exponent,
        .factor = test_random_between(random, 1.0, 8.0),
        .limit_load_ratio = test_random_between(random, 1.0, 6.0),
    };
}

static double yield_of(const nw_rule_input *m)
{
    return m->strength_coefficient_mpa * pow(0.002, m->hardening_exponent);
}

/* ---- the equations, in logarithms so that nothing overflows ---- */

/* ln of plastic over elastic strain on the cyclic curve. */
static double log_plastic_ratio(const nw_rule_input *m, double log_stress)
{
    double log_plastic = (log_stress - log(m->strength_coefficient_mpa)) / m->hardening_exponent;
    return log_plastic - log_stress + log(m->youngs_modulus_mpa);
}

static double log_one_plus(double log_ratio)
{
    return log_ratio > 30.0 ? log_ratio : log1p(exp(log_ratio));
}

static double log_strain(const nw_rule_input *m, double log_stress)
{
    return log_stress - log(m->youngs_modulus_mpa) + log_one_plus(log_plastic_ratio(m, log_stress));
}

/* ln of the strain energy density s^2/(2E) + s/(n'+1) (s/K')^(1/n'). */
static double log_energy(const nw_rule_input *m, double log_stress)
{
    double share = log(2.0 / (m->hardening_exponent + 1.0)) + log_plastic_ratio(m, log_stress);
    return 2.0 * log_stress - log(2.0 * m->youngs_modulus_mpa) + log_one_plus(share);
}

/* ln of left over right side of the rule's equation; grows with the stress. */
static double rule_equation(double log_stress, void *data)
{
    const point *p = data;
    const nw_rule_input *m = &p->material;
    double log_load = log(p->load), log_modulus = log(m->youngs_modulus_mpa);
    double factor = log(m->factor), ratio = log(m->limit_load_ratio);
    if (strcmp(p->rule, "linear") == 0) { /* e = L/E */
        return log_strain(m, log_stress) - (log_load - log_modulus);
    }
    if (strcmp(p->rule, "esed") == 0) { /* w(s) = L^2/(2E), or K^2 w(S) */
        double right = m->plastic_net_section ? 2.0 * factor + log_energy(m, log_load - factor)
                                              : 2.0 * log_load - log(2.0) - log_modulus;
        return log_energy(m, log_stress) - right;
    }
    double right = 2.0 * log_load - log_modulus; /* neuber: s e = L^2/E, or K^2 S e(S) */
    if (strcmp(p->rule, "limit_load") == 0) {    /* s e = L Kp e*(L/Kp) */
        right = log_load + ratio + log_strain(m, log_load - ratio);
    } else if (m->plastic_net_section) {
        right = factor + log_load + log_strain(m, log_load - factor);
    }
    return log_stress + log_strain(m, log_stress) - right;
}

/* ln of the stress, which lies between 0 and L. */
static double bracketed_root(point *p)
{
    gsl_function function = {rule_equation, p};
    gsl_root_fsolver *solver = gsl_root_fsolver_alloc(gsl_root_fsolver_brent);
    double high = log(p->load) + 1e-12, low = high - 40.0;
    assert_int_equal(gsl_root_fsolver_set(solver, &function, low, high), GSL_SUCCESS);
    int status = GSL_CONTINUE;
    for (int i = 0; i < 300 && status == GSL_CONTINUE; i++) {
        gsl_root_fsolver_iterate(solver);
        status = gsl_root_test_interval(gsl_root_fsolver_x_lower(solver),
                                        gsl_root_fsolver_x_upper(solver), 1e-14, 0.0);
    }
    double root = gsl_root_fsolver_root(solver);
    gsl_root_fsolver_free(solver);
    assert_int_equal(status, GSL_SUCCESS);
    return root;
}

static void assert_point(point *p, double stress, double strain)
{
    double root = bracketed_root(p);
    assert_near(stress, exp(root), promised, 0.0);
    assert_near(strain, exp(log_strain(&p->material, root)), promised, 0.0);
}

/* ---- the sweep ---- */

static const char *const rules[] = {"neuber", "esed", "linear", "limit_load"};

/* Loads spread evenly over four decades below the largest, which is up to 12 times the yield stress. */
static void sweep_curve(test_random *random, point *p)
{
    const nw_notch_rule *rule = nw_notch_rule_find(p->rule);
    double most = yield_of(&p->material) * exp(test_random_between(random, log(0.3), log(12.0)));
    nw_notch_curve *curve;
    nw_diagnostics diagnostics;
    nw_diagnostics_clear(&diagnostics);
    assert_int_equal(nw_notch_curve_build(rule, &p->material, most, &curve, &diagnostics), NW_OK);
    assert_true(nw_notch_curve_error(curve) <= promised);
    for (int i = 0; i < LOADS; i++) {
        double stress, strain;
        p->load =
            i == 0 ? most : most * pow(10.0, -test_random_between(random, 0.0, i < 6 ? 1 : 4));
        nw_notch_curve_at(curve, p->load, &stress, &strain);
        assert_point(p, stress, strain);
        assert_int_equal(nw_notch_rule_solve(rule, &p->material, p->load, &stress, &strain), NW_OK);
        assert_point(p, stress, strain);
        nw_notch_curve_at(curve, -p->load, &stress, &strain);
        assert_point(p, -stress, -strain);
    }
    nw_notch_curve_free(curve);
}

static void every_rule_solves_its_equation(void **state)
{
    test_random random = {1};
    for (int i = 0; i < CURVES; i++) {
        point p = {.material = random_input(&random), .rule = rules[i % 4]};
        bool takes_plastic = nw_notch_rule_find(p.rule)->takes_plastic_net_section;
        p.material.plastic_net_section = takes_plastic && test_random_int(&random, 0, 1) == 1;
        sweep_curve(&random, &p);
    }
}

/* ---- what holds between the rules ---- */

static double strain_of(const char *rule, const nw_rule_input *input, double load, double *stress)
{
    double strain;
    assert_int_equal(nw_notch_rule_solve(nw_notch_rule_find(rule), input, load, stress, &strain),
                     NW_OK);
    return strain;
}

/* eps(linear) <= eps(esed) <= eps(neuber), and the stresses likewise; strictly once the plastic share
 * stands out from the solver's tolerance. */
static void rules_keep_their_order(void **state)
{
    test_random random = {2};
    for (int i = 0; i < 2000; i++) {
        nw_rule_input input = random_input(&random);
        double load = yield_of(&input) * exp(test_random_between(&random, log(0.05), log(12.0)));
        double stress[3], strain[3];
        strain[0] = strain_of("linear", &input, load, &stress[0]);
        strain[1] = strain_of("esed", &input, load, &stress[1]);
        strain[2] = strain_of("neuber", &input, load, &stress[2]);
        bool strictly = exp(log_plastic_ratio(&input, log(load))) > 1e-6;
        double slack = strictly ? 0.0 : 1e-9;
        for (int k = 0; k < 2; k++) {
            assert_true(strain[k] < strain[k + 1] * (1.0 + slack));
            assert_true(stress[k] < stress[k + 1] * (1.0 + slack));
        }
    }
}

static void limit_load_tends_to_neuber(void **state)
{
    test_random random = {3};
    for (int i = 0; i < 500; i++) {
        nw_rule_input input = random_input(&random);
        double load = yield_of(&input) * exp(test_random_between(&random, log(0.3), log(12.0)));
        double stress, other;
        double neuber = strain_of("neuber", &input, load, &stress);
        input.limit_load_ratio = 1e12;
        assert_near(strain_of("limit_load", &input, load, &other), neuber, promised, 0.0);
        assert_near(other, stress, promised, 0.0);
        input.limit_load_ratio = 2.0; /* and a real limit load makes the strain larger */
        assert_true(strain_of("limit_load", &input, load, &other) >= neuber * (1.0 - promised));
    }
}

/* With Kp in the place of K the plastic net section under Neuber's rule is the same equation. */
static void limit_load_equals_plastic_net_section(void **state)
{
    test_random random = {4};
    for (int i = 0; i < 500; i++) {
        nw_rule_input input = random_input(&random);
        input.limit_load_ratio = input.factor;
        double load = yield_of(&input) * exp(test_random_between(&random, log(0.3), log(12.0)));
        double stress, other, strain = strain_of("limit_load", &input, load, &stress);
        input.plastic_net_section = true;
        assert_near(strain_of("neuber", &input, load, &other), strain, promised, 0.0);
        assert_near(other, stress, promised, 0.0);
    }
}

/* Load at which the plastic share on the cyclic curve is `share`. */
static double load_of_share(const nw_rule_input *m, double share)
{
    double n = m->hardening_exponent;
    double log_ratio = log(share * m->strength_coefficient_mpa / m->youngs_modulus_mpa);
    return m->strength_coefficient_mpa * exp(log_ratio * n / (1.0 - n));
}

/* At a plastic share p << 1 the stress is L (1 - k p) and the strain L/E (1 + (1 - k) p): k = 1/2 for
 * neuber, 1/(n'+1) for esed, 1 for linear. The next term is at most p^2/n'. */
static void rules_agree_while_elastic(void **state)
{
    test_random random = {5};
    for (int i = 0; i < 500; i++) {
        nw_rule_input input = random_input(&random);
        const double leading[3] = {0.5, 1.0 / (input.hardening_exponent + 1.0), 1.0};
        for (double p = 1e-14; p < 1e-3; p *= 1e3) {
            double load = load_of_share(&input, p);
            for (int k = 0; k < 3; k++) {
                double stress, strain = strain_of(rules[k], &input, load, &stress);
                double next = p * p / input.hardening_exponent + 1e-10;
                assert_near(stress / load, 1.0 - leading[k] * p, 0.0, next);
                double relative = strain * input.youngs_modulus_mpa / load;
                assert_near(relative, 1.0 + (1.0 - leading[k]) * p, 0.0, next);
            }
        }
    }
}

/* Far below yield (at 0.01 MPa the plastic share is 1e-20) the curve is elastic, and nothing at zero. */
static void curve_starts_elastic(void **state)
{
    nw_rule_input input = {206000.0, 1184.0, 0.187, 3.0, NAN, false};
    nw_notch_curve *curve;
    assert_int_equal(
        nw_notch_curve_build(nw_notch_rule_find("neuber"), &input, 900.0, &curve, NULL), NW_OK);
    double stress, strain;
    for (double load = 1e-302; load < 0.02; load *= 1e10) {
        nw_notch_curve_at(curve, load, &stress, &strain);
        assert_near(stress, load, 1e-12, 0.0);
        assert_near(strain, load / 206000.0, 1e-12, 0.0);
    }
    nw_notch_curve_at(curve, 0.0, &stress, &strain);
    assert_near(stress, 0.0, 0.0, 0.0);
    assert_near(strain, 0.0, 0.0, 0.0);
    nw_notch_curve_free(curve);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(every_rule_solves_its_equation),
        cmocka_unit_test(rules_keep_their_order),
        cmocka_unit_test(limit_load_tends_to_neuber),
        cmocka_unit_test(limit_load_equals_plastic_net_section),
        cmocka_unit_test(rules_agree_while_elastic),
        cmocka_unit_test(curve_starts_elastic),
    };
    gsl_set_error_handler_off();
    return cmocka_run_group_tests(tests, NULL, NULL);
}
