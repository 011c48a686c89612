using System.Globalization;
using ScopeReader.Commands.Tables;
using ScopeReader.Comparing;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Archive;

/// <summary>What a series says: the line or the parabola, residuals, settings within a limit, a resonator's pulling.</summary>
internal static class SeriesReport
{
    private const double Pico = 1e-12;

    /// <summary>Farads are told in picofarads, everything else in its own unit.</summary>
    public static double Scale(string unit) => unit == "F" ? Pico : 1;

    /// <summary>The unit that <see cref="Scale"/> leads to.</summary>
    public static string ScaledUnit(string unit) => unit == "F" ? "pF" : unit;

    /// <summary>The report.</summary>
    /// <param name="quantity">The quantity.</param>
    /// <param name="condition">The condition's name.</param>
    /// <param name="points">Two or more, at two settings or more.</param>
    /// <param name="low">Lower bound of the quantity; null for none.</param>
    /// <param name="high">Upper bound.</param>
    /// <param name="frequencies">Frequencies at the same settings, for a load capacitance; null otherwise.</param>
    /// <param name="to">How wide the report is.</param>
    public static string Text(string quantity, string condition, IReadOnlyList<SeriesPoint> points, double? low, double? high, IReadOnlyList<SeriesPoint>? frequencies, Surroundings to)
    {
        var sheet = new Sheet(to.Width(), to.Colour);
        double[] x = [.. points.Select(p => p.Setting)], y = [.. points.Select(p => p.Value)];
        (string unit, string setting) = (points[0].Unit, points[0].SettingUnit);
        ConditionFit fit = ConditionFit.Of(x, y);
        sheet.Heading(SafeText.Of($"{quantity} against {condition}"));
        sheet.Columns([[SafeText.Of(condition), quantity, "residual", ""], .. points.Select(p => new[]
            { Sheet.Joined(p.SettingText), Sheet.Joined(Engineering.Format(p.Value, p.ExpandedUncertainty, unit)), Sheet.Joined(Residual(p.Value - fit.Best.At(p.Setting), p.ExpandedUncertainty, unit)), SafeText.Of(p.Label) })]);
        foreach (string line in TextPlot.Lines(x, y, unit, [], [], to.Width()))
            sheet.AsItIs(line);
        Slope(sheet, fit, unit, setting);
        if (low is not null || high is not null)
            Within(sheet, fit, unit, setting, low, high);
        if (frequencies is not null)
            Pulling(sheet, frequencies);
        return sheet.ToString();
    }

    // No finer than the reading itself is known.
    private static string Residual(double residual, double uncertainty, string unit)
    {
        (string value, _, string prefixed) = Engineering.Parts(residual, uncertainty, unit);
        return $"{value} {prefixed}".TrimEnd();
    }

    private static void Slope(Sheet sheet, ConditionFit fit, string unit, string setting)
    {
        double scale = Scale(setting);
        string per = $"{unit}/{ScaledUnit(setting)}";
        if (double.IsNaN(fit.SlopeExpandedUncertainty))
        {
            sheet.Line($"slope {Engineering.Format(fit.Line.Coefficients[1] * scale, per, 4)}; two points leave its uncertainty unknown");
            return;
        }
        sheet.Line($"slope {Engineering.Format(fit.Line.Coefficients[1] * scale, fit.SlopeExpandedUncertainty * scale, per)} (95 %, straight line); scatter about it {Engineering.Format(fit.Line.ResidualDeviation, unit, 2)}");
        if (fit.Parabola is not { } p)
            sheet.Line("five points or more, at three settings or more, would show a curvature");
        else if (fit.CurvatureIsSignificant)
            sheet.Line($"curvature is significant: {Engineering.Format(p.Coefficients[2] * scale * scale, Numerics.StudentT.Quantile95(p.DegreesOfFreedom) * p.StandardUncertainties[2] * scale * scale, per + "²")} (95 %); the parabola is what residuals and settings below refer to; scatter about it {Engineering.Format(p.ResidualDeviation, unit, 2)}");
        else
            sheet.Line("curvature is not significant at 95 %: the straight line holds");
    }

    private static void Within(Sheet sheet, ConditionFit fit, string unit, string setting, double? low, double? high)
    {
        (double from, double to) = (low ?? double.NegativeInfinity, high ?? double.PositiveInfinity);
        string limit = (low, high) switch
        {
            ({ } l, { } h) when l == -h => $"within {Engineering.Format(h, unit)}",
            ({ } l, { } h) => $"from {Engineering.Format(l, unit)} to {Engineering.Format(h, unit)}",
            ({ } l, null) => $"at {Engineering.Format(l, unit)} or more",
            _ => $"at {Engineering.Format(high!.Value, unit)} or less",
        };
        string Ranges(IReadOnlyList<(double From, double To)> ranges) => ranges.Count == 0 ? "nowhere between the settings measured"
            : string.Join(" and ", ranges.Select(r => $"from {Engineering.Format(r.From, setting)} to {Engineering.Format(r.To, setting)}"));
        sheet.Line($"{limit} {Ranges(fit.SettingsWithin(from, to))} by the curve");
        // Two points have no scatter that a further reading could be foretold from.
        if (!double.IsNaN(fit.SlopeExpandedUncertainty))
            sheet.Line($"{limit} {Ranges(fit.SettingsWithin(from, to, fit.ExpandedPrediction))} for one more reading at 95 %; the chain's own error is not in this");
        if (low is { } a && high is { } b)
            sheet.Line($"closest to the middle of the limit at {Engineering.Format(fit.Closest((a + b) / 2), setting)}");
    }

    private static void Pulling(Sheet sheet, IReadOnlyList<SeriesPoint> frequencies)
    {
        if (ResonatorPulling.Fit([.. frequencies.Select(p => p.Setting)], [.. frequencies.Select(p => p.Value)]) is not { } fit)
        {
            sheet.Line("the frequencies do not bend over the load as a pulled resonator's do, or there are fewer than four loads: no motional and shunt capacitance");
            return;
        }
        double k = fit.DegreesOfFreedom > 0 ? Numerics.StudentT.Quantile95(fit.DegreesOfFreedom) : 0;
        sheet.Line($"resonator: motional capacitance {Engineering.Format(fit.MotionalCapacitance, k * fit.MotionalUncertainty, "F")}, shunt capacitance {Engineering.Format(fit.ShuntCapacitance, k * fit.ShuntUncertainty, "F")} (95 %; stray and probe capacitance that the load does not count are in the shunt), series resonance {Engineering.Format(fit.SeriesFrequency, "Hz", 9)}");
        if (k == 0)
            sheet.Line(string.Create(CultureInfo.InvariantCulture, $"{frequencies.Count} loads for three unknowns leave their uncertainty unknown"));
    }
}
