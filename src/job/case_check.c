/* What only several sections together tell. */
#include "job/case_sections.h"

#include "life/surface.h"

#include <math.h>
#include <string.h>

/* The node that a fault is placed at: the entry when it is there, else its section, else the file. */
static const nw_node *node_for(const nw_node *root, const char *section, const char *key)
{
    const nw_node *map = nw_node_entry(root, section);
    const nw_node *entry = nw_node_entry(map, key);
    return entry != NULL ? entry : map != NULL ? map : root;
}

static size_t count_kind(const nw_case *result, nw_load_kind kind)
{
    size_t count = 0;
    for (size_t i = 0; i < result->load_count; i++) {
        count += result->loads[i].kind == kind;
    }
    return count;
}

static void check_kinds(nw_field_reader *reader, const nw_node *root, nw_case *result)
{
    size_t gauges = count_kind(result, NW_NOTCH_STRAIN);
    if (gauges > 0 && gauges < result->load_count) {
        nw_field_fault(
            reader, node_for(root, "load", ""), "load", "",
            "found events as notch_strain beside events as stress, expected all or none: "
            "a gauge at the root measures what the notch rule would calculate");
    }
    bool needs_kt = count_kind(result, NW_NOMINAL_STRESS) > 0 || result->plastic_net_section;
    bool kt_given = nw_node_entry(nw_node_entry(root, "notch"), "kt") != NULL;
    if (needs_kt && !kt_given) {
        nw_field_fault(reader, node_for(root, "notch", ""), "notch", "kt",
                       "missing, expected the stress concentration factor that turns nominal into "
                       "notch stress");
    }
}

static void resolve_walker(nw_field_reader *reader, const nw_node *root, nw_case *result)
{
    if (!result->correction->uses_walker_gamma || !isnan(result->walker_gamma)) {
        return;
    }
    result->walker_gamma = nw_walker_gamma_estimated(&result->material);
    result->walker_gamma_estimated = true;
    if (isnan(result->walker_gamma)) {
        nw_field_fault(reader, node_for(root, "life", "mean_stress"), "life", "walker_gamma",
                       "missing, and it cannot be estimated for a steel without ultimate_strength");
    }
}

static void resolve_surface(nw_field_reader *reader, const nw_node *root, nw_case *result)
{
    const nw_material *m = &result->material;
    if (!isnan(m->endurance_cycles)) {
        result->surface_reversals = 2.0 * m->endurance_cycles;
    }
    if (!isnan(result->roughness_um)) {
        char why[200];
        double factor = nw_roughness_factor(m, result->roughness_um, why, sizeof why);
        if (isnan(factor)) {
            nw_field_fault(reader, node_for(root, "life", "roughness"), "life", "roughness", "%s",
                           why);
            return;
        }
        result->surface_factor = factor;
    }
    if (!(result->surface_factor > 0.0)) {
        return; /* said where it was read */
    }
    nw_strain_life curve = nw_strain_life_of(m, result->surface_factor, result->surface_reversals);
    if (!(curve.fatigue_strength_exponent < 0.0) ||
        !(curve.fatigue_strength_exponent > curve.fatigue_ductility_exponent)) {
        nw_field_fault(reader, node_for(root, "life", "surface_factor"), "life", "surface_factor",
                       "%g turns the exponent b into %g, expected it to stay between c (%g) and 0",
                       result->surface_factor, curve.fatigue_strength_exponent,
                       curve.fatigue_ductility_exponent);
    }
}

/* The endurance amplitude as given, times the surface factor; or read off the curve (which holds the factor
 * already) at the endurance life. */
static void resolve_endurance(nw_field_reader *reader, const nw_node *root, nw_case *result)
{
    const nw_material *m = &result->material;
    result->endurance_strain_amplitude = m->endurance_strain_amplitude * result->surface_factor;
    if (isnan(result->endurance_strain_amplitude) && !isnan(m->endurance_cycles)) {
        nw_strain_life curve =
            nw_strain_life_of(m, result->surface_factor, result->surface_reversals);
        result->endurance_strain_amplitude = nw_strain_life_amplitude(&curve, m->endurance_cycles);
    }
    if (result->below_endurance != NW_DAMAGES && isnan(result->endurance_strain_amplitude)) {
        nw_field_fault(reader, node_for(root, "life", "below_endurance"), "life", "below_endurance",
                       "found %s, but the material gives no endurance (strain_amplitude or cycles)",
                       nw_below_endurance_name(result->below_endurance));
    }
}

static void check_survival(nw_field_reader *reader, const nw_node *root, const nw_case *result)
{
    bool sensible = result->survival > 0.0 && result->survival < 1.0;
    if (sensible && result->survival != 0.5 && isnan(result->material.log10_life_sd)) {
        nw_field_fault(
            reader, node_for(root, "life", "survival"), "life", "survival",
            "found %g %%, but the material gives no scatter (log10_life_sd); expected 50 %%",
            100.0 * result->survival);
    }
}

void nw_case_check(nw_field_reader *reader, const nw_node *root, bool material_good,
                   nw_case *result)
{
    check_kinds(reader, root, result);
    if (!material_good) {
        return;
    }
    resolve_walker(reader, root, result);
    resolve_surface(reader, root, result);
    resolve_endurance(reader, root, result);
    check_survival(reader, root, result);
}
