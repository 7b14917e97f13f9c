/* Sections of a case or material file, described by tables: one row a key. Reading, unknown keys and the
 * list of keys in help and docs all come from the same rows. */
#ifndef NW_BASE_FIELDS_H
#define NW_BASE_FIELDS_H

#include "base/tree.h"
#include "notchwright/quantity.h"

typedef enum nw_field_kind {
    NW_FIELD_QUANTITY, /* double in the internal unit; NAN when absent */
    NW_FIELD_COUNT,    /* double holding a whole number; NAN when absent */
    NW_FIELD_CHOICE,   /* int: index into choices; untouched when absent */
    NW_FIELD_TEXT,     /* char[size]; untouched when absent */
    NW_FIELD_RANGE,    /* double[2]: [low, high] */
    NW_FIELD_OTHER,    /* known, but read by the owner of the section */
} nw_field_kind;

typedef struct nw_field {
    const char *key;
    nw_field_kind kind;
    nw_dimension dimension;
    size_t offset; /* of the value in the section's struct */
    size_t size;   /* NW_FIELD_TEXT: capacity */
    bool required;
    double low, high;           /* accepted values; low == high: no limits */
    bool low_open, high_open;   /* the limit itself is refused */
    const char *const *choices; /* NW_FIELD_CHOICE, NULL-terminated */
} nw_field;

typedef struct nw_field_reader {
    const nw_default_units *defaults;
    nw_diagnostics *diagnostics;
    nw_status status; /* NW_OK until something is found */
} nw_field_reader;

/* Reads every row (ended by key == NULL) of `map` into `section`, and refuses keys that no row has,
 * naming the nearest. `path` is the key path of the map ("" at the top). `map` may be NULL (absent):
 * then nothing is read and nothing is missed. */
void nw_fields_read(nw_field_reader *reader, const nw_node *map, const char *path,
                    const nw_field *rows, void *section);

/* Adds a fault at the node's value. */
void nw_field_fault(nw_field_reader *reader, const nw_node *node, const char *path, const char *key,
                    const char *format, ...) NW_PRINTF(5, 6);

/* One scalar as a quantity; false (and a fault) when it is not one. */
bool nw_field_quantity(nw_field_reader *reader, const nw_node *node, const char *path,
                       const char *key, nw_dimension dimension, double *value);

/* One scalar as a word of a NULL-terminated list: its index, or -1 and a fault that lists the words and names
 * the nearest. */
int nw_field_word(nw_field_reader *reader, const nw_node *node, const char *path, const char *key,
                  const char *const *words);

/* A fault at the entry `key` unless the format number read from it (NAN: absent) is the one this version reads.
 * `what` is formatted: "case", "material". */
void nw_field_check_format(nw_field_reader *reader, const nw_node *map, const char *key,
                           const char *what, double format);

/* Writes "path.key" (or "key"). */
char *nw_field_path(char *text, size_t capacity, const char *path, const char *key);

/* Index of `word` in a NULL-terminated list, or -1. */
int nw_choice_index(const char *const *choices, const char *word);

#endif
