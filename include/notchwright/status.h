/* notchwright - strain-life notch analysis. GPL-3.0-or-later.
 *
 * Status codes and diagnostics: the one channel by which the library reports that something went
 * wrong. The library never prints and never exits.
 */
#ifndef NOTCHWRIGHT_STATUS_H
#define NOTCHWRIGHT_STATUS_H

#include <stdbool.h>
#include <stddef.h>

#if defined(__GNUC__)
#define NW_API __attribute__((visibility("default")))
#define NW_PRINTF(format_index, first) __attribute__((format(printf, format_index, first)))
#else
#define NW_API
#define NW_PRINTF(format_index, first)
#endif

#ifdef __cplusplus
extern "C" {
#endif

/* X(code, exit status of the program, text) */
#define NW_STATUS_LIST(X)                          \
    X(NW_OK, 0, "done")                            \
    X(NW_BELOW_TARGET, 1, "life below the target") \
    X(NW_USAGE, 2, "wrong usage")                  \
    X(NW_INPUT, 3, "input refused")                \
    X(NW_COMPUTE, 4, "could not be computed")      \
    X(NW_FILE, 5, "file trouble")                  \
    X(NW_MEMORY, 5, "out of memory")

typedef enum nw_status {
#define NW_STATUS_ENUM(code, exit_status, text) code,
    NW_STATUS_LIST(NW_STATUS_ENUM)
#undef NW_STATUS_ENUM
} nw_status;

/* Short text of a status; never NULL. */
NW_API const char *nw_status_text(nw_status status);

/* Exit status of the program for a status (0 to 5). */
NW_API int nw_status_exit(nw_status status);

/* Where something was found. `file` may be "" (no place); line and column count from 1, 0 = unknown. */
typedef struct nw_place {
    char file[256];
    size_t line;
    size_t column;
} nw_place;

/* One fault: what, where (place and key path such as "notch.kt"), found, expected. */
typedef struct nw_diagnostic {
    nw_status status;
    nw_place place;
    char key_path[128]; /* "" where there is none */
    char message[512];
} nw_diagnostic;

enum { NW_DIAGNOSTICS_KEPT = 40 };

/* Caller-owned list of faults. It holds no memory of its own, so it also works when memory ran out.
 * Start it with nw_diagnostics_clear(). Faults past NW_DIAGNOSTICS_KEPT are counted in `omitted`.
 * Every function of the library that takes one accepts NULL (then only the status comes back). */
typedef struct nw_diagnostics {
    size_t count;
    size_t omitted;
    nw_diagnostic items[NW_DIAGNOSTICS_KEPT];
} nw_diagnostics;

/* Empties the list. */
NW_API void nw_diagnostics_clear(nw_diagnostics *diagnostics);

/* Adds a fault and returns `status`, so that a caller can write `return nw_fault(...)`.
 *   diagnostics  may be NULL
 *   place        may be NULL (no place)
 *   key_path     may be NULL
 *   format       printf-like message: what, found, expected */
NW_API nw_status nw_fault(nw_diagnostics *diagnostics, nw_status status, const nw_place *place,
                          const char *key_path, const char *format, ...) NW_PRINTF(5, 6);

/* Writes "FILE:LINE:COLUMN: error: KEY.PATH: message" into `text` (always terminated); parts that do
 * not exist are left out. Returns `text`. */
NW_API char *nw_diagnostic_text(const nw_diagnostic *diagnostic, char *text, size_t capacity);

/* A caution qualifies a number of the result: a stable code, a text, and the place in the result it
 * belongs to (the JSON key path of the number, for example "life_blocks"). */
typedef struct nw_caution {
    const char *code; /* static string, snake_case */
    char about[48];   /* number it qualifies */
    char text[400];
} nw_caution;

enum { NW_CAUTIONS_KEPT = 40 };

typedef struct nw_cautions {
    size_t count;
    nw_caution items[NW_CAUTIONS_KEPT];
} nw_cautions;

/* Adds a caution; a code that is there already for the same number is kept once.
 *   code    static string
 *   about   key path of the number it qualifies
 *   format  printf-like text */
NW_API void nw_caution_add(nw_cautions *cautions, const char *code, const char *about,
                           const char *format, ...) NW_PRINTF(4, 5);

#ifdef __cplusplus
}
#endif
#endif
