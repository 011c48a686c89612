"""scipy's side of tools/spectrum-speed.sh: best times in ms, one work a call.

python3 spectrum_speed.py transform LENGTH TIMES
python3 spectrum_speed.py harmonics FILE TIMES
"""
import sys
import time

import numpy as np
import scipy.fft
import scipy.signal

RATE = 1e8
ORDERS = 10


def best(times, work):
    found = []
    for _ in range(times):
        start = time.perf_counter()
        result = work()
        found.append(time.perf_counter() - start)
    return 1e3 * min(found), result


def harmonics(x):
    """Every quantity of the harmonics group, from a Hann spectrum of the whole record and Welch's method for the floor."""
    n = len(x)
    power = np.abs(scipy.fft.rfft((x - x.mean()) * scipy.signal.windows.hann(n, sym=False))) ** 2
    top = int(np.argmax(power))
    side = 1 if power[top + 1] > power[top - 1] else -1
    ratio = np.sqrt(power[top + side] / power[top])
    place = top + side * (2 * ratio - 1) / (1 + ratio)

    def line(at):
        k = int(round(at))
        return power[k - 3:k + 4].sum()

    lines = np.array([line(k * place) for k in range(1, ORDERS + 1) if k * place < n / 2 - 4])
    dbc = 10 * np.log10(lines[1:] / lines[0])
    # Of a line of amplitude A the bins hold A²/4 · n · Σw², with Σw² = 3/8 n.
    carrier = 2 * lines[0] / (3 / 8 * n * n)
    _, density = scipy.signal.welch(x, RATE, nperseg=1 << 16)
    floor = np.median(density)
    rest = power[4:].sum() - lines[0]
    peaks, _ = scipy.signal.find_peaks(power, height=np.median(power[:: max(1, n // 4096)]) / np.log(2) * 30)
    others = [p for p in peaks if abs(p - top) > 4]
    spur = max(power[p - 3:p + 4].sum() for p in others)
    return {
        "frequency": place * RATE / n,
        "harmonics": dbc,
        "worst": dbc.max(),
        "thd": 100 * np.sqrt(lines[1:].sum() / lines[0]),
        "sinad": 10 * np.log10(lines[0] / rest),
        "enob": (10 * np.log10(lines[0] / rest) - 1.7609) / 6.0206,
        "sfdr": 10 * np.log10(lines[0] / spur),
        "floor": 10 * np.log10(floor / carrier),
        "level": 10 * np.log10(carrier),
    }


what, argument, times = sys.argv[1], sys.argv[2], int(sys.argv[3])
if what == "transform":
    samples = np.random.default_rng(1).standard_normal(int(argument))
    ms, _ = best(times, lambda: scipy.fft.rfft(samples))
else:
    samples = np.fromfile(argument)
    ms, result = best(times, lambda: harmonics(samples))
    print({k: np.round(v, 4) for k, v in result.items()}, file=sys.stderr)
print(f"{ms:.3f}")
