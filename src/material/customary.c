#include "material/customary.h"

#include <math.h>

const double nw_customary_hardness_misfit = 0.15;

nw_customary nw_customary_modulus_mpa(nw_group group)
{
    switch (group) {
    case NW_STEEL:
    case NW_CAST_STEEL:
        return (nw_customary){185e3, 220e3};
    case NW_ALUMINIUM:
        return (nw_customary){65e3, 82e3};
    case NW_TITANIUM:
        return (nw_customary){95e3, 125e3};
    case NW_NICKEL:
        return (nw_customary){180e3, 235e3};
    case NW_CAST_IRON:
        return (nw_customary){70e3, 190e3};
    default:
        return (nw_customary){0.0, INFINITY};
    }
}

bool nw_hardness_misfits(nw_group group, double ultimate_strength_mpa, double hardness_hb)
{
    double expected = nw_ultimate_from_hardness_mpa(hardness_hb);
    return group == NW_STEEL &&
           fabs(ultimate_strength_mpa - expected) > nw_customary_hardness_misfit * expected;
}
