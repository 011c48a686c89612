using ScopeReader.Levels;

namespace ScopeReader.Signals;

/// <summary>One edge of a made square wave: its instants in cycles, its aberrations as fractions of amplitude.</summary>
/// <remarks>
/// The edge is seen as a passage from 0 to 1 in either direction. The regions of IEEE Std 181: aberrations before it count
/// from so many transition durations before the last instant inside the boundary of the first state, aberrations after it
/// until so many after the first instant inside that of the second. Boundaries are those of the settling band.
/// </remarks>
internal sealed class EdgeTruth
{
    private readonly SquareWave _wave;
    private readonly bool _isRising;

    /// <param name="wave">The wave.</param>
    /// <param name="isRising">Which edge.</param>
    /// <param name="from">A phase in the state before the edge, cycles.</param>
    /// <param name="settings">Reference levels and regions.</param>
    public EdgeTruth(SquareWave wave, bool isRising, double from, LevelSettings settings)
    {
        (_wave, _isRising) = (wave, isRising);
        int n = wave.Signal.Table.Length, start = (int)Math.Floor(from * n);
        double band = settings.SettlingBandPercent / 100;

        int middle = Forward(start, start + n, i => this[i] < 0.5 && this[i + 1] >= 0.5);
        int low = Backward(middle, i => Crosses(i, settings.ReferenceLowPercent / 100));
        int high = Forward(middle, middle + n, i => Crosses(i, settings.ReferenceHighPercent / 100));
        Instant = Root(middle, 0.5);
        Duration = Root(high, settings.ReferenceHighPercent / 100) - Root(low, settings.ReferenceLowPercent / 100);
        int region = (int)Math.Round(settings.OvershootRegion * Duration * n);

        int leaves = Backward(middle, i => Crosses(i, band)), enters = Forward(middle, middle + n, i => Crosses(i, 1 - band));
        Overshoot = Math.Max(0, Highest(middle, enters + region, i => this[i] - 1));
        Preshoot = Math.Max(0, Highest(leaves - region, leaves, i => -this[i]));
        int reaches = Forward(middle, enters + region, i => this[i + 1] >= 1);
        Undershoot = reaches == enters + region ? 0 : Math.Max(0, Highest(reaches + 1, enters + region, i => 1 - this[i]));

        int next = Forward(high, high + n, i => this[i] >= 0.5 && this[i + 1] < 0.5);
        int end = Backward(next, i => Math.Abs(this[i] - 1) <= band);
        int last = Backward(end, i => Math.Abs(this[i] - 1) > band);
        Settling = Root(last, this[last] > 1 ? 1 + band : 1 - band) - Instant;
    }

    /// <summary>The 50 % instant, cycles.</summary>
    public double Instant { get; }

    /// <summary>Between the reference levels, cycles.</summary>
    public double Duration { get; }

    /// <summary>Beyond the second state, of amplitude.</summary>
    public double Overshoot { get; }

    /// <summary>Short of the second state once it was reached, of amplitude.</summary>
    public double Undershoot { get; }

    /// <summary>Away from the second state before the edge, of amplitude.</summary>
    public double Preshoot { get; }

    /// <summary>From the 50 % instant to the last entry into the band, cycles.</summary>
    public double Settling { get; }

    private double this[int i]
    {
        get
        {
            ReadOnlySpan<double> table = _wave.Signal.Table;
            int n = table.Length;
            return Fraction(table[(i % n + n) % n]);
        }
    }

    private double Fraction(double value) => (_isRising ? value - _wave.Low : _wave.High - value) / _wave.Amplitude;

    private bool Crosses(int i, double level) => this[i] < level && this[i + 1] >= level;

    private static int Forward(int from, int to, Func<int, bool> found)
    {
        int i = from;
        while (i < to && !found(i))
            i++;
        return i;
    }

    private int Backward(int from, Func<int, bool> found)
    {
        int end = from - _wave.Signal.Table.Length, i = from;
        while (i > end && !found(i))
            i--;
        return i;
    }

    // Where the closed form passes the level between table points i and i + 1; bisection to the last bit.
    private double Root(int i, double level)
    {
        double n = _wave.Signal.Table.Length, a = i / n, b = (i + 1) / n;
        bool below = At(a) < level;
        // A level that is met at a table point: the closed form may have it on the other side of its own rounding.
        if (At(b) < level == below)
            return Math.Abs(At(a) - level) < Math.Abs(At(b) - level) ? a : b;
        for (int k = 0; k < 45; k++)
        {
            double middle = (a + b) / 2;
            if (At(middle) < level == below)
                a = middle;
            else
                b = middle;
        }
        return (a + b) / 2;
    }

    private double At(double phase) => Fraction(_wave.Signal.Series.At(phase));

    private static double Highest(int from, int to, Func<int, double> value)
    {
        int best = from;
        for (int i = from; i <= to; i++)
            if (value(i) > value(best))
                best = i;
        // At an end of the region the value is no top.
        return best == from || best == to ? value(best) : Parabola.Top(value(best - 1), value(best), value(best + 1));
    }
}
