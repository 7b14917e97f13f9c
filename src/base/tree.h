/* A YAML text as a small tree in which every node knows its place. Plain maps, lists and scalars only:
 * anchors, aliases and tags are refused, so what is read is what stands in the file. */
#ifndef NW_BASE_TREE_H
#define NW_BASE_TREE_H

#include "notchwright/status.h"

typedef enum nw_node_kind { NW_NODE_SCALAR, NW_NODE_LIST, NW_NODE_MAP } nw_node_kind;

typedef struct nw_node nw_node;
struct nw_node {
    nw_node_kind kind;
    bool quoted;      /* scalar in quotes */
    char *key;        /* entry of a map: its key, else NULL */
    char *scalar;     /* NW_NODE_SCALAR: the text */
    const char *file; /* owned by the root's owner; outlives the tree */
    size_t line, column;
    size_t key_line, key_column;
    size_t count; /* children of a list or map */
    size_t capacity;
    nw_node **children;
};

enum {
    NW_TREE_DEPTH = 24,           /* deepest nesting read */
    NW_TREE_BYTES = 64 * 1 << 20, /* largest file read */
};

/* Parses `text`. `file` is the name shown in faults; it is not copied.
 * All faults that can be found without guessing are added to `diagnostics`.
 * Returns NW_OK with *root (free with nw_node_free), NW_INPUT or NW_MEMORY with *root = NULL. */
nw_status nw_tree_parse(const char *text, size_t length, const char *file, nw_node **root,
                        nw_diagnostics *diagnostics);

/* Reads and parses a file; same statuses and NW_FILE. */
nw_status nw_tree_read(const char *file, nw_node **root, nw_diagnostics *diagnostics);

/* Replaces or adds the entry at `path` ("notch.rule", "load.2.repeats": lists count from 1) by the YAML
 * text `value`. `origin` names the source in faults and must outlive the tree. */
nw_status nw_tree_set(nw_node *root, const char *path, const char *value, const char *origin,
                      nw_diagnostics *diagnostics);

/* The entry of a map, or NULL. */
const nw_node *nw_node_entry(const nw_node *map, const char *key);

/* Place of a node's value, and of its key. */
nw_place nw_node_place(const nw_node *node);
nw_place nw_node_key_place(const nw_node *node);

/* A place in `file`. */
nw_place nw_tree_place(const char *file, size_t line, size_t column);

/* Takes the child over: it is freed when there is no room for it (NW_MEMORY). */
nw_status nw_node_append(nw_node *parent, nw_node *child);

void nw_node_free(nw_node *node);

#endif
