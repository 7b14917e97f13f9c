/* One-sided tolerance factors of a normal population against published values.
 *
 * Tables: values to four decimals as in the tables of Owen (1962) and ISO 16269-6, computed outside this project and
 * agreeing with them; the example of the NIST/SEMATECH e-Handbook of Statistical Methods, sec. 7.2.6.3: n = 43,
 * 90 % of the population, 99 % confidence (exact 1.8740). Tolerance: half a unit of the last digit. */
#include "support/support.h"

typedef struct row {
    double confidence;
    int n;
    double at_90, at_95, at_99;
} row;

static void against_tables(void **state)
{
    (void)state;
    static const row rows[] = {
        {0.90, 5, 2.7423, 3.3998, 4.6660},  {0.90, 10, 2.0657, 2.5684, 3.5317},
        {0.90, 20, 1.7652, 2.2078, 3.0515}, {0.95, 5, 3.4066, 4.2027, 5.7411},
        {0.95, 10, 2.3546, 2.9110, 3.9811}, {0.95, 20, 1.9260, 2.3960, 3.2952},
        {0.50, 10, 1.3241, 1.7016, 2.4103},
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        double c = rows[i].confidence, h = 1.0 / rows[i].n, nu = rows[i].n - 1;
        assert_near(nw_tolerance_factor(0.90, c, h, nu), rows[i].at_90, 0.0, 0.5e-4);
        assert_near(nw_tolerance_factor(0.95, c, h, nu), rows[i].at_95, 0.0, 0.5e-4);
        assert_near(nw_tolerance_factor(0.99, c, h, nu), rows[i].at_99, 0.0, 0.5e-4);
    }
}

static void nist_example(void **state)
{
    (void)state;
    assert_near(nw_tolerance_factor(0.90, 0.99, 1.0 / 43.0, 42.0), 1.8740, 0.0, 0.5e-4);
}

/* A fitted line without its leverage, nu = n - 2, as ISO 12107 tables have it (from memory). */
static void fitted_line(void **state)
{
    (void)state;
    assert_near(nw_tolerance_factor(0.90, 0.95, 1.0 / 8.0, 6.0), 2.723, 0.0, 0.5e-3);
    assert_near(nw_tolerance_factor(0.90, 0.95, 1.0 / 10.0, 8.0), 2.431, 0.0, 0.5e-3);
    assert_near(nw_tolerance_factor(0.90, 0.95, 1.0 / 28.0, 26.0), 1.807, 0.0, 0.5e-3);
}

/* At 50 % survival the noncentral t is Student's t: k = t sqrt(h). Tables of t: 1.833113, 2.764458. */
static void central_case(void **state)
{
    (void)state;
    assert_near(nw_tolerance_factor(0.5, 0.95, 0.1, 9.0), 1.8331129 * sqrt(0.1), 1e-7, 0.0);
    assert_near(nw_tolerance_factor(0.5, 0.99, 0.3, 10.0), 2.7637695 * sqrt(0.3), 1e-7, 0.0);
    assert_near(nw_noncentral_t(0.0, 5.0, 1.0), 0.158655254, 0.0, 1e-9); /* Phi(-1) */
}

/* nu = 1: P(T <= t) for delta = 0 is that of the Cauchy distribution. */
static void one_degree(void **state)
{
    (void)state;
    for (double t = -50.0; t <= 50.0; t += 0.37) {
        assert_near(nw_noncentral_t(t, 1.0, 0.0), 0.5 + atan(t) / 3.14159265358979324, 0.0, 1e-12);
    }
}

/* Many tests: the factor goes to the normal quantile, here 1.2815516 plus the large-sample term
 * z_C sqrt(1/n + z_P^2/(2 nu)). */
static void many_tests(void **state)
{
    (void)state;
    double n = 1e6, z = 1.2815516, expected = z + 1.6448536 * sqrt(1.0 / n + z * z / (2.0 * n));
    assert_near(nw_tolerance_factor(0.90, 0.95, 1.0 / n, n - 1.0), expected, 0.0, 3e-6);
}

static void nonsense(void **state)
{
    (void)state;
    assert_true(isnan(nw_tolerance_factor(0.0, 0.95, 0.1, 9.0)));
    assert_true(isnan(nw_tolerance_factor(0.9, 1.0, 0.1, 9.0)));
    assert_true(isnan(nw_tolerance_factor(0.9, 0.95, 0.0, 9.0)));
    assert_true(isnan(nw_tolerance_factor(0.9, 0.95, 0.1, 0.0)));
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(against_tables), cmocka_unit_test(nist_example),
        cmocka_unit_test(fitted_line),    cmocka_unit_test(central_case),
        cmocka_unit_test(one_degree),     cmocka_unit_test(many_tests),
        cmocka_unit_test(nonsense),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
