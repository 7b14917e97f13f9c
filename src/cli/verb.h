/* A verb of the program: one file, one record. */
#ifndef NW_CLI_VERB_H
#define NW_CLI_VERB_H

#include "notchwright/notchwright.h"

typedef struct nw_verb {
    const char *name;
    const char *arguments; /* "CASE.yaml" */
    const char *summary;   /* one line */
    const char *help;      /* options and a runnable example */
    /* Runs with the arguments after the verb; returns the exit status. */
    int (*run)(int count, char **arguments);
} nw_verb;

extern const nw_verb nw_verb_assess;

/* Prints diagnostics to standard error, one a line. Returns the exit status of the gravest. */
int nw_cli_report(const nw_diagnostics *diagnostics, nw_status status);

/* Wrong usage: says what, points to the help; returns 2. */
int nw_cli_usage(const nw_verb *verb, const char *format, ...) NW_PRINTF(2, 3);

#endif
