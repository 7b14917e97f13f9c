/* Materials for a person to read. */
#include "notchwright/library.h"
#include "output/page.h"

#include <math.h>
#include <string.h>

enum { NUMBER = 40 };

static void put_cautions(FILE *to, const nw_cautions *cautions)
{
    for (size_t i = 0; i < cautions->count; i++) {
        nw_page_paragraph(to, "    ! ", cautions->items[i].text);
    }
}

static void put_known(FILE *to, const char *name, double value, const char *unit)
{
    if (!isnan(value)) {
        fprintf(to, "  %-34s %.6g%s%s\n", name, value, unit[0] == '\0' ? "" : " ", unit);
    }
}

static const char *from(nw_origin origin)
{
    return origin == NW_GIVEN           ? ""
           : origin == NW_COMPATIBILITY ? "(by compatibility)"
                                        : "(estimated)";
}

static void put_parameter(FILE *to, const char *name, double value, const char *unit,
                          nw_origin origin)
{
    fprintf(to, "  %-34s %.6g%s%s%s%s\n", name, value, unit[0] == '\0' ? "" : " ", unit,
            origin == NW_GIVEN ? "" : " ", from(origin));
}

static void put_static(FILE *to, const nw_material *m)
{
    put_known(to, "Young's modulus E", m->youngs_modulus_mpa / 1e3, "GPa");
    put_known(to, "Poisson's ratio", m->poisson_ratio, "");
    put_known(to, "yield strength", m->yield_strength_mpa, "MPa");
    put_known(to, "tensile strength Su", m->ultimate_strength_mpa, "MPa");
    put_known(to, "reduction of area", 100.0 * m->reduction_of_area, "%");
    put_known(to, "true fracture stress", m->fracture_stress_mpa, "MPa");
    put_known(to, "true fracture strain", m->fracture_strain, "");
    put_known(to, "hardness", m->hardness_hb, "HB");
}

static void put_curves(FILE *to, const nw_material *m)
{
    fputs("Cyclic curve e = s/E + (s/K')^(1/n')\n", to);
    put_parameter(to, "strength coefficient K'", m->strength_coefficient_mpa, "MPa",
                  m->strength_coefficient_origin);
    put_parameter(to, "hardening exponent n'", m->hardening_exponent, "",
                  m->hardening_exponent_origin);
    fputs("Strain-life ea = (sf'/E)(2N)^b + ef'(2N)^c\n", to);
    put_parameter(to, "fatigue strength coefficient sf'", m->fatigue_strength_coefficient_mpa,
                  "MPa", m->strain_life_origin);
    put_parameter(to, "fatigue strength exponent b", m->fatigue_strength_exponent, "",
                  m->strain_life_origin);
    put_parameter(to, "fatigue ductility coefficient ef'", m->fatigue_ductility_coefficient, "",
                  m->strain_life_origin);
    put_parameter(to, "fatigue ductility exponent c", m->fatigue_ductility_exponent, "",
                  m->strain_life_origin);
}

static void put_range(FILE *to, const char *name, const double pair[2])
{
    if (!isnan(pair[0])) {
        fprintf(to, "  %-34s %g to %g\n", name, pair[0], pair[1]);
    }
}

static void put_tests(FILE *to, const nw_material *m)
{
    put_known(to, "endurance strain amplitude", m->endurance_strain_amplitude, "");
    put_known(to, "at cycles", m->endurance_cycles, "");
    put_known(to, "scatter of log10 life", m->log10_life_sd, "");
    put_known(to, "tests", m->scatter_tests, "");
    put_range(to, "tested lives, cycles", m->valid_cycles);
    put_range(to, "tested strain amplitudes", m->valid_strain_amplitude);
}

static void put_derived(FILE *to, const nw_material_derived *d)
{
    char text[NUMBER], name[NUMBER];
    fputs("Derived\n", to);
    fprintf(to, "  %-34s %s reversals (elastic and plastic strain equal)\n", "transition life 2Nt",
            nw_page_rounded(d->transition_reversals, 4, text, sizeof text));
    fprintf(to, "  %-34s %.0f MPa (K' 0.002^n')\n", "cyclic yield stress", d->cyclic_yield_mpa);
    fprintf(to, "  %-34s sa = A N^b with A %.4g MPa, b %.4g\n", "Basquin's law, amplitude",
            d->basquin_coefficient_mpa, d->basquin_exponent);
    fprintf(to, "  %-34s N sa^k = C with k = -1/b = %.4g, log10 C %.5g\n", "Basquin's law, life",
            d->basquin_slope, d->basquin_log10_constant);
    snprintf(name, sizeof name, "amplitude at %g cycles", d->cycles);
    fprintf(to, "  %-34s %.0f MPa stress (elastic line), %.4g strain\n", name,
            d->stress_amplitude_mpa, d->strain_amplitude);
    fprintf(to, "  %-34s n' = b/c = %.4g, sf'/ef'^n' = %.5g MPa\n", "by compatibility",
            d->compatible_exponent, d->compatible_strength_mpa);
}

nw_status nw_write_material_text(FILE *to, const nw_material_review *review, bool colour)
{
    const nw_material *m = &review->material;
    fprintf(to, "%s%s%s  %s, %s\n", colour ? "\033[1m" : "", m->name, colour ? "\033[0m" : "",
            nw_group_name(m->group), nw_basis_name(m->basis));
    nw_page_paragraph(to, "  source: ", m->source);
    if (m->note[0] != '\0') {
        nw_page_paragraph(to, "  note: ", m->note);
    }
    fprintf(to, "  file: %s\n", review->file);
    put_cautions(to, &review->cautions);
    fputs("\nGiven\n", to);
    put_static(to, m);
    put_curves(to, m);
    put_tests(to, m);
    put_derived(to, &review->derived);
    return ferror(to) ? NW_FILE : NW_OK;
}

static void put_row(FILE *to, const nw_material *m)
{
    char yield[NUMBER] = "-", ultimate[NUMBER] = "-";
    if (!isnan(m->yield_strength_mpa)) {
        snprintf(yield, sizeof yield, "%.0f", m->yield_strength_mpa);
    }
    if (!isnan(m->ultimate_strength_mpa)) {
        snprintf(ultimate, sizeof ultimate, "%.0f", m->ultimate_strength_mpa);
    }
    fprintf(to, "%-30s %-10s %6s %6s %6.0f %8.4g %7.4g %8.4g  %s\n", m->name,
            nw_group_name(m->group), ultimate, yield, m->fatigue_strength_coefficient_mpa,
            m->fatigue_strength_exponent, m->fatigue_ductility_coefficient,
            m->fatigue_ductility_exponent, nw_basis_name(m->basis));
}

nw_status nw_write_material_list_text(FILE *to, const nw_material_list *list)
{
    fputs("name                           group          Su     Sy    sf'        b     ef'"
          "        c  basis\n"
          "                                             MPa    MPa    MPa\n",
          to);
    for (size_t i = 0; i < list->count; i++) {
        put_row(to, &list->materials[i]);
    }
    fprintf(to, "%zu of %zu materials\n", list->count, list->total);
    put_cautions(to, &list->cautions);
    return ferror(to) ? NW_FILE : NW_OK;
}

nw_status nw_write_material_checks_text(FILE *to, const nw_material_checks *checks, bool colour)
{
    for (size_t i = 0; i < checks->count; i++) {
        const nw_material_check *item = &checks->items[i];
        bool good = item->status == NW_OK;
        const char *on = !colour ? "" : good ? "\033[1;32m" : "\033[1;31m";
        fprintf(to, "%s%s%s  %s", on, good ? "ACCEPTED" : "REFUSED", colour ? "\033[0m" : "",
                item->name);
        if (!good) {
            size_t faults = item->fault_count + item->faults_omitted;
            fprintf(to, " (%zu fault%s, on standard error)", faults, faults == 1 ? "" : "s");
        }
        fputc('\n', to);
        put_cautions(to, &item->cautions);
    }
    fprintf(to, "%zu checked, %zu refused\n", checks->count, checks->refused);
    return ferror(to) ? NW_FILE : NW_OK;
}
