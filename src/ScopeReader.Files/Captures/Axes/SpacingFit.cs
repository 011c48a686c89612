using System.Globalization;

namespace ScopeReader.Files.Axes;

/// <summary>Fits one step to a column of values that were rounded as they were printed, as they come in; none is kept.</summary>
/// <remarks>Each printed value lies within half of its last digit of the true one: a linear program in start and step, whose
/// range of steps is exact. The step taken is the least-squares one inside that range.</remarks>
internal sealed class SpacingFit
{
    // A few roundings of a double on the way from digits to differences.
    private const double Ulps = 4 * double.Epsilon, RelativeUlp = 4.5e-16;

    private readonly HullPair _rounded = new(), _printed = new();
    private double _first, _firstN, _last, _lastN, _reference, _sumN, _sumNn, _sumD, _sumNd, _largest;

    /// <summary>How many values there are.</summary>
    public long Count { get; private set; }

    /// <summary>Half of the widest last digit.</summary>
    public double WidestHalf { get; private set; }

    private double Noise => _largest * RelativeUlp + Ulps;

    /// <summary>Adds a value.</summary>
    /// <param name="row">Its row, higher than that of the one before.</param>
    /// <param name="value">As printed.</param>
    /// <param name="half">Half of its last digit.</param>
    public void Add(long row, double value, double half)
    {
        if (Count++ == 0)
            (_first, _firstN) = (value, row);
        double n = row - _firstN, offset = value - _first;
        if (Count == 2)
            _reference = offset / n;
        (_last, _lastN) = (value, n);
        _largest = Math.Max(_largest, Math.Abs(value));
        WidestHalf = Math.Max(WidestHalf, half);
        double reach = half * (1 + 1e-6) + Noise;
        _rounded.Add(n, offset - reach, offset + reach);
        _printed.Add(n, offset, offset);
        double d = offset - n * _reference;
        (_sumN, _sumNn, _sumD, _sumNd) = (_sumN + n, _sumNn + n * n, _sumD + d, _sumNd + n * d);
    }

    /// <summary>The spacing; null where the values are not evenly spaced to within their last digit.</summary>
    public Spacing? Fit()
    {
        if (Count < 2 || !_rounded.TrySlopes(out double low, out double high))
            return null;
        double even = Plain((_last - _first) / _lastN, 2 * Noise / _lastN);
        (double most, double least) = _printed.Starts(even);
        if (Count > 2 && most - least <= 8 * Noise)
            return new Spacing(StartAt(_first, even), even, even, even, 0, true);
        double slope = Math.Clamp(LeastSquares(), low, high);
        (double startLow, double startHigh) = _rounded.Starts(slope);
        double start = (startLow + startHigh) / 2;
        (most, least) = _printed.Starts(slope);
        return new Spacing(StartAt(_first + start, slope), slope, low, high, Math.Max(Math.Abs(most - start), Math.Abs(least - start)), false);
    }

    /// <summary>The spacing that fits best, however badly; its worst deviation says how well.</summary>
    public Spacing Nearest()
    {
        double slope = LeastSquares();
        (double most, double least) = _printed.Starts(slope);
        double worst = Math.Abs(most - least) / 2;
        // The range of steps that the deviation leaves open over the whole record.
        double spread = _lastN > 0 ? 2 * worst / _lastN : 0;
        return new Spacing(StartAt(_first + (most + least) / 2, slope), slope, slope - spread, slope + spread, worst, false);
    }

    private double StartAt(double first, double step) => first - _firstN * step;

    private double LeastSquares()
    {
        double n = Count;
        return _reference + (n * _sumNd - _sumN * _sumD) / (n * _sumNn - _sumN * _sumN);
    }

    // The step as a decimal number, where one of 14 digits or fewer is as good: 1E-06 and not 1.0000000000000002E-06.
    private static double Plain(double step, double tolerance)
    {
        double plain = double.Parse(step.ToString("G14", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        return Math.Abs(plain - step) <= tolerance ? plain : step;
    }
}
