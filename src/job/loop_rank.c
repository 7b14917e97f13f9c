/* Equal loops merged, the most damaging first. */
#include "base/bin_table.h"
#include "job/loop_tally.h"

#include <math.h>
#include <stdlib.h>

/* Equal loops differ by rounding only: the same loads, and stresses to within this. */
static const double same_stress_mpa = 1e-6;

static double load_max_of(const nw_loop *loop)
{
    return fmax(loop->start.load_mpa, loop->tip.load_mpa);
}

static double load_min_of(const nw_loop *loop)
{
    return fmin(loop->start.load_mpa, loop->tip.load_mpa);
}

static double stress_max_of(const nw_loop *loop)
{
    return fmax(loop->start.stress_mpa, loop->tip.stress_mpa);
}

static bool same_loop(const nw_loop *a, const nw_loop *b)
{
    return load_max_of(a) == load_max_of(b) && load_min_of(a) == load_min_of(b) &&
           fabs(stress_max_of(a) - stress_max_of(b)) <= same_stress_mpa;
}

/* + 0.0 makes both zeros one. */
static uint64_t hash_of(const nw_loop *loop)
{
    uint64_t hash = nw_bits_of(load_max_of(loop) + 0.0) * 0x9E3779B97F4A7C15u;
    hash = (hash ^ (hash >> 29)) + nw_bits_of(load_min_of(loop) + 0.0);
    hash *= 0xBF58476D1CE4E5B9u;
    return hash ^ (hash >> 32);
}

/* Open addressing over the loops that stay at the front; slots hold index + 1. */
static nw_status merge(nw_counted_loop *loops, size_t *count)
{
    size_t slots = 64, merged = 0;
    while (slots < 2 * *count) {
        slots *= 2;
    }
    size_t *slot = calloc(slots, sizeof *slot);
    if (slot == NULL) {
        return NW_MEMORY;
    }
    for (size_t i = 0; i < *count; i++) {
        size_t at = (size_t)hash_of(&loops[i].loop) & (slots - 1);
        while (slot[at] != 0 && !same_loop(&loops[slot[at] - 1].loop, &loops[i].loop)) {
            at = (at + 1) & (slots - 1);
        }
        if (slot[at] != 0) {
            loops[slot[at] - 1].count += loops[i].count;
        } else {
            loops[merged++] = loops[i];
            slot[at] = merged;
        }
    }
    free(slot);
    *count = merged;
    return NW_OK;
}

/* More damage first; equal damage: larger range, then higher load, so that the order is always the same. */
static int by_damage(const void *left, const void *right)
{
    const nw_counted_loop *a = left, *b = right;
    double keys[3][2] = {
        {a->rate * a->count, b->rate * b->count},
        {load_max_of(&a->loop) - load_min_of(&a->loop),
         load_max_of(&b->loop) - load_min_of(&b->loop)},
        {load_max_of(&a->loop), load_max_of(&b->loop)},
    };
    for (int i = 0; i < 3; i++) {
        if (keys[i][0] != keys[i][1]) {
            return keys[i][0] > keys[i][1] ? -1 : 1;
        }
    }
    return 0;
}

/* Insertion into a short sorted front: what is wanted is few, what there is may be very many. */
static void select_front(nw_counted_loop *loops, size_t count, size_t wanted)
{
    qsort(loops, wanted, sizeof *loops, by_damage);
    for (size_t i = wanted; i < count; i++) {
        if (by_damage(&loops[i], &loops[wanted - 1]) >= 0) {
            continue;
        }
        nw_counted_loop moved = loops[i];
        loops[i] = loops[wanted - 1];
        size_t at = wanted - 1;
        for (; at > 0 && by_damage(&moved, &loops[at - 1]) < 0; at--) {
            loops[at] = loops[at - 1];
        }
        loops[at] = moved;
    }
}

nw_status nw_counted_loops_rank(nw_counted_loop *loops, size_t *count, size_t wanted)
{
    nw_status status = merge(loops, count);
    if (status != NW_OK || *count == 0) {
        return status;
    }
    if (wanted < *count && wanted > 0 && wanted <= NW_WORST_MOST) {
        select_front(loops, *count, wanted);
    } else {
        qsort(loops, *count, sizeof *loops, by_damage);
    }
    return NW_OK;
}
