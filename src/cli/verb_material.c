/* notchwright material: the library, one material, files checked. */
#include "base/text.h"
#include "cli/verb.h"

#include <math.h>
#include <string.h>

static const nw_option options[] = {
    {"--group", "GROUP", "list: only steel, cast_steel, aluminium, titanium, nickel, ..."},
    {"--min-strength", "STRESS", "list: only tensile strengths from here, \"600 MPa\""},
    {"--max-strength", "STRESS", "list: only tensile strengths up to here"},
    {"--cycles", "NUMBER", "show: life for the amplitudes (default: the endurance life, else 1e6)"},
    {NULL, NULL, NULL},
};

/* One of the verb's questions. */
typedef struct question {
    const char *word;
    size_t names_least, names_most;
    const char *names; /* in words */
    nw_status (*run)(const nw_arguments *arguments, nw_diagnostics *diagnostics);
} question;

/* ---- list ---- */

static nw_status read_filter(const nw_arguments *arguments, nw_material_filter *filter,
                             nw_diagnostics *diagnostics)
{
    const char *word = nw_argument(arguments, "--group");
    const char *words[NW_GROUP_UNSTATED + 1] = {NULL};
    filter->group = NW_GROUP_UNSTATED;
    for (int group = 0; group < NW_GROUP_UNSTATED; group++) {
        words[group] = nw_group_name((nw_group)group);
        if (word != NULL && strcmp(word, words[group]) == 0) {
            filter->group = (nw_group)group;
        }
    }
    nw_status low = nw_argument_quantity(arguments, "--min-strength", NW_STRESS,
                                         &filter->strength_low_mpa, diagnostics);
    nw_status high = nw_argument_quantity(arguments, "--max-strength", NW_STRESS,
                                          &filter->strength_high_mpa, diagnostics);
    if (word != NULL && filter->group == NW_GROUP_UNSTATED) {
        char list[200];
        return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "--group: found '%.60s', expected %s",
                        word, nw_text_join(list, sizeof list, words));
    }
    if (filter->strength_low_mpa > filter->strength_high_mpa) {
        return nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                        "--min-strength: found %g MPa, expected at most --max-strength (%g MPa)",
                        filter->strength_low_mpa, filter->strength_high_mpa);
    }
    return low != NW_OK ? low : high;
}

static nw_status write_list(FILE *to, nw_format format, bool colour, const void *data)
{
    (void)colour;
    switch (format) {
    case NW_FORMAT_JSON:
        return nw_write_material_list_json(to, data);
    case NW_FORMAT_CSV:
        return nw_write_material_list_csv(to, data);
    default:
        return nw_write_material_list_text(to, data);
    }
}

static nw_status run_list(const nw_arguments *arguments, nw_diagnostics *diagnostics)
{
    nw_material_filter filter;
    nw_material_list list;
    nw_status status = read_filter(arguments, &filter, diagnostics);
    if (status == NW_OK) {
        status = nw_material_list_read(&filter, &list, diagnostics);
    }
    if (status == NW_OK) {
        status = nw_cli_write(arguments, write_list, &list, diagnostics);
        nw_material_list_clear(&list);
    }
    return status;
}

/* ---- show ---- */

static nw_status read_cycles(const nw_arguments *arguments, double *cycles,
                             nw_diagnostics *diagnostics)
{
    nw_status status = nw_argument_quantity(arguments, "--cycles", NW_PURE, cycles, diagnostics);
    if (status == NW_OK && !isnan(*cycles) && !(*cycles >= 0.5 && *cycles <= 1e12)) {
        status = nw_fault(diagnostics, NW_INPUT, NULL, NULL,
                          "--cycles: found %g, expected 0.5 to 1e12", *cycles);
    }
    return status;
}

static nw_status write_review(FILE *to, nw_format format, bool colour, const void *data)
{
    switch (format) {
    case NW_FORMAT_JSON:
        return nw_write_material_json(to, data);
    case NW_FORMAT_CSV:
        return nw_write_material_csv(to, data);
    default:
        return nw_write_material_text(to, data, colour);
    }
}

static nw_status run_show(const nw_arguments *arguments, nw_diagnostics *diagnostics)
{
    double cycles;
    nw_material_review review;
    nw_status status = read_cycles(arguments, &cycles, diagnostics);
    if (status == NW_OK) {
        status = nw_material_review_read(arguments->operands[1], cycles, &review, diagnostics);
    }
    return status == NW_OK ? nw_cli_write(arguments, write_review, &review, diagnostics) : status;
}

/* ---- check ---- */

static nw_status write_checks(FILE *to, nw_format format, bool colour, const void *data)
{
    switch (format) {
    case NW_FORMAT_JSON:
        return nw_write_material_checks_json(to, data);
    case NW_FORMAT_CSV:
        return nw_write_material_checks_csv(to, data);
    default:
        return nw_write_material_checks_text(to, data, colour);
    }
}

/* A file that cannot be opened outweighs one that is refused. */
static nw_status worst(const nw_material_checks *checks)
{
    nw_status status = NW_OK;
    for (size_t i = 0; i < checks->count; i++) {
        if (nw_status_exit(checks->items[i].status) > nw_status_exit(status)) {
            status = checks->items[i].status;
        }
    }
    return status;
}

static nw_status run_check(const nw_arguments *arguments, nw_diagnostics *diagnostics)
{
    nw_material_checks checks;
    nw_status status = nw_material_checks_run(arguments->operands + 1, arguments->operand_count - 1,
                                              &checks, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    status = nw_cli_write(arguments, write_checks, &checks, diagnostics);
    if (status == NW_OK) {
        status = worst(&checks);
    }
    nw_material_checks_clear(&checks);
    return status;
}

/* ---- the verb ---- */

static const question questions[] = {
    {"list", 0, 0, "no names", run_list},
    {"show", 1, 1, "one library name or file", run_show},
    {"check", 1, NW_MOST_OPERANDS - 1, "files or library names", run_check},
};

static nw_status run(const nw_arguments *arguments, nw_diagnostics *diagnostics)
{
    const char *word = arguments->operands[0];
    size_t names = arguments->operand_count - 1;
    for (size_t i = 0; i < sizeof questions / sizeof questions[0]; i++) {
        const question *q = &questions[i];
        if (strcmp(word, q->word) != 0) {
            continue;
        }
        if (names < q->names_least || names > q->names_most) {
            return nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                            "material %s: found %zu names, expected %s", word, names, q->names);
        }
        return q->run(arguments, diagnostics);
    }
    return nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                    "material: found '%.60s', expected list, show or check", word);
}

const nw_verb nw_verb_material = {
    .name = "material",
    .operands = "list|show|check",
    .operand_least = 1,
    .operand_most = NW_MOST_OPERANDS,
    .summary = "the material library",
    .about = "material list           what is in the library, by group and strength if asked\n"
             "material show NAME      parameters, source, what follows from them, cautions\n"
             "material check FILE ... every fault and caution of material files; 3 when one is "
             "refused",
    .options = options,
    .example = "notchwright material show sae-1045-normalised --cycles 2e6",
    .run = run,
};
