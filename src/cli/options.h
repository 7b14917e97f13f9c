/* Options that the verbs share. */
#ifndef NW_CLI_OPTIONS_H
#define NW_CLI_OPTIONS_H

#include "cli/verb.h"

typedef enum nw_format { NW_FORMAT_TEXT, NW_FORMAT_JSON, NW_FORMAT_CSV } nw_format;

enum { NW_MOST_SETTINGS = 200, NW_MOST_OPERANDS = 4 };

typedef struct nw_options {
    nw_format format;
    const char *output; /* "-" is standard output */
    const char *settings[NW_MOST_SETTINGS];
    size_t setting_count;
    bool quiet, help, require_target;
    const char *operands[NW_MOST_OPERANDS];
    size_t operand_count;
} nw_options;

/* Reads the arguments of a verb. Returns 0, or 2 after saying what is wrong. */
int nw_options_read(const nw_verb *verb, int count, char **arguments, nw_options *options);

#endif
