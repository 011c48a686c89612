using System.Numerics;

namespace ScopeReader.Ringing;

/// <summary>What windows after the edges have in common, and what they have not.</summary>
/// <param name="Values">The windows' values.</param>
/// <param name="Mean">Mean over the edges; shape [2][slots], low first.</param>
/// <param name="Rest">Values less mean.</param>
/// <param name="Scatter">Variance of a value about the mean.</param>
internal sealed record CommonPart(Complex[] Values, Complex[][] Mean, Complex[] Rest, double Scatter)
{
    /// <summary>Takes values apart.</summary>
    public static CommonPart Of(BandWindows windows, Complex[] values)
    {
        Complex[][] mean = windows.Mean(values);
        Complex[] rest = windows.Without(values, mean);
        return new CommonPart(values, mean, rest, Math.Max(windows.Scatter(rest), 1e-300));
    }

    /// <summary>How many successive windows vary together: 1 + 2 Σ ρ over the lags up to the first that is not above 0.1.</summary>
    public double Correlated(BandWindows windows, bool high)
    {
        int slots = windows.Slots(high);
        double together = 1;
        for (int lag = 1; lag < slots; lag++)
        {
            Complex product = 0;
            double power = 0;
            for (int i = 0; i + lag < windows.Count; i++)
                if (windows.IsHigh(i) == high && windows.Span(i + lag) == windows.Span(i))
                {
                    product += Rest[i + lag] * Complex.Conjugate(Rest[i]);
                    power += (Square(Rest[i]) + Square(Rest[i + lag])) / 2;
                }
            // A band's middle is not quite the windows' frequency: neighbours then turn, and vary together all the same.
            double correlation = power > 0 ? product.Magnitude / power : 0;
            if (correlation < 0.1)
                break;
            together += 2 * correlation * (1 - (double)lag / slots);
        }
        return Math.Min(together, slots);
    }

    /// <summary>Envelope of the mean, last window over first, and how the first window's phases gather, on the level that rings more.</summary>
    public (double LateToEarly, double Resultant, int Edges) Phases(BandWindows windows)
    {
        bool high = windows.Slots(false) == 0 || (windows.Slots(true) > 0 && Mean[1][0].Magnitude >= Mean[0][0].Magnitude);
        Complex[] mean = Mean[high ? 1 : 0];
        if (mean.Length == 0)
            return (double.NaN, 0, 0);
        Complex sum = 0;
        int count = 0;
        for (int i = 0; i < windows.Count; i++)
            if (windows.IsHigh(i) == high && windows.Slot(i) == 0 && Values[i] != 0)
            {
                sum += Values[i] * windows.EdgePhase(i) / Values[i].Magnitude;
                count++;
            }
        return (mean[^1].Magnitude / mean[0].Magnitude, count > 0 ? sum.Magnitude / count : 0, count);
    }

    private static double Square(Complex z) => z.Real * z.Real + z.Imaginary * z.Imaginary;
}
