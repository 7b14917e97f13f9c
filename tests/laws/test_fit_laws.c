/* What must hold for any table of coupon tests. */
#include "support/support.h"

enum { MOST = 64 };

typedef struct truth {
    double modulus, strength, b, ductility, c, sd;
} truth;

static const truth steel = {206000.0, 1100.0, -0.09, 0.5, -0.6, 0.12};

/* Strain amplitude and its parts at a life. */
static nw_coupon point(const truth *t, double cycles, size_t number)
{
    double reversals = 2.0 * cycles, stress = t->strength * pow(reversals, t->b);
    double plastic = t->ductility * pow(reversals, t->c);
    nw_coupon c = {.strain_amplitude = stress / t->modulus + plastic,
                   .stress_amplitude_mpa = stress,
                   .plastic_strain_amplitude = plastic,
                   .cycles = cycles};
    snprintf(c.id, sizeof c.id, "T%zu", number);
    return c;
}

/* Sum of twelve uniform numbers: near enough to normal. */
static double scatter(test_random *random)
{
    double sum = -6.0;
    for (int i = 0; i < 12; i++) {
        sum += test_random_between(random, 0.0, 1.0);
    }
    return sum;
}

static nw_coupons made(const truth *t, nw_coupon *tests, test_random *random, size_t levels,
                       size_t replicates)
{
    nw_coupons coupons = {.tests = tests};
    for (size_t i = 0; i < levels; i++) {
        double cycles = 100.0 * pow(10.0, 4.0 * (double)i / (double)(levels - 1));
        for (size_t k = 0; k < replicates; k++) {
            nw_coupon c = point(t, cycles, coupons.count + 1);
            c.cycles *= pow(10.0, t->sd * (random == NULL ? 0.0 : scatter(random)));
            tests[coupons.count++] = c;
        }
    }
    return coupons;
}

static nw_fit *fit_of(const nw_coupons *coupons, nw_fit_options o)
{
    nw_fit *fit;
    nw_diagnostics diagnostics;
    nw_diagnostics_clear(&diagnostics);
    if (nw_fit_coupons(coupons, &o, &fit, &diagnostics) != NW_OK) {
        fail_msg("%s", diagnostics.count > 0 ? diagnostics.items[0].message : "no fault named");
    }
    return fit;
}

static nw_fit_options options_for(const truth *t)
{
    nw_fit_options o = nw_fit_options_default();
    o.youngs_modulus_mpa = t->modulus;
    o.least_plastic_strain = 0.0;
    return o;
}

static bool has_caution(const nw_fit *fit, const char *code)
{
    for (size_t i = 0; i < fit->cautions.count; i++) {
        if (strcmp(fit->cautions.items[i].code, code) == 0) {
            return true;
        }
    }
    return false;
}

/* Points on a curve give the curve back, plastic strain measured or not. */
static void exact_points(void **state)
{
    (void)state;
    for (int measured = 0; measured < 2; measured++) {
        nw_coupon tests[MOST];
        nw_coupons coupons = made(&steel, tests, NULL, 7, 3);
        for (size_t i = 0; i < coupons.count && !measured; i++) {
            tests[i].plastic_strain_amplitude = NAN;
        }
        nw_fit *fit = fit_of(&coupons, options_for(&steel));
        const double expected[] = {steel.strength,
                                   steel.b,
                                   steel.ductility,
                                   steel.c,
                                   steel.strength / pow(steel.ductility, steel.b / steel.c),
                                   steel.b / steel.c};
        for (int i = 0; i < NW_FIT_PARAMETERS; i++) {
            assert_near(fit->parameter[i].value, expected[i], 1e-9, 0.0);
        }
        assert_near(fit->compatible_exponent, steel.b / steel.c, 1e-9, 0.0);
        assert_near(fit->cyclic_disagreement, 0.0, 0.0, 1e-9);
        assert_near(fit->log10_life_sd, 0.0, 0.0, 1e-9);
        assert_true(has_caution(fit, "no_scatter"));
        assert_int_equal(fit->outlier_count, 0);
        assert_int_equal(measured ? fit->plastic_measured : fit->plastic_computed, 21);
        double limits[2];
        assert_near(nw_fit_life(fit, tests[9].strain_amplitude, 0.5, 0.95, limits), tests[9].cycles,
                    1e-8, 0.0);
        nw_fit_free(fit);
    }
}

/* Scatter so small that only rounding separates the likelihood from least squares: both find the curve. */
static void nearly_exact_likelihood(void **state)
{
    (void)state;
    truth t = steel;
    t.sd = 1e-5;
    nw_coupon tests[MOST];
    test_random random = {7};
    nw_coupons coupons = made(&t, tests, &random, 8, 3);
    nw_fit_options o = options_for(&t);
    o.method = NW_FIT_LIKELIHOOD;
    nw_fit *fit = fit_of(&coupons, o);
    assert_near(fit->parameter[0].value, t.strength, 1e-3, 0.0);
    assert_near(fit->parameter[1].value, t.b, 1e-3, 0.0);
    assert_near(fit->parameter[2].value, t.ductility, 1e-3, 0.0);
    assert_near(fit->parameter[3].value, t.c, 1e-3, 0.0);
    assert_true(fit->log10_life_sd < 2e-5);
    nw_fit_free(fit);
}

/* Where the scatter is small the likelihood is nearly a parabola, and the profile's limits are those of the information
 * matrix. */
static void profile_limits(void **state)
{
    (void)state;
    truth t = steel;
    t.sd = 0.01;
    nw_coupon tests[MOST];
    test_random random = {9};
    nw_coupons coupons = made(&t, tests, &random, 8, 4);
    tests[31].runout = tests[30].runout = true;
    nw_fit_options o = options_for(&t);
    o.profile = true;
    o.limits = 0.9;
    nw_fit *fit = fit_of(&coupons, o);
    assert_int_equal(fit->method, NW_FIT_LIKELIHOOD);
    for (int i = 0; i < 4; i++) {
        const nw_fit_parameter *p = &fit->parameter[i];
        double width = p->high - p->low;
        assert_near(p->profile_low, p->low, 0.0, 0.05 * width);
        assert_near(p->profile_high, p->high, 0.0, 0.05 * width);
    }
    nw_fit_free(fit);
}

/* The same table in other units. */
static void units(void **state)
{
    (void)state;
    nw_coupon tests[MOST];
    test_random random = {11};
    nw_coupons coupons = made(&steel, tests, &random, 6, 3);
    tests[17].runout = true;
    test_scratch scratch = test_scratch_create();
    char *first = malloc(1 << 16), *second = malloc(1 << 16);
    strcpy(first, "id,strain_amplitude,stress_amplitude[MPa],cycles,runout\n");
    strcpy(second, "runout;reversals;stress_amplitude [psi];strain_amplitude[microstrain];id\r\n");
    for (size_t i = 0; i < coupons.count; i++) {
        const nw_coupon *c = &tests[i];
        double psi = c->stress_amplitude_mpa * 25.4 * 25.4 / 4.4482216152605;
        sprintf(first + strlen(first), "%s,%.17g,%.17g,%.17g,%d\n", c->id, c->strain_amplitude,
                c->stress_amplitude_mpa, c->cycles, c->runout);
        sprintf(second + strlen(second), "%d;%.17g;%.17g;%.17g;\"%s\"\r\n", c->runout,
                2.0 * c->cycles, psi, 1e6 * c->strain_amplitude, c->id);
    }
    const char *paths[] = {test_scratch_text(&scratch, "a.csv", first),
                           test_scratch_text(&scratch, "b.csv", second)};
    nw_fit *fits[2];
    for (int i = 0; i < 2; i++) {
        nw_coupons read;
        nw_coupon_options how = {.youngs_modulus_mpa = steel.modulus};
        assert_int_equal(nw_coupons_read(paths[i], &how, &read, NULL), NW_OK);
        nw_fit_options o = options_for(&steel);
        o.profile = true;
        fits[i] = fit_of(&read, o);
        nw_coupons_clear(&read);
    }
    assert_int_equal(fits[0]->method, NW_FIT_LIKELIHOOD);
    for (int i = 0; i < NW_FIT_PARAMETERS; i++) {
        const nw_fit_parameter *a = &fits[0]->parameter[i], *b = &fits[1]->parameter[i];
        assert_near(b->value, a->value, 1e-7, 0.0);
        assert_near(b->standard_error, a->standard_error, 1e-6, 1e-9 * fabs(a->value));
        assert_near(b->low, a->low, 1e-6, 0.0);
        assert_near(b->high, a->high, 1e-6, 0.0);
    }
    assert_near(fits[1]->likelihood.log_likelihood, fits[0]->likelihood.log_likelihood, 1e-10, 0.0);
    nw_fit_free(fits[0]);
    nw_fit_free(fits[1]);
    free(first);
    free(second);
    test_scratch_remove(&scratch);
}

/* The order of the tests means nothing; a test written down again is another test. */
static void order(void **state)
{
    (void)state;
    nw_coupon tests[MOST], turned[MOST];
    test_random random = {13};
    nw_coupons coupons = made(&steel, tests, &random, 6, 3), other = coupons;
    for (size_t i = 0; i < coupons.count; i++) {
        turned[i] = tests[coupons.count - 1 - i];
    }
    other.tests = turned;
    nw_fit *a = fit_of(&coupons, options_for(&steel)), *b = fit_of(&other, options_for(&steel));
    for (int i = 0; i < NW_FIT_PARAMETERS; i++) {
        assert_near(b->parameter[i].value, a->parameter[i].value, 1e-10, 0.0);
        assert_near(b->parameter[i].high, a->parameter[i].high, 1e-9, 0.0);
    }
    assert_near(b->likelihood.log_likelihood, a->likelihood.log_likelihood, 1e-10, 0.0);
    nw_fit_free(a);
    nw_fit_free(b);
}

/* A wrong life is flagged, stays in, and is left out when named. */
static void outlier(void **state)
{
    (void)state;
    nw_coupon tests[MOST];
    test_random random = {17};
    nw_coupons coupons = made(&steel, tests, &random, 6, 3);
    tests[7].cycles *= 30.0;
    nw_fit_options o = options_for(&steel);
    nw_fit *fit = fit_of(&coupons, o);
    assert_int_equal(fit->outlier_count, 1);
    assert_int_equal(fit->outliers[0].test, 7);
    assert_true(fit->outliers[0].studentised > fit->outliers[0].critical);
    assert_int_equal(fit->tests, 18);
    assert_true(has_caution(fit, "outliers"));
    nw_fit_free(fit);
    const char *drop[] = {"T8"};
    o.drop = drop;
    o.drop_count = 1;
    fit = fit_of(&coupons, o);
    assert_int_equal(fit->outlier_count, 0);
    assert_int_equal(fit->tests, 17);
    assert_int_equal(fit->dropped_count, 1);
    assert_int_equal(fit->dropped[0], 7);
    assert_true(has_caution(fit, "tests_dropped"));
    nw_fit_free(fit);
}

/* Studentised residuals by their definition: the fit without the test, and the t of its prediction. */
static void studentised_by_leaving_out(void **state)
{
    (void)state;
    nw_coupon tests[MOST];
    test_random random = {19};
    nw_coupons coupons = made(&steel, tests, &random, 5, 2);
    double x[MOST], y[MOST];
    tests[4].cycles *= 20.0;
    for (size_t i = 0; i < coupons.count; i++) {
        tests[i].stress_amplitude_mpa = tests[i].strain_amplitude = NAN;
    }
    nw_fit *fit = fit_of(&coupons, options_for(&steel));
    assert_int_equal(fit->outlier_count, 1);
    assert_string_equal(fit->outliers[0].about, "plastic line");
    size_t count = 0;
    for (size_t i = 0; i < coupons.count; i++) {
        if (i != 4) {
            x[count] = log10(tests[i].plastic_strain_amplitude);
            y[count++] = log10(tests[i].cycles);
        }
    }
    nw_line line;
    assert_int_equal(nw_line_fit(x, y, NULL, count, 0.95, &line), NW_OK);
    double at = log10(tests[4].plastic_strain_amplitude), dx = at - line.x_mean;
    double error = line.sd * sqrt(1.0 + 1.0 / line.points + dx * dx / line.sxx);
    double t = (log10(tests[4].cycles) - line.a - line.b * at) / error;
    assert_near(fit->outliers[0].studentised, t, 1e-9, 0.0);
    nw_fit_free(fit);
}

/* Small plastic strains and run-outs are left out of the lines and listed with their reason. */
static void left_out(void **state)
{
    (void)state;
    nw_coupon tests[MOST];
    test_random random = {23};
    nw_coupons coupons = made(&steel, tests, &random, 7, 3);
    tests[20].runout = true;
    nw_fit_options o = options_for(&steel);
    o.least_plastic_strain = 5e-4;
    nw_fit *fit = fit_of(&coupons, o);
    size_t small = 0, runouts = 0;
    for (size_t i = 0; i < fit->plastic.left_out_count; i++) {
        const nw_fit_left_out *l = &fit->plastic.left_out[i];
        bool runout = strcmp(l->reason, "run-out") == 0;
        runouts += runout;
        small += !runout;
        assert_true(runout || tests[l->test].plastic_strain_amplitude < 5e-4);
    }
    assert_int_equal(runouts, 1);
    assert_true(small >= 3);
    assert_int_equal(fit->plastic.line.points + fit->plastic.left_out_count, 21);
    assert_int_equal(fit->elastic.left_out_count, 1);
    assert_true(has_caution(fit, "plastic_strains_left_out"));
    nw_fit_free(fit);
}

/* More survival and more confidence mean shorter lives; percentile limits hold their curve. */
static void curves_in_order(void **state)
{
    (void)state;
    nw_coupon tests[MOST];
    test_random random = {29};
    nw_coupons coupons = made(&steel, tests, &random, 7, 3);
    for (int model = 0; model < 5; model++) {
        nw_fit_options o = options_for(&steel);
        o.method = model == 4 ? NW_FIT_LINES : NW_FIT_LIKELIHOOD;
        o.distribution = (nw_distribution)(model % 4 / 2);
        o.scatter = (nw_scatter_model)(model % 2);
        o.survival_count = o.confidence_count = 2;
        o.confidence[1] = 0.99;
        nw_fit *fit = fit_of(&coupons, o);
        assert_int_equal(fit->curve_count, 7);
        for (int i = 0; i < NW_FIT_GRID; i++) {
            double life[7];
            for (int k = 0; k < 7; k++) {
                const nw_fit_point *p = &fit->curves[k].points[i];
                life[k] = p->cycles;
                assert_true(p->cycles > 0.0);
                assert_true(k >= 3 || (p->low < p->cycles && p->cycles < p->high));
                assert_true(i == 0 || p->strain_amplitude > p[-1].strain_amplitude);
            }
            assert_true(life[0] < life[1] && life[1] < life[2]);
            assert_true(life[3] < life[0] && life[4] < life[3]); /* 90/95 below 10 %; 90/99 lower */
            assert_true(life[5] < life[3] && life[6] < life[5]);
        }
        nw_fit_free(fit);
    }
}

/* Each planned test narrows the curve, and the first is placed better than at any amplitude of the table. */
static void plan(void **state)
{
    (void)state;
    nw_coupon tests[MOST];
    test_random random = {31};
    nw_coupons coupons = made(&steel, tests, &random, 5, 3);
    for (int method = NW_FIT_LINES; method <= NW_FIT_LIKELIHOOD; method++) {
        nw_fit_options o = options_for(&steel);
        o.method = (nw_fit_method)method;
        o.plan_cycles = 3e4;
        o.plan_tests = 12;
        nw_fit *fit = fit_of(&coupons, o);
        size_t placed = 0;
        assert_true(fit->plan.available);
        assert_near(nw_fit_life(fit, fit->plan.strain_amplitude, 0.5, 0.95, NULL), 3e4, 1e-9, 0.0);
        for (size_t i = 0; i < fit->plan.row_count; i++) {
            placed += fit->plan.rows[i].tests;
        }
        assert_int_equal(placed, 12);
        for (size_t i = 1; i <= 12; i++) {
            assert_true(fit->plan.factor_after[i] < fit->plan.factor_after[i - 1]);
        }
        double limits[2];
        nw_fit_life(fit, fit->plan.strain_amplitude, 0.5, 0.95, limits);
        assert_near(fit->plan.factor_now, sqrt(limits[1] / limits[0]), 1e-6, 0.0);
        nw_fit_free(fit);
    }
}

/* Where stress and plastic strain say the same of every test, the two lines are one: the curve's limits are those of a
 * single line with n - 2 degrees of freedom. Student's t: 97.5 % for 16 and 17 degrees, any table. */
static const double t_16 = 2.119905299, t_17 = 2.109815578;

static nw_fit *one_line(nw_line *line, nw_fit_options o)
{
    nw_coupon tests[MOST];
    double x[MOST], y[MOST];
    test_random random = {37};
    nw_coupons coupons = made(&steel, tests, &random, 6, 3);
    for (size_t i = 0; i < coupons.count; i++) {
        x[i] = log10(tests[i].stress_amplitude_mpa);
        y[i] = log10(tests[i].cycles);
    }
    assert_int_equal(nw_line_fit(x, y, NULL, coupons.count, 0.95, line), NW_OK);
    o.method = NW_FIT_LINES;
    return fit_of(&coupons, o);
}

static void compatible_lines(void **state)
{
    (void)state;
    nw_line line;
    nw_fit *fit = one_line(&line, options_for(&steel));
    assert_near(fit->degrees, 16.0, 1e-9, 0.0);
    assert_near(fit->log10_life_sd, line.sd, 1e-9, 0.0);
    for (double cycles = 100.0; cycles < 2e6; cycles *= 7.0) {
        nw_coupon at = point(&steel, cycles, 1);
        double limits[2], dx = log10(at.stress_amplitude_mpa) - line.x_mean;
        double life = nw_fit_life(fit, at.strain_amplitude, 0.5, 0.95, limits);
        double half = t_16 * line.sd * sqrt(1.0 / 18.0 + dx * dx / line.sxx);
        assert_near(log10(life), line.y_mean + line.b * dx, 1e-9, 0.0);
        assert_near(log10(limits[1] / life), half, 1e-7, 0.0);
        assert_near(log10(life / limits[0]), half, 1e-7, 0.0);
    }
    nw_fit_free(fit);
}

/* The first planned test is where a search over all amplitudes puts it. */
static void plan_is_best(void **state)
{
    (void)state;
    nw_line line;
    nw_fit_options o = options_for(&steel);
    o.plan_cycles = 2000.0;
    o.plan_tests = 1;
    for (int i = 0; i < 3; i++, o.plan_cycles *= 6.0) {
        nw_fit *fit = one_line(&line, o);
        double n = line.points, wanted = (log10(o.plan_cycles) - line.a) / line.b;
        double least = INFINITY;
        for (double x = line.x_min; x <= line.x_max; x += (line.x_max - line.x_min) / 4000.0) {
            double dx = x - line.x_mean, mean = line.x_mean + dx / (n + 1.0);
            double sxx = line.sxx + dx * dx * n / (n + 1.0);
            double variance = 1.0 / (n + 1.0) + (wanted - mean) * (wanted - mean) / sxx;
            least = fmin(least, variance);
        }
        double expected = pow(10.0, t_17 * line.sd * sqrt(least));
        assert_near(fit->plan.factor_after[1], expected, 2e-4, 0.0);
        nw_fit_free(fit);
    }
}

/* Levels, replication and what they are customarily good for. */
static void programme(void **state)
{
    (void)state;
    nw_coupon tests[MOST];
    nw_coupons coupons = made(&steel, tests, NULL, 4, 2);
    nw_fit *fit = fit_of(&coupons, options_for(&steel));
    assert_int_equal(fit->levels, 4);
    assert_int_equal(fit->least_replicates, 2);
    assert_near(fit->replication_percent, 50.0, 0.0, 1e-12);
    assert_string_equal(fit->verdict, "research and development");
    assert_true(has_caution(fit, "few_levels"));
    assert_true(has_caution(fit, "few_replicates"));
    nw_fit_free(fit);
    coupons = made(&steel, tests, NULL, 5, 3);
    fit = fit_of(&coupons, options_for(&steel));
    assert_string_equal(fit->verdict, "design allowables");
    assert_false(has_caution(fit, "few_levels"));
    assert_false(has_caution(fit, "few_replicates"));
    nw_fit_free(fit);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(exact_points),
        cmocka_unit_test(nearly_exact_likelihood),
        cmocka_unit_test(profile_limits),
        cmocka_unit_test(units),
        cmocka_unit_test(order),
        cmocka_unit_test(outlier),
        cmocka_unit_test(studentised_by_leaving_out),
        cmocka_unit_test(left_out),
        cmocka_unit_test(curves_in_order),
        cmocka_unit_test(plan),
        cmocka_unit_test(compatible_lines),
        cmocka_unit_test(plan_is_best),
        cmocka_unit_test(programme),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
