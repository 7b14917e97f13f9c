/* The sections of a case file, one reader each, and the checks that need several of them. */
#ifndef NW_JOB_CASE_SECTIONS_H
#define NW_JOB_CASE_SECTIONS_H

#include "base/fields.h"
#include "notchwright/assessment.h"

void nw_case_read_notch(nw_field_reader *reader, const nw_node *map, nw_case *result);
void nw_case_read_loads(nw_field_reader *reader, const nw_node *list, nw_case *result);
void nw_case_read_life(nw_field_reader *reader, const nw_node *map, nw_case *result);

/* `material_good`: the material was read, so what depends on it can be checked and derived. */
void nw_case_check(nw_field_reader *reader, const nw_node *root, bool material_good,
                   nw_case *result);

extern const char *const nw_load_kind_words[]; /* NULL-terminated */

#endif
