/* Estimates as a table, one row a method. */
#include "notchwright/estimate.h"
#include "output/csv.h"

nw_status nw_write_estimate_csv(FILE *to, const nw_estimate_comparison *r)
{
    fputs("name,applies,recommended,fatigue_strength_coefficient_mpa,fatigue_strength_exponent,"
          "fatigue_ductility_coefficient,fatigue_ductility_exponent,strength_coefficient_mpa,"
          "hardening_exponent,endurance_stress_mpa,transition_reversals,"
          "stress_amplitude_at_1e6_cycles_mpa",
          to);
    for (size_t i = 0; i < r->amplitude_count; i++) {
        fprintf(to, ",cycles_at_%.10g", r->amplitudes[i]);
    }
    fputs(",reason\n", to);
    for (size_t i = 0; i < r->row_count; i++) {
        const nw_estimate_row *row = &r->rows[i];
        const nw_estimate_values *v = &row->values;
        const double columns[] = {
            v->fatigue_strength_coefficient_mpa,
            v->fatigue_strength_exponent,
            v->fatigue_ductility_coefficient,
            v->fatigue_ductility_exponent,
            v->strength_coefficient_mpa,
            v->hardening_exponent,
            v->endurance_stress_mpa,
            row->transition_reversals,
            row->stress_amplitude_1e6_mpa,
        };
        fprintf(to, "%s,%d,%d", row->record->key, row->applies, row->record == r->recommended);
        nw_csv_numbers(to, columns, sizeof columns / sizeof columns[0]);
        nw_csv_numbers(to, row->cycles, r->amplitude_count);
        nw_csv_text(to, row->reason);
        fputc('\n', to);
    }
    return ferror(to) ? NW_FILE : NW_OK;
}
