using ScopeReader.Files.Text;

namespace ScopeReader.Files.Rows;

/// <summary>The quick way through rows of nothing but numbers; any other row stops it and is read the long way.</summary>
/// <remarks>The text is split at line ends over the cores; each part writes behind the rows that the parts before it have lines
/// for, so that the result is the same for any number of them.</remarks>
internal sealed unsafe class PlainRows
{
    private const int SmallestPart = 1 << 17, MostParts = 4;

    private readonly Table _table;
    private readonly PlainCell[] _cells;
    private readonly PlainRowParser _parser;
    private int _reach = int.MaxValue;

    private PlainRows(Table table, PlainCell[] cells) => (_table, _cells, _parser) = (table, cells, new PlainRowParser(table.Shape, cells.Length));

    /// <summary>True where the last call was stopped by a row that is not plain.</summary>
    public bool IsStopped { get; private set; }

    /// <summary>The quick way for a table; null where its rows are of another kind.</summary>
    public static PlainRows? For(Table table) => table.Shape.Delimiter < 128 && PlainCell.Of(table) is { } cells ? new PlainRows(table, cells) : null;

    /// <summary>Reads rows until one is not plain.</summary>
    /// <param name="lines">Whole lines, with <see cref="TextWindow.Slack"/> bytes more behind them that may be looked at.</param>
    /// <param name="rows">How many rows were read.</param>
    /// <returns>How many bytes were read.</returns>
    public int Read(ReadOnlySpan<byte> lines, out int rows)
    {
        // Where rows of another kind are frequent, what lies behind the next of them would be read in vain.
        if (lines.Length > _reach)
            lines = lines[..(lines[.._reach].LastIndexOf((byte)'\n') + 1)];
        int parts = Math.Clamp(lines.Length / SmallestPart, 1, Math.Min(MostParts, Environment.ProcessorCount));
        int[] starts = new int[parts + 1], firstRows = new int[parts + 1], ends = new int[parts], found = new int[parts];
        for (int k = 1; k <= parts; k++)
        {
            int near = Math.Max(starts[k - 1], (int)((long)lines.Length * k / parts));
            starts[k] = k == parts ? lines.Length : near + lines[near..].IndexOf((byte)'\n') + 1;
            firstRows[k] = firstRows[k - 1] + lines[starts[k - 1]..starts[k]].Count((byte)'\n');
        }
        PlainCell[] cells = Reserve(firstRows[parts]);
        fixed (byte* text = lines)
        {
            nint at = (nint)text;
            Task[] others = new Task[parts - 1];
            for (int k = 1; k < parts; k++)
            {
                int part = k;
                others[k - 1] = Task.Run(() => Parse(part));
            }
            try
            {
                Parse(0);
            }
            finally
            {
                // Nobody may still read the text when it is let go of.
                Task.WaitAll(others);
            }

            void Parse(int k) => ends[k] = (int)(_parser.Parse((byte*)at + starts[k], (byte*)at + starts[k + 1], firstRows[k], cells, out found[k]) - (byte*)at);
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
        Commit(rows);
        IsStopped = done < lines.Length;
        _reach = IsStopped ? SmallestPart / 2 : (int)Math.Min(2L * _reach, int.MaxValue);
        return done;
    }

    // Where the numbers of each cell of the next row go.
    private PlainCell[] Reserve(int rows)
    {
        PlainCell[] cells = [.. _cells];
        for (int i = 0; i < _table.Roles.Length; i++)
        {
            ref PlainCell cell = ref cells[_table.Shape.Columns[i]];
            if (_table.Samples[i] is { } samples)
                cell.Values = samples.Reserve(rows) + samples.Count;
            else if (_table.Axes[i] is { } axis)
            {
                cell.Values = axis.Reserve(rows, out double* halves);
                cell.Halves = halves;
            }
        }
        return cells;
    }

    private void Commit(int rows)
    {
        for (int i = 0; i < _table.Roles.Length; i++)
        {
            _table.Samples[i]?.Commit(rows);
            _table.Axes[i]?.Commit(rows);
        }
        _table.Rows += rows;
    }
}
