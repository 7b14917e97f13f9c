/* Runs two shell commands in turn, A B A B ..., and prints the medians of their times, the ratio A/B pair by
 * pair, and their largest memory: what the operating system accounts to each finished process.
 *   bench_compare_commands ROUNDS 'COMMAND A' 'COMMAND B' */
#include <fcntl.h>
#include <stdio.h>
#include <stdlib.h>
#include <sys/resource.h>
#include <sys/wait.h>
#include <time.h>
#include <unistd.h>

enum { MOST = 101 };

typedef struct run {
    double wall, cpu;
    long memory_kib;
    int status;
} run;

static double seconds(struct timeval t)
{
    return (double)t.tv_sec + 1e-6 * (double)t.tv_usec;
}

static run measure(const char *command)
{
    struct timespec start, end;
    clock_gettime(CLOCK_MONOTONIC, &start);
    pid_t child = fork();
    if (child == 0) {
        int null = open("/dev/null", O_WRONLY);
        dup2(null, STDOUT_FILENO);
        execl("/bin/sh", "sh", "-c", command, (char *)NULL);
        _exit(127);
    }
    struct rusage usage;
    run result = {0};
    wait4(child, &result.status, 0, &usage);
    clock_gettime(CLOCK_MONOTONIC, &end);
    result.wall =
        (double)(end.tv_sec - start.tv_sec) + 1e-9 * (double)(end.tv_nsec - start.tv_nsec);
    result.cpu = seconds(usage.ru_utime) + seconds(usage.ru_stime);
    result.memory_kib = usage.ru_maxrss;
    return result;
}

static int rising(const void *a, const void *b)
{
    double x = *(const double *)a, y = *(const double *)b;
    return (x > y) - (x < y);
}

static double median(double *values, int count)
{
    qsort(values, (size_t)count, sizeof *values, rising);
    return values[count / 2];
}

int main(int count, char **arguments)
{
    int rounds = count == 4 ? atoi(arguments[1]) : 0;
    if (rounds < 1 || rounds > MOST) {
        fputs("usage: bench_compare_commands ROUNDS 'COMMAND A' 'COMMAND B'\n", stderr);
        return 2;
    }
    double a[MOST], b[MOST], ratio[MOST];
    long memory_a = 0, memory_b = 0;
    for (int i = -1; i < rounds; i++) {
        run one = measure(arguments[2]), other = measure(arguments[3]);
        if (one.status != 0 || other.status != 0) {
            fprintf(stderr, "a command failed\n");
            return 1;
        }
        memory_a = one.memory_kib > memory_a ? one.memory_kib : memory_a;
        memory_b = other.memory_kib > memory_b ? other.memory_kib : memory_b;
        if (i >= 0) {
            a[i] = one.wall;
            b[i] = other.wall;
            ratio[i] = one.wall / other.wall;
        }
    }
    printf("  A %.4f s, %.1f MiB   B %.4f s, %.1f MiB   A/B %.2f (medians of %d)\n",
           median(a, rounds), (double)memory_a / 1024.0, median(b, rounds),
           (double)memory_b / 1024.0, median(ratio, rounds), rounds);
    return 0;
}
