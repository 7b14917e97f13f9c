/* The comparison of estimates for a person to read: the verdict, then the methods side by side. */
#include "base/text.h"
#include "notchwright/estimate.h"
#include "output/page.h"

#include <math.h>
#include <string.h>

enum { LINE = 500, NUMBER = 40 };

static void cautions_about(FILE *to, const nw_estimate_comparison *r, const char *about)
{
    for (size_t i = 0; i < r->cautions.count; i++) {
        const nw_caution *c = &r->cautions.items[i];
        if (strcmp(c->about, about) == 0) {
            nw_page_paragraph(to, "    ! ", c->text);
        }
    }
}

static void write_set(FILE *to, const nw_estimate_values *v)
{
    fprintf(to, "  sf' %.4g MPa, b %.4g, ef' %.4g, c %.4g; K' %.4g MPa, n' %.4g%s\n",
            v->fatigue_strength_coefficient_mpa, v->fatigue_strength_exponent,
            v->fatigue_ductility_coefficient, v->fatigue_ductility_exponent,
            v->strength_coefficient_mpa, v->hardening_exponent,
            v->cyclic_curve_origin == NW_COMPATIBILITY ? " by compatibility" : "");
}

static void write_verdict(FILE *to, const nw_estimate_comparison *r, const nw_estimate *chosen,
                          bool colour)
{
    const char *on = colour ? "\033[1m" : "", *off = colour ? "\033[0m" : "";
    if (chosen != NULL && chosen != r->recommended) {
        fprintf(to, "%sCHOSEN%s  %s: %s\n", on, off, chosen->key, chosen->title);
        write_set(to, &nw_estimate_row_of(r, chosen)->values);
        fprintf(to, "  asked for; recommended is %s\n",
                r->recommended == NULL ? "none" : r->recommended->key);
    } else if (r->recommended != NULL) {
        fprintf(to, "%sRECOMMENDED%s  %s: %s\n", on, off, r->recommended->key,
                r->recommended->title);
        write_set(to, &nw_estimate_row_of(r, r->recommended)->values);
        nw_page_paragraph(to, "  because ", r->because);
    } else {
        fprintf(to, "%sNO METHOD APPLIES%s\n", on, off);
    }
    cautions_about(to, r, "recommended");
}

static void add_known(nw_text_builder *out, const char *name, double value, const char *unit)
{
    if (!isnan(value)) {
        nw_text_add(out, ", %s %.6g %s", name, value, unit);
    }
}

static void write_inputs(FILE *to, const nw_estimate_comparison *r)
{
    const nw_estimate_input *in = &r->input;
    char line[LINE];
    nw_text_builder out = nw_text_builder_on(line, sizeof line);
    nw_text_add(&out, "%s, E %.6g GPa", nw_group_name(in->group), in->youngs_modulus_mpa / 1e3);
    add_known(&out, "Su", in->ultimate_strength_mpa, "MPa");
    add_known(&out, "Sy", in->yield_strength_mpa, "MPa");
    add_known(&out, "hardness", in->hardness_hb, "HB");
    add_known(&out, "reduction of area", 100.0 * in->reduction_of_area, "%");
    if (!isnan(r->fracture_strain)) {
        nw_text_add(&out, ", true fracture strain D %.4g (%s)", r->fracture_strain,
                    isnan(in->fracture_strain) ? "ln(1/(1 - RA))" : "given");
    }
    if (!isnan(r->fracture_stress_mpa)) {
        nw_text_add(&out, ", true fracture stress %.5g MPa (%s)", r->fracture_stress_mpa,
                    r->fracture_stress_derived ? "Su (1 + D)" : "given");
    }
    fputc('\n', to);
    nw_page_paragraph(to, "Given    ", line);
    cautions_about(to, r, "inputs");
}

static void write_row(FILE *to, const nw_estimate_comparison *r, const nw_estimate_row *row)
{
    const nw_estimate_values *v = &row->values;
    char transition[NUMBER];
    fprintf(to, " %c%-25s %6.0f %8.4f %7.4f %8.4f %6.0f%c%7.4f %9s %6.0f\n",
            row->record == r->recommended ? '*' : ' ', row->record->key,
            v->fatigue_strength_coefficient_mpa, v->fatigue_strength_exponent,
            v->fatigue_ductility_coefficient, v->fatigue_ductility_exponent,
            v->strength_coefficient_mpa, v->cyclic_curve_origin == NW_COMPATIBILITY ? 'c' : ' ',
            v->hardening_exponent,
            nw_page_rounded(row->transition_reversals, 3, transition, sizeof transition),
            row->stress_amplitude_1e6_mpa);
}

static void write_methods(FILE *to, const nw_estimate_comparison *r)
{
    if (r->applicable == 0) {
        return;
    }
    fputs("\nMethods that apply\n"
          "  method                      sf' MPa      b     ef'       c  K' MPa     n'       2Nt"
          "  sa(1e6)\n",
          to);
    for (size_t i = 0; i < r->row_count; i++) {
        if (r->rows[i].applies) {
            write_row(to, r, &r->rows[i]);
        }
    }
    nw_page_paragraph(to, "  ",
                      "* recommended; c: K' and n' by compatibility; 2Nt: reversals at which "
                      "elastic and plastic strain are equal; sa(1e6): stress amplitude of the "
                      "elastic line at 1e6 cycles, MPa");
    cautions_about(to, r, "methods");
}

static void write_amplitudes(FILE *to, const nw_estimate_comparison *r, size_t from, size_t end)
{
    fprintf(to, "\n  %-25s", "strain amplitude");
    for (size_t i = from; i < end; i++) {
        char text[NUMBER];
        snprintf(text, sizeof text, "%.4g %%", 100.0 * r->amplitudes[i]);
        fprintf(to, " %10s", text);
    }
    fputc('\n', to);
    char text[NUMBER];
    for (size_t k = 0; k < r->row_count; k++) {
        const nw_estimate_row *row = &r->rows[k];
        if (!row->applies) {
            continue;
        }
        fprintf(to, " %c%-25s", row->record == r->recommended ? '*' : ' ', row->record->key);
        for (size_t i = from; i < end; i++) {
            fprintf(to, " %10s", nw_page_rounded(row->cycles[i], 2, text, sizeof text));
        }
        fputc('\n', to);
    }
    fprintf(to, "  %-25s", "longest over shortest");
    for (size_t i = from; i < end; i++) {
        fprintf(to, " %10s", nw_page_rounded(r->spread[i].ratio, 2, text, sizeof text));
    }
    fputc('\n', to);
}

/* Six amplitudes a table fit the page. */
static void write_lives(FILE *to, const nw_estimate_comparison *r)
{
    if (r->applicable == 0) {
        return;
    }
    fputs("\nWhat the spread means: life in cycles", to);
    for (size_t from = 0; from < r->amplitude_count; from += 6) {
        size_t end = from + 6 < r->amplitude_count ? from + 6 : r->amplitude_count;
        write_amplitudes(to, r, from, end);
    }
    cautions_about(to, r, "spread");
}

static void write_others(FILE *to, const nw_estimate_comparison *r)
{
    if (r->applicable == r->row_count) {
        return;
    }
    fputs("\nMethods that do not apply\n", to);
    for (size_t i = 0; i < r->row_count; i++) {
        if (!r->rows[i].applies) {
            char first[NUMBER];
            snprintf(first, sizeof first, "  %-26s", r->rows[i].record->key);
            nw_page_paragraph(to, first, r->rows[i].reason);
        }
    }
}

static void write_plan(FILE *to, const nw_estimate_comparison *r)
{
    if (r->recommended == NULL) {
        return;
    }
    fputs("\nTests that would settle it: strain-controlled, five levels of three specimens each, "
          "the\n"
          "customary least (common practice, no source), at lives of the recommended method\n",
          to);
    for (int i = 0; i < NW_PLAN_LEVELS; i++) {
        char life[NUMBER];
        fprintf(to, "  %.3g %% strain amplitude, %d specimens, about %s cycles\n",
                100.0 * r->plan[i].strain_amplitude, r->plan[i].specimens,
                nw_page_rounded(r->plan[i].expected_cycles, 2, life, sizeof life));
    }
}

static void write_sources(FILE *to, const nw_estimate_comparison *r)
{
    fputs("\nSources, what is reported of accuracy, and what the formulas were checked against\n",
          to);
    for (size_t i = 0; i < r->row_count; i++) {
        const nw_estimate *m = r->rows[i].record;
        if (!r->rows[i].applies) {
            continue;
        }
        char first[NUMBER];
        snprintf(first, sizeof first, "  %s: ", m->key);
        nw_page_paragraph(to, first, m->reference);
        nw_page_paragraph(to, "    accuracy: ", m->accuracy);
        nw_page_paragraph(to, "    check: ", m->check);
        if (m->doubt != NULL) {
            nw_page_paragraph(to, "    doubt: ", m->doubt);
        }
    }
}

nw_status nw_write_estimate_text(FILE *to, const nw_estimate_comparison *r,
                                 const nw_estimate *chosen, bool colour)
{
    write_verdict(to, r, chosen, colour);
    write_inputs(to, r);
    write_methods(to, r);
    write_lives(to, r);
    write_others(to, r);
    write_plan(to, r);
    write_sources(to, r);
    return ferror(to) ? NW_FILE : NW_OK;
}
