/* YAML events to a tree, with every plain thing's place and everything else refused. */
#include "base/tree.h"

#include "base/file.h"
#include "base/text.h"

#include <stdlib.h>
#include <string.h>
#include <yaml.h>

typedef struct loader {
    yaml_parser_t parser;
    const char *text;
    const char *file;
    nw_diagnostics *diagnostics;
    bool duplicate_found;
} loader;

static nw_place mark_place(const loader *in, yaml_mark_t mark)
{
    return nw_tree_place(in->file, mark.line + 1, mark.column + 1);
}

static nw_status out_of_memory(const loader *in)
{
    return nw_fault(in->diagnostics, NW_MEMORY, NULL, NULL, "out of memory reading %s", in->file);
}

/* Text that is no UTF-8 is reported by byte offset only. */
static yaml_mark_t mark_of_offset(const char *text, size_t offset)
{
    yaml_mark_t mark = {.index = offset};
    for (size_t i = 0; i < offset; i++) {
        mark.line += text[i] == '\n';
        mark.column = text[i] == '\n' ? 0 : mark.column + 1;
    }
    return mark;
}

static nw_status parser_fault(const loader *in)
{
    const yaml_parser_t *parser = &in->parser;
    if (parser->error == YAML_MEMORY_ERROR) {
        return out_of_memory(in);
    }
    yaml_mark_t mark = parser->problem_mark;
    if (parser->error == YAML_READER_ERROR) {
        mark = mark_of_offset(in->text, parser->problem_offset);
    }
    nw_place place = mark_place(in, mark);
    return nw_fault(in->diagnostics, NW_INPUT, &place, NULL, "not valid YAML: %s%s%s",
                    parser->problem == NULL ? "unreadable" : parser->problem,
                    parser->context == NULL ? "" : " ",
                    parser->context == NULL ? "" : parser->context);
}

static nw_status next_event(loader *in, yaml_event_t *event)
{
    return yaml_parser_parse(&in->parser, event) ? NW_OK : parser_fault(in);
}

static nw_node *new_node(const loader *in, nw_node_kind kind, yaml_mark_t mark)
{
    nw_node *node = calloc(1, sizeof *node);
    if (node != NULL) {
        node->kind = kind;
        node->file = in->file;
        node->line = mark.line + 1;
        node->column = mark.column + 1;
    }
    return node;
}

/* An event that a plain tree does not use, or NULL. */
static const char *refused_feature(const yaml_event_t *event)
{
    const yaml_char_t *anchor = NULL, *tag = NULL;
    switch (event->type) {
    case YAML_ALIAS_EVENT:
        return "an alias (*name)";
    case YAML_SCALAR_EVENT:
        anchor = event->data.scalar.anchor;
        tag = event->data.scalar.tag;
        break;
    case YAML_SEQUENCE_START_EVENT:
        anchor = event->data.sequence_start.anchor;
        tag = event->data.sequence_start.tag;
        break;
    case YAML_MAPPING_START_EVENT:
        anchor = event->data.mapping_start.anchor;
        tag = event->data.mapping_start.tag;
        break;
    default:
        break;
    }
    return anchor != NULL ? "an anchor (&name)" : tag != NULL ? "a tag (!name)" : NULL;
}

static nw_status load_value(loader *in, yaml_event_t *first, unsigned depth, nw_node **value);

static nw_status load_children(loader *in, nw_node *parent, unsigned depth);

/* Builds the node of `first` and what follows from it; takes `first` over. */
static nw_status load_value(loader *in, yaml_event_t *first, unsigned depth, nw_node **value)
{
    *value = NULL;
    nw_place place = mark_place(in, first->start_mark);
    const char *refused = refused_feature(first);
    if (refused != NULL) {
        yaml_event_delete(first);
        return nw_fault(in->diagnostics, NW_INPUT, &place, NULL,
                        "found %s, expected plain maps, lists and values", refused);
    }
    if (depth > NW_TREE_DEPTH) {
        yaml_event_delete(first);
        return nw_fault(in->diagnostics, NW_INPUT, &place, NULL,
                        "found more than %d levels of nesting, expected at most that",
                        NW_TREE_DEPTH);
    }
    nw_node_kind kind = first->type == YAML_MAPPING_START_EVENT    ? NW_NODE_MAP
                        : first->type == YAML_SEQUENCE_START_EVENT ? NW_NODE_LIST
                                                                   : NW_NODE_SCALAR;
    nw_node *node = new_node(in, kind, first->start_mark);
    if (node != NULL && kind == NW_NODE_SCALAR) {
        node->scalar = nw_text_duplicate((const char *)first->data.scalar.value);
        node->quoted = first->data.scalar.style != YAML_PLAIN_SCALAR_STYLE;
    }
    bool nul_inside = kind == NW_NODE_SCALAR &&
                      strlen((const char *)first->data.scalar.value) != first->data.scalar.length;
    yaml_event_delete(first);
    if (node == NULL || (kind == NW_NODE_SCALAR && node->scalar == NULL)) {
        nw_node_free(node);
        return out_of_memory(in);
    }
    nw_status status = NW_OK;
    if (nul_inside) {
        status = nw_fault(in->diagnostics, NW_INPUT, &place, NULL,
                          "found a NUL character, expected text");
    } else if (kind != NW_NODE_SCALAR) {
        status = load_children(in, node, depth);
    }
    if (status != NW_OK) {
        nw_node_free(node);
        return status;
    }
    *value = node;
    return NW_OK;
}

static nw_status read_key(loader *in, yaml_event_t *event, char **key, yaml_mark_t *mark)
{
    *mark = event->start_mark;
    const char *refused = refused_feature(event);
    if (refused != NULL || event->type != YAML_SCALAR_EVENT) {
        nw_place place = mark_place(in, event->start_mark);
        yaml_event_delete(event);
        return nw_fault(in->diagnostics, NW_INPUT, &place, NULL,
                        "found %s as a key, expected a plain word",
                        refused == NULL ? "a map or list" : refused);
    }
    *key = nw_text_duplicate((const char *)event->data.scalar.value);
    yaml_event_delete(event);
    return *key == NULL ? out_of_memory(in) : NW_OK;
}

static nw_status load_entry(loader *in, nw_node *map, yaml_event_t *key_event, unsigned depth)
{
    char *key = NULL;
    yaml_mark_t mark;
    nw_status status = read_key(in, key_event, &key, &mark);
    yaml_event_t event;
    nw_node *value = NULL;
    if (status == NW_OK) {
        status = next_event(in, &event);
    }
    if (status == NW_OK) {
        status = load_value(in, &event, depth + 1, &value);
    }
    if (status != NW_OK) {
        free(key);
        return status;
    }
    value->key = key;
    value->key_line = mark.line + 1;
    value->key_column = mark.column + 1;
    const nw_node *earlier = nw_node_entry(map, key);
    if (earlier != NULL) {
        nw_place place = nw_node_key_place(value);
        nw_fault(in->diagnostics, NW_INPUT, &place, NULL,
                 "found the key '%s' twice, first on line %zu; expected it once", key,
                 earlier->key_line);
        in->duplicate_found = true;
    }
    return nw_node_append(map, value) == NW_OK ? NW_OK : out_of_memory(in);
}

static nw_status load_children(loader *in, nw_node *parent, unsigned depth)
{
    yaml_event_type_t end =
        parent->kind == NW_NODE_MAP ? YAML_MAPPING_END_EVENT : YAML_SEQUENCE_END_EVENT;
    for (;;) {
        yaml_event_t event;
        nw_status status = next_event(in, &event);
        if (status != NW_OK) {
            return status;
        }
        if (event.type == end) {
            yaml_event_delete(&event);
            return NW_OK;
        }
        if (parent->kind == NW_NODE_MAP) {
            status = load_entry(in, parent, &event, depth);
        } else {
            nw_node *child = NULL;
            status = load_value(in, &event, depth + 1, &child);
            if (status == NW_OK && nw_node_append(parent, child) != NW_OK) {
                status = out_of_memory(in);
            }
        }
        if (status != NW_OK) {
            return status;
        }
    }
}

/* Stream start, document start, the document's value, document end, stream end. */
static nw_status load_document(loader *in, nw_node **root)
{
    *root = NULL;
    for (;;) {
        yaml_event_t event;
        nw_status status = next_event(in, &event);
        if (status != NW_OK) {
            return status;
        }
        yaml_event_type_t type = event.type;
        if (type == YAML_STREAM_START_EVENT || type == YAML_DOCUMENT_END_EVENT) {
            yaml_event_delete(&event);
        } else if (type == YAML_DOCUMENT_START_EVENT) {
            nw_place place = mark_place(in, event.start_mark);
            yaml_event_delete(&event);
            if (*root != NULL) {
                return nw_fault(in->diagnostics, NW_INPUT, &place, NULL,
                                "found a second YAML document, expected one");
            }
        } else if (type == YAML_STREAM_END_EVENT) {
            yaml_event_delete(&event);
            if (*root == NULL) {
                nw_place place = nw_tree_place(in->file, 1, 1);
                return nw_fault(in->diagnostics, NW_INPUT, &place, NULL,
                                "found nothing, expected 'key: value' entries");
            }
            return NW_OK;
        } else {
            status = load_value(in, &event, 1, root);
            if (status != NW_OK) {
                return status;
            }
        }
    }
}

nw_status nw_tree_parse(const char *text, size_t length, const char *file, nw_node **root,
                        nw_diagnostics *diagnostics)
{
    *root = NULL;
    loader in = {.text = text, .file = file, .diagnostics = diagnostics};
    if (!yaml_parser_initialize(&in.parser)) {
        return out_of_memory(&in);
    }
    yaml_parser_set_input_string(&in.parser, (const unsigned char *)text, length);
    nw_status status = load_document(&in, root);
    yaml_parser_delete(&in.parser);
    if (status == NW_OK && in.duplicate_found) {
        status = NW_INPUT;
    }
    if (status != NW_OK) {
        nw_node_free(*root);
        *root = NULL;
    }
    return status;
}

nw_status nw_tree_read(const char *file, nw_node **root, nw_diagnostics *diagnostics)
{
    *root = NULL;
    char *text = NULL;
    size_t length = 0;
    nw_status status = nw_file_read(file, NW_TREE_BYTES, &text, &length, diagnostics);
    if (status == NW_OK) {
        status = nw_tree_parse(text, length, file, root, diagnostics);
    }
    free(text);
    return status;
}
