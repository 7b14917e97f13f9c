/* NumPy .npy files, built byte by byte after the format's description (NEP 1; numpy.lib.format). */
#include "support/histories.h"

static test_scratch scratch;

typedef struct bytes {
    char data[1 << 17];
    size_t size;
} bytes;

static void add(bytes *to, const void *data, size_t size)
{
    assert_true(to->size + size <= sizeof to->data);
    memcpy(to->data + to->size, data, size);
    to->size += size;
}

/* Magic, version, header length and header, padded as NumPy pads it. */
static void add_header(bytes *to, int version, const char *type, const char *order,
                       const char *shape)
{
    char header[256];
    int length =
        snprintf(header, sizeof header, "{'descr': '%s', 'fortran_order': %s, 'shape': %s, }", type,
                 order, shape);
    size_t size_bytes = version == 1 ? 2 : 4, total = 8 + size_bytes + (size_t)length + 1;
    size_t padded = (size_t)length + 1 + (64 - total % 64) % 64;
    const unsigned char start[] = {0x93, 'N', 'U', 'M', 'P', 'Y', (unsigned char)version, 0};
    const unsigned char sizes[] = {(unsigned char)padded, (unsigned char)(padded >> 8), 0, 0};
    add(to, start, sizeof start);
    add(to, sizes, size_bytes);
    memset(header + length, ' ', padded - (size_t)length - 1);
    header[padded - 1] = '\n';
    add(to, header, padded);
}

static void add_reversed(bytes *to, const void *item, size_t size)
{
    for (size_t i = size; i-- > 0;) {
        add(to, (const char *)item + i, 1);
    }
}

static bool little_endian(void)
{
    const uint16_t one = 1;
    return *(const unsigned char *)&one == 1;
}

/* One value as float32 or float64 in the byte order of the type. */
static void add_value(bytes *to, const char *type, double value)
{
    bool reversed = (type[0] == '>') == little_endian();
    float single = (float)value;
    const void *item = type[2] == '4' ? (const void *)&single : (const void *)&value;
    size_t size = type[2] == '4' ? 4 : 8;
    if (reversed) {
        add_reversed(to, item, size);
    } else {
        add(to, item, size);
    }
}

static const double values[] = {1.5, -2.0, 300.0, 0.0, -0.25, 1048576.0};

static const char *one_dimension(const char *type, int version)
{
    bytes file = {.size = 0};
    add_header(&file, version, type, "False", "(6,)");
    for (size_t i = 0; i < 6; i++) {
        add_value(&file, type, values[i]);
    }
    return test_scratch_write(&scratch, "h.npy", file.data, file.size);
}

static const char *const types[] = {"<f8", "<f4", ">f8", ">f4"};

static void types_orders_and_versions(void **state)
{
    for (size_t i = 0; i < 4; i++) {
        for (int version = 1; version <= 3; version++) {
            test_history_holds(one_dimension(types[i], version), NULL, '.', values, 6);
        }
    }
    test_history_holds(one_dimension("<f8", 1), "1", '.', values, 6);
}

static void two_dimensions(void **state)
{
    for (size_t i = 0; i < 4; i++) {
        bytes file = {.size = 0};
        add_header(&file, 1, types[i], "False", "(6, 3)");
        for (size_t row = 0; row < 6; row++) {
            add_value(&file, types[i], (double)row);
            add_value(&file, types[i], values[row]);
            add_value(&file, types[i], -7.0);
        }
        const char *path = test_scratch_write(&scratch, "h.npy", file.data, file.size);
        test_history_holds(path, "2", '.', values, 6);
        const double first[] = {0, 1, 2, 3, 4, 5};
        test_history_holds(path, "1", '.', first, 6);
        test_history_refused(path, NULL, '.', NW_INPUT, 0, 0, "no choice of column");
        test_history_refused(path, "4", '.', NW_INPUT, 0, 0, "from 1 to 3");
        test_history_refused(path, "0", '.', NW_INPUT, 0, 0, "from 1 to 3");
        test_history_refused(path, "load", '.', NW_INPUT, 0, 0, "column load");
    }
}

static void single_column_needs_no_choice(void **state)
{
    bytes file = {.size = 0};
    add_header(&file, 1, "<f8", "False", "(6, 1)");
    for (size_t i = 0; i < 6; i++) {
        add_value(&file, "<f8", values[i]);
    }
    test_history_holds(test_scratch_write(&scratch, "h.npy", file.data, file.size), NULL, '.',
                       values, 6);
}

/* Longer than one block of the reader. */
static void many_rows(void **state)
{
    enum { ROWS = 15000 };
    bytes *file = calloc(1, sizeof *file);
    double *expected = malloc(ROWS * sizeof *expected);
    assert_true(file != NULL && expected != NULL);
    add_header(file, 1, "<f4", "False", "(15000, 2)");
    for (int i = 0; i < ROWS; i++) {
        expected[i] = i * 0.5;
        add_value(file, "<f4", expected[i]);
        add_value(file, "<f4", -1.0);
    }
    test_history_holds(test_scratch_write(&scratch, "h.npy", file->data, file->size), "1", '.',
                       expected, ROWS);
    free(file);
    free(expected);
}

static void header_refused(const char *type, const char *order, const char *shape, const char *word)
{
    bytes file = {.size = 0};
    add_header(&file, 1, type, order, shape);
    for (size_t i = 0; i < 6; i++) {
        add_value(&file, "<f8", values[i]);
    }
    test_history_refused(test_scratch_write(&scratch, "h.npy", file.data, file.size), NULL, '.',
                         NW_INPUT, 0, 0, word);
}

static void other_arrays(void **state)
{
    header_refused("<i8", "False", "(6,)", "'<i8'");
    header_refused("<f2", "False", "(6,)", "'<f2'");
    header_refused("<c16", "False", "(6,)", "'<c16'");
    header_refused("|O", "False", "(6,)", "'|O'");
    header_refused("<f8", "True", "(2, 3)", "Fortran order");
    header_refused("<f8", "False", "(1, 2, 3)", "one or two dimensions");
    header_refused("<f8", "False", "()", "one or two dimensions");
    header_refused("<f8", "False", "(6, 0)", "one or two dimensions");
    header_refused("<f8", "False", "(7,)", "end of the file inside the data");
    header_refused("<f8", "False", "(99999999999999999999,)", "one or two dimensions");
}

static void not_finite(void **state)
{
    static const double bad[] = {NAN, INFINITY, -INFINITY};
    for (size_t i = 0; i < 4; i++) {
        for (size_t k = 0; k < 3; k++) {
            bytes file = {.size = 0};
            add_header(&file, 1, types[i], "False", "(2, 2)");
            for (int j = 0; j < 3; j++) {
                add_value(&file, types[i], 1.0);
            }
            add_value(&file, types[i], bad[k]);
            const char *path = test_scratch_write(&scratch, "h.npy", file.data, file.size);
            test_history_refused(path, "2", '.', NW_INPUT, 0, 0, "row 2, column 2");
            const double other[] = {1, 1};
            test_history_holds(path, "1", '.', other, 2);
        }
    }
}

/* Cut short at every length: refused, never read past its end. */
static void cut_short(void **state)
{
    char *whole = test_read_file(one_dimension("<f8", 1));
    size_t size = 128 + 48; /* header and six values */
    for (size_t length = 6; length < size; length++) {
        const char *path = test_scratch_write(&scratch, "cut.npy", whole, length);
        test_history_refused(path, NULL, '.', NW_INPUT, 0, 0, ".npy");
    }
    free(whole);
}

static int make_scratch(void **state)
{
    scratch = test_scratch_create();
    return 0;
}

static int remove_scratch(void **state)
{
    test_scratch_remove(&scratch);
    return 0;
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(types_orders_and_versions),
        cmocka_unit_test(two_dimensions),
        cmocka_unit_test(single_column_needs_no_choice),
        cmocka_unit_test(many_rows),
        cmocka_unit_test(other_arrays),
        cmocka_unit_test(not_finite),
        cmocka_unit_test(cut_short),
    };
    return cmocka_run_group_tests(tests, make_scratch, remove_scratch);
}
