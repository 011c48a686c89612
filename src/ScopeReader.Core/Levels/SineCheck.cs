using MathNet.Numerics.LinearAlgebra;
using ScopeReader.Edges;
using ScopeReader.Frequency;

namespace ScopeReader.Levels;

/// <summary>Whether a wave is one sine and little else, by a fit of the sine and its lowest harmonics.</summary>
internal static class SineCheck
{
    private const int Inspected = 20000, Harmonics = 5, LeastCycles = 4;

    // Triangles have -18.3 dB of harmonics and are no sines.
    private const double MostHarmonicPower = 0.01, MostOtherPower = 0.35;

    /// <summary>Offset, peak amplitude and residual rms of the sine; null where the wave is none.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="low">Rough lower level.</param>
    /// <param name="high">Rough upper level.</param>
    /// <param name="noise">Rough noise.</param>
    public static (double Offset, double Amplitude, double Noise)? Fit(ReadOnlySpan<double> samples, double low, double high, double noise)
    {
        IReadOnlyList<Transition> transitions = Transitions.Find(samples, low, high, noise);
        double[] rising = [.. transitions.Where(t => t.IsRising).Select(t => t.Instant)], falling = [.. transitions.Where(t => !t.IsRising).Select(t => t.Instant)];
        if (EdgeRegression.Fit(rising, falling, samplePhase: false) is not { } fit || fit.Spread > 0.15 * fit.Period)
            return null;

        // A stretch in the middle: the period from the whole record keeps its phase there.
        int length = (int)Math.Min(samples.Length, Math.Max(Inspected, Math.Ceiling(LeastCycles * fit.Period)));
        int start = (samples.Length - length) / 2, stride = Math.Max(1, length / Inspected);
        // Under about twice as many samples per cycle the harmonic's columns are hard to tell from those of a lower one.
        int harmonics = (int)Math.Clamp(Math.Ceiling(fit.Period / stride / 2) - 1, 1, Harmonics);
        int size = 1 + 2 * harmonics, count = (length + stride - 1) / stride;
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
            for (int k = 1; k <= harmonics; k++)
                (row[2 * k - 1], row[2 * k]) = Math.SinCos(k * phase);
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
}
