using ScopeReader.Captures;
using ScopeReader.Files.Meaning;

namespace ScopeReader.Files.Structure;

/// <summary>Finds the block of numbers first; the text round it is read afterwards, for what it says about the block.</summary>
internal static class TableFinder
{
    private const int UnitRows = 20, FewRows = 10;
    private static readonly char[] s_delimiters = [',', ';', '\t', '|', RowSplitter.Spaces], s_besideCommas = [';', '\t', '|', RowSplitter.Spaces, ','];

    /// <summary>The best reading of some lines as a table; null where they hold no numbers.</summary>
    /// <param name="lines">Whole lines of UTF-8.</param>
    /// <param name="settings">What the person says about them.</param>
    /// <param name="firstLine">Index of the first line that may be data.</param>
    /// <exception cref="TooWideException">A line has more cells than any table.</exception>
    public static TableShape? Find(ReadOnlyMemory<byte> lines, ImportSettings settings, int firstLine)
    {
        TableShape? best = null;
        double bestScore = 0;
        foreach (char delimiter in settings.Delimiter is { } given ? [given] : settings.DecimalMark == ',' ? s_besideCommas : s_delimiters)
        {
            if (settings.Delimiter is null && best is not null && lines.Span.IndexOf((byte)delimiter) < 0)
                continue;
            List<string[]> rows = RowSplitter.Split(lines, delimiter);
            foreach (char mark in settings.DecimalMark is { } stated ? [stated] : (char[])['.', ','])
            {
                (TableShape? shape, double score) = Read(rows, delimiter, mark, firstLine);
                // Of readings that explain the text equally well, the first tried is the usual one.
                if (score > bestScore * 1.001 || (score > bestScore * 0.999 && IsBetterExplained(shape!, best!)))
                    (best, bestScore) = (shape, score);
            }
        }
        return best;
    }

    // A single column is read alike whatever separates columns; the preamble above it is not.
    private static bool IsBetterExplained(TableShape shape, TableShape best) =>
        shape.Width == 1 && best.Width == 1 && shape.Delimiter != RowSplitter.Spaces && shape.First > 0 && Numbers(shape) > Numbers(best);

    private static int Numbers(TableShape shape) => Preamble.Read(shape, Header.Read(shape)).Numbers;

    private static (TableShape? Shape, double Score) Read(List<string[]> rows, char delimiter, char mark, int from)
    {
        var cells = new Cell[rows.Count][];
        for (int r = 0; r < rows.Count; r++)
            cells[r] = r < from ? [] : Array.ConvertAll(rows[r], cell => Cell.Read(cell, mark));
        (int[] columns, int first, int sampled) = Block(rows, cells, rows.Count);
        if (first < 0)
            return (null, 0);
        // A table of another build may stand above the one with the most rows.
        while (Block(rows, cells, first) is { First: >= 0, Sampled: >= FewRows } above)
            (columns, first, sampled) = above;
        double score = 0;
        int named = 0;
        for (int r = first; r < rows.Count; r++)
            if (RowFit.Fits(cells[r], columns))
            {
                score += Explained(rows[r], cells[r]);
                if (cells[r][0].Kind == CellKind.Text && r < first + sampled)
                    named++;
            }
        // Words before the numbers in most rows: a list of settings or of results, not of samples.
        if (2 * named > sampled)
            return (null, 0);
        int[] units = RowFit.UnitColumns([.. rows.Skip(first).Take(Math.Min(sampled, UnitRows))], columns);
        return (new TableShape
        {
            Delimiter = delimiter,
            Mark = mark,
            Rows = rows,
            First = first,
            Columns = columns,
            UnitColumns = units,
            CellUnits = CellUnits(rows[first], cells[first], columns, units),
            Sampled = sampled,
        }, score);
    }

    private static (int[] Columns, int First, int Sampled) Block(List<string[]> rows, Cell[][] cells, int end)
    {
        var counts = new Dictionary<string, ColumnSet>();
        for (int r = 0; r < end; r++)
        {
            int[] numbers = RowFit.Numbers(cells[r]);
            if (numbers.Length == 0)
                continue;
            string key = string.Join(',', numbers);
            counts[key] = counts.TryGetValue(key, out ColumnSet? set) ? set.Seen(cells[r]) : new ColumnSet(0, numbers, false).Seen(cells[r]);
        }
        if (counts.Count == 0)
            return ([], -1, 0);
        int[] columns = Widen(counts.Values);
        (int first, int length) = FirstRun(rows, cells, columns, end);
        return (columns, first, length);
    }

    private static string?[] CellUnits(string[] row, Cell[] cells, int[] columns, int[] unitColumns)
    {
        string?[] units = new string?[columns.Length];
        for (int i = 0; i < units.Length; i++)
            units[i] = unitColumns[i] >= 0 && Label.TryUnit(row[unitColumns[i]], out _, out string unit) ? unit
                : columns[i] < cells.Length ? cells[columns[i]].Unit : null;
        return units;
    }

    // The set of columns that most rows fill with numbers; of two as common, the larger one. Tables side by side end at
    // different rows: columns that are filled in other rows, without words beside them, belong too.
    private static int[] Widen(ICollection<ColumnSet> sets)
    {
        int[] wide = sets.MaxBy(set => (long)set.Count * 10_000 + set.Columns.Length)!.Columns;
        foreach (ColumnSet set in sets)
            if (set.Count >= 3 && !set.HasText && set.Columns.Length > wide.Length && wide.All(set.Columns.Contains))
                wide = set.Columns;
        return wide;
    }

    // The first stretch of rows that fit, leaving out short ones before the table proper: lists of segments and the like.
    private static (int First, int Length) FirstRun(List<string[]> rows, Cell[][] cells, int[] columns, int end)
    {
        var runs = new List<(int First, int Length)>();
        int start = -1, length = 0;
        for (int r = 0; r <= end; r++)
        {
            if (r < end && RowFit.Fits(cells[r], columns))
            {
                if (length++ == 0)
                    start = r;
            }
            else if (length > 0 && !(r < end && RowFit.IsRemark(rows[r])))
            {
                runs.Add((start, length));
                length = 0;
            }
        }
        if (runs.Count == 0)
            return (-1, 0);
        int enough = Math.Min(10, (runs.Max(run => run.Length) + 3) / 4);
        return runs.First(run => run.Length >= enough);
    }

    // The share of a row's characters that this reading takes for numbers or delimiters.
    private static double Explained(string[] row, Cell[] cells)
    {
        int all = row.Length - 1, numbers = row.Length - 1;
        for (int c = 0; c < row.Length; c++)
        {
            all += row[c].Length;
            if (cells[c].Kind != CellKind.Text)
                numbers += row[c].Length;
        }
        return (double)numbers / all;
    }

    // Rows that fill the same columns with numbers: how many, and whether any of them has words in other columns.
    private sealed record ColumnSet(int Count, int[] Columns, bool HasText)
    {
        public ColumnSet Seen(Cell[] row) => this with { Count = Count + 1, HasText = HasText || row.Any(c => c.Kind == CellKind.Text) };
    }
}
