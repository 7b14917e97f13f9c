/* Numbers with units. */
#include "notchwright/quantity.h"

#include "base/number.h"
#include "base/text.h"

#include <ctype.h>
#include <math.h>
#include <stdio.h>
#include <string.h>

typedef struct unit {
    const char *name;
    nw_dimension dimension;
    double factor;
} unit;

/* 1 psi = 4.4482216152605 N / (25.4 mm)^2, exact by definition. */
#define LBF_IN_N 4.4482216152605
#define PSI_IN_MPA (LBF_IN_N / (25.4 * 25.4))

static const unit units[] = {
    {"Pa", NW_STRESS, 1e-6},
    {"kPa", NW_STRESS, 1e-3},
    {"MPa", NW_STRESS, 1.0},
    {"GPa", NW_STRESS, 1e3},
    {"N/mm2", NW_STRESS, 1.0},
    {"N/mm^2", NW_STRESS, 1.0},
    {"bar", NW_STRESS, 0.1},
    {"psi", NW_STRESS, PSI_IN_MPA},
    {"ksi", NW_STRESS, 1e3 * PSI_IN_MPA},
    {"Msi", NW_STRESS, 1e6 * PSI_IN_MPA},
    {"mm", NW_LENGTH, 1.0},
    {"um", NW_LENGTH, 1e-3},
    {"\xC2\xB5m", NW_LENGTH, 1e-3},
    {"cm", NW_LENGTH, 10.0},
    {"m", NW_LENGTH, 1e3},
    {"in", NW_LENGTH, 25.4},
    {"ratio", NW_STRAIN, 1.0},
    {"%", NW_STRAIN, 1e-2},
    {"percent", NW_STRAIN, 1e-2},
    {"microstrain", NW_STRAIN, 1e-6},
    {"mm/mm", NW_STRAIN, 1.0},
    {"in/in", NW_STRAIN, 1.0},
    {"%", NW_FRACTION, 1e-2},
    {"percent", NW_FRACTION, 1e-2},
    {"HB", NW_HARDNESS, 1.0},
    {"HBW", NW_HARDNESS, 1.0},
    {"N", NW_FORCE, 1.0},
    {"kN", NW_FORCE, 1e3},
    {"MN", NW_FORCE, 1e6},
    {"lbf", NW_FORCE, LBF_IN_N},
    {"kip", NW_FORCE, 1e3 * LBF_IN_N},
    {"Nmm", NW_MOMENT, 1.0},
    {"Nm", NW_MOMENT, 1e3},
    {"kNm", NW_MOMENT, 1e6},
    {"N mm", NW_MOMENT, 1.0},
    {"N m", NW_MOMENT, 1e3},
    {"kN m", NW_MOMENT, 1e6},
    {"lbf-in", NW_MOMENT, LBF_IN_N * 25.4},
    {"lbf-ft", NW_MOMENT, LBF_IN_N * 12.0 * 25.4},
    {"lbf in", NW_MOMENT, LBF_IN_N * 25.4},
    {"lbf ft", NW_MOMENT, LBF_IN_N * 12.0 * 25.4},
};

static const char *const dimension_names[NW_DIMENSIONS] = {
    "pure number", "stress", "length", "strain", "fraction", "hardness", "force", "moment",
};

static const char *const dimension_units[NW_DIMENSIONS] = {
    "no unit",
    "Pa, kPa, MPa, GPa, N/mm2, bar, psi, ksi or Msi",
    "um, mm, cm, m or in",
    "ratio, %, microstrain, mm/mm or in/in",
    "% (or a plain ratio)",
    "HB (or HBW)",
    "N, kN, MN, lbf or kip",
    "Nmm, Nm, kNm, lbf-in or lbf-ft",
};

const char *nw_dimension_name(nw_dimension dimension)
{
    return dimension < NW_DIMENSIONS ? dimension_names[dimension] : "unknown";
}

const char *nw_dimension_units(nw_dimension dimension)
{
    return dimension < NW_DIMENSIONS ? dimension_units[dimension] : "none";
}

bool nw_unit_factor(const char *name, nw_dimension dimension, double *factor)
{
    for (size_t i = 0; i < sizeof units / sizeof units[0]; i++) {
        if (units[i].dimension == dimension && strcmp(units[i].name, name) == 0) {
            *factor = units[i].factor;
            return true;
        }
    }
    return false;
}

static const char *dimension_of_unit(const char *name)
{
    for (size_t i = 0; i < sizeof units / sizeof units[0]; i++) {
        if (strcmp(units[i].name, name) == 0) {
            return dimension_names[units[i].dimension];
        }
    }
    return NULL;
}

bool nw_number_read(const char *text, double *value)
{
    size_t length = strlen(text);
    double number;
    if (nw_number_scan(text, text + length, '.', &number) != text + length || !isfinite(number)) {
        return false;
    }
    *value = number;
    return true;
}

static bool default_factor(nw_dimension dimension, const nw_default_units *defaults, double *factor)
{
    if (dimension == NW_PURE || dimension == NW_FRACTION) {
        *factor = 1.0;
        return true;
    }
    const char *name = defaults == NULL ? NULL : defaults->unit[dimension];
    return name != NULL && nw_unit_factor(name, dimension, factor);
}

static bool is_other_hardness(const char *name)
{
    return strncmp(name, "HV", 2) == 0 || strncmp(name, "HR", 2) == 0;
}

nw_status nw_quantity_read(const char *text, nw_dimension dimension,
                           const nw_default_units *defaults, double *value, char *why,
                           size_t capacity)
{
    const char *end = text + strlen(text);
    const char *start = text;
    while (start < end && isspace((unsigned char)*start)) {
        start++;
    }
    double number;
    const char *rest = nw_number_scan(start, end, '.', &number);
    if (rest == NULL) {
        snprintf(why, capacity, "found '%s', expected a number%s%s", text,
                 dimension == NW_PURE ? "" : " with a unit of ",
                 dimension == NW_PURE ? "" : nw_dimension_name(dimension));
        return NW_INPUT;
    }
    while (rest < end && isspace((unsigned char)*rest)) {
        rest++;
    }
    double factor = 1.0;
    if (*rest == '\0') {
        if (!default_factor(dimension, defaults, &factor)) {
            snprintf(why, capacity,
                     "found '%s' without a unit, expected a %s in %s (or a default under 'units')",
                     text, nw_dimension_name(dimension), nw_dimension_units(dimension));
            return NW_INPUT;
        }
    } else if (dimension == NW_PURE || !nw_unit_factor(rest, dimension, &factor)) {
        const char *other = dimension_of_unit(rest);
        snprintf(why, capacity, "found '%s' (%s%s), expected %s%s%s", text,
                 other == NULL ? "unknown unit" : "a ", other == NULL ? "" : other,
                 dimension == NW_PURE ? "a pure number, " : "a ",
                 dimension == NW_PURE ? "" : nw_dimension_name(dimension),
                 dimension == NW_PURE ? "no unit" : "");
        if (dimension != NW_PURE) {
            size_t used = strlen(why);
            snprintf(why + used, capacity - used, " in %s%s", nw_dimension_units(dimension),
                     dimension == NW_HARDNESS && is_other_hardness(rest)
                         ? "; Vickers and Rockwell are not converted: that takes the table for the "
                           "alloy in ISO 18265 or ASTM E140, and the tables differ"
                         : "");
        }
        return NW_INPUT;
    }
    if (!isfinite(number) || !isfinite(number * factor)) {
        snprintf(why, capacity, "found '%s', expected a finite number", text);
        return NW_INPUT;
    }
    *value = number * factor;
    return NW_OK;
}
