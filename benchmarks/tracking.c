/* Tracking with full local stress, strain and life against bare loop counting on the same turning points, in
 * one process, in turn.
 *   bench_tracking FILE [ROUNDS] */
#include "notch/notch_curve.h"
#include "notchwright/notchwright.h"

#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <time.h>

static double now(void)
{
    struct timespec t;
    clock_gettime(CLOCK_MONOTONIC, &t);
    return (double)t.tv_sec + 1e-9 * (double)t.tv_nsec;
}

static nw_status read_event(const char *path, nw_event *event, nw_diagnostics *diagnostics)
{
    nw_history_options options = {0};
    nw_history *history;
    nw_turning_finder finder = {.scale = 3.0};
    static double values[4096];
    size_t count = 1;
    nw_status status = nw_history_open(path, &options, &history, diagnostics);
    while (status == NW_OK && count > 0) {
        status = nw_history_read(history, values, 4096, &count, diagnostics);
        if (status == NW_OK) {
            status = nw_event_feed(event, &finder, values, count);
        }
    }
    nw_history_close(history);
    return status == NW_OK ? nw_event_finish(event, &finder) : status;
}

/* The stack alone, with the same memory rules: which loops close, nothing about stress or life. */
static size_t count_loops(const nw_event *event, double *stack)
{
    size_t top = 1, loops = 0;
    stack[0] = stack[1] = event->points[0].load_mpa;
    for (size_t i = 1; i < event->count; i++) {
        double load = event->points[i].load_mpa;
        double direction = load > stack[top] ? 1.0 : -1.0;
        while (direction * (load - stack[top - 1]) >= 0.0) {
            if (top == 1) {
                break;
            }
            loops++;
            top -= 2;
            if (top == 0) {
                break;
            }
        }
        if (top == 0 || (top == 1 && fabs(load) > fabs(stack[1]))) {
            stack[0] = -load;
            top = 0;
        }
        stack[++top] = load;
    }
    return loops;
}

typedef struct total {
    const nw_life *life;
    double damage;
} total;

static nw_status add(void *data, const nw_loop *loops, size_t count, double weight)
{
    total *sum = data;
    double rates[256];
    nw_life_rates(sum->life, loops, count, rates);
    for (size_t i = 0; i < count; i++) {
        sum->damage += weight * rates[i];
    }
    return NW_OK;
}

static int rising(const void *a, const void *b)
{
    double x = *(const double *)a, y = *(const double *)b;
    return (x > y) - (x < y);
}

int main(int count, char **arguments)
{
    static nw_diagnostics diagnostics;
    nw_event event = {.repeats = 1.0};
    int rounds = count > 2 ? atoi(arguments[2]) : 9;
    if (count < 2 || rounds < 1 || rounds > 99 ||
        read_event(arguments[1], &event, &diagnostics) != NW_OK) {
        fputs("usage: bench_tracking FILE [ROUNDS]\n", stderr);
        return 2;
    }
    nw_material material = {.youngs_modulus_mpa = 206000,
                            .strength_coefficient_mpa = 1184,
                            .hardening_exponent = 0.187,
                            .fatigue_strength_coefficient_mpa = 1230,
                            .fatigue_strength_exponent = -0.087,
                            .fatigue_ductility_coefficient = 0.59,
                            .fatigue_ductility_exponent = -0.58};
    nw_rule_input input = {206000, 1184, 0.187, 3.0, NAN, false};
    double largest = 0.0, stress, strain;
    for (size_t i = 0; i < event.count; i++) {
        largest = fmax(largest, fabs(event.points[i].load_mpa));
    }
    nw_notch_curve *curve;
    nw_life *life;
    nw_life_options options = {.correction = nw_correction_find("swt"),
                               .surface_factor = 1.0,
                               .surface_reversals = 1e6,
                               .life_factor = 1.0};
    if (nw_notch_curve_build(nw_notch_rule_find("neuber"), &input, largest, &curve, NULL) !=
        NW_OK) {
        return 1;
    }
    nw_notch_curve_at(curve, largest, &stress, &strain);
    if (nw_life_create(&material, &options, strain, stress, &life, NULL) != NW_OK) {
        return 1;
    }
    double *stack = malloc((event.count + 2) * sizeof *stack);
    double bare[99], full[99], ratio[99];
    size_t loops = 0;
    total sum = {life, 0.0};
    for (int i = 0; i < rounds && stack != NULL; i++) {
        double t0 = now();
        loops = count_loops(&event, stack);
        double t1 = now();
        nw_tracker *tracker;
        sum.damage = 0.0;
        if (nw_tracker_create(curve, 0.0, add, &sum, &tracker) != NW_OK ||
            nw_tracker_pass(tracker, &event, 0, 1.0) != NW_OK) {
            return 1;
        }
        nw_tracker_free(tracker);
        double t2 = now();
        bare[i] = t1 - t0;
        full[i] = t2 - t1;
        ratio[i] = full[i] / bare[i];
    }
    qsort(bare, (size_t)rounds, sizeof *bare, rising);
    qsort(full, (size_t)rounds, sizeof *full, rising);
    qsort(ratio, (size_t)rounds, sizeof *ratio, rising);
    double each = 1e9 / (double)event.count;
    printf("  %zu turning points, %zu loops: bare counting %.2f ns, with stress, strain and life "
           "%.2f ns "
           "a reversal, ratio %.2f (medians of %d; damage %.6g)\n",
           event.count, loops, bare[rounds / 2] * each, full[rounds / 2] * each, ratio[rounds / 2],
           rounds, sum.damage);
    free(stack);
    nw_life_free(life);
    nw_notch_curve_free(curve);
    nw_event_clear(&event);
    return 0;
}
