/* One notch under one block: histories to events, first block, repeating block, life. */
#include "job/assess.h"

#include "job/events.h"
#include "job/loop_tally.h"

#include <gsl/gsl_cdf.h>
#include <math.h>
#include <stdlib.h>
#include <string.h>

/* What a run works with; freed together. */
typedef struct run {
    const nw_case *input;
    const nw_assess_options *options;
    nw_diagnostics *diagnostics;
    nw_event *events;
    uint64_t *first_ids;
    nw_notch_curve *curve;
    nw_life *life;
    nw_tracker *tracker;
    nw_tally tally;
    double first_damage, first_damage_above;
    bool header_unit_overridden;
} run;

static nw_status no_memory(run *r)
{
    return nw_fault(r->diagnostics, NW_MEMORY, NULL, NULL, "out of memory assessing the case");
}

static void free_run(run *r)
{
    for (size_t i = 0; r->events != NULL && i < r->input->load_count; i++) {
        nw_event_clear(&r->events[i]);
    }
    free(r->events);
    free(r->first_ids);
    free(r->tally.kept);
    nw_tracker_free(r->tracker);
    nw_life_free(r->life);
    nw_notch_curve_free(r->curve);
}

static nw_status read_events(run *r)
{
    size_t count = r->input->load_count;
    r->events = calloc(count, sizeof *r->events);
    r->first_ids = calloc(count, sizeof *r->first_ids);
    if (r->events == NULL || r->first_ids == NULL) {
        return no_memory(r);
    }
    nw_status status =
        nw_case_events(r->input, r->options, r->events, &r->header_unit_overridden, r->diagnostics);
    for (size_t i = 1; i < count; i++) {
        r->first_ids[i] = r->first_ids[i - 1] + r->events[i - 1].count;
    }
    return status;
}

/* The largest |L| that a branch or the initial curve can reach. */
static double largest_load(const run *r)
{
    double largest = fabs(r->input->residual_stress_mpa);
    for (size_t i = 0; i < r->input->load_count; i++) {
        largest =
            fmax(largest, fmax(fabs(r->events[i].load_max_mpa), fabs(r->events[i].load_min_mpa)));
    }
    return largest;
}

const nw_notch_rule *nw_case_rule_in_use(const nw_case *input)
{
    bool gauge = input->load_count > 0 && input->loads[0].kind == NW_NOTCH_STRAIN;
    return gauge ? nw_notch_rule_find("linear") : input->rule;
}

nw_rule_input nw_case_rule_input(const nw_case *input)
{
    return (nw_rule_input){
        .youngs_modulus_mpa = input->material.youngs_modulus_mpa,
        .strength_coefficient_mpa = input->material.strength_coefficient_mpa,
        .hardening_exponent = input->material.hardening_exponent,
        .factor = isnan(input->factor) ? 1.0 : input->factor,
        .limit_load_ratio = input->limit_load_ratio,
        .plastic_net_section = input->plastic_net_section,
    };
}

static nw_status build_curve(run *r)
{
    const nw_notch_rule *rule = nw_case_rule_in_use(r->input);
    if (rule->is_table) {
        return nw_case_curve_file(r->input, &r->curve, r->diagnostics);
    }
    nw_rule_input input = nw_case_rule_input(r->input);
    return nw_notch_curve_build(rule, &input, largest_load(r), &r->curve, r->diagnostics);
}

/* Lives of the curve used over those of the median curve, from the log-normal scatter. */
static double survival_factor(const nw_case *input)
{
    return input->survival == 0.5
               ? 1.0
               : pow(10.0, input->material.log10_life_sd * gsl_cdf_ugaussian_Qinv(input->survival));
}

static nw_status prepare_life(run *r)
{
    const nw_case *input = r->input;
    nw_life_options options = {
        .correction = input->correction,
        .walker_gamma = input->walker_gamma,
        .below_endurance = input->below_endurance,
        .endurance_strain_amplitude = input->endurance_strain_amplitude,
        .surface_factor = input->surface_factor,
        .surface_reversals = input->surface_reversals,
        .life_factor = survival_factor(input),
    };
    double stress, strain;
    nw_notch_curve_at(r->curve, largest_load(r), &stress, &strain);
    return nw_life_create(&input->material, &options, strain, stress, &r->life, r->diagnostics);
}

static void prepare_tally(run *r)
{
    nw_tally *tally = &r->tally;
    tally->life = r->life;
    tally->events = r->events;
    tally->first_ids = r->first_ids;
    tally->event_count = r->input->load_count;
    for (size_t i = 0; i < r->input->load_count; i++) {
        tally->any_gate |= r->events[i].ignore_ranges_below_mpa > 0.0;
    }
    bool open = r->input->below_endurance == NW_HARMLESS_UNTIL_EXCEEDED;
    tally->endurance = open ? r->input->endurance_strain_amplitude : NAN;
    tally->top_most = r->options->worst == 0              ? 1
                      : r->options->worst > NW_WORST_MOST ? NW_WORST_MOST
                                                          : r->options->worst;
    tally->stress_mean_max_mpa = -INFINITY;
    size_t points = 0;
    for (size_t i = 0; i < r->input->load_count; i++) {
        points += r->events[i].count;
    }
    nw_tally_reserve(tally, points);
}

static nw_status pass(run *r)
{
    nw_tally_restart(&r->tally);
    nw_status status = nw_block_pass(r->tracker, r->events, r->input->load_count);
    return status == NW_MEMORY ? no_memory(r) : status;
}

/* Whether loops that were not kept could, added up, be among the worst. */
static bool skipped_could_matter(const nw_tally *tally)
{
    if (tally->skipped_damage == 0.0) {
        return false;
    }
    if (tally->kept_count < tally->top_most) {
        return true;
    }
    const nw_counted_loop *last = &tally->kept[tally->top_most - 1];
    return tally->skipped_damage > last->rate * last->count;
}

/* The block from rest, then the repeating block. Of the second only loops are kept that can be among the
 * worst, judged by the first; where that turns out too bold the (periodic) block is passed again. */
static nw_status run_blocks(run *r)
{
    nw_tally *tally = &r->tally;
    if (nw_tracker_create(r->curve, r->input->residual_stress_mpa, nw_tally_loops, tally,
                          &r->tracker) != NW_OK) {
        return no_memory(r);
    }
    tally->finds_top = !r->options->all_loops;
    nw_status status = pass(r);
    r->first_damage = tally->damage;
    r->first_damage_above = tally->damage_above;
    double top = tally->top[tally->top_most - 1];
    tally->keep_from = tally->finds_top && tally->loops > 0.0 ? top / tally->loops : 0.0;
    tally->finds_top = false;
    tally->keeps = true;
    for (bool again = true; again && status == NW_OK;) {
        status = pass(r);
        if (status != NW_OK) {
            break;
        }
        size_t wanted = r->options->all_loops ? SIZE_MAX : tally->top_most;
        if (nw_counted_loops_rank(tally->kept, &tally->kept_count, wanted) != NW_OK) {
            return no_memory(r);
        }
        again = skipped_could_matter(tally);
        tally->keep_from = 0.0;
    }
    return status;
}

static double life_of(double first, double repeating, double damage_sum)
{
    if (first >= damage_sum) {
        return damage_sum / first;
    }
    return repeating > 0.0 ? 1.0 + (damage_sum - first) / repeating : INFINITY;
}

/* Largest |nominal stress| of the events; NAN when no event tells it. */
static double largest_nominal(const run *r)
{
    const nw_case *input = r->input;
    double nominal = NAN;
    for (size_t i = 0; i < input->load_count; i++) {
        nw_load_kind kind = input->loads[i].kind;
        double factor = kind == NW_NOMINAL_STRESS         ? input->factor
                        : kind == NW_NOTCH_ELASTIC_STRESS ? input->kt
                                                          : NAN;
        double high = r->events[i].load_max_mpa - input->residual_stress_mpa;
        double low = r->events[i].load_min_mpa - input->residual_stress_mpa;
        nominal = fmax(nominal, fmax(fabs(high), fabs(low)) / factor);
    }
    return nominal;
}

static void fill_block(const run *r, nw_assessment *result)
{
    for (size_t i = 0; i < r->input->load_count; i++) {
        result->samples += (double)r->events[i].samples * r->events[i].repeats;
    }
    result->extremes = nw_tracker_extremes(r->tracker);
    result->load_max_mpa = result->extremes.load_max_mpa;
    result->load_min_mpa = result->extremes.load_min_mpa;
    result->loops_total = r->tally.loops;
    result->left_out = r->tally.left_out;
    result->turning_points = 2.0 * (r->tally.loops + r->tally.left_out.loops);
    result->nominal_max_mpa = largest_nominal(r);
}

static void fill_damage(const run *r, nw_assessment *result)
{
    const nw_case *input = r->input;
    bool open = input->below_endurance == NW_HARMLESS_UNTIL_EXCEEDED;
    result->endurance_exceeded = r->tally.exceeded;
    bool none_counts = open && !r->tally.exceeded;
    if (none_counts && !r->tally.left_out_exceeded) {
        result->left_out.damage = 0.0;
    }
    result->damage_first_block = none_counts ? r->first_damage_above : r->first_damage;
    result->damage_per_block = none_counts ? r->tally.damage_above : r->tally.damage;
    result->life_blocks =
        life_of(result->damage_first_block, result->damage_per_block, input->damage_sum);
    result->has_target = !isnan(input->target_blocks);
    result->target_reached = result->has_target && result->life_blocks >= input->target_blocks;
}

static void fill_loop(const run *r, const nw_assessment *result, const nw_counted_loop *from,
                      nw_loop_result *to)
{
    bool harmless = result->damage_per_block == 0.0;
    double rate = harmless ? 0.0 : from->rate;
    to->values = nw_loop_values_of(&from->loop);
    to->count = from->count;
    to->cycles = rate > 0.0 ? 1.0 / rate : INFINITY;
    to->damage = rate * from->count;
    to->share = harmless ? 0.0 : to->damage / result->damage_per_block;
    to->start = nw_history_place_of(&r->tally, from->loop.start.id);
    to->tip = nw_history_place_of(&r->tally, from->loop.tip.id);
}

enum { FILL_CHUNK = 1 << 14 };

/* From the end, giving back the room of what is done: with very many loops both lists whole would be the
 * largest thing in memory. */
static void fill_from_end(run *r, nw_assessment *result)
{
    for (size_t done = result->loop_count; done > 0;) {
        size_t from = done > FILL_CHUNK ? done - FILL_CHUNK : 0;
        for (size_t i = from; i < done; i++) {
            fill_loop(r, result, &r->tally.kept[i], &result->loops[i]);
        }
        done = from;
        nw_counted_loop *smaller = realloc(r->tally.kept, (from + 1) * sizeof *smaller);
        r->tally.kept = smaller == NULL ? r->tally.kept : smaller;
    }
}

static nw_status fill_loops(run *r, nw_assessment *result)
{
    size_t count = r->tally.kept_count;
    if (!r->options->all_loops && count > r->options->worst) {
        count = r->options->worst;
    }
    result->loops = malloc((count == 0 ? 1 : count) * sizeof *result->loops);
    if (result->loops == NULL) {
        return no_memory(r);
    }
    result->loop_count = count;
    fill_from_end(r, result);
    return NW_OK;
}

static nw_status fill(run *r, nw_assessment *result)
{
    result->rule = nw_case_rule_in_use(r->input);
    result->notch_curve_error = nw_notch_curve_error(r->curve);
    result->curve = nw_life_curve(r->life);
    fill_block(r, result);
    fill_damage(r, result);
    nw_status status = fill_loops(r, result);
    nw_assess_evidence evidence = {
        .stress_mean_max_mpa = r->tally.stress_mean_max_mpa,
        .rate_max = r->tally.rate_max,
        .header_unit_overridden = r->header_unit_overridden,
        .curve_exceeded =
            result->rule->is_table && largest_load(r) > nw_notch_curve_load_max_mpa(r->curve),
    };
    nw_assess_cautions(r->input, &evidence, result);
    return status;
}

nw_status nw_assess(const nw_case *input, const nw_assess_options *options, nw_assessment **result,
                    nw_diagnostics *diagnostics)
{
    run r = {.input = input, .options = options, .diagnostics = diagnostics};
    *result = NULL;
    nw_status status = read_events(&r);
    if (status == NW_OK) {
        status = build_curve(&r);
    }
    if (status == NW_OK) {
        status = prepare_life(&r);
    }
    if (status == NW_OK) {
        prepare_tally(&r);
        status = run_blocks(&r);
    }
    nw_assessment *made = status == NW_OK ? calloc(1, sizeof *made) : NULL;
    if (status == NW_OK) {
        status = made == NULL ? no_memory(&r) : fill(&r, made);
    }
    free_run(&r);
    if (status != NW_OK) {
        nw_assessment_free(made);
        return status;
    }
    *result = made;
    return NW_OK;
}

void nw_assessment_free(nw_assessment *result)
{
    if (result != NULL) {
        free(result->loops);
        free(result);
    }
}
