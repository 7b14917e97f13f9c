#include "base/file.h"

#include "base/text.h"

#include <errno.h>
#include <fcntl.h>
#include <stdlib.h>
#include <string.h>
#include <sys/stat.h>
#include <unistd.h>

static nw_status path_fault(nw_diagnostics *diagnostics, const char *path, const char *what)
{
    const char *reason = errno == 0 ? "an earlier write failed" : strerror(errno);
    nw_place place = {.line = 0};
    nw_text_copy(place.file, sizeof place.file, path);
    return nw_fault(diagnostics, NW_FILE, &place, NULL, "cannot be %s: %s", what, reason);
}

static nw_status read_stream(FILE *stream, const char *path, size_t limit, char **text,
                             size_t *length, nw_diagnostics *diagnostics)
{
    size_t capacity = 1 << 14, used = 0;
    char *buffer = malloc(capacity + 1);
    while (buffer != NULL) {
        used += fread(buffer + used, 1, capacity - used, stream);
        if (used < capacity || used > limit) {
            break;
        }
        capacity *= 2;
        char *larger = realloc(buffer, capacity + 1);
        if (larger == NULL) {
            free(buffer);
        }
        buffer = larger;
    }
    if (buffer == NULL) {
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory reading %s", path);
    }
    if (ferror(stream)) {
        free(buffer);
        return path_fault(diagnostics, path, "read");
    }
    if (used > limit) {
        free(buffer);
        nw_place place = {.line = 0};
        nw_text_copy(place.file, sizeof place.file, path);
        return nw_fault(diagnostics, NW_INPUT, &place, NULL,
                        "found more than %zu bytes, expected at most that", limit);
    }
    buffer[used] = '\0';
    *text = buffer;
    *length = used;
    return NW_OK;
}

nw_status nw_file_read(const char *path, size_t limit, char **text, size_t *length,
                       nw_diagnostics *diagnostics)
{
    FILE *stream = fopen(path, "rb");
    if (stream == NULL) {
        return errno == ENOMEM
                   ? nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory opening %s", path)
                   : path_fault(diagnostics, path, "opened");
    }
    nw_status status = read_stream(stream, path, limit, text, length, diagnostics);
    fclose(stream);
    return status;
}

/* A name of its own beside the destination; created with the permissions a new file would have. */
static FILE *open_temporary(nw_whole_file *file)
{
    size_t stem = strlen(file->path);
    int descriptor = -1;
    for (int attempt = 0; attempt < 100 && descriptor < 0; attempt++) {
        sprintf(file->temporary + stem, ".part-%ld-%d", (long)getpid(), attempt);
        descriptor = open(file->temporary, O_WRONLY | O_CREAT | O_EXCL | O_CLOEXEC, 0666);
        if (descriptor < 0 && errno != EEXIST) {
            return NULL;
        }
    }
    struct stat present;
    if (descriptor >= 0 && stat(file->path, &present) == 0) {
        (void)!fchmod(descriptor, present.st_mode & 07777); /* as the file it replaces */
    }
    FILE *stream = descriptor < 0 ? NULL : fdopen(descriptor, "wb");
    if (stream == NULL && descriptor >= 0) {
        int trouble = errno;
        close(descriptor);
        unlink(file->temporary);
        errno = trouble;
    }
    return stream;
}

/* The file behind a link is the one to replace. Returns a copy that the caller frees, or NULL. */
static char *destination_of(const char *path)
{
    char *resolved = realpath(path, NULL);
    return resolved != NULL ? resolved : errno == ENOMEM ? NULL : nw_text_duplicate(path);
}

/* Devices and pipes are written to directly: they cannot be replaced by renaming. */
static bool is_special(const char *path)
{
    struct stat status;
    return stat(path, &status) == 0 && !S_ISREG(status.st_mode);
}

nw_status nw_whole_file_open(nw_whole_file *file, const char *path, nw_diagnostics *diagnostics)
{
    *file = (nw_whole_file){NULL, NULL, NULL};
    if (strcmp(path, "-") == 0) {
        file->stream = stdout;
        return NW_OK;
    }
    file->path = destination_of(path);
    file->temporary = file->path == NULL ? NULL : malloc(strlen(file->path) + 40);
    if (file->path == NULL || file->temporary == NULL) {
        nw_whole_file_discard(file);
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory opening %s", path);
    }
    if (is_special(path)) {
        free(file->temporary);
        file->temporary = NULL;
        file->stream = fopen(path, "wb");
    } else {
        strcpy(file->temporary, file->path);
        file->stream = open_temporary(file);
    }
    if (file->stream == NULL) {
        nw_status status = path_fault(diagnostics, path, "written");
        free(file->temporary);
        file->temporary = NULL;
        nw_whole_file_discard(file);
        return status;
    }
    return NW_OK;
}

nw_status nw_whole_file_commit(nw_whole_file *file, nw_diagnostics *diagnostics)
{
    const char *path = file->path == NULL ? "standard output" : file->path;
    errno = 0;
    bool failed = ferror(file->stream) != 0;
    failed = fflush(file->stream) != 0 || failed; /* also tells why an earlier write failed */
    if (!failed && file->temporary != NULL) {
        failed = fsync(fileno(file->stream)) != 0;
    }
    if (file->path != NULL) {
        int trouble = errno;
        failed = fclose(file->stream) != 0 || failed;
        errno = trouble != 0 ? trouble : errno;
        file->stream = NULL;
    }
    if (!failed && file->temporary != NULL) {
        failed = rename(file->temporary, file->path) != 0;
    }
    nw_status status = failed ? path_fault(diagnostics, path, "written") : NW_OK;
    if (!failed) {
        free(file->temporary);
        file->temporary = NULL;
    }
    nw_whole_file_discard(file);
    return status;
}

void nw_whole_file_discard(nw_whole_file *file)
{
    if (file->stream != NULL && file->path != NULL) {
        fclose(file->stream);
    }
    if (file->temporary != NULL) {
        unlink(file->temporary);
    }
    free(file->temporary);
    free(file->path);
    *file = (nw_whole_file){NULL, NULL, NULL};
}
