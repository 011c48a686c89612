using System.Numerics;
using System.Runtime.InteropServices;

namespace ScopeReader.Ringing;

/// <summary>What the edges of one polarity have in common, window after window: something that decays, something that stays, or both.</summary>
/// <param name="Decaying">Fall of χ² through the part that decays.</param>
/// <param name="Steady">Fall of χ² through the part that stays.</param>
/// <param name="DecayingAmplitude">Magnitude of the part that decays, in the first window.</param>
/// <param name="SteadyAmplitude">Magnitude of the part that stays.</param>
internal readonly record struct DecayingAndSteady(double Decaying, double Steady, double DecayingAmplitude, double SteadyAmplitude)
{
    // What decays falls to a half or less from the first window to the last; what has gone after a third of a window is an edge's tail.
    private const double LeastDecay = 0.6931471805599453, FastestPerWindow = 3;

    private const int Decays = 12, Turns = 33;

    /// <summary>Fits.</summary>
    /// <param name="mean">Shape [slots]: mean over the edges, phases counted from the edge.</param>
    /// <param name="variance">Of each component of one of them, above 0.</param>
    /// <param name="step">From window to window, samples.</param>
    /// <param name="width">Length of a window, samples.</param>
    /// <remarks>
    /// Model A r^j + D, with r on a grid of decays and small turns of phase (the ringing need not have the windows' frequency) and A
    /// and D by least squares. With A alone, or D alone, χ² is larger by what the other explains.
    /// </remarks>
    public static DecayingAndSteady Of(ReadOnlySpan<Complex> mean, double variance, double step, double width)
    {
        int n = mean.Length;
        if (n < 3)
            return default;
        double total = 0;
        Complex sum = 0;
        foreach (Complex m in mean)
        {
            total += Square(m);
            sum += m;
        }
        double slowest = LeastDecay / (n - 1), fastest = Math.Max(2 * slowest, FastestPerWindow * step / width), turns = 2 * Math.PI * step / width;
        double steadyAlone = total - Square(sum) / n;
        double[] values = new double[2 * n];
        mean.CopyTo(MemoryMarshal.Cast<double, Complex>(values.AsSpan()));
        double decayingAlone = Least(values, slowest, fastest, turns, withSteady: false, out _, out _);
        double both = Math.Min(decayingAlone, Least(values, slowest, fastest, turns, withSteady: true, out double amplitude, out double stays));
        return new DecayingAndSteady(Math.Max(0, steadyAlone - both) / variance, Math.Max(0, decayingAlone - both) / variance, amplitude, stays);
    }

    // Grid, then smaller and smaller steps from its best place.
    private static double Least(double[] mean, double slowest, double fastest, double turns, bool withSteady, out double decaying, out double steady)
    {
        double scale = Math.Log(fastest / slowest);
        (double X, double Y, double Left) best = (0, 0, double.PositiveInfinity);
        for (int d = 0; d < Decays; d++)
            for (int t = 0; t < Turns; t++)
                Try((double)d / (Decays - 1), 2.0 * t / (Turns - 1) - 1);
        for (double dx = 0.5 / (Decays - 1), dy = 1.0 / (Turns - 1); dx > 1e-5; dx /= 2, dy /= 2)
            for (bool moved = true; moved;)
            {
                (double x, double y, double before) = best;
                Try(x + dx, y);
                Try(x - dx, y);
                Try(x, y + dy);
                Try(x, y - dy);
                moved = best.Left < before * (1 - 1e-9);
            }
        (_, decaying, steady) = Remainder(mean, slowest * Math.Exp(scale * best.X), turns * best.Y, withSteady);
        return best.Left;

        void Try(double x, double y)
        {
            x = Math.Clamp(x, 0, 1);
            y = Math.Clamp(y, -1, 1);
            double rest = Remainder(mean, slowest * Math.Exp(scale * x), turns * y, withSteady).Left;
            if (rest < best.Left)
                best = (x, y, rest);
        }
    }

    private static (double Left, double Decaying, double Steady) Remainder(double[] mean, double decay, double turn, bool withSteady)
    {
        ReadOnlySpan<Complex> values = MemoryMarshal.Cast<double, Complex>(mean);
        Complex r = Complex.FromPolarCoordinates(Math.Exp(-decay), turn), power = 1, s = 0, rm = 0, sum = 0;
        double rr = 0, total = 0;
        foreach (Complex m in values)
        {
            s += power;
            rr += Square(power);
            rm += Complex.Conjugate(power) * m;
            sum += m;
            total += Square(m);
            power *= r;
        }
        double determinant = rr * values.Length - Square(s);
        if (!withSteady || determinant < 1e-9 * rr * values.Length)
            return (total - Square(rm) / rr, rm.Magnitude / rr, 0);
        Complex a = (values.Length * rm - Complex.Conjugate(s) * sum) / determinant, steady = (rr * sum - s * rm) / determinant;
        return (total - (Complex.Conjugate(a) * rm).Real - (Complex.Conjugate(steady) * sum).Real, a.Magnitude, steady.Magnitude);
    }

    private static double Square(Complex z) => z.Real * z.Real + z.Imaginary * z.Imaginary;
}
