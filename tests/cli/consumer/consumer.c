/* A program of somebody who installed the library: assesses a case and prints life and JSON. */
#include <notchwright/notchwright.h>

#include <stdio.h>

int main(int count, char **arguments)
{
    nw_diagnostics diagnostics;
    nw_diagnostics_clear(&diagnostics);
    nw_case input;
    nw_assessment *result = NULL;
    nw_assess_options options = {.all_loops = true};
    nw_status status = nw_case_read(count > 1 ? arguments[1] : "", NULL, 0, &input, &diagnostics);
    if (status == NW_OK) {
        status = nw_assess(&input, &options, &result, &diagnostics);
    }
    if (status == NW_OK) {
        status = nw_write_assessment_json(stdout, &input, result);
    }
    for (size_t i = 0; i < diagnostics.count; i++) {
        char text[1200];
        fprintf(stderr, "%s\n", nw_diagnostic_text(&diagnostics.items[i], text, sizeof text));
    }
    nw_assessment_free(result);
    nw_case_clear(&input);
    return nw_status_exit(status);
}
