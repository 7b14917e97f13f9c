/* The 'life' section. */
#include "job/case_sections.h"

#include "base/text.h"

#include <math.h>

enum { MOST_CORRECTIONS = 16 };

typedef struct section {
    double walker_gamma, damage_sum, surface_factor, roughness_mm, survival, target;
    int below_endurance;
} section;

static const char *const below_words[] = {"damages", "harmless", "harmless_until_exceeded", NULL};

static const nw_field rows[] = {
    {.key = "mean_stress", .kind = NW_FIELD_OTHER},
    {"walker_gamma", NW_FIELD_QUANTITY, NW_PURE, offsetof(section, walker_gamma), 0, false, 0.0,
     1.0, false, false, NULL},
    {"damage_sum", NW_FIELD_QUANTITY, NW_PURE, offsetof(section, damage_sum), 0, false, 0.0, 10.0,
     true, false, NULL},
    {.key = "below_endurance",
     .kind = NW_FIELD_CHOICE,
     .offset = offsetof(section, below_endurance),
     .choices = below_words},
    {"surface_factor", NW_FIELD_QUANTITY, NW_PURE, offsetof(section, surface_factor), 0, false, 0.0,
     2.0, true, false, NULL},
    {"roughness", NW_FIELD_QUANTITY, NW_LENGTH, offsetof(section, roughness_mm), 0, false, 0.0, 1.0,
     true, false, NULL},
    {"survival", NW_FIELD_QUANTITY, NW_FRACTION, offsetof(section, survival), 0, false, 0.0, 1.0,
     true, true, NULL},
    {"target", NW_FIELD_QUANTITY, NW_PURE, offsetof(section, target), 0, false, 0.0, INFINITY, true,
     true, NULL},
    {.key = NULL},
};

static void read_correction(nw_field_reader *reader, const nw_node *map, nw_case *result)
{
    result->correction = nw_correction_find("swt");
    const nw_node *node = nw_node_entry(map, "mean_stress");
    const char *keys[MOST_CORRECTIONS + 1] = {NULL};
    const nw_correction *record;
    for (size_t i = 0; i < MOST_CORRECTIONS && (record = nw_correction_at(i)) != NULL; i++) {
        keys[i] = record->key;
    }
    int index = node == NULL ? -1 : nw_field_word(reader, node, "life", "mean_stress", keys);
    if (index >= 0) {
        result->correction = nw_correction_at((size_t)index);
    }
}

static double or_default(double value, double otherwise)
{
    return isnan(value) ? otherwise : value;
}

void nw_case_read_life(nw_field_reader *reader, const nw_node *map, nw_case *result)
{
    section values = {.below_endurance = 0};
    nw_fields_read(reader, map, "life", rows, &values);
    read_correction(reader, map, result);
    result->walker_gamma = values.walker_gamma;
    result->damage_sum = or_default(values.damage_sum, 1.0);
    result->below_endurance = (nw_below_endurance)values.below_endurance;
    result->surface_factor = or_default(values.surface_factor, 1.0);
    result->roughness_um = 1e3 * values.roughness_mm;
    result->survival = or_default(values.survival, 0.5);
    result->target_blocks = values.target;
    if (!isnan(values.surface_factor) && !isnan(values.roughness_mm)) {
        nw_field_fault(reader, nw_node_entry(map, "roughness"), "life", "roughness",
                       "found both roughness and surface_factor, expected one of them");
    }
}
