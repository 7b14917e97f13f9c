/* Library materials: one file a material, found by its name. */
#include "base/text.h"
#include "notchwright/material.h"

#include <dirent.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

/* Folders to look in, in order; the build sets the last two. */
static const char *folder_at(size_t index, char *buffer, size_t capacity)
{
    const char *list = getenv("NOTCHWRIGHT_MATERIALS");
    while (list != NULL && *list != '\0') {
        size_t length = strcspn(list, ":");
        if (length > 0 && index-- == 0) {
            snprintf(buffer, capacity, "%.*s", (int)length, list);
            return buffer;
        }
        list += length + (list[length] == ':');
    }
    return index == 0 ? NW_INSTALLED_MATERIALS : index == 1 ? NW_SOURCE_MATERIALS : NULL;
}

static bool is_plain_name(const char *name)
{
    return name[0] != '\0' && name[0] != '.' && strchr(name, '/') == NULL && strlen(name) < 90;
}

enum { MOST_NAMES = 400, NAME_LENGTH = 96 };

/* Remembers the library name closest to `name`. */
static void note_nearest(const char *folder, const char *name, char nearest[NAME_LENGTH])
{
    DIR *entries = opendir(folder);
    if (entries == NULL) {
        return;
    }
    const struct dirent *entry;
    while ((entry = readdir(entries)) != NULL) {
        char candidate[NAME_LENGTH];
        if (!nw_text_ends(entry->d_name, ".yaml") || strlen(entry->d_name) >= NAME_LENGTH) {
            continue;
        }
        nw_text_copy(candidate, strlen(entry->d_name) - 4, entry->d_name);
        const char *pair[] = {candidate, nearest[0] == '\0' ? NULL : nearest, NULL};
        const char *best = nw_text_nearest(name, pair);
        if (best == candidate) {
            nw_text_copy(nearest, NAME_LENGTH, candidate);
        }
    }
    closedir(entries);
}

nw_status nw_material_find(const char *name, char *path, size_t capacity,
                           nw_diagnostics *diagnostics)
{
    char buffer[1024], nearest[NAME_LENGTH] = "";
    const char *folder;
    for (size_t i = 0; (folder = folder_at(i, buffer, sizeof buffer)) != NULL; i++) {
        if (!is_plain_name(name)) {
            break;
        }
        int length = snprintf(path, capacity, "%s/%s.yaml", folder, name);
        if (length > 0 && (size_t)length < capacity && access(path, F_OK) == 0) {
            return NW_OK;
        }
        note_nearest(folder, name, nearest);
    }
    return nw_fault(diagnostics, NW_INPUT, NULL, "material",
                    "no library material '%.90s'%s%s%s; expected a library name or the path of a "
                    "material file",
                    name, nearest[0] == '\0' ? "" : " (did you mean '", nearest,
                    nearest[0] == '\0' ? "" : "'?)");
}
