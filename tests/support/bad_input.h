/* Wrong inputs as a table: a good base case, one thing wrong in each row, and what the program must say.
 *
 * '@' in a case text, a replacement or a companion file marks the place that the program must name. It is
 * taken out before the file is written, and FILE:LINE:COLUMN of the mark must stand before the message. */
#ifndef TEST_BAD_INPUT_H
#define TEST_BAD_INPUT_H

#include "support/support.h"

typedef struct bad_input {
    const char *name;
    const char *from, *to; /* piece of the base case and what stands there instead */
    const char *text;      /* or a whole case file */
    const char *options;   /* after "assess CASE" */
    const char *file; /* companion file; the history of the case where from and text are NULL */
    const char *content;
    size_t size; /* of content; 0 : a text */
    int status;
    const char *message;   /* after the place, where there is a mark */
    const char *message_2; /* another piece, or NULL */
} bad_input;

/* Every row but those that say otherwise is refused with this status. */
enum { BAD_INPUT_REFUSED = 3 };

/* The good case that rows change. */
extern const char bad_input_base[];

/* Turns rows into tests, one a row under the row's name. */
void bad_input_tests(const bad_input *rows, size_t count, struct CMUnitTest *tests);

/* Fails unless the base case, unchanged, is assessed without complaint. */
void bad_input_base_is_good(void **state);

/* A copy of `text` with the only occurrence of `from` replaced; free it. */
char *bad_input_replace(const char *text, const char *from, const char *to);

/* The base case in a scratch folder of its own: a cmocka fixture, *state being a bench. */
typedef struct bench {
    test_scratch scratch;
    char path[512];
} bench;
int bench_set_up(void **state);
int bench_tear_down(void **state);

#endif
