/* Output that is whole or not there at all: files, full disks, closed pipes. */
#include "support/bad_input.h"

#include <unistd.h>

#define EXAMPLE TEST_SOURCE_DIR "/examples/forwarder-axle/case.yaml"

/* Fails unless the scratch folder holds just these files ("case.yaml" and others, sorted). */
static void assert_files(const bench *b, const char *names)
{
    test_result listing = test_shell("ls -A '%s'", b->scratch.path);
    assert_string_equal(listing.out, names);
    test_result_free(&listing);
}

static void output_file_holds_what_standard_output_would(void **state)
{
    const bench *b = *state;
    const char *const formats[] = {"text", "json", "csv"};
    for (int i = 0; i < 3; i++) {
        test_result direct = test_shell("\"$NW\" assess '%s' --format %s", b->path, formats[i]);
        test_result filed =
            test_shell("cd '%s' && echo old >out && \"$NW\" assess case.yaml --quiet --format %s "
                       "--output out",
                       b->scratch.path, formats[i]);
        assert_int_equal(filed.status, 0);
        assert_string_equal(filed.out, "");
        assert_string_equal(filed.err, "");
        char *content = test_read_file(test_scratch_path(&b->scratch, "out"));
        assert_string_equal(content, direct.out);
        free(content);
        test_result_free(&direct);
        test_result_free(&filed);
    }
    assert_files(b, "case.yaml\nout\n");
}

/* Runs `command` with an old file "out" there; it must fail with `status` and leave the file as it was. */
static void assert_out_untouched(const bench *b, int status, const char *command)
{
    test_scratch_text(&b->scratch, "out", "old content\n");
    test_result result = test_shell("cd '%s' && %s", b->scratch.path, command);
    if (result.status != status) {
        fail_msg("%s: exit status %d, expected %d\n%s", command, result.status, status, result.err);
    }
    assert_string_not_equal(result.err, "");
    char *content = test_read_file(test_scratch_path(&b->scratch, "out"));
    assert_string_equal(content, "old content\n");
    free(content);
    test_result_free(&result);
    assert_files(b, "case.yaml\nout\n");
}

static void failed_run_leaves_the_output_file(void **state)
{
    const bench *b = *state;
    assert_out_untouched(b, 3, "\"$NW\" assess case.yaml --output out --set notch.kt=0");
    assert_out_untouched(b, 5, "\"$NW\" assess case.yaml --output out --set load.1.history=no.csv");
    assert_out_untouched(b, 4,
                         "\"$NW\" assess case.yaml --output out "
                         "--set 'material.cyclic_curve.strength_coefficient=1e-300 MPa'");
    assert_out_untouched(b, 2, "\"$NW\" assess case.yaml --output out --format xml");
}

/* A limit on the size of files stands for a disk that fills up while the result is written. */
static void full_disk_leaves_the_output_file(void **state)
{
    const char *const limit =
        "trap '' XFSZ; ulimit -f 8; \"$NW\" assess '" EXAMPLE "' --format csv "
        "--output out";
    assert_out_untouched(*state, 5, limit);
}

static void full_device_is_told(void **state)
{
    const bench *b = *state;
    if (access("/dev/full", W_OK) != 0) {
        skip();
    }
    const char *const rows[] = {"--output /dev/full", "> /dev/full", "--format json > /dev/full",
                                "--format csv > /dev/full"};
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        test_result result = test_shell("\"$NW\" assess '%s' %s", b->path, rows[i]);
        assert_int_equal(result.status, 5);
        assert_non_null(strstr(result.err, "cannot be written: No space left on device"));
        test_result_free(&result);
    }
}

/* Help and version are results too: lost output is no success. */
static void full_device_is_told_by_help(void **state)
{
    (void)state;
    if (access("/dev/full", W_OK) != 0) {
        skip();
    }
    const char *const rows[] = {"--help", "--version", "assess --help"};
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        test_result result = test_shell("\"$NW\" %s > /dev/full", rows[i]);
        assert_int_equal(result.status, 5);
        test_result_free(&result);
    }
}

/* More output than a pipe holds, so that the program is still writing when its reader has gone. */
static void closed_pipe_is_told(void **state)
{
    const bench *b = *state;
    const char *status = test_scratch_path(&b->scratch, "status");
    test_result result =
        test_shell("{ \"$NW\" assess '" EXAMPLE "' --format csv; echo $? >'%s'; } | true", status);
    char *content = test_read_file(status);
    assert_string_equal(content, "5\n");
    assert_non_null(strstr(result.err, "standard output: error: cannot be written: "));
    assert_null(strstr(result.err, "Success"));
    free(content);
    test_result_free(&result);
}

static void closed_standard_output_is_told(void **state)
{
    const bench *b = *state;
    test_result result = test_shell("\"$NW\" assess '%s' >&-", b->path);
    assert_int_equal(result.status, 5);
    assert_non_null(strstr(result.err, "standard output: error: cannot be written: "));
    test_result_free(&result);
}

/* What a command reads it must not overwrite, whatever the name it goes by. */
static void inputs_are_not_overwritten(void **state)
{
    const bench *b = *state;
    const char *const names[] = {"case.yaml", "./case.yaml", "link.yaml"};
    for (int i = 0; i < 3; i++) {
        test_result result = test_shell(
            "cd '%s' && ln -sf case.yaml link.yaml && \"$NW\" assess case.yaml --output %s",
            b->scratch.path, names[i]);
        assert_int_equal(result.status, 2);
        assert_non_null(strstr(result.err, "also reads or writes"));
        test_result_free(&result);
    }
    char *content = test_read_file(b->path);
    assert_string_equal(content, bad_input_base);
    free(content);
    test_result saved =
        test_shell("cd '%s' && \"$NW\" estimate --modulus '206 GPa' --ultimate '820 MPa' "
                   "--group steel --save s.yaml --output s.yaml",
                   b->scratch.path);
    assert_int_equal(saved.status, 2);
    test_result_free(&saved);
}

/* Loops thrown away on request must not turn a missed target into a silent success. */
static void left_out_loops_stand_beside_the_verdict(void **state)
{
    const bench *b = *state;
    const char *path = test_scratch_text(
        &b->scratch, "gate.yaml",
        "notchwright: 1\nmaterial: rqc-100\nnotch: {kt: 2.5}\nload:\n"
        "  - {history: [0, 200, -100, 0], scale: 1 MPa, ignore_ranges_below: 5000 MPa}\n"
        "life: {target: 1e9}\n");
    test_result result = test_shell("\"$NW\" assess '%s'", path);
    const char *caution = strstr(result.out, "left out");
    assert_non_null(caution);
    assert_non_null(strstr(result.out, "MISSED"));
    assert_true(caution < strstr(result.out, "\nDamage"));
    test_result_free(&result);
}

/* Near the target the numbers shown must lie on the side of the verdict. */
static void rounding_does_not_contradict_the_verdict(void **state)
{
    const bench *b = *state;
    test_result exact =
        test_shell("\"$NW\" assess '%s' --format json | grep '\"life_blocks\"'", b->path);
    double life = strtod(strchr(exact.out, ':') + 1, NULL);
    test_result_free(&exact);
    test_result missed =
        test_shell("\"$NW\" assess '%s' --set life.target=%.8g", b->path, life * 1.001);
    const char *about = strstr(missed.out, "TARGET MISSED  about ");
    assert_non_null(about);
    assert_true(strtod(about + 21, NULL) < life * 1.001);
    test_result_free(&missed);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test_setup_teardown(output_file_holds_what_standard_output_would, bench_set_up,
                                        bench_tear_down),
        cmocka_unit_test_setup_teardown(failed_run_leaves_the_output_file, bench_set_up,
                                        bench_tear_down),
        cmocka_unit_test_setup_teardown(full_disk_leaves_the_output_file, bench_set_up,
                                        bench_tear_down),
        cmocka_unit_test_setup_teardown(full_device_is_told, bench_set_up, bench_tear_down),
        cmocka_unit_test(full_device_is_told_by_help),
        cmocka_unit_test_setup_teardown(closed_pipe_is_told, bench_set_up, bench_tear_down),
        cmocka_unit_test_setup_teardown(closed_standard_output_is_told, bench_set_up,
                                        bench_tear_down),
        cmocka_unit_test_setup_teardown(inputs_are_not_overwritten, bench_set_up, bench_tear_down),
        cmocka_unit_test_setup_teardown(left_out_loops_stand_beside_the_verdict, bench_set_up,
                                        bench_tear_down),
        cmocka_unit_test_setup_teardown(rounding_does_not_contradict_the_verdict, bench_set_up,
                                        bench_tear_down),
    };
    return cmocka_run_group_tests_name("exit_output_files", tests, NULL, NULL);
}
