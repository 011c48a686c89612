namespace ScopeReader.Files.Axes;

/// <summary>Fits one step to a column of values that were rounded as they were printed, as they come in; none is kept.</summary>
/// <remarks>Each printed value lies within half of its last digit of the true one: a linear program in start and step, whose
/// range of steps is exact. The step taken is the least-squares one inside that range.</remarks>
internal sealed class SpacingFit
{
    // A few roundings of a double on the way from digits to differences.
    private const double Ulps = 4 * double.Epsilon, RelativeUlp = 4.5e-16;

    private readonly HullPair _rounded = new(), _printed = new();
    private double _first, _last, _reference, _sumN, _sumNn, _sumD, _sumNd, _largest, _widest;

    /// <summary>How many values there are.</summary>
    public long Count { get; private set; }

    /// <summary>Half of the widest last digit.</summary>
    public double WidestRounding => _widest;

    /// <summary>Adds the next value.</summary>
    /// <param name="value">As printed.</param>
    /// <param name="half">Half of its last digit.</param>
    public void Add(double value, double half)
    {
        double n = Count++;
        if (n == 0)
            _first = value;
        if (n == 1)
            _reference = value - _first;
        _last = value;
        _largest = Math.Max(_largest, Math.Abs(value));
        _widest = Math.Max(_widest, half);
        double noise = _largest * RelativeUlp + Ulps, offset = value - _first;
        _rounded.Add(n, offset - half * (1 + 1e-6) - noise, offset + half * (1 + 1e-6) + noise);
        _printed.Add(n, offset, offset);
        double d = offset - n * _reference;
        (_sumN, _sumNn, _sumD, _sumNd) = (_sumN + n, _sumNn + n * n, _sumD + d, _sumNd + n * d);
    }

    /// <summary>The spacing; null where the values are not evenly spaced to within their last digit.</summary>
    public Spacing? Fit() => Fit(_rounded);

    /// <summary>The spacing that fits best, however badly; its worst deviation says how well.</summary>
    public Spacing Nearest()
    {
        double slope = LeastSquares();
        (double low, double high) = _printed.Starts(slope);
        double worst = Math.Abs(high - low) / 2;
        // The range of steps that the deviation leaves open, seen over the whole record.
        double spread = Count > 1 ? 2 * worst / (Count - 1) : 0;
        return new Spacing(_first + (low + high) / 2, slope, slope - spread, slope + spread, worst, false);
    }

    private Spacing? Fit(HullPair rounded)
    {
        if (Count < 2 || !rounded.TrySlopes(out double low, out double high))
            return null;
        double even = (_last - _first) / (Count - 1);
        (double from, double to) = _printed.Starts(even);
        double noise = _largest * RelativeUlp + Ulps;
        if (Count > 2 && Math.Abs(from - to) <= 4 * noise && from <= 2 * noise && to >= -2 * noise)
            return new Spacing(_first, even, even, even, 0, true);
        double slope = Math.Clamp(LeastSquares(), low, high);
        (double startLow, double startHigh) = rounded.Starts(slope);
        double start = (startLow + startHigh) / 2;
        (double most, double least) = _printed.Starts(slope);
        return new Spacing(_first + start, slope, low, high, Math.Max(Math.Abs(most - start), Math.Abs(least - start)), false);
    }

    private double LeastSquares()
    {
        double n = Count;
        return _reference + (n * _sumNd - _sumN * _sumD) / (n * _sumNn - _sumN * _sumN);
    }
}
