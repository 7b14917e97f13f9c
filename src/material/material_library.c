/* Library materials: one file a material, found by its name. */
#include "base/text.h"
#include "notchwright/library.h"

#include <dirent.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>
#include <unistd.h>

/* "../share/notchwright/materials" seen from the program's own folder, so that an installed tree can be moved;
 * NULL where the system does not tell. */
static const char *folder_beside_program(char *buffer, size_t capacity)
{
    static const char tail[] = "/../share/notchwright/materials";
    ssize_t length = readlink("/proc/self/exe", buffer, capacity - sizeof tail);
    if (length <= 0) {
        return NULL;
    }
    buffer[length] = '\0';
    char *slash = strrchr(buffer, '/');
    if (slash == NULL) {
        return NULL;
    }
    memcpy(slash, tail, sizeof tail);
    return buffer;
}

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
    if (index == 0) {
        const char *beside = folder_beside_program(buffer, capacity);
        return beside != NULL ? beside : NW_INSTALLED_MATERIALS;
    }
    return index == 1 ? NW_INSTALLED_MATERIALS : index == 2 ? NW_SOURCE_MATERIALS : NULL;
}

static bool is_plain_name(const char *name)
{
    return name[0] != '\0' && name[0] != '.' && strchr(name, '/') == NULL && strlen(name) < 90;
}

enum { NAME_LENGTH = 96 };

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

/* ---- everything there is ---- */

static const char *file_name(const char *path)
{
    const char *slash = strrchr(path, '/');
    return slash == NULL ? path : slash + 1;
}

static bool has_name(const nw_library *library, size_t count, const char *name)
{
    for (size_t i = 0; i < count; i++) {
        if (strcmp(file_name(library->paths[i]), name) == 0) {
            return true;
        }
    }
    return false;
}

static nw_status add_path(nw_library *library, const char *folder, const char *name)
{
    size_t size = strlen(folder) + strlen(name) + 2;
    char **paths = realloc(library->paths, (library->count + 1) * sizeof *paths);
    char *path = malloc(size);
    if (paths != NULL) {
        library->paths = paths;
    }
    if (paths == NULL || path == NULL) {
        free(path);
        return NW_MEMORY;
    }
    snprintf(path, size, "%s/%s", folder, name);
    library->paths[library->count++] = path;
    return NW_OK;
}

/* Names that an earlier folder has are hidden by it. */
static nw_status add_folder(nw_library *library, const char *folder)
{
    DIR *entries = opendir(folder);
    if (entries == NULL) {
        return NW_OK;
    }
    size_t earlier = library->count;
    nw_status status = NW_OK;
    const struct dirent *entry;
    while (status == NW_OK && (entry = readdir(entries)) != NULL) {
        if (entry->d_name[0] != '.' && nw_text_ends(entry->d_name, ".yaml") &&
            !has_name(library, earlier, entry->d_name)) {
            status = add_path(library, folder, entry->d_name);
        }
    }
    closedir(entries);
    return status;
}

static int by_name(const void *a, const void *b)
{
    return strcmp(file_name(*(char *const *)a), file_name(*(char *const *)b));
}

nw_status nw_library_list(nw_library *library, nw_diagnostics *diagnostics)
{
    *library = (nw_library){NULL, 0};
    char buffer[1024];
    const char *folder;
    nw_status status = NW_OK;
    for (size_t i = 0; status == NW_OK && (folder = folder_at(i, buffer, sizeof buffer)) != NULL;
         i++) {
        status = add_folder(library, folder);
    }
    if (status != NW_OK) {
        nw_library_clear(library);
        return nw_fault(diagnostics, status, NULL, NULL, "out of memory listing the library");
    }
    if (library->count > 0) {
        qsort(library->paths, library->count, sizeof library->paths[0], by_name);
    }
    return NW_OK;
}

void nw_library_clear(nw_library *library)
{
    for (size_t i = 0; i < library->count; i++) {
        free(library->paths[i]);
    }
    free(library->paths);
    *library = (nw_library){NULL, 0};
}
