/* The stress-strain path against a bed of parallel springs with friction sliders driven by L (Iwan, J. Appl.
 * Mech. 34 (1967) 612), which knows nothing of turning points, branches or memory rules.
 *
 * Everything is whole, so nothing is rounded and the comparison is exact. Slider i sticks while
 * |force| < i, i = 1 .. N; the notch curve is given at L = 1 .. N, where the interpolation returns the
 * points as given; loads are even, so half a range is a whole number as well. Stress and strain are sums
 * over the same sliders with different weights. */
#include "support/loops.h"

enum { SLIDERS = 40, LONGEST = 60, CASES = 4000 };

typedef struct bed {
    int stress_slope[SLIDERS + 1], strain_slope[SLIDERS + 1]; /* of the curve from i - 1 to i */
    int force[SLIDERS + 1];
    int load;
} bed;

/* ---- the bed of sliders ---- */

static void drive(bed *b, int load)
{
    int step = load - b->load;
    for (int i = 1; i <= SLIDERS; i++) {
        int force = b->force[i] + step;
        b->force[i] = force > i ? i : force < -i ? -i : force;
    }
    b->load = load;
}

/* A curve of slopes m_1, m_2, ... is the sum of sliders of weights m_i - m_(i+1). */
static int sum_of(const bed *b, const int *slope)
{
    int sum = 0;
    for (int i = 1; i <= SLIDERS; i++) {
        sum += (slope[i] - (i < SLIDERS ? slope[i + 1] : 0)) * b->force[i];
    }
    return sum;
}

static void assert_here(const bed *b, const nw_local_point *found)
{
    assert_near(found->load_mpa, b->load, 0.0, 0.0);
    assert_near(found->stress_mpa, sum_of(b, b->stress_slope), 0.0, 0.0);
    assert_near(found->strain, sum_of(b, b->strain_slope), 0.0, 0.0);
}

/* ---- the same material as a notch curve ---- */

/* Any positive slopes will do: each part of a branch then has its own. */
static bed random_bed(test_random *random)
{
    bed b = {.load = 0};
    for (int i = 1; i <= SLIDERS; i++) {
        b.stress_slope[i] = test_random_int(random, 1, 1000);
        b.strain_slope[i] = test_random_int(random, 1, 1000);
    }
    return b;
}

static nw_notch_curve *curve_of(const bed *b)
{
    double load[SLIDERS], stress[SLIDERS], strain[SLIDERS], s = 0.0, e = 0.0;
    for (int i = 1; i <= SLIDERS; i++) {
        load[i - 1] = i;
        stress[i - 1] = s += b->stress_slope[i];
        strain[i - 1] = e += b->strain_slope[i];
    }
    nw_notch_curve *curve;
    assert_int_equal(nw_notch_curve_from_table(load, stress, strain, SLIDERS, &curve, NULL), NW_OK);
    return curve;
}

static int random_load(test_random *random, int reach)
{
    return 2 * test_random_int(random, -reach / 2, reach / 2);
}

/* ---- every point of the path ---- */

static const int reaches[] = {2, 4, 8, 20, SLIDERS};

static void moves_follow_the_sliders(void **state)
{
    test_random random = {21};
    for (int i = 0; i < CASES; i++) {
        bed b = random_bed(&random);
        nw_notch_curve *curve = curve_of(&b);
        test_loops loops = {NULL, 0, 0};
        nw_tracker *tracker;
        int start = i % 3 == 0 ? random_load(&random, reaches[i % 5]) : 0; /* residual stress */
        drive(&b, start);
        assert_int_equal(nw_tracker_create(curve, start, test_loops_sink, &loops, &tracker), NW_OK);
        for (int j = 0; j < LONGEST; j++) {
            int load = random_load(&random, reaches[i % 5]);
            drive(&b, load);
            assert_int_equal(nw_tracker_move(tracker, load, (uint64_t)j), NW_OK);
            nw_local_point now = nw_tracker_now(tracker);
            assert_here(&b, &now);
        }
        nw_tracker_free(tracker);
        test_loops_free(&loops);
        nw_notch_curve_free(curve);
    }
}

/* ---- tips of the loops of whole blocks ---- */

typedef struct history {
    int load[LONGEST];
    nw_event event;
} history;

static history random_history(test_random *random, int reach, double repeats)
{
    history h;
    double values[LONGEST];
    int count = test_random_int(random, 2, LONGEST);
    for (int i = 0; i < count; i++) {
        values[i] = h.load[i] = random_load(random, reach);
    }
    h.event = test_event(values, (size_t)count, repeats);
    return h;
}

/* Path of the sliders over one pass of an event, at its turning points. */
static void path_of(bed *b, const nw_event *event, nw_local_point *path)
{
    for (size_t i = 0; i < event->count; i++) {
        drive(b, (int)event->points[i].load_mpa);
        path[i] =
            (nw_local_point){b->load, sum_of(b, b->stress_slope), sum_of(b, b->strain_slope), i};
    }
}

static bool is_on(const nw_local_point *tip, const nw_local_point *path)
{
    const nw_local_point *at = &path[tip->id];
    return tip->load_mpa == at->load_mpa && tip->stress_mpa == at->stress_mpa &&
           tip->strain == at->strain;
}

/* Both tips of each loop are points of the path: of this pass or, where a loop spans two, of the one
 * before. */
static void assert_tips(const test_loops *loops, const nw_local_point *before,
                        const nw_local_point *path)
{
    for (size_t i = 0; i < loops->count; i++) {
        const nw_loop *loop = &loops->items[i].loop;
        assert_true(is_on(&loop->start, path) || is_on(&loop->start, before));
        assert_true(is_on(&loop->tip, path) || is_on(&loop->tip, before));
    }
}

static void passes_follow_the_sliders(void **state)
{
    test_random random = {22};
    for (int i = 0; i < CASES; i++) {
        bed b = random_bed(&random);
        nw_notch_curve *curve = curve_of(&b);
        history h = random_history(&random, reaches[i % 5], 1.0);
        test_loops loops = {NULL, 0, 0};
        nw_tracker *tracker;
        nw_local_point path[2][LONGEST] = {{{0}}};
        assert_int_equal(nw_tracker_create(curve, 0.0, test_loops_sink, &loops, &tracker), NW_OK);
        for (int pass = 0; pass < 4; pass++) {
            const nw_local_point *before = path[pass == 0 ? 0 : (pass + 1) % 2];
            path_of(&b, &h.event, path[pass % 2]);
            loops.count = 0;
            assert_int_equal(nw_block_pass(tracker, &h.event, 1), NW_OK);
            nw_local_point now = nw_tracker_now(tracker);
            assert_here(&b, &now);
            assert_tips(&loops, before, path[pass % 2]);
        }
        nw_tracker_free(tracker);
        test_loops_free(&loops);
        nw_event_clear(&h.event);
        nw_notch_curve_free(curve);
    }
}

/* Repeated events: the part ends where the sliders end after as many literal passes. */
static void repeats_follow_the_sliders(void **state)
{
    test_random random = {23};
    for (int i = 0; i < CASES; i++) {
        bed b = random_bed(&random);
        nw_notch_curve *curve = curve_of(&b);
        test_loops loops = {NULL, 0, 0};
        nw_tracker *tracker;
        nw_event events[3];
        nw_local_point path[LONGEST];
        assert_int_equal(nw_tracker_create(curve, 0.0, test_loops_sink, &loops, &tracker), NW_OK);
        for (int e = 0; e < 3; e++) {
            double repeats = test_random_int(&random, 1, 5);
            events[e] = random_history(&random, reaches[(i + e) % 5], repeats).event;
        }
        for (int pass = 0; pass < 3; pass++) {
            for (int e = 0; e < 3; e++) {
                for (double r = 0.0; r < events[e].repeats; r += 1.0) {
                    path_of(&b, &events[e], path);
                }
            }
            assert_int_equal(nw_block_pass(tracker, events, 3), NW_OK);
            nw_local_point now = nw_tracker_now(tracker);
            assert_here(&b, &now);
        }
        for (int e = 0; e < 3; e++) {
            nw_event_clear(&events[e]);
        }
        nw_tracker_free(tracker);
        test_loops_free(&loops);
        nw_notch_curve_free(curve);
    }
}

/* Largest and smallest values met, against those of the sliders at the turning points. */
static void extremes_are_those_of_the_path(void **state)
{
    test_random random = {24};
    for (int i = 0; i < CASES; i++) {
        bed b = random_bed(&random);
        nw_notch_curve *curve = curve_of(&b);
        history h = random_history(&random, reaches[i % 5], 1.0);
        test_loops loops = {NULL, 0, 0};
        nw_tracker *tracker;
        nw_local_point path[LONGEST];
        nw_extremes e = {-1e9, 1e9, -1e9, 1e9, -1e9, 1e9};
        path_of(&b, &h.event, path);
        for (size_t j = 0; j < h.event.count; j++) {
            e.stress_max_mpa = fmax(e.stress_max_mpa, path[j].stress_mpa);
            e.stress_min_mpa = fmin(e.stress_min_mpa, path[j].stress_mpa);
            e.strain_max = fmax(e.strain_max, path[j].strain);
            e.strain_min = fmin(e.strain_min, path[j].strain);
            e.load_max_mpa = fmax(e.load_max_mpa, path[j].load_mpa);
            e.load_min_mpa = fmin(e.load_min_mpa, path[j].load_mpa);
        }
        assert_int_equal(nw_tracker_create(curve, 0.0, test_loops_sink, &loops, &tracker), NW_OK);
        assert_int_equal(nw_block_pass(tracker, &h.event, 1), NW_OK);
        nw_extremes found = nw_tracker_extremes(tracker);
        assert_near(found.stress_max_mpa, e.stress_max_mpa, 0.0, 0.0);
        assert_near(found.stress_min_mpa, e.stress_min_mpa, 0.0, 0.0);
        assert_near(found.strain_max, e.strain_max, 0.0, 0.0);
        assert_near(found.strain_min, e.strain_min, 0.0, 0.0);
        assert_near(found.load_max_mpa, e.load_max_mpa, 0.0, 0.0);
        assert_near(found.load_min_mpa, e.load_min_mpa, 0.0, 0.0);
        nw_tracker_free(tracker);
        test_loops_free(&loops);
        nw_event_clear(&h.event);
        nw_notch_curve_free(curve);
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(moves_follow_the_sliders),
        cmocka_unit_test(passes_follow_the_sliders),
        cmocka_unit_test(repeats_follow_the_sliders),
        cmocka_unit_test(extremes_are_those_of_the_path),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
