/* Sums over the loops of a result, CSV against JSON, and --set against editing the file. */
#include "support/bad_input.h"

#include <jansson.h>

enum { VALUES = 400 };

/* The base case over an irregular inline history. */
static int set_up(void **state)
{
    char list[VALUES * 8 + 16] = "[0";
    size_t used = strlen(list);
    test_random random = {2024};
    for (int i = 0; i < VALUES; i++) {
        used += (size_t)snprintf(list + used, sizeof list - used, ", %d",
                                 test_random_int(&random, -180, 220));
    }
    snprintf(list + used, sizeof list - used, "]");
    char *text = bad_input_replace(bad_input_base, "[0, 200, -100, 150, 0]", list);
    bench *b = malloc(sizeof *b);
    b->scratch = test_scratch_create();
    strcpy(b->path, test_scratch_text(&b->scratch, "case.yaml", text));
    free(text);
    *state = b;
    return 0;
}

static char *assess_text(const char *path, const char *options)
{
    test_result result = test_shell("\"$NW\" assess '%s' %s", path, options);
    assert_string_equal(result.err, "");
    assert_int_equal(result.status, 0);
    free(result.err);
    return result.out;
}

static json_t *assess(const char *path, const char *options)
{
    char all[600];
    snprintf(all, sizeof all, "--format json %s", options);
    char *text = assess_text(path, all);
    json_t *root = json_loads(text, JSON_REJECT_DUPLICATES, NULL);
    assert_non_null(root);
    free(text);
    return root;
}

static double number(const json_t *object, const char *key)
{
    const json_t *value = json_object_get(object, key);
    assert_true(json_is_number(value));
    return json_number_value(value);
}

/* Palmgren-Miner: the loops listed are all there are, so their damages add up to that of the block, their
 * shares to one, their counts to the number of loops. Rounding of some 200 terms: 1e-9 is ample. */
static void loops_add_up(void **state)
{
    const bench *b = *state;
    static const char *const options[] = {"", "--set life.mean_stress=morrow",
                                          "--set notch.rule=esed", "--set 'life.survival=90 %'",
                                          "--set life.below_endurance=harmless"};
    for (size_t i = 0; i < sizeof options / sizeof options[0]; i++) {
        json_t *root = assess(b->path, options[i]);
        double damage = 0.0, share = 0.0, count = 0.0, before = INFINITY;
        size_t index;
        const json_t *loop;
        json_array_foreach(json_object_get(root, "loops"), index, loop)
        {
            damage += number(loop, "damage");
            share += number(loop, "share");
            count += number(loop, "count");
            assert_true(number(loop, "damage") <= before);
            before = number(loop, "damage");
            if (before > 0.0) {
                assert_near(before, number(loop, "count") / number(loop, "cycles_to_initiation"),
                            1e-12, 0.0);
            }
        }
        assert_true(number(root, "damage_per_block") > 0.0);
        assert_near(damage, number(root, "damage_per_block"), 1e-9, 0.0);
        assert_near(share, 1.0, 1e-9, 0.0);
        assert_near(count, number(root, "loops_total"), 0.0, 0.0);
        assert_near(number(json_object_get(root, "block"), "turning_points"), 2.0 * count, 0.0,
                    0.0);
        json_decref(root);
    }
}

/* Life from the two damages: 1 + (sum - first) / each later, while the first stays below the sum. */
static void life_follows_from_the_damages(void **state)
{
    const bench *b = *state;
    const double sums[] = {1.0, 0.3, 1e-9};
    for (int i = 0; i < 3; i++) {
        char option[80];
        snprintf(option, sizeof option, "--set life.damage_sum=%g", sums[i]);
        json_t *root = assess(b->path, option);
        double first = number(root, "damage_first_block"), each = number(root, "damage_per_block");
        double expected = first >= sums[i] ? sums[i] / first : 1.0 + (sums[i] - first) / each;
        assert_near(number(root, "life_blocks"), expected, 1e-12, 0.0);
        json_decref(root);
    }
}

static const char csv_header[] =
    "count,load_max_mpa,load_min_mpa,strain_amplitude,strain_mean,stress_max_mpa,stress_min_mpa,"
    "stress_mean_mpa,cycles_to_initiation,damage,share,start_event,start_sample,tip_event,tip_"
    "sample\n";

/* The field at `at` is this number to 10 digits, or empty for null. Returns the next field. */
static const char *assert_field(const char *at, const json_t *value)
{
    char *end = (char *)(uintptr_t)at;
    if (!json_is_null(value)) {
        assert_true(json_is_number(value));
        assert_near(strtod(at, &end), json_number_value(value), 1e-9, 0.0);
        assert_true(end > at);
    }
    assert_int_equal(*end, ',');
    return end + 1;
}

/* One row a loop, in the same order, with the numbers of the JSON (printed with 10 digits: 1e-9). */
static void csv_rows_are_the_loops_of_the_json(void **state)
{
    const bench *b = *state;
    char *csv = assess_text(b->path, "--format csv");
    json_t *root = assess(b->path, "");
    assert_memory_equal(csv, csv_header, sizeof csv_header - 1);
    const char *at = csv + sizeof csv_header - 1;
    size_t index;
    const json_t *loop;
    json_array_foreach(json_object_get(root, "loops"), index, loop)
    {
        static const char *const keys[] = {"count",
                                           "load_max_mpa",
                                           "load_min_mpa",
                                           "strain_amplitude",
                                           "strain_mean",
                                           "stress_max_mpa",
                                           "stress_min_mpa",
                                           "stress_mean_mpa",
                                           "cycles_to_initiation",
                                           "damage",
                                           "share"};
        for (int k = 0; k < 11; k++) {
            at = assert_field(at, json_object_get(loop, keys[k]));
        }
        long places[4];
        int length = 0;
        assert_int_equal(sscanf(at, "%ld,%ld,%ld,%ld%n", &places[0], &places[1], &places[2],
                                &places[3], &length),
                         4);
        assert_int_equal(at[length], '\n');
        const json_t *start = json_object_get(loop, "start"), *tip = json_object_get(loop, "tip");
        assert_int_equal(places[0], (long)number(start, "event"));
        assert_int_equal(places[1], (long)number(start, "sample"));
        assert_int_equal(places[2], (long)number(tip, "event"));
        assert_int_equal(places[3], (long)number(tip, "sample"));
        at += length + 1;
    }
    assert_true(index > 50);
    assert_string_equal(at, "");
    json_decref(root);
    free(csv);
}

/* A life that does not exist is an empty field. */
static void csv_leaves_out_what_does_not_exist(void **state)
{
    const bench *b = *state;
    char *csv = assess_text(b->path, "--format csv --set life.below_endurance=harmless "
                                     "--set 'load.1.scale=0.1 MPa'");
    assert_null(strstr(csv, "inf"));
    assert_null(strstr(csv, "nan"));
    assert_non_null(strstr(csv, ",,0,0,1,"));
    free(csv);
}

/* ---- --set ---- */

typedef struct edit {
    const char *from, *to, *set;
} edit;

static const edit edits[] = {
    {"rule: neuber", "rule: esed", "--set notch.rule=esed"},
    {"kt: 2.5", "kt: 2.2", "--set notch.kt=2.2"},
    {"kt: 2.5", "kt: 2.5\n  kf: 2.1", "--set notch.kf=2.1"},
    {"kt: 2.5", "kt: 2.5\n  residual_stress: -120 MPa", "--set 'notch.residual_stress=-120 MPa'"},
    {"repeats: 3", "repeats: 12", "--set load.1.repeats=12"},
    {"scale: 1 MPa", "scale: 1.25 MPa", "--set 'load.1.scale=1.25 MPa'"},
    {"mean_stress: swt", "mean_stress: morrow", "--set life.mean_stress=morrow"},
    {"survival: 50 %", "survival: 90 %", "--set 'life.survival=90 %'"},
    {"title: Bracket, shoulder", "title: Other", "--set title=Other"},
    {"exponent: -0.6", "exponent: -0.55",
     "--set material.strain_life.fatigue_ductility_exponent=-0.55"},
    {"[0.001, 0.02]", "[0.002, 0.02]", "--set material.valid.strain_amplitude.1=0.002"},
    {"{log10_life_sd: 0.15, tests: 18}", "{log10_life_sd: 0.2}",
     "--set 'material.scatter={log10_life_sd: 0.2}'"},
    {"rule: neuber", "rule: esed", "--set notch.rule=linear --set notch.rule=esed"},
};

static void set_equals_editing(void **state)
{
    const bench *b = *state;
    char *base = test_read_file(b->path), *unchanged = assess_text(b->path, "--format json");
    for (size_t i = 0; i < sizeof edits / sizeof edits[0]; i++) {
        char *text = bad_input_replace(base, edits[i].from, edits[i].to), options[200];
        const char *path = test_scratch_text(&b->scratch, "edited.yaml", text);
        snprintf(options, sizeof options, "--format json %s", edits[i].set);
        char *edited = assess_text(path, "--format json"), *set = assess_text(b->path, options);
        assert_string_equal(set, edited);
        assert_string_not_equal(set, unchanged);
        free(text);
        free(edited);
        free(set);
    }
    free(base);
    free(unchanged);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test_setup_teardown(loops_add_up, set_up, bench_tear_down),
        cmocka_unit_test_setup_teardown(life_follows_from_the_damages, set_up, bench_tear_down),
        cmocka_unit_test_setup_teardown(csv_rows_are_the_loops_of_the_json, set_up,
                                        bench_tear_down),
        cmocka_unit_test_setup_teardown(csv_leaves_out_what_does_not_exist, set_up,
                                        bench_tear_down),
        cmocka_unit_test_setup_teardown(set_equals_editing, set_up, bench_tear_down),
    };
    return cmocka_run_group_tests_name("exit_output_sums", tests, NULL, NULL);
}
