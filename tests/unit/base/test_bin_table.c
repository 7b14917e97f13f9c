/* Tables of polynomials against the functions they were made of. */
#include "base/bin_table.h"
#include "support/support.h"

/* Functions of very different size: a steep power and a slow logarithm. */
static nw_status two_functions(void *data, double x, double *values)
{
    *(int *)data += 1;
    values[0] = pow(x, -3.7);
    values[1] = 1.0 + log1p(x);
    return NW_OK;
}

static double at(const nw_bin_table *table, int function, double x)
{
    uint64_t bin = nw_bin_of(table, x);
    assert_true(bin < table->bins);
    const double *c = table->coefficients + bin * table->width * NW_BIN_COEFFICIENTS;
    double t = nw_bin_position(table, x);
    return table->width == 1 ? nw_bin_polynomial(c, t) : nw_bin_polynomial_pair(c, t)[function];
}

static nw_status first_function(void *data, double x, double *values)
{
    double both[2];
    nw_status status = two_functions(data, x, both);
    values[0] = both[0];
    return status;
}

/* A table of one function holds the same numbers as that function's half of a table of two. */
static void one_function_or_two(void **state)
{
    nw_bin_table one, two;
    int calls = 0;
    assert_int_equal(nw_bin_table_build(&one, 1, 0.013, 4100.0, 1e-9, first_function, &calls),
                     NW_OK);
    assert_int_equal(nw_bin_table_build(&two, 2, 0.013, 4100.0, 1e-9, two_functions, &calls),
                     NW_OK);
    test_random random = {92};
    for (int i = 0; i < 1000; i++) {
        double x = exp(test_random_between(&random, log(0.013), log(4100.0)));
        assert_near(at(&one, 0, x), at(&two, 0, x), 1.5e-9, 0.0);
        assert_near(at(&one, 0, x), pow(x, -3.7), 1.5e-9, 0.0);
    }
    nw_bin_table_clear(&one);
    nw_bin_table_clear(&two);
}

/* At points that the builder never looked at; it promises the tolerance at its own checks, and a smooth
 * function goes past that by little. */
static void table_is_within_its_tolerance(void **state)
{
    static const double tolerances[] = {1e-5, 1e-8, 5e-10};
    for (size_t k = 0; k < 3; k++) {
        nw_bin_table table;
        int calls = 0;
        assert_int_equal(
            nw_bin_table_build(&table, 2, 0.013, 4100.0, tolerances[k], two_functions, &calls),
            NW_OK);
        assert_true(table.relative_error <= tolerances[k]);
        test_random random = {91};
        for (int i = 0; i < 20000; i++) {
            double values[2], x = exp(test_random_between(&random, log(0.013), log(4100.0)));
            two_functions(&calls, x, values);
            assert_near(at(&table, 0, x), values[0], 1.5 * tolerances[k], 0.0);
            assert_near(at(&table, 1, x), values[1], 1.5 * tolerances[k], 0.0);
        }
        assert_true(calls > 0);
        nw_bin_table_clear(&table);
    }
}

/* Neighbouring polynomials meet, and both ends are inside. */
static void bins_meet_and_reach_the_ends(void **state)
{
    nw_bin_table table;
    int calls = 0;
    assert_int_equal(nw_bin_table_build(&table, 2, 0.013, 4100.0, 1e-8, two_functions, &calls),
                     NW_OK);
    double ends[] = {0.013, 4100.0}, values[2];
    for (int i = 0; i < 2; i++) {
        two_functions(&calls, ends[i], values);
        assert_near(at(&table, 0, ends[i]), values[0], 2e-8, 0.0);
    }
    for (double x = 0.015625; x < 4096.0; x *= 2.0) {
        assert_near(at(&table, 0, nextafter(x, 0.0)), at(&table, 0, x), 1e-12, 0.0);
        assert_near(at(&table, 1, nextafter(x, 0.0)), at(&table, 1, x), 1e-12, 0.0);
    }
    assert_true(nw_bin_of(&table, 0.001) >= table.bins);
    assert_true(nw_bin_of(&table, 1e9) >= table.bins);
    nw_bin_table_clear(&table);
}

static nw_status jump(void *data, double x, double *values)
{
    values[0] = x < 1.03 ? 1.0 : 2.0;
    return NW_OK;
}

static nw_status failing(void *data, double x, double *values)
{
    values[0] = 1.0;
    return x < 2.0 ? NW_MEMORY : NW_OK;
}

static void what_cannot_be_tabulated(void **state)
{
    nw_bin_table table;
    assert_int_equal(nw_bin_table_build(&table, 1, 0.5, 8.0, 1e-9, jump, NULL), NW_COMPUTE);
    nw_bin_table_clear(&table);
    assert_int_equal(nw_bin_table_build(&table, 1, 0.5, 8.0, 1e-9, failing, NULL), NW_MEMORY);
    nw_bin_table_clear(&table);
}

static nw_status not_a_number(void *data, double x, double *values)
{
    values[0] = x > 1.0 && x < 1.1 ? NAN : 1.0;
    return NW_OK;
}

/* A value that is no number never passes for a good fit. */
static void nan_is_no_fit(void **state)
{
    nw_bin_table table;
    assert_int_equal(nw_bin_table_build(&table, 1, 0.5, 8.0, 1e-9, not_a_number, NULL), NW_COMPUTE);
    nw_bin_table_clear(&table);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(table_is_within_its_tolerance),
        cmocka_unit_test(one_function_or_two),
        cmocka_unit_test(bins_meet_and_reach_the_ends),
        cmocka_unit_test(what_cannot_be_tabulated),
        cmocka_unit_test(nan_is_no_fit),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
