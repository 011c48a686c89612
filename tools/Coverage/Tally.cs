using ScopeReader.Readings;

namespace ScopeReader.Coverage;

/// <summary>How the readings of one quantity by one method compare with the truth.</summary>
internal sealed class Tally(string name)
{
    private readonly List<double> _errors = [];
    private double _stated, _truth;
    private int _covered, _bounded;

    public string Name { get; } = name;
    public int Count => _errors.Count;
    public double Cover => (double)_covered / Count;
    public double MeanStated => _stated / Count;
    public double MeanTruth => _truth / Count;
    public double Bias => _errors.Average();

    /// <summary>True where most readings' variance is mostly one rectangle: their interval is to hold the truth, not to fit the spread.</summary>
    public bool IsBounded => 2 * _bounded > Count;

    public double Spread
    {
        get
        {
            double mean = Bias;
            return Math.Sqrt(_errors.Sum(e => (e - mean) * (e - mean)) / Math.Max(1, Count - 1));
        }
    }

    public void Add(Reading reading, double truth)
    {
        double error = reading.Value - truth, variance = reading.Budget.StandardUncertainty * reading.Budget.StandardUncertainty;
        _errors.Add(error);
        _truth += truth;
        _stated += reading.Budget.StandardUncertainty;
        if (Math.Abs(error) <= reading.Budget.ExpandedUncertainty)
            _covered++;
        if (reading.Budget.Terms.Any(t => t.Distribution == Distribution.Rectangular && t.Contribution * t.Contribution > variance / 2))
            _bounded++;
    }
}
