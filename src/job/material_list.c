/* The library as a list, filtered. */
#include "base/text.h"
#include "notchwright/library.h"

#include <math.h>
#include <stdlib.h>

static bool passes(const nw_material_filter *filter, const nw_material *m)
{
    double su = m->ultimate_strength_mpa;
    return (filter->group == NW_GROUP_UNSTATED || filter->group == m->group) &&
           (isnan(filter->strength_low_mpa) || su >= filter->strength_low_mpa) &&
           (isnan(filter->strength_high_mpa) || su <= filter->strength_high_mpa);
}

/* A file that cannot be used is named, not hidden. */
static void note_refused(nw_material_list *list, const nw_diagnostics *faults)
{
    char text[1200];
    nw_caution_add(&list->cautions, "material_refused", "materials", "left out: %s",
                   faults->count == 0 ? "out of memory"
                                      : nw_diagnostic_text(&faults->items[0], text, sizeof text));
}

nw_status nw_material_list_read(const nw_material_filter *filter, nw_material_list *list,
                                nw_diagnostics *diagnostics)
{
    *list = (nw_material_list){.materials = NULL};
    nw_library library;
    nw_status status = nw_library_list(&library, diagnostics);
    if (status != NW_OK) {
        return status;
    }
    list->materials = malloc((library.count + 1) * sizeof list->materials[0]);
    nw_diagnostics *faults = malloc(sizeof *faults);
    if (list->materials == NULL || faults == NULL) {
        status = nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory listing the library");
    }
    for (size_t i = 0; i < library.count && status == NW_OK; i++) {
        nw_material material;
        nw_diagnostics_clear(faults);
        if (nw_material_read(library.paths[i], &material, faults) != NW_OK) {
            note_refused(list, faults);
            continue;
        }
        list->total++;
        if (passes(filter, &material)) {
            list->materials[list->count++] = material;
        }
    }
    free(faults);
    nw_library_clear(&library);
    if (status != NW_OK) {
        nw_material_list_clear(list);
    }
    return status;
}

void nw_material_list_clear(nw_material_list *list)
{
    free(list->materials);
    list->materials = NULL;
    list->count = 0;
}
