/* The example that ships: it runs, says first what matters, and the places it names are the right ones. */
#include "support/support.h"

#include <jansson.h>

#define FOLDER TEST_SOURCE_DIR "/examples/forwarder-axle/"

/* As the case file states them; example_states_these() looks there. */
static const double scale_mpa = 11.88, kt = 2.04;

static void example_states_these(void **state)
{
    (void)state;
    char *text = test_read_file(FOLDER "case.yaml");
    assert_non_null(strstr(text, "kt: 2.04\n"));
    const char *at = text;
    for (int i = 0; i < 3; i++) {
        at = strstr(at, "scale: 11.88 MPa\n");
        assert_non_null(at);
        at++;
    }
    free(text);
}

/* A history of the example, read here without the library. */
typedef struct samples {
    double *values;
    size_t count;
} samples;

static void add(samples *to, double value)
{
    if ((to->count & (to->count - 1)) == 0) {
        to->values = realloc(to->values, 2 * (to->count + 1) * sizeof *to->values);
        assert_non_null(to->values);
    }
    to->values[to->count++] = value;
}

/* Second column of a table after comments and one line of names. */
static samples read_table(const char *path)
{
    FILE *file = fopen(path, "r");
    assert_non_null(file);
    samples out = {NULL, 0};
    char line[200];
    while (fgets(line, sizeof line, file) != NULL) {
        double value;
        if (sscanf(line, "%*f%*1[,\t]%lf", &value) == 1) {
            add(&out, value);
        }
    }
    fclose(file);
    return out;
}

/* Version 1 of the format: 10 bytes, the header's text, then float32 values. */
static samples read_npy(const char *path)
{
    FILE *file = fopen(path, "rb");
    assert_non_null(file);
    unsigned char start[10];
    assert_int_equal(fread(start, 1, 10, file), 10);
    assert_memory_equal(start, "\x93NUMPY\x01", 7);
    assert_int_equal(fseek(file, 10 + start[8] + 256 * start[9], SEEK_SET), 0);
    samples out = {NULL, 0};
    float value;
    while (fread(&value, sizeof value, 1, file) == 1) {
        add(&out, (double)value);
    }
    fclose(file);
    return out;
}

static samples read_samples(const char *name)
{
    char path[600];
    snprintf(path, sizeof path, "%s%s", FOLDER, name);
    return strstr(name, ".npy") != NULL ? read_npy(path) : read_table(path);
}

enum { EVENTS = 3 };

static json_t *assess_json(void)
{
    test_result result = test_shell("\"$NW\" assess '" FOLDER "case.yaml' --format json");
    assert_int_equal(result.status, 0);
    json_t *root = json_loads(result.out, 0, NULL);
    assert_non_null(root);
    test_result_free(&result);
    return root;
}

static double number(const json_t *object, const char *key)
{
    const json_t *value = json_object_get(object, key);
    assert_true(json_is_number(value));
    return json_number_value(value);
}

static const json_t *events_of(const json_t *root)
{
    const json_t *events = json_object_get(json_object_get(root, "block"), "events");
    assert_int_equal(json_array_size(events), EVENTS);
    return events;
}

static const char *history_of(const json_t *object)
{
    return json_string_value(json_object_get(object, "history"));
}

static void all_samples_count(void **state)
{
    (void)state;
    json_t *root = assess_json();
    double total = 0.0, files = 0.0;
    for (size_t i = 0; i < EVENTS; i++) {
        const json_t *event = json_array_get(events_of(root), i);
        samples all = read_samples(history_of(event));
        files += (double)all.count;
        total += number(event, "repeats") * (double)all.count;
        free(all.values);
    }
    assert_true(files >= 100000.0);
    assert_near(number(json_object_get(root, "block"), "samples"), total, 0.0, 0.0);
    json_decref(root);
}

/* Notch stress of the sample that a loop names. */
static double load_at(const samples *all, const json_t *place)
{
    size_t event = (size_t)number(place, "event") - 1, sample = (size_t)number(place, "sample") - 1;
    assert_true(event < EVENTS && sample < all[event].count);
    return kt * scale_mpa * all[event].values[sample];
}

/* Tips of every loop, looked up in the files: same product of three factors, so rounding alone differs. */
static void loops_name_the_samples_that_make_them(void **state)
{
    (void)state;
    json_t *root = assess_json();
    samples all[EVENTS];
    bool met[EVENTS] = {false};
    for (size_t i = 0; i < EVENTS; i++) {
        all[i] = read_samples(history_of(json_array_get(events_of(root), i)));
    }
    size_t index;
    const json_t *loop;
    json_array_foreach(json_object_get(root, "loops"), index, loop)
    {
        const json_t *start = json_object_get(loop, "start"), *tip = json_object_get(loop, "tip");
        double a = load_at(all, start), b = load_at(all, tip);
        assert_near(fmax(a, b), number(loop, "load_max_mpa"), 1e-12, 1e-9);
        assert_near(fmin(a, b), number(loop, "load_min_mpa"), 1e-12, 1e-9);
        met[(size_t)number(start, "event") - 1] = met[(size_t)number(tip, "event") - 1] = true;
    }
    assert_true(index > 1000 && met[0] && met[1] && met[2]);
    for (size_t i = 0; i < EVENTS; i++) {
        free(all[i].values);
    }
    json_decref(root);
}

/* The extremes of the block are those of the files. */
static void extremes_of_the_block(void **state)
{
    (void)state;
    json_t *root = assess_json();
    double highest = -INFINITY, lowest = INFINITY;
    for (size_t i = 0; i < EVENTS; i++) {
        samples all = read_samples(history_of(json_array_get(events_of(root), i)));
        for (size_t k = 0; k < all.count; k++) {
            highest = fmax(highest, kt * scale_mpa * all.values[k]);
            lowest = fmin(lowest, kt * scale_mpa * all.values[k]);
        }
        free(all.values);
    }
    const json_t *block = json_object_get(root, "block");
    assert_near(number(block, "load_max_mpa"), highest, 1e-12, 0.0);
    assert_near(number(block, "load_min_mpa"), lowest, 1e-12, 0.0);
    json_decref(root);
}

/* Title, empty line, then the verdict before anything else; cautions beside what they qualify. */
static void text_says_first_what_matters(void **state)
{
    (void)state;
    test_result result = test_shell("\"$NW\" assess '" FOLDER "case.yaml'");
    test_result strict = test_shell("\"$NW\" assess '" FOLDER "case.yaml' --require-target");
    json_t *root = assess_json();
    char head[200], place[200];
    bool reached = json_is_true(json_object_get(json_object_get(root, "target"), "reached"));
    snprintf(head, sizeof head, "%s\n\n%s  about ",
             json_string_value(json_object_get(root, "title")),
             reached ? "TARGET REACHED" : "TARGET MISSED");
    assert_memory_equal(result.out, head, strlen(head));
    assert_int_equal(strict.status, reached ? 0 : 1);
    assert_string_equal(strict.out, result.out);
    assert_non_null(strstr(result.out, "    ! "));
    assert_non_null(strstr(result.out, "Applicable codes"));
    assert_non_null(strstr(result.out, "3 events, "));
    const json_t *worst = json_array_get(json_object_get(root, "loops"), 0);
    const json_t *start = json_object_get(worst, "start"), *tip = json_object_get(worst, "tip");
    assert_near(number(start, "event"), number(tip, "event"), 0.0, 0.0);
    const json_t *event = json_array_get(events_of(root), (size_t)number(start, "event") - 1);
    snprintf(place, sizeof place, "%s: samples %.0f and %.0f\n", history_of(event),
             number(start, "sample"), number(tip, "sample"));
    assert_non_null(strstr(result.out, place));
    json_decref(root);
    test_result_free(&strict);
    test_result_free(&result);
}

/* The life printed is the life of the JSON to the two digits that it claims. */
static void text_rounds_the_life(void **state)
{
    (void)state;
    test_result result = test_shell("\"$NW\" assess '" FOLDER "case.yaml'");
    json_t *root = assess_json();
    const char *about = strstr(result.out, "about ");
    assert_non_null(about);
    assert_near(strtod(about + strlen("about "), NULL), number(root, "life_blocks"), 0.05, 0.0);
    json_decref(root);
    test_result_free(&result);
}

/* Every caution of the JSON stands in the text too (first words; the text is wrapped). */
static void text_holds_every_caution(void **state)
{
    (void)state;
    test_result result = test_shell("\"$NW\" assess '" FOLDER "case.yaml'");
    json_t *root = assess_json();
    size_t index;
    const json_t *caution;
    json_array_foreach(json_object_get(root, "cautions"), index, caution)
    {
        char words[40];
        snprintf(words, sizeof words, "! %.30s",
                 json_string_value(json_object_get(caution, "text")));
        assert_non_null(strstr(result.out, words));
    }
    assert_true(index >= 1);
    json_decref(root);
    test_result_free(&result);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(example_states_these),
        cmocka_unit_test(all_samples_count),
        cmocka_unit_test(loops_name_the_samples_that_make_them),
        cmocka_unit_test(extremes_of_the_block),
        cmocka_unit_test(text_says_first_what_matters),
        cmocka_unit_test(text_rounds_the_life),
        cmocka_unit_test(text_holds_every_caution),
    };
    return cmocka_run_group_tests_name("example", tests, NULL, NULL);
}
