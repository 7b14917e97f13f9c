/* The 'notch' section. */
#include "job/case_sections.h"

#include "base/text.h"

#include <math.h>
#include <stdlib.h>

enum { MOST_RULES = 16 };

typedef struct section {
    double kt, kf, limit_load_ratio, residual_stress_mpa;
    int net_section, constraint;
} section;

static const char *const net_section_words[] = {"elastic", "plastic", NULL};
static const char *const constraint_words[] = {"plane_stress", NULL};

static const nw_field rows[] = {
    {"kt", NW_FIELD_QUANTITY, NW_PURE, offsetof(section, kt), 0, false, 1.0, 1000.0, false, false,
     NULL},
    {"kf", NW_FIELD_QUANTITY, NW_PURE, offsetof(section, kf), 0, false, 1.0, 1000.0, false, false,
     NULL},
    {.key = "rule", .kind = NW_FIELD_OTHER},
    {.key = "net_section",
     .kind = NW_FIELD_CHOICE,
     .offset = offsetof(section, net_section),
     .choices = net_section_words},
    {"limit_load_ratio", NW_FIELD_QUANTITY, NW_PURE, offsetof(section, limit_load_ratio), 0, false,
     1.0, 1e6, false, false, NULL},
    {.key = "curve", .kind = NW_FIELD_OTHER},
    {"residual_stress", NW_FIELD_QUANTITY, NW_STRESS, offsetof(section, residual_stress_mpa), 0,
     false, -1e4, 1e4, false, false, NULL},
    {.key = "constraint",
     .kind = NW_FIELD_CHOICE,
     .offset = offsetof(section, constraint),
     .choices = constraint_words},
    {.key = NULL},
};

static void read_rule(nw_field_reader *reader, const nw_node *map, nw_case *result)
{
    result->rule = nw_notch_rule_at(0);
    const nw_node *node = nw_node_entry(map, "rule");
    const char *keys[MOST_RULES + 1] = {NULL};
    const nw_notch_rule *rule;
    for (size_t i = 0; i < MOST_RULES && (rule = nw_notch_rule_at(i)) != NULL; i++) {
        keys[i] = rule->key;
    }
    int index = node == NULL ? -1 : nw_field_word(reader, node, "notch", "rule", keys);
    if (index >= 0) {
        result->rule = nw_notch_rule_at((size_t)index);
        result->rule_given = true;
    }
}

static void read_curve_file(nw_field_reader *reader, const nw_node *map, nw_case *result)
{
    const nw_node *node = nw_node_entry(map, "curve");
    if (node == NULL) {
        return;
    }
    if (node->kind != NW_NODE_SCALAR || node->scalar[0] == '\0') {
        nw_field_fault(reader, node, "notch", "curve", "found no single word, expected a file");
        return;
    }
    result->curve_file = nw_text_beside(result->file, node->scalar);
    result->curve_place = nw_node_place(node);
    if (result->curve_file == NULL) {
        reader->status = nw_fault(reader->diagnostics, NW_MEMORY, NULL, NULL, "out of memory");
    }
    const char *unit = reader->defaults->unit[NW_STRESS];
    if (unit != NULL) {
        nw_unit_factor(unit, NW_STRESS, &result->curve_stress_factor);
    }
}

static void check_rule_needs(nw_field_reader *reader, const nw_node *map, nw_case *result)
{
    const nw_notch_rule *rule = result->rule;
    if (rule->needs_limit_load_ratio && isnan(result->limit_load_ratio)) {
        nw_field_fault(reader, map, "notch", "limit_load_ratio",
                       "missing, expected a number of at least 1 for the rule %s", rule->key);
    }
    if (rule->is_table && nw_node_entry(map, "curve") == NULL) {
        nw_field_fault(reader, map, "notch", "curve",
                       "missing, expected the file of the notch curve for the rule %s", rule->key);
    }
    if (result->plastic_net_section && !rule->takes_plastic_net_section) {
        nw_field_fault(reader, nw_node_entry(map, "net_section"), "notch", "net_section",
                       "found plastic with the rule %s, expected elastic (plastic goes with neuber "
                       "and esed)",
                       rule->key);
    }
    if (result->kf > result->kt) {
        nw_field_fault(reader, nw_node_entry(map, "kf"), "notch", "kf",
                       "found %g, expected at most kt (%g)", result->kf, result->kt);
    }
}

void nw_case_read_notch(nw_field_reader *reader, const nw_node *map, nw_case *result)
{
    section values = {.net_section = 0};
    nw_fields_read(reader, map, "notch", rows, &values);
    result->kt = values.kt;
    result->kf = values.kf;
    result->factor = isnan(values.kf) ? values.kt : values.kf;
    result->limit_load_ratio = values.limit_load_ratio;
    result->residual_stress_mpa =
        isnan(values.residual_stress_mpa) ? 0.0 : values.residual_stress_mpa;
    result->plastic_net_section = values.net_section == 1;
    read_rule(reader, map, result);
    if (map != NULL && map->kind == NW_NODE_MAP) {
        read_curve_file(reader, map, result);
        check_rule_needs(reader, map, result);
    }
}
