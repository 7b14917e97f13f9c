/* One entry of a tree replaced: --set PATH=VALUE. */
#include "base/tree.h"

#include "base/text.h"

#include <stdio.h>
#include <stdlib.h>
#include <string.h>

static nw_status set_fault(const char *origin, nw_diagnostics *diagnostics, const char *found)
{
    nw_place place = nw_tree_place(origin, 0, 0);
    return nw_fault(diagnostics, NW_INPUT, &place, NULL, "%s", found);
}

/* Index of the child that a path step names, or count when there is none. */
static size_t child_of_step(const nw_node *parent, const char *step)
{
    if (parent->kind == NW_NODE_MAP) {
        for (size_t i = 0; i < parent->count; i++) {
            if (strcmp(parent->children[i]->key, step) == 0) {
                return i;
            }
        }
        return parent->count;
    }
    char *end;
    unsigned long number = strtoul(step, &end, 10);
    return *end == '\0' && number >= 1 && number <= parent->count ? number - 1 : parent->count;
}

static nw_node *add_map_child(nw_node *parent, const char *step, const char *origin)
{
    nw_node *child = calloc(1, sizeof *child);
    if (child == NULL) {
        return NULL;
    }
    child->kind = NW_NODE_MAP;
    child->file = origin;
    child->key = nw_text_duplicate(step);
    if (child->key == NULL) {
        nw_node_free(child);
        return NULL;
    }
    return nw_node_append(parent, child) == NW_OK ? child : NULL;
}

static nw_status put_child(nw_node *parent, size_t index, const char *step, nw_node *value)
{
    value->key = NULL;
    if (parent->kind == NW_NODE_MAP) {
        value->key = nw_text_duplicate(step);
        if (value->key == NULL) {
            nw_node_free(value);
            return NW_MEMORY;
        }
    }
    if (index < parent->count) {
        nw_node_free(parent->children[index]);
        parent->children[index] = value;
        return NW_OK;
    }
    return nw_node_append(parent, value);
}

static nw_status set_along(nw_node *root, char *path, nw_node *value, const char *origin,
                           nw_diagnostics *diagnostics)
{
    nw_node *parent = root;
    for (char *step = path;;) {
        char *dot = strchr(step, '.');
        if (dot != NULL) {
            *dot = '\0';
        }
        char found[200];
        if (*step == '\0' || parent->kind == NW_NODE_SCALAR) {
            nw_node_free(value);
            snprintf(found, sizeof found, "the path names no place at '%.60s'", step);
            return set_fault(origin, diagnostics, found);
        }
        size_t index = child_of_step(parent, step);
        if (index == parent->count && parent->kind == NW_NODE_LIST) {
            nw_node_free(value);
            snprintf(found, sizeof found, "found '%.60s', expected a number from 1 to %zu", step,
                     parent->count);
            return set_fault(origin, diagnostics, found);
        }
        if (dot == NULL) {
            return put_child(parent, index, step, value);
        }
        nw_node *next =
            index < parent->count ? parent->children[index] : add_map_child(parent, step, origin);
        if (next == NULL) {
            nw_node_free(value);
            return NW_MEMORY;
        }
        parent = next;
        step = dot + 1;
    }
}

nw_status nw_tree_set(nw_node *root, const char *path, const char *value, const char *origin,
                      nw_diagnostics *diagnostics)
{
    nw_node *node = NULL;
    nw_status status = nw_tree_parse(value, strlen(value), origin, &node, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    char *steps = nw_text_duplicate(path);
    if (steps == NULL) {
        nw_node_free(node);
        return NW_MEMORY;
    }
    status = set_along(root, steps, node, origin, diagnostics);
    free(steps);
    if (status == NW_MEMORY) {
        nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory setting %s", path);
    }
    return status;
}
