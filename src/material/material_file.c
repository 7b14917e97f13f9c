/* Material files: what stands in them. */
#include "material/material_file.h"

#include "base/fields.h"
#include "base/text.h"

#include <math.h>
#include <string.h>

static const char *const group_words[] = {"steel",  "cast_steel", "aluminium", "titanium",
                                          "nickel", "cast_iron",  "other",     NULL};
static const char *const basis_words[] = {"tested", "handbook", "estimated", NULL};
static const char *const origin_words[] = {"given", "compatibility", "estimate"};

const char *nw_group_name(nw_group group)
{
    return group < NW_GROUP_UNSTATED ? group_words[group] : "unstated";
}

const char *nw_basis_name(nw_basis basis)
{
    return basis < NW_BASIS_UNSTATED ? basis_words[basis] : "unstated";
}

const char *nw_origin_name(nw_origin origin)
{
    return origin_words[origin];
}

typedef struct top {
    nw_material material;
    int group, basis;
    double format;
} top;

#define TOP(member) offsetof(top, member)
#define IN_MATERIAL(member) offsetof(nw_material, member)

static const nw_field top_rows[] = {
    {.key = "notchwright_material", .kind = NW_FIELD_COUNT, .offset = TOP(format)},
    {.key = "name", .kind = NW_FIELD_TEXT, .offset = TOP(material.name), .size = 96},
    {.key = "group", .kind = NW_FIELD_CHOICE, .offset = TOP(group), .choices = group_words},
    {.key = "basis", .kind = NW_FIELD_CHOICE, .offset = TOP(basis), .choices = basis_words},
    {.key = "source", .kind = NW_FIELD_TEXT, .offset = TOP(material.source), .size = 480},
    {.key = "note", .kind = NW_FIELD_TEXT, .offset = TOP(material.note), .size = 480},
    {.key = "units", .kind = NW_FIELD_OTHER},
    {.key = "estimate", .kind = NW_FIELD_OTHER},
    {"youngs_modulus", NW_FIELD_QUANTITY, NW_STRESS, TOP(material.youngs_modulus_mpa), 0, true, 1e3,
     1e6, false, false, NULL},
    {"poisson_ratio", NW_FIELD_QUANTITY, NW_PURE, TOP(material.poisson_ratio), 0, false, 0.0, 0.5,
     true, true, NULL},
    {"yield_strength", NW_FIELD_QUANTITY, NW_STRESS, TOP(material.yield_strength_mpa), 0, false,
     0.0, 1e4, true, false, NULL},
    {"ultimate_strength", NW_FIELD_QUANTITY, NW_STRESS, TOP(material.ultimate_strength_mpa), 0,
     false, 0.0, 1e4, true, false, NULL},
    {"reduction_of_area", NW_FIELD_QUANTITY, NW_FRACTION, TOP(material.reduction_of_area), 0, false,
     0.0, 1.0, true, true, NULL},
    {"hardness", NW_FIELD_QUANTITY, NW_HARDNESS, TOP(material.hardness_hb), 0, false, 0.0, 1000.0,
     true, false, NULL},
    {"fracture_stress", NW_FIELD_QUANTITY, NW_STRESS, TOP(material.fracture_stress_mpa), 0, false,
     0.0, 1e4, true, false, NULL},
    {"fracture_strain", NW_FIELD_QUANTITY, NW_STRAIN, TOP(material.fracture_strain), 0, false, 0.0,
     10.0, true, false, NULL},
    {.key = "cyclic_curve", .kind = NW_FIELD_OTHER},
    {.key = "strain_life", .kind = NW_FIELD_OTHER},
    {.key = "endurance", .kind = NW_FIELD_OTHER},
    {.key = "scatter", .kind = NW_FIELD_OTHER},
    {.key = "valid", .kind = NW_FIELD_OTHER},
    {.key = "fit", .kind = NW_FIELD_OTHER}, /* covariance of fitted parameters; not used here */
    {.key = NULL},
};

static const nw_field cyclic_rows[] = {
    {"strength_coefficient", NW_FIELD_QUANTITY, NW_STRESS, IN_MATERIAL(strength_coefficient_mpa), 0,
     false, 0.0, 1e5, true, false, NULL},
    {"hardening_exponent", NW_FIELD_QUANTITY, NW_PURE, IN_MATERIAL(hardening_exponent), 0, false,
     0.005, 0.6, false, false, NULL},
    {.key = NULL},
};

static const nw_field life_rows[] = {
    {"fatigue_strength_coefficient", NW_FIELD_QUANTITY, NW_STRESS,
     IN_MATERIAL(fatigue_strength_coefficient_mpa), 0, true, 0.0, 1e5, true, false, NULL},
    {"fatigue_strength_exponent", NW_FIELD_QUANTITY, NW_PURE,
     IN_MATERIAL(fatigue_strength_exponent), 0, true, -1.0, 0.0, true, true, NULL},
    {"fatigue_ductility_coefficient", NW_FIELD_QUANTITY, NW_STRAIN,
     IN_MATERIAL(fatigue_ductility_coefficient), 0, true, 0.0, 100.0, true, false, NULL},
    {"fatigue_ductility_exponent", NW_FIELD_QUANTITY, NW_PURE,
     IN_MATERIAL(fatigue_ductility_exponent), 0, true, -2.0, 0.0, true, true, NULL},
    {.key = NULL},
};

static const nw_field endurance_rows[] = {
    {"strain_amplitude", NW_FIELD_QUANTITY, NW_STRAIN, IN_MATERIAL(endurance_strain_amplitude), 0,
     false, 0.0, 0.1, true, false, NULL},
    {"cycles", NW_FIELD_QUANTITY, NW_PURE, IN_MATERIAL(endurance_cycles), 0, false, 1.0, 1e12,
     false, false, NULL},
    {.key = NULL},
};

static const nw_field scatter_rows[] = {
    {"log10_life_sd", NW_FIELD_QUANTITY, NW_PURE, IN_MATERIAL(log10_life_sd), 0, true, 0.0, 3.0,
     true, false, NULL},
    {"tests", NW_FIELD_COUNT, NW_PURE, IN_MATERIAL(scatter_tests), 0, false, 1.0, 1e9, false, false,
     NULL},
    {.key = NULL},
};

static const nw_field valid_rows[] = {
    {"cycles", NW_FIELD_RANGE, NW_PURE, IN_MATERIAL(valid_cycles), 0, false, 0.0, INFINITY, true,
     false, NULL},
    {"strain_amplitude", NW_FIELD_RANGE, NW_STRAIN, IN_MATERIAL(valid_strain_amplitude), 0, false,
     0.0, 1.0, true, false, NULL},
    {.key = NULL},
};

/* Strain coefficients are ratios that people write bare (ef' = 0.26), so a bare ratio is right there; unless
 * the file makes another strain unit the default: then a bare number could mean either and is refused. */
static nw_default_units with_bare_strain(const nw_default_units *defaults)
{
    nw_default_units units = {{NULL}};
    if (defaults != NULL) {
        units = *defaults;
    }
    bool other = units.unit[NW_STRAIN] != NULL && strcmp(units.unit[NW_STRAIN], "ratio") != 0;
    units.unit[NW_STRAIN] = other ? NULL : "ratio";
    return units;
}

static void read_sections(nw_field_reader *reader, const nw_node *map, const char *path,
                          nw_material *material)
{
    static const struct {
        const char *key;
        const nw_field *rows;
    } sections[] = {
        {"cyclic_curve", cyclic_rows}, {"strain_life", life_rows}, {"endurance", endurance_rows},
        {"scatter", scatter_rows},     {"valid", valid_rows},
    };
    for (size_t i = 0; i < sizeof sections / sizeof sections[0]; i++) {
        char whole[96];
        nw_fields_read(reader, nw_node_entry(map, sections[i].key),
                       nw_field_path(whole, sizeof whole, path, sections[i].key), sections[i].rows,
                       material);
    }
}

static void require_file_keys(nw_field_reader *reader, const nw_node *map)
{
    static const char *const required[] = {"notchwright_material", "name", "group", "basis",
                                           "source"};
    for (size_t i = 0; i < sizeof required / sizeof required[0]; i++) {
        if (nw_node_entry(map, required[i]) == NULL) {
            nw_field_fault(reader, map, "", required[i],
                           "missing, expected this key in every "
                           "material file");
        }
    }
}

enum { MOST_ESTIMATES = 32 };

static const char *estimate_wanted(nw_field_reader *reader, const nw_node *map, const char *path)
{
    const nw_node *node = nw_node_entry(map, "estimate");
    const char *keys[MOST_ESTIMATES + 1] = {NULL};
    const nw_estimate *record;
    for (size_t i = 0; i < MOST_ESTIMATES && (record = nw_estimate_at(i)) != NULL; i++) {
        keys[i] = record->key;
    }
    int index = node == NULL ? -1 : nw_field_word(reader, node, path, "estimate", keys);
    return index < 0 ? NULL : nw_estimate_at((size_t)index)->key;
}

nw_status nw_material_from_tree(const nw_node *map, const char *path, bool is_file,
                                const nw_default_units *defaults, nw_material *material,
                                nw_diagnostics *diagnostics)
{
    nw_default_units units = with_bare_strain(defaults);
    nw_field_reader reader = {.defaults = &units, .diagnostics = diagnostics};
    if (nw_default_units_from_tree(map, path, &units, diagnostics) != NW_OK) {
        reader.status = NW_INPUT;
    }
    top values = {.group = NW_GROUP_UNSTATED, .basis = NW_BASIS_UNSTATED};
    nw_fields_read(&reader, map, path, top_rows, &values);
    if (map->kind != NW_NODE_MAP) {
        return reader.status;
    }
    nw_field_check_format(&reader, map, "notchwright_material", "material", values.format);
    values.material.group = (nw_group)values.group;
    values.material.basis = (nw_basis)values.basis;
    read_sections(&reader, map, path, &values.material);
    if (is_file) {
        require_file_keys(&reader, map);
    }
    const char *estimate = estimate_wanted(&reader, map, path);
    if (reader.status == NW_OK) {
        reader.status = nw_material_complete(&values.material, map, path, estimate, diagnostics);
    }
    *material = values.material;
    return reader.status;
}

nw_status nw_material_read(const char *path, nw_material *material, nw_diagnostics *diagnostics)
{
    nw_node *root = NULL;
    nw_status status = nw_tree_read(path, &root, diagnostics);
    if (status == NW_OK) {
        status = nw_material_from_tree(root, "", true, NULL, material, diagnostics);
    }
    nw_node_free(root);
    return status;
}
