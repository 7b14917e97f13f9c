/* Which estimate to prefer, by the published comparisons of them. */
#include "material/estimates.h"

#define PARK_SONG "Park & Song, Int. J. Fatigue 17 (1995) 365"
#define LEE_SONG "Lee & Song, Int. J. Fatigue 28 (2006) 386"

/* For each group the first that applies. */
static const struct {
    nw_group group;
    const nw_estimate *record;
    const char *because;
} preferences[] = {
    {NW_STEEL, &nw_estimate_hardness,
     "the hardness is known, and the hardness method was found excellent for steels (" LEE_SONG
     ")"},
    {NW_STEEL, &nw_estimate_modified_universal_slopes,
     "the ductility is known, and the method came first in a comparison on 116 steels (" PARK_SONG
     ")"},
    {NW_STEEL, &nw_estimate_uniform_material_law,
     "of the methods that need no more than strength and modulus it came best in a comparison on "
     "116 steels (" PARK_SONG "); with hardness or reduction of area another would be preferred"},
    {NW_STEEL, &nw_estimate_strength_power_laws,
     "the uniform material law does not reach this strength, and this method's data do; no "
     "comparison of the two is at hand"},
    {NW_STEEL, &nw_estimate_medians,
     "nothing better applies at this strength; its ef' of 0.45 is far above the 0.003 to 0.07 of "
     "the "
     "hardest steels in this library, so give hardness or reduction of area"},
    {NW_ALUMINIUM, &nw_estimate_medians,
     "medians were found best for aluminium alloys (" LEE_SONG ")"},
    {NW_TITANIUM, &nw_estimate_modified_universal_slopes,
     "the ductility is known, and the method came first in a comparison that had 6 titanium "
     "alloys (" PARK_SONG "): thin evidence"},
    {NW_TITANIUM, &nw_estimate_uniform_material_law,
     "of the methods that need no more than strength and modulus it came best in a comparison "
     "that had 6 titanium alloys (" PARK_SONG "): thin evidence"},
    {NW_CAST_STEEL, &nw_estimate_strength_power_laws,
     "it is the only method here that was made for cast steel"},
    {NW_NICKEL, &nw_estimate_universal_slopes,
     "it and the four-point correlation alone had a nickel alloy among their data, and it is the "
     "simpler one: thin evidence"},
};

const nw_estimate *nw_estimate_recommended(const nw_estimate_input *input, const char **because)
{
    char why[300];
    for (size_t i = 0; i < sizeof preferences / sizeof preferences[0]; i++) {
        if (preferences[i].group == input->group &&
            nw_estimate_apply(preferences[i].record, input, NULL, why, sizeof why)) {
            if (because != NULL) {
                *because = preferences[i].because;
            }
            return preferences[i].record;
        }
    }
    if (because != NULL) {
        *because = "no method applies to this group with these inputs";
    }
    return NULL;
}
