/* Loops as a table for other programs. */
#include "notchwright/output.h"

#include <inttypes.h>
#include <math.h>

static void put_number(FILE *to, double value)
{
    if (isfinite(value)) {
        fprintf(to, ",%.10g", value);
    } else {
        fputc(',', to); /* what does not exist is empty */
    }
}

nw_status nw_write_assessment_csv(FILE *to, const nw_case *input, const nw_assessment *result)
{
    (void)input;
    fputs(
        "count,load_max_mpa,load_min_mpa,strain_amplitude,strain_mean,stress_max_mpa,"
        "stress_min_mpa,stress_mean_mpa,cycles_to_initiation,damage,share,start_event,start_sample,"
        "tip_event,tip_sample\n",
        to);
    for (size_t i = 0; i < result->loop_count; i++) {
        const nw_loop_result *loop = &result->loops[i];
        const nw_loop_values *v = &loop->values;
        const double columns[] = {v->load_max_mpa,    v->load_min_mpa,   v->strain_amplitude,
                                  v->strain_mean,     v->stress_max_mpa, v->stress_min_mpa,
                                  v->stress_mean_mpa, loop->cycles,      loop->damage,
                                  loop->share};
        fprintf(to, "%.15g", loop->count);
        for (size_t k = 0; k < sizeof columns / sizeof columns[0]; k++) {
            put_number(to, columns[k]);
        }
        fprintf(to, ",%zu,%" PRIu64 ",%zu,%" PRIu64 "\n", loop->start.event + 1,
                loop->start.sample + 1, loop->tip.event + 1, loop->tip.sample + 1);
    }
    return ferror(to) ? NW_FILE : NW_OK;
}
