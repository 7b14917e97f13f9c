/* Exit statuses, what goes to standard output and what to standard error, help, colour. */
#define _XOPEN_SOURCE 700

#include "support/bad_input.h"

#include <fcntl.h>
#include <sys/wait.h>
#include <unistd.h>

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

/* ---- colour ---- */

/* What the program prints on a terminal, with NO_COLOR or without. */
static size_t run_on_terminal(const char *path, bool no_colour, char *text, size_t capacity)
{
    int terminal = posix_openpt(O_RDWR | O_NOCTTY);
    if (terminal < 0) {
        skip(); /* a bare container has no pseudo-terminals */
    }
    assert_true(grantpt(terminal) == 0 && unlockpt(terminal) == 0);
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
        cmocka_unit_test_setup_teardown(statuses, bench_set_up, bench_tear_down),
        cmocka_unit_test_setup_teardown(results_and_diagnostics_are_kept_apart, bench_set_up,
                                        bench_tear_down),
        cmocka_unit_test_setup_teardown(quiet_prints_errors_alone, bench_set_up, bench_tear_down),
        cmocka_unit_test(help_and_version),
        cmocka_unit_test(example_of_the_help_runs),
        cmocka_unit_test_setup_teardown(colour_on_a_terminal_unless_refused, bench_set_up,
                                        bench_tear_down),
    };
    return cmocka_run_group_tests_name("exit_and_output", tests, NULL, NULL);
}
