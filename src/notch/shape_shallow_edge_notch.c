/* A notch that is shallow beside everything else: the edge of a half plane, or the surface of a thick shaft in
 * torsion. The stress far away is the nominal one. */
#include "notch/shapes.h"

#include <math.h>

static const double pi = 3.14159265358979323846;

static double half_plane_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    (void)formula;
    return 0.855 + 2.21 * sqrt(nw_ratio_depth_radius(sizes));
}

/* Antiplane shear past a circular arc that meets the surface; th half the angle of the arc. */
static double arc_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    (void)formula;
    double half_angle = acos(1.0 - nw_ratio_depth_radius(sizes));
    double exponent = pi / (pi - half_angle), cosine = cos(half_angle / 2.0);
    return exponent * exponent * cosine * cosine;
}

static const nw_kt_formula half_plane = {
    .key = "half_plane",
    .equation = "Kt = 0.855 + 2.21 sqrt(t/r)",
    .source = "fit for a U notch in a half plane, in Peterson's Stress Concentration Factors (from "
              "memory); exact for a semicircle: 3.065",
    .ranges = {{"t/r", nw_ratio_depth_radius, 1.0, 100.0}},
    .kt = half_plane_kt,
};

static const nw_kt_formula arc = {
    .key = "arc",
    .equation = "Kt = (pi/(pi - th))^2 cos^2(th/2), cos th = 1 - t/r",
    .source = "exact solution for a circular arc in antiplane shear by conformal mapping (derived; "
              "2 for a semicircle)",
    .ranges = {{"t/r", nw_ratio_depth_radius, 0.0, 1.0}},
    .kt = arc_kt,
};

static double exact_arc(const void *data, const nw_sizes *sizes, double *error_percent)
{
    *error_percent = 0.0;
    return nw_ratio_depth_radius(sizes) <= 1.0 ? arc_kt(data, sizes) : NAN;
}

/* Two solved depths of the half plane: t/r = 1 gives 3.0653, t/r = 4 gives 5.338. */
static double solved_half_plane(const void *data, const nw_sizes *sizes, double *error_percent)
{
    (void)data;
    double q = nw_ratio_depth_radius(sizes);
    *error_percent = 0.5;
    return q >= 1.0 && q <= 4.0 ? 3.0653 + (5.338 - 3.0653) * (sqrt(q) - 1.0) : NAN;
}

static const nw_kt_formula *const tension_formulas[] = {&half_plane, NULL};
static const nw_kt_formula *const torsion_formulas[] = {&arc, NULL};

static const nw_shape_load tension = {
    .key = "tension",
    .nominal = "gross: S is the stress along the edge far from the notch",
    .kt_means = "stress at the root over S",
    .action = NW_ACTION_STRESS,
    .formulas = tension_formulas,
    .reference = solved_half_plane,
    .reference_how = "a straight line in sqrt(t/r) between the two solved depths t/r = 1 and 4 "
                     "(converged finite elements)",
};

static const nw_shape_load torsion = {
    .key = "torsion",
    .nominal = "gross, shear: S is the shear stress at the surface far from the groove",
    .kt_means = "largest shear stress at the root over S",
    .action = NW_ACTION_STRESS,
    .is_shear = true,
    .formulas = torsion_formulas,
    .reference = exact_arc,
    .reference_how = "the formula is the exact solution for a groove shallow beside the shaft",
    .gradient = nw_gradient_groove_torsion,
    .gradient_source = "exact for a groove in torsion that is shallow beside the shaft",
    .notes = {{"shear_stress", "kt", nw_note_shear}},
};

static const nw_shape_load *const loads[] = {&tension, &torsion, NULL};

static void complete(nw_size_check *check)
{
    nw_size_required(check, NW_SIZE_R);
    nw_size_required(check, NW_SIZE_T);
}

const nw_shape nw_shape_shallow_edge_notch = {
    .key = "shallow_edge_notch",
    .title = "Shallow notch in a wide edge, or groove in a thick shaft",
    .needs = "r and t",
    .sizes =
        {
            {NW_SIZE_R, "r", NULL, "notch root radius", NW_LENGTH, false},
            {NW_SIZE_T, "t", NULL, "depth", NW_LENGTH, false},
        },
    .loads = loads,
    .complete = complete,
    .applies =
        "depth small beside width or diameter: the net section hardly differs from the gross one",
};
