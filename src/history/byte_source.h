/* Bytes of a file, plain or gzip-compressed; which of the two is told from the first bytes. */
#ifndef NW_HISTORY_BYTE_SOURCE_H
#define NW_HISTORY_BYTE_SOURCE_H

#include "notchwright/status.h"

#include <stdint.h>

typedef struct nw_byte_source nw_byte_source;

nw_status nw_byte_source_open(const char *path, nw_byte_source **source,
                              nw_diagnostics *diagnostics);

/* Reads up to `capacity` bytes; *count is 0 only at the end. */
nw_status nw_byte_source_read(nw_byte_source *source, char *bytes, size_t capacity, size_t *count,
                              nw_diagnostics *diagnostics);

/* Bytes of a plain file; 0 when not known beforehand. */
uint64_t nw_byte_source_size(const nw_byte_source *source);

const char *nw_byte_source_path(const nw_byte_source *source);

void nw_byte_source_close(nw_byte_source *source);

#endif
