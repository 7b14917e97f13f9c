#include "output/csv.h"

#include <math.h>
#include <string.h>

void nw_csv_numbers(FILE *to, const double *values, size_t count)
{
    for (size_t i = 0; i < count; i++) {
        if (isfinite(values[i])) {
            fprintf(to, ",%.10g", values[i]);
        } else {
            fputc(',', to);
        }
    }
}

void nw_csv_text(FILE *to, const char *text)
{
    fputc(',', to);
    nw_csv_first_text(to, text);
}

void nw_csv_first_text(FILE *to, const char *text)
{
    if (strpbrk(text, ",\"\r\n") == NULL) {
        fputs(text, to);
        return;
    }
    fputc('"', to);
    for (; *text != '\0'; text++) {
        if (*text == '"') {
            fputc('"', to);
        }
        fputc(*text, to);
    }
    fputc('"', to);
}
