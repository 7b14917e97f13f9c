/* Exit statuses, what goes where, and output files that are whole or not there at all. */
#define _XOPEN_SOURCE 700

#include "support/bad_input.h"

#include <fcntl.h>
#include <sys/wait.h>
#include <unistd.h>

#define EXAMPLE TEST_SOURCE_DIR "/examples/forwarder-axle/case.yaml"

/* The base case in a scratch folder of its own. */
typedef struct bench {
    test_scratch scratch;
    char path[512];
} bench;

static int set_up(void **state)
{
    bench *b = malloc(sizeof *b);
    b->scratch = test_scratch_create();
    strcpy(b->path, test_scratch_text(&b->scratch, "case.yaml", bad_input_base));
    *state = b;
    return 0;
}

static int tear_down(void **state)
{
    bench *b = *state;
    test_scratch_remove(&b->scratch);
    free(b);
    return 0;
}

static void expect(const bench *b, int status, const char *arguments)
{
    test_result result =
        test_shell("cd '%s' && \"$NW\" assess case.yaml %s", b->scratch.path, arguments);
    if (result.status != status) {
        fail_msg("%s: exit status %d, expected %d\n%s", arguments, result.status, status,
                 result.err);
    }
    assert_true((result.err[0] == '\0') == (status < 2));
    test_result_free(&result);
}

/* Case: life about 5e4 blocks or more, so both sides of a target are far away. */
static void statuses(void **state)
{
    expect(*state, 0, "");
    expect(*state, 0, "--require-target");
    expect(*state, 0, "--set life.target=1e30");
    expect(*state, 1, "--set life.target=1e30 --require-target");
    expect(*state, 1, "--set life.target=1e30 --require-target --quiet");
    expect(*state, 1, "--set life.target=1e30 --require-target --format json");
    expect(*state, 2, "--format xml");
    expect(*state, 3, "--set notch.kt=0.5");
    /* Strength so low that the cyclic curve leaves the range of doubles: no root to be found. */
    expect(*state, 4, "--set 'material.cyclic_curve.strength_coefficient=1e-300 MPa'");
    expect(*state, 5, "--output nowhere/out");
}

static void results_and_diagnostics_are_kept_apart(void **state)
{
    const bench *b = *state;
    const char *const formats[] = {"text", "json", "csv"};
    for (int i = 0; i < 3; i++) {
        test_result result = test_shell("\"$NW\" assess '%s' --format %s", b->path, formats[i]);
        assert_int_equal(result.status, 0);
        assert_string_equal(result.err, "");
        assert_true(strlen(result.out) > 100);
        assert_null(strchr(result.out, '\033'));
        test_result_free(&result);
    }
}

static void quiet_prints_errors_alone(void **state)
{
    const bench *b = *state;
    test_result good = test_shell("\"$NW\" assess '%s' --quiet --format json", b->path);
    assert_int_equal(good.status, 0);
    assert_string_equal(good.out, "");
    assert_string_equal(good.err, "");
    test_result_free(&good);
    test_result bad = test_shell("\"$NW\" assess '%s' --quiet --set notch.kt=0", b->path);
    assert_int_equal(bad.status, 3);
    assert_string_equal(bad.out, "");
    assert_non_null(strstr(bad.err, "notch.kt: found 0"));
    test_result_free(&bad);
}

static void help_and_version(void **state)
{
    (void)state;
    static const struct {
        const char *arguments, *expected[4];
    } rows[] = {
        {"--help", {"Usage:", "assess", "--version", "licensed"}},
        {"-h", {"Usage:", "assess", "--version", "licensed"}},
        {"assess --help",
         {"Usage: notchwright assess CASE.yaml", "--require-target", "Example:", "--set"}},
        {"assess nowhere.yaml -h",
         {"Usage: notchwright assess CASE.yaml", "--quiet", "Exit status", "--output"}},
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        test_result result = test_shell("\"$NW\" %s", rows[i].arguments);
        assert_int_equal(result.status, 0);
        assert_string_equal(result.err, "");
        for (int k = 0; k < 4; k++) {
            assert_non_null(strstr(result.out, rows[i].expected[k]));
        }
        test_result_free(&result);
    }
    char version[64];
    snprintf(version, sizeof version, "notchwright %s\n", nw_version());
    test_result result = test_shell("\"$NW\" --version");
    assert_string_equal(result.out, version);
    test_result_free(&result);
}

/* The example that the help of assess ends with runs as it stands. */
static void example_of_the_help_runs(void **state)
{
    (void)state;
    test_result help = test_shell("\"$NW\" assess --help");
    const char *example = strstr(help.out, "Example:\n  notchwright ");
    assert_non_null(example);
    test_result result = test_shell("cd '" TEST_SOURCE_DIR "' && \"$NW\" %s",
                                    example + strlen("Example:\n  notchwright "));
    assert_int_equal(result.status, 0);
    assert_non_null(strstr(result.out, "TARGET"));
    test_result_free(&result);
    test_result_free(&help);
}

/* ---- output files ---- */

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
    assert_non_null(strstr(result.err, "standard output: error: cannot be written: Broken pipe"));
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

/* ---- colour ---- */

/* What the program prints on a terminal, with NO_COLOR or without. */
static size_t run_on_terminal(const char *path, bool no_colour, char *text, size_t capacity)
{
    int terminal = posix_openpt(O_RDWR | O_NOCTTY);
    assert_true(terminal >= 0 && grantpt(terminal) == 0 && unlockpt(terminal) == 0);
    int side = open(ptsname(terminal), O_RDWR | O_NOCTTY);
    assert_true(side >= 0);
    pid_t child = fork();
    if (child == 0) {
        dup2(side, STDOUT_FILENO);
        close(terminal);
        no_colour ? setenv("NO_COLOR", "1", 1) : unsetenv("NO_COLOR");
        execl(TEST_PROGRAM, TEST_PROGRAM, "assess", path, (char *)NULL);
        _exit(99);
    }
    close(side);
    size_t used = 0;
    for (ssize_t got; used + 1 < capacity; used += (size_t)got) {
        got = read(terminal, text + used, capacity - used - 1);
        if (got <= 0) {
            break;
        }
    }
    text[used] = '\0';
    close(terminal);
    int status;
    assert_int_equal(waitpid(child, &status, 0), child);
    assert_int_equal(WEXITSTATUS(status), 0);
    return used;
}

static void colour_on_a_terminal_unless_refused(void **state)
{
    const bench *b = *state;
    char text[20000];
    assert_true(run_on_terminal(b->path, false, text, sizeof text) > 100);
    assert_non_null(strstr(text, "\033["));
    assert_true(run_on_terminal(b->path, true, text, sizeof text) > 100);
    assert_null(strchr(text, '\033'));
    assert_non_null(strstr(text, "TARGET REACHED"));
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test_setup_teardown(statuses, set_up, tear_down),
        cmocka_unit_test_setup_teardown(results_and_diagnostics_are_kept_apart, set_up, tear_down),
        cmocka_unit_test_setup_teardown(quiet_prints_errors_alone, set_up, tear_down),
        cmocka_unit_test(help_and_version),
        cmocka_unit_test(example_of_the_help_runs),
        cmocka_unit_test_setup_teardown(output_file_holds_what_standard_output_would, set_up,
                                        tear_down),
        cmocka_unit_test_setup_teardown(failed_run_leaves_the_output_file, set_up, tear_down),
        cmocka_unit_test_setup_teardown(full_disk_leaves_the_output_file, set_up, tear_down),
        cmocka_unit_test_setup_teardown(full_device_is_told, set_up, tear_down),
        cmocka_unit_test(full_device_is_told_by_help),
        cmocka_unit_test_setup_teardown(closed_pipe_is_told, set_up, tear_down),
        cmocka_unit_test_setup_teardown(closed_standard_output_is_told, set_up, tear_down),
        cmocka_unit_test_setup_teardown(colour_on_a_terminal_unless_refused, set_up, tear_down),
    };
    return cmocka_run_group_tests_name("exit_and_output", tests, NULL, NULL);
}
