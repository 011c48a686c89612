using System.Globalization;
using ScopeReader.Bench.Drawing;
using ScopeReader.Limits;
using ScopeReader.Readings;

namespace ScopeReader.Bench.Work;

/// <summary>How the bench says what was measured: verdicts and stages in a word, readings and limits in a phrase.</summary>
internal static class Words
{
    private static readonly NumberFormatInfo Grouped = new() { NumberGroupSeparator = " " };

    /// <summary>A verdict in a word, and its ink.</summary>
    public static (string Word, Ink Ink) Of(VerdictOutcome outcome) => outcome switch
    {
        VerdictOutcome.Pass => ("pass", Ink.Pass),
        VerdictOutcome.Fail => ("FAIL", Ink.Fail),
        VerdictOutcome.Undecided => ("undecided", Ink.Undecided),
        VerdictOutcome.NotMeasured => ("no reading", Ink.Undecided),
        _ => ("n/a", Ink.Quiet),
    };

    /// <summary>How a capture stands, in a word.</summary>
    public static (string Word, Ink Ink) Of(OpenCapture capture) => capture.Stage switch
    {
        CaptureStage.Waiting => ("waiting", Ink.Quiet),
        CaptureStage.Reading => ("reading", Ink.Quiet),
        CaptureStage.Measuring => (capture.Progress > 0 ? string.Create(CultureInfo.InvariantCulture, $"{100 * capture.Progress:F0} % done") : "measuring", Ink.Quiet),
        CaptureStage.Unreadable => ("unreadable", Ink.Fail),
        _ => Of(capture.Measurement!.Outcome),
    };

    private static (string, Ink) Of(Outcome outcome) => outcome switch
    {
        Outcome.Pass => Of(VerdictOutcome.Pass),
        Outcome.Fail => Of(VerdictOutcome.Fail),
        Outcome.Undecided => Of(VerdictOutcome.Undecided),
        Outcome.Error => Of(VerdictOutcome.NotMeasured),
        _ => ("measured", Ink.Quiet),
    };

    /// <summary>A limit as a phrase: "−50 … 50 ppm", "≤ 12 %".</summary>
    public static string Of(Limit limit)
    {
        string unit = limit.Quantity.Unit;
        return (limit.Low, limit.High) switch
        {
            ({ } low, { } high) => Range(low, high, unit),
            ({ } low, null) => "≥ " + Number(low, unit),
            (null, { } high) => "≤ " + Number(high, unit),
            _ => "",
        };
    }

    /// <summary>A count with thin groups of three: "20 000".</summary>
    public static string Count(int count) => count.ToString("#,0", Grouped);

    /// <summary>A number with a true minus sign.</summary>
    public static string Minus(string number) => number.StartsWith('-') ? "−" + number[1..] : number;

    /// <summary>A reading as a phrase: "455.012 kHz ± 0.011 kHz".</summary>
    public static string Of(Reading reading) => Minus(Engineering.Format(reading.Value, reading.Budget.ExpandedUncertainty, reading.Unit));

    /// <summary>A number that a person wrote, with no more digits than that took: "12 %", "10 ns".</summary>
    public static string Number(double value, string unit) => Minus(Shorter(Engineering.Format(value, unit, 5)));

    private static string Range(double low, double high, string unit)
    {
        (string from, string to) = (Number(low, unit), Number(high, unit));
        int a = from.IndexOf(' '), b = to.IndexOf(' ');
        // The unit once, where both ends have the same.
        return a > 0 && b > 0 && from[a..] == to[b..] ? $"{from[..a]} … {to}" : $"{from} … {to}";
    }

    // A person who wrote 12 % does not want to read 12.000 %.
    private static string Shorter(string text)
    {
        int end = text.IndexOf(' ');
        (string number, string rest) = end < 0 ? (text, "") : (text[..end], text[end..]);
        return (number.Contains('.') ? number.TrimEnd('0').TrimEnd('.') : number) + rest;
    }
}
