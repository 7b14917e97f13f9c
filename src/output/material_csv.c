/* Materials as tables. */
#include "notchwright/library.h"
#include "output/csv.h"

static const char parameter_heads[] =
    "name,group,basis,youngs_modulus_mpa,yield_strength_mpa,ultimate_strength_mpa,"
    "reduction_of_area,hardness_hb,strength_coefficient_mpa,hardening_exponent,"
    "fatigue_strength_coefficient_mpa,fatigue_strength_exponent,fatigue_ductility_coefficient,"
    "fatigue_ductility_exponent";

static void put_parameters(FILE *to, const nw_material *m)
{
    const double columns[] = {
        m->youngs_modulus_mpa,
        m->yield_strength_mpa,
        m->ultimate_strength_mpa,
        m->reduction_of_area,
        m->hardness_hb,
        m->strength_coefficient_mpa,
        m->hardening_exponent,
        m->fatigue_strength_coefficient_mpa,
        m->fatigue_strength_exponent,
        m->fatigue_ductility_coefficient,
        m->fatigue_ductility_exponent,
    };
    nw_csv_first_text(to, m->name);
    fprintf(to, ",%s,%s", nw_group_name(m->group), nw_basis_name(m->basis));
    nw_csv_numbers(to, columns, sizeof columns / sizeof columns[0]);
}

nw_status nw_write_material_csv(FILE *to, const nw_material_review *review)
{
    const nw_material_derived *d = &review->derived;
    const double columns[] = {
        d->transition_reversals,
        d->cyclic_yield_mpa,
        d->basquin_coefficient_mpa,
        d->basquin_slope,
        d->cycles,
        d->stress_amplitude_mpa,
        d->strain_amplitude,
        d->compatible_exponent,
        d->compatible_strength_mpa,
    };
    fprintf(
        to,
        "%s,transition_reversals,cyclic_yield_mpa,basquin_coefficient_mpa,basquin_slope_k,"
        "cycles,stress_amplitude_at_cycles_mpa,strain_amplitude_at_cycles,"
        "hardening_exponent_by_compatibility,strength_coefficient_by_compatibility_mpa,source\n",
        parameter_heads);
    put_parameters(to, &review->material);
    nw_csv_numbers(to, columns, sizeof columns / sizeof columns[0]);
    nw_csv_text(to, review->material.source);
    fputc('\n', to);
    return ferror(to) ? NW_FILE : NW_OK;
}

nw_status nw_write_material_list_csv(FILE *to, const nw_material_list *list)
{
    fprintf(to, "%s,source\n", parameter_heads);
    for (size_t i = 0; i < list->count; i++) {
        put_parameters(to, &list->materials[i]);
        nw_csv_text(to, list->materials[i].source);
        fputc('\n', to);
    }
    return ferror(to) ? NW_FILE : NW_OK;
}

static void put_line(FILE *to, const nw_material_check *item, const char *kind, size_t line,
                     const char *about, const char *text)
{
    nw_csv_first_text(to, item->name);
    fprintf(to, ",%d,%s,", item->status == NW_OK, kind);
    if (line > 0) {
        fprintf(to, "%zu", line);
    }
    nw_csv_text(to, about);
    nw_csv_text(to, text);
    fputc('\n', to);
}

/* One row a fault or caution; a file with neither has one row. */
nw_status nw_write_material_checks_csv(FILE *to, const nw_material_checks *checks)
{
    fputs("file,accepted,kind,line,about,text\n", to);
    for (size_t i = 0; i < checks->count; i++) {
        const nw_material_check *item = &checks->items[i];
        for (size_t k = 0; k < item->fault_count; k++) {
            const nw_diagnostic *d = &item->faults[k];
            put_line(to, item, "fault", d->place.line, d->key_path, d->message);
        }
        for (size_t k = 0; k < item->cautions.count; k++) {
            const nw_caution *c = &item->cautions.items[k];
            put_line(to, item, "caution", 0, c->about, c->text);
        }
        if (item->fault_count + item->cautions.count == 0) {
            put_line(to, item, "", 0, "", "");
        }
    }
    return ferror(to) ? NW_FILE : NW_OK;
}
