/* What tests share: includes in the order cmocka wants, reproducible random numbers, scratch files, and
 * running the program as a user does. */
#ifndef TEST_SUPPORT_H
#define TEST_SUPPORT_H

/* clang-format off */
#include <stdarg.h>
#include <stddef.h>
#include <setjmp.h>
#include <stdint.h>
#include <cmocka.h>
/* clang-format on */

#include "notchwright/notchwright.h"

#include <math.h>
#include <stdbool.h>
#include <stdio.h>
#include <stdlib.h>
#include <string.h>

/* Fails unless |found - expected| <= relative |expected| + absolute. */
#define assert_near(found, expected, relative, absolute) \
    test_near(#found, (found), (expected), (relative), (absolute), __FILE__, __LINE__)
void test_near(const char *what, double found, double expected, double relative, double absolute,
               const char *file, int line);

/* A small reproducible generator (splitmix64). */
typedef struct test_random {
    uint64_t state;
} test_random;
uint64_t test_random_bits(test_random *random);
double test_random_between(test_random *random, double low, double high);
int test_random_int(test_random *random, int low, int high); /* both included */

/* A scratch folder of its own, removed with its files by test_scratch_remove(). */
typedef struct test_scratch {
    char path[256];
} test_scratch;
test_scratch test_scratch_create(void);
void test_scratch_remove(test_scratch *scratch);
/* Writes a file into it; returns its path in a static buffer of eight that rotate. */
const char *test_scratch_write(const test_scratch *scratch, const char *name, const void *content,
                               size_t size);
const char *test_scratch_text(const test_scratch *scratch, const char *name, const char *text);
const char *test_scratch_path(const test_scratch *scratch, const char *name);

/* What a command did. Free with test_result_free(). */
typedef struct test_result {
    int status; /* exit status, or -signal */
    char *out, *err;
} test_result;
/* Runs a shell command line; "$NW" in it is the program. */
test_result test_shell(const char *format, ...) __attribute__((format(printf, 1, 2)));
void test_result_free(test_result *result);

/* A whole file as text; free it. */
char *test_read_file(const char *path);

#endif
