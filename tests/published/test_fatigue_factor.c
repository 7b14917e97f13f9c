/* Fatigue notch factors against published values.
 *
 * Values without a word of their own were computed outside this project from the formulas (Peterson's length and the
 * two gradient forms from memory, Neuber's polynomials as printed by Budynas & Nisbett) and are given to the digits
 * shown: half of the last one is the tolerance. */
#include "support/support.h"

static nw_sensitivity_input input_of(nw_group group, double ultimate, double radius, double kt)
{
    return (nw_sensitivity_input){.group = group,
                                  .ultimate_strength_mpa = ultimate,
                                  .yield_strength_mpa = NAN,
                                  .radius_mm = radius,
                                  .gradient_per_mm = NAN,
                                  .kt = kt,
                                  .plain = 1.0};
}

static nw_kf kf_of(const char *key, const nw_sensitivity_input *input, bool extrapolate)
{
    const nw_sensitivity *record = nw_sensitivity_find(key);
    assert_non_null(record);
    return nw_kf_evaluate(record, input, extrapolate);
}

/* ---- Peterson ---- */

/* Su = 820 MPa: r = 0.5, Kt = 3: q = 0.7867, Kf = 2.573; r = 2, Kt = 2: q = 0.9365, Kf = 1.937. */
static void peterson(void **state)
{
    nw_sensitivity_input input = input_of(NW_STEEL, 820.0, 0.5, 3.0);
    nw_kf kf = kf_of("peterson", &input, false);
    assert_true(kf.applies && kf.in_range);
    assert_near(kf.q, 0.7867, 0.0, 0.5e-4);
    assert_near(kf.kf, 2.573, 0.0, 0.5e-3);
    input = input_of(NW_STEEL, 820.0, 2.0, 2.0);
    kf = kf_of("peterson", &input, false);
    assert_near(kf.q, 0.9365, 0.0, 0.5e-4);
    assert_near(kf.kf, 1.937, 0.0, 0.5e-3);
}

/* a = 0.4935, 0.1356, 0.0518 mm at Su = 400, 820, 1400 MPa; the other published form, (270/Su)^1.8, agrees to
 * 0.2 %. In torsion 0.6 a. With r = a: q = 1/2. */
static void peterson_lengths(void **state)
{
    static const double ultimate[] = {400.0, 820.0, 1400.0}, length[] = {0.4935, 0.1356, 0.0518};
    for (int i = 0; i < 3; i++) {
        nw_sensitivity_input input = input_of(NW_STEEL, ultimate[i], 1.0, 2.0);
        nw_kf kf = kf_of("peterson", &input, true);
        double a = 1.0 / kf.q - 1.0;
        assert_near(a, length[i], 0.0, 0.5e-4);
        assert_near(a, pow(270.0 / ultimate[i], 1.8), 2e-3, 0.0);
        input.torsion = true;
        kf = kf_of("peterson", &input, true);
        assert_near(1.0 / kf.q - 1.0, 0.6 * a, 1e-12, 0.0);
    }
    nw_sensitivity_input weak = input_of(NW_STEEL, 400.0, 1.0, 2.0);
    nw_kf kf = kf_of("peterson", &weak, false);
    assert_true(!kf.applies && kf.beyond_range && isnan(kf.kf));
    assert_non_null(strstr(kf.reason, "550"));
}

/* Aluminium: lengths of 0.51 to 0.64 mm are published; the smallest is the safe one. */
static void peterson_aluminium(void **state)
{
    nw_sensitivity_input input = input_of(NW_ALUMINIUM, NAN, 0.51, 3.0);
    assert_near(kf_of("peterson", &input, false).q, 0.5, 1e-15, 0.0);
    input.torsion = true;
    assert_false(kf_of("peterson", &input, true).applies);
    input = input_of(NW_NICKEL, 900.0, 1.0, 3.0);
    assert_false(kf_of("peterson", &input, true).applies);
}

/* ---- Neuber ---- */

/* Su = 820 MPa: r = 0.5, Kt = 3: 2.487; r = 2, Kt = 2: 1.853. */
static void neuber(void **state)
{
    nw_sensitivity_input input = input_of(NW_STEEL, 820.0, 0.5, 3.0);
    assert_near(kf_of("neuber", &input, false).kf, 2.487, 0.0, 0.5e-3);
    input = input_of(NW_STEEL, 820.0, 2.0, 2.0);
    assert_near(kf_of("neuber", &input, false).kf, 1.853, 0.0, 0.5e-3);
}

/* sqrt(p) at r = 1 mm. */
static double root_of(nw_group group, double ultimate, bool torsion)
{
    nw_sensitivity_input input = input_of(group, ultimate, 1.0, 2.0);
    input.torsion = torsion;
    return 1.0 / kf_of("neuber", &input, true).q - 1.0;
}

/* What the rounding of the printed coefficients leaves open, in MPa and mm or in ksi and inches. */
static double open_in_mm(double su)
{
    return 0.5e-3 + 0.5e-5 * su + 0.5e-8 * su * su + 0.5e-12 * su * su * su;
}

static double open_in_inches(double s)
{
    return 0.5e-3 + 0.5e-5 * s + 0.5e-7 * s * s + 0.5e-10 * s * s * s;
}

/* sqrt(p) = 0.5697, 0.2442, 0.0982 at Su = 400, 820, 1400 MPa. In torsion against the polynomial in inches,
 * 0.190 - 2.51e-3 S + 1.35e-5 S^2 - 2.67e-8 S^3 (S in ksi; Budynas & Nisbett, from memory). */
static void neuber_lengths(void **state)
{
    static const double ultimate[] = {400.0, 820.0, 1400.0}, root[] = {0.5697, 0.2442, 0.0982};
    static const double ksi = 6.894757293;
    for (int i = 0; i < 3; i++) {
        assert_near(root_of(NW_STEEL, ultimate[i], false), root[i], 0.0, 0.5e-4);
        double s = ultimate[i] / ksi;
        double inches = 0.190 - 2.51e-3 * s + 1.35e-5 * s * s - 2.67e-8 * s * s * s;
        assert_near(root_of(NW_STEEL, ultimate[i], true), inches * sqrt(25.4), 0.0,
                    open_in_mm(ultimate[i]) + open_in_inches(s) * sqrt(25.4));
    }
}

/* Norton, Machine Design, tables 6-6 and 6-7: Su in ksi, sqrt(p) in in^0.5. The polynomial stays within 0.004 of
 * the table for steels; for aluminium the table itself is built in. */
static void neuber_tables(void **state)
{
    static const double steel[][2] = {{50, 0.130},  {60, 0.108},  {80, 0.080},
                                      {100, 0.062}, {120, 0.049}, {140, 0.039},
                                      {160, 0.031}, {200, 0.018}, {240, 0.009}};
    static const double aluminium[][2] = {{10, 0.500}, {20, 0.264}, {30, 0.180}, {45, 0.111}};
    static const double ksi = 6.894757293, root_inch = 5.0398;
    for (size_t i = 0; i < sizeof steel / sizeof steel[0]; i++) {
        assert_near(root_of(NW_STEEL, steel[i][0] * ksi, false) / root_inch, steel[i][1], 0.0,
                    0.004);
    }
    for (size_t i = 0; i < sizeof aluminium / sizeof aluminium[0]; i++) {
        assert_near(root_of(NW_ALUMINIUM, aluminium[i][0] * ksi, false) / root_inch,
                    aluminium[i][1], 1e-4, 0.0);
    }
    double between = root_of(NW_ALUMINIUM, 12.5 * ksi, false) / root_inch;
    assert_near(between, (0.500 + 0.341) / 2.0, 1e-4, 0.0);
}

/* Norton's worked example: Su = 100 ksi, r = 0.25 in, Kt = 1.56 gives q = 0.89, Kf = 1.50. */
static void neuber_example(void **state)
{
    nw_sensitivity_input input = input_of(NW_STEEL, 689.4757293, 6.35, 1.56);
    nw_kf kf = kf_of("neuber", &input, false);
    assert_near(kf.q, 0.89, 0.0, 0.005);
    assert_near(kf.kf, 1.50, 0.0, 0.005);
}

static void neuber_range(void **state)
{
    static const struct {
        nw_group group;
        double ultimate;
        bool within;
    } rows[] = {
        {NW_STEEL, 340.0, true},    {NW_STEEL, 339.0, false},    {NW_STEEL, 1700.0, true},
        {NW_STEEL, 1701.0, false},  {NW_ALUMINIUM, 310.0, true}, {NW_ALUMINIUM, 311.0, false},
        {NW_ALUMINIUM, 69.0, true}, {NW_ALUMINIUM, 68.0, false}, {NW_TITANIUM, 900.0, false},
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        nw_sensitivity_input input = input_of(rows[i].group, rows[i].ultimate, 1.0, 2.0);
        assert_int_equal(kf_of("neuber", &input, false).applies, rows[i].within);
    }
}

/* ---- stress gradient ---- */

/* Yield 600 MPa, gradient 2.3/mm: n = 1.1019; surface-hardened 1 + sqrt(2.3) 10^-0.7 = 1.3026. */
static void gradient(void **state)
{
    nw_sensitivity_input input = input_of(NW_STEEL, NAN, 1.0, 2.0);
    input.gradient_per_mm = 2.3;
    assert_false(kf_of("gradient", &input, true).applies);
    input.yield_strength_mpa = 600.0;
    assert_near(2.0 / kf_of("gradient", &input, false).kf, 1.1019, 0.0, 0.5e-4);
    input.yield_strength_mpa = NAN;
    input.surface_hardened = true;
    assert_near(2.0 / kf_of("gradient", &input, false).kf, 1.3026, 0.0, 0.5e-4);
    input.gradient_per_mm = NAN;
    assert_false(kf_of("gradient", &input, true).applies);
}

/* Su = 820 MPa: n = 1.0248, 1.1111, 1.1935 at G = 0.05, 0.5, 2.3/mm; no step at 0.1 and 1/mm. */
static void guideline(void **state)
{
    static const double gradient_per_mm[] = {0.05, 0.5, 2.3}, support[] = {1.0248, 1.1111, 1.1935};
    nw_sensitivity_input input = input_of(NW_STEEL, 820.0, 1.0, 2.0);
    for (int i = 0; i < 3; i++) {
        input.gradient_per_mm = gradient_per_mm[i];
        assert_near(2.0 / kf_of("guideline", &input, false).kf, support[i], 0.0, 0.5e-4);
    }
    for (double g = 0.1; g < 2.0; g *= 10.0) {
        input.gradient_per_mm = g * (1.0 - 1e-9);
        double below = kf_of("guideline", &input, false).kf;
        input.gradient_per_mm = g * (1.0 + 1e-9);
        assert_near(kf_of("guideline", &input, false).kf, below, 1e-8, 0.0);
    }
    input.gradient_per_mm = 101.0;
    assert_false(kf_of("guideline", &input, false).applies);
    assert_true(kf_of("guideline", &input, true).applies);
    input.torsion = true;
    assert_false(kf_of("guideline", &input, true).applies);
}

/* ---- what holds for all ---- */

/* The fatigue notch factor lies between 1 and Kt (common practice, no source), whatever goes in. */
static void between_one_and_kt(void **state)
{
    test_random random = {20240};
    int applied = 0, clamped = 0;
    for (int i = 0; i < 20000; i++) {
        nw_sensitivity_input input =
            input_of((nw_group)test_random_int(&random, 0, NW_ALUMINIUM),
                     exp(test_random_between(&random, log(20.0), log(5000.0))),
                     exp(test_random_between(&random, log(1e-3), log(1e3))),
                     exp(test_random_between(&random, 0.0, log(30.0))));
        input.yield_strength_mpa = 0.7 * input.ultimate_strength_mpa;
        input.gradient_per_mm = 2.0 / input.radius_mm;
        input.torsion = test_random_int(&random, 0, 1) == 1;
        input.plain = exp(test_random_between(&random, 0.0, log(input.kt)));
        const nw_sensitivity *record = nw_sensitivity_at((size_t)test_random_int(&random, 0, 3));
        nw_kf kf = nw_kf_evaluate(record, &input, true);
        if (kf.applies) {
            assert_true(kf.kf >= 1.0 && kf.kf <= input.kt * (1.0 + 1e-14));
            assert_true(kf.kf >= input.plain * (1.0 - 1e-14));
            assert_true(kf.q >= 0.0 && kf.q <= 1.0);
            applied++;
            clamped += kf.clamped;
        }
    }
    assert_true(applied > 5000);
    assert_true(clamped > 50); /* the sweep does reach where the formulas fail */
}

/* A larger radius or strength never lowers the sensitivity; an endless radius gives Kt. */
static void grows_with_radius_and_strength(void **state)
{
    static const char *const keys[] = {"peterson", "neuber"};
    for (int k = 0; k < 2; k++) {
        double before = 0.0;
        for (double r = 0.01; r < 1e3; r *= 2.0) {
            nw_sensitivity_input input = input_of(NW_STEEL, 700.0, r, 2.5);
            double q = kf_of(keys[k], &input, false).q;
            assert_true(q > before);
            before = q;
        }
        before = 0.0;
        for (double su = 550.0; su <= 1700.0; su += 50.0) {
            nw_sensitivity_input input = input_of(NW_STEEL, su, 1.0, 2.5);
            double q = kf_of(keys[k], &input, false).q;
            assert_true(q > before);
            before = q;
        }
        nw_sensitivity_input input = input_of(NW_STEEL, 700.0, 1e12, 2.5);
        assert_near(kf_of(keys[k], &input, false).kf, 2.5, 1e-5, 0.0);
    }
}

static void registry(void **state)
{
    size_t i = 0;
    for (const nw_sensitivity *r; (r = nw_sensitivity_at(i)) != NULL; i++) {
        assert_ptr_equal(nw_sensitivity_find(r->key), r);
        const char *texts[] = {r->key, r->title, r->equation, r->reference, r->range};
        for (int k = 0; k < 5; k++) {
            assert_non_null(texts[k]);
            assert_true(strlen(texts[k]) > 4);
        }
        assert_non_null(r->evaluate);
    }
    assert_int_equal(i, 4);
    assert_true(i <= NW_SENSITIVITIES_MOST);
    assert_null(nw_sensitivity_find("none"));
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(peterson),           cmocka_unit_test(peterson_lengths),
        cmocka_unit_test(peterson_aluminium), cmocka_unit_test(neuber),
        cmocka_unit_test(neuber_lengths),     cmocka_unit_test(neuber_tables),
        cmocka_unit_test(neuber_example),     cmocka_unit_test(neuber_range),
        cmocka_unit_test(gradient),           cmocka_unit_test(guideline),
        cmocka_unit_test(between_one_and_kt), cmocka_unit_test(grows_with_radius_and_strength),
        cmocka_unit_test(registry),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
