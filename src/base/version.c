#include "notchwright/notchwright.h"

const char *nw_version(void)
{
    return NW_VERSION;
}
