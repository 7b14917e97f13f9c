/* The 'load' section: the events that make one block. */
#include "job/case_sections.h"

#include "base/text.h"

#include <math.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

typedef struct section {
    int as;
    double repeats;
    char decimal[8];
    char column[96];
} section;

static const nw_field rows[] = {
    {.key = "history", .kind = NW_FIELD_OTHER, .required = true},
    {.key = "column", .kind = NW_FIELD_TEXT, .offset = offsetof(section, column), .size = 96},
    {.key = "decimal", .kind = NW_FIELD_TEXT, .offset = offsetof(section, decimal), .size = 8},
    {.key = "as",
     .kind = NW_FIELD_CHOICE,
     .offset = offsetof(section, as),
     .choices = nw_load_kind_words},
    {.key = "scale", .kind = NW_FIELD_OTHER},
    {.key = "offset", .kind = NW_FIELD_OTHER},
    {"repeats", NW_FIELD_COUNT, NW_PURE, offsetof(section, repeats), 0, false, 1.0, 1e15, false,
     false, NULL},
    {.key = "ignore_ranges_below", .kind = NW_FIELD_OTHER},
    {.key = NULL},
};

static void out_of_memory(nw_field_reader *reader)
{
    reader->status = nw_fault(reader->diagnostics, NW_MEMORY, NULL, NULL, "out of memory");
}

/* Inline values are plain numbers when a scale is given, else quantities. */
static void read_inline(nw_field_reader *reader, const nw_node *list, const char *path,
                        nw_dimension dimension, nw_load *load)
{
    if (list->count == 0) {
        nw_field_fault(reader, list, path, "history", "found an empty list, expected values");
        return;
    }
    load->values = malloc(list->count * sizeof *load->values);
    if (load->values == NULL) {
        out_of_memory(reader);
        return;
    }
    bool plain = !isnan(load->scale);
    load->value_count = list->count;
    for (size_t i = 0; i < list->count; i++) {
        load->values[i] = 0.0;
        nw_field_quantity(reader, list->children[i], path, "history", plain ? NW_PURE : dimension,
                          &load->values[i]);
    }
    load->scale = plain ? load->scale : 1.0;
}

static void read_history(nw_field_reader *reader, const nw_node *map, const char *path,
                         nw_dimension dimension, const char *case_file, nw_load *load)
{
    const nw_node *node = nw_node_entry(map, "history");
    if (node == NULL) {
        return;
    }
    load->place = nw_node_place(node);
    if (node->kind == NW_NODE_LIST) {
        load->label = nw_text_duplicate("inline");
        read_inline(reader, node, path, dimension, load);
    } else if (node->kind == NW_NODE_SCALAR && node->scalar[0] != '\0') {
        load->label = nw_text_duplicate(node->scalar);
        load->history = nw_text_beside(case_file, node->scalar);
        if (load->history == NULL) {
            out_of_memory(reader);
        }
    } else {
        nw_field_fault(reader, node, path, "history",
                       "found a map or nothing, expected a file or a list of values");
        return;
    }
    if (load->label == NULL) {
        out_of_memory(reader);
    }
}

static void read_optional(nw_field_reader *reader, const nw_node *map, const char *path,
                          const char *key, nw_dimension dimension, double *value)
{
    const nw_node *node = nw_node_entry(map, key);
    if (node != NULL) {
        nw_field_quantity(reader, node, path, key, dimension, value);
    }
}

static void read_scale(nw_field_reader *reader, const nw_node *map, const char *path,
                       nw_dimension dimension, nw_load *load)
{
    load->scale = NAN;
    read_optional(reader, map, path, "scale", dimension, &load->scale);
    if (load->scale == 0.0) {
        nw_field_fault(reader, nw_node_entry(map, "scale"), path, "scale",
                       "found 0, expected the %s per unit of the column",
                       nw_dimension_name(dimension));
    }
    load->offset = 0.0;
    read_optional(reader, map, path, "offset", dimension, &load->offset);
}

static void read_decimal(nw_field_reader *reader, const nw_node *map, const char *path,
                         const char *decimal, nw_load *load)
{
    load->decimal = '.';
    if (decimal[0] == '\0') {
        return;
    }
    if (strcmp(decimal, ".") != 0 && strcmp(decimal, ",") != 0) {
        nw_field_fault(reader, nw_node_entry(map, "decimal"), path, "decimal",
                       "found '%s', expected \".\" or \",\"", decimal);
        return;
    }
    load->decimal = decimal[0];
}

static void read_load(nw_field_reader *reader, const nw_node *map, size_t number,
                      const char *case_file, nw_load *load)
{
    char path[48];
    snprintf(path, sizeof path, "load.%zu", number);
    section values = {.as = NW_NOMINAL_STRESS};
    nw_fields_read(reader, map, path, rows, &values);
    if (map->kind != NW_NODE_MAP) {
        return;
    }
    nw_text_copy(load->column, sizeof load->column, values.column);
    load->repeats = isnan(values.repeats) ? 1.0 : values.repeats;
    load->place = nw_node_place(map);
    load->kind = (nw_load_kind)values.as;
    read_decimal(reader, map, path, values.decimal, load);
    nw_dimension dimension = load->kind == NW_NOTCH_STRAIN ? NW_STRAIN : NW_STRESS;
    read_scale(reader, map, path, dimension, load);
    load->ignore_ranges_below_mpa = 0.0;
    read_optional(reader, map, path, "ignore_ranges_below", dimension,
                  &load->ignore_ranges_below_mpa);
    if (load->ignore_ranges_below_mpa < 0.0) {
        nw_field_fault(reader, nw_node_entry(map, "ignore_ranges_below"), path,
                       "ignore_ranges_below", "found a negative range, expected 0 or more");
    }
    read_history(reader, map, path, dimension, case_file, load);
}

void nw_case_read_loads(nw_field_reader *reader, const nw_node *list, nw_case *result)
{
    if (list == NULL) {
        return;
    }
    if (list->kind != NW_NODE_LIST || list->count == 0) {
        nw_field_fault(reader, list, "", "load",
                       "found no list of events, expected at least one '- history: ...'");
        return;
    }
    result->load_place = nw_node_place(list);
    result->loads = calloc(list->count, sizeof *result->loads);
    if (result->loads == NULL) {
        out_of_memory(reader);
        return;
    }
    result->load_count = list->count;
    for (size_t i = 0; i < list->count; i++) {
        read_load(reader, list->children[i], i + 1, result->file, &result->loads[i]);
    }
}
