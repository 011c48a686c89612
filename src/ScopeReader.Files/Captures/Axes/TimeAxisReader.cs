using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Rows;
using ScopeReader.Readings;

namespace ScopeReader.Files.Axes;

/// <summary>Settles when the rows of a block were taken: by the person, by a column, by the preamble, or not at all.</summary>
internal sealed class TimeAxisReader(CaptureBuilder capture, Table table)
{
    // Printed times that leave an even spacing by more than this share of an interval are not one capture's.
    private const double Jitter = 0.1;

    // An interval that is known to 10 ppm is better known than most timebases are.
    private const double Fine = 10e-6;

    /// <summary>The stretches of evenly spaced rows under a column of times; -1 for none.</summary>
    /// <exception cref="ImportException">The times are not those of evenly spaced samples.</exception>
    public List<TimedPiece> Read(int column)
    {
        if (column < 0)
            return WithoutColumn();
        (Label label, AxisColumn times) = (table.Header.Labels[column], table.Axes[column]!);
        Spacing? fitted = times.Fit();
        double factor = FactorOf(label, column);
        if (capture.Settings.Interval is { } given)
            return Given(given, fitted, factor, times.Rows);
        if (times.Rows < 2)
            throw new ImportException(capture.File, "expected times of two samples or more, found one. Export the whole capture.", table.FirstLine, ColumnNumber(column));

        var pieces = new List<TimedPiece>();
        if (fitted is { } spacing)
            pieces.Add(Timed(new Piece(0, times.Rows, spacing), factor, column));
        else
            foreach (Piece piece in Cut(times.Values(), times.WidestHalf, column))
                pieces.Add(Timed(piece, factor, column));
        return pieces;
    }

    private int ColumnNumber(int column) => table.Shape.Columns[column] + 1;

    private List<TimedPiece> WithoutColumn()
    {
        (double? interval, AxisSource source) = capture.Settings.Interval is { } given ? (given, AxisSource.Option) : (Stated(1), AxisSource.Preamble);
        if (interval is not { } step)
        {
            capture.Note(new AxisReport(AxisSource.None, "sample", null, null, null, null));
            Doubt("the file states no sample interval: readings are per sample until --interval or --rate is given");
            return Blocks(TimeAxis.PerSample);
        }
        capture.Note(new AxisReport(source, "s", step, step, step, null));
        double start = source == AxisSource.Preamble ? table.Facts.Number(Fact.Start, "s")?.Value ?? 0 : 0;
        return Blocks(new TimeAxis(start, step, source));
    }

    // Without times, blank lines are all that sets stretches apart.
    private List<TimedPiece> Blocks(TimeAxis axis)
    {
        var pieces = new List<TimedPiece>();
        int first = 0;
        foreach (int end in table.Breaks.Append(table.Rows))
        {
            pieces.Add(new TimedPiece(first, end - first, axis));
            first = end;
        }
        return pieces;
    }

    private double FactorOf(Label label, int column)
    {
        if (capture.Settings.Units is { } units && table.Shape.Columns[column] < units.Count && UnitWords.TryRead(units[table.Shape.Columns[column]], out double given, out string unit) && unit == "s")
            return given;
        if (label.Unit is { Length: > 0 })
            return label.Factor;
        if (table.Facts.Word(Fact.AxisUnit) is { } word && Label.TryUnit(word, out double factor, out string stated) && stated == "s")
            return factor;
        if (capture.Settings.Interval is null)
            Doubt($"the unit of the times ({(label.Name.Length > 0 ? Excerpt.Of(label.Name, 20) : "the first column")}) is not stated: taken as seconds");
        return 1;
    }

    private List<TimedPiece> Given(double interval, Spacing? fitted, double factor, int rows)
    {
        if (fitted is { } spacing && (interval < Scaled(spacing.Low, factor) * (1 - 1e-9) || interval > Scaled(spacing.High, factor) * (1 + 1e-9)))
            Doubt($"the interval given, {Engineering.Format(interval, "s", 6)}, is not that of the times, {Engineering.Format(Scaled(spacing.Interval, factor), "s", 6)}; the one given is used");
        capture.Note(new AxisReport(AxisSource.Option, "s", interval, interval, interval, null));
        return [new TimedPiece(0, rows, new TimeAxis(0, interval, AxisSource.Option))];
    }

    private List<Piece> Cut(ReadOnlySpan<double> times, double half, int column)
    {
        bool falls = times[^1] < times[0] && Steps(times).Falling > Steps(times).Rising;
        double[] forward = times.ToArray();
        if (falls)
            for (int i = 0; i < forward.Length; i++)
                forward[i] = -forward[i];
        List<Piece>? pieces = Pieces.Of(forward, half);
        if (pieces is null || pieces.Count > Math.Max(1, times.Length / 4))
            throw Uneven(Pieces.NearestOf(forward, half));
        var whole = new List<Piece>();
        int alone = 0;
        foreach (Piece piece in pieces)
        {
            if (piece.Length < 2)
            {
                alone++;
                continue;
            }
            Spacing spacing = piece.Spacing ?? Nearly(Pieces.NearestOf(forward.AsSpan(piece.First, piece.Length), half));
            whole.Add(piece with { Spacing = falls ? Reversed(spacing) : spacing });
        }
        if (alone > 0)
            Doubt(FormattableString.Invariant($"{alone} samples stand alone between gaps in the times: left out"));
        if (whole.Count > 1)
            Doubt(FormattableString.Invariant($"the times fall back or jump {whole.Count - 1} times, first at row {whole[1].First + 1} (line {table.FirstLine + whole[1].First} if none is blank): {whole.Count} segments"));
        return whole.Count > 0 ? whole : throw new ImportException(capture.File, "expected times that go on from sample to sample, found none. Give --interval.", table.FirstLine, ColumnNumber(column));
    }

    private static (int Rising, int Falling) Steps(ReadOnlySpan<double> times)
    {
        int rising = 0, falling = 0;
        for (int i = 1; i < times.Length; i++)
            if (times[i] > times[i - 1])
                rising++;
            else if (times[i] < times[i - 1])
                falling++;
        return (rising, falling);
    }

    private static Spacing Reversed(Spacing s) => new(-s.Start, -s.Interval, -s.High, -s.Low, s.WorstDeviation, s.IsExact);

    private Spacing Nearly(Spacing nearest)
    {
        if (!(nearest.Interval > 0) || nearest.WorstDeviation > Jitter * nearest.Interval)
            throw Uneven(nearest);
        Doubt(FormattableString.Invariant($"the times leave an even spacing by up to {100 * nearest.WorstDeviation / nearest.Interval:G2} % of an interval; one interval was fitted"));
        return nearest;
    }

    private ImportException Uneven(Spacing nearest) => new(capture.File,
        FormattableString.Invariant($"expected evenly spaced times, found some that leave an even spacing by {nearest.WorstDeviation / Math.Abs(nearest.Interval):G3} intervals. Export the samples as they were taken, or give --interval."), table.FirstLine);

    private TimedPiece Timed(Piece piece, double factor, int column)
    {
        Spacing spacing = piece.Spacing!;
        bool falls = spacing.Interval < 0;
        if (falls)
        {
            Doubt("the times run backwards: the samples were turned round");
            spacing = Reversed(spacing) with { Start = spacing.Start + (piece.Length - 1) * spacing.Interval };
        }
        double interval = Scaled(spacing.Interval, factor), low = Scaled(spacing.Low, factor), high = Scaled(spacing.High, factor), start = Scaled(spacing.Start, factor);
        (low, high) = (Math.Min(low, interval), Math.Max(high, interval));
        if (!(low > 0) || !double.IsFinite(high))
            throw new ImportException(capture.File, "expected times that tell samples apart, found steps that could be 0 by their last digit. Give --interval or --rate.", table.FirstLine, ColumnNumber(column));
        capture.Note(new AxisReport(AxisSource.Column, "s", interval, low, high, Scaled(spacing.WorstDeviation, factor)));
        if (Stated(factor) is { } stated)
        {
            // A last bit apart is not a disagreement; a stated interval is printed to as many digits as its maker meant.
            if (stated >= low * (1 - 1e-9) && stated <= high * (1 + 1e-9))
            {
                if (high - low > 2 * Fine * interval)
                    Doubt($"the times are rounded; the interval that the preamble states, {Engineering.Format(stated, "s", 6)}, lies in their range and is used");
                return new TimedPiece(piece.First, piece.Length, new TimeAxis(start, stated, AxisSource.Column), falls);
            }
            Doubt(FormattableString.Invariant($"the preamble states an interval of {Engineering.Format(stated, "s", 6)}, the times say {Engineering.Format(interval, "s", 6)} ({(stated / interval - 1) * 1e6:G3} ppm off): the times are used"));
        }
        if (high - low > 2 * Fine * interval)
            Doubt(FormattableString.Invariant($"the times are printed too coarsely to know the interval better than ± {(high - low) / 2 / interval * 1e6:G3} ppm; --interval or --rate settles it"));
        return new TimedPiece(piece.First, piece.Length, new TimeAxis(start, interval, AxisSource.Column, low, high), falls);
    }

    // The interval that the preamble states, s; without a unit it is in seconds or in the unit of the times, whichever fits.
    private double? Stated(double factor)
    {
        if (table.Facts.Number(Fact.Interval, "s") is { Value: > 0 } interval)
            return interval.Unit is null ? InSeconds(interval.Value, factor) : interval.Value;
        return table.Facts.Number(Fact.Rate, "Hz", "Sa/s") is { Value: > 0 } rate && double.IsFinite(1 / rate.Value) ? 1 / rate.Value : null;
    }

    private double InSeconds(double value, double factor)
    {
        if (factor == 1)
            return value;
        double fitted = table.Axes.Where(a => a is { Rows: > 1 }).Select(a => Math.Abs(a!.Fit()?.Interval ?? 0)).FirstOrDefault();
        return Math.Abs(value / fitted - 1) < 0.01 ? Scaled(value, factor) : value;
    }

    private void Doubt(string sentence)
    {
        if (!capture.Doubts.Contains(sentence))
            capture.Doubts.Add(sentence);
    }

    // Printed numbers are decimal: 15 digits of the scaled one, where the scaling only cost the last bit.
    private static double Scaled(double value, double factor)
    {
        double scaled = UnitWords.Scale(value, factor), plain = double.Parse(scaled.ToString("G15", CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        return Math.Abs(plain - scaled) <= 3e-16 * Math.Abs(scaled) ? plain : scaled;
    }
}
