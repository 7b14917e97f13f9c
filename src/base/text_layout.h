/* The layout of a text table: delimiter, header, number of columns, and how to find a field in a line. */
#ifndef NW_BASE_TEXT_LAYOUT_H
#define NW_BASE_TEXT_LAYOUT_H

#include <stdbool.h>
#include <stddef.h>

enum { NW_BLANKS = ' ', NW_SINGLE = 0 };

typedef struct nw_text_layout {
    char delimiter; /* ',', ';', '\t', NW_BLANKS (any run of blanks) or NW_SINGLE (one column) */
    char decimal;
    bool has_header;
    size_t columns;
    size_t column; /* the one read, from 0 */
} nw_text_layout;

/* A field: what stands between two delimiters, without blanks and quotes around it. */
typedef struct nw_text_field {
    const char *start, *end;
} nw_text_field;

/* Takes the next field of a line (which ends at `end`, excluded) from *at on. False when there is none. */
bool nw_text_next_field(const nw_text_layout *layout, const char **at, const char *end,
                        nw_text_field *field);

/* Number of fields of a line. */
size_t nw_text_count_fields(const nw_text_layout *layout, const char *line, const char *end);

/* Cuts line endings, trailing blanks and a '#' comment off: returns the new end. */
const char *nw_text_content_end(const char *line, const char *end);

/* Finds the delimiter from a line of data. */
char nw_text_delimiter_of(const char *line, const char *end, char decimal);

/* True when the field starts like a number, NaN and infinity included. */
bool nw_text_looks_numeric(nw_text_field field);

#endif
