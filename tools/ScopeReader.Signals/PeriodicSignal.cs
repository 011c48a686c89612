namespace ScopeReader.Signals;

/// <summary>A Fourier series played at a frequency, from a table of one period.</summary>
/// <remarks>
/// Between table points a cubic through both values and both slopes: its error is at most h⁴/384·max|x''''|. With 64 steps
/// in the standard deviation of a Gaussian edge that is under 1e-10 of the swing.
/// </remarks>
public sealed class PeriodicSignal : ISignal
{
    private readonly double[] _values, _slopes;

    /// <param name="frequency">Hz.</param>
    /// <param name="series">One period.</param>
    /// <param name="finest">Shortest feature of the period, cycles: the standard deviation of its fastest edge.</param>
    public PeriodicSignal(double frequency, FourierSeries series, double finest)
    {
        ArgumentNullException.ThrowIfNull(series);
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(frequency);
        ArgumentOutOfRangeException.ThrowIfLessThan(finest, 1e-5);
        (Frequency, Series) = (frequency, series);
        int steps = 1024;
        while (steps < Math.Max(64 / finest, 4 * series.Coefficients.Length))
            steps *= 2;
        (_values, _slopes) = series.Tabulate(steps);
    }

    /// <summary>Repetition frequency, Hz.</summary>
    public double Frequency { get; }

    /// <summary>One period.</summary>
    public FourierSeries Series { get; }

    /// <summary>One period in equal steps from phase 0.</summary>
    public ReadOnlySpan<double> Table => _values;

    /// <inheritdoc/>
    public double At(double time)
    {
        int n = _values.Length;
        double cycles = time * Frequency, place = (cycles - Math.Floor(cycles)) * n;
        int i = Math.Min((int)place, n - 1), j = i + 1 == n ? 0 : i + 1;
        double t = place - i, s = 1 - t, h = 1.0 / n;
        return s * s * (1 + 2 * t) * _values[i] + t * t * (1 + 2 * s) * _values[j] + h * t * s * (s * _slopes[i] - t * _slopes[j]);
    }
}
