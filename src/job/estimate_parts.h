/* Inside of the comparison of estimates. */
#ifndef NW_JOB_ESTIMATE_PARTS_H
#define NW_JOB_ESTIMATE_PARTS_H

#include "notchwright/estimate.h"

/* Adds what a reader must know beside the numbers of a finished comparison. */
void nw_estimate_cautions(nw_estimate_comparison *result);

#endif
