/* The fit of coupon tests as one JSON object. */
#include "notchwright/notchwright.h"
#include "output/json.h"

/* Appends and takes over; false when memory ran out. */
static bool append(json_t *list, json_t *item)
{
    return item != NULL && json_array_append_new(list, item) == 0;
}

/* The list, or NULL (and the list released) when it could not be filled. */
static json_t *checked(json_t *list, bool filled)
{
    if (!filled) {
        json_decref(list);
        return NULL;
    }
    return list;
}

static json_t *numbers(const double *values, size_t count)
{
    json_t *list = json_array();
    bool filled = list != NULL;
    for (size_t i = 0; i < count && filled; i++) {
        filled = append(list, nw_json_number(values[i]));
    }
    return checked(list, filled);
}

static json_t *test_object(const nw_coupons *coupons, size_t index, const char *reason)
{
    const nw_coupon *c = &coupons->tests[index];
    return json_pack("{s:o, s:I, s:o}", "id", nw_json_text(c->id), "line", (json_int_t)c->line,
                     "reason", nw_json_text(reason));
}

static json_t *left_out_array(const nw_coupons *coupons, const nw_fit_line *line)
{
    json_t *list = json_array();
    bool filled = list != NULL;
    for (size_t i = 0; i < line->left_out_count && filled; i++) {
        filled =
            append(list, test_object(coupons, line->left_out[i].test, line->left_out[i].reason));
    }
    return checked(list, filled);
}

/* The band that holds the whole line, at its ends and in the middle of the tested amplitudes. */
static json_t *band_array(const nw_line *line)
{
    json_t *list = json_array();
    bool filled = list != NULL;
    for (int i = 0; i < 5 && filled; i++) {
        double x = line->x_min + (line->x_max - line->x_min) * i / 4.0, half;
        double y = nw_line_band(line, x, line->confidence, &half);
        filled = append(list, json_pack("{s:f, s:o, s:o, s:o}", "amplitude", pow(10.0, x), "value",
                                        nw_json_number(pow(10.0, y)), "low",
                                        nw_json_number(pow(10.0, y - half)), "high",
                                        nw_json_number(pow(10.0, y + half))));
    }
    return checked(list, filled);
}

static json_t *line_object(const nw_coupons *coupons, const nw_fit_line *source,
                           const char *amplitude, const char *response)
{
    const nw_line *line = &source->line;
    json_t *left_out = left_out_array(coupons, source);
    if (!source->available) {
        return json_pack("{s:s, s:s, s:n, s:n, s:o, s:I, s:o}", "amplitude", amplitude, "response",
                         response, "a", "b", "why", nw_json_text(source->why), "points_used",
                         (json_int_t)line->points, "points_left_out", left_out);
    }
    bool life = response[0] == 'c';
    json_t *object = json_pack("{s:s, s:s}", "amplitude", amplitude, "response", response);
    const struct {
        const char *key;
        double value;
    } rows[] = {
        {"a", line->a},
        {"a_standard_error", line->a_standard_error},
        {"a_low", line->a_low},
        {"a_high", line->a_high},
        {"b", line->b},
        {"b_standard_error", line->b_standard_error},
        {"b_low", line->b_low},
        {"b_high", line->b_high},
        {"sd_log10_life", life ? line->sd : NAN},
        {"sd_log10_stress", life ? NAN : line->sd},
        {"degrees_of_freedom", line->degrees},
        {"f_linearity", line->f_linearity},
        {"f_critical", line->f_critical},
        {"f_degrees_of_freedom_1", line->f_degrees[0]},
        {"f_degrees_of_freedom_2", line->f_degrees[1]},
        {"replication_percent", line->replication_percent},
    };
    int failed = object == NULL;
    for (size_t i = 0; i < sizeof rows / sizeof rows[0] && !failed; i++) {
        failed |= json_object_set_new(object, rows[i].key, nw_json_number(rows[i].value));
    }
    if (!failed) {
        failed |= json_object_set_new(object, "linear",
                                      isnan(line->f_linearity)
                                          ? json_null()
                                          : json_boolean(line->f_linearity <= line->f_critical));
        failed |= json_object_set_new(object, "levels", json_integer((json_int_t)line->levels));
        failed |=
            json_object_set_new(object, "points_used", json_integer((json_int_t)line->points));
        failed |= json_object_set_new(object, "band", band_array(line));
        failed |= json_object_set_new(object, "points_left_out", left_out);
        left_out = NULL;
    }
    json_decref(left_out);
    return checked(object, !failed);
}

static json_t *lines_object(const nw_coupons *coupons, const nw_fit *fit)
{
    return json_pack(
        "{s:o, s:o, s:o}", "plastic",
        line_object(coupons, &fit->plastic, "plastic_strain_amplitude", "cycles"), "elastic",
        line_object(coupons, &fit->elastic, "stress_amplitude_mpa", "cycles"), "cyclic",
        line_object(coupons, &fit->cyclic, "plastic_strain_amplitude", "stress_amplitude_mpa"));
}

static json_t *model_object(const nw_likelihood *l)
{
    double gone = l->available ? 0.0 : NAN;
    return json_pack(
        "{s:s, s:s, s:I, s:I, s:I, s:o, s:o, s:o, s:o, s:o, s:o}", "distribution",
        nw_distribution_name(l->distribution), "scatter", nw_scatter_model_name(l->scatter),
        "parameters", (json_int_t)l->parameters, "failures", (json_int_t)l->failures, "runouts",
        (json_int_t)l->runouts, "log_likelihood", nw_json_number(l->log_likelihood + gone), "aic",
        nw_json_number(l->aic + gone), "log10_life_sd", nw_json_number(l->log10_life_sd + gone),
        "reference_cycles", nw_json_number(l->reference_cycles + gone), "scatter_slope",
        nw_json_number(l->theta[5] * M_LN10 + gone), "why",
        nw_json_text(l->available ? "" : l->why));
}

static json_t *likelihood_object(const nw_fit *fit)
{
    static const char *const names[] = {"ln_elastic_strain_coefficient",
                                        "fatigue_strength_exponent",
                                        "ln_fatigue_ductility_coefficient",
                                        "fatigue_ductility_exponent",
                                        "ln_scale",
                                        "ln_scale_slope"};
    const nw_likelihood *l = &fit->likelihood;
    json_t *object = model_object(l), *candidates = json_array(), *labels = json_array();
    bool filled = object != NULL && candidates != NULL && labels != NULL;
    for (int i = 0; i < 4 && filled; i++) {
        filled = append(candidates, model_object(&fit->candidates[i]));
    }
    size_t count = l->available ? l->parameters : 0;
    for (size_t i = 0; i < count && filled; i++) {
        filled = append(labels, json_string(names[i]));
    }
    if (!filled) {
        json_decref(candidates);
        json_decref(labels);
        return checked(object, false);
    }
    int failed = json_object_set_new(object, "theta_names", labels);
    failed |= json_object_set_new(object, "theta", numbers(l->theta, count));
    failed |= json_object_set_new(object, "covariance", numbers(l->covariance, count * count));
    failed |= json_object_set_new(object, "candidates", candidates);
    return checked(object, !failed);
}

static json_t *parameter_object(const nw_fit *fit, const nw_fit_parameter *p)
{
    json_t *object = json_pack("{s:o, s:o, s:o, s:o, s:o, s:o}", "value", nw_json_number(p->value),
                               "standard_error", nw_json_number(p->standard_error), "low",
                               nw_json_number(p->low), "high", nw_json_number(p->high), "from",
                               nw_json_text(p->from), "limits_by", nw_json_text(p->limits_by));
    if (object != NULL && fit->options.profile) {
        int failed = json_object_set_new(object, "profile_low", nw_json_number(p->profile_low));
        failed |= json_object_set_new(object, "profile_high", nw_json_number(p->profile_high));
        return checked(object, !failed);
    }
    return object;
}

static json_t *parameters_object(const nw_fit *fit)
{
    json_t *object = json_object();
    bool filled = object != NULL;
    for (int i = 0; i < NW_FIT_PARAMETERS && filled; i++) {
        filled = json_object_set_new(object, nw_fit_parameter_key((nw_fit_parameter_index)i),
                                     parameter_object(fit, &fit->parameter[i])) == 0;
    }
    return checked(object, filled);
}

static json_t *covariance_object(const nw_fit *fit)
{
    json_t *matrix = json_array();
    bool filled = matrix != NULL;
    for (int i = 0; i < 4 && filled; i++) {
        filled = append(matrix, numbers(&fit->covariance[4 * i], 4));
    }
    return json_pack("{s:[s, s, s, s], s:o}", "parameters", "ln_fatigue_strength_coefficient_mpa",
                     "fatigue_strength_exponent", "ln_fatigue_ductility_coefficient",
                     "fatigue_ductility_exponent", "matrix", checked(matrix, filled));
}

static json_t *curve_object(const nw_fit_curve *curve)
{
    json_t *points = json_array();
    bool filled = points != NULL;
    for (int i = 0; i < NW_FIT_GRID && filled; i++) {
        const nw_fit_point *p = &curve->points[i];
        json_t *item = json_pack("{s:f, s:o}", "strain_amplitude", p->strain_amplitude, "cycles",
                                 nw_json_number(p->cycles));
        filled = append(points, item);
        if (filled && !curve->tolerance) {
            filled = json_object_set_new(item, "low", nw_json_number(p->low)) == 0 &&
                     json_object_set_new(item, "high", nw_json_number(p->high)) == 0;
        }
    }
    return json_pack("{s:s, s:o, s:f, s:o, s:o}", "kind",
                     curve->tolerance ? "tolerance" : "percentile", "percentile",
                     nw_json_number(curve->tolerance ? NAN : 100.0 * (1.0 - curve->survival)),
                     "survival", curve->survival, "confidence", nw_json_number(curve->confidence),
                     "points", checked(points, filled));
}

static json_t *curves_array(const nw_fit *fit)
{
    json_t *list = json_array();
    bool filled = list != NULL;
    for (size_t i = 0; i < fit->curve_count && filled; i++) {
        filled = append(list, curve_object(&fit->curves[i]));
    }
    return checked(list, filled);
}

static json_t *tests_object(const nw_coupons *coupons, const nw_fit *fit)
{
    json_t *dropped = json_array();
    bool filled = dropped != NULL;
    for (size_t i = 0; i < fit->dropped_count && filled; i++) {
        filled = append(dropped, test_object(coupons, fit->dropped[i], "dropped on request"));
    }
    double lives[2] = {fit->life_min, fit->life_max},
           strains[2] = {fit->strain_min, fit->strain_max};
    return json_pack("{s:I, s:I, s:I, s:I, s:I, s:f, s:f, s:s, s:I, s:I, s:f, s:o, s:o, s:o}",
                     "count", (json_int_t)fit->tests, "failures", (json_int_t)fit->failures,
                     "runouts", (json_int_t)fit->runouts, "levels", (json_int_t)fit->levels,
                     "least_replicates", (json_int_t)fit->least_replicates, "level_width",
                     fit->options.level_width, "replication_percent", fit->replication_percent,
                     "verdict", fit->verdict, "plastic_strain_measured",
                     (json_int_t)fit->plastic_measured, "plastic_strain_total_minus_stress_over_e",
                     (json_int_t)fit->plastic_computed, "least_plastic_strain",
                     fit->options.least_plastic_strain, "cycles", numbers(lives, 2),
                     "strain_amplitude", numbers(strains, 2), "dropped", checked(dropped, filled));
}

static json_t *outliers_array(const nw_coupons *coupons, const nw_fit *fit)
{
    json_t *list = json_array();
    bool filled = list != NULL;
    for (size_t i = 0; i < fit->outlier_count && filled; i++) {
        const nw_fit_outlier *o = &fit->outliers[i];
        const nw_coupon *c = &coupons->tests[o->test];
        filled = append(list, json_pack("{s:o, s:I, s:s, s:f, s:o, s:f}", "id", nw_json_text(c->id),
                                        "line", (json_int_t)c->line, "about", o->about,
                                        "residual_log10_life", o->residual, "studentised",
                                        nw_json_number(o->studentised), "critical", o->critical));
    }
    return checked(list, filled);
}

static json_t *plan_object(const nw_fit *fit)
{
    const nw_fit_plan *plan = &fit->plan;
    if (isnan(fit->options.plan_cycles)) {
        return json_null();
    }
    if (!plan->available) {
        return json_pack("{s:f, s:o}", "cycles", plan->cycles, "why", nw_json_text(plan->why));
    }
    json_t *rows = json_array();
    bool filled = rows != NULL;
    for (size_t i = 0; i < plan->row_count && filled; i++) {
        const nw_fit_plan_row *r = &plan->rows[i];
        filled = append(rows, json_pack("{s:f, s:f, s:I}", "strain_amplitude", r->strain_amplitude,
                                        "cycles", r->cycles, "tests", (json_int_t)r->tests));
    }
    return json_pack("{s:f, s:f, s:f, s:I, s:o, s:o}", "cycles", plan->cycles, "strain_amplitude",
                     plan->strain_amplitude, "factor_now", plan->factor_now, "tests",
                     (json_int_t)plan->tests, "factor_after",
                     numbers(plan->factor_after, plan->tests + 1), "rows", checked(rows, filled));
}

static json_t *whole(const nw_coupons *coupons, const nw_fit *fit)
{
    json_t *object = json_pack("{s:s, s:s, s:o, s:s, s:o, s:b, s:f}", "format", "notchwright.fit/1",
                               "version", nw_version(), "file", nw_json_text(coupons->file),
                               "method", nw_fit_method_name(fit->method), "youngs_modulus_mpa",
                               nw_json_number(fit->youngs_modulus_mpa), "youngs_modulus_from_tests",
                               (int)fit->modulus_from_tests, "limits", fit->options.limits);
    if (object == NULL) {
        return NULL;
    }
    int failed = json_object_set_new(object, "tests", tests_object(coupons, fit));
    failed |= json_object_set_new(object, "parameters", parameters_object(fit));
    failed |= json_object_set_new(
        object, "scatter",
        json_pack("{s:o, s:o, s:o, s:o, s:o, s:f}", "log10_life_sd",
                  nw_json_number(fit->log10_life_sd), "low", nw_json_number(fit->log10_life_sd_low),
                  "high", nw_json_number(fit->log10_life_sd_high), "log10_life_sd_corrected",
                  nw_json_number(fit->log10_life_sd_corrected), "degrees_of_freedom",
                  nw_json_number(fit->degrees), "slope", fit->scatter_slope));
    failed |= json_object_set_new(object, "covariance", covariance_object(fit));
    failed |= json_object_set_new(
        object, "cyclic",
        json_pack("{s:o, s:o, s:o, s:o, s:o, s:f}", "direct_strength_coefficient_mpa",
                  nw_json_number(fit->cyclic.available ? pow(10.0, fit->cyclic.line.a) : NAN),
                  "direct_hardening_exponent",
                  nw_json_number(fit->cyclic.available ? fit->cyclic.line.b : NAN),
                  "compatible_strength_coefficient_mpa",
                  nw_json_number(fit->compatible_coefficient_mpa), "compatible_hardening_exponent",
                  nw_json_number(fit->compatible_exponent), "disagreement",
                  nw_json_number(fit->cyclic_disagreement), "disagreement_limit",
                  fit->options.cyclic_disagreement_limit));
    failed |= json_object_set_new(object, "lines", lines_object(coupons, fit));
    failed |= json_object_set_new(object, "likelihood", likelihood_object(fit));
    failed |= json_object_set_new(object, "outliers", outliers_array(coupons, fit));
    failed |= json_object_set_new(object, "plan", plan_object(fit));
    failed |= json_object_set_new(object, "curves", curves_array(fit));
    failed |= json_object_set_new(object, "cautions", nw_json_cautions(&fit->cautions));
    return checked(object, !failed);
}

nw_status nw_write_fit_json(FILE *to, const nw_coupons *coupons, const nw_fit *fit)
{
    json_t *object = whole(coupons, fit);
    if (object == NULL) {
        return NW_MEMORY;
    }
    int failed = json_dumpf(object, to, JSON_INDENT(1) | NW_JSON_FLAGS);
    json_decref(object);
    fputc('\n', to);
    return failed ? (ferror(to) ? NW_FILE : NW_MEMORY) : ferror(to) ? NW_FILE : NW_OK;
}
