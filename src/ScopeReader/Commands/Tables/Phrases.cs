using System.Globalization;
using ScopeReader.Captures;
using ScopeReader.Files.Output;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Commands.Tables;

/// <summary>How the tables say what was measured.</summary>
internal static class Phrases
{
    private const string HarmonicPrefix = "harmonic-";

    /// <summary>A verdict in a word that stands out.</summary>
    public static string Of(VerdictOutcome outcome) => outcome switch
    {
        VerdictOutcome.Pass => "PASS",
        VerdictOutcome.Fail => "FAIL",
        VerdictOutcome.Undecided => "UNDECIDED",
        VerdictOutcome.NotMeasured => "NO READING",
        _ => "NOT APPLICABLE",
    };

    /// <summary>A file's outcome in a word that stands out.</summary>
    public static string Of(MeasuredFile file) => file switch
    {
        { Error: not null } => "UNREADABLE",
        { Outcome: Outcome.Unjudged } => "MEASURED",
        { Outcome: Outcome.Pass } => Of(VerdictOutcome.Pass),
        { Outcome: Outcome.Undecided } => Of(VerdictOutcome.Undecided),
        { Outcome: Outcome.Fail } => Of(VerdictOutcome.Fail),
        _ => Of(VerdictOutcome.NotMeasured),
    };

    /// <summary>A value with its uncertainty, the unit once: "455.012 ± 0.011 kHz".</summary>
    public static string Of(Reading reading)
    {
        (string value, string uncertainty, string unit) = Engineering.Parts(reading.Value, reading.Budget.ExpandedUncertainty, reading.Unit);
        string behind = uncertainty.Length == 0 ? "" : $"± {uncertainty}";
        if (unit is not ("1" or ""))
            behind += (behind.Length == 0 ? "" : " ") + SafeText.Of(unit);
        return behind.Length == 0 ? value : uncertainty.Length == 0 ? Sheet.Joined($"{value} {behind}") : $"{value} {Sheet.Joined(behind)}";
    }

    /// <summary>A limit: "limit -50 to 50 ppm", "limit at most 12 %".</summary>
    public static string Of(Limit limit, string unit)
    {
        string Bound(double value) => Number(value, unit, 6);
        string bounds = (limit.Low, limit.High) switch
        {
            ({ } low, { } high) => Range(Bound(low), Bound(high)),
            ({ } low, null) => "at least " + Bound(low),
            (null, { } high) => "at most " + Bound(high),
            _ => "",
        };
        string rule = limit.Rule == DecisionRule.Simple ? ", simple rule" : limit.Guard == 1 ? "" : string.Create(CultureInfo.InvariantCulture, $", guard {limit.Guard:G4}");
        return $"limit {bounds}{rule}";
    }

    /// <summary>A verdict after its word: the quantity, the reading, the limit.</summary>
    public static string Of(Verdict verdict) => verdict.Line is { } place ? Of(verdict, place) :
        $"{verdict.Limit.Quantity}{(verdict.Reading is { } reading ? " " + Of(reading) : "")}, {Of(verdict.Limit, OutputWords.Unit(verdict))}";

    // "limit line "mask": margin 2.3 ± 0.8 dB at 20.3 MHz, -52.3 dBm for at most -50 dBm".
    private static string Of(Verdict verdict, LinePlace place)
    {
        string name = $"limit line \"{SafeText.Of(place.Line.Name)}\"", unit = place.Line.Unit;
        string rule = verdict.Limit.Rule == DecisionRule.Simple ? ", simple rule" : verdict.Limit.Guard == 1 ? "" : string.Create(CultureInfo.InvariantCulture, $", guard {verdict.Limit.Guard:G4}");
        return verdict.Reading is not { } reading ? name + rule
            : $"{name}: margin {Of(reading)} at {Number(place.Frequency, "Hz", 5)}, {Sheet.Joined(string.Create(CultureInfo.InvariantCulture, $"{place.Level:F2} {unit}"))} for at {(place.Line.Side == LineSide.Upper ? "most" : "least")} {Number(place.LineLevel, unit, 5)}{rule}";
    }

    /// <summary>What a channel holds: "100000 samples, 10 ns apart".</summary>
    public static string Of(Channel channel) => channel switch
    {
        Waveform { Axis.IsTimed: true } w => string.Create(CultureInfo.InvariantCulture, $"{w.Count} samples, {Number(w.Interval, "s", 6)} apart"),
        Waveform w => string.Create(CultureInfo.InvariantCulture, $"{w.Count} samples, interval unknown"),
        SpectrumTrace t => string.Create(CultureInfo.InvariantCulture, $"{t.Count} points from {Number(t.Frequencies[0], "Hz", 6)} to {Number(t.Frequencies[^1], "Hz", 6)}"),
        _ => "",
    };

    /// <summary>A channel by its name, with its segment where it is not the first.</summary>
    public static string Name(Channel channel) =>
        SafeText.Of(channel.Name) + (channel.Segment > 1 ? string.Create(CultureInfo.InvariantCulture, $", segment {channel.Segment}") : "");

    /// <summary>How a reading was made, and what to know beside it.</summary>
    public static string How(Reading reading)
    {
        var parts = new List<string> { reading.Count is { } n ? string.Create(CultureInfo.InvariantCulture, $"{reading.Method}, n = {n}") : reading.Method };
        if (!reading.IsPrimary)
            parts.Add("for comparison");
        if (reading.Budget.Missing.Count > 0)
            parts.Add($"without {string.Join(", ", reading.Budget.Missing)}");
        if (reading.Note is { Length: > 0 } note)
            parts.Add(note);
        return SafeText.Of(string.Join("; ", parts));
    }

    /// <summary>Quantities in a row, runs of harmonics as "harmonic-2 to harmonic-10".</summary>
    public static string List(IEnumerable<Quantity> quantities)
    {
        var parts = new List<string>();
        int first = 0, last = 0;
        foreach (Quantity quantity in quantities.Append(null!))
        {
            int number = quantity is null ? 0 : HarmonicNumber(quantity);
            if (number > 0 && number == last + 1)
            {
                last = number;
                continue;
            }
            if (last > first + 1)
                parts.Add($"{HarmonicPrefix}{first} to {HarmonicPrefix}{last}");
            else
                parts.AddRange(Enumerable.Range(first, last > 0 ? last - first + 1 : 0).Select(k => HarmonicPrefix + k));
            (first, last) = (number, number);
            if (number == 0 && quantity is not null)
                parts.Add(quantity.Id);
        }
        return string.Join(", ", parts);
    }

    /// <summary>Number of a harmonic; 0 for any other quantity.</summary>
    public static int HarmonicNumber(Quantity quantity) =>
        quantity.Id.StartsWith(HarmonicPrefix, StringComparison.Ordinal) && int.TryParse(quantity.Id[HarmonicPrefix.Length..], CultureInfo.InvariantCulture, out int number) ? number : 0;

    /// <summary>A number that is given and not measured: so many digits at most, and no zeros that say nothing.</summary>
    public static string Number(double value, string unit, int digits) => Sheet.Joined(Engineering.Given(value, SafeText.Of(unit), digits));

    private static string Range(string low, string high)
    {
        int a = low.IndexOf(Sheet.Joint), b = high.IndexOf(Sheet.Joint);
        // The unit once, where both have the same.
        return a > 0 && b > 0 && low[a..] == high[b..] ? $"{low[..a]} to {high}" : $"{low} to {high}";
    }
}
