/* The tips of every loop of the repeating block satisfy the rule's equation and the cyclic curve, both
 * written in ranges: with s = ds/2, e = de/2 and L = dL/2 they are the equations of first loading (Masing).
 *
 * Tolerance: the curve is within 1e-9; a range is the difference of two values of up to about 1500 MPa
 * carried along some fifty branches, which rounds to less than 1e-10 MPa. */
#include "support/loops.h"
#include "support/part.h"

enum { PARTS = 100, BLOCKS = 20, LONGEST = 50 };

static double plastic_strain(const nw_rule_input *m, double stress)
{
    return pow(stress / m->strength_coefficient_mpa, 1.0 / m->hardening_exponent);
}

static double curve_strain(const nw_rule_input *m, double stress)
{
    return stress / m->youngs_modulus_mpa + plastic_strain(m, stress);
}

static double energy(const nw_rule_input *m, double stress)
{
    return 0.5 * stress * stress / m->youngs_modulus_mpa +
           stress * plastic_strain(m, stress) / (m->hardening_exponent + 1.0);
}

/* Left over right side of the rule's equation, less 1. */
static double imbalance(const test_part *part, double load, double stress, double strain)
{
    const nw_rule_input *m = &part->rule_input;
    const char *rule = part->rule->key;
    double modulus = m->youngs_modulus_mpa, factor = m->factor, ratio = m->limit_load_ratio;
    if (strcmp(rule, "linear") == 0) {
        return strain / (load / modulus) - 1.0;
    }
    if (strcmp(rule, "esed") == 0) {
        double right = m->plastic_net_section ? factor * factor * energy(m, load / factor)
                                              : 0.5 * load * load / modulus;
        return energy(m, stress) / right - 1.0;
    }
    double right = load * load / modulus;
    if (strcmp(rule, "limit_load") == 0) {
        right = load * ratio * curve_strain(m, load / ratio);
    } else if (m->plastic_net_section) {
        right = factor * load * curve_strain(m, load / factor);
    }
    return stress * strain / right - 1.0;
}

/* Plastic strain and energy grow with the stress to the power 1/n' + 1, at most 21 here. */
static void assert_loop(const test_part *part, const nw_loop *loop)
{
    double load = 0.5 * test_loop_range(loop);
    double stress = 0.5 * fabs(loop->start.stress_mpa - loop->tip.stress_mpa);
    double strain = 0.5 * fabs(loop->start.strain - loop->tip.strain);
    double uncertain = 1e-9 + 1e-10 / load;
    assert_near(imbalance(part, load, stress, strain), 0.0, 0.0, 22.0 * uncertain);
    assert_near(strain, curve_strain(&part->rule_input, stress), 22.0 * uncertain, 0.0);
    double rise = (loop->tip.load_mpa - loop->start.load_mpa);
    assert_true(rise * (loop->tip.stress_mpa - loop->start.stress_mpa) > 0.0);
    assert_true(rise * (loop->tip.strain - loop->start.strain) > 0.0);
}

static void tips_satisfy_the_rule_in_ranges(void **state)
{
    test_random random = {61};
    for (int i = 0; i < PARTS; i++) {
        test_part part = test_part_random(&random, "none");
        for (int j = 0; j < BLOCKS; j++) {
            double loads[LONGEST];
            size_t count = test_random_loads(&random, loads, LONGEST);
            nw_event event = test_event(loads, count, 1.0);
            test_loops loops = test_repeating_loops(part.curve, &event, 1);
            for (size_t k = 0; k < loops.count; k++) {
                assert_loop(&part, &loops.items[k].loop);
            }
            assert_true(loops.count > 0);
            test_loops_free(&loops);
            nw_event_clear(&event);
        }
        test_part_free(&part);
    }
}

/* The outermost loop reaches the initial curve at the largest |L|. */
static void largest_load_is_on_the_initial_curve(void **state)
{
    test_random random = {62};
    for (int i = 0; i < PARTS; i++) {
        test_part part = test_part_random(&random, "none");
        double loads[LONGEST], largest = 0.0, stress, strain;
        size_t count = test_random_loads(&random, loads, LONGEST);
        for (size_t k = 0; k < count; k++) {
            largest = fabs(loads[k]) > fabs(largest) ? loads[k] : largest;
        }
        nw_event event = test_event(loads, count, 1.0);
        test_loops loops = test_repeating_loops(part.curve, &event, 1);
        nw_notch_curve_at(part.curve, largest, &stress, &strain);
        bool found = false;
        for (size_t k = 0; k < loops.count; k++) {
            const nw_local_point *ends[2] = {&loops.items[k].loop.start, &loops.items[k].loop.tip};
            for (int e = 0; e < 2; e++) {
                if (ends[e]->load_mpa == largest) {
                    assert_near(ends[e]->stress_mpa, stress, 1e-12, 0.0);
                    assert_near(ends[e]->strain, strain, 1e-12, 0.0);
                    found = true;
                }
            }
        }
        assert_true(found);
        test_loops_free(&loops);
        nw_event_clear(&event);
        test_part_free(&part);
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(tips_satisfy_the_rule_in_ranges),
        cmocka_unit_test(largest_load_is_on_the_initial_curve),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
