using ScopeReader.Captures;
using ScopeReader.Files.Axes;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Rows;
using ScopeReader.Readings;

namespace ScopeReader.Files;

/// <summary>Makes spectrum traces of a column of levels.</summary>
internal static class SpectrumBuilder
{
    private const int FewestPoints = 3;

    /// <summary>True where the preamble gives a frequency axis to a column without one.</summary>
    public static bool IsStated(Table table, SampleSource source) =>
        source.Unit.StartsWith("dB", StringComparison.Ordinal) && Frequencies(table) is not null;

    /// <summary>Adds a trace over a column of frequencies.</summary>
    /// <exception cref="ImportException">The frequencies do not rise.</exception>
    public static void FromColumn(CaptureBuilder capture, Table table, SampleSource source)
    {
        ReadOnlySpan<double> printed = table.Axes[source.Axis]!.Values(), levels = table.Samples[source.Index]!.Values[..printed.Length];
        Label label = table.Header.Labels[source.Axis];
        double factor = label.Factor;
        if (label.Unit is null or "")
            NoteUnit(capture, table, ref factor);
        // Where a frequency is lower than the one before, another trace begins, unless all of them fall.
        bool falls = printed.Length > 1 && printed[^1] < printed[0] && IsFalling(printed);
        int first = 0;
        for (int i = 1; i <= printed.Length; i++)
        {
            if (i < printed.Length && (falls || !(printed[i] < printed[i - 1])))
                continue;
            AddTrace(capture, table, source, printed[first..i], levels[first..i], factor, falls, first);
            first = i;
        }
    }

    /// <summary>Adds a trace whose frequencies the preamble states.</summary>
    public static void FromPreamble(CaptureBuilder capture, Table table, SampleSource source)
    {
        (double start, double step) = Frequencies(table)!.Value;
        double[] levels = table.Samples[source.Index]!.Values.ToArray(), frequencies = new double[levels.Length];
        for (int i = 0; i < frequencies.Length; i++)
            frequencies[i] = start + i * step;
        capture.Note(new AxisReport(AxisSource.Preamble, "Hz", step, step, step, null));
        Add(capture, table, source, frequencies, levels, AxisSource.Preamble);
    }

    private static void AddTrace(CaptureBuilder capture, Table table, SampleSource source, ReadOnlySpan<double> printed, ReadOnlySpan<double> values, double factor, bool falls, int row)
    {
        double[] frequencies = new double[printed.Length], levels = values.ToArray();
        for (int i = 0; i < frequencies.Length; i++)
            frequencies[i] = UnitWords.Scale(printed[i], factor);
        if (falls)
        {
            Array.Reverse(frequencies);
            Array.Reverse(levels);
        }
        Add(capture, table, source, frequencies, levels, AxisSource.Column, row);
    }

    private static void Add(CaptureBuilder capture, Table table, SampleSource source, double[] frequencies, double[] levels, AxisSource axis, int row = 0)
    {
        int last = levels.AsSpan().LastIndexOfAnyExcept(double.NaN) + 1, kept = 0;
        for (int i = 0; i < last; i++)
            if (!double.IsNaN(levels[i]) && !double.IsNaN(frequencies[i]))
                (frequencies[kept], levels[kept++]) = (frequencies[i], levels[i]);
        if (kept < FewestPoints)
            throw new ImportException(capture.File, FormattableString.Invariant($"expected a spectrum trace of {FewestPoints} points or more in {source.Name}, found {kept}. Export the whole trace."), table.FirstLine + row);
        if (kept < last)
            capture.Doubts.Add(FormattableString.Invariant($"{source.Name}: {last - kept} of {last} points are missing or over range: left out"));
        (frequencies, levels) = (frequencies[..kept], levels[..kept]);
        if (axis == AxisSource.Column)
            Raise(capture, table, source, frequencies, isWhole: kept == last, row);
        capture.Scale(levels, source.Unit, source.Factor);
        double? resolution = table.Facts.Number(Fact.ResolutionBandwidth, "Hz") is { Value: > 0 } stated ? stated.Value : null;
        capture.Add(new SpectrumTrace(source.Name, source.Unit, frequencies, levels, resolution, axis, capture.NextSegment(source.Name)) { Averaging = AveragingWords.Of(table.Facts) }, last - kept);
    }

    // Frequencies that are printed too coarsely to tell neighbours apart are evenly spaced ones, or no axis at all.
    private static void Raise(CaptureBuilder capture, Table table, SampleSource source, double[] frequencies, bool isWhole, int row)
    {
        double half = table.Axes[source.Axis]!.WidestHalf * table.Header.Labels[source.Axis].Factor;
        Spacing? spacing = isWhole ? Pieces.SpacingOf(frequencies, half) : null;
        int stuck = 1;
        while (stuck < frequencies.Length && frequencies[stuck] > frequencies[stuck - 1])
            stuck++;
        if (stuck < frequencies.Length)
        {
            if (spacing is not { Low: > 0 } even)
                throw new ImportException(capture.File, $"expected frequencies that rise, found {Engineering.Format(frequencies[stuck], "Hz", 9)} after {Engineering.Format(frequencies[stuck - 1], "Hz", 9)}. Export one trace a file.", table.FirstLine + row + stuck, table.Shape.Columns[source.Axis] + 1);
            capture.Doubts.Add($"{source.Name}: frequencies repeat by rounding; an even spacing of {Engineering.Format(even.Interval, "Hz", 6)} was fitted");
            for (int k = 0; k < frequencies.Length; k++)
                frequencies[k] = even.Start + k * even.Interval;
        }
        capture.Note(new AxisReport(AxisSource.Column, "Hz", spacing?.Interval, spacing?.Low, spacing?.High, spacing?.WorstDeviation));
    }

    private static void NoteUnit(CaptureBuilder capture, Table table, ref double factor)
    {
        if (table.Facts.Word(Fact.AxisUnit) is { } word && Label.TryUnit(word, out double stated, out string unit) && unit == "Hz")
            factor = stated;
        else
            capture.Doubt("the unit of the frequencies is not stated: taken as hertz");
    }

    private static bool IsFalling(ReadOnlySpan<double> values)
    {
        for (int i = 1; i < values.Length; i++)
            if (values[i] > values[i - 1])
                return false;
        return true;
    }

    // Start and stop, start and step, or centre and span, with the rows counted.
    private static (double Start, double Step)? Frequencies(Table table)
    {
        Facts facts = table.Facts;
        int steps = table.Rows - 1;
        if (steps < FewestPoints - 1)
            return null;
        if (facts.Number(Fact.Start, "Hz") is { } start)
        {
            if (facts.Number(Fact.Stop, "Hz") is { } stop && stop.Value > start.Value)
                return (start.Value, (stop.Value - start.Value) / steps);
            if (facts.Number(Fact.Interval, "Hz") is { Value: > 0 } step)
                return (start.Value, step.Value);
            if (facts.Number(Fact.Span, "Hz") is { Value: > 0 } width)
                return (start.Value, width.Value / steps);
        }
        if (facts.Number(Fact.Center, "Hz") is { } center && facts.Number(Fact.Span, "Hz") is { Value: > 0 } span)
            return (center.Value - span.Value / 2, span.Value / steps);
        return null;
    }
}
