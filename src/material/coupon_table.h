/* Reading a table of coupon tests: shared by header and rows. */
#ifndef NW_MATERIAL_COUPON_TABLE_H
#define NW_MATERIAL_COUPON_TABLE_H

#include "base/text_layout.h"
#include "notchwright/fit.h"

typedef enum nw_coupon_kind {
    NW_COUPON_STRAIN,
    NW_COUPON_PLASTIC,
    NW_COUPON_STRESS,
    NW_COUPON_CYCLES,
    NW_COUPON_REVERSALS,
    NW_COUPON_RUNOUT,
    NW_COUPON_ID,
    NW_COUPON_OTHER /* not read */
} nw_coupon_kind;

typedef struct nw_coupon_column {
    nw_coupon_kind kind;
    const char *name;
    char unit[32];
    double factor; /* to the internal unit; reversals to cycles */
} nw_coupon_column;

enum { NW_COUPON_COLUMNS = 64 };

typedef struct nw_coupon_table {
    nw_coupons *coupons;
    size_t capacity;
    nw_diagnostics *diagnostics;
    nw_status status; /* NW_OK until a fault is found */
    double youngs_modulus_mpa;
    nw_text_layout layout;
    nw_coupon_column columns[NW_COUPON_COLUMNS];
    size_t column_count;
    bool has_id;
    const char *end; /* of the text */
    const char *line_start;
    size_t line; /* from 1 */
} nw_coupon_table;

/* Finds the columns from the header line. Returns NW_OK or NW_INPUT. */
nw_status nw_coupon_header_read(nw_coupon_table *table, const char *line, const char *end);

/* Adds a fault at `at` in the present line. */
nw_status nw_coupon_fault(nw_coupon_table *table, const char *at, const char *key,
                          const char *format, ...) NW_PRINTF(4, 5);

#endif
