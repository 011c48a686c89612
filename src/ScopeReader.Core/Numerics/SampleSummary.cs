namespace ScopeReader.Numerics;

/// <summary>Mean, scatter and neighbourliness of a run of values.</summary>
/// <param name="Mean">The mean.</param>
/// <param name="StandardDeviation">Experimental standard deviation, n − 1; NaN for one value.</param>
/// <param name="Lag1">Autocorrelation of neighbours, -1 to 1; NaN where all values are equal.</param>
public readonly record struct SampleSummary(double Mean, double StandardDeviation, double Lag1)
{
    /// <summary>Summarises values, in two passes: never by the difference of two large sums.</summary>
    /// <param name="values">Shape [n], n of 1 or more, finite.</param>
    public static SampleSummary Of(ReadOnlySpan<double> values)
    {
        ArgumentOutOfRangeException.ThrowIfZero(values.Length, nameof(values));
        DoubleDouble sum = 0;
        foreach (double value in values)
            sum += value;
        DoubleDouble mean = sum / values.Length, squares = 0, products = 0, before = 0;
        for (int i = 0; i < values.Length; i++)
        {
            DoubleDouble deviation = values[i] - mean;
            squares += deviation * deviation;
            if (i > 0)
                products += deviation * before;
            before = deviation;
        }
        return new SampleSummary((double)mean, Math.Sqrt((double)squares / (values.Length - 1)), (double)products / (double)squares);
    }
}
