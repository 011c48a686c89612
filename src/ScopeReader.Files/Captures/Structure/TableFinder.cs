using ScopeReader.Captures;

namespace ScopeReader.Files.Structure;

/// <summary>Finds the block of numbers first; the text round it is read afterwards, for what it says about the block.</summary>
internal static class TableFinder
{
    private static readonly char[] s_delimiters = [',', ';', '\t', '|', RowSplitter.Spaces];

    /// <summary>The best reading of some lines as a table; null where they hold no numbers.</summary>
    /// <param name="lines">Whole lines of UTF-8.</param>
    /// <param name="settings">What the person says about them.</param>
    public static TableShape? Find(ReadOnlyMemory<byte> lines, ImportSettings settings)
    {
        TableShape? best = null;
        double bestScore = 0;
        foreach (char delimiter in settings.Delimiter is { } given ? [given] : s_delimiters)
        {
            List<string[]> rows = RowSplitter.Split(lines, delimiter);
            foreach (char mark in settings.DecimalMark is { } stated ? [stated] : (char[])['.', ','])
            {
                (TableShape? shape, double score) = Read(rows, delimiter, mark, (settings.FirstLine ?? 1) - 1);
                // A thousandth: of readings that explain the text equally well, the first tried is the usual one.
                if (score > bestScore * 1.001)
                    (best, bestScore) = (shape, score);
            }
        }
        return best;
    }

    private static (TableShape? Shape, double Score) Read(List<string[]> rows, char delimiter, char mark, int from)
    {
        var kinds = new CellKind[rows.Count][];
        var counts = new Dictionary<string, (int Count, int[] Columns)>();
        for (int r = from; r < rows.Count; r++)
        {
            kinds[r] = [.. rows[r].Select(cell => Cell.Read(cell, (byte)mark, out _, out _))];
            int[] numbers = [.. Enumerable.Range(0, kinds[r].Length).Where(c => kinds[r][c] == CellKind.Number)];
            if (numbers.Length == 0)
                continue;
            string key = string.Join(',', numbers);
            counts[key] = (counts.GetValueOrDefault(key).Count + 1, numbers);
        }
        if (counts.Count == 0)
            return (null, 0);
        // The set of columns that most rows fill with numbers; of two as common, the larger one.
        int[] columns = counts.Values.MaxBy(c => (long)c.Count * 1000 + c.Columns.Length).Columns;
        int first = -1, sampled = 0;
        double score = 0;
        for (int r = from; r < rows.Count; r++)
        {
            if (!Fits(kinds[r], columns))
                continue;
            if (first < 0)
                first = r;
            sampled++;
            score += Explained(rows[r], kinds[r]);
        }
        return first < 0 ? (null, 0) : (new TableShape { Delimiter = delimiter, Mark = mark, Rows = rows, First = first, Columns = columns, Sampled = sampled }, score);
    }

    /// <summary>True where a row fills all the columns with numbers or with words that stand for one.</summary>
    private static bool Fits(CellKind[] kinds, int[] columns)
    {
        int numbers = 0;
        foreach (int c in columns)
        {
            if (c >= kinds.Length || kinds[c] is CellKind.Text or CellKind.Empty)
                return false;
            if (kinds[c] == CellKind.Number)
                numbers++;
        }
        return numbers > 0;
    }

    // The share of a row's characters that this reading takes for numbers or delimiters.
    private static double Explained(string[] cells, CellKind[] kinds)
    {
        int all = cells.Length - 1, numbers = cells.Length - 1;
        for (int c = 0; c < cells.Length; c++)
        {
            all += cells[c].Length;
            if (kinds[c] != CellKind.Text)
                numbers += cells[c].Length;
        }
        return (double)numbers / all;
    }
}
