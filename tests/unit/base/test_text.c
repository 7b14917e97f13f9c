/* Nearest words, bounded building, and paths. */
#include "base/text.h"
#include "support/support.h"

static const char *const rules[] = {"neuber", "esed", "linear", "limit_load", "curve", NULL};

static void assert_nearest(const char *word, const char *expected)
{
    const char *found = nw_text_nearest(word, rules);
    if (expected == NULL) {
        assert_null(found);
    } else {
        assert_non_null(found);
        assert_string_equal(found, expected);
    }
}

static void nearest_is_what_a_typist_meant(void **state)
{
    assert_nearest("nueber", "neuber"); /* swapped neighbours */
    assert_nearest("neubr", "neuber");
    assert_nearest("neubber", "neuber");
    assert_nearest("Neuber", "neuber");
    assert_nearest("limitload", "limit_load");
    assert_nearest("limit-load", "limit_load");
    assert_nearest("liner", "linear");
    assert_nearest("esde", "esed");
    assert_nearest("curve", "curve");
}

/* A swap of neighbours is one slip: two of a two-letter word would be too many. */
static void swapped_neighbours_are_one_slip(void **state)
{
    const char *const words[] = {"kt", "kf", NULL};
    assert_string_equal(nw_text_nearest("tk", words), "kt");
    assert_null(nw_text_nearest("xy", words));
}

static void far_words_have_no_nearest(void **state)
{
    assert_nearest("ramberg_osgood", NULL);
    assert_nearest("xyz", NULL);
    assert_nearest("", NULL);
}

/* A word longer than any key is near to none of them. */
static void endless_words_have_no_nearest(void **state)
{
    char long_word[300];
    memset(long_word, 'n', sizeof long_word - 1);
    long_word[sizeof long_word - 1] = '\0';
    assert_nearest(long_word, NULL);
}

static void the_closer_candidate_wins(void **state)
{
    const char *const words[] = {"scale", "scales", "scaled", NULL};
    assert_string_equal(nw_text_nearest("scaled", words), "scaled");
    assert_string_equal(nw_text_nearest("scal", words), "scale");
    const char *const none[] = {NULL};
    assert_null(nw_text_nearest("scale", none));
}

static void builder_never_overruns(void **state)
{
    char text[12];
    memset(text, '!', sizeof text);
    nw_text_builder out = nw_text_builder_on(text, 8);
    nw_text_add(&out, "%s", "abc");
    nw_text_add(&out, "%d", 12345678);
    nw_text_add(&out, "%s", "more");
    assert_string_equal(text, "abc1234");
    assert_int_equal(text[8], '!');
    assert_int_equal(out.length, 7);
}

static void copy_cuts_and_ends(void **state)
{
    char text[5];
    nw_text_copy(text, sizeof text, "abcdefgh");
    assert_string_equal(text, "abcd");
    nw_text_copy(text, sizeof text, "");
    assert_string_equal(text, "");
}

static void joined_words(void **state)
{
    char text[100];
    const char *const one[] = {"a", NULL};
    const char *const two[] = {"a", "b", NULL};
    assert_string_equal(nw_text_join(text, sizeof text, one), "a");
    assert_string_equal(nw_text_join(text, sizeof text, two), "a or b");
    assert_string_equal(nw_text_join(text, sizeof text, rules),
                        "neuber, esed, linear, limit_load or curve");
}

static void endings(void **state)
{
    assert_true(nw_text_ends("a.yaml", ".yaml"));
    assert_false(nw_text_ends("yaml", ".yaml"));
    assert_true(nw_text_ends("x", ""));
}

static void assert_beside(const char *file, const char *name, const char *expected)
{
    char *path = nw_text_beside(file, name);
    assert_string_equal(path, expected);
    free(path);
}

static void files_stand_beside_the_case(void **state)
{
    assert_beside("cases/one.yaml", "load.csv", "cases/load.csv");
    assert_beside("one.yaml", "load.csv", "load.csv");
    assert_beside("cases/one.yaml", "/data/load.csv", "/data/load.csv");
    assert_beside("/one.yaml", "../load.csv", "/../load.csv");
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(nearest_is_what_a_typist_meant),
        cmocka_unit_test(swapped_neighbours_are_one_slip),
        cmocka_unit_test(far_words_have_no_nearest),
        cmocka_unit_test(endless_words_have_no_nearest),
        cmocka_unit_test(the_closer_candidate_wins),
        cmocka_unit_test(builder_never_overruns),
        cmocka_unit_test(copy_cuts_and_ends),
        cmocka_unit_test(joined_words),
        cmocka_unit_test(endings),
        cmocka_unit_test(files_stand_beside_the_case),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
