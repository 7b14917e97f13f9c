/* How far reading is. */
#include "cli/verb.h"

#include <time.h>
#include <unistd.h>

static double seconds_now(void)
{
    struct timespec now;
    clock_gettime(CLOCK_MONOTONIC, &now);
    return (double)now.tv_sec + 1e-9 * (double)now.tv_nsec;
}

nw_cli_progress nw_cli_progress_start(void)
{
    return (nw_cli_progress){seconds_now(), false};
}

void nw_cli_progress_tell(void *data, const char *history, uint64_t samples)
{
    nw_cli_progress *progress = data;
    if (seconds_now() - progress->started > 1.0 && isatty(STDERR_FILENO)) {
        fprintf(stderr, "\rreading %.60s: %.1f million samples", history, 1e-6 * (double)samples);
        progress->shown = true;
    }
}

void nw_cli_progress_end(nw_cli_progress *progress)
{
    if (progress->shown) {
        fprintf(stderr, "\r%*s\r", 100, "");
    }
}
