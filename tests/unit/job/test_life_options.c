/* The options of a case, each where its effect can be told in advance. */
#include "support/support.h"

static test_scratch scratch;

/* SAE 1045 of Dowling, Mechanical Behavior of Materials, 4th ed., table 14.1; the scatter is made up. */
static const char case_text[] =
    "notchwright: 1\n"
    "material:\n"
    "  youngs_modulus: 202000 MPa\n"
    "  cyclic_curve: {strength_coefficient: 1258 MPa, hardening_exponent: 0.208}\n"
    "  strain_life: {fatigue_strength_coefficient: 948 MPa, fatigue_strength_exponent: -0.092,\n"
    "                fatigue_ductility_coefficient: 0.26, fatigue_ductility_exponent: -0.445}\n"
    "  endurance: {strain_amplitude: 0.0011, cycles: 2e6}\n"
    "  scatter: {log10_life_sd: 0.2}\n"
    "notch: {kt: 2.5, rule: neuber}\n"
    "load:\n"
    "  - {scale: 1 MPa, history: [200, -100, 200]}\n"
    "  - {scale: 1 MPa, history: [0, 60, 0], repeats: 100}\n"
    "life: {mean_stress: none}\n";

static nw_assessment *assess(size_t count, const char *const *settings)
{
    const char *path = test_scratch_text(&scratch, "case.yaml", case_text);
    nw_diagnostics diagnostics;
    nw_diagnostics_clear(&diagnostics);
    nw_case input;
    nw_assessment *result = NULL;
    nw_assess_options options = {.all_loops = true};
    if (nw_case_read(path, settings, count, &input, &diagnostics) != NW_OK) {
        fail_msg("refused: %s", diagnostics.items[0].message);
    }
    assert_int_equal(nw_assess(&input, &options, &result, &diagnostics), NW_OK);
    nw_case_clear(&input);
    return result;
}

#define ASSESS(...)                                                      \
    assess(sizeof((const char *[]){__VA_ARGS__}) / sizeof(const char *), \
           (const char *[]){__VA_ARGS__})

static nw_assessment *base_case(void)
{
    return assess(0, NULL);
}

/* A log-normal life: its 90 % survival is 10^(-1.2816 s) of the median (standard normal tables). */
static void survival(void **state)
{
    nw_assessment *median = base_case(), *safe = ASSESS("life.survival=90 %");
    nw_assessment *bold = ASSESS("life.survival=10 %");
    double factor = pow(10.0, 0.2 * 1.2815515655446004);
    assert_near(safe->damage_per_block, median->damage_per_block * factor, 1e-9, 0.0);
    assert_near(bold->damage_per_block, median->damage_per_block / factor, 1e-9, 0.0);
    nw_assessment_free(median);
    nw_assessment_free(safe);
    nw_assessment_free(bold);
}

/* life = 1 + (sum - D1)/Ds. */
static void damage_sum_and_target(void **state)
{
    nw_assessment *one = base_case();
    nw_assessment *half = ASSESS("life.damage_sum=0.5", "life.target=1000");
    nw_assessment *far = ASSESS("life.target=1e12");
    double life = 1.0 + (0.5 - one->damage_first_block) / one->damage_per_block;
    assert_near(half->life_blocks, life, 1e-12, 0.0);
    assert_false(one->has_target);
    assert_true(half->has_target && half->target_reached);
    assert_true(far->has_target && !far->target_reached);
    nw_assessment_free(one);
    nw_assessment_free(half);
    nw_assessment_free(far);
}

/* A block that fails the part in less than itself: damage_sum / D1. */
static void failure_within_the_first_block(void **state)
{
    nw_assessment *one = base_case();
    char setting[64];
    snprintf(setting, sizeof setting, "life.damage_sum=%.17g", 0.25 * one->damage_first_block);
    nw_assessment *quarter = ASSESS(setting);
    assert_near(quarter->life_blocks, 0.25, 1e-12, 0.0);
    nw_assessment_free(one);
    nw_assessment_free(quarter);
}

static double damage_at_or_above(const nw_assessment *result, double strain_amplitude)
{
    double damage = 0.0;
    for (size_t i = 0; i < result->loop_count; i++) {
        bool counts = result->loops[i].values.strain_amplitude >= strain_amplitude;
        damage += counts ? result->loops[i].damage : 0.0;
    }
    return damage;
}

/* The largest loop (0.00237) is above the endurance amplitude (0.0011), the hundred small ones below. */
static void below_endurance(void **state)
{
    nw_assessment *all = base_case(), *none = ASSESS("life.below_endurance=harmless");
    nw_assessment *open = ASSESS("life.below_endurance=harmless_until_exceeded");
    double large = damage_at_or_above(all, 0.0011);
    assert_near(all->loops[0].values.strain_amplitude, 0.00237065, 0.0, 0.5e-8);
    assert_true(all->damage_per_block > large * (1.0 + 1e-9));
    assert_near(none->damage_per_block, large, 1e-12, 0.0);
    assert_near(open->damage_per_block, all->damage_per_block, 1e-12, 0.0);
    nw_assessment_free(all);
    nw_assessment_free(none);
    nw_assessment_free(open);
}

/* With every loop below it there is no damage and no end; two that differ only in that. */
static void never_exceeded(void **state)
{
    nw_assessment *open = ASSESS("life.below_endurance=harmless_until_exceeded",
                                 "material.endurance.strain_amplitude=0.0024");
    nw_assessment *none =
        ASSESS("life.below_endurance=harmless", "material.endurance.strain_amplitude=0.0024");
    assert_near(open->damage_per_block, 0.0, 0.0, 0.0);
    assert_near(none->damage_per_block, 0.0, 0.0, 0.0);
    assert_true(isinf(open->life_blocks) && isinf(none->life_blocks));
    nw_assessment_free(open);
    nw_assessment_free(none);
}

/* Ranges below 2.5 x 60 = 150 MPa of L are 100 loops of the second event. */
static void small_ranges_left_out(void **state)
{
    nw_assessment *all = base_case();
    nw_assessment *gated =
        ASSESS("load.1.ignore_ranges_below=151 MPa", "load.2.ignore_ranges_below=151 MPa");
    nw_assessment *at = ASSESS("load.2.ignore_ranges_below=150 MPa");
    assert_near(gated->left_out.loops + gated->loops_total, all->loops_total, 0.0, 0.0);
    assert_true(gated->left_out.loops >= 99.0);
    assert_near(gated->left_out.damage + gated->damage_per_block, all->damage_per_block, 1e-12,
                0.0);
    assert_near(at->left_out.loops, 0.0, 0.0, 0.0); /* a range just as large is not below */
    nw_assessment_free(all);
    nw_assessment_free(gated);
    nw_assessment_free(at);
}

static const char elastic_load[] = "load=[{scale: 1 MPa, history: [1, -0.6, 1]}]";

/* While all is elastic (plastic share 1e-8) a residual stress is added to L and moves the mean stress, no more. */
static void residual_stress_while_elastic(void **state)
{
    nw_assessment *result = ASSESS(elastic_load, "notch.residual_stress=-2 MPa");
    const nw_loop_values *v = &result->loops[0].values;
    assert_near(v->load_max_mpa, 2.5 - 2.0, 1e-12, 0.0);
    assert_near(v->load_min_mpa, -1.5 - 2.0, 1e-12, 0.0);
    assert_near(v->stress_max_mpa, 0.5, 1e-6, 0.0);
    assert_near(v->stress_min_mpa, -3.5, 1e-6, 0.0);
    nw_assessment_free(result);
}

/* The part starts at rest at the residual stress, on the notch curve: one tip of the first branch. */
static void residual_stress_is_where_the_part_starts(void **state)
{
    nw_assessment *result = ASSESS("load=[{scale: 1 MPa, history: [0, -200, 0]}]",
                                   "notch.residual_stress=400 MPa", "material.poisson_ratio=0.3");
    nw_rule_input input = {202000.0, 1258.0, 0.208, 2.5, NAN, false};
    double stress, strain;
    assert_int_equal(
        nw_notch_rule_solve(nw_notch_rule_find("neuber"), &input, 400.0, &stress, &strain), NW_OK);
    assert_near(result->extremes.stress_max_mpa, stress, 1e-9, 0.0);
    assert_near(result->extremes.strain_max, strain, 1e-9, 0.0);
    nw_assessment_free(result);
}

/* scale and offset, nominal and at the notch: four ways to write the same loads. */
static void the_same_load_written_four_ways(void **state)
{
    nw_assessment *results[] = {
        ASSESS("load=[{scale: 1 MPa, history: [200, -100, 200]}]"),
        ASSESS("load=[{scale: 2 MPa, offset: 50 MPa, history: [75, -75, 75]}]"),
        ASSESS("load=[{history: [500 MPa, -250 MPa, 0.5 GPa], as: notch_elastic_stress}]"),
        ASSESS("notch.kt=3", "notch.kf=2.5", "load=[{scale: 1 MPa, history: [200, -100, 200]}]"),
    };
    for (size_t i = 0; i < 4; i++) {
        assert_near(results[i]->loops[0].cycles, 164310.0, 0.0, 0.5); /* worked by hand */
        assert_near(results[i]->load_max_mpa, 500.0, 1e-12, 0.0);
        nw_assessment_free(results[i]);
    }
}

/* A gauge at the root: the strain is the one measured, under any rule, and the stress is on the cyclic
 * curve. */
static void strain_measured_at_the_root(void **state)
{
    nw_assessment *result = ASSESS("load=[{history: [0.4 %, -4000 microstrain, 0.004 ratio], as: "
                                   "notch_strain}]");
    nw_rule_input input = {202000.0, 1258.0, 0.208, 1.0, NAN, false};
    const nw_loop_values *v = &result->loops[0].values;
    assert_string_equal(result->rule->key, "linear");
    assert_near(v->strain_amplitude, 0.004, 1e-9, 0.0);
    assert_near(v->strain_mean, 0.0, 0.0, 1e-12);
    assert_near(nw_cyclic_strain(&input, v->stress_amplitude_mpa), 0.004, 1e-8, 0.0);
    nw_assessment_free(result);
}

/* surface_factor lowers the elastic line to that share at the endurance life: b' = b + log f/log 2N. */
static void surface_factor(void **state)
{
    nw_assessment *smooth = base_case(), *rough = ASSESS("life.surface_factor=0.8");
    double b = -0.092 + log10(0.8) / log10(4e6);
    assert_near(rough->curve.fatigue_strength_exponent, b, 1e-12, 0.0);
    assert_true(rough->life_blocks < smooth->life_blocks);
    nw_assessment_free(smooth);
    nw_assessment_free(rough);
}

static int make_scratch(void **state)
{
    scratch = test_scratch_create();
    return 0;
}

static int remove_scratch(void **state)
{
    test_scratch_remove(&scratch);
    return 0;
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(survival),
        cmocka_unit_test(damage_sum_and_target),
        cmocka_unit_test(failure_within_the_first_block),
        cmocka_unit_test(below_endurance),
        cmocka_unit_test(never_exceeded),
        cmocka_unit_test(small_ranges_left_out),
        cmocka_unit_test(residual_stress_while_elastic),
        cmocka_unit_test(residual_stress_is_where_the_part_starts),
        cmocka_unit_test(the_same_load_written_four_ways),
        cmocka_unit_test(strain_measured_at_the_root),
        cmocka_unit_test(surface_factor),
    };
    return cmocka_run_group_tests(tests, make_scratch, remove_scratch);
}
