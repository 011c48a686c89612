using MathNet.Numerics.LinearAlgebra;
using ScopeReader.Numerics;

namespace ScopeReader.Comparing;

/// <summary>A resonator's motional and shunt capacitance, from its frequency under several load capacitances.</summary>
/// <remarks>
/// <para>Model: f = fs √(1 + C1/(C0 + CL)), the usage of IEC 60122 (from memory). For a given C0 the square of f is a straight
/// line over 1/(C0 + CL); C0 is searched for the least residuals.</para>
/// <para>C0 comes out with every capacitance in it that the load did not count: stray, and the probe's.</para>
/// </remarks>
public sealed record ResonatorPulling
{
    private const int GridPoints = 400;

    /// <summary>Series resonance frequency, Hz.</summary>
    public required double SeriesFrequency { get; init; }

    /// <summary>Motional capacitance, F.</summary>
    public required double MotionalCapacitance { get; init; }

    /// <summary>Its standard uncertainty from the residuals.</summary>
    public required double MotionalUncertainty { get; init; }

    /// <summary>Shunt capacitance, F, uncounted load in it.</summary>
    public required double ShuntCapacitance { get; init; }

    /// <summary>Its standard uncertainty from the residuals.</summary>
    public required double ShuntUncertainty { get; init; }

    /// <summary>Standard deviation of the points about the curve, relative to the frequency.</summary>
    public required double RelativeScatter { get; init; }

    /// <summary>Points less three.</summary>
    public required int DegreesOfFreedom { get; init; }

    /// <summary>Frequency under a load, Hz.</summary>
    /// <param name="load">F.</param>
    public double At(double load) => SeriesFrequency * Math.Sqrt(1 + MotionalCapacitance / (ShuntCapacitance + load));

    /// <summary>Fits the model.</summary>
    /// <param name="loads">Load capacitances, F, above zero, shape [n].</param>
    /// <param name="frequencies">Frequencies, Hz, shape [n].</param>
    /// <returns>Null with fewer than four different loads, or where the points do not bend as a pulled resonator's do.</returns>
    public static ResonatorPulling? Fit(ReadOnlySpan<double> loads, ReadOnlySpan<double> frequencies)
    {
        ArgumentOutOfRangeException.ThrowIfNotEqual(frequencies.Length, loads.Length, nameof(frequencies));
        double[] load = loads.ToArray(), y = new double[load.Length];
        if (load.Distinct().Count() < 4 || load.Min() <= 0)
            return null;
        // (f/f0)² − 1 without the loss of digits that squaring first would bring.
        double f0 = SampleSummary.Of(frequencies).Mean;
        for (int i = 0; i < y.Length; i++)
            y[i] = (frequencies[i] - f0) * (frequencies[i] + f0) / (f0 * f0);

        double least = 0.01 * load.Min(), most = 20 * load.Max();
        int best = 0;
        double lowest = double.PositiveInfinity;
        for (int i = 0; i < GridPoints; i++)
            if (Line(load, y, Grid(least, most, i)).ResidualSumOfSquares is var residuals && residuals < lowest)
                (best, lowest) = (i, residuals);
        if (best is 0 or GridPoints - 1)
            return null;
        double shunt = Golden(c => Line(load, y, c).ResidualSumOfSquares, Grid(least, most, best - 1), Grid(least, most, best + 1));
        PolynomialFit line = Line(load, y, shunt);
        double slope = line.Coefficients[1];
        return slope > 0 ? Make(load, line, f0, shunt) : null;
    }

    private static ResonatorPulling Make(double[] load, PolynomialFit line, double f0, double shunt)
    {
        double intercept = line.Coefficients[0], slope = line.Coefficients[1];
        int freedom = load.Length - 3;
        double scatter = Math.Sqrt(line.ResidualSumOfSquares / freedom);
        // Columns scaled to about one, so that the inverse keeps its digits.
        Matrix<double> jacobian = Matrix<double>.Build.Dense(load.Length, 3, (i, k) => k switch
        {
            0 => 1,
            1 => shunt / (shunt + load[i]),
            _ => shunt * shunt / ((shunt + load[i]) * (shunt + load[i])),
        });
        Matrix<double> covariance = jacobian.TransposeThisAndMultiply(jacobian).Inverse();
        return new ResonatorPulling
        {
            SeriesFrequency = f0 * Math.Sqrt(1 + intercept),
            MotionalCapacitance = slope / (1 + intercept),
            MotionalUncertainty = scatter * Math.Sqrt(Math.Max(0, covariance[1, 1])) * shunt / (1 + intercept),
            ShuntCapacitance = shunt,
            ShuntUncertainty = scatter * Math.Sqrt(Math.Max(0, covariance[2, 2])) * shunt * shunt / slope,
            RelativeScatter = scatter / 2,
            DegreesOfFreedom = freedom,
        };
    }

    private static PolynomialFit Line(double[] load, double[] y, double shunt)
    {
        var x = new double[load.Length];
        for (int i = 0; i < x.Length; i++)
            x[i] = 1 / (shunt + load[i]);
        return PolynomialFit.Of(x, y, 1);
    }

    private static double Grid(double least, double most, int i) => least * Math.Pow(most / least, (double)i / (GridPoints - 1));

    private static double Golden(Func<double, double> function, double low, double high)
    {
        const double Ratio = 0.6180339887498949;
        for (int i = 0; i < 60; i++)
        {
            double width = high - low, left = high - Ratio * width, right = low + Ratio * width;
            if (function(left) < function(right))
                high = right;
            else
                low = left;
        }
        return (low + high) / 2;
    }
}
