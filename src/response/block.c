/* One pass of the block: its events, each as often as it repeats. */
#include "notchwright/response.h"

nw_status nw_block_pass(nw_tracker *tracker, const nw_event *events, size_t count)
{
    nw_status status = NW_OK;
    uint64_t first_id = 0;
    for (size_t i = 0; i < count && status == NW_OK; i++) {
        status = nw_tracker_pass(tracker, &events[i], first_id, 1.0);
        if (status == NW_OK && events[i].repeats > 1.0) {
            status = nw_tracker_pass(tracker, &events[i], first_id, events[i].repeats - 1.0);
        }
        first_id += events[i].count;
    }
    return status;
}
