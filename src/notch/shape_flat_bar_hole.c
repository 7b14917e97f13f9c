/* Flat bar with a central circular hole, X = d/W. */
#include "notch/shapes.h"

#include <math.h>

/* ---- tension ---- */

static double polynomial_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    (void)formula;
    double x = nw_ratio_hole_width(sizes);
    return 3.0 + x * (-3.13 + x * (3.66 - x * 1.53));
}

static double heywood_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    (void)formula;
    double rest = 1.0 - nw_ratio_hole_width(sizes);
    return 2.0 + rest * rest * rest;
}

static const nw_kt_formula roark_tension = {
    .key = "roark",
    .equation = "Kt = 3 - 3.13 X + 3.66 X^2 - 1.53 X^3, X = d/W",
    .source = nw_source_roark,
    .ranges = {{"d/W", nw_ratio_hole_width, 0.0, 1.0}},
    .fe_points = 6,
    .fe_low_percent = -0.9,
    .fe_high_percent = -0.1,
    .kt = polynomial_kt,
};

static const nw_kt_formula heywood_tension = {
    .key = "heywood",
    .equation = "Kt = 2 + (1 - X)^3, X = d/W",
    .source = "Heywood, Designing by Photoelasticity, Chapman & Hall 1952 (from memory)",
    .ranges = {{"d/W", nw_ratio_hole_width, 0.0, 1.0}},
    .fe_points = 6,
    .fe_low_percent = -3.3,
    .fe_high_percent = 0.0,
    .kt = heywood_kt,
};

/* ---- bending in the plane ---- */

static double two(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    (void)formula;
    (void)sizes;
    return 2.0;
}

static const nw_kt_formula roark_bending = {
    .key = "roark",
    .equation = "Kt = 2 on the nominal stress at the edge of the hole, whatever d/W",
    .source = nw_source_roark,
    .ranges = {{"d/W", nw_ratio_hole_width, 0.0, 1.0}},
    .fe_points = 3,
    .fe_low_percent = -0.1,
    .fe_high_percent = 3.8,
    .kt = two,
};

/* ---- bending of the plate ---- */

static double plate_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    (void)formula;
    double x = nw_ratio_hole_width(sizes);
    double y = nw_size_of(sizes, NW_SIZE_D_NET) / nw_size_of(sizes, NW_SIZE_H);
    double wide = 1.79 + 0.25 / (0.39 + y) + 0.81 / (1.0 + y * y) - 0.26 / (1.0 + y * y * y);
    return wide * (1.0 + x * (-1.04 + x * 1.22));
}

static const nw_kt_formula roark_plate_bending = {
    .key = "roark",
    .equation =
        "Kt = [1.79 + 0.25/(0.39 + y) + 0.81/(1 + y^2) - 0.26/(1 + y^3)] [1 - 1.04 X + 1.22 "
        "X^2], y = d/h, X = d/W",
    .source = "Roark's Formulas for Stress and Strain, Table 17.1 (Young & Budynas, 7th ed. 2002; "
              "the second bracket and its range are from memory)",
    .ranges = {{"d/W", nw_ratio_hole_width, 0.0, 0.3}},
    .kt = plate_kt,
};

/* ---- sections ---- */

static double net_area(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_H) *
           (nw_size_of(sizes, NW_SIZE_D_GROSS) - nw_size_of(sizes, NW_SIZE_D_NET));
}

/* Nominal stress at the edge of the hole: M (d/2)/I with I = h (W^3 - d^3)/12. */
static double hole_edge_modulus(const nw_sizes *sizes)
{
    double w = nw_size_of(sizes, NW_SIZE_D_GROSS), d = nw_size_of(sizes, NW_SIZE_D_NET);
    return nw_size_of(sizes, NW_SIZE_H) * (w * w * w - d * d * d) / (6.0 * d);
}

static double plate_modulus(const nw_sizes *sizes)
{
    return net_area(sizes) * nw_size_of(sizes, NW_SIZE_H) / 6.0;
}

/* ---- finite elements ---- */

const char nw_hole_reference_how[] =
    "interpolated between solved widths by a cubic through the four nearest (converged finite "
    "elements, plane stress)";

/* Through the four nearest nodes; NAN beyond the last. */
static double interpolated(const double (*nodes)[2], int count, double x)
{
    if (!(x >= nodes[0][0] && x <= nodes[count - 1][0])) {
        return NAN;
    }
    int used = count < 4 ? count : 4, first = 0;
    while (first + used < count && x > nodes[first + used / 2][0]) {
        first++;
    }
    double sum = 0.0;
    for (int i = first; i < first + used; i++) {
        double term = nodes[i][1];
        for (int k = first; k < first + used; k++) {
            term *= k == i ? 1.0 : (x - nodes[k][0]) / (nodes[i][0] - nodes[k][0]);
        }
        sum += term;
    }
    return sum;
}

double nw_hole_tension_reference(const void *data, const nw_sizes *sizes, double *error_percent)
{
    (void)data;
    static const double nodes[][2] = {{0.0, 3.0},   {0.02, 2.942}, {0.1, 2.7325}, {0.2, 2.522},
                                      {0.3, 2.362}, {0.5, 2.1737}, {0.7, 2.096}};
    *error_percent = 0.2;
    return interpolated(nodes, sizeof nodes / sizeof nodes[0], nw_ratio_hole_width(sizes));
}

static double bending_reference(const void *data, const nw_sizes *sizes, double *error_percent)
{
    (void)data;
    static const double nodes[][2] = {{0.02, 2.001}, {0.2, 1.989}, {0.5, 1.928}};
    *error_percent = 0.5;
    return interpolated(nodes, sizeof nodes / sizeof nodes[0], nw_ratio_hole_width(sizes));
}

/* ---- loads ---- */

static void check_outer_edge(const nw_sizes *sizes, double kt, nw_cautions *cautions)
{
    double x = nw_ratio_hole_width(sizes);
    if (kt * x < 1.0) {
        nw_caution_add(cautions, "outer_edge_governs", "kt",
                       "The outer edge of the bar is stressed more: 6 M W/(h (W^3 - d^3)) there is "
                       "%.3g times the stress at the hole.",
                       1.0 / (kt * x));
    }
}

static const nw_kt_formula *const tension_formulas[] = {&roark_tension, &heywood_tension, NULL};
static const nw_kt_formula *const bending_formulas[] = {&roark_bending, NULL};
static const nw_kt_formula *const plate_bending_formulas[] = {&roark_plate_bending, NULL};

static const nw_shape_load tension = {
    .key = "tension",
    .nominal = "net section: S = P/(h (W - d))",
    .kt_means = "stress at the edge of the hole over S",
    .action = NW_ACTION_FORCE,
    .nominal_needs_h = true,
    .section = net_area,
    .formulas = tension_formulas,
    .reference = nw_hole_tension_reference,
    .reference_how = nw_hole_reference_how,
    .gradient = nw_gradient_hole,
    .gradient_source = nw_gradient_kirsch,
};

static const nw_shape_load bending = {
    .key = "bending",
    .nominal = "in the plane of the bar, at the edge of the hole: S = 6 M d/(h (W^3 - d^3))",
    .kt_means = "stress at the edge of the hole over S",
    .action = NW_ACTION_MOMENT,
    .nominal_needs_h = true,
    .section = hole_edge_modulus,
    .formulas = bending_formulas,
    .reference = bending_reference,
    .reference_how = nw_hole_reference_how,
    .check = check_outer_edge,
};

static const nw_shape_load plate_bending = {
    .key = "plate_bending",
    .nominal = "out of the plane, net section: S = 6 M/((W - d) h^2), M the whole moment",
    .kt_means = "stress at the edge of the hole, at the surface, over S",
    .action = NW_ACTION_MOMENT,
    .required = 1u << NW_SIZE_H,
    .nominal_needs_h = true,
    .section = plate_modulus,
    .formulas = plate_bending_formulas,
};

static const nw_shape_load *const loads[] = {&tension, &bending, &plate_bending, NULL};

/* The hole by its diameter or its radius. */
static void complete(nw_size_check *check)
{
    double *value = check->sizes->value;
    if (isnan(value[NW_SIZE_D_NET])) {
        value[NW_SIZE_D_NET] = 2.0 * value[NW_SIZE_R];
    } else if (isnan(value[NW_SIZE_R])) {
        value[NW_SIZE_R] = value[NW_SIZE_D_NET] / 2.0;
    } else if (fabs(value[NW_SIZE_D_NET] - 2.0 * value[NW_SIZE_R]) > 1e-4 * value[NW_SIZE_D_NET]) {
        nw_size_fault(check, NW_SIZE_R, "found %g mm, expected half of d (%g mm): give one of them",
                      value[NW_SIZE_R], value[NW_SIZE_D_NET]);
    }
    if (nw_size_required(check, NW_SIZE_D_NET) && nw_size_required(check, NW_SIZE_D_GROSS) &&
        value[NW_SIZE_D_NET] >= value[NW_SIZE_D_GROSS]) {
        nw_size_fault(check, NW_SIZE_D_NET, "found %g mm, expected less than W (%g mm)",
                      value[NW_SIZE_D_NET], value[NW_SIZE_D_GROSS]);
    }
}

const nw_shape nw_shape_flat_bar_hole = {
    .key = "flat_bar_hole",
    .title = "Flat bar with central hole",
    .needs = "W and d (or r); h for a force or moment, and for plate_bending",
    .sizes =
        {
            {NW_SIZE_D_GROSS, "W", "D", "width", NW_LENGTH, false},
            {NW_SIZE_D_NET, "d", NULL, "diameter of the hole", NW_LENGTH, false},
            {NW_SIZE_R, "r", NULL, "radius of the hole", NW_LENGTH, false},
            {NW_SIZE_H, "h", NULL, "thickness", NW_LENGTH, false},
        },
    .loads = loads,
    .complete = complete,
    .applies = "one hole in the middle of the width, empty, far from ends and other holes",
};
