/* Materials as JSON: one looked at closely, the list, and checks of files. */
#include "notchwright/notchwright.h"
#include "output/json.h"

static const char format[] = "notchwright.material/1";

static json_t *range(const double *values)
{
    return isnan(values[0]) ? json_null() : json_pack("[f, f]", values[0], values[1]);
}

static json_t *parameters(const nw_material *m)
{
    json_t *object = json_pack("{s:o, s:s, s:s, s:o, s:o, s:o}", "name", nw_json_text(m->name),
                               "group", nw_group_name(m->group), "basis", nw_basis_name(m->basis),
                               "source", nw_json_text(m->source), "note", nw_json_text(m->note),
                               "estimate", nw_json_text(m->estimate));
    const struct {
        const char *key;
        double value;
    } numbers[] = {
        {"youngs_modulus_mpa", m->youngs_modulus_mpa},
        {"poisson_ratio", m->poisson_ratio},
        {"yield_strength_mpa", m->yield_strength_mpa},
        {"ultimate_strength_mpa", m->ultimate_strength_mpa},
        {"reduction_of_area", m->reduction_of_area},
        {"fracture_stress_mpa", m->fracture_stress_mpa},
        {"fracture_strain", m->fracture_strain},
        {"hardness_hb", m->hardness_hb},
        {"strength_coefficient_mpa", m->strength_coefficient_mpa},
        {"hardening_exponent", m->hardening_exponent},
        {"fatigue_strength_coefficient_mpa", m->fatigue_strength_coefficient_mpa},
        {"fatigue_strength_exponent", m->fatigue_strength_exponent},
        {"fatigue_ductility_coefficient", m->fatigue_ductility_coefficient},
        {"fatigue_ductility_exponent", m->fatigue_ductility_exponent},
        {"endurance_strain_amplitude", m->endurance_strain_amplitude},
        {"endurance_cycles", m->endurance_cycles},
        {"log10_life_sd", m->log10_life_sd},
        {"tests", m->scatter_tests},
    };
    int failed = 0;
    for (size_t i = 0; i < sizeof numbers / sizeof numbers[0]; i++) {
        failed |= json_object_set_new(object, numbers[i].key, nw_json_number(numbers[i].value));
    }
    failed |= json_object_set_new(object, "strength_coefficient_from",
                                  json_string(nw_origin_name(m->strength_coefficient_origin)));
    failed |= json_object_set_new(object, "hardening_exponent_from",
                                  json_string(nw_origin_name(m->hardening_exponent_origin)));
    failed |= json_object_set_new(object, "valid_cycles", range(m->valid_cycles));
    failed |=
        json_object_set_new(object, "valid_strain_amplitude", range(m->valid_strain_amplitude));
    if (failed) {
        json_decref(object);
        return NULL;
    }
    return object;
}

static json_t *derived_object(const nw_material_derived *d)
{
    return json_pack("{s:o, s:o, s:{s:o, s:f, s:f, s:o}, s:o, s:o, s:o, s:f, s:o}",
                     "transition_reversals", nw_json_number(d->transition_reversals),
                     "cyclic_yield_mpa", nw_json_number(d->cyclic_yield_mpa), "basquin",
                     "coefficient_mpa", nw_json_number(d->basquin_coefficient_mpa), "exponent_b",
                     d->basquin_exponent, "slope_k", d->basquin_slope, "log10_constant",
                     nw_json_number(d->basquin_log10_constant), "cycles", nw_json_number(d->cycles),
                     "stress_amplitude_at_cycles_mpa", nw_json_number(d->stress_amplitude_mpa),
                     "strain_amplitude_at_cycles", nw_json_number(d->strain_amplitude),
                     "hardening_exponent_by_compatibility", d->compatible_exponent,
                     "strength_coefficient_by_compatibility_mpa",
                     nw_json_number(d->compatible_strength_mpa));
}

nw_status nw_write_material_json(FILE *to, const nw_material_review *review)
{
    return nw_json_put(to, json_pack("{s:s, s:s, s:s, s:o, s:o, s:o}", "format", format, "version",
                                     nw_version(), "file", review->file, "material",
                                     parameters(&review->material), "derived",
                                     derived_object(&review->derived), "cautions",
                                     nw_json_cautions(&review->cautions)));
}

nw_status nw_write_material_list_json(FILE *to, const nw_material_list *list)
{
    json_t *materials = json_array();
    for (size_t i = 0; materials != NULL && i < list->count; i++) {
        if (json_array_append_new(materials, parameters(&list->materials[i])) != 0) {
            json_decref(materials);
            return NW_MEMORY;
        }
    }
    return nw_json_put(to, json_pack("{s:s, s:s, s:I, s:I, s:o, s:o}", "format", format, "version",
                                     nw_version(), "shown", (json_int_t)list->count, "total",
                                     (json_int_t)list->total, "materials", materials, "cautions",
                                     nw_json_cautions(&list->cautions)));
}

static json_t *fault_object(const nw_diagnostic *d)
{
    return json_pack("{s:o, s:o, s:o, s:o, s:o}", "file", nw_json_text(d->place.file), "line",
                     d->place.line == 0 ? json_null() : json_integer((json_int_t)d->place.line),
                     "column",
                     d->place.line == 0 ? json_null() : json_integer((json_int_t)d->place.column),
                     "key_path", nw_json_text(d->key_path), "text", nw_json_text(d->message));
}

static json_t *check_object(const nw_material_check *item)
{
    json_t *faults = json_array();
    for (size_t i = 0; faults != NULL && i < item->fault_count; i++) {
        if (json_array_append_new(faults, fault_object(&item->faults[i])) != 0) {
            json_decref(faults);
            return NULL;
        }
    }
    return json_pack("{s:o, s:o, s:b, s:o, s:I, s:o}", "file", nw_json_text(item->name), "name",
                     nw_json_text(item->material), "accepted", item->status == NW_OK, "faults",
                     faults, "faults_omitted", (json_int_t)item->faults_omitted, "cautions",
                     nw_json_cautions(&item->cautions));
}

nw_status nw_write_material_checks_json(FILE *to, const nw_material_checks *checks)
{
    json_t *files = json_array();
    for (size_t i = 0; files != NULL && i < checks->count; i++) {
        if (json_array_append_new(files, check_object(&checks->items[i])) != 0) {
            json_decref(files);
            return NW_MEMORY;
        }
    }
    return nw_json_put(to, json_pack("{s:s, s:s, s:I, s:I, s:o}", "format", format, "version",
                                     nw_version(), "checked", (json_int_t)checks->count, "refused",
                                     (json_int_t)checks->refused, "files", files));
}
