#!/usr/bin/env python3
"""Writes pchip_values.h: monotone curves interpolated by SciPy, for tests/unit/notch/test_monotone.c.

scipy.interpolate.PchipInterpolator is the shape-preserving cubic of Fritsch and Butland (1984), with the
three-point end slopes of Moler, Numerical Computing with MATLAB, chapter 3.

    python3 tests/reference/pchip_values.py
"""

import pathlib

import numpy
import scipy
from scipy.interpolate import PchipInterpolator

SETS = {
    "two points": ([0.0, 3.0], [0.0, 7.0]),
    "three points": ([0.0, 1.0, 4.0], [0.0, 2.0, 3.0]),
    "even": ([0.0, 1.0, 2.0, 3.0, 4.0], [0.0, 1.0, 1.5, 4.0, 4.5]),
    "stress of a notch": (
        [0.0, 100.0, 180.0, 250.0, 400.0, 500.0, 750.0, 1100.0],
        [0.0, 99.8, 175.0, 226.0, 292.0, 318.0, 360.0, 399.0],
    ),
    "strain of a notch": (
        [0.0, 100.0, 180.0, 250.0, 400.0, 500.0, 750.0, 1100.0],
        [0.0, 0.000485, 0.00089, 0.00135, 0.00266, 0.0038, 0.0076, 0.0147],
    ),
    "uneven steps": ([0.0, 0.01, 5.0, 5.02, 9.0], [0.0, 3.0, 3.1, 8.0, 8.0001]),
}
BETWEEN = (0.0, 0.1, 0.37, 0.5, 0.81, 0.99)


def line_of(name, x, y, at, value):
    numbers = lambda values: ", ".join(f"{v:.17g}" for v in values)
    return (
        f'    {{"{name}",\n     {len(x)},\n     {{{numbers(x)}}},\n     {{{numbers(y)}}},\n'
        f"     {len(at)},\n     {{{numbers(at)}}},\n     {{{numbers(value)}}}}},\n"
    )


def main():
    rows = []
    for name, (x, y) in SETS.items():
        at = [a + f * (b - a) for a, b in zip(x, x[1:]) for f in BETWEEN] + [x[-1]]
        value = PchipInterpolator(x, y)(numpy.array(at))
        rows.append(line_of(name, x, y, at, value))
    text = (
        f"/* Written by pchip_values.py with SciPy {scipy.__version__}. */\n"
        "static const struct {\n    const char *name;\n    size_t count;\n    double x[8], y[8];\n"
        "    size_t asked;\n    double at[43], value[43];\n} pchip_sets[] = {\n"
        + "".join(rows)
        + "};\n"
    )
    pathlib.Path(__file__).with_name("pchip_values.h").write_text(text, encoding="utf-8")


if __name__ == "__main__":
    main()
