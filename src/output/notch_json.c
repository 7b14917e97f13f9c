/* The factors of a notch as one JSON object. */
#include "notchwright/notch_factors.h"
#include "notchwright/notchwright.h"
#include "output/json.h"

static json_t *sizes_object(const nw_kt *k)
{
    json_t *object = json_object();
    for (const nw_shape_size *row = k->shape->sizes; object != NULL && row->key != NULL; row++) {
        if (json_object_set_new(object, row->key, nw_json_number(k->sizes.value[row->size])) != 0) {
            json_decref(object);
            return NULL;
        }
    }
    return object;
}

static json_t *formulas_array(const nw_kt *k)
{
    json_t *list = json_array();
    for (size_t i = 0; list != NULL && i < k->row_count; i++) {
        const nw_kt_row *row = &k->rows[i];
        json_t *item =
            json_pack("{s:s, s:o, s:b, s:o, s:o, s:s, s:s}", "name", row->formula->key, "kt",
                      nw_json_number(row->kt), "valid", (int)row->valid, "outside",
                      nw_json_text(row->outside), "bias_percent", nw_json_number(row->bias_percent),
                      "equation", row->formula->equation, "source", row->formula->source);
        if (item == NULL || json_array_append_new(list, item) != 0) {
            json_decref(list);
            return NULL;
        }
    }
    return list;
}

static json_t *methods_array(const nw_notch_factors *r)
{
    json_t *list = json_array();
    for (size_t i = 0; list != NULL && i < r->row_count; i++) {
        const nw_kf *row = &r->rows[i];
        json_t *item =
            json_pack("{s:s, s:b, s:o, s:o, s:o, s:s, s:s, s:s}", "name", row->record->key,
                      "applies", (int)row->applies, "kf", nw_json_number(row->kf),
                      "notch_sensitivity", nw_json_number(row->q), "reason",
                      nw_json_text(row->reason), "range", row->record->range, "equation",
                      row->record->equation, "source", row->record->reference);
        if (item == NULL || json_array_append_new(list, item) != 0) {
            json_decref(list);
            return NULL;
        }
    }
    return list;
}

static json_t *material_object(const nw_notch_question *q)
{
    return json_pack("{s:s, s:b, s:o, s:o, s:b, s:o}", "group",
                     nw_group_name(q->group == NW_GROUP_UNSTATED ? NW_STEEL : q->group),
                     "group_assumed", (int)(q->group == NW_GROUP_UNSTATED), "ultimate_strength_mpa",
                     nw_json_number(q->ultimate_strength_mpa), "yield_strength_mpa",
                     nw_json_number(q->yield_strength_mpa), "surface_hardened",
                     (int)q->surface_hardened, "roughness_um", nw_json_number(q->roughness_um));
}

static const char *section_key(const nw_kt *k)
{
    return k->load->action == NW_ACTION_FORCE ? "section_area_mm2" : "section_modulus_mm3";
}

static json_t *kt_part(const nw_kt *k)
{
    return json_pack(
        "{s:s, s:s, s:s, s:s, s:f, s:s, s:s, s:o, s:o, s:o, s:o, s:s, s:s, s:s, s:b, s:o, s:b, "
        "s:o, s:o, s:o, s:o}",
        "format", "notchwright.notch/1", "version", nw_version(), "shape", k->shape->key, "load",
        k->load->key, "kt", k->kt, "kt_formula", k->formula->key, "kt_source", k->formula->source,
        "kt_bias_percent", nw_json_number(k->bias_percent), "kt_finite_elements",
        nw_json_number(k->reference), "kt_finite_elements_error_percent",
        nw_json_number(k->reference_error_percent), "kt_bias_how",
        nw_json_text(isnan(k->reference) ? NULL : k->load->reference_how), "kt_means",
        k->load->kt_means, "nominal", k->load->nominal, "action", nw_action_name(k->load->action),
        "shear", (int)k->load->is_shear, section_key(k), nw_json_number(k->section), "valid",
        (int)k->valid, "sizes", sizes_object(k), "radius_mm", nw_json_number(k->radius_mm),
        "stress_gradient_per_mm", nw_json_number(k->gradient_per_mm), "formulas",
        formulas_array(k));
}

static json_t *kf_part(const nw_notch_factors *r)
{
    const nw_sensitivity *s = r->sensitivity;
    return json_pack("{s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:o}", "kf",
                     nw_json_number(r->kf), "sensitivity", nw_json_text(s == NULL ? NULL : s->key),
                     "notch_sensitivity", nw_json_number(r->q), "kf_source",
                     nw_json_text(s == NULL ? NULL : s->reference), "fatigue_factors",
                     methods_array(r), "material", material_object(&r->question), "action_value",
                     nw_json_number(r->question.action), "nominal_stress_mpa",
                     nw_json_number(r->nominal_stress_mpa), "notch_elastic_stress_mpa",
                     nw_json_number(r->notch_elastic_stress_mpa), "surface_factor",
                     nw_json_number(r->surface_factor), "cautions", nw_json_cautions(&r->cautions));
}

nw_status nw_write_notch_json(FILE *to, const nw_notch_factors *result)
{
    json_t *object = kt_part(&result->kt), *rest = kf_part(result);
    if (object == NULL || rest == NULL || json_object_update(object, rest) != 0) {
        json_decref(object);
        object = NULL;
    }
    json_decref(rest);
    return nw_json_put(to, object);
}
