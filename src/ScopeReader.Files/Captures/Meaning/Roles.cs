using ScopeReader.Captures;
using ScopeReader.Files.Structure;

namespace ScopeReader.Files.Meaning;

/// <summary>Decides what each column of a block is for.</summary>
internal static class Roles
{
    private const int Enough = 3;
    private const double LeastFrequency = 1000;

    /// <summary>The role of each column, from what the person says, then its label, then its first numbers.</summary>
    /// <exception cref="ImportException">Two columns, or two meanings of one, could be the axis.</exception>
    public static ColumnRole[] Of(string file, TableShape shape, Header header, Facts facts, ImportSettings settings, long startLine)
    {
        Label[] labels = header.Labels;
        if (settings.Columns is { } given)
            return Array.ConvertAll(shape.Columns, c => Given(given, c));
        ColumnRole[] roles = Array.ConvertAll(labels, Labelled);
        for (int i = 0; i < roles.Length; i++)
            if (roles[i] is ColumnRole.Index or ColumnRole.Time && labels[i].Unit is null or "" && shape.CellUnits[i] is null)
                roles[i] = Counted(shape, i, roles[i]);
        int axis = Array.FindIndex(roles, r => r is ColumnRole.Time or ColumnRole.Frequency);
        if (axis < 0 && roles.Length > 1 && roles[0] == ColumnRole.Value && labels[0].Unit is null or "")
            roles[0] = ByNumbers(file, shape, labels, facts, startLine);
        else if (axis > 0 && roles[0] == ColumnRole.Value && labels[0] is { Name: "", Unit: null } && IsCount([.. First(shape, 0)]))
            roles[0] = ColumnRole.Index;
        if (axis >= 0)
            KeepMeasuredTimes(file, shape, labels, roles, axis, startLine);
        RepeatAxis(shape, labels, roles);
        return roles;
    }

    // Without names, an axis of a later channel is a column that steps exactly as the first axis does.
    private static void RepeatAxis(TableShape shape, Label[] labels, ColumnRole[] roles)
    {
        int axis = Array.FindIndex(roles, r => r is ColumnRole.Time or ColumnRole.Frequency);
        if (axis < 0)
            return;
        double[] x = [.. First(shape, axis)];
        for (int i = axis + 2; i < roles.Length - 1; i++)
            if (roles[i] == ColumnRole.Value && labels[i] is { Name: "", Unit: null } && First(shape, i).SequenceEqual(x))
                roles[i] = roles[axis];
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

    // Without a unit, 0, 1, 2 … are row numbers even under the name of a time; a row number that isn't whole is a time.
    private static ColumnRole Counted(TableShape shape, int column, ColumnRole role)
    {
        double[] x = [.. First(shape, column)];
        if (x.Length < 2)
            return role;
        if (IsCount(x))
            return ColumnRole.Index;
        return role == ColumnRole.Index && Rises(x) && !x.All(double.IsInteger) ? ColumnRole.Time : role;
    }

    // A first column without a telling label that rises evenly is an axis: whole numbers that count are row numbers.
    private static ColumnRole ByNumbers(string file, TableShape shape, Label[] labels, Facts facts, long startLine)
    {
        double[] x = [.. First(shape, 0)];
        if (x.Length < Enough || !Rises(x, WidestHalf(shape, 0)))
            return ColumnRole.Value;
        if (IsCount(x))
            return ColumnRole.Index;
        bool decibels = labels[1].Unit is { } unit ? unit.StartsWith("dB", StringComparison.Ordinal) : First(shape, 1).DefaultIfEmpty(0).All(v => v is < 40 and > -200) && First(shape, 1).DefaultIfEmpty(0).Average() < -20;
        bool spectral = facts.Number(Fact.ResolutionBandwidth, "Hz") is not null || facts.Number(Fact.Stop, "Hz") is { Unit: not null } || facts.Number(Fact.Span, "Hz") is not null;
        if (spectral || (decibels && x[^1] >= LeastFrequency))
            return ColumnRole.Frequency;
        bool timed = facts.Number(Fact.Interval, "s") is not null || facts.Number(Fact.Rate, "Hz") is not null;
        if (timed || x[^1] - x[0] < LeastFrequency)
            return ColumnRole.Time;
        throw new ImportException(file, FormattableString.Invariant($"expected an axis in s or Hz, found a first column without a name from {x[0]:G6} to {x[^1]:G6}: times or frequencies. ")
            + "Give --columns time or --columns frequency.", startLine + shape.First, 1);
    }

    // Beside an axis, a second column of times or frequencies is an axis of its own only if it rises evenly before more values.
    private static void KeepMeasuredTimes(string file, TableShape shape, Label[] labels, ColumnRole[] roles, int axis, long startLine)
    {
        for (int i = 0; i < roles.Length; i++)
        {
            if (i == axis || roles[i] is not (ColumnRole.Time or ColumnRole.Frequency))
                continue;
            bool leadsValues = i + 1 < roles.Length && roles[i + 1] == ColumnRole.Value;
            double[] x = [.. First(shape, i)];
            bool isAxis = leadsValues && x.Length >= 2 && (Rises(x) || Rises([.. x.Reverse()]));
            if (isAxis && i == axis + 1 && roles[i] != roles[axis])
                throw new ImportException(file, $"expected one axis, found two: {Excerpt.Of(labels[axis].Name, 20)} in column {shape.Columns[axis] + 1} and {Excerpt.Of(labels[i].Name, 20)} in column {shape.Columns[i] + 1}. "
                    + "Give --columns with time or frequency for the axis and skip for the other.", startLine + shape.First);
            if (!isAxis)
                roles[i] = i == axis + 1 && roles[i] == ColumnRole.Time && roles[axis] == ColumnRole.Time && leadsValues ? ColumnRole.Skip : ColumnRole.Value;
        }
    }

    private static bool IsCount(double[] x)
    {
        for (int i = 1; i < x.Length; i++)
            if (x[i] != x[i - 1] + 1)
                return false;
        return double.IsInteger(x[0]);
    }

    private static bool Rises(double[] x, double half = 0)
    {
        double mean = (x[^1] - x[0]) / (x.Length - 1);
        for (int i = 1; i < x.Length; i++)
            if (x[i] < x[i - 1] || x[i] - x[i - 1] > 2.5 * mean + 2 * half)
                return false;
        return mean > 0;
    }

    // Times printed to few digits step by none or by a last digit; whole numbers do not come from rounding.
    private static double WidestHalf(TableShape shape, int column)
    {
        double widest = 0;
        foreach (string[] row in shape.Rows.Skip(shape.First).Take(Math.Max(shape.Sampled, 1)))
            if (shape.Columns[column] < row.Length && Cell.Read(row[shape.Columns[column]], shape.Mark) is { Kind: CellKind.Number, Half: < 0.5 } cell)
                widest = Math.Max(widest, cell.Half);
        return widest;
    }

    private static IEnumerable<double> First(TableShape shape, int column)
    {
        int c = shape.Columns[column];
        foreach (string[] row in shape.Rows.Skip(shape.First).Take(Math.Max(shape.Sampled, 1)))
            if (c < row.Length && Cell.Read(row[c], shape.Mark) is { Kind: CellKind.Number } cell)
                yield return cell.Value;
    }
}
