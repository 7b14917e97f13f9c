/* Diagnostics on standard error. */
#include "cli/verb.h"

#include <stdarg.h>
#include <stdio.h>

int nw_cli_report(const nw_diagnostics *diagnostics, nw_status status)
{
    for (size_t i = 0; i < diagnostics->count; i++) {
        char line[1200];
        fprintf(stderr, "%s\n", nw_diagnostic_text(&diagnostics->items[i], line, sizeof line));
    }
    if (diagnostics->omitted > 0) {
        fprintf(stderr, "error: and %zu more\n", diagnostics->omitted);
    }
    if (diagnostics->count == 0 && status != NW_OK) {
        fprintf(stderr, "error: %s\n", nw_status_text(status));
    }
    return nw_status_exit(status);
}

int nw_cli_usage(const nw_verb *verb, const char *format, ...)
{
    fprintf(stderr, "notchwright%s%s: error: ", verb == NULL ? "" : " ",
            verb == NULL ? "" : verb->name);
    va_list arguments;
    va_start(arguments, format);
    vfprintf(stderr, format, arguments);
    va_end(arguments);
    fprintf(stderr, "\ntry: notchwright%s%s --help\n", verb == NULL ? "" : " ",
            verb == NULL ? "" : verb->name);
    return nw_status_exit(NW_USAGE);
}
