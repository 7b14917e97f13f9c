#include "base/text.h"

#include <stdarg.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

nw_text_builder nw_text_builder_on(char *text, size_t capacity)
{
    text[0] = '\0';
    return (nw_text_builder){text, capacity, 0};
}

void nw_text_add(nw_text_builder *builder, const char *format, ...)
{
    va_list arguments;
    va_start(arguments, format);
    size_t room = builder->capacity - builder->length;
    int wanted = vsnprintf(builder->text + builder->length, room, format, arguments);
    va_end(arguments);
    if (wanted > 0) {
        builder->length += (size_t)wanted < room ? (size_t)wanted : room - 1;
    }
}

void nw_text_copy(char *to, size_t capacity, const char *from)
{
    size_t length = strlen(from);
    if (length >= capacity) {
        length = capacity - 1;
    }
    memcpy(to, from, length);
    to[length] = '\0';
}

char *nw_text_duplicate(const char *text)
{
    size_t size = strlen(text) + 1;
    char *copy = malloc(size);
    if (copy != NULL) {
        memcpy(copy, text, size);
    }
    return copy;
}

enum { LONGEST_WORD = 64 };

/* Edit distance that counts a swap of neighbours as one step. */
static size_t edit_distance(const char *a, const char *b)
{
    size_t n = strlen(a), m = strlen(b);
    if (n >= LONGEST_WORD || m >= LONGEST_WORD) {
        return SIZE_MAX;
    }
    size_t rows[3][LONGEST_WORD];
    for (size_t j = 0; j <= m; j++) {
        rows[0][j] = j;
    }
    for (size_t i = 1; i <= n; i++) {
        size_t *row = rows[i % 3], *above = rows[(i + 2) % 3], *above2 = rows[(i + 1) % 3];
        row[0] = i;
        for (size_t j = 1; j <= m; j++) {
            size_t best = above[j - 1] + (a[i - 1] != b[j - 1]);
            if (above[j] + 1 < best) {
                best = above[j] + 1;
            }
            if (row[j - 1] + 1 < best) {
                best = row[j - 1] + 1;
            }
            bool swapped = i > 1 && j > 1 && a[i - 1] == b[j - 2] && a[i - 2] == b[j - 1];
            if (swapped && above2[j - 2] + 1 < best) {
                best = above2[j - 2] + 1;
            }
            row[j] = best;
        }
    }
    return rows[n % 3][m];
}

const char *nw_text_nearest(const char *word, const char *const *candidates)
{
    const char *nearest = NULL;
    size_t limit = strlen(word) / 3 + 1;
    for (; *candidates != NULL; candidates++) {
        size_t distance = edit_distance(word, *candidates);
        if (distance <= limit) {
            nearest = *candidates;
            limit = distance > 0 ? distance - 1 : 0;
            if (distance == 0) {
                break;
            }
        }
    }
    return nearest;
}

char *nw_text_join(char *text, size_t capacity, const char *const *words)
{
    nw_text_builder out = nw_text_builder_on(text, capacity);
    for (size_t i = 0; words[i] != NULL; i++) {
        const char *before = i == 0 ? "" : words[i + 1] == NULL ? " or " : ", ";
        nw_text_add(&out, "%s%s", before, words[i]);
    }
    return text;
}

bool nw_text_ends(const char *text, const char *ending)
{
    size_t length = strlen(text), tail = strlen(ending);
    return length >= tail && strcmp(text + length - tail, ending) == 0;
}

char *nw_text_beside(const char *file, const char *name)
{
    const char *slash = strrchr(file, '/');
    if (name[0] == '/' || slash == NULL) {
        return nw_text_duplicate(name);
    }
    size_t folder = (size_t)(slash - file) + 1, tail = strlen(name) + 1;
    char *path = malloc(folder + tail);
    if (path != NULL) {
        memcpy(path, file, folder);
        memcpy(path + folder, name, tail);
    }
    return path;
}
