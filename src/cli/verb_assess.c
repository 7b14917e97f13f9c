/* notchwright assess: the life of one notch under one block. */
#include "cli/verb.h"

static const nw_option options[] = {
    {"--set", "PATH=VALUE", "override an entry of the case: notch.rule=esed, load.2.repeats=5"},
    {"--require-target", NULL, "exit with 1 when the life is below the target"},
    {NULL, NULL, NULL},
};

typedef struct written {
    const nw_case *input;
    const nw_assessment *result;
} written;

static nw_status write_result(FILE *to, nw_format format, bool colour, const void *data)
{
    const written *w = data;
    switch (format) {
    case NW_FORMAT_JSON:
        return nw_write_assessment_json(to, w->input, w->result);
    case NW_FORMAT_CSV:
        return nw_write_assessment_csv(to, w->input, w->result);
    default:
        return nw_write_assessment_text(to, w->input, w->result, colour);
    }
}

static nw_status assess(const nw_arguments *arguments, const nw_case *input,
                        nw_diagnostics *diagnostics)
{
    bool require = nw_argument(arguments, "--require-target") != NULL;
    if (require && !(input->target_blocks > 0.0)) {
        return nw_fault(diagnostics, NW_USAGE, NULL, "life.target",
                        "--require-target: the case gives no target");
    }
    nw_cli_progress progress = nw_cli_progress_start();
    nw_assess_options how = {.all_loops = nw_argument_format(arguments) != NW_FORMAT_TEXT,
                             .worst = 10,
                             .progress = nw_cli_progress_tell,
                             .progress_data = &progress};
    nw_assessment *result = NULL;
    nw_status status = nw_assess(input, &how, &result, diagnostics);
    nw_cli_progress_end(&progress);
    if (status == NW_OK) {
        written w = {input, result};
        status = nw_cli_write(arguments, write_result, &w, diagnostics);
    }
    if (status == NW_OK && require && !result->target_reached) {
        status = NW_BELOW_TARGET;
    }
    nw_assessment_free(result);
    return status;
}

static nw_status check_output(const nw_arguments *arguments, const nw_case *input,
                              nw_diagnostics *diagnostics)
{
    const char *own[] = {input->file, input->curve_file};
    nw_status status = nw_cli_refuse_overwriting(arguments, "--output", own, 2, diagnostics);
    for (size_t i = 0; i < input->load_count && status == NW_OK; i++) {
        const char *history = input->loads[i].history;
        status = nw_cli_refuse_overwriting(arguments, "--output", &history, 1, diagnostics);
    }
    return status;
}

static nw_status run(const nw_arguments *arguments, nw_diagnostics *diagnostics)
{
    const char *settings[NW_MOST_GIVEN];
    size_t count = nw_argument_all(arguments, "--set", settings, NW_MOST_GIVEN);
    nw_case input;
    nw_status status = nw_case_read(arguments->operands[0], settings, count, &input, diagnostics);
    if (status == NW_OK) {
        status = check_output(arguments, &input, diagnostics);
    }
    if (status == NW_OK) {
        status = assess(arguments, &input, diagnostics);
    }
    nw_case_clear(&input);
    return status;
}

const nw_verb nw_verb_assess = {
    .name = "assess",
    .operands = "CASE.yaml",
    .operand_least = 1,
    .operand_most = 1,
    .summary = "life of one notch under one block",
    .about = "Life of one notch under one repeated block of loading, by the local-strain method:\n"
             "verdict and life, the loops that do the damage and where in the history they peak.\n"
             "With --format csv the closed loops, one a row.",
    .options = options,
    .example = "notchwright assess examples/forwarder-axle/case.yaml --set notch.rule=esed",
    .run = run,
};
