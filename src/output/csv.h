/* Small change for CSV output. */
#ifndef NW_OUTPUT_CSV_H
#define NW_OUTPUT_CSV_H

#include <stddef.h>
#include <stdio.h>

/* ",value" for each; a number that does not exist is empty. */
void nw_csv_numbers(FILE *to, const double *values, size_t count);

/* ",text", in quotes where it needs them (RFC 4180). */
void nw_csv_text(FILE *to, const char *text);

/* The same at the start of a row, without the comma. */
void nw_csv_first_text(FILE *to, const char *text);

#endif
