using System.Globalization;
using ScopeReader.Limits;

namespace ScopeReader.Files.Plans;

/// <summary>Reads one [[limit-line]] of a plan.</summary>
internal static class LimitLineReader
{
    private const string Example = "[[\"1 MHz\", -40], [\"30 MHz\", -60]]";

    public static LimitLine Read(PlanSection section, string file)
    {
        var values = new Dictionary<string, PlanValue>(StringComparer.Ordinal);
        foreach ((string key, PlanValue value) in section.Entries)
            if (!values.TryAdd(PlanKeyList.Find(PlanKeyList.LimitLine, key)?.Name ?? throw value.Unknown("key", key, PlanKeyList.NamesIn(PlanKeyList.LimitLine)), value))
                throw value.Wrong("stated twice");
        foreach ((string key, string example) in (ReadOnlySpan<(string, string)>)[("name", "\"harmonics\""), ("unit", "\"dBm\""), ("points", Example)])
            if (!values.ContainsKey(key))
                throw new PlanException(file, section.Line, $"this limit line has no {key}; add {key} = {example}, or another");

        string name = values["name"].Text(), unit = values["unit"].Text();
        if (name.Length == 0)
            throw values["name"].Wrong("expected a name, found none");
        unit = LimitLine.Units.FirstOrDefault(u => u.Equals(unit.Replace('\u03bc', 'µ').Replace("uV", "µV", StringComparison.Ordinal), StringComparison.OrdinalIgnoreCase))
            ?? throw values["unit"].Wrong($"expected {string.Join(" or ", LimitLine.Units)}, found {values["unit"].Found}");
        LineInterpolation interpolation = values.GetValueOrDefault("interpolation")?.Choice(("linear", LineInterpolation.Linear), ("log", LineInterpolation.Logarithmic)) ?? LineInterpolation.Linear;
        PlanValue points = values["points"];
        (double Frequency, double Level)[] read = [.. points.Items().Select(p => Point(p, unit))];
        if (read.Length < 2)
            throw points.Wrong($"expected two points or more, such as {Example}, found {points.Found}");
        if (LimitLine.Problem(read, interpolation) is var (number, problem))
            throw points.Items()[number - 1].Wrong(string.Create(CultureInfo.InvariantCulture, $"point {number} {problem}"));
        return new LimitLine(name, unit, read, interpolation)
        {
            Side = values.GetValueOrDefault("side")?.Choice(("upper", LineSide.Upper), ("lower", LineSide.Lower)) ?? LineSide.Upper,
            Rule = values.GetValueOrDefault("rule")?.Choice(("guarded", DecisionRule.Guarded), ("simple", DecisionRule.Simple)) ?? DecisionRule.Guarded,
            Guard = values.GetValueOrDefault("guard")?.Amount("1", 0) ?? 1,
        };
    }

    // A level is a plain number in the line's unit, or text with that unit.
    private static (double Frequency, double Level) Point(PlanValue point, string unit) => point.Items() is [var frequency, var level]
        ? (frequency.Amount("Hz"), level.Number() ?? level.Amount(unit))
        : throw point.Wrong($"expected a frequency and a level, such as [\"1 MHz\", -40], found {point.Found}");
}
