/* Round bar with shoulder fillet. The formulas made from finite elements are preferred to the charts, which lie
 * far below them in tension. */
#include "notch/shapes.h"

#include <math.h>

/* ---- formulas made from finite elements, u = D/d and v = r/d ---- */

static double tipton_tension_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    (void)formula;
    double u = nw_ratio_gross_net(sizes), v = nw_ratio_radius_net(sizes), u2 = u * u;
    double root = (3.43 - 3.41 * u2 + 0.0232 * u2 * u2) / (1.0 - 8.85 * u2 - 0.078 * u2 * u2);
    return 0.493 + 0.480 * pow(u, -2.43) + pow(v, -0.48) * sqrt(root);
}

static double tipton_bending_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    (void)formula;
    double u = nw_ratio_gross_net(sizes), v = nw_ratio_radius_net(sizes), u2 = u * u;
    double root = (-0.14 - 0.363 * u2 + 0.503 * u2 * u2) / (1.0 - 2.39 * u2 + 3.368 * u2 * u2);
    return 0.632 + 0.377 * pow(u, -4.4) + pow(v, -0.5) * sqrt(root);
}

static const nw_kt_formula tipton_tension = {
    .key = "tipton",
    .equation =
        "Kt = 0.493 + 0.480 u^-2.43 + v^-0.48 sqrt[(3.43 - 3.41 u^2 + 0.0232 u^4)/(1 - 8.85 u^2 - "
        "0.078 u^4)], u = D/d, v = r/d",
    .source = "Tipton, Sorem & Rolovic, J. Mech. Design 118 (1996) 321 (from memory)",
    .ranges = {{"D/d", nw_ratio_gross_net, 1.01, 6.0}, {"r/d", nw_ratio_radius_net, 0.002, 0.3}},
    .fe_points = 14,
    .fe_low_percent = -6.4,
    .fe_high_percent = -1.6,
    .kt = tipton_tension_kt,
};

static const nw_kt_formula tipton_bending = {
    .key = "tipton",
    .equation =
        "Kt = 0.632 + 0.377 u^-4.4 + v^-0.5 sqrt[(-0.14 - 0.363 u^2 + 0.503 u^4)/(1 - 2.39 u^2 + "
        "3.368 u^4)], u = D/d, v = r/d",
    .source = "Tipton, Sorem & Rolovic, J. Mech. Design 118 (1996) 321 (from memory)",
    .ranges = {{"D/d", nw_ratio_gross_net, 1.01, 6.0}, {"r/d", nw_ratio_radius_net, 0.002, 0.3}},
    .fe_points = 11,
    .fe_low_percent = -0.3,
    .fe_high_percent = 1.4,
    .kt = tipton_bending_kt,
};

/* ---- charts ---- */

static const nw_chart peterson_tension_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.926, 1.157, -0.099},
              {0.012, -3.036, 0.961},
              {-0.302, 3.977, -1.744},
              {0.365, -2.098, 0.878}}},
            {20.0,
             {{1.2, 0.86, -0.022},
              {-1.805, -0.346, -0.038},
              {2.198, -0.486, 0.165},
              {-0.593, -0.028, -0.106}}},
        },
};

static const nw_kt_formula peterson_tension = {
    .key = "peterson",
    .equation = nw_chart_equation,
    .source = nw_source_peterson,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.1, 20.0}},
    .fe_points = 35,
    .fe_low_percent = -22.3,
    .fe_high_percent = 4.4,
    .kt = nw_chart_kt,
    .chart = &peterson_tension_chart,
};

static const nw_chart roark_tension_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.927, 1.149, -0.086},
              {0.011, -3.029, 0.948},
              {-0.304, 3.979, -1.737},
              {0.366, -2.098, 0.875}}},
            {20.0,
             {{1.225, 0.831, -0.01},
              {-1.831, -0.318, -0.049},
              {2.236, -0.522, 0.176},
              {-0.63, 0.009, -0.117}}},
        },
};

static const nw_kt_formula roark_tension = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.25, 20.0}},
    .fe_points = 30,
    .fe_low_percent = -20.5,
    .fe_high_percent = 4.7,
    .kt = nw_chart_kt,
    .chart = &roark_tension_chart,
};

static const nw_chart peterson_bending_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.947, 1.206, -0.131},
              {0.022, -3.405, 0.915},
              {0.869, 1.777, -0.555},
              {-0.81, 0.422, -0.26}}},
            {20.0,
             {{1.232, 0.832, -0.008},
              {-3.813, 0.968, -0.26},
              {7.423, -4.868, 0.869},
              {-3.839, 3.07, -0.6}}},
        },
};

static const nw_kt_formula peterson_bending = {
    .key = "peterson",
    .equation = nw_chart_equation,
    .source = nw_source_peterson,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.1, 20.0}},
    .fe_points = 19,
    .fe_low_percent = -14.8,
    .fe_high_percent = 7.5,
    .kt = nw_chart_kt,
    .chart = &peterson_bending_chart,
};

static const nw_chart roark_bending_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.927, 1.149, -0.086},
              {0.015, -3.281, 0.837},
              {0.847, 1.716, -0.506},
              {-0.79, 0.417, -0.246}}},
            {20.0,
             {{1.225, 0.831, -0.01},
              {-3.79, 0.958, -0.257},
              {7.374, -4.834, 0.862},
              {-3.809, 3.046, -0.595}}},
        },
};

static const nw_kt_formula roark_bending = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.25, 20.0}},
    .fe_points = 16,
    .fe_low_percent = -15.5,
    .fe_high_percent = 4.1,
    .kt = nw_chart_kt,
    .chart = &roark_bending_chart,
};

static const nw_chart peterson_torsion_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {4.0,
             {{0.905, 0.783, -0.075},
              {-0.437, -1.969, 0.553},
              {1.557, 1.073, -0.578},
              {-1.061, 0.171, 0.086}}},
        },
};

static const nw_kt_formula peterson_torsion = {
    .key = "peterson",
    .equation = nw_chart_equation,
    .source = nw_source_peterson,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.25, 4.0}},
    .fe_points = 15,
    .fe_low_percent = -0.6,
    .fe_high_percent = 3.5,
    .kt = nw_chart_kt,
    .chart = &peterson_torsion_chart,
};

static const nw_chart roark_torsion_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {4.0,
             {{0.953, 0.68, -0.053},
              {-0.493, -1.82, 0.517},
              {1.621, 0.908, -0.529},
              {-1.081, 0.232, 0.065}}},
        },
};

static const nw_kt_formula roark_torsion = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark_memory,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.25, 4.0}},
    .fe_points = 15,
    .fe_low_percent = -1.9,
    .fe_high_percent = 1.0,
    .kt = nw_chart_kt,
    .chart = &roark_torsion_chart,
};

/* ---- loads ---- */

static const nw_kt_formula *const tension_formulas[] = {&tipton_tension, &peterson_tension,
                                                        &roark_tension, NULL};

static const nw_kt_formula *const bending_formulas[] = {&tipton_bending, &peterson_bending,
                                                        &roark_bending, NULL};

static const nw_kt_formula *const torsion_formulas[] = {&peterson_torsion, &roark_torsion, NULL};

static const nw_shape_load tension = {
    .key = "tension",
    .nominal = "net section: S = 4 P/(pi d^2)",
    .kt_means = "largest principal stress at the root over S",
    .action = NW_ACTION_FORCE,
    .section = nw_section_round_area,
    .formulas = tension_formulas,
    .reference = nw_kt_surface_at,
    .reference_data = &nw_kt_surface_round_fillet_tension,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_shoulder,
    .gradient_source = nw_gradient_din_743,
};

static const nw_shape_load bending = {
    .key = "bending",
    .nominal = "net section: S = 32 M/(pi d^3)",
    .kt_means = "largest principal stress at the root over S",
    .action = NW_ACTION_MOMENT,
    .section = nw_section_round_bending,
    .formulas = bending_formulas,
    .reference = nw_kt_surface_at,
    .reference_data = &nw_kt_surface_round_fillet_bending,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_shoulder,
    .gradient_source = nw_gradient_din_743,
};

static const nw_shape_load torsion = {
    .key = "torsion",
    .nominal = "net section, shear: S = 16 T/(pi d^3)",
    .kt_means = "largest shear stress at the root over S",
    .action = NW_ACTION_MOMENT,
    .is_shear = true,
    .section = nw_section_round_torsion,
    .formulas = torsion_formulas,
    .reference = nw_kt_surface_at,
    .reference_data = &nw_kt_surface_round_fillet_torsion,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_shoulder_torsion,
    .gradient_source = nw_gradient_din_743,
    .notes = {{"shear_stress", "kt", nw_note_shear}},
};

static void complete(nw_size_check *check)
{
    nw_size_required(check, NW_SIZE_R);
    nw_size_two_of_three(check, NW_SIZE_D_GROSS, NW_SIZE_D_NET, NW_SIZE_T, 2.0);
}

static const nw_shape_load *const loads[] = {&tension, &bending, &torsion, NULL};

const nw_shape nw_shape_round_bar_fillet = {
    .key = "round_bar_fillet",
    .title = "Round bar with shoulder fillet",
    .needs = "r and two of D, d and t",
    .sizes =
        {
            {NW_SIZE_D_GROSS, "D", NULL, "larger diameter", NW_LENGTH, false},
            {NW_SIZE_D_NET, "d", NULL, "smaller diameter", NW_LENGTH, false},
            {NW_SIZE_R, "r", NULL, "fillet radius", NW_LENGTH, false},
            {NW_SIZE_T, "t", NULL, "depth, (D - d)/2", NW_LENGTH, false},
        },
    .loads = loads,
    .complete = complete,
    .applies = "the larger diameter goes on for at least about its own length: a shorter collar "
               "lowers Kt, by up "
               "to 37 %; a fillet of r > t is an arc that ends at the larger diameter",
};
