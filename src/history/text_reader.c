/* CSV, TSV and blank-separated text, streamed: one buffer that always ends in a whole line. */
#include "base/number.h"
#include "base/text.h"
#include "history/text_file.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>
#if defined(__SSE2__)
#include <emmintrin.h>
#endif

static bool recognises(const char *head, size_t count)
{
    (void)head;
    (void)count;
    return true;
}

static void text_close(void *state)
{
    nw_text_file *file = state;
    free(file->buffer);
    free(file);
}

nw_status nw_text_fill(nw_text_file *file, nw_input *input, nw_diagnostics *diagnostics)
{
    size_t kept = (size_t)(file->end - file->at);
    memmove(file->buffer, file->at, kept);
    file->at = file->buffer;
    file->end = file->lines_end = file->buffer + kept;
    if (file->source_ended) {
        return NW_OK;
    }
    if (kept == NW_TEXT_BUFFER_BYTES) {
        return nw_input_fault(input, file->line, 1, NW_INPUT, diagnostics,
                              "found a line of more than %d bytes, expected lines of text",
                              NW_TEXT_BUFFER_BYTES);
    }
    size_t got;
    nw_status status =
        nw_input_read(input, file->end, NW_TEXT_BUFFER_BYTES - kept, &got, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    file->end += got;
    if (file->end < file->buffer + NW_TEXT_BUFFER_BYTES) {
        file->source_ended = true;
        if (file->end > file->buffer && file->end[-1] != '\n') {
            *file->end++ = '\n';
        }
    }
    memset(file->end, 0, NW_NUMBER_PADDING);
    char *last = file->end;
    while (last > file->buffer && last[-1] != '\n') {
        last--;
    }
    file->lines_end = last;
    if (last == file->buffer && !file->source_ended) {
        return nw_text_fill(file, input, diagnostics);
    }
    return NW_OK;
}

static size_t column_of(const nw_text_file *file, const char *p)
{
    return (size_t)(p - file->at) + 1;
}

static nw_status field_fault(const nw_text_file *file, const nw_input *input, nw_text_field field,
                             nw_diagnostics *diagnostics)
{
    char shown[41];
    int length = field.end - field.start > 40 ? 40 : (int)(field.end - field.start);
    for (int i = 0; i < length; i++) {
        shown[i] = (unsigned char)field.start[i] < ' ' ? '?' : field.start[i];
    }
    shown[length] = '\0';
    const char *hint = "";
    if (file->layout.decimal == '.' && memchr(field.start, ',', (size_t)length) != NULL) {
        hint = " (decimal commas need  decimal: \",\")";
    }
    if (length == 0) {
        return nw_input_fault(input, file->line, column_of(file, field.start), NW_INPUT,
                              diagnostics, "found an empty field, expected a finite number");
    }
    return nw_input_fault(input, file->line, column_of(file, field.start), NW_INPUT, diagnostics,
                          "found '%s', expected a finite number%s", shown, hint);
}

/* One line in full generality. *taken tells whether it held a sample. */
static nw_status read_line(nw_text_file *file, const nw_input *input, const char *line_end,
                           double *value, bool *taken, nw_diagnostics *diagnostics)
{
    *taken = false;
    const char *end = nw_text_content_end(file->at, line_end);
    if (end == file->at) {
        return NW_OK;
    }
    const char *at = file->at;
    nw_text_field field = {NULL, NULL}, wanted = {NULL, NULL};
    size_t count = 0;
    while (nw_text_next_field(&file->layout, &at, end, &field)) {
        if (count == file->layout.column) {
            wanted = field;
        }
        count++;
    }
    if (count != file->layout.columns) {
        return nw_input_fault(input, file->line, 1, NW_INPUT, diagnostics,
                              "found %zu field%s in this row, expected %zu", count,
                              count == 1 ? "" : "s", file->layout.columns);
    }
    const char *stop = nw_number_scan(wanted.start, wanted.end, file->layout.decimal, value);
    if (stop != wanted.end || !isfinite(*value)) {
        return field_fault(file, input, wanted, diagnostics);
    }
    *taken = true;
    return NW_OK;
}

enum { SHORT_LINE = 16 };

/* Length of a line of fewer than SHORT_LINE bytes, else SHORT_LINE. Where the next line starts is then known
 * before the number of this one is worked out, so the processor can do both at once. */
static size_t short_line_length(const char *p)
{
#if defined(__SSE2__)
    __m128i bytes = _mm_loadu_si128((const __m128i *)(const void *)p);
    int ends = _mm_movemask_epi8(_mm_cmpeq_epi8(bytes, _mm_set1_epi8('\n')));
    return (size_t)__builtin_ctz((unsigned)ends | 1u << SHORT_LINE);
#else
    const char *end = memchr(p, '\n', SHORT_LINE);
    return end == NULL ? SHORT_LINE : (size_t)(end - p);
#endif
}

/* Lines of one plain number each, the usual logger's file; stops at the first line that is not. */
static size_t read_plain_lines(nw_text_file *file, double *values, size_t capacity)
{
    const char *p = file->at, *end = file->lines_end;
    char decimal = file->layout.decimal;
    size_t count = 0;
    while (p < end && count < capacity) {
        size_t length = short_line_length(p);
        size_t ending = length > 0 && p[length - 1] == '\r';
        const char *stop = nw_number_scan_padded(p, end, decimal, &values[count]);
        if (length == SHORT_LINE || stop != p + length - ending || !isfinite(values[count])) {
            break;
        }
        count++;
        p += length + 1;
    }
    file->at += p - file->at;
    file->line += count;
    return count;
}

static nw_status text_read(void *state, nw_input *input, double *values, size_t capacity,
                           size_t *count, nw_diagnostics *diagnostics)
{
    nw_text_file *file = state;
    *count = 0;
    while (*count < capacity) {
        if (file->at == file->lines_end) {
            if (*count > 0) {
                return NW_OK;
            }
            nw_status status = nw_text_fill(file, input, diagnostics);
            if (status != NW_OK || file->at == file->lines_end) {
                return status;
            }
        }
        if (file->layout.delimiter == NW_SINGLE) {
            *count += read_plain_lines(file, values + *count, capacity - *count);
            if (file->at == file->lines_end || *count == capacity) {
                continue;
            }
        }
        char *line_end = memchr(file->at, '\n', (size_t)(file->lines_end - file->at));
        bool taken;
        nw_status status = read_line(file, input, line_end, &values[*count], &taken, diagnostics);
        if (status != NW_OK) {
            return status;
        }
        *count += taken;
        file->at = line_end + 1;
        file->line++;
    }
    return NW_OK;
}

static nw_status refuse_encoding(const nw_text_file *file, const nw_input *input,
                                 nw_diagnostics *diagnostics)
{
    const unsigned char *b = (const unsigned char *)file->at;
    size_t size = (size_t)(file->end - file->at);
    bool utf16 = size >= 2 && ((b[0] == 0xFF && b[1] == 0xFE) || (b[0] == 0xFE && b[1] == 0xFF));
    if (utf16) {
        return nw_input_fault(input, 1, 1, NW_INPUT, diagnostics,
                              "found UTF-16 text, expected UTF-8");
    }
    size_t checked = size > 512 ? 512 : size;
    if (memchr(file->at, '\0', checked) != NULL) {
        return nw_input_fault(input, 1, 1, NW_INPUT, diagnostics,
                              "found binary data, expected a text table or .npy");
    }
    return NW_OK;
}

static nw_status open_text(nw_text_file *file, nw_input *input, const nw_history_options *options,
                           nw_diagnostics *diagnostics)
{
    file->buffer = malloc(NW_TEXT_BUFFER_BYTES + 1 + NW_NUMBER_PADDING);
    if (file->buffer == NULL) {
        return nw_input_fault(input, 0, 0, NW_MEMORY, diagnostics, "out of memory");
    }
    file->layout.decimal = options->decimal == ',' ? ',' : '.';
    file->line = 1;
    file->at = file->end = file->lines_end = file->buffer;
    nw_status status = nw_text_fill(file, input, diagnostics);
    if (status == NW_OK) {
        status = refuse_encoding(file, input, diagnostics);
    }
    if (status == NW_OK && file->end - file->at >= 3 && memcmp(file->at, "\xEF\xBB\xBF", 3) == 0) {
        file->at += 3;
    }
    return status == NW_OK ? nw_text_find_layout(file, input, options, diagnostics) : status;
}

static nw_status text_open(nw_input *input, const nw_history_options *options, void **state,
                           nw_diagnostics *diagnostics)
{
    *state = NULL;
    nw_text_file *file = calloc(1, sizeof *file);
    if (file == NULL) {
        return nw_input_fault(input, 0, 0, NW_MEMORY, diagnostics, "out of memory");
    }
    nw_status status = open_text(file, input, options, diagnostics);
    if (status != NW_OK) {
        text_close(file);
        return status;
    }
    *state = file;
    return NW_OK;
}

const nw_history_format nw_history_format_text = {
    .key = "text",
    .title = "CSV, TSV or blank-separated text",
    .recognises = recognises,
    .open = text_open,
    .read = text_read,
    .close = text_close,
};
