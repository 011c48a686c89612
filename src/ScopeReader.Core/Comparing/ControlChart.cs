using ScopeReader.Numerics;

namespace ScopeReader.Comparing;

/// <summary>Control limits of single readings taken one after another.</summary>
/// <remarks>Chart for individual values: the scatter comes from the mean moving range of two, over d2 = 2/√π; limits at three
/// times that about the mean (ISO 7870-2; W. A. Shewhart; constants from memory). A drift hardly widens the moving range, so a
/// drifting run walks out of its limits.</remarks>
public sealed record ControlChart
{
    private static readonly double D2 = 2 / Math.Sqrt(Math.PI);

    private ControlChart(double centre, double sigma, IReadOnlyList<int> outside) => (Centre, Sigma, Outside) = (centre, sigma, outside);

    /// <summary>The mean.</summary>
    public double Centre { get; }

    /// <summary>Scatter from one reading to the next, as a standard deviation.</summary>
    public double Sigma { get; }

    /// <summary>Lower control limit.</summary>
    public double Low => Centre - 3 * Sigma;

    /// <summary>Upper control limit.</summary>
    public double High => Centre + 3 * Sigma;

    /// <summary>Indices of the readings beyond the limits.</summary>
    public IReadOnlyList<int> Outside { get; }

    /// <summary>The chart of readings in the order they were taken; null for fewer than three.</summary>
    /// <param name="values">Shape [n], finite.</param>
    public static ControlChart? Of(ReadOnlySpan<double> values)
    {
        if (values.Length < 3)
            return null;
        double ranges = 0;
        for (int i = 1; i < values.Length; i++)
            ranges += Math.Abs(values[i] - values[i - 1]);
        var chart = new ControlChart(SampleSummary.Of(values).Mean, ranges / (values.Length - 1) / D2, []);
        var outside = new List<int>();
        for (int i = 0; i < values.Length; i++)
            if (values[i] < chart.Low || values[i] > chart.High)
                outside.Add(i);
        return new ControlChart(chart.Centre, chart.Sigma, outside);
    }
}
