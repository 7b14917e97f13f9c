/* The two-term curve inverted: special cases where the life is known in closed form. */
#include "support/support.h"

static void balanced_terms(void **state)
{
    /* At X = 1 both terms are their coefficients: y = a + b. */
    const nw_two_terms t = {0.006, -0.09, 0.5, -0.6};
    assert_near(nw_two_terms_reversals(&t, 0.506), 1.0, 1e-13, 0.0);
}

/* One term alone where the other is negligible: X = (y/a)^(1/p). */
static void single_term(void **state)
{
    const nw_two_terms elastic = {0.006, -0.09, 1e-300, -0.6}, plastic = {1e-300, -0.09, 0.5, -0.6};
    for (double y = 1e-4; y < 0.1; y *= 1.7) {
        assert_near(nw_two_terms_reversals(&elastic, y), pow(y / 0.006, -1.0 / 0.09), 1e-11, 0.0);
        assert_near(nw_two_terms_reversals(&plastic, y), pow(y / 0.5, -1.0 / 0.6), 1e-11, 0.0);
    }
}

/* Transition life 2Nt = (ef' E/sf')^(1/(b - c)): both terms equal. */
static void transition_life(void **state)
{
    const nw_two_terms t = {1230.0 / 206000.0, -0.087, 0.5177, -0.58};
    double transition = pow(t.b / t.a, 1.0 / (t.p - t.q));
    double y = 2.0 * t.a * pow(transition, t.p);
    assert_near(nw_two_terms_reversals(&t, y), transition, 1e-12, 0.0);
    assert_near(transition, 8.53e3, 0.0, 0.005e3); /* worked for these constants */
}

static void longer_life_for_less(void **state)
{
    const nw_two_terms t = {0.006, -0.09, 0.5, -0.6};
    double before = INFINITY;
    for (double y = 1e-6; y < 10.0; y *= 1.01) {
        double now = nw_two_terms_reversals(&t, y);
        assert_true(now < before && now > 0.0);
        before = now;
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(balanced_terms),
        cmocka_unit_test(single_term),
        cmocka_unit_test(transition_life),
        cmocka_unit_test(longer_life_for_less),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
