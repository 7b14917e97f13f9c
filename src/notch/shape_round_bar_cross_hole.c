/* Round bar or tube with a hole across it. D outer diameter, d bore, r radius of the hole; k = d/D, y = 2r/D. */
#include "notch/shapes.h"

#include <math.h>

static const double pi = 3.14159265358979323846;

static double share_of_hole(const nw_sizes *sizes)
{
    return 2.0 * nw_size_of(sizes, NW_SIZE_R) / nw_size_of(sizes, NW_SIZE_D_GROSS);
}

static double share_of_bore(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_D_NET) / nw_size_of(sizes, NW_SIZE_D_GROSS);
}

/* Kt = C1 + C2 y + C3 y^2 + C4 y^3, Ci = c[i][0] + c[i][1] k + c[i][2] k^2. */
typedef struct cubic {
    double c[4][3];
} cubic;

static double cubic_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    const cubic *chart = formula->chart;
    double y = share_of_hole(sizes), k = share_of_bore(sizes), kt = 0.0;
    for (int i = 3; i >= 0; i--) {
        const double *c = chart->c[i];
        kt = kt * y + c[0] + k * (c[1] + k * c[2]);
    }
    return kt;
}

static const cubic tension_cubic = {{{3.0, 0.0, 0.0},
                                     {2.773, 1.529, -4.379},
                                     {-0.421, -12.782, 22.781},
                                     {16.841, 16.678, -40.007}}};
static const cubic bending_cubic = {{{3.0, 0.0, 0.0},
                                     {-6.690, -1.620, 4.432},
                                     {44.739, 10.724, -19.927},
                                     {-53.307, -25.998, 43.258}}};
static const cubic torsion_cubic = {
    {{4.0, 0.0, 0.0}, {-6.793, 1.133, -0.126}, {38.382, -7.242, 6.495}, {-44.576, -7.428, 58.656}}};

static const char equation[] =
    "Kt = C1 + C2 y + C3 y^2 + C4 y^3, Ci polynomials in d/D (d the bore), y = 2r/D";

static const nw_kt_formula roark_tension = {
    .key = "roark",
    .equation = equation,
    .source = nw_source_roark_memory,
    .ranges = {{"2r/D", share_of_hole, 0.0, 0.45}},
    .kt = cubic_kt,
    .chart = &tension_cubic,
};

static const nw_kt_formula roark_bending = {
    .key = "roark",
    .equation = equation,
    .source = nw_source_roark_memory,
    .ranges = {{"2r/D", share_of_hole, 0.0, 0.3}},
    .kt = cubic_kt,
    .chart = &bending_cubic,
};

static const nw_kt_formula roark_torsion = {
    .key = "roark",
    .equation = equation,
    .source = nw_source_roark,
    .ranges = {{"2r/D", share_of_hole, 0.0, 0.4}, {"d/D", share_of_bore, 0.0, 0.9}},
    .kt = cubic_kt,
    .chart = &torsion_cubic,
};

/* ---- gross sections ---- */

static double area(const nw_sizes *sizes)
{
    double big = nw_size_of(sizes, NW_SIZE_D_GROSS), k = share_of_bore(sizes);
    return pi * big * big * (1.0 - k * k) / 4.0;
}

static double bending_modulus(const nw_sizes *sizes)
{
    double big = nw_size_of(sizes, NW_SIZE_D_GROSS), k = share_of_bore(sizes);
    return pi * big * big * big * (1.0 - k * k * k * k) / 32.0;
}

static double torsion_modulus(const nw_sizes *sizes)
{
    return 2.0 * bending_modulus(sizes);
}

/* ---- loads ---- */

static const nw_kt_formula *const tension_formulas[] = {&roark_tension, NULL};
static const nw_kt_formula *const bending_formulas[] = {&roark_bending, NULL};
static const nw_kt_formula *const torsion_formulas[] = {&roark_torsion, NULL};

static const nw_shape_load tension = {
    .key = "tension",
    .nominal = "gross section: S = 4 P/(pi (D^2 - d^2))",
    .kt_means = "largest principal stress at the edge of the hole over S",
    .action = NW_ACTION_FORCE,
    .section = area,
    .formulas = tension_formulas,
    .gradient = nw_gradient_hole,
    .gradient_source = nw_gradient_kirsch,
    .notes = {{"gross_section", "nominal", nw_note_gross}},
};

static const nw_shape_load bending = {
    .key = "bending",
    .nominal = "gross section: S = 32 M D/(pi (D^4 - d^4)); the axis of the hole in the plane of "
               "bending",
    .kt_means = "largest principal stress at the edge of the hole over S",
    .action = NW_ACTION_MOMENT,
    .section = bending_modulus,
    .formulas = bending_formulas,
    .gradient = nw_gradient_hole,
    .gradient_source = nw_gradient_kirsch,
    .notes = {{"gross_section", "nominal", nw_note_gross},
              {"coefficients_doubtful", "kt",
               "The coefficients are from memory, and lie 0.2 % from the one published value they "
               "could be held against."}},
};

static const nw_shape_load torsion = {
    .key = "torsion",
    .nominal = "gross section, shear: S = 16 T D/(pi (D^4 - d^4))",
    .kt_means = "largest principal stress at the edge of the hole over the shear stress S",
    .action = NW_ACTION_MOMENT,
    .section = torsion_modulus,
    .formulas = torsion_formulas,
    .gradient = nw_gradient_hole_shear,
    .gradient_source = nw_gradient_kirsch,
    .notes = {{"gross_section", "nominal", nw_note_gross},
              {"shear_nominal", "nominal",
               "S is a shear stress, the stress at the edge of the hole is a normal stress: Kt is "
               "near 4 for a small hole."}},
};

static const nw_shape_load *const loads[] = {&tension, &bending, &torsion, NULL};

static void complete(nw_size_check *check)
{
    double *value = check->sizes->value;
    if (isnan(value[NW_SIZE_D_NET])) {
        value[NW_SIZE_D_NET] = 0.0;
    }
    if (!nw_size_required(check, NW_SIZE_D_GROSS) || !nw_size_required(check, NW_SIZE_R)) {
        return;
    }
    if (value[NW_SIZE_D_NET] >= value[NW_SIZE_D_GROSS]) {
        nw_size_fault(check, NW_SIZE_D_NET, "found a bore of %g mm, expected less than D (%g mm)",
                      value[NW_SIZE_D_NET], value[NW_SIZE_D_GROSS]);
    }
    if (2.0 * value[NW_SIZE_R] >= value[NW_SIZE_D_GROSS]) {
        nw_size_fault(check, NW_SIZE_R,
                      "found a hole of diameter %g mm, expected less than D (%g mm)",
                      2.0 * value[NW_SIZE_R], value[NW_SIZE_D_GROSS]);
    }
}

const nw_shape nw_shape_round_bar_cross_hole = {
    .key = "round_bar_cross_hole",
    .title = "Round bar or tube with hole across it",
    .needs = "D and r (the hole's radius); d, the bore, for a tube",
    .sizes =
        {
            {NW_SIZE_D_GROSS, "D", NULL, "outer diameter", NW_LENGTH, false},
            {NW_SIZE_R, "r", NULL, "radius of the hole", NW_LENGTH, false},
            {NW_SIZE_D_NET, "d", NULL, "bore of the tube; 0, a solid bar, when not given",
             NW_LENGTH, true},
        },
    .loads = loads,
    .complete = complete,
    .applies = "a through hole square to the axis and through it",
};
