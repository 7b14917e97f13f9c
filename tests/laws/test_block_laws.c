/* What holds for the damage of every block, whatever the part: random materials, rules, mean-stress
 * corrections and histories, with ties and mirror images.
 *
 * Tolerance: two ways to the same path differ by the rounding of a few hundred additions (1e-13), which a
 * power of up to 1/0.06 turns into less than 3e-12 of damage; and an argument at the edge of two bins of the
 * life table may fall into either, which both hold to 5e-10. Hence 1e-9 relative. */
#include "support/loops.h"
#include "support/part.h"

enum { PARTS = 100, BLOCKS = 30, LONGEST = 50 };

static const double agreed = 1e-9;

/* First and second pass of one history. */
static void damage_of(const test_part *part, const double *loads, size_t count, double damage[2])
{
    nw_event event = test_event(loads, count, 1.0);
    test_part_damage(part, &event, 1, damage, 2);
    nw_event_clear(&event);
}

/* Calls `law` with many parts and histories. */
static void for_all(uint64_t seed, const char *correction,
                    void (*law)(const test_part *, const double *, size_t, test_random *))
{
    test_random random = {seed};
    for (int i = 0; i < PARTS; i++) {
        test_part part = test_part_random(&random, correction);
        for (int j = 0; j < BLOCKS; j++) {
            double loads[LONGEST];
            size_t count = test_random_loads(&random, loads, LONGEST);
            law(&part, loads, count, &random);
        }
        test_part_free(&part);
    }
}

static void rotated(const test_part *part, const double *loads, size_t count, test_random *random)
{
    double turned[LONGEST], damage[2], other[2];
    size_t by = (size_t)test_random_int(random, 1, (int)count - 1);
    for (size_t i = 0; i < count; i++) {
        turned[i] = loads[(i + by) % count];
    }
    damage_of(part, loads, count, damage);
    damage_of(part, turned, count, other);
    assert_near(other[1], damage[1], agreed, 0.0);
}

static void rotation_keeps_damage_per_block(void **state)
{
    for_all(41, NULL, rotated);
}

/* Written twice: the first block does D1 + Ds, each later one 2 Ds. */
static void doubled(const test_part *part, const double *loads, size_t count, test_random *random)
{
    double twice[2 * LONGEST], damage[2], other[2];
    memcpy(twice, loads, count * sizeof *loads);
    memcpy(twice + count, loads, count * sizeof *loads);
    damage_of(part, loads, count, damage);
    damage_of(part, twice, 2 * count, other);
    assert_near(other[0], damage[0] + damage[1], agreed, 0.0);
    assert_near(other[1], 2.0 * damage[1], agreed, 0.0);
}

static void block_twice_does_twice_the_damage(void **state)
{
    for_all(42, NULL, doubled);
}

static void repeated(const test_part *part, const double *loads, size_t count, test_random *random)
{
    enum { MOST_COPIES = 6 };
    double copies[MOST_COPIES * LONGEST], after[LONGEST], damage[2], other[2];
    size_t repeats = (size_t)test_random_int(random, 1, MOST_COPIES);
    size_t after_count = test_random_loads(random, after, LONGEST);
    for (size_t i = 0; i < repeats; i++) {
        memcpy(copies + i * count, loads, count * sizeof *loads);
    }
    nw_event events[2] = {test_event(loads, count, (double)repeats),
                          test_event(after, after_count, 1)};
    test_part_damage(part, events, 2, damage, 2);
    nw_event_clear(&events[0]);
    events[0] = test_event(copies, repeats * count, 1.0);
    test_part_damage(part, events, 2, other, 2);
    assert_near(other[0], damage[0], agreed, 0.0);
    assert_near(other[1], damage[1], agreed, 0.0);
    nw_event_clear(&events[0]);
    nw_event_clear(&events[1]);
}

static void repeats_equal_copies(void **state)
{
    for_all(43, NULL, repeated);
}

static void turned_over(const test_part *part, const double *loads, size_t count,
                        test_random *random)
{
    double negative[LONGEST], damage[2], other[2];
    for (size_t i = 0; i < count; i++) {
        negative[i] = -loads[i];
    }
    damage_of(part, loads, count, damage);
    damage_of(part, negative, count, other);
    assert_near(other[0], damage[0], agreed, 0.0);
    assert_near(other[1], damage[1], agreed, 0.0);
}

static void reversed_signs_leave_none_unchanged(void **state)
{
    for_all(44, "none", turned_over);
}

/* From the second pass on the response is periodic, to the last bit. */
static void passed_again(const test_part *part, const double *loads, size_t count,
                         test_random *random)
{
    double damage[5];
    nw_event event = test_event(loads, count, test_random_int(random, 1, 3));
    test_part_damage(part, &event, 1, damage, 5);
    for (int i = 2; i < 5; i++) {
        assert_near(damage[i], damage[1], 0.0, 0.0);
    }
    nw_event_clear(&event);
}

static void third_pass_equals_second(void **state)
{
    for_all(45, NULL, passed_again);
}

/* Points on the way, and points written twice, say nothing new. */
static void filled_in(const test_part *part, const double *loads, size_t count, test_random *random)
{
    double filled[4 * LONGEST], damage[2], other[2];
    size_t used = 0;
    for (size_t i = 0; i < count; i++) {
        filled[used++] = loads[i];
        int more = i + 1 < count ? test_random_int(random, 0, 3) : 0;
        double at = 0.0;
        for (int k = 0; k < more; k++) {
            at += (1.0 - at) * (test_random_int(random, 0, 3) * 0.25); /* never turns back */
            double value = loads[i] + at * (loads[i + 1] - loads[i]);
            filled[used++] =
                fmin(fmax(value, fmin(loads[i], loads[i + 1])), fmax(loads[i], loads[i + 1]));
        }
    }
    damage_of(part, loads, count, damage);
    damage_of(part, filled, used, other);
    assert_near(other[0], damage[0], 0.0, 0.0);
    assert_near(other[1], damage[1], 0.0, 0.0);
}

static void points_on_a_ramp_change_nothing(void **state)
{
    for_all(46, NULL, filled_in);
}

/* ---- more load, less life ---- */

/* Blocks to a damage sum of 1. */
static double blocks_of(const double damage[2])
{
    return damage[0] >= 1.0 ? 1.0 / damage[0] : 1.0 + (1.0 - damage[0]) / damage[1];
}

static void scaled_up(const test_part *part, const double *loads, size_t count, test_random *random)
{
    double larger[LONGEST], damage[2], other[2];
    double scale = test_random_between(random, 1.0, 1.5);
    for (size_t i = 0; i < count; i++) {
        larger[i] = scale * loads[i];
    }
    damage_of(part, loads, count, damage);
    damage_of(part, larger, count, other);
    assert_true(other[0] >= damage[0] * (1.0 - agreed));
    assert_true(other[1] >= damage[1] * (1.0 - agreed));
    assert_true(blocks_of(other) <= blocks_of(damage) * (1.0 + agreed));
}

static void scaling_up_never_lengthens_life_under_none(void **state)
{
    for_all(47, "none", scaled_up);
}

/* With a mean-stress correction the law has real exceptions: a higher overload leaves more compression at
 * the root, and the many small cycles that follow do less damage. An aluminium alloy as soft and strong as
 * 7075-T6, once 0 to 650 MPa and then 100000 times 0 to 260 MPa (L), against 1.2 times all of that; the
 * same inequality was found with SciPy before it was written down here. */
static void overload_block(const test_part *part, double scale, double damage[2])
{
    const double over[] = {0.0, scale * 650.0, 0.0}, small[] = {0.0, scale * 260.0, 0.0};
    nw_event events[2] = {test_event(over, 3, 1.0), test_event(small, 3, 1e5)};
    test_part_damage(part, events, 2, damage, 2);
    nw_event_clear(&events[0]);
    nw_event_clear(&events[1]);
}

static test_part aluminium_part(const char *correction)
{
    test_part part = {.material = {.youngs_modulus_mpa = 71000.0,
                                   .fatigue_strength_coefficient_mpa = 1466.0,
                                   .fatigue_strength_exponent = -0.143,
                                   .fatigue_ductility_coefficient = 0.262,
                                   .fatigue_ductility_exponent = -0.619}};
    nw_rule_input input = {71000.0, 977.0, 0.106, 1.0, NAN, false};
    nw_life_options options = {.correction = nw_correction_find(correction),
                               .surface_factor = 1.0,
                               .surface_reversals = 1e6,
                               .life_factor = 1.0};
    assert_int_equal(
        nw_notch_curve_build(nw_notch_rule_find("neuber"), &input, 800.0, &part.curve, NULL),
        NW_OK);
    assert_int_equal(nw_life_create(&part.material, &options, 0.02, 600.0, &part.life, NULL),
                     NW_OK);
    return part;
}

static void overloads_can_lengthen_life(void **state)
{
    static const struct {
        const char *correction;
        bool lengthens;
    } rows[] = {{"swt", true}, {"none", false}};
    for (size_t i = 0; i < 2; i++) {
        test_part part = aluminium_part(rows[i].correction);
        double damage[2], other[2];
        overload_block(&part, 1.0, damage);
        overload_block(&part, 1.2, other);
        assert_int_equal(blocks_of(other) > blocks_of(damage), rows[i].lengthens);
        test_part_free(&part);
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(rotation_keeps_damage_per_block),
        cmocka_unit_test(block_twice_does_twice_the_damage),
        cmocka_unit_test(repeats_equal_copies),
        cmocka_unit_test(reversed_signs_leave_none_unchanged),
        cmocka_unit_test(third_pass_equals_second),
        cmocka_unit_test(points_on_a_ramp_change_nothing),
        cmocka_unit_test(scaling_up_never_lengthens_life_under_none),
        cmocka_unit_test(overloads_can_lengthen_life),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
