using ScopeReader.Readings;
using static ScopeReader.Harmonics.HarmonicAnalyser;

namespace ScopeReader.Harmonics;

/// <summary>Writes the widths of the strongest line down, or that it is no wider than the resolution filter.</summary>
/// <remarks>
/// A line that is wider than the filter is seen with the filter's width in it. Were both Gaussian the squares would subtract; a
/// Lorentzian line in a Gaussian filter follows W = 0.5346 L + √(0.2166 L² + B²) (Olivero and Longbothum 1977, from memory). What
/// the line is nobody knows: the reading lies between the two, and half of their distance is its bound.
/// </remarks>
internal sealed class TraceWidthReport(TraceLevels levels, double? resolutionBandwidth, ChainErrors chain, ReadingSheet sheet)
{
    private const double Resolved = 1.15, NoiseBelow = 10;
    private const int FewPoles = 4;

    // The cases are the ends of the rectangle, and 95 % of it would leave them out.
    private const double Inside = 0.94;

    private static readonly (Quantity Quantity, double Down)[] Widths =
        [(Quantities.Bandwidth3Db, 3.010299956639812), (Quantities.Bandwidth6Db, 6.020599913279624), (Quantities.Bandwidth60Db, 60)];

    public void Write(int top, TraceLine line)
    {
        foreach ((Quantity quantity, double down) in Widths)
            Write(quantity, down, top, line);
    }

    private void Write(Quantity quantity, double down, int top, TraceLine line)
    {
        double noise = levels.Noise(top).MeanDb - line.LevelDb;
        if (noise > -down - NoiseBelow && down > 6.1)
        {
            sheet.Refuse("noise", Text($"the noise lies {-noise:F0} dB under the line, and this width needs {down + NoiseBelow:F0} dB; narrow the resolution bandwidth"), quantity);
            return;
        }
        if (TraceWidth.Of(levels, top, line, down) is not { } found)
        {
            sheet.Refuse("outside-span", Text($"the span ends before the line has fallen by {down:F0} dB; widen it"), quantity);
            return;
        }
        double width = found.Width * chain.FrequencyFactor;
        if (resolutionBandwidth is not { } filter)
        {
            sheet.RefuseBelow("no-resolution-bandwidth", $"< {Engineering.Format(width, "Hz", 3)}: line and resolution filter together, for the file states no resolution bandwidth", width, quantity);
            return;
        }
        double narrow = filter * ResolutionFilter.GaussianWidth(down), wide = filter * ResolutionFilter.SynchronousWidth(FewPoles, down);
        if (width < Resolved * wide)
        {
            double bound = Math.Max(width, narrow);
            sheet.RefuseBelow("unresolved", $"< {Engineering.Format(bound, "Hz", 3)}: at most the resolution bandwidth of {Engineering.Format(filter, "Hz", 3)}, whose filter is as wide there; narrow it", bound, quantity);
            return;
        }
        double gaussian = Math.Sqrt(width * width - narrow * narrow), lorentzian = Lorentzian(width, wide), middle = (gaussian + lorentzian) / 2;
        double share = width / middle;
        sheet.Add(new Reading(quantity, middle, "Hz", chain.ForTime(middle,
            [.. found.Terms.Select(t => t.Times(share)), BudgetTerm.Rectangular("line shape", Math.Abs(gaussian - lorentzian) / 2 / Inside)]), "crossings")
        {
            Note = $"{Engineering.Format(width, "Hz", 4)} as seen through the resolution bandwidth of {Engineering.Format(filter, "Hz", 3)}",
        });
    }

    // W = a L + √(b L² + B²) solved for L: (a² - b) L² - 2aW L + W² - B² = 0.
    private static double Lorentzian(double width, double filter)
    {
        const double a = 0.5346, b = 0.2166;
        double p = a * a - b, q = -2 * a * width, r = width * width - filter * filter;
        return (-q - Math.Sqrt(q * q - 4 * p * r)) / (2 * p);
    }
}
