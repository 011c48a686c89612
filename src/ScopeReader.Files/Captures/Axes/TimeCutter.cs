using ScopeReader.Files.Rows;

namespace ScopeReader.Files.Axes;

/// <summary>Cuts a column of times that is not evenly spaced as a whole into stretches that are.</summary>
internal sealed class TimeCutter(CaptureBuilder capture, Table table)
{
    // Printed times that leave an even spacing by more than this share of an interval are not one capture's.
    private const double Jitter = 0.1;

    /// <summary>The stretches, each with its spacing.</summary>
    /// <param name="times">Shape [n], as printed; NaN where one is missing.</param>
    /// <param name="half">Half of the widest last digit.</param>
    /// <param name="column">Number of the column, from 1, for messages.</param>
    /// <exception cref="ImportException">The times are not those of evenly spaced samples.</exception>
    public List<Piece> Cut(ReadOnlySpan<double> times, double half, int column)
    {
        bool falls = Falls(times);
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
            whole.Add(piece with { Spacing = falls ? spacing.Reversed() : spacing });
        }
        if (alone > 0)
            capture.Doubt(FormattableString.Invariant($"{alone} samples stand alone between gaps in the times: left out"));
        if (whole.Count > 1)
            capture.Doubt(FormattableString.Invariant($"the times fall back or jump {whole.Count - 1} times, first at row {whole[1].First + 1} (line {table.FirstLine + whole[1].First} if none is blank): {whole.Count} segments"));
        return whole.Count > 0 ? whole : throw new ImportException(capture.File, "expected times that go on from sample to sample, found none. Give --interval.", table.FirstLine, column);
    }

    /// <summary>The stretches between falls of the times, whatever their spacing; one, where they are no record's times.</summary>
    /// <param name="times">Shape [n], as printed; NaN where one is missing.</param>
    /// <param name="half">Half of the widest last digit.</param>
    public static List<Piece> BetweenFalls(ReadOnlySpan<double> times, double half)
    {
        var pieces = new List<Piece>();
        int start = 0;
        for (int i = 1; i <= times.Length; i++)
            if (i == times.Length || (times[i] < times[i - 1] - 2 * half && !double.IsNaN(times[start])))
            {
                pieces.Add(new Piece(start, i - start, null));
                start = i;
            }
        return pieces.Count <= Math.Max(1, times.Length / 4) && pieces.All(p => p.Length > 1) && !double.IsNaN(times[0]) ? pieces : [new Piece(0, times.Length, null)];
    }

    private static bool Falls(ReadOnlySpan<double> times)
    {
        int rising = 0, falling = 0;
        for (int i = 1; i < times.Length; i++)
            if (times[i] > times[i - 1])
                rising++;
            else if (times[i] < times[i - 1])
                falling++;
        return times[^1] < times[0] && falling > rising;
    }

    private Spacing Nearly(Spacing nearest)
    {
        if (!(nearest.Interval > 0) || nearest.WorstDeviation > Jitter * nearest.Interval)
            throw Uneven(nearest);
        capture.Doubt(FormattableString.Invariant($"the times leave an even spacing by up to {100 * nearest.WorstDeviation / nearest.Interval:G2} % of an interval; one interval was fitted"));
        return nearest;
    }

    private ImportException Uneven(Spacing nearest) => new(capture.File,
        FormattableString.Invariant($"expected evenly spaced times, found some that leave an even spacing by {nearest.WorstDeviation / Math.Abs(nearest.Interval):G3} intervals. Export the samples as they were taken, or give --interval."), table.FirstLine);
}
