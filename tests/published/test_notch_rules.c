/* Worked values of the notch rules for E = 206000 MPa, K' = 1184 MPa, n' = 0.187, Kt = 3.
 *
 * Rules: Neuber, J. Appl. Mech. 28 (1961) 544; Topper, Wetzel & Morrow, J. Materials 4 (1969) 200; Molski &
 * Glinka, Mater. Sci. Eng. 50 (1981) 93; Seeger & Heuler, J. Test. Eval. 8 (1980) 199 (all from memory).
 * The values were computed from those equations outside this project by bisection and are given to 0.001
 * MPa and 1e-6: the tolerance is half of that. */
#include "support/loops.h"

static const double half_stress_digit = 0.5e-3, half_strain_digit = 0.5e-6;

typedef struct worked {
    const char *rule;
    bool plastic_net_section;
    double limit_load_ratio;
    double load, stress, strain;
} worked;

static const worked values[] = {
    {"neuber", false, NAN, 450, 339.251, 0.002898},
    {"neuber", true, NAN, 450, 341.142, 0.002945},
    {"esed", false, NAN, 450, 319.416, 0.002457},
    {"limit_load", false, 1.5, 450, 371.218, 0.003826},
    {"limit_load", false, 2.0, 450, 349.715, 0.003169},
    {"limit_load", false, 3.0, 450, 341.142, 0.002945},
    {"neuber", false, NAN, 750, 427.574, 0.006386},
    {"neuber", true, NAN, 750, 443.528, 0.007397},
    {"esed", false, NAN, 750, 397.752, 0.004859},
    {"limit_load", false, 1.5, 750, 576.705, 0.024151},
    {"limit_load", false, 2.0, 750, 496.197, 0.011964},
    {"limit_load", false, 3.0, 750, 443.528, 0.007397},
};

enum { VALUES = sizeof values / sizeof values[0] };

static nw_rule_input input_of(const worked *w)
{
    return (nw_rule_input){
        206000.0, 1184.0, 0.187, 3.0, w->limit_load_ratio, w->plastic_net_section};
}

static void equation_solved(void **state)
{
    for (size_t i = 0; i < VALUES; i++) {
        const worked *w = &values[i];
        nw_rule_input input = input_of(w);
        double stress, strain;
        assert_int_equal(
            nw_notch_rule_solve(nw_notch_rule_find(w->rule), &input, w->load, &stress, &strain),
            NW_OK);
        assert_near(stress, w->stress, 0.0, half_stress_digit);
        assert_near(strain, w->strain, 0.0, half_strain_digit);
    }
}

static nw_notch_curve *curve_of(const worked *w)
{
    nw_rule_input input = input_of(w);
    nw_notch_curve *curve;
    assert_int_equal(
        nw_notch_curve_build(nw_notch_rule_find(w->rule), &input, w->load, &curve, NULL), NW_OK);
    return curve;
}

static void curve_built(void **state)
{
    for (size_t i = 0; i < VALUES; i++) {
        const worked *w = &values[i];
        nw_notch_curve *curve = curve_of(w);
        for (double sign = -1.0; sign <= 1.0; sign += 2.0) {
            double stress, strain;
            nw_notch_curve_at(curve, sign * w->load, &stress, &strain);
            assert_near(stress, sign * w->stress, 0.0, half_stress_digit);
            assert_near(strain, sign * w->strain, 0.0, half_strain_digit);
        }
        nw_notch_curve_free(curve);
    }
}

/* A range of 2 L has twice the stress and strain of L, the doubled curve (Masing): 678.503 MPa and 0.005795 for
 * Neuber's rule and a range of 900 MPa. */
static void doubled_range(void **state)
{
    nw_notch_curve *curve = curve_of(&values[0]);
    const double loads[] = {450, -450, 450};
    nw_event event = test_event(loads, 3, 1.0);
    test_loops loops = test_repeating_loops(curve, &event, 1);
    assert_int_equal(loops.count, 1);
    const nw_loop *loop = &loops.items[0].loop;
    assert_near(fabs(loop->start.stress_mpa - loop->tip.stress_mpa), 678.503, 0.0,
                half_stress_digit);
    assert_near(fabs(loop->start.strain - loop->tip.strain), 0.005795, 0.0, half_strain_digit);
    test_loops_free(&loops);
    nw_event_clear(&event);
    nw_notch_curve_free(curve);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(equation_solved),
        cmocka_unit_test(curve_built),
        cmocka_unit_test(doubled_range),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
