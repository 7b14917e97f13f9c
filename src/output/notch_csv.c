/* The factors of a notch as a table: one row a formula for Kt, then one a method for Kf. */
#include "notchwright/notch_factors.h"
#include "output/csv.h"

nw_status nw_write_notch_csv(FILE *to, const nw_notch_factors *result)
{
    const nw_kt *k = &result->kt;
    fputs("factor,name,used,value,bias_percent,notch_sensitivity,remark,source\n", to);
    for (size_t i = 0; i < k->row_count; i++) {
        const nw_kt_row *row = &k->rows[i];
        fprintf(to, "kt,%s,%d", row->formula->key, row->formula == k->formula);
        nw_csv_numbers(to, (const double[]){row->kt, row->bias_percent}, 2);
        fputc(',', to);
        nw_csv_text(to, row->outside);
        nw_csv_text(to, row->formula->source);
        fputc('\n', to);
    }
    for (size_t i = 0; i < result->row_count; i++) {
        const nw_kf *row = &result->rows[i];
        fprintf(to, "kf,%s,%d", row->record->key, row->record == result->sensitivity);
        nw_csv_numbers(to, (const double[]){row->kf}, 1);
        fputc(',', to);
        nw_csv_numbers(to, (const double[]){row->q}, 1);
        nw_csv_text(to, row->reason);
        nw_csv_text(to, row->record->reference);
        fputc('\n', to);
    }
    return ferror(to) ? NW_FILE : NW_OK;
}
