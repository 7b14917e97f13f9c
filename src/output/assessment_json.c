/* The assessment as one JSON object; loops are written one by one, as there may be very many. */
#include "notchwright/notchwright.h"
#include "output/json.h"

#include <inttypes.h>

static json_t *method_object(const nw_case *input, const nw_assessment *result)
{
    return json_pack(
        "{s:s, s:s, s:s, s:s, s:s, s:s, s:o, s:b, s:f, s:s, s:o, s:s, s:f, s:f}", "rule",
        result->rule->key, "rule_equation", result->rule->equation, "rule_reference",
        result->rule->reference, "mean_stress", input->correction->key, "mean_stress_equation",
        input->correction->equation, "mean_stress_reference", input->correction->reference,
        "walker_gamma",
        nw_json_number(input->correction->uses_walker_gamma ? input->walker_gamma : NAN),
        "walker_gamma_estimated", (int)input->walker_gamma_estimated, "damage_sum",
        input->damage_sum, "below_endurance", nw_below_endurance_name(input->below_endurance),
        "endurance_strain_amplitude", nw_json_number(input->endurance_strain_amplitude),
        "net_section", input->plastic_net_section ? "plastic" : "elastic", "surface_factor",
        input->surface_factor, "survival", input->survival);
}

static json_t *material_object(const nw_case *input, const nw_assessment *result)
{
    json_t *object = nw_json_material(&input->material);
    if (json_object_set_new(object, "fatigue_strength_exponent_used",
                            json_real(result->curve.fatigue_strength_exponent)) != 0) {
        json_decref(object);
        return NULL;
    }
    return object;
}

static json_t *notch_object(const nw_case *input, const nw_assessment *result)
{
    return json_pack(
        "{s:o, s:o, s:o, s:o, s:f, s:s, s:o, s:f}", "kt", nw_json_number(input->kt), "kf",
        nw_json_number(input->kf), "factor_used", nw_json_number(input->factor), "limit_load_ratio",
        nw_json_number(input->limit_load_ratio), "residual_stress_mpa", input->residual_stress_mpa,
        "constraint", "plane_stress", "nominal_stress_max_mpa",
        nw_json_number(result->nominal_max_mpa), "curve_error", result->notch_curve_error);
}

static json_t *events_array(const nw_case *input)
{
    json_t *list = json_array();
    for (size_t i = 0; list != NULL && i < input->load_count; i++) {
        const nw_load *load = &input->loads[i];
        json_t *item = json_pack(
            "{s:o, s:o, s:s, s:o, s:f}", "history", nw_json_text(load->label), "column",
            nw_json_text(load->column), "as", nw_load_kind_name(load->kind), "repeats",
            nw_json_count(load->repeats), "ignore_ranges_below", load->ignore_ranges_below_mpa);
        if (item == NULL || json_array_append_new(list, item) != 0) {
            json_decref(list);
            return NULL;
        }
    }
    return list;
}

static json_t *block_object(const nw_case *input, const nw_assessment *result)
{
    return json_pack("{s:o, s:o, s:f, s:f, s:o}", "samples", nw_json_count(result->samples),
                     "turning_points", nw_json_count(result->turning_points), "load_max_mpa",
                     result->load_max_mpa, "load_min_mpa", result->load_min_mpa, "events",
                     events_array(input));
}

/* Everything before the loops. */
static json_t *head_object(const nw_case *input, const nw_assessment *result)
{
    const nw_extremes *e = &result->extremes;
    json_t *target = result->has_target ? json_pack("{s:f, s:b}", "blocks", input->target_blocks,
                                                    "reached", (int)result->target_reached)
                                        : json_null();
    return json_pack("{s:s, s:s, s:o, s:o, s:o, s:o, s:o, s:{s:f, s:f, s:f, s:f}, s:f, s:f, s:o, "
                     "s:o, s:{s:o, s:f}, "
                     "s:o}",
                     "format", "notchwright.assessment/1", "version", nw_version(), "title",
                     nw_json_text(input->title), "method", method_object(input, result), "material",
                     material_object(input, result), "notch", notch_object(input, result), "block",
                     block_object(input, result), "extremes", "stress_max_mpa", e->stress_max_mpa,
                     "stress_min_mpa", e->stress_min_mpa, "strain_max", e->strain_max, "strain_min",
                     e->strain_min, "damage_first_block", result->damage_first_block,
                     "damage_per_block", result->damage_per_block, "life_blocks",
                     nw_json_number(result->life_blocks), "target", target, "left_out", "loops",
                     nw_json_count(result->left_out.loops), "damage", result->left_out.damage,
                     "loops_total", nw_json_count(result->loops_total));
}

/* Plain numbers only, so they are written directly: there may be a million of them. */
static void put_loop(FILE *to, const nw_loop_result *loop)
{
    const nw_loop_values *v = &loop->values;
    const struct {
        const char *key;
        double value;
    } numbers[] = {
        {"load_max_mpa", v->load_max_mpa},
        {"load_min_mpa", v->load_min_mpa},
        {"strain_amplitude", v->strain_amplitude},
        {"strain_mean", v->strain_mean},
        {"stress_max_mpa", v->stress_max_mpa},
        {"stress_min_mpa", v->stress_min_mpa},
        {"stress_mean_mpa", v->stress_mean_mpa},
        {"cycles_to_initiation", loop->cycles},
        {"damage", loop->damage},
        {"share", loop->share},
    };
    fprintf(to, "{\"count\":%.15g", loop->count);
    for (size_t i = 0; i < sizeof numbers / sizeof numbers[0]; i++) {
        if (isfinite(numbers[i].value)) {
            fprintf(to, ",\"%s\":%.15g", numbers[i].key, numbers[i].value);
        } else {
            fprintf(to, ",\"%s\":null", numbers[i].key);
        }
    }
    fprintf(to,
            ",\"start\":{\"event\":%zu,\"sample\":%" PRIu64 "},\"tip\":{\"event\":%zu,"
            "\"sample\":%" PRIu64 "}}",
            loop->start.event + 1, loop->start.sample + 1, loop->tip.event + 1,
            loop->tip.sample + 1);
}

/* Writes and releases; NULL means memory ran out while building. */
static nw_status put(FILE *to, json_t *value, size_t flags)
{
    if (value == NULL) {
        return NW_MEMORY;
    }
    int failed = json_dumpf(value, to, flags | NW_JSON_FLAGS);
    json_decref(value);
    return failed ? (ferror(to) ? NW_FILE : NW_MEMORY) : NW_OK;
}

nw_status nw_write_assessment_json(FILE *to, const nw_case *input, const nw_assessment *result)
{
    fputs("{", to);
    nw_status status = put(to, head_object(input, result), JSON_EMBED | JSON_INDENT(1));
    fputs(",\n \"loops\": [", to);
    for (size_t i = 0; i < result->loop_count && status == NW_OK; i++) {
        fputs(i == 0 ? "\n  " : ",\n  ", to);
        put_loop(to, &result->loops[i]);
    }
    fputs("\n ],\n \"cautions\": ", to);
    if (status == NW_OK) {
        status = put(to, nw_json_cautions(&result->cautions), JSON_INDENT(1));
    }
    fputs("\n}\n", to);
    return status == NW_OK && ferror(to) ? NW_FILE : status;
}
