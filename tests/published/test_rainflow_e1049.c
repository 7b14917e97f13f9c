/* The rainflow example of ASTM E1049-85 (2017), section 5.4.5 and figure 7, for a repeating history.
 * The standard's figures are quoted from memory; a rainflow routine of its own and the invariants of
 * counting (the sum of ranges) agree with them. */
#include "support/loops.h"

typedef struct pair {
    double max, min, count;
} pair;

static double count_of(const test_loops *loops, double max, double min)
{
    double count = 0.0;
    for (size_t i = 0; i < loops->count; i++) {
        const nw_loop *loop = &loops->items[i].loop;
        bool equal = test_loop_max(loop) == max && test_loop_min(loop) == min;
        count += equal ? loops->items[i].weight : 0.0;
    }
    return count;
}

static double count_all(const test_loops *loops)
{
    double count = 0.0;
    for (size_t i = 0; i < loops->count; i++) {
        count += loops->items[i].weight;
    }
    return count;
}

/* The repeating history has exactly these loops. */
static void assert_loops(const double *loads, size_t count, const pair *expected, size_t pairs)
{
    nw_notch_curve *curve = test_straight_curve(500.0);
    nw_event event = test_event(loads, count, 1.0);
    test_loops loops = test_repeating_loops(curve, &event, 1);
    double total = 0.0;
    for (size_t i = 0; i < pairs; i++) {
        double found = count_of(&loops, expected[i].max, expected[i].min);
        assert_near(found, expected[i].count, 0.0, 0.0);
        total += expected[i].count;
    }
    assert_near(count_all(&loops), total, 0.0, 0.0);
    test_loops_free(&loops);
    nw_event_clear(&event);
    nw_notch_curve_free(curve);
}

/* Cycles E-F, A-B, H-C and D-G, of ranges 4, 3, 7 and 9. */
static const pair e1049[] = {{3, -1, 1}, {1, -2, 1}, {4, -3, 1}, {5, -4, 1}};

static void history_as_printed(void **state)
{
    const double loads[] = {-2, 1, -3, 5, -1, 3, -4, 4, -2}; /* A to I */
    assert_loops(loads, 9, e1049, 4);
}

static void history_started_at_its_maximum(void **state)
{
    const double loads[] = {5,  -1, 3,  -4, 4,
                            -2, 1,  -3, 5}; /* D to D, as the standard arranges it */
    assert_loops(loads, 9, e1049, 4);
}

static void history_repeated_inside_the_block(void **state)
{
    const double loads[] = {-2, 1, -3, 5, -1, 3, -4, 4, -2};
    nw_notch_curve *curve = test_straight_curve(500.0);
    nw_event event = test_event(loads, 9, 1000.0);
    test_loops loops = test_repeating_loops(curve, &event, 1);
    for (size_t i = 0; i < 4; i++) {
        assert_near(count_of(&loops, e1049[i].max, e1049[i].min), 1000.0, 0.0, 0.0);
    }
    assert_near(count_all(&loops), 4000.0, 0.0, 0.0);
    test_loops_free(&loops);
    nw_event_clear(&event);
    nw_notch_curve_free(curve);
}

/* Computed with a three-point routine, not published: ranges 150, 50, 200 and 400, once each. */
static void second_repeating_history(void **state)
{
    const double loads[] = {250, -150, 100, -50, 150, 0, 50, -50, 250};
    const pair expected[] = {{100, -50, 1}, {50, 0, 1}, {150, -50, 1}, {250, -150, 1}};
    assert_loops(loads, 9, expected, 4);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(history_as_printed),
        cmocka_unit_test(history_started_at_its_maximum),
        cmocka_unit_test(history_repeated_inside_the_block),
        cmocka_unit_test(second_repeating_history),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
