#include "support/support.h"

#include <sys/wait.h>
#include <unistd.h>

void test_near(const char *what, double found, double expected, double relative, double absolute,
               const char *file, int line)
{
    double allowed = relative * fabs(expected) + absolute;
    if (!(fabs(found - expected) <= allowed)) {
        print_error("%s:%d: %s is %.15g, expected %.15g within %.3g\n", file, line, what, found,
                    expected, allowed);
        _fail(file, line);
    }
}

uint64_t test_random_bits(test_random *random)
{
    uint64_t z = (random->state += 0x9E3779B97F4A7C15u);
    z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9u;
    z = (z ^ (z >> 27)) * 0x94D049BB133111EBu;
    return z ^ (z >> 31);
}

double test_random_between(test_random *random, double low, double high)
{
    return low + (high - low) * (double)(test_random_bits(random) >> 11) * 0x1p-53;
}

int test_random_int(test_random *random, int low, int high)
{
    return low + (int)(test_random_bits(random) % (uint64_t)(high - low + 1));
}

test_scratch test_scratch_create(void)
{
    test_scratch scratch;
    snprintf(scratch.path, sizeof scratch.path, "%s/scratch-XXXXXX", TEST_BUILD_DIR);
    assert_non_null(mkdtemp(scratch.path));
    return scratch;
}

void test_scratch_remove(test_scratch *scratch)
{
    test_result result = test_shell("rm -rf '%s'", scratch->path);
    test_result_free(&result);
}

const char *test_scratch_path(const test_scratch *scratch, const char *name)
{
    static char paths[8][512];
    static unsigned turn;
    char *path = paths[turn++ % 8];
    snprintf(path, sizeof paths[0], "%s/%s", scratch->path, name);
    return path;
}

const char *test_scratch_write(const test_scratch *scratch, const char *name, const void *content,
                               size_t size)
{
    const char *path = test_scratch_path(scratch, name);
    FILE *file = fopen(path, "wb");
    assert_non_null(file);
    assert_int_equal(fwrite(content, 1, size, file), size);
    assert_int_equal(fclose(file), 0);
    return path;
}

const char *test_scratch_text(const test_scratch *scratch, const char *name, const char *text)
{
    return test_scratch_write(scratch, name, text, strlen(text));
}

char *test_read_file(const char *path)
{
    FILE *file = fopen(path, "rb");
    assert_non_null(file);
    size_t capacity = 1 << 16, used = 0, got;
    char *text = malloc(capacity + 1);
    assert_non_null(text);
    while ((got = fread(text + used, 1, capacity - used, file)) > 0) {
        used += got;
        if (used == capacity) {
            capacity *= 2;
            text = realloc(text, capacity + 1);
            assert_non_null(text);
        }
    }
    fclose(file);
    text[used] = '\0';
    return text;
}

test_result test_shell(const char *format, ...)
{
    char command[8192], out[300], err[300], whole[9200];
    va_list arguments;
    va_start(arguments, format);
    int length = vsnprintf(command, sizeof command, format, arguments);
    va_end(arguments);
    assert_in_range(length, 1, (int)sizeof command - 1);
    snprintf(out, sizeof out, "%s/out-%ld", TEST_BUILD_DIR, (long)getpid());
    snprintf(err, sizeof err, "%s/err-%ld", TEST_BUILD_DIR, (long)getpid());
    snprintf(whole, sizeof whole, "NW='%s'; { %s\n} >'%s' 2>'%s' </dev/null", TEST_PROGRAM, command,
             out, err);
    int status = system(whole);
    test_result result = {WIFEXITED(status) ? WEXITSTATUS(status) : -WTERMSIG(status),
                          test_read_file(out), test_read_file(err)};
    unlink(out);
    unlink(err);
    return result;
}

void test_result_free(test_result *result)
{
    free(result->out);
    free(result->err);
    result->out = result->err = NULL;
}
