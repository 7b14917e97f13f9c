/* The shape records, one file each, and what they share. */
#ifndef NW_NOTCH_SHAPES_H
#define NW_NOTCH_SHAPES_H

#include "notchwright/shape.h"

extern const nw_shape nw_shape_round_bar_fillet;
extern const nw_shape nw_shape_round_bar_groove;
extern const nw_shape nw_shape_round_bar_cross_hole;
extern const nw_shape nw_shape_flat_bar_fillet;
extern const nw_shape nw_shape_flat_bar_notches;
extern const nw_shape nw_shape_flat_bar_edge_notch;
extern const nw_shape nw_shape_flat_bar_hole;
extern const nw_shape nw_shape_flat_bar_offset_hole;
extern const nw_shape nw_shape_ellipse_in_plate;
extern const nw_shape nw_shape_shallow_edge_notch;

static inline double nw_size_of(const nw_sizes *sizes, nw_size size)
{
    return sizes->value[size];
}

/* ---- ratios (shape_ratio.c) ---- */

double nw_ratio_depth_radius(const nw_sizes *sizes); /* q = t/r */
double nw_ratio_depth_both(const nw_sizes *sizes);   /* x = 2t/D */
double nw_ratio_depth_one(const nw_sizes *sizes);    /* x = t/W */
double nw_ratio_gross_net(const nw_sizes *sizes);    /* D/d */
double nw_ratio_radius_net(const nw_sizes *sizes);   /* r/d */
double nw_ratio_hole_width(const nw_sizes *sizes);   /* d/W */

/* ---- nominal sections (shape_section.c) ---- */

double nw_section_round_area(const nw_sizes *sizes);    /* pi d^2/4 */
double nw_section_round_bending(const nw_sizes *sizes); /* pi d^3/32 */
double nw_section_round_torsion(const nw_sizes *sizes); /* pi d^3/16 */
double nw_section_flat_area(const nw_sizes *sizes);     /* h d */
double nw_section_flat_bending(const nw_sizes *sizes);  /* h d^2/6 */

/* ---- gradients after DIN 743-2 (shape_gradient.c) ---- */

extern const char nw_gradient_din_743[];
extern const char nw_gradient_kirsch[];
double nw_gradient_shoulder(const nw_sizes *sizes);         /* 2.3 (1 + phi)/r */
double nw_gradient_shoulder_torsion(const nw_sizes *sizes); /* 1.15/r */
double nw_gradient_groove(const nw_sizes *sizes);           /* 2 (1 + phi)/r */
double nw_gradient_groove_torsion(const nw_sizes *sizes);   /* 1/r */
double nw_gradient_hole(const nw_sizes *sizes);             /* 7/(3r), Kirsch */
double nw_gradient_hole_shear(const nw_sizes *sizes);       /* 3/r, Kirsch in pure shear */

/* ---- chart fits (shape_chart.c) ---- */

/* Kt = C1 + C2 x + C3 x^2 + C4 x^3, Ci = c[i][0] + c[i][1] p + c[i][2] p^2 with p = sqrt(q), or q where
 * `plain`; q = t/r. One or two branches in q, in rising order; the second with high == 0 is absent. */
typedef struct nw_chart {
    double (*x)(const nw_sizes *sizes);
    bool plain;
    struct {
        double high;
        double c[4][3];
    } branches[2];
} nw_chart;

double nw_chart_kt(const nw_kt_formula *formula, const nw_sizes *sizes);

extern const char nw_chart_equation[], nw_chart_equation_plain[];
extern const char nw_source_peterson[], nw_source_peterson_memory[];
extern const char nw_source_roark[], nw_source_roark_memory[];

/* ---- notes that several loads carry (shape_notes.c) ---- */

extern const char nw_note_shear[];
extern const char nw_note_gross[];

/* ---- sizes being completed (shape_size.c) ---- */

typedef struct nw_size_check {
    const nw_shape *shape;
    nw_sizes *sizes;
    const char *path; /* "" : none */
    const nw_place *place;
    nw_diagnostics *diagnostics;
    nw_status status;
} nw_size_check;

/* Adds a fault at a size. */
void nw_size_fault(nw_size_check *check, nw_size size, const char *format, ...) NW_PRINTF(3, 4);

/* Faults what was given and is no length above 0. */
void nw_size_check_signs(nw_size_check *check);

/* True when known; a fault otherwise. */
bool nw_size_required(nw_size_check *check, nw_size size);

/* big = small + times x part: completes the one that is missing, refuses two that are missing or three that
 * contradict one another, and refuses big <= small. True when all three are known and fit. */
bool nw_size_two_of_three(nw_size_check *check, nw_size big, nw_size small, nw_size part,
                          double times);

/* ---- finite elements (kt_reference.c) ---- */

/* Kt = 1 + Y S interpolated between solved points: see kt_reference.c. */
typedef struct nw_kt_surface {
    double (*x)(const nw_sizes *sizes);
    double corner_exponent; /* m of S */
    int degree;             /* of Y, in total */
    const double *coefficients;
    const double (
        *hull)[2]; /* corners of the convex hull of the points, in (w, x), anticlockwise */
    int hull_corners;
    int points;
    double error_percent; /* twice the leave-one-out error, or the largest residual */
} nw_kt_surface;

extern const nw_kt_surface nw_kt_surface_round_fillet_tension;
extern const nw_kt_surface nw_kt_surface_round_fillet_bending;
extern const nw_kt_surface nw_kt_surface_round_fillet_torsion;
extern const nw_kt_surface nw_kt_surface_round_groove_tension;
extern const nw_kt_surface nw_kt_surface_round_groove_bending;
extern const nw_kt_surface nw_kt_surface_round_groove_torsion;
extern const nw_kt_surface nw_kt_surface_flat_fillet_tension;
extern const nw_kt_surface nw_kt_surface_flat_fillet_bending;
extern const nw_kt_surface nw_kt_surface_flat_notches_tension;
extern const nw_kt_surface nw_kt_surface_flat_notches_bending;
extern const nw_kt_surface nw_kt_surface_edge_notch_tension;
extern const nw_kt_surface nw_kt_surface_edge_notch_gross_line;
extern const nw_kt_surface nw_kt_surface_edge_notch_bending;

/* Central hole in tension, on net stress (shape_flat_bar_hole.c). */
double nw_hole_tension_reference(const void *data, const nw_sizes *sizes, double *error_percent);
extern const char nw_hole_reference_how[];

/* `reference` of a load whose reference_data is a surface. */
double nw_kt_surface_at(const void *surface, const nw_sizes *sizes, double *error_percent);

extern const char nw_kt_surface_how[];

#endif
