/* Running a verb: help, output, faults. */
#include "base/file.h"
#include "cli/verb.h"

#include <errno.h>
#include <stdlib.h>
#include <string.h>
#include <sys/stat.h>
#include <unistd.h>

nw_status nw_cli_write(const nw_arguments *arguments, nw_writer write, const void *data,
                       nw_diagnostics *diagnostics)
{
    const char *path = nw_argument(arguments, "--output");
    path = path == NULL ? "-" : path;
    if (nw_argument(arguments, "--quiet") != NULL && strcmp(path, "-") == 0) {
        return NW_OK;
    }
    nw_whole_file file;
    nw_status status = nw_whole_file_open(&file, path, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    const char *no_colour = getenv("NO_COLOR");
    bool colour = file.stream == stdout && isatty(STDOUT_FILENO) &&
                  (no_colour == NULL || no_colour[0] == '\0');
    status = write(file.stream, nw_argument_format(arguments), colour, data);
    if (status != NW_OK && status != NW_FILE) {
        nw_whole_file_discard(&file);
        return nw_fault(diagnostics, status, NULL, NULL, "%s writing the result",
                        nw_status_text(status));
    }
    return nw_whole_file_commit(&file, diagnostics);
}

static bool same_file(const char *a, const char *b)
{
    struct stat one, other;
    if (strcmp(a, b) == 0) { /* perhaps both still to be written */
        return stat(a, &one) != 0 || S_ISREG(one.st_mode);
    }
    return stat(a, &one) == 0 && stat(b, &other) == 0 && S_ISREG(one.st_mode) &&
           one.st_dev == other.st_dev && one.st_ino == other.st_ino;
}

nw_status nw_cli_refuse_overwriting(const nw_arguments *arguments, const char *option,
                                    const char *const *inputs, size_t count,
                                    nw_diagnostics *diagnostics)
{
    const char *output = nw_argument(arguments, option);
    for (size_t i = 0; output != NULL && i < count; i++) {
        if (inputs[i] != NULL && same_file(output, inputs[i])) {
            return nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                            "%s %.200s: found a file that this command also reads or writes, "
                            "expected another one",
                            option, output);
        }
    }
    return NW_OK;
}

static void print_faults(const nw_diagnostics *diagnostics, nw_status status)
{
    for (size_t i = 0; i < diagnostics->count; i++) {
        char line[1200];
        fprintf(stderr, "%s\n", nw_diagnostic_text(&diagnostics->items[i], line, sizeof line));
    }
    if (diagnostics->omitted > 0) {
        fprintf(stderr, "error: and %zu more\n", diagnostics->omitted);
    }
    if (diagnostics->count == 0) {
        fprintf(stderr, "error: %s\n", nw_status_text(status));
    }
}

int nw_cli_end_of_output(void)
{
    errno = 0;
    bool failed = ferror(stdout) != 0;
    failed = fflush(stdout) != 0 || failed;
    if (failed) {
        fprintf(stderr, "standard output: error: cannot be written: %s\n",
                errno == 0 ? "an earlier write failed" : strerror(errno));
    }
    return failed ? nw_status_exit(NW_FILE) : 0;
}

int nw_cli_run(const nw_verb *verb, int count, char **words)
{
    nw_arguments arguments;
    nw_diagnostics diagnostics;
    nw_diagnostics_clear(&diagnostics);
    nw_status status = nw_arguments_read(verb, count, words, &arguments, &diagnostics);
    if (status == NW_OK && nw_argument(&arguments, "--help") != NULL) {
        nw_verb_help(verb);
        return nw_cli_end_of_output();
    }
    if (status == NW_OK) {
        status = verb->run(&arguments, &diagnostics);
    }
    if (status != NW_OK && status != NW_BELOW_TARGET) {
        print_faults(&diagnostics, status);
    }
    if (status == NW_USAGE) {
        fprintf(stderr, "try: notchwright %s --help\n", verb->name);
    }
    return nw_status_exit(status);
}
