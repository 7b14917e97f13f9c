#include "history/byte_source.h"

#include "base/text.h"

#include <errno.h>
#include <fcntl.h>
#include <stdlib.h>
#include <string.h>
#include <sys/stat.h>
#include <unistd.h>
#include <zlib.h>

struct nw_byte_source {
    int descriptor; /* plain file, or -1 */
    gzFile compressed;
    size_t head_used, head_count; /* first bytes, read to tell the kind of a plain file */
    char head[2];
    char path[];
};

static nw_status file_fault(const char *path, nw_diagnostics *diagnostics, const char *what,
                            const char *reason)
{
    nw_place place = {.line = 0};
    nw_text_copy(place.file, sizeof place.file, path);
    return nw_fault(diagnostics, NW_FILE, &place, NULL, "cannot be %s: %s", what, reason);
}

/* Reads until `capacity` bytes are there or the file ends; -1 on an error. */
static ssize_t read_fully(int descriptor, char *bytes, size_t capacity)
{
    size_t used = 0;
    while (used < capacity) {
        ssize_t got = read(descriptor, bytes + used, capacity - used);
        if (got < 0 && errno == EINTR) {
            continue;
        }
        if (got < 0) {
            return -1;
        }
        if (got == 0) {
            break;
        }
        used += (size_t)got;
    }
    return (ssize_t)used;
}

static nw_status open_compressed(nw_byte_source *source, nw_diagnostics *diagnostics)
{
    if (lseek(source->descriptor, 0, SEEK_SET) != 0) {
        return file_fault(source->path, diagnostics, "read", "compressed data in a pipe");
    }
    source->compressed = gzdopen(source->descriptor, "rb");
    if (source->compressed != NULL) {
        source->descriptor = -1;
    }
    if (source->compressed == NULL || gzbuffer(source->compressed, 1 << 17) != 0) {
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory opening %s",
                        source->path);
    }
    source->head_count = 0;
    return NW_OK;
}

static nw_status open_source(nw_byte_source *source, nw_diagnostics *diagnostics)
{
    source->descriptor = open(source->path, O_RDONLY | O_CLOEXEC);
    if (source->descriptor < 0) {
        return file_fault(source->path, diagnostics, "opened", strerror(errno));
    }
    ssize_t got = read_fully(source->descriptor, source->head, sizeof source->head);
    if (got < 0) {
        return file_fault(source->path, diagnostics, "read", strerror(errno));
    }
    source->head_count = (size_t)got;
    bool gzip = got == 2 && source->head[0] == '\x1f' && source->head[1] == '\x8b';
    return gzip ? open_compressed(source, diagnostics) : NW_OK;
}

nw_status nw_byte_source_open(const char *path, nw_byte_source **source,
                              nw_diagnostics *diagnostics)
{
    size_t length = strlen(path) + 1;
    nw_byte_source *made = calloc(1, sizeof *made + length);
    *source = NULL;
    if (made == NULL) {
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory opening %s", path);
    }
    made->descriptor = -1;
    memcpy(made->path, path, length);
    nw_status status = open_source(made, diagnostics);
    if (status != NW_OK) {
        nw_byte_source_close(made);
        return status;
    }
    *source = made;
    return NW_OK;
}

static nw_status read_compressed(nw_byte_source *source, char *bytes, size_t capacity,
                                 size_t *count, nw_diagnostics *diagnostics)
{
    unsigned wanted = capacity > 1u << 30 ? 1u << 30 : (unsigned)capacity;
    int got = gzread(source->compressed, bytes, wanted);
    int code = Z_OK;
    const char *reason = gzerror(source->compressed, &code);
    if (code == Z_MEM_ERROR) {
        return nw_fault(diagnostics, NW_MEMORY, NULL, NULL, "out of memory reading %s",
                        source->path);
    }
    if (got < 0 || (code != Z_OK && code != Z_STREAM_END)) {
        return file_fault(source->path, diagnostics, "decompressed",
                          code == Z_BUF_ERROR ? "the file ends early" : reason);
    }
    *count = (size_t)got;
    return NW_OK;
}

nw_status nw_byte_source_read(nw_byte_source *source, char *bytes, size_t capacity, size_t *count,
                              nw_diagnostics *diagnostics)
{
    *count = 0;
    if (source->compressed != NULL) {
        return read_compressed(source, bytes, capacity, count, diagnostics);
    }
    while (source->head_used < source->head_count && *count < capacity) {
        bytes[(*count)++] = source->head[source->head_used++];
    }
    ssize_t got = read_fully(source->descriptor, bytes + *count, capacity - *count);
    if (got < 0) {
        return file_fault(source->path, diagnostics, "read", strerror(errno));
    }
    *count += (size_t)got;
    return NW_OK;
}

uint64_t nw_byte_source_size(const nw_byte_source *source)
{
    struct stat status;
    bool plain = source->descriptor >= 0 && fstat(source->descriptor, &status) == 0 &&
                 S_ISREG(status.st_mode);
    return plain ? (uint64_t)status.st_size : 0;
}

const char *nw_byte_source_path(const nw_byte_source *source)
{
    return source->path;
}

void nw_byte_source_close(nw_byte_source *source)
{
    if (source == NULL) {
        return;
    }
    if (source->compressed != NULL) {
        gzclose_r(source->compressed);
    }
    if (source->descriptor >= 0) {
        close(source->descriptor);
    }
    free(source);
}
