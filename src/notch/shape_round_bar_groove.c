/* Round bar with circumferential U groove. In tension and bending Roark's fit is the nearer one to finite
 * elements for t/r of about 1 and more, in torsion Peterson's. */
#include "notch/shapes.h"

static const nw_chart peterson_tension_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.89, 2.208, -0.094},
              {-0.923, -6.678, 1.638},
              {2.893, 6.448, -2.516},
              {-1.912, -1.944, 0.963}}},
            {50.0,
             {{1.037, 1.967, 0.002},
              {-2.679, -2.98, -0.053},
              {3.09, 2.124, 0.165},
              {-0.424, -1.153, -0.106}}},
        },
};

static const nw_kt_formula peterson_tension = {
    .key = "peterson",
    .equation = nw_chart_equation,
    .source = nw_source_peterson,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.1, 50.0}},
    .fe_points = 53,
    .fe_low_percent = -13.5,
    .fe_high_percent = 2.0,
    .kt = nw_chart_kt,
    .chart = &peterson_tension_chart,
};

static const nw_chart roark_tension_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.455, 3.354, -0.769},
              {3.129, -15.955, 7.404},
              {-6.909, 29.286, -16.104},
              {4.325, -16.685, 9.469}}},
            {50.0,
             {{0.935, 1.922, 0.004},
              {0.537, -3.708, 0.04},
              {-2.538, 3.438, -0.012},
              {2.066, -1.652, -0.031}}},
        },
};

static const nw_kt_formula roark_tension = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.25, 50.0}},
    .fe_points = 44,
    .fe_low_percent = -13.7,
    .fe_high_percent = 10.4,
    .kt = nw_chart_kt,
    .chart = &roark_tension_chart,
};

static const nw_chart peterson_bending_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.594, 2.958, -0.52},
              {0.422, -10.545, 2.692},
              {0.501, 14.375, -4.486},
              {-0.613, -6.573, 2.177}}},
            {50.0,
             {{0.965, 1.926, 0.0},
              {-2.773, -4.414, -0.017},
              {4.785, 4.681, 0.096},
              {-1.995, -2.241, -0.074}}},
        },
};

static const nw_kt_formula peterson_bending = {
    .key = "peterson",
    .equation = nw_chart_equation,
    .source = nw_source_peterson,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.25, 50.0}},
    .fe_points = 21,
    .fe_low_percent = -8.8,
    .fe_high_percent = 9.1,
    .kt = nw_chart_kt,
    .chart = &peterson_bending_chart,
};

static const nw_chart roark_bending_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.455, 3.354, -0.769},
              {0.891, -12.721, 4.593},
              {0.286, 15.481, -6.392},
              {-0.632, -6.115, 2.568}}},
            {50.0,
             {{0.935, 1.922, 0.004},
              {-0.552, -5.327, 0.086},
              {0.754, 6.281, -0.121},
              {-0.138, -2.876, 0.031}}},
        },
};

static const nw_kt_formula roark_bending = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.25, 50.0}},
    .fe_points = 21,
    .fe_low_percent = -8.5,
    .fe_high_percent = 7.7,
    .kt = nw_chart_kt,
    .chart = &roark_bending_chart,
};

static const nw_chart peterson_torsion_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{0.966, 1.056, -0.022},
              {-0.192, -4.037, 0.674},
              {0.808, 5.321, -1.231},
              {-0.567, -2.364, 0.566}}},
            {50.0,
             {{1.089, 0.924, 0.018},
              {-1.504, -2.141, -0.047},
              {2.486, 2.289, 0.091},
              {-1.056, -1.104, -0.059}}},
        },
};

static const nw_kt_formula peterson_torsion = {
    .key = "peterson",
    .equation = nw_chart_equation,
    .source = nw_source_peterson,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.25, 50.0}},
    .fe_points = 35,
    .fe_low_percent = -11.7,
    .fe_high_percent = 4.9,
    .kt = nw_chart_kt,
    .chart = &peterson_torsion_chart,
};

static const nw_chart roark_torsion_chart = {
    .x = nw_ratio_depth_both,
    .branches =
        {
            {2.0,
             {{1.245, 0.264, 0.491},
              {-3.03, 3.269, -3.633},
              {7.199, -11.286, 8.318},
              {-4.414, 7.753, -5.176}}},
            {50.0,
             {{1.651, 0.614, 0.04},
              {-4.794, -0.314, -0.217},
              {8.457, -0.962, 0.389},
              {-4.314, 0.662, -0.212}}},
        },
};

static const nw_kt_formula roark_torsion = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.25, 50.0}},
    .fe_points = 35,
    .fe_low_percent = -16.6,
    .fe_high_percent = 7.3,
    .kt = nw_chart_kt,
    .chart = &roark_torsion_chart,
};

/* ---- loads ---- */

static const nw_kt_formula *const tension_formulas[] = {&roark_tension, &peterson_tension, NULL};

static const nw_kt_formula *const bending_formulas[] = {&roark_bending, &peterson_bending, NULL};

static const nw_kt_formula *const torsion_formulas[] = {&peterson_torsion, &roark_torsion, NULL};

static const nw_shape_load tension = {
    .key = "tension",
    .nominal = "net section: S = 4 P/(pi d^2)",
    .kt_means = "largest principal stress at the root over S",
    .action = NW_ACTION_FORCE,
    .section = nw_section_round_area,
    .formulas = tension_formulas,
    .reference = nw_kt_surface_at,
    .reference_data = &nw_kt_surface_round_groove_tension,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_groove,
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
    .reference_data = &nw_kt_surface_round_groove_bending,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_groove,
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
    .reference_data = &nw_kt_surface_round_groove_torsion,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_groove_torsion,
    .gradient_source = nw_gradient_din_743,
    .notes = {{"shear_stress", "kt", nw_note_shear}},
};

static void complete(nw_size_check *check)
{
    nw_size_required(check, NW_SIZE_R);
    nw_size_two_of_three(check, NW_SIZE_D_GROSS, NW_SIZE_D_NET, NW_SIZE_T, 2.0);
}

static const nw_shape_load *const loads[] = {&tension, &bending, &torsion, NULL};

const nw_shape nw_shape_round_bar_groove = {
    .key = "round_bar_groove",
    .title = "Round bar with U groove",
    .needs = "r and two of D, d and t",
    .sizes =
        {
            {NW_SIZE_D_GROSS, "D", NULL, "larger diameter", NW_LENGTH, false},
            {NW_SIZE_D_NET, "d", NULL, "smaller diameter", NW_LENGTH, false},
            {NW_SIZE_R, "r", NULL, "groove root radius", NW_LENGTH, false},
            {NW_SIZE_T, "t", NULL, "depth, (D - d)/2", NW_LENGTH, false},
        },
    .loads = loads,
    .complete = complete,
    .applies =
        "a groove with parallel flanks, or an arc where r > t; far from ends and other notches",
};
