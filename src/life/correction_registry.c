/* Every mean-stress correction there is, in the order shown. */
#include "life/corrections.h"

#include <string.h>

static const nw_correction *const records[] = {
    &nw_correction_none, &nw_correction_morrow, &nw_correction_manson_halford,
    &nw_correction_swt,  &nw_correction_walker,
};

const nw_correction *nw_correction_at(size_t index)
{
    return index < sizeof records / sizeof records[0] ? records[index] : NULL;
}

const nw_correction *nw_correction_find(const char *key)
{
    const nw_correction *record;
    for (size_t i = 0; (record = nw_correction_at(i)) != NULL; i++) {
        if (strcmp(record->key, key) == 0) {
            return record;
        }
    }
    return NULL;
}
