"""Writes tests/ScopeReader.Core.Tests/Reference/rfft.csv: transforms by numpy.fft.rfft, for RealTransformTests.

Run in the repository's top folder: python3 tools/reference/rfft.py (numpy is needed)
Samples are those of the minimal standard generator (x <- 16807 x mod 2^31 - 1, from 1234567890), x/(2^31 - 1) - 1/2.
"""
import numpy as np

LENGTHS = [1, 2, 3, 4, 5, 7, 12, 15, 16, 25, 30, 48, 49, 60, 97, 121, 128]
x = 1234567890
with open("tests/ScopeReader.Core.Tests/Reference/rfft.csv", "w") as out:
    out.write(f"# numpy {np.__version__} numpy.fft.rfft; one line a bin: length, bin, real, imaginary; samples as in tools/reference/rfft.py\n")
    for n in LENGTHS:
        samples = []
        for _ in range(n):
            samples.append(x / 2147483647 - 0.5)
            x = 16807 * x % 2147483647
        for k, v in enumerate(np.fft.rfft(samples)):
            out.write(f"{n},{k},{float(v.real)!r},{float(v.imag)!r}\n")
