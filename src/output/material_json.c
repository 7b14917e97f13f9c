/* Materials as JSON: one looked at closely, the list, and checks of files. */
#include "notchwright/notchwright.h"
#include "output/json.h"

static const char format[] = "notchwright.material/1";

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
                                     nw_json_material(&review->material), "derived",
                                     derived_object(&review->derived), "cautions",
                                     nw_json_cautions(&review->cautions)));
}

nw_status nw_write_material_list_json(FILE *to, const nw_material_list *list)
{
    json_t *materials = json_array();
    for (size_t i = 0; materials != NULL && i < list->count; i++) {
        if (json_array_append_new(materials, nw_json_material(&list->materials[i])) != 0) {
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
