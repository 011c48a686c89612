using ScopeReader.Limits;
using Spectre.Console;

namespace ScopeReader.Commands.Tables;

/// <summary>Verdicts: the word, what was judged, and the reason wherever it is not a plain pass.</summary>
internal static class VerdictSection
{
    public static void Write(Sheet sheet, IReadOnlyList<Verdict> verdicts) =>
        sheet.Columns([.. verdicts.Select(v => new[] { Phrases.Of(v.Outcome), Text(v) })], row => Ink(verdicts[row].Outcome));

    /// <summary>A verdict on one line, for --quiet.</summary>
    public static string Line(string file, ChannelMeasurement channel, Verdict verdict) =>
        $"{Phrases.Of(verdict.Outcome)}  {SafeText.Of(file)} {Phrases.Name(channel.Channel)}: {Text(verdict).Replace('\n', ' ').Replace(Sheet.Joint, ' ')}";

    /// <summary>The colour that goes with the word.</summary>
    public static Style Ink(VerdictOutcome outcome) => outcome switch
    {
        VerdictOutcome.Pass => new Style(Color.Green),
        VerdictOutcome.Fail => new Style(Color.Red, decoration: Decoration.Bold),
        VerdictOutcome.NotApplicable => Style.Plain,
        _ => new Style(Color.Yellow),
    };

    private static string Text(Verdict verdict)
    {
        bool plain = verdict.Outcome == VerdictOutcome.Pass && verdict.Limit.Rule == DecisionRule.Guarded;
        string text = Phrases.Of(verdict);
        return plain ? text : $"{text}:\n{SafeText.Of(verdict.Reason)}";
    }
}
