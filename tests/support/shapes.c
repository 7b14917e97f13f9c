#include "support/shapes.h"

nw_sizes test_notch_sizes(double q, double x, bool one_sided)
{
    nw_sizes sizes = nw_sizes_unknown();
    sizes.value[NW_SIZE_R] = 1.0;
    sizes.value[NW_SIZE_T] = q;
    sizes.value[NW_SIZE_D_GROSS] = (one_sided ? 1.0 : 2.0) * q / x;
    return sizes;
}

nw_kt test_kt(const char *shape, const char *load, const char *formula, const nw_sizes *sizes)
{
    const nw_shape *record = nw_shape_find(shape);
    assert_non_null(record);
    const nw_shape_load *of = nw_shape_load_find(record, load);
    assert_non_null(of);
    nw_kt_options options = {.formula = formula, .extrapolate = true};
    nw_kt result;
    nw_diagnostics faults;
    nw_diagnostics_clear(&faults);
    if (nw_kt_evaluate(record, of, sizes, &options, &result, &faults) != NW_OK) {
        fail_msg("%s, %s, %s: %s", shape, load, formula, faults.items[0].message);
    }
    return result;
}

void test_table(const char *name, test_table_row row, void *data)
{
    char path[512];
    snprintf(path, sizeof path, "%s/tests/reference/%s", TEST_SOURCE_DIR, name);
    char *text = test_read_file(path), *rest = NULL;
    size_t rows = 0;
    for (char *line = strtok_r(text, "\r\n", &rest); line != NULL;
         line = strtok_r(NULL, "\r\n", &rest)) {
        enum { MOST = 16 };
        char *cells[MOST], *inner = NULL;
        size_t count = 0;
        for (char *cell = strtok_r(line, ",", &inner); cell != NULL && count < MOST;
             cell = strtok_r(NULL, ",", &inner)) {
            cells[count++] = cell;
        }
        if (rows++ > 0) {
            row(data, cells, count);
        }
    }
    assert_true(rows > 1);
    free(text);
}
