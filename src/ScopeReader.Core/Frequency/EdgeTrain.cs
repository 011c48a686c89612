namespace ScopeReader.Frequency;

/// <summary>The edges of one direction: when each came, and which it is.</summary>
/// <remarks>
/// An edge's number is the sum of single rounded differences: a rounded distance from the first edge would slip a cycle as
/// soon as the first guess of the period is wrong by 1/(2M).
/// </remarks>
internal sealed class EdgeTrain
{
    private const int Guessed = 10001;

    /// <param name="instants">Instants, rising.</param>
    /// <param name="period">A guess of the period, in the unit of the instants.</param>
    public EdgeTrain(double[] instants, double period)
    {
        Instants = instants;
        Numbers = new int[instants.Length];
        Used = new bool[instants.Length];
        Array.Fill(Used, true);
        double perPeriod = 1 / period;
        for (int i = 1; i < instants.Length; i++)
            Numbers[i] = Numbers[i - 1] + (int)Math.Round((instants[i] - instants[i - 1]) * perPeriod);
    }

    /// <summary>Instants of the edges, without the error of interpolation once that was fitted.</summary>
    public double[] Instants { get; set; }

    /// <summary>Cycle of each edge, the first in cycle 0.</summary>
    public int[] Numbers { get; }

    /// <summary>False for strays, which no fit rests on.</summary>
    public bool[] Used { get; }

    /// <summary>Instant of edge 0 on the grid.</summary>
    public double Origin { get; set; }

    /// <summary>How many edges there are.</summary>
    public int Count => Instants.Length;

    /// <summary>Distance of an edge from the grid of a period.</summary>
    public double Distance(int i, double period) => Instants[i] - Origin - period * Numbers[i];

    /// <summary>A first guess of the period of two trains: the median distance of neighbours, which missing and extra edges do not move.</summary>
    public static double GuessPeriod(double[] rising, double[] falling)
    {
        double[] longer = rising.Length >= falling.Length ? rising : falling;
        int count = Math.Min(Guessed, longer.Length - 1);
        var differences = new double[count];
        for (int i = 0; i < count; i++)
        {
            int at = (int)((long)i * (longer.Length - 1) / count);
            differences[i] = longer[at + 1] - longer[at];
        }
        Array.Sort(differences);
        return (differences[(count - 1) / 2] + differences[count / 2]) / 2;
    }
}
