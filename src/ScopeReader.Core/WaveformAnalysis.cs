namespace ScopeReader;

/// <summary>The order in which a waveform is measured: each stage builds on the ones before.</summary>
public static class WaveformAnalysis
{
    /// <summary>Runs every analyser that suits the waveform.</summary>
    public static void Measure(WaveformJob job)
    {
        ArgumentNullException.ThrowIfNull(job);
    }
}
