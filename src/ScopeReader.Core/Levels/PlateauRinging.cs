using MathNet.Numerics.LinearAlgebra;

namespace ScopeReader.Levels;

/// <summary>The level that a ringing plateau settles to, by a fit of what still rings.</summary>
/// <remarks>
/// The plateaus of a state, averaged sample by sample from their edge on, are fitted with c + e^(−αt)(a cos ωt + b sin ωt):
/// α and ω by search, the rest linear (variable projection). A mean over the plateau alone would keep a part of the
/// ringing that more averaging does not remove.
/// </remarks>
internal static class PlateauRinging
{
    private const int MostPoints = 200, FewestPoints = 12;
    private const double Significant = 6;

    // Decays over the window that the search starts from, in 1/e.
    private static readonly double[] Decays = [0.5, 1.5, 3, 5, 8];

    /// <summary>The settled level, its standard uncertainty for a noise of one unit on each point of the average, and that noise.</summary>
    /// <param name="average">Shape [n]: the averaged plateau.</param>
    /// <returns>Null where nothing rings visibly, or the plateau is too short to tell.</returns>
    public static (double Level, double Factor, double Noise)? Settled(ReadOnlySpan<double> average)
    {
        int block = (average.Length + MostPoints - 1) / MostPoints, n = average.Length / block;
        if (n < FewestPoints)
            return null;
        var y = new double[n];
        double mean = 0, flat = 0;
        for (int i = 0; i < n; i++)
        {
            foreach (double value in average.Slice(i * block, block))
                y[i] += value / block;
            mean += y[i] / n;
        }
        foreach (double value in y)
            flat += (value - mean) * (value - mean);

        (double cycles, double decay, double rest) = Search(y);
        if (!((flat - rest) / 4 > Significant * rest / (n - 5)))
            return null;

        // The two non-linear parameters cost certainty too: their derivatives are columns of the normal equations.
        var design = Matrix<double>.Build.Dense(n, 5);
        double[] linear = Project(y, cycles, decay).Coefficients;
        for (int i = 0; i < n; i++)
        {
            double t = (i + 0.5) / n, envelope = Math.Exp(-decay * t);
            var (sin, cos) = Math.SinCos(2 * Math.PI * cycles * t);
            double wave = envelope * (linear[1] * cos + linear[2] * sin), quadrature = envelope * (linear[2] * cos - linear[1] * sin);
            design.SetRow(i, [1, envelope * cos, envelope * sin, t * wave, t * quadrature]);
        }
        double variance = (design.Transpose() * design).Inverse()[0, 0] / block;
        return double.IsFinite(variance) && variance > 0 ? (linear[0], Math.Sqrt(variance), Math.Sqrt(rest * block / (n - 5))) : null;
    }

    // A coarse look at every frequency from one cycle in the window up, then a pattern search about the best.
    private static (double Cycles, double Decay, double Squares) Search(double[] y)
    {
        (double cycles, double decay, double rest) best = (1, 1, double.PositiveInfinity);
        foreach (double decay in Decays)
            for (double cycles = 1; cycles < 0.4 * y.Length; cycles += 0.5)
                Try(cycles, decay);
        for (double step = 0.25; step > 1e-4; step /= 2)
            for (int i = 0; i < 20; i++)
            {
                double before = best.rest, cycles = best.cycles, decay = best.decay;
                Try(cycles + step, decay);
                Try(cycles - step, decay);
                Try(cycles, decay + 2 * step);
                Try(cycles, decay - 2 * step);
                if (best.rest >= before)
                    break;
            }
        return best;

        void Try(double cycles, double decay)
        {
            if (cycles < 0.8 || decay < 0)
                return;
            double rest = Project(y, cycles, decay).Squares;
            if (rest < best.rest)
                best = (cycles, decay, rest);
        }
    }

    // Least squares of the three linear coefficients; t runs from 0 to 1 over the window.
    private static (double[] Coefficients, double Squares) Project(double[] y, double cycles, double decay)
    {
        double shift = y[^1], cc = 0, ss = 0, cs = 0, c1 = 0, s1 = 0, yc = 0, ys = 0, y1 = 0, yy = 0;
        double turn = 2 * Math.PI * cycles / y.Length, shrink = Math.Exp(-decay / y.Length);
        var (sin, cos) = Math.SinCos(turn / 2);
        var (stepSin, stepCos) = Math.SinCos(turn);
        (cos, sin) = (cos * Math.Sqrt(shrink), sin * Math.Sqrt(shrink));
        foreach (double value in y)
        {
            double v = value - shift;
            cc += cos * cos;
            ss += sin * sin;
            cs += cos * sin;
            c1 += cos;
            s1 += sin;
            yc += v * cos;
            ys += v * sin;
            y1 += v;
            yy += v * v;
            (cos, sin) = (shrink * (cos * stepCos - sin * stepSin), shrink * (sin * stepCos + cos * stepSin));
        }
        double n = y.Length;
        // The constant is projected out first: a 2 × 2 system remains.
        double a11 = cc - c1 * c1 / n, a22 = ss - s1 * s1 / n, a12 = cs - c1 * s1 / n, b1 = yc - c1 * y1 / n, b2 = ys - s1 * y1 / n;
        double determinant = a11 * a22 - a12 * a12;
        if (!(determinant > 1e-12 * a11 * a22))
            return ([shift + y1 / n, 0, 0], yy - y1 * y1 / n);
        double a = (b1 * a22 - b2 * a12) / determinant, b = (b2 * a11 - b1 * a12) / determinant;
        double rest = yy - y1 * y1 / n - a * b1 - b * b2;
        return ([shift + (y1 - a * c1 - b * s1) / n, a, b], Math.Max(0, rest));
    }
}
