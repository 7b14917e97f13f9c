#include "support/loops.h"

nw_status test_loops_sink(void *loops, const nw_loop *closed, size_t count, double weight)
{
    test_loops *to = loops;
    if (to->count + count > to->capacity) {
        to->capacity = 2 * to->capacity + count;
        to->items = realloc(to->items, to->capacity * sizeof *to->items);
        assert_non_null(to->items);
    }
    for (size_t i = 0; i < count; i++) {
        to->items[to->count++] = (test_loop){closed[i], weight};
    }
    return NW_OK;
}

void test_loops_free(test_loops *loops)
{
    free(loops->items);
    *loops = (test_loops){NULL, 0, 0};
}

double test_loop_max(const nw_loop *loop)
{
    return fmax(loop->start.load_mpa, loop->tip.load_mpa);
}

double test_loop_min(const nw_loop *loop)
{
    return fmin(loop->start.load_mpa, loop->tip.load_mpa);
}

double test_loop_range(const nw_loop *loop)
{
    return test_loop_max(loop) - test_loop_min(loop);
}

nw_event test_event(const double *loads, size_t count, double repeats)
{
    nw_event event = {.repeats = repeats};
    nw_turning_finder finder = {.scale = 1.0};
    assert_int_equal(nw_event_feed(&event, &finder, loads, count), NW_OK);
    assert_int_equal(nw_event_finish(&event, &finder), NW_OK);
    return event;
}

nw_notch_curve *test_straight_curve(double load_max)
{
    const double load[2] = {0.5 * load_max, load_max};
    const double strain[2] = {load[0] / 200000.0, load[1] / 200000.0};
    nw_notch_curve *curve;
    assert_int_equal(nw_notch_curve_from_table(load, load, strain, 2, &curve, NULL), NW_OK);
    return curve;
}

test_loops test_repeating_loops(const nw_notch_curve *curve, const nw_event *events, size_t count)
{
    test_loops loops = {NULL, 0, 0};
    nw_tracker *tracker;
    assert_int_equal(nw_tracker_create(curve, 0.0, test_loops_sink, &loops, &tracker), NW_OK);
    assert_int_equal(nw_block_pass(tracker, events, count), NW_OK);
    loops.count = 0;
    assert_int_equal(nw_block_pass(tracker, events, count), NW_OK);
    nw_tracker_free(tracker);
    return loops;
}
