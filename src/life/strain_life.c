/* The strain-life curve in use, and what is read off it. */
#include "life/corrections.h"

#include <math.h>

static const char *const below_names[] = {"damages", "harmless", "harmless_until_exceeded"};

const char *nw_below_endurance_name(nw_below_endurance mode)
{
    return below_names[mode];
}

nw_strain_life nw_strain_life_of(const nw_material *material, double surface_factor,
                                 double surface_reversals)
{
    nw_strain_life curve = {
        material->youngs_modulus_mpa,         material->fatigue_strength_coefficient_mpa,
        material->fatigue_strength_exponent,  material->fatigue_ductility_coefficient,
        material->fatigue_ductility_exponent,
    };
    if (surface_factor != 1.0) {
        curve.fatigue_strength_exponent += log10(surface_factor) / log10(surface_reversals);
    }
    return curve;
}

double nw_strain_life_amplitude(const nw_strain_life *c, double cycles)
{
    double reversals = 2.0 * cycles;
    return c->fatigue_strength_coefficient_mpa / c->youngs_modulus_mpa *
               pow(reversals, c->fatigue_strength_exponent) +
           c->fatigue_ductility_coefficient * pow(reversals, c->fatigue_ductility_exponent);
}

double nw_walker_gamma_estimated(const nw_material *material)
{
    bool steel = material->group == NW_STEEL || material->group == NW_CAST_STEEL;
    return steel ? 0.8818 - 0.0002 * material->ultimate_strength_mpa : 0.5;
}

nw_loop_values nw_loop_values_of(const nw_loop *loop)
{
    const nw_local_point *a = &loop->start, *b = &loop->tip;
    nw_loop_values v = {
        .load_max_mpa = fmax(a->load_mpa, b->load_mpa),
        .load_min_mpa = fmin(a->load_mpa, b->load_mpa),
        .strain_amplitude = nw_loop_strain_amplitude(loop),
        .strain_mean = 0.5 * (a->strain + b->strain),
        .stress_max_mpa = nw_loop_stress_max(loop),
        .stress_min_mpa = fmin(a->stress_mpa, b->stress_mpa),
        .stress_mean_mpa = nw_loop_stress_mean(loop),
        .stress_amplitude_mpa = 0.5 * fabs(a->stress_mpa - b->stress_mpa),
    };
    return v;
}
