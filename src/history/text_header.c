/* What the first lines of a text history tell: delimiter, header, the column to read and its unit. */
#include "base/text.h"
#include "history/text_file.h"
#include "notchwright/quantity.h"

#include <stdlib.h>
#include <string.h>

/* Moves `file` to the next line with content; false when there is none in the buffer. */
static bool seek_content(nw_text_file *file, const char **line_end)
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

static nw_status column_fault(const nw_text_file *file, const nw_input *input, const char *line,
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
static size_t columns_named(nw_text_file *file, const char *line, const char *end,
                            const char *wanted)
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
static void note_unit(const nw_text_file *file, nw_input *input, const char *line, const char *end)
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
static nw_status choose_column(nw_text_file *file, const nw_input *input, const char *line,
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
static bool is_header(nw_text_file *file, const char *line, const char *end, const char *wanted)
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
static nw_status find_content(nw_text_file *file, nw_input *input, const char **line_end,
                              const char *found_at_end, nw_diagnostics *diagnostics)
{
    *line_end = NULL;
    while (!seek_content(file, line_end)) {
        if (file->source_ended) {
            return nw_input_fault(input, file->line, 1, NW_INPUT, diagnostics, "%s", found_at_end);
        }
        nw_status status = nw_text_fill(file, input, diagnostics);
        if (status != NW_OK) {
            return status;
        }
    }
    /* With the first line at the front, the second one is in the buffer too. */
    if (file->at > file->buffer && !file->source_ended) {
        nw_status status = nw_text_fill(file, input, diagnostics);
        *line_end = memchr(file->at, '\n', (size_t)(file->lines_end - file->at));
        return status;
    }
    return NW_OK;
}

static void set_columns(nw_text_file *file, const char *line, const char *end)
{
    file->layout.delimiter = nw_text_delimiter_of(line, end, file->layout.decimal);
    file->layout.columns = nw_text_count_fields(&file->layout, line, end);
}

/* The header, which stands in a copy of its own, against the first row of data at `file`. */
static nw_status use_header(nw_text_file *file, nw_input *input, const char *header,
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

static nw_status read_header(nw_text_file *file, nw_input *input, const char *end,
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
nw_status nw_text_find_layout(nw_text_file *file, nw_input *input,
                              const nw_history_options *options, nw_diagnostics *diagnostics)
{
    const char *first_end, *data_end;
    nw_status status = find_content(file, input, &first_end,
                                    "found no values, expected at least one", diagnostics);
    if (status != NW_OK) {
        return status;
    }
    const char *end = nw_text_content_end(file->at, first_end);
    nw_text_file second = *file;
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
