/* Text without surprises: bounded building and copying, and the nearest of a list of words. */
#ifndef NW_BASE_TEXT_H
#define NW_BASE_TEXT_H

#include "notchwright/status.h"

typedef struct nw_text_builder {
    char *text;
    size_t capacity;
    size_t length;
} nw_text_builder;

/* A builder on a caller's array of `capacity` > 0 characters; the text is always terminated. */
nw_text_builder nw_text_builder_on(char *text, size_t capacity);

/* Appends; what does not fit is cut off. */
void nw_text_add(nw_text_builder *builder, const char *format, ...) NW_PRINTF(2, 3);

/* Copies at most capacity - 1 characters and terminates. */
void nw_text_copy(char *to, size_t capacity, const char *from);

/* A copy on the heap, or NULL when memory ran out. */
char *nw_text_duplicate(const char *text);

/* The candidate (NULL-terminated list) closest to `word` by edit distance, or NULL when none is close
 * enough to be what a typist meant. */
const char *nw_text_nearest(const char *word, const char *const *candidates);

/* "a, b or c" of a NULL-terminated list. */
char *nw_text_join(char *text, size_t capacity, const char *const *words);

/* True when `text` ends in `ending`. */
bool nw_text_ends(const char *text, const char *ending);

/* Joins the folder of `file` with `name` unless `name` is absolute; NULL when memory ran out. */
char *nw_text_beside(const char *file, const char *name);

#endif
