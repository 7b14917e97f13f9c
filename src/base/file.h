/* Whole files: read at once, or replaced at once. */
#ifndef NW_BASE_FILE_H
#define NW_BASE_FILE_H

#include "notchwright/status.h"

#include <stdio.h>

/* Reads a whole text of at most `limit` bytes; *text is terminated and freed by the caller.
 * NW_FILE when it cannot be read, NW_INPUT when it is larger, NW_MEMORY. */
nw_status nw_file_read(const char *path, size_t limit, char **text, size_t *length,
                       nw_diagnostics *diagnostics);

/* A file under construction: written beside its destination, put in place only when complete. */
typedef struct nw_whole_file {
    FILE *stream;
    char *path;
    char *temporary;
} nw_whole_file;

/* Opens for writing. Also takes "-" for standard output, which cannot be taken back. */
nw_status nw_whole_file_open(nw_whole_file *file, const char *path, nw_diagnostics *diagnostics);

/* Flushes, checks every error and puts the file in place. On trouble the destination stays as it was. */
nw_status nw_whole_file_commit(nw_whole_file *file, nw_diagnostics *diagnostics);

/* Removes what was written. Harmless after a commit. */
void nw_whole_file_discard(nw_whole_file *file);

#endif
