#include "base/tree.h"

#include "base/text.h"

#include <stdlib.h>
#include <string.h>

void nw_node_free(nw_node *node)
{
    if (node == NULL) {
        return;
    }
    for (size_t i = 0; i < node->count; i++) {
        nw_node_free(node->children[i]);
    }
    free(node->children);
    free(node->key);
    free(node->scalar);
    free(node);
}

nw_place nw_tree_place(const char *file, size_t line, size_t column)
{
    nw_place place = {.line = line, .column = column};
    nw_text_copy(place.file, sizeof place.file, file);
    return place;
}

nw_place nw_node_place(const nw_node *node)
{
    return nw_tree_place(node->file, node->line, node->column);
}

nw_place nw_node_key_place(const nw_node *node)
{
    return node->key_line == 0 ? nw_node_place(node)
                               : nw_tree_place(node->file, node->key_line, node->key_column);
}

const nw_node *nw_node_entry(const nw_node *map, const char *key)
{
    if (map == NULL || map->kind != NW_NODE_MAP) {
        return NULL;
    }
    for (size_t i = 0; i < map->count; i++) {
        if (strcmp(map->children[i]->key, key) == 0) {
            return map->children[i];
        }
    }
    return NULL;
}

nw_status nw_node_append(nw_node *parent, nw_node *child)
{
    if (parent->count == parent->capacity) {
        size_t capacity = parent->capacity == 0 ? 8 : 2 * parent->capacity;
        nw_node **children = realloc(parent->children, capacity * sizeof *children);
        if (children == NULL) {
            nw_node_free(child);
            return NW_MEMORY;
        }
        parent->children = children;
        parent->capacity = capacity;
    }
    parent->children[parent->count++] = child;
    return NW_OK;
}
