/* Shape-preserving cubics against SciPy's PchipInterpolator; the values and the script that wrote them stand in
 * tests/reference. Both compute in double: the tolerance is a few roundings. */
#include "notch/monotone.h"
#include "support/support.h"

#include "reference/pchip_values.h"

enum { SETS = sizeof pchip_sets / sizeof pchip_sets[0] };

static void values_as_scipy(void **state)
{
    for (size_t i = 0; i < SETS; i++) {
        double slope[8];
        nw_monotone_slopes(pchip_sets[i].x, pchip_sets[i].y, pchip_sets[i].count, slope);
        for (size_t j = 0; j < pchip_sets[i].asked; j++) {
            double found = nw_monotone_at(pchip_sets[i].x, pchip_sets[i].y, slope,
                                          pchip_sets[i].count, pchip_sets[i].at[j]);
            assert_near(found, pchip_sets[i].value[j], 1e-14, 1e-15);
        }
    }
}

/* The same through the notch curve of a table, negative loads included. */
static void notch_curve_of_a_table(void **state)
{
    const double *load = pchip_sets[3].x, *stress = pchip_sets[3].y, *strain = pchip_sets[4].y;
    assert_string_equal(pchip_sets[3].name, "stress of a notch");
    nw_notch_curve *curve;
    /* with and without the point at zero */
    for (size_t skip = 0; skip < 2; skip++) {
        assert_int_equal(nw_notch_curve_from_table(load + skip, stress + skip, strain + skip,
                                                   8 - skip, &curve, NULL),
                         NW_OK);
        for (size_t j = 0; j < pchip_sets[3].asked; j++) {
            double s, e, at = pchip_sets[3].at[j];
            nw_notch_curve_at(curve, -at, &s, &e);
            assert_near(s, -pchip_sets[3].value[j], 1e-14, 1e-15);
            assert_near(e, -pchip_sets[4].value[j], 1e-14, 1e-15);
        }
        assert_near(nw_notch_curve_load_max_mpa(curve), 1100.0, 0.0, 0.0);
        nw_notch_curve_free(curve);
    }
}

/* Between increasing points the curve increases, whatever the points. */
static void curves_keep_increasing(void **state)
{
    test_random random = {95};
    for (int i = 0; i < 2000; i++) {
        double x[12], y[12], slope[12];
        int count = test_random_int(&random, 2, 12);
        x[0] = y[0] = 0.0;
        for (int k = 1; k < count; k++) {
            x[k] = x[k - 1] + exp(test_random_between(&random, -6.0, 6.0));
            y[k] = y[k - 1] + exp(test_random_between(&random, -6.0, 6.0));
        }
        nw_monotone_slopes(x, y, (size_t)count, slope);
        double before = 0.0;
        for (int k = 1; k <= 500; k++) {
            double at = x[count - 1] * 1.1 * k / 500.0;
            double now = nw_monotone_at(x, y, slope, (size_t)count, at);
            assert_true(now >= before * (1.0 - 1e-14));
            before = now;
        }
        for (int k = 0; k < count; k++) {
            double now = nw_monotone_at(x, y, slope, (size_t)count, x[k]);
            assert_near(now, y[k], 0.0, 0.0);
        }
    }
}

/* Past the last point it goes on straight. */
static void straight_past_the_end(void **state)
{
    const double x[] = {0, 1, 4}, y[] = {0, 2, 3};
    double slope[3];
    nw_monotone_slopes(x, y, 3, slope);
    double one = nw_monotone_at(x, y, slope, 3, 5.0), two = nw_monotone_at(x, y, slope, 3, 6.0);
    assert_near(two - one, one - 3.0, 1e-14, 0.0);
    assert_true(one > 3.0);
}

static void table_refused(const double *load, const double *stress, const double *strain,
                          size_t count, const char *word)
{
    nw_notch_curve *curve;
    nw_diagnostics diagnostics;
    nw_diagnostics_clear(&diagnostics);
    assert_int_equal(nw_notch_curve_from_table(load, stress, strain, count, &curve, &diagnostics),
                     NW_INPUT);
    assert_null(curve);
    assert_non_null(strstr(diagnostics.items[0].message, word));
}

static void tables_that_do_not_increase(void **state)
{
    const double good[] = {1, 2, 3}, flat[] = {1, 2, 2}, back[] = {1, 3, 2},
                 negative[] = {-1, 2, 3};
    const double nan_inside[] = {1, NAN, 3};
    table_refused(flat, good, good, 3, "point 3: found load");
    table_refused(good, back, good, 3, "point 3: found stress");
    table_refused(good, good, flat, 3, "point 3: found strain");
    table_refused(negative, good, good, 3, "point 1: found load");
    table_refused(good, nan_inside, good, 3, "point 2: found stress");
    table_refused(good, good, good, 1, "at least two");
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(values_as_scipy),
        cmocka_unit_test(notch_curve_of_a_table),
        cmocka_unit_test(curves_keep_increasing),
        cmocka_unit_test(straight_past_the_end),
        cmocka_unit_test(tables_that_do_not_increase),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
