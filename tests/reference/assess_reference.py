"""Independent reference for `notchwright assess`, written for clarity, not speed.

Usage: python3 assess_reference.py CASE.yaml

Needs NumPy, SciPy and PyYAML. It shares no code with the program: every point
of the notch curve and every loop life is one scipy.optimize.brentq call, every
repeat of an event is a literal copy, and the block is simply passed twice.
It covers the parts of the case format that decide a life; anything else
(notch shapes, plane strain, surface and survival options, the material
library) is refused rather than guessed.
"""

import json
import math
import os
import re
import sys
from collections import namedtuple

import numpy
import yaml
from scipy.interpolate import PchipInterpolator
from scipy.optimize import brentq

PSI_IN_MPA = 4.4482216152605 / 645.16
STRESS_UNITS = {"Pa": 1e-6, "kPa": 1e-3, "MPa": 1.0, "GPa": 1e3,
                "psi": PSI_IN_MPA, "ksi": 1e3 * PSI_IN_MPA}
STRAIN_UNITS = {"": 1.0, "%": 1e-2, "microstrain": 1e-6}


class CaseError(Exception):
    """The case is wrong, or asks for something the reference leaves out."""


def quantity(value, units, what, default_unit=""):
    """Read `820 MPa`, a bare number in the default unit, or a bare zero."""
    number, unit = re.fullmatch(r"([-+.\deE]*)\s*(.*)", str(value).strip()).groups()
    unit = unit or default_unit
    if not unit and float(number) == 0.0:
        return 0.0
    if unit not in units:
        raise CaseError(f"{what}: unit in {value!r}, expected one of {sorted(units)}")
    return float(number) * units[unit]


# --- Material ---------------------------------------------------------------

Material = namedtuple(
    "Material", "modulus strength_coefficient hardening_exponent "
    "sigma_f b epsilon_f c group ultimate endurance_strain")


def uniform_material_law(group, ultimate, modulus):
    """Baeumel & Seeger 1990: all constants from the tensile strength."""
    if group == "steel":
        ratio = ultimate / modulus
        psi = 1.0 if ratio <= 0.003 else max(0.0, 1.375 - 125.0 * ratio)
        return Material(modulus, 1.65 * ultimate, 0.15, 1.5 * ultimate, -0.087,
                        0.59 * psi, -0.58, group, ultimate,
                        0.45 * ratio + 1.95e-4 * psi)
    if group in ("aluminium", "titanium"):
        return Material(modulus, 1.61 * ultimate, 0.11, 1.67 * ultimate, -0.095,
                        0.35, -0.69, group, ultimate, 0.42 * ultimate / modulus)
    raise CaseError(f"material: the uniform material law does not cover {group!r}")


def read_material(entry, stress_unit):
    if not isinstance(entry, dict):
        raise CaseError("material: the reference reads inline maps only")

    def stress(table, key):
        return quantity(table[key], STRESS_UNITS, key, stress_unit)

    modulus = stress(entry, "youngs_modulus")
    group = entry.get("group", "other")
    ultimate = stress(entry, "ultimate_strength") if "ultimate_strength" in entry else None
    if "estimate" in entry:
        if entry["estimate"] != "uniform_material_law":
            raise CaseError(f"material: estimate {entry['estimate']!r} is not covered")
        return uniform_material_law(group, ultimate, modulus)

    life = entry["strain_life"]
    sigma_f = stress(life, "fatigue_strength_coefficient")
    b = float(life["fatigue_strength_exponent"])
    epsilon_f = quantity(life["fatigue_ductility_coefficient"], STRAIN_UNITS,
                         "fatigue_ductility_coefficient")
    c = float(life["fatigue_ductility_exponent"])
    if "cyclic_curve" in entry:
        strength = stress(entry["cyclic_curve"], "strength_coefficient")
        hardening = float(entry["cyclic_curve"]["hardening_exponent"])
    else:  # compatibility of the two curves
        hardening = b / c
        strength = sigma_f / epsilon_f ** hardening
    endurance = entry.get("endurance", {}).get("strain_amplitude")
    if endurance is not None:
        endurance = quantity(endurance, STRAIN_UNITS, "endurance.strain_amplitude")
    return Material(modulus, strength, hardening, sigma_f, b, epsilon_f, c,
                    group, ultimate, endurance)


def cyclic_strain(material, stress):
    """Cyclic stress-strain curve (Ramberg-Osgood) for stress >= 0."""
    return (stress / material.modulus
            + (stress / material.strength_coefficient) ** (1.0 / material.hardening_exponent))


def strain_energy(material, stress):
    """Strain energy density under the cyclic curve up to `stress`."""
    n = material.hardening_exponent
    plastic = stress / (n + 1.0) * (stress / material.strength_coefficient) ** (1.0 / n)
    return stress ** 2 / (2.0 * material.modulus) + plastic


# --- Notch curve: pseudo-elastic notch stress L -> local stress and strain --

class NotchCurve:
    """One equation per rule, solved afresh for every new L (kept for reuse)."""

    def __init__(self, material, rule, factor=None, plastic_net_section=False,
                 limit_load_ratio=None):
        if plastic_net_section and rule not in ("neuber", "esed"):
            raise CaseError(f"notch: net_section plastic has no meaning for rule {rule}")
        self.material = material
        self.rule = rule
        self.factor = factor
        self.plastic_net_section = plastic_net_section
        self.limit_load_ratio = limit_load_ratio
        self.known = {0.0: (0.0, 0.0)}

    def sides(self, load):
        """The rule as left(stress) = right, both increasing."""
        material = self.material
        modulus = material.modulus
        if self.rule == "linear":
            return (lambda s: cyclic_strain(material, s)), load / modulus
        if self.rule == "esed":
            right = load ** 2 / (2.0 * modulus)
            if self.plastic_net_section:
                right = self.factor ** 2 * strain_energy(material, load / self.factor)
            return (lambda s: strain_energy(material, s)), right
        if self.rule == "neuber":
            right = load ** 2 / modulus
            if self.plastic_net_section:
                nominal = load / self.factor
                right = self.factor ** 2 * nominal * cyclic_strain(material, nominal)
        elif self.rule == "limit_load":
            ratio = self.limit_load_ratio
            right = load * ratio * cyclic_strain(material, load / ratio)
        else:
            raise CaseError(f"notch: rule {self.rule!r} is not covered")
        return (lambda s: s * cyclic_strain(material, s)), right

    def solve(self, load):
        left, right = self.sides(load)
        # The root lies in (0, L]; a little room above for rounding at L itself.
        share = brentq(lambda u: left(u * load) / right - 1.0, 0.0, 1.0 + 1e-6,
                       xtol=1e-16, rtol=4.0 * numpy.finfo(float).eps, maxiter=500)
        stress = share * load
        strain = load / self.material.modulus if self.rule == "linear" \
            else cyclic_strain(self.material, stress)
        return stress, strain

    def at(self, load):
        """Local (stress, strain); the curve is odd in L."""
        size = abs(load)
        if size not in self.known:
            self.known[size] = self.solve(size)
        stress, strain = self.known[size]
        return (stress, strain) if load >= 0.0 else (-stress, -strain)


class TableCurve(NotchCurve):
    """Rule `curve`: a table from a calibrated elastic-plastic run."""

    def __init__(self, material, loads, stresses, strains):
        super().__init__(material, "curve")
        if loads[0] != 0.0:
            loads, stresses, strains = (numpy.concatenate(([0.0], column))
                                        for column in (loads, stresses, strains))
        self.last = loads[-1]
        self.stress = PchipInterpolator(loads, stresses)
        self.strain = PchipInterpolator(loads, strains)

    def solve(self, load):
        if load > self.last:
            raise CaseError(f"notch curve ends at {self.last} MPa, {load} MPa is asked for")
        return float(self.stress(load)), float(self.strain(load))


# --- Files ------------------------------------------------------------------

def read_table(path):
    """Column names (or None) and a 2-D array from .npy or delimited text."""
    if path.endswith(".npy"):
        values = numpy.load(path).astype(float)
        return None, values.reshape(len(values), -1)
    with open(path, encoding="utf-8-sig") as file:
        lines = [line.split("#")[0].strip() for line in file]
    lines = [line for line in lines if line]
    delimiter = next((d for d in "\t;," if d in lines[0]), None)
    rows = [[field.strip() for field in line.split(delimiter)] for line in lines]
    try:
        [float(field) for field in rows[0]]
        names = None
    except ValueError:
        names = rows.pop(0)
    return names, numpy.array(rows, dtype=float)


def read_history(event, directory):
    history = event["history"]
    if isinstance(history, list):
        return [float(value) for value in history]
    names, values = read_table(os.path.join(directory, history))
    column = event.get("column", 1)
    if isinstance(column, int):
        return values[:, column - 1].tolist()
    if names is None or column not in names:
        raise CaseError(f"history: no column {column!r} in {history}")
    return values[:, names.index(column)].tolist()


def read_notch_curve(path, material):
    """Columns load[unit], stress[unit], strain, in any order."""
    names, values = read_table(path)
    columns = {}
    for index, header in enumerate(names or ()):
        name, _, unit = header.partition("[")
        units = STRAIN_UNITS if name.strip() == "strain" else STRESS_UNITS
        unit = unit.rstrip("] ")
        columns[name.strip()] = values[:, index] * units[unit]
    return TableCurve(material, columns["load"], columns["stress"], columns["strain"])


# --- Case -------------------------------------------------------------------

Event = namedtuple("Event", "loads repeats ignore_below")
Case = namedtuple("Case", "title material curve notch events residual life")


def read_event(event, directory, material, factor, stress_unit):
    """One event as pseudo-elastic notch stress, without residual stress."""
    kind = event.get("as", "nominal_stress")
    if kind == "notch_strain":
        units, default, multiplier = STRAIN_UNITS, "", material.modulus
    elif kind == "notch_elastic_stress":
        units, default, multiplier = STRESS_UNITS, stress_unit, 1.0
    elif kind == "nominal_stress":
        if factor is None:
            raise CaseError("notch: nominal stress needs kt or kf")
        units, default, multiplier = STRESS_UNITS, stress_unit, factor
    else:
        raise CaseError(f"load: as {kind!r} is not covered")
    scale = quantity(event.get("scale", 1), units, "scale", default)
    offset = quantity(event.get("offset", 0), units, "offset", default)
    ignore = quantity(event.get("ignore_ranges_below", 0), STRESS_UNITS,
                      "ignore_ranges_below", stress_unit)
    loads = [multiplier * (scale * value + offset)
             for value in read_history(event, directory)]
    return Event(loads, int(event.get("repeats", 1)), ignore)


def read_curve(notch, material, factor, strain_imposed, directory):
    if strain_imposed:
        return NotchCurve(material, "linear")
    rule = notch.get("rule", "neuber")
    if rule == "curve":
        return read_notch_curve(os.path.join(directory, notch["curve"]), material)
    plastic = notch.get("net_section", "elastic") == "plastic"
    if plastic and factor is None:
        raise CaseError("notch: net_section plastic needs kt or kf")
    ratio = notch.get("limit_load_ratio")
    if rule == "limit_load" and ratio is None:
        raise CaseError("notch: rule limit_load needs limit_load_ratio")
    return NotchCurve(material, rule, factor, plastic,
                      None if ratio is None else float(ratio))


def refuse_uncovered(case):
    notch, life = case.get("notch", {}), case.get("life", {})
    if "shape" in notch or notch.get("sensitivity", "none") != "none":
        raise CaseError("notch: the reference takes kt and kf only")
    if notch.get("constraint", "plane_stress") != "plane_stress":
        raise CaseError("notch: the reference covers plane stress only")
    if float(life.get("surface_factor", 1.0)) != 1.0 or "roughness" in life:
        raise CaseError("life: the reference covers surface_factor 1 only")
    if str(life.get("survival", "50 %")).replace(" ", "") not in ("50%", "0.5"):
        raise CaseError("life: the reference covers survival 50 % only")


def read_life(entry, material):
    life = {"mean_stress": entry.get("mean_stress", "swt"),
            "damage_sum": float(entry.get("damage_sum", 1.0)),
            "below_endurance": entry.get("below_endurance", "damages"),
            "walker_gamma": None}
    if life["below_endurance"] != "damages" and material.endurance_strain is None:
        raise CaseError("life: below_endurance needs the material's endurance")
    if life["mean_stress"] == "walker":
        gamma = entry.get("walker_gamma")
        if gamma is None:  # Dowling, Calhoun & Arcari 2009, steels only
            if material.group != "steel" or material.ultimate is None:
                raise CaseError("life: walker_gamma can be estimated for steels only")
            gamma = -0.000200 * material.ultimate + 0.8818
        life["walker_gamma"] = float(gamma)
    return life


def read_case(path):
    directory = os.path.dirname(path)
    with open(path, encoding="utf-8") as file:
        case = yaml.safe_load(file)
    refuse_uncovered(case)
    stress_unit = case.get("units", {}).get("stress", "")
    material = read_material(case["material"], stress_unit)
    notch = case.get("notch", {})
    factor = notch.get("kf", notch.get("kt"))
    factor = None if factor is None else float(factor)

    imposed = [event.get("as") == "notch_strain" for event in case["load"]]
    if any(imposed) and not all(imposed):
        raise CaseError("load: notch_strain must be used for all events or for none")
    curve = read_curve(notch, material, factor, all(imposed), directory)
    residual = quantity(notch.get("residual_stress", 0), STRESS_UNITS,
                        "residual_stress", stress_unit)
    events = [read_event(event, directory, material, factor, stress_unit)
              for event in case["load"]]
    return Case(case.get("title"), material, curve, dict(notch, factor_used=factor),
                events, residual, read_life(case.get("life", {}), material))


# --- Branches and memory ----------------------------------------------------

# A point remembers up to which range its event lets loops be dropped.
Point = namedtuple("Point", "load stress strain ignore_below")
Loop = namedtuple("Loop", "load_max load_min stress_max stress_min strain_max "
                  "strain_min ignore_below")


def make_loop(start, tip):
    low, high = sorted((start, tip), key=lambda point: point.load)
    # A loop across two events is dropped only if both would drop it.
    return Loop(high.load, low.load, high.stress, low.stress, high.strain,
                low.strain, min(start.ignore_below, tip.ignore_below))


class Memory:
    """The part: where it is, and the reversals it still remembers.

    `reversals` holds the turning points of all open branches, oldest first.
    The oldest one lies on the initial curve; an empty list means the part is
    on the initial curve now.
    """

    def __init__(self, curve, residual):
        self.curve = curve
        self.reversals = []
        # As if loaded from 0 to the residual stress before the block begins.
        self.direction = (residual > 0.0) - (residual < 0.0)
        self.here = Point(residual, *curve.at(residual), math.inf)

    def move_to(self, load, ignore_below):
        """Go to `load`; return the loops that close on the way, in order."""
        if load == self.here.load:
            return []
        direction = 1 if load > self.here.load else -1
        if direction == -self.direction:
            self.reversals.append(self.here)
        self.direction = direction

        closed = []
        # M1 and M2: reaching the start of the loop ends it and its memory.
        while len(self.reversals) >= 2 and direction * (load - self.reversals[-2].load) >= 0.0:
            tip, start = self.reversals.pop(), self.reversals.pop()
            closed.append(make_loop(start, tip))
        # M3: past the mirror image of where it left, on the initial curve again.
        if len(self.reversals) == 1 and abs(load) > abs(self.reversals[0].load):
            self.reversals.clear()
        self.here = Point(load, *self.response(load), ignore_below)
        return closed

    def response(self, load):
        if not self.reversals:
            return self.curve.at(load)
        origin = self.reversals[-1]  # Masing: the curve doubled, from the reversal
        stress, strain = self.curve.at((load - origin.load) / 2.0)
        return origin.stress + 2.0 * stress, origin.strain + 2.0 * strain


# --- Life of one loop -------------------------------------------------------

def log_or_minus_infinity(value):
    return math.log(value) if value > 0.0 else -math.inf


def solve_cycles(level, first, first_exponent, second, second_exponent):
    """N from level = first (2N)^first_exponent + second (2N)^second_exponent."""
    log_level = math.log(level)
    log_first, log_second = log_or_minus_infinity(first), log_or_minus_infinity(second)

    def excess(log_reversals):
        return numpy.logaddexp(log_first + first_exponent * log_reversals,
                               log_second + second_exponent * log_reversals) - log_level

    low, high = -50.0, 50.0
    while excess(low) < 0.0:
        low *= 2.0
    while excess(high) > 0.0:
        high *= 2.0
    log_reversals = brentq(excess, low, high, xtol=1e-14, maxiter=500)
    return 0.5 * math.exp(log_reversals) if log_reversals < 700.0 else math.inf


def cycles_to_initiation(material, loop, correction, gamma):
    modulus, sigma_f, b = material.modulus, material.sigma_f, material.b
    epsilon_f, c = material.epsilon_f, material.c
    amplitude = 0.5 * (loop.strain_max - loop.strain_min)
    mean = 0.5 * (loop.stress_max + loop.stress_min)
    if correction == "none":
        return solve_cycles(amplitude, sigma_f / modulus, b, epsilon_f, c)
    if correction in ("morrow", "manson_halford"):
        if mean >= sigma_f:
            return 1.0
        plastic = epsilon_f
        if correction == "manson_halford":
            plastic *= ((sigma_f - mean) / sigma_f) ** (c / b)
        return solve_cycles(amplitude, (sigma_f - mean) / modulus, b, plastic, c)
    if correction not in ("swt", "walker"):
        raise CaseError(f"life: mean_stress {correction!r} is not covered")
    if loop.stress_max <= 0.0:
        return math.inf
    if correction == "swt":
        return solve_cycles(loop.stress_max * amplitude, sigma_f ** 2 / modulus, 2.0 * b,
                            sigma_f * epsilon_f, b + c)
    ratio = loop.stress_min / loop.stress_max
    w = ((1.0 - ratio) / 2.0) ** (1.0 - gamma)
    return solve_cycles(amplitude, sigma_f / modulus * w, b, epsilon_f * w ** (c / b), c)


# --- Block ------------------------------------------------------------------

def block_of(case):
    """Every load of the block with its event's threshold, repeats copied out."""
    return [(load + case.residual, event.ignore_below)
            for event in case.events for _ in range(event.repeats) for load in event.loads]


def count_reversals(loads):
    """Turning points of the block taken as a ring."""
    ring = [load for i, load in enumerate(loads) if load != loads[i - 1]]
    if len(ring) < 2:
        return 0
    return sum((ring[i] - ring[i - 1]) * (ring[(i + 1) % len(ring)] - ring[i]) < 0.0
               for i in range(len(ring)))


def run_passes(case, passes=2):
    """Closed loops of each pass of the block, and every point visited."""
    memory = Memory(case.curve, case.residual)
    loops, points = [], []
    for _ in range(passes):
        closed = []
        for load, ignore_below in block_of(case):
            closed += memory.move_to(load, ignore_below)
            points.append(memory.here)
        loops.append(closed)
    return loops, points


def split_ignored(loops):
    ignored = [loop for loop in loops if loop.load_max - loop.load_min < loop.ignore_below]
    kept = [loop for loop in loops if loop.load_max - loop.load_min >= loop.ignore_below]
    return kept, ignored


class DamageRule:
    """Damage of one loop under the case's life options."""

    def __init__(self, case, steady_loops):
        self.material, self.life = case.material, case.life
        self.threshold = None
        if self.life["below_endurance"] != "damages":
            self.threshold = self.material.endurance_strain
        if self.life["below_endurance"] == "harmless_until_exceeded" and any(
                self.amplitude(loop) > self.threshold for loop in steady_loops):
            self.threshold = None

    @staticmethod
    def amplitude(loop):
        return 0.5 * (loop.strain_max - loop.strain_min)

    def cycles(self, loop):
        return cycles_to_initiation(self.material, loop, self.life["mean_stress"],
                                    self.life["walker_gamma"])

    def damage(self, loop):
        if self.threshold is not None and self.amplitude(loop) < self.threshold:
            return 0.0
        return 1.0 / self.cycles(loop)


def group_equal(loops):
    """[loop, count] of loops that differ by rounding only."""
    groups = []
    for loop in loops:
        for group in groups:
            if all(math.isclose(a, b, rel_tol=1e-9, abs_tol=1e-9)
                   for a, b in zip(group[0][:6], loop[:6])):
                group[1] += 1
                break
        else:
            groups.append([loop, 1])
    return groups


def life_in_blocks(first, steady, limit):
    if first >= limit:
        return limit / first
    return 1.0 + (limit - first) / steady if steady > 0.0 else None


# --- Result -----------------------------------------------------------------

def describe_loop(rule, loop, count, total):
    cycles, damage = rule.cycles(loop), count * rule.damage(loop)
    return {
        "count": count,
        "load_max_mpa": loop.load_max,
        "load_min_mpa": loop.load_min,
        "strain_amplitude": rule.amplitude(loop),
        "strain_mean": 0.5 * (loop.strain_max + loop.strain_min),
        "stress_max_mpa": loop.stress_max,
        "stress_min_mpa": loop.stress_min,
        "stress_mean_mpa": 0.5 * (loop.stress_max + loop.stress_min),
        "cycles_to_initiation": cycles if math.isfinite(cycles) else None,
        "damage": damage,
        "share": damage / total if total > 0.0 else 0.0,
    }


def assess(case):
    (first, steady), points = run_passes(case)
    first, _ = split_ignored(first)
    steady, ignored = split_ignored(steady)
    rule = DamageRule(case, steady)
    damage_first = math.fsum(rule.damage(loop) for loop in first)
    damage_steady = math.fsum(rule.damage(loop) for loop in steady)
    loops = [describe_loop(rule, loop, count, damage_steady)
             for loop, count in group_equal(steady)]
    loads = [load for load, _ in block_of(case)]
    return {
        "format": "notchwright.assessment/1",
        "title": case.title,
        "method": dict(case.life, rule=case.curve.rule,
                       net_section="plastic" if case.curve.plastic_net_section else "elastic"),
        "material": case.material._asdict(),
        "notch": case.notch,
        "block": {"samples": len(loads), "turning_points": count_reversals(loads),
                  "load_max_mpa": max(loads), "load_min_mpa": min(loads)},
        "extremes": {"stress_max_mpa": max(point.stress for point in points),
                     "stress_min_mpa": min(point.stress for point in points),
                     "strain_max": max(point.strain for point in points),
                     "strain_min": min(point.strain for point in points)},
        "damage_first_block": damage_first,
        "damage_per_block": damage_steady,
        "life_blocks": life_in_blocks(damage_first, damage_steady, case.life["damage_sum"]),
        "loops_total": len(steady),
        "loops": sorted(loops, key=lambda entry: -entry["damage"]),
        "ignored": {"loops": len(ignored),
                    "damage": math.fsum(rule.damage(loop) for loop in ignored)},
    }


def main(arguments):
    if len(arguments) != 2:
        print("usage: assess_reference.py CASE.yaml", file=sys.stderr)
        return 2
    try:
        result = assess(read_case(arguments[1]))
    except (CaseError, KeyError, OSError, ValueError, yaml.YAMLError) as error:
        print(f"{arguments[1]}: error: {error}", file=sys.stderr)
        return 3
    print(json.dumps(result, indent=2, allow_nan=False))
    return 0


if __name__ == "__main__":
    sys.exit(main(sys.argv))
