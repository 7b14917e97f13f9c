/* A notch curve the user brings: load, stress and strain of a calibrated elastic-plastic run. */
#include "notch/rules.h"

const nw_notch_rule nw_notch_rule_curve = {
    .key = "curve",
    .title = "Given notch curve",
    .equation = "s(L) and e(L) from the table, shape-preserving cubics between its points",
    .reference = "Fritsch & Butland, SIAM J. Sci. Stat. Comput. 5 (1984) 300 (interpolation)",
    .is_table = true,
};
