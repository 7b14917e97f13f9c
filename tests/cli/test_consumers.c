/* The library as installed: a small program found its way to it by CMake and by pkg-config, static and
 * shared, and gives the very result that the program gives. */
#include "support/bad_input.h"

#define CONSUMER TEST_SOURCE_DIR "/tests/cli/consumer"

/* One installation for all tests. */
typedef struct installation {
    test_scratch scratch;
    char prefix[320], case_path[512];
    char *expected; /* what the program itself writes */
} installation;

static installation shared;

static void run(const char *what, const char *command)
{
    test_result result = test_shell("cd '%s' && P='%s' && CASE='%s' && unset DESTDIR && %s",
                                    shared.scratch.path, shared.prefix, shared.case_path, command);
    if (result.status != 0) {
        fail_msg("%s: exit status %d\n%s%s", what, result.status, result.out, result.err);
    }
    test_result_free(&result);
}

/* Runs a consumer; its result is that of the program, to the byte. */
static void assert_same_result(const char *command)
{
    test_result result = test_shell("cd '%s' && P='%s' && %s '%s'", shared.scratch.path,
                                    shared.prefix, command, shared.case_path);
    assert_string_equal(result.err, "");
    assert_int_equal(result.status, 0);
    assert_string_equal(result.out, shared.expected);
    test_result_free(&result);
}

static int install(void **state)
{
    (void)state;
    if (TEST_SANITIZED) {
        return 0;
    }
    shared.scratch = test_scratch_create();
    snprintf(shared.prefix, sizeof shared.prefix, "%s/prefix", shared.scratch.path);
    strcpy(shared.case_path, test_scratch_text(&shared.scratch, "case.yaml", bad_input_base));
    run("cmake --install", "'" TEST_CMAKE "' --install '" TEST_BUILD_DIR "' --prefix \"$P\"");
    test_result result = test_shell("\"$NW\" assess '%s' --format json", shared.case_path);
    assert_int_equal(result.status, 0);
    shared.expected = result.out;
    free(result.err);
    return 0;
}

static int remove_all(void **state)
{
    (void)state;
    if (!TEST_SANITIZED) {
        free(shared.expected);
        test_scratch_remove(&shared.scratch);
    }
    return 0;
}

#define SKIP_WHEN_SANITIZED()                                                   \
    if (TEST_SANITIZED) {                                                       \
        skip(); /* a consumer would have to be built with the sanitizers too */ \
    }

static void program_and_data_are_installed(void **state)
{
    (void)state;
    SKIP_WHEN_SANITIZED();
    assert_same_result("\"$P/bin/notchwright\" assess --format json");
    run("materials", "(cd '" TEST_SOURCE_DIR "/materials' && ls *.yaml) >want && "
                     "(cd \"$P/share/notchwright/materials\" && ls *.yaml) >got && "
                     "[ $(wc -l <want) -ge 10 ] && diff want got");
    run("examples and page", "find \"$P\" -name case.yaml | grep forwarder-axle && "
                             "find \"$P\" -name notchwright.1 | grep man1");
}

static void materials_are_found_by_name(void **state)
{
    (void)state;
    SKIP_WHEN_SANITIZED();
    run("NOTCHWRIGHT_MATERIALS",
        "mkdir -p own && sed 's/^name: .*/name: of-our-own/' \"$P/share/notchwright/materials/"
        "rqc-100.yaml\" >own/of-our-own.yaml && NOTCHWRIGHT_MATERIALS=\"$PWD/own\" "
        "\"$P/bin/notchwright\" assess \"$CASE\" --set material=of-our-own --format json "
        "| grep '\"name\": \"of-our-own\"'");
}

static void cmake_finds_it(void **state)
{
    (void)state;
    SKIP_WHEN_SANITIZED();
    run("configure", "'" TEST_CMAKE "' -S '" CONSUMER "' -B by_cmake -G '" TEST_GENERATOR
                     "' -DCMAKE_PREFIX_PATH=\"$P\" "
                     "-DCMAKE_C_COMPILER='" TEST_COMPILER "' -DCMAKE_BUILD_TYPE=Release");
    run("build", "'" TEST_CMAKE "' --build by_cmake");
    assert_same_result("by_cmake/consumer_static");
    assert_same_result("by_cmake/consumer_shared");
    run("kinds", "ldd by_cmake/consumer_shared | grep \"$P.*libnotchwright\" && "
                 "! ldd by_cmake/consumer_static | grep libnotchwright");
}

static void cmake_refuses_another_major_version(void **state)
{
    (void)state;
    SKIP_WHEN_SANITIZED();
    run("version 2",
        "mkdir -p later && sed 's/notchwright 1 /notchwright 2 /' '" CONSUMER
        "/CMakeLists.txt' >later/CMakeLists.txt && cp '" CONSUMER
        "/consumer.c' later && ! '" TEST_CMAKE "' -S later -B by_cmake_2 -G '" TEST_GENERATOR
        "' -DCMAKE_PREFIX_PATH=\"$P\" -DCMAKE_C_COMPILER='" TEST_COMPILER "'");
}

/* Sets PKG_CONFIG_PATH to the installed folder of .pc files. */
#define WITH_PC \
    "PC=$(dirname \"$(find \"$P\" -name notchwright.pc)\") && export PKG_CONFIG_PATH=\"$PC\" && "

static void pkg_config_shared(void **state)
{
    (void)state;
    SKIP_WHEN_SANITIZED();
    run("compile", WITH_PC "'" TEST_COMPILER "' '" CONSUMER "/consumer.c' -o by_pc_shared "
                           "$(pkg-config --cflags --libs notchwright)");
    assert_same_result(
        "LD_LIBRARY_PATH=$(dirname \"$(find \"$P\" -name libnotchwright.so)\") ./by_pc_shared");
    run("version", WITH_PC "[ \"notchwright $(pkg-config --modversion notchwright)\" = "
                           "\"$(\"$NW\" --version)\" ]");
}

/* Without the shared library beside it, as the linker prefers that one. */
static void pkg_config_static(void **state)
{
    (void)state;
    SKIP_WHEN_SANITIZED();
    run("copy", "rm -rf static_only && cp -R \"$P\" static_only && "
                "find static_only -name 'libnotchwright.so*' -exec rm {} +");
    run("compile",
        "P=\"$PWD/static_only\" && " WITH_PC "'" TEST_COMPILER "' '" CONSUMER
        "/consumer.c' -o by_pc_static $(pkg-config --static --cflags --libs notchwright)");
    assert_same_result("./by_pc_static");
    run("kind", "! ldd by_pc_static | grep libnotchwright");
}

static void each_header_stands_alone(void **state)
{
    (void)state;
    SKIP_WHEN_SANITIZED();
    run("headers",
        "cd \"$P/include/notchwright\" && for H in *.h; do "
        "echo \"#include <notchwright/$H>\" | '" TEST_COMPILER
        "' -std=c17 -Wall -Wextra -Wpedantic -Werror -fsyntax-only -x c -I \"$P/include\" - "
        "|| exit 1; done");
}

/* The shared library exports what its headers declare and nothing else. */
static void only_declared_names_are_exported(void **state)
{
    (void)state;
    SKIP_WHEN_SANITIZED();
    run("symbols",
        "nm -D --defined-only \"$(find \"$P\" -name libnotchwright.so)\" >symbols && "
        "grep -q ' T nw_assess$' symbols && for NAME in $(sed 's/.* //' symbols); do "
        "grep -qw \"$NAME\" \"$P\"/include/notchwright/*.h || { echo \"$NAME\"; exit 1; }; "
        "done");
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(program_and_data_are_installed),
        cmocka_unit_test(materials_are_found_by_name),
        cmocka_unit_test(cmake_finds_it),
        cmocka_unit_test(cmake_refuses_another_major_version),
        cmocka_unit_test(pkg_config_shared),
        cmocka_unit_test(pkg_config_static),
        cmocka_unit_test(each_header_stands_alone),
        cmocka_unit_test(only_declared_names_are_exported),
    };
    return cmocka_run_group_tests_name("consumers", tests, install, remove_all);
}
