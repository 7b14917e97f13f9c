/* Memory that runs out at any moment: each allocation of a run fails once, alone and with all that follow.
 * The run must end with status 5 and a word on standard error, or (where the allocation could be done
 * without) with the full result; never in a crash, with half a result, or with a broken output file. */
#include "support/support.h"

#include <fcntl.h>
#include <sys/resource.h>
#include <sys/wait.h>
#include <unistd.h>

#define CASE_HEAD                                                                      \
    "notchwright: 1\ntitle: Lack of memory\nunits: {stress: MPa}\nmaterial: rqc-100\n" \
    "notch: {kt: 2.5, rule: neuber}\n"

/* An inline history and a file, so that both ways of reading are met. */
static const char inline_and_file[] = CASE_HEAD
    "load:\n  - {history: [0, 200, -100, 150, 0], scale: 1 MPa}\n"
    "  - {history: load.csv, column: load, scale: 1 MPa, repeats: 4}\nlife: {target: 100}\n";
static const char packed[] =
    CASE_HEAD "load: [{history: load.csv.gz, column: load, scale: 1 MPa}]\n";
static const char curve[] = CASE_HEAD "load: [{history: [0, 200, -100], scale: 1 MPa}]\n";

typedef struct run {
    const char *name, *text;
    const char *options[9];
    bool and_on_too; /* also without any memory from then on */
} run;

static const run runs[] = {
    {"text", inline_and_file, {NULL}, false},
    {"json", inline_and_file, {"--format", "json", NULL}, true},
    {"gzip", packed, {NULL}, false},
    {"curve", curve, {"--set", "notch.rule=curve", "--set", "notch.curve=fe.csv", NULL}, false},
    {"settings",
     curve,
     {"--set", "notch.rule=esed", "--set", "life.mean_stress=walker", "--set", "load.1.repeats=7",
      NULL},
     false},
};
enum { RUNS = sizeof runs / sizeof runs[0] };

/* Which allocation fails; 0: none. */
typedef struct failure {
    unsigned long call;
    bool and_on;
} failure;

static void redirect(int descriptor, const char *path)
{
    int file = open(path, O_WRONLY | O_CREAT | O_TRUNC, 0600);
    if (file < 0 || dup2(file, descriptor) < 0) {
        _exit(97);
    }
}

/* In the child: the program with the library preloaded. Without a shell, as this runs thousands of times. */
static void become_program(const test_scratch *scratch, const run *r, failure f)
{
    char number[24];
    const char *arguments[16] = {TEST_PROGRAM, "assess", "case.yaml", "--output", "out"};
    for (size_t i = 0; r->options[i] != NULL; i++) {
        arguments[5 + i] = r->options[i];
    }
    snprintf(number, sizeof number, "%lu", f.call);
    if (chdir(scratch->path) != 0) {
        _exit(97);
    }
    redirect(STDOUT_FILENO, "stdout");
    redirect(STDERR_FILENO, "stderr");
    setenv("FAIL_ALLOCATION", number, 1);
    setenv("FAIL_ALLOCATION_ON", f.and_on ? "1" : "0", 1);
    setenv("FAIL_ALLOCATION_COUNT", "count", 1);
    setenv("LD_PRELOAD", TEST_FAIL_ALLOCATION, 1);
    execv(TEST_PROGRAM, (char **)(uintptr_t)arguments);
    _exit(97);
}

static test_result run_with(const test_scratch *scratch, const run *r, failure f)
{
    unlink(test_scratch_path(scratch, "out"));
    pid_t child = fork();
    assert_true(child >= 0);
    if (child == 0) {
        become_program(scratch, r, f);
    }
    int status;
    assert_int_equal(waitpid(child, &status, 0), child);
    return (test_result){WIFEXITED(status) ? WEXITSTATUS(status) : -WTERMSIG(status),
                         test_read_file(test_scratch_path(scratch, "stdout")),
                         test_read_file(test_scratch_path(scratch, "stderr"))};
}

static test_scratch prepare(const run *r)
{
    test_scratch scratch = test_scratch_create();
    test_scratch_text(&scratch, "case.yaml", r->text);
    test_scratch_text(&scratch, "load.csv", "time,load\n0,0\n1,180\n2,-60\n3,90\n4,-120\n5,0\n");
    test_scratch_text(&scratch, "fe.csv",
                      "load,stress,strain\n0,0,0\n200,200,0.001\n400,380,0.0021\n700,450,0.005\n");
    test_result result = test_shell("cd '%s' && gzip -k load.csv", scratch.path);
    assert_int_equal(result.status, 0);
    test_result_free(&result);
    return scratch;
}

/* The output file, or NULL. */
static char *output_of(const test_scratch *scratch)
{
    const char *path = test_scratch_path(scratch, "out");
    FILE *file = fopen(path, "r");
    if (file == NULL) {
        return NULL;
    }
    fclose(file);
    return test_read_file(path);
}

/* What is wrong with the way this run ended, or NULL. */
static const char *complaint(const test_result *result, const char *output, const char *expected)
{
    if (result->status == 0) {
        return output != NULL && strcmp(output, expected) == 0 ? NULL : "status 0, other output";
    }
    if (result->status != 5) {
        return result->status < 0 ? "crash" : "status that is not 5";
    }
    return output != NULL           ? "output file left by a failed run"
           : result->err[0] == '\0' ? "status 5 without a word"
                                    : NULL;
}

static void assert_no_parts(const test_scratch *scratch)
{
    test_result listing = test_shell("ls -A '%s' | grep part", scratch->path);
    assert_string_equal(listing.out, "");
    test_result_free(&listing);
}

/* Prints what went wrong rather than stopping at the first; returns how many (0 or 1). */
static int try_one(const test_scratch *scratch, const run *r, failure f, const char *expected)
{
    test_result result = run_with(scratch, r, f);
    char *output = output_of(scratch);
    const char *wrong = complaint(&result, output, expected);
    if (wrong != NULL) {
        print_error("%s, allocation %lu%s fails: %s (status %d) %s\n", r->name, f.call,
                    f.and_on ? " and on" : "", wrong, result.status, result.err);
    }
    free(output);
    test_result_free(&result);
    return wrong != NULL;
}

/* Calls of a run in which none fails; `expected` receives its output. */
static unsigned long count_calls(const test_scratch *scratch, const run *r, char **expected)
{
    test_result whole = run_with(scratch, r, (failure){0, false});
    assert_string_equal(whole.err, "");
    assert_int_equal(whole.status, 0);
    test_result_free(&whole);
    *expected = output_of(scratch);
    assert_non_null(*expected);
    char *text = test_read_file(test_scratch_path(scratch, "count"));
    unsigned long count = strtoul(text, NULL, 10);
    free(text);
    assert_in_range(count, 20, 100000);
    return count;
}

static void every_allocation_may_fail(void **state)
{
    const run *r = *state;
    if (TEST_SANITIZED) {
        skip(); /* the sanitizer brings its own allocator */
    }
    char *expected;
    int wrong = 0;
    test_scratch scratch = prepare(r);
    unsigned long count = count_calls(&scratch, r, &expected);
    for (unsigned long n = 1; n <= count; n++) {
        wrong += try_one(&scratch, r, (failure){n, false}, expected);
        wrong += r->and_on_too ? try_one(&scratch, r, (failure){n, true}, expected) : 0;
    }
    test_result past = run_with(&scratch, r, (failure){count + 1, true});
    assert_int_equal(past.status, 0);
    test_result_free(&past);
    assert_no_parts(&scratch);
    free(expected);
    test_scratch_remove(&scratch);
    assert_int_equal(wrong, 0);
}

/* The preloaded library works: without any memory there is no result. */
static void first_allocation_matters(void **state)
{
    (void)state;
    if (TEST_SANITIZED) {
        skip();
    }
    test_scratch scratch = prepare(&runs[0]);
    test_result result = run_with(&scratch, &runs[0], (failure){1, true});
    assert_int_equal(result.status, 5);
    assert_non_null(strstr(result.err, "out of memory"));
    test_result_free(&result);
    test_scratch_remove(&scratch);
}

int main(void)
{
    const struct rlimit no_core = {0, 0};
    setrlimit(RLIMIT_CORE, &no_core);
    struct CMUnitTest tests[RUNS + 1] = {cmocka_unit_test(first_allocation_matters)};
    for (size_t i = 0; i < RUNS; i++) {
        tests[i + 1] = (struct CMUnitTest){runs[i].name, every_allocation_may_fail, NULL, NULL,
                                           (void *)(uintptr_t)&runs[i]};
    }
    return cmocka_run_group_tests_name("allocation_failure", tests, NULL, NULL);
}
