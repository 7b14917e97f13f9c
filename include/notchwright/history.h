/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Load histories: files read as a stream of samples, and the turning points kept of them. Memory grows
 * with turning points, never with samples.
 */
#ifndef NOTCHWRIGHT_HISTORY_H
#define NOTCHWRIGHT_HISTORY_H

#include "notchwright/status.h"

#include <stdint.h>

#ifdef __cplusplus
extern "C" {
#endif

/* How to read a history file. Zero-initialise for the defaults. */
typedef struct nw_history_options {
    const char *
        column; /* header name (with or without its [unit]) or 1-based number; NULL: the only one */
    char decimal; /* '.' (also 0) or ',' */
} nw_history_options;

typedef struct nw_history nw_history;

/* Opens CSV, TSV or blank-separated text (header optional, '#' comments, LF or CRLF, UTF-8 with or without
 * byte order mark), NumPy .npy (float32 or float64, 1-D or 2-D, C order), or either gzip-compressed. The
 * kind is told from the content.
 * Returns NW_OK with *history (close with nw_history_close), NW_INPUT, NW_FILE or NW_MEMORY. */
NW_API nw_status nw_history_open(const char *path, const nw_history_options *options,
                                 nw_history **history, nw_diagnostics *diagnostics);

/* Reads on.
 *   values    [capacity] receives samples in column units, all finite
 *   count     how many; 0 at the end
 * Returns NW_OK; NW_INPUT with the place of a value that is no finite number or of a ragged row; NW_FILE. */
NW_API nw_status nw_history_read(nw_history *history, double *values, size_t capacity,
                                 size_t *count, nw_diagnostics *diagnostics);

/* Upper bound of the number of samples, from the size of the file; 0: unknown. */
NW_API uint64_t nw_history_samples_at_most(const nw_history *history);

/* Unit that the header gives the column, as in "load[MPa]", or "". */
NW_API const char *nw_history_unit(const nw_history *history);

/* Harmless with NULL. */
NW_API void nw_history_close(nw_history *history);

/* A local extreme of the load, or the first or last sample. */
typedef struct nw_turning_point {
    double load_mpa; /* pseudo-elastic notch stress L [MPa] */
    uint64_t sample; /* 0-based index of the first sample that reached it */
} nw_turning_point;

/* The turning points of one event: first sample, extremes in order, last sample; neighbours differ. */
typedef struct nw_event {
    nw_turning_point *points; /* [count] */
    size_t count;
    size_t capacity;
    uint64_t samples;
    double load_max_mpa, load_min_mpa; /* of the points; set by nw_event_finish() */
    double repeats;                    /* >= 1, whole */
    double
        ignore_ranges_below_mpa; /* closed loops with a smaller range of L are left out; 0: none */
} nw_event;

/* Feeds samples to an event one batch after the other.
 *   scale   L per column unit [MPa]; not zero
 *   offset  L at column value zero [MPa]
 * Start with a zeroed nw_turning_finder; end with nw_event_finish(). Returns NW_OK or NW_MEMORY. */
typedef struct nw_turning_finder {
    double scale, offset;
    double previous;
    uint64_t previous_sample;
    bool started, rising, has_direction;
} nw_turning_finder;

/* Makes room for turning points before they come. Room that is never used costs address space only, and
 * points that need not move are read faster later. It may do nothing. */
NW_API void nw_event_reserve(nw_event *event, uint64_t points);

NW_API nw_status nw_event_feed(nw_event *event, nw_turning_finder *finder, const double *values,
                               size_t count);
NW_API nw_status nw_event_finish(nw_event *event, nw_turning_finder *finder);

/* Frees the points. */
NW_API void nw_event_clear(nw_event *event);

#ifdef __cplusplus
}
#endif
#endif
