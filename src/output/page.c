#include "output/page.h"

#include <math.h>
#include <stdbool.h>
#include <stdlib.h>
#include <string.h>

/* Characters shown, not bytes: UTF-8 continuation bytes take no room. */
static size_t width_of(const char *text, size_t length)
{
    size_t width = 0;
    for (size_t i = 0; i < length; i++) {
        width += ((unsigned char)text[i] & 0xC0) != 0x80;
    }
    return width;
}

void nw_page_paragraph(FILE *to, const char *first, const char *text)
{
    size_t indent = width_of(first, strlen(first)), used = indent;
    fputs(first, to);
    for (bool start = true; *text != '\0'; start = false) {
        size_t length = strcspn(text, " ");
        size_t width = width_of(text, length);
        if (!start && used + 1 + width > NW_PAGE_WIDTH) {
            fprintf(to, "\n%*s", (int)indent, "");
            used = indent;
            start = true;
        }
        if (!start) {
            fputc(' ', to);
            used++;
        }
        fwrite(text, 1, length, to);
        used += width;
        text += length;
        text += strspn(text, " ");
    }
    fputc('\n', to);
}

char *nw_page_rounded(double value, int digits, char *text, size_t capacity)
{
    char exact[40];
    snprintf(exact, sizeof exact, "%.*e", digits - 1, value);
    double rounded = strtod(exact, NULL), size = fabs(rounded);
    if (size != 0.0 && (size >= 1e7 || size < 1e-4)) {
        snprintf(text, capacity, "%.*e", digits - 1, value);
        return text;
    }
    int decimals = size == 0.0 ? 0 : digits - 1 - (int)floor(log10(size) + 1e-12);
    snprintf(text, capacity, "%.*f", decimals > 0 ? decimals : 0, rounded);
    return text;
}
