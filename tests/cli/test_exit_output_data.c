/* JSON and CSV as programs read them: every key of the contract, sums that must hold, --set. */
#include "support/bad_input.h"

#include <jansson.h>

static json_t *parsed(const char *text)
{
    json_error_t error;
    json_t *root = json_loads(text, JSON_REJECT_DUPLICATES, &error);
    if (root == NULL) {
        fail_msg("no JSON, line %d: %s", error.line, error.text);
    }
    return root;
}

static json_t *assess(const char *path, const char *options)
{
    test_result result = test_shell("\"$NW\" assess '%s' --format json %s", path, options);
    assert_string_equal(result.err, "");
    assert_int_equal(result.status, 0);
    json_t *root = parsed(result.out);
    test_result_free(&result);
    return root;
}

/* ---- keys and types ---- */

/* o object, a array, s string, n number, i whole number, b boolean; a capital letter may also be null. */
typedef struct key_type {
    const char *key;
    char type;
} key_type;

static bool has_type(const json_t *value, char type)
{
    switch (type) {
    case 'o':
        return json_is_object(value);
    case 'a':
        return json_is_array(value);
    case 's':
        return json_is_string(value);
    case 'n':
        return json_is_number(value);
    case 'i':
        return json_is_integer(value);
    case 'b':
        return json_is_boolean(value);
    default:
        return json_is_null(value) || has_type(value, (char)(type - 'A' + 'a'));
    }
}

static void assert_keys(const json_t *object, const char *name, const key_type *keys)
{
    for (; keys->key != NULL; keys++) {
        const json_t *value = json_object_get(object, keys->key);
        if (value == NULL || !has_type(value, keys->type)) {
            fail_msg("%s.%s: %s, expected type %c", name, keys->key,
                     value == NULL ? "missing" : "of another type", keys->type);
        }
    }
}

static const key_type top_keys[] = {{"format", 's'},
                                    {"title", 'S'},
                                    {"method", 'o'},
                                    {"material", 'o'},
                                    {"notch", 'o'},
                                    {"block", 'o'},
                                    {"extremes", 'o'},
                                    {"damage_first_block", 'n'},
                                    {"damage_per_block", 'n'},
                                    {"life_blocks", 'N'},
                                    {"target", 'O'},
                                    {"loops_total", 'i'},
                                    {"loops", 'a'},
                                    {"cautions", 'a'},
                                    {NULL, 0}};
static const key_type method_keys[] = {{"rule", 's'},        {"mean_stress", 's'},
                                       {"damage_sum", 'n'},  {"below_endurance", 's'},
                                       {"net_section", 's'}, {NULL, 0}};
static const key_type material_keys[] = {{"name", 'S'},
                                         {"basis", 's'},
                                         {"source", 'S'},
                                         {"group", 's'},
                                         {"youngs_modulus_mpa", 'n'},
                                         {"poisson_ratio", 'n'},
                                         {"yield_strength_mpa", 'N'},
                                         {"ultimate_strength_mpa", 'N'},
                                         {"reduction_of_area", 'N'},
                                         {"hardness_hb", 'N'},
                                         {"strength_coefficient_mpa", 'n'},
                                         {"hardening_exponent", 'n'},
                                         {"fatigue_strength_coefficient_mpa", 'n'},
                                         {"fatigue_strength_exponent", 'n'},
                                         {"fatigue_ductility_coefficient", 'n'},
                                         {"fatigue_ductility_exponent", 'n'},
                                         {"endurance_strain_amplitude", 'N'},
                                         {"endurance_cycles", 'N'},
                                         {NULL, 0}};
static const key_type notch_keys[] = {{"kt", 'N'}, {"kf", 'N'}, {"factor_used", 'N'}, {NULL, 0}};
static const key_type block_keys[] = {{"samples", 'i'},
                                      {"turning_points", 'i'},
                                      {"load_max_mpa", 'n'},
                                      {"load_min_mpa", 'n'},
                                      {NULL, 0}};
static const key_type extremes_keys[] = {{"stress_max_mpa", 'n'},
                                         {"stress_min_mpa", 'n'},
                                         {"strain_max", 'n'},
                                         {"strain_min", 'n'},
                                         {NULL, 0}};
static const key_type target_keys[] = {{"blocks", 'n'}, {"reached", 'b'}, {NULL, 0}};
static const key_type loop_keys[] = {{"count", 'i'},
                                     {"load_max_mpa", 'n'},
                                     {"load_min_mpa", 'n'},
                                     {"strain_amplitude", 'n'},
                                     {"strain_mean", 'n'},
                                     {"stress_max_mpa", 'n'},
                                     {"stress_min_mpa", 'n'},
                                     {"stress_mean_mpa", 'n'},
                                     {"cycles_to_initiation", 'N'},
                                     {"damage", 'n'},
                                     {"share", 'n'},
                                     {NULL, 0}};
static const key_type caution_keys[] = {{"code", 's'}, {"text", 's'}, {NULL, 0}};

static void assert_contract(const json_t *root)
{
    const struct {
        const char *name;
        const key_type *keys;
    } parts[] = {{"method", method_keys},
                 {"material", material_keys},
                 {"notch", notch_keys},
                 {"block", block_keys},
                 {"extremes", extremes_keys}};
    assert_keys(root, "top", top_keys);
    assert_string_equal(json_string_value(json_object_get(root, "format")),
                        "notchwright.assessment/1");
    for (size_t i = 0; i < sizeof parts / sizeof parts[0]; i++) {
        assert_keys(json_object_get(root, parts[i].name), parts[i].name, parts[i].keys);
    }
    if (!json_is_null(json_object_get(root, "target"))) {
        assert_keys(json_object_get(root, "target"), "target", target_keys);
    }
    size_t index;
    const json_t *item;
    json_array_foreach(json_object_get(root, "loops"), index, item)
    {
        assert_keys(item, "loops[]", loop_keys);
    }
    json_array_foreach(json_object_get(root, "cautions"), index, item)
    {
        assert_keys(item, "cautions[]", caution_keys);
    }
}

static double number(const json_t *object, const char *key)
{
    const json_t *value = json_object_get(object, key);
    assert_true(json_is_number(value));
    return json_number_value(value);
}

static void every_key_of_the_contract(void **state)
{
    const bench *b = *state;
    static const char *const options[] = {
        "",
        "--set notch.rule=linear --set life.mean_stress=walker",
        "--set material=rqc-100",
        "--set 'material={estimate: uniform_material_law, group: steel, ultimate_strength: 820 "
        "MPa, "
        "youngs_modulus: 206 GPa}'",
        "--set notch.rule=limit_load --set notch.limit_load_ratio=1.7 --set notch.kf=2.1",
        "--set 'load=[{history: [0 %, 0.4 %, -0.2 %], as: notch_strain}]' --set 'notch={}'",
    };
    for (size_t i = 0; i < sizeof options / sizeof options[0]; i++) {
        json_t *root = assess(b->path, options[i]);
        assert_contract(root);
        assert_true(json_array_size(json_object_get(root, "loops")) > 0);
        json_decref(root);
    }
}

/* What the case states comes back: loads are Kt times nominal stress, 5 samples 3 times over. */
static void case_values_come_back(void **state)
{
    const bench *b = *state;
    json_t *root = assess(b->path, "");
    const json_t *block = json_object_get(root, "block");
    assert_near(number(block, "load_max_mpa"), 2.5 * 200.0, 1e-15, 0.0);
    assert_near(number(block, "load_min_mpa"), 2.5 * -100.0, 1e-15, 0.0);
    assert_near(number(block, "samples"), 15.0, 0.0, 0.0);
    assert_near(number(json_object_get(root, "target"), "blocks"), 100.0, 0.0, 0.0);
    assert_true(json_is_true(json_object_get(json_object_get(root, "target"), "reached")));
    assert_near(number(json_object_get(root, "material"), "youngs_modulus_mpa"), 206e3, 1e-15, 0.0);
    assert_string_equal(json_string_value(json_object_get(root, "title")), "Bracket, shoulder");
    json_decref(root);
}

/* Loops that do no damage: no life is a number, so null. */
static void endless_life_is_null(void **state)
{
    const bench *b = *state;
    json_t *root =
        assess(b->path, "--set life.below_endurance=harmless --set 'load.1.scale=0.1 MPa'");
    assert_contract(root);
    assert_true(json_is_null(json_object_get(root, "life_blocks")));
    assert_near(number(root, "damage_per_block"), 0.0, 0.0, 0.0);
    assert_true(json_is_true(json_object_get(json_object_get(root, "target"), "reached")));
    size_t index;
    const json_t *loop;
    json_array_foreach(json_object_get(root, "loops"), index, loop)
    {
        assert_true(json_is_null(json_object_get(loop, "cycles_to_initiation")));
        assert_near(number(loop, "damage"), 0.0, 0.0, 0.0);
        assert_near(number(loop, "share"), 0.0, 0.0, 0.0);
    }
    json_decref(root);
}

static void no_target_is_null(void **state)
{
    const bench *b = *state;
    json_t *root = assess(b->path, "--set life={}");
    assert_true(json_is_null(json_object_get(root, "target")));
    json_decref(root);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test_setup_teardown(every_key_of_the_contract, bench_set_up, bench_tear_down),
        cmocka_unit_test_setup_teardown(case_values_come_back, bench_set_up, bench_tear_down),
        cmocka_unit_test_setup_teardown(endless_life_is_null, bench_set_up, bench_tear_down),
        cmocka_unit_test_setup_teardown(no_target_is_null, bench_set_up, bench_tear_down),
    };
    return cmocka_run_group_tests_name("exit_output_data", tests, NULL, NULL);
}
