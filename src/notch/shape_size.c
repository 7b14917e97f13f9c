/* Sizes of a drawing: completed, and held against one another. */
#include "notch/shapes.h"

#include <math.h>
#include <stdarg.h>
#include <stdio.h>
#include <string.h>

/* Sizes that follow from one another may differ by the rounding of a drawing. */
static const double rounding = 1e-4;

nw_sizes nw_sizes_unknown(void)
{
    nw_sizes sizes;
    for (int i = 0; i < NW_SIZES; i++) {
        sizes.value[i] = NAN;
    }
    return sizes;
}

static const nw_shape_size *row_of(const nw_shape *shape, nw_size size)
{
    const nw_shape_size *row = shape->sizes;
    while (row->key != NULL && row->size != size) {
        row++;
    }
    return row;
}

void nw_size_fault(nw_size_check *check, nw_size size, const char *format, ...)
{
    char message[400], path[128];
    va_list arguments;
    va_start(arguments, format);
    vsnprintf(message, sizeof message, format, arguments);
    va_end(arguments);
    snprintf(path, sizeof path, "%s%s%s", check->path, check->path[0] == '\0' ? "" : ".",
             row_of(check->shape, size)->key);
    check->status = nw_fault(check->diagnostics, NW_INPUT, check->place, path, "%s", message);
}

void nw_size_check_signs(nw_size_check *check)
{
    for (const nw_shape_size *row = check->shape->sizes; row->key != NULL; row++) {
        double value = nw_size_of(check->sizes, row->size);
        if (isnan(value) || row->dimension != NW_LENGTH) {
            continue;
        }
        if (!(row->may_be_zero ? value >= 0.0 : value > 0.0) || isinf(value)) {
            nw_size_fault(check, row->size, "found %g mm, expected a length %s 0 (%s)", value,
                          row->may_be_zero ? "of at least" : "above", row->meaning);
        }
    }
}

bool nw_size_required(nw_size_check *check, nw_size size)
{
    if (!isnan(nw_size_of(check->sizes, size))) {
        return true;
    }
    nw_size_fault(check, size, "missing, expected the %s", row_of(check->shape, size)->meaning);
    return false;
}

static int count_missing(const nw_size_check *check, const nw_size three[3], nw_size *missing)
{
    int count = 0;
    for (int i = 0; i < 3; i++) {
        if (isnan(nw_size_of(check->sizes, three[i]))) {
            *missing = three[i];
            count++;
        }
    }
    return count;
}

bool nw_size_two_of_three(nw_size_check *check, nw_size big, nw_size small, nw_size part,
                          double times)
{
    const nw_size three[3] = {big, small, part};
    const char *keys[3];
    for (int i = 0; i < 3; i++) {
        keys[i] = row_of(check->shape, three[i])->key;
    }
    double *value = check->sizes->value;
    nw_size missing = big;
    int count = count_missing(check, three, &missing);
    if (count > 1) {
        nw_size_fault(check, missing, "missing, expected two of %s, %s and %s", keys[0], keys[1],
                      keys[2]);
        return false;
    }
    if (!isnan(value[big]) && !isnan(value[small]) && value[big] <= value[small]) {
        nw_size_fault(check, small, "found %g mm, expected less than %s (%g mm)", value[small],
                      keys[0], value[big]);
        return false;
    }
    if (!isnan(value[big]) && !isnan(value[part]) && value[big] <= times * value[part]) {
        nw_size_fault(check, part,
                      "found %g mm, expected less than %g mm: %s must leave some of %s "
                      "(%g mm)",
                      value[part], value[big] / times, keys[2], keys[0], value[big]);
        return false;
    }
    if (count == 0) {
        double expected = value[small] + times * value[part];
        if (fabs(value[big] - expected) > rounding * value[big]) {
            nw_size_fault(check, part,
                          "found %g mm, expected %g mm from %s and %s: give two of the three",
                          value[part], (value[big] - value[small]) / times, keys[0], keys[1]);
            return false;
        }
    } else if (missing == big) {
        value[big] = value[small] + times * value[part];
    } else if (missing == small) {
        value[small] = value[big] - times * value[part];
    } else {
        value[part] = (value[big] - value[small]) / times;
    }
    return true;
}
