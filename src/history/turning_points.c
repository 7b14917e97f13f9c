/* Turning points of one event, found while its samples stream by. */
#include "notchwright/history.h"

#include <stdlib.h>

void nw_event_clear(nw_event *event)
{
    free(event->points);
    event->points = NULL;
    event->count = event->capacity = 0;
}

enum { MOST_RESERVED = 1 << 27 };

void nw_event_reserve(nw_event *event, uint64_t points)
{
    size_t capacity = points < MOST_RESERVED ? (size_t)points + 2 : MOST_RESERVED;
    if (event->points == NULL) {
        event->points = malloc(capacity * sizeof *event->points);
        event->capacity = event->points == NULL ? 0 : capacity;
    }
}

/* Grows by halves: a doubling would hold up to twice what long histories need. */
static nw_status make_room(nw_event *event, size_t more)
{
    if (event->capacity - event->count >= more) {
        return NW_OK;
    }
    size_t capacity = event->count + more + event->count / 2;
    nw_turning_point *points = realloc(event->points, capacity * sizeof *points);
    if (points == NULL) {
        return NW_MEMORY;
    }
    event->points = points;
    event->capacity = capacity;
    return NW_OK;
}

/* Until the first change of value there is no direction yet. Returns how many values were used. */
static size_t find_direction(nw_event *event, nw_turning_finder *finder, const double *values,
                             size_t count)
{
    size_t i = 0;
    if (!finder->started && count > 0) {
        finder->previous = values[0] * finder->scale + finder->offset;
        finder->previous_sample = 0;
        finder->started = true;
        i = 1;
    }
    for (; i < count && !finder->has_direction; i++) {
        double load = values[i] * finder->scale + finder->offset;
        if (load != finder->previous) {
            event->points[event->count++] =
                (nw_turning_point){finder->previous, finder->previous_sample};
            finder->rising = load > finder->previous;
            finder->has_direction = true;
            finder->previous = load;
            finder->previous_sample = event->samples + i;
        }
    }
    return i;
}

nw_status nw_event_feed(nw_event *event, nw_turning_finder *finder, const double *values,
                        size_t count)
{
    if (make_room(event, count + 1) != NW_OK) {
        return NW_MEMORY;
    }
    size_t i = find_direction(event, finder, values, count);
    /* Branch-free: every sample writes the point before it, and only a reversal keeps it. */
    nw_turning_point *out = event->points + event->count;
    double previous = finder->previous;
    uint64_t previous_sample = finder->previous_sample, sample = event->samples + i;
    unsigned rising = finder->rising;
    for (; i < count; i++, sample++) {
        double load = values[i] * finder->scale + finder->offset;
        unsigned up = load > previous, down = load < previous;
        out->load_mpa = previous;
        out->sample = previous_sample;
        out += (up & ~rising) | (down & rising);
        rising = (rising | up) & ~down;
        uint64_t changed = -(uint64_t)(up | down);
        previous_sample ^= (previous_sample ^ sample) & changed;
        previous = load;
    }
    event->count = (size_t)(out - event->points);
    event->samples += count;
    finder->previous = previous;
    finder->previous_sample = previous_sample;
    finder->rising = rising;
    return NW_OK;
}

static void find_limits(nw_event *event)
{
    double high = event->points[0].load_mpa, low = high;
    for (size_t i = 1; i < event->count; i++) {
        double load = event->points[i].load_mpa;
        high = load > high ? load : high;
        low = load < low ? load : low;
    }
    event->load_max_mpa = high;
    event->load_min_mpa = low;
}

nw_status nw_event_finish(nw_event *event, nw_turning_finder *finder)
{
    if (!finder->started) {
        return NW_OK;
    }
    if (make_room(event, 1) != NW_OK) {
        return NW_MEMORY;
    }
    event->points[event->count++] = (nw_turning_point){finder->previous, finder->previous_sample};
    find_limits(event);
    nw_turning_point *fitted = realloc(event->points, event->count * sizeof *fitted);
    if (fitted != NULL) {
        event->points = fitted;
        event->capacity = event->count;
    }
    return NW_OK;
}
