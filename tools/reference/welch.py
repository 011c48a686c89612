"""Writes tests/ScopeReader.Core.Tests/Reference/welch.csv: an averaged periodogram by scipy.signal.welch, for AveragedPeriodogramTests.

Run in the repository's top folder: python3 tools/reference/welch.py (scipy is needed)
Samples are those of the minimal standard generator (x <- 16807 x mod 2^31 - 1, from 1234567890), x/(2^31 - 1) - 1/2.
"""
import scipy
import scipy.signal

x = 1234567890
samples = []
for _ in range(1000):
    samples.append(x / 2147483647 - 0.5)
    x = 16807 * x % 2147483647
_, density = scipy.signal.welch(samples, 100.0, window="hann", nperseg=120, noverlap=60, detrend=False)
with open("tests/ScopeReader.Core.Tests/Reference/welch.csv", "w") as out:
    out.write(f"# scipy {scipy.__version__} scipy.signal.welch; one line a bin: bin, density; samples and settings as in tools/reference/welch.py\n")
    for k, v in enumerate(density):
        out.write(f"{k},{float(v)!r}\n")
