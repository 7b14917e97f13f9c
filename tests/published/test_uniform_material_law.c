/* Uniform material law: Baeumel & Seeger, Materials Data for Cyclic Loading, Supplement 1, Elsevier 1990
 * (coefficients from memory). The sets below were computed from the published coefficients outside this
 * project; the row Su = 500 MPa agrees with one printed in Metals 15 (2025) 780. */
#include "support/support.h"

static nw_estimate_values evaluate(nw_group group, double ultimate, double modulus)
{
    const nw_estimate *law = nw_estimate_find("uniform_material_law");
    nw_estimate_input input = {group, ultimate, modulus};
    nw_estimate_values values;
    char why[300];
    assert_non_null(law);
    assert_true(law->applies(&input, why, sizeof why));
    law->evaluate(&input, &values);
    return values;
}

/* Su = 820 MPa, E = 206 GPa: 1230.00, -0.0870, 0.5177, -0.5800, K' 1353, n' 0.15 (psi = 0.8774). */
static void steel_820(void **state)
{
    nw_estimate_values v = evaluate(NW_STEEL, 820.0, 206000.0);
    assert_near(v.fatigue_strength_coefficient_mpa, 1230.00, 0.0, 0.005);
    assert_near(v.fatigue_strength_exponent, -0.0870, 0.0, 0.5e-4);
    assert_near(v.fatigue_ductility_coefficient, 0.5177, 0.0, 0.5e-4);
    assert_near(v.fatigue_ductility_exponent, -0.5800, 0.0, 0.5e-4);
    assert_near(v.strength_coefficient_mpa, 1353.0, 0.0, 0.5);
    assert_near(v.hardening_exponent, 0.15, 0.0, 0.005);
}

/* 0.45 Su/E + 1.95e-4 psi = 0.0017913 + 0.0001711 at 5e5 cycles. */
static void endurance_of_steel_820(void **state)
{
    nw_estimate_values v = evaluate(NW_STEEL, 820.0, 206000.0);
    assert_near(v.endurance_strain_amplitude, 0.0019624, 0.0, 0.5e-7);
    assert_near(v.endurance_cycles, 5e5, 0.0, 0.0);
}

/* The elastic line of the same set at 1e6 cycles: 348.1 MPa; transition life 2Nt = 8.53e3 reversals. */
static void lines_of_steel_820(void **state)
{
    nw_estimate_values v = evaluate(NW_STEEL, 820.0, 206000.0);
    nw_strain_life elastic = {206000.0, v.fatigue_strength_coefficient_mpa,
                              v.fatigue_strength_exponent, 0.0, v.fatigue_ductility_exponent};
    nw_strain_life plastic = {206000.0, 0.0, v.fatigue_strength_exponent,
                              v.fatigue_ductility_coefficient, v.fatigue_ductility_exponent};
    assert_near(206000.0 * nw_strain_life_amplitude(&elastic, 1e6), 348.1, 0.0, 0.05);
    double early = 0.5 * 8.525e3, late = 0.5 * 8.535e3; /* cycles, half a digit to each side */
    assert_true(nw_strain_life_amplitude(&plastic, early) >
                nw_strain_life_amplitude(&elastic, early));
    assert_true(nw_strain_life_amplitude(&plastic, late) < nw_strain_life_amplitude(&elastic, late));
}

/* Metals 15 (2025) 780, row Su = 500 MPa, E = 210 GPa: sf' = 750. Su/E is below 0.003, so psi = 1. */
static void steel_500(void **state)
{
    nw_estimate_values v = evaluate(NW_STEEL, 500.0, 210000.0);
    assert_near(v.fatigue_strength_coefficient_mpa, 750.0, 0.0, 0.5);
    assert_near(v.fatigue_ductility_coefficient, 0.59, 0.0, 0.005);
}

/* Aluminium, Su = 470 MPa: sf' = 784.9; the rest are the law's constants. */
static void aluminium_470(void **state)
{
    nw_estimate_values v = evaluate(NW_ALUMINIUM, 470.0, 70000.0);
    assert_near(v.fatigue_strength_coefficient_mpa, 784.9, 0.0, 0.05);
    assert_near(v.fatigue_strength_exponent, -0.095, 0.0, 0.5e-3);
    assert_near(v.fatigue_ductility_coefficient, 0.35, 0.0, 0.005);
    assert_near(v.fatigue_ductility_exponent, -0.69, 0.0, 0.005);
    assert_near(v.strength_coefficient_mpa, 1.61 * 470.0, 1e-12, 0.0);
    assert_near(v.hardening_exponent, 0.11, 0.0, 0.005);
    assert_near(v.endurance_strain_amplitude, 0.42 * 470.0 / 70000.0, 1e-12, 0.0);
    assert_near(v.endurance_cycles, 1e6, 0.0, 0.0);
}

static void titanium_as_aluminium(void **state)
{
    nw_estimate_values a = evaluate(NW_ALUMINIUM, 470.0, 70000.0);
    nw_estimate_values t = evaluate(NW_TITANIUM, 470.0, 70000.0);
    assert_memory_equal(&a, &t, sizeof a);
}

/* psi = 1.375 - 125 Su/E meets 1 at Su/E = 0.003. */
static void ductility_factor_is_continuous(void **state)
{
    nw_estimate_values below = evaluate(NW_STEEL, 0.003 * 2e5 - 1e-6, 2e5);
    nw_estimate_values above = evaluate(NW_STEEL, 0.003 * 2e5 + 1e-6, 2e5);
    assert_near(above.fatigue_ductility_coefficient, below.fatigue_ductility_coefficient, 1e-8, 0.0);
}

static void refused(nw_group group, double ultimate, double modulus)
{
    const nw_estimate *law = nw_estimate_find("uniform_material_law");
    nw_estimate_input input = {group, ultimate, modulus};
    char why[300] = "";
    assert_false(law->applies(&input, why, sizeof why));
    assert_true(strlen(why) > 10);
}

/* Outside the materials it was made for, or where psi would not be positive (Su/E >= 0.011). */
static void refused_outside_its_range(void **state)
{
    refused(NW_NICKEL, 800.0, 2e5);
    refused(NW_CAST_IRON, 400.0, 1.6e5);
    refused(NW_GROUP_UNSTATED, 400.0, 2e5);
    refused(NW_STEEL, 2200.0, 2e5);
    refused(NW_STEEL, NAN, 2e5);
    refused(NW_STEEL, 800.0, NAN);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(steel_820),
        cmocka_unit_test(endurance_of_steel_820),
        cmocka_unit_test(lines_of_steel_820),
        cmocka_unit_test(steel_500),
        cmocka_unit_test(aluminium_470),
        cmocka_unit_test(titanium_as_aluminium),
        cmocka_unit_test(ductility_factor_is_continuous),
        cmocka_unit_test(refused_outside_its_range),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
