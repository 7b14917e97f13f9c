/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Local stress-strain response: Masing branches on a notch curve, material memory, and the closed loops.
 *
 * Branches (Masing 1926): from a turning point (L0, s0, e0) the local stress is
 *   s = s0 +- 2 s_curve(|L - L0|/2), and the strain likewise.
 * Memory (Clormann & Seeger, Stahlbau 55 (1986) 65):
 *   M1  a closed loop that started on the initial curve returns to the initial curve;
 *   M2  a closed loop that started on a branch returns to that branch;
 *   M3  a branch that passes the mirror image of the point where it left the initial curve goes on along
 *       the initial curve.
 * A loop closes when the load reaches the value it started from; M3 needs |L| to exceed the mirror value.
 */
#ifndef NOTCHWRIGHT_RESPONSE_H
#define NOTCHWRIGHT_RESPONSE_H

#include "notchwright/history.h"
#include "notchwright/notch.h"

#ifdef __cplusplus
extern "C" {
#endif

/* A point of the local path. */
typedef struct nw_local_point {
    double load_mpa; /* L */
    double stress_mpa;
    double strain;
    uint64_t id; /* the caller's number of the turning point */
} nw_local_point;

/* A closed hysteresis loop: the turning point where it began and its other tip. */
typedef struct nw_loop {
    nw_local_point start, tip;
} nw_loop;

/* Receives closed loops, each of which stands for `weight` equal ones. What it returns other than NW_OK
 * stops the tracker. */
typedef nw_status (*nw_loop_sink)(void *data, const nw_loop *loops, size_t count, double weight);

typedef struct nw_extremes {
    double stress_max_mpa, stress_min_mpa, strain_max, strain_min, load_max_mpa, load_min_mpa;
} nw_extremes;

typedef struct nw_tracker nw_tracker;

/* A part at rest on the initial curve at load `start_load_mpa` (0, or the residual stress).
 *   curve  must outlive the tracker and reach every |L| that will be met
 * Returns NW_OK (free with nw_tracker_free) or NW_MEMORY. */
NW_API nw_status nw_tracker_create(const nw_notch_curve *curve, double start_load_mpa,
                                   nw_loop_sink sink, void *sink_data, nw_tracker **tracker);

/* Moves to a load, turning point or not. */
NW_API nw_status nw_tracker_move(nw_tracker *tracker, double load_mpa, uint64_t id);

/* Passes an event once, its points numbered from first_id; loops that close count `weight` times. */
NW_API nw_status nw_tracker_pass(nw_tracker *tracker, const nw_event *event, uint64_t first_id,
                                 double weight);

/* Hands loops that are still waiting to the sink. */
NW_API nw_status nw_tracker_flush(nw_tracker *tracker);

/* Extremes over all loads met so far (the state of rest not among them). */
NW_API nw_extremes nw_tracker_extremes(const nw_tracker *tracker);

/* Where the part is now. */
NW_API nw_local_point nw_tracker_now(const nw_tracker *tracker);

NW_API void nw_tracker_free(nw_tracker *tracker);

/* Passes a block once: each event `repeats` times. Because the response to a repeated event is periodic
 * from its second pass on, an event is passed at most twice, the second time with weight repeats - 1. */
NW_API nw_status nw_block_pass(nw_tracker *tracker, const nw_event *events, size_t count);

#ifdef __cplusplus
}
#endif
#endif
