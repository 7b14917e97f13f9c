/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Everything the library offers, in the order in which data flows.
 */
#ifndef NOTCHWRIGHT_NOTCHWRIGHT_H
#define NOTCHWRIGHT_NOTCHWRIGHT_H

#include "notchwright/assessment.h"
#include "notchwright/estimate.h"
#include "notchwright/fatigue_factor.h"
#include "notchwright/fit.h"
#include "notchwright/history.h"
#include "notchwright/library.h"
#include "notchwright/life.h"
#include "notchwright/material.h"
#include "notchwright/notch.h"
#include "notchwright/notch_factors.h"
#include "notchwright/output.h"
#include "notchwright/quantity.h"
#include "notchwright/response.h"
#include "notchwright/shape.h"
#include "notchwright/status.h"

#ifdef __cplusplus
extern "C" {
#endif

/* Version of the library, "1.0.0". */
NW_API const char *nw_version(void);

#ifdef __cplusplus
}
#endif
#endif
