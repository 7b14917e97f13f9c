/* Every notch rule there is, in the order shown. */
#include "notch/rules.h"

#include <string.h>

static const nw_notch_rule *const records[] = {
    &nw_notch_rule_neuber,     &nw_notch_rule_esed,         &nw_notch_rule_linear,
    &nw_notch_rule_limit_load, &nw_notch_rule_seeger_beste, &nw_notch_rule_curve,
};

const nw_notch_rule *nw_notch_rule_at(size_t index)
{
    return index < sizeof records / sizeof records[0] ? records[index] : NULL;
}

const nw_notch_rule *nw_notch_rule_find(const char *key)
{
    const nw_notch_rule *rule;
    for (size_t i = 0; (rule = nw_notch_rule_at(i)) != NULL; i++) {
        if (strcmp(rule->key, key) == 0) {
            return rule;
        }
    }
    return NULL;
}
