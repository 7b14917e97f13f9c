/* Memory that runs out at any moment: each allocation of a run fails once, alone and with all that follow.
 * The run must end with status 5 and a word on standard error, or (where the allocation could be done
 * without) with the full result; never in a crash, with half a result, or with a broken output file. */
#include "support/support.h"

#include <sys/resource.h>

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
    const char *name, *text, *options;
} run;

static const run runs[] = {
    {"text", inline_and_file, ""},
    {"json", inline_and_file, "--format json"},
    {"csv", inline_and_file, "--format csv"},
    {"gzip", packed, ""},
    {"curve", curve, "--set notch.rule=curve --set notch.curve=fe.csv --format json"},
    {"settings", curve,
     "--set notch.rule=esed --set life.mean_stress=walker --set load.1.repeats=7"},
};
enum { RUNS = sizeof runs / sizeof runs[0] };

static test_result run_with(const test_scratch *scratch, const run *r, const char *variables)
{
    return test_shell("cd '%s' && rm -f out && env LD_PRELOAD='" TEST_FAIL_ALLOCATION
                      "' %s \"$NW\" "
                      "assess case.yaml %s --output out",
                      scratch->path, variables, r->options);
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
        return result->status < 0 || result->status > 128 ? "crash" : "status that is not 5";
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

/* Fails the n-th allocation; counts and prints complaints rather than stopping at the first. */
static int try_one(const test_scratch *scratch, const run *r, unsigned long n, bool and_on,
                   const char *expected)
{
    char variables[80];
    snprintf(variables, sizeof variables, "FAIL_ALLOCATION=%lu FAIL_ALLOCATION_ON=%d", n, and_on);
    test_result result = run_with(scratch, r, variables);
    char *output = output_of(scratch);
    const char *wrong = complaint(&result, output, expected);
    if (wrong != NULL) {
        print_error("%s, allocation %lu%s fails: %s (status %d) %s\n", r->name, n,
                    and_on ? " and on" : "", wrong, result.status, result.err);
    }
    free(output);
    test_result_free(&result);
    return wrong != NULL;
}

static void every_allocation_may_fail(void **state)
{
    const run *r = *state;
    if (TEST_SANITIZED) {
        skip(); /* the sanitizer brings its own allocator */
    }
    test_scratch scratch = prepare(r);
    test_result whole = run_with(&scratch, r, "FAIL_ALLOCATION_COUNT=count");
    assert_int_equal(whole.status, 0);
    char *expected = output_of(&scratch);
    assert_non_null(expected);
    char *text = test_read_file(test_scratch_path(&scratch, "count"));
    unsigned long count = strtoul(text, NULL, 10);
    assert_in_range(count, 20, 100000);
    int wrong = 0;
    for (unsigned long n = 1; n <= count && wrong < 20; n++) {
        wrong += try_one(&scratch, r, n, false, expected);
        wrong += try_one(&scratch, r, n, true, expected);
    }
    wrong += try_one(&scratch, r, count + 1, true, expected);
    assert_no_parts(&scratch);
    free(text);
    free(expected);
    test_result_free(&whole);
    test_scratch_remove(&scratch);
    assert_int_equal(wrong, 0);
}

/* The preloaded library works: without the first allocation there is no result. */
static void first_allocation_matters(void **state)
{
    (void)state;
    if (TEST_SANITIZED) {
        skip();
    }
    test_scratch scratch = prepare(&runs[0]);
    test_result result = run_with(&scratch, &runs[0], "FAIL_ALLOCATION=1 FAIL_ALLOCATION_ON=1");
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
