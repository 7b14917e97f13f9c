/* The program: finds the verb. */
#include "base/text.h"
#include "cli/verb.h"

#include <gsl/gsl_errno.h>
#include <signal.h>
#include <string.h>

static const nw_verb *const verbs[] = {
    &nw_verb_assess, &nw_verb_estimate, &nw_verb_fit, &nw_verb_material, &nw_verb_notch,
};
enum { VERBS = sizeof verbs / sizeof verbs[0] };

static int print_help(void)
{
    puts("notchwright: strain-life analysis of notched metal parts\n\nUsage:");
    for (size_t i = 0; i < VERBS; i++) {
        printf("  notchwright %-9s %-15s %s\n", verbs[i]->name, verbs[i]->operands,
               verbs[i]->summary);
    }
    puts("\n  notchwright VERB --help   options and an example\n"
         "  notchwright --version\n\n"
         "Life estimates can hurt people when they are wrong. This program supports the judgement "
         "of\n"
         "a qualified engineer; it does not replace applicable codes, tests of the part or "
         "licensed\n"
         "practice.");
    return nw_cli_end_of_output();
}

static int wrong_usage(const char *word)
{
    const char *names[VERBS + 1];
    for (size_t i = 0; i < VERBS; i++) {
        names[i] = verbs[i]->name;
    }
    names[VERBS] = NULL;
    const char *nearest = word == NULL ? NULL : nw_text_nearest(word, names);
    if (word == NULL) {
        fputs("error: found no verb, expected one\n", stderr);
    } else {
        fprintf(stderr, "error: unknown verb '%.60s'%s%s%s\n", word,
                nearest == NULL ? "" : "; did you mean '", nearest == NULL ? "" : nearest,
                nearest == NULL ? "" : "'?");
    }
    fputs("try: notchwright --help\n", stderr);
    return nw_status_exit(NW_USAGE);
}

int main(int count, char **words)
{
    /* A reader that goes away and a size limit are file errors like any other, not a sudden death. */
    signal(SIGPIPE, SIG_IGN);
    signal(SIGXFSZ, SIG_IGN);
    gsl_set_error_handler_off();
    const char *word = count < 2 ? NULL : words[1];
    if (word == NULL) {
        return wrong_usage(NULL);
    }
    if (strcmp(word, "--version") == 0) {
        printf("notchwright %s\n", nw_version());
        return nw_cli_end_of_output();
    }
    if (strcmp(word, "--help") == 0 || strcmp(word, "-h") == 0) {
        return print_help();
    }
    for (size_t i = 0; i < VERBS; i++) {
        if (strcmp(word, verbs[i]->name) == 0) {
            return nw_cli_run(verbs[i], count - 2, words + 2);
        }
    }
    return wrong_usage(word);
}
