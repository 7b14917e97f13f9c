/* Writes an invented load history: `samples` values of which one in `spacing` is a reversal; every reversal
 * has its own value, so that no branch predictor learns the history.
 *   bench_make_history SAMPLES SPACING FILE.csv|FILE.npy */
#include "base/text.h"

#include <inttypes.h>
#include <math.h>
#include <stdint.h>
#include <stdio.h>
#include <stdlib.h>

static double uniform(uint64_t *state)
{
    uint64_t z = (*state += 0x9E3779B97F4A7C15u);
    z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9u;
    z = (z ^ (z >> 27)) * 0x94D049BB133111EBu;
    return (double)((z ^ (z >> 31)) >> 11) * 0x1p-53;
}

/* Reversals alternate about a slow wave: many small loops inside large ones, with rare peaks. */
static double reversal(uint64_t *state, uint64_t number)
{
    double wave = 60.0 * sin(1e-4 * (double)number) + 35.0 * sin(3.1e-3 * (double)number);
    double size = -20.0 * log(1.0 - uniform(state));
    return wave + (number % 2 == 0 ? size : -size);
}

static void write_npy_header(FILE *to, uint64_t samples)
{
    char header[128];
    int length =
        snprintf(header, sizeof header,
                 "{'descr': '<f8', 'fortran_order': False, 'shape': (%" PRIu64 ",), }", samples);
    for (; (10 + length + 1) % 64 != 0; length++) {
        header[length] = ' ';
    }
    header[length++] = '\n';
    fputs("\x93NUMPY\x01", to);
    fputc(0, to);
    fputc(length & 0xFF, to);
    fputc(length >> 8, to);
    fwrite(header, 1, (size_t)length, to);
}

int main(int count, char **arguments)
{
    if (count != 4) {
        fputs("usage: bench_make_history SAMPLES SPACING FILE.csv|FILE.npy\n", stderr);
        return 2;
    }
    uint64_t samples = strtoull(arguments[1], NULL, 10);
    uint64_t spacing = strtoull(arguments[2], NULL, 10), state = 1;
    bool binary = nw_text_ends(arguments[3], ".npy");
    FILE *to = fopen(arguments[3], "wb");
    if (to == NULL || spacing == 0) {
        return 1;
    }
    if (binary) {
        write_npy_header(to, samples);
    }
    double from = reversal(&state, 0), next = reversal(&state, 1);
    for (uint64_t i = 0; i < samples; i++) {
        uint64_t step = i % spacing;
        if (i > 0 && step == 0) {
            from = next;
            next = reversal(&state, i / spacing + 1);
        }
        double value = from + (next - from) * (double)step / (double)spacing;
        if (binary) {
            fwrite(&value, sizeof value, 1, to);
        } else {
            fprintf(to, "%.3f\n", value);
        }
    }
    return fclose(to) != 0;
}
