/* The curves of a fit as a table for other programs. */
#include "notchwright/fit.h"
#include "output/csv.h"

nw_status nw_write_fit_csv(FILE *to, const nw_fit *fit)
{
    fputs("curve,survival,confidence,strain_amplitude,cycles,low,high\n", to);
    for (size_t i = 0; i < fit->curve_count; i++) {
        const nw_fit_curve *curve = &fit->curves[i];
        for (int k = 0; k < NW_FIT_GRID; k++) {
            const nw_fit_point *p = &curve->points[k];
            const double columns[] = {curve->survival,
                                      curve->tolerance ? curve->confidence : fit->options.limits,
                                      p->strain_amplitude,
                                      p->cycles,
                                      p->low,
                                      p->high};
            nw_csv_first_text(to, curve->tolerance ? "tolerance" : "percentile");
            nw_csv_numbers(to, columns, sizeof columns / sizeof columns[0]);
            fputc('\n', to);
        }
    }
    return ferror(to) ? NW_FILE : NW_OK;
}
