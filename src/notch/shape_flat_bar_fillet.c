/* Flat bar with opposite shoulder fillets. */
#include "notch/shapes.h"

static const nw_chart peterson_tension_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{1.006, 1.008, -0.044},
              {-0.115, -0.584, 0.315},
              {0.245, -1.006, -0.257},
              {-0.135, 0.582, -0.017}}},
            {20.0,
             {{1.02, 1.009, -0.048},
              {-0.065, -0.165, -0.007},
              {-3.459, 1.266, -0.016},
              {3.505, -2.109, 0.069}}},
        },
};

static const nw_kt_formula peterson_tension = {
    .key = "peterson",
    .equation = nw_chart_equation,
    .source = nw_source_peterson,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.1, 20.0}},
    .fe_points = 36,
    .fe_low_percent = -7.1,
    .fe_high_percent = 11.6,
    .kt = nw_chart_kt,
    .chart = &peterson_tension_chart,
};

static const nw_chart roark_tension_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{1.007, 1.0, -0.031},
              {-0.114, -0.585, 0.314},
              {0.241, -0.992, -0.271},
              {-0.134, 0.577, -0.012}}},
            {20.0,
             {{1.042, 0.982, -0.036},
              {-0.074, -0.156, -0.01},
              {-3.418, 1.22, -0.005},
              {3.45, -2.046, 0.051}}},
        },
};

static const nw_kt_formula roark_tension = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.1, 20.0}},
    .fe_points = 36,
    .fe_low_percent = -6.9,
    .fe_high_percent = 11.6,
    .kt = nw_chart_kt,
    .chart = &roark_tension_chart,
};

static const nw_chart peterson_bending_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{1.006, 0.967, 0.013},
              {-0.27, -2.372, 0.708},
              {0.662, 1.157, -0.908},
              {-0.405, 0.249, 0.2}}},
            {20.0,
             {{1.058, 1.002, -0.038},
              {-3.652, 1.639, -0.436},
              {6.17, -5.687, 1.175},
              {-2.558, 3.046, -0.701}}},
        },
};

static const nw_kt_formula peterson_bending = {
    .key = "peterson",
    .equation = nw_chart_equation,
    .source = nw_source_peterson,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.1, 20.0}},
    .fe_points = 39,
    .fe_low_percent = -7.1,
    .fe_high_percent = 3.4,
    .kt = nw_chart_kt,
    .chart = &peterson_bending_chart,
};

static const nw_chart roark_bending_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{1.007, 1.0, -0.031},
              {-0.27, -2.404, 0.749},
              {0.677, 1.133, -0.904},
              {-0.414, 0.271, 0.186}}},
            {20.0,
             {{1.042, 0.982, -0.036},
              {-3.599, 1.619, -0.431},
              {6.084, -5.607, 1.158},
              {-2.527, 3.006, -0.691}}},
        },
};

static const nw_kt_formula roark_bending = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.1, 20.0}},
    .fe_points = 39,
    .fe_low_percent = -8.6,
    .fe_high_percent = 3.9,
    .kt = nw_chart_kt,
    .chart = &roark_bending_chart,
};

/* ---- loads ---- */

static const nw_kt_formula *const tension_formulas[] = {&peterson_tension, &roark_tension, NULL};

static const nw_kt_formula *const bending_formulas[] = {&peterson_bending, &roark_bending, NULL};

static const nw_shape_load tension = {
    .key = "tension",
    .nominal = "net section: S = P/(h d)",
    .kt_means = "largest principal stress at the root over S",
    .action = NW_ACTION_FORCE,
    .nominal_needs_h = true,
    .section = nw_section_flat_area,
    .formulas = tension_formulas,
    .reference = nw_kt_surface_at,
    .reference_data = &nw_kt_surface_flat_fillet_tension,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_shoulder,
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
    .reference_data = &nw_kt_surface_flat_fillet_bending,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_shoulder,
    .gradient_source = nw_gradient_din_743,
};

static void complete(nw_size_check *check)
{
    nw_size_required(check, NW_SIZE_R);
    nw_size_two_of_three(check, NW_SIZE_D_GROSS, NW_SIZE_D_NET, NW_SIZE_T, 2.0);
}

static const nw_shape_load *const loads[] = {&tension, &bending, NULL};

const nw_shape nw_shape_flat_bar_fillet = {
    .key = "flat_bar_fillet",
    .title = "Flat bar with opposite shoulder fillets",
    .needs = "r and two of W, d and t; h for a force or moment",
    .sizes =
        {
            {NW_SIZE_D_GROSS, "W", "D", "larger width", NW_LENGTH, false},
            {NW_SIZE_D_NET, "d", NULL, "smaller width", NW_LENGTH, false},
            {NW_SIZE_R, "r", NULL, "fillet radius", NW_LENGTH, false},
            {NW_SIZE_T, "t", NULL, "depth, (W - d)/2", NW_LENGTH, false},
            {NW_SIZE_H, "h", NULL, "thickness (for a force or moment)", NW_LENGTH, false},
        },
    .loads = loads,
    .complete = complete,
    .applies = "the wide part is longer than 3 W (r/d)^-0.25 in tension and 0.8 W (r/d)^-0.25 in "
               "bending; a "
               "shorter one lowers Kt",
};
