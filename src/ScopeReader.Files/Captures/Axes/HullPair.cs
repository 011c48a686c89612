namespace ScopeReader.Files.Axes;

/// <summary>All straight lines that pass above every lower point and below every upper point, as the points come in.</summary>
/// <remarks>Line a + b·n. The steepest is bound by (U_j - L_i)/(j - i) over i before j, the flattest by (L_j - U_i)/(j - i):
/// only the corners of the lower points' upper hull and of the upper points' lower hull count, a handful for printed times.
/// Linear cost (monotone chain).</remarks>
internal sealed class HullPair
{
    private readonly List<(double N, double T)> _lower = [], _upper = [];

    /// <summary>Adds the bounds of one point; <paramref name="n"/> rises from call to call.</summary>
    public void Add(double n, double low, double high)
    {
        Push(_lower, n, low, 1);
        Push(_upper, n, high, -1);
    }

    /// <summary>How many corners are held.</summary>
    public int Corners => _lower.Count + _upper.Count;

    /// <summary>The slopes of the flattest and the steepest line; false where no line passes.</summary>
    public bool TrySlopes(out double low, out double high)
    {
        (low, high) = (0, 0);
        return _lower.Count > 1 && TryExtreme(1, out high) && TryExtreme(-1, out low) && low <= high;
    }

    /// <summary>The lowest and the highest value at n = 0 of the lines of a slope; low above high where none passes.</summary>
    public (double Low, double High) Starts(double slope)
    {
        double low = double.NegativeInfinity, high = double.PositiveInfinity;
        foreach ((double n, double t) in _lower)
            low = Math.Max(low, t - slope * n);
        foreach ((double n, double t) in _upper)
            high = Math.Min(high, t - slope * n);
        return (low, high);
    }

    // Keeps a chain that turns one way: clockwise seen from the left for the upper hull (turn 1).
    private static void Push(List<(double N, double T)> hull, double n, double t, int turn)
    {
        if (hull.Count > 0 && hull[^1].N == n)
            return; // The same point once more.
        while (hull.Count >= 2)
        {
            (double n1, double t1) = hull[^1];
            (double n0, double t0) = hull[^2];
            if (turn * ((t1 - t0) * (n - n0) - (t - t0) * (n1 - n0)) > 0)
                break;
            hull.RemoveAt(hull.Count - 1);
        }
        hull.Add((n, t));
    }

    // Newton's steps from beyond the end: at each slope the worst pair of corners gives the next one.
    private bool TryExtreme(int sign, out double slope)
    {
        (double firstLow, double lastHigh) = sign > 0 ? (_lower[0].T, _upper[^1].T) : (_upper[0].T, _lower[^1].T);
        slope = (lastHigh - firstLow) / (_lower[^1].N - _lower[0].N);
        for (int step = 0; step < 100; step++)
        {
            (double N, double T) low = Most(_lower, slope, 1), high = Most(_upper, slope, -1);
            double excess = low.T - slope * low.N - (high.T - slope * high.N);
            if (excess <= 0)
                return true;
            // The pair binds from the other side: steeper and flatter at once, so nothing passes.
            if (sign * (high.N - low.N) <= 0)
                return false;
            double next = (high.T - low.T) / (high.N - low.N);
            if (sign * (next - slope) >= 0)
                return true; // Nothing but rounding of the last bit is left.
            slope = next;
        }
        return true;
    }

    private static (double N, double T) Most(List<(double N, double T)> hull, double slope, int sign)
    {
        (double N, double T) best = hull[0];
        double most = double.NegativeInfinity;
        foreach ((double n, double t) in hull)
            if (sign * (t - slope * n) > most)
                (most, best) = (sign * (t - slope * n), (n, t));
        return best;
    }
}
