/* Whole assessments against an independent implementation in Python with SciPy's root finder, which takes
 * repeats literally: tests/reference/assess_reference.py. Its results are stored by store_results.py in
 * tests/reference/cases/results.csv; all rules, corrections, residual stress and repeats occur. */
#include "support/support.h"

enum { COLUMNS = 9 };

typedef struct row {
    char name[64];
    double value[COLUMNS];
} row;

static bool read_row(FILE *from, row *to)
{
    char line[600];
    if (fgets(line, sizeof line, from) == NULL) {
        return false;
    }
    char *at = strchr(line, ',');
    assert_non_null(at);
    snprintf(to->name, sizeof to->name, "%.*s", (int)(at - line), line);
    for (int i = 0; i < COLUMNS; i++) {
        assert_int_equal(*at, ',');
        to->value[i] = strtod(at + 1, &at);
    }
    return true;
}

static nw_assessment *assess(const char *name)
{
    static nw_diagnostics diagnostics;
    char path[512];
    snprintf(path, sizeof path, "%s/tests/reference/cases/%s", TEST_SOURCE_DIR, name);
    nw_diagnostics_clear(&diagnostics);
    nw_case input;
    nw_assessment *result = NULL;
    nw_assess_options options = {.all_loops = true};
    assert_int_equal(nw_case_read(path, NULL, 0, &input, &diagnostics), NW_OK);
    assert_int_equal(nw_assess(&input, &options, &result, &diagnostics), NW_OK);
    nw_case_clear(&input);
    return result;
}

static void assert_row(const row *expected)
{
    nw_assessment *r = assess(expected->name);
    const nw_extremes *e = &r->extremes;
    double stress = fmax(fabs(e->stress_max_mpa), fabs(e->stress_min_mpa));
    double strain = fmax(fabs(e->strain_max), fabs(e->strain_min));
    double life = isinf(r->life_blocks) ? -1.0 : r->life_blocks;
    const double found[COLUMNS] = {r->damage_first_block, r->damage_per_block, life,
                                   e->stress_max_mpa,     e->stress_min_mpa,   e->strain_max,
                                   e->strain_min,         r->loops_total,      r->turning_points};
    /* Extremes near zero are judged against the other one; damage below 1e-25 against nothing. */
    const double floor[COLUMNS] = {
        1e-25, 1e-25, 0.0, 1e-6 * stress, 1e-6 * stress, 1e-6 * strain, 1e-6 * strain, 0.0, 0.0};
    for (int i = 0; i < COLUMNS; i++) {
        if (!(fabs(found[i] - expected->value[i]) <= 1e-6 * fabs(expected->value[i]) + floor[i])) {
            print_error("%s, column %d\n", expected->name, i + 2);
        }
        assert_near(found[i], expected->value[i], 1e-6, floor[i]);
    }
    nw_assessment_free(r);
}

static void stored_cases_agree(void **state)
{
    (void)state;
    FILE *results = fopen(TEST_SOURCE_DIR "/tests/reference/cases/results.csv", "r");
    assert_non_null(results);
    char header[600];
    assert_non_null(fgets(header, sizeof header, results));
    row expected;
    size_t count = 0;
    for (; read_row(results, &expected); count++) {
        assert_row(&expected);
    }
    fclose(results);
    assert_int_equal(count, 60);
}

int main(void)
{
    const struct CMUnitTest tests[] = {cmocka_unit_test(stored_cases_agree)};
    return cmocka_run_group_tests(tests, NULL, NULL);
}
