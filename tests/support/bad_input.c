#include "support/bad_input.h"

const char bad_input_base[] = "notchwright: 1\n"
                              "title: Bracket, shoulder\n"
                              "units: {stress: MPa, length: mm}\n"
                              "material:\n"
                              "  name: bracket-steel\n"
                              "  group: steel\n"
                              "  basis: tested\n"
                              "  source: invented for this test\n"
                              "  youngs_modulus: 206 GPa\n"
                              "  poisson_ratio: 0.3\n"
                              "  yield_strength: 500 MPa\n"
                              "  ultimate_strength: 820 MPa\n"
                              "  reduction_of_area: 55 %\n"
                              "  hardness: 245 HB\n"
                              "  cyclic_curve:\n"
                              "    strength_coefficient: 1200 MPa\n"
                              "    hardening_exponent: 0.15\n"
                              "  strain_life:\n"
                              "    fatigue_strength_coefficient: 1100 MPa\n"
                              "    fatigue_strength_exponent: -0.09\n"
                              "    fatigue_ductility_coefficient: 0.5\n"
                              "    fatigue_ductility_exponent: -0.6\n"
                              "  endurance: {strain_amplitude: 0.0018, cycles: 1e6}\n"
                              "  scatter: {log10_life_sd: 0.15, tests: 18}\n"
                              "  valid: {cycles: [20, 2e6], strain_amplitude: [0.001, 0.02]}\n"
                              "notch:\n"
                              "  kt: 2.5\n"
                              "  rule: neuber\n"
                              "  constraint: plane_stress\n"
                              "load:\n"
                              "  - history: [0, 200, -100, 150, 0]\n"
                              "    as: nominal_stress\n"
                              "    scale: 1 MPa\n"
                              "    offset: 0 MPa\n"
                              "    repeats: 3\n"
                              "life:\n"
                              "  mean_stress: swt\n"
                              "  below_endurance: damages\n"
                              "  survival: 50 %\n"
                              "  target: 100\n";

char *bad_input_replace(const char *text, const char *from, const char *to)
{
    const char *at = strstr(text, from);
    if (at == NULL || strstr(at + 1, from) != NULL) {
        fail_msg("'%s' stands not once in the base case", from);
    }
    size_t size = strlen(text) + strlen(to) + 1;
    char *out = malloc(size);
    assert_non_null(out);
    snprintf(out, size, "%.*s%s%s", (int)(at - text), text, to, at + strlen(from));
    return out;
}

/* Writes a file without its mark; `place` receives "NAME:LINE:COLUMN: error: " of the mark, if any. */
static void write_marked(const test_scratch *scratch, const char *name, const char *content,
                         size_t size, char place[128])
{
    char *plain = malloc(size + 1);
    assert_non_null(plain);
    size_t used = 0, line = 1, column = 1;
    for (size_t i = 0; i < size; i++) {
        if (content[i] == '@') {
            assert_string_equal(place, "");
            snprintf(place, 128, "%s:%zu:%zu: error: ", name, line, column);
            continue;
        }
        plain[used++] = content[i];
        column = content[i] == '\n' ? 1 : column + 1;
        line += content[i] == '\n';
    }
    test_scratch_write(scratch, name, plain, used);
    free(plain);
}

static char *case_text(const bad_input *row)
{
    if (row->text != NULL) {
        char *copy = malloc(strlen(row->text) + 1);
        assert_non_null(copy);
        return strcpy(copy, row->text);
    }
    if (row->from != NULL) {
        return bad_input_replace(bad_input_base, row->from, row->to);
    }
    return row->file != NULL
               ? bad_input_replace(bad_input_base, "[0, 200, -100, 150, 0]", row->file)
               : bad_input_replace(bad_input_base, "Bracket", "Bracket");
}

static void assert_says(const bad_input *row, const test_result *result, const char *place,
                        const char *message)
{
    char whole[700];
    snprintf(whole, sizeof whole, "%s%s", place, message);
    if (strstr(result->err, whole) == NULL) {
        fail_msg("%s: expected '%s', found\n%s", row->name, whole, result->err);
    }
}

static void refuse(void **state)
{
    const bad_input *row = *state;
    test_scratch scratch = test_scratch_create();
    char place[128] = "";
    if (row->file != NULL && row->content != NULL) {
        size_t size = row->size > 0 ? row->size : strlen(row->content);
        write_marked(&scratch, row->file, row->content, size, place);
    }
    char *text = case_text(row);
    write_marked(&scratch, "case.yaml", text, strlen(text), place);
    free(text);
    test_result result =
        test_shell("cd '%s' && timeout 60 \"$NW\" assess '%s' %s", scratch.path,
                   test_scratch_path(&scratch, "case.yaml"), row->options ? row->options : "");
    int expected = row->status > 0 ? row->status : BAD_INPUT_REFUSED;
    if (result.status != expected) {
        fail_msg("%s: exit status %d, expected %d\n%s", row->name, result.status, expected,
                 result.err);
    }
    assert_says(row, &result, place, row->message);
    if (row->message_2 != NULL) {
        assert_says(row, &result, "", row->message_2);
    }
    assert_string_equal(result.out, "");
    test_result_free(&result);
    test_scratch_remove(&scratch);
}

void bad_input_tests(const bad_input *rows, size_t count, struct CMUnitTest *tests)
{
    for (size_t i = 0; i < count; i++) {
        tests[i] =
            (struct CMUnitTest){rows[i].name, refuse, NULL, NULL, (void *)(uintptr_t)&rows[i]};
    }
}

void bad_input_base_is_good(void **state)
{
    (void)state;
    test_scratch scratch = test_scratch_create();
    const char *path = test_scratch_text(&scratch, "case.yaml", bad_input_base);
    test_result result = test_shell("\"$NW\" assess '%s' --require-target", path);
    assert_int_equal(result.status, 0);
    assert_string_equal(result.err, "");
    assert_non_null(strstr(result.out, "TARGET REACHED"));
    test_result_free(&result);
    test_scratch_remove(&scratch);
}

int bench_set_up(void **state)
{
    bench *b = malloc(sizeof *b);
    b->scratch = test_scratch_create();
    strcpy(b->path, test_scratch_text(&b->scratch, "case.yaml", bad_input_base));
    *state = b;
    return 0;
}

int bench_tear_down(void **state)
{
    bench *b = *state;
    test_scratch_remove(&b->scratch);
    free(b);
    return 0;
}
