using ScopeReader.Files.Numbers;
using ScopeReader.Files.Structure;
using ScopeReader.Files.Text;

namespace ScopeReader.Files.Rows;

/// <summary>The quick way through rows of nothing but numbers; any other row stops it and is read the long way.</summary>
/// <remarks>One pass over the bytes: a number's end is found as its digits are read. The text is split at line ends over the
/// cores; each part writes behind the rows that the parts before it have lines for.</remarks>
internal sealed unsafe class PlainRows
{
    private const int SmallestPart = 1 << 17, MostParts = 4;

    private readonly Table _table;
    private readonly byte _delimiter, _mark;
    private readonly int[] _columnOfCell;

    private PlainRows(Table table)
    {
        _table = table;
        (_delimiter, _mark) = ((byte)table.Shape.Delimiter, (byte)table.Shape.Mark);
        _columnOfCell = new int[table.Shape.Columns[^1] + 1];
        for (int c = 0; c < _columnOfCell.Length; c++)
        {
            int column = Array.IndexOf(table.Shape.Columns, c);
            _columnOfCell[c] = column >= 0 && (table.Samples[column] is not null || table.Axes[column] is not null) ? column : -1;
        }
    }

    /// <summary>The quick way for a table; null where its rows are of another kind.</summary>
    public static PlainRows? For(Table table) =>
        table.Shape.UnitColumns.All(u => u < 0) && table.Shape.CellUnits.All(u => u is null) && table.Shape.Delimiter < 128 ? new PlainRows(table) : null;

    /// <summary>Reads rows until one is not plain.</summary>
    /// <param name="lines">Whole lines, with <see cref="TextWindow.Slack"/> bytes more behind them that may be looked at.</param>
    /// <param name="rows">How many rows were read.</param>
    /// <returns>How many bytes were read.</returns>
    public int Read(ReadOnlySpan<byte> lines, out int rows)
    {
        int parts = Math.Clamp(lines.Length / SmallestPart, 1, Math.Min(MostParts, Environment.ProcessorCount));
        int[] starts = new int[parts + 1], firstRows = new int[parts + 1], ends = new int[parts], found = new int[parts];
        for (int k = 1; k <= parts; k++)
        {
            int near = Math.Max(starts[k - 1], (int)((long)lines.Length * k / parts));
            starts[k] = k == parts ? lines.Length : near + lines[near..].IndexOf((byte)'\n') + 1;
            firstRows[k] = firstRows[k - 1] + lines[starts[k - 1]..starts[k]].Count((byte)'\n');
        }
        Target[] targets = Reserve(firstRows[parts]);
        fixed (byte* text = lines)
        {
            nint at = (nint)text;
            Task[] others = new Task[parts - 1];
            for (int k = 1; k < parts; k++)
            {
                int part = k;
                others[k - 1] = Task.Run(() => ends[part] = starts[part] + Parse((byte*)at + starts[part], (byte*)at + starts[part + 1], firstRows[part], targets, out found[part]));
            }
            ends[0] = Parse((byte*)at, (byte*)at + starts[1], 0, targets, out found[0]);
            Task.WaitAll(others);
        }
        rows = 0;
        int done = 0;
        for (int k = 0; k < parts; k++)
        {
            rows += found[k];
            done = ends[k];
            if (done < starts[k + 1])
                break; // The parts behind a row that is not plain stand in the wrong rows: they are read again.
        }
        for (int i = 0; i < _table.Roles.Length; i++)
        {
            _table.Samples[i]?.Commit(rows);
            _table.Axes[i]?.Commit(rows);
        }
        _table.Rows += rows;
        return done;
    }

    // Where the numbers of each cell of a row go; null for cells that nobody wants.
    private Target[] Reserve(int rows) => Array.ConvertAll(_columnOfCell, i =>
    {
        if (i < 0)
            return default;
        if (_table.Samples[i] is { } samples)
            return new Target(samples.Reserve(rows) + samples.Count, null);
        AxisColumn axis = _table.Axes[i]!;
        double* values = axis.Reserve(rows, out double* halves);
        return new Target(values, halves);
    });

    private readonly struct Target(double* values, double* halves)
    {
        public readonly double* Values = values, Halves = halves;
    }

    // Bytes read of a part, whose rows are written from a row on.
    private int Parse(byte* start, byte* end, int row, Target[] targets, out int rows)
    {
        byte delimiter = _delimiter, mark = _mark;
        bool isSpaced = delimiter == RowSplitter.Spaces;
        byte* p = start;
        int first = row, last = targets.Length - 1;
        fixed (double* powers = NumberParser.Powers, halfOf = NumberParser.Halves)
        fixed (Target* target = targets)
            while (p < end)
            {
                byte* line = p;
                for (int c = 0; c <= last; c++)
                {
                    while (*p == ' ')
                        p++;
                    if (target[c].Values == null)
                    {
                        while (*p != delimiter && *p != '\n' && *p != '"')
                            p++;
                    }
                    else
                    {
                        p = PlainNumber.Read(p, mark, powers, out double value, out int lastDigit);
                        if (p == null)
                            goto NotPlain;
                        target[c].Values[row] = value;
                        if (target[c].Halves != null)
                            target[c].Halves[row] = lastDigit is >= -NumberParser.HalfRange and <= NumberParser.HalfRange ? halfOf[lastDigit + NumberParser.HalfRange] : NumberParser.HalfOf(lastDigit);
                        byte* behind = p;
                        while (*p == ' ')
                            p++;
                        if (isSpaced && p > behind)
                            p--; // One space is the delimiter.
                    }
                    if (c < last && *p++ != delimiter)
                        goto NotPlain;
                }
                if (*p == delimiter)
                    p++;
                if (*p == '\r')
                    p++;
                if (*p != '\n')
                    goto NotPlain;
                p++;
                row++;
                continue;
            NotPlain:
                p = line;
                break;
            }
        rows = row - first;
        return (int)(p - start);
    }
}
