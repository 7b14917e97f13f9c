/* Closed loops against a rainflow count of the repeating history, done here the plain way: literal copies of
 * every event, turned so that it starts at the largest load, and the four-point rule on all points. */
#include "support/loops.h"

enum { CASES = 6000, LONGEST = 400 };

typedef struct pair {
    double max, min;
} pair;

typedef struct pairs {
    pair items[LONGEST * 2];
    size_t count;
} pairs;

typedef struct loads {
    double items[LONGEST * 2];
    size_t count;
} loads;

static void add_load(loads *to, double load)
{
    assert_true(to->count < sizeof to->items / sizeof to->items[0]);
    to->items[to->count++] = load;
}

static void add_pair(pairs *to, double a, double b)
{
    to->items[to->count++] = (pair){fmax(a, b), fmin(a, b)};
}

/* ---- the plain count ---- */

static bool is_reversal(double before, double at, double after)
{
    return (at - before) * (after - at) < 0.0;
}

/* Points without repeats or points on the way, in place; returns how many stay. */
static size_t keep_reversals(double *load, size_t count)
{
    size_t kept = 0;
    for (size_t i = 0; i < count; i++) {
        double now = load[i];
        if (kept > 0 && now == load[kept - 1]) {
            continue;
        }
        if (kept > 1 && !is_reversal(load[kept - 2], load[kept - 1], now)) {
            kept--;
        }
        load[kept++] = now;
    }
    return kept;
}

/* The repeating history from its first largest load back to the same. */
static loads started_at_maximum(const loads *history)
{
    size_t top = 0;
    for (size_t i = 1; i < history->count; i++) {
        top = history->items[i] > history->items[top] ? i : top;
    }
    loads turned = {.count = 0};
    for (size_t i = 0; i <= history->count; i++) {
        add_load(&turned, history->items[(top + i) % history->count]);
    }
    turned.count = keep_reversals(turned.items, turned.count);
    return turned;
}

/* Takes out the inner pair of any four points whose inner range is within the outer ones, from the left,
 * until none is left (Amzallag et al., Int. J. Fatigue 16 (1994) 287, from memory). */
static bool take_one_cycle(loads *points, pairs *found)
{
    double *p = points->items;
    for (size_t i = 0; i + 3 < points->count; i++) {
        double inner = fabs(p[i + 2] - p[i + 1]);
        if (inner <= fabs(p[i + 1] - p[i]) && inner <= fabs(p[i + 3] - p[i + 2])) {
            add_pair(found, p[i + 1], p[i + 2]);
            memmove(p + i + 1, p + i + 3, (points->count - i - 3) * sizeof *p);
            points->count -= 2;
            return true;
        }
    }
    return false;
}

static pairs rainflow(const loads *history)
{
    pairs found = {.count = 0};
    loads points = started_at_maximum(history);
    while (take_one_cycle(&points, &found)) {
    }
    if (points.count >= 3) { /* what is left goes from the maximum to the minimum and back */
        assert_int_equal(points.count, 3);
        add_pair(&found, points.items[0], points.items[1]);
    }
    return found;
}

/* ---- what the tracker gives ---- */

typedef struct block {
    nw_event events[4];
    size_t count;
} block;

static void clear_block(block *b)
{
    for (size_t i = 0; i < b->count; i++) {
        nw_event_clear(&b->events[i]);
    }
}

static pairs tracked(const nw_notch_curve *curve, const block *b)
{
    test_loops loops = test_repeating_loops(curve, b->events, b->count);
    pairs found = {.count = 0};
    for (size_t i = 0; i < loops.count; i++) {
        const nw_loop *loop = &loops.items[i].loop;
        for (double w = 0.0; w < loops.items[i].weight; w += 1.0) {
            add_pair(&found, loop->start.load_mpa, loop->tip.load_mpa);
        }
    }
    test_loops_free(&loops);
    return found;
}

static int compare_pairs(const void *a, const void *b)
{
    const pair *x = a, *y = b;
    int by_max = (x->max > y->max) - (x->max < y->max);
    return by_max != 0 ? by_max : (x->min > y->min) - (x->min < y->min);
}

static void assert_same(pairs found, pairs expected, int number)
{
    qsort(found.items, found.count, sizeof *found.items, compare_pairs);
    qsort(expected.items, expected.count, sizeof *expected.items, compare_pairs);
    bool same = found.count == expected.count;
    for (size_t i = 0; same && i < found.count; i++) {
        same = compare_pairs(&found.items[i], &expected.items[i]) == 0;
    }
    if (!same) {
        fail_msg("case %d: %zu loops found, %zu expected, or they differ", number, found.count,
                 expected.count);
    }
}

/* ---- random histories ---- */

/* Whole loads within `reach` of zero: a small reach makes ties and mirror images common. */
static loads random_history(test_random *random, int longest, int reach)
{
    loads history = {.count = 0};
    int count = test_random_int(random, 1, longest);
    for (int i = 0; i < count; i++) {
        add_load(&history, test_random_int(random, -reach, reach));
    }
    return history;
}

static bool is_constant(const loads *history)
{
    for (size_t i = 1; i < history->count; i++) {
        if (history->items[i] != history->items[0]) {
            return false;
        }
    }
    return true;
}

static void append_copies(loads *to, const loads *event, int copies)
{
    for (int i = 0; i < copies; i++) {
        for (size_t j = 0; j < event->count; j++) {
            add_load(to, event->items[j]);
        }
    }
}

static const int reaches[] = {1, 2, 4, 10, 100, 1000000};

static void one_event(void **state)
{
    test_random random = {11};
    nw_notch_curve *curve = test_straight_curve(2e6);
    for (int i = 0; i < CASES; i++) {
        loads history = random_history(&random, i % 10 == 0 ? LONGEST : 24, reaches[i % 6]);
        if (is_constant(&history)) {
            continue;
        }
        block b = {.count = 1};
        b.events[0] = test_event(history.items, history.count, 1.0);
        assert_same(tracked(curve, &b), rainflow(&history), i);
        clear_block(&b);
    }
    nw_notch_curve_free(curve);
}

/* Events with repeats against the same block written out. */
static void several_events_with_repeats(void **state)
{
    test_random random = {12};
    nw_notch_curve *curve = test_straight_curve(2e6);
    for (int i = 0; i < CASES; i++) {
        loads whole = {.count = 0};
        block b = {.count = (size_t)test_random_int(&random, 1, 4)};
        for (size_t e = 0; e < b.count; e++) {
            loads event = random_history(&random, 14, reaches[i % 6]);
            int repeats = test_random_int(&random, 1, 6);
            b.events[e] = test_event(event.items, event.count, repeats);
            append_copies(&whole, &event, repeats);
        }
        if (!is_constant(&whole)) {
            assert_same(tracked(curve, &b), rainflow(&whole), i);
        }
        clear_block(&b);
    }
    nw_notch_curve_free(curve);
}

/* Loops are loops of the load's order: the notch curve has no say in which of them close. */
static void material_does_not_matter(void **state)
{
    test_random random = {13};
    nw_rule_input input = {206000.0, 1184.0, 0.187, 3.0, NAN, false};
    nw_notch_curve *curve;
    assert_int_equal(
        nw_notch_curve_build(nw_notch_rule_find("neuber"), &input, 1000.0, &curve, NULL), NW_OK);
    for (int i = 0; i < CASES / 6; i++) {
        loads history = random_history(&random, 40, i % 2 == 0 ? 1000 : 6);
        if (is_constant(&history)) {
            continue;
        }
        block b = {.count = 1};
        b.events[0] = test_event(history.items, history.count, 1.0);
        assert_same(tracked(curve, &b), rainflow(&history), i);
        clear_block(&b);
    }
    nw_notch_curve_free(curve);
}

/* Invariant of counting: each loop uses up two steps as long as itself, so the ranges of the repeating
 * history's loops sum to half the length of the way. */
static void ranges_sum_to_half_the_way(void **state)
{
    test_random random = {14};
    nw_notch_curve *curve = test_straight_curve(2e6);
    for (int i = 0; i < CASES; i++) {
        loads history = random_history(&random, 60, reaches[i % 6]);
        block b = {.count = 1};
        b.events[0] = test_event(history.items, history.count, 1.0);
        double way = 0.0, sum = 0.0;
        for (size_t j = 0; j < history.count; j++) {
            way += fabs(history.items[(j + 1) % history.count] - history.items[j]);
        }
        test_loops loops = test_repeating_loops(curve, b.events, 1);
        for (size_t j = 0; j < loops.count; j++) {
            sum += test_loop_range(&loops.items[j].loop);
        }
        assert_near(sum, 0.5 * way, 0.0, 0.0); /* whole numbers below 2^53 */
        test_loops_free(&loops);
        clear_block(&b);
    }
    nw_notch_curve_free(curve);
}

/* Sums over loops: of their ranges and of the squares. */
typedef struct sums {
    double range, square;
} sums;

static void add_range(sums *to, double range)
{
    to->range += range;
    to->square += range * range;
}

/* Three-point counting with a stack, from the largest load on, for histories too long for the plain way. */
static sums stack_count(const double *load, size_t count)
{
    sums total = {0.0, 0.0};
    double *turned = malloc((count + 1) * sizeof *turned), *open = turned;
    size_t top = 0, used = 0;
    assert_non_null(turned);
    for (size_t i = 1; i < count; i++) {
        top = load[i] > load[top] ? i : top;
    }
    for (size_t i = 0; i <= count; i++) {
        turned[i] = load[(top + i) % count];
    }
    size_t points = keep_reversals(turned, count + 1);
    for (size_t i = 0; i < points; i++) { /* the stack never passes what is still to be read */
        open[used++] = turned[i];
        while (used >= 3 &&
               fabs(open[used - 1] - open[used - 2]) >= fabs(open[used - 2] - open[used - 3])) {
            add_range(&total, fabs(open[used - 2] - open[used - 3]));
            open[used - 3] = open[used - 1];
            used -= 2;
        }
    }
    free(turned);
    return total;
}

/* Longer than every buffer on the way: many loops in one pass, and many open branches at once. */
static void assert_long_history(const double *load, size_t count)
{
    nw_notch_curve *curve = test_straight_curve(2e6);
    nw_event event = test_event(load, count, 1.0);
    test_loops loops = test_repeating_loops(curve, &event, 1);
    sums expected = stack_count(load, count), found = {0.0, 0.0};
    for (size_t i = 0; i < loops.count; i++) {
        add_range(&found, test_loop_range(&loops.items[i].loop));
    }
    assert_near(found.range, expected.range, 0.0, 0.0);
    assert_near(found.square, expected.square, 0.0, 0.0);
    test_loops_free(&loops);
    nw_event_clear(&event);
    nw_notch_curve_free(curve);
}

static void long_histories(void **state)
{
    enum { LONG = 60000 };
    test_random random = {15};
    double *load = malloc(LONG * sizeof *load);
    assert_non_null(load);
    for (int reach = 3; reach < 10000; reach *= 20) {
        for (size_t i = 0; i < LONG; i++) {
            load[i] = test_random_int(&random, -reach, reach);
        }
        assert_long_history(load, LONG);
    }
    for (int i = 0; i < LONG; i++) { /* fades: every branch stays open to the end */
        load[i] = i % 2 == 0 ? LONG - i : i - LONG;
    }
    assert_long_history(load, LONG);
    for (int i = 0; i < LONG; i++) { /* grows: always on the initial curve */
        load[i] = i % 2 == 0 ? i : -i;
    }
    assert_long_history(load, LONG);
    free(load);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(one_event),
        cmocka_unit_test(several_events_with_repeats),
        cmocka_unit_test(material_does_not_matter),
        cmocka_unit_test(ranges_sum_to_half_the_way),
        cmocka_unit_test(long_histories),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
