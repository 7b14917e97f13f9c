/* Turning points found while samples stream by, against looking at the whole history at once. */
#include "support/loops.h"

enum { LONGEST = 200, CASES = 5000 };

/* First sample, extremes, last sample; of a plateau its first sample. */
static size_t plainly(const double *values, size_t count, nw_turning_point *points)
{
    size_t found = 0, first = 0; /* `first`: first sample of the plateau we are on */
    points[found++] = (nw_turning_point){values[0], 0};
    for (size_t i = 1; i < count; i++) {
        if (values[i] == values[i - 1]) {
            continue;
        }
        size_t next_first = i, before = first;
        while (before > 0 && values[before - 1] == values[first]) {
            before--;
        }
        bool turns = before > 0 &&
                     (values[before] - values[before - 1]) * (values[i] - values[before]) < 0.0;
        if (turns) {
            points[found++] = (nw_turning_point){values[before], before};
        }
        first = next_first;
    }
    points[found++] = (nw_turning_point){values[first], first};
    return found > 1 && first == 0 ? 1 : found;
}

static size_t random_values(test_random *random, double *values)
{
    size_t count = (size_t)test_random_int(random, 1, LONGEST);
    int reach = test_random_int(random, 1, 4); /* small: many plateaus */
    for (size_t i = 0; i < count; i++) {
        values[i] = test_random_int(random, -reach, reach);
    }
    return count;
}

static nw_event fed_in_batches(const double *values, size_t count, size_t batch, double scale,
                               double offset)
{
    nw_event event = {.repeats = 1.0};
    nw_turning_finder finder = {.scale = scale, .offset = offset};
    for (size_t i = 0; i < count; i += batch) {
        size_t size = count - i < batch ? count - i : batch;
        assert_int_equal(nw_event_feed(&event, &finder, values + i, size), NW_OK);
    }
    assert_int_equal(nw_event_finish(&event, &finder), NW_OK);
    return event;
}

static void assert_points(const nw_event *event, const nw_turning_point *points, size_t count)
{
    assert_int_equal(event->count, count);
    for (size_t i = 0; i < count; i++) {
        assert_near(event->points[i].load_mpa, points[i].load_mpa, 0.0, 0.0);
        assert_int_equal(event->points[i].sample, points[i].sample);
    }
}

static void every_batch_size_finds_the_same(void **state)
{
    test_random random = {101};
    static const size_t batches[] = {1, 2, 3, 7, 64, LONGEST};
    for (int i = 0; i < CASES; i++) {
        double values[LONGEST];
        nw_turning_point points[LONGEST + 1];
        size_t count = random_values(&random, values);
        size_t expected = plainly(values, count, points);
        for (size_t b = 0; b < 6; b++) {
            nw_event event = fed_in_batches(values, count, batches[b], 1.0, 0.0);
            assert_points(&event, points, expected);
            assert_int_equal(event.samples, count);
            nw_event_clear(&event);
        }
    }
}

static void assert_found(const double *values, size_t count, const double *loads,
                         const uint64_t *samples, size_t expected)
{
    nw_event event = fed_in_batches(values, count, count == 0 ? 1 : count, 1.0, 0.0);
    assert_int_equal(event.count, expected);
    for (size_t i = 0; i < expected; i++) {
        assert_near(event.points[i].load_mpa, loads[i], 0.0, 0.0);
        assert_int_equal(event.points[i].sample, samples[i]);
    }
    nw_event_clear(&event);
}

/* By hand. */
static void plateaus_and_ramps(void **state)
{
    const double plateau[] = {0, 0, 5, 5, 5, -3, -3, 2, 2};
    const double plateau_loads[] = {0, 5, -3, 2};
    const uint64_t plateau_samples[] = {0, 2, 5, 7};
    assert_found(plateau, 9, plateau_loads, plateau_samples, 4);
    const double ramp[] = {1, 2, 3, 3, 4, 9}, ramp_loads[] = {1, 9};
    const uint64_t ramp_samples[] = {0, 5};
    assert_found(ramp, 6, ramp_loads, ramp_samples, 2);
    const double stair[] = {0, 1, 1, 0, 0, -1}, stair_loads[] = {0, 1, -1};
    const uint64_t stair_samples[] = {0, 1, 5};
    assert_found(stair, 6, stair_loads, stair_samples, 3);
    const double constant[] = {4, 4, 4};
    const uint64_t zero[] = {0};
    assert_found(constant, 3, constant, zero, 1);
    assert_found(constant, 1, constant, zero, 1);
    assert_found(constant, 0, constant, zero, 0);
}

/* L = scale x + offset; a negative scale turns the history over. */
static void scale_and_offset(void **state)
{
    const double values[] = {0, 2, -1, 1};
    nw_event event = fed_in_batches(values, 4, 2, -10.0, 3.0);
    const nw_turning_point points[] = {{3, 0}, {-17, 1}, {13, 2}, {-7, 3}};
    assert_points(&event, points, 4);
    nw_event_clear(&event);
}

/* Neighbours differ and alternate: what the tracker relies on. */
static void points_alternate(void **state)
{
    test_random random = {102};
    for (int i = 0; i < CASES; i++) {
        double values[LONGEST];
        size_t count = random_values(&random, values);
        nw_event event = test_event(values, count, 1.0);
        for (size_t k = 1; k < event.count; k++) {
            double step = event.points[k].load_mpa - event.points[k - 1].load_mpa;
            assert_true(step != 0.0);
            assert_true(k == 1 ||
                        step * (event.points[k - 1].load_mpa - event.points[k - 2].load_mpa) < 0.0);
            assert_true(event.points[k].sample > event.points[k - 1].sample);
        }
        nw_event_clear(&event);
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(every_batch_size_finds_the_same),
        cmocka_unit_test(plateaus_and_ramps),
        cmocka_unit_test(scale_and_offset),
        cmocka_unit_test(points_alternate),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
