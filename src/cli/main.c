/* The program: finds the verb. */
#include "base/text.h"
#include "cli/verb.h"

#include <gsl/gsl_errno.h>
#include <signal.h>
#include <stdio.h>
#include <string.h>

static const nw_verb *const verbs[] = {
    &nw_verb_assess,
};
enum { VERBS = sizeof verbs / sizeof verbs[0] };

static void print_help(void)
{
    puts("notchwright: strain-life analysis of notched metal parts\n\nUsage:");
    for (size_t i = 0; i < VERBS; i++) {
        printf("  notchwright %-10s %-12s %s\n", verbs[i]->name, verbs[i]->arguments,
               verbs[i]->summary);
    }
    puts("\n  notchwright VERB --help   options and an example\n"
         "  notchwright --version\n\n"
         "Life estimates can hurt people when they are wrong. This program supports the judgement "
         "of a\n"
         "qualified engineer; it does not replace applicable codes, tests of the part or licensed\n"
         "practice.");
}

static int unknown_verb(const char *word)
{
    const char *names[VERBS + 1];
    for (size_t i = 0; i < VERBS; i++) {
        names[i] = verbs[i]->name;
    }
    names[VERBS] = NULL;
    const char *nearest = nw_text_nearest(word, names);
    return nw_cli_usage(NULL, "unknown verb '%s'%s%s%s", word,
                        nearest == NULL ? "" : "; did you mean '", nearest == NULL ? "" : nearest,
                        nearest == NULL ? "" : "'?");
}

int main(int count, char **arguments)
{
    /* A reader that goes away is a file error like any other, not a sudden death. */
    signal(SIGPIPE, SIG_IGN);
    gsl_set_error_handler_off();
    if (count < 2) {
        return nw_cli_usage(NULL, "found no verb, expected one");
    }
    if (strcmp(arguments[1], "--version") == 0) {
        printf("notchwright %s\n", nw_version());
        return 0;
    }
    if (strcmp(arguments[1], "--help") == 0 || strcmp(arguments[1], "-h") == 0) {
        print_help();
        return 0;
    }
    for (size_t i = 0; i < VERBS; i++) {
        if (strcmp(arguments[1], verbs[i]->name) == 0) {
            return verbs[i]->run(count - 2, arguments + 2);
        }
    }
    return unknown_verb(arguments[1]);
}
