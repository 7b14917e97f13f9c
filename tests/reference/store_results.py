"""Assesses every case of a folder with the reference and stores the numbers that the tests compare.

    python3 random_cases.py cases 60 2026
    python3 store_results.py cases

writes cases/results.csv; needs NumPy, SciPy (1.10.1 was used) and PyYAML. An infinite life is stored as -1.
"""
import pathlib
import sys

import assess_reference

COLUMNS = ("damage_first_block", "damage_per_block", "life_blocks")
EXTREMES = ("stress_max_mpa", "stress_min_mpa", "strain_max", "strain_min")


def row(path):
    result = assess_reference.assess(assess_reference.read_case(path))
    values = [result[name] for name in COLUMNS] + [result["extremes"][name] for name in EXTREMES]
    values += [result["loops_total"], result["block"]["turning_points"]]
    return ",".join([path.name] + [repr(float(-1.0 if v is None else v)) for v in values])


def main():
    directory = pathlib.Path(sys.argv[1])
    header = ",".join(("case",) + COLUMNS + EXTREMES + ("loops_total", "turning_points"))
    rows = [row(path) for path in sorted(directory.glob("*.yaml"))]
    (directory / "results.csv").write_text("\n".join([header] + rows) + "\n", encoding="utf-8")


if __name__ == "__main__":
    main()
