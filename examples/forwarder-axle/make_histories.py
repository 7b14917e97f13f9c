#!/usr/bin/env python3
"""Makes the three load histories of this example. All of it is invented.

    python3 make_histories.py          (needs NumPy; writes beside this file)

The bending moment at the shoulder of a non-rotating stub axle is put together
from what such a record usually shows: wheel load, slow sway, tyre and bogie
resonances, obstacles that ring down, sensor noise, thermal drift and the steps
of the logger. RandomState is used because NumPy keeps its numbers the same from
release to release, so the files can be made again bit for bit.
"""

from pathlib import Path

import numpy as np

HERE = Path(__file__).resolve().parent
RATE_HZ = 200.0
LOGGER_STEP_KNM = 0.004  # one count of the logger
SENSOR_NOISE_KNM = 0.006  # standard deviation


def resonance(random, count, frequency_hz, damping, deviation):
    """Noise as one lightly damped mode passes it on, with the given deviation."""
    radius = np.exp(-2 * np.pi * frequency_hz * damping / RATE_HZ)
    angle = 2 * np.pi * frequency_hz * np.sqrt(1 - damping**2) / RATE_HZ
    a1, a2 = 2 * radius * np.cos(angle), -(radius**2)
    lead_in = 2000  # the mode starts at rest; leave its start out
    driving = random.standard_normal(count + lead_in)
    out = np.zeros(count + lead_in)
    for i in range(2, len(out)):
        out[i] = a1 * out[i - 1] + a2 * out[i - 2] + driving[i]
    out = out[lead_in:]
    return deviation * (out - out.mean()) / out.std()


def sway(random, count, period_s, deviation):
    """Slow change of side slope and steering: random values joined smoothly."""
    knots = int(count / RATE_HZ / period_s) + 3
    values = random.standard_normal(knots)
    at = np.arange(count) / RATE_HZ / period_s
    left = at.astype(int)
    blend = (1 - np.cos(np.pi * (at - left))) / 2
    return deviation * ((1 - blend) * values[left] + blend * values[left + 1])


def obstacle(time_s, start_s, peak, width_s, frequency_hz, damping):
    """A wheel climbs something for width_s and the bogie rings down after it."""
    t = time_s - start_s
    climb = np.where((t > 0) & (t < width_s), np.sin(np.pi * t / width_s), 0.0)
    after = np.maximum(t - width_s, 0.0)
    ring = np.exp(-2 * np.pi * damping * frequency_hz * after) * np.sin(
        2 * np.pi * frequency_hz * after
    )
    return peak * (climb - 0.62 * np.where(t >= width_s, ring, 0.0))


def bursts(random, time_s, how_many, peaks, width_s, frequency_hz):
    """Obstacles at random moments, most of them small (exponential peaks, cut off)."""
    total = np.zeros_like(time_s)
    typical, largest = peaks
    for start in np.sort(random.uniform(2.0, time_s[-1] - 4.0, how_many)):
        peak = min(typical * random.exponential(), largest)
        width = width_s * random.uniform(0.7, 1.4)
        total += obstacle(time_s, start, peak, width, frequency_hz, 0.07)
    return total


def logged(random, true_knm):
    """What the logger writes: sensor noise, thermal drift, whole counts."""
    hours = np.arange(len(true_knm)) / RATE_HZ / 3600
    drift = 0.9 * hours * (1 + 0.3 * random.standard_normal())
    noise = SENSOR_NOISE_KNM * random.standard_normal(len(true_knm))
    counts = np.rint((true_knm + drift + noise) / LOGGER_STEP_KNM)
    return np.round(counts * LOGGER_STEP_KNM, 3) + 0.0  # no minus zero


def seconds(count):
    return np.arange(count) / RATE_HZ


def haul_loaded(random):
    """200 s of extraction track with a full bunk, two stumps and two ditches."""
    time_s = seconds(40_000)
    moment = 5.6 + sway(random, len(time_s), 9.0, 1.1)
    roughness = 0.75 + 0.45 * np.abs(sway(random, len(time_s), 14.0, 1.0))
    moment += roughness * resonance(random, len(time_s), 1.9, 0.15, 1.25)
    moment += roughness * resonance(random, len(time_s), 9.5, 0.20, 0.35)
    moment += bursts(random, time_s, 38, (2.6, 8.0), 0.34, 2.6)
    moment += obstacle(time_s, 61.3, 17.5, 0.42, 2.3, 0.06)
    moment += obstacle(time_s, 97.9, -18.0, 0.65, 1.9, 0.09)
    moment += obstacle(time_s, 142.8, 16.5, 0.36, 2.3, 0.07)
    moment += obstacle(time_s, 171.6, -19.5, 0.70, 1.9, 0.08)
    return time_s, logged(random, moment)


def crane_loading(random):
    """180 s beside one pile: the crane swings over this wheel and back, log by log."""
    time_s = seconds(36_000)
    moment = np.full(len(time_s), 3.1)
    start = 4.0
    while start < time_s[-1] - 14.0:
        length = random.uniform(9.0, 14.0)
        reach = random.uniform(2.2, 5.4)
        inside = np.clip((time_s - start) / length, 0.0, 1.0)
        moment += reach * np.sin(np.pi * inside) ** 2 * np.where(inside < 1, 1, 0)
        drop = start + length * random.uniform(0.78, 0.9)
        moment += obstacle(time_s, drop, random.uniform(0.8, 2.6), 0.15, 3.1, 0.08)
        moment += 0.13 * np.where(time_s > drop, 1.0, 0.0)  # the bunk fills
        start += length + random.uniform(1.0, 3.5)
    moment += resonance(random, len(time_s), 2.4, 0.12, 0.22)
    moment += resonance(random, len(time_s), 28.0, 0.05, 0.035)  # engine
    return time_s, logged(random, moment)


def return_empty(random):
    """150 s back to the pile with an empty bunk, faster, so the wheel hops."""
    time_s = seconds(30_000)
    moment = 2.3 + sway(random, len(time_s), 7.0, 0.8)
    roughness = 0.8 + 0.5 * np.abs(sway(random, len(time_s), 11.0, 1.0))
    moment += roughness * resonance(random, len(time_s), 2.7, 0.14, 1.15)
    moment += roughness * resonance(random, len(time_s), 11.0, 0.18, 0.45)
    moment += bursts(random, time_s, 45, (2.2, 9.0), 0.24, 3.2)
    return time_s, logged(random, moment)


def write_text(path, notes, delimiter, time_s, moment_knm):
    rows = (f"{t:.3f}{delimiter}{m:.3f}\n" for t, m in zip(time_s, moment_knm))
    with open(path, "w", encoding="utf-8", newline="\n") as out:
        out.writelines(f"# {note}\n" for note in notes)
        out.write(f"time_s{delimiter}bending_kNm\n")
        out.writelines(rows)


def main():
    gauge = "Full bridge at the stub axle, rear left; bending moment at the shoulder, 200 Hz"
    time_s, moment = haul_loaded(np.random.RandomState(20411))
    notes = ["Invented data. Extraction track, bunk full", gauge]
    write_text(HERE / "haul-loaded.csv", notes, ",", time_s, moment)

    time_s, moment = return_empty(np.random.RandomState(20412))
    notes = ["Invented data. Back to the pile, bunk empty", gauge]
    write_text(HERE / "return-empty.tsv", notes, "\t", time_s, moment)

    _, moment = crane_loading(np.random.RandomState(20413))
    np.save(HERE / "crane-loading.npy", moment.astype("<f4"))


if __name__ == "__main__":
    main()
