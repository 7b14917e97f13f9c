/* The assessment for a person to read. */
#include "base/text.h"
#include "notchwright/notchwright.h"
#include "output/page.h"

#include <inttypes.h>
#include <math.h>
#include <stdlib.h>
#include <string.h>

enum { LINE = 400, NUMBER = 40 };

/* Digits of a life that its basis can support. */
static int life_digits(const nw_case *input)
{
    return input->material.basis == NW_ESTIMATED ? 1 : 2;
}

static const char *basis_words(const nw_case *input)
{
    switch (input->material.basis) {
    case NW_TESTED:
        return "from tests";
    case NW_HANDBOOK:
        return "from a handbook";
    case NW_ESTIMATED:
        return "ESTIMATED without tests";
    default:
        return "given in the case, basis not stated";
    }
}

static void cautions_about(FILE *to, const nw_assessment *result, const char *about)
{
    for (size_t i = 0; i < result->cautions.count; i++) {
        const nw_caution *c = &result->cautions.items[i];
        if (strcmp(c->about, about) == 0) {
            nw_page_paragraph(to, "    ! ", c->text);
        }
    }
}

/* Digits at which the rounded life lies on the side of the target that the life itself does: "missed" beside two
 * equal numbers would be no help. */
static int verdict_digits(const nw_case *input, const nw_assessment *result)
{
    int digits = life_digits(input);
    char text[NUMBER];
    for (; result->has_target && digits < 9; digits++) {
        double rounded =
            strtod(nw_page_rounded(result->life_blocks, digits, text, sizeof text), NULL);
        double ratio = strtod(
            nw_page_rounded(result->life_blocks / input->target_blocks, digits, text, sizeof text),
            NULL);
        if ((rounded >= input->target_blocks) == result->target_reached &&
            (ratio >= 1.0) == result->target_reached) {
            break;
        }
    }
    return digits;
}

static void write_verdict(FILE *to, const nw_case *input, const nw_assessment *result, bool colour)
{
    char life[NUMBER], ratio[NUMBER], line[LINE];
    int digits = isinf(result->life_blocks) ? life_digits(input) : verdict_digits(input, result);
    nw_text_builder out = nw_text_builder_on(line, sizeof line);
    if (isinf(result->life_blocks)) {
        nw_text_add(&out, "no damage by this method");
    } else {
        nw_text_add(&out, "about %s blocks%s",
                    nw_page_rounded(result->life_blocks, digits, life, sizeof life),
                    input->material.basis == NW_ESTIMATED ? " (estimated)" : "");
    }
    if (!result->has_target) {
        fprintf(to, "LIFE  %s (no target given)\n", line);
        return;
    }
    const char *verdict = result->target_reached ? "TARGET REACHED" : "TARGET MISSED";
    const char *on = !colour ? "" : result->target_reached ? "\033[1;32m" : "\033[1;31m";
    fprintf(to, "%s%s%s  %s against a target of %.7g", on, verdict, colour ? "\033[0m" : "", line,
            input->target_blocks);
    if (isfinite(result->life_blocks)) {
        fprintf(to, ", %s times the target",
                nw_page_rounded(result->life_blocks / input->target_blocks, digits, ratio,
                                sizeof ratio));
    }
    fputc('\n', to);
}

static bool is_gauge(const nw_case *input)
{
    return input->loads[0].kind == NW_NOTCH_STRAIN;
}

static void write_basis(FILE *to, const nw_case *input, const nw_assessment *result)
{
    char line[LINE];
    snprintf(line, sizeof line,
             "%s%s; mean stress %s; material %s, %s; %g %% survival%s; failure at damage sum %g.",
             is_gauge(input) ? "strain measured at the root" : "rule ",
             is_gauge(input) ? "" : result->rule->title, input->correction->title,
             input->material.name[0] == '\0' ? "inline" : input->material.name, basis_words(input),
             100.0 * input->survival, input->survival == 0.5 ? " (median curve)" : "",
             input->damage_sum);
    nw_page_paragraph(to, "  by ", line);
}

static void write_damage(FILE *to, const nw_case *input, const nw_assessment *result)
{
    char first[NUMBER], each[NUMBER];
    int digits = life_digits(input) + 1;
    fprintf(to, "\nDamage   first block %s, each later block %s (Palmgren-Miner)\n",
            nw_page_rounded(result->damage_first_block, digits, first, sizeof first),
            nw_page_rounded(result->damage_per_block, digits, each, sizeof each));
    cautions_about(to, result, "damage_per_block");
}

static void write_load(FILE *to, const nw_case *input, const nw_assessment *result)
{
    fprintf(to, "Block    %zu event%s, %.0f samples, %.0f reversals, %.0f closed loop%s a block\n",
            input->load_count, input->load_count == 1 ? "" : "s", result->samples,
            result->turning_points, result->loops_total, result->loops_total == 1.0 ? "" : "s");
    fprintf(to, "Load     notch stress if all were elastic: %.1f to %.1f MPa", result->load_min_mpa,
            result->load_max_mpa);
    if (!isnan(result->nominal_max_mpa)) {
        fprintf(to, " (%s = %.3g, nominal up to %.1f MPa)", isnan(input->kf) ? "Kt" : "Kf",
                input->factor, result->nominal_max_mpa);
    }
    if (input->residual_stress_mpa != 0.0) {
        fprintf(to, ", residual %.1f MPa included", input->residual_stress_mpa);
    }
    fputc('\n', to);
}

static void write_local(FILE *to, const nw_assessment *result)
{
    const nw_extremes *e = &result->extremes;
    fprintf(to, "Local    stress %.0f to %.0f MPa, strain %.3f to %.3f %%\n", e->stress_min_mpa,
            e->stress_max_mpa, 100.0 * e->strain_min, 100.0 * e->strain_max);
    cautions_about(to, result, "extremes");
}

static void write_material(FILE *to, const nw_case *input, const nw_assessment *result)
{
    const nw_material *m = &input->material;
    fprintf(to,
            "Material E %.0f MPa, K' %.4g MPa, n' %.4g, sf' %.4g MPa, b %.4g, ef' %.4g, c %.4g\n",
            m->youngs_modulus_mpa, m->strength_coefficient_mpa, m->hardening_exponent,
            m->fatigue_strength_coefficient_mpa, result->curve.fatigue_strength_exponent,
            m->fatigue_ductility_coefficient, m->fatigue_ductility_exponent);
    if (m->source[0] != '\0') {
        nw_page_paragraph(to, "         source: ", m->source);
    }
}

static void write_loop(FILE *to, const nw_case *input, const nw_loop_result *loop, size_t number)
{
    const nw_loop_values *v = &loop->values;
    char life[NUMBER], place[LINE];
    snprintf(place, sizeof place, "%s: samples %" PRIu64 " and %" PRIu64,
             input->loads[loop->start.event].label, loop->start.sample + 1, loop->tip.sample + 1);
    if (loop->start.event != loop->tip.event) {
        snprintf(place, sizeof place, "%s: sample %" PRIu64 "; %s: sample %" PRIu64,
                 input->loads[loop->start.event].label, loop->start.sample + 1,
                 input->loads[loop->tip.event].label, loop->tip.sample + 1);
    }
    fprintf(to, "  %3zu %6.1f %8.0f %8.4f %7.0f %7.0f %9s  %s\n", number, 100.0 * loop->share,
            loop->count, 100.0 * v->strain_amplitude, v->stress_max_mpa, v->stress_mean_mpa,
            isinf(loop->cycles) ? "-" : nw_page_rounded(loop->cycles, 3, life, sizeof life), place);
}

static void write_loops(FILE *to, const nw_case *input, const nw_assessment *result)
{
    size_t shown = result->loop_count < 10 ? result->loop_count : 10;
    if (shown == 0) {
        fputs("\nNo closed loop is left in the repeating block\n", to);
        return;
    }
    if (shown == 1) {
        fputs("\nThe loop of the repeating block\n", to);
    } else {
        fprintf(to, "\nThe %zu most damaging loops of the repeating block\n", shown);
    }
    fputs("        share    count   strain  stress  stress   life of   where they peak\n"
          "   no       %    /block   ampl. %  max MPa mean MPa  cycles   (sample counts from 1)\n",
          to);
    double share = 0.0;
    for (size_t i = 0; i < shown; i++) {
        write_loop(to, input, &result->loops[i], i + 1);
        share += result->loops[i].share;
    }
    if (result->damage_per_block > 0.0) {
        fprintf(to, "  together %.1f %% of the damage a block\n", 100.0 * share);
    }
}

nw_status nw_write_assessment_text(FILE *to, const nw_case *input, const nw_assessment *result,
                                   bool colour)
{
    if (input->title[0] != '\0') {
        fprintf(to, "%s\n\n", input->title);
    }
    write_verdict(to, input, result, colour);
    write_basis(to, input, result);
    cautions_about(to, result, "life_blocks");
    write_damage(to, input, result);
    write_load(to, input, result);
    write_local(to, result);
    write_material(to, input, result);
    write_loops(to, input, result);
    fprintf(to, "\nMethods\n");
    if (is_gauge(input)) {
        nw_page_paragraph(to, "  notch rule: ", "none, strain was measured at the root");
    } else {
        nw_page_paragraph(to, "  notch rule: ", result->rule->equation);
        nw_page_paragraph(to, "    ", result->rule->reference);
    }
    nw_page_paragraph(to, "  mean stress: ", input->correction->equation);
    nw_page_paragraph(to, "    ", input->correction->reference);
    nw_page_paragraph(
        to, "  memory: ",
        "Masing branches, loops closed as in Clormann & Seeger, Stahlbau 55 (1986) 65");
    return ferror(to) ? NW_FILE : NW_OK;
}
