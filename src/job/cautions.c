/* Cautions: what a reader must know beside a number. */
#include "job/assess.h"

#include <math.h>
#include <string.h>

static void material_cautions(const nw_case *input, nw_cautions *out)
{
    const nw_material *m = &input->material;
    if (m->estimate != NULL) {
        const nw_estimate *estimate = nw_estimate_find(m->estimate);
        nw_caution_add(
            out, "estimated_material", "life_blocks",
            "Life estimated without tests: strain-life parameters by the %s (for %s). Lives "
            "from such estimates are commonly off by a factor of 3 to 10.",
            estimate->title, estimate->range);
    } else if (m->basis == NW_ESTIMATED) {
        nw_caution_add(
            out, "estimated_material", "life_blocks",
            "Life estimated without tests: the material file says its values are "
            "estimates (%.200s). Lives from such estimates are commonly off by a factor of 3 "
            "to 10.",
            m->source);
    }
    if (m->basis == NW_BASIS_UNSTATED) {
        nw_caution_add(out, "basis_unstated", "life_blocks",
                       "The case does not say where its material values come from (basis: tested, "
                       "handbook or estimated).");
    }
    if (m->hardening_exponent_origin == NW_COMPATIBILITY ||
        m->strength_coefficient_origin == NW_COMPATIBILITY) {
        bool both = m->hardening_exponent_origin == m->strength_coefficient_origin;
        nw_caution_add(out, "cyclic_curve_from_compatibility", "extremes",
                       "%s of the cyclic curve not given: %s from the strain-life set (n' = b/c, "
                       "K' = sf'/ef'^n').",
                       both ? "Both parameters"
                            : (m->hardening_exponent_origin == NW_COMPATIBILITY ? "n'" : "K'"),
                       both ? "taken" : "it follows");
    }
    double ratio = m->fatigue_strength_exponent / m->fatigue_ductility_exponent;
    if (m->hardening_exponent_origin == NW_GIVEN &&
        fabs(ratio - m->hardening_exponent) > 0.3 * m->hardening_exponent) {
        nw_caution_add(
            out, "curves_disagree", "life_blocks",
            "The cyclic curve and the strain-life set disagree (n' = %.3g, b/c = %.3g): they "
            "were fitted separately. Both are used as given.",
            m->hardening_exponent, ratio);
    }
}

static bool has_nominal_load(const nw_case *input)
{
    for (size_t i = 0; i < input->load_count; i++) {
        if (input->loads[i].kind == NW_NOMINAL_STRESS) {
            return true;
        }
    }
    return false;
}

static void load_cautions(const nw_case *input, const nw_assess_evidence *evidence,
                          nw_assessment *result)
{
    nw_cautions *out = &result->cautions;
    double yield = nw_material_cyclic_yield_mpa(&input->material);
    double nominal = result->nominal_max_mpa;
    const nw_notch_rule *rule = result->rule;
    if (!isnan(nominal) && !rule->is_table && nominal > 0.8 * yield) {
        nw_caution_add(
            out, "net_section_yield", "extremes",
            "Nominal stress reaches %.0f MPa, %.2f of the cyclic yield stress (%.0f MPa at "
            "0.2 %%): the net section itself yields%s.",
            nominal, nominal / yield, yield,
            rule->needs_limit_load_ratio || input->plastic_net_section
                ? ""
                : ", where this notch rule is known to give too little strain");
    }
    double largest = fmax(fabs(result->load_max_mpa), fabs(result->load_min_mpa));
    if (rule->needs_limit_load_ratio && largest / input->limit_load_ratio > yield) {
        nw_caution_add(
            out, "limit_load", "extremes",
            "The load goes past the limit load of the net section (L/Kp = %.0f MPa, cyclic "
            "yield stress %.0f MPa).",
            largest / input->limit_load_ratio, yield);
    }
    if (input->loads[0].kind == NW_NOTCH_STRAIN) {
        nw_caution_add(
            out, "strain_measured", "extremes",
            "Strain was measured at the root, so %s; stress follows from the cyclic curve.",
            input->rule_given ? "the notch rule of the case is not used" : "no notch rule is used");
    } else if (!isnan(input->kf) && has_nominal_load(input)) {
        nw_caution_add(
            out, "kf_in_use", "extremes",
            "Kf = %.3g replaces Kt in the notch rule: local stress and strain are those of "
            "an equivalent notch, not the ones a gauge would show.",
            input->kf);
    }
    if (evidence->header_unit_overridden) {
        nw_caution_add(out, "header_unit_overridden", "extremes",
                       "A history's header gives its column a unit, but the case gives a different "
                       "scale, which was used. Check which of the two is right.");
    }
    if (fmax(fabs(result->extremes.strain_max), fabs(result->extremes.strain_min)) > 0.05) {
        nw_caution_add(out, "large_strain", "extremes",
                       "Local strain exceeds 5 %%: small-strain notch rules are formal there.");
    }
}

static double strain_of(const nw_loop_result *loop)
{
    return loop->values.strain_amplitude;
}

static double cycles_of(const nw_loop_result *loop)
{
    return loop->cycles;
}

/* Damage from outside a range is said from this share on. */
static const double share_worth_saying = 0.05;

/* Share of the damage done by loops (of those kept, the worst) outside [low, high]; 0 without a range. */
static double share_outside(const nw_assessment *result, double (*value)(const nw_loop_result *),
                            const double range[2])
{
    double share = 0.0;
    for (size_t i = 0; i < result->loop_count; i++) {
        double at = value(&result->loops[i]);
        share += at < range[0] || at > range[1] ? result->loops[i].share : 0.0;
    }
    return share;
}

static void range_cautions(const nw_case *input, const nw_assess_evidence *evidence,
                           nw_assessment *result)
{
    nw_cautions *out = &result->cautions;
    const nw_material *m = &input->material;
    double beside_strain = share_outside(result, strain_of, m->valid_strain_amplitude);
    if (beside_strain > share_worth_saying) {
        nw_caution_add(
            out, "outside_tested_strain", "life_blocks",
            "%.0f %% of the damage comes from loops with strain amplitudes outside the range "
            "of the tests (%.4g to %.4g): extrapolated.",
            100.0 * beside_strain, m->valid_strain_amplitude[0], m->valid_strain_amplitude[1]);
    }
    double beside_life = share_outside(result, cycles_of, m->valid_cycles);
    if (beside_life > share_worth_saying) {
        nw_caution_add(
            out, "outside_tested_life", "life_blocks",
            "%.0f %% of the damage comes from loops with lives outside the range of the tests "
            "(%.3g to %.3g cycles): extrapolated.",
            100.0 * beside_life, m->valid_cycles[0], m->valid_cycles[1]);
    }
    const double usual_tests[2] = {0.0, 1e7};
    double beyond = isnan(m->valid_cycles[1]) ? share_outside(result, cycles_of, usual_tests) : 0.0;
    if (beyond > share_worth_saying) {
        nw_caution_add(
            out, "long_life_extrapolated", "life_blocks",
            "%.0f %% of the damage comes from loops with lives above 1e7 cycles. The material "
            "does not say how far its tests reach; coupon tests seldom reach that far, so this "
            "life is extrapolated.",
            100.0 * beyond);
    }
    if (evidence->rate_max > 2.0) {
        nw_caution_add(
            out, "life_below_one_reversal", "life_blocks",
            "A loop's life is below one reversal (%.2g cycles): the strain-life curve does "
            "not reach there.",
            1.0 / evidence->rate_max);
    }
    bool elastic_mean = strcmp(input->correction->key, "morrow") == 0 ||
                        strcmp(input->correction->key, "manson_halford") == 0;
    if (elastic_mean &&
        evidence->stress_mean_max_mpa >= result->curve.fatigue_strength_coefficient_mpa) {
        nw_caution_add(
            out, "mean_stress_at_strength", "life_blocks",
            "A loop's mean stress (%.0f MPa) reaches sf' (%.0f MPa): it is taken to fail in "
            "its first cycle.",
            evidence->stress_mean_max_mpa, result->curve.fatigue_strength_coefficient_mpa);
    }
    if (evidence->curve_exceeded) {
        nw_caution_add(
            out, "notch_curve_extrapolated", "extremes",
            "The load goes past the last point of the given notch curve, which is carried on "
            "straight.");
    }
}

/* What the life would be with the loops that were left out on request. */
static void left_out_caution(const nw_case *input, nw_assessment *result)
{
    if (result->left_out.loops == 0.0) {
        return;
    }
    double with_them = input->damage_sum / (result->damage_per_block + result->left_out.damage);
    bool misses = result->target_reached && with_them < input->target_blocks;
    nw_caution_add(
        &result->cautions, "small_ranges_left_out", "life_blocks",
        "%.0f closed loop%s a block %s left out (ignore_ranges_below), with damage %.3g a "
        "block beside the %.3g counted. Counted, life is about %.2g blocks%s.",
        result->left_out.loops, result->left_out.loops == 1.0 ? "" : "s",
        result->left_out.loops == 1.0 ? "was" : "were", result->left_out.damage,
        result->damage_per_block, with_them, misses ? ": the target is then MISSED" : "");
}

static void life_cautions(const nw_case *input, nw_assessment *result)
{
    nw_cautions *out = &result->cautions;
    left_out_caution(input, result);
    if (input->walker_gamma_estimated) {
        bool steel = input->material.group == NW_STEEL || input->material.group == NW_CAST_STEEL;
        nw_caution_add(out, "walker_gamma_estimated", "life_blocks",
                       "Walker's gamma was not given: %.3f %s.", input->walker_gamma,
                       steel ? "estimated from the tensile strength"
                             : "assumed, as no estimate covers this material group");
    }
    if (strcmp(input->correction->key, "morrow") == 0 && input->material.group == NW_ALUMINIUM) {
        nw_caution_add(out, "morrow_for_aluminium", "life_blocks",
                       "Morrow's correction with sf' is known to fit aluminium alloys badly.");
    }
    if (input->surface_factor != 1.0) {
        nw_caution_add(
            out, "surface_factor", "life_blocks",
            "Surface factor %.3f on the elastic amplitude at %.3g reversals, none at one "
            "reversal: b = %.4f becomes %.4f.",
            input->surface_factor, input->surface_reversals,
            input->material.fatigue_strength_exponent, result->curve.fatigue_strength_exponent);
    }
    if (input->below_endurance == NW_HARMLESS) {
        nw_caution_add(
            out, "endurance_assumed", "life_blocks",
            "Loops below the endurance strain amplitude (%.4g) count as harmless; overloads "
            "and corrosion take that limit away.",
            input->endurance_strain_amplitude);
    } else if (input->below_endurance == NW_HARMLESS_UNTIL_EXCEEDED) {
        nw_caution_add(
            out, "endurance_assumed", "life_blocks",
            result->endurance_exceeded
                ? "A loop exceeds the endurance strain amplitude (%.4g), so all loops count."
                : "No loop exceeds the endurance strain amplitude (%.4g), so none counts.",
            input->endurance_strain_amplitude);
    }
    if (isinf(result->life_blocks)) {
        nw_caution_add(
            out, "no_damage", "life_blocks",
            "The repeating block does no damage by this method; that is no proof of endless "
            "life.");
    }
    nw_caution_add(
        out, "scope", "life_blocks",
        "Life to a technical crack (about 0.5 to 1 mm) at the notch root. Crack growth, "
        "welds, creep and corrosion are not covered. Tests of such parts commonly scatter by "
        "a factor of 2 to 3 about a prediction. Applicable codes and the judgement of a "
        "qualified engineer come first.");
}

void nw_assess_cautions(const nw_case *input, const nw_assess_evidence *evidence,
                        nw_assessment *result)
{
    material_cautions(input, &result->cautions);
    load_cautions(input, evidence, result);
    range_cautions(input, evidence, result);
    life_cautions(input, result);
}
