/* The comparison of estimates as one JSON object. */
#include "notchwright/notchwright.h"
#include "output/json.h"

static json_t *text_of(const nw_estimate *record)
{
    return nw_json_text(record == NULL ? NULL : record->key);
}

static json_t *inputs_object(const nw_estimate_comparison *r)
{
    const nw_estimate_input *in = &r->input;
    bool from_area = isnan(in->fracture_strain);
    return json_pack(
        "{s:s, s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:o}", "group", nw_group_name(in->group),
        "ultimate_strength_mpa", nw_json_number(in->ultimate_strength_mpa), "youngs_modulus_mpa",
        nw_json_number(in->youngs_modulus_mpa), "yield_strength_mpa",
        nw_json_number(in->yield_strength_mpa), "hardness_hb", nw_json_number(in->hardness_hb),
        "reduction_of_area", nw_json_number(in->reduction_of_area), "fracture_strain",
        nw_json_number(r->fracture_strain), "fracture_strain_from",
        nw_json_text(isnan(r->fracture_strain) ? NULL
                     : from_area               ? "reduction_of_area"
                                               : "given"),
        "fracture_stress_mpa", nw_json_number(r->fracture_stress_mpa), "fracture_stress_from",
        nw_json_text(isnan(r->fracture_stress_mpa) ? NULL
                     : r->fracture_stress_derived  ? "ultimate_strength and fracture_strain"
                                                   : "given"));
}

static json_t *numbers_array(const double *values, size_t count)
{
    json_t *list = json_array();
    for (size_t i = 0; list != NULL && i < count; i++) {
        if (json_array_append_new(list, nw_json_number(values[i])) != 0) {
            json_decref(list);
            return NULL;
        }
    }
    return list;
}

static json_t *method_object(const nw_estimate_comparison *r, const nw_estimate_row *row)
{
    const nw_estimate *m = row->record;
    const nw_estimate_values *v = &row->values;
    return json_pack(
        "{s:s, s:s, s:b, s:s, s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:o, s:s, "
        "s:s, s:s, s:s, s:o, s:s, s:o}",
        "name", m->key, "title", m->title, "applies", (int)row->applies, "reason", row->reason,
        "fatigue_strength_coefficient_mpa", nw_json_number(v->fatigue_strength_coefficient_mpa),
        "fatigue_strength_exponent", nw_json_number(v->fatigue_strength_exponent),
        "fatigue_ductility_coefficient", nw_json_number(v->fatigue_ductility_coefficient),
        "fatigue_ductility_exponent", nw_json_number(v->fatigue_ductility_exponent),
        "strength_coefficient_mpa", nw_json_number(v->strength_coefficient_mpa),
        "hardening_exponent", nw_json_number(v->hardening_exponent), "cyclic_curve_from",
        nw_json_text(row->applies ? nw_origin_name(v->cyclic_curve_origin) : NULL),
        "endurance_stress_mpa", nw_json_number(v->endurance_stress_mpa),
        "endurance_strain_amplitude", nw_json_number(v->endurance_strain_amplitude),
        "endurance_cycles", nw_json_number(v->endurance_cycles), "transition_reversals",
        nw_json_number(row->transition_reversals), "stress_amplitude_at_1e6_cycles_mpa",
        nw_json_number(row->stress_amplitude_1e6_mpa), "range", m->range, "equation", m->equation,
        "source", m->reference, "check", m->check, "doubt", nw_json_text(m->doubt), "accuracy",
        m->accuracy, "cycles", numbers_array(row->cycles, r->amplitude_count));
}

static json_t *methods_array(const nw_estimate_comparison *r)
{
    json_t *list = json_array();
    for (size_t i = 0; list != NULL && i < r->row_count; i++) {
        if (json_array_append_new(list, method_object(r, &r->rows[i])) != 0) {
            json_decref(list);
            return NULL;
        }
    }
    return list;
}

static json_t *spread_array(const nw_estimate_comparison *r)
{
    json_t *list = json_array();
    for (size_t i = 0; list != NULL && i < r->amplitude_count; i++) {
        const nw_estimate_spread *s = &r->spread[i];
        json_t *item =
            json_pack("{s:f, s:o, s:o, s:o, s:o, s:o}", "strain_amplitude", r->amplitudes[i],
                      "shortest_cycles", nw_json_number(s->shortest_cycles), "shortest_by",
                      text_of(s->shortest), "longest_cycles", nw_json_number(s->longest_cycles),
                      "longest_by", text_of(s->longest), "ratio", nw_json_number(s->ratio));
        if (json_array_append_new(list, item) != 0) {
            json_decref(list);
            return NULL;
        }
    }
    return list;
}

static json_t *plan_array(const nw_estimate_comparison *r)
{
    json_t *list = json_array();
    for (int i = 0; list != NULL && r->recommended != NULL && i < NW_PLAN_LEVELS; i++) {
        json_t *item = json_pack("{s:f, s:f, s:i}", "strain_amplitude", r->plan[i].strain_amplitude,
                                 "expected_cycles", r->plan[i].expected_cycles, "specimens",
                                 r->plan[i].specimens);
        if (json_array_append_new(list, item) != 0) {
            json_decref(list);
            return NULL;
        }
    }
    return list;
}

nw_status nw_write_estimate_json(FILE *to, const nw_estimate_comparison *r,
                                 const nw_estimate *chosen)
{
    json_t *object =
        json_pack("{s:s, s:s, s:o, s:o, s:s, s:o, s:o, s:o, s:o, s:o, s:o}", "format",
                  "notchwright.estimate/1", "version", nw_version(), "inputs", inputs_object(r),
                  "recommended", text_of(r->recommended), "recommended_because", r->because,
                  "chosen", text_of(chosen == NULL ? r->recommended : chosen), "methods",
                  methods_array(r), "strain_amplitudes",
                  numbers_array(r->amplitudes, r->amplitude_count), "spread", spread_array(r),
                  "tests_to_settle", plan_array(r), "cautions", nw_json_cautions(&r->cautions));
    return nw_json_put(to, object);
}
