/* The material file of a fit: the material itself, and what later steps need to carry its uncertainty on. */
#include "notchwright/fit.h"

#include <math.h>

static const char *const names[] = {"ln_fatigue_strength_coefficient_mpa",
                                    "fatigue_strength_exponent", "ln_fatigue_ductility_coefficient",
                                    "fatigue_ductility_exponent"};

/* 17 digits read back to the same number; a decimal point in every locale. */
static void put_number(FILE *to, double value)
{
    char text[40];
    snprintf(text, sizeof text, "%.17g", value);
    for (char *at = text; *at != '\0'; at++) {
        fputc(*at == ',' ? '.' : *at, to);
    }
}

nw_status nw_fit_write_material(FILE *to, const nw_fit *fit, const nw_material *material)
{
    nw_status status = nw_material_write(to, material);
    if (status != NW_OK || isnan(fit->covariance[0])) {
        return status;
    }
    fprintf(to, "fit:\n  method: %s\n  degrees_of_freedom: ", nw_fit_method_name(fit->method));
    put_number(to, fit->degrees);
    fputs("\n  parameters:\n", to);
    for (int i = 0; i < 4; i++) {
        fprintf(to, "    - %s\n", names[i]);
    }
    fputs("  covariance:\n", to);
    for (int i = 0; i < 4; i++) {
        fputs("    - [", to);
        for (int j = 0; j < 4; j++) {
            fputs(j == 0 ? "" : ", ", to);
            put_number(to, fit->covariance[4 * i + j]);
        }
        fputs("]\n", to);
    }
    return ferror(to) ? NW_FILE : NW_OK;
}
