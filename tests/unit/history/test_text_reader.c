/* CSV, TSV and blank-separated histories that are to be read. */
#include "support/histories.h"

static test_scratch scratch;

static void holds(const char *text, const char *column, char decimal, const double *values,
                  size_t count)
{
    test_history_holds(test_scratch_text(&scratch, "h.csv", text), column, decimal, values, count);
}

static const double three[] = {1.5, -2.0, 300.0};

static void one_number_a_line(void **state)
{
    holds("1.5\n-2\n3e2\n", NULL, '.', three, 3);
    holds("1.5\n-2\n3e2", NULL, '.', three, 3); /* no end to the last line */
    holds("1.5\r\n-2\r\n3e2\r\n", NULL, '.', three, 3);
    holds("\xEF\xBB\xBF"
          "1.5\n-2\n3e2\n",
          NULL, '.', three, 3);
    holds("  1.5 \n  -2\t\n 3e2\n", NULL, '.', three, 3);
    holds("+1.5\n-2.\n+3.00e+02\n", NULL, '.', three, 3);
    holds("\"1.5\"\n\"-2\"\n\" 3e2 \"\n", NULL, '.', three, 3);
}

static void comments_and_empty_lines(void **state)
{
    holds("# logger 7\n\n1.5 # first\n   \n-2#x\n# between\n3e2\n\n#end", NULL, '.', three, 3);
    holds("\r\n\r\n# c\r\n1.5\r\n\r\n-2\r\n3e2\r\n\r\n", NULL, '.', three, 3);
}

static void headers(void **state)
{
    holds("load\n1.5\n-2\n3e2\n", NULL, '.', three, 3);
    holds("# c\nload\n# c\n1.5\n-2\n3e2\n", NULL, '.', three, 3);
    holds("time,load\n0,1.5\n1,-2\n2,3e2\n", "load", '.', three, 3);
    holds("time,load\n0,1.5\n1,-2\n2,3e2\n", "2", '.', three, 3);
    holds("0,1.5\n1,-2\n2,3e2\n", "2", '.', three, 3);
    holds("2,1\n1.5,0\n-2,1\n3e2,2\n", "1", '.', (const double[]){2, 1.5, -2, 300}, 4);
    holds("\"time\";\"load, left\"\n0;1.5\n1;-2\n2;3e2\n", "load, left", '.', three, 3);
    holds("t , load \n0 , 1.5 \n1, -2\n2,3e2\n", "load", '.', three, 3);
}

/* A name may start with a digit; by number a column is meant only where no name fits. */
static void names_with_digits(void **state)
{
    holds("t,2nd gauge\n0,1.5\n1,-2\n2,3e2\n", "2nd gauge", '.', three, 3);
    holds("t,1P_bending\n0,1.5\n1,-2\n2,3e2\n", "2", '.', three, 3);
}

static void delimiters(void **state)
{
    holds("t\tload\n0\t1.5\n1\t-2\n2\t3e2\n", "load", '.', three, 3);
    holds("t;load\n0;1.5\n1;-2\n2;3e2\n", "load", '.', three, 3);
    holds("t load\n0 1.5\n1   -2\n2 3e2\n", "load", '.', three, 3);
    holds("  0   1.5\n  1    -2\n 10   3e2\n", "2", '.', three, 3);
    holds("0, 1.5\n1, -2\n2, 3e2\n", "2", '.', three, 3);
}

static void decimal_commas(void **state)
{
    holds("1,5\n-2,0\n3,00e2\n", NULL, ',', three, 3);
    holds("t;load\n0,0;1,5\n0,1;-2\n0,2;300\n", "load", ',', three, 3);
    holds("0,0\t1,5\n0,1\t-2\n0,2\t300\n", "2", ',', three, 3);
    holds("0,0 1,5\n0,1 -2\n0,2 300\n", "2", ',', three, 3);
}

static void unit_is(const char *text, const char *column, const char *unit)
{
    const char *path = test_scratch_text(&scratch, "u.csv", text);
    test_samples found = test_history_read(path, column, '.', 16);
    assert_int_equal(found.status, NW_OK);
    assert_string_equal(found.unit, unit);
    test_samples_free(&found);
}

static void units_in_headers(void **state)
{
    unit_is("load[MPa]\n1\n2\n", NULL, "MPa");
    unit_is("load [MPa]\n1\n2\n", "load", "MPa");
    unit_is("t[s],load[ksi]\n1,2\n", "load", "ksi");
    unit_is("t[s],load[ksi]\n1,2\n", "load[ksi]", "ksi");
    unit_is("t[s],load[ksi]\n1,2\n", "1", "s");
    unit_is("t,load\n1,2\n", "load", "");
    unit_is("1\n2\n", NULL, "");
}

/* ---- longer than the reader's buffer of 256 KiB ---- */

/* A number that tells its own place, of random width so that every byte of a line meets the boundary. */
static double write_sample(char *to, size_t *used, test_random *random, int number)
{
    double value = number + 0.5;
    int width = test_random_int(random, 1, 24);
    *used += (size_t)sprintf(to + *used, "%*.1f%s", width, value,
                             test_random_int(random, 0, 1) == 0 ? "\n" : "\r\n");
    return value;
}

static void assert_long_file(uint64_t seed, const char *before, const char *column)
{
    enum { SAMPLES = 60000, MOST = 40 };
    test_random random = {seed};
    char *text = malloc((size_t)SAMPLES * MOST);
    double *values = malloc(SAMPLES * sizeof *values);
    size_t used = 0;
    assert_true(text != NULL && values != NULL);
    for (int i = 0; i < SAMPLES; i++) {
        memcpy(text + used, before, strlen(before));
        used += strlen(before);
        values[i] = write_sample(text, &used, &random, i - SAMPLES / 2);
    }
    assert_true(used > 2 * (1 << 18));
    const char *path = test_scratch_write(&scratch, "long.csv", text, used);
    test_samples found = test_history_read(path, column, '.', 1000);
    assert_int_equal(found.status, NW_OK);
    assert_int_equal(found.count, SAMPLES);
    for (int i = 0; i < SAMPLES; i++) {
        assert_near(found.values[i], values[i], 0.0, 0.0);
    }
    test_samples_free(&found);
    free(text);
    free(values);
}

static void lines_across_the_buffer(void **state)
{
    for (uint64_t seed = 1; seed <= 12; seed++) {
        assert_long_file(seed, "", NULL);
        assert_long_file(seed, "7,", "2");
    }
}

/* Files that end just before, at and after the end of the buffer, with and without a last line end. */
static void files_as_long_as_the_buffer(void **state)
{
    enum { BUFFER = 1 << 18 };
    char *text = malloc(BUFFER + 16);
    assert_non_null(text);
    for (int more = -3; more <= 3; more++) {
        size_t size = (size_t)(BUFFER + more), lines = 0, last = 0;
        memset(text, '1', size);
        for (size_t i = 7; i + 4 < size; i += 8, lines++) {
            text[i] = '\n';
            last = i;
        }
        for (int ended = 0; ended < 2; ended++) {
            text[size - 1] = ended == 1 ? '\n' : '1';
            const char *path = test_scratch_write(&scratch, "edge.csv", text, size);
            test_samples found = test_history_read(path, NULL, '.', 5000);
            assert_int_equal(found.status, NW_OK);
            assert_int_equal(found.count, lines + 1);
            size_t digits = size - last - 1 - (size_t)ended;
            assert_near(found.values[lines], floor(pow(10.0, (double)digits) / 9.0), 0.0, 0.0);
            test_samples_free(&found);
        }
    }
    free(text);
}

/* More comment than the buffer holds, before the first line and before the second. */
static void assert_after_comments(const char *first, const char *values, const char *column)
{
    size_t lines = 9000, size = 0;
    char *text = malloc(lines * 40);
    assert_non_null(text);
    size += (size_t)sprintf(text, "%s", first);
    for (size_t i = 0; i < lines; i++) {
        size += (size_t)sprintf(text + size, "# comment line %zu of the logger\n", i);
    }
    size += (size_t)sprintf(text + size, "%s", values);
    assert_true(size > 1 << 18);
    test_history_holds(test_scratch_write(&scratch, "c.csv", text, size), column, '.', three, 3);
    free(text);
}

static void long_comments_first(void **state)
{
    assert_after_comments("", "1.5\n-2\n3e2\n", NULL);
    assert_after_comments("", "t,load\n0,1.5\n1,-2\n2,3e2\n", "load");
    assert_after_comments("1.5\n", "-2\n3e2\n", NULL);
}

static void long_comments_below_the_header(void **state)
{
    assert_after_comments("load\n", "1.5\n-2\n3e2\n", NULL);
    assert_after_comments("t,load\n", "0,1.5\n1,-2\n2,3e2\n", "load");
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
        cmocka_unit_test(one_number_a_line),
        cmocka_unit_test(comments_and_empty_lines),
        cmocka_unit_test(headers),
        cmocka_unit_test(names_with_digits),
        cmocka_unit_test(delimiters),
        cmocka_unit_test(decimal_commas),
        cmocka_unit_test(units_in_headers),
        cmocka_unit_test(lines_across_the_buffer),
        cmocka_unit_test(files_as_long_as_the_buffer),
        cmocka_unit_test(long_comments_first),
        cmocka_unit_test(long_comments_below_the_header),
    };
    return cmocka_run_group_tests(tests, make_scratch, remove_scratch);
}
