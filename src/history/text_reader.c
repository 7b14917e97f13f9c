/* CSV, TSV and blank-separated text, streamed: one buffer that always ends in a whole line. */
#include "base/number.h"
#include "base/text.h"
#include "base/text_layout.h"
#include "history/reader.h"
#include "notchwright/quantity.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>
#if defined(__SSE2__)
#include <emmintrin.h>
#endif

enum { BUFFER_BYTES = 1 << 18 };

typedef struct text_file {
    nw_text_layout layout;
    char *buffer;    /* BUFFER_BYTES + 1 for a missing last line end + padding */
    char *at;        /* next line */
    char *lines_end; /* end of the last whole line */
    char *end;       /* end of the bytes read */
    bool source_ended;
    size_t line; /* number of the line at `at`, from 1 */
} text_file;

static bool recognises(const char *head, size_t count)
{
    (void)head;
    (void)count;
    return true;
}

static void text_close(void *state)
{
    text_file *file = state;
    free(file->buffer);
    free(file);
}

/* Moves the unfinished line to the front and reads on until there is a whole line. */
static nw_status fill(text_file *file, nw_input *input, nw_diagnostics *diagnostics)
{
    size_t kept = (size_t)(file->end - file->at);
    memmove(file->buffer, file->at, kept);
    file->at = file->buffer;
    file->end = file->lines_end = file->buffer + kept;
    if (file->source_ended) {
        return NW_OK;
    }
    if (kept == BUFFER_BYTES) {
        return nw_input_fault(input, file->line, 1, NW_INPUT, diagnostics,
                              "found a line of more than %d bytes, expected lines of text",
                              BUFFER_BYTES);
    }
    size_t got;
    nw_status status = nw_input_read(input, file->end, BUFFER_BYTES - kept, &got, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    file->end += got;
    if (file->end < file->buffer + BUFFER_BYTES) {
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
        return fill(file, input, diagnostics);
    }
    return NW_OK;
}

static size_t column_of(const text_file *file, const char *p)
{
    return (size_t)(p - file->at) + 1;
}

static nw_status field_fault(const text_file *file, const nw_input *input, nw_text_field field,
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
static nw_status read_line(text_file *file, const nw_input *input, const char *line_end,
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
static size_t read_plain_lines(text_file *file, double *values, size_t capacity)
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
    text_file *file = state;
    *count = 0;
    while (*count < capacity) {
        if (file->at == file->lines_end) {
            if (*count > 0) {
                return NW_OK;
            }
            nw_status status = fill(file, input, diagnostics);
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

/* ---- the layout, told from the first lines ---- */

/* Moves `file` to the next line with content; false when there is none in the buffer. */
static bool seek_content(text_file *file, const char **line_end)
{
    while (file->at < file->lines_end) {
        char *end = memchr(file->at, '\n', (size_t)(file->lines_end - file->at));
        if (nw_text_content_end(file->at, end) > file->at) {
            *line_end = end;
            return true;
        }
        file->at = end + 1;
        file->line++;
    }
    return false;
}

static nw_status refuse_encoding(const text_file *file, const nw_input *input,
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

static nw_status column_fault(const text_file *file, const nw_input *input, const char *line,
                              const char *end, const char *wanted, nw_diagnostics *diagnostics)
{
    char names[300];
    nw_text_builder out = nw_text_builder_on(names, sizeof names);
    nw_text_field field;
    for (size_t i = 0; nw_text_next_field(&file->layout, &line, end, &field); i++) {
        nw_text_add(&out, "%s%zu", i == 0 ? "" : ", ", i + 1);
        if (file->layout.has_header) {
            nw_text_add(&out, " '%.*s'", (int)(field.end - field.start), field.start);
        }
    }
    return nw_input_fault(input, file->line, 1, NW_INPUT, diagnostics,
                          "found %s%.60s%s, expected 'column' to be one of: %s",
                          wanted == NULL ? "several columns and no choice" : "no column '",
                          wanted == NULL ? "" : wanted, wanted == NULL ? "" : "'", names);
}

/* Splits "name[unit]" or "name [unit]"; the unit is empty where there is none. */
static nw_text_field split_unit(nw_text_field *name)
{
    nw_text_field unit = {name->end, name->end};
    const char *open = memchr(name->start, '[', (size_t)(name->end - name->start));
    if (open != NULL && open > name->start && name->end[-1] == ']') {
        unit = (nw_text_field){open + 1, name->end - 1};
        name->end = open;
        while (name->end > name->start && name->end[-1] == ' ') {
            name->end--;
        }
    }
    return unit;
}

static bool equals(nw_text_field field, const char *word)
{
    size_t length = (size_t)(field.end - field.start);
    return length == strlen(word) && memcmp(field.start, word, length) == 0;
}

/* How many columns have the name; the first of them becomes the column read. */
static size_t columns_named(text_file *file, const char *line, const char *end, const char *wanted)
{
    nw_text_field field;
    size_t found = 0;
    for (size_t i = 0; nw_text_next_field(&file->layout, &line, end, &field); i++) {
        nw_text_field name = field;
        split_unit(&name);
        if (equals(field, wanted) || equals(name, wanted)) {
            file->layout.column = found == 0 ? i : file->layout.column;
            found++;
        }
    }
    return found;
}

/* Keeps the unit that the header gives the column. */
static void note_unit(const text_file *file, nw_input *input, const char *line, const char *end)
{
    nw_text_field field = {line, line};
    for (size_t i = 0; i <= file->layout.column; i++) {
        nw_text_next_field(&file->layout, &line, end, &field);
    }
    nw_text_field unit = split_unit(&field);
    size_t length = (size_t)(unit.end - unit.start);
    if (length < sizeof input->unit) {
        memcpy(input->unit, unit.start, length);
        input->unit[length] = '\0';
    }
}

/* The header's name comes first, so that a column called "2" can be meant by its name. */
static nw_status choose_column(text_file *file, const nw_input *input, const char *line,
                               const char *end, const char *wanted, nw_diagnostics *diagnostics)
{
    if (wanted == NULL) {
        return file->layout.columns == 1 ? NW_OK
                                         : column_fault(file, input, line, end, NULL, diagnostics);
    }
    size_t named = file->layout.has_header ? columns_named(file, line, end, wanted) : 0;
    if (named > 1) {
        return nw_input_fault(
            input, file->line, 1, NW_INPUT, diagnostics,
            "found %zu columns called '%.60s', expected one; give the number of the "
            "column instead",
            named, wanted);
    }
    if (named == 1) {
        return NW_OK;
    }
    char *rest;
    unsigned long number = strtoul(wanted, &rest, 10);
    if (*wanted == '\0' || *rest != '\0' || number < 1 || number > file->layout.columns) {
        return column_fault(file, input, line, end, wanted, diagnostics);
    }
    file->layout.column = number - 1;
    return NW_OK;
}

/* A first line without a single number is a header, and so is one that names the column asked for; else it is
 * data. */
static bool is_header(text_file *file, const char *line, const char *end, const char *wanted)
{
    double number;
    if (wanted != NULL && !nw_number_read(wanted, &number) &&
        columns_named(file, line, end, wanted) > 0) {
        return true;
    }
    nw_text_field field;
    while (nw_text_next_field(&file->layout, &line, end, &field)) {
        if (nw_text_looks_numeric(field)) {
            return false;
        }
    }
    return true;
}

/* Moves to the next line with content, reading on as far as needed: comments may be long. */
static nw_status find_content(text_file *file, nw_input *input, const char **line_end,
                              const char *found_at_end, nw_diagnostics *diagnostics)
{
    *line_end = NULL;
    while (!seek_content(file, line_end)) {
        if (file->source_ended) {
            return nw_input_fault(input, file->line, 1, NW_INPUT, diagnostics, "%s", found_at_end);
        }
        nw_status status = fill(file, input, diagnostics);
        if (status != NW_OK) {
            return status;
        }
    }
    /* With the first line at the front, the second one is in the buffer too. */
    if (file->at > file->buffer && !file->source_ended) {
        nw_status status = fill(file, input, diagnostics);
        *line_end = memchr(file->at, '\n', (size_t)(file->lines_end - file->at));
        return status;
    }
    return NW_OK;
}

static void set_columns(text_file *file, const char *line, const char *end)
{
    file->layout.delimiter = nw_text_delimiter_of(line, end, file->layout.decimal);
    file->layout.columns = nw_text_count_fields(&file->layout, line, end);
}

/* The header, which stands in a copy of its own, against the first row of data at `file`. */
static nw_status use_header(text_file *file, nw_input *input, const char *header,
                            size_t header_line, const char *wanted, nw_diagnostics *diagnostics)
{
    const char *end = header + strlen(header);
    size_t names = nw_text_count_fields(&file->layout, header, end), data_line = file->line;
    if (names != file->layout.columns) {
        return nw_input_fault(input, data_line, 1, NW_INPUT, diagnostics,
                              "found %zu field%s in this row, expected %zu as in the header",
                              file->layout.columns, file->layout.columns == 1 ? "" : "s", names);
    }
    file->line = header_line;
    nw_status status = choose_column(file, input, header, end, wanted, diagnostics);
    file->line = data_line;
    if (status == NW_OK) {
        note_unit(file, input, header, end);
    }
    return status;
}

static nw_status read_header(text_file *file, nw_input *input, const char *end,
                             const char *first_end, const char *wanted, nw_diagnostics *diagnostics)
{
    size_t length = (size_t)(end - file->at), line = file->line;
    char *header = malloc(length + 1);
    if (header == NULL) {
        return nw_input_fault(input, 0, 0, NW_MEMORY, diagnostics, "out of memory");
    }
    memcpy(header, file->at, length);
    header[length] = '\0';
    file->at += first_end - file->at + 1;
    file->line++;
    const char *data_end;
    nw_status status =
        find_content(file, input, &data_end,
                     "found a header and no values, expected at least one row", diagnostics);
    if (status == NW_OK) {
        set_columns(file, file->at, nw_text_content_end(file->at, data_end));
        status = use_header(file, input, header, line, wanted, diagnostics);
    }
    free(header);
    return status;
}

/* The first row of data tells the delimiter: names in a header may hold blanks. */
static nw_status find_layout(text_file *file, nw_input *input, const nw_history_options *options,
                             nw_diagnostics *diagnostics)
{
    const char *first_end, *data_end;
    nw_status status = find_content(file, input, &first_end,
                                    "found no values, expected at least one", diagnostics);
    if (status != NW_OK) {
        return status;
    }
    const char *end = nw_text_content_end(file->at, first_end);
    text_file second = *file;
    second.at = file->at + (first_end - file->at) + 1;
    set_columns(file, file->at, end);
    if (seek_content(&second, &data_end)) {
        set_columns(file, second.at, nw_text_content_end(second.at, data_end));
    }
    file->layout.has_header = is_header(file, file->at, end, options->column);
    if (file->layout.has_header) {
        return read_header(file, input, end, first_end, options->column, diagnostics);
    }
    set_columns(file, file->at, end);
    return choose_column(file, input, file->at, end, options->column, diagnostics);
}

static nw_status open_text(text_file *file, nw_input *input, const nw_history_options *options,
                           nw_diagnostics *diagnostics)
{
    file->buffer = malloc(BUFFER_BYTES + 1 + NW_NUMBER_PADDING);
    if (file->buffer == NULL) {
        return nw_input_fault(input, 0, 0, NW_MEMORY, diagnostics, "out of memory");
    }
    file->layout.decimal = options->decimal == ',' ? ',' : '.';
    file->line = 1;
    file->at = file->end = file->lines_end = file->buffer;
    nw_status status = fill(file, input, diagnostics);
    if (status == NW_OK) {
        status = refuse_encoding(file, input, diagnostics);
    }
    if (status == NW_OK && file->end - file->at >= 3 && memcmp(file->at, "\xEF\xBB\xBF", 3) == 0) {
        file->at += 3;
    }
    return status == NW_OK ? find_layout(file, input, options, diagnostics) : status;
}

static nw_status text_open(nw_input *input, const nw_history_options *options, void **state,
                           nw_diagnostics *diagnostics)
{
    *state = NULL;
    text_file *file = calloc(1, sizeof *file);
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
