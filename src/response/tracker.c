/* The stack of open branches. */
#include "notch/notch_curve.h"
#include "notchwright/response.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

enum { LOOP_BUFFER = 256, CHUNK = 4096, FIRST_CAPACITY = 256 };

/* stack[1] is the last point on the initial curve, stack[0].load its mirror image: a branch that passes
 * it is on the initial curve again (M3). stack[i] starts the branch that ends in stack[i + 1]; the last
 * one is where the part is now. */
struct nw_tracker {
    const nw_notch_curve *curve;
    nw_local_point *stack;
    size_t capacity;
    size_t top;
    nw_loop_sink sink;
    void *sink_data;
    double weight;
    nw_extremes extremes;
    nw_status failure; /* of the sink, where advance() returns NULL */
    size_t waiting;
    nw_loop loops[LOOP_BUFFER];
};

static nw_local_point on_initial_curve(const nw_notch_curve *curve, double load, uint64_t id)
{
    nw_local_point point = {.load_mpa = load, .id = id};
    nw_notch_curve_at(curve, load, &point.stress_mpa, &point.strain);
    return point;
}

nw_status nw_tracker_create(const nw_notch_curve *curve, double start_load_mpa, nw_loop_sink sink,
                            void *sink_data, nw_tracker **tracker)
{
    nw_tracker *made = calloc(1, sizeof *made);
    *tracker = NULL;
    if (made == NULL) {
        return NW_MEMORY;
    }
    made->stack = malloc(FIRST_CAPACITY * sizeof *made->stack);
    if (made->stack == NULL) {
        free(made);
        return NW_MEMORY;
    }
    made->capacity = FIRST_CAPACITY;
    made->curve = curve;
    made->sink = sink;
    made->sink_data = sink_data;
    made->weight = 1.0;
    made->stack[1] = on_initial_curve(curve, start_load_mpa, UINT64_MAX);
    made->stack[0] = (nw_local_point){.load_mpa = -start_load_mpa};
    made->top = 1;
    made->extremes = (nw_extremes){-INFINITY, INFINITY, -INFINITY, INFINITY, -INFINITY, INFINITY};
    *tracker = made;
    return NW_OK;
}

void nw_tracker_free(nw_tracker *tracker)
{
    if (tracker != NULL) {
        free(tracker->stack);
        free(tracker);
    }
}

static inline double larger(double a, double b)
{
    return a > b ? a : b;
}

static inline double smaller(double a, double b)
{
    return a < b ? a : b;
}

/* Every point met ends in a closed loop, on the initial curve or in the stack, so extremes need not be
 * looked after at each move. */
static void widen_by_loops(nw_extremes *extremes, const nw_loop *loops, size_t count)
{
    nw_extremes e = *extremes;
    for (size_t i = 0; i < count; i++) {
        const nw_local_point *a = &loops[i].start, *b = &loops[i].tip;
        e.stress_max_mpa = larger(e.stress_max_mpa, larger(a->stress_mpa, b->stress_mpa));
        e.stress_min_mpa = smaller(e.stress_min_mpa, smaller(a->stress_mpa, b->stress_mpa));
        e.strain_max = larger(e.strain_max, larger(a->strain, b->strain));
        e.strain_min = smaller(e.strain_min, smaller(a->strain, b->strain));
        e.load_max_mpa = larger(e.load_max_mpa, larger(a->load_mpa, b->load_mpa));
        e.load_min_mpa = smaller(e.load_min_mpa, smaller(a->load_mpa, b->load_mpa));
    }
    *extremes = e;
}

nw_status nw_tracker_flush(nw_tracker *tracker)
{
    size_t count = tracker->waiting;
    tracker->waiting = 0;
    widen_by_loops(&tracker->extremes, tracker->loops, count);
    return count == 0 ? NW_OK
                      : tracker->sink(tracker->sink_data, tracker->loops, count, tracker->weight);
}

static void widen(nw_extremes *extremes, const nw_local_point *point)
{
    extremes->stress_max_mpa = fmax(extremes->stress_max_mpa, point->stress_mpa);
    extremes->stress_min_mpa = fmin(extremes->stress_min_mpa, point->stress_mpa);
    extremes->strain_max = fmax(extremes->strain_max, point->strain);
    extremes->strain_min = fmin(extremes->strain_min, point->strain);
    extremes->load_max_mpa = fmax(extremes->load_max_mpa, point->load_mpa);
    extremes->load_min_mpa = fmin(extremes->load_min_mpa, point->load_mpa);
}

static nw_local_point *go_on_initial(nw_tracker *tracker, double load, uint64_t id)
{
    tracker->stack[1] = on_initial_curve(tracker->curve, load, id);
    tracker->stack[0].load_mpa = -load;
    tracker->top = 1;
    widen(&tracker->extremes, &tracker->stack[1]);
    return &tracker->stack[1];
}

/* From `top`, the last point of the stack, to `load`: closes what closes on the way and puts the point reached
 * on the stack, for which there must be room. Returns it, or NULL when the sink failed. `rising` and `in_bins`
 * are constants where this is inlined: the comparison then is one instruction, and the curve is looked up
 * without asking what kind it is. The top travels in a register: from memory it would lengthen the one chain
 * of dependent steps there is. */
static inline __attribute__((always_inline)) nw_local_point *advance(nw_tracker *tracker,
                                                                     nw_local_point *top,
                                                                     double load, uint64_t id,
                                                                     bool rising, bool in_bins)
{
    nw_local_point *const base = tracker->stack;
    while (rising ? load >= top[-1].load_mpa : load <= top[-1].load_mpa) {
        if (top == base + 1) {
            /* Farther along the initial curve, or back on it (M3) unless just at the mirror image. */
            if (fabs(load) > fabs(top->load_mpa)) {
                return go_on_initial(tracker, load, id);
            }
            break;
        }
        tracker->loops[tracker->waiting++] = (nw_loop){top[-1], top[0]};
        top -= 2;
        if (tracker->waiting == LOOP_BUFFER) {
            tracker->failure = nw_tracker_flush(tracker);
            if (tracker->failure != NW_OK) {
                return NULL;
            }
        }
        if (top == base) { /* M1; otherwise M2: the branch from `top` goes on */
            return go_on_initial(tracker, load, id);
        }
    }
    double half_range = rising ? 0.5 * (load - top->load_mpa) : 0.5 * (top->load_mpa - load);
    nw_pair half = in_bins ? nw_notch_curve_in_bins(&tracker->curve->bins,
                                                    tracker->curve->compliance, half_range)
                           : nw_notch_curve_positive(tracker->curve, half_range);
    nw_pair from = nw_pair_load(&top->stress_mpa);
    nw_pair reached = rising ? from + 2.0 * half : from - 2.0 * half;
    top[1].load_mpa = load;
    memcpy(&top[1].stress_mpa, &reached, sizeof reached);
    top[1].id = id;
    return top + 1;
}

static nw_status keep_top(nw_tracker *tracker, const nw_local_point *top)
{
    if (top == NULL) {
        return tracker->failure;
    }
    tracker->top = (size_t)(top - tracker->stack);
    return NW_OK;
}

static nw_status make_room(nw_tracker *tracker, size_t more)
{
    size_t needed = tracker->top + more + 2;
    if (needed <= tracker->capacity) {
        return NW_OK;
    }
    size_t capacity = needed + tracker->capacity / 2;
    nw_local_point *stack = realloc(tracker->stack, capacity * sizeof *stack);
    if (stack == NULL) {
        return NW_MEMORY;
    }
    tracker->stack = stack;
    tracker->capacity = capacity;
    return NW_OK;
}

/* Points that turn each time; the first one goes up when `rising`. */
static inline __attribute__((always_inline)) nw_status advance_all(nw_tracker *tracker,
                                                                   const nw_turning_point *points,
                                                                   size_t count, uint64_t first_id,
                                                                   bool rising, bool in_bins)
{
    nw_local_point *top = tracker->stack + tracker->top;
    size_t i = 0;
    if (!rising && count > 0) {
        top = advance(tracker, top, points[0].load_mpa, first_id, false, in_bins);
        i = 1;
    }
    for (; i + 1 < count && top != NULL; i += 2) {
        top = advance(tracker, top, points[i].load_mpa, first_id + i, true, in_bins);
        if (top != NULL) {
            top = advance(tracker, top, points[i + 1].load_mpa, first_id + i + 1, false, in_bins);
        }
    }
    if (i < count && top != NULL) {
        top = advance(tracker, top, points[i].load_mpa, first_id + i, true, in_bins);
    }
    return keep_top(tracker, top);
}

nw_status nw_tracker_move(nw_tracker *tracker, double load_mpa, uint64_t id)
{
    const nw_local_point *now = tracker->stack + tracker->top;
    if (load_mpa == now->load_mpa) {
        widen(&tracker->extremes, now);
        return NW_OK;
    }
    bool rising = load_mpa > now->load_mpa;
    bool goes_on = tracker->top > 1 && rising == (now->load_mpa > now[-1].load_mpa);
    tracker->top -= goes_on;
    nw_status status = make_room(tracker, 1);
    if (status != NW_OK) {
        return status;
    }
    nw_local_point *top = tracker->stack + tracker->top;
    top = rising ? advance(tracker, top, load_mpa, id, true, false)
                 : advance(tracker, top, load_mpa, id, false, false);
    status = keep_top(tracker, top);
    /* The load may go on from here, and then this point is in no loop. */
    widen(&tracker->extremes, &tracker->stack[tracker->top]);
    return status;
}

nw_status nw_tracker_pass(nw_tracker *tracker, const nw_event *event, uint64_t first_id,
                          double weight)
{
    const nw_turning_point *points = event->points;
    nw_status status = nw_tracker_flush(tracker);
    tracker->weight = weight;
    size_t i = 0;
    /* The first two may go on in the direction the last event ended with; from then on each one turns. */
    for (; i < event->count && i < 2 && status == NW_OK; i++) {
        status = nw_tracker_move(tracker, points[i].load_mpa, first_id + i);
    }
    bool in_bins = tracker->curve->points == 0;
    while (i < event->count && status == NW_OK) {
        size_t size = event->count - i < CHUNK ? event->count - i : CHUNK;
        bool rising = points[i].load_mpa > points[i - 1].load_mpa;
        status = make_room(tracker, size);
        if (status == NW_OK) {
            status = in_bins ? advance_all(tracker, points + i, size, first_id + i, rising, true)
                             : advance_all(tracker, points + i, size, first_id + i, rising, false);
        }
        i += size;
    }
    return status == NW_OK ? nw_tracker_flush(tracker) : status;
}

/* Points still open are not in any closed loop yet. */
nw_extremes nw_tracker_extremes(const nw_tracker *tracker)
{
    nw_extremes extremes = tracker->extremes;
    for (size_t i = 1; i <= tracker->top; i++) {
        if (tracker->stack[i].id != UINT64_MAX) {
            widen(&extremes, &tracker->stack[i]);
        }
    }
    return extremes;
}

nw_local_point nw_tracker_now(const nw_tracker *tracker)
{
    return tracker->stack[tracker->top];
}
