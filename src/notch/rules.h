/* The notch-rule records, one file each, and what they share. */
#ifndef NW_NOTCH_RULES_H
#define NW_NOTCH_RULES_H

#include "notchwright/notch.h"

extern const nw_notch_rule nw_notch_rule_neuber;
extern const nw_notch_rule nw_notch_rule_esed;
extern const nw_notch_rule nw_notch_rule_linear;
extern const nw_notch_rule nw_notch_rule_limit_load;
extern const nw_notch_rule nw_notch_rule_seeger_beste;
extern const nw_notch_rule nw_notch_rule_curve;

/* Plastic over elastic strain on the cyclic curve at stress s > 0: (E/s) (s/K')^(1/n'). */
double nw_plastic_ratio(const nw_rule_input *input, double stress_mpa);

#endif
