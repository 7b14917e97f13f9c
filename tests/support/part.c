#include "support/part.h"

/* Parameters as metals have them, not compatible with each other on purpose. */
static nw_material random_material(test_random *random)
{
    return (nw_material){
        .group = NW_STEEL,
        .youngs_modulus_mpa = test_random_between(random, 7e4, 2.1e5),
        .strength_coefficient_mpa = test_random_between(random, 700.0, 2000.0),
        .hardening_exponent = test_random_between(random, 0.05, 0.25),
        .fatigue_strength_coefficient_mpa = test_random_between(random, 1500.0, 2500.0),
        .fatigue_strength_exponent = test_random_between(random, -0.13, -0.06),
        .fatigue_ductility_coefficient = test_random_between(random, 0.1, 1.5),
        .fatigue_ductility_exponent = test_random_between(random, -0.75, -0.5),
    };
}

static const char *const rules[] = {"neuber", "esed", "linear", "limit_load"};

static void make_curve(test_part *part, test_random *random)
{
    part->rule = nw_notch_rule_find(rules[test_random_int(random, 0, 3)]);
    part->rule_input = (nw_rule_input){
        .youngs_modulus_mpa = part->material.youngs_modulus_mpa,
        .strength_coefficient_mpa = part->material.strength_coefficient_mpa,
        .hardening_exponent = part->material.hardening_exponent,
        .factor = 2.5,
        .limit_load_ratio = test_random_between(random, 1.5, 4.0),
        .plastic_net_section =
            part->rule->takes_plastic_net_section && test_random_int(random, 0, 1) == 1,
    };
    assert_int_equal(
        nw_notch_curve_build(part->rule, &part->rule_input, TEST_PART_LOAD_MAX, &part->curve, NULL),
        NW_OK);
}

static const nw_correction *random_correction(test_random *random)
{
    size_t count = 0;
    while (nw_correction_at(count) != NULL) {
        count++;
    }
    return nw_correction_at((size_t)test_random_int(random, 0, (int)count - 1));
}

test_part test_part_random(test_random *random, const char *correction)
{
    test_part part = {.material = random_material(random)};
    make_curve(&part, random);
    part.correction =
        correction == NULL ? random_correction(random) : nw_correction_find(correction);
    nw_life_options options = {
        .correction = part.correction,
        .walker_gamma = test_random_between(random, 0.4, 0.8),
        .surface_factor = 1.0,
        .surface_reversals = 1e6,
        .life_factor = 1.0,
    };
    double stress, strain;
    nw_notch_curve_at(part.curve, TEST_PART_LOAD_MAX, &stress, &strain);
    assert_int_equal(nw_life_create(&part.material, &options, strain, stress, &part.life, NULL),
                     NW_OK);
    return part;
}

void test_part_free(test_part *part)
{
    nw_life_free(part->life);
    nw_notch_curve_free(part->curve);
}

typedef struct sum {
    const nw_life *life;
    double damage;
} sum;

static nw_status add_damage(void *data, const nw_loop *loops, size_t count, double weight)
{
    sum *to = data;
    double rates[64];
    for (size_t first = 0; first < count; first += 64) {
        size_t size = count - first < 64 ? count - first : 64;
        nw_life_rates(to->life, loops + first, size, rates);
        for (size_t i = 0; i < size; i++) {
            to->damage += weight * rates[i];
        }
    }
    return NW_OK;
}

void test_part_damage(const test_part *part, const nw_event *events, size_t count, double *damage,
                      size_t passes)
{
    sum to = {part->life, 0.0};
    nw_tracker *tracker;
    assert_int_equal(nw_tracker_create(part->curve, 0.0, add_damage, &to, &tracker), NW_OK);
    for (size_t i = 0; i < passes; i++) {
        to.damage = 0.0;
        assert_int_equal(nw_block_pass(tracker, events, count), NW_OK);
        damage[i] = to.damage;
    }
    nw_tracker_free(tracker);
}

size_t test_random_loads(test_random *random, double *loads, size_t most)
{
    static const int reaches[] = {2, 4, 10, 100, 1000};
    int reach = reaches[test_random_int(random, 0, 4)];
    double scale = test_random_between(random, 300.0, 1000.0) / reach;
    size_t count = (size_t)test_random_int(random, 3, (int)most);
    loads[0] = reach * scale; /* never a constant history */
    for (size_t i = 1; i < count; i++) {
        loads[i] = test_random_int(random, -reach, reach) * scale;
    }
    loads[1] = -0.5 * reach * scale;
    return count;
}
