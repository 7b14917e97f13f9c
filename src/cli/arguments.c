/* Words of a command line against the options of a verb. */
#include "base/text.h"
#include "cli/verb.h"

#include <math.h>
#include <string.h>

static const nw_option common[] = {
    {"--format", "text|json|csv", "text for reading (default), or all numbers as JSON or CSV"},
    {"--output", "FILE", "write there, whole or not at all, instead of to standard output"},
    {"--quiet", NULL, "no output but errors"},
    {"--help", NULL, "this text"},
    {NULL, NULL, NULL},
};

static const char *const format_words[] = {"text", "json", "csv", NULL};

static const nw_option *find_in(const nw_option *options, const char *word, size_t length)
{
    for (; options != NULL && options->name != NULL; options++) {
        if (strlen(options->name) == length && strncmp(options->name, word, length) == 0) {
            return options;
        }
    }
    return NULL;
}

static const nw_option *find_option(const nw_verb *verb, const char *word)
{
    size_t length = strcspn(word, "=");
    const nw_option *own = find_in(verb->options, word, length);
    return own != NULL ? own : find_in(common, word, length);
}

static nw_status unknown_option(const nw_verb *verb, const char *word, nw_diagnostics *diagnostics)
{
    const char *names[64];
    size_t count = 0;
    const nw_option *lists[] = {verb->options, common};
    for (int i = 0; i < 2; i++) {
        for (const nw_option *o = lists[i]; o != NULL && o->name != NULL && count < 63; o++) {
            names[count++] = o->name;
        }
    }
    names[count] = NULL;
    char plain[64];
    nw_text_copy(plain, sizeof plain, word);
    plain[strcspn(plain, "=")] = '\0';
    const char *nearest = nw_text_nearest(plain, names);
    return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "unknown option %.80s%s%s%s", word,
                    nearest == NULL ? "" : "; did you mean ", nearest == NULL ? "" : nearest,
                    nearest == NULL ? "" : "?");
}

static nw_status check_format(const char *value, nw_diagnostics *diagnostics)
{
    for (int i = 0; format_words[i] != NULL; i++) {
        if (strcmp(format_words[i], value) == 0) {
            return NW_OK;
        }
    }
    return nw_fault(diagnostics, NW_USAGE, NULL, NULL,
                    "--format: found '%.40s', expected text, json or csv", value);
}

/* Takes the option at *at with its value; moves *at over both. */
static nw_status take_option(nw_arguments *arguments, int count, char **words, int *at,
                             nw_diagnostics *diagnostics)
{
    const char *word = words[*at], *equals = strchr(word, '=');
    if (strcmp(word, "-h") == 0) {
        word = "--help";
    }
    const nw_option *option = find_option(arguments->verb, word);
    if (option == NULL) {
        return unknown_option(arguments->verb, word, diagnostics);
    }
    const char *value = "";
    if (option->argument == NULL && equals != NULL) {
        return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s takes no value", option->name);
    }
    if (option->argument != NULL) {
        value = equals != NULL ? equals + 1 : *at + 1 < count ? words[++*at] : NULL;
        if (value == NULL) {
            return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s: missing its value (%s)",
                            option->name, option->argument);
        }
    }
    if (arguments->given_count == NW_MOST_GIVEN) {
        return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "more than %d options", NW_MOST_GIVEN);
    }
    arguments->given[arguments->given_count].name = option->name;
    arguments->given[arguments->given_count++].value = value;
    return strcmp(option->name, "--format") == 0 ? check_format(value, diagnostics) : NW_OK;
}

static nw_status check_operands(const nw_arguments *arguments, nw_diagnostics *diagnostics)
{
    const nw_verb *verb = arguments->verb;
    size_t count = arguments->operand_count;
    if (nw_argument(arguments, "--help") != NULL ||
        (count >= verb->operand_least && count <= verb->operand_most)) {
        return NW_OK;
    }
    return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "found %zu argument%s, expected %s", count,
                    count == 1 ? "" : "s", verb->operand_most == 0 ? "none" : verb->operands);
}

/* A minus sign followed by a digit starts a number, not an option. */
static bool is_option(const char *word)
{
    return word[0] == '-' && word[1] != '\0' && strchr("0123456789.", word[1]) == NULL;
}

nw_status nw_arguments_read(const nw_verb *verb, int count, char **words, nw_arguments *arguments,
                            nw_diagnostics *diagnostics)
{
    *arguments = (nw_arguments){.verb = verb};
    bool only_operands = false;
    for (int at = 0; at < count; at++) {
        if (!only_operands && strcmp(words[at], "--") == 0) {
            only_operands = true;
        } else if (!only_operands && is_option(words[at])) {
            nw_status status = take_option(arguments, count, words, &at, diagnostics);
            if (status != NW_OK) {
                return status;
            }
        } else if (arguments->operand_count == NW_MOST_OPERANDS) {
            return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "too many arguments");
        } else {
            arguments->operands[arguments->operand_count++] = words[at];
        }
    }
    return check_operands(arguments, diagnostics);
}

size_t nw_argument_all(const nw_arguments *arguments, const char *name, const char **values,
                       size_t capacity)
{
    size_t count = 0;
    for (size_t i = 0; i < arguments->given_count && count < capacity; i++) {
        if (strcmp(arguments->given[i].name, name) == 0) {
            values[count++] = arguments->given[i].value;
        }
    }
    return count;
}

const char *nw_argument(const nw_arguments *arguments, const char *name)
{
    for (size_t i = arguments->given_count; i-- > 0;) {
        if (strcmp(arguments->given[i].name, name) == 0) {
            return arguments->given[i].value;
        }
    }
    return NULL;
}

nw_status nw_argument_quantity(const nw_arguments *arguments, const char *name,
                               nw_dimension dimension, double *value, nw_diagnostics *diagnostics)
{
    const char *text = nw_argument(arguments, name);
    *value = NAN;
    if (text == NULL) {
        return NW_OK;
    }
    char why[300];
    if (nw_quantity_read(text, dimension, NULL, value, why, sizeof why) == NW_OK) {
        return NW_OK;
    }
    return nw_fault(diagnostics, NW_USAGE, NULL, NULL, "%s: %s", name, why);
}

nw_format nw_argument_format(const nw_arguments *arguments)
{
    const char *word = nw_argument(arguments, "--format");
    for (int i = 0; word != NULL && format_words[i] != NULL; i++) {
        if (strcmp(format_words[i], word) == 0) {
            return (nw_format)i;
        }
    }
    return NW_FORMAT_TEXT;
}

static void print_options(const nw_option *options)
{
    for (; options != NULL && options->name != NULL; options++) {
        char left[64];
        snprintf(left, sizeof left, "%s%s%s", options->name, options->argument == NULL ? "" : " ",
                 options->argument == NULL ? "" : options->argument);
        printf("  %-26s %s\n", left, options->help);
    }
}

void nw_verb_help(const nw_verb *verb)
{
    printf("Usage: notchwright %s%s%s [OPTION ...]\n\n%s\n\nOptions:\n", verb->name,
           verb->operands[0] == '\0' ? "" : " ", verb->operands, verb->about);
    print_options(verb->options);
    print_options(common);
    printf("\nExit status: 0 done, 1 below the target (--require-target), 2 wrong usage, 3 input "
           "refused,\n4 could not be computed, 5 file or memory trouble.\n\nExample:\n  %s\n",
           verb->example);
}
