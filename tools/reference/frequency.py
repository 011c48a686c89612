#!/usr/bin/python3
"""What a competent numpy and scipy user writes for the same quantities, vectorised: levels, transitions, crossings with their
regression, interpolated transform, four-parameter sine fit or joint harmonic fit, widths, jitter, Allan deviation, drift.
Prints the best time of five runs. Usage: frequency.py FILE.f64 sine|square"""
import sys
import time

import numpy as np
import scipy.fft


def levels(y):
    counts, edges = np.histogram(y, bins=4096)
    centres = (edges[1:] + edges[:-1]) / 2
    half = len(counts) // 2
    return centres[np.argmax(counts[:half])], centres[half + np.argmax(counts[half:])]


def crossings(y, low, high):
    middle, hysteresis = (low + high) / 2, 0.2 * (high - low)
    beyond = np.flatnonzero(np.abs(y - middle) >= hysteresis)
    side = y[beyond] > middle
    turns = np.flatnonzero(side[1:] != side[:-1])
    before, after = beyond[turns], beyond[turns + 1]
    rising = side[turns + 1]
    # The mid level between the last sample beyond one threshold and the first beyond the other, by the line through both.
    instants = before + (middle - y[before]) / (y[after] - y[before]) * (after - before)
    return instants[rising], instants[~rising]


def regression(t):
    k = np.arange(len(t), dtype=float)
    slope, origin = np.polyfit(k - k.mean(), t, 1)
    distance = t - origin - slope * (k - k.mean())
    return slope, distance


def interpolated(y):
    n = 1 << 18
    part = y[(len(y) - n) // 2:(len(y) - n) // 2 + n]
    window = 0.5 - 0.5 * np.cos(2 * np.pi * np.arange(n) / n)
    magnitude = np.abs(scipy.fft.rfft((part - part.mean()) * window))
    k = np.argmax(magnitude[2:-1]) + 2
    side = 1 if magnitude[k + 1] >= magnitude[k - 1] else -1
    ratio = magnitude[k + side] / magnitude[k]
    return (k + side * (2 * ratio - 1) / (ratio + 1)) / n


def joint_fit(y, f, harmonics, steps=2):
    t = np.arange(len(y)) - (len(y) - 1) / 2
    for _ in range(steps):
        base = np.exp(2j * np.pi * f * t)
        columns, power = [np.ones_like(t)], np.ones_like(base)
        for _ in range(harmonics):
            power = power * base
            columns += [power.real, power.imag]
        design = np.stack(columns)
        c = np.linalg.solve(design @ design.T, design @ y)
        slope = sum(2 * np.pi * (k + 1) * (c[2 * k + 2] * columns[2 * k + 1] - c[2 * k + 1] * columns[2 * k + 2]) for k in range(harmonics)) * t
        design = np.vstack([design, slope])
        f += np.linalg.solve(design @ design.T, design @ y)[-1]
    return f


def template_fit(y, f, harmonics, parts=64):
    """The whole record's frequency: the period fitted to the middle, its lateness in each part, the slope of those."""
    middle = len(y) // 2
    near = y[middle - 100_000:middle + 100_000]
    f = joint_fit(near, f, harmonics)
    t = np.arange(len(near)) - (len(near) - 1) / 2
    design = np.stack([np.ones_like(t)] + [w for k in range(1, harmonics + 1) for w in (np.cos(2 * np.pi * k * f * t), np.sin(2 * np.pi * k * f * t))])
    c = np.linalg.solve(design @ design.T, design @ near)
    grid = np.arange(4097) / 4096
    wave = c[0] + sum(c[2 * k - 1] * np.cos(2 * np.pi * k * grid) + c[2 * k] * np.sin(2 * np.pi * k * grid) for k in range(1, harmonics + 1))
    slope = sum(2 * np.pi * k * (c[2 * k] * np.cos(2 * np.pi * k * grid) - c[2 * k - 1] * np.sin(2 * np.pi * k * grid)) for k in range(1, harmonics + 1))
    usable = len(y) // parts * parts
    index = np.arange(usable) - (len(y) - 1) / 2
    phase = np.mod(f * index, 1.0)
    late = np.interp(phase, grid, slope).reshape(parts, -1)
    rest = (y[:usable] - np.interp(phase, grid, wave)).reshape(parts, -1)
    phases = (rest * late).sum(axis=1) / (late * late).sum(axis=1)
    return f + np.polyfit(index.reshape(parts, -1).mean(axis=1), phases, 1)[0]


def plateaus(y, low, high):
    """State levels and noise from samples that no edge is near."""
    inside = (np.abs(y - low) < 0.1 * (high - low)) | (np.abs(y - high) < 0.1 * (high - low))
    clear = inside.copy()
    for shift in (1, 2, 3):
        clear[shift:] &= inside[:-shift]
        clear[:-shift] &= inside[shift:]
    upper = clear & (y > (low + high) / 2)
    lower = clear & ~upper
    return y[lower].mean(), y[upper].mean(), y[lower].std(), y[upper].std()


def allan(x, tau, m):
    second = x[2 * m:] - 2 * x[m:-m] + x[:-2 * m]
    return np.sqrt(np.mean(second ** 2) / 2) / (m * tau)


def measure(y, kind):
    low, high = levels(y)
    if kind == "square":
        low, high, _, _ = plateaus(y, low, high)
    rising, falling = crossings(y, low, high)
    period, distance = regression(rising)
    regression(falling)
    width = np.mean(falling[: len(rising)][:1000] - rising[: len(falling)][:1000])
    line = interpolated(y)
    if kind == "sine":
        f = joint_fit(y, 1 / period, 1)
    else:
        f = template_fit(y, 1 / period, 9)
    periods = np.diff(rising)
    jitter = periods.std(), np.sqrt(np.mean(np.diff(periods) ** 2)), np.ptp(distance)
    m = len(distance) // 10
    deviations = []
    while m >= 1:
        deviations.append(allan(distance, period, m))
        m //= 10
    drift = np.polyfit(np.linspace(-1, 1, len(distance)), distance, 2)[0]
    return f, line, width, jitter, deviations, drift, y.mean(), np.sqrt(np.mean(y * y)), np.ptp(y)


samples = np.fromfile(sys.argv[1])
best = float("inf")
for _ in range(5):
    start = time.perf_counter()
    result = measure(samples, sys.argv[2])
    best = min(best, time.perf_counter() - start)
print(f"{sys.argv[2]} {best:.3f} {result[0]!r}")
