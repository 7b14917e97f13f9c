/* notchwright estimate: strain-life parameters without tests. */
#include "base/file.h"
#include "base/text.h"
#include "cli/verb.h"
#include "material/customary.h"

#include <math.h>
#include <string.h>

static const nw_option options[] = {
    {"--ultimate", "STRESS", "tensile strength Su: \"820 MPa\""},
    {"--modulus", "STRESS", "Young's modulus: \"206 GPa\""},
    {"--group", "GROUP", "steel, cast_steel, aluminium, titanium, nickel, cast_iron or other"},
    {"--hardness", "HARDNESS", "Brinell hardness: \"245 HB\""},
    {"--reduction-of-area", "FRACTION", "reduction of area: \"55 %\""},
    {"--fracture-strain", "STRAIN", "true fracture strain, instead of reduction of area"},
    {"--fracture-stress", "STRESS", "true fracture stress; else Su (1 + fracture strain)"},
    {"--yield", "STRESS", "yield strength; checked and saved, no method uses it"},
    {"--at", "STRAIN,...", "strain amplitudes for the lives: \"0.2 %,0.5 %\""},
    {"--method", "NAME", "the method to show first and save, instead of the recommended one"},
    {"--save", "FILE.yaml", "write a material file, marked as estimated"},
    {"--name", "NAME", "name of the saved material (default: from the file's name)"},
    {NULL, NULL, NULL},
};

/* ---- what was given ---- */

static nw_group group_of_word(const char *word)
{
    for (int group = 0; group < NW_GROUP_UNSTATED; group++) {
        if (strcmp(nw_group_name((nw_group)group), word) == 0) {
            return (nw_group)group;
        }
    }
    return NW_GROUP_UNSTATED;
}

static nw_status read_group(const nw_arguments *arguments, nw_estimate_input *input,
                            nw_diagnostics *diagnostics)
{
    const char *word = nw_argument(arguments, "--group");
    input->group = word == NULL ? NW_STEEL : group_of_word(word);
    if (input->group != NW_GROUP_UNSTATED) {
        return NW_OK;
    }
    const char *words[NW_GROUP_UNSTATED + 1] = {NULL};
    for (int group = 0; group < NW_GROUP_UNSTATED; group++) {
        words[group] = nw_group_name((nw_group)group);
    }
    char list[200];
    return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "--group: found '%.60s', expected %s", word,
                    nw_text_join(list, sizeof list, words));
}

/* Every option is read, so that all faults come in one run. */
static nw_status read_input(const nw_arguments *arguments, nw_estimate_input *input,
                            nw_diagnostics *diagnostics)
{
    *input = nw_estimate_input_unknown(NW_STEEL);
    const struct {
        const char *option;
        nw_dimension dimension;
        double *value;
    } rows[] = {
        {"--ultimate", NW_STRESS, &input->ultimate_strength_mpa},
        {"--modulus", NW_STRESS, &input->youngs_modulus_mpa},
        {"--hardness", NW_HARDNESS, &input->hardness_hb},
        {"--reduction-of-area", NW_FRACTION, &input->reduction_of_area},
        {"--fracture-strain", NW_STRAIN, &input->fracture_strain},
        {"--fracture-stress", NW_STRESS, &input->fracture_stress_mpa},
        {"--yield", NW_STRESS, &input->yield_strength_mpa},
    };
    nw_status status = read_group(arguments, input, diagnostics);
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        if (nw_argument_quantity(arguments, rows[i].option, rows[i].dimension, rows[i].value,
                                 diagnostics) != NW_OK) {
            status = NW_USAGE;
        }
    }
    if (nw_argument(arguments, "--modulus") == NULL) {
        status = nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                          "--modulus is missing, expected Young's modulus (\"206 GPa\")");
    }
    if (nw_argument(arguments, "--group") == NULL && input->youngs_modulus_mpa > 0.0 &&
        !nw_is_customary(nw_customary_modulus_mpa(NW_STEEL), input->youngs_modulus_mpa)) {
        status = nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                          "--group is missing; steel would be assumed, but a modulus of %g GPa is "
                          "not that of a steel",
                          input->youngs_modulus_mpa / 1e3);
    }
    if (nw_argument(arguments, "--ultimate") == NULL &&
        nw_argument(arguments, "--hardness") == NULL) {
        status = nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                          "--ultimate is missing, expected the tensile strength (or --hardness for "
                          "a steel)");
    }
    return status;
}

static nw_status read_amplitudes(const nw_arguments *arguments, double *values, size_t *count,
                                 nw_diagnostics *diagnostics)
{
    const char *text = nw_argument(arguments, "--at");
    *count = 0;
    while (text != NULL) {
        size_t length = strcspn(text, ",");
        char item[60], why[300];
        snprintf(item, sizeof item, "%.*s", length < 59 ? (int)length : 59, text);
        if (*count == NW_AMPLITUDES_MOST) {
            return nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                            "--at: found more than %d strain amplitudes", NW_AMPLITUDES_MOST);
        }
        if (nw_quantity_read(item, NW_STRAIN, NULL, &values[*count], why, sizeof why) != NW_OK) {
            return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "--at: %s", why);
        }
        ++*count;
        text = text[length] == '\0' ? NULL : text + length + 1;
    }
    return NW_OK;
}

static nw_status read_method(const nw_arguments *arguments, const nw_estimate **method,
                             nw_diagnostics *diagnostics)
{
    const char *word = nw_argument(arguments, "--method");
    *method = word == NULL ? NULL : nw_estimate_find(word);
    if (word == NULL || *method != NULL) {
        return NW_OK;
    }
    const char *keys[NW_ESTIMATES_MOST + 1] = {NULL};
    const nw_estimate *record;
    for (size_t i = 0; i < NW_ESTIMATES_MOST && (record = nw_estimate_at(i)) != NULL; i++) {
        keys[i] = record->key;
    }
    char list[300];
    return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "--method: found '%.60s', expected %s", word,
                    nw_text_join(list, sizeof list, keys));
}

/* ---- the material file ---- */

/* "folder/c45-guess.yaml" gives "c45-guess". */
static void name_of_file(const char *path, char *name, size_t capacity)
{
    const char *slash = strrchr(path, '/');
    nw_text_copy(name, capacity, slash == NULL ? path : slash + 1);
    char *dot = strrchr(name, '.');
    if (dot != NULL && dot != name) {
        *dot = '\0';
    }
}

static nw_status save(const nw_arguments *arguments, const nw_estimate_comparison *result,
                      const nw_estimate *method, nw_diagnostics *diagnostics)
{
    const char *path = nw_argument(arguments, "--save"), *given = nw_argument(arguments, "--name");
    char name[96];
    name_of_file(path, name, sizeof name);
    if (given != NULL && (given[0] == '\0' || strlen(given) >= sizeof name)) {
        return nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                        "--name: found %zu bytes, expected 1 to %zu", strlen(given),
                        sizeof name - 1);
    }
    nw_material material;
    nw_whole_file file;
    nw_status status = nw_cli_refuse_overwriting(arguments, "--output", &path, 1, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    status = nw_estimate_material(method, &result->input, given == NULL ? name : given, &material,
                                  diagnostics);
    if (status == NW_OK) {
        status = nw_whole_file_open(&file, path, diagnostics);
    }
    if (status != NW_OK) {
        return status;
    }
    nw_material_write(file.stream, &material); /* the stream's error is seen by the commit */
    return nw_whole_file_commit(&file, diagnostics);
}

/* ---- the verb ---- */

typedef struct written {
    const nw_estimate_comparison *result;
    const nw_estimate *chosen;
} written;

static nw_status write_result(FILE *to, nw_format format, bool colour, const void *data)
{
    const written *w = data;
    switch (format) {
    case NW_FORMAT_JSON:
        return nw_write_estimate_json(to, w->result, w->chosen);
    case NW_FORMAT_CSV:
        return nw_write_estimate_csv(to, w->result);
    default:
        return nw_write_estimate_text(to, w->result, w->chosen, colour);
    }
}

static nw_status check_choice(const nw_arguments *arguments, const nw_estimate_comparison *result,
                              const nw_estimate *method, nw_diagnostics *diagnostics)
{
    const nw_estimate_row *row = method == NULL ? NULL : nw_estimate_row_of(result, method);
    if (row != NULL && !row->applies) {
        return nw_fault(diagnostics, NW_INPUT, NULL, NULL, "--method: %s does not apply: %s",
                        method->key, row->reason);
    }
    if (nw_argument(arguments, "--save") != NULL && method == NULL && result->recommended == NULL) {
        return nw_fault(diagnostics, NW_INPUT, NULL, NULL, "--save: no method applies");
    }
    return NW_OK;
}

static void caution_assumed_group(const nw_arguments *arguments, nw_estimate_comparison *result)
{
    if (nw_argument(arguments, "--group") == NULL) {
        nw_caution_add(&result->cautions, "group_assumed", "inputs",
                       "The alloy group was not given: steel is assumed (--group).");
    }
}

static nw_status run(const nw_arguments *arguments, nw_diagnostics *diagnostics)
{
    nw_estimate_input input;
    double amplitudes[NW_AMPLITUDES_MOST];
    size_t count = 0;
    const nw_estimate *method = NULL;
    nw_status faults[] = {
        read_input(arguments, &input, diagnostics),
        read_amplitudes(arguments, amplitudes, &count, diagnostics),
        read_method(arguments, &method, diagnostics),
    };
    for (size_t i = 0; i < sizeof faults / sizeof faults[0]; i++) {
        if (faults[i] != NW_OK) {
            return faults[i];
        }
    }
    nw_estimate_comparison result;
    nw_status status = nw_estimate_compare(&input, amplitudes, count, &result, diagnostics);
    if (status == NW_OK) {
        caution_assumed_group(arguments, &result);
        status = check_choice(arguments, &result, method, diagnostics);
    }
    if (status == NW_OK && nw_argument(arguments, "--save") != NULL) {
        status =
            save(arguments, &result, method == NULL ? result.recommended : method, diagnostics);
    }
    written w = {&result, method};
    return status == NW_OK ? nw_cli_write(arguments, write_result, &w, diagnostics) : status;
}

const nw_verb nw_verb_estimate = {
    .name = "estimate",
    .operands = "",
    .operand_least = 0,
    .operand_most = 0,
    .summary = "strain-life parameters without tests",
    .about =
        "Strain-life parameters from strength, hardness and ductility by every published method\n"
        "that these allow, side by side: the one to prefer and why, what keeps the others out,\n"
        "and the lives that each one means. --save writes a material file.",
    .options = options,
    .example = "notchwright estimate --ultimate \"820 MPa\" --modulus \"206 GPa\" --group steel "
               "--reduction-of-area \"55 %\"",
    .run = run,
};
