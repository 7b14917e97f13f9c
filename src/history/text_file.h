/* A text history under reading: one buffer that always ends in a whole line. */
#ifndef NW_HISTORY_TEXT_FILE_H
#define NW_HISTORY_TEXT_FILE_H

#include "base/text_layout.h"
#include "history/reader.h"

enum { NW_TEXT_BUFFER_BYTES = 1 << 18 };

typedef struct nw_text_file {
    nw_text_layout layout;
    char *buffer;    /* NW_TEXT_BUFFER_BYTES + 1 for a missing last line end + padding */
    char *at;        /* next line */
    char *lines_end; /* end of the last whole line */
    char *end;       /* end of the bytes read */
    bool source_ended;
    size_t line; /* number of the line at `at`, from 1 */
} nw_text_file;

/* Moves the unfinished line to the front and reads on until there is a whole line. */
nw_status nw_text_fill(nw_text_file *file, nw_input *input, nw_diagnostics *diagnostics);

/* Tells delimiter, header and column from the first lines, and moves on to the first row of data. */
nw_status nw_text_find_layout(nw_text_file *file, nw_input *input,
                              const nw_history_options *options, nw_diagnostics *diagnostics);

#endif
