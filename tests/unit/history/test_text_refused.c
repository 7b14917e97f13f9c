/* Text histories that are refused, and where the fault is said to be. */
#include "support/histories.h"

static test_scratch scratch;

static void refused(const char *text, const char *column, char decimal, size_t line,
                    size_t place_column, const char *word)
{
    test_history_refused(test_scratch_text(&scratch, "h.csv", text), column, decimal, NW_INPUT,
                         line, place_column, word);
}

static void what_is_no_finite_number(void **state)
{
    refused("1\n2\nnan\n", NULL, '.', 3, 1, "'nan', expected a finite number");
    refused("1\n2\nNaN\n", NULL, '.', 3, 1, "'NaN'");
    refused("1\n-inf\n2\n", NULL, '.', 2, 1, "'-inf'");
    refused("1\nInfinity\n", NULL, '.', 2, 1, "'Infinity'");
    refused("nan\n1\n", NULL, '.', 1, 1, "'nan'"); /* no header */
    refused("1\n1e999\n", NULL, '.', 2, 1, "'1e999'");
    refused("1\n12x\n", NULL, '.', 2, 1, "'12x'");
    refused("1\n0x1F\n", NULL, '.', 2, 1, "'0x1F'");
    refused("t,load\n0,1\n1,abc\n", "load", '.', 3, 3, "'abc'");
    refused("t,load\n0,1\n1,\n", "load", '.', 3, 3, "empty field");
    refused("t,load\n0,1\n1,  \n", "load", '.', 3, 3, "empty field");
}

static void ragged_rows(void **state)
{
    refused("t,load\n0,1\n1\n", "load", '.', 3, 1, "1 field in this row, expected 2");
    refused("t,load\n0,1\n1,2,3\n", "load", '.', 3, 1, "3 fields in this row, expected 2");
    refused("t,load\n0,1,2\n", "load", '.', 2, 1, "as in the header");
    refused("1\n2\n2 3\n", NULL, '.', 3, 1, "found '2 3'");
}

/* Without a header the first row says how many fields there are. */
static void second_row_is_ragged(void **state)
{
    refused("1\n2 3\n4 5\n", NULL, '.', 2, 1, "2");
}

static void decimal_sign(void **state)
{
    refused("1,5\n2,5\n", NULL, '.', 1, 1, "several columns");
    refused("0;1,5\n1;2,5\n", "2", '.', 1, 3, "decimal commas");
    refused("1.5\n2.5\n", NULL, ',', 1, 1, "found '1.5'");
}

static void columns(void **state)
{
    refused("t,load\n0,1\n", NULL, '.', 1, 1, "no choice");
    refused("t,load\n0,1\n", "laod", '.', 1, 1, "2 'load'");
    refused("t,load\n0,1\n", "3", '.', 1, 1, "no column '3'");
    refused("t,load\n0,1\n", "0", '.', 1, 1, "no column '0'");
    refused("t,load\n0,1\n", "-1", '.', 1, 1, "no column '-1'");
    refused("t,load\n0,1\n", "", '.', 1, 1, "no column");
}

static void nothing_in_it(void **state)
{
    refused("", NULL, '.', 1, 1, "no values");
    refused("\n\n  \n", NULL, '.', 4, 1, "no values");
    refused("# only\n# comments\n", NULL, '.', 3, 1, "no values");
    refused("load\n", NULL, '.', 2, 1, "a header and no values");
}

static void other_encodings(void **state)
{
    const char little[] = "\xFF\xFE"
                          "1\0"
                          "\n\0",
               big[] = "\xFE\xFF\0"
                       "1\0"
                       "\n";
    const char binary[] = "MATLAB 5.0\0\0\1\0IM";
    test_history_refused(test_scratch_write(&scratch, "b", little, sizeof little - 1), NULL, '.',
                         NW_INPUT, 1, 1, "UTF-16");
    test_history_refused(test_scratch_write(&scratch, "b", big, sizeof big - 1), NULL, '.',
                         NW_INPUT, 1, 1, "UTF-16");
    test_history_refused(test_scratch_write(&scratch, "b", binary, sizeof binary - 1), NULL, '.',
                         NW_INPUT, 1, 1, "binary");
}

/* Bytes of zero later in the file are no numbers either. */
static void zero_bytes_later(void **state)
{
    char text[4096];
    for (size_t i = 0; i < sizeof text; i += 2) {
        memcpy(text + i, "1\n", 2);
    }
    text[3000] = '\0';
    const char *path = test_scratch_write(&scratch, "z.csv", text, sizeof text);
    test_history_refused(path, NULL, '.', NW_INPUT, 1501, 1, "finite number");
}

static void endless_line(void **state)
{
    size_t size = 600000;
    char *text = malloc(size);
    assert_non_null(text);
    memset(text, '1', size);
    const char *path = test_scratch_write(&scratch, "long.csv", text, size);
    test_history_refused(path, NULL, '.', NW_INPUT, 1, 1, "line of more than");
    memcpy(text, "1\n2\n", 4);
    path = test_scratch_write(&scratch, "long.csv", text, size);
    test_history_refused(path, NULL, '.', NW_INPUT, 3, 1, "line of more than");
    free(text);
}

/* Lines are counted across buffers, comments and both kinds of line end. */
static void line_number_far_down(void **state)
{
    enum { LINES = 100000 };
    char *text = malloc(LINES * 16);
    size_t used = 0;
    assert_non_null(text);
    for (int i = 1; i < LINES; i++) {
        used += (size_t)sprintf(text + used,
                                i % 3 == 0   ? "# %d\n"
                                : i % 3 == 1 ? "%d\r\n"
                                             : "%d\n",
                                i);
    }
    used += (size_t)sprintf(text + used, "  oops\n");
    const char *path = test_scratch_write(&scratch, "far.csv", text, used);
    test_history_refused(path, NULL, '.', NW_INPUT, LINES, 3, "'oops'");
    free(text);
}

static void files_that_are_not_there(void **state)
{
    test_history_refused(test_scratch_path(&scratch, "none.csv"), NULL, '.', NW_FILE, 0, 0,
                         "opened");
    test_history_refused(scratch.path, NULL, '.', NW_FILE, 0, 0, "read"); /* a folder */
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
        cmocka_unit_test(what_is_no_finite_number),
        cmocka_unit_test(ragged_rows),
        cmocka_unit_test(decimal_sign),
        cmocka_unit_test(second_row_is_ragged),
        cmocka_unit_test(columns),
        cmocka_unit_test(nothing_in_it),
        cmocka_unit_test(other_encodings),
        cmocka_unit_test(zero_bytes_later),
        cmocka_unit_test(endless_line),
        cmocka_unit_test(line_number_far_down),
        cmocka_unit_test(files_that_are_not_there),
    };
    return cmocka_run_group_tests(tests, make_scratch, remove_scratch);
}
