using ScopeReader.Numerics;

namespace ScopeReader.Frequency;

/// <summary>A wave's template laid on one part of the record: how much of it is there, and how late.</summary>
/// <param name="Instant">Middle of the part, samples from the middle of the record.</param>
/// <param name="Gain">Amplitude over the template's.</param>
/// <param name="Phase">Phase less the template's, cycles, -0.5 to 0.5.</param>
/// <param name="GainFactor">Standard uncertainty of the gain for noise of one unit a sample.</param>
/// <param name="PhaseFactor">Standard uncertainty of the phase for noise of one unit a sample, at a gain of 1.</param>
/// <param name="Residual">Rms of the samples less the fit.</param>
internal readonly record struct PartFit(double Instant, double Gain, double Phase, double GainFactor, double PhaseFactor, double Residual)
{
    private const int Fewest = 8, MostParts = 64;
    private const double CyclesPerPart = 2;

    /// <summary>Fits up to 64 parts of equal length, of two cycles or more; those in which the three unknowns cannot be told apart are left out.</summary>
    /// <param name="samples">Shape [n].</param>
    /// <param name="template">One period.</param>
    /// <param name="frequency">Cycles per sample that the parts are laid on.</param>
    public static PartFit[] Over(ReadOnlyMemory<double> samples, WaveTemplate template, double frequency)
    {
        int parts = (int)Math.Min(MostParts, samples.Length * frequency / CyclesPerPart);
        var found = new PartFit?[parts];
        // Each part is summed on its own, so that the sums do not depend on how many cores share the work.
        void Fit(int p) => found[p] = One(samples.Span, template, frequency, (int)((long)p * samples.Length / parts), (int)((long)(p + 1) * samples.Length / parts));
        if (samples.Length > 1 << 18)
            Parallel.For(0, parts, Fit);
        else
            for (int p = 0; p < parts; p++)
                Fit(p);
        return [.. found.Where(f => f is not null).Select(f => f!.Value)];
    }

    // y = offset + gain · s(φ) + late · s'(φ): linear in its three unknowns while late is small beside the wave's features.
    private static PartFit? One(ReadOnlySpan<double> samples, WaveTemplate template, double frequency, int start, int end)
    {
        int count = end - start, points = template.Points;
        if (count < Fewest)
            return null;
        ReadOnlySpan<double> values = template.Values, slopes = template.Slopes, part = samples[start..end];
        double middle = (samples.Length - 1) / 2.0, first = frequency * (start - middle), shift = part[0];
        double place = (first - Math.Floor(first)) * points, step = frequency * points;
        double s1 = 0, p1 = 0, ss = 0, sp = 0, pp = 0, y1 = 0, ys = 0, yp = 0, yy = 0;
        foreach (double sample in part)
        {
            if (place >= points)
                place -= points;
            int i = (int)place;
            double t = place - i, s = values[i] + t * (values[i + 1] - values[i]), p = slopes[i] + t * (slopes[i + 1] - slopes[i]), y = sample - shift;
            s1 += s;
            p1 += p;
            ss += s * s;
            sp += s * p;
            pp += p * p;
            y1 += y;
            ys += y * s;
            yp += y * p;
            yy += y * y;
            place += step;
        }
        // The offset is projected out first: a 2 × 2 system remains.
        double n = count, a = ss - s1 * s1 / n, b = sp - s1 * p1 / n, c = pp - p1 * p1 / n, u = ys - y1 * s1 / n, v = yp - y1 * p1 / n;
        double determinant = a * c - b * b;
        if (!(determinant > 1e-9 * a * c))
            return null;
        double gain = (u * c - v * b) / determinant, late = (v * a - u * b) / determinant;
        double rest = Math.Max(0, yy - y1 * y1 / n - gain * u - late * v);
        // Of a sine this is exact for any lateness; other waves have it for small ones.
        double phase = Math.Atan2(2 * Math.PI * late, gain) / (2 * Math.PI);
        return new PartFit((start + end - 1) / 2.0 - middle, double.Hypot(gain, 2 * Math.PI * late), phase, Math.Sqrt(c / determinant), Math.Sqrt(a / determinant), Math.Sqrt(rest / n));
    }
}
