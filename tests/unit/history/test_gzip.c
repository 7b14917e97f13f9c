/* Compressed histories: told from the content, not from the name. */
#include "support/histories.h"

#include <zlib.h>

static test_scratch scratch;

static const char *compressed(const char *name, const void *data, size_t size)
{
    const char *path = test_scratch_path(&scratch, name);
    gzFile file = gzopen(path, "wb");
    assert_non_null(file);
    assert_int_equal(gzwrite(file, data, (unsigned)size), (int)size);
    assert_int_equal(gzclose(file), Z_OK);
    return path;
}

static const double three[] = {1.5, -2.0, 300.0};

static void compressed_text(void **state)
{
    const char plain[] = "1.5\n-2\n3e2\n", table[] = "t,load\n0,1.5\n1,-2\n2,3e2\n";
    test_history_holds(compressed("h.csv.gz", plain, strlen(plain)), NULL, '.', three, 3);
    test_history_holds(compressed("no-ending", table, strlen(table)), "load", '.', three, 3);
}

static void compressed_npy(void **state)
{
    char file[128 + sizeof three];
    memset(file, ' ', sizeof file);
    memcpy(file, "\x93NUMPY\1\0\x76\0{'descr': '<f8', 'fortran_order': False, 'shape': (3,)}", 66);
    file[127] = '\n';
    memcpy(file + 128, three, sizeof three);
    test_history_holds(compressed("h.npy.gz", file, sizeof file), NULL, '.', three, 3);
}

static void longer_than_all_buffers(void **state)
{
    enum { LINES = 200000 };
    char *text = malloc(LINES * 8);
    double *values = malloc(LINES * sizeof *values);
    size_t used = 0;
    assert_true(text != NULL && values != NULL);
    for (int i = 0; i < LINES; i++) {
        values[i] = i;
        used += (size_t)sprintf(text + used, "%d\n", i);
    }
    test_samples found = test_history_read(compressed("long.gz", text, used), NULL, '.', 5000);
    assert_int_equal(found.status, NW_OK);
    assert_int_equal(found.count, LINES);
    assert_memory_equal(found.values, values, LINES * sizeof *values);
    test_samples_free(&found);
    free(text);
    free(values);
}

/* Two compressed parts one after the other are one file, as gzip itself has it. */
static void parts_joined(void **state)
{
    char *one = test_read_file(compressed("one.gz", "1.5\n-2\n", 7));
    const char *path = test_scratch_path(&scratch, "one.gz");
    gzFile file = gzopen(path, "ab");
    assert_int_equal(gzwrite(file, "3e2\n", 4), 4);
    assert_int_equal(gzclose(file), Z_OK);
    test_history_holds(path, NULL, '.', three, 3);
    free(one);
}

static long size_of(const char *path)
{
    FILE *file = fopen(path, "rb");
    assert_non_null(file);
    assert_int_equal(fseek(file, 0, SEEK_END), 0);
    long size = ftell(file);
    fclose(file);
    return size;
}

/* A download that broke off is refused, not taken for a shorter history. */
static void cut_short(void **state)
{
    char text[6000];
    size_t used = 0;
    for (int i = 0; used + 8 < sizeof text; i++) {
        used += (size_t)sprintf(text + used, "%d\n", i * 7919 % 10007);
    }
    const char *path = compressed("whole.gz", text, used);
    long size = size_of(path);
    char *whole = malloc((size_t)size);
    FILE *file = fopen(path, "rb");
    assert_int_equal(fread(whole, 1, (size_t)size, file), (size_t)size);
    fclose(file);
    for (long length = 20; length < size; length += 97) {
        path = test_scratch_write(&scratch, "cut.gz", whole, (size_t)length);
        test_samples found = test_history_read(path, NULL, '.', 100);
        assert_int_not_equal(found.status, NW_OK);
        test_samples_free(&found);
    }
    whole[size / 2] ^= 0x55; /* damaged: the checksum or the code does not hold */
    path = test_scratch_write(&scratch, "cut.gz", whole, (size_t)size);
    test_samples found = test_history_read(path, NULL, '.', 100);
    assert_int_not_equal(found.status, NW_OK);
    test_samples_free(&found);
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
        cmocka_unit_test(compressed_text),
        cmocka_unit_test(compressed_npy),
        cmocka_unit_test(longer_than_all_buffers),
        cmocka_unit_test(parts_joined),
        cmocka_unit_test(cut_short),
    };
    return cmocka_run_group_tests(tests, make_scratch, remove_scratch);
}
