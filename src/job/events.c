#include "job/events.h"

#include "notchwright/quantity.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

enum { BATCH = 4096, PROGRESS_BATCHES = 256 };

/* L per unit of the load's quantity. */
static double load_per_quantity(const nw_case *input, const nw_load *load)
{
    switch (load->kind) {
    case NW_NOTCH_STRAIN:
        return input->material.youngs_modulus_mpa;
    case NW_NOTCH_ELASTIC_STRESS:
        return 1.0;
    default:
        return input->factor;
    }
}

static nw_status resolve_scale(const nw_load *load, const char *unit, double *scale,
                               bool *overridden, nw_diagnostics *diagnostics)
{
    nw_dimension dimension = load->kind == NW_NOTCH_STRAIN ? NW_STRAIN : NW_STRESS;
    bool header_tells = nw_unit_factor(unit, dimension, scale);
    if (!isnan(load->scale)) {
        *overridden |= header_tells && *scale != load->scale;
        *scale = load->scale;
        return NW_OK;
    }
    if (header_tells) {
        return NW_OK;
    }
    return nw_fault(
        diagnostics, NW_INPUT, &load->place, "load.scale",
        "missing for %s, expected the %s per unit of the column (or a header that ends in "
        "its unit, as in load[MPa])",
        load->label, nw_dimension_name(dimension));
}

static nw_status start_finder(const nw_case *input, const nw_load *load, const char *unit,
                              nw_turning_finder *finder, bool *overridden,
                              nw_diagnostics *diagnostics)
{
    double scale, factor = load_per_quantity(input, load);
    nw_status status = resolve_scale(load, unit, &scale, overridden, diagnostics);
    if (status == NW_OK) {
        *finder = (nw_turning_finder){.scale = scale * factor,
                                      .offset = load->offset * factor + input->residual_stress_mpa};
    }
    return status;
}

static void tell_progress(const nw_assess_options *options, const nw_load *load,
                          const nw_event *event)
{
    if (options->progress != NULL && event->samples / BATCH % PROGRESS_BATCHES == 0) {
        options->progress(options->progress_data, load->label, event->samples);
    }
}

static nw_status stream_file(const nw_case *input, const nw_assess_options *options,
                             const nw_load *load, nw_history *history, nw_event *event,
                             bool *overridden, nw_diagnostics *diagnostics)
{
    nw_turning_finder finder;
    nw_status status =
        start_finder(input, load, nw_history_unit(history), &finder, overridden, diagnostics);
    double *values = malloc(BATCH * sizeof *values);
    if (values == NULL) {
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory reading %s",
                        load->label);
    }
    nw_event_reserve(event, nw_history_samples_at_most(history));
    size_t count = 1;
    while (status == NW_OK && count > 0) {
        status = nw_history_read(history, values, BATCH, &count, diagnostics);
        if (status == NW_OK && nw_event_feed(event, &finder, values, count) != NW_OK) {
            status = nw_fault(diagnostics, NW_MEMORY, NULL, NULL,
                              "out of memory for the turning points of %s", load->label);
        }
        tell_progress(options, load, event);
    }
    free(values);
    return status == NW_OK ? nw_event_finish(event, &finder) : status;
}

static nw_status read_file(const nw_case *input, const nw_assess_options *options,
                           const nw_load *load, nw_event *event, bool *overridden,
                           nw_diagnostics *diagnostics)
{
    nw_history_options how = {load->column[0] == '\0' ? NULL : load->column, load->decimal};
    nw_history *history = NULL;
    nw_status status = nw_history_open(load->history, &how, &history, diagnostics);
    if (status == NW_OK) {
        status = stream_file(input, options, load, history, event, overridden, diagnostics);
    }
    nw_history_close(history);
    return status;
}

static nw_status read_inline(const nw_case *input, const nw_load *load, nw_event *event,
                             nw_diagnostics *diagnostics)
{
    nw_turning_finder finder;
    bool overridden = false;
    nw_status status = start_finder(input, load, "", &finder, &overridden, diagnostics);
    if (status == NW_OK) {
        status = nw_event_feed(event, &finder, load->values, load->value_count);
    }
    if (status == NW_OK) {
        status = nw_event_finish(event, &finder);
    }
    return status == NW_MEMORY ? nw_fault(diagnostics, status, NULL, NULL, "out of memory")
                               : status;
}

static nw_status check_finite(const nw_load *load, const nw_event *event,
                              nw_diagnostics *diagnostics)
{
    if (event->samples == 0) {
        return nw_fault(diagnostics, NW_INPUT, &load->place, "load.history",
                        "%s: found no values, expected at least one", load->label);
    }
    double largest = fmax(fabs(event->load_max_mpa), fabs(event->load_min_mpa));
    if (!(largest <= 1e9)) {
        return nw_fault(
            diagnostics, NW_INPUT, &load->place, "load",
            "%s: found a notch stress of %g MPa, expected less than 1e9 MPa; check scale "
            "and units",
            load->label, largest);
    }
    return NW_OK;
}

static bool has_reversal(const nw_event *events, size_t count)
{
    for (size_t i = 0; i < count; i++) {
        if (events[i].load_max_mpa != events[0].load_min_mpa ||
            events[i].load_min_mpa != events[0].load_min_mpa) {
            return true;
        }
    }
    return false;
}

nw_status nw_case_events(const nw_case *input, const nw_assess_options *options, nw_event *events,
                         bool *header_unit_overridden, nw_diagnostics *diagnostics)
{
    nw_status status = NW_OK;
    *header_unit_overridden = false;
    memset(events, 0, input->load_count * sizeof *events);
    for (size_t i = 0; i < input->load_count; i++) {
        const nw_load *load = &input->loads[i];
        events[i].repeats = load->repeats;
        events[i].ignore_ranges_below_mpa =
            load->ignore_ranges_below_mpa *
            (load->kind == NW_NOTCH_STRAIN ? input->material.youngs_modulus_mpa : 1.0);
        nw_status one = load->values != NULL ? read_inline(input, load, &events[i], diagnostics)
                                             : read_file(input, options, load, &events[i],
                                                         header_unit_overridden, diagnostics);
        if (one == NW_OK) {
            one = check_finite(load, &events[i], diagnostics);
        }
        if (one == NW_MEMORY) {
            return one;
        }
        status = one == NW_OK ? status : one;
    }
    if (status == NW_OK && !has_reversal(events, input->load_count)) {
        return nw_fault(diagnostics, NW_INPUT, &input->load_place, "load",
                        "found a constant history (%g MPa at the notch), expected at least two "
                        "different values in the block",
                        events[0].points[0].load_mpa);
    }
    return status;
}
