namespace ScopeReader.Frequency;

/// <summary>How far edges of one direction come from where a steady source would have them.</summary>
/// <remarks>
/// Terms differ between authors; these are: period jitter, the standard deviation of the periods; cycle-to-cycle jitter, the rms
/// difference of neighbouring periods; time-interval error, the distance of an edge from the regression's grid. White timing noise σ
/// of an edge gives √2 σ, √6 σ and σ.
/// </remarks>
/// <param name="Period">Standard deviation of the periods, in the unit of the instants.</param>
/// <param name="CycleToCycle">Rms difference of neighbouring periods.</param>
/// <param name="PeakToPeak">Largest less smallest distance from the grid.</param>
/// <param name="Periods">How many periods there are.</param>
/// <param name="Pairs">How many pairs of neighbouring periods.</param>
/// <param name="Edges">How many edges.</param>
public sealed record Jitter(double Period, double CycleToCycle, double PeakToPeak, int Periods, int Pairs, int Edges)
{
    /// <summary>Measures it.</summary>
    /// <param name="instants">Instants of edges of one direction, rising, one a cycle; where one is missing, its neighbours make no period.</param>
    /// <param name="numbers">Number of each edge.</param>
    /// <param name="period">The period of the grid, in the unit of the instants.</param>
    /// <param name="origin">Instant of edge 0 on it.</param>
    public static Jitter Of(ReadOnlySpan<double> instants, ReadOnlySpan<int> numbers, double period, double origin)
    {
        double squares = 0, sum = 0, differences = 0, least = double.PositiveInfinity, most = double.NegativeInfinity, before = double.NaN;
        int periods = 0, pairs = 0;
        for (int i = 0; i < instants.Length; i++)
        {
            double distance = instants[i] - origin - period * numbers[i];
            (least, most) = (Math.Min(least, distance), Math.Max(most, distance));
            if (i == 0 || numbers[i] != numbers[i - 1] + 1)
            {
                before = double.NaN;
                continue;
            }
            // Less the mean period: the squares of whole ones would cost digits.
            double own = instants[i] - instants[i - 1] - period;
            sum += own;
            squares += own * own;
            periods++;
            if (!double.IsNaN(before))
            {
                differences += (own - before) * (own - before);
                pairs++;
            }
            before = own;
        }
        double variance = periods > 1 ? Math.Max(0, squares - sum * sum / periods) / (periods - 1) : 0;
        return new Jitter(Math.Sqrt(variance), pairs > 0 ? Math.Sqrt(differences / pairs) : 0, most - least, periods, pairs, instants.Length);
    }
}
