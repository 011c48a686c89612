using MathNet.Numerics;

namespace ScopeReader.Numerics;

/// <summary>The distribution of a rectangular and a normal error added: both about zero, independent.</summary>
/// <remarks>
/// The normal distribution function integrated over the rectangle: with G(z) = z Φ(z) + φ(z), whose derivative is Φ,
/// P(error ≤ x) = (σ/2a)·[G((x + a)/σ) − G((x − a)/σ)].
/// </remarks>
public sealed class BoundedNormal
{
    private readonly double _halfWidth, _sigma;

    /// <param name="halfWidth">Half-width of the rectangle, 0 or more.</param>
    /// <param name="sigma">Standard deviation of the normal part, 0 or more, in the same unit.</param>
    public BoundedNormal(double halfWidth, double sigma)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(halfWidth);
        ArgumentOutOfRangeException.ThrowIfNegative(sigma);
        (_halfWidth, _sigma) = (halfWidth, sigma);
    }

    /// <summary>Probability of an error at most <paramref name="x"/>.</summary>
    public double Cumulative(double x)
    {
        // Below these ratios one part is lost in the rounding of the other.
        if (_halfWidth <= 1e-6 * _sigma)
            return _sigma == 0 ? (x < 0 ? 0 : 1) : NormalCumulative(x / _sigma);
        // Farther out the normal part has nothing left in a double, and at infinity G − G would be no number.
        if (Math.Abs(x) > _halfWidth + 40 * _sigma)
            return x < 0 ? 0 : 1;
        if (_sigma <= 1e-9 * _halfWidth)
            return Math.Clamp(0.5 + x / (2 * _halfWidth), 0, 1);
        return Math.Clamp(_sigma / (2 * _halfWidth) * (G((x + _halfWidth) / _sigma) - G((x - _halfWidth) / _sigma)), 0, 1);
    }

    /// <summary>Half-width of the interval about zero that holds a share of the errors.</summary>
    /// <param name="coverage">The share, above 0 and below 1.</param>
    public double HalfWidth(double coverage)
    {
        ArgumentOutOfRangeException.ThrowIfLessThanOrEqual(coverage, 0);
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(coverage, 1);
        if (_sigma == 0)
            return coverage * _halfWidth;
        double k = NormalQuantile((1 + coverage) / 2), low = 0, high = _halfWidth + k * _sigma;
        // Bisection to the last bit or so: the function is monotonic and this runs once a reading.
        for (int i = 0; i < 60 && high - low > 1e-15 * high; i++)
        {
            double middle = (low + high) / 2;
            if (2 * Cumulative(middle) - 1 < coverage)
                low = middle;
            else
                high = middle;
        }
        return high;
    }

    /// <summary>The standard normal distribution function.</summary>
    public static double NormalCumulative(double z) => 0.5 * SpecialFunctions.Erfc(-z / Math.Sqrt(2));

    /// <summary>The standard normal quantile.</summary>
    public static double NormalQuantile(double p) => -Math.Sqrt(2) * SpecialFunctions.ErfcInv(2 * p);

    // For large z the sum z·Φ + φ is z to the last bit; for very negative z it is 0.
    private static double G(double z) =>
        z * NormalCumulative(z) + Math.Exp(-0.5 * z * z) / Math.Sqrt(2 * Math.PI);
}
