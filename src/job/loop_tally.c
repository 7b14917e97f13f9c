#include "job/loop_tally.h"

#include "life/corrections.h"

#include <math.h>
#include <stdlib.h>

enum { BATCH = 256 };

/* Damages closer than this (relative) may be of equal loops. */
static const double same_damage = 1e-9;

nw_history_place nw_history_place_of(const nw_tally *tally, uint64_t id)
{
    nw_history_place place = {0, 0};
    size_t low = 0, high = tally->event_count;
    while (high - low > 1) {
        size_t middle = (low + high) / 2;
        *(tally->first_ids[middle] <= id ? &low : &high) = middle;
    }
    const nw_event *event = &tally->events[low];
    uint64_t point = id - tally->first_ids[low];
    if (point < event->count) {
        place.event = low;
        place.sample = event->points[point].sample;
    }
    return place;
}

static double gate_of(const nw_tally *tally, uint64_t id)
{
    nw_history_place place = nw_history_place_of(tally, id);
    return tally->events[place.event].ignore_ranges_below_mpa;
}

/* A loop between two events counts unless both leave out ranges as small as it. */
static bool is_left_out(const nw_tally *tally, const nw_loop *loop)
{
    double range = fabs(loop->start.load_mpa - loop->tip.load_mpa);
    return range < fmin(gate_of(tally, loop->start.id), gate_of(tally, loop->tip.id));
}

/* Copies the loops that are not to be ignored, and their rates; returns how many stay. */
static size_t leave_out(nw_tally *tally, const nw_loop *loops, size_t count, double weight,
                        nw_loop *staying, double *rates)
{
    size_t stay = 0;
    for (size_t i = 0; i < count; i++) {
        if (is_left_out(tally, &loops[i])) {
            tally->left_out.loops += weight;
            tally->left_out.damage += weight * rates[i];
            tally->left_out_exceeded |= nw_loop_strain_amplitude(&loops[i]) >= tally->endurance;
        } else {
            staying[stay] = loops[i];
            rates[stay++] = rates[i];
        }
    }
    return stay;
}

/* Keeps the largest damages, those of equal loops once. */
static void offer_top(nw_tally *tally, double damage)
{
    double *top = tally->top;
    size_t last = tally->top_most - 1, at = last;
    for (size_t i = 0; i <= last; i++) {
        if (fabs(damage - top[i]) <= same_damage * damage) {
            return;
        }
    }
    for (; at > 0 && top[at - 1] < damage; at--) {
        top[at] = top[at - 1];
    }
    top[at] = damage;
}

void nw_tally_reserve(nw_tally *tally, size_t loops)
{
    size_t capacity = loops + BATCH;
    tally->kept =
        capacity < SIZE_MAX / sizeof *tally->kept ? malloc(capacity * sizeof *tally->kept) : NULL;
    tally->kept_capacity = tally->kept == NULL ? 0 : capacity;
}

static nw_status keep(nw_tally *tally, const nw_loop *loops, const double *rates, size_t count,
                      double weight)
{
    if (tally->kept_count + count > tally->kept_capacity) {
        size_t capacity = tally->kept_capacity + tally->kept_capacity / 2 + count + 64;
        nw_counted_loop *kept = realloc(tally->kept, capacity * sizeof *kept);
        if (kept == NULL) {
            return NW_MEMORY;
        }
        tally->kept = kept;
        tally->kept_capacity = capacity;
    }
    /* By the rate and not by weight times rate: of equal loops all are kept or none. */
    for (size_t i = 0; i < count; i++) {
        if (rates[i] >= tally->keep_from) {
            tally->kept[tally->kept_count++] = (nw_counted_loop){loops[i], weight, rates[i]};
        } else {
            tally->skipped_damage += weight * rates[i];
        }
    }
    return NW_OK;
}

static void note_endurance(nw_tally *tally, const nw_loop *loops, const double *rates, size_t count,
                           double weight)
{
    for (size_t i = 0; i < count; i++) {
        bool above = nw_loop_strain_amplitude(&loops[i]) >= tally->endurance;
        tally->exceeded |= above;
        tally->damage_above += above ? weight * rates[i] : 0.0;
    }
}

static nw_status tally_batch(nw_tally *tally, const nw_loop *loops, size_t count, double weight)
{
    double rates[BATCH];
    nw_loop staying[BATCH];
    nw_life_rates(tally->life, loops, count, rates);
    if (tally->any_gate) {
        count = leave_out(tally, loops, count, weight, staying, rates);
        loops = staying;
    }
    double sum = 0.0, mean = tally->stress_mean_max_mpa;
    double fastest = tally->rate_max;
    for (size_t i = 0; i < count; i++) {
        double own_mean = nw_loop_stress_mean(&loops[i]);
        sum += rates[i];
        mean = own_mean > mean ? own_mean : mean;
        fastest = rates[i] > fastest ? rates[i] : fastest;
    }
    tally->damage += weight * sum;
    tally->loops += weight * (double)count;
    tally->stress_mean_max_mpa = mean;
    tally->rate_max = fastest;
    if (!isnan(tally->endurance)) {
        note_endurance(tally, loops, rates, count, weight);
    }
    for (size_t i = 0; tally->finds_top && i < count; i++) {
        if (weight * rates[i] > tally->top[tally->top_most - 1]) {
            offer_top(tally, weight * rates[i]);
        }
    }
    return tally->keeps ? keep(tally, loops, rates, count, weight) : NW_OK;
}

nw_status nw_tally_loops(void *data, const nw_loop *loops, size_t count, double weight)
{
    nw_status status = NW_OK;
    for (size_t first = 0; first < count && status == NW_OK; first += BATCH) {
        size_t size = count - first < BATCH ? count - first : BATCH;
        status = tally_batch(data, loops + first, size, weight);
    }
    return status;
}

void nw_tally_restart(nw_tally *tally)
{
    tally->damage = tally->damage_above = tally->loops = 0.0;
    tally->left_out = (nw_left_out){0.0, 0.0};
    tally->kept_count = 0;
    tally->skipped_damage = 0.0;
}
