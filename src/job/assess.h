/* What the parts of an assessment share. */
#ifndef NW_JOB_ASSESS_H
#define NW_JOB_ASSESS_H

#include "notchwright/assessment.h"

/* What cautions are drawn from, beyond the result itself. */
typedef struct nw_assess_evidence {
    double stress_mean_max_mpa;
    double rate_max;             /* largest 1/N */
    bool header_unit_overridden; /* a column's own unit gave way to a scale */
    bool curve_exceeded;
} nw_assess_evidence;

/* The rule in use: a gauge at the root makes it linear whatever the case says. */
const nw_notch_rule *nw_case_rule_in_use(const nw_case *input);

nw_rule_input nw_case_rule_input(const nw_case *input);

void nw_assess_cautions(const nw_case *input, const nw_assess_evidence *evidence,
                        nw_assessment *result);

#endif
