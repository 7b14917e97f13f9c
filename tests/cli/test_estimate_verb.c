/* notchwright estimate, as a user runs it. */
#include "support/support.h"

#include <jansson.h>

static const char steel[] = "--ultimate '820 MPa' --modulus '206 GPa' --group steel "
                            "--reduction-of-area '55 %' --hardness '245 HB'";

static json_t *json_of(const char *arguments)
{
    test_result result = test_shell("\"$NW\" estimate %s --format json", arguments);
    if (result.status != 0) {
        fail_msg("%s", result.err);
    }
    assert_string_equal(result.err, "");
    json_t *root = json_loads(result.out, JSON_REJECT_DUPLICATES, NULL);
    assert_non_null(root);
    test_result_free(&result);
    return root;
}

static const char *text(const json_t *object, const char *key)
{
    return json_string_value(json_object_get(object, key));
}

static double number(const json_t *object, const char *key)
{
    const json_t *value = json_object_get(object, key);
    assert_true(json_is_number(value));
    return json_number_value(value);
}

static const json_t *method(const json_t *root, const char *name)
{
    const json_t *list = json_object_get(root, "methods");
    for (size_t i = 0; i < json_array_size(list); i++) {
        if (strcmp(text(json_array_get(list, i), "name"), name) == 0) {
            return json_array_get(list, i);
        }
    }
    fail_msg("no method %s", name);
    return NULL;
}

/* The keys that scripts rely on, in every method. A number that does not exist is null. */
static void json_keys(void **state)
{
    (void)state;
    static const char *const numbers[] = {
        "fatigue_strength_coefficient_mpa", "fatigue_strength_exponent",
        "fatigue_ductility_coefficient",    "fatigue_ductility_exponent",
        "strength_coefficient_mpa",         "hardening_exponent",
    };
    json_t *root = json_of("--ultimate '820 MPa' --modulus '206 GPa' --group steel");
    assert_string_equal(text(root, "format"), "notchwright.estimate/1");
    assert_string_equal(text(root, "recommended"), "uniform_material_law");
    assert_true(strlen(text(root, "recommended_because")) > 20);
    const json_t *list = json_object_get(root, "methods");
    assert_int_equal(json_array_size(list), 9);
    for (size_t i = 0; i < 9; i++) {
        const json_t *m = json_array_get(list, i);
        bool applies = json_is_true(json_object_get(m, "applies"));
        assert_true(json_is_boolean(json_object_get(m, "applies")));
        assert_true(strlen(text(m, "reason")) > 10 && strlen(text(m, "source")) > 10);
        assert_true(strlen(text(m, "accuracy")) > 10);
        for (size_t k = 0; k < sizeof numbers / sizeof numbers[0]; k++) {
            const json_t *value = json_object_get(m, numbers[k]);
            assert_true(applies ? json_is_real(value) : json_is_null(value));
        }
        assert_non_null(json_object_get(m, "endurance_stress_mpa"));
    }
    assert_near(number(method(root, "uniform_material_law"), "endurance_stress_mpa"), 369.0, 1e-12,
                0.0);
    assert_true(json_is_null(json_object_get(method(root, "medians"), "endurance_stress_mpa")));
    assert_string_equal(text(method(root, "hardness"), "reason"), "hardness is missing");
    json_decref(root);
}

/* 0.2, 0.35, 0.6 and 1 % unless --at says otherwise; units of --at are free. */
static void amplitudes_default_and_given(void **state)
{
    (void)state;
    char arguments[400];
    json_t *root = json_of(steel);
    const json_t *spread = json_object_get(root, "spread");
    assert_int_equal(json_array_size(spread), 4);
    assert_near(number(json_array_get(spread, 0), "strain_amplitude"), 0.002, 1e-14, 0.0);
    assert_near(number(json_array_get(spread, 3), "strain_amplitude"), 0.01, 1e-14, 0.0);
    json_decref(root);
    snprintf(arguments, sizeof arguments, "%s --at '0.2 %%, 5000 microstrain,0.01 ratio'", steel);
    root = json_of(arguments);
    spread = json_object_get(root, "spread");
    assert_int_equal(json_array_size(spread), 3);
    assert_near(number(json_array_get(spread, 1), "strain_amplitude"), 0.005, 1e-12, 0.0);
    const json_t *second = json_array_get(spread, 1);
    double ratio = number(second, "longest_cycles") / number(second, "shortest_cycles");
    assert_near(number(second, "ratio"), ratio, 1e-12, 0.0);
    assert_true(ratio > 1.5 && ratio < 20.0);
    json_decref(root);
}

static bool cautioned(const json_t *root, const char *code)
{
    const json_t *list = json_object_get(root, "cautions");
    for (size_t i = 0; i < json_array_size(list); i++) {
        if (strcmp(text(json_array_get(list, i), "code"), code) == 0) {
            return true;
        }
    }
    return false;
}

static void cautions_are_in_json(void **state)
{
    (void)state;
    json_t *root = json_of(steel);
    assert_true(cautioned(root, "estimated_material"));
    assert_true(cautioned(root, "fracture_stress_derived"));
    assert_true(cautioned(root, "cyclic_curve_from_compatibility"));
    assert_true(cautioned(root, "scope"));
    assert_false(cautioned(root, "group_assumed"));
    assert_false(cautioned(root, "hardness_and_strength_disagree"));
    assert_false(cautioned(root, "modulus_unusual"));
    json_decref(root);
    root = json_of("--ultimate '820 MPa' --modulus '206 GPa' --hardness '120 HB'");
    assert_true(cautioned(root, "group_assumed"));
    assert_true(cautioned(root, "hardness_and_strength_disagree"));
    assert_false(cautioned(root, "fracture_stress_derived"));
    json_decref(root);
    root = json_of("--ultimate '470 MPa' --modulus '206 GPa' --group aluminium");
    assert_true(cautioned(root, "modulus_unusual"));
    json_decref(root);
    root = json_of("--ultimate '820 MPa' --modulus '206 GPa' --reduction-of-area '75 %' "
                   "--at '0.001 %,20 %'");
    assert_true(cautioned(root, "fracture_strain_large"));
    assert_true(cautioned(root, "life_extrapolated"));
    json_decref(root);
    root = json_of("--ultimate '400 MPa' --modulus '150 GPa' --group cast_iron");
    assert_true(cautioned(root, "no_method_applies"));
    assert_true(json_is_null(json_object_get(root, "recommended")));
    assert_true(
        json_is_null(json_object_get(json_array_get(json_object_get(root, "spread"), 0), "ratio")));
    json_decref(root);
}

/* The verdict comes first; the methods, the lives and the reasons follow; nothing is wider than a page. */
static void text_reads_from_the_verdict(void **state)
{
    (void)state;
    test_result result = test_shell("\"$NW\" estimate --ultimate '820 MPa' --modulus '206 GPa' "
                                    "--group steel");
    assert_int_equal(result.status, 0);
    static const char *const order[] = {"RECOMMENDED  uniform_material_law",
                                        "because",
                                        "! Estimated without tests",
                                        "Given    steel, E 206 GPa, Su 820 MPa",
                                        "Methods that apply",
                                        "life in cycles",
                                        "longest over shortest",
                                        "Methods that do not apply",
                                        "hardness is missing",
                                        "Tests that would settle it",
                                        "Sources"};
    const char *at = result.out;
    for (size_t i = 0; i < sizeof order / sizeof order[0]; i++) {
        const char *next = strstr(at, order[i]);
        if (next == NULL) {
            fail_msg("'%s' missing or out of order in\n%s", order[i], result.out);
        }
        at = next;
    }
    assert_ptr_equal(strstr(result.out, order[0]), result.out);
    for (const char *line = result.out; *line != '\0'; line += strcspn(line, "\n") + 1) {
        assert_true(strcspn(line, "\n") <= 100);
    }
    test_result_free(&result);
}

static void csv_has_a_row_a_method(void **state)
{
    (void)state;
    test_result result = test_shell("\"$NW\" estimate %s --at '0.3 %%' --format csv", steel);
    assert_int_equal(result.status, 0);
    assert_non_null(strstr(result.out, ",cycles_at_0.003,"));
    size_t lines = 0, commas = 0;
    bool quoted = false;
    for (const char *at = result.out; *at != '\0'; at++) {
        quoted ^= *at == '"';
        lines += *at == '\n';
        commas += *at == ',' && !quoted;
    }
    assert_int_equal(lines, 10);
    assert_int_equal(commas % 10, 0); /* as many fields in every row */
    test_result_free(&result);
}

static void save_and_assess(const char *options, const char *key)
{
    test_scratch scratch = test_scratch_create();
    test_scratch_text(&scratch, "case.yaml",
                      "notchwright: 1\nmaterial: saved.yaml\nnotch: {kt: 2.5}\n"
                      "load:\n  - history: [0, 300, -200, 0]\n    scale: 1 MPa\n");
    test_result saved = test_shell("cd '%s' && \"$NW\" estimate %s %s --save saved.yaml --quiet",
                                   scratch.path, steel, options);
    if (saved.status != 0) {
        fail_msg("%s", saved.err);
    }
    assert_string_equal(saved.out, "");
    test_result_free(&saved);
    test_result run = test_shell("cd '%s' && \"$NW\" assess case.yaml --format json", scratch.path);
    if (run.status != 0) {
        fail_msg("%s", run.err);
    }
    json_t *root = json_loads(run.out, 0, NULL), *all = json_of(steel);
    const json_t *material = json_object_get(root, "material"), *expected = method(all, key);
    static const char *const keys[] = {
        "fatigue_strength_coefficient_mpa", "fatigue_strength_exponent",
        "fatigue_ductility_coefficient",    "fatigue_ductility_exponent",
        "strength_coefficient_mpa",         "hardening_exponent",
    };
    for (size_t i = 0; i < sizeof keys / sizeof keys[0]; i++) {
        assert_near(number(material, keys[i]), number(expected, keys[i]), 1e-14, 0.0);
    }
    assert_string_equal(text(material, "name"), "saved");
    assert_string_equal(text(material, "basis"), "estimated");
    assert_non_null(strstr(text(material, "source"), key));
    assert_true(cautioned(root, "estimated_material"));
    assert_true(number(root, "life_blocks") > 10.0);
    json_decref(root);
    json_decref(all);
    test_result_free(&run);
    test_scratch_remove(&scratch);
}

/* Every method saved, then used by assess, gives the values that were shown. */
static void saved_files_are_used_by_assess(void **state)
{
    (void)state;
    const nw_estimate *record;
    save_and_assess("", "hardness"); /* the recommended one */
    for (size_t i = 0; (record = nw_estimate_at(i)) != NULL; i++) {
        char options[80];
        snprintf(options, sizeof options, "--method %s", record->key);
        save_and_assess(options, record->key);
    }
}

/* Source and note hold method, inputs, range and accuracy, uncut. */
static void saved_words_are_whole(void **state)
{
    (void)state;
    nw_estimate_input input = nw_estimate_input_unknown(NW_STEEL);
    input.ultimate_strength_mpa = 823.456;
    input.youngs_modulus_mpa = 206123.4;
    input.hardness_hb = 245.123;
    input.reduction_of_area = 0.551234;
    const nw_estimate *record;
    for (size_t i = 0; (record = nw_estimate_at(i)) != NULL; i++) {
        nw_material m;
        assert_int_equal(nw_estimate_material(record, &input, "x", &m, NULL), NW_OK);
        assert_true(strlen(m.source) < sizeof m.source - 1);
        assert_true(strlen(m.note) < sizeof m.note - 1);
        assert_non_null(strstr(m.source, record->reference));
        assert_non_null(strstr(m.note, record->range));
        assert_non_null(strstr(m.note, record->accuracy));
        assert_int_equal(strstr(m.source, "823.456 MPa") != NULL,
                         (record->needs & NW_NEEDS_ULTIMATE) != 0);
        assert_int_equal(strstr(m.source, "245.123 HB") != NULL,
                         (record->needs & NW_NEEDS_HARDNESS) != 0);
        assert_int_equal(strstr(m.source, "reduction of area 55.12 %") != NULL,
                         (record->needs & NW_NEEDS_FRACTURE_STRAIN) != 0);
    }
}

static void name_can_be_given(void **state)
{
    (void)state;
    test_scratch scratch = test_scratch_create();
    test_result result =
        test_shell("cd '%s' && \"$NW\" estimate %s --save a.yaml --name 'shaft: 1' "
                   "--quiet && \"$NW\" material check ./a.yaml",
                   scratch.path, steel);
    assert_int_equal(result.status, 0);
    assert_string_equal(result.err, "");
    char *content = test_read_file(test_scratch_path(&scratch, "a.yaml"));
    assert_non_null(strstr(content, "name: \"shaft: 1\"\n"));
    assert_non_null(strstr(content, "ultimate_strength: 820 MPa\n"));
    assert_non_null(strstr(content, "reduction_of_area: 55 %\n"));
    free(content);
    test_result_free(&result);
    test_scratch_remove(&scratch);
}

/* A case that names an estimate passes on what the material says of itself. */
static void case_files_use_every_input(void **state)
{
    (void)state;
    const nw_estimate *record;
    json_t *all = json_of(steel);
    for (size_t i = 0; (record = nw_estimate_at(i)) != NULL; i++) {
        test_scratch scratch = test_scratch_create();
        char content[700];
        snprintf(
            content, sizeof content,
            "notchwright: 1\nmaterial: {estimate: %s, group: steel, ultimate_strength: 820 MPa, "
            "youngs_modulus: 206 GPa, reduction_of_area: 55 %%, hardness: 245 HB}\n"
            "notch: {kt: 2}\nload:\n  - {history: [0, 300], scale: 1 MPa}\n",
            record->key);
        const char *path = test_scratch_text(&scratch, "case.yaml", content);
        test_result run = test_shell("\"$NW\" assess '%s' --format json", path);
        if (run.status != 0) {
            fail_msg("%s", run.err);
        }
        json_t *root = json_loads(run.out, 0, NULL);
        const json_t *material = json_object_get(root, "material");
        const json_t *expected = method(all, record->key);
        assert_near(number(material, "fatigue_ductility_coefficient"),
                    number(expected, "fatigue_ductility_coefficient"), 1e-14, 0.0);
        assert_near(number(material, "strength_coefficient_mpa"),
                    number(expected, "strength_coefficient_mpa"), 1e-14, 0.0);
        assert_string_equal(text(material, "hardening_exponent_from"),
                            text(expected, "cyclic_curve_from"));
        json_decref(root);
        test_result_free(&run);
        test_scratch_remove(&scratch);
    }
    json_decref(all);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(json_keys),
        cmocka_unit_test(amplitudes_default_and_given),
        cmocka_unit_test(cautions_are_in_json),
        cmocka_unit_test(text_reads_from_the_verdict),
        cmocka_unit_test(csv_has_a_row_a_method),
        cmocka_unit_test(saved_files_are_used_by_assess),
        cmocka_unit_test(saved_words_are_whole),
        cmocka_unit_test(name_can_be_given),
        cmocka_unit_test(case_files_use_every_input),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
