/* Tables of coupon tests, row by row. What stands in which column is found by coupon_header.c. */
#include "base/file.h"
#include "base/number.h"
#include "base/text.h"
#include "material/coupon_table.h"

#include <math.h>
#include <stdarg.h>
#include <stdlib.h>
#include <string.h>

enum { LARGEST_FILE = 1 << 30 };

static const double largest_strain = 0.2, largest_stress_mpa = 5000.0, least_stress_mpa = 1.0;

nw_status nw_coupon_fault(nw_coupon_table *table, const char *at, const char *key,
                          const char *format, ...)
{
    char message[400];
    va_list arguments;
    va_start(arguments, format);
    vsnprintf(message, sizeof message, format, arguments);
    va_end(arguments);
    nw_place place = {.line = table->line, .column = (size_t)(at - table->line_start) + 1};
    nw_text_copy(place.file, sizeof place.file, table->coupons->file);
    table->status = nw_fault(table->diagnostics, NW_INPUT, &place, key, "%s", message);
    return table->status;
}

/* ---- one row ---- */

static bool read_number(nw_coupon_table *table, const nw_coupon_column *column, nw_text_field field,
                        double *value)
{
    int length = field.end - field.start > 40 ? 40 : (int)(field.end - field.start);
    bool room = table->end - field.start > NW_NUMBER_PADDING + 400;
    double number;
    const char *stop =
        length == 0 ? NULL
        : room      ? nw_number_scan_padded(field.start, field.end, table->layout.decimal, &number)
                    : nw_number_scan(field.start, field.end, table->layout.decimal, &number);
    if (stop != field.end || !isfinite(number)) {
        bool comma =
            table->layout.decimal == '.' && memchr(field.start, ',', (size_t)length) != NULL;
        nw_coupon_fault(table, field.start, column->name,
                        "found %s%.*s%s, expected a finite number%s",
                        length == 0 ? "an empty field" : "'", length, field.start,
                        length == 0 ? "" : "'", comma ? " (decimal commas need --decimal ,)" : "");
        return false;
    }
    *value = number * column->factor;
    return true;
}

static void read_strain(nw_coupon_table *table, const nw_coupon_column *column, nw_text_field field,
                        double *strain)
{
    double value;
    bool plastic = column->kind == NW_COUPON_PLASTIC;
    if (plastic && field.start == field.end) {
        return;
    }
    if (!read_number(table, column, field, &value)) {
        return;
    }
    int length = (int)(field.end - field.start);
    if (value < 0.0 || (value == 0.0 && !plastic)) {
        nw_coupon_fault(table, field.start, column->name, "found %.*s, expected %s", length,
                        field.start, plastic ? "0 or more" : "a strain amplitude above 0");
    } else if (value >= largest_strain) {
        nw_coupon_fault(table, field.start, column->name,
                        "found %.*s%s%s (a strain of %g), expected a ratio below %g; %s", length,
                        field.start, column->unit[0] == '\0' ? "" : " ", column->unit, value,
                        largest_strain,
                        value >= 10.0 ? "are strain and stress swapped?"
                                      : "is the unit missing in the header, as in "
                                        "strain_amplitude[%]?");
    } else {
        *strain = value;
    }
}

static void read_stress(nw_coupon_table *table, const nw_coupon_column *column, nw_text_field field,
                        double *stress)
{
    double value;
    if (!read_number(table, column, field, &value)) {
        return;
    }
    int length = (int)(field.end - field.start);
    if (!(value > 0.0)) {
        nw_coupon_fault(table, field.start, column->name,
                        "found %.*s, expected a stress amplitude above 0", length, field.start);
    } else if (value < least_stress_mpa || value > largest_stress_mpa) {
        nw_coupon_fault(table, field.start, column->name,
                        "found %.*s %s, expected %g to %g MPa; %s", length, field.start,
                        column->unit, least_stress_mpa, largest_stress_mpa,
                        value < least_stress_mpa ? "are strain and stress swapped, or is the unit "
                                                   "another?"
                                                 : "is the unit another?");
    } else {
        *stress = value;
    }
}

static void read_life(nw_coupon_table *table, const nw_coupon_column *column, nw_text_field field,
                      double *cycles)
{
    double value;
    if (!read_number(table, column, field, &value)) {
        return;
    }
    if (!(value > 0.0)) {
        nw_coupon_fault(table, field.start, column->name, "found %.*s, expected a life above 0",
                        (int)(field.end - field.start), field.start);
    } else {
        *cycles = value;
    }
}

static void read_runout(nw_coupon_table *table, const nw_coupon_column *column, nw_text_field field,
                        bool *runout)
{
    size_t length = (size_t)(field.end - field.start);
    if (length != 1 || (*field.start != '0' && *field.start != '1')) {
        nw_coupon_fault(table, field.start, column->name,
                        "found '%.*s', expected 0 (failed) or 1 (stopped without failure)",
                        length > 40 ? 40 : (int)length, field.start);
        return;
    }
    *runout = *field.start == '1';
}

static void read_id(nw_coupon_table *table, const nw_coupon_column *column, nw_text_field field,
                    nw_coupon *test)
{
    size_t length = (size_t)(field.end - field.start);
    if (length == 0 || length >= sizeof test->id) {
        nw_coupon_fault(table, field.start, column->name,
                        "found %s, expected a name of 1 to %zu bytes",
                        length == 0 ? "an empty field" : "a longer name", sizeof test->id - 1);
        return;
    }
    memcpy(test->id, field.start, length);
    test->id[length] = '\0';
}

/* What two fields of a row say about each other. */
static void check_row(nw_coupon_table *table, const nw_coupon *test, const char *plastic_at,
                      const char *stress_at)
{
    if (plastic_at != NULL && test->plastic_strain_amplitude > test->strain_amplitude) {
        nw_coupon_fault(table, plastic_at, "plastic_strain_amplitude",
                        "found a plastic strain of %g above the total strain of %g, expected at "
                        "most that",
                        test->plastic_strain_amplitude, test->strain_amplitude);
    }
    double elastic = test->stress_amplitude_mpa / table->youngs_modulus_mpa;
    if (stress_at != NULL && elastic > 1.1 * test->strain_amplitude) {
        nw_coupon_fault(table, stress_at, "stress_amplitude",
                        "found %g MPa, which is an elastic strain of %g by the modulus of %g MPa, "
                        "above the total strain of %g; check units and modulus",
                        test->stress_amplitude_mpa, elastic, table->youngs_modulus_mpa,
                        test->strain_amplitude);
    }
}

static void read_field(nw_coupon_table *table, const nw_coupon_column *column, nw_text_field field,
                       nw_coupon *test)
{
    switch (column->kind) {
    case NW_COUPON_STRAIN:
        read_strain(table, column, field, &test->strain_amplitude);
        break;
    case NW_COUPON_PLASTIC:
        read_strain(table, column, field, &test->plastic_strain_amplitude);
        break;
    case NW_COUPON_STRESS:
        read_stress(table, column, field, &test->stress_amplitude_mpa);
        break;
    case NW_COUPON_CYCLES:
    case NW_COUPON_REVERSALS:
        read_life(table, column, field, &test->cycles);
        break;
    case NW_COUPON_RUNOUT:
        read_runout(table, column, field, &test->runout);
        break;
    case NW_COUPON_ID:
        read_id(table, column, field, test);
        break;
    case NW_COUPON_OTHER:
        break;
    }
}

static void read_row(nw_coupon_table *table, const char *line, const char *end, nw_coupon *test)
{
    *test = (nw_coupon){.strain_amplitude = NAN,
                        .stress_amplitude_mpa = NAN,
                        .plastic_strain_amplitude = NAN,
                        .cycles = NAN,
                        .line = table->line};
    size_t count = 0;
    const char *plastic_at = NULL, *stress_at = NULL;
    nw_text_field field;
    while (nw_text_next_field(&table->layout, &line, end, &field)) {
        if (count < table->column_count) {
            const nw_coupon_column *column = &table->columns[count];
            read_field(table, column, field, test);
            plastic_at = column->kind == NW_COUPON_PLASTIC ? field.start : plastic_at;
            stress_at = column->kind == NW_COUPON_STRESS ? field.start : stress_at;
        }
        count++;
    }
    if (count != table->column_count) {
        nw_coupon_fault(table, table->line_start, NULL,
                        "found %zu field%s in this row, expected %zu as in the header", count,
                        count == 1 ? "" : "s", table->column_count);
        return;
    }
    check_row(table, test, plastic_at, stress_at);
}

/* ---- all rows ---- */

static nw_status add_row(nw_coupon_table *table, const char *end)
{
    nw_coupons *c = table->coupons;
    if (c->count == table->capacity) {
        size_t capacity = table->capacity == 0 ? 64 : 2 * table->capacity;
        nw_coupon *larger = realloc(c->tests, capacity * sizeof *larger);
        if (larger == NULL) {
            return nw_fault(table->diagnostics, NW_MEMORY, NULL, NULL, "out of memory");
        }
        c->tests = larger;
        table->capacity = capacity;
    }
    nw_coupon *test = &c->tests[c->count++];
    read_row(table, table->line_start, end, test);
    if (!table->has_id) {
        snprintf(test->id, sizeof test->id, "%zu", c->count);
    }
    return NW_OK;
}

static nw_status read_lines(nw_coupon_table *table, const char *text)
{
    bool has_header = false;
    nw_status status = NW_OK;
    for (const char *at = text; at < table->end && status == NW_OK;) {
        const char *stop = memchr(at, '\n', (size_t)(table->end - at));
        stop = stop == NULL ? table->end : stop;
        table->line++;
        table->line_start = at;
        const char *end = nw_text_content_end(at, stop);
        if (end > at && !has_header) {
            status = nw_coupon_header_read(table, at, end);
            has_header = true;
        } else if (end > at) {
            status = add_row(table, end);
        }
        at = stop + 1;
    }
    if (status == NW_OK && table->status == NW_OK && table->coupons->count == 0) {
        table->line_start = table->end;
        nw_coupon_fault(table, table->end, NULL, "found no tests, expected %s",
                        has_header ? "a row for each under the header" : "a header and a row each");
    }
    return status;
}

static int by_id(const void *left, const void *right)
{
    const nw_coupon *a = *(const nw_coupon *const *)left, *b = *(const nw_coupon *const *)right;
    int order = strcmp(a->id, b->id);
    return order != 0 ? order : (a->line > b->line) - (a->line < b->line);
}

/* Goes back to a line and the id in it. Only for a fault: it passes over the text again. */
static const char *find_id(nw_coupon_table *table, const char *text, size_t line)
{
    table->line = line;
    table->line_start = text;
    for (size_t i = 1; i < line; i++) {
        table->line_start = (const char *)memchr(table->line_start, '\n',
                                                 (size_t)(table->end - table->line_start)) +
                            1;
    }
    const char *at = table->line_start;
    nw_text_field field = {at, at};
    for (size_t i = 0; nw_text_next_field(&table->layout, &at, table->end, &field); i++) {
        if (table->columns[i].kind == NW_COUPON_ID) {
            break;
        }
    }
    return field.start;
}

static bool is_full(const nw_diagnostics *diagnostics)
{
    return diagnostics == NULL || diagnostics->count == NW_DIAGNOSTICS_KEPT;
}

static nw_status refuse_twice(nw_coupon_table *table, const char *text)
{
    nw_coupons *c = table->coupons;
    const nw_coupon **order = malloc((c->count + 1) * sizeof *order);
    if (order == NULL) {
        return nw_fault(table->diagnostics, NW_MEMORY, NULL, NULL, "out of memory");
    }
    for (size_t i = 0; i < c->count; i++) {
        order[i] = &c->tests[i];
    }
    qsort(order, c->count, sizeof *order, by_id);
    for (size_t i = 1; i < c->count; i++) {
        if (order[i]->id[0] != '\0' && strcmp(order[i]->id, order[i - 1]->id) == 0) {
            const char *at = is_full(table->diagnostics) ? table->line_start
                                                         : find_id(table, text, order[i]->line);
            nw_coupon_fault(table, at, "id",
                            "found '%s' again (first in line %zu), expected each id once",
                            order[i]->id, order[i - 1]->line);
        }
    }
    free(order);
    return NW_OK;
}

static nw_status read_table(nw_coupon_table *table, const char *text, size_t length)
{
    if (memchr(text, '\0', length) != NULL) {
        table->line = 1;
        table->line_start = text;
        return nw_coupon_fault(table, text, NULL,
                               "found binary or UTF-16 data, expected UTF-8 text");
    }
    table->end = text + length;
    text += length >= 3 && memcmp(text, "\xEF\xBB\xBF", 3) == 0 ? 3 : 0;
    nw_status status = read_lines(table, text);
    if (status == NW_OK && table->has_id) {
        status = refuse_twice(table, text);
    }
    return status == NW_OK ? table->status : status;
}

nw_status nw_coupons_read(const char *path, const nw_coupon_options *options, nw_coupons *coupons,
                          nw_diagnostics *diagnostics)
{
    *coupons = (nw_coupons){.count = 0};
    nw_text_copy(coupons->file, sizeof coupons->file, path);
    char *text = NULL;
    size_t length = 0;
    nw_status status = nw_file_read(path, LARGEST_FILE, &text, &length, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    nw_coupon_table table = {.coupons = coupons,
                             .diagnostics = diagnostics,
                             .youngs_modulus_mpa = options->youngs_modulus_mpa,
                             .layout.decimal = options->decimal == ',' ? ',' : '.'};
    status = read_table(&table, text, length);
    free(text);
    return status;
}

void nw_coupons_clear(nw_coupons *coupons)
{
    free(coupons->tests);
    *coupons = (nw_coupons){.count = 0};
}
