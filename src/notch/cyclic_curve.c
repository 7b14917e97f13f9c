/* The cyclic stress-strain curve of Ramberg and Osgood (NACA TN 902, 1943). */
#include "notch/rules.h"

#include <math.h>

double nw_plastic_ratio(const nw_rule_input *input, double stress_mpa)
{
    double exponent = 1.0 / input->hardening_exponent;
    double log_stress = log(stress_mpa / input->strength_coefficient_mpa);
    return input->youngs_modulus_mpa / stress_mpa * exp(exponent * log_stress);
}

double nw_cyclic_strain(const nw_rule_input *input, double stress_mpa)
{
    double size = fabs(stress_mpa);
    double plastic = pow(size / input->strength_coefficient_mpa, 1.0 / input->hardening_exponent);
    return copysign(size / input->youngs_modulus_mpa + plastic, stress_mpa);
}
