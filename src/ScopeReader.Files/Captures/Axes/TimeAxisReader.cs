using ScopeReader.Captures;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Rows;
using ScopeReader.Readings;

namespace ScopeReader.Files.Axes;

/// <summary>Settles when the rows of a block were taken: by the person, by a column, by the preamble, or not at all.</summary>
internal sealed class TimeAxisReader(CaptureBuilder capture, Table table)
{
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
        double factor = FactorOf(label);
        if (capture.Settings.Interval is { } given)
            return Given(given, fitted, factor, times);
        if (times.Rows < 2)
            throw new ImportException(capture.File, "expected times of two samples or more, found one. Export the whole capture.", table.FirstLine, ColumnNumber(column));

        var pieces = new List<TimedPiece>();
        if (fitted is { } spacing)
            pieces.Add(Timed(new Piece(0, times.Rows, spacing), factor, column));
        else if (TimePairs.Of(times.Values(), times.WidestHalf) is { } paired)
        {
            capture.Doubt("each time stands twice: read as the lowest and the highest sample of every interval, two channels");
            pieces.Add(Timed(new Piece(0, times.Rows / 2, paired), factor, column) with { IsPaired = true });
        }
        else
            foreach (Piece piece in new TimeCutter(capture, table).Cut(times.Values(), times.WidestHalf, ColumnNumber(column)))
                pieces.Add(Timed(piece, factor, column));
        return pieces;
    }

    private int ColumnNumber(int column) => table.Shape.Columns[column] + 1;

    private List<TimedPiece> WithoutColumn()
    {
        (double? interval, AxisSource source) = capture.Settings.Interval is { } given ? (given, AxisSource.Option) : (StatedInterval.Of(table, 1), AxisSource.Preamble);
        if (interval is not { } step)
        {
            capture.Note(new AxisReport(AxisSource.None, "sample", null, null, null, null));
            capture.Doubt("the file states no sample interval: readings are per sample until --interval or --rate is given");
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

    private double FactorOf(Label label)
    {
        if (label.Unit is { Length: > 0 })
            return label.Factor;
        if (table.Facts.Word(Fact.AxisUnit) is { } word && Label.TryUnit(word, out double factor, out string stated) && stated == "s")
            return factor;
        if (capture.Settings.Interval is null)
            capture.Doubt($"the unit of the times ({(label.Name.Length > 0 ? Excerpt.Of(label.Name, 20) : "the first column")}) is not stated: taken as seconds");
        return 1;
    }

    // The interval is the person's; where the stretches begin is still the column's.
    private List<TimedPiece> Given(double interval, Spacing? fitted, double factor, AxisColumn times)
    {
        if (fitted is { } spacing && (interval < StatedInterval.Scaled(spacing.Low, factor) * (1 - 1e-9) || interval > StatedInterval.Scaled(spacing.High, factor) * (1 + 1e-9)))
            capture.Doubt($"the interval given, {Engineering.Format(interval, "s", 6)}, is not that of the times, {Engineering.Format(StatedInterval.Scaled(spacing.Interval, factor), "s", 6)}; the one given is used");
        capture.Note(new AxisReport(AxisSource.Option, "s", interval, interval, interval, null));
        if (fitted is not null)
        {
            bool falls = fitted.Interval < 0;
            double first = falls ? fitted.Start + (times.Rows - 1) * fitted.Interval : fitted.Start;
            return [new TimedPiece(0, times.Rows, new TimeAxis(StatedInterval.Scaled(first, factor), interval, AxisSource.Option), falls)];
        }
        return TimeCutter.BetweenFalls(times.Values(), times.WidestHalf)
            .ConvertAll(p => new TimedPiece(p.First, p.Length, new TimeAxis(StatedInterval.Scaled(times.Values()[p.First], factor), interval, AxisSource.Option)));
    }

    private TimedPiece Timed(Piece piece, double factor, int column)
    {
        Spacing spacing = piece.Spacing!;
        bool falls = spacing.Interval < 0;
        if (falls)
        {
            capture.Doubt("the times run backwards: the samples were turned round");
            spacing = spacing.Reversed() with { Start = spacing.Start + (piece.Length - 1) * spacing.Interval };
        }
        double interval = StatedInterval.Scaled(spacing.Interval, factor), low = StatedInterval.Scaled(spacing.Low, factor), high = StatedInterval.Scaled(spacing.High, factor), start = StatedInterval.Scaled(spacing.Start, factor);
        (low, high) = (Math.Min(low, interval), Math.Max(high, interval));
        if (!(low > 0) || !double.IsFinite(high))
            throw new ImportException(capture.File, "expected times that tell samples apart, found steps that could be 0 by their last digit. Give --interval or --rate.", table.FirstLine, ColumnNumber(column));
        capture.Note(new AxisReport(AxisSource.Column, "s", interval, low, high, StatedInterval.Scaled(spacing.WorstDeviation, factor)));
        if (StatedInterval.Of(table, factor) is { } stated)
        {
            // A last bit apart is not a disagreement; a stated interval is printed to as many digits as its maker meant.
            if (stated >= low * (1 - 1e-9) && stated <= high * (1 + 1e-9))
            {
                if (high - low > 2 * Fine * interval)
                    capture.Doubt($"the times are rounded; the interval that the preamble states, {Engineering.Format(stated, "s", 6)}, lies in their range and is used");
                return new TimedPiece(piece.First, piece.Length, new TimeAxis(start, stated, AxisSource.Column), falls);
            }
            capture.Doubt($"the preamble states an interval of {Engineering.Format(stated, "s", 6)}, the times say {Engineering.Format(interval, "s", 6)} ({Engineering.Format((stated / interval - 1) * 1e6, "ppm", 3)} off): the times are used");
        }
        if (high - low > 2 * Fine * interval)
            capture.Doubt($"the times are printed too coarsely to know the interval better than ± {Engineering.Format((high - low) / 2 / interval * 1e6, "ppm", 2)}; --interval or --rate settles it");
        return new TimedPiece(piece.First, piece.Length, new TimeAxis(start, interval, AxisSource.Column, low, high), falls);
    }
}
