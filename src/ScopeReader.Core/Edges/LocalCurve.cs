using ScopeReader.Numerics;

namespace ScopeReader.Edges;

/// <summary>A cubic through the points of an averaged edge about one instant: what the edge does there, and how well that is known.</summary>
/// <remarks>Weighted least squares over a window that grows until the points hold the cubic at its centre.</remarks>
internal sealed class LocalCurve
{
    /// <summary>
    /// Variance of the value at the centre over that of the mean of the points: 2.25 for even points, 4 for four points about
    /// their centre or on one of them; above this the centre lies in a gap, and the window must grow.
    /// </summary>
    private const double WorstLeverage = 5;

    private const int Order = 4;

    private readonly double[] _coefficients;

    private LocalCurve(double centre, double halfWidth, int first, int count, double[] coefficients, double averaging, double noise, double rounding) =>
        (Centre, HalfWidth, First, Count, _coefficients, Averaging, Noise, Rounding) = (centre, halfWidth, first, count, coefficients, averaging, noise, rounding);

    /// <summary>The instant in the middle, samples.</summary>
    public double Centre { get; }

    /// <summary>Half the width of the window, samples.</summary>
    public double HalfWidth { get; }

    /// <summary>Index of the first point in the window.</summary>
    public int First { get; }

    /// <summary>How many points it holds.</summary>
    public int Count { get; }

    /// <summary>Noise of the value at the centre over the noise of one sample.</summary>
    public double Averaging { get; }

    /// <summary>Standard uncertainty of the value at the centre from noise, of the step.</summary>
    public double Noise { get; }

    /// <summary>Standard uncertainty of it from the converter's rounding, of the step.</summary>
    public double Rounding { get; }

    /// <summary>Value at the centre, of the step.</summary>
    public double Value => _coefficients[0];

    /// <summary>Slope at the centre, of the step per sample.</summary>
    public double Slope => _coefficients[1] / HalfWidth;

    /// <summary>Second derivative at the centre, of the step per sample squared.</summary>
    public double Curvature => 2 * _coefficients[2] / (HalfWidth * HalfWidth);

    /// <summary>Value elsewhere in the window.</summary>
    public double At(double time)
    {
        double x = (time - Centre) / HalfWidth;
        return ((_coefficients[3] * x + _coefficients[2]) * x + _coefficients[1]) * x + _coefficients[0];
    }

    /// <summary>Slope elsewhere in the window.</summary>
    public double SlopeAt(double time)
    {
        double x = (time - Centre) / HalfWidth;
        return ((3 * _coefficients[3] * x + 2 * _coefficients[2]) * x + _coefficients[1]) / HalfWidth;
    }

    /// <summary>The curve about an instant, or null where the points do not hold one.</summary>
    /// <param name="edge">The averaged edge.</param>
    /// <param name="centre">The instant, samples from the 50 % instant.</param>
    /// <param name="halfWidth">The narrowest window, samples.</param>
    /// <param name="widest">The widest one.</param>
    public static LocalCurve? About(AveragedEdge edge, double centre, double halfWidth, double widest)
    {
        var equations = new NormalEquations(Order);
        for (double h = halfWidth; ; h = Math.Min(h * 1.25, widest))
        {
            if (TryFit(edge, centre, h, equations) is { } curve)
                return curve;
            if (h >= widest)
                return null;
        }
    }

    /// <summary>What the same fit makes of other values at the same points.</summary>
    /// <param name="edge">The averaged edge that this curve was fitted to.</param>
    /// <param name="values">Value at a time.</param>
    /// <returns>The value at the centre.</returns>
    public double Refit(AveragedEdge edge, Func<double, double> values)
    {
        var equations = new NormalEquations(Order);
        Span<double> row = stackalloc double[Order];
        for (int i = First; i < First + Count; i++)
        {
            Powers(row, (edge.Times[i] - Centre) / HalfWidth);
            equations.Add(row, values(edge.Times[i]), 1 / edge.Variance(i));
        }
        return equations.Factor() is { } factor ? equations.Solve(factor)[0] : double.NaN;
    }

    private static LocalCurve? TryFit(AveragedEdge edge, double centre, double halfWidth, NormalEquations equations)
    {
        int first = edge.IndexAt(centre - halfWidth), end = edge.IndexAt(centre + halfWidth), middle = edge.IndexAt(centre);
        if (end - first < Order || middle - first < 1 || end - middle < 1)
            return null;
        equations.Clear();
        Span<double> row = stackalloc double[Order];
        double mean = 0;
        for (int i = first; i < end; i++)
        {
            Powers(row, (edge.Times[i] - centre) / halfWidth);
            equations.Add(row, edge.Values[i], 1 / edge.Variance(i));
            mean += 1 / edge.Variance(i);
        }
        if (equations.Factor() is not { } factor)
            return null;
        double[] covariances = equations.Covariances(factor, 0);
        if (covariances[0] * mean > WorstLeverage)
            return null;
        double[] coefficients = equations.Solve(factor);
        var (averaging, rounding) = Uncertainties(edge, centre, halfWidth, first, end, covariances, coefficients);
        return new LocalCurve(centre, halfWidth, first, end - first, coefficients, averaging, edge.Noise * averaging, rounding);
    }

    private static (double Averaging, double Rounding) Uncertainties(AveragedEdge edge, double centre, double halfWidth, int first, int end, double[] covariances, double[] coefficients)
    {
        Span<double> row = stackalloc double[Order];
        double averaging = 0, rounding = 0;
        for (int i = first; i < end; i++)
        {
            Powers(row, (edge.Times[i] - centre) / halfWidth);
            double share = 0;
            for (int k = 0; k < Order; k++)
                share += row[k] * covariances[k];
            share /= edge.Variance(i);
            averaging += share * share / edge.Counts[i];
            rounding += share * share;
        }
        // Points inside one step of the converter share its rounding: there are no more independent ones than steps passed.
        double steps = edge.CodeStep > 0 ? Math.Max(1, 2 * (Math.Abs(coefficients[1]) + Math.Abs(coefficients[2])) / edge.CodeStep) : 1;
        rounding = Math.Min(1, Math.Max(rounding, 2.25 / steps));
        return (Math.Sqrt(averaging), edge.CodeError * Math.Sqrt(rounding));
    }

    private static void Powers(Span<double> row, double x) => (row[0], row[1], row[2], row[3]) = (1, x, x * x, x * x * x);
}
