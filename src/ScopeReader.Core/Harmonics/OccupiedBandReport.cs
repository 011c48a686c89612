using ScopeReader.Captures;
using ScopeReader.Readings;

namespace ScopeReader.Harmonics;

/// <summary>Writes the occupied bandwidth of a trace down, or why not.</summary>
/// <remarks>The floor is taken off every point first, or the span would set the answer; the resolution filter's own width goes off in squares, and half of that is its bound.</remarks>
internal sealed class OccupiedBandReport(TraceLevels levels, SpectrumTrace trace, ChainErrors chain, ReadingSheet sheet)
{
    private const double OutsideShare = 0.005, MostNoise = 0.2;

    public void Write(int from, TraceNoise noise)
    {
        Quantity quantity = Quantities.OccupiedBandwidth;
        if (levels.TooCoarse(trace.ResolutionBandwidth) is { } coarse)
        {
            sheet.Refuse("point-spacing", coarse, quantity);
            return;
        }
        double floor = Decibels.PowerRatio(noise.MeanDb), total = 0;
        double[] powers = new double[levels.Count - from];
        for (int i = 0; i < powers.Length; i++)
            total += powers[i] = Decibels.PowerRatio(levels.Level(from + i)) - floor;
        double independent = Math.Min(1, levels.Spacing / Math.Max(levels.Spacing, trace.ResolutionBandwidth ?? levels.Spacing));
        double wander = floor * Math.Sqrt(powers.Length / noise.Averages / independent);
        if (!(wander < MostNoise * OutsideShare * total) || OccupiedBand.Of(levels.Frequency(from), levels.Spacing, powers) is not { } band)
        {
            sheet.Refuse("noise", "what stands at the ends of the span, noise or the signal itself, holds as much power as the half percent on each side; set the span to about three times the signal, or average more", quantity);
            return;
        }
        double width = band.Width * chain.FrequencyFactor;
        if (trace.ResolutionBandwidth is not { } filter)
        {
            sheet.RefuseBelow("no-resolution-bandwidth", $"< {Engineering.Format(width, "Hz", 3)}: signal and resolution filter together, for the file states no resolution bandwidth", width, quantity);
            return;
        }
        // A Gaussian filter itself holds 99 % in 5.15 of its standard deviations; poles have wider skirts.
        double own = 2 * 2.5758293035489004 / Math.Sqrt(8 * Math.Log(2)) * filter;
        if (width < 1.5 * own)
        {
            sheet.RefuseBelow("unresolved", $"< {Engineering.Format(width, "Hz", 3)}: no wider than the resolution filter makes a line; narrow the resolution bandwidth", width, quantity);
            return;
        }
        // What lies outside scatters too, where it is noise-like.
        double outside = 0;
        for (int i = 0; i < powers.Length; i++)
            if (levels.Frequency(from + i) is var f && (f < band.Low || f > band.High))
                outside += powers[i] * powers[i] / 2;
        wander = Math.Sqrt(wander * wander + outside / noise.Averages / independent);
        double narrow = Math.Sqrt(width * width - own * own), slope = Math.Min(Edge(powers, band.Low - levels.Frequency(from)), Edge(powers, band.High - levels.Frequency(from)));
        sheet.Add(new Reading(quantity, (width + narrow) / 2, "Hz", chain.ForTime(width,
            [
                BudgetTerm.Normal("noise", Math.Sqrt(2) * wander / slope * levels.Spacing),
                BudgetTerm.Rectangular("point-spacing", levels.Spacing / 4),
                BudgetTerm.Rectangular("resolution filter", (width - narrow) / 2),
            ]), "cumulative-power")
        { Note = $"99 %, from {Engineering.Format(band.Low, "Hz", 5)} to {Engineering.Format(band.High, "Hz", 5)}, noise taken off" });
    }

    // Power a point around an edge: what the noise's wander is held against.
    private double Edge(double[] powers, double offset)
    {
        int centre = (int)Math.Round(offset / levels.Spacing), reach = Math.Max(2, powers.Length / 200);
        double sum = 0;
        int count = 0;
        for (int i = Math.Max(0, centre - reach); i <= Math.Min(powers.Length - 1, centre + reach); i++)
            (sum, count) = (sum + powers[i], count + 1);
        return Math.Max(sum / count, double.Epsilon);
    }
}
