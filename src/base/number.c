#include "base/number.h"

#include <locale.h>
#include <stdbool.h>
#include <stdlib.h>

static bool is_digit(char c)
{
    return c >= '0' && c <= '9';
}

/* End of the longest decimal number at `p`, or NULL. */
static const char *number_end(const char *p, const char *end, char decimal)
{
    if (p < end && (*p == '-' || *p == '+')) {
        p++;
    }
    const char *digits = p;
    while (p < end && is_digit(*p)) {
        p++;
    }
    size_t count = (size_t)(p - digits);
    if (p < end && *p == decimal) {
        const char *part = ++p;
        while (p < end && is_digit(*p)) {
            p++;
        }
        count += (size_t)(p - part);
    }
    if (count == 0) {
        return NULL;
    }
    if (p < end && (*p == 'e' || *p == 'E')) {
        const char *exponent = p + 1;
        if (exponent < end && (*exponent == '-' || *exponent == '+')) {
            exponent++;
        }
        if (exponent < end && is_digit(*exponent)) {
            p = exponent;
            while (p < end && is_digit(*p)) {
                p++;
            }
        }
    }
    return p;
}

enum { LONGEST_NUMBER = 400 };

/* strtod reads the decimal sign of the process's locale, so the number is rewritten with that. */
const char *nw_number_scan(const char *start, const char *end, char decimal, double *value)
{
    const char *stop = number_end(start, end, decimal);
    if (stop == NULL || stop - start >= LONGEST_NUMBER) {
        return NULL;
    }
    char text[LONGEST_NUMBER + 8];
    const char *sign = localeconv()->decimal_point;
    size_t used = 0;
    for (const char *p = start; p < stop; p++) {
        if (*p == decimal) {
            for (const char *s = sign; *s != '\0' && used < LONGEST_NUMBER; s++) {
                text[used++] = *s;
            }
        } else {
            text[used++] = *p;
        }
    }
    text[used] = '\0';
    *value = strtod(text, NULL);
    return stop;
}
