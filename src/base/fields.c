#include "base/fields.h"

#include "base/text.h"

#include <math.h>
#include <stdarg.h>
#include <stdio.h>
#include <string.h>

enum { PATH_LENGTH = 128, MOST_KEYS = 64 };

char *nw_field_path(char *text, size_t capacity, const char *path, const char *key)
{
    snprintf(text, capacity, "%s%s%s", path, path[0] == '\0' || key[0] == '\0' ? "" : ".", key);
    return text;
}

int nw_choice_index(const char *const *choices, const char *word)
{
    for (int i = 0; choices[i] != NULL; i++) {
        if (strcmp(choices[i], word) == 0) {
            return i;
        }
    }
    return -1;
}

void nw_field_fault(nw_field_reader *reader, const nw_node *node, const char *path, const char *key,
                    const char *format, ...)
{
    char message[400], whole[PATH_LENGTH];
    va_list arguments;
    va_start(arguments, format);
    vsnprintf(message, sizeof message, format, arguments);
    va_end(arguments);
    nw_place place = nw_node_place(node);
    reader->status = nw_fault(reader->diagnostics, NW_INPUT, &place,
                              nw_field_path(whole, sizeof whole, path, key), "%s", message);
}

static const char *kind_of(const nw_node *node)
{
    return node->kind == NW_NODE_MAP ? "a map" : node->kind == NW_NODE_LIST ? "a list" : "a value";
}

static bool is_scalar(nw_field_reader *reader, const nw_node *node, const char *path,
                      const char *key)
{
    if (node->kind == NW_NODE_SCALAR && node->scalar[0] != '\0') {
        return true;
    }
    nw_field_fault(reader, node, path, key, "found %s, expected one value",
                   node->kind == NW_NODE_SCALAR ? "nothing" : kind_of(node));
    return false;
}

bool nw_field_quantity(nw_field_reader *reader, const nw_node *node, const char *path,
                       const char *key, nw_dimension dimension, double *value)
{
    if (!is_scalar(reader, node, path, key)) {
        return false;
    }
    char why[300];
    nw_status status =
        nw_quantity_read(node->scalar, dimension, reader->defaults, value, why, sizeof why);
    if (status != NW_OK) {
        nw_field_fault(reader, node, path, key, "%s", why);
    }
    return status == NW_OK;
}

static const char *internal_unit(nw_dimension dimension)
{
    switch (dimension) {
    case NW_STRESS:
        return " MPa";
    case NW_LENGTH:
        return " mm";
    case NW_HARDNESS:
        return " HB";
    default:
        return "";
    }
}

static bool within(const nw_field *row, double value)
{
    if (row->low == row->high) {
        return true;
    }
    bool above = row->low_open ? value > row->low : value >= row->low;
    bool below = row->high_open ? value < row->high : value <= row->high;
    return above && below;
}

static void check_limits(nw_field_reader *reader, const nw_node *node, const char *path,
                         const nw_field *row, double value)
{
    if (within(row, value)) {
        return;
    }
    const char *unit = internal_unit(row->dimension);
    char low[48] = "", high[48] = "";
    if (isfinite(row->low)) {
        snprintf(low, sizeof low, "%s %.6g%s", row->low_open ? "above" : "at least", row->low,
                 unit);
    }
    if (isfinite(row->high)) {
        snprintf(high, sizeof high, "%s%s %.6g%s", low[0] == '\0' ? "" : " and ",
                 row->high_open ? "below" : "at most", row->high, unit);
    }
    nw_field_fault(reader, node, path, row->key, "found %s, expected a value %s%s", node->scalar,
                   low, high);
}

static void read_number(nw_field_reader *reader, const nw_node *node, const char *path,
                        const nw_field *row, double *value)
{
    if (!nw_field_quantity(reader, node, path, row->key, row->dimension, value)) {
        return;
    }
    if (row->kind == NW_FIELD_COUNT && *value != floor(*value)) {
        nw_field_fault(reader, node, path, row->key, "found %s, expected a whole number",
                       node->scalar);
        return;
    }
    check_limits(reader, node, path, row, *value);
}

int nw_field_word(nw_field_reader *reader, const nw_node *node, const char *path, const char *key,
                  const char *const *words)
{
    if (!is_scalar(reader, node, path, key)) {
        return -1;
    }
    int index = nw_choice_index(words, node->scalar);
    if (index < 0) {
        char list[300];
        const char *nearest = nw_text_nearest(node->scalar, words);
        nw_field_fault(reader, node, path, key, "found '%.60s', expected %s%s%s%s", node->scalar,
                       nw_text_join(list, sizeof list, words),
                       nearest == NULL ? "" : "; did you mean '", nearest == NULL ? "" : nearest,
                       nearest == NULL ? "" : "'?");
    }
    return index;
}

void nw_field_check_format(nw_field_reader *reader, const nw_node *map, const char *key,
                           const char *what, double format)
{
    if (!isnan(format) && format != 1.0) {
        nw_field_fault(reader, nw_node_entry(map, key), "", key,
                       "found %s format %g, expected 1, the one this version reads", what, format);
    }
}

static void read_choice(nw_field_reader *reader, const nw_node *node, const char *path,
                        const nw_field *row, int *value)
{
    int index = nw_field_word(reader, node, path, row->key, row->choices);
    *value = index >= 0 ? index : *value;
}

/* Control characters and those that turn the direction of text could make a page say what it does not. */
static void make_printable(char *text)
{
    for (unsigned char *p = (unsigned char *)text; *p != '\0'; p++) {
        bool turns = p[0] == 0xE2 && ((p[1] == 0x80 && p[2] >= 0xAA && p[2] <= 0xAE) ||
                                      (p[1] == 0x81 && p[2] >= 0xA6 && p[2] <= 0xA9));
        if (turns) {
            memset(p, '?', 3);
        } else if (*p < ' ' || *p == 0x7F) {
            *p = ' ';
        }
    }
}

static void read_text(nw_field_reader *reader, const nw_node *node, const char *path,
                      const nw_field *row, char *value)
{
    if (node->kind != NW_NODE_SCALAR) {
        nw_field_fault(reader, node, path, row->key, "found %s, expected text", kind_of(node));
    } else if (strlen(node->scalar) >= row->size) {
        nw_field_fault(reader, node, path, row->key, "found %zu characters, expected at most %zu",
                       strlen(node->scalar), row->size - 1);
    } else {
        nw_text_copy(value, row->size, node->scalar);
        make_printable(value);
    }
}

static void read_range(nw_field_reader *reader, const nw_node *node, const char *path,
                       const nw_field *row, double *value)
{
    if (node->kind != NW_NODE_LIST || node->count != 2) {
        nw_field_fault(reader, node, path, row->key, "found %s, expected a list [low, high]",
                       kind_of(node));
        return;
    }
    double pair[2];
    for (int i = 0; i < 2; i++) {
        if (!nw_field_quantity(reader, node->children[i], path, row->key, row->dimension,
                               &pair[i])) {
            return;
        }
        check_limits(reader, node->children[i], path, row, pair[i]);
    }
    if (pair[0] >= pair[1]) {
        nw_field_fault(reader, node, path, row->key,
                       "found [%g, %g], expected the lower value first", pair[0], pair[1]);
        return;
    }
    value[0] = pair[0];
    value[1] = pair[1];
}

static void read_row(nw_field_reader *reader, const nw_node *node, const char *path,
                     const nw_field *row, char *section)
{
    void *value = section + row->offset;
    switch (row->kind) {
    case NW_FIELD_QUANTITY:
    case NW_FIELD_COUNT:
        read_number(reader, node, path, row, value);
        break;
    case NW_FIELD_CHOICE:
        read_choice(reader, node, path, row, value);
        break;
    case NW_FIELD_TEXT:
        read_text(reader, node, path, row, value);
        break;
    case NW_FIELD_RANGE:
        read_range(reader, node, path, row, value);
        break;
    case NW_FIELD_OTHER:
        break;
    }
}

static void refuse_unknown(nw_field_reader *reader, const nw_node *map, const char *path,
                           const nw_field *rows)
{
    const char *keys[MOST_KEYS + 1];
    size_t count = 0;
    for (const nw_field *row = rows; row->key != NULL && count < MOST_KEYS; row++) {
        keys[count++] = row->key;
    }
    keys[count] = NULL;
    for (size_t i = 0; i < map->count; i++) {
        const nw_node *entry = map->children[i];
        if (nw_choice_index(keys, entry->key) >= 0) {
            continue;
        }
        char whole[PATH_LENGTH], list[400] = "";
        const char *nearest = nw_text_nearest(entry->key, keys);
        if (nearest == NULL) {
            nw_text_join(list, sizeof list, keys);
        }
        nw_place place = nw_node_key_place(entry);
        reader->status =
            nw_fault(reader->diagnostics, NW_INPUT, &place,
                     nw_field_path(whole, sizeof whole, path, entry->key), "unknown key; %s%s%s",
                     nearest == NULL ? "expected " : "did you mean '",
                     nearest == NULL ? list : nearest, nearest == NULL ? "" : "'?");
    }
}

void nw_fields_read(nw_field_reader *reader, const nw_node *map, const char *path,
                    const nw_field *rows, void *section)
{
    for (const nw_field *row = rows; row->key != NULL; row++) {
        if (row->kind == NW_FIELD_QUANTITY || row->kind == NW_FIELD_COUNT) {
            *(double *)((char *)section + row->offset) = NAN;
        } else if (row->kind == NW_FIELD_RANGE) {
            double *pair = (double *)(void *)((char *)section + row->offset);
            pair[0] = pair[1] = NAN;
        }
    }
    if (map == NULL) {
        return;
    }
    if (map->kind != NW_NODE_MAP) {
        nw_field_fault(reader, map, path, "", "found %s, expected a map of 'key: value'",
                       kind_of(map));
        return;
    }
    for (const nw_field *row = rows; row->key != NULL; row++) {
        const nw_node *node = nw_node_entry(map, row->key);
        if (node != NULL) {
            read_row(reader, node, path, row, section);
        } else if (row->required) {
            nw_field_fault(reader, map, path, row->key, "missing, expected %s",
                           row->kind == NW_FIELD_TEXT || row->kind == NW_FIELD_OTHER
                               ? "this key"
                               : nw_dimension_name(row->dimension));
        }
    }
    refuse_unknown(reader, map, path, rows);
}
