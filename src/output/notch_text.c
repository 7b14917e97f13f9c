/* The factors of a notch for a person to read. */
#include "base/text.h"
#include "notchwright/notch_factors.h"
#include "output/page.h"

#include <math.h>
#include <string.h>

enum { LINE = 900, NUMBER = 40 };

static void cautions_about(FILE *to, const nw_notch_factors *r, const char *about)
{
    for (size_t i = 0; i < r->cautions.count; i++) {
        const nw_caution *c = &r->cautions.items[i];
        if (strcmp(c->about, about) == 0) {
            nw_page_paragraph(to, "    ! ", c->text);
        }
    }
}

static void write_kt(FILE *to, const nw_notch_factors *r, bool colour)
{
    const nw_kt *k = &r->kt;
    fprintf(to, "%s, %s\n\n", k->shape->title, k->load->key);
    fprintf(to, "%sKt %.4g%s  formula %s%s", colour ? "\033[1m" : "", k->kt,
            colour ? "\033[0m" : "", k->formula->key, k->valid ? "" : " (EXTRAPOLATED)");
    if (!isnan(k->bias_percent)) {
        fprintf(to, "; finite elements %.4g: the formula is %.1f %% %s", k->reference,
                fabs(k->bias_percent), k->bias_percent < 0.0 ? "low" : "high");
    }
    fputc('\n', to);
    nw_page_paragraph(to, "  means ", k->load->kt_means);
    nw_page_paragraph(to, "  on ", k->load->nominal);
    cautions_about(to, r, "kt");
    cautions_about(to, r, "nominal");
}

static bool material_given(const nw_notch_factors *r)
{
    const nw_notch_question *q = &r->question;
    return q->group != NW_GROUP_UNSTATED || !isnan(q->ultimate_strength_mpa) ||
           !isnan(q->yield_strength_mpa);
}

static void write_kf(FILE *to, const nw_notch_factors *r)
{
    if (r->sensitivity == NULL) {
        fputs(material_given(r) ? "Kf not calculated: no method applies, see below\n"
                                : "Kf not calculated: give --ultimate (and --group, --yield)\n",
              to);
        return;
    }
    fprintf(to, "Kf %.4g  by %s", r->kf, r->sensitivity->key);
    if (!isnan(r->q)) {
        fprintf(to, ", notch sensitivity q %.3f", r->q);
    }
    fputc('\n', to);
    cautions_about(to, r, "kf");
}

static void write_stress(FILE *to, const nw_notch_factors *r)
{
    if (!isnan(r->nominal_stress_mpa)) {
        fprintf(to,
                "\nNominal stress S %.4g MPa; notch stress if all were elastic, Kt S, %.4g MPa\n",
                r->nominal_stress_mpa, r->notch_elastic_stress_mpa);
    }
    if (!isnan(r->surface_factor)) {
        fprintf(to,
                "\nSurface factor %.4f for a roughness Rz of %g um, on the endurance amplitude\n",
                r->surface_factor, r->question.roughness_um);
    }
}

static void write_sizes(FILE *to, const nw_kt *k)
{
    char line[LINE];
    nw_text_builder out = nw_text_builder_on(line, sizeof line);
    for (const nw_shape_size *row = k->shape->sizes; row->key != NULL; row++) {
        double value = k->sizes.value[row->size];
        if (!isnan(value)) {
            nw_text_add(&out, "%s%s %.6g%s", out.length > 0 ? ", " : "", row->key, value,
                        row->dimension == NW_LENGTH ? " mm" : "");
        }
    }
    fputc('\n', to);
    nw_page_paragraph(to, "Sizes    ", line);
    nw_page_paragraph(to, "Drawing  ", k->shape->applies);
    if (!isnan(k->gradient_per_mm)) {
        char gradient[LINE];
        snprintf(gradient, sizeof gradient, "%.4g/mm at the root: %s", k->gradient_per_mm,
                 k->load->gradient_source);
        nw_page_paragraph(to, "Gradient ", gradient);
    }
}

static void write_formulas(FILE *to, const nw_kt *k)
{
    fputs("\nFormulas for Kt\n", to);
    for (size_t i = 0; i < k->row_count; i++) {
        const nw_kt_row *row = &k->rows[i];
        char bias[NUMBER] = "", line[LINE];
        if (!isnan(row->bias_percent)) {
            snprintf(bias, sizeof bias, ", %+.1f %%", row->bias_percent);
        }
        fprintf(to, " %c%-11s %.4g%s%s%s\n", row->formula == k->formula ? '*' : ' ',
                row->formula->key, row->kt, bias,
                row->valid ? "" : ", out of range: ", row->outside);
        snprintf(line, sizeof line, "%s; %s", row->formula->equation, row->formula->source);
        nw_page_paragraph(to, "             ", line);
    }
    if (!isnan(k->reference)) {
        char line[LINE];
        snprintf(line, sizeof line, "percent against Kt %.4g: %s; within about %g %%.",
                 k->reference, k->load->reference_how, k->reference_error_percent);
        nw_page_paragraph(to, "  ", line);
    }
}

static void write_methods(FILE *to, const nw_notch_factors *r)
{
    if (!material_given(r)) {
        return;
    }
    fputs("\nMethods for Kf\n", to);
    for (size_t i = 0; i < r->row_count; i++) {
        const nw_kf *row = &r->rows[i];
        char line[LINE];
        nw_text_builder out = nw_text_builder_on(line, sizeof line);
        if (!row->applies) {
            nw_text_add(&out, "- %s", row->reason);
        } else if (isnan(row->q)) {
            nw_text_add(&out, "%.4g", row->kf);
        } else {
            nw_text_add(&out, "%.4g, q %.3f", row->kf, row->q);
        }
        fprintf(to, " %c%-11s %s\n", row->record == r->sensitivity ? '*' : ' ', row->record->key,
                line);
        snprintf(line, sizeof line, "%s; %s", row->record->equation, row->record->reference);
        if (row->applies) {
            nw_page_paragraph(to, "             ", line);
        }
    }
}

nw_status nw_write_notch_text(FILE *to, const nw_notch_factors *result, bool colour)
{
    write_kt(to, result, colour);
    write_kf(to, result);
    write_stress(to, result);
    write_sizes(to, &result->kt);
    write_formulas(to, &result->kt);
    write_methods(to, result);
    return ferror(to) ? NW_FILE : NW_OK;
}
