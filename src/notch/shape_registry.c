/* Every shape there is, in the order shown. */
#include "notch/shapes.h"

#include <string.h>

static const nw_shape *const records[] = {
    &nw_shape_round_bar_fillet,   &nw_shape_round_bar_groove,     &nw_shape_round_bar_cross_hole,
    &nw_shape_flat_bar_fillet,    &nw_shape_flat_bar_notches,     &nw_shape_flat_bar_edge_notch,
    &nw_shape_flat_bar_hole,      &nw_shape_flat_bar_offset_hole, &nw_shape_ellipse_in_plate,
    &nw_shape_shallow_edge_notch,
};

const nw_shape *nw_shape_at(size_t index)
{
    return index < sizeof records / sizeof records[0] ? records[index] : NULL;
}

const nw_shape *nw_shape_find(const char *key)
{
    const nw_shape *shape;
    for (size_t i = 0; (shape = nw_shape_at(i)) != NULL; i++) {
        if (strcmp(shape->key, key) == 0) {
            return shape;
        }
    }
    return NULL;
}

const nw_shape_load *nw_shape_load_find(const nw_shape *shape, const char *key)
{
    for (const nw_shape_load *const *load = shape->loads; *load != NULL; load++) {
        if (strcmp((*load)->key, key) == 0) {
            return *load;
        }
    }
    return NULL;
}

const nw_shape_size *nw_shape_size_find(const nw_shape *shape, const char *key)
{
    for (const nw_shape_size *row = shape->sizes; row->key != NULL; row++) {
        if (strcmp(row->key, key) == 0 || (row->other != NULL && strcmp(row->other, key) == 0)) {
            return row;
        }
    }
    return NULL;
}

const char *nw_action_name(nw_action action)
{
    static const char *const names[] = {"force", "moment", "stress"};
    return action <= NW_ACTION_STRESS ? names[action] : "unknown";
}
