namespace ScopeReader.Readings;

/// <summary>What a limit on a quantity can be set against.</summary>
[Flags]
public enum CaptureKinds
{
    /// <summary>Waveforms have it.</summary>
    Waveform = 1,

    /// <summary>Spectrum traces have it.</summary>
    Spectrum = 2,
}

/// <summary>Something measured.</summary>
/// <param name="Id">Its identifier, kebab-case: <c>rise-time</c>.</param>
/// <param name="Unit">Base unit of its values: Hz, s, ppm, %, dBc, 1; V stands for the channel's own unit.</param>
/// <param name="Meaning">What it is, in a sentence without a full stop.</param>
/// <param name="Source">Where the definition stands.</param>
/// <param name="Kinds">The kinds of capture that have it.</param>
public sealed record Quantity(string Id, string Unit, string Meaning, string Source, CaptureKinds Kinds)
{
    /// <inheritdoc/>
    public override string ToString() => Id;
}
