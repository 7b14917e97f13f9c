/* A material from a tree: a file of its own or a map inside a case. */
#ifndef NW_MATERIAL_FILE_H
#define NW_MATERIAL_FILE_H

#include "base/tree.h"
#include "notchwright/material.h"
#include "notchwright/quantity.h"

/* Reads and completes. With `is_file` the keys notchwright_material, name, basis and source are required;
 * inside a case they are not. `path` is the key path of the map. `defaults` may be NULL; a 'units' entry
 * of the map itself takes precedence. */
nw_status nw_material_from_tree(const nw_node *map, const char *path, bool is_file,
                                const nw_default_units *defaults, nw_material *material,
                                nw_diagnostics *diagnostics);

/* Reads a 'units: {stress: MPa, length: mm}' entry; absent: leaves `units` as it is. */
nw_status nw_default_units_from_tree(const nw_node *map, const char *path, nw_default_units *units,
                                     nw_diagnostics *diagnostics);

/* Fills in what follows from the rest (estimate, compatibility) and checks that the set can be used;
 * faults are placed at `map`. */
nw_status nw_material_complete(nw_material *material, const nw_node *map, const char *path,
                               const char *estimate, nw_diagnostics *diagnostics);

#endif
