"""Surfaces through finite-element stress concentration factors: writes src/notch/kt_surface_table.c.

    python3 tests/reference/kt_surfaces.py > src/notch/kt_surface_table.c

kt_finite_elements.csv: converged finite-element solutions (Poisson's ratio 0.3), one a row: shape, load, t/r, x,
Kt, Kt in von Mises stress, ratio of second to first principal stress at the root, angle of the peak, relative
gradients times r. x is 2t/D (round, two-sided) or t/W (single). Kt is on the net section, but for `single` on the
gross one; there load G is a force along the middle of the gross section and B is bending.
kt_finite_element_checks.csv: the same by another program, on the net section; FU1_T is a force through the middle of
the net section. kt_finite_element_extremes.csv: six sharp or deep ones by a third (CalculiX). All are used.

Each set is written as Kt = 1 + Y S, with S = (g^-2 + f^-2)^(-1/2), g = sqrt(q) (1 + q)^(m - 1/2),
f = z/(1 + z)^(1 - m), q = t/r, z = q (1 - x)/x, and Y a polynomial in w = sqrt(q)/(1 + sqrt(q)) and x (Chebyshev
products of total degree n over the unit square), fitted by least squares of the relative error of Kt. S carries the
limits of shallow, deep, blunt and sharp notches; m is the exponent of the corner that is left as r -> 0. The degree is
the one with the smallest leave-one-out error, over the points that are no corners of the convex hull (a left-out
corner would be extrapolated, which the program never does). The error stated is twice that, or the largest residual. Needs
NumPy.
"""
import csv
import math
import os
import numpy as np
from numpy.polynomial import chebyshev

HERE = os.path.dirname(os.path.abspath(__file__))
DEGREES = (2, 3, 4)
NAMES = {
    ('fillet_r', 'T'): 'round_fillet_tension',
    ('fillet_r', 'B'): 'round_fillet_bending',
    ('fillet_r', 'S'): 'round_fillet_torsion',
    ('groove_r', 'T'): 'round_groove_tension',
    ('groove_r', 'B'): 'round_groove_bending',
    ('groove_r', 'S'): 'round_groove_torsion',
    ('fillet_f', 'T'): 'flat_fillet_tension',
    ('fillet_f', 'B'): 'flat_fillet_bending',
    ('notch_f', 'T'): 'flat_notches_tension',
    ('notch_f', 'B'): 'flat_notches_bending',
    ('single', 'T'): 'edge_notch_tension',
    ('single', 'G'): 'edge_notch_gross_line',
    ('single', 'B'): 'edge_notch_bending',
}


def read_sets():
    sets = {}
    for name in ('kt_finite_elements.csv', 'kt_finite_element_extremes.csv'):
        with open(os.path.join(HERE, name)) as file:
            for row in csv.DictReader(file):
                sets.setdefault((row['shape'], row['load']), []).append(
                    [float(row[k]) for k in ('q_t_over_r', 'x', 'Kt')])
    return {key: np.array(rows) for key, rows in sets.items()}


CHECKS = {'SHF': 'fillet_r', 'SUG': 'groove_r', 'FBF': 'fillet_f', 'FUU': 'notch_f', 'FU1': 'single'}


def add_checks(sets):
    with open(os.path.join(HERE, 'kt_finite_element_checks.csv')) as file:
        for row in csv.DictReader(file):
            shape, load = row['id'].split('_')
            point = [float(row[k]) for k in ('t_over_r', 'x', 'Kt_FE')]
            key = CHECKS[shape], load
            sets[key] = np.vstack([sets[key], point])


def single_notch(sets):
    """From gross to net. Through the middle of the net section: G less the bending by M = P t/2."""
    gross, bend = sets['single', 'G'], sets['single', 'B']
    through = []
    for q, x, kt in gross:
        for qb, xb, ktb in bend:
            if abs(qb / q - 1) < 1e-6 and abs(xb / x - 1) < 1e-6:
                through.append([q, x, (kt - 3 * x * ktb) * (1 - x)])
    sets['single', 'T'] = np.array(through)
    # over P/(h d) (1 + 3 x/(1 - x)), which is the largest nominal stress of the net section
    gross[:, 2] *= (1 - gross[:, 1])**2 / (1 + 2 * gross[:, 1])
    bend[:, 2] *= (1 - bend[:, 1])**2


def corner_exponent(key):
    if not key[0].startswith('fillet'):
        return 0.5
    return 1 / 3 if key[1] == 'S' else 0.4555


def stretch(q, x, m):
    z = q * (1 - x) / x
    g = np.sqrt(q) * (1 + q)**(m - 0.5)
    f = z / (1 + z)**(1 - m)
    return (g**-2 + f**-2)**-0.5


def products(w, x, degree):
    u, v = 2 * w - 1, 2 * x - 1
    return np.stack([chebyshev.chebval(u, [0] * i + [1]) * chebyshev.chebval(v, [0] * j + [1])
                     for i in range(degree + 1) for j in range(degree + 1 - i)], 1)


def fit(points, m, degree):
    """Coefficients of Y, leave-one-out error of Kt (root mean square) and largest residual, both relative."""
    q, x, kt = points.T
    s = stretch(q, x, m)
    weight = s / kt
    a = products(np.sqrt(q) / (1 + np.sqrt(q)), x, degree) * weight[:, None]
    y = (kt - 1) / s * weight
    inverse = np.linalg.pinv(a)
    residual = y - a @ (inverse @ y)
    left_out = residual / (1 - np.diag(a @ inverse))
    corners = set(hull_of(points))
    left_out = left_out[[p not in corners for p in zip(np.sqrt(q) / (1 + np.sqrt(q)), x)]]
    return inverse @ y, math.sqrt(np.mean(left_out**2)), np.max(np.abs(residual))


def hull_of(points):
    """Corners of the convex hull, anticlockwise."""
    q, x, _ = points.T
    rest = sorted(zip(np.sqrt(q) / (1 + np.sqrt(q)), x))

    def half(sequence):
        out = []
        for p in sequence:
            while len(out) > 1 and ((out[-1][0] - out[-2][0]) * (p[1] - out[-2][1]) -
                                    (out[-1][1] - out[-2][1]) * (p[0] - out[-2][0])) <= 0:
                out.pop()
            out.append(p)
        return out
    return half(rest)[:-1] + half(rest[::-1])[:-1]


def best(points, m):
    tries = []
    for degree in DEGREES:
        if (degree + 1) * (degree + 2) / 2 <= 0.6 * len(points):
            coefficients, error, largest = fit(points, m, degree)
            tries.append((error, degree, coefficients, max(2 * error, largest)))
    return min(tries, key=lambda t: t[0])[1:]


def write(key, points):
    name, m = NAMES[key], corner_exponent(key)
    degree, coefficients, error = best(points, m)
    hull = hull_of(points)
    ratio = 'nw_ratio_depth_one' if key[0] == 'single' else 'nw_ratio_depth_both'
    print(f'static const double {name}_c[] = {{{", ".join(f"{c:.9g}" for c in coefficients)}}};')
    print(f'static const double {name}_hull[][2] = {{'
          + ', '.join(f'{{{w:.6f}, {x:.6f}}}' for w, x in hull) + '};')
    print(f'const nw_kt_surface nw_kt_surface_{name} = {{.x = {ratio}, .corner_exponent = {m:.10g}, '
          f'.degree = {degree}, .coefficients = {name}_c, .hull = {name}_hull, .hull_corners = {len(hull)}, '
          f'.points = {len(points)}, .error_percent = {math.ceil(1000 * error) / 10}}};\n')


def main():
    sets = read_sets()
    single_notch(sets)
    add_checks(sets)
    print('/* Made by tests/reference/kt_surfaces.py from the finite-element tables beside it; not to be edited. */')
    print('#include "notch/shapes.h"\n')
    for key in NAMES:
        write(key, sets[key])


if __name__ == '__main__':
    main()
