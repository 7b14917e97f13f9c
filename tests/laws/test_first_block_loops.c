/* Loops of the first block, from rest, against a four-point rainflow count.
 *
 * A part at rest is a part that has been led to zero by an ever smaller alternating load. With that fading
 * load written before the history, first loading is a branch like any other and M1 and M3 follow from plain
 * counting: the loops of the first block are the counted ones with both ends in the history. The fading
 * load is odd and the history even, with no load the mirror image of another, so nothing ties. */
#include "support/loops.h"

enum { REACH = 60, LONGEST = 80, MOST = 4 * REACH + LONGEST, CASES = 4000 };

typedef struct mark {
    int load, sample; /* sample -1: of the fading load */
} mark;

typedef struct marks {
    mark items[MOST];
    size_t count;
} marks;

/* Closes what the newest point closes: the inner pair of the last four, again and again. */
static int close_loops(marks *open, int (*closed)[2])
{
    int count = 0;
    for (;;) {
        mark *m = open->items + open->count - 1;
        if (open->count < 4) {
            return count;
        }
        int inner = abs(m[-1].load - m[-2].load);
        if (inner > abs(m[-2].load - m[-3].load) || inner > abs(m[0].load - m[-1].load)) {
            return count;
        }
        if (m[-1].sample >= 0 && m[-2].sample >= 0) {
            closed[count][0] = m[-2].load;
            closed[count++][1] = m[-1].load;
        }
        m[-2] = m[0];
        open->count -= 2;
    }
}

static void put(marks *open, int load, int sample)
{
    mark *m = open->items + open->count;
    bool on_the_way = open->count >= 2 && (m[-1].load > m[-2].load) == (load > m[-1].load);
    open->count -= on_the_way;
    open->items[open->count++] = (mark){load, sample};
}

static marks after_fading_load(void)
{
    marks open = {.count = 0};
    for (int load = 2 * REACH + 1; load > 0; load -= 2) {
        put(&open, load, -1);
        put(&open, -load, -1);
    }
    return open;
}

/* Positive loads are multiples of 4, negative ones even but not: no mirror images. */
static int random_load(test_random *random)
{
    int load = 4 * test_random_int(random, 0, REACH / 2);
    return test_random_int(random, 0, 1) == 0 ? load : -load - 2;
}

static int compare_loops(const void *a, const void *b)
{
    return memcmp(a, b, 2 * sizeof(int));
}

static int (*tracked_loops(const int *load, size_t count, size_t *found))[2]
{
    nw_notch_curve *curve = test_straight_curve(3.0 * REACH);
    test_loops loops = {NULL, 0, 0};
    nw_tracker *tracker;
    double values[LONGEST];
    for (size_t i = 0; i < count; i++) {
        values[i] = load[i];
    }
    nw_event event = test_event(values, count, 1.0);
    assert_int_equal(nw_tracker_create(curve, 0.0, test_loops_sink, &loops, &tracker), NW_OK);
    assert_int_equal(nw_block_pass(tracker, &event, 1), NW_OK);
    int(*result)[2] = calloc(LONGEST, sizeof *result);
    assert_non_null(result);
    *found = loops.count;
    for (size_t i = 0; i < loops.count; i++) {
        result[i][0] = (int)loops.items[i].loop.start.load_mpa;
        result[i][1] = (int)loops.items[i].loop.tip.load_mpa;
    }
    nw_tracker_free(tracker);
    test_loops_free(&loops);
    nw_event_clear(&event);
    nw_notch_curve_free(curve);
    return result;
}

static void first_block_of_random_histories(void **state)
{
    test_random random = {31};
    for (int i = 0; i < CASES; i++) {
        int load[LONGEST], expected[LONGEST][2];
        int count = test_random_int(&random, 2, LONGEST);
        size_t closed = 0, found;
        marks open = after_fading_load();
        for (int j = 0; j < count; j++) {
            load[j] = random_load(&random);
            if (j == 0 || load[j] != load[j - 1]) {
                put(&open, load[j], j);
                closed += (size_t)close_loops(&open, expected + closed);
            }
        }
        int(*loops)[2] = tracked_loops(load, (size_t)count, &found);
        assert_int_equal(found, closed);
        qsort(loops, found, sizeof *loops, compare_loops);
        qsort(expected, closed, sizeof *expected, compare_loops);
        assert_memory_equal(loops, expected, closed * sizeof *loops);
        free(loops);
    }
}

/* ---- by hand: what the memory rules say about mirror images ---- */

static void assert_first_block(const double *values, size_t count, size_t expected)
{
    int load[LONGEST];
    size_t found;
    for (size_t i = 0; i < count; i++) {
        load[i] = (int)values[i];
    }
    free(tracked_loops(load, count, &found));
    assert_int_equal(found, expected);
}

static void mirror_images(void **state)
{
    /* Ends just at the mirror image: still a branch, and the way back closes a loop. */
    const double back_and_forth[] = {0, 50, -50, 50};
    assert_first_block(back_and_forth, 4, 1);
    /* Past it: the part is on the initial curve (M3), and 50 is no start of a loop any more. */
    const double past[] = {0, 50, -52, 50};
    assert_first_block(past, 4, 0);
    /* Back to -52 then closes the loop that began there, and no other. */
    const double past_and_back[] = {0, 50, -52, 50, -52};
    assert_first_block(past_and_back, 5, 1);
    /* Short of it: a branch, and the loop from 50 closes. */
    const double within[] = {0, 50, -48, 50};
    assert_first_block(within, 4, 1);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(first_block_of_random_histories),
        cmocka_unit_test(mirror_images),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
