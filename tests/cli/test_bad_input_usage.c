/* Wrong command lines and --set paths; several faults in one run. */
#include "support/bad_input.h"

typedef struct wrong_command {
    const char *name;
    const char *arguments; /* as typed after the program; case.yaml is the good base case */
    int status;
    const char *message, *message_2;
} wrong_command;

static const wrong_command commands[] = {
    {"no_verb", "", 2, "found no verb, expected one", "try: notchwright --help"},
    {"unknown_verb", "asess case.yaml", 2, "unknown verb 'asess'; did you mean 'assess'?", NULL},
    {"verb_like_none", "frobnicate", 2, "unknown verb 'frobnicate'\n", NULL},
    {"option_before_verb", "--format json assess case.yaml", 2, "unknown verb '--format'", NULL},
    {"case_as_verb", "case.yaml", 2, "unknown verb 'case.yaml'", NULL},
    {"no_operand", "assess", 2, "error: found 0 arguments, expected CASE.yaml",
     "try: notchwright assess --help"},
    {"two_operands", "assess case.yaml case.yaml", 2,
     "error: found 2 arguments, expected CASE.yaml", NULL},
    {"many_operands", "assess a b c d e f", 2, "error: found 6 arguments, expected CASE.yaml",
     NULL},
    {"unknown_option", "assess case.yaml --fromat json", 2,
     "unknown option --fromat; did you mean --format?", "try: notchwright assess --help"},
    {"unknown_short_option", "assess case.yaml -q", 2, "unknown option -q", NULL},
    {"flag_with_value", "assess case.yaml --quiet=yes", 2, "--quiet takes no value", NULL},
    {"format_xml", "assess case.yaml --format xml", 2,
     "--format: found 'xml', expected text, json or csv", NULL},
    {"format_empty", "assess case.yaml --format=", 2, "--format: found '', expected text", NULL},
    {"format_without_value", "assess case.yaml --format", 2, "--format: missing its value", NULL},
    {"output_without_value", "assess case.yaml --output", 2, "--output: missing its value", NULL},
    {"set_without_value", "assess case.yaml --set", 2, "--set: missing its value", NULL},
    {"set_without_equals", "assess case.yaml --set notch.kt", 2,
     "--set: expected PATH=VALUE, for example notch.rule=esed", "notch.kt: error: "},
    {"set_without_path", "assess case.yaml --set =2", 2, "--set: expected PATH=VALUE", NULL},
    {"set_path_too_long", "assess case.yaml --set notch.$(printf %0200d 7)=2", 2,
     "--set: found a path of 206 characters", NULL},
    {"set_nothing", "assess case.yaml --set notch.kt=", 3, "notch.kt=:1:1: error: found nothing",
     NULL},
    {"set_unknown_key", "assess case.yaml --set notch.ktt=2", 3,
     "error: notch.ktt: unknown key; did you mean 'kt'?", "notch.ktt=2:"},
    {"set_unknown_section", "assess case.yaml --set noch.kt=2", 3,
     "error: noch: unknown key; did you mean 'notch'?", NULL},
    {"set_below_a_value", "assess case.yaml --set notch.kt.x=2", 3,
     "notch.kt.x=2: error: the path names no place at 'x'", NULL},
    {"set_empty_step", "assess case.yaml --set notch..kt=2", 3,
     "notch..kt=2: error: the path names no place at ''", NULL},
    {"set_event_0", "assess case.yaml --set load.0.repeats=2", 3,
     "load.0.repeats=2: error: found '0', expected a number from 1 to 1", NULL},
    {"set_event_2_of_1", "assess case.yaml --set load.2.repeats=2", 3,
     "load.2.repeats=2: error: found '2', expected a number from 1 to 1", NULL},
    {"set_event_by_word", "assess case.yaml --set load.last.repeats=2", 3,
     "load.last.repeats=2: error: found 'last', expected a number from 1 to 1", NULL},
    {"set_bad_value", "assess case.yaml --set notch.kt=0.5", 3,
     "notch.kt=0.5:1:1: error: notch.kt: found 0.5, expected a value at least 1", NULL},
    {"set_broken_yaml", "assess case.yaml --set 'notch={kt: 2'", 3,
     "notch={kt: 2:", "not valid YAML"},
    {"set_anchor", "assess case.yaml --set 'notch.kt=&k 2'", 3, "found an anchor", NULL},
    {"require_target_without_target", "assess no-target.yaml --require-target", 2,
     "life.target: --require-target: the case gives no target", NULL},
    {"case_missing", "assess nowhere.yaml", 5,
     "nowhere.yaml: error: cannot be opened: No such file or directory", NULL},
    {"case_is_a_folder", "assess .", 5, ".: error: cannot be read: Is a directory", NULL},
    {"case_like_an_option", "assess -- --case.yaml", 5, "--case.yaml: error: cannot be opened",
     NULL},
    {"output_in_missing_folder", "assess case.yaml --output nowhere/out.txt", 5,
     "nowhere/out.txt: error: cannot be written: No such file or directory", NULL},
    {"output_is_a_folder", "assess case.yaml --output .", 5,
     ".: error: cannot be written: Is a directory", NULL},
    {"output_empty", "assess case.yaml --output ''", 5, "error: cannot be written", NULL},
};
enum { COMMANDS = sizeof commands / sizeof commands[0] };

static void refuse(void **state)
{
    const wrong_command *row = *state;
    test_scratch scratch = test_scratch_create();
    test_scratch_text(&scratch, "case.yaml", bad_input_base);
    char *no_target = bad_input_replace(bad_input_base, "  target: 100\n", "");
    test_scratch_text(&scratch, "no-target.yaml", no_target);
    free(no_target);
    test_result result = test_shell("cd '%s' && \"$NW\" %s", scratch.path, row->arguments);
    if (result.status != row->status) {
        fail_msg("%s: exit status %d, expected %d\n%s", row->name, result.status, row->status,
                 result.err);
    }
    if (strstr(result.err, row->message) == NULL ||
        (row->message_2 != NULL && strstr(result.err, row->message_2) == NULL)) {
        fail_msg("%s: expected '%s' and '%s', found\n%s", row->name, row->message,
                 row->message_2 == NULL ? "" : row->message_2, result.err);
    }
    assert_string_equal(result.out, "");
    test_result_free(&result);
    test_result listing = test_shell("ls '%s'", scratch.path);
    assert_string_equal(listing.out, "case.yaml\nno-target.yaml\n");
    test_result_free(&listing);
    test_scratch_remove(&scratch);
}

/* Faults in every section, all named by one run, each at its place. */
static void several_faults_are_told_together(void **state)
{
    (void)state;
    static const char text[] = "notchwright: 1\n"
                               "titel: Bracket\n"
                               "units: {stress: mm}\n"
                               "material:\n"
                               "  group: bronze\n"
                               "  youngs_modulus: 206\n"
                               "  cyclic_curve: {strength_coefficient: 9 mm}\n"
                               "notch:\n"
                               "  kt: 0.8\n"
                               "  rule: nueber\n"
                               "load:\n"
                               "  - history: [0, nan]\n"
                               "    scale: 0 MPa\n"
                               "    repeats: 1.5\n"
                               "  - history: [0, 1]\n"
                               "    scael: 1 MPa\n"
                               "life:\n"
                               "  mean_stress: morow\n"
                               "  survival: 200 %\n";
    static const char *const expected[] = {
        "case.yaml:2:1: error: titel: unknown key",
        "case.yaml:3:17: error: units.stress: found 'mm'",
        "case.yaml:5:10: error: material.group: found 'bronze'",
        "case.yaml:6:19: error: material.youngs_modulus: found '206' without a unit",
        "case.yaml:7:40: error: material.cyclic_curve.strength_coefficient: found '9 mm'",
        "case.yaml:9:7: error: notch.kt: found 0.8",
        "case.yaml:10:9: error: notch.rule: found 'nueber'",
        "case.yaml:12:18: error: load.1.history: found 'nan'",
        "case.yaml:13:12: error: load.1.scale: found 0",
        "case.yaml:14:14: error: load.1.repeats: found 1.5",
        "case.yaml:16:5: error: load.2.scael: unknown key",
        "case.yaml:18:16: error: life.mean_stress: found 'morow'",
        "case.yaml:19:13: error: life.survival: found 200 %",
    };
    test_scratch scratch = test_scratch_create();
    test_result result =
        test_shell("\"$NW\" assess '%s'", test_scratch_text(&scratch, "case.yaml", text));
    assert_int_equal(result.status, 3);
    for (size_t i = 0; i < sizeof expected / sizeof expected[0]; i++) {
        if (strstr(result.err, expected[i]) == NULL) {
            fail_msg("'%s' is not in\n%s", expected[i], result.err);
        }
    }
    test_result_free(&result);
    test_scratch_remove(&scratch);
}

/* Two bad history files are both named. */
static void several_bad_histories_are_told_together(void **state)
{
    (void)state;
    test_scratch scratch = test_scratch_create();
    test_scratch_text(&scratch, "a.csv", "0\nx\n");
    test_scratch_text(&scratch, "b.csv", "0\n1\n2\nnan\n");
    const char *path = test_scratch_text(
        &scratch, "case.yaml",
        "notchwright: 1\nmaterial: rqc-100\nnotch: {kt: 2}\nload:\n"
        "  - {history: a.csv, scale: 1 MPa}\n  - {history: b.csv, scale: 1 MPa}\n");
    test_result result = test_shell("\"$NW\" assess '%s'", path);
    assert_int_equal(result.status, 3);
    assert_non_null(strstr(result.err, "a.csv:2:1: error: found 'x'"));
    assert_non_null(strstr(result.err, "b.csv:4:1: error: found 'nan'"));
    test_result_free(&result);
    test_scratch_remove(&scratch);
}

/* Past the number that is kept, the others are counted. */
static void very_many_faults_are_counted(void **state)
{
    (void)state;
    char text[4000];
    int used = snprintf(text, sizeof text, "notchwright: 1\n");
    for (int i = 0; i < 100; i++) {
        used += snprintf(text + used, sizeof text - (size_t)used, "unheard_of_%d: 1\n", i);
    }
    test_scratch scratch = test_scratch_create();
    test_result result =
        test_shell("\"$NW\" assess '%s'", test_scratch_text(&scratch, "case.yaml", text));
    assert_int_equal(result.status, 3);
    char count[64]; /* two keys are missing besides */
    snprintf(count, sizeof count, "error: and %d more\n", 102 - NW_DIAGNOSTICS_KEPT);
    assert_non_null(strstr(result.err, count));
    test_result_free(&result);
    test_scratch_remove(&scratch);
}

int main(void)
{
    struct CMUnitTest tests[COMMANDS + 4] = {
        cmocka_unit_test(bad_input_base_is_good),
        cmocka_unit_test(several_faults_are_told_together),
        cmocka_unit_test(several_bad_histories_are_told_together),
        cmocka_unit_test(very_many_faults_are_counted),
    };
    for (size_t i = 0; i < COMMANDS; i++) {
        tests[i + 4] = (struct CMUnitTest){commands[i].name, refuse, NULL, NULL,
                                           (void *)(uintptr_t)&commands[i]};
    }
    return cmocka_run_group_tests_name("bad_input_usage", tests, NULL, NULL);
}
