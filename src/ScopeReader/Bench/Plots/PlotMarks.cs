using System.Globalization;
using ScopeReader.Bench.Drawing;
using ScopeReader.Captures;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Bench.Plots;

/// <summary>Which readings and limits a plot can show, and where.</summary>
internal static class PlotMarks
{
    /// <summary>The marks of a measured channel.</summary>
    public static IReadOnlyList<PlotMark> Of(ChannelMeasurement measured)
    {
        var marks = new List<PlotMark>();
        if (measured.Channel is SpectrumTrace)
            Lines(measured, marks);
        else
            States(measured, marks);
        return marks;
    }

    private static void States(ChannelMeasurement measured, List<PlotMark> marks)
    {
        Level(measured, Quantities.HighLevel, "high", marks);
        Level(measured, Quantities.LowLevel, "low", marks);
        if (Value(measured, Quantities.HighLevel) is { } high && Value(measured, Quantities.LowLevel) is { } low)
            marks.Add(new PlotMark((high + low) / 2, "50 %", Ink.Accent));
    }

    private static void Level(ChannelMeasurement measured, Quantity quantity, string label, List<PlotMark> marks)
    {
        if (Value(measured, quantity) is { } value)
            marks.Add(new PlotMark(value, label, Ink.Accent));
        foreach (Verdict verdict in measured.Verdicts.Where(v => v.Limit.Quantity == quantity))
        {
            if (verdict.Limit.Low is { } from)
                marks.Add(new PlotMark(from, label + " from", Ink.Bound));
            if (verdict.Limit.High is { } to)
                marks.Add(new PlotMark(to, label + " to", Ink.Bound));
        }
    }

    private static void Lines(ChannelMeasurement measured, List<PlotMark> marks)
    {
        if (Value(measured, Quantities.PeakFrequency) is not { } fundamental || (Value(measured, Quantities.PeakPower) ?? Value(measured, Quantities.PeakLevel)) is not { } peak)
            return;
        marks.Add(new PlotMark(peak, "1", Ink.Accent, fundamental));
        for (int k = 2; k <= Quantities.HighestHarmonic; k++)
        {
            Quantity harmonic = Quantities.Harmonic(k);
            if (Value(measured, harmonic) is { } relative)
                marks.Add(new PlotMark(peak + relative, k.ToString(CultureInfo.InvariantCulture), Ink.Accent, k * fundamental));
            foreach (Verdict verdict in measured.Verdicts)
                if (verdict.Limit.Quantity == harmonic && verdict.Limit.High is { } high)
                    marks.Add(new PlotMark(peak + high, "", Ink.Bound, k * fundamental));
        }
        foreach (Verdict verdict in measured.Verdicts)
            if (verdict.Limit.Quantity == Quantities.WorstHarmonic && verdict.Limit.High is { } worst)
                marks.Add(new PlotMark(peak + worst, "harmonics to", Ink.Bound));
    }

    private static double? Value(ChannelMeasurement measured, Quantity quantity)
    {
        foreach (Reading reading in measured.Readings)
            if (reading.IsPrimary && reading.Quantity == quantity)
                return reading.Value;
        return null;
    }
}
