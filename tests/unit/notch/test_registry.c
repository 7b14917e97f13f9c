/* Every record says what it is: a new one that leaves something out fails here. */
#include "support/support.h"

static void assert_text(const char *text)
{
    assert_non_null(text);
    assert_true(strlen(text) > 2);
}

/* Keys are what users type: small letters and underscores. */
static void assert_key(const char *key)
{
    assert_non_null(key);
    assert_true(strlen(key) > 2);
    assert_int_equal(strspn(key, "abcdefghijklmnopqrstuvwxyz_0123456789"), strlen(key));
}

static void notch_rules(void **state)
{
    size_t i = 0;
    for (const nw_notch_rule *r; (r = nw_notch_rule_at(i)) != NULL; i++) {
        assert_key(r->key);
        assert_text(r->title);
        assert_text(r->equation);
        assert_text(r->reference);
        assert_ptr_equal(nw_notch_rule_find(r->key), r);
        assert_int_equal(r->residual == NULL, r->is_table);
    }
    assert_true(i >= 5);
    assert_null(nw_notch_rule_at(1000));
    assert_null(nw_notch_rule_find("nueber"));
}

static void corrections(void **state)
{
    size_t i = 0;
    for (const nw_correction *r; (r = nw_correction_at(i)) != NULL; i++) {
        assert_key(r->key);
        assert_text(r->title);
        assert_text(r->equation);
        assert_text(r->reference);
        assert_ptr_equal(nw_correction_find(r->key), r);
        assert_true(r->terms != NULL && r->prepare != NULL);
    }
    assert_true(i >= 5);
    assert_null(nw_correction_at(1000));
    assert_null(nw_correction_find(""));
}

static void estimates(void **state)
{
    size_t i = 0;
    for (const nw_estimate *r; (r = nw_estimate_at(i)) != NULL; i++) {
        assert_key(r->key);
        assert_text(r->title);
        assert_text(r->range);
        assert_text(r->reference);
        assert_ptr_equal(nw_estimate_find(r->key), r);
        assert_true(r->evaluate != NULL);
    }
    assert_true(i >= 1);
    assert_null(nw_estimate_at(1000));
    assert_null(nw_estimate_find("none such"));
}

static void assert_unlike(const char *const *keys, size_t count)
{
    for (size_t i = 0; i < count; i++) {
        for (size_t j = 0; j < i; j++) {
            assert_string_not_equal(keys[i], keys[j]);
        }
    }
}

static void keys_differ(void **state)
{
    const char *keys[64];
    size_t count = 0;
    for (; count < 64 && nw_notch_rule_at(count) != NULL; count++) {
        keys[count] = nw_notch_rule_at(count)->key;
    }
    assert_unlike(keys, count);
    for (count = 0; count < 64 && nw_correction_at(count) != NULL; count++) {
        keys[count] = nw_correction_at(count)->key;
    }
    assert_unlike(keys, count);
    for (count = 0; count < 64 && nw_estimate_at(count) != NULL; count++) {
        keys[count] = nw_estimate_at(count)->key;
    }
    assert_unlike(keys, count);
}

/* The names the contract fixes. */
static void contract_names(void **state)
{
    static const char *const rules[] = {"neuber", "esed", "linear", "limit_load", "curve"};
    static const char *const means[] = {"none", "morrow", "manson_halford", "swt", "walker"};
    for (int i = 0; i < 5; i++) {
        assert_non_null(nw_notch_rule_find(rules[i]));
        assert_non_null(nw_correction_find(means[i]));
    }
    assert_non_null(nw_estimate_find("uniform_material_law"));
}

/* Words for enumerations: none missing. */
static void enumeration_names(void **state)
{
    for (int i = NW_OK; i <= NW_MEMORY; i++) {
        assert_text(nw_status_text((nw_status)i));
        assert_in_range(nw_status_exit((nw_status)i), 0, 5);
    }
    for (int i = NW_STEEL; i <= NW_OTHER_GROUP; i++) {
        assert_text(nw_group_name((nw_group)i));
    }
    for (int i = NW_TESTED; i <= NW_ESTIMATED; i++) {
        assert_text(nw_basis_name((nw_basis)i));
    }
    for (int i = NW_DAMAGES; i <= NW_HARMLESS_UNTIL_EXCEEDED; i++) {
        assert_text(nw_below_endurance_name((nw_below_endurance)i));
    }
    for (int i = NW_NOMINAL_STRESS; i <= NW_NOTCH_STRAIN; i++) {
        assert_text(nw_load_kind_name((nw_load_kind)i));
    }
}

int main(void)
{
    const struct CMUnitTest tests[] = {
        cmocka_unit_test(notch_rules),    cmocka_unit_test(corrections),
        cmocka_unit_test(estimates),      cmocka_unit_test(keys_differ),
        cmocka_unit_test(contract_names), cmocka_unit_test(enumeration_names),
    };
    return cmocka_run_group_tests(tests, NULL, NULL);
}
