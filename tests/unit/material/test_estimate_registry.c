/* Every estimate record is complete, and says why where it does not apply. */
#include "support/support.h"

static bool has(const char *text)
{
    return text != NULL && strlen(text) > 10;
}

static void records_are_complete(void **state)
{
    (void)state;
    const nw_estimate *record;
    size_t count = 0;
    for (; (record = nw_estimate_at(count)) != NULL; count++) {
        assert_ptr_equal(nw_estimate_find(record->key), record); /* keys differ */
        assert_true(record->key[strspn(record->key, "abcdefghijklmnopqrstuvwxyz_")] == '\0');
        assert_true(has(record->title) || strcmp(record->key, "medians") == 0);
        assert_true(has(record->range) && has(record->equation) && has(record->reference));
        assert_true(has(record->accuracy) && has(record->check));
        assert_true(record->doubt == NULL || has(record->doubt));
        assert_true(record->groups != 0 && record->needs != 0);
        assert_non_null(record->evaluate);
    }
    assert_int_equal(count, 9);
    assert_null(nw_estimate_find("none_such"));
}

static nw_estimate_input full_input(nw_group group)
{
    bool heavy = group != NW_ALUMINIUM;
    nw_estimate_input input = nw_estimate_input_unknown(group);
    input.ultimate_strength_mpa = heavy ? 700.0 : 450.0;
    input.youngs_modulus_mpa = heavy ? 206e3 : 70e3;
    input.hardness_hb = 205.0;
    input.reduction_of_area = 0.5;
    return input;
}

/* With every input, a method applies exactly to the groups it was made for. */
static void groups_decide(void **state)
{
    (void)state;
    for (int group = 0; group <= NW_GROUP_UNSTATED; group++) {
        nw_estimate_input input = full_input((nw_group)group);
        const nw_estimate *record;
        for (size_t i = 0; (record = nw_estimate_at(i)) != NULL; i++) {
            char why[300] = "";
            bool applies = nw_estimate_apply(record, &input, NULL, why, sizeof why);
            assert_int_equal(applies, (record->groups >> group) & 1u);
            assert_int_equal(applies, why[0] == '\0');
            if (!applies) {
                assert_non_null(strstr(why, nw_group_name((nw_group)group)));
            }
        }
    }
}

static void set_unknown(nw_estimate_input *input, unsigned need)
{
    double *value = need == NW_NEEDS_ULTIMATE   ? &input->ultimate_strength_mpa
                    : need == NW_NEEDS_MODULUS  ? &input->youngs_modulus_mpa
                    : need == NW_NEEDS_HARDNESS ? &input->hardness_hb
                                                : &input->reduction_of_area;
    *value = NAN;
}

/* Without one of its inputs a method does not apply and names it; without another's it does. */
static void missing_inputs_are_named(void **state)
{
    (void)state;
    static const struct {
        unsigned need;
        const char *name;
    } rows[] = {{NW_NEEDS_ULTIMATE, "ultimate_strength"},
                {NW_NEEDS_MODULUS, "youngs_modulus"},
                {NW_NEEDS_HARDNESS, "hardness"},
                {NW_NEEDS_FRACTURE_STRAIN, "reduction_of_area (or fracture_strain)"}};
    for (size_t k = 0; k < 4; k++) {
        nw_estimate_input input = full_input(NW_STEEL);
        set_unknown(&input, rows[k].need);
        const nw_estimate *record;
        for (size_t i = 0; (record = nw_estimate_at(i)) != NULL; i++) {
            char why[300] = "";
            bool applies = nw_estimate_apply(record, &input, NULL, why, sizeof why);
            assert_int_equal(applies, (record->needs & rows[k].need) == 0);
            if (!applies) {
                assert_non_null(strstr(why, rows[k].name));
                assert_non_null(strstr(why, "missing"));
            }
        }
    }
}

static void refused(const char *key, const nw_estimate_input *input, const char *reason)
{
    char why[300] = "";
    assert_false(nw_estimate_apply(nw_estimate_find(key), input, NULL, why, sizeof why));
    if (strstr(why, reason) == NULL) {
        fail_msg("%s: expected '%s', found '%s'", key, reason, why);
    }
}

static void ranges_are_kept(void **state)
{
    (void)state;
    nw_estimate_input input = full_input(NW_STEEL);
    input.hardness_hb = 149.0;
    refused("hardness", &input, "150 to 700 HB");
    input.hardness_hb = 701.0;
    refused("hardness", &input, "150 to 700 HB");
    refused("mitchell", &input, "below 500 HB");
    input.hardness_hb = NAN;
    input.ultimate_strength_mpa = 1800.0; /* about 522 HB */
    refused("mitchell", &input, "about 522 HB");
    input.ultimate_strength_mpa = 2297.0;
    refused("strength_power_laws", &input, "121 to 2296 MPa");
    refused("uniform_material_law", &input, "not positive");
    input.ultimate_strength_mpa = 120.0;
    refused("strength_power_laws", &input, "121 to 2296 MPa");
    input = full_input(NW_ALUMINIUM); /* strong for its modulus: no plastic strain left at 1e4 */
    input.ultimate_strength_mpa = 900.0;
    refused("four_point_correlation", &input, "leaves nothing plastic");
    refused("strength_power_laws", &input, "216 to 649 MPa");
    input = full_input(NW_STEEL);
    input.ultimate_strength_mpa = 2500.0;
    refused("modified_four_point", &input, "leaves nothing plastic");
}

/* For each group and what is known, the method that the published comparisons prefer. */
static void recommendation_follows_the_evidence(void **state)
{
    (void)state;
    const struct {
        nw_group group;
        bool hardness, area;
        const char *key;
    } rows[] = {
        {NW_STEEL, true, true, "hardness"},
        {NW_STEEL, true, false, "hardness"},
        {NW_STEEL, false, true, "modified_universal_slopes"},
        {NW_STEEL, false, false, "uniform_material_law"},
        {NW_CAST_STEEL, true, true, "strength_power_laws"},
        {NW_ALUMINIUM, true, true, "medians"},
        {NW_ALUMINIUM, false, false, "medians"},
        {NW_TITANIUM, false, true, "modified_universal_slopes"},
        {NW_TITANIUM, false, false, "uniform_material_law"},
        {NW_NICKEL, false, true, "universal_slopes"},
        {NW_NICKEL, false, false, NULL},
        {NW_CAST_IRON, true, true, NULL},
        {NW_OTHER_GROUP, true, true, NULL},
        {NW_GROUP_UNSTATED, true, true, NULL},
    };
    for (size_t i = 0; i < sizeof rows / sizeof rows[0]; i++) {
        nw_estimate_input input = full_input(rows[i].group);
        input.hardness_hb = rows[i].hardness ? input.hardness_hb : NAN;
        input.reduction_of_area = rows[i].area ? input.reduction_of_area : NAN;
        const char *because = NULL;
        const nw_estimate *record = nw_estimate_recommended(&input, &because);
        assert_true(has(because));
        if (rows[i].key == NULL) {
            assert_null(record);
        } else {
            assert_non_null(record);
            assert_string_equal(record->key, rows[i].key);
        }
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(records_are_complete),
        cmocka_unit_test(groups_decide),
        cmocka_unit_test(missing_inputs_are_named),
        cmocka_unit_test(ranges_are_kept),
        cmocka_unit_test(recommendation_follows_the_evidence),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
