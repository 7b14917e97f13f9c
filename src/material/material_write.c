/* A material as a file that reads back to the same values, bit by bit. */
#include "notchwright/material.h"

#include <math.h>
#include <stdint.h>
#include <stdlib.h>
#include <string.h>

enum { NUMBER = 40 };

/* Fewest digits that read back to the same double, without an exponent for ordinary sizes; a decimal point in
 * every locale. */
static char *shortest(double value, char text[NUMBER])
{
    bool ordinary = fabs(value) >= 1e-4 && fabs(value) < 1e12;
    for (int digits = 1; digits <= 17; digits++) {
        snprintf(text, NUMBER, "%.*g", digits, value);
        if (strtod(text, NULL) == value && !(ordinary && strchr(text, 'e') != NULL)) {
            break;
        }
    }
    for (char *at = text; *at != '\0'; at++) {
        *at = strchr("0123456789+-e", *at) == NULL ? '.' : *at;
    }
    return text;
}

/* Length of the UTF-8 sequence at `text` and its code point; 0 where there is none. */
static size_t sequence(const unsigned char *text, uint32_t *point)
{
    static const uint32_t least[] = {0, 0, 0x80, 0x800, 0x10000};
    size_t length = text[0] < 0x80               ? 1
                    : (text[0] & 0xE0u) == 0xC0u ? 2
                    : (text[0] & 0xF0u) == 0xE0u ? 3
                    : (text[0] & 0xF8u) == 0xF0u ? 4
                                                 : 0;
    *point = length == 1 ? text[0] : length == 0 ? 0 : text[0] & (0x7Fu >> length);
    for (size_t i = 1; i < length; i++) {
        if ((text[i] & 0xC0u) != 0x80u) {
            return 0;
        }
        *point = *point << 6 | (text[i] & 0x3Fu);
    }
    bool surrogate = *point >= 0xD800 && *point <= 0xDFFF;
    return length == 0 || *point < least[length] || *point > 0x10FFFF || surrogate ? 0 : length;
}

/* Characters that YAML takes as they are inside double quotes. */
static bool is_plain(uint32_t point)
{
    bool line_break = point == 0x2028 || point == 0x2029;
    return (point >= 0x20 && point < 0x7F) ||
           (point >= 0xA0 && !line_break && point != 0xFEFF && point != 0xFFFE && point != 0xFFFF);
}

/* In double quotes, all else escaped; bytes that are no UTF-8 (a text cut off) become '?'. */
static void put_text(FILE *to, const char *key, const char *text)
{
    if (text[0] == '\0') {
        return;
    }
    fprintf(to, "%s: \"", key);
    const unsigned char *at = (const unsigned char *)text;
    while (*at != '\0') {
        uint32_t point;
        size_t length = sequence(at, &point);
        if (length == 0) {
            fputc('?', to);
        } else if (point == '"' || point == '\\') {
            fprintf(to, "\\%c", (int)point);
        } else if (is_plain(point)) {
            fwrite(at, 1, length, to);
        } else {
            fprintf(to, "\\U%08X", (unsigned)point);
        }
        at += length == 0 ? 1 : length;
    }
    fputs("\"\n", to);
}

/* A value in `unit`, of which one is `factor` internal units, if it reads back exactly. */
static bool put_in_unit(FILE *to, const char *key, double value, double factor, const char *unit)
{
    char text[NUMBER];
    shortest(value / factor, text);
    if (strlen(text) > 8 || strtod(text, NULL) * factor != value) {
        return false;
    }
    fprintf(to, "%s: %s %s\n", key, text, unit);
    return true;
}

static void put_value(FILE *to, const char *key, double value, const char *unit, const char *remark)
{
    char text[NUMBER];
    fprintf(to, "%s: %s%s%s%s%s\n", key, shortest(value, text), unit[0] == '\0' ? "" : " ", unit,
            remark[0] == '\0' ? "" : "   # ", remark);
}

/* Positive values only: what is unknown (NAN) or was left at zero is left out. */
static void put_known(FILE *to, const char *key, double value, const char *unit)
{
    if (value > 0.0 && isfinite(value)) {
        put_value(to, key, value, unit, "");
    }
}

static void put_static_values(FILE *to, const nw_material *m)
{
    if (!put_in_unit(to, "youngs_modulus", m->youngs_modulus_mpa, 1e3, "GPa")) {
        put_value(to, "youngs_modulus", m->youngs_modulus_mpa, "MPa", "");
    }
    put_known(to, "poisson_ratio", m->poisson_ratio, "");
    put_known(to, "yield_strength", m->yield_strength_mpa, "MPa");
    put_known(to, "ultimate_strength", m->ultimate_strength_mpa, "MPa");
    if (m->reduction_of_area > 0.0 &&
        !put_in_unit(to, "reduction_of_area", m->reduction_of_area, 1e-2, "%")) {
        put_value(to, "reduction_of_area", m->reduction_of_area, "", "");
    }
    put_known(to, "fracture_stress", m->fracture_stress_mpa, "MPa");
    put_known(to, "fracture_strain", m->fracture_strain, "");
    put_known(to, "hardness", m->hardness_hb, "HB");
}

static const char *remark_on(nw_origin origin)
{
    return origin == NW_COMPATIBILITY ? "by compatibility with strain_life" : "";
}

static void put_curves(FILE *to, const nw_material *m)
{
    fputs("cyclic_curve:\n", to);
    put_value(to, "  strength_coefficient", m->strength_coefficient_mpa, "MPa",
              remark_on(m->strength_coefficient_origin));
    put_value(to, "  hardening_exponent", m->hardening_exponent, "",
              remark_on(m->hardening_exponent_origin));
    fputs("strain_life:\n", to);
    put_value(to, "  fatigue_strength_coefficient", m->fatigue_strength_coefficient_mpa, "MPa", "");
    put_value(to, "  fatigue_strength_exponent", m->fatigue_strength_exponent, "", "");
    put_value(to, "  fatigue_ductility_coefficient", m->fatigue_ductility_coefficient, "", "");
    put_value(to, "  fatigue_ductility_exponent", m->fatigue_ductility_exponent, "", "");
}

/* "section: {first: a, second: b}" with what is known of the two. */
static void put_pair(FILE *to, const char *section, const char *first, double a, const char *second,
                     double b)
{
    char text[NUMBER];
    bool has_a = a > 0.0 && isfinite(a), has_b = b > 0.0 && isfinite(b);
    if (!has_a && !has_b) {
        return;
    }
    fprintf(to, "%s: {", section);
    if (has_a) {
        fprintf(to, "%s: %s", first, shortest(a, text));
    }
    if (has_b) {
        fprintf(to, "%s%s: %s", has_a ? ", " : "", second, shortest(b, text));
    }
    fputs("}\n", to);
}

static bool is_range(const double pair[2])
{
    return pair[0] > 0.0 && pair[1] > pair[0] && isfinite(pair[1]);
}

static void put_range(FILE *to, const char *key, const double pair[2])
{
    char low[NUMBER], high[NUMBER];
    if (is_range(pair)) {
        fprintf(to, "  %s: [%s, %s]\n", key, shortest(pair[0], low), shortest(pair[1], high));
    }
}

nw_status nw_material_write(FILE *to, const nw_material *m)
{
    fputs("notchwright_material: 1\n", to);
    put_text(to, "name", m->name);
    fprintf(to, "group: %s\nbasis: %s\n", nw_group_name(m->group), nw_basis_name(m->basis));
    put_text(to, "source", m->source);
    put_text(to, "note", m->note);
    put_static_values(to, m);
    put_curves(to, m);
    put_pair(to, "endurance", "strain_amplitude", m->endurance_strain_amplitude, "cycles",
             m->endurance_cycles);
    if (m->log10_life_sd > 0.0) { /* tests alone say nothing of scatter */
        put_pair(to, "scatter", "log10_life_sd", m->log10_life_sd, "tests", m->scatter_tests);
    }
    if (is_range(m->valid_cycles) || is_range(m->valid_strain_amplitude)) {
        fputs("valid:\n", to);
        put_range(to, "cycles", m->valid_cycles);
        put_range(to, "strain_amplitude", m->valid_strain_amplitude);
    }
    return ferror(to) ? NW_FILE : NW_OK;
}
