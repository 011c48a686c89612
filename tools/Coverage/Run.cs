using ScopeReader.Captures;

namespace ScopeReader.Coverage;

/// <summary>What came of one seed.</summary>
/// <param name="Case">The made case; null where making or measuring it threw.</param>
/// <param name="Channel">What was measured.</param>
/// <param name="Failure">The exception's text; null where there was none.</param>
internal sealed record Run(MadeCase? Case, ChannelMeasurement? Channel, string? Failure)
{
    public static Run Of(Scenario scenario, ulong seed)
    {
        try
        {
            MadeCase made = scenario.Draw(seed);
            var capture = new Capture("made", "", [made.Channel], []);
            return new Run(made, Analysis.Measure(capture, made.Plan).Channels[0], null);
        }
        catch (Exception e) // One seed that breaks an analyser must not hide what the others show.
        {
            return new Run(null, null, $"seed {seed}: {e.GetType().Name}: {e.Message.ReplaceLineEndings(" ")} {e.StackTrace?.Split('\n')[0].Trim()}");
        }
    }
}
