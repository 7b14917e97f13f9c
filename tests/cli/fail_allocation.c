/* Preloaded into a program: lets a chosen allocation fail.
 *
 *   FAIL_ALLOCATION=n       the n-th call of malloc, calloc or realloc returns NULL; 0: none does
 *   FAIL_ALLOCATION_ON=1    and so does every later one
 *   FAIL_ALLOCATION_COUNT=FILE  receives the number of calls when the program ends
 *
 * One function is spared: SUNContext_Create of SUNDIALS 6.4 uses what it allocates for its logger without
 * asking whether it got it, which cannot be mended from outside. The program makes sure beforehand that there
 * is memory for it; here it always gets what it asks for, and its allocations are not counted.
 *
 * glibc's own names are called, since looking the next malloc up would itself allocate. */
#define _GNU_SOURCE
#include <dlfcn.h>
#include <errno.h>
#include <fcntl.h>
#include <stdbool.h>
#include <stdio.h>
#include <stdlib.h>
#include <unistd.h>

void *__libc_malloc(size_t size);
void *__libc_calloc(size_t count, size_t size);
void *__libc_realloc(void *block, size_t size);

static unsigned long calls, failing;
static bool fails_on, spared;

__attribute__((constructor)) static void start(void)
{
    const char *wanted = getenv("FAIL_ALLOCATION"), *on = getenv("FAIL_ALLOCATION_ON");
    failing = wanted == NULL ? 0 : strtoul(wanted, NULL, 10);
    fails_on = on != NULL && on[0] == '1';
    calls = 0; /* what the loader did before is not the program's */
}

__attribute__((destructor)) static void finish(void)
{
    const char *path = getenv("FAIL_ALLOCATION_COUNT");
    int file = path == NULL ? -1 : open(path, O_WRONLY | O_CREAT | O_TRUNC, 0600);
    if (file >= 0) {
        char text[32];
        int length = snprintf(text, sizeof text, "%lu\n", calls);
        if (write(file, text, (size_t)length) != length) {
            _exit(98);
        }
        close(file);
    }
}

/* Stands before the library's own function of this name. */
int SUNContext_Create(void *communicator, void *context)
{
    typedef int create(void *, void *);
    spared = true;
    create *own = NULL;
    *(void **)&own = dlsym(RTLD_NEXT, "SUNContext_Create");
    int result = own == NULL ? -1 : own(communicator, context);
    spared = false;
    return result;
}

static bool fails(void)
{
    if (spared) {
        return false;
    }
    unsigned long call = ++calls;
    if (failing == 0 || (fails_on ? call < failing : call != failing)) {
        return false;
    }
    errno = ENOMEM;
    return true;
}

void *malloc(size_t size)
{
    return fails() ? NULL : __libc_malloc(size);
}

void *calloc(size_t count, size_t size)
{
    return fails() ? NULL : __libc_calloc(count, size);
}

void *realloc(void *block, size_t size)
{
    return fails() ? NULL : __libc_realloc(block, size);
}
