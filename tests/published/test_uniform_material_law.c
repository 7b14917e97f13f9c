/* Uniform material law: Baeumel & Seeger, Materials Data for Cyclic Loading, Supplement 1, Elsevier 1990
 * (coefficients from memory). The sets below were computed from the published coefficients outside this
 * project; the row Su = 500 MPa agrees with one printed in Metals 15 (2025) 780. */
#include "support/support.h"

/* Reads a material file of strengths only. Strengths are written as given, "820 MPa". */
static nw_status read_strengths(const char *group, const char *ultimate, const char *modulus,
                                nw_material *material, nw_diagnostics *diagnostics)
{
    test_scratch scratch = test_scratch_create();
    char text[600];
    snprintf(text, sizeof text,
             "notchwright_material: 1\nname: probe\ngroup: %s\nbasis: estimated\nsource: none\n"
             "estimate: uniform_material_law\nultimate_strength: %s\nyoungs_modulus: %s\n",
             group, ultimate, modulus);
    nw_diagnostics_clear(diagnostics);
    const char *path = test_scratch_text(&scratch, "probe.yaml", text);
    nw_status status = nw_material_read(path, material, diagnostics);
    test_scratch_remove(&scratch);
    return status;
}

static nw_material evaluate(const char *group, const char *ultimate, const char *modulus)
{
    nw_material material;
    nw_diagnostics diagnostics;
    assert_int_equal(read_strengths(group, ultimate, modulus, &material, &diagnostics), NW_OK);
    assert_string_equal(material.estimate, "uniform_material_law");
    assert_int_equal(material.strain_life_origin, NW_FROM_ESTIMATE);
    return material;
}

/* Su = 820 MPa, E = 206 GPa: 1230.00, -0.0870, 0.5177, -0.5800, K' 1353, n' 0.15 (psi = 0.8774). */
static void steel_820(void **state)
{
    nw_material v = evaluate("steel", "820 MPa", "206 GPa");
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
    nw_material v = evaluate("steel", "820 MPa", "206 GPa");
    assert_near(v.endurance_strain_amplitude, 0.0019624, 0.0, 0.5e-7);
    assert_near(v.endurance_cycles, 5e5, 0.0, 0.0);
}

/* The elastic line of the same set at 1e6 cycles: 348.1 MPa; transition life 2Nt = 8.53e3 reversals. */
static void lines_of_steel_820(void **state)
{
    nw_material v = evaluate("steel", "820 MPa", "206 GPa");
    nw_strain_life elastic = {206000.0, v.fatigue_strength_coefficient_mpa,
                              v.fatigue_strength_exponent, 0.0, v.fatigue_ductility_exponent};
    nw_strain_life plastic = {206000.0, 0.0, v.fatigue_strength_exponent,
                              v.fatigue_ductility_coefficient, v.fatigue_ductility_exponent};
    assert_near(206000.0 * nw_strain_life_amplitude(&elastic, 1e6), 348.1, 0.0, 0.05);
    double early = 0.5 * 8.525e3, late = 0.5 * 8.535e3; /* cycles, half a digit to each side */
    assert_true(nw_strain_life_amplitude(&plastic, early) >
                nw_strain_life_amplitude(&elastic, early));
    assert_true(nw_strain_life_amplitude(&plastic, late) <
                nw_strain_life_amplitude(&elastic, late));
}

/* Metals 15 (2025) 780, row Su = 500 MPa, E = 210 GPa: sf' = 750. Su/E is below 0.003, so psi = 1. */
static void steel_500(void **state)
{
    nw_material v = evaluate("steel", "500 MPa", "210 GPa");
    assert_near(v.fatigue_strength_coefficient_mpa, 750.0, 0.0, 0.5);
    assert_near(v.fatigue_ductility_coefficient, 0.59, 0.0, 0.005);
}

/* Aluminium, Su = 470 MPa: sf' = 784.9; the rest are the law's constants. */
static void aluminium_470(void **state)
{
    nw_material v = evaluate("aluminium", "470 MPa", "70 GPa");
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
    nw_material a = evaluate("aluminium", "470 MPa", "70 GPa");
    nw_material t = evaluate("titanium", "470 MPa", "70 GPa");
    assert_near(t.fatigue_strength_coefficient_mpa, a.fatigue_strength_coefficient_mpa, 0.0, 0.0);
    assert_near(t.fatigue_strength_exponent, a.fatigue_strength_exponent, 0.0, 0.0);
    assert_near(t.fatigue_ductility_coefficient, a.fatigue_ductility_coefficient, 0.0, 0.0);
    assert_near(t.fatigue_ductility_exponent, a.fatigue_ductility_exponent, 0.0, 0.0);
    assert_near(t.strength_coefficient_mpa, a.strength_coefficient_mpa, 0.0, 0.0);
    assert_near(t.hardening_exponent, a.hardening_exponent, 0.0, 0.0);
}

/* psi = 1.375 - 125 Su/E meets 1 at Su/E = 0.003: both sides of it, 1e-6 MPa apart. */
static void ductility_factor_is_continuous(void **state)
{
    nw_material below = evaluate("steel", "599.999999 MPa", "200 GPa");
    nw_material above = evaluate("steel", "600.000001 MPa", "200 GPa");
    assert_near(above.fatigue_ductility_coefficient, below.fatigue_ductility_coefficient, 1e-8,
                0.0);
}

static void refused(const char *group, const char *ultimate, const char *modulus)
{
    nw_material material;
    nw_diagnostics diagnostics;
    assert_int_equal(read_strengths(group, ultimate, modulus, &material, &diagnostics), NW_INPUT);
    assert_true(diagnostics.count >= 1);
    assert_true(strlen(diagnostics.items[0].message) > 10);
}

/* Outside the materials it was made for, or where psi would not be positive (Su/E >= 0.011). */
static void refused_outside_its_range(void **state)
{
    refused("nickel", "800 MPa", "200 GPa");
    refused("cast_iron", "400 MPa", "160 GPa");
    refused("steel", "2200 MPa", "200 GPa");
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
