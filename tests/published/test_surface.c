/* Roughness factor of the FKM guideline, Analytical strength assessment: K_R = 1 - a_R log10(Rz)
 * log10(2 Rm/R_mN). The guideline's own example, Rm = 600 MPa and Rz = 100 um, prints 0.79; the other values
 * were computed from the printed coefficients outside this project, to four digits. */
#include "life/surface.h"
#include "support/support.h"

static double factor_of(nw_group group, double ultimate, double roughness_um)
{
    nw_material material = {.group = group, .ultimate_strength_mpa = ultimate};
    char why[200] = "";
    return nw_roughness_factor(&material, roughness_um, why, sizeof why);
}

static void guideline_example(void **state)
{
    assert_near(factor_of(NW_STEEL, 600.0, 100.0), 0.79, 0.0, 0.005);
}

static void steels(void **state)
{
    static const double roughness[4] = {6.3, 25.0, 100.0, 200.0};
    static const struct {
        double ultimate, factor[4];
    } rows[] = {
        {400.0, {0.9471, 0.9074, 0.8675, 0.8476}},
        {600.0, {0.9161, 0.8533, 0.7901, 0.7585}},
        {820.0, {0.8922, 0.8115, 0.7304, 0.6898}},
        {1200.0, {0.8632, 0.7607, 0.6576, 0.6061}},
    };
    for (size_t i = 0; i < 4; i++) {
        for (size_t j = 0; j < 4; j++) {
            double found = factor_of(NW_STEEL, rows[i].ultimate, roughness[j]);
            assert_near(found, rows[i].factor[j], 0.0, 0.5e-4);
        }
    }
}

static void wrought_aluminium(void **state)
{
    assert_near(factor_of(NW_ALUMINIUM, 470.0, 25.0), 0.7388, 0.0, 0.5e-4);
}

static void never_above_one(void **state)
{
    assert_near(factor_of(NW_STEEL, 820.0, 1.0), 1.0, 0.0, 0.0);
    assert_near(factor_of(NW_STEEL, 820.0, 0.2), 1.0, 0.0, 0.0);
    assert_near(factor_of(NW_STEEL, 150.0, 25.0), 1.0, 0.0, 0.0);
}

static void refused_without_formula(void **state)
{
    nw_material material = {.group = NW_NICKEL, .ultimate_strength_mpa = 900.0};
    char why[200] = "";
    assert_true(isnan(nw_roughness_factor(&material, 10.0, why, sizeof why)));
    assert_non_null(strstr(why, "nickel"));
    assert_true(isnan(factor_of(NW_STEEL, NAN, 10.0)));
}

/* b' = b + log10(K_R)/log10(2 N_E), common practice with no single source: K_R = 0.8115 at 1e6 reversals
 * takes b from -0.0870 to -0.1021. */
static void exponent_of_a_rough_surface(void **state)
{
    nw_material material = {.youngs_modulus_mpa = 206000.0,
                            .fatigue_strength_coefficient_mpa = 1230.0,
                            .fatigue_strength_exponent = -0.0870,
                            .fatigue_ductility_coefficient = 0.5177,
                            .fatigue_ductility_exponent = -0.58};
    nw_strain_life rough = nw_strain_life_of(&material, 0.8115, 1e6);
    assert_near(rough.fatigue_strength_exponent, -0.1021, 0.0, 0.5e-4);
    assert_near(rough.fatigue_strength_coefficient_mpa, 1230.0, 0.0, 0.0);
    nw_strain_life smooth = nw_strain_life_of(&material, 1.0, 1e6);
    assert_near(smooth.fatigue_strength_exponent, -0.0870, 0.0, 0.0);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(guideline_example),       cmocka_unit_test(steels),
        cmocka_unit_test(wrought_aluminium),       cmocka_unit_test(never_above_one),
        cmocka_unit_test(refused_without_formula), cmocka_unit_test(exponent_of_a_rough_surface),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
