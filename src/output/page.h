/* Text pages: wrapped paragraphs and rounded numbers. */
#ifndef NW_OUTPUT_PAGE_H
#define NW_OUTPUT_PAGE_H

#include <stddef.h>
#include <stdio.h>

enum { NW_PAGE_WIDTH = 96 };

/* Wraps `text` at NW_PAGE_WIDTH: the first line after `first`, the others after as many blanks. */
void nw_page_paragraph(FILE *to, const char *first, const char *text);

/* A number rounded to `digits` significant digits and written without exponent where that reads well
 * ("5300", "0.012", "2.4e+07"). Returns `text`. */
char *nw_page_rounded(double value, int digits, char *text, size_t capacity);

#endif
