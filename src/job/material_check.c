/* Material files checked one by one. */
#include "base/text.h"
#include "notchwright/library.h"

#include <math.h>
#include <stdlib.h>
#include <string.h>

static void pass_on(const nw_diagnostics *from, nw_diagnostics *to)
{
    for (size_t i = 0; i < from->count; i++) {
        const nw_diagnostic *d = &from->items[i];
        nw_fault(to, d->status, &d->place, d->key_path, "%s", d->message);
    }
    if (to != NULL) {
        to->omitted += from->omitted;
    }
}

static nw_status keep_faults(nw_material_check *item, const nw_diagnostics *found)
{
    item->faults = malloc((found->count + 1) * sizeof item->faults[0]);
    if (item->faults == NULL) {
        return NW_MEMORY;
    }
    memcpy(item->faults, found->items, found->count * sizeof found->items[0]);
    item->fault_count = found->count;
    item->faults_omitted = found->omitted;
    return NW_OK;
}

static nw_status check_one(const char *name, nw_material_check *item, nw_diagnostics *found)
{
    nw_material_review *review = malloc(sizeof *review);
    if (review == NULL) {
        return NW_MEMORY;
    }
    nw_diagnostics_clear(found);
    *item = (nw_material_check){.name = name};
    item->status = nw_material_review_read(name, NAN, review, found);
    nw_status status = item->status == NW_MEMORY ? NW_MEMORY : NW_OK;
    if (item->status == NW_OK) {
        nw_text_copy(item->material, sizeof item->material, review->material.name);
        item->cautions = review->cautions;
    } else if (status == NW_OK) {
        status = keep_faults(item, found);
    }
    free(review);
    return status;
}

nw_status nw_material_checks_run(const char *const *names, size_t count, nw_material_checks *checks,
                                 nw_diagnostics *diagnostics)
{
    *checks = (nw_material_checks){NULL, 0, 0};
    checks->items = calloc(count + 1, sizeof checks->items[0]);
    nw_diagnostics *found = malloc(sizeof *found);
    nw_status status = checks->items == NULL || found == NULL ? NW_MEMORY : NW_OK;
    for (size_t i = 0; i < count && status == NW_OK; i++) {
        status = check_one(names[i], &checks->items[i], found);
        checks->count++;
        checks->refused += checks->items[i].status != NW_OK;
        pass_on(found, diagnostics);
    }
    free(found);
    if (status != NW_OK) {
        nw_material_checks_clear(checks);
        return nw_fault(diagnostics, status, NULL, NULL, "out of memory checking materials");
    }
    return NW_OK;
}

void nw_material_checks_clear(nw_material_checks *checks)
{
    for (size_t i = 0; i < checks->count; i++) {
        free(checks->items[i].faults);
    }
    free(checks->items);
    *checks = (nw_material_checks){NULL, 0, 0};
}
