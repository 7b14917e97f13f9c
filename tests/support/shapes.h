/* Shapes in tests: made from t/r and x, and tables of the tests/reference folder. */
#ifndef TEST_SHAPES_H
#define TEST_SHAPES_H

#include "support/support.h"

/* Sizes with r = 1 mm, t = q and x = 2t/D, or t/W where `one_sided`. */
nw_sizes test_notch_sizes(double q, double x, bool one_sided);

/* Kt by a formula, whatever its range; fails where there is none. */
nw_kt test_kt(const char *shape, const char *load, const char *formula, const nw_sizes *sizes);

/* A CSV table of tests/reference: calls `row` with the cells of each row after the header. */
typedef void (*test_table_row)(void *data, char **cells, size_t count);
void test_table(const char *name, test_table_row row, void *data);

#endif
