"""Write random cases for comparing `notchwright assess` with the reference.

Usage: python3 random_cases.py DIR COUNT SEED

Half of the cases are `exact`: whole-number histories with scales, offsets and
factors that are exact in binary, so that equal loads and exact mirror values
occur often and no order of arithmetic can break them. The others use decimals
throughout. The same seed writes the same cases.
"""

import os
import random
import sys

import yaml

import assess_reference

RULES = ("neuber", "esed", "linear", "limit_load", "curve")
CORRECTIONS = ("none", "morrow", "manson_halford", "swt", "walker")
ENDURANCE_OPTIONS = ("damages", "damages", "harmless", "harmless_until_exceeded")


def stress_text(rng, mpa):
    """The stress in one of the units of the case format."""
    unit = rng.choice(("MPa", "MPa", "GPa", "ksi"))
    return f"{mpa / assess_reference.STRESS_UNITS[unit]:.6g} {unit}"


# --- Material ---------------------------------------------------------------

def random_material(rng):
    group = rng.choice(("steel", "steel", "aluminium", "titanium"))
    modulus = {"steel": rng.uniform(195e3, 215e3), "aluminium": rng.uniform(68e3, 75e3),
               "titanium": rng.uniform(105e3, 120e3)}[group]
    ultimate = rng.uniform(350.0, 1500.0) if group == "steel" else rng.uniform(250.0, 900.0)
    material = {"name": f"random-{group}", "group": group, "basis": "estimated",
                "source": "random numbers, no real material",
                "ultimate_strength": stress_text(rng, ultimate),
                "youngs_modulus": stress_text(rng, modulus)}
    if rng.random() < 0.2:
        material = {"estimate": "uniform_material_law", "group": group,
                    "ultimate_strength": material["ultimate_strength"],
                    "youngs_modulus": material["youngs_modulus"]}
        return material
    if rng.random() < 0.8:
        material["cyclic_curve"] = {
            "strength_coefficient": stress_text(rng, ultimate * rng.uniform(1.1, 2.0)),
            "hardening_exponent": round(rng.uniform(0.06, 0.24), 4)}
    strength_ratio = rng.uniform(1.3, 2.0)
    if "cyclic_curve" in material and rng.random() < 0.1:  # so that mean stresses reach it
        strength_ratio *= 0.25
    material["strain_life"] = {
        "fatigue_strength_coefficient": stress_text(rng, ultimate * strength_ratio),
        "fatigue_strength_exponent": round(rng.uniform(-0.13, -0.06), 4),
        "fatigue_ductility_coefficient": round(rng.uniform(0.1, 1.4), 4),
        "fatigue_ductility_exponent": round(rng.uniform(-0.80, -0.45), 4)}
    if rng.random() < 0.7:
        strain = 0.45 * ultimate / modulus * rng.uniform(0.7, 1.5)
        material["endurance"] = {"strain_amplitude": float(f"{strain:.4g}"), "cycles": 2000000}
    return material


# --- Load -------------------------------------------------------------------

def whole_numbers(rng, length, reach):
    if rng.random() < 0.5:
        return [rng.randint(-reach, reach) for _ in range(length)]
    value, values = 0, []
    for _ in range(length):  # bounded walk: many nested and hanging loops
        value = max(-reach, min(reach, value + rng.randint(-reach // 2, reach // 2)))
        values.append(value)
    return values


def decimals(rng, length, reach):
    return [round(rng.gauss(0.0, reach / 2.0), 3) for _ in range(length)]


def random_events(rng, exact, reach):
    count = rng.randint(1, 3)
    lengths = [max(2, rng.randint(5, 60) // count) for _ in range(count)]
    draw = whole_numbers if exact else decimals
    return [{"history": draw(rng, length, reach), "repeats": rng.choice((1, 1, 2, 3, 4))}
            for length in lengths]


def scale_stress_events(rng, events, exact, factor, peak, reach):
    """Scales and offsets that bring the largest notch stress near `peak`."""
    for event in events:
        elastic_peak = rng.random() < 0.25
        if elastic_peak:
            event["as"] = "notch_elastic_stress"
        elif rng.random() < 0.5:
            event["as"] = "nominal_stress"
        scale = peak / reach / (1.0 if elastic_peak else factor)
        scale = max(0.25, round(scale * 4.0) / 4.0) if exact else float(f"{scale:.4g}")
        event["scale"] = f"{scale} MPa" if exact else stress_text(rng, scale)
        if rng.random() < 0.35:
            offset = scale * rng.uniform(-0.6, 0.6) * reach
            event["offset"] = f"{round(offset)} MPa" if exact else stress_text(rng, offset)


def scale_strain_events(rng, events, exact, peak_strain, reach):
    """Imposed strain. Exact cases take no offset: their sums would be rounded."""
    for event in events:
        event["as"] = "notch_strain"
        scale = max(1, round(peak_strain / reach * 1e6))
        event["scale"] = f"{scale} microstrain"
        if not exact and rng.random() < 0.35:
            event["offset"] = f"{rng.uniform(-0.4, 0.4) * peak_strain * 100.0:.4g} %"


# --- Notch and life ---------------------------------------------------------

def random_notch(rng, exact):
    notch = {"kt": rng.randint(8, 32) / 8 if exact else round(rng.uniform(1.0, 4.0), 3)}
    if rng.random() < 0.3:
        kf = 1.0 + (notch["kt"] - 1.0) * rng.uniform(0.5, 1.0)
        notch["kf"] = max(8, int(kf * 8)) / 8 if exact else max(1.0, round(kf, 3))
    notch["rule"] = rng.choice(RULES)
    if notch["rule"] == "limit_load":
        notch["limit_load_ratio"] = round(rng.uniform(1.1, 4.0), 3)
    if notch["rule"] in ("neuber", "esed") and rng.random() < 0.3:
        notch["net_section"] = "plastic"
    return notch


def random_life(rng, material):
    life = {"mean_stress": rng.choice(CORRECTIONS),
            "damage_sum": rng.choice((1.0, 1.0, 0.9, 0.5, 0.3))}
    if life["mean_stress"] == "walker" and (material["group"] != "steel" or rng.random() < 0.5):
        life["walker_gamma"] = round(rng.uniform(0.4, 0.9), 3)
    # The law gives the endurance as a strain for steels.
    law = "estimate" in material and material["group"] == "steel"
    if "endurance" in material or law:
        life["below_endurance"] = rng.choice(ENDURANCE_OPTIONS)
    return life


def write_notch_curve(rng, path, material, peak):
    """A table up to `peak` somewhat stiffer than Neuber, in uneven steps."""
    curve = assess_reference.NotchCurve(material, "neuber")
    steps = rng.randint(6, 16)
    rows = ["0,0,0"] if rng.random() < 0.5 else []
    for step in range(1, steps + 1):
        load = peak * (step / steps) ** 1.3
        stress, strain = curve.at(load)
        rows.append(f"{load:.7g},{0.97 * stress:.7g},{0.93 * strain:.7g}")
    with open(path, "w", encoding="utf-8") as file:
        file.write("load[MPa],stress[MPa],strain\n" + "\n".join(rows) + "\n")


def largest_load(events, notch, material):
    """Largest notch stress of either sign, the residual stress included."""
    residual = assess_reference.quantity(notch.get("residual_stress", 0),
                                         assess_reference.STRESS_UNITS, "residual_stress")
    factor = notch.get("kf", notch["kt"])
    loads = [load + residual for event in events
             for load in assess_reference.read_event(event, "", material, factor, "").loads]
    return max(abs(load) for load in loads + [residual])


def random_case(rng, directory, name):
    exact = rng.random() < 0.5
    case = {"notchwright": 1, "title": name, "material": random_material(rng)}
    material = assess_reference.read_material(case["material"], "")
    strength = material.strength_coefficient
    reach = rng.choice((4, 10, 100))
    events = random_events(rng, exact, reach)
    notch = random_notch(rng, exact)
    if rng.random() < 0.12:
        peak_strain = rng.uniform(0.5, 4.0) * strength / material.modulus
        scale_strain_events(rng, events, exact, min(peak_strain, 0.03), reach)
        notch = {"rule": "linear"}
    else:
        factor = notch.get("kf", notch["kt"])
        peak = strength * rng.uniform(0.15, 1.5)
        scale_stress_events(rng, events, exact, factor, peak, reach)
        if rng.random() < 0.3:
            residual = strength * rng.uniform(-0.4, 0.4)
            notch["residual_stress"] = f"{round(residual)} MPa" if exact \
                else stress_text(rng, residual)
        if rng.random() < 0.2:  # one threshold for all events: no doubt whose it is
            ignore = stress_text(rng, peak * rng.uniform(0.05, 0.6))
            for event in events:
                event["ignore_ranges_below"] = ignore
    case["notch"] = notch
    case["load"] = events
    case["life"] = random_life(rng, case["material"])
    if notch["rule"] == "curve":
        notch["curve"] = f"{name}_curve.csv"
        write_notch_curve(rng, os.path.join(directory, notch["curve"]), material,
                          1.05 * largest_load(events, notch, material) + 1.0)
    with open(os.path.join(directory, f"{name}.yaml"), "w", encoding="utf-8") as file:
        yaml.safe_dump(case, file, sort_keys=False, default_flow_style=None, width=100)


def main(arguments):
    if len(arguments) != 4:
        print("usage: random_cases.py DIR COUNT SEED", file=sys.stderr)
        return 2
    directory, count, seed = arguments[1], int(arguments[2]), int(arguments[3])
    os.makedirs(directory, exist_ok=True)
    rng = random.Random(seed)
    for number in range(count):
        random_case(rng, directory, f"case_{number:05d}")
    return 0


if __name__ == "__main__":
    sys.exit(main(sys.argv))
