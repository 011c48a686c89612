namespace ScopeReader.Signals;

/// <summary>How the primary frequencies of a trial compare with the truth and with the bound.</summary>
public sealed class FrequencyTally
{
    private readonly double _bound;

    internal FrequencyTally(double bound, IReadOnlyList<(double Error, double Stated, bool Covered, string Method)?> runs)
    {
        _bound = bound;
        var found = runs.Where(r => r is not null).Select(r => r!.Value).ToList();
        (Runs, Refused) = (found.Count, runs.Count - found.Count);
        if (Runs == 0)
            return;
        Bias = found.Average(r => r.Error);
        RootMeanSquare = Math.Sqrt(found.Average(r => r.Error * r.Error));
        Stated = found.Average(r => r.Stated);
        Cover = found.Average(r => r.Covered ? 1.0 : 0);
        Method = found.CountBy(r => r.Method).MaxBy(p => p.Value).Key;
    }

    /// <summary>Runs that gave a frequency.</summary>
    public int Runs { get; }

    /// <summary>Runs that gave none.</summary>
    public int Refused { get; }

    /// <summary>Mean error, cycles per sample.</summary>
    public double Bias { get; }

    /// <summary>Root mean square error.</summary>
    public double RootMeanSquare { get; }

    /// <summary>Mean stated standard uncertainty.</summary>
    public double Stated { get; }

    /// <summary>Share of the runs whose 95 % interval holds the truth.</summary>
    public double Cover { get; }

    /// <summary>The method that was primary most often.</summary>
    public string Method { get; } = "";

    /// <summary>Root mean square error over the Cramér-Rao bound.</summary>
    public double Ratio => RootMeanSquare / _bound;

    /// <summary>Standard error of <see cref="Ratio"/> as the number of runs leaves it: 1/√(2n) of it.</summary>
    public double RatioError => Ratio / Math.Sqrt(2.0 * Math.Max(1, Runs));

    /// <summary>Bias over the stated standard uncertainty, sign taken off.</summary>
    public double BiasShare => Math.Abs(Bias) / Stated;
}
