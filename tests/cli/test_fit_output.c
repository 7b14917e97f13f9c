/* What `notchwright fit` writes: the JSON keys that scripts rely on, the table of curves, the material file. */
#include "support/support.h"

#include <jansson.h>

static const char example[] = TEST_SOURCE_DIR "/examples/coupons/tests.csv";

static json_t *fit_json(const char *options)
{
    test_result result =
        test_shell("\"$NW\" fit '%s' --modulus '206 GPa' --format json %s", example, options);
    if (result.status != 0) {
        fail_msg("%s", result.err);
    }
    json_error_t error;
    json_t *root = json_loads(result.out, 0, &error);
    assert_non_null(root);
    test_result_free(&result);
    return root;
}

/* The value at "lines.plastic.a"; fails when there is none. */
static const json_t *at(const json_t *root, const char *path)
{
    char copy[200];
    snprintf(copy, sizeof copy, "%s", path);
    for (char *key = strtok(copy, "."); key != NULL; key = strtok(NULL, ".")) {
        root = json_is_array(root) ? json_array_get(root, (size_t)atoi(key))
                                   : json_object_get(root, key);
        if (root == NULL) {
            fail_msg("no key %s", path);
        }
    }
    return root;
}

static double number_at(const json_t *root, const char *path)
{
    return json_number_value(at(root, path));
}

static void json_keys(void **state)
{
    (void)state;
    static const char *const keys[] = {"lines.plastic.a",
                                       "lines.plastic.b",
                                       "lines.plastic.a_standard_error",
                                       "lines.plastic.a_low",
                                       "lines.plastic.a_high",
                                       "lines.plastic.b_standard_error",
                                       "lines.plastic.b_low",
                                       "lines.plastic.b_high",
                                       "lines.plastic.sd_log10_life",
                                       "lines.plastic.f_linearity",
                                       "lines.plastic.f_critical",
                                       "lines.plastic.points_used",
                                       "lines.plastic.points_left_out",
                                       "lines.elastic.sd_log10_life",
                                       "lines.cyclic.b",
                                       "likelihood.distribution",
                                       "likelihood.scatter",
                                       "likelihood.log_likelihood",
                                       "likelihood.aic",
                                       "likelihood.candidates.3.aic",
                                       "scatter.log10_life_sd",
                                       "curves.0.points.40.low",
                                       "curves.3.confidence",
                                       "tests.count",
                                       "tests.levels",
                                       "tests.replication_percent",
                                       "tests.verdict",
                                       "cautions.0.code",
                                       "covariance.matrix.3.3",
                                       "plan.rows.0.tests",
                                       "cyclic.disagreement",
                                       "parameters.fatigue_ductility_exponent.profile_low"};
    json_t *root = fit_json("--plan 1e5 --profile");
    assert_string_equal(json_string_value(at(root, "format")), "notchwright.fit/1");
    for (size_t i = 0; i < sizeof keys / sizeof keys[0]; i++) {
        at(root, keys[i]);
    }
    for (int i = 0; i < NW_FIT_PARAMETERS; i++) {
        static const char *const parts[] = {"value", "standard_error", "low", "high", "from"};
        for (int k = 0; k < 5; k++) {
            char path[120];
            snprintf(path, sizeof path, "parameters.%s.%s",
                     nw_fit_parameter_key((nw_fit_parameter_index)i), parts[k]);
            at(root, path);
        }
    }
    assert_int_equal(json_array_size(at(root, "curves")), 5);
    assert_int_equal(json_integer_value(at(root, "tests.count")), 21);
    assert_int_equal(json_integer_value(at(root, "tests.runouts")), 1);
    assert_string_equal(json_string_value(at(root, "method")), "likelihood");
    json_decref(root);
}

/* The contract: by lines c = 1/b and ef' = 10^(-a/b) 2^(-c) of the plastic line, the same for the elastic one. */
static void parameters_by_lines(void **state)
{
    (void)state;
    json_t *root = fit_json("--method lines");
    double a = number_at(root, "lines.plastic.a"), b = number_at(root, "lines.plastic.b");
    assert_near(number_at(root, "parameters.fatigue_ductility_exponent.value"), 1.0 / b, 1e-12,
                0.0);
    assert_near(number_at(root, "parameters.fatigue_ductility_coefficient.value"),
                pow(10.0, -a / b) * pow(2.0, -1.0 / b), 1e-12, 0.0);
    a = number_at(root, "lines.elastic.a");
    b = number_at(root, "lines.elastic.b");
    assert_near(number_at(root, "parameters.fatigue_strength_exponent.value"), 1.0 / b, 1e-12, 0.0);
    assert_near(number_at(root, "parameters.fatigue_strength_coefficient_mpa.value"),
                pow(10.0, -a / b) * pow(2.0, -1.0 / b), 1e-12, 0.0);
    a = number_at(root, "lines.cyclic.a");
    assert_near(number_at(root, "parameters.strength_coefficient_mpa.value"), pow(10.0, a), 1e-12,
                0.0);
    assert_string_equal(json_string_value(at(root, "parameters.fatigue_ductility_exponent.from")),
                        "lines");
    json_decref(root);
}

static void percentiles_and_tolerance(void **state)
{
    (void)state;
    json_t *root = fit_json("--percentiles '1 %,50 %' --survival 99.9% --confidence 0.9,0.95");
    assert_int_equal(json_array_size(at(root, "curves")), 4);
    assert_near(number_at(root, "curves.0.percentile"), 1.0, 1e-12, 0.0);
    assert_near(number_at(root, "curves.3.survival"), 0.999, 1e-12, 0.0);
    assert_near(number_at(root, "curves.3.confidence"), 0.95, 1e-12, 0.0);
    assert_string_equal(json_string_value(at(root, "curves.3.kind")), "tolerance");
    json_decref(root);
}

static void table_of_curves(void **state)
{
    (void)state;
    test_result result = test_shell("\"$NW\" fit '%s' --modulus '206 GPa' --format csv", example);
    assert_int_equal(result.status, 0);
    assert_int_equal(strncmp(result.out,
                             "curve,survival,confidence,strain_amplitude,cycles,low,high\n"
                             "percentile,0.9,0.95,",
                             60),
                     0);
    size_t rows = 0;
    for (const char *p = result.out; *p != '\0'; p++) {
        rows += *p == '\n';
    }
    assert_int_equal(rows, 1 + 5 * NW_FIT_GRID);
    test_result_free(&result);
}

/* The saved file reads back to the same parameters and says what it rests on. */
static void material_file(void **state)
{
    (void)state;
    test_scratch scratch = test_scratch_create();
    for (int lines = 0; lines < 2; lines++) {
        char options[400];
        snprintf(options, sizeof options, "--method %s --save '%s/c45.yaml' --group steel",
                 lines ? "lines" : "likelihood", scratch.path);
        json_t *root = fit_json(options);
        nw_material m;
        const char *path = test_scratch_path(&scratch, "c45.yaml");
        assert_int_equal(nw_material_read(path, &m, NULL), NW_OK);
        assert_string_equal(m.name, "c45");
        assert_int_equal(m.group, NW_STEEL);
        assert_int_equal(m.basis, NW_TESTED);
        assert_non_null(strstr(m.source, "21 tests at 7 levels, 1 run-outs"));
        const double read[] = {m.fatigue_strength_coefficient_mpa, m.fatigue_strength_exponent,
                               m.fatigue_ductility_coefficient,    m.fatigue_ductility_exponent,
                               m.strength_coefficient_mpa,         m.hardening_exponent};
        for (int i = 0; i < NW_FIT_PARAMETERS; i++) {
            char key[120];
            snprintf(key, sizeof key, "parameters.%s.value",
                     nw_fit_parameter_key((nw_fit_parameter_index)i));
            assert_near(read[i], number_at(root, key), 1e-13, 0.0);
        }
        assert_near(m.log10_life_sd, number_at(root, "scatter.log10_life_sd_corrected"), 1e-13,
                    0.0);
        assert_near(m.valid_cycles[1], number_at(root, "tests.cycles.1"), 1e-13, 0.0);
        assert_near(m.valid_strain_amplitude[0], number_at(root, "tests.strain_amplitude.0"), 1e-13,
                    0.0);
        char *text = test_read_file(path), wanted[60];
        snprintf(wanted, sizeof wanted, "    - [%.17g, ", number_at(root, "covariance.matrix.0.0"));
        assert_non_null(strstr(text, "  covariance:\n    - ["));
        assert_int_equal(strncmp(strstr(text, "    - ["), wanted, 20), 0);
        free(text);
        json_decref(root);
    }
    test_scratch_remove(&scratch);
}

/* Tests of one line cannot make a material; nothing is written then. */
static void no_material(void **state)
{
    (void)state;
    test_scratch scratch = test_scratch_create();
    const char *path = test_scratch_text(&scratch, "tests.csv",
                                         "plastic_strain_amplitude,cycles\n"
                                         "0.01,500\n0.005,1500\n0.001,14000\n");
    test_result result = test_shell(
        "cd '%s' && \"$NW\" fit '%s' --save m.yaml --quiet; s=$?; ls; exit $s", scratch.path, path);
    assert_int_equal(result.status, 3);
    assert_non_null(strstr(result.err, "a material needs fatigue_strength_coefficient_mpa"));
    assert_null(strstr(result.out, "yaml"));
    test_result_free(&result);
    test_scratch_remove(&scratch);
}

/* The command shown by --help, and every number of the text page finite. */
static void example_of_help(void **state)
{
    (void)state;
    test_result result = test_shell("cd '%s' && eval \"$(\"$NW\" fit --help | sed -n "
                                    "'/^Example:/{n;s/^  notchwright/\\\"$NW\\\"/p;}')\"",
                                    TEST_SOURCE_DIR);
    assert_int_equal(result.status, 0);
    assert_string_equal(result.err, "");
    assert_non_null(strstr(result.out, "Parameters by likelihood"));
    assert_non_null(strstr(result.out, "Plan     to narrow the 50 % curve at 1e+05 cycles"));
    assert_null(strstr(result.out, "nan"));
    assert_null(strstr(result.out, "inf "));
    test_result_free(&result);
}

/* Dropped tests are named in the result. */
static void dropped(void **state)
{
    (void)state;
    json_t *root = fit_json("--drop B07 --drop B21");
    assert_int_equal(json_integer_value(at(root, "tests.count")), 19);
    assert_string_equal(json_string_value(at(root, "tests.dropped.0.id")), "B07");
    assert_int_equal(json_integer_value(at(root, "tests.dropped.0.line")), 9);
    assert_string_equal(json_string_value(at(root, "method")), "lines");
    json_decref(root);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(json_keys),       cmocka_unit_test(parameters_by_lines),
        cmocka_unit_test(dropped),         cmocka_unit_test(percentiles_and_tolerance),
        cmocka_unit_test(table_of_curves), cmocka_unit_test(material_file),
        cmocka_unit_test(no_material),     cmocka_unit_test(example_of_help),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
