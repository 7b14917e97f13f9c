/* Opening a history: asks each format whether the first bytes are its own. */
#include "history/reader.h"

#include "base/text.h"

#include <stdarg.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

static const nw_history_format *const formats[] = {
    &nw_history_format_npy,
    &nw_history_format_text,
};

struct nw_history {
    nw_input input;
    const nw_history_format *format;
    void *state;
};

nw_status nw_input_read(nw_input *input, char *bytes, size_t capacity, size_t *count,
                        nw_diagnostics *diagnostics)
{
    size_t first = 0;
    while (input->head_used < input->head_count && first < capacity) {
        bytes[first++] = input->head[input->head_used++];
    }
    nw_status status =
        nw_byte_source_read(input->source, bytes + first, capacity - first, count, diagnostics);
    *count += first;
    return status;
}

nw_status nw_input_fault(const nw_input *input, size_t line, size_t column, nw_status status,
                         nw_diagnostics *diagnostics, const char *format, ...)
{
    char message[400];
    va_list arguments;
    va_start(arguments, format);
    vsnprintf(message, sizeof message, format, arguments);
    va_end(arguments);
    nw_place place = {.line = line, .column = column};
    nw_text_copy(place.file, sizeof place.file, nw_byte_source_path(input->source));
    return nw_fault(diagnostics, status, &place, NULL, "%s", message);
}

static nw_status open_format(nw_history *history, const nw_history_options *options,
                             nw_diagnostics *diagnostics)
{
    nw_input *input = &history->input;
    nw_status status = nw_byte_source_read(input->source, input->head, sizeof input->head,
                                           &input->head_count, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    for (size_t i = 0; i < sizeof formats / sizeof formats[0]; i++) {
        if (formats[i]->recognises(input->head, input->head_count)) {
            history->format = formats[i];
            break;
        }
    }
    return history->format->open(input, options, &history->state, diagnostics);
}

nw_status nw_history_open(const char *path, const nw_history_options *options, nw_history **history,
                          nw_diagnostics *diagnostics)
{
    *history = NULL;
    nw_history *made = calloc(1, sizeof *made);
    if (made == NULL) {
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory opening %s", path);
    }
    nw_status status = nw_byte_source_open(path, &made->input.source, diagnostics);
    if (status == NW_OK) {
        status = open_format(made, options, diagnostics);
    }
    if (status != NW_OK) {
        nw_history_close(made);
        return status;
    }
    *history = made;
    return NW_OK;
}

nw_status nw_history_read(nw_history *history, double *values, size_t capacity, size_t *count,
                          nw_diagnostics *diagnostics)
{
    *count = 0;
    return history->format->read(history->state, &history->input, values, capacity, count,
                                 diagnostics);
}

/* A sample takes two bytes at the least. */
uint64_t nw_history_samples_at_most(const nw_history *history)
{
    return nw_byte_source_size(history->input.source) / 2;
}

const char *nw_history_unit(const nw_history *history)
{
    return history->input.unit;
}

void nw_history_close(nw_history *history)
{
    if (history == NULL) {
        return;
    }
    if (history->state != NULL) {
        history->format->close(history->state);
    }
    nw_byte_source_close(history->input.source);
    free(history);
}
