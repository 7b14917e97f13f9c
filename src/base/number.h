/* Text to double, correctly rounded. Short numbers, as loggers write them, take an exact fast path:
 * an integer below 2^53 divided by a power of ten up to 10^22 is rounded once (Clinger 1990). */
#ifndef NW_BASE_NUMBER_H
#define NW_BASE_NUMBER_H

#include <stdint.h>
#include <string.h>

/* Bytes that nw_number_scan_padded() may read past the end of the text. */
enum { NW_NUMBER_PADDING = 32 };

/* Reads one number at `start`.
 *   end      end of the text; *end must be readable and must not continue a number
 *   decimal  '.' or ','
 *   value    result; an overflow gives an infinity, which the caller refuses
 * Returns the place after the number, or NULL when there is none at `start`. Words such as "nan" and
 * "inf" are no numbers. */
const char *nw_number_scan(const char *start, const char *end, char decimal, double *value);

/* Digits at `p`, at most eight, taken eight bytes at a time; `*length` receives how many. */
static inline uint32_t nw_digits_of_eight(const char *p, unsigned *length)
{
    uint64_t word;
    memcpy(&word, p, sizeof word);
#if defined(__BYTE_ORDER__) && __BYTE_ORDER__ == __ORDER_BIG_ENDIAN__
    word = __builtin_bswap64(word);
#endif
    uint64_t digits = word ^ 0x3030303030303030u;
    uint64_t other = ((digits + 0x7676767676767676u) | digits) & 0x8080808080808080u;
    unsigned n = other == 0 ? 8 : (unsigned)__builtin_ctzll(other) >> 3;
    *length = n;
    digits = n == 0 ? 0 : digits << (64 - 8 * n);
    digits = digits * 10 + (digits >> 8);
    uint64_t low = (digits & 0x000000FF000000FFu) * 0x000F424000000064u;
    uint64_t high = ((digits >> 16) & 0x000000FF000000FFu) * 0x0000271000000001u;
    return (uint32_t)((low + high) >> 32);
}

static const double nw_power_of_ten[8] = {1e0, 1e1, 1e2, 1e3, 1e4, 1e5, 1e6, 1e7};

/* The same for text with NW_NUMBER_PADDING readable bytes after `end`: seven digits at most on either
 * side of the point go straight through, everything else to nw_number_scan(). */
static inline const char *nw_number_scan_padded(const char *start, const char *end, char decimal,
                                                double *value)
{
    const char *p = start;
    int negative = *p == '-';
    p += negative;
    unsigned whole_length, part_length = 0;
    uint32_t whole = nw_digits_of_eight(p, &whole_length);
    uint32_t part = 0;
    p += whole_length;
    if (*p == decimal) {
        p++;
        part = nw_digits_of_eight(p, &part_length);
        p += part_length;
    }
    int unusual = whole_length == 8 || part_length == 8 || whole_length + part_length == 0 ||
                  (*p | 0x20) == 'e' || p > end || (whole_length == 0 && *start == '+');
    if (unusual) {
        return nw_number_scan(start, end, decimal, value);
    }
    double power = nw_power_of_ten[part_length];
    double number = (whole * power + part) / power;
    *value = negative ? -number : number;
    return p;
}

#endif
