/* NumPy .npy, version 1 to 3: float32 or float64, 1-D or 2-D, C order (NEP 1, numpy.lib.format). */
#include "history/reader.h"

#include <inttypes.h>
#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

typedef struct npy {
    size_t item_bytes; /* 4 or 8 */
    bool swapped;      /* file order differs from this machine's */
    uint64_t rows, columns, column;
    uint64_t row; /* rows read so far */
    char *row_bytes;
} npy;

static bool recognises(const char *head, size_t count)
{
    return count >= 6 && memcmp(head, "\x93NUMPY", 6) == 0;
}

static nw_status read_exactly(nw_input *input, char *bytes, size_t wanted,
                              nw_diagnostics *diagnostics, const char *what)
{
    size_t got;
    nw_status status = nw_input_read(input, bytes, wanted, &got, diagnostics);
    if (status == NW_OK && got < wanted) {
        status = nw_input_fault(input, 0, 0, NW_INPUT, diagnostics,
                                ".npy: found the end of the file inside %s, expected %zu bytes",
                                what, wanted);
    }
    return status;
}

static bool machine_is_little_endian(void)
{
    const uint16_t one = 1;
    return *(const unsigned char *)&one == 1;
}

/* Text after "'name':" of the header dictionary, or NULL. */
static const char *header_value(const char *header, const char *name)
{
    char quoted[32];
    snprintf(quoted, sizeof quoted, "'%s'", name);
    const char *at = strstr(header, quoted);
    if (at == NULL) {
        return NULL;
    }
    at += strlen(quoted);
    while (*at == ' ' || *at == ':') {
        at++;
    }
    return at;
}

static nw_status parse_type(npy *file, nw_input *input, const char *header,
                            nw_diagnostics *diagnostics)
{
    const char *type = header_value(header, "descr");
    char found[24] = "no 'descr'";
    if (type != NULL) {
        snprintf(found, sizeof found, "%.*s", (int)strcspn(type, ",}"), type);
    }
    bool quoted = type != NULL && type[0] == '\'';
    if (!quoted || strchr("<>=|", type[1]) == NULL || type[1] == '\0' || type[2] != 'f' ||
        (type[3] != '4' && type[3] != '8') || type[4] != '\'') {
        return nw_input_fault(input, 0, 0, NW_INPUT, diagnostics,
                              ".npy: found values of type %s, expected float32 or float64", found);
    }
    file->item_bytes = (size_t)(type[3] - '0');
    file->swapped = (type[1] == '<' && !machine_is_little_endian()) ||
                    (type[1] == '>' && machine_is_little_endian());
    return NW_OK;
}

static nw_status parse_shape(npy *file, nw_input *input, const char *header,
                             nw_diagnostics *diagnostics)
{
    const char *order = header_value(header, "fortran_order");
    const char *shape = header_value(header, "shape");
    if (order == NULL || strncmp(order, "False", 5) != 0) {
        return nw_input_fault(input, 0, 0, NW_INPUT, diagnostics,
                              ".npy: found Fortran order (or none stated), expected C order");
    }
    uint64_t sizes[2] = {0, 1};
    int dimensions = 0;
    bool good = shape != NULL && *shape == '(';
    const char *at = good ? shape + 1 : "";
    while (good && *at >= '0' && *at <= '9') {
        char *end;
        uint64_t size = strtoull(at, &end, 10);
        if (dimensions < 2) {
            sizes[dimensions] = size;
        }
        dimensions++;
        at = end;
        while (*at == ',' || *at == ' ' || *at == 'L') {
            at++;
        }
    }
    good = good && *at == ')';
    bool sensible = sizes[0] < (uint64_t)1 << 48 && sizes[1] >= 1 && sizes[1] <= 1 << 20;
    if (!good || dimensions < 1 || dimensions > 2 || !sensible) {
        return nw_input_fault(input, 0, 0, NW_INPUT, diagnostics,
                              ".npy: found shape %.*s, expected one or two dimensions",
                              shape == NULL ? 4 : (int)strcspn(shape, ")") + 1,
                              shape == NULL ? "none" : shape);
    }
    file->rows = sizes[0];
    file->columns = sizes[1];
    return NW_OK;
}

static nw_status choose_column(npy *file, nw_input *input, const char *wanted,
                               nw_diagnostics *diagnostics)
{
    if (wanted == NULL && file->columns == 1) {
        return NW_OK;
    }
    char *end = NULL;
    unsigned long long number = wanted == NULL ? 0 : strtoull(wanted, &end, 10);
    if (wanted == NULL || *end != '\0' || number < 1 || number > file->columns) {
        return nw_input_fault(input, 0, 0, NW_INPUT, diagnostics,
                              ".npy: found %s%s, expected a column number from 1 to %" PRIu64,
                              wanted == NULL ? "no choice of column" : "column ",
                              wanted == NULL ? "" : wanted, file->columns);
    }
    file->column = number - 1;
    return NW_OK;
}

static nw_status read_header(npy *file, nw_input *input, const nw_history_options *options,
                             nw_diagnostics *diagnostics)
{
    unsigned char start[12] = {0};
    nw_status status = read_exactly(input, (char *)start, 8, diagnostics, "the header");
    if (status != NW_OK) {
        return status;
    }
    size_t size_bytes = start[6] == 1 ? 2 : 4;
    status = read_exactly(input, (char *)start + 8, size_bytes, diagnostics, "the header");
    if (status != NW_OK) {
        return status;
    }
    size_t length =
        start[8] | (size_t)start[9] << 8 | (size_t)start[10] << 16 | (size_t)start[11] << 24;
    if (start[6] < 1 || start[6] > 3 || length > 1 << 16) {
        return nw_input_fault(input, 0, 0, NW_INPUT, diagnostics,
                              ".npy: found format version %d with a header of %zu bytes, expected "
                              "version 1 to 3 and at most 65536 bytes",
                              start[6], length);
    }
    char *header = calloc(1, length + 1);
    if (header == NULL) {
        return nw_input_fault(input, 0, 0, NW_MEMORY, diagnostics, "out of memory");
    }
    status = read_exactly(input, header, length, diagnostics, "the header");
    if (status == NW_OK) {
        status = parse_type(file, input, header, diagnostics);
    }
    if (status == NW_OK) {
        status = parse_shape(file, input, header, diagnostics);
    }
    if (status == NW_OK) {
        status = choose_column(file, input, options->column, diagnostics);
    }
    free(header);
    return status;
}

static void npy_close(void *state)
{
    npy *file = state;
    free(file->row_bytes);
    free(file);
}

enum { BLOCK_BYTES = 1 << 16 };

static size_t rows_per_block(const npy *file)
{
    size_t rows = BLOCK_BYTES / (file->item_bytes * file->columns);
    return rows == 0 ? 1 : rows;
}

static nw_status npy_open(nw_input *input, const nw_history_options *options, void **state,
                          nw_diagnostics *diagnostics)
{
    npy *file = calloc(1, sizeof *file);
    *state = NULL;
    if (file == NULL) {
        return nw_input_fault(input, 0, 0, NW_MEMORY, diagnostics, "out of memory");
    }
    nw_status status = read_header(file, input, options, diagnostics);
    if (status == NW_OK) {
        file->row_bytes = malloc(rows_per_block(file) * file->item_bytes * file->columns);
        if (file->row_bytes == NULL) {
            status = nw_input_fault(input, 0, 0, NW_MEMORY, diagnostics, "out of memory");
        }
    }
    if (status != NW_OK) {
        npy_close(file);
        return status;
    }
    *state = file;
    return NW_OK;
}

static double item_at(const npy *file, const char *bytes)
{
    unsigned char copy[8];
    for (size_t i = 0; i < file->item_bytes; i++) {
        copy[i] = (unsigned char)bytes[file->swapped ? file->item_bytes - 1 - i : i];
    }
    if (file->item_bytes == 4) {
        float value;
        memcpy(&value, copy, sizeof value);
        return (double)value;
    }
    double value;
    memcpy(&value, copy, sizeof value);
    return value;
}

static nw_status npy_read(void *state, nw_input *input, double *values, size_t capacity,
                          size_t *count, nw_diagnostics *diagnostics)
{
    npy *file = state;
    size_t wanted = rows_per_block(file);
    wanted = wanted > capacity ? capacity : wanted;
    if (wanted > file->rows - file->row) {
        wanted = (size_t)(file->rows - file->row);
    }
    if (wanted == 0) {
        return NW_OK;
    }
    size_t row_size = file->item_bytes * file->columns;
    nw_status status =
        read_exactly(input, file->row_bytes, wanted * row_size, diagnostics, "the data");
    if (status != NW_OK) {
        return status;
    }
    const char *at = file->row_bytes + file->column * file->item_bytes;
    bool plain = file->item_bytes == 8 && file->columns == 1 && !file->swapped;
    if (plain) {
        memcpy(values, at, wanted * sizeof *values);
    }
    for (size_t i = 0; i < wanted; i++, at += row_size) {
        if (!plain) {
            values[i] = item_at(file, at);
        }
        if (!isfinite(values[i])) {
            return nw_input_fault(input, 0, 0, NW_INPUT, diagnostics,
                                  "row %" PRIu64 ", column %" PRIu64
                                  ": found %g, expected a finite number",
                                  file->row + i + 1, file->column + 1, values[i]);
        }
    }
    file->row += wanted;
    *count = wanted;
    return NW_OK;
}

const nw_history_format nw_history_format_npy = {
    .key = "npy",
    .title = "NumPy .npy (float32 or float64, one or two dimensions, C order)",
    .recognises = recognises,
    .open = npy_open,
    .read = npy_read,
    .close = npy_close,
};
