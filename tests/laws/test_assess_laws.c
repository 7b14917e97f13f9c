/* What holds for every assessment as a user gets it: the block's laws through the case file, and the parts of
 * one result against each other.
 *
 * Tolerance 1e-9 relative, as for the block laws: rounding along different ways, and the life table's own
 * error where an argument stands at the edge of two bins. */
#include "support/support.h"

enum { CASES = 100, LONGEST = 30, TEXT = 16384 };

static const double agreed = 1e-9;

typedef struct text {
    char chars[TEXT];
    size_t used;
} text;

static void add(text *to, const char *format, ...) __attribute__((format(printf, 2, 3)));

static void add(text *to, const char *format, ...)
{
    va_list arguments;
    va_start(arguments, format);
    int length = vsnprintf(to->chars + to->used, TEXT - to->used, format, arguments);
    va_end(arguments);
    to->used += (size_t)length;
    assert_true(to->used < TEXT);
}

static const char *const rules[] = {"neuber", "esed", "linear", "limit_load"};
static const char *const corrections[] = {"none", "morrow", "manson_halford", "swt", "walker"};

static text random_head(test_random *random)
{
    text t = {.used = 0};
    add(&t, "notchwright: 1\n"
            "material: {estimate: uniform_material_law, group: steel, youngs_modulus: 206 GPa,\n");
    add(&t, "  ultimate_strength: %.3f MPa}\n", test_random_between(random, 450.0, 1200.0));
    add(&t, "notch: {kt: %.3f, rule: %s, limit_load_ratio: 2.5, residual_stress: %d MPa}\n",
        test_random_between(random, 1.2, 3.5), rules[test_random_int(random, 0, 3)],
        test_random_int(random, -2, 2) * 60);
    add(&t, "life: {mean_stress: %s}\n", corrections[test_random_int(random, 0, 4)]);
    add(&t, "load:\n");
    return t;
}

static size_t random_values(test_random *random, int *values)
{
    size_t count = (size_t)test_random_int(random, 3, LONGEST);
    int step = test_random_int(random, 0, 1) == 0 ? 60 : 1;
    for (size_t i = 0; i < count; i++) {
        values[i] = test_random_int(random, -240 / step, 300 / step) * step;
    }
    values[0] = 300;
    values[1] = -200;
    return count;
}

/* An event of `copies` times the values, passed `repeats` times. */
static void add_event(text *to, const int *values, size_t count, int copies, int repeats)
{
    add(to, "  - scale: 1 MPa\n    repeats: %d\n    history: [", repeats);
    for (int c = 0; c < copies; c++) {
        for (size_t i = 0; i < count; i++) {
            add(to, "%s%d", c == 0 && i == 0 ? "" : ", ", values[i]);
        }
    }
    add(to, "]\n");
}

static nw_assessment *assess(const char *path, const text *t, const nw_assess_options *options)
{
    nw_diagnostics diagnostics;
    nw_diagnostics_clear(&diagnostics);
    nw_case input;
    nw_assessment *result = NULL;
    FILE *file = fopen(path, "w");
    assert_non_null(file);
    assert_int_equal(fwrite(t->chars, 1, t->used, file), t->used);
    assert_int_equal(fclose(file), 0);
    assert_int_equal(nw_case_read(path, NULL, 0, &input, &diagnostics), NW_OK);
    assert_int_equal(nw_assess(&input, options, &result, &diagnostics), NW_OK);
    nw_case_clear(&input);
    return result;
}

static const nw_assess_options all = {.all_loops = true};

static void assert_same_damage(const nw_assessment *a, const nw_assessment *b)
{
    assert_near(a->damage_first_block, b->damage_first_block, agreed, 0.0);
    assert_near(a->damage_per_block, b->damage_per_block, agreed, 0.0);
    assert_near(a->life_blocks, b->life_blocks, agreed, 0.0);
    assert_near(a->loops_total, b->loops_total, 0.0, 0.0);
    assert_near(a->samples, b->samples, 0.0, 0.0);
}

/* `law` writes one or two cases and compares what comes back. */
typedef void law_function(test_random *random, const char *path);

static void for_all(uint64_t seed, law_function *law)
{
    test_scratch scratch = test_scratch_create();
    test_random random = {seed};
    for (int i = 0; i < CASES; i++) {
        law(&random, test_scratch_path(&scratch, "case.yaml"));
    }
    test_scratch_remove(&scratch);
}

static void copies_law(test_random *random, const char *path)
{
    int values[LONGEST], more[LONGEST], repeats = test_random_int(random, 1, 5);
    size_t count = random_values(random, values), more_count = random_values(random, more);
    text t = random_head(random), u = t;
    add_event(&t, values, count, 1, repeats);
    add_event(&t, more, more_count, 1, 1);
    add_event(&u, values, count, repeats, 1);
    add_event(&u, more, more_count, 1, 1);
    nw_assessment *a = assess(path, &t, &all), *b = assess(path, &u, &all);
    assert_same_damage(a, b);
    nw_assessment_free(a);
    nw_assessment_free(b);
}

static void repeats_equal_copies(void **state)
{
    for_all(71, copies_law);
}

/* Half the life, as long as it is more than two blocks: then both lives are 1 + (1 - D1)/Ds of their own. */
static void twice_law(test_random *random, const char *path)
{
    int values[LONGEST];
    size_t count = random_values(random, values);
    text t = random_head(random), u = t;
    add_event(&t, values, count, 1, 1);
    add_event(&u, values, count, 2, 1);
    nw_assessment *a = assess(path, &t, &all), *b = assess(path, &u, &all);
    assert_near(b->damage_per_block, 2.0 * a->damage_per_block, agreed, 0.0);
    assert_near(b->damage_first_block, a->damage_first_block + a->damage_per_block, agreed, 0.0);
    if (a->life_blocks > 2.0) {
        assert_near(2.0 * b->life_blocks, a->life_blocks, agreed, 0.0);
    }
    nw_assessment_free(a);
    nw_assessment_free(b);
}

static void block_twice_halves_the_life(void **state)
{
    for_all(72, twice_law);
}

static void rotation_law(test_random *random, const char *path)
{
    int values[LONGEST], turned[LONGEST];
    size_t count = random_values(random, values);
    size_t by = (size_t)test_random_int(random, 1, (int)count - 1);
    for (size_t i = 0; i < count; i++) {
        turned[i] = values[(i + by) % count];
    }
    text t = random_head(random), u = t;
    add_event(&t, values, count, 1, 1);
    add_event(&u, turned, count, 1, 1);
    nw_assessment *a = assess(path, &t, &all), *b = assess(path, &u, &all);
    assert_near(b->damage_per_block, a->damage_per_block, agreed, 0.0);
    assert_near(b->loops_total, a->loops_total, 0.0, 0.0);
    assert_int_equal(b->loop_count, a->loop_count);
    nw_assessment_free(a);
    nw_assessment_free(b);
}

static void rotation_keeps_damage_per_block(void **state)
{
    for_all(73, rotation_law);
}

/* A history cut into events that follow one another is the same history. */
static void cut_law(test_random *random, const char *path)
{
    int values[LONGEST];
    size_t count = random_values(random, values);
    size_t at = (size_t)test_random_int(random, 1, (int)count - 1);
    text t = random_head(random), u = t;
    add_event(&t, values, count, 1, 1);
    add_event(&u, values, at, 1, 1);
    add_event(&u, values + at, count - at, 1, 1);
    nw_assessment *a = assess(path, &t, &all), *b = assess(path, &u, &all);
    assert_same_damage(a, b);
    nw_assessment_free(a);
    nw_assessment_free(b);
}

static void cut_history_is_the_same_block(void **state)
{
    for_all(74, cut_law);
}

/* Loops sum to the totals and come in falling damage. */
static void totals_law(test_random *random, const char *path)
{
    int values[LONGEST];
    text t = random_head(random);
    for (int e = 0; e < 3; e++) {
        size_t count = random_values(random, values);
        add_event(&t, values, count, 1, test_random_int(random, 1, 1000));
    }
    nw_assessment *a = assess(path, &t, &all);
    double damage = 0.0, count = 0.0, share = 0.0;
    for (size_t i = 0; i < a->loop_count; i++) {
        const nw_loop_result *loop = &a->loops[i];
        damage += loop->damage;
        count += loop->count;
        share += loop->share;
        if (loop->damage > 0.0) {
            assert_near(loop->damage * loop->cycles, loop->count, 1e-12, 0.0);
        }
        assert_true(i == 0 || loop->damage <= a->loops[i - 1].damage);
    }
    assert_near(damage, a->damage_per_block, agreed, 0.0);
    assert_near(count, a->loops_total, 0.0, 0.0);
    assert_near(share, 1.0, agreed, 0.0);
    assert_near(a->turning_points, 2.0 * a->loops_total, 0.0, 0.0);
    nw_assessment_free(a);
}

static void loops_sum_to_the_totals(void **state)
{
    for_all(75, totals_law);
}

typedef struct places {
    int values[3][LONGEST];
    size_t count[3];
} places;

static void assert_place(const places *p, nw_history_place place, const nw_loop_values *v,
                         double per_value)
{
    assert_true(place.event < 3);
    assert_true(place.sample < p->count[place.event]);
    double load = per_value * p->values[place.event][place.sample];
    assert_true(fabs(load - v->load_max_mpa) < 1e-9 || fabs(load - v->load_min_mpa) < 1e-9);
}

/* Where the tips are said to stand in the histories, their loads stand. */
static void places_law(test_random *random, const char *path)
{
    places p;
    text t = {.used = 0};
    add(&t, "notchwright: 1\nmaterial: sae-1045-normalised\nnotch: {kt: 1.5}\nload:\n");
    for (int e = 0; e < 3; e++) {
        p.count[e] = random_values(random, p.values[e]);
        add_event(&t, p.values[e], p.count[e], 1, test_random_int(random, 1, 3));
    }
    nw_assessment *a = assess(path, &t, &all);
    for (size_t i = 0; i < a->loop_count; i++) {
        assert_place(&p, a->loops[i].start, &a->loops[i].values, 1.5);
        assert_place(&p, a->loops[i].tip, &a->loops[i].values, 1.5);
    }
    nw_assessment_free(a);
}

static void loads_stand_where_they_are_said_to(void **state)
{
    for_all(77, places_law);
}

/* Asking for the worst loops only gives the first of all loops, and changes no number. */
static void worst_law(test_random *random, const char *path)
{
    int values[LONGEST];
    text t = random_head(random);
    for (int e = 0; e < 3; e++) {
        size_t count = random_values(random, values);
        add_event(&t, values, count, 1, test_random_int(random, 1, 50));
    }
    nw_assess_options worst = {.worst = (size_t)test_random_int(random, 1, 12)};
    nw_assessment *a = assess(path, &t, &all), *b = assess(path, &t, &worst);
    assert_same_damage(a, b);
    assert_int_equal(b->loop_count, a->loop_count < worst.worst ? a->loop_count : worst.worst);
    for (size_t i = 0; i < b->loop_count; i++) {
        assert_near(b->loops[i].damage, a->loops[i].damage, agreed, 0.0);
        assert_near(b->loops[i].count, a->loops[i].count, 0.0, 0.0);
    }
    nw_assessment_free(a);
    nw_assessment_free(b);
}

static void worst_loops_are_the_first_of_all(void **state)
{
    for_all(76, worst_law);
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(repeats_equal_copies),
        cmocka_unit_test(block_twice_halves_the_life),
        cmocka_unit_test(rotation_keeps_damage_per_block),
        cmocka_unit_test(cut_history_is_the_same_block),
        cmocka_unit_test(loops_sum_to_the_totals),
        cmocka_unit_test(loads_stand_where_they_are_said_to),
        cmocka_unit_test(worst_loops_are_the_first_of_all),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
