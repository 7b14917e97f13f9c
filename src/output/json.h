/* Small change for JSON output. */
#ifndef NW_OUTPUT_JSON_H
#define NW_OUTPUT_JSON_H

#include "notchwright/material.h"
#include "notchwright/status.h"

#include <jansson.h>
#include <math.h>
#include <stdio.h>

enum { NW_JSON_FLAGS = JSON_REAL_PRECISION(15) };

/* A number, or null when it does not exist. */
static inline json_t *nw_json_number(double value)
{
    return isfinite(value) ? json_real(value) : json_null();
}

/* A text, or null when it is empty or NULL; text that is no UTF-8 has its odd bytes replaced. */
json_t *nw_json_text(const char *text);

/* A whole number where it is one. */
json_t *nw_json_count(double value);

/* A material with all its parameters. */
json_t *nw_json_material(const nw_material *material);

/* Cautions as [{code, about, text}]. */
json_t *nw_json_cautions(const nw_cautions *cautions);

/* Writes a whole object, one line an entry, and releases it. NULL (memory ran out while it was built) gives
 * NW_MEMORY; else NW_OK or NW_FILE. */
nw_status nw_json_put(FILE *to, json_t *object);

#endif
