/* What becomes of the loops of a pass: damage summed, the worst kept, all kept when asked. */
#ifndef NW_JOB_LOOP_TALLY_H
#define NW_JOB_LOOP_TALLY_H

#include "notchwright/assessment.h"

enum { NW_WORST_MOST = 64 };

/* A loop with how often it occurs and 1/N. */
typedef struct nw_counted_loop {
    nw_loop loop;
    double count;
    double rate;
} nw_counted_loop;

typedef struct nw_tally {
    const nw_life *life;
    const nw_event *events;
    const uint64_t *first_ids; /* [event_count] id of each event's first turning point */
    size_t event_count;
    bool any_gate;    /* some event leaves small ranges out */
    double endurance; /* strain amplitude; NAN when it plays no part */

    /* Sums of the pass. */
    double damage, damage_above; /* all loops; loops at or above the endurance amplitude */
    double loops;
    bool exceeded;
    nw_left_out left_out;
    bool left_out_exceeded; /* one of them is at or above the endurance amplitude */
    double stress_mean_max_mpa, rate_max;

    /* Damages of the most damaging single loops, falling: [top_most] while `finds_top`. */
    bool finds_top;
    size_t top_most;
    double top[NW_WORST_MOST];

    /* Loops kept while `keeps`: those whose 1/N is at least `keep_from`. */
    bool keeps;
    double keep_from;
    nw_counted_loop *kept; /* [kept_count] */
    size_t kept_count, kept_capacity;
    double skipped_damage;
} nw_tally;

/* nw_loop_sink for an nw_tally. */
nw_status nw_tally_loops(void *tally, const nw_loop *loops, size_t count, double weight);

/* Room for loops to be kept, which costs address space only until it is used. It may do nothing. */
void nw_tally_reserve(nw_tally *tally, size_t loops);

/* Forgets what was counted, keeps the settings. */
void nw_tally_restart(nw_tally *tally);

/* Merges equal loops (any order) and brings the `wanted` most damaging to the front, in order.
 * Returns NW_OK or NW_MEMORY. */
nw_status nw_counted_loops_rank(nw_counted_loop *loops, size_t *count, size_t wanted);

/* Event and sample of a turning point's id. */
nw_history_place nw_history_place_of(const nw_tally *tally, uint64_t id);

#endif
