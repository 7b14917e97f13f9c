/* Censored fits against R: tests/reference/fit_reference.csv, made by fit_reference.R beside it (R 4.2.2,
 * survival 3.5-3). Regressions: survival::survreg, to 1e-6. The strain-life curve: its likelihood written out in R
 * and maximised there by numerical derivatives, to 1e-6 of the likelihood and 1e-5 of the parameters. */
#include "support/support.h"

enum { MOST = 300 };

typedef struct table {
    double x[MOST], life[MOST];
    bool runout[MOST];
    size_t count;
} table;

static table read_table(const char *name)
{
    char path[600], line[200];
    table t = {.count = 0};
    snprintf(path, sizeof path, "%s/tests/reference/fit_%s.csv", TEST_SOURCE_DIR, name);
    FILE *file = fopen(path, "r");
    assert_non_null(file);
    assert_non_null(fgets(line, sizeof line, file));
    int runout;
    while (fgets(line, sizeof line, file) != NULL &&
           sscanf(line, "%lf,%lf,%d", &t.x[t.count], &t.life[t.count], &runout) == 3) {
        t.runout[t.count++] = runout == 1;
        assert_true(t.count < MOST);
    }
    fclose(file);
    assert_true(t.count > 20);
    return t;
}

static double reference(const char *dataset, const char *model, const char *quantity)
{
    char path[600], line[300], wanted[200];
    snprintf(path, sizeof path, "%s/tests/reference/fit_reference.csv", TEST_SOURCE_DIR);
    int length = snprintf(wanted, sizeof wanted, "%s,%s,%s,", dataset, model, quantity);
    FILE *file = fopen(path, "r");
    assert_non_null(file);
    double value = NAN;
    while (fgets(line, sizeof line, file) != NULL) {
        if (strncmp(line, wanted, (size_t)length) == 0) {
            value = strtod(line + length, NULL);
        }
    }
    fclose(file);
    assert_false(isnan(value));
    return value;
}

static void compare_regression(const char *name, nw_distribution distribution, size_t degree)
{
    table t = read_table(name);
    nw_regression r;
    char model[40], key[40];
    snprintf(model, sizeof model, "%s_%zu", distribution == NW_WEIBULL ? "weibull" : "lognormal",
             degree);
    assert_int_equal(
        nw_censored_regression(t.x, t.life, t.runout, t.count, degree, 0, distribution, &r, NULL),
        NW_OK);
    assert_int_equal(r.count, degree + 2);
    for (size_t i = 0; i < r.count; i++) {
        snprintf(key, sizeof key, "coefficient_%zu", i);
        assert_near(r.coefficient[i], reference(name, model, key), 1e-6, 1e-7);
        snprintf(key, sizeof key, "standard_error_%zu", i);
        assert_near(r.standard_error[i], reference(name, model, key), 1e-6, 0.0);
    }
    assert_near(r.log_likelihood, reference(name, model, "log_likelihood"), 1e-9, 1e-6);
    assert_near(r.aic, reference(name, model, "aic"), 1e-9, 1e-6);
}

static void survreg(void **state)
{
    (void)state;
    static const char *const names[] = {"nelson", "made_1", "made_2"};
    for (int i = 0; i < 3; i++) {
        for (size_t degree = 1; degree <= 2; degree++) {
            compare_regression(names[i], NW_LOG_NORMAL, degree);
            compare_regression(names[i], NW_WEIBULL, degree);
        }
    }
}

/* Published fits of the superalloy: Meeker & Escobar 1998 (Weibull, quadratic: 217.61, -85.52, 8.48, .375), from
 * memory; scatter that changes with stress computed outside this project to the digits given. */
static void superalloy(void **state)
{
    (void)state;
    table t = read_table("nelson");
    nw_regression r;
    assert_int_equal(
        nw_censored_regression(t.x, t.life, t.runout, t.count, 2, 0, NW_WEIBULL, &r, NULL), NW_OK);
    assert_near(r.coefficient[0], 217.61, 0.0, 0.005);
    assert_near(r.coefficient[1], -85.52, 0.0, 0.005);
    assert_near(r.coefficient[2], 8.48, 0.0, 0.005);
    assert_near(exp(r.coefficient[3]), 0.375, 0.0, 0.0005);
    assert_near(r.log_likelihood, -93.3819, 0.0, 0.5e-4);
    assert_int_equal(
        nw_censored_regression(t.x, t.life, t.runout, t.count, 2, 1, NW_WEIBULL, &r, NULL), NW_OK);
    assert_near(r.coefficient[0], 243.17, 0.0, 0.005);
    assert_near(r.coefficient[1], -96.524, 0.0, 0.0005);
    assert_near(r.coefficient[2], 9.6653, 0.0, 0.5e-4);
    assert_near(r.coefficient[3], 4.4666, 0.0, 0.5e-4);
    assert_near(r.coefficient[4], -1.17574, 0.0, 0.5e-5);
    assert_near(r.log_likelihood, -92.581, 0.0, 0.0005);
    assert_int_equal(
        nw_censored_regression(t.x, t.life, t.runout, t.count, 2, 1, NW_LOG_NORMAL, &r, NULL),
        NW_OK);
    assert_near(r.coefficient[3], 10.403, 0.0, 0.0005);
    assert_near(r.coefficient[4], -2.3813, 0.0, 0.5e-4);
    assert_near(r.log_likelihood, -94.756, 0.0, 0.0005);
}

static void compare_curve(const nw_fit *fit, nw_distribution distribution, nw_scatter_model scatter)
{
    const nw_likelihood *l = &fit->candidates[2 * distribution + scatter];
    char model[40], key[40];
    snprintf(model, sizeof model, "%s_%s", distribution == NW_WEIBULL ? "weibull" : "lognormal",
             nw_scatter_model_name(scatter));
    assert_true(l->available);
    assert_near(l->log_likelihood, reference("made_curve", model, "log_likelihood"), 0.0, 1e-6);
    assert_near(l->aic, reference("made_curve", model, "aic"), 0.0, 1e-6);
    for (size_t i = 0; i < l->parameters; i++) {
        snprintf(key, sizeof key, "standard_error_%zu", i);
        double error = reference("made_curve", model, key);
        assert_near(sqrt(l->covariance[i * l->parameters + i]), error, 1e-4, 0.0);
        snprintf(key, sizeof key, "theta_%zu", i);
        assert_near(l->theta[i], reference("made_curve", model, key), 0.0, 1e-5 * error);
    }
}

static nw_fit *fit_made_curve(void)
{
    table t = read_table("made_curve");
    nw_coupon tests[MOST];
    nw_coupons coupons = {.tests = tests, .count = t.count};
    for (size_t i = 0; i < t.count; i++) {
        tests[i] = (nw_coupon){.strain_amplitude = t.x[i],
                               .stress_amplitude_mpa = NAN,
                               .plastic_strain_amplitude = NAN,
                               .cycles = t.life[i],
                               .runout = t.runout[i]};
        snprintf(tests[i].id, sizeof tests[i].id, "%zu", i);
    }
    nw_fit_options o = nw_fit_options_default();
    o.youngs_modulus_mpa = 206000.0;
    nw_fit *fit;
    assert_int_equal(nw_fit_coupons(&coupons, &o, &fit, NULL), NW_OK);
    return fit;
}

static void strain_life_curve(void **state)
{
    (void)state;
    nw_fit *fit = fit_made_curve();
    assert_int_equal(fit->method, NW_FIT_LIKELIHOOD);
    for (int k = 0; k < 4; k++) {
        compare_curve(fit, (nw_distribution)(k / 2), (nw_scatter_model)(k % 2));
    }
    nw_fit_free(fit);
}

/* Tolerance factors by R's noncentral t, which sums another series (AS 243). */
static void tolerance(void **state)
{
    (void)state;
    static const int sizes[] = {3, 5, 10, 30, 100};
    static const double survivals[] = {0.5, 0.9, 0.99}, confidences[] = {0.05, 0.5, 0.9, 0.99};
    for (int i = 0; i < 5 * 3 * 4; i++) {
        int n = sizes[i / 12];
        double survival = survivals[i / 4 % 3], confidence = confidences[i % 4];
        char model[40], key[40];
        snprintf(model, sizeof model, "n%d_%g", n, survival);
        snprintf(key, sizeof key, "confidence_%g", confidence);
        assert_near(nw_tolerance_factor(survival, confidence, 1.0 / n, n - 1.0),
                    reference("tolerance", model, key), 1e-8, 1e-9);
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(survreg),
        cmocka_unit_test(superalloy),
        cmocka_unit_test(strain_life_curve),
        cmocka_unit_test(tolerance),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
