/* Flat bar with one U notch in an edge. The charts for tension hold for a force through the middle of the net
 * section. A force along the middle of the gross section also bends the net section, by M = P t/2; since
 * stresses add, its factor on P/(h d) is Kt(tension) + Kt(bending) 3 x/(1 - x) with x = t/W. */
#include "notch/shapes.h"

static const nw_chart roark_tension_chart = {
    .x = nw_ratio_depth_one,
    .branches =
        {
            {4.0,
             {{0.721, 2.394, -0.127},
              {1.978, -11.489, 2.211},
              {-4.413, 18.751, -4.596},
              {2.714, -9.655, 2.512}}},
        },
};

static const nw_kt_formula roark_tension = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark_memory,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.5, 4.0}},
    .fe_points = 5,
    .fe_low_percent = -2.5,
    .fe_high_percent = 8.1,
    .kt = nw_chart_kt,
    .chart = &roark_tension_chart,
};

static const nw_chart peterson_tension_chart = {
    .x = nw_ratio_depth_one,
    .branches =
        {
            {20.0,
             {{0.907, 2.125, 0.023},
              {0.71, -11.289, 1.708},
              {-0.672, 18.754, -4.046},
              {0.175, -9.759, 2.365}}},
        },
};

static const nw_kt_formula peterson_tension = {
    .key = "peterson",
    .equation = nw_chart_equation,
    .source = nw_source_peterson_memory,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.5, 20.0}},
    .fe_points = 10,
    .fe_low_percent = -7.3,
    .fe_high_percent = 27.5,
    .kt = nw_chart_kt,
    .chart = &peterson_tension_chart,
};

static const nw_chart roark_bending_chart = {
    .x = nw_ratio_depth_one,
    .branches =
        {
            {4.0,
             {{0.721, 2.394, -0.127},
              {-0.426, -8.827, 1.518},
              {2.161, 10.968, -2.455},
              {-1.456, -4.535, 1.064}}},
        },
};

static const nw_kt_formula roark_bending = {
    .key = "roark",
    .equation = nw_chart_equation,
    .source = nw_source_roark_memory,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.5, 4.0}},
    .fe_points = 13,
    .fe_low_percent = -5.7,
    .fe_high_percent = 6.3,
    .kt = nw_chart_kt,
    .chart = &roark_bending_chart,
};

static const nw_chart peterson_bending_chart = {
    .x = nw_ratio_depth_one,
    .plain = true,
    .branches =
        {
            {2.0,
             {{1.795, 1.481, -0.211},
              {-3.544, -3.677, 0.578},
              {5.459, 3.691, -0.565},
              {-2.678, -1.531, 0.205}}},
            {20.0,
             {{2.966, 0.502, -0.009},
              {-6.475, -1.126, 0.019},
              {8.023, 1.253, -0.02},
              {-3.572, -0.634, 0.01}}},
        },
};

static const nw_kt_formula peterson_bending = {
    .key = "peterson",
    .equation = nw_chart_equation_plain,
    .source = nw_source_peterson,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.5, 20.0}},
    .fe_points = 21,
    .fe_low_percent = -6.9,
    .fe_high_percent = 14.6,
    .kt = nw_chart_kt,
    .chart = &peterson_bending_chart,
};

/* ---- force along the middle of the gross section ---- */

static double gross_line_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    const nw_kt_formula *const *parts = formula->chart;
    double x = nw_ratio_depth_one(sizes);
    return parts[0]->kt(parts[0], sizes) + parts[1]->kt(parts[1], sizes) * 3.0 * x / (1.0 - x);
}

static const nw_kt_formula *const roark_parts[] = {&roark_tension, &roark_bending};
static const nw_kt_formula *const peterson_parts[] = {&peterson_tension, &peterson_bending};

static const nw_kt_formula roark_gross_line = {
    .key = "roark",
    .equation =
        "Kt = Kt(tension) + Kt(bending) 3 x/(1 - x), x = t/W, by superposition of the two fits",
    .source = nw_source_roark_memory,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.5, 4.0}},
    .fe_points = 14,
    .fe_low_percent = -4.6,
    .fe_high_percent = 6.4,
    .kt = gross_line_kt,
    .chart = roark_parts,
};

static const nw_kt_formula peterson_gross_line = {
    .key = "peterson",
    .equation =
        "Kt = Kt(tension) + Kt(bending) 3 x/(1 - x), x = t/W, by superposition of the two fits",
    .source = nw_source_peterson_memory,
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.5, 20.0}},
    .fe_points = 21,
    .fe_low_percent = 0.8,
    .fe_high_percent = 11.4,
    .kt = gross_line_kt,
    .chart = peterson_parts,
};

/* Nominal stress at the root, tension and bending, over P/(h d): 1 + 3 x/(1 - x). */
static double with_bending(const nw_sizes *sizes)
{
    double x = nw_ratio_depth_one(sizes);
    return (1.0 + 2.0 * x) / (1.0 - x);
}

/* The solved factors are on that stress; here they are wanted on P/(h d). */
static double gross_line_reference(const void *surface, const nw_sizes *sizes, double *error)
{
    return nw_kt_surface_at(surface, sizes, error) * with_bending(sizes);
}

/* ---- loads ---- */

/* The line of the force is easily overlooked, and matters much. */
static void check_line(const nw_sizes *sizes, double kt, nw_cautions *cautions)
{
    double x = nw_ratio_depth_one(sizes);
    const nw_kt_formula *bending =
        nw_ratio_depth_radius(sizes) <= 4.0 ? &roark_bending : &peterson_bending;
    nw_caution_add(
        cautions, "line_of_force", "kt",
        "Kt holds for a force through the middle of the net section. A force along the "
        "middle of the gross section, the usual one in a long bar, gives about %.3g on the "
        "same nominal stress: load tension_gross_line.",
        kt + bending->kt(bending, sizes) * 3.0 * x / (1.0 - x));
}

static const nw_kt_formula *const tension_formulas[] = {&roark_tension, &peterson_tension, NULL};

static const nw_kt_formula *const gross_line_formulas[] = {&roark_gross_line, &peterson_gross_line,
                                                           NULL};

static const nw_kt_formula *const bending_formulas[] = {&roark_bending, &peterson_bending, NULL};

static const nw_shape_load tension = {
    .key = "tension",
    .nominal = "force through the middle of the net section: S = P/(h (W - t))",
    .kt_means = "largest principal stress at the root over S",
    .action = NW_ACTION_FORCE,
    .nominal_needs_h = true,
    .section = nw_section_flat_area,
    .formulas = tension_formulas,
    .reference = nw_kt_surface_at,
    .reference_data = &nw_kt_surface_edge_notch_tension,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_groove,
    .gradient_source = nw_gradient_din_743,
    .check = check_line,
};

static const nw_shape_load gross_line = {
    .key = "tension_gross_line",
    .nominal =
        "force along the middle of the gross section: S = P/(h (W - t)), without its bending",
    .kt_means = "largest principal stress at the root over S; it contains the bending",
    .action = NW_ACTION_FORCE,
    .nominal_needs_h = true,
    .section = nw_section_flat_area,
    .formulas = gross_line_formulas,
    .plain = with_bending,
    .reference = gross_line_reference,
    .reference_data = &nw_kt_surface_edge_notch_gross_line,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_groove,
    .gradient_source = nw_gradient_din_743,
};

static const nw_shape_load bending = {
    .key = "bending",
    .nominal = "in the plane of the bar, net section: S = 6 M/(h (W - t)^2)",
    .kt_means = "largest principal stress at the root over S",
    .action = NW_ACTION_MOMENT,
    .nominal_needs_h = true,
    .section = nw_section_flat_bending,
    .formulas = bending_formulas,
    .reference = nw_kt_surface_at,
    .reference_data = &nw_kt_surface_edge_notch_bending,
    .reference_how = nw_kt_surface_how,
    .gradient = nw_gradient_groove,
    .gradient_source = nw_gradient_din_743,
};

static void complete(nw_size_check *check)
{
    nw_size_required(check, NW_SIZE_R);
    nw_size_two_of_three(check, NW_SIZE_D_GROSS, NW_SIZE_D_NET, NW_SIZE_T, 1.0);
}

static const nw_shape_load *const loads[] = {&tension, &gross_line, &bending, NULL};

const nw_shape nw_shape_flat_bar_edge_notch = {
    .key = "flat_bar_edge_notch",
    .title = "Flat bar with U notch in one edge",
    .needs = "r and two of W, d and t; h for a force or moment",
    .sizes =
        {
            {NW_SIZE_D_GROSS, "W", "D", "width", NW_LENGTH, false},
            {NW_SIZE_D_NET, "d", NULL, "net width, W - t", NW_LENGTH, false},
            {NW_SIZE_R, "r", NULL, "notch root radius", NW_LENGTH, false},
            {NW_SIZE_T, "t", NULL, "depth, W - d", NW_LENGTH, false},
            {NW_SIZE_H, "h", NULL, "thickness (for a force or moment)", NW_LENGTH, false},
        },
    .loads = loads,
    .complete = complete,
    .applies = "a notch with parallel flanks, or an arc where r > t; the bar is free to bend",
};
