/* Flat bar with a hole nearer to one edge, in tension: c from the centre of the hole to the near edge, e to the far
 * one, a = r; g = c/e. Gross stress. */
#include "notch/shapes.h"

#include <math.h>

static double hole_to_edge(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_R) / nw_size_of(sizes, NW_SIZE_C);
}

static double offset(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_C) / nw_size_of(sizes, NW_SIZE_E);
}

static double sjostrom_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    (void)formula;
    double y = hole_to_edge(sizes), g = offset(sizes);
    double c1 = 2.9969 + g * (-0.0090 + g * 0.01338);
    double c2 = 0.1217 + g * (0.5180 - g * 0.5297);
    double c3 = 0.5565 + g * (0.7215 + g * 0.6153);
    double c4 = 4.082 + g * (6.0146 - g * 3.9815);
    return c1 + y * (c2 + y * (c3 + y * c4));
}

static const nw_kt_formula peterson = {
    .key = "peterson",
    .equation = "Kt = C1 + C2 y + C3 y^2 + C4 y^3, Ci polynomials in c/e, y = r/c",
    .source = nw_source_peterson_memory,
    .ranges = {{"r/c", hole_to_edge, 0.0, 0.5}, {"c/e", offset, 0.0, 1.0}},
    .fe_points = 3, /* central: r/c = 0.1, 0.3, 0.5 */
    .fe_low_percent = -1.3,
    .fe_high_percent = 0.1,
    .kt = sjostrom_kt,
};

static double gross_area(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_H) * nw_size_of(sizes, NW_SIZE_D_GROSS);
}

/* Net over gross stress. */
static double net_over_gross(const nw_sizes *sizes)
{
    return 1.0 / (1.0 - nw_ratio_hole_width(sizes));
}

/* Only the central hole was solved. */
static double central_reference(const void *data, const nw_sizes *sizes, double *error_percent)
{
    double kt = nw_hole_tension_reference(data, sizes, error_percent);
    return fabs(offset(sizes) - 1.0) < 1e-6 ? kt * net_over_gross(sizes) : NAN;
}

static const nw_kt_formula *const tension_formulas[] = {&peterson, NULL};

static const nw_shape_load tension = {
    .key = "tension",
    .nominal = "gross section: S = P/(h W)",
    .kt_means = "stress at the edge of the hole, on the side of the near edge, over S",
    .action = NW_ACTION_FORCE,
    .nominal_needs_h = true,
    .section = gross_area,
    .formulas = tension_formulas,
    .reference = central_reference,
    .reference_how = nw_hole_reference_how,
    .plain = net_over_gross,
    .gradient = nw_gradient_hole,
    .gradient_source = nw_gradient_kirsch,
    .notes = {{"gross_section", "nominal", nw_note_gross}},
};

static const nw_shape_load *const loads[] = {&tension, NULL};

static void complete_radius(double *value)
{
    if (isnan(value[NW_SIZE_R])) {
        value[NW_SIZE_R] = value[NW_SIZE_D_NET] / 2.0;
    } else if (isnan(value[NW_SIZE_D_NET])) {
        value[NW_SIZE_D_NET] = 2.0 * value[NW_SIZE_R];
    }
}

/* r or d, and two of W, c and e. */
static void complete(nw_size_check *check)
{
    double *value = check->sizes->value;
    complete_radius(value);
    if (!nw_size_required(check, NW_SIZE_R)) {
        return;
    }
    if (fabs(value[NW_SIZE_D_NET] - 2.0 * value[NW_SIZE_R]) > 1e-4 * value[NW_SIZE_D_NET]) {
        nw_size_fault(check, NW_SIZE_R, "found %g mm, expected half of d (%g mm): give one of them",
                      value[NW_SIZE_R], value[NW_SIZE_D_NET]);
    }
    if (!nw_size_two_of_three(check, NW_SIZE_D_GROSS, NW_SIZE_C, NW_SIZE_E, 1.0)) {
        return;
    }
    if (value[NW_SIZE_C] > value[NW_SIZE_E] * (1.0 + 1e-9)) {
        nw_size_fault(check, NW_SIZE_C,
                      "found %g mm, expected the distance to the near edge, at most W/2 (%g mm)",
                      value[NW_SIZE_C], value[NW_SIZE_D_GROSS] / 2.0);
    } else if (value[NW_SIZE_R] >= value[NW_SIZE_C]) {
        nw_size_fault(check, NW_SIZE_R, "found %g mm, expected less than c (%g mm)",
                      value[NW_SIZE_R], value[NW_SIZE_C]);
    }
}

const nw_shape nw_shape_flat_bar_offset_hole = {
    .key = "flat_bar_offset_hole",
    .title = "Flat bar with hole off its middle",
    .needs = "r (or d) and two of W, c and e; h for a force",
    .sizes =
        {
            {NW_SIZE_D_GROSS, "W", "D", "width", NW_LENGTH, false},
            {NW_SIZE_R, "r", NULL, "radius of the hole", NW_LENGTH, false},
            {NW_SIZE_D_NET, "d", NULL, "diameter of the hole", NW_LENGTH, false},
            {NW_SIZE_C, "c", NULL, "distance from the hole's centre to the near edge", NW_LENGTH,
             false},
            {NW_SIZE_E, "e", NULL, "distance from the hole's centre to the far edge", NW_LENGTH,
             false},
            {NW_SIZE_H, "h", NULL, "thickness (for a force)", NW_LENGTH, false},
        },
    .loads = loads,
    .complete = complete,
    .applies = "uniform stress far from the hole; far from ends and other holes. No published "
               "factor for bending is built in",
};
