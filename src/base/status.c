/* Status codes: their texts and the exit status each one leads to. */
#include "notchwright/status.h"

static const struct {
    int exit_status;
    const char *text;
} table[] = {
#define NW_STATUS_ROW(code, exit_status, text) {exit_status, text},
    NW_STATUS_LIST(NW_STATUS_ROW)
#undef NW_STATUS_ROW
};

static size_t row_of(nw_status status)
{
    size_t row = (size_t)status;
    return row < sizeof table / sizeof table[0] ? row : (size_t)NW_COMPUTE;
}

const char *nw_status_text(nw_status status)
{
    return table[row_of(status)].text;
}

int nw_status_exit(nw_status status)
{
    return table[row_of(status)].exit_status;
}
