using MathNet.Numerics.LinearAlgebra;
using ScopeReader.Edges;
using ScopeReader.Frequency;

namespace ScopeReader.Levels;

/// <summary>Whether a wave is one sine and little else, by a fit of the sine and its lowest harmonics.</summary>
internal static class SineCheck
{
    private const int Inspected = 20000, Harmonics = 5, LeastCycles = 4;

    // From here up no harmonic lies below half the sample rate, and edges alias.
    private const double FewSamples = 0.2;

    // Triangles have -18.3 dB of harmonics and are no sines.
    private const double MostHarmonicPower = 0.01, MostOtherPower = 0.35;

    /// <summary>Offset, peak amplitude and residual rms of the sine; null where the wave is none.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="low">Rough lower level.</param>
    /// <param name="high">Rough upper level.</param>
    /// <param name="noise">Rough noise.</param>
    public static (double Offset, double Amplitude, double Noise)? Fit(ReadOnlySpan<double> samples, double low, double high, double noise)
    {
        samples = Scattered.Stretch(samples, low, high, noise);
        IReadOnlyList<Transition> transitions = Transitions.Find(samples, low, high, noise);
        double[] rising = [.. transitions.Where(t => t.IsRising).Select(t => t.Instant)], falling = [.. transitions.Where(t => !t.IsRising).Select(t => t.Instant)];
        if (EdgeRegression.Fit(rising, falling, samplePhase: false) is not { } fit || fit.Spread > 0.15 * fit.Period)
            return null;

        // A stretch in the middle: the period from the whole record keeps its phase there.
        int length = (int)Math.Min(samples.Length, Math.Max(Inspected, Math.Ceiling(LeastCycles * fit.Period)));
        int start = (samples.Length - length) / 2, stride = Math.Max(1, length / Inspected);
        int count = (length + stride - 1) / stride;
        int[] harmonics = Distinct(stride / fit.Period, count);
        int size = 1 + 2 * harmonics.Length;
        if (count < 2 * size)
            return null;

        var normal = new double[size, size];
        var right = new double[size];
        var row = new double[size];
        double squares = 0;
        for (int i = start; i < start + length; i += stride)
        {
            double phase = 2 * Math.PI * (i - start) / fit.Period, value = samples[i] - (low + high) / 2;
            row[0] = 1;
            for (int k = 0; k < harmonics.Length; k++)
                (row[2 * k + 1], row[2 * k + 2]) = Math.SinCos(harmonics[k] * phase);
            squares += value * value;
            for (int a = 0; a < size; a++)
            {
                right[a] += row[a] * value;
                for (int b = 0; b <= a; b++)
                    normal[a, b] += row[a] * row[b];
            }
        }
        for (int a = 0; a < size; a++)
            for (int b = a + 1; b < size; b++)
                normal[a, b] = normal[b, a];
        Vector<double> c = Matrix<double>.Build.DenseOfArray(normal).Solve(Vector<double>.Build.Dense(right));
        double rest = Math.Max(0, squares - c.DotProduct(Vector<double>.Build.Dense(right))) / Math.Max(1, count - size);
        double fundamental = (c[1] * c[1] + c[2] * c[2]) / 2, others = 0;
        for (int a = 3; a < size; a++)
            others += c[a] * c[a] / 2;
        // Noise alone gives each coefficient some power.
        others -= rest * (size - 3) / count;
        bool isSine = double.IsFinite(fundamental) && others <= MostHarmonicPower * fundamental && rest <= MostOtherPower * fundamental;
        return isSine ? ((low + high) / 2 + c[0], Math.Sqrt(2 * fundamental), Math.Sqrt(rest)) : null;
    }

    // The harmonics that are folded onto neither another one nor the mean; beyond half the sample rate they still show.
    private static int[] Distinct(double frequency, int count)
    {
        var found = new List<int>();
        for (int k = 1; k <= Harmonics; k++)
        {
            double folded = Folded(k * frequency), nearest = Math.Min(folded, 0.5 - folded);
            foreach (int other in found)
                nearest = Math.Min(nearest, Math.Abs(folded - Folded(other * frequency)));
            if (k == 1 || nearest > 2.0 / count)
                found.Add(k);
        }
        return [.. found];
    }

    private static double Folded(double frequency) => Math.Abs(frequency - Math.Round(frequency));

    /// <summary>The same for a sine of fewer than five samples a cycle, whose edges say little.</summary>
    public static (double Offset, double Amplitude, double Noise)? FitLine(ReadOnlySpan<double> samples) =>
        InterpolatedFft.Estimate(samples) is { CyclesPerSample: > FewSamples } line && SineFit.From(samples, line.CyclesPerSample) is { } sine
            && sine.ResidualRms * sine.ResidualRms <= MostOtherPower * sine.Amplitude * sine.Amplitude / 2
            ? (sine.Offset, sine.Amplitude, sine.ResidualRms) : null;
}
