using ScopeReader.Captures;
using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Meaning;

/// <summary>Decides what each column of a block is for.</summary>
internal static class Roles
{
    private const int Enough = 3;

    /// <summary>The role of each column, from what the person says, then its label, then its first numbers.</summary>
    public static ColumnRole[] Of(TableShape shape, Label[] labels, ImportSettings settings)
    {
        var roles = new ColumnRole[labels.Length];
        for (int i = 0; i < roles.Length; i++)
            roles[i] = settings.Columns is { } given ? Given(given, shape.Columns[i]) : Labelled(labels[i]);
        if (settings.Columns is null && roles.Length > 1 && roles[0] == ColumnRole.Value && labels[0].Unit is null or "")
            roles[0] = ByNumbers(shape, labels);
        return roles;
    }

    private static ColumnRole Given(IReadOnlyList<string> columns, int index) => index >= columns.Count ? ColumnRole.Value : columns[index].ToUpperInvariant() switch
    {
        "TIME" => ColumnRole.Time,
        "FREQUENCY" => ColumnRole.Frequency,
        "SKIP" => ColumnRole.Skip,
        _ => ColumnRole.Value,
    };

    private static ColumnRole Labelled(Label label) => label.Unit switch
    {
        "s" => ColumnRole.Time,
        "Hz" => ColumnRole.Frequency,
        null or "" when TradeWords.IsTime(label.Name) => ColumnRole.Time,
        null or "" when TradeWords.IsFrequency(label.Name) => ColumnRole.Frequency,
        null or "" when TradeWords.IsIndex(label.Name) => ColumnRole.Index,
        _ => ColumnRole.Value,
    };

    // A first column without a telling label that rises evenly is an axis: whole numbers from 0 or 1 count the rows, others are times.
    private static ColumnRole ByNumbers(TableShape shape, Label[] labels)
    {
        double[] x = [.. First(shape, 0)];
        if (x.Length < Enough || !Rises(x))
            return ColumnRole.Value;
        if (x[0] is 0 or 1 && x.Zip(x.Skip(1), (a, b) => b - a).All(step => step == 1))
            return ColumnRole.Index;
        bool levels = labels.Length == 2 && (labels[1].Unit is { } unit ? unit.StartsWith("dB", StringComparison.Ordinal) : First(shape, 1).All(v => v is < 40 and > -200) && First(shape, 1).Average() < -20);
        return levels ? ColumnRole.Frequency : ColumnRole.Time;
    }

    private static bool Rises(double[] x)
    {
        double mean = (x[^1] - x[0]) / (x.Length - 1);
        for (int i = 1; i < x.Length; i++)
            if (x[i] < x[i - 1] || x[i] - x[i - 1] > 2.5 * mean)
                return false;
        return mean > 0;
    }

    private static IEnumerable<double> First(TableShape shape, int column)
    {
        int c = shape.Columns[column];
        foreach (string[] row in shape.Rows.Skip(shape.First))
            if (c < row.Length && Cell.Read(row[c], (byte)shape.Mark, out double value, out _) == CellKind.Number)
                yield return value;
    }
}
