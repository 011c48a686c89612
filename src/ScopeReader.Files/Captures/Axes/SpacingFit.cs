using System.Globalization;
using System.Numerics;
using System.Runtime.InteropServices;

namespace ScopeReader.Files.Axes;

/// <summary>Fits one step to a column of values that were rounded as they were printed, as they come in; none is kept.</summary>
/// <remarks>Each printed value lies within half of its last digit of the true one: a linear program in start and step, whose
/// range of steps is exact. The step taken is the least-squares one inside that range.</remarks>
internal sealed class SpacingFit
{
    // A few roundings of a double on the way from digits to differences.
    private const double Ulps = 4 * double.Epsilon, RelativeUlp = 4.5e-16;

    private const int FewValues = 4096, Neighbours = 64;

    private readonly HullPair _rounded = new(), _printed = new();
    private double _first, _firstN, _last, _lastN, _reference, _sumWeight, _sumN, _sumNn, _sumD, _sumNd, _largest;

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
        if (Count == 2)
            _reference = (value - _first) / (row - _firstN);
        AddPoint(row, value, half);
        Weigh(row - _firstN, value - _first, 1);
    }

    private void AddPoint(long row, double value, double half)
    {
        double n = row - _firstN, offset = value - _first;
        (_last, _lastN) = (value, n);
        _largest = Math.Max(_largest, Math.Abs(value));
        WidestHalf = Math.Max(WidestHalf, half);
        double reach = half * (1 + 1e-6) + Noise;
        _rounded.Add(n, offset - reach, offset + reach);
        _printed.Add(n, offset, offset);
    }

    private void Weigh(double n, double offset, double weight)
    {
        double d = offset - n * _reference;
        _sumWeight += weight;
        (_sumN, _sumNn, _sumD, _sumNd) = (_sumN + weight * n, _sumNn + weight * n * n, _sumD + weight * d, _sumNd + weight * n * d);
    }

    /// <summary>Adds many values at once, of which only those can matter that lie farthest from an even spacing.</summary>
    /// <param name="row">Row of the first.</param>
    /// <param name="values">As printed; NaN where one is missing.</param>
    /// <param name="halves">Half of each one's last digit.</param>
    /// <remarks>Of 64 neighbours the two farthest above and below a line through the ends of all are taken: the others bound the
    /// step less, by no more than 64 times the error of that line's slope, which is a last digit over all of the values.
    /// Leaving them out can only widen the range.</remarks>
    public void Add(long row, ReadOnlySpan<double> values, ReadOnlySpan<double> halves)
    {
        bool few = values.Length < FewValues || Count < 2 || double.IsNaN(values[0]) || double.IsNaN(values[^1]);
        for (int i = 0; i < values.Length && (few || Count < 2); i++)
            if (!double.IsNaN(values[i]))
                Add(row + i, values[i], halves[i]);
        if (few)
            return;
        double slope = (values[^1] - values[0]) / (values.Length - 1);
        for (int start = 0; start < values.Length; start += Neighbours)
        {
            int length = Math.Min(Neighbours, values.Length - start);
            AddExtremes(row + start, values.Slice(start, length), halves.Slice(start, length), slope);
        }
        (_last, _lastN) = (values[^1], row + values.Length - 1 - _firstN);
    }

    private void AddExtremes(long row, ReadOnlySpan<double> values, ReadOnlySpan<double> halves, double slope)
    {
        // Where one half holds for all, the farthest printed values are the farthest bounds too.
        if (halves.IndexOfAnyExceptInRange(halves[0], halves[0]) < 0 && TryRange(values, slope, out double low, out double high, out double sum))
        {
            int lowAt = 0, highAt = 0;
            for (int i = 0; i < values.Length; i++)
            {
                double off = values[i] - i * slope;
                if (off == low)
                    lowAt = i;
                if (off == high)
                    highAt = i;
            }
            AddPoint(row + Math.Min(lowAt, highAt), values[Math.Min(lowAt, highAt)], halves[0]);
            AddPoint(row + Math.Max(lowAt, highAt), values[Math.Max(lowAt, highAt)], halves[0]);
            // Of the least-squares sums the neighbours' mean is enough.
            Weigh(row - _firstN + (values.Length - 1) / 2.0, sum / values.Length, values.Length);
            Count += values.Length;
            return;
        }
        for (int i = 0; i < values.Length; i++)
            if (!double.IsNaN(values[i]))
                Add(row + i, values[i], halves[i]);
    }

    // The lowest and the highest value off a line, and the sum of all less the first one ever; false where one is missing.
    private bool TryRange(ReadOnlySpan<double> values, double slope, out double low, out double high, out double sum)
    {
        (low, high, sum) = (0, 0, 0);
        int width = Vector<double>.Count;
        if (values.Length % width != 0)
            return false;
        ReadOnlySpan<Vector<double>> wide = MemoryMarshal.Cast<double, Vector<double>>(values);
        Vector<double> lowest = new(double.PositiveInfinity), highest = new(double.NegativeInfinity), total = Vector<double>.Zero, index = Vector<double>.Indices, first = new(_first);
        foreach (Vector<double> v in wide)
        {
            Vector<double> off = v - index * slope;
            (lowest, highest, total) = (Vector.Min(lowest, off), Vector.Max(highest, off), total + (v - first));
            index += new Vector<double>(width);
        }
        (low, high, sum) = (lowest[0], highest[0], Vector.Sum(total));
        for (int k = 1; k < width; k++)
            (low, high) = (Math.Min(low, lowest[k]), Math.Max(high, highest[k]));
        return !double.IsNaN(sum);
    }

    /// <summary>The spacing; null where the values are not evenly spaced to within their last digit.</summary>
    public Spacing? Fit()
    {
        if (Count < 2 || !_rounded.TrySlopes(out double low, out double high))
            return null;
        double even = Plain((_last - _first) / _lastN, 2 * Noise / _lastN);
        (double most, double least) = _printed.Starts(even);
        if (Count > 2 && most - least <= 8 * Noise)
            return new Spacing(StartAt(_first, even), even, Math.Min(low, even), Math.Max(high, even), 0, true);
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
        double n = _sumWeight;
        return _reference + (n * _sumNd - _sumN * _sumD) / (n * _sumNn - _sumN * _sumN);
    }

    // The step as a decimal number, where one of 14 digits or fewer is as good: 1E-06 and not 1.0000000000000002E-06.
    private static double Plain(double step, double tolerance)
    {
        double plain = double.Parse(step.ToString("G14", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        return Math.Abs(plain - step) <= tolerance ? plain : step;
    }
}
