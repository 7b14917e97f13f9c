/* Neuber: q = 1/(1 + sqrt(p/r)), p a length of the material. */
#include "notch/sensitivities.h"

#include <math.h>
#include <stdio.h>

static const double steel_low_mpa = 340.0, steel_high_mpa = 1700.0;

/* sqrt(p) [mm^0.5] of steels. */
static double steel_root(double su, bool torsion)
{
    return torsion ? 0.958 + su * (-1.83e-3 + su * (1.43e-6 - su * 4.11e-10))
                   : 1.24 + su * (-2.25e-3 + su * (1.60e-6 - su * 4.11e-10));
}

/* Annealed aluminium: sqrt(p) in in^0.5 by tensile strength in ksi. */
static const double aluminium[][2] = {{10, 0.500}, {15, 0.341}, {20, 0.264}, {25, 0.217},
                                      {30, 0.180}, {35, 0.152}, {40, 0.126}, {45, 0.111}};
enum { ALUMINIUM = sizeof aluminium / sizeof aluminium[0] };

static const double ksi_in_mpa = 4448.2216152605 / (25.4 * 25.4);

static double aluminium_root(double su)
{
    double ksi = su / ksi_in_mpa;
    int i = 1;
    while (i < ALUMINIUM - 1 && ksi > aluminium[i][0]) {
        i++;
    }
    const double *a = aluminium[i - 1], *b = aluminium[i];
    double root = a[1] + (b[1] - a[1]) * (ksi - a[0]) / (b[0] - a[0]);
    return root * sqrt(25.4);
}

static void check_range(double su, double low, double high, const char *of, char *why,
                        size_t capacity)
{
    if (su < low * (1.0 - 1e-9) || su > high * (1.0 + 1e-9)) {
        snprintf(why, capacity,
                 "made for %s of %.0f to %.0f MPa tensile strength, this is %.4g MPa", of, low,
                 high, su);
    }
}

static bool root_of(const nw_sensitivity_input *input, double *root, char *why, size_t capacity)
{
    double su = input->ultimate_strength_mpa;
    if (input->group != NW_STEEL && input->group != NW_ALUMINIUM) {
        snprintf(why, capacity, "no length is published for the group %s",
                 nw_group_name(input->group));
        return false;
    }
    if (input->group == NW_ALUMINIUM && input->torsion) {
        snprintf(why, capacity, "no length is published for aluminium alloys in torsion");
        return false;
    }
    if (!nw_sensitivity_needs(su, "the tensile strength", why, capacity)) {
        return false;
    }
    if (input->group == NW_STEEL) {
        *root = steel_root(su, input->torsion);
        check_range(su, steel_low_mpa, steel_high_mpa, "steels", why, capacity);
    } else {
        *root = aluminium_root(su);
        check_range(su, aluminium[0][0] * ksi_in_mpa, aluminium[ALUMINIUM - 1][0] * ksi_in_mpa,
                    "annealed aluminium", why, capacity);
    }
    return true;
}

static bool evaluate(const nw_sensitivity_input *input, double *kf, char *why, size_t capacity)
{
    double root;
    if (!root_of(input, &root, why, capacity)) {
        return false;
    }
    double share = 1.0 + root / sqrt(input->radius_mm);
    *kf = share > 0.0 ? 1.0 + (input->kt - 1.0) / share : INFINITY;
    return true;
}

const nw_sensitivity nw_sensitivity_neuber = {
    .key = "neuber",
    .title = "Neuber",
    .equation =
        "Kf = 1 + (Kt - 1)/(1 + sqrt(p/r)); steels sqrt(p/mm) = 1.24 - 2.25e-3 Su + 1.60e-6 Su^2 "
        "- 4.11e-10 Su^3, in torsion 0.958 - 1.83e-3 Su + 1.43e-6 Su^2 - 4.11e-10 Su^3, Su in "
        "MPa; annealed aluminium by table",
    .reference =
        "Neuber, Theory of Notch Stresses, Edwards 1946; polynomials of Budynas & Nisbett, "
        "Shigley's Mechanical Engineering Design; aluminium of Norton, Machine Design, table "
        "6-7",
    .range =
        "steels with Su of 340 to 1700 MPa; annealed aluminium of 69 to 310 MPa, not in torsion",
    .evaluate = evaluate,
};
