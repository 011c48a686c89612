using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Files.Meaning;
using ScopeReader.Files.Rows;

namespace ScopeReader.Files;

/// <summary>A column of samples, with its name and unit settled.</summary>
/// <param name="Index">Index of the column in its table.</param>
/// <param name="Axis">Index of the axis column in its table, or -1.</param>
/// <param name="Name">The channel's name.</param>
/// <param name="Unit">The base unit.</param>
/// <param name="Factor">What one of the printed unit is in it.</param>
internal sealed record SampleSource(int Index, int Axis, string Name, string Unit, double Factor)
{
    /// <summary>The columns of samples of a table.</summary>
    public static List<SampleSource> Of(Table table, ImportSettings settings)
    {
        var sources = new List<SampleSource>();
        int values = table.Roles.Count(r => r == ColumnRole.Value), firstAxis = Array.FindIndex(table.Roles, r => r is ColumnRole.Time or ColumnRole.Frequency), axis = firstAxis;
        for (int i = 0; i < table.Roles.Length; i++)
        {
            if (table.Axes[i] is not null)
                axis = i;
            if (table.Roles[i] != ColumnRole.Value)
                continue;
            int column = table.Shape.Columns[i];
            (string unit, double factor) = UnitOf(table, i);
            sources.Add(new SampleSource(i, axis, NameOf(table, settings, i, column, sources, values), unit, factor));
        }
        return sources;
    }

    private static string NameOf(Table table, ImportSettings settings, int i, int column, List<SampleSource> before, int values)
    {
        string name = settings.Columns is { } given && column < given.Count ? given[column] : table.Header.Labels[i].Name;
        if (name.Length == 0 && values == 1 && table.Facts.Word(Fact.Channel) is { } stated)
            name = stated;
        name = Excerpt.Of(name);
        if (name.Length == 0)
            return string.Create(CultureInfo.InvariantCulture, $"channel {before.Count + 1}");
        // Two channels of one name could not be told apart by --channel.
        return before.Any(s => s.Name == name) ? string.Create(CultureInfo.InvariantCulture, $"{name} ({before.Count + 1})") : name;
    }

    private static (string Unit, double Factor) UnitOf(Table table, int i)
    {
        Label label = table.Header.Labels[i];
        if (label.Unit is { Length: > 0 } unit)
            return (unit, label.Factor);
        return table.Facts.Word(Fact.ValueUnit) is { } word && Label.TryUnit(word, out double factor, out string stated) ? (stated, factor) : ("", 1);
    }
}
