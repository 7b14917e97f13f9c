/* notchwright assess: the life of one notch under one block. */
#include "base/file.h"
#include "cli/options.h"

#include <stdlib.h>
#include <string.h>
#include <unistd.h>

static const char help[] =
    "Usage: notchwright assess CASE.yaml [OPTION ...]\n"
    "\n"
    "Life of one notch under one repeated block of loading, by the local-strain method:\n"
    "verdict and life, the loops that do the damage and where in the history they peak.\n"
    "\n"
    "Options:\n"
    "  --format text|json|csv  text for reading (default), the whole result as JSON, or the\n"
    "                          loops as CSV\n"
    "  --output FILE           write there (whole or not at all) instead of to standard output\n"
    "  --set PATH=VALUE        override one entry of the case, e.g. --set notch.rule=esed or\n"
    "                          --set load.2.repeats=5 (events count from 1); repeatable\n"
    "  --require-target        exit with 1 when the life is below the target\n"
    "  --quiet                 no output, only the exit status and errors\n"
    "  --help                  this text\n"
    "\n"
    "Exit status: 0 done, 1 below the target (with --require-target), 2 wrong usage,\n"
    "3 input refused, 4 could not be computed, 5 file or memory trouble.\n"
    "\n"
    "Example:\n"
    "  notchwright assess examples/forwarder-axle/case.yaml --set notch.rule=esed\n";

static nw_status write_result(FILE *to, const nw_options *options, const nw_case *input,
                              const nw_assessment *result)
{
    if (options->format == NW_FORMAT_JSON) {
        return nw_write_assessment_json(to, input, result);
    }
    if (options->format == NW_FORMAT_CSV) {
        return nw_write_assessment_csv(to, input, result);
    }
    bool colour = to == stdout && isatty(STDOUT_FILENO) && getenv("NO_COLOR") == NULL;
    return nw_write_assessment_text(to, input, result, colour);
}

static nw_status write_out(const nw_options *options, const nw_case *input,
                           const nw_assessment *result, nw_diagnostics *diagnostics)
{
    if (options->quiet && strcmp(options->output, "-") == 0) {
        return NW_OK;
    }
    nw_whole_file file;
    nw_status status = nw_whole_file_open(&file, options->output, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    status = write_result(file.stream, options, input, result);
    if (status == NW_MEMORY) {
        nw_whole_file_discard(&file);
        return nw_fault(diagnostics, status, NULL, NULL, "out of memory writing the result");
    }
    return nw_whole_file_commit(&file, diagnostics);
}

static nw_status assess(const nw_options *options, nw_diagnostics *diagnostics)
{
    nw_case input;
    nw_status status = nw_case_read(options->operands[0], options->settings, options->setting_count,
                                    &input, diagnostics);
    nw_assessment *result = NULL;
    if (status == NW_OK && options->require_target && !(input.target_blocks > 0.0)) {
        status = nw_fault(diagnostics, NW_USAGE, NULL, "life.target",
                          "--require-target: the case gives no target");
    }
    if (status == NW_OK) {
        nw_assess_options how = {.all_loops = options->format != NW_FORMAT_TEXT, .worst = 10};
        status = nw_assess(&input, &how, &result, diagnostics);
    }
    if (status == NW_OK) {
        status = write_out(options, &input, result, diagnostics);
    }
    if (status == NW_OK && options->require_target && !result->target_reached) {
        status = NW_BELOW_TARGET;
    }
    nw_assessment_free(result);
    nw_case_clear(&input);
    return status;
}

static int run(int count, char **arguments)
{
    nw_options options;
    int usage = nw_options_read(&nw_verb_assess, count, arguments, &options);
    if (usage != 0) {
        return usage;
    }
    if (options.help) {
        fputs(help, stdout);
        return 0;
    }
    if (options.operand_count != 1) {
        return nw_cli_usage(&nw_verb_assess, "found %zu case files, expected one",
                            options.operand_count);
    }
    nw_diagnostics diagnostics;
    nw_diagnostics_clear(&diagnostics);
    nw_status status = assess(&options, &diagnostics);
    if (status == NW_OK || status == NW_BELOW_TARGET) {
        return nw_status_exit(status);
    }
    return nw_cli_report(&diagnostics, status);
}

const nw_verb nw_verb_assess = {
    .name = "assess",
    .arguments = "CASE.yaml",
    .summary = "life of one notch under one block",
    .help = help,
    .run = run,
};
