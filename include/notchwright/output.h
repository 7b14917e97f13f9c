/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Results written down: text for a person, JSON and CSV for programs.
 */
#ifndef NOTCHWRIGHT_OUTPUT_H
#define NOTCHWRIGHT_OUTPUT_H

#include "notchwright/assessment.h"

#include <stdio.h>

#ifdef __cplusplus
extern "C" {
#endif

/* Verdict and life first, cautions beside what they qualify, the worst loops.
 *   colour  use terminal colour for the verdict */
NW_API nw_status nw_write_assessment_text(FILE *to, const nw_case *input,
                                          const nw_assessment *result, bool colour);

/* One object, format "notchwright.assessment/1"; stress in MPa, strain as a ratio; numbers that do not exist
 * are null. Returns NW_OK, NW_MEMORY or NW_FILE. */
NW_API nw_status nw_write_assessment_json(FILE *to, const nw_case *input,
                                          const nw_assessment *result);

/* One row a distinct loop, most damaging first. */
NW_API nw_status nw_write_assessment_csv(FILE *to, const nw_case *input,
                                         const nw_assessment *result);

#ifdef __cplusplus
}
#endif
#endif
