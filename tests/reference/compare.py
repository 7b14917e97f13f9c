"""Compare `notchwright assess` with the independent reference.

Usage: python3 compare.py PROGRAM DIR [--tolerance 1e-6]

Runs `PROGRAM assess CASE --format json` on every .yaml case in DIR, prints a
line for every disagreement and a summary, and exits with 1 if there was any.
"""

import argparse
import json
import pathlib
import subprocess
import sys

import assess_reference

# Damage smaller than this per block is a life no one can tell from infinite;
# it appears where the peak stress is zero but for rounding.
NO_DAMAGE = 1e-20

# Loops of one result that lie closer together (see `distance`) are one loop.
SAME_LOOP = 1e-7

# Each pair is judged relative to the larger of its two sizes: one of them may be
# close to zero as the small difference of large numbers.
EXTREME_PAIRS = (("stress_max_mpa", "stress_min_mpa"), ("strain_max", "strain_min"))
LOOP_PAIRS = (("load_max_mpa", "load_min_mpa"), ("stress_max_mpa", "stress_min_mpa"),
              ("strain_amplitude", "strain_mean"))


class Judge:
    """Collects disagreements between one pair of results."""

    def __init__(self, tolerance):
        self.tolerance = tolerance
        self.disagreements = []

    def close(self, what, found, expected, floor=0.0):
        """Agree within the tolerance, or within `floor` absolutely."""
        if found is None or expected is None:
            agree = found is expected
        else:
            size = max(abs(found), abs(expected))
            agree = abs(found - expected) <= max(self.tolerance * size, floor)
        if not agree:
            self.disagreements.append(f"{what}: found {found!r}, expected {expected!r}")

    def equal(self, what, found, expected):
        if found != expected:
            self.disagreements.append(f"{what}: found {found!r}, expected {expected!r}")

    def pairs(self, what, names, found, expected):
        for pair in names:
            floor = self.tolerance * max(abs(expected[name]) for name in pair)
            for name in pair:
                self.close(f"{what}.{name}", found[name], expected[name], floor)


def distance(a, b):
    """How far apart two loops lie in load, stress and strain, relative to b."""
    load_range = b["load_max_mpa"] - b["load_min_mpa"]
    sizes = {"load_max_mpa": load_range, "load_min_mpa": load_range,
             "stress_max_mpa": load_range, "stress_min_mpa": load_range,
             "strain_mean": b["strain_amplitude"], "strain_amplitude": b["strain_amplitude"]}
    return max(abs(a[name] - b[name]) / size for name, size in sizes.items())


def merged(loops):
    """Distinct loops with their counts and damages added up."""
    result = []
    for loop in loops:
        twin = next((other for other in result if distance(loop, other) <= SAME_LOOP), None)
        if twin is None:
            result.append(dict(loop))
        else:
            for name in ("count", "damage", "share"):
                twin[name] = (twin[name] or 0) + (loop[name] or 0)
    return result


def loop_name(loop):
    return (f"loop {loop['load_max_mpa']:.6g}..{loop['load_min_mpa']:.6g} MPa"
            f" at {loop['stress_max_mpa']:.6g} MPa")


def compare_loop(judge, found, expected, damage_per_block):
    name = loop_name(expected)
    judge.equal(f"{name}.count", found["count"], expected["count"])
    judge.pairs(name, LOOP_PAIRS, found, expected)
    judge.close(f"{name}.stress_mean_mpa", found["stress_mean_mpa"], expected["stress_mean_mpa"],
                judge.tolerance * abs(expected["stress_max_mpa"] - expected["stress_min_mpa"]))
    # A loop that adds next to nothing may sit where life hangs on a stress near zero.
    floor = max(NO_DAMAGE, 1e-3 * judge.tolerance * damage_per_block)
    judge.close(f"{name}.damage", found["damage"], expected["damage"], floor)
    judge.close(f"{name}.share", found["share"] or 0.0, expected["share"], 1e-3 * judge.tolerance)
    if expected["damage"] > floor:
        judge.close(f"{name}.cycles_to_initiation", found["cycles_to_initiation"],
                    expected["cycles_to_initiation"])


def compare_loops(judge, found, expected, damage_per_block):
    """Pair every expected loop with the nearest one found."""
    found, expected = merged(found), merged(expected)
    for loop in expected:
        if not found:
            judge.disagreements.append(f"{loop_name(loop)}: missing")
            continue
        nearest = min(found, key=lambda other: distance(other, loop))
        found.remove(nearest)
        compare_loop(judge, nearest, loop, damage_per_block)
    for loop in found:
        judge.disagreements.append(f"{loop_name(loop)}: not in the reference")


def compare_results(found, expected, tolerance):
    """Disagreements, one text each, of a result with the reference result."""
    judge = Judge(tolerance)
    for name in ("damage_first_block", "damage_per_block"):
        judge.close(name, found[name], expected[name], NO_DAMAGE)
    if max(expected["damage_first_block"], expected["damage_per_block"]) > NO_DAMAGE:
        judge.close("life_blocks", found["life_blocks"], expected["life_blocks"])
    judge.pairs("extremes", EXTREME_PAIRS, found["extremes"], expected["extremes"])
    judge.equal("loops_total", found["loops_total"], expected["loops_total"])
    judge.equal("block.turning_points", found["block"]["turning_points"],
                expected["block"]["turning_points"])
    judge.pairs("block", (("load_max_mpa", "load_min_mpa"),), found["block"], expected["block"])
    compare_loops(judge, found["loops"], expected["loops"], expected["damage_per_block"])
    return judge.disagreements


def run_program(program, path):
    run = subprocess.run([program, "assess", str(path), "--format", "json"],
                         capture_output=True, text=True, check=False)
    if run.returncode != 0:
        raise ValueError(f"exit status {run.returncode}: {run.stderr.strip()}")
    return json.loads(run.stdout, parse_constant=refuse_constant)


def refuse_constant(text):
    raise ValueError(f"{text} in the JSON result")


def compare_case(program, path, tolerance):
    try:
        found = run_program(program, path)
        expected = assess_reference.assess(assess_reference.read_case(str(path)))
        return compare_results(found, expected, tolerance)
    except assess_reference.CaseError as error:
        return [f"the reference refuses the case: {error}"]
    except ValueError as error:
        return [f"no result: {error}"]
    except (KeyError, TypeError) as error:
        return [f"result out of shape: {type(error).__name__} {error}"]


def main():
    parser = argparse.ArgumentParser(description=__doc__.split("\n", maxsplit=1)[0])
    parser.add_argument("program")
    parser.add_argument("directory", type=pathlib.Path)
    parser.add_argument("--tolerance", type=float, default=1e-6)
    options = parser.parse_args()

    cases = sorted(options.directory.glob("*.yaml"))
    if not cases:
        parser.error(f"no .yaml case in {options.directory}")
    wrong = 0
    for path in cases:
        disagreements = compare_case(options.program, path, options.tolerance)
        wrong += bool(disagreements)
        for text in disagreements:
            print(f"{path.name}: {text}")
    print(f"{len(cases)} cases, {len(cases) - wrong} agree, {wrong} disagree"
          f" (relative tolerance {options.tolerance:g})")
    return 1 if wrong else 0


if __name__ == "__main__":
    sys.exit(main())
