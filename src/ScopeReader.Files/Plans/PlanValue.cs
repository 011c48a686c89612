using System.Globalization;
using ScopeReader.Readings;
using Tomlyn.Syntax;

namespace ScopeReader.Files.Plans;

/// <summary>A key's value in a plan, read as what the key needs or refused with its place.</summary>
internal sealed class PlanValue(PlanDocument document, string key, int line, ValueSyntax syntax)
{
    public string Key => key;

    public int Line => line;

    /// <summary>A refusal that names the file, the line and the key.</summary>
    public PlanException Wrong(string problem) => new(document.File, line, $"{key}: {problem}");

    /// <summary>A refusal of a word that the reader does not know.</summary>
    public PlanException Unknown(string kind, string word, IEnumerable<string> known) =>
        new(document.File, line, $"unknown {kind} \"{word}\"; {NearestWord.Hint(word, [.. known])}");

    public string Text() => syntax is StringValueSyntax { Value: { } text } ? text : throw Wrong($"expected text in quotes, found {Found}");

    /// <summary>A value with its unit, in the base unit.</summary>
    public double Amount(string unit, double least = double.NegativeInfinity)
    {
        // A number that needs no unit reads the same with and without quotes.
        string text = unit == "1" && Plain is { } plain ? plain : syntax is StringValueSyntax { Value: { } quoted } ? quoted
            : throw Wrong($"expected text with a number and its unit, such as \"{PlanUnits.Example(unit)}\", found {Found}");
        if (!Units.TryParse(text, unit, out double value, out string problem))
            throw PlanUnits.MistypedUnit(text, unit) is { } nearest
                ? new PlanException(document.File, line, $"{key}: unknown unit \"{PlanUnits.UnitOf(text)}\"; the nearest is {nearest}")
                : Wrong(problem);
        return value >= least ? value : throw Wrong($"expected {AtLeast(least, unit)}, found {Found}");
    }

    /// <summary>A value above zero with its unit.</summary>
    public double Positive(string unit)
    {
        double value = Amount(unit);
        return value > 0 ? value : throw Wrong($"expected more than zero, found {Found}");
    }

    /// <summary>A value in whatever unit it has; a plain number has the unit 1.</summary>
    public (double Value, string Unit) AnyAmount()
    {
        string text = Plain ?? Text();
        if (!Units.TryParse(text, out double value, out string unit))
            throw PlanUnits.UnitOf(text) is { Length: > 0 } suffix && suffix.Length < text.Trim().Length
                ? new PlanException(document.File, line, $"{key}: unknown unit \"{suffix}\"; the nearest is {NearestWord.Of(suffix, PlanUnits.All)}")
                : Wrong($"expected a number with its unit, such as \"5.0 V\", found {Found}");
        return (value, unit.Length == 0 ? "1" : unit);
    }

    public int WholeNumber(int least, int most)
    {
        string text = Plain ?? Text();
        return int.TryParse(text, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out int value) && value >= least && value <= most
            ? value
            : throw Wrong(string.Create(CultureInfo.InvariantCulture, $"expected a whole number from {least} to {most}, found {Found}"));
    }

    public DateOnly Date()
    {
        if (syntax is DateTimeValueSyntax date && date.Kind != SyntaxKind.LocalTime)
            return DateOnly.FromDateTime(date.Value.DateTime.DateTime);
        return syntax is StringValueSyntax { Value: { } text } && DateOnly.TryParseExact(text.Trim(), "yyyy-MM-dd", CultureInfo.InvariantCulture, DateTimeStyles.None, out DateOnly day)
            ? day
            : throw Wrong($"expected a date, such as 2026-03-31, found {Found}");
    }

    /// <summary>One of a few words.</summary>
    public T Choice<T>(params ReadOnlySpan<(string Word, T Meaning)> words)
    {
        string text = Text();
        var known = new List<string>();
        foreach ((string word, T meaning) in words)
        {
            if (word == text)
                return meaning;
            known.Add(word);
        }
        throw Wrong($"expected {string.Join(" or ", known)}, found {Found}; the nearest is {NearestWord.Of(text, known)}");
    }

    /// <summary>The items of a list, each a value of its own.</summary>
    public IReadOnlyList<PlanValue> Items() => syntax is ArraySyntax array
        ? [.. array.Items.Select(item => new PlanValue(document, key, item.Value!.Span.Start.Line + 1, item.Value))]
        : throw Wrong($"expected a list in [ ], found {Found}");

    /// <summary>A percentage: a plain number, or text with its unit.</summary>
    public double Percent() => Number() ?? Amount("%");

    /// <summary>A plain number; null where it is text.</summary>
    public double? Number() => Plain is { } plain && double.TryParse(plain, NumberStyles.Float, CultureInfo.InvariantCulture, out double value) && double.IsFinite(value) ? value : null;

    /// <summary>The value as the file has it, short enough for a line.</summary>
    public string Found => Written is { Length: > 60 } text ? text[..57] + "..." : Written;

    /// <summary>The value as the file has it.</summary>
    public string Written => document.Text[Start..End];

    /// <summary>The value without quotes and brackets, for a sentence.</summary>
    public string Said => syntax switch
    {
        StringValueSyntax { Value: { } text } => text,
        ArraySyntax => string.Join(", ", Items().Select(i => i.Said)),
        _ => Written,
    };

    /// <summary>Where it begins in the file's text.</summary>
    public int Start => syntax.Span.Start.Offset;

    /// <summary>Where it ends: the first character that is not its own.</summary>
    public int End => syntax.Span.End.Offset + 1;

    // TOML's own numbers, as text; underscores between digits are TOML's.
    private string? Plain => syntax switch
    {
        IntegerValueSyntax integer => integer.Value.ToString(CultureInfo.InvariantCulture),
        FloatValueSyntax real => real.Value.ToString("R", CultureInfo.InvariantCulture),
        _ => null,
    };

    private static string AtLeast(double least, string unit) => least == 0 ? "zero or more" : $"at least {Engineering.Format(least, unit)}";
}
