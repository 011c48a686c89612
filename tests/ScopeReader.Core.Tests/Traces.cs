using ScopeReader.Signals;

namespace ScopeReader.Tests;

/// <summary>The made trace that most tests of spectra begin with.</summary>
internal static class Traces
{
    /// <summary>A line of -10 dBm at 455.3 kHz and two harmonics of -35 and -50 dBc, without noise: 5 kHz wide in points of 1 kHz.</summary>
    public static readonly SpectrumLines Lines = new()
    {
        Lines = [new(455.3e3, -10), new(2 * 455.3e3, -45), new(3 * 455.3e3, -60)],
        Start = 100e3,
        Stop = 2.1e6,
        Count = 2001,
        ResolutionBandwidth = 5e3,
    };
}
