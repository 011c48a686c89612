using ScopeReader.Captures;

namespace ScopeReader.Files.Meaning;

/// <summary>What a preamble's words on detector and averaging say of a spectrum trace.</summary>
internal static class AveragingWords
{
    /// <summary>What the trace averages; unknown where the words leave it open.</summary>
    public static TraceAveraging Of(Facts facts)
    {
        string detector = facts.Word(Fact.Detector) ?? "", averaging = facts.Word(Fact.Averaging) ?? "";
        if (Has(detector, "peak", "max", "spitze"))
            return TraceAveraging.Peak;
        if (Has(detector, "rms") || Has(averaging, "rms", "power", "leistung"))
            return TraceAveraging.Power;
        if (Has(averaging, "log", "video", "dB"))
            return TraceAveraging.Level;
        return Has(averaging, "volt", "linear", "spannung") ? TraceAveraging.Voltage : TraceAveraging.Unknown;
    }

    private static bool Has(string text, params ReadOnlySpan<string> words)
    {
        foreach (string word in words)
            if (text.Contains(word, StringComparison.OrdinalIgnoreCase))
                return true;
        return false;
    }
}
