/* Case files: what stands in them, checked as a whole. */
#include "job/case_sections.h"

#include "base/text.h"
#include "material/material_file.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

const char *const nw_load_kind_words[] = {"nominal_stress", "notch_elastic_stress", "notch_strain",
                                          NULL};

const char *nw_load_kind_name(nw_load_kind kind)
{
    return nw_load_kind_words[kind];
}

typedef struct top {
    double format;
    char title[240];
} top;

static const nw_field top_rows[] = {
    {.key = "notchwright",
     .kind = NW_FIELD_COUNT,
     .offset = offsetof(top, format),
     .required = true},
    {.key = "title", .kind = NW_FIELD_TEXT, .offset = offsetof(top, title), .size = 240},
    {.key = "units", .kind = NW_FIELD_OTHER},
    {.key = "material", .kind = NW_FIELD_OTHER, .required = true},
    {.key = "notch", .kind = NW_FIELD_OTHER},
    {.key = "load", .kind = NW_FIELD_OTHER, .required = true},
    {.key = "life", .kind = NW_FIELD_OTHER},
    {.key = NULL},
};

static void read_material_at(nw_field_reader *reader, const nw_node *node, const char *path,
                             nw_case *result)
{
    nw_status status = nw_material_read(path, &result->material, reader->diagnostics);
    if (status != NW_OK) {
        reader->status = status;
        nw_field_fault(reader, node, "", "material", "the material file %s cannot be used", path);
        reader->status = status;
    }
}

/* A name from the library, or the path of a file (with a slash or ending in .yaml), beside the case. */
static void read_material_named(nw_field_reader *reader, const nw_node *node, nw_case *result)
{
    const char *name = node->scalar;
    if (strchr(name, '/') != NULL || nw_text_ends(name, ".yaml") || nw_text_ends(name, ".yml")) {
        char *path = nw_text_beside(result->file, name);
        if (path == NULL) {
            reader->status = nw_fault(reader->diagnostics, NW_MEMORY, NULL, NULL, "out of memory");
            return;
        }
        read_material_at(reader, node, path, result);
        free(path);
        return;
    }
    char path[4096];
    nw_diagnostics search;
    nw_diagnostics_clear(&search);
    if (nw_material_find(name, path, sizeof path, &search) != NW_OK) {
        nw_field_fault(reader, node, "", "material", "%s", search.items[0].message);
        return;
    }
    read_material_at(reader, node, path, result);
}

static void read_material(nw_field_reader *reader, const nw_node *root, nw_case *result)
{
    const nw_node *node = nw_node_entry(root, "material");
    if (node == NULL) {
        return;
    }
    if (node->kind == NW_NODE_SCALAR && node->scalar[0] != '\0') {
        read_material_named(reader, node, result);
    } else if (node->kind == NW_NODE_MAP) {
        nw_status status = nw_material_from_tree(node, "material", false, reader->defaults,
                                                 &result->material, reader->diagnostics);
        reader->status = status == NW_OK ? reader->status : status;
    } else {
        nw_field_fault(reader, node, "", "material",
                       "found a list or nothing, expected a library name, a file or a map");
    }
}

static nw_status read_tree(const nw_node *root, nw_case *result, nw_diagnostics *diagnostics)
{
    nw_default_units units = {{NULL}};
    nw_field_reader reader = {.defaults = &units, .diagnostics = diagnostics};
    top values = {.title = ""};
    nw_fields_read(&reader, root, "", top_rows, &values);
    if (root->kind != NW_NODE_MAP) {
        return reader.status;
    }
    nw_field_check_format(&reader, root, "notchwright", "case", values.format);
    nw_text_copy(result->title, sizeof result->title, values.title);
    if (nw_default_units_from_tree(root, "", &units, diagnostics) != NW_OK) {
        reader.status = NW_INPUT;
    }
    read_material(&reader, root, result);
    bool material_good = reader.status == NW_OK;
    nw_case_read_notch(&reader, nw_node_entry(root, "notch"), result);
    nw_case_read_loads(&reader, nw_node_entry(root, "load"), result);
    nw_case_read_life(&reader, nw_node_entry(root, "life"), result);
    nw_case_check(&reader, root, material_good, result);
    return reader.status;
}

static nw_status apply_setting(nw_node *root, const char *setting, nw_diagnostics *diagnostics)
{
    nw_place place = {.line = 0};
    nw_text_copy(place.file, sizeof place.file, setting);
    const char *equals = strchr(setting, '=');
    if (equals == NULL || equals == setting) {
        return nw_fault(diagnostics, NW_USAGE, &place, NULL,
                        "--set: expected PATH=VALUE, for example notch.rule=esed");
    }
    char path[128];
    size_t length = (size_t)(equals - setting);
    if (length >= sizeof path) {
        return nw_fault(diagnostics, NW_USAGE, &place, NULL,
                        "--set: found a path of %zu characters, expected fewer than 128", length);
    }
    memcpy(path, setting, length);
    path[length] = '\0';
    return nw_tree_set(root, path, equals + 1, setting, diagnostics);
}

static void start_empty(nw_case *result)
{
    *result = (nw_case){.kt = NAN,
                        .kf = NAN,
                        .factor = NAN,
                        .limit_load_ratio = NAN,
                        .curve_stress_factor = NAN,
                        .walker_gamma = NAN,
                        .endurance_strain_amplitude = NAN,
                        .roughness_um = NAN,
                        .target_blocks = NAN,
                        .survival = 0.5,
                        .damage_sum = 1.0,
                        .surface_factor = 1.0,
                        .surface_reversals = 1e6};
}

nw_status nw_case_read(const char *path, const char *const *settings, size_t setting_count,
                       nw_case *result, nw_diagnostics *diagnostics)
{
    start_empty(result);
    result->file = nw_text_duplicate(path);
    if (result->file == NULL) {
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory");
    }
    nw_node *root = NULL;
    nw_status status = nw_tree_read(path, &root, diagnostics);
    for (size_t i = 0; i < setting_count && status == NW_OK; i++) {
        status = apply_setting(root, settings[i], diagnostics);
    }
    if (status == NW_OK) {
        status = read_tree(root, result, diagnostics);
    }
    nw_node_free(root);
    return status;
}

void nw_case_clear(nw_case *result)
{
    for (size_t i = 0; i < result->load_count; i++) {
        free(result->loads[i].history);
        free(result->loads[i].label);
        free(result->loads[i].values);
    }
    free(result->loads);
    free(result->curve_file);
    free(result->file);
    start_empty(result);
}
