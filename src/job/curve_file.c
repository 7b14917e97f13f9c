/* The file of a notch curve: columns load, stress and strain, units in the header. */
#include "job/events.h"
#include "notchwright/quantity.h"

#include <math.h>
#include <stdlib.h>

enum { MOST_POINTS = 100000 };

typedef struct column {
    const char *name;
    nw_dimension dimension;
    double *values;
    size_t count;
} column;

static nw_status unit_of(const nw_case *input, const column *c, const char *unit, double *factor,
                         nw_diagnostics *diagnostics)
{
    if (nw_unit_factor(unit, c->dimension, factor)) {
        return NW_OK;
    }
    if (unit[0] == '\0' && c->dimension == NW_STRAIN) {
        *factor = 1.0;
        return NW_OK;
    }
    if (unit[0] == '\0' && !isnan(input->curve_stress_factor)) {
        *factor = input->curve_stress_factor;
        return NW_OK;
    }
    return nw_fault(diagnostics, NW_INPUT, &input->curve_place, "notch.curve",
                    "%s: found column %s with %s%s%s, expected a unit in its header, as in %s[%s]",
                    input->curve_file, c->name, unit[0] == '\0' ? "no unit" : "the unit '", unit,
                    unit[0] == '\0' ? "" : "'", c->name, c->dimension == NW_STRESS ? "MPa" : "%");
}

static nw_status read_values(column *c, nw_history *history, double factor, const nw_case *input,
                             nw_diagnostics *diagnostics)
{
    c->values = malloc(MOST_POINTS * sizeof *c->values);
    if (c->values == NULL) {
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory");
    }
    size_t got = 1;
    while (got > 0) {
        nw_status status = nw_history_read(history, c->values + c->count, MOST_POINTS - c->count,
                                           &got, diagnostics);
        if (status != NW_OK) {
            return status;
        }
        c->count += got;
        if (c->count == MOST_POINTS) {
            return nw_fault(diagnostics, NW_INPUT, &input->curve_place, "notch.curve",
                            "%s: found %d points or more, expected fewer", input->curve_file,
                            MOST_POINTS);
        }
    }
    for (size_t i = 0; i < c->count; i++) {
        c->values[i] *= factor;
    }
    return NW_OK;
}

static nw_status read_column(const nw_case *input, column *c, nw_diagnostics *diagnostics)
{
    nw_history_options options = {c->name, '.'};
    nw_history *history = NULL;
    double factor = 1.0;
    nw_status status = nw_history_open(input->curve_file, &options, &history, diagnostics);
    if (status == NW_OK) {
        status = unit_of(input, c, nw_history_unit(history), &factor, diagnostics);
    }
    if (status == NW_OK) {
        status = read_values(c, history, factor, input, diagnostics);
    }
    nw_history_close(history);
    return status;
}

nw_status nw_case_curve_file(const nw_case *input, nw_notch_curve **curve,
                             nw_diagnostics *diagnostics)
{
    column columns[] = {{"load", NW_STRESS, NULL, 0},
                        {"stress", NW_STRESS, NULL, 0},
                        {"strain", NW_STRAIN, NULL, 0}};
    nw_status status = NW_OK;
    for (int i = 0; i < 3 && status == NW_OK; i++) {
        status = read_column(input, &columns[i], diagnostics);
    }
    if (status == NW_OK) {
        size_t before = diagnostics == NULL ? 0 : diagnostics->count;
        status = nw_notch_curve_from_table(columns[0].values, columns[1].values, columns[2].values,
                                           columns[0].count, curve, diagnostics);
        if (status != NW_OK && diagnostics != NULL && diagnostics->count > before) {
            diagnostics->items[before].place = input->curve_place;
        }
    }
    for (int i = 0; i < 3; i++) {
        free(columns[i].values);
    }
    return status;
}
