namespace ScopeReader.Captures;

/// <summary>One column of a capture: a <see cref="Waveform"/> or a <see cref="SpectrumTrace"/>.</summary>
public abstract class Channel
{
    private protected Channel(string name, string unit, int segment)
    {
        ArgumentException.ThrowIfNullOrEmpty(name);
        ArgumentNullException.ThrowIfNull(unit);
        ArgumentOutOfRangeException.ThrowIfLessThan(segment, 1);
        (Name, Unit, Segment) = (name, unit, segment);
    }

    /// <summary>The channel's name in the file, or "channel 1" where the file has none.</summary>
    public string Name { get; }

    /// <summary>Unit of the values, without prefix: V, A, dBm, dBV, dBµV, W. Empty where the file states none.</summary>
    public string Unit { get; }

    /// <summary>Number of the segment that these samples belong to, from 1.</summary>
    public int Segment { get; }

    /// <summary>How many samples or points there are.</summary>
    public abstract int Count { get; }
}
