#include "base/text_layout.h"

#include <ctype.h>
#include <string.h>
#include <strings.h>

static bool is_blank(char c)
{
    return c == ' ' || c == '\t';
}

const char *nw_text_content_end(const char *line, const char *end)
{
    const char *comment = memchr(line, '#', (size_t)(end - line));
    if (comment != NULL) {
        end = comment;
    }
    while (end > line && (is_blank(end[-1]) || end[-1] == '\r' || end[-1] == '\n')) {
        end--;
    }
    return end;
}

static nw_text_field trimmed(const char *start, const char *end)
{
    while (start < end && is_blank(*start)) {
        start++;
    }
    while (end > start && is_blank(end[-1])) {
        end--;
    }
    if (end - start >= 2 && *start == '"' && end[-1] == '"') {
        return trimmed(start + 1, end - 1);
    }
    return (nw_text_field){start, end};
}

/* End of the field at `p`: the delimiter outside quotes, or the end of the line. */
static const char *field_end(const nw_text_layout *layout, const char *p, const char *end)
{
    bool quoted = false;
    for (; p < end; p++) {
        if (*p == '"') {
            quoted = !quoted;
        } else if (!quoted &&
                   (*p == layout->delimiter || (layout->delimiter == NW_BLANKS && *p == '\t'))) {
            break;
        }
    }
    return p;
}

bool nw_text_next_field(const nw_text_layout *layout, const char **at, const char *end,
                        nw_text_field *field)
{
    if (*at == NULL || *at > end) {
        return false;
    }
    const char *start = *at;
    if (layout->delimiter == NW_SINGLE) {
        *field = trimmed(start, end);
        *at = NULL;
        return true;
    }
    if (layout->delimiter == NW_BLANKS) {
        while (start < end && is_blank(*start)) {
            start++;
        }
        if (start == end) {
            return false;
        }
    }
    const char *stop = field_end(layout, start, end);
    *field = trimmed(start, stop);
    *at = stop < end ? stop + 1 : NULL;
    return true;
}

size_t nw_text_count_fields(const nw_text_layout *layout, const char *line, const char *end)
{
    size_t count = 0;
    nw_text_field field;
    while (nw_text_next_field(layout, &line, end, &field)) {
        count++;
    }
    return count;
}

char nw_text_delimiter_of(const char *line, const char *end, char decimal)
{
    size_t length = (size_t)(end - line);
    if (memchr(line, '\t', length) != NULL) {
        return '\t';
    }
    if (memchr(line, ';', length) != NULL) {
        return ';';
    }
    if (decimal != ',' && memchr(line, ',', length) != NULL) {
        return ',';
    }
    nw_text_field whole = trimmed(line, end);
    size_t inner = (size_t)(whole.end - whole.start);
    return memchr(whole.start, ' ', inner) != NULL ? NW_BLANKS : NW_SINGLE;
}

/* Letters other than the exponent's. */
static size_t count_letters(const char *p, const char *end)
{
    size_t letters = 0;
    for (; p < end; p++) {
        unsigned char c = (unsigned char)*p;
        letters += c >= 0x80 || (isalpha(c) && c != 'e' && c != 'E');
    }
    return letters;
}

/* "2nd gauge" is a name; "12.5x" is a number gone wrong and must not pass for a header. */
bool nw_text_looks_numeric(nw_text_field field)
{
    const char *p = field.start;
    if (p < field.end && (*p == '-' || *p == '+')) {
        p++;
    }
    size_t length = (size_t)(field.end - p);
    bool digits = (length > 0 && *p >= '0' && *p <= '9') ||
                  (length > 1 && (*p == '.' || *p == ',') && p[1] >= '0' && p[1] <= '9');
    return (digits && count_letters(p, field.end) < 2) ||
           (length == 3 && strncasecmp(p, "nan", 3) == 0) ||
           (length == 3 && strncasecmp(p, "inf", 3) == 0) ||
           (length == 8 && strncasecmp(p, "infinity", 8) == 0);
}
