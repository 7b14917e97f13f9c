/* Three notches worked by hand from a case file to the life: Neuber's rule, Masing branches, material
 * memory and each mean-stress correction.
 *
 * Materials: Dowling, Mechanical Behavior of Materials, 4th ed. 2013, table 14.1 (read). No printed example
 * with a block of loads was at hand: the histories are constructed and were worked outside this project
 * by bisection. Digits as worked; the tolerance is half of the last one. */
#include "support/support.h"

#define SAE_1045                                                                                  \
    "notchwright: 1\n"                                                                            \
    "material:\n"                                                                                 \
    "  youngs_modulus: 202000 MPa\n"                                                              \
    "  cyclic_curve: {strength_coefficient: 1258 MPa, hardening_exponent: 0.208}\n"               \
    "  strain_life: {fatigue_strength_coefficient: 948 MPa, fatigue_strength_exponent: -0.092,\n" \
    "                fatigue_ductility_coefficient: 0.26, fatigue_ductility_exponent: -0.445}\n"

#define RQC_100                                                                                    \
    "notchwright: 1\n"                                                                             \
    "material:\n"                                                                                  \
    "  youngs_modulus: 200000 MPa\n"                                                               \
    "  cyclic_curve: {strength_coefficient: 903 MPa, hardening_exponent: 0.0905}\n"                \
    "  strain_life: {fatigue_strength_coefficient: 938 MPa, fatigue_strength_exponent: -0.0648,\n" \
    "                fatigue_ductility_coefficient: 1.38, fatigue_ductility_exponent: -0.704}\n"

static nw_assessment *assess(const char *text, const char *correction)
{
    test_scratch scratch = test_scratch_create();
    const char *path = test_scratch_text(&scratch, "case.yaml", text);
    char setting[64];
    snprintf(setting, sizeof setting, "life.mean_stress=%s", correction);
    const char *settings[] = {setting};
    nw_diagnostics diagnostics;
    nw_diagnostics_clear(&diagnostics);
    nw_case input;
    nw_assessment *result = NULL;
    nw_assess_options options = {.all_loops = true};
    assert_int_equal(nw_case_read(path, settings, 1, &input, &diagnostics), NW_OK);
    assert_int_equal(nw_assess(&input, &options, &result, &diagnostics), NW_OK);
    nw_case_clear(&input);
    test_scratch_remove(&scratch);
    return result;
}

static const nw_loop_result *loop_of(const nw_assessment *result, double max, double min)
{
    for (size_t i = 0; i < result->loop_count; i++) {
        const nw_loop_values *v = &result->loops[i].values;
        if (fabs(v->load_max_mpa - max) < 1e-9 && fabs(v->load_min_mpa - min) < 1e-9) {
            return &result->loops[i];
        }
    }
    fail_msg("no loop from %g to %g MPa", max, min);
    return NULL;
}

static const char *const corrections[] = {"none", "morrow", "manson_halford", "swt"};

/* ---- SAE 1045, Kt = 2.5, nominal 0, +200, then -100 to +200 for good ---- */

static const char constant_amplitude[] = SAE_1045 "notch: {kt: 2.5, rule: neuber}\n"
                                                  "load:\n"
                                                  "  - history: [200, -100, 200]\n"
                                                  "    scale: 1 MPa\n";

static void constant_amplitude_path(void **state)
{
    nw_assessment *result = assess(constant_amplitude, "none");
    assert_int_equal(result->loop_count, 1);
    const nw_loop_values *v = &result->loops[0].values;
    assert_near(v->load_max_mpa, 500.0, 1e-12, 0.0);
    assert_near(v->load_min_mpa, -250.0, 1e-12, 0.0);
    assert_near(v->stress_max_mpa, 342.425, 0.0, 0.5e-3);
    assert_near(v->stress_min_mpa, -244.893, 0.0, 0.5e-3);
    assert_near(v->stress_mean_mpa, 48.766, 0.0, 0.5e-3);
    assert_near(2.0 * v->stress_amplitude_mpa, 587.318, 0.0, 0.5e-3);
    assert_near(v->strain_amplitude, 0.00237065, 0.0, 0.5e-8);
    assert_near(result->extremes.strain_max, 0.00361429, 0.0, 0.5e-8);
    assert_near(result->extremes.strain_min, -0.00112702, 0.0, 0.5e-8);
    nw_assessment_free(result);
}

static void constant_amplitude_lives(void **state)
{
    static const double cycles[] = {164310, 143237, 92547, 103704};
    for (size_t i = 0; i < 4; i++) {
        nw_assessment *result = assess(constant_amplitude, corrections[i]);
        assert_near(result->loops[0].cycles, cycles[i], 0.0, 0.5);
        assert_near(1.0 / result->damage_per_block, cycles[i], 0.0, 0.5);
        nw_assessment_free(result);
    }
}

/* The first loop closes only when the load is back at its maximum, at the end of the first block. */
static void constant_amplitude_first_block(void **state)
{
    nw_assessment *result = assess(constant_amplitude, "none");
    assert_near(result->damage_first_block, result->damage_per_block, 1e-12, 0.0);
    assert_near(result->life_blocks, 164310.0, 0.0, 0.5);
    nw_assessment_free(result);
}

/* ---- RQC-100, Kt = 2.4 ---- */

static const char rqc_block[] = RQC_100 "notch: {kt: 2.4, rule: neuber}\n"
                                        "load:\n"
                                        "  - history: [350, -250, 200, -100, 250, -50, 350]\n"
                                        "    scale: 1 MPa\n";

static void assert_loop(const nw_loop_result *loop, double amplitude, double mean)
{
    assert_near(loop->values.strain_amplitude, amplitude, 0.0, 0.5e-6);
    assert_near(loop->values.stress_mean_mpa, mean, 0.0, 0.005);
    assert_near(loop->count, 1.0, 0.0, 0.0);
}

static void rqc_block_loops(void **state)
{
    nw_assessment *result = assess(rqc_block, "swt");
    assert_near(result->loops_total, 3.0, 0.0, 0.0);
    assert_loop(loop_of(result, 2.4 * 200, 2.4 * -100), 0.001817, 84.98);
    assert_loop(loop_of(result, 2.4 * 250, 2.4 * -50), 0.001817, 126.79);
    assert_loop(loop_of(result, 2.4 * 350, 2.4 * -250), 0.004964, 22.54);
    nw_assessment_free(result);
}

static void rqc_block_tips(void **state)
{
    nw_assessment *result = assess(rqc_block, "swt");
    const nw_loop_values *small = &loop_of(result, 480.0, -240.0)->values;
    const nw_loop_values *middle = &loop_of(result, 600.0, -120.0)->values;
    const nw_loop_values *large = &loop_of(result, 840.0, -600.0)->values;
    assert_near(large->stress_max_mpa, 544.717, 0.0, 0.5e-3);
    assert_near(large->stress_min_mpa, -499.639, 0.0, 0.5e-3);
    assert_near(small->stress_max_mpa, 441.529, 0.0, 0.5e-3);
    assert_near(small->stress_min_mpa, -271.560, 0.0, 0.5e-3);
    assert_near(middle->stress_max_mpa, 483.339, 0.0, 0.5e-3);
    assert_near(middle->stress_min_mpa, -229.750, 0.0, 0.5e-3);
    assert_near(large->strain_mean + large->strain_amplitude, 0.006477, 0.0, 0.5e-6);
    assert_near(large->strain_mean - large->strain_amplitude, -0.003451, 0.0, 0.5e-6);
    assert_near(small->strain_mean + small->strain_amplitude, 0.002746, 0.0, 0.5e-6);
    assert_near(small->strain_mean - small->strain_amplitude, -0.000889, 0.0, 0.5e-6);
    assert_near(middle->strain_mean + middle->strain_amplitude, 0.003874, 0.0, 0.5e-6);
    assert_near(middle->strain_mean - middle->strain_amplitude, 0.000239, 0.0, 0.5e-6);
    nw_assessment_free(result);
}

static void rqc_block_lives(void **state)
{
    static const double blocks[] = {4248.0, 4044.6, 2860.4, 3764.1};
    for (size_t i = 0; i < 4; i++) {
        nw_assessment *result = assess(rqc_block, corrections[i]);
        assert_near(1.0 / result->damage_per_block, blocks[i], 0.0, 0.05);
        nw_assessment_free(result);
    }
}

/* ---- SAE 1045, Kt = 2.5 ---- */

static const char sae_block[] =
    SAE_1045 "notch: {kt: 2.5, rule: neuber}\n"
             "load:\n"
             "  - history: [250, -150, 100, -50, 150, 0, 50, -50, 250]\n"
             "    scale: 1 MPa\n";

static void assert_tips(const nw_loop_result *loop, double stress_max, double strain_max,
                        double stress_min, double strain_min)
{
    const nw_loop_values *v = &loop->values;
    assert_near(v->stress_max_mpa, stress_max, 0.0, 0.5e-3);
    assert_near(v->stress_min_mpa, stress_min, 0.0, 0.5e-3);
    assert_near(v->strain_mean + v->strain_amplitude, strain_max, 0.0, 0.5e-6);
    assert_near(v->strain_mean - v->strain_amplitude, strain_min, 0.0, 0.5e-6);
}

static void sae_block_tips(void **state)
{
    nw_assessment *result = assess(sae_block, "swt");
    assert_near(result->loops_total, 4.0, 0.0, 0.0);
    assert_tips(loop_of(result, 625.0, -375.0), 380.715, 0.005079, -304.135, -0.002149);
    assert_tips(loop_of(result, 250.0, -125.0), 221.552, 0.001529, -136.652, -0.000414);
    assert_tips(loop_of(result, 375.0, -125.0), 283.183, 0.002592, -167.597, -0.000153);
    assert_tips(loop_of(result, 125.0, 0.0), 49.870, 0.001268, -75.022, 0.000649);
    nw_assessment_free(result);
}

static void sae_block_lives(void **state)
{
    static const double blocks[] = {30707, 28609, 19561, 23112};
    for (size_t i = 0; i < 4; i++) {
        nw_assessment *result = assess(sae_block, corrections[i]);
        assert_near(1.0 / result->damage_per_block, blocks[i], 0.0, 0.5);
        nw_assessment_free(result);
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(constant_amplitude_path),
        cmocka_unit_test(constant_amplitude_lives),
        cmocka_unit_test(constant_amplitude_first_block),
        cmocka_unit_test(rqc_block_loops),
        cmocka_unit_test(rqc_block_tips),
        cmocka_unit_test(rqc_block_lives),
        cmocka_unit_test(sae_block_tips),
        cmocka_unit_test(sae_block_lives),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
