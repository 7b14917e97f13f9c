/* Flat bar with opposite U notches. Roark's fit is the nearer one to finite elements. */
#include "notch/shapes.h"

static const nw_chart roark_tension_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.85, 2.628, -0.413},
              {-1.119, -4.826, 2.575},
              {3.563, -0.514, -2.402},
              {-2.294, 2.713, 0.24}}},
            {50.0,
             {{0.833, 2.069, -0.009},
              {2.732, -4.157, 0.176},
              {-8.859, 5.327, -0.32},
              {6.294, -3.239, 0.154}}},
        },
};

static const nw_kt_formula roark_tension = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.1, 50.0}},
    .fe_points = 41,
    .fe_low_percent = -12.9,
    .fe_high_percent = 2.0,
    .kt = nw_chart_kt,
    .chart = &roark_tension_chart,
};

static const nw_chart peterson_tension_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.955, 2.169, -0.081},
              {-1.557, -4.046, 1.032},
              {4.013, 0.424, -0.748},
              {-2.461, 1.538, -0.236}}},
            {50.0,
             {{1.037, 1.991, 0.002},
              {-1.886, -2.181, -0.048},
              {0.649, 1.086, 0.142},
              {1.218, -0.922, -0.086}}},
        },
};

static const nw_kt_formula peterson_tension = {
    .key = "peterson",
    .equation = nw_chart_equation,
    .source = nw_source_peterson,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.1, 50.0}},
    .fe_points = 41,
    .fe_low_percent = -12.6,
    .fe_high_percent = 1.7,
    .kt = nw_chart_kt,
    .chart = &peterson_tension_chart,
};

static const nw_chart roark_bending_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.723, 2.845, -0.504},
              {-1.836, -5.746, 1.314},
              {7.254, -1.885, 1.646},
              {-5.14, 4.785, -2.456}}},
            {50.0,
             {{0.833, 2.069, -0.009},
              {0.024, -5.383, 0.126},
              {-0.856, 6.46, -0.199},
              {0.999, -3.146, 0.082}}},
        },
};

static const nw_kt_formula roark_bending = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.25, 50.0}},
    .fe_points = 31,
    .fe_low_percent = -10.6,
    .fe_high_percent = 7.1,
    .kt = nw_chart_kt,
    .chart = &roark_bending_chart,
};

static const nw_chart peterson_bending_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{1.024, 2.092, -0.051},
              {-0.63, -7.194, 1.288},
              {2.117, 8.574, -2.16},
              {-1.42, -3.494, 0.932}}},
            {50.0,
             {{1.113, 1.957, 0.0},
              {-2.579, -4.017, -0.013},
              {4.1, 3.922, 0.083},
              {-1.528, -1.893, -0.066}}},
        },
};

static const nw_kt_formula peterson_bending = {
    .key = "peterson",
    .equation = nw_chart_equation,
    .source = nw_source_peterson_memory,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.1, 50.0}},
    .fe_points = 39,
    .fe_low_percent = -7.5,
    .fe_high_percent = 15.4,
    .kt = nw_chart_kt,
    .chart = &peterson_bending_chart,
};

/* ---- semicircular notches ---- */

static double semicircle_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    (void)formula;
    double x = nw_ratio_depth_both(sizes);
    return 3.065 + x * (-3.472 + x * (1.009 + x * 0.405));
}

static const nw_kt_formula semicircle_tension = {
    .key = "semicircle",
    .equation = "Kt = 3.065 - 3.472 x + 1.009 x^2 + 0.405 x^3, x = 2t/W, t = r",
    .source = nw_source_peterson,
    .ranges = {{"t/r", nw_ratio_depth_radius, 1.0, 1.0}},
    .kt = semicircle_kt,
};

/* ---- loads ---- */

static const nw_kt_formula *const tension_formulas[] = {&roark_tension, &peterson_tension,
                                                        &semicircle_tension, NULL};

static const nw_kt_formula *const bending_formulas[] = {&roark_bending, &peterson_bending, NULL};

static const nw_shape_load tension = {
    .key = "tension",
    .nominal = "net section: S = P/(h d)",
    .kt_means = "largest principal stress at the root over S",
    .action = NW_ACTION_FORCE,
    .nominal_needs_h = true,
    .section = nw_section_flat_area,
    .formulas = tension_formulas,
    .reference = nw_kt_surface_at,
    .reference_data = &nw_kt_surface_flat_notches_tension,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_groove,
    .gradient_source = nw_gradient_din_743,
};

static const nw_shape_load bending = {
    .key = "bending",
    .nominal = "in the plane of the bar, net section: S = 6 M/(h d^2)",
    .kt_means = "largest principal stress at the root over S",
    .action = NW_ACTION_MOMENT,
    .nominal_needs_h = true,
    .section = nw_section_flat_bending,
    .formulas = bending_formulas,
    .reference = nw_kt_surface_at,
    .reference_data = &nw_kt_surface_flat_notches_bending,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_groove,
    .gradient_source = nw_gradient_din_743,
};

static void complete(nw_size_check *check)
{
    nw_size_required(check, NW_SIZE_R);
    nw_size_two_of_three(check, NW_SIZE_D_GROSS, NW_SIZE_D_NET, NW_SIZE_T, 2.0);
}

static const nw_shape_load *const loads[] = {&tension, &bending, NULL};

const nw_shape nw_shape_flat_bar_notches = {
    .key = "flat_bar_notches",
    .title = "Flat bar with opposite U notches",
    .needs = "r and two of W, d and t; h for a force or moment",
    .sizes =
        {
            {NW_SIZE_D_GROSS, "W", "D", "larger width", NW_LENGTH, false},
            {NW_SIZE_D_NET, "d", NULL, "smaller width", NW_LENGTH, false},
            {NW_SIZE_R, "r", NULL, "notch root radius", NW_LENGTH, false},
            {NW_SIZE_T, "t", NULL, "depth, (W - d)/2", NW_LENGTH, false},
            {NW_SIZE_H, "h", NULL, "thickness (for a force or moment)", NW_LENGTH, false},
        },
    .loads = loads,
    .complete = complete,
    .applies = "notches with parallel flanks, or arcs where r > t; far from ends and other notches",
};
