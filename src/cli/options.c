#include "cli/options.h"

#include "base/text.h"

#include <string.h>

static const char *const format_words[] = {"text", "json", "csv", NULL};
static const char *const option_words[] = {"--format", "--output",         "--set", "--quiet",
                                           "--help",   "--require-target", NULL};

/* The value of "--name value" or "--name=value"; NULL when it is missing. */
static const char *value_of(int count, char **arguments, int *at, const char *name)
{
    size_t length = strlen(name);
    if (arguments[*at][length] == '=') {
        return arguments[*at] + length + 1;
    }
    return *at + 1 < count ? arguments[++*at] : NULL;
}

static bool is_option(const char *argument, const char *name)
{
    size_t length = strlen(name);
    return strncmp(argument, name, length) == 0 &&
           (argument[length] == '\0' || argument[length] == '=');
}

static int read_format(const nw_verb *verb, const char *value, nw_options *options)
{
    for (int i = 0; format_words[i] != NULL; i++) {
        if (strcmp(format_words[i], value) == 0) {
            options->format = (nw_format)i;
            return 0;
        }
    }
    return nw_cli_usage(verb, "--format: found '%s', expected text, json or csv", value);
}

static int read_valued(const nw_verb *verb, const char *name, const char *value,
                       nw_options *options)
{
    if (value == NULL) {
        return nw_cli_usage(verb, "%s: missing its value", name);
    }
    if (strcmp(name, "--format") == 0) {
        return read_format(verb, value, options);
    }
    if (strcmp(name, "--output") == 0) {
        options->output = value;
        return 0;
    }
    if (options->setting_count == NW_MOST_SETTINGS) {
        return nw_cli_usage(verb, "--set: found more than %d, expected at most that",
                            NW_MOST_SETTINGS);
    }
    options->settings[options->setting_count++] = value;
    return 0;
}

static int unknown_option(const nw_verb *verb, const char *argument)
{
    char word[64];
    nw_text_copy(word, sizeof word, argument);
    word[strcspn(word, "=")] = '\0';
    const char *nearest = nw_text_nearest(word, option_words);
    return nw_cli_usage(verb, "unknown option %s%s%s%s", argument,
                        nearest == NULL ? "" : "; did you mean ", nearest == NULL ? "" : nearest,
                        nearest == NULL ? "" : "?");
}

static int read_option(const nw_verb *verb, int count, char **arguments, int *at,
                       nw_options *options)
{
    const char *argument = arguments[*at];
    static const char *const valued[] = {"--format", "--output", "--set"};
    for (size_t i = 0; i < sizeof valued / sizeof valued[0]; i++) {
        if (is_option(argument, valued[i])) {
            return read_valued(verb, valued[i], value_of(count, arguments, at, valued[i]), options);
        }
    }
    if (strcmp(argument, "--quiet") == 0) {
        options->quiet = true;
    } else if (strcmp(argument, "--help") == 0 || strcmp(argument, "-h") == 0) {
        options->help = true;
    } else if (strcmp(argument, "--require-target") == 0) {
        options->require_target = true;
    } else {
        return unknown_option(verb, argument);
    }
    return 0;
}

int nw_options_read(const nw_verb *verb, int count, char **arguments, nw_options *options)
{
    *options = (nw_options){.format = NW_FORMAT_TEXT, .output = "-"};
    bool only_operands = false;
    for (int at = 0; at < count; at++) {
        const char *argument = arguments[at];
        if (!only_operands && strcmp(argument, "--") == 0) {
            only_operands = true;
        } else if (!only_operands && argument[0] == '-' && argument[1] != '\0') {
            int status = read_option(verb, count, arguments, &at, options);
            if (status != 0) {
                return status;
            }
        } else if (options->operand_count == NW_MOST_OPERANDS) {
            return nw_cli_usage(verb, "too many arguments");
        } else {
            options->operands[options->operand_count++] = argument;
        }
    }
    return 0;
}
