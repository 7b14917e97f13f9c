/* History files read whole, for tests of the readers. */
#ifndef TEST_HISTORIES_H
#define TEST_HISTORIES_H

#include "support/support.h"

/* Samples of a file, or the first fault. */
typedef struct test_samples {
    double *values;
    size_t count;
    char unit[32];
    nw_status status;
    nw_diagnostics diagnostics;
} test_samples;

/* Reads with `batch` samples a call; `column` may be NULL. Free with test_samples_free(). */
test_samples test_history_read(const char *path, const char *column, char decimal, size_t batch);
void test_samples_free(test_samples *samples);

/* The file holds exactly these samples, whatever the batch. */
void test_history_holds(const char *path, const char *column, char decimal, const double *values,
                        size_t count);

/* The file is refused with this status at this place (0: unknown) and with the word in the message. */
void test_history_refused(const char *path, const char *column, char decimal, nw_status status,
                          size_t line, size_t place_column, const char *word);

#endif
