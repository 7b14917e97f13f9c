/* History files that are no text: wrong .npy, truncated .gz, UTF-16, and bytes of any kind. */
#include "support/bad_input.h"

#include <zlib.h>

#define BYTES(literal) .content = literal, .size = sizeof(literal) - 1
#define NPY(header_size, header) "\x93NUMPY\x01\x00" header_size "\x00" header
#define TWO_DOUBLES "\0\0\0\0\0\0\0\0\0\0\0\0\0\0\xf0\x3f" /* 0 and 1 */
#define DICTIONARY(type, order, shape) \
    "{'descr': '" type "', 'fortran_order': " order ", 'shape': " shape ", }"

static const bad_input rows[] = {
    {.name = "npy_of_integers",
     .file = "load.npy",
     BYTES(NPY("\x39", DICTIONARY("<i8", "False", "(2,)")) TWO_DOUBLES),
     .message = "load.npy: error: .npy: found values of type '<i8', expected float32 or float64"},
    {.name = "npy_of_objects",
     .file = "load.npy",
     BYTES(NPY("\x38", DICTIONARY("|O", "False", "(2,)")) TWO_DOUBLES),
     .message = "load.npy: error: .npy: found values of type '|O', expected float32 or float64"},
    {.name = "npy_of_half_floats",
     .file = "load.npy",
     BYTES(NPY("\x39", DICTIONARY("<f2", "False", "(8,)")) TWO_DOUBLES),
     .message = "load.npy: error: .npy: found values of type '<f2', expected float32 or float64"},
    {.name = "npy_of_records",
     .file = "load.npy",
     BYTES(NPY("\x42", "{'descr': [('a', '<f8')], 'fortran_order': False, 'shape': (2,), }")
               TWO_DOUBLES),
     .message = "load.npy: error: .npy: found values of type [('a'"},
    {.name = "npy_fortran_order",
     .file = "load.npy",
     BYTES(NPY("\x3a", DICTIONARY("<f8", "True", "(1, 2)")) TWO_DOUBLES),
     .message = "load.npy: error: .npy: found Fortran order"},
    {.name = "npy_three_dimensions",
     .file = "load.npy",
     BYTES(NPY("\x3e", DICTIONARY("<f8", "False", "(1, 1, 2)")) TWO_DOUBLES),
     .message = "load.npy: error: .npy: found shape (1, 1, 2), expected one or two dimensions"},
    {.name = "npy_single_number",
     .file = "load.npy",
     BYTES(NPY("\x37", DICTIONARY("<f8", "False", "()")) TWO_DOUBLES),
     .message = "load.npy: error: .npy: found shape (), expected one or two dimensions"},
    {.name = "npy_shape_overflows",
     .file = "load.npy",
     BYTES(NPY("\x4c", DICTIONARY("<f8", "False", "(18446744073709551615,)")) TWO_DOUBLES),
     .message = "load.npy: error: .npy: found shape (18446744073709551615,), expected"},
    {.name = "npy_without_shape",
     .file = "load.npy",
     BYTES(NPY("\x27", "{'descr': '<f8', 'fortran_order': False") TWO_DOUBLES),
     .message = "load.npy: error: .npy: found shape none, expected one or two dimensions"},
    {.name = "npy_header_is_rubbish",
     .file = "load.npy",
     BYTES(NPY("\x08", "{}{}{}{}") TWO_DOUBLES),
     .message =
         "load.npy: error: .npy: found values of type no 'descr', expected float32 or float64"},
    {.name = "npy_version_9",
     .file = "load.npy",
     BYTES("\x93NUMPY\x09\x00\x39\x00\x00\x00" DICTIONARY("<f8", "False", "(2,)") TWO_DOUBLES),
     .message = "load.npy: error: .npy: found format version 9"},
    {.name = "npy_header_too_long",
     .file = "load.npy",
     BYTES("\x93NUMPY\x02\x00\xff\xff\xff\x7f" DICTIONARY("<f8", "False", "(2,)") TWO_DOUBLES),
     .message = "load.npy: error: .npy: found format version 2 with a header of 2147483647 bytes"},
    {.name = "npy_ends_in_magic",
     .file = "load.npy",
     BYTES("\x93NUMPY\x01"),
     .message = "load.npy: error: .npy: found the end of the file inside the header"},
    {.name = "npy_ends_in_header",
     .file = "load.npy",
     BYTES(NPY("\x3a", "{'descr': '<f8', ")),
     .message = "load.npy: error: .npy: found the end of the file inside the header"},
    {.name = "npy_ends_in_data",
     .file = "load.npy",
     BYTES(NPY("\x39", DICTIONARY("<f8", "False", "(3,)")) TWO_DOUBLES),
     .message = "load.npy: error: .npy: found the end of the file inside the data"},
    {.name = "npy_no_rows",
     .file = "load.npy",
     BYTES(NPY("\x39", DICTIONARY("<f8", "False", "(0,)"))),
     .message = "load.history: load.npy: found no values, expected at least one"},
    {.name = "npy_nan",
     .file = "load.npy",
     BYTES(NPY("\x39", DICTIONARY("<f8", "False", "(3,)")) TWO_DOUBLES "\0\0\0\0\0\0\xf8\x7f"),
     .message = "load.npy: error: row 3, column 1: found nan, expected a finite number"},
    {.name = "npy_inf_float32",
     .file = "load.npy",
     BYTES(NPY("\x39", DICTIONARY("<f4", "False", "(2,)")) "\0\0\0\0\0\0\x80\x7f"),
     .message = "load.npy: error: row 2, column 1: found inf, expected a finite number"},
    {.name = "npy_two_columns_no_choice",
     .file = "load.npy",
     BYTES(NPY("\x3b", DICTIONARY("<f8", "False", "(1, 2)")) TWO_DOUBLES),
     .message =
         "load.npy: error: .npy: found no choice of column, expected a column number from 1 to 2"},
    {.name = "npy_column_too_high",
     .file = "load.npy",
     .options = "--set load.1.column=3",
     BYTES(NPY("\x3b", DICTIONARY("<f8", "False", "(1, 2)")) TWO_DOUBLES),
     .message = "load.npy: error: .npy: found column 3, expected a column number from 1 to 2"},
    {.name = "npy_column_by_name",
     .file = "load.npy",
     .options = "--set load.1.column=bending",
     BYTES(NPY("\x3b", DICTIONARY("<f8", "False", "(1, 2)")) TWO_DOUBLES),
     .message =
         "load.npy: error: .npy: found column bending, expected a column number from 1 to 2"},
    {.name = "utf16_little_endian",
     .file = "load.csv",
     BYTES("\xFF\xFE"
           "0\0\n\0"
           "9\0\n\0"),
     .message = "load.csv:1:1: error: found UTF-16 text, expected UTF-8"},
    {.name = "utf16_big_endian",
     .file = "load.csv",
     BYTES("\xFE\xFF\0"
           "0\0\n\0"
           "9\0\n"),
     .message = "load.csv:1:1: error: found UTF-16 text, expected UTF-8"},
    {.name = "utf16_without_mark",
     .file = "load.csv",
     BYTES("0\0\n\0"
           "9\0\n\0"),
     .message = "load.csv:1:1: error: found binary data, expected a text table or .npy"},
    {.name = "spreadsheet",
     .file = "load.xlsx",
     BYTES("PK\x03\x04\x14\0\x06\0\x08\0\0\0!\0"),
     .message = "load.xlsx:1:1: error: found binary data, expected a text table or .npy"},
    {.name = "nul_inside",
     .file = "load.csv",
     BYTES("0\n100\n5\0"
           "0\n-50\n"),
     .message = "load.csv:1:1: error: found binary data, expected a text table or .npy"},
    {.name = "no_utf8_value",
     .file = "load.csv",
     BYTES("0\n100\n@\xff\xfe\n-50\n"),
     .message = "found '\xff\xfe', expected a finite number"},
    {.name = "gz_ends_in_header",
     .file = "load.csv.gz",
     BYTES("\x1f\x8b\x08"),
     .status = 5,
     .message = "load.csv.gz: error: cannot be decompressed: "},
    {.name = "gz_of_rubbish",
     .file = "load.csv.gz",
     BYTES("\x1f\x8b\x08\0\0\0\0\0\0\x03rubbish and more of it"),
     .status = 5,
     .message = "load.csv.gz: error: cannot be decompressed: "},
};
enum { ROWS = sizeof rows / sizeof rows[0] };

enum { TEXT_BYTES = 60000 };

/* Compresses numbers that do not repeat; returns the bytes written. */
static size_t compressed_numbers(const char *path, char *bytes, size_t capacity)
{
    gzFile out = gzopen(path, "wb");
    assert_non_null(out);
    test_random random = {7};
    for (int used = 0; used < TEXT_BYTES;) {
        used += gzprintf(out, "%.6f\n", test_random_between(&random, -100.0, 100.0));
    }
    assert_int_equal(gzclose(out), Z_OK);
    FILE *in = fopen(path, "rb");
    assert_non_null(in);
    size_t size = fread(bytes, 1, capacity, in);
    fclose(in);
    assert_in_range(size, 1000, capacity - 1);
    return size;
}

/* Assesses the base case over load.csv.gz of these bytes. */
static test_result assess_bytes(const test_scratch *scratch, const char *bytes, size_t size)
{
    test_scratch_write(scratch, "load.csv.gz", bytes, size);
    char *text = bad_input_replace(bad_input_base, "[0, 200, -100, 150, 0]", "load.csv.gz");
    const char *path = test_scratch_text(scratch, "case.yaml", text);
    free(text);
    return test_shell("\"$NW\" assess '%s'", path);
}

/* Cut anywhere (in the data, in the checksum at the end) or with one bit flipped, it is refused. */
static void damaged_gz_is_refused(void **state)
{
    (void)state;
    static char bytes[1 << 17];
    test_scratch scratch = test_scratch_create();
    size_t size =
        compressed_numbers(test_scratch_path(&scratch, "load.csv.gz"), bytes, sizeof bytes);
    test_result whole = assess_bytes(&scratch, bytes, size);
    assert_int_equal(whole.status, 0);
    test_result_free(&whole);
    const size_t kept[] = {15, size / 2, size - 9, size - 8, size - 4, size - 1};
    for (size_t i = 0; i < sizeof kept / sizeof kept[0]; i++) {
        test_result cut = assess_bytes(&scratch, bytes, kept[i]);
        if (cut.status != 5 ||
            strstr(cut.err, "load.csv.gz: error: cannot be decompressed: ") == NULL) {
            fail_msg("cut to %zu of %zu bytes: status %d\n%s", kept[i], size, cut.status, cut.err);
        }
        assert_string_equal(cut.out, "");
        test_result_free(&cut);
    }
    bytes[size - 6] ^= 1;
    test_result flipped = assess_bytes(&scratch, bytes, size);
    assert_int_equal(flipped.status, 5);
    assert_non_null(strstr(flipped.err, "cannot be decompressed"));
    test_result_free(&flipped);
    test_scratch_remove(&scratch);
}

/* Without their faults the bytes above are a history, so that each is refused for its fault alone. */
static void sound_npy_is_read(void **state)
{
    (void)state;
    static const char bytes[] = NPY("\x39", DICTIONARY("<f8", "False", "(2,)")) TWO_DOUBLES;
    test_scratch scratch = test_scratch_create();
    test_scratch_write(&scratch, "load.npy", bytes, sizeof bytes - 1);
    char *text = bad_input_replace(bad_input_base, "[0, 200, -100, 150, 0]", "load.npy");
    test_result result =
        test_shell("\"$NW\" assess '%s'", test_scratch_text(&scratch, "case.yaml", text));
    free(text);
    assert_string_equal(result.err, "");
    assert_int_equal(result.status, 0);
    test_result_free(&result);
    test_scratch_remove(&scratch);
}

int main(void)
{
    struct CMUnitTest tests[ROWS + 3] = {cmocka_unit_test(bad_input_base_is_good),
                                         cmocka_unit_test(sound_npy_is_read),
                                         cmocka_unit_test(damaged_gz_is_refused)};
    bad_input_tests(rows, ROWS, tests + 3);
    return cmocka_run_group_tests_name("bad_input_binary", tests, NULL, NULL);
}
