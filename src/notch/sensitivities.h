/* The records of fatigue notch factors, one file each. */
#ifndef NW_NOTCH_SENSITIVITIES_H
#define NW_NOTCH_SENSITIVITIES_H

#include "notchwright/fatigue_factor.h"

extern const nw_sensitivity nw_sensitivity_peterson;
extern const nw_sensitivity nw_sensitivity_neuber;
extern const nw_sensitivity nw_sensitivity_gradient;
extern const nw_sensitivity nw_sensitivity_guideline;

/* False with "needs the ultimate strength (...)" where the value is unknown. */
bool nw_sensitivity_needs(double value, const char *what, char *why, size_t capacity);

#endif
