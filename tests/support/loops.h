/* Loops as a tracker hands them out, and the few things every test of the response needs. */
#ifndef TEST_LOOPS_H
#define TEST_LOOPS_H

#include "support/support.h"

typedef struct test_loop {
    nw_loop loop;
    double weight;
} test_loop;

/* Zero-initialise; free with test_loops_free(). */
typedef struct test_loops {
    test_loop *items; /* [count], in the order in which they closed */
    size_t count, capacity;
} test_loops;

/* nw_loop_sink for a test_loops. */
nw_status test_loops_sink(void *loops, const nw_loop *closed, size_t count, double weight);
void test_loops_free(test_loops *loops);

/* Larger and smaller load of a loop, and their distance. */
double test_loop_max(const nw_loop *loop);
double test_loop_min(const nw_loop *loop);
double test_loop_range(const nw_loop *loop);

/* An event of these loads [MPa]; clear with nw_event_clear(). */
nw_event test_event(const double *loads, size_t count, double repeats);

/* s = L, e = L/E with E = 200000 MPa: for what depends on the order of the loads alone. */
nw_notch_curve *test_straight_curve(double load_max);

/* Loops of the block's second pass, which is the repeating one; the part starts at rest. */
test_loops test_repeating_loops(const nw_notch_curve *curve, const nw_event *events, size_t count);

#endif
