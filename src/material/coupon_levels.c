/* Levels of a test programme, replication, and what it is good for. */
#include "material/fit_parts.h"

#include <stdlib.h>

typedef struct item {
    double value;
    size_t index;
} item;

static int by_value(const void *left, const void *right)
{
    double a = ((const item *)left)->value, b = ((const item *)right)->value;
    return (a > b) - (a < b);
}

nw_status nw_levels_of(const double *values, size_t count, double width, size_t *level,
                       size_t *levels)
{
    item *items = malloc((count + 1) * sizeof *items);
    *levels = 0;
    if (items == NULL) {
        return NW_MEMORY;
    }
    for (size_t i = 0; i < count; i++) {
        items[i] = (item){values[i], i};
    }
    qsort(items, count, sizeof *items, by_value);
    double lowest = 0.0;
    for (size_t i = 0; i < count; i++) {
        if (i == 0 || items[i].value > lowest * (1.0 + width)) {
            lowest = items[i].value;
            ++*levels;
        }
        level[items[i].index] = *levels - 1;
    }
    free(items);
    return NW_OK;
}

/* Least specimens and least percent replication for each purpose: ASTM E739-10, sec. 7 (from memory). */
static const struct {
    size_t specimens;
    double replication;
    const char *purpose;
} purposes[] = {
    {12, 75.0, "reliability data"},
    {12, 50.0, "design allowables"},
    {6, 33.0, "research and development"},
    {6, 17.0, "preliminary and exploratory work"},
};

const char *nw_sample_verdict(size_t count, double replication_percent)
{
    for (size_t i = 0; i < sizeof purposes / sizeof purposes[0]; i++) {
        if (count >= purposes[i].specimens && replication_percent >= purposes[i].replication) {
            return purposes[i].purpose;
        }
    }
    return "less than preliminary work";
}
