/* A file format of load histories: one record, one file. */
#ifndef NW_HISTORY_READER_H
#define NW_HISTORY_READER_H

#include "history/byte_source.h"
#include "notchwright/history.h"

enum { NW_HEAD_BYTES = 8 };

/* Bytes as they come from the source, with the first ones peeked at. Formats share it. */
typedef struct nw_input {
    nw_byte_source *source;
    char head[NW_HEAD_BYTES];
    size_t head_used, head_count;
    char unit[32]; /* unit in the header of the column read, "load[MPa]", or "" */
} nw_input;

nw_status nw_input_read(nw_input *input, char *bytes, size_t capacity, size_t *count,
                        nw_diagnostics *diagnostics);

/* Fault at a line and column (0: unknown) of the file. */
nw_status nw_input_fault(const nw_input *input, size_t line, size_t column, nw_status status,
                         nw_diagnostics *diagnostics, const char *format, ...) NW_PRINTF(6, 7);

typedef struct nw_history_format {
    const char *key;   /* "npy" */
    const char *title; /* shown in help */
    bool (*recognises)(const char *head, size_t count);
    nw_status (*open)(nw_input *input, const nw_history_options *options, void **state,
                      nw_diagnostics *diagnostics);
    nw_status (*read)(void *state, nw_input *input, double *values, size_t capacity, size_t *count,
                      nw_diagnostics *diagnostics);
    void (*close)(void *state);
} nw_history_format;

extern const nw_history_format nw_history_format_npy;
extern const nw_history_format
    nw_history_format_text; /* recognises everything: the last one asked */

#endif
