/* From the loads of a case to events in L. */
#ifndef NW_JOB_EVENTS_H
#define NW_JOB_EVENTS_H

#include "notchwright/assessment.h"

/* Reads every history; *header_unit_overridden tells whether a header's unit gave way to a given scale; events[load_count] are zeroed first and to be cleared by the caller whatever is
 * returned. Faults of all histories are collected. */
nw_status nw_case_events(const nw_case *input, const nw_assess_options *options, nw_event *events,
                         bool *header_unit_overridden, nw_diagnostics *diagnostics);

/* The notch curve of the rule "curve" from its file. */
nw_status nw_case_curve_file(const nw_case *input, nw_notch_curve **curve,
                             nw_diagnostics *diagnostics);

#endif
