/* notchwright notch: the factors of one notch from its drawing. */
#include "base/text.h"
#include "cli/verb.h"

#include <math.h>
#include <string.h>

static const nw_option options[] = {
    {"--load", "LOAD", "tension, bending or torsion; --list names those of a shape"},
    {"--D", "LENGTH", "larger diameter (or width)"},
    {"--W", "LENGTH", "width of a flat bar"},
    {"--d", "LENGTH", "smaller diameter or width; diameter of a hole; bore of a tube"},
    {"--r", "LENGTH", "radius of the notch, fillet or hole"},
    {"--t", "LENGTH", "depth of the notch"},
    {"--h", "LENGTH", "thickness of a flat bar"},
    {"--a", "LENGTH", "semi-axis of an ellipse across the stress"},
    {"--b", "LENGTH", "semi-axis of an ellipse along the stress"},
    {"--c", "LENGTH", "centre of a hole to the near edge"},
    {"--e", "LENGTH", "centre of a hole to the far edge"},
    {"--stress-ratio", "NUMBER", "second remote stress over the first"},
    {"--force", "FORCE", "show the nominal stress of it: \"12 kN\""},
    {"--moment", "MOMENT", "show the nominal stress of it: \"150 Nm\""},
    {"--stress", "STRESS", "remote stress, for shapes in a wide plate"},
    {"--ultimate", "STRESS", "tensile strength, for Kf"},
    {"--yield", "STRESS", "yield strength, for Kf by the stress gradient"},
    {"--group", "GROUP", "steel, cast_steel, aluminium, titanium, nickel, cast_iron or other"},
    {"--surface-hardened", NULL, "for Kf by the stress gradient"},
    {"--sensitivity", "METHOD", "peterson, neuber, gradient or guideline: Kf by it"},
    {"--roughness", "LENGTH", "roughness Rz: show the surface factor"},
    {"--formula", "NAME", "the formula for Kt, instead of the preferred one"},
    {"--extrapolate", NULL, "go beyond the range of a formula, with a caution"},
    {"--list", NULL, "the shapes, or all about one"},
    {NULL, NULL, NULL},
};

/* ---- words ---- */

static nw_status unknown_word(const char *what, const char *word, const char *const *words,
                              nw_diagnostics *diagnostics)
{
    char list[500];
    const char *nearest = word == NULL ? NULL : nw_text_nearest(word, words);
    if (word == NULL) {
        return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s is missing, expected %s", what,
                        nw_text_join(list, sizeof list, words));
    }
    return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s: found '%.60s', expected %s%s%s%s", what,
                    word, nw_text_join(list, sizeof list, words),
                    nearest == NULL ? "" : "; did you mean ", nearest == NULL ? "" : nearest,
                    nearest == NULL ? "" : "?");
}

static nw_status read_shape(const nw_arguments *arguments, const nw_shape **shape,
                            nw_diagnostics *diagnostics)
{
    enum { MOST = 32 };
    const char *keys[MOST + 1] = {NULL};
    const nw_shape *record;
    for (size_t i = 0; i < MOST && (record = nw_shape_at(i)) != NULL; i++) {
        keys[i] = record->key;
    }
    *shape = nw_shape_find(arguments->operands[0]);
    return *shape != NULL ? NW_OK
                          : unknown_word("SHAPE", arguments->operands[0], keys, diagnostics);
}

static nw_status read_load(const nw_arguments *arguments, nw_notch_question *question,
                           nw_diagnostics *diagnostics)
{
    const char *word = nw_argument(arguments, "--load");
    const char *keys[NW_SHAPE_LOADS_MOST + 1] = {NULL};
    for (size_t i = 0; i < NW_SHAPE_LOADS_MOST && question->shape->loads[i] != NULL; i++) {
        keys[i] = question->shape->loads[i]->key;
    }
    question->load = word == NULL ? NULL : nw_shape_load_find(question->shape, word);
    if (question->load != NULL) {
        return NW_OK;
    }
    char what[80];
    snprintf(what, sizeof what, "--load of %s", question->shape->key);
    return unknown_word(what, word, keys, diagnostics);
}

static nw_status read_group(const nw_arguments *arguments, nw_notch_question *question,
                            nw_diagnostics *diagnostics)
{
    const char *word = nw_argument(arguments, "--group");
    const char *words[NW_GROUP_UNSTATED + 1] = {NULL};
    for (int group = 0; group < NW_GROUP_UNSTATED; group++) {
        words[group] = nw_group_name((nw_group)group);
        if (word != NULL && strcmp(words[group], word) == 0) {
            question->group = (nw_group)group;
            return NW_OK;
        }
    }
    return word == NULL ? NW_OK : unknown_word("--group", word, words, diagnostics);
}

static nw_status read_sensitivity(const nw_arguments *arguments, nw_notch_question *question,
                                  nw_diagnostics *diagnostics)
{
    const char *word = nw_argument(arguments, "--sensitivity");
    const char *keys[NW_SENSITIVITIES_MOST + 1] = {NULL};
    const nw_sensitivity *record;
    for (size_t i = 0; i < NW_SENSITIVITIES_MOST && (record = nw_sensitivity_at(i)) != NULL; i++) {
        keys[i] = record->key;
    }
    question->sensitivity = word == NULL ? NULL : nw_sensitivity_find(word);
    return word == NULL || question->sensitivity != NULL
               ? NW_OK
               : unknown_word("--sensitivity", word, keys, diagnostics);
}

/* ---- quantities ---- */

/* The size that an option names, "--D" the size "D"; NULL when it names none. */
static const char *size_key(const nw_option *option)
{
    static const struct {
        const char *option, *key;
    } rows[] = {{"--D", "D"},
                {"--W", "W"},
                {"--d", "d"},
                {"--r", "r"},
                {"--t", "t"},
                {"--h", "h"},
                {"--a", "a"},
                {"--b", "b"},
                {"--c", "c"},
                {"--e", "e"},
                {"--stress-ratio", "stress_ratio"}};
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        if (strcmp(option->name, rows[i].option) == 0) {
            return rows[i].key;
        }
    }
    return NULL;
}

static nw_status no_such_size(const nw_option *option, const nw_shape *shape,
                              nw_diagnostics *diagnostics)
{
    return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s is no size of %s, which needs %s",
                    option->name, shape->key, shape->needs);
}

static nw_status read_size(const nw_arguments *arguments, const nw_option *option,
                           nw_notch_question *question, nw_diagnostics *diagnostics)
{
    const char *key = size_key(option);
    if (key == NULL || nw_argument(arguments, option->name) == NULL) {
        return NW_OK;
    }
    const nw_shape_size *row = nw_shape_size_find(question->shape, key);
    if (row == NULL) {
        return no_such_size(option, question->shape, diagnostics);
    }
    double *value = &question->sizes.value[row->size];
    if (!isnan(*value)) {
        return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s: %s and %s are the same size",
                        option->name, row->key, row->other);
    }
    return nw_argument_quantity(arguments, option->name, row->dimension, value, diagnostics);
}

static nw_status read_sizes(const nw_arguments *arguments, nw_notch_question *question,
                            nw_diagnostics *diagnostics)
{
    nw_status status = NW_OK;
    for (const nw_option *option = options; option->name != NULL; option++) {
        nw_status found = read_size(arguments, option, question, diagnostics);
        status = found == NW_OK ? status : found;
    }
    return status;
}

/* Force, moment or remote stress, whichever the load has. */
static nw_status read_action(const nw_arguments *arguments, nw_notch_question *question,
                             nw_diagnostics *diagnostics)
{
    static const struct {
        const char *option;
        nw_dimension dimension;
    } rows[] = {{"--force", NW_FORCE}, {"--moment", NW_MOMENT}, {"--stress", NW_STRESS}};
    nw_status status = NW_OK;
    for (int i = 0; i < 3; i++) {
        double value;
        nw_status found =
            nw_argument_quantity(arguments, rows[i].option, rows[i].dimension, &value, diagnostics);
        if (found == NW_OK && !isnan(value) && question->load != NULL &&
            question->load->action != (nw_action)i) {
            found =
                nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s: %s of %s takes a %s (--%s): %s",
                         rows[i].option, question->load->key, question->shape->key,
                         nw_action_name(question->load->action),
                         nw_action_name(question->load->action), question->load->nominal);
        }
        question->action = isnan(value) ? question->action : value;
        status = found == NW_OK ? status : found;
    }
    return status;
}

static nw_status read_material(const nw_arguments *arguments, nw_notch_question *question,
                               nw_diagnostics *diagnostics)
{
    double roughness_mm;
    nw_status faults[] = {
        nw_argument_quantity(arguments, "--ultimate", NW_STRESS, &question->ultimate_strength_mpa,
                             diagnostics),
        nw_argument_quantity(arguments, "--yield", NW_STRESS, &question->yield_strength_mpa,
                             diagnostics),
        nw_argument_quantity(arguments, "--roughness", NW_LENGTH, &roughness_mm, diagnostics),
        read_group(arguments, question, diagnostics),
        read_sensitivity(arguments, question, diagnostics),
    };
    question->roughness_um = 1e3 * roughness_mm;
    question->surface_hardened = nw_argument(arguments, "--surface-hardened") != NULL;
    for (size_t i = 0; i < sizeof faults / sizeof faults[0]; i++) {
        if (faults[i] != NW_OK) {
            return faults[i];
        }
    }
    return NW_OK;
}

/* ---- the verb ---- */

static nw_status write_shapes(FILE *to, nw_format format, bool colour, const void *data)
{
    (void)colour;
    switch (format) {
    case NW_FORMAT_JSON:
        return nw_write_shapes_json(to, data);
    case NW_FORMAT_CSV:
        return nw_write_shapes_csv(to, data);
    default:
        return nw_write_shapes_text(to, data);
    }
}

static nw_status write_factors(FILE *to, nw_format format, bool colour, const void *data)
{
    switch (format) {
    case NW_FORMAT_JSON:
        return nw_write_notch_json(to, data);
    case NW_FORMAT_CSV:
        return nw_write_notch_csv(to, data);
    default:
        return nw_write_notch_text(to, data, colour);
    }
}

static nw_status read_question(const nw_arguments *arguments, const nw_shape *shape,
                               nw_notch_question *question, nw_diagnostics *diagnostics)
{
    *question = nw_notch_question_of(shape, NULL);
    nw_status faults[] = {
        read_load(arguments, question, diagnostics),
        read_sizes(arguments, question, diagnostics),
        read_action(arguments, question, diagnostics),
        read_material(arguments, question, diagnostics),
    };
    question->options.formula = nw_argument(arguments, "--formula");
    question->options.extrapolate = nw_argument(arguments, "--extrapolate") != NULL;
    for (size_t i = 0; i < sizeof faults / sizeof faults[0]; i++) {
        if (faults[i] != NW_OK) {
            return faults[i];
        }
    }
    return NW_OK;
}

static nw_status run(const nw_arguments *arguments, nw_diagnostics *diagnostics)
{
    const nw_shape *shape = NULL;
    if (arguments->operand_count == 0) {
        if (nw_argument(arguments, "--load") != NULL) {
            return nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                            "--load is given, but no shape; notchwright notch --list names them");
        }
        return nw_cli_write(arguments, write_shapes, NULL, diagnostics);
    }
    nw_status status = read_shape(arguments, &shape, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    if (nw_argument(arguments, "--list") != NULL) {
        return nw_cli_write(arguments, write_shapes, shape, diagnostics);
    }
    nw_notch_question question;
    nw_notch_factors factors;
    status = read_question(arguments, shape, &question, diagnostics);
    if (status == NW_OK) {
        status = nw_notch_factors_of(&question, &factors, diagnostics);
    }
    return status == NW_OK ? nw_cli_write(arguments, write_factors, &factors, diagnostics) : status;
}

const nw_verb nw_verb_notch = {
    .name = "notch",
    .operands = "[SHAPE]",
    .operand_least = 0,
    .operand_most = 1,
    .summary = "elastic Kt and fatigue Kf of a shape",
    .about =
        "Elastic stress concentration factor Kt of a shape from its drawing, how far the formula\n"
        "is from converged finite elements there, the nominal stress it refers to, and the\n"
        "fatigue notch factor Kf when the strength is given. Without a shape: the list of them.",
    .options = options,
    .example = "notchwright notch round_bar_fillet --load tension --D \"30 mm\" --d \"20 mm\" --r "
               "\"1.6 mm\" --ultimate \"820 MPa\"",
    .run = run,
};
