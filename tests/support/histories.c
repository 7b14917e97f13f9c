#include "support/histories.h"

static void append(test_samples *to, const double *values, size_t count)
{
    to->values = realloc(to->values, (to->count + count + 1) * sizeof *to->values);
    assert_non_null(to->values);
    memcpy(to->values + to->count, values, count * sizeof *values);
    to->count += count;
}

test_samples test_history_read(const char *path, const char *column, char decimal, size_t batch)
{
    test_samples result = {.status = NW_OK};
    nw_diagnostics_clear(&result.diagnostics);
    nw_history_options options = {column, decimal};
    nw_history *history = NULL;
    double *values = malloc(batch * sizeof *values);
    size_t count = 1;
    assert_non_null(values);
    result.status = nw_history_open(path, &options, &history, &result.diagnostics);
    assert_int_equal(history == NULL, result.status != NW_OK);
    if (history != NULL) {
        snprintf(result.unit, sizeof result.unit, "%s", nw_history_unit(history));
    }
    while (result.status == NW_OK && count > 0) {
        result.status = nw_history_read(history, values, batch, &count, &result.diagnostics);
        if (result.status == NW_OK) {
            append(&result, values, count);
        }
    }
    nw_history_close(history);
    free(values);
    return result;
}

void test_samples_free(test_samples *samples)
{
    free(samples->values);
    samples->values = NULL;
}

void test_history_holds(const char *path, const char *column, char decimal, const double *values,
                        size_t count)
{
    static const size_t batches[] = {4096, 1, 3};
    for (size_t b = 0; b < 3; b++) {
        test_samples found = test_history_read(path, column, decimal, batches[b]);
        if (found.status != NW_OK) {
            fail_msg("refused: %s", found.diagnostics.items[0].message);
        }
        assert_int_equal(found.count, count);
        for (size_t i = 0; i < count; i++) {
            assert_near(found.values[i], values[i], 0.0, 0.0);
        }
        test_samples_free(&found);
    }
}

void test_history_refused(const char *path, const char *column, char decimal, nw_status status,
                          size_t line, size_t place_column, const char *word)
{
    test_samples found = test_history_read(path, column, decimal, 16);
    assert_int_equal(found.status, status);
    assert_true(found.diagnostics.count >= 1);
    const nw_diagnostic *d = &found.diagnostics.items[0];
    if (strstr(d->message, word) == NULL || d->place.line != line ||
        d->place.column != place_column) {
        fail_msg("at %zu:%zu '%s'; expected '%s' at %zu:%zu", d->place.line, d->place.column,
                 d->message, word, line, place_column);
    }
    test_samples_free(&found);
}
