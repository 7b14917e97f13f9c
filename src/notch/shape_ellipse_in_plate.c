/* Elliptical hole in a wide plate: semi-axis a across the first stress, b along it, r = b^2/a at the end of a. */
#include "notch/shapes.h"

#include <math.h>

static double uniaxial_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    (void)formula;
    return 1.0 + 2.0 * nw_size_of(sizes, NW_SIZE_A) / nw_size_of(sizes, NW_SIZE_B);
}

static double biaxial_kt(const nw_kt_formula *formula, const nw_sizes *sizes)
{
    return uniaxial_kt(formula, sizes) - nw_size_of(sizes, NW_SIZE_STRESS_RATIO);
}

static double stress_ratio(const nw_sizes *sizes)
{
    return nw_size_of(sizes, NW_SIZE_STRESS_RATIO);
}

static const char inglis[] = "exact (Inglis, Trans. Inst. Naval Arch. 55 (1913) 219)";

static const nw_kt_formula exact_uniaxial = {
    .key = "inglis",
    .equation = "Kt = 1 + 2 a/b = 1 + 2 sqrt(a/r)",
    .source = inglis,
    .kt = uniaxial_kt,
};

static const nw_kt_formula exact_biaxial = {
    .key = "inglis",
    .equation = "Kt = 1 + 2 a/b - S2/S1",
    .source = inglis,
    .kt = biaxial_kt,
};

/* The formula is elasticity itself. */
static double exact_reference(const void *data, const nw_sizes *sizes, double *error_percent)
{
    const nw_kt_formula *formula = data;
    *error_percent = 0.0;
    return formula->kt(formula, sizes);
}

static const char exact_how[] = "the formula is the exact solution for an infinite plate";

/* Relative gradient (2 + 1/Kt)/r at the end of a, from the same solution. */
static double gradient(const nw_sizes *sizes)
{
    return (2.0 + 1.0 / uniaxial_kt(NULL, sizes)) / nw_size_of(sizes, NW_SIZE_R);
}

/* The other end may be stressed more: S2 (1 + 2 b/a) - S1 at the end of b. */
static void check_other_end(const nw_sizes *sizes, double kt, nw_cautions *cautions)
{
    double a = nw_size_of(sizes, NW_SIZE_A), b = nw_size_of(sizes, NW_SIZE_B);
    double other = stress_ratio(sizes) * (1.0 + 2.0 * b / a) - 1.0;
    if (fabs(other) > kt) {
        nw_caution_add(cautions, "other_end_governs", "kt",
                       "The stress at the end of the axis b is %.4g S1, which is larger.", other);
    }
}

static const nw_kt_formula *const tension_formulas[] = {&exact_uniaxial, NULL};
static const nw_kt_formula *const biaxial_formulas[] = {&exact_biaxial, NULL};

static const nw_shape_load tension = {
    .key = "tension",
    .nominal = "gross: S is the stress far from the hole, across a",
    .kt_means = "stress at the end of the axis a over S; at the end of b it is -S",
    .action = NW_ACTION_STRESS,
    .formulas = tension_formulas,
    .reference = exact_reference,
    .reference_data = &exact_uniaxial,
    .reference_how = exact_how,
    .gradient = gradient,
    .gradient_source = "from the exact solution: (2 + 1/Kt)/r",
};

static const nw_shape_load biaxial = {
    .key = "biaxial",
    .nominal = "gross: S1 is the stress far from the hole across a, S2 = stress_ratio S1 along it",
    .kt_means = "stress at the end of the axis a over S1",
    .action = NW_ACTION_STRESS,
    .required = 1u << NW_SIZE_STRESS_RATIO,
    .formulas = biaxial_formulas,
    .reference = exact_reference,
    .reference_data = &exact_biaxial,
    .reference_how = exact_how,
    .check = check_other_end,
};

static const nw_shape_load *const loads[] = {&tension, &biaxial, NULL};

/* Two of a, b and r, r = b^2/a. */
static void complete(nw_size_check *check)
{
    double *value = check->sizes->value;
    double a = value[NW_SIZE_A], b = value[NW_SIZE_B], r = value[NW_SIZE_R];
    int given = !isnan(a) + !isnan(b) + !isnan(r);
    double ratio = value[NW_SIZE_STRESS_RATIO];
    if (given < 2) {
        nw_size_fault(check, isnan(a) ? NW_SIZE_A : NW_SIZE_B,
                      "missing, expected two of a, b and r = b^2/a");
    } else if (given == 3 && fabs(r - b * b / a) > 1e-4 * r) {
        nw_size_fault(check, NW_SIZE_R,
                      "found %g mm, expected b^2/a (%g mm): give two of the three", r, b * b / a);
    } else if (isnan(a)) {
        value[NW_SIZE_A] = b * b / r;
    } else if (isnan(b)) {
        value[NW_SIZE_B] = sqrt(a * r);
    } else {
        value[NW_SIZE_R] = b * b / a;
    }
    if (ratio > 1.0 || ratio < -1.0) {
        nw_size_fault(check, NW_SIZE_STRESS_RATIO,
                      "found %g, expected -1 to 1: S1 is the larger stress", ratio);
    }
}

const nw_shape nw_shape_ellipse_in_plate = {
    .key = "ellipse_in_plate",
    .title = "Elliptical hole in a wide plate",
    .needs = "two of a, b and r; stress_ratio for biaxial",
    .sizes =
        {
            {NW_SIZE_A, "a", NULL, "semi-axis across the stress", NW_LENGTH, false},
            {NW_SIZE_B, "b", NULL, "semi-axis along the stress", NW_LENGTH, false},
            {NW_SIZE_R, "r", NULL, "radius at the end of a, b^2/a", NW_LENGTH, false},
            {NW_SIZE_STRESS_RATIO, "stress_ratio", NULL,
             "second remote stress over the first, S2/S1", NW_PURE, false},
        },
    .loads = loads,
    .complete = complete,
    .applies = "a plate many times wider than the hole",
};
