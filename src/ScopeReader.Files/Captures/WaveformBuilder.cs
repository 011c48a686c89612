using ScopeReader.Captures;
using ScopeReader.Files.Axes;
using ScopeReader.Files.Rows;

namespace ScopeReader.Files;

/// <summary>Makes waveforms of a column of samples and the stretches of its times.</summary>
internal static class WaveformBuilder
{
    /// <summary>Adds a waveform for each stretch.</summary>
    public static void Add(CaptureBuilder capture, Table table, SampleSource source, List<TimedPiece> pieces)
    {
        SampleColumn column = table.Samples[source.Index]!;
        int added = 0;
        foreach (TimedPiece piece in pieces)
            foreach ((SampleSource channel, Memory<double> samples) in Channels(source, column, piece))
                if (AddPiece(capture, channel, samples, column.Missing, piece))
                    added++;
        if (added == 0)
            throw new ImportException(capture.File, $"expected numbers in {source.Name}, found none. Leave the column out: --columns with skip in its place.", table.FirstLine, table.Shape.Columns[source.Index] + 1);
    }

    private static (SampleSource, Memory<double>)[] Channels(SampleSource source, SampleColumn column, TimedPiece piece)
    {
        if (!piece.IsPaired)
            return [(source, column.Memory.Slice(piece.First, Math.Clamp(column.Filled - piece.First, 0, piece.Length)))];
        ReadOnlySpan<double> pairs = column.Values.Slice(piece.First, 2 * piece.Length);
        double[] low = new double[piece.Length], high = new double[piece.Length];
        for (int k = 0; k < low.Length; k++)
            (low[k], high[k]) = (Math.Min(pairs[2 * k], pairs[2 * k + 1]), Math.Max(pairs[2 * k], pairs[2 * k + 1]));
        return [(source with { Name = source.Name + ", low" }, low), (source with { Name = source.Name + ", high" }, high)];
    }

    private static bool AddPiece(CaptureBuilder capture, SampleSource source, Memory<double> samples, int missingInColumn, TimedPiece piece)
    {
        ReadOnlySpan<double> values = samples.Span;
        int missing = missingInColumn == 0 ? 0 : values.Count(double.NaN);
        (int start, int length) = missing == 0 ? (0, values.Length) : LongestWhole(values);
        if (length == 0)
            return false;
        int segment = capture.NextSegment(source.Name);
        if (missing > 0)
            capture.Doubts.Add(FormattableString.Invariant($"{source.Name}: {missing} of {values.Length} samples are missing or over range, the first is sample {values.IndexOf(double.NaN) + 1}; measured is the longest stretch without them, samples {start + 1} to {start + length}"));
        samples = samples.Slice(start, length);
        capture.Scale(samples.Span, source.Unit, source.Factor);
        int before = start;
        if (piece.Falls)
        {
            samples.Span.Reverse();
            before = piece.Length - start - length;
        }
        TimeAxis axis = piece.Axis;
        if (axis.IsTimed && before > 0)
            axis = new TimeAxis(axis.Start + before * axis.Interval, axis.Interval, axis.Source, axis.IntervalLow, axis.IntervalHigh);
        capture.Add(new Waveform(source.Name, source.Unit, axis, samples, segment), samples, missing);
        return true;
    }

    private static (int Start, int Length) LongestWhole(ReadOnlySpan<double> values)
    {
        int bestStart = 0, best = 0, start = 0;
        for (int i = 0; i <= values.Length; i++)
        {
            if (i < values.Length && !double.IsNaN(values[i]))
                continue;
            if (i - start > best)
                (bestStart, best) = (start, i - start);
            start = i + 1;
        }
        return (bestStart, best);
    }
}
