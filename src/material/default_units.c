/* The 'units' entry of a case or material file. */
#include "material/material_file.h"

#include "base/fields.h"

#include <string.h>

static const char *const unit_keys[] = {"stress", "length", "strain", NULL};
static const nw_dimension unit_dimensions[] = {NW_STRESS, NW_LENGTH, NW_STRAIN};

nw_status nw_default_units_from_tree(const nw_node *map, const char *path, nw_default_units *units,
                                     nw_diagnostics *diagnostics)
{
    static const nw_field rows[] = {
        {.key = "stress", .kind = NW_FIELD_OTHER},
        {.key = "length", .kind = NW_FIELD_OTHER},
        {.key = "strain", .kind = NW_FIELD_OTHER},
        {.key = NULL},
    };
    const nw_node *entry = nw_node_entry(map, "units");
    nw_field_reader reader = {.diagnostics = diagnostics};
    char whole[64];
    nw_field_path(whole, sizeof whole, path, "units");
    nw_fields_read(&reader, entry, whole, rows, NULL);
    if (entry == NULL || entry->kind != NW_NODE_MAP) {
        return reader.status;
    }
    for (int i = 0; unit_keys[i] != NULL; i++) {
        const nw_node *node = nw_node_entry(entry, unit_keys[i]);
        double factor;
        if (node == NULL) {
            continue;
        }
        if (node->kind != NW_NODE_SCALAR ||
            !nw_unit_factor(node->scalar, unit_dimensions[i], &factor)) {
            nw_field_fault(&reader, node, whole, unit_keys[i], "found %s%s%s, expected %s",
                           node->kind == NW_NODE_SCALAR ? "'" : "",
                           node->kind == NW_NODE_SCALAR ? node->scalar : "no single unit",
                           node->kind == NW_NODE_SCALAR ? "'" : "",
                           nw_dimension_units(unit_dimensions[i]));
            continue;
        }
        units->unit[unit_dimensions[i]] = node->scalar;
    }
    return reader.status;
}
