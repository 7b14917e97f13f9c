/* The stack of open branches. */
#include "notch/notch_curve.h"
#include "notchwright/response.h"

#include <math.h>
#include <stdlib.h>

enum { LOOP_BUFFER = 256, FIRST_CAPACITY = 256 };

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
    made->extremes =
        (nw_extremes){-INFINITY, INFINITY, -INFINITY, INFINITY, -INFINITY, INFINITY};
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

nw_status nw_tracker_flush(nw_tracker *tracker)
{
    size_t count = tracker->waiting;
    tracker->waiting = 0;
    return count == 0 ? NW_OK
                      : tracker->sink(tracker->sink_data, tracker->loops, count, tracker->weight);
}

static nw_status grow(nw_tracker *tracker)
{
    size_t capacity = tracker->capacity + tracker->capacity / 2;
    nw_local_point *stack = realloc(tracker->stack, capacity * sizeof *stack);
    if (stack == NULL) {
        return NW_MEMORY;
    }
    tracker->stack = stack;
    tracker->capacity = capacity;
    return NW_OK;
}

static inline double larger(double a, double b)
{
    return a > b ? a : b;
}

static inline double smaller(double a, double b)
{
    return a < b ? a : b;
}

static inline void widen(nw_extremes *extremes, const nw_local_point *point)
{
    extremes->stress_max_mpa = larger(extremes->stress_max_mpa, point->stress_mpa);
    extremes->stress_min_mpa = smaller(extremes->stress_min_mpa, point->stress_mpa);
    extremes->strain_max = larger(extremes->strain_max, point->strain);
    extremes->strain_min = smaller(extremes->strain_min, point->strain);
    extremes->load_max_mpa = larger(extremes->load_max_mpa, point->load_mpa);
    extremes->load_min_mpa = smaller(extremes->load_min_mpa, point->load_mpa);
}

/* Goes from the last point of the stack to `load`, in direction +1 or -1: closes what closes on the way
 * and puts the point reached on the stack. */
static inline nw_status advance(nw_tracker *tracker, double load, double direction, uint64_t id)
{
    nw_local_point *top = tracker->stack + tracker->top;
    bool initial = false;
    while (direction * (load - top[-1].load_mpa) >= 0.0) {
        if (top == tracker->stack + 1) { /* M3, unless just at the mirror image */
            initial = fabs(load) > fabs(top->load_mpa);
            break;
        }
        tracker->loops[tracker->waiting++] = (nw_loop){top[-1], top[0]};
        top -= 2;
        if (tracker->waiting == LOOP_BUFFER) {
            tracker->top = (size_t)(top - tracker->stack);
            nw_status status = nw_tracker_flush(tracker);
            if (status != NW_OK) {
                return status;
            }
        }
        if (top == tracker->stack) { /* M1; otherwise M2: the branch from `top` goes on */
            initial = true;
            break;
        }
    }
    if (initial) {
        tracker->stack[1] = on_initial_curve(tracker->curve, load, id);
        tracker->stack[0].load_mpa = -load;
        tracker->top = 1;
        widen(&tracker->extremes, &tracker->stack[1]);
        return NW_OK;
    }
    double stress, strain, half_range = 0.5 * direction * (load - top->load_mpa);
    nw_notch_curve_positive(tracker->curve, half_range, &stress, &strain);
    double doubled = 2.0 * direction;
    top[1] = (nw_local_point){load, top->stress_mpa + doubled * stress,
                              top->strain + doubled * strain, id};
    widen(&tracker->extremes, &top[1]);
    tracker->top = (size_t)(top - tracker->stack) + 1;
    return tracker->top + 2 < tracker->capacity ? NW_OK : grow(tracker);
}

/* The part stays on the initial curve when it moves on away from zero. */
static bool stays_on_initial(const nw_tracker *tracker, double load)
{
    double now = tracker->stack[1].load_mpa;
    return tracker->top == 1 && fabs(load) > fabs(now) && load * now >= 0.0;
}

nw_status nw_tracker_move(nw_tracker *tracker, double load_mpa, uint64_t id)
{
    const nw_local_point *now = tracker->stack + tracker->top;
    if (load_mpa == now->load_mpa) {
        widen(&tracker->extremes, now);
        return NW_OK;
    }
    double direction = load_mpa > now->load_mpa ? 1.0 : -1.0;
    if (stays_on_initial(tracker, load_mpa)) {
        tracker->stack[1] = on_initial_curve(tracker->curve, load_mpa, id);
        tracker->stack[0].load_mpa = -load_mpa;
        widen(&tracker->extremes, &tracker->stack[1]);
        return NW_OK;
    }
    bool goes_on = tracker->top > 1 && direction * (now->load_mpa - now[-1].load_mpa) > 0.0;
    tracker->top -= goes_on;
    return advance(tracker, load_mpa, direction, id);
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
    if (i < event->count) {
        double direction = points[i].load_mpa > points[i - 1].load_mpa ? 1.0 : -1.0;
        for (; i < event->count && status == NW_OK; i++, direction = -direction) {
            status = advance(tracker, points[i].load_mpa, direction, first_id + i);
        }
    }
    return status == NW_OK ? nw_tracker_flush(tracker) : status;
}

nw_extremes nw_tracker_extremes(const nw_tracker *tracker)
{
    return tracker->extremes;
}

nw_local_point nw_tracker_now(const nw_tracker *tracker)
{
    return tracker->stack[tracker->top];
}
