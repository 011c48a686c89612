using System.Globalization;
using ScopeReader.Ringing;
using ScopeReader.Signals;

namespace ScopeReader.Coverage;

/// <summary>How near fits of damped sinusoids, without a start, come to the Cramér-Rao bound.</summary>
internal static class RingingBoundTable
{
    // A record of three decay times; the ratio's own standard error is 1/√(2 runs).
    private const double DecayTimes = 3;

    /// <summary>Runs and writes the table.</summary>
    /// <param name="runs">Records a row.</param>
    /// <param name="first">The first seed.</param>
    /// <param name="output">Where the table goes.</param>
    public static void Write(int runs, ulong first, TextWriter output)
    {
        output.WriteLine(string.Create(CultureInfo.InvariantCulture, $"rms error over the bound; {runs} records a row, so ± {100 / Math.Sqrt(2.0 * runs):0.0} % (one standard error)"));
        output.WriteLine("| Q | samples a cycle | dB | points | frequency | decay | lost |");
        output.WriteLine("|---|---|---|---|---|---|---|");
        foreach (double q in (ReadOnlySpan<double>)[3, 10, 30])
            foreach (double perCycle in (ReadOnlySpan<double>)[6, 20, 60])
                foreach (double decibels in (ReadOnlySpan<double>)[20, 30, 40])
                    Row(q, perCycle, decibels, runs, first, output);
    }

    private static void Row(double q, double perCycle, double decibels, int runs, ulong first, TextWriter output)
    {
        double f = 1 / perCycle, decay = Math.PI * f / q, noise = Math.Sqrt(0.5) / Math.Pow(10, decibels / 20);
        int count = (int)Math.Ceiling(DecayTimes / decay);
        double[] times = [.. Enumerable.Range(0, count).Select(i => (double)i)], variances = [.. Enumerable.Repeat(noise * noise, count)];
        var done = new (double F, double A)[runs];
        Parallel.For(0, runs, i => done[i] = Errors(first + (ulong)i));
        (double F, double A)[] kept = [.. done.Where(d => !double.IsNaN(d.F))];
        output.WriteLine(string.Create(CultureInfo.InvariantCulture,
            $"| {q} | {perCycle} | {decibels} | {count} | {Math.Sqrt(kept.Average(d => d.F)):0.00} | {Math.Sqrt(kept.Average(d => d.A)):0.00} | {runs - kept.Length} |"));

        // Squared errors over the bound's variance, which the phase changes a little.
        (double, double) Errors(ulong seed)
        {
            var draw = new NormalNoise(seed);
            double phase = 2 * Math.PI * draw.Uniform();
            var curve = new DampedSinusoid(f, decay, Math.Cos(phase), Math.Sin(phase), draw.Uniform(-0.1, 0.1));
            double[] values = [.. times.Select(t => curve.At(t) + noise * draw.Normal())];
            if (DampedSinusoidFit.Find(times, values, variances) is not { } fit || DampedSinusoidFit.Covariance(times, variances, curve) is not { } bound)
                return (double.NaN, double.NaN);
            return (Math.Pow(fit.Curve.Frequency - f, 2) / bound[0, 0], Math.Pow(fit.Curve.Decay - decay, 2) / bound[1, 1]);
        }
    }
}
