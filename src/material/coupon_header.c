/* The header of a table of coupon tests: names and units of its columns. */
#include "base/text.h"
#include "material/coupon_table.h"
#include "notchwright/quantity.h"

#include <math.h>
#include <string.h>

static const struct {
    const char *name;
    nw_coupon_kind kind;
    nw_dimension dimension;
} known[] = {
    {"strain_amplitude", NW_COUPON_STRAIN, NW_STRAIN},
    {"plastic_strain_amplitude", NW_COUPON_PLASTIC, NW_STRAIN},
    {"stress_amplitude", NW_COUPON_STRESS, NW_STRESS},
    {"cycles", NW_COUPON_CYCLES, NW_PURE},
    {"reversals", NW_COUPON_REVERSALS, NW_PURE},
    {"runout", NW_COUPON_RUNOUT, NW_PURE},
    {"id", NW_COUPON_ID, NW_PURE},
};
enum { KNOWN = sizeof known / sizeof known[0], NAME = 64 };

/* Columns that would change what the lives mean: never passed over in silence. */
static const char *const flags[] = {"status",     "censored", "censor",  "suspended",
                                    "suspension", "failed",   "failure", NULL};

/* Splits "name[unit]" or "name [unit]"; "name_mpa" is MPa, as in this program's own tables. */
static void split(nw_text_field field, char name[NAME], char *unit, size_t unit_size)
{
    size_t length = (size_t)(field.end - field.start);
    const char *open = memchr(field.start, '[', length);
    unit[0] = '\0';
    if (open != NULL && field.end[-1] == ']') {
        size_t size = (size_t)(field.end - open) - 1;
        nw_text_copy(unit, size < unit_size ? size : unit_size, open + 1);
        length = (size_t)(open - field.start);
        while (length > 0 && field.start[length - 1] == ' ') {
            length--;
        }
    }
    nw_text_copy(name, length + 1 < NAME ? length + 1 : NAME, field.start);
    if (open == NULL && (nw_text_ends(name, "_mpa") || nw_text_ends(name, "_MPa"))) {
        nw_text_copy(unit, unit_size, "MPa");
        name[strlen(name) - 4] = '\0';
    }
}

static void find_unit(nw_coupon_table *table, nw_coupon_column *column, nw_dimension dimension,
                      nw_text_field field)
{
    column->factor = column->kind == NW_COUPON_REVERSALS ? 0.5 : 1.0;
    if (dimension == NW_PURE) {
        if (column->unit[0] != '\0') {
            nw_coupon_fault(table, field.start, column->name, "found the unit '%s', expected none",
                            column->unit);
        }
    } else if (column->unit[0] == '\0' && dimension == NW_STRESS) {
        nw_coupon_fault(table, field.start, column->name,
                        "found no unit, expected it in the header, as in stress_amplitude[MPa]; "
                        "accepted are %s",
                        nw_dimension_units(dimension));
    } else if (column->unit[0] != '\0' &&
               !nw_unit_factor(column->unit, dimension, &column->factor)) {
        nw_coupon_fault(table, field.start, column->name,
                        "found the unit '%s', expected a %s in %s", column->unit,
                        nw_dimension_name(dimension), nw_dimension_units(dimension));
    }
}

static bool is_taken(const nw_coupon_table *table, nw_coupon_kind kind)
{
    for (size_t i = 0; i < table->column_count; i++) {
        if (table->columns[i].kind == kind) {
            return true;
        }
    }
    return false;
}

/* A column of another name: a slip of the pen, a flag that must not be missed, or something else. */
static void other_column(nw_coupon_table *table, const char *name, nw_text_field field,
                         nw_text_builder *passed_over)
{
    const char *names[KNOWN + 1];
    size_t count = 0;
    for (size_t i = 0; i < KNOWN; i++) {
        names[count++] = known[i].name;
    }
    names[count] = NULL;
    const char *nearest = nw_text_nearest(name, names);
    for (size_t i = 0; flags[i] != NULL; i++) {
        if (strcmp(name, flags[i]) == 0) {
            nearest = "runout";
        }
    }
    if (nearest != NULL) {
        nw_coupon_fault(
            table, field.start, NULL, "unknown column '%s'; did you mean '%s'%s?", name, nearest,
            strcmp(nearest, "runout") == 0 ? " (0 failed, 1 stopped without failure)" : "");
    }
    nw_text_add(passed_over, "%s'%s'", passed_over->length == 0 ? "" : ", ", name);
}

static void add_column(nw_coupon_table *table, nw_text_field field, nw_text_builder *passed_over)
{
    nw_coupon_column column = {.kind = NW_COUPON_OTHER, .name = ""};
    nw_dimension dimension = NW_PURE;
    char name[NAME];
    split(field, name, column.unit, sizeof column.unit);
    for (size_t i = 0; i < KNOWN; i++) {
        if (strcmp(name, known[i].name) == 0) {
            column.kind = known[i].kind;
            column.name = known[i].name;
            dimension = known[i].dimension;
        }
    }
    if (column.kind == NW_COUPON_OTHER) {
        other_column(table, name, field, passed_over);
    } else if (is_taken(table, column.kind)) {
        nw_coupon_fault(table, field.start, column.name,
                        "found this column twice, expected it once");
    } else {
        find_unit(table, &column, dimension, field);
    }
    table->columns[table->column_count++] = column;
}

static void check_columns(nw_coupon_table *table, const char *line)
{
    bool cycles = is_taken(table, NW_COUPON_CYCLES),
         reversals = is_taken(table, NW_COUPON_REVERSALS);
    if (cycles && reversals) {
        nw_coupon_fault(table, line, NULL, "found both cycles and reversals, expected one of them");
    } else if (!cycles && !reversals) {
        nw_coupon_fault(table, line, NULL,
                        "found no life, expected a column 'cycles' or 'reversals'");
    }
    if (!is_taken(table, NW_COUPON_STRAIN) && !is_taken(table, NW_COUPON_STRESS) &&
        !is_taken(table, NW_COUPON_PLASTIC)) {
        nw_coupon_fault(table, line, NULL,
                        "found no amplitude, expected strain_amplitude, stress_amplitude[MPa] or "
                        "plastic_strain_amplitude");
    }
}

nw_status nw_coupon_header_read(nw_coupon_table *table, const char *line, const char *end)
{
    table->layout.delimiter = nw_text_delimiter_of(line, end, table->layout.decimal);
    char names[300];
    nw_text_builder passed_over = nw_text_builder_on(names, sizeof names);
    nw_text_field field;
    const char *at = line;
    if (nw_text_next_field(&table->layout, &at, end, &field) && nw_text_looks_numeric(field)) {
        return nw_coupon_fault(table, line, NULL,
                               "found numbers, expected a header that names the columns, as in "
                               "strain_amplitude,stress_amplitude[MPa],cycles");
    }
    at = line;
    while (nw_text_next_field(&table->layout, &at, end, &field)) {
        if (table->column_count == NW_COUPON_COLUMNS) {
            return nw_coupon_fault(table, field.start, NULL, "found more than %d columns",
                                   NW_COUPON_COLUMNS);
        }
        add_column(table, field, &passed_over);
    }
    check_columns(table, line);
    table->has_id = is_taken(table, NW_COUPON_ID);
    if (passed_over.length > 0) {
        nw_caution_add(&table->coupons->cautions, "columns_not_read", "tests",
                       "Columns that are not read: %s.", names);
    }
    return table->status;
}
