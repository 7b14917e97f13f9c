/* A look at the notch curve against solving its equation with KINSOL at the same loads. */
#include "base/bin_table.h"
#include "notchwright/notchwright.h"

#include <math.h>
#include <stdio.h>
#include <time.h>

static double now(void)
{
    struct timespec t;
    clock_gettime(CLOCK_MONOTONIC, &t);
    return (double)t.tv_sec + 1e-9 * (double)t.tv_nsec;
}

int main(void)
{
    enum { LOADS = 20000, LOOKS = 500 };
    nw_rule_input input = {206000, 1184, 0.187, 3.0, NAN, false};
    const nw_notch_rule *rule = nw_notch_rule_find("neuber");
    nw_notch_curve *curve;
    double t0 = now();
    if (nw_notch_curve_build(rule, &input, 2000.0, &curve, NULL) != NW_OK) {
        return 1;
    }
    double t1 = now(), worst = 0.0, sum = 0.0, stress, strain;
    for (int i = 1; i <= LOADS; i++) {
        double load = 2000.0 * i / LOADS;
        if (nw_notch_rule_solve(rule, &input, load, &stress, &strain) != NW_OK) {
            return 1;
        }
        sum += stress;
    }
    double t2 = now();
    for (int k = 0; k < LOOKS; k++) {
        for (int i = 1; i <= LOADS; i++) {
            nw_notch_curve_at(curve, 2000.0 * i / LOADS, &stress, &strain);
            sum += stress;
        }
    }
    double t3 = now();
    for (int i = 1; i <= LOADS; i++) {
        double load = 2000.0 * i / LOADS, exact, exact_strain;
        nw_notch_curve_at(curve, load, &stress, &strain);
        nw_notch_rule_solve(rule, &input, load, &exact, &exact_strain);
        worst = fmax(worst, fmax(fabs(stress / exact - 1.0), fabs(strain / exact_strain - 1.0)));
    }
    double solve = (t2 - t1) / LOADS, look = (t3 - t2) / LOADS / LOOKS;
    printf(
        "  built in %.2f ms; one solve %.0f ns, one look %.2f ns, ratio %.0f; largest difference "
        "%.1e relative%s\n",
        1e3 * (t1 - t0), 1e9 * solve, 1e9 * look, solve / look, worst, sum < 0.0 ? " " : "");
    nw_notch_curve_free(curve);
    return 0;
}
