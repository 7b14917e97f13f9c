/* Faults and cautions: bounded, caller-owned lists that need no memory of their own. */
#include "base/text.h"
#include "notchwright/status.h"

#include <stdarg.h>
#include <stdio.h>
#include <string.h>

void nw_diagnostics_clear(nw_diagnostics *diagnostics)
{
    diagnostics->count = 0;
    diagnostics->omitted = 0;
}

nw_status nw_fault(nw_diagnostics *diagnostics, nw_status status, const nw_place *place,
                   const char *key_path, const char *format, ...)
{
    if (diagnostics == NULL) {
        return status;
    }
    if (diagnostics->count == NW_DIAGNOSTICS_KEPT) {
        diagnostics->omitted++;
        return status;
    }
    nw_diagnostic *item = &diagnostics->items[diagnostics->count++];
    item->status = status;
    if (place != NULL) {
        item->place = *place;
    } else {
        memset(&item->place, 0, sizeof item->place);
    }
    nw_text_copy(item->key_path, sizeof item->key_path, key_path == NULL ? "" : key_path);
    va_list arguments;
    va_start(arguments, format);
    vsnprintf(item->message, sizeof item->message, format, arguments);
    va_end(arguments);
    return status;
}

char *nw_diagnostic_text(const nw_diagnostic *diagnostic, char *text, size_t capacity)
{
    const nw_place *place = &diagnostic->place;
    nw_text_builder out = nw_text_builder_on(text, capacity);
    if (place->file[0] != '\0') {
        nw_text_add(&out, "%s:", place->file);
        if (place->line > 0) {
            nw_text_add(&out, "%zu:", place->line);
        }
        if (place->line > 0 && place->column > 0) {
            nw_text_add(&out, "%zu:", place->column);
        }
        nw_text_add(&out, " ");
    }
    nw_text_add(&out, "error: ");
    if (diagnostic->key_path[0] != '\0') {
        nw_text_add(&out, "%s: ", diagnostic->key_path);
    }
    nw_text_add(&out, "%s", diagnostic->message);
    return text;
}

static bool known_already(const nw_cautions *cautions, const char *code, const char *about)
{
    for (size_t i = 0; i < cautions->count; i++) {
        if (strcmp(cautions->items[i].code, code) == 0 &&
            strcmp(cautions->items[i].about, about) == 0) {
            return true;
        }
    }
    return false;
}

void nw_caution_add(nw_cautions *cautions, const char *code, const char *about, const char *format,
                    ...)
{
    if (cautions->count == NW_CAUTIONS_KEPT || known_already(cautions, code, about)) {
        return;
    }
    nw_caution *item = &cautions->items[cautions->count++];
    item->code = code;
    nw_text_copy(item->about, sizeof item->about, about);
    va_list arguments;
    va_start(arguments, format);
    vsnprintf(item->text, sizeof item->text, format, arguments);
    va_end(arguments);
}
