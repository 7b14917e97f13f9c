/* YAML as a tree that knows its places, what it refuses, and --set paths. */
#include "base/tree.h"
#include "support/support.h"

static nw_diagnostics diagnostics;

static nw_node *parse(const char *text)
{
    nw_node *root = NULL;
    nw_diagnostics_clear(&diagnostics);
    nw_status status = nw_tree_parse(text, strlen(text), "t.yaml", &root, &diagnostics);
    if (status != NW_OK) {
        fail_msg("refused: %s", diagnostics.items[0].message);
    }
    return root;
}

/* Refused at a place, with the word in the message. */
static void refused(const char *text, size_t length, size_t line, size_t column, const char *word)
{
    nw_node *root = NULL;
    nw_diagnostics_clear(&diagnostics);
    assert_int_equal(nw_tree_parse(text, length, "t.yaml", &root, &diagnostics), NW_INPUT);
    assert_null(root);
    assert_true(diagnostics.count >= 1);
    const nw_diagnostic *d = &diagnostics.items[0];
    assert_string_equal(d->place.file, "t.yaml");
    assert_int_equal(d->place.line, line);
    assert_int_equal(d->place.column, column);
    if (strstr(d->message, word) == NULL) {
        fail_msg("'%s' lacks '%s'", d->message, word);
    }
}

static void assert_place(nw_place place, size_t line, size_t column)
{
    assert_string_equal(place.file, "t.yaml");
    assert_int_equal(place.line, line);
    assert_int_equal(place.column, column);
}

static void every_node_knows_its_place(void **state)
{
    nw_node *root = parse("a: 1\n"
                          "notch:\n"
                          "  kt:   2.35\n"
                          "load:\n"
                          "  - history: [0, 310]\n");
    assert_place(nw_node_place(root), 1, 1);
    const nw_node *notch = nw_node_entry(root, "notch");
    const nw_node *kt = nw_node_entry(notch, "kt");
    assert_place(nw_node_key_place(notch), 2, 1);
    assert_place(nw_node_place(notch), 3, 3);
    assert_place(nw_node_key_place(kt), 3, 3);
    assert_place(nw_node_place(kt), 3, 9);
    assert_string_equal(kt->scalar, "2.35");
    const nw_node *load = nw_node_entry(root, "load");
    assert_int_equal(load->kind, NW_NODE_LIST);
    const nw_node *history = nw_node_entry(load->children[0], "history");
    assert_int_equal(history->count, 2);
    assert_place(nw_node_place(history->children[1]), 5, 18);
    assert_null(nw_node_entry(root, "nothing"));
    assert_null(nw_node_entry(kt, "nothing"));
    nw_node_free(root);
}

static void quotes_are_noted(void **state)
{
    nw_node *root = parse("a: \"1\"\nb: 1\nc: '2'\n");
    assert_true(nw_node_entry(root, "a")->quoted);
    assert_false(nw_node_entry(root, "b")->quoted);
    assert_true(nw_node_entry(root, "c")->quoted);
    nw_node_free(root);
}

static void duplicate_keys(void **state)
{
    const char text[] = "kt: 2\nkf: 1\nkt: 3\n";
    refused(text, strlen(text), 3, 1, "twice, first on line 1");
}

/* All of them, not only the first. */
static void every_duplicate_is_told(void **state)
{
    const char text[] = "a: 1\na: 2\nb: {c: 1, c: 2}\n";
    refused(text, strlen(text), 2, 1, "'a' twice");
    assert_int_equal(diagnostics.count, 2);
    assert_int_equal(diagnostics.items[1].place.line, 3);
    assert_int_equal(diagnostics.items[1].place.column, 11);
}

static void anchors_aliases_and_tags(void **state)
{
    const char alias[] = "a: &x 1\nb: *x\n", tag[] = "a: !!str 1\n", only[] = "b: *x\n";
    refused(alias, strlen(alias), 1, 4, "anchor");
    refused(tag, strlen(tag), 1, 4, "tag");
    refused(only, strlen(only), 1, 4, "alias");
}

static void keys_are_plain_words(void **state)
{
    const char list[] = "? [a, b]\n: 1\n", map[] = "{a: 1}: 2\n";
    refused(list, strlen(list), 1, 3, "as a key");
    refused(map, strlen(map), 1, 1, "as a key");
}

static void depth_is_limited(void **state)
{
    char text[200];
    memset(text, '[', NW_TREE_DEPTH);
    memset(text + NW_TREE_DEPTH, ']', NW_TREE_DEPTH);
    text[2 * NW_TREE_DEPTH] = '\0';
    nw_node_free(parse(text));
    memset(text, '[', NW_TREE_DEPTH + 1);
    memset(text + NW_TREE_DEPTH + 1, ']', NW_TREE_DEPTH + 1);
    refused(text, 2 * NW_TREE_DEPTH + 2, 1, NW_TREE_DEPTH + 1, "nesting");
}

/* A million brackets end in a message, not in the stack. */
static void depth_is_refused_early(void **state)
{
    size_t size = 1000000;
    char *text = malloc(size);
    memset(text, '[', size);
    refused(text, size, 1, NW_TREE_DEPTH + 1, "nesting");
    free(text);
}

static void broken_yaml(void **state)
{
    const char open[] = "a: [1, 2\nb: 3\n", two[] = "a: 1\n---\nb: 2\n", nul[] = "a: \"x\\0y\"\n";
    nw_node *root = NULL;
    nw_diagnostics_clear(&diagnostics);
    assert_int_equal(nw_tree_parse(open, strlen(open), "t.yaml", &root, &diagnostics), NW_INPUT);
    assert_non_null(strstr(diagnostics.items[0].message, "not valid YAML"));
    assert_int_equal(diagnostics.items[0].place.line, 2);
    refused(two, strlen(two), 2, 1, "second YAML document");
    refused(nul, strlen(nul), 1, 4, "NUL");
    refused("", 0, 1, 1, "nothing");
    refused("# only a comment\n", 17, 1, 1, "nothing");
}

static void missing_file(void **state)
{
    nw_node *root = NULL;
    nw_diagnostics_clear(&diagnostics);
    assert_int_equal(nw_tree_read("no/such/file.yaml", &root, &diagnostics), NW_FILE);
    assert_null(root);
    assert_int_equal(diagnostics.count, 1);
}

/* ---- --set ---- */

static void set_good(nw_node *root, const char *path, const char *value)
{
    nw_diagnostics_clear(&diagnostics);
    assert_int_equal(nw_tree_set(root, path, value, "--set x", &diagnostics), NW_OK);
}

static void set_refused(nw_node *root, const char *path, const char *value, const char *word)
{
    nw_diagnostics_clear(&diagnostics);
    assert_int_equal(nw_tree_set(root, path, value, "--set x", &diagnostics), NW_INPUT);
    assert_string_equal(diagnostics.items[0].place.file, "--set x");
    assert_non_null(strstr(diagnostics.items[0].message, word));
}

static const char case_text[] =
    "notch:\n  rule: neuber\nload:\n  - {repeats: 1}\n  - {repeats: 2}\n";

static void settings_replace_and_add(void **state)
{
    nw_node *root = parse(case_text);
    set_good(root, "notch.rule", "esed");
    set_good(root, "load.2.repeats", "7");
    set_good(root, "load.1", "{repeats: 5, scale: 1 MPa}");
    set_good(root, "life.mean_stress", "walker"); /* a section that is not there */
    set_good(root, "title", "\"x: y\"");
    const nw_node *load = nw_node_entry(root, "load");
    assert_string_equal(nw_node_entry(nw_node_entry(root, "notch"), "rule")->scalar, "esed");
    assert_string_equal(nw_node_entry(load->children[1], "repeats")->scalar, "7");
    assert_string_equal(nw_node_entry(load->children[0], "scale")->scalar, "1 MPa");
    assert_string_equal(nw_node_entry(nw_node_entry(root, "life"), "mean_stress")->scalar,
                        "walker");
    assert_string_equal(nw_node_entry(root, "title")->scalar, "x: y");
    assert_string_equal(nw_node_place(nw_node_entry(root, "title")).file, "--set x");
    nw_node_free(root);
}

static void settings_that_name_no_place(void **state)
{
    nw_node *root = parse(case_text);
    set_refused(root, "load.0.repeats", "1", "from 1 to 2");
    set_refused(root, "load.3.repeats", "1", "from 1 to 2");
    set_refused(root, "load.one", "1", "from 1 to 2");
    set_refused(root, "load.-1", "1", "from 1 to 2");
    set_refused(root, "notch.rule.deep", "1", "no place");
    set_refused(root, "notch..rule", "1", "no place");
    set_refused(root, "", "1", "no place");
    set_refused(root, "notch.", "1", "no place");
    set_refused(root, "notch.kt", "", "nothing");
    set_refused(root, "notch.kt", "[1", "YAML");
    assert_string_equal(nw_node_entry(nw_node_entry(root, "notch"), "rule")->scalar, "neuber");
    nw_node_free(root);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(every_node_knows_its_place),
        cmocka_unit_test(quotes_are_noted),
        cmocka_unit_test(duplicate_keys),
        cmocka_unit_test(every_duplicate_is_told),
        cmocka_unit_test(anchors_aliases_and_tags),
        cmocka_unit_test(keys_are_plain_words),
        cmocka_unit_test(depth_is_limited),
        cmocka_unit_test(depth_is_refused_early),
        cmocka_unit_test(broken_yaml),
        cmocka_unit_test(missing_file),
        cmocka_unit_test(settings_replace_and_add),
        cmocka_unit_test(settings_that_name_no_place),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
