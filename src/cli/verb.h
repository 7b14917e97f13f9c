/* A verb of the program: one file, one record. Help is made from the record. */
#ifndef NW_CLI_VERB_H
#define NW_CLI_VERB_H

#include "notchwright/notchwright.h"

/* An option of a verb: "--set" with its value "PATH=VALUE", or a switch (argument NULL). */
typedef struct nw_option {
    const char *name;
    const char *argument;
    const char *help;
} nw_option;

typedef struct nw_arguments nw_arguments;

typedef struct nw_verb {
    const char *name;
    const char *operands; /* "CASE.yaml", as shown in help */
    size_t operand_least, operand_most;
    const char *summary;      /* one line, lower case */
    const char *about;        /* what it does, a paragraph or two */
    const nw_option *options; /* its own, ended by name == NULL; the common ones are added */
    const char *example;      /* a runnable command line */
    /* Does the work; faults go to `diagnostics`. */
    nw_status (*run)(const nw_arguments *arguments, nw_diagnostics *diagnostics);
} nw_verb;

extern const nw_verb nw_verb_assess;
extern const nw_verb nw_verb_estimate;
extern const nw_verb nw_verb_fit;
extern const nw_verb nw_verb_material;
extern const nw_verb nw_verb_notch;

/* ---- arguments as given ---- */

enum { NW_MOST_GIVEN = 256, NW_MOST_OPERANDS = 1024 };

struct nw_arguments {
    const nw_verb *verb;
    struct {
        const char *name, *value;
    } given[NW_MOST_GIVEN];
    size_t given_count;
    const char *operands[NW_MOST_OPERANDS];
    size_t operand_count;
};

typedef enum nw_format { NW_FORMAT_TEXT, NW_FORMAT_JSON, NW_FORMAT_CSV } nw_format;

/* Reads arguments against the verb's options; NW_USAGE with the fault. */
nw_status nw_arguments_read(const nw_verb *verb, int count, char **words, nw_arguments *arguments,
                            nw_diagnostics *diagnostics);

/* Last value of an option, or NULL; for a switch "" when it is given. */
const char *nw_argument(const nw_arguments *arguments, const char *name);

/* All values of an option in order; returns how many went into values[capacity]. */
size_t nw_argument_all(const nw_arguments *arguments, const char *name, const char **values,
                       size_t capacity);

/* A quantity given as an option, "820 MPa"; NAN when it is not given. */
nw_status nw_argument_quantity(const nw_arguments *arguments, const char *name,
                               nw_dimension dimension, double *value, nw_diagnostics *diagnostics);

/* --format, checked while reading. */
nw_format nw_argument_format(const nw_arguments *arguments);

/* Prints the help of a verb. */
void nw_verb_help(const nw_verb *verb);

/* ---- output ---- */

/* Writes a result: `write` is called with the stream of --output (whole or not at all) or standard output;
 * nothing is written with --quiet and no --output. `colour` tells whether a terminal wants colour. */
typedef nw_status (*nw_writer)(FILE *to, nw_format format, bool colour, const void *data);
nw_status nw_cli_write(const nw_arguments *arguments, nw_writer write, const void *data,
                       nw_diagnostics *diagnostics);

/* A line on standard error that says how far reading is: only on a terminal, only after a second of work. */
typedef struct nw_cli_progress {
    double started;
    bool shown;
} nw_cli_progress;
nw_cli_progress nw_cli_progress_start(void);
void nw_cli_progress_tell(void *progress, const char *history, uint64_t samples);
void nw_cli_progress_end(nw_cli_progress *progress);

/* NW_USAGE when an option ("--output", "--save") names the same file as one of the others (NULL entries are passed over): it would be lost. */
nw_status nw_cli_refuse_overwriting(const nw_arguments *arguments, const char *option,
                                    const char *const *inputs, size_t count,
                                    nw_diagnostics *diagnostics);

/* Ends what was printed to standard output: exit status 0, or 5 and a message when it could not be written. */
int nw_cli_end_of_output(void);

/* Runs a verb on its words: help, faults on standard error; returns the exit status. */
int nw_cli_run(const nw_verb *verb, int count, char **words);

#endif
