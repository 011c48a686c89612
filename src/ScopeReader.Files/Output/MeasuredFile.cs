namespace ScopeReader.Files.Output;

/// <summary>A file as it came out: measured, or why it could not be read.</summary>
/// <param name="File">The file as the person named it.</param>
/// <param name="Measurement">What was measured; null where the file could not be read.</param>
/// <param name="Error">Why it could not be read; null where it was.</param>
public sealed record MeasuredFile(string File, Measurement? Measurement, string? Error)
{
    /// <summary>How the file came out: <see cref="Outcome.Error"/> where it could not be read.</summary>
    public Outcome Outcome => Measurement?.Outcome ?? Outcome.Error;

    /// <summary>The outcome of two files together: error, fail, undecided, pass, unjudged, whichever of these comes first in one of them.</summary>
    public static Outcome Worst(Outcome one, Outcome other) => one > other ? one : other;
}
